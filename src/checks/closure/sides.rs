//! Which sides a region has, and which boundaries cover them, as the checks of closure ask it.

use crate::case::model::{Boundary, Case, Region, Shape, Side};
use crate::physics::geometry::{covered_sides, sides, sizes};
use crate::physics::model::SideGeometry;

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

/// The sides that a region's shape has, with their areas; empty without a shape.
pub fn sides_of(case: &Case, region: &Region) -> Vec<SideGeometry> {
    let mut sides = sizes(region).map(|sizes| sides(case, region, &sizes)).unwrap_or_default();
    sides.sort_by_key(|of| of.side);
    sides
}

/// The sides that some boundary must cover. The narrow rims of a gap and the ends of an annulus count as insulated where
/// nothing is said, those of a channel as open: common practice.
pub fn sides_to_assign(case: &Case, region: &Region) -> Vec<SideGeometry> {
    let must_be = |side: Side| match &region.shape {
        _ if region.is_surrounded => true,
        Some(Shape::Gap { .. } | Shape::Channel { .. }) => matches!(side, Side::West | Side::East),
        Some(Shape::Annulus { .. }) => matches!(side, Side::Inner | Side::Outer),
        _ => true,
    };
    sides_of(case, region).into_iter().filter(|of| must_be(of.side)).collect()
}

/// Whether a boundary covers only a part of its sides.
pub fn is_partial(boundary: &Boundary) -> bool {
    boundary.patch.is_some() || boundary.area.is_some()
}

/// Whether a boundary names a side itself.
pub fn names(boundary: &Boundary, side: Side) -> bool {
    boundary.sides.iter().any(|stated| stated.value == side)
}

/// The sides that a boundary covers, wholly or in part.
pub fn covered_by(case: &Case, region: &Region, boundary: &Boundary) -> Vec<Side> {
    covered_sides(case, region)
        .into_iter()
        .filter(|(_, boundaries)| boundaries.iter().any(|on_it| on_it.name.text == boundary.name.text))
        .map(|(side, _)| side)
        .collect()
}

/// The area that a boundary with a `patch` or an `area` states.
pub fn stated_area(boundary: &Boundary) -> Option<f64> {
    let patch = boundary.patch.as_ref().map(|(width, height)| width.si * height.si);
    boundary.area.as_ref().map(|area| area.si).or(patch)
}
