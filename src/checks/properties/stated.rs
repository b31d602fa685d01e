//! The property values that a deck states for its fluids, each beside the substance's own: what the checks of the
//! family share.

use crate::case::model::{Case, DensityLaw, Fluid, Value};
use crate::checks::Subject;
use crate::quantity::dimension_names as dimension;
use crate::quantity::display::{format_in, format_si};
use crate::quantity::{Dimension, parse_unit};
use crate::substances::{Medium, Properties};

/// Pressure where the deck gives none, Pa.
const STANDARD_PRESSURE: f64 = 101_325.0;

/// A property that a fluid may state.
#[derive(Debug)]
pub struct PropertyRow {
    /// Its name in a sentence, which is also the statement's words without hyphens.
    pub name: &'static str,
    /// Its symbol.
    pub symbol: &'static str,
    /// Its dimension.
    pub dimension: Dimension,
    /// The value as stated.
    pub stated: fn(&Fluid) -> Option<&Value>,
    /// The substance's own.
    pub own: fn(&Properties) -> f64,
    /// Units in which its number is often quoted.
    pub units: &'static [&'static str],
}

/// Every property that a fluid may state.
pub static PROPERTIES: &[PropertyRow] = &[
    PropertyRow {
        name: "density",
        symbol: "ρ",
        dimension: dimension::DENSITY,
        stated: |fluid| fluid.density.as_ref(),
        own: |properties| properties.density,
        units: &["kg/m^3", "g/cm^3", "lb/ft^3", "lb/gal"],
    },
    PropertyRow {
        name: "expansion",
        symbol: "α",
        dimension: dimension::THERMAL_EXPANSION,
        stated: |fluid| fluid.expansion.as_ref(),
        own: |properties| properties.expansion,
        units: &["1/K", "1/kK", "ppm/K", "1/degF"],
    },
    PropertyRow {
        name: "viscosity",
        symbol: "μ",
        dimension: dimension::DYNAMIC_VISCOSITY,
        stated: |fluid| fluid.viscosity.as_ref(),
        own: |properties| properties.viscosity,
        units: &["Pa.s", "mPa.s", "µPa.s", "P", "lb/(ft.s)", "lb/(ft.h)"],
    },
    PropertyRow {
        name: "kinematic viscosity",
        symbol: "ν",
        dimension: dimension::KINEMATIC_VISCOSITY,
        stated: |fluid| fluid.kinematic_viscosity.as_ref(),
        own: Properties::kinematic_viscosity,
        units: &["m^2/s", "mm^2/s", "cm^2/s", "ft^2/s", "ft^2/h", "m^2/h"],
    },
    PropertyRow {
        name: "conductivity",
        symbol: "k",
        dimension: dimension::THERMAL_CONDUCTIVITY,
        stated: |fluid| fluid.conductivity.as_ref(),
        own: |properties| properties.conductivity,
        units: &["W/m/K", "mW/m/K", "W/cm/K", "cal/(s.cm.K)", "Btu/(h.ft.degF)"],
    },
    PropertyRow {
        name: "diffusivity",
        symbol: "a",
        dimension: dimension::KINEMATIC_VISCOSITY,
        stated: |fluid| fluid.diffusivity.as_ref(),
        own: Properties::diffusivity,
        units: &["m^2/s", "mm^2/s", "cm^2/s", "ft^2/s", "ft^2/h", "m^2/h"],
    },
    PropertyRow {
        name: "heat capacity",
        symbol: "cp",
        dimension: dimension::SPECIFIC_HEAT_CAPACITY,
        stated: |fluid| fluid.heat_capacity.as_ref(),
        own: |properties| properties.heat_capacity,
        units: &["J/kg/K", "kJ/kg/K", "cal/g/K", "cal/kg/K"],
    },
    PropertyRow {
        name: "Prandtl number",
        symbol: "Pr",
        dimension: Dimension::NONE,
        stated: |fluid| fluid.prandtl.as_ref(),
        own: Properties::prandtl,
        units: &[],
    },
];

