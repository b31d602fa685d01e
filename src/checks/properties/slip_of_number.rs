//! Slips in plain numbers and in gravity: per cent and degrees left out, growth as an excess, cm/s^2 or ft/s^2 for m/s^2.

use super::slip::Slip;
use super::stated::{as_written, number_written, rewritten};
use crate::case::model::Value;
use crate::checks::Subject;
use crate::quantity::dimension_names::ACCELERATION;
use crate::quantity::parse_unit;
use crate::quantity::unit_table::STANDARD_GRAVITY;
use crate::syntax::Level;

/// The slips.
pub fn slips(subject: &Subject<'_>) -> Vec<Slip> {
    let case = subject.case;
    let mut slips = Vec::new();
    for solid in &case.solids {
        slips.extend(solid.emissivity.as_ref().and_then(|value| per_cent(value, "emissivity", &solid.name.text)));
    }
    for boundary in &case.boundaries {
        slips.extend(boundary.emissivity.as_ref().and_then(|value| per_cent(value, "emissivity", &boundary.name.text)));
    }
    for fluid in &case.fluids {
        slips.extend(fluid.fraction.as_ref().and_then(|value| per_cent(value, "fraction", &fluid.name.text)));
    }
    for region in &case.regions {
        slips.extend(region.tilt.as_ref().and_then(|value| degrees(value, &region.name.text)));
    }
    for mesh in &case.meshes {
        let name = mesh.region.as_ref().map_or("mesh", |name| &*name.text);
        slips.extend(mesh.growth.as_ref().and_then(|value| growth(value, name)));
    }
    slips.extend(case.gravity.value.as_ref().and_then(gravity));
    slips
}

fn is_bare(value: &Value) -> bool {
    matches!(&*value.origin.unit, "" | "1")
}

/// 85 for 85 %.
fn per_cent(value: &Value, name: &str, owner: &str) -> Option<Slip> {
    // Little over 1 is a share that is wrong, and no per cent that anyone would write.
    if !(is_bare(value) && value.si >= 2.0 && value.si <= 100.0) {
        return None;
    }
    let meant = format!("{} %", rewritten(value.si));
    let message = format!("the {name} of `{owner}`, {}, is over 1; {meant} was probably meant", as_written(value));
    Some(Slip::of(value, owner, Level::Error, meant, true, message))
}

/// 60 for 60 deg.
fn degrees(value: &Value, owner: &str) -> Option<Slip> {
    if !(is_bare(value) && value.si > std::f64::consts::PI && value.si <= 180.0) {
        return None;
    }
    let meant = format!("{} deg", rewritten(value.si));
    let message = format!(
        "the tilt of `{owner}`, {}, is in radians as it stands, and over π; {meant} was probably meant",
        as_written(value)
    );
    Some(Slip::of(value, owner, Level::Error, meant, true, message))
}

/// 15 % for 1.15.
fn growth(value: &Value, owner: &str) -> Option<Slip> {
    if !(&*value.origin.unit == "%" && value.si > 0.0 && value.si <= 0.5) {
        return None;
    }
    let meant = rewritten(1.0 + value.si);
    let message = format!(
        "the growth of `{owner}`, {0}, makes each cell a fraction of the one before; {meant} makes it {0} greater",
        as_written(value)
    );
    Some(Slip::of(value, owner, Level::Error, meant, false, message))
}

/// 981 m/s^2 for cm/s^2, 32.2 m/s^2 for ft/s^2.
fn gravity(value: &Value) -> Option<Slip> {
    let number = number_written(value).filter(|_| value.dimension == ACCELERATION)?;
    let is_standard = |si: f64| (si.abs() / STANDARD_GRAVITY - 1.0).abs() < 0.01;
    let units = ["m/s^2", "cm/s^2", "mm/s^2", "ft/s^2"].into_iter();
    let unit = units
        .filter(|_| !is_standard(value.si))
        .find(|unit| parse_unit(unit).is_ok_and(|unit| is_standard(unit.to_si(number))))?;
    let meant = format!("{} {unit}", rewritten(number));
    let message =
        format!("gravity of {} acts nowhere that people build; {meant} is that of the earth", as_written(value));
    Some(Slip::of(value, "case", Level::Error, meant, true, message))
}
