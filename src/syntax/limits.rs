//! The bounds that keep any text harmless. Each has a finding that names it.

/// Largest file that is read, in bytes. 8 MiB is about 200,000 lines, far beyond any deck written by hand.
pub const FILE_BYTES: usize = 8 * 1024 * 1024;
/// Longest line that is parsed, in bytes. A list of some thousand values fits.
pub const LINE_BYTES: usize = 32 * 1024;
/// Deepest nesting of brackets in a line. Checked before the grammar sees the text, because the parser
/// recurses once a level and its own limit is global to the process.
pub const NESTING: usize = 48;
/// Most operators in one expression: bounds the depth of its tree.
pub const OPERATORS: usize = 200;
