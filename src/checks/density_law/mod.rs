//! Density law: does the Boussinesq law hold, and is it the law that the case needs?
//!
//! One file a check. `criterion` works the criteria out for a medium, a span and a height; `assess` does so for the
//! regions of a case and turns what is over a limit into findings; `criteria` lists them all.

pub mod adiabatic_lapse;
pub mod assess;
pub mod buoyancy_error;
pub mod closed_gas_pressure;
pub mod conductivity_drift;
pub mod constant_with_buoyancy;
pub mod criteria;
pub mod criterion;
pub mod density_maximum;
pub mod density_span;
pub mod dissipation_number;
mod drift;
pub mod expansion_drift;
pub mod heat_capacity_drift;
pub mod hydrostatic_span;
pub mod law_heavier_than_needed;
pub mod low_mach;
mod reference;
pub mod reference_off_centre;
pub mod reference_outside_span;
mod remedy;
pub mod viscosity_drift;

pub use criteria::{Criterion, criteria};
pub use criterion::{CriterionValues, evaluate};