/// A fluid of a known substance at its reference.
#[derive(Debug)]
pub struct AtReference<'a> {
    /// The fluid.
    pub fluid: &'a Fluid,
    /// The substance.
    pub medium: Medium<'a>,
    /// T0, K.
    pub temperature: f64,
    /// Pressure, Pa.
    pub pressure: f64,
    /// The substance's properties there.
    pub own: Properties,
}

/// The fluids of known substance whose reference is known and lies within the substance's data.
pub fn at_reference<'a>(subject: &Subject<'a>) -> Vec<AtReference<'a>> {
    let case = subject.case;
    let fluids = case.fluids.iter().enumerate();
    fluids
        .filter_map(|(index, fluid)| {
            let medium = Medium::of(case, fluid)?;
            let temperature = reference_temperature(subject, index, fluid)?;
            let pressure = reference_pressure(case, fluid);
            let own = medium.properties(temperature, pressure)?;
            Some(AtReference { fluid, medium, temperature, pressure, own })
        })
        .collect()
}

/// T0 of a fluid, K: as stated, else as the physics took it for a region.
pub fn reference_temperature(subject: &Subject<'_>, index: usize, fluid: &Fluid) -> Option<f64> {
    if let Some(stated) = &fluid.reference_temperature {
        return stated.is_known().then_some(stated.si);
    }
    let states = subject.physics.regions.iter().filter_map(|region| region.fluid.as_ref());
    states.filter(|state| state.index == index).map(|state| state.reference_temperature).find(|value| value.is_finite())
}

/// The pressure of a fluid, Pa: as stated, else the ambient one, else one standard atmosphere.
pub fn reference_pressure(case: &Case, fluid: &Fluid) -> f64 {
    let stated = fluid.reference_pressure.as_ref().or(case.ambient_pressure.as_ref());
    stated.map_or(STANDARD_PRESSURE, |value| value.si)
}

/// Whether a fluid is a gas: its substance is, or its density follows the ideal-gas law.
pub fn is_gas(case: &Case, fluid: &Fluid) -> bool {
    let follows_law = fluid.density_law.is_some_and(|law| law.value == DensityLaw::IdealGas);
    follows_law || Medium::of(case, fluid).is_some_and(|medium| medium.is_gas())
}

/// By how much two values of one sign differ, whichever is the greater: 0.05 is 5 %, 1 a factor 2. Infinite where the
/// signs differ, `NaN` where one is not known.
pub fn deviation(stated: f64, own: f64) -> f64 {
    let ratio = stated / own;
    if ratio.is_nan() {
        f64::NAN
    } else if ratio <= 0.0 {
        f64::INFINITY
    } else {
        ratio.max(1.0 / ratio) - 1.0
    }
}

/// A value as the deck writes it: in its own unit where it has one.
pub fn as_written(value: &Value) -> String {
    in_unit_of(value.si, value)
}

/// Another SI value of the same kind, in the unit of `like`.
pub fn in_unit_of(si: f64, like: &Value) -> String {
    format_in(si, &like.origin.unit).unwrap_or_else(|| format_si(si, like.dimension))
}

/// The number that stands in the deck before the unit. For a gauge unit this is not known.
pub fn number_written(value: &Value) -> Option<f64> {
    if value.origin.unit.is_empty() {
        return value.dimension.is_none().then_some(value.si);
    }
    let unit = parse_unit(&value.origin.unit).ok()?;
    (unit.scale != crate::quantity::Scale::Gauge).then(|| unit.from_si(value.si)).filter(|number| number.is_finite())
}

/// A temperature that a value points to, to the whole degree: no more is meant by it.
pub fn about(kelvin: f64) -> String {
    format!("{} degC", (kelvin - 273.15).round() + 0.0)
}

/// A number as it would be written again: without the digits that conversion to SI and back leaves.
pub fn rewritten(number: f64) -> String {
    let rounded: f64 = format!("{number:.11e}").parse().unwrap_or(number);
    let size = rounded.abs();
    if size != 0.0 && !(1e-4..1e7).contains(&size) { format!("{rounded:e}") } else { format!("{rounded}") }
}
