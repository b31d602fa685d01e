//! Slips in the properties of a fluid, told by the substance's own value: mPa.s for Pa.s, kJ for J, g/cm^3 for kg/m^3,
//! and the kinematic viscosity for the dynamic one.

use super::slip::Slip;
use super::stated::{
    AtReference, PROPERTIES, PropertyRow, as_written, at_reference, deviation, in_unit_of, number_written, rewritten,
};
use crate::case::model::Value;
use crate::checks::Subject;
use crate::checks::density_law::assess::temperature;
use crate::checks::look::named;
use crate::quantity::parse_unit;
use crate::syntax::Level;

/// From what deviation on a value may be a slip: by less, no pair of units differs.
const WRONG: f64 = 0.5;
/// Within what deviation the same number in another unit settles it.
const RIGHT: f64 = 0.05;
/// Within what deviation it is likely, where the value as written is ten times off or more.
const LIKELY: f64 = 0.2;
/// Within what deviation a viscosity is the other viscosity. The two may differ by as little as the value is off.
const OTHER_VISCOSITY: f64 = 0.02;

/// The slips.
pub fn slips(subject: &Subject<'_>) -> Vec<Slip> {
    let fluids = at_reference(subject);
    let pairs = fluids.iter().flat_map(|fluid| PROPERTIES.iter().map(move |property| (fluid, property)));
    pairs
        .filter_map(|(fluid, property)| {
            let value = (property.stated)(fluid.fluid).filter(|value| value.si > 0.0)?;
            let own = (property.own)(&fluid.own);
            in_other_unit(fluid, property, value, own).or_else(|| other_viscosity(fluid, property, value, own))
        })
        .collect()
}

fn in_other_unit(fluid: &AtReference<'_>, property: &PropertyRow, value: &Value, own: f64) -> Option<Slip> {
    let off = deviation(value.si, own);
    let is_wrong = off > WRONG;
    if !is_wrong {
        return None;
    }
    let number = number_written(value)?;
    let tried = property.units.iter().filter_map(|unit| {
        let si = parse_unit(unit).ok()?.to_si(number);
        Some((*unit, deviation(si, own))).filter(|(_, off)| off.is_finite())
    });
    let (unit, left) = tried.min_by(|a, b| a.1.total_cmp(&b.1))?;
    if !(left <= RIGHT || (left <= LIKELY && off >= 9.0)) {
        return None;
    }
    let meant = format!("{} {unit}", rewritten(number));
    let message = format!(
        "the {} of {}, {}, is a unit away from that of {}, {} at {}: {meant} fits",
        property.name,
        named(&fluid.fluid.name),
        as_written(value),
        fluid.medium.substance.name.text,
        in_unit_of(own, value),
        temperature(fluid.temperature),
    );
    Some(Slip::of(value, &fluid.fluid.name.text, Level::Error, meant, left <= RIGHT, message))
}

/// A dynamic viscosity whose number is that of the kinematic one, or the reverse.
fn other_viscosity(fluid: &AtReference<'_>, property: &PropertyRow, value: &Value, own: f64) -> Option<Slip> {
    let (other_own, other_name, scale) = match property.symbol {
        "μ" => (fluid.own.kinematic_viscosity(), "kinematic viscosity", fluid.own.density),
        "ν" => (fluid.own.viscosity, "dynamic viscosity", 1.0 / fluid.own.density),
        _ => return None,
    };
    let off = deviation(value.si, own);
    // The number in the SI unit, or in mPa.s for mm^2/s, in which oils are quoted; these differ by a factor 1000.
    let as_other = match property.symbol {
        "μ" => [value.si, value.si * 1e-3],
        _ => [value.si, value.si * 1e3],
    };
    let met = as_other.into_iter().find(|number| deviation(*number, other_own) <= OTHER_VISCOSITY)?;
    if !(off > super::judge::CLOSE && off > 3.0 * deviation(met, other_own)) {
        return None;
    }
    let meant = in_unit_of(met * scale, value);
    let level = if off > 1.0 {
        Level::Error
    } else if off > 0.2 {
        Level::Warning
    } else {
        Level::Information
    };
    let message = format!(
        "the {} of {}, {}, is the number of the {other_name} of {} at {}; the {} is {meant}",
        property.name,
        named(&fluid.fluid.name),
        as_written(value),
        fluid.medium.substance.name.text,
        temperature(fluid.temperature),
        property.name,
    );
    Some(Slip::of(value, &fluid.fluid.name.text, level, meant, false, message))
}
