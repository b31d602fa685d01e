//! Writing: is the deck well written? Found while it is read and resolved.

pub mod circular_definition;
pub mod include_circular;
pub mod include_not_found;
pub mod include_outside;
pub mod include_too_deep;
pub mod line_too_complex;
pub mod misplaced_statement;
pub mod missing_argument;
pub mod missing_statement;
pub mod no_finite_value;
pub mod repeated_name;
pub mod repeated_statement;
pub mod sweep_too_large;
pub mod sweep_unpaired;
pub mod sweep_without_end;
pub mod unexpected_argument;
pub mod unknown_name;
pub mod unknown_word;
pub mod unreadable_line;
pub mod unused_name;
