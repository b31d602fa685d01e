//! What the substance library says of the fluid that a place in the deck is about.

use super::spot::Spot;
use crate::case::model::{Case, Fluid};
use crate::quantity::{Dimension, display};
use crate::substances::{Medium, Properties};
use crate::vocabulary::EntryKind;
use crate::vocabulary::statements::{
    CONDUCTIVITY, DENSITY, DIFFUSIVITY, EXPANSION, HEAT_CAPACITY, NUMBER, PRESSURE, TEMPERATURE, VISCOSITY,
};

/// Standard atmosphere, Pa (CGPM 1954, Resolution 4): where neither the fluid nor the case states a pressure.
const STANDARD_ATMOSPHERE: f64 = 101_325.0;

/// A property of a fluid: how a deck calls it, its symbol, its dimension, and its value.
pub struct PropertyRow {
    /// The statement's word.
    pub word: &'static str,
    /// Its symbol.
    pub symbol: &'static str,
    /// Its dimension.
    pub dimension: Dimension,
    /// Its value, SI.
    pub value: fn(&Properties) -> f64,
}

/// The properties that a fluid may state.
pub const PROPERTIES: &[PropertyRow] = &[
    PropertyRow { word: "density", symbol: "ρ", dimension: DENSITY, value: |p| p.density },
    PropertyRow { word: "expansion", symbol: "α", dimension: EXPANSION, value: |p| p.expansion },
    PropertyRow { word: "viscosity", symbol: "μ", dimension: VISCOSITY, value: |p| p.viscosity },
    PropertyRow {
        word: "kinematic-viscosity",
        symbol: "ν",
        dimension: DIFFUSIVITY,
        value: Properties::kinematic_viscosity,
    },
    PropertyRow { word: "conductivity", symbol: "k", dimension: CONDUCTIVITY, value: |p| p.conductivity },
    PropertyRow { word: "diffusivity", symbol: "a", dimension: DIFFUSIVITY, value: Properties::diffusivity },
    PropertyRow { word: "heat-capacity", symbol: "cp", dimension: HEAT_CAPACITY, value: |p| p.heat_capacity },
    PropertyRow { word: "prandtl", symbol: "Pr", dimension: NUMBER, value: Properties::prandtl },
];

/// The property that a statement of a fluid gives.
pub fn property(word: &str) -> Option<&'static PropertyRow> {
    PROPERTIES.iter().find(|row| row.word == word)
}

/// The fluid that a place is about: that of the entry itself, or of the region that it belongs to.
pub fn fluid_at<'c>(spot: &Spot<'_>, case: &'c Case) -> Option<&'c Fluid> {
    let region = match spot.row?.kind {
        EntryKind::Fluid => return case.fluid(spot.entry_name()?),
        EntryKind::Region | EntryKind::Initial => spot.entry_name()?,
        EntryKind::Boundary | EntryKind::Mesh => spot.head_link("of")?,
        EntryKind::Source => spot.head_link("in")?,
        _ => return None,
    };
    case.fluid_of(case.region(region)?)
}

/// The pressure of a fluid, Pa: its reference's, else the ambient one.
pub fn pressure_of(case: &Case, fluid: &Fluid) -> f64 {
    let stated = fluid.reference_pressure.as_ref().or(case.ambient_pressure.as_ref());
    stated.map_or(STANDARD_ATMOSPHERE, |value| value.si)
}

/// The library's properties of a fluid at a temperature (K).
pub fn properties_at(case: &Case, fluid: &Fluid, temperature: f64) -> Option<Properties> {
    Medium::of(case, fluid)?.properties(temperature, pressure_of(case, fluid))
}

/// "water at 40 degC, 2 bar".
pub fn state_in_words(case: &Case, fluid: &Fluid, temperature: f64) -> String {
    let substance = fluid.substance.as_ref().map_or("", |name| &name.text);
    let stated = fluid.reference_pressure.as_ref().or(case.ambient_pressure.as_ref());
    let pressure = pressure_of(case, fluid);
    let pressure = stated
        .filter(|value| !value.origin.unit.is_empty() && value.origin.literal.is_some())
        .and_then(|value| display::format_in(pressure, &value.origin.unit))
        .unwrap_or_else(|| display::format_si(pressure, PRESSURE));
    let share = fluid
        .fraction
        .as_ref()
        .and_then(|fraction| display::format_in(fraction.si, "%"))
        .map_or_else(String::new, |share| format!(" {share}"));
    format!("{substance}{share} at {}, {pressure}", display::format_si(temperature, TEMPERATURE))
}
