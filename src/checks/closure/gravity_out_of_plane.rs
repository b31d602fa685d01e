//! `gravity-out-of-plane`: a plane case with gravity pointing out of its plane.

use crate::case::model::{Axis, Region, Shape};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{finding_of, gravity_acts, is_fluid};
use crate::quantity::display::format_number;
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "gravity-out-of-plane",
    family: Family::Closure,
    limits: &[(Level::Error, 0.01)],
    level: Level::Error,
    basis: Basis {
        compares: "Holds the direction of gravity against the plane of a plane case.",
        formula: "|g·n| / g, where n is normal to the plane: y, or the axis of an annulus without a length",
        source: "a plane case has no momentum equation along n, so that part of buoyancy is lost: common practice",
        remedy: "Gravity within the plane, or a case with depth.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let gravity = &subject.case.gravity;
    if !gravity_acts(subject.case) {
        return Vec::new();
    }
    let mut findings = Vec::new();
    for region in subject.case.regions.iter().filter(|region| is_fluid(region)) {
        let Some((axis, plane)) = normal_of_plane(region) else { continue };
        let [x, y, z] = gravity.direction;
        let out_of_plane = match axis {
            Axis::X => x,
            Axis::Y => y,
            Axis::Z => z,
        }
        .abs();
        let Some((level, _)) = weighing.over(out_of_plane) else { continue };
        let share = if out_of_plane > 0.999 {
            "Gravity points".into()
        } else {
            format!("{} of gravity points", percent(out_of_plane))
        };
        let message = format!("{share} out of the plane of `{}`, which is a plane case in {plane}.", region.name.text);
        let depth = "a length along the third axis for the shape";
        let mut finding = finding_of(CHECK.name, level, &region.name, message).remedy(if axis == Axis::Y {
            format!("gravity along -z, or {depth}")
        } else {
            format!("`along y` for its axis, or {depth}")
        });
        if let Some(place) = gravity.place {
            finding = finding.related(place, "gravity");
        }
        if let Some(place) = region.shape_place {
            finding = finding.related(place, "the plane case");
        }
        findings.push(finding);
    }
    findings
}

fn percent(share: f64) -> String {
    format!("{} %", format_number((100.0 * share).round()))
}

/// The direction along which a plane case has no extent, and the plane in words; `None` for a case with depth. An annulus
/// that states no axis lies across y, in x and z like every plane case.
fn normal_of_plane(region: &Region) -> Option<(Axis, &'static str)> {
    if region.is_surrounded {
        return None;
    }
    match region.shape.as_ref()? {
        Shape::Box { y: None, .. } | Shape::Gap { depth: None, .. } | Shape::Channel { depth: None, .. } => {
            Some((Axis::Y, "x and z"))
        }
        Shape::Annulus { length: None, .. } => Some(match region.axis.map_or(Axis::Y, |axis| axis.value) {
            Axis::X => (Axis::X, "y and z"),
            Axis::Y => (Axis::Y, "x and z"),
            Axis::Z => (Axis::Z, "x and y"),
        }),
        _ => None,
    }
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn gravity_along_y() {
        expect_of(
            CHECK.name,
            r##"
case
    gravity 9.81 m/s^2 along -y
fluid a
    substance air
region slab  #! gravity-out-of-plane "points out of the plane"
    box 1 m by 2 m
    filled with a
region room
    box 1 m by 2 m by 3 m
    filled with a
"##,
        );
    }

    #[test]
    fn partly() {
        expect_of(
            CHECK.name,
            r##"
case
    gravity 9.81 m/s^2 along (0, 1, -1)
fluid a
    substance air
region slab  #! gravity-out-of-plane "71 %"
    box 1 m by 2 m
    filled with a
region ring  #! gravity-out-of-plane
    annulus 0.1 m by 0.2 m along z
    filled with a
"##,
        );
    }

    #[test]
    fn in_the_plane() {
        expect_of(
            CHECK.name,
            r##"
case
    gravity 9.81 m/s^2 along (1, 0, -1)
fluid a
    substance air
region slab
    box 1 m by 2 m
    filled with a
region ring
    annulus 0.1 m by 0.2 m along y
    filled with a
"##,
        );
    }
}
