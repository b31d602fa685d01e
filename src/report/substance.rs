//! Property data as text for a terminal.

use super::paint::harmless;
use super::{Layout, wrap};
use crate::quantity::Dimension;
use crate::quantity::dimension_names::{
    COMPRESSIBILITY, DENSITY, DYNAMIC_VISCOSITY, KINEMATIC_VISCOSITY, PRESSURE, SPECIFIC_HEAT_CAPACITY, TEMPERATURE,
    THERMAL_CONDUCTIVITY, THERMAL_EXPANSION,
};
use crate::quantity::display::{format_number, format_si};
use crate::substances::{Medium, Properties};
use std::io::{self, Write};

/// 0 degC, K.
const ZERO_CELSIUS: f64 = 273.15;
/// Rows of the table over the range of the data at most, less one.
const MOST_ROWS: f64 = 12.0;
/// Steps of its temperatures, K.
const ROUND_STEPS: [f64; 8] = [1.0, 2.0, 5.0, 10.0, 20.0, 50.0, 100.0, 200.0];

/// Writes what is known of a substance: where it is from, how good it is, and a table over its range.
///
/// # Errors
/// Those of `out`.
pub fn sheet(medium: &Medium<'_>, pressure: f64, out: &mut dyn Write, layout: Layout) -> io::Result<()> {
    let (substance, paint) = (medium.substance, layout.paint);
    writeln!(out, "{}", paint.strong(&substance.name.text))?;
    let (low, high) = medium.range();
    let mut facts = vec![("Valid", format!("{} to {}", format_si(low, TEMPERATURE), format_si(high, TEMPERATURE)))];
    if let Some((least, most)) = substance.fraction {
        let percent = |fraction: f64| format_number(100.0 * fraction);
        facts.push(("Mass fraction", format!("{} to {} %", percent(least), percent(most))));
    }
    let boiling = medium.boiling(pressure).map(|value| format_si(value, TEMPERATURE));
    let freezing = medium.freezing(pressure).map(|value| format_si(value, TEMPERATURE));
    let named = [
        ("Source", Some(substance.source.to_string())),
        ("Deviation", Some(substance.deviation.to_string())),
        ("Boils at", boiling),
        ("Freezes at", freezing),
    ];
    facts.extend(named.into_iter().filter_map(|(title, text)| Some((title, text?))));
    let description = substance.description.split('\n').collect::<Vec<_>>().join(" ");
    wrap::paragraph(out, &harmless(&description), 2, 0, layout.width)?;
    writeln!(out)?;
    for (title, text) in facts.iter().filter(|(_, text)| !text.is_empty()) {
        wrap::paragraph(out, &format!("{title}: {}", harmless(text)), 2, 4, layout.width)?;
    }
    let at = composition(medium);
    writeln!(out, "\n  At {}{at}:\n", format_si(pressure, PRESSURE))?;
    table(medium, pressure, out, layout)
}

/// Writes the properties at one state.
///
/// # Errors
/// Those of `out`.
pub fn state(
    medium: &Medium<'_>,
    temperature: f64,
    pressure: f64,
    properties: &Properties,
    out: &mut dyn Write,
    layout: Layout,
) -> io::Result<()> {
    let at = composition(medium);
    let phase = other_phase(medium, temperature, pressure);
    let (temperature, pressure) = (format_si(temperature, TEMPERATURE), format_si(pressure, PRESSURE));
    writeln!(out, "{} at {temperature}, {pressure}{at}\n", layout.paint.strong(&medium.substance.name.text))?;
    for PropertyRow { symbol, name, value, dimension, .. } in rows(properties) {
        let value = if value.is_finite() { format_si(value, dimension) } else { "not known here".to_string() };
        writeln!(out, "  {symbol:<3} {name:<30} {value}")?;
    }
    if let Some(phase) = phase {
        writeln!(out, "\n  Under this pressure it has {} there: these values are beyond its range.", phase)?;
    }
    Ok(())
}

/// One property.
pub struct PropertyRow {
    /// Its symbol.
    pub symbol: &'static str,
    /// Its name.
    pub name: &'static str,
    /// Its value, SI.
    pub value: f64,
    /// Its dimension.
    pub dimension: Dimension,
    /// From which others it follows; empty for those of the data.
    pub formula: &'static str,
}

