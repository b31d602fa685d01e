//! Slips in temperatures and pressures: degC for K and K for degC, told by the other temperatures and the substance's
//! data; kPa for Pa, and gauge for absolute pressure.

use super::slip::Slip;
use super::stated::{as_written, number_written, reference_pressure, rewritten};
use crate::case::model::{Case, Fluid, Heat, Value};
use crate::checks::Subject;
use crate::checks::density_law::assess::temperature;
use crate::quantity::{Scale, parse_unit};
use crate::substances::Medium;
use crate::syntax::{Level, Place};
use std::collections::HashMap;

const ZERO_CELSIUS: f64 = 273.15;
/// Pressures of air at places where people work, from above 4000 m to below sea level, Pa (ISO 2533).
const PRESSURES: std::ops::Range<f64> = 60e3..110e3;
/// Pressure of the standard atmosphere, Pa.
const ATMOSPHERE: f64 = 101_325.0;
/// How far a temperature may be from the middle of the others and still belong to them, K.
const NEAR: f64 = 100.0;

/// The slips.
pub fn slips(subject: &Subject<'_>) -> Vec<Slip> {
    let case = subject.case;
    let temperatures = temperatures(case);
    let middles = Middles::of(&temperatures);
    let mut slips: Vec<Slip> = temperatures.iter().filter_map(|stated| of_temperature(stated, &middles)).collect();
    slips.extend(case.fluids.iter().filter_map(|fluid| of_pressure(case, fluid.reference_pressure.as_ref()?, fluid)));
    slips.extend(case.ambient_pressure.as_ref().and_then(|value| in_other_pressure_unit(value, "case")));
    slips
}

/// A temperature of the deck.
struct Stated<'a> {
    value: &'a Value,
    owner: &'a str,
    /// The substance whose temperature it is; `None` for surroundings.
    medium: Option<Medium<'a>>,
    pressure: f64,
}

/// The temperatures that the fluid itself comes to. A sky or space that a face radiates to may be as cold as it likes.
fn temperatures(case: &Case) -> Vec<Stated<'_>> {
    let mut found = Vec::new();
    for fluid in &case.fluids {
        let state = (Medium::of(case, fluid), reference_pressure(case, fluid));
        push(&mut found, &fluid.reference_temperature, &fluid.name.text, state);
    }
    let state_of = |region: Option<&crate::case::model::Name>| {
        let fluid = region.and_then(|name| case.fluid_of(case.region(&name.text)?));
        (
            fluid.and_then(|fluid| Medium::of(case, fluid)),
            fluid.map_or(f64::NAN, |fluid| reference_pressure(case, fluid)),
        )
    };
    for boundary in &case.boundaries {
        let state = state_of(boundary.region.as_ref());
        for (heat, _) in &boundary.heat {
            match heat {
                Heat::HeldAt(value) => found.push(stated(value, &boundary.name.text, state)),
                Heat::Exchanges { temperature, .. } => {
                    found.push(stated(temperature, &boundary.name.text, (None, f64::NAN)));
                }
                Heat::HeatedBy(_) | Heat::CooledBy(_) | Heat::Insulated | Heat::RadiatesTo(_) => {}
            }
        }
        push(&mut found, &boundary.carries, &boundary.name.text, state);
        push(&mut found, &boundary.backflow, &boundary.name.text, state);
    }
    for initial in &case.initials {
        let state = state_of(initial.region.as_ref());
        let name = initial.region.as_ref().map_or("case", |name| &*name.text);
        push(&mut found, &initial.temperature, name, state);
        if let Some((bottom, top)) = &initial.stratified {
            found.extend([bottom, top].map(|value| stated(value, name, state)));
        }
    }
    push(&mut found, &case.ambient_temperature, "case", (None, f64::NAN));
    found
}

fn push<'a>(found: &mut Vec<Stated<'a>>, value: &'a Option<Value>, owner: &'a str, state: (Option<Medium<'a>>, f64)) {
    found.extend(value.iter().map(|value| stated(value, owner, state)));
}

fn stated<'a>(value: &'a Value, owner: &'a str, (medium, pressure): (Option<Medium<'a>>, f64)) -> Stated<'a> {
    Stated { value, owner, medium, pressure }
}

fn of_temperature(stated: &Stated<'_>, middles: &Middles) -> Option<Slip> {
    let unit = parse_unit(&stated.value.origin.unit).ok()?;
    let number = number_written(stated.value)?;
    let si = stated.value.si;
    let middle = middles.of_others(literal(stated.value));
    let holds = |temperature: f64| stated.medium.is_none_or(|medium| medium.holds_at(temperature));
    let (meant, evidence) = if unit.scale == Scale::TemperatureOpen && unit.factor == 1.0 {
        let kelvin = number + ZERO_CELSIUS;
        let fits = middle.is_none_or(|middle| (kelvin - middle).abs() <= NEAR && (si - middle).abs() > NEAR);
        // Without other temperatures, only the data of the substance can tell.
        let can_tell = middle.is_some() || stated.medium.is_some();
        let is_wrong = si < 150.0 && (stated.medium.is_none() || !holds(si));
        if !(fits && can_tell && is_wrong && holds(kelvin)) {
            return None;
        }
        (format!("{} degC", rewritten(number)), kelvin)
    } else if unit.scale == Scale::TemperaturePoint && unit.factor == 1.0 {
        let medium = stated.medium.filter(|medium| !medium.is_gas())?;
        let most = medium.boiling(stated.pressure).unwrap_or(f64::INFINITY).min(medium.range().1);
        let least = medium.freezing(stated.pressure).unwrap_or(0.0).max(medium.range().0);
        let fits = middle.is_none_or(|middle| (number - middle).abs() <= NEAR && (si - middle).abs() > NEAR);
        if !(si > most && number > least && number < most && fits) {
            return None;
        }
        (format!("{} K", rewritten(number)), number)
    } else {
        return None;
    };
    let beside = middle
        .map_or(String::new(), |middle| format!(", and the others of the deck lie about {}", temperature(middle)));
    let substance = stated
        .medium
        .filter(|_| !holds(si))
        .map_or(String::new(), |medium| format!("; {} has no data there", medium.substance.name.text));
    let message = format!(
        "{} of `{}` is {}{substance}{beside}; {meant}{} was probably meant",
        as_written(stated.value),
        stated.owner,
        temperature(si),
        if meant.ends_with(" K") { format!(", {},", temperature(evidence)) } else { String::new() },
    );
    Some(Slip::of(stated.value, stated.owner, Level::Error, meant, middle.is_some(), message))
}

