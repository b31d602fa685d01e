//! What a deck comes to, region by region: state of the fluid, sizes, arrangement, temperatures, characteristic numbers
//! and scales, each with its formula, and the margins of the checks that speak. Plain data, which is the JSON form, and
//! the text for a terminal.

use super::json::{LevelWord, Tool, Weighed};
use super::paint::harmless;
use super::substance::rows as property_rows;
use super::wrap::sentence;
use super::{Layout, scale, wrap};
use crate::case::model::{Case, Region};
use crate::checks::{self, Family};
use crate::physics::model::{ArrangementKind, Bound, Numbers as Computed, RegionPhysics};
use crate::quantity::Dimension;
use crate::quantity::dimension_names::{
    FREQUENCY, HEAT_TRANSFER_COEFFICIENT, LENGTH, PRESSURE, SPEED, TEMPERATURE, TIME, VOLUME,
};
use crate::quantity::display::{format_difference, format_number, format_si};
use crate::syntax::{Finding, Level};
use crate::workspace::Deck;
use crate::workspace::sweep::in_words;
use schemars::{JsonSchema, Schema, schema_for};
use serde::Serialize;
use std::io::{self, Write};

/// The version of the JSON form.
pub const FORMAT: u32 = 1;

/// The numbers of a deck.
#[derive(Debug, Serialize, JsonSchema)]
#[schemars(title = "Numbers of deckline")]
pub struct Numbers {
    /// The version of this form.
    pub format: u32,
    /// What wrote it.
    pub tool: Tool,
    /// The deck's path.
    pub deck: String,
    /// The title of its case; empty if none.
    pub title: String,
    /// In a sweep: at which of its points the numbers hold; empty without one.
    pub point: String,
    /// Errors of writing and units in the deck: while there are any, numbers may be missing.
    pub errors: usize,
    /// Gravity, m/s².
    pub gravity: Option<f64>,
    /// The regions, in the deck's order.
    pub regions: Vec<RegionNumbers>,
}

/// The numbers of one region.
#[derive(Debug, Serialize, JsonSchema)]
pub struct RegionNumbers {
    /// Its name.
    pub region: String,
    /// The arrangement, by its word in the language; empty where none was found.
    pub arrangement: String,
    /// Why that one.
    pub arrangement_why: String,
    /// The fluid.
    pub fluid: Option<FluidUsed>,
    /// The least and the greatest temperature that the fluid can reach.
    pub temperatures: Vec<Reached>,
    /// Sizes.
    pub sizes: Vec<Number>,
    /// The properties at the film temperature.
    pub properties: Vec<Number>,
    /// Characteristic numbers.
    pub numbers: Vec<Number>,
    /// Scales of length, speed and time.
    pub scales: Vec<Number>,
    /// Numbers that checks weighed against a limit and spoke of.
    pub margins: Vec<MarginLeft>,
}

/// A fluid and its reference state.
#[derive(Debug, Serialize, JsonSchema)]
pub struct FluidUsed {
    /// Its name in the deck.
    pub name: String,
    /// The substance; empty if none is named.
    pub substance: String,
    /// Reference temperature, K.
    pub reference_temperature: Option<f64>,
    /// Pressure, Pa.
    pub pressure: Option<f64>,
    /// The temperature at which `properties` hold, K.
    pub film_temperature: Option<f64>,
}

/// A temperature that the fluid can reach.
#[derive(Debug, Serialize, JsonSchema)]
pub struct Reached {
    /// `lowest` or `highest`.
    pub end: String,
    /// The temperature, K.
    pub temperature: Option<f64>,
    /// Lowest and highest value of an estimate, K.
    pub band: Option<(f64, f64)>,
    /// What sets it.
    pub set_by: String,
    /// How it was estimated; none where it is given.
    pub estimate: Option<String>,
}

/// A number with its formula.
#[derive(Debug, Serialize, JsonSchema)]
pub struct Number {
    /// Its symbol.
    pub symbol: String,
    /// Its name.
    pub name: String,
    /// Its value in SI.
    pub value: f64,
    /// Its SI unit; `1` for a pure number.
    pub unit: String,
    /// As a person reads it.
    pub shown: String,
    /// Lowest and highest value of an estimate.
    pub band: Option<(f64, f64)>,
    /// The formula, or the correlation and its source; empty where it is given.
    pub formula: String,
}

/// A number that a check weighed.
#[derive(Debug, Serialize, JsonSchema)]
pub struct MarginLeft {
    /// The check.
    pub check: String,
    /// The level of its finding.
    pub level: LevelWord,
    /// The number and its limit.
    pub margin: Weighed,
    /// Whether a waiver covers the finding.
    pub waived: bool,
}