/// Every property.
pub fn rows(properties: &Properties) -> Vec<PropertyRow> {
    let row = |symbol, name, value, dimension, formula| PropertyRow { symbol, name, value, dimension, formula };
    vec![
        row("ρ", "density", properties.density, DENSITY, ""),
        row("cp", "specific heat capacity", properties.heat_capacity, SPECIFIC_HEAT_CAPACITY, ""),
        row("μ", "dynamic viscosity", properties.viscosity, DYNAMIC_VISCOSITY, ""),
        row("k", "thermal conductivity", properties.conductivity, THERMAL_CONDUCTIVITY, ""),
        row("α", "thermal expansion", properties.expansion, THERMAL_EXPANSION, ""),
        row("κ", "isothermal compressibility", properties.compressibility, COMPRESSIBILITY, ""),
        row("ν", "kinematic viscosity", properties.kinematic_viscosity(), KINEMATIC_VISCOSITY, "μ / ρ"),
        row("a", "thermal diffusivity", properties.diffusivity(), KINEMATIC_VISCOSITY, "k / (ρ cp)"),
        row("Pr", "Prandtl number", properties.prandtl(), Dimension::NONE, "ν / a"),
    ]
}

/// What has become of the substance where it is not in the state that its data are for.
pub fn other_phase(medium: &Medium<'_>, temperature: f64, pressure: f64) -> Option<&'static str> {
    // Written limits and computed temperatures may differ in the last digit.
    const SLACK: f64 = 1e-6;
    let (boiling, freezing) = (medium.boiling(pressure), medium.freezing(pressure));
    match medium.is_gas() {
        true => boiling.filter(|boiling| temperature < boiling - SLACK).map(|_| "condensed"),
        false if freezing.is_some_and(|freezing| temperature < freezing - SLACK) => Some("frozen"),
        false => boiling.filter(|boiling| temperature > boiling + SLACK).map(|_| "boiled"),
    }
}

fn composition(medium: &Medium<'_>) -> String {
    match medium.substance.fraction {
        Some(_) => format!(", mass fraction {} %", format_number(100.0 * medium.fraction)),
        None => String::new(),
    }
}

fn table(medium: &Medium<'_>, pressure: f64, out: &mut dyn Write, layout: Layout) -> io::Result<()> {
    const HEADS: [&str; 7] = ["T", "ρ", "cp", "μ", "k", "α", "Pr"];
    const UNITS: [&str; 7] = ["degC", "kg/m^3", "J/kg/K", "Pa.s", "W/m/K", "1/K", "1"];
    let line = |cells: [String; 7]| {
        let padded: Vec<String> = cells.iter().map(|cell| format!("{cell:>10}")).collect();
        padded.concat()
    };
    writeln!(out, "{}", layout.paint.strong(&line(HEADS.map(str::to_string))))?;
    writeln!(out, "{}", layout.paint.faint(&line(UNITS.map(str::to_string))))?;
    for temperature in temperatures(medium, pressure) {
        let number = |value: f64| if value.is_finite() { format_number(value) } else { "-".to_string() };
        let Some(found) = medium.properties(temperature, pressure) else { continue };
        let cells = [
            number(temperature - ZERO_CELSIUS),
            number(found.density),
            number(found.heat_capacity),
            number(found.viscosity),
            number(found.conductivity),
            number(found.expansion),
            number(found.prandtl()),
        ];
        writeln!(out, "{}", line(cells))?;
    }
    Ok(())
}

/// Round temperatures, K, over the range in which the substance is in the state that its data are for.
fn temperatures(medium: &Medium<'_>, pressure: f64) -> Vec<f64> {
    let (mut low, mut high) = medium.range();
    let (boiling, freezing) = (medium.boiling(pressure), medium.freezing(pressure));
    if medium.is_gas() {
        low = low.max(boiling.unwrap_or(low));
    } else {
        low = low.max(freezing.unwrap_or(low));
        high = high.min(boiling.unwrap_or(high));
    }
    if !low.is_finite() || !high.is_finite() || high <= low {
        return Vec::new();
    }
    let step = ROUND_STEPS.into_iter().find(|step| (high - low) / step <= MOST_ROWS).unwrap_or(high - low);
    let first = ((low - ZERO_CELSIUS) / step).ceil() as i64;
    let last = ((high - ZERO_CELSIUS) / step).floor() as i64;
    (first..=last).map(|number| ZERO_CELSIUS + number as f64 * step).collect()
}