/// The known temperatures of the deck, K, rising, and at which of them each literal stands: a long deck has many, and the
/// median of the others is wanted for each.
struct Middles {
    sorted: Vec<f64>,
    at: HashMap<Place, Vec<usize>>,
}

impl Middles {
    fn of(all: &[Stated<'_>]) -> Middles {
        let known = all.iter().filter(|stated| stated.value.si.is_finite());
        let mut sorted: Vec<(f64, Place)> = known.map(|stated| (stated.value.si, literal(stated.value))).collect();
        sorted.sort_by(|a, b| f64::total_cmp(&a.0, &b.0));
        let mut at: HashMap<Place, Vec<usize>> = HashMap::new();
        for (index, (_, place)) in sorted.iter().enumerate() {
            at.entry(*place).or_default().push(index);
        }
        Middles { sorted: sorted.into_iter().map(|(si, _)| si).collect(), at }
    }

    /// The median of the temperatures that do not come from the literal, K; `None` where there is none.
    fn of_others(&self, literal: Place) -> Option<f64> {
        let own = self.at.get(&literal).map_or(&[][..], Vec::as_slice);
        let mut middle = (self.sorted.len() - own.len()) / 2;
        // Over those that are left out, which rise.
        for left_out in own {
            middle += usize::from(*left_out <= middle);
        }
        self.sorted.get(middle).copied()
    }
}

fn literal(value: &Value) -> Place {
    value.origin.literal.unwrap_or(value.origin.place)
}

fn of_pressure(case: &Case, value: &Value, fluid: &Fluid) -> Option<Slip> {
    in_other_pressure_unit(value, &fluid.name.text).or_else(|| as_gauge(case, value, fluid))
}

/// 101.3 Pa for kPa, 1.013 Pa for bar.
fn in_other_pressure_unit(value: &Value, owner: &str) -> Option<Slip> {
    let number = number_written(value).filter(|number| *number > 0.0)?;
    let unit = ["kPa", "bar", "mbar"].into_iter().find(|unit| {
        let si = parse_unit(unit).map_or(f64::NAN, |unit| unit.to_si(number));
        // Low pressures are meant at times; one that is the atmosphere's number in another unit is not, nor is one
        // under which no fluid is a continuum any more.
        let is_atmosphere = (si / ATMOSPHERE - 1.0).abs() < 0.01;
        value.si < 0.05 * si && (is_atmosphere || (value.si < 50.0 && PRESSURES.contains(&si)))
    })?;
    let meant = format!("{} {unit}", rewritten(number));
    let message = format!("{} is next to a vacuum; {meant} is a pressure of the atmosphere", as_written(value));
    Some(Slip::of(value, owner, Level::Error, meant, true, message))
}

/// 0 bar, or a low pressure at which the liquid would boil, where a gauge shows it.
fn as_gauge(case: &Case, value: &Value, fluid: &Fluid) -> Option<Slip> {
    let gauge_unit = format!("{}g", value.origin.unit);
    let unit = parse_unit(&gauge_unit).ok().filter(|unit| unit.scale == Scale::Gauge)?;
    let number = number_written(value)?;
    let ambient = case.ambient_pressure.as_ref().map_or(ATMOSPHERE, |ambient| ambient.si);
    let meant = format!("{} {gauge_unit}", rewritten(number));
    if value.si == 0.0 {
        let message = format!("{} is a vacuum; on a gauge it is the ambient pressure", as_written(value));
        return Some(Slip::of(value, &fluid.name.text, Level::Error, meant, true, message));
    }
    let medium = Medium::of(case, fluid).filter(|medium| !medium.is_gas())?;
    let reference = fluid.reference_temperature.as_ref()?.si;
    let boils_at = |pressure: f64| medium.boiling(pressure);
    let boils_as_written = boils_at(value.si).is_some_and(|boiling| boiling < reference);
    let stays_liquid = boils_at(ambient + unit.to_si(number)).is_some_and(|boiling| boiling > reference);
    if !(value.si < 0.5 * ambient && boils_as_written && stays_liquid) {
        return None;
    }
    let message = format!(
        "{} boils below {} at {}; read on a gauge, above the ambient pressure, it stays liquid",
        medium.substance.name.text,
        temperature(reference),
        as_written(value),
    );
    Some(Slip::of(value, &fluid.name.text, Level::Warning, meant, false, message))
}
