//! Units: do dimensions and kinds of temperature fit? Found while the deck is resolved.

pub mod bare_number;
pub mod dimension_mismatch;
pub mod gauge_or_absolute;
pub mod temperature_kind;
pub mod unit_spacing;
pub mod unknown_unit;
