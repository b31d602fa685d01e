//! Properties: are the values those of the substance, do they agree with one another, and can they be at all? Beside
//! these, `likely-unit-slip` of the family units, which the same data decide.
//!
//! One file a check. `stated` sets each stated value beside the substance's own, `judge` decides which check speaks of
//! it, the `slip` files look for the unit that was meant.

pub mod expansion_not_at_reference;
mod judge;
pub mod likely_unit_slip;
pub mod not_physical;
pub mod outside_property_range;
pub mod phase_change;
pub mod properties_disagree;
pub mod property_elsewhere;
pub mod property_off_library;
pub(super) mod slip;
mod slip_of_number;
mod slip_of_property;
mod slip_of_size;
pub(super) mod slip_of_state;
mod stated;
