//! Quantities.
pub mod dimension;
pub use dimension::{Dimension, Exponent};
