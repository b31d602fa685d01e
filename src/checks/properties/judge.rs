//! Which check speaks of a stated property: one value draws one finding at most, from the check that explains it best.

use super::slip;
use super::stated::{AtReference, PROPERTIES, PropertyRow, at_reference, deviation, is_gas};
use crate::case::model::{DensityLaw, Value};
use crate::checks::Subject;

/// How far a value may be from the substance's own, by rounding and by the choice of a handbook.
pub const CLOSE: f64 = 0.05;
/// How near a value must come to the substance at another state to be called that of this state.
const FITS: f64 = 0.01;
/// How far from the reference a temperature is looked for, K: one farther away explains nothing.
const REACH: f64 = 100.0;
/// Steps in which it is looked for.
const STEPS: u32 = 200;
/// One standard atmosphere, Pa.
const ATMOSPHERE: f64 = 101_325.0;

/// What a stated value is.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Verdict {
    /// That of the substance, near enough; or another check's matter.
    Fits,
    /// That of the substance at another temperature, K.
    ElsewhereAt(f64),
    /// That of the gas at one standard atmosphere.
    AtOneAtmosphere,
    /// None of these.
    Off,
}

/// A stated value with its verdict.
#[derive(Debug)]
pub struct Judged<'a> {
    /// The value.
    pub value: &'a Value,
    /// The property.
    pub property: &'static PropertyRow,
    /// The substance's own at the reference.
    pub own: f64,
    /// By how much it differs.
    pub deviation: f64,
    /// What it is.
    pub verdict: Verdict,
}

/// Every stated property of every fluid of known substance.
pub fn judged<'a>(subject: &Subject<'a>) -> Vec<(AtReference<'a>, Vec<Judged<'a>>)> {
    let slips = slip::slips(subject);
    at_reference(subject)
        .into_iter()
        .map(|fluid| {
            let judged = PROPERTIES
                .iter()
                .filter_map(|property| {
                    let value = (property.stated)(fluid.fluid)?;
                    let own = (property.own)(&fluid.own);
                    let deviation = deviation(value.si, own);
                    let is_other_matter =
                        slip::is_slip(&slips, value) || is_of_other_check(subject, &fluid, property, value);
                    let is_off = deviation > CLOSE;
                    let verdict =
                        if is_off && !is_other_matter { explain(&fluid, property, value.si) } else { Verdict::Fits };
                    Some(Judged { value, property, own, deviation, verdict })
                })
                .collect();
            (fluid, judged)
        })
        .collect()
}

/// Whether another check speaks of the value: `not-physical`; of the expansion of a gas `expansion-not-at-reference`;
/// of the density of an ideal gas `properties-disagree`.
fn is_of_other_check(subject: &Subject<'_>, fluid: &AtReference<'_>, property: &PropertyRow, value: &Value) -> bool {
    let gas = is_gas(subject.case, fluid.fluid);
    match property.symbol {
        "α" => gas || turns_near(fluid),
        "ρ" if gas && fluid.fluid.density_law.is_some_and(|law| law.value == DensityLaw::IdealGas) => true,
        _ => value.si <= 0.0,
    }
}

/// Whether α changes sign within a kelvin of the reference, where a ratio of two values says nothing.
fn turns_near(fluid: &AtReference<'_>) -> bool {
    let expansion = |offset: f64| fluid.medium.expansion(fluid.temperature + offset, fluid.pressure);
    matches!((expansion(-1.0), expansion(1.0)), (Some(below), Some(above)) if below * above <= 0.0)
}

fn explain(fluid: &AtReference<'_>, property: &PropertyRow, value: f64) -> Verdict {
    let at_one_atmosphere = || {
        let own = fluid.medium.properties(fluid.temperature, ATMOSPHERE).map(|properties| (property.own)(&properties));
        own.is_some_and(|own| deviation(value, own) <= FITS)
    };
    if fluid.medium.is_gas() && at_one_atmosphere() {
        return Verdict::AtOneAtmosphere;
    }
    temperature_of(fluid, property, value).map_or(Verdict::Off, Verdict::ElsewhereAt)
}

/// The temperature nearest to the reference at which the substance has the value, K.
fn temperature_of(fluid: &AtReference<'_>, property: &PropertyRow, value: f64) -> Option<f64> {
    let (from, to) = fluid.medium.range();
    let lowest = from.max(fluid.temperature - REACH).max(1.0);
    let highest = to.min(fluid.temperature + REACH);
    let off_at = |temperature: f64| {
        let properties = fluid.medium.properties(temperature, fluid.pressure)?;
        Some((property.own)(&properties) / value - 1.0).filter(|off| off.is_finite())
    };
    let step = (highest - lowest) / f64::from(STEPS);
    let points: Vec<(f64, f64)> = (0..=STEPS)
        .map(|index| lowest + step * f64::from(index))
        .filter_map(|temperature| Some((temperature, off_at(temperature)?)))
        .collect();
    let crossings = points.windows(2).filter_map(|pair| match pair {
        [(low, a), (high, b)] if a * b <= 0.0 && a != b => Some(low + (high - low) * a / (a - b)),
        _ => None,
    });
    // At an end of the data, or at a turn, the value may be met without being passed.
    let touches = points.iter().filter(|(_, off)| off.abs() <= FITS).map(|(temperature, _)| *temperature);
    let nearest = |a: &f64, b: &f64| (a - fluid.temperature).abs().total_cmp(&(b - fluid.temperature).abs());
    crossings.min_by(nearest).or_else(|| touches.min_by(nearest))
}