/// The schema of the JSON form.
pub fn schema() -> Schema {
    schema_for!(Numbers)
}

impl Numbers {
    /// The numbers of a deck.
    pub fn of(deck: &Deck) -> Numbers {
        let case = &deck.case;
        let regions = case.regions.iter().zip(&deck.physics.regions);
        Numbers {
            format: FORMAT,
            tool: Tool::this(),
            deck: deck.files.first().map(|file| file.path.to_string_lossy().into_owned()).unwrap_or_default(),
            title: case.title.as_ref().map(|title| title.text.to_string()).unwrap_or_default(),
            point: point(deck),
            errors: deck.findings.iter().filter(|finding| hides_values(finding)).count(),
            gravity: finite(case.gravity.magnitude),
            regions: regions.map(|(region, physics)| region_numbers(case, region, physics, &deck.findings)).collect(),
        }
    }
}

/// Whether a finding says that something could not be read, so that what depends on it is not known.
fn hides_values(finding: &Finding) -> bool {
    let family = checks::find(finding.check).map(|check| check.family);
    finding.level == Level::Error && matches!(family, None | Some(Family::Writing | Family::Units))
}

fn region_numbers(case: &Case, region: &Region, physics: &RegionPhysics, findings: &[Finding]) -> RegionNumbers {
    let computed = &physics.numbers;
    let fluid = physics.fluid.as_ref().and_then(|state| {
        let fluid = case.fluids.get(state.index)?;
        Some(FluidUsed {
            name: fluid.name.text.to_string(),
            substance: fluid.substance.as_ref().map(|name| name.text.to_string()).unwrap_or_default(),
            reference_temperature: finite(state.reference_temperature),
            pressure: finite(state.pressure),
            film_temperature: finite(computed.film_temperature),
        })
    });
    let bracket = physics.bracket.as_ref();
    let ends = bracket.map(|bracket| vec![reached("lowest", &bracket.lowest), reached("highest", &bracket.highest)]);
    let about = |finding: &&Finding| {
        finding.subject == *region.name.text
            || fluid.as_ref().is_some_and(|fluid| finding.subject == fluid.name)
            || case.boundaries_of(region).any(|boundary| finding.subject == *boundary.name.text)
    };
    RegionNumbers {
        region: region.name.text.to_string(),
        arrangement: word(physics.arrangement.kind).to_string(),
        arrangement_why: physics.arrangement.why.clone(),
        temperatures: ends.unwrap_or_default(),
        sizes: sizes(physics),
        properties: properties(computed),
        numbers: characteristic(computed),
        scales: scales(computed),
        margins: findings.iter().filter(about).filter_map(margin_left).collect(),
        fluid,
    }
}

fn reached(end: &str, bound: &Bound) -> Reached {
    let (from, to) = bound.band;
    Reached {
        end: end.to_string(),
        temperature: finite(bound.value),
        band: bound.estimate.as_ref().and_then(|_| finite(from).zip(finite(to))),
        set_by: bound.set_by.clone(),
        estimate: bound.estimate.clone(),
    }
}

/// A number; none where it is not known.
fn number(symbol: &str, name: &str, value: f64, dimension: Dimension, formula: &str) -> Option<Number> {
    value.is_finite().then(|| Number {
        symbol: symbol.to_string(),
        name: name.to_string(),
        value,
        unit: dimension.base_units(),
        shown: format_si(value, dimension),
        band: None,
        formula: formula.to_string(),
    })
}

fn sizes(physics: &RegionPhysics) -> Vec<Number> {
    let geometry = &physics.geometry;
    // A plane case has a volume per metre of depth, which is an area.
    let volume = number("V", "volume; per metre of depth in a plane case", geometry.volume, VOLUME, "");
    [
        number("H", "height along gravity", geometry.height, LENGTH, ""),
        number("L", "characteristic length", geometry.length, LENGTH, ""),
        number("d", "distance of hot and cold side", geometry.spacing, LENGTH, ""),
        volume,
    ]
    .into_iter()
    .flatten()
    .collect()
}

fn properties(computed: &Computed) -> Vec<Number> {
    let Some(properties) = &computed.properties else { return Vec::new() };
    property_rows(properties)
        .into_iter()
        .filter_map(|row| number(row.symbol, row.name, row.value, row.dimension, row.formula))
        .collect()
}

