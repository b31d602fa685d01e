//! Which sides a region has, and which boundaries cover them.

use crate::case::model::{Boundary, Case, Region, Shape, Side};
use crate::physics::model::RegionPhysics;

/// The word of a side.
pub const fn word(side: Side) -> &'static str {
    match side {
        Side::West => "west",
        Side::East => "east",
        Side::South => "south",
        Side::North => "north",
        Side::Bottom => "bottom",
        Side::Top => "top",
        Side::Around => "around",
        Side::Inner => "inner",
        Side::Outer => "outer",
        Side::Face => "face",
        Side::Far => "far",
        Side::Remaining => "remaining",
    }
}

/// The sides that a region's shape has; empty without a shape.
pub fn sides_of(region: &Region) -> &'static [Side] {
    use Side::{Around, Bottom, East, Face, Far, Inner, North, Outer, South, Top, West};
    let Some(shape) = &region.shape else { return &[] };
    if region.is_surrounded {
        return &[Face, Far];
    }
    match shape {
        Shape::Box { y: Some(_), .. } | Shape::Gap { depth: Some(_), .. } | Shape::Channel { depth: Some(_), .. } => {
            &[West, East, South, North, Bottom, Top]
        }
        Shape::Box { y: None, .. } | Shape::Gap { depth: None, .. } | Shape::Channel { depth: None, .. } => {
            &[West, East, Bottom, Top]
        }
        Shape::Cylinder { .. } => &[Around, Bottom, Top],
        Shape::Sphere { .. } => &[Around],
        Shape::Annulus { length: Some(_), .. } => &[Inner, Outer, Bottom, Top],
        Shape::Annulus { length: None, .. } => &[Inner, Outer],
        Shape::Plate { .. } => &[Face, Far],
    }
}

/// The sides that some boundary must cover. The narrow rims of a gap and the ends of an annulus count as insulated where
/// nothing is said, those of a channel as open: common practice.
pub fn sides_to_assign(region: &Region) -> &'static [Side] {
    match &region.shape {
        Some(Shape::Gap { .. } | Shape::Channel { .. }) if !region.is_surrounded => &[Side::West, Side::East],
        Some(Shape::Annulus { .. }) if !region.is_surrounded => &[Side::Inner, Side::Outer],
        _ => sides_of(region),
    }
}

/// Whether a boundary covers only a part of its sides.
pub fn is_partial(boundary: &Boundary) -> bool {
    boundary.patch.is_some() || boundary.area.is_some()
}

/// Whether a boundary names a side itself.
pub fn names(boundary: &Boundary, side: Side) -> bool {
    boundary.sides.iter().any(|stated| stated.value == side)
}

/// The sides that a boundary covers, wholly or in part; `remaining` stands for those that no other boundary of the region
/// covers wholly.
pub fn covered_by(case: &Case, region: &Region, boundary: &Boundary) -> Vec<Side> {
    let named = |side: &Side| {
        names(boundary, *side)
            || (names(boundary, Side::Remaining)
                && !case.boundaries_of(region).any(|other| names(other, *side) && !is_partial(other)))
    };
    sides_of(region).iter().copied().filter(named).collect()
}

/// The area of one side, m²; per metre of depth for a plane case. `NaN` where it is not known.
pub fn area_of_side(physics: &RegionPhysics, side: Side) -> f64 {
    physics.geometry.sides.iter().find(|of| of.side == side).map_or(f64::NAN, |of| of.area)
}

/// The area that a boundary with a `patch` or an `area` states.
pub fn stated_area(boundary: &Boundary) -> Option<f64> {
    let patch = boundary.patch.as_ref().map(|(width, height)| width.si * height.si);
    boundary.area.as_ref().map(|area| area.si).or(patch)
}

/// The area of a boundary, m²; per metre of depth for a plane case. `NaN` where it is not known.
pub fn area_of(case: &Case, region: &Region, physics: &RegionPhysics, boundary: &Boundary) -> f64 {
    if let Some(area) = stated_area(boundary) {
        return area;
    }
    // What patches of other boundaries take from the same sides.
    let taken = |side: Side| -> f64 {
        case.boundaries_of(region)
            .filter(|other| other.name.text != boundary.name.text && names(other, side))
            .filter_map(stated_area)
            .sum()
    };
    covered_by(case, region, boundary).into_iter().map(|side| area_of_side(physics, side) - taken(side)).sum()
}
