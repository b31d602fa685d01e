//! The list of the checks. Adding one is a file and a line here.

use super::check::Check;
use super::*;

/// Every check, by family.
pub static CHECKS: &[&Check] = &[
    // writing
    &writing::unreadable_line::CHECK,
    &writing::line_too_complex::CHECK,
    &writing::unknown_word::CHECK,
    &writing::misplaced_statement::CHECK,
    &writing::missing_statement::CHECK,
    &writing::repeated_statement::CHECK,
    &writing::missing_argument::CHECK,
    &writing::unexpected_argument::CHECK,
    &writing::unknown_name::CHECK,
    &writing::repeated_name::CHECK,
    &writing::unused_name::CHECK,
    &writing::circular_definition::CHECK,
    &writing::no_finite_value::CHECK,
    &writing::sweep_without_end::CHECK,
    &writing::sweep_unpaired::CHECK,
    &writing::sweep_too_large::CHECK,
    &writing::include_not_found::CHECK,
    &writing::include_circular::CHECK,
    &writing::include_outside::CHECK,
    &writing::include_too_deep::CHECK,
    // units
    &units::dimension_mismatch::CHECK,
    &units::unknown_unit::CHECK,
    &units::bare_number::CHECK,
    &units::temperature_kind::CHECK,
    &units::unit_spacing::CHECK,
    &units::gauge_or_absolute::CHECK,
    &properties::likely_unit_slip::CHECK,
    // properties
    &properties::property_off_library::CHECK,
    &properties::property_elsewhere::CHECK,
    &properties::properties_disagree::CHECK,
    &properties::expansion_not_at_reference::CHECK,
    &properties::outside_property_range::CHECK,
    &properties::phase_change::CHECK,
    &properties::not_physical::CHECK,
    // density law
    &density_law::density_span::CHECK,
    &density_law::buoyancy_error::CHECK,
    &density_law::expansion_drift::CHECK,
    &density_law::viscosity_drift::CHECK,
    &density_law::conductivity_drift::CHECK,
    &density_law::heat_capacity_drift::CHECK,
    &density_law::density_maximum::CHECK,
    &density_law::hydrostatic_span::CHECK,
    &density_law::adiabatic_lapse::CHECK,
    &density_law::dissipation_number::CHECK,
    &density_law::reference_outside_span::CHECK,
    &density_law::reference_off_centre::CHECK,
    &density_law::closed_gas_pressure::CHECK,
    &density_law::low_mach::CHECK,
    &density_law::law_heavier_than_needed::CHECK,
    &density_law::constant_with_buoyancy::CHECK,
];
