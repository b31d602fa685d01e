//! Files, includes, practice files, and the pass over a deck from text to findings.

pub mod analyse;
pub mod deck;
pub mod includes;
pub mod overlay;
pub mod practice;
pub mod read;
pub mod sweep;
pub mod walk;

pub use analyse::{Options, analyse, analyse_text};
pub use deck::{Deck, SourceFile};
pub use read::{Disk, Problem, Read};
