//! Quantities: dimensions, units, their names, and how numbers are written for people.
//!
//! Everything inside the tool is SI. This room reads the units that people write and writes SI values back in units that
//! people read; it knows nothing of decks.

pub mod dimension;
pub mod dimension_names;
pub mod display;
mod exponent;
pub mod mend;
pub mod prefix;
pub mod problem;
pub mod suggest;
pub mod unit;
pub mod unit_parser;
pub mod unit_table;

pub use dimension::{Dimension, Exponent};
pub use dimension_names::usual_units;
pub use problem::UnitProblem;
pub use unit::{Scale, Unit, parse_unit};