fn characteristic(computed: &Computed) -> Vec<Number> {
    let plain = |symbol, name, value, formula| number(symbol, name, value, Dimension::NONE, formula);
    let outside = if computed.nusselt_inside_range { "" } else { "; outside the range that it is published for" };
    let correlation = format!("{}{outside}", computed.nusselt_basis);
    let mut nusselt = plain("Nu", "Nusselt number", computed.nusselt, &correlation);
    if let Some(number) = &mut nusselt {
        let (from, to) = computed.nusselt_band;
        number.band = finite(from).zip(finite(to));
    }
    let difference = finite(computed.difference).map(|kelvin| Number {
        symbol: "ΔT".to_string(),
        name: "driving temperature difference".to_string(),
        value: kelvin,
        unit: "K".to_string(),
        shown: format_difference(kelvin),
        band: None,
        formula: String::new(),
    });
    [
        difference,
        plain("Ra", "Rayleigh number", computed.rayleigh, "g α ΔT L³ / (ν a)"),
        plain("Gr", "Grashof number", computed.grashof, "g α ΔT L³ / ν²"),
        plain("Pr", "Prandtl number", computed.prandtl, "ν / a"),
        plain("Re", "Reynolds number of the fastest given velocity", computed.reynolds, "v L / ν"),
        plain("Ri", "Richardson number", computed.richardson, "Gr / Re²"),
        nusselt,
        plain("αΔT", "expansion over the whole span", computed.expansion_span, "α (T highest - T lowest)"),
        plain("Ma", "Mach number of the fastest velocity", computed.mach, "v / c"),
    ]
    .into_iter()
    .flatten()
    .collect()
}

fn scales(computed: &Computed) -> Vec<Number> {
    const TIMES: &str = "Patterson and Imberger 1980";
    let coefficient = computed.heat_transfer_coefficient;
    [
        number("h", "heat transfer coefficient", coefficient, HEAT_TRANSFER_COEFFICIENT, "Nu k / L"),
        number("u", "buoyant velocity", computed.buoyant_velocity, SPEED, "√(g α ΔT H)"),
        number("v", "fastest given velocity", computed.given_velocity, SPEED, ""),
        number(
            "δ",
            "thermal boundary layer",
            computed.thermal_layer,
            LENGTH,
            "thickness by the scales of the arrangement",
        ),
        number(
            "δv",
            "viscous boundary layer",
            computed.viscous_layer,
            LENGTH,
            "thickness by the scales of the arrangement",
        ),
        number("N", "buoyancy frequency", computed.buoyancy_frequency, FREQUENCY, "√(g α dT/dz)")
            .filter(|number| number.value > 0.0),
        number("t1", "boundary-layer time", computed.boundary_layer_time, TIME, TIMES),
        number("t2", "filling time", computed.filling_time, TIME, TIMES),
    ]
    .into_iter()
    .flatten()
    .collect()
}

fn margin_left(finding: &Finding) -> Option<MarginLeft> {
    Some(MarginLeft {
        check: finding.check.to_string(),
        level: finding.level.into(),
        margin: finding.margin.as_ref()?.into(),
        waived: finding.waived.is_some(),
    })
}

/// The arrangement's word in the language; empty for none.
pub fn word(kind: ArrangementKind) -> &'static str {
    match kind {
        ArrangementKind::SideHeatedCavity => "side-heated-cavity",
        ArrangementKind::LayerHeatedFromBelow => "layer-heated-from-below",
        ArrangementKind::StableLayer => "stable-layer",
        ArrangementKind::TiltedCavity => "tilted-cavity",
        ArrangementKind::VerticalPlate => "vertical-plate",
        ArrangementKind::PlateFacingUp => "plate-facing-up",
        ArrangementKind::PlateFacingDown => "plate-facing-down",
        ArrangementKind::InclinedPlate => "inclined-plate",
        ArrangementKind::HorizontalCylinder => "horizontal-cylinder",
        ArrangementKind::Sphere => "sphere",
        ArrangementKind::Annulus => "annulus",
        ArrangementKind::VerticalChannel => "vertical-channel",
        ArrangementKind::ThroughFlow => "through-flow",
        ArrangementKind::UniformHeating => "uniform-heating",
        ArrangementKind::Unknown => "",
    }
}

