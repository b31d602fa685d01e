//! Property data: the built-in substances (`data/*.buoy`), and the evaluation of any substance at a temperature and
//! pressure. A substance of the deck is evaluated by the same code.

pub mod forms;
pub mod library;
pub mod medium;
mod table;

pub use library::library;
pub use medium::{Medium, Properties};
