//! Slips in lengths: mm for m and m for mm, told by the space itself: a first cell wider than the space, a gap wider
//! than it is high, a laminar space larger than any, or one too small to move.

use super::slip::Slip;
use super::stated::{as_written, number_written, rewritten};
use crate::case::model::{Case, Flow, Mesh, Region, Shape, Value};
use crate::checks::Subject;
use crate::syntax::Level;

/// Every length of a space from here on, m, and no turbulence: no such flow is laminar.
const HUGE: f64 = 100.0;
/// Every length of a space up to here, m.
const TINY: f64 = 2e-3;

/// The slips.
pub fn slips(subject: &Subject<'_>) -> Vec<Slip> {
    let case = subject.case;
    let mut slips = Vec::new();
    for (index, region) in case.regions.iter().enumerate() {
        let rayleigh = subject.physics.regions.get(index).map_or(f64::NAN, |physics| physics.numbers.rayleigh);
        slips.extend(of_region(region, rayleigh));
    }
    slips.extend(case.meshes.iter().filter_map(|mesh| of_first_cell(case, mesh)));
    slips
}

/// The lengths of a shape.
pub fn lengths(shape: &Shape) -> Vec<&Value> {
    match shape {
        Shape::Box { x, y, z } => [Some(x), y.as_ref(), Some(z)].into_iter().flatten().collect(),
        Shape::Cylinder { diameter, height } => vec![diameter, height],
        Shape::Sphere { diameter } => vec![diameter],
        Shape::Annulus { inner, outer, length } => {
            [Some(inner), Some(outer), length.as_ref()].into_iter().flatten().collect()
        }
        Shape::Gap { spacing, height, depth } | Shape::Channel { spacing, height, depth } => {
            [Some(spacing), Some(height), depth.as_ref()].into_iter().flatten().collect()
        }
        Shape::Plate { height, depth } => [Some(height), depth.as_ref()].into_iter().flatten().collect(),
    }
}

fn of_region(region: &Region, rayleigh: f64) -> Vec<Slip> {
    let Some(shape) = &region.shape else { return Vec::new() };
    let name = &region.name.text;
    if let Shape::Gap { spacing, height, .. } | Shape::Channel { spacing, height, .. } = shape
        && spacing.si >= 3.0 * height.si
        && let Some(slip) = rescaled(spacing, "m", "mm", name, |meant| {
            (meant < height.si).then(|| format!("wider than it is high ({})", as_written(height)))
        })
    {
        return vec![slip];
    }
    let lengths = lengths(shape);
    let is_turbulent = region.flow.is_some_and(|flow| matches!(flow.value, Flow::Turbulent(_)));
    if lengths.iter().all(|length| length.si >= HUGE) && !is_turbulent {
        let each = lengths.iter().filter_map(|length| {
            rescaled(length, "m", "mm", name, |_| Some("and no flow in a space of this size is laminar".to_string()))
        });
        return each.collect();
    }
    if lengths.iter().all(|length| length.si > 0.0 && length.si <= TINY) && rayleigh < 1.0 {
        let each = lengths.iter().filter_map(|length| {
            rescaled(length, "mm", "m", name, |_| {
                Some("and no fluid moves by itself in a space of this size".to_string())
            })
        });
        return each.collect();
    }
    Vec::new()
}

/// A first cell that takes half of the space or more, and in mm does not.
fn of_first_cell(case: &Case, mesh: &Mesh) -> Option<Slip> {
    let first = mesh.first_cell.as_ref()?;
    let region = case.region(&mesh.region.as_ref()?.text)?;
    let lengths = lengths(region.shape.as_ref()?);
    let least = lengths.iter().map(|length| length.si).fold(f64::INFINITY, f64::min);
    let fills_it = first.si >= 0.5 * least;
    if !fills_it {
        return None;
    }
    rescaled(first, "m", "mm", &region.name.text, |meant| {
        (meant < 0.05 * least).then(|| "and the space is hardly wider".to_string())
    })
}

/// The same number in another unit, where the value is written in `from` and `evidence`, given the value in `to` (m),
/// speaks for it.
fn rescaled(
    value: &Value,
    from: &str,
    to: &str,
    owner: &str,
    evidence: impl Fn(f64) -> Option<String>,
) -> Option<Slip> {
    let number = number_written(value).filter(|_| &*value.origin.unit == from)?;
    let si = crate::quantity::parse_unit(to).ok()?.to_si(number);
    let why = evidence(si)?;
    let meant = format!("{} {to}", rewritten(number));
    let message = format!(
        "{} in {owner} is {} {to}, {why}; {meant} was probably meant",
        as_written(value),
        rewritten(value.si * number / si)
    );
    Some(Slip::of(value, owner, Level::Warning, meant, false, message))
}
