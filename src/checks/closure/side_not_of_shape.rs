//! `side-not-of-shape`: a boundary on a side that the region's shape does not have.

use super::sides::{sides_of, word};
use crate::case::model::{Case, Region, Shape, Side};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::listed;
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "side-not-of-shape",
    family: Family::Closure,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Holds the sides that each boundary names against those that the region's shape has.",
        formula: "",
        source: "the vocabulary of the language",
        remedy: "One of the sides of the shape, or `remaining`.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let mut findings = Vec::new();
    for region in &subject.case.regions {
        let sides: Vec<Side> = sides_of(subject.case, region).iter().map(|of| of.side).collect();
        if sides.is_empty() {
            continue;
        }
        let words: Vec<&str> = sides.iter().map(|side| word(*side)).collect();
        for boundary in subject.case.boundaries_of(region) {
            for stated in &boundary.sides {
                let side = stated.value;
                if has(region, &sides, side) {
                    continue;
                }
                let message =
                    format!("`{}` is {} and has no side `{}`.", region.name.text, shape_in_words(region), word(side));
                findings.push(
                    Finding::new(CHECK.name, weighing.level, stated.place, message)
                        .about(&*boundary.name.text)
                        .remedy(remedy(region, side, &words))
                        .related(region.shape_place.unwrap_or(region.name.place), "its shape"),
                );
            }
        }
    }
    findings
}

fn remedy(region: &Region, side: Side, words: &[&str]) -> String {
    let may_be_body = matches!(region.shape, Some(Shape::Cylinder { .. } | Shape::Sphere { .. } | Shape::Box { .. }));
    match (&region.filled_with, side) {
        (Some(fluid), Side::Face | Side::Far) if may_be_body => {
            format!("`surrounded by {}` where the fluid lies around it; else one of {}", fluid.text, listed(words))
        }
        _ => format!("one of {}, or `remaining`", listed(words)),
    }
}

/// Whether a boundary of the region names a side that its shape does not have.
pub fn names_others(case: &Case, region: &Region, sides: &[Side]) -> bool {
    case.boundaries_of(region).flat_map(|boundary| &boundary.sides).any(|stated| !has(region, sides, stated.value))
}

fn has(region: &Region, sides: &[Side], side: Side) -> bool {
    side == Side::Remaining || sides.contains(&side) || is_face_of_body(region, side)
}

/// The face of a body in a wide fluid may be called as the shape itself has it.
fn is_face_of_body(region: &Region, side: Side) -> bool {
    region.is_surrounded
        && match &region.shape {
            Some(Shape::Cylinder { .. } | Shape::Sphere { .. }) => side == Side::Around,
            Some(Shape::Box { .. }) => {
                matches!(side, Side::West | Side::East | Side::South | Side::North | Side::Bottom | Side::Top)
            }
            _ => false,
        }
}

fn shape_in_words(region: &Region) -> &'static str {
    match &region.shape {
        Some(Shape::Plate { .. }) => "a plate in a wide fluid",
        Some(_) if region.is_surrounded => "a body in a wide fluid",
        Some(Shape::Box { y: None, .. }) => "a plane case in x and z",
        Some(Shape::Box { .. }) => "a box",
        Some(Shape::Cylinder { .. }) => "a cylinder",
        Some(Shape::Sphere { .. }) => "a sphere",
        Some(Shape::Annulus { length: None, .. }) => "an annulus without ends (a plane case)",
        Some(Shape::Annulus { .. }) => "an annulus",
        Some(Shape::Gap { depth: None, .. }) => "a gap without a width (a plane case)",
        Some(Shape::Gap { .. }) => "a gap",
        Some(Shape::Channel { depth: None, .. }) => "a channel without a width (a plane case)",
        Some(Shape::Channel { .. }) => "a channel",
        None => "without a shape",
    }
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn sides_that_are_not_there() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance air
region slab
    box 1 m by 2 m
    filled with a
boundary one of slab
    side west, south  #! side-not-of-shape "plane case"
    insulated
region ball
    sphere 0.1 m
    surrounded by a
boundary skin of ball
    side outer  #! side-not-of-shape "body in a wide fluid"
    held at 40 degC
"##,
        );
    }

    #[test]
    fn sides_that_are() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance air
region tank
    cylinder 1 m by 2 m
    filled with a
boundary mantle of tank
    side around, bottom, top
    insulated
region ball
    sphere 0.1 m
    surrounded by a
boundary skin of ball
    side face
    held at 40 degC
boundary air_around of ball
    side far
    held at 20 degC
"##,
        );
    }
}
