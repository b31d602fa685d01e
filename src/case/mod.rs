//! The resolved case: names, SI values, kinds of temperature, origins.

pub mod compiled;
pub mod model;
