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
        && 1e-3 * spacing.si < height.si
    {
        let why = format!("`{name}` is {} wide and only {} high", as_written(spacing), as_written(height));
        return rescaled(spacing, "m", "mm", name, &why).into_iter().collect();
    }
    let lengths = lengths(shape);
    let each = |from: &str, to: &str, why: &str| {
        let slips = lengths.iter().filter_map(|length| {
            rescaled(length, from, to, name, &format!("`{name}` has a length of {}, and {why}", as_written(length)))
        });
        slips.collect()
    };
    let is_turbulent = region.flow.is_some_and(|flow| matches!(flow.value, Flow::Turbulent(_)));
    if lengths.iter().all(|length| length.si >= HUGE) && !is_turbulent {
        return each("m", "mm", "no flow in a space of this size is laminar");
    }
    if lengths.iter().all(|length| length.si > 0.0 && length.si <= TINY) && rayleigh < 1.0 {
        return each("mm", "m", "no fluid moves by itself in a space of this size");
    }
    Vec::new()
}

/// A first cell that takes half of the space or more, and in mm does not.
fn of_first_cell(case: &Case, mesh: &Mesh) -> Option<Slip> {
    let first = mesh.first_cell.as_ref()?;
    let region = case.region(&mesh.region.as_ref()?.text)?;
    let lengths = lengths(region.shape.as_ref()?);
    let least = lengths.into_iter().min_by(|a, b| a.si.total_cmp(&b.si))?;
    if first.si < 0.5 * least.si || 1e-3 * first.si >= 0.05 * least.si {
        return None;
    }
    let name = &region.name.text;
    let why =
        format!("a first cell of {} hardly fits into `{name}`, which is {} wide", as_written(first), as_written(least));
    rescaled(first, "m", "mm", name, &why)
}

/// The same number in the unit `to`, where the value is written in `from`.
fn rescaled(value: &Value, from: &str, to: &str, owner: &str, why: &str) -> Option<Slip> {
    let number = number_written(value).filter(|_| &*value.origin.unit == from)?;
    let meant = format!("{} {to}", rewritten(number));
    let message = format!("{why}; {meant} was probably meant");
    Some(Slip::of(value, owner, Level::Warning, meant, false, message))
}