/// Writes the numbers for a person.
///
/// # Errors
/// Those of `out`.
pub fn write(numbers: &Numbers, out: &mut dyn Write, layout: Layout) -> io::Result<()> {
    let paint = layout.paint;
    writeln!(out, "{}", paint.strong(&harmless(&numbers.deck)))?;
    if !numbers.title.is_empty() {
        wrap::paragraph(out, &harmless(&numbers.title), 2, 0, layout.width)?;
    }
    if !numbers.point.is_empty() {
        wrap::paragraph(
            out,
            &format!("At the first point of the sweep: {}.", harmless(&numbers.point)),
            2,
            0,
            layout.width,
        )?;
    }
    let (errors, they_are) = match numbers.errors {
        1 => ("an error".to_string(), "it is"),
        more => (format!("{more} errors"), "they are"),
    };
    if numbers.errors > 0 {
        let text =
            format!("The deck has {errors} of writing or units; numbers may be missing until {they_are} put right.");
        wrap::paragraph(out, &text, 2, 0, layout.width)?;
    }
    if let Some(gravity) = numbers.gravity {
        writeln!(out, "  Gravity is {} m/s^2.", format_number(gravity))?;
    }
    if numbers.regions.is_empty() {
        writeln!(out, "\n  It has no region.")?;
    }
    for region in &numbers.regions {
        writeln!(out, "\n  {}", paint.strong(&format!("region {}", harmless(&region.region))))?;
        about(region, out, layout)?;
        section("Sizes", &region.sizes, out, layout)?;
        let film = region.fluid.as_ref().and_then(|fluid| fluid.film_temperature);
        let title =
            film.map_or("Properties".to_string(), |film| format!("Properties at {}", format_si(film, TEMPERATURE)));
        section(&title, &region.properties, out, layout)?;
        section("Characteristic numbers", &region.numbers, out, layout)?;
        section("Scales", &region.scales, out, layout)?;
        margins(&region.margins, out, layout)?;
    }
    Ok(())
}

fn about(region: &RegionNumbers, out: &mut dyn Write, layout: Layout) -> io::Result<()> {
    if !region.arrangement.is_empty() {
        wrap::paragraph(
            out,
            &sentence(&format!("Taken as {}: {}", region.arrangement, region.arrangement_why)),
            4,
            2,
            layout.width,
        )?;
    }
    if let Some(fluid) = &region.fluid {
        let temperature = fluid.reference_temperature.map(|value| format_si(value, TEMPERATURE));
        let pressure = fluid.pressure.map(|value| format_si(value, PRESSURE));
        let state: Vec<String> = [temperature, pressure].into_iter().flatten().collect();
        let substance = if fluid.substance.is_empty() { String::new() } else { format!(" ({})", fluid.substance) };
        let text = format!("The fluid is {}{substance}, reference {}.", fluid.name, state.join(", "));
        wrap::paragraph(out, &harmless(&text), 4, 2, layout.width)?;
    }
    for end in &region.temperatures {
        let Some(temperature) = end.temperature else { continue };
        let (shown, band) = (format_si(temperature, TEMPERATURE), end.band.unwrap_or((temperature, temperature)));
        let (from, to) = (format_si(band.0, TEMPERATURE), format_si(band.1, TEMPERATURE));
        let band = if from == to { String::new() } else { format!(" ({from} to {to})") };
        let estimate = end.estimate.as_ref().map_or(String::new(), |how| format!(", estimated: {how}"));
        let text = format!("The {} temperature is {shown}{band}, set by {}{estimate}.", end.end, end.set_by);
        wrap::paragraph(out, &harmless(&text), 4, 2, layout.width)?;
    }
    Ok(())
}

fn section(title: &str, numbers: &[Number], out: &mut dyn Write, layout: Layout) -> io::Result<()> {
    if numbers.is_empty() {
        return Ok(());
    }
    writeln!(out, "\n    {}", layout.paint.faint(title))?;
    for number in numbers {
        let band = number
            .band
            .map_or(String::new(), |(from, to)| format!(" ({} to {})", format_number(from), format_number(to)));
        let value = format!("{}{band}", number.shown);
        let line = format!("{:<4}{value:<26}{}", number.symbol, number.name);
        let formula = if number.formula.is_empty() { String::new() } else { format!(": {}", number.formula) };
        wrap::paragraph(out, &format!("{line}{formula}"), 6, 30, layout.width)?;
    }
    Ok(())
}

fn margins(margins: &[MarginLeft], out: &mut dyn Write, layout: Layout) -> io::Result<()> {
    if margins.is_empty() {
        return Ok(());
    }
    writeln!(out, "\n    {}", layout.paint.faint("Weighed against a limit"))?;
    for left in margins {
        let level = left.level.level();
        let waived = if left.waived { ", waived" } else { "" };
        writeln!(out, "      {}, {}{waived}", left.check, layout.paint.level(level, level.word()))?;
        let width = layout.width.min(wrap::WIDEST).saturating_sub(8);
        if let Some(drawn) = left.margin.margin().and_then(|margin| scale::line(&margin, width)) {
            writeln!(out, "        {}", harmless(&drawn))?;
        }
    }
    Ok(())
}

/// The first point of the sweep, in words; empty without a sweep.
fn point(deck: &Deck) -> String {
    if deck.resolution.sweep.points() > 1 { in_words(deck, 0) } else { String::new() }
}

fn finite(value: f64) -> Option<f64> {
    value.is_finite().then_some(value)
}
