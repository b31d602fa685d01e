//! `symmetry-across-gravity`: a mirror plane that gravity points through.

use super::parts::{Role, role};
use super::sides::{covered_by, sides_of, word};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{finding_of, gravity_acts, is_fluid, region_of};
use crate::syntax::{Finding, Level};

/// Sine of the angle that a mirror plane may make with gravity: rounding of a vector in a deck.
const SLIGHT: f64 = 0.01;

/// The check.
pub const CHECK: Check = Check {
    name: "symmetry-across-gravity",
    family: Family::Closure,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Holds the direction of gravity against each mirror plane.",
        formula: "n·g, which is 0 for a mirror plane; n is normal to it",
        source: "a mirror turns the component of the buoyancy force normal to it around, so the equations are symmetric only about planes \
                 that hold gravity: common practice",
        remedy: "Model the whole, or mirror it about an upright plane.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let gravity = &subject.case.gravity;
    if !gravity_acts(subject.case) {
        return Vec::new();
    }
    let mut findings = Vec::new();
    for boundary in subject.case.boundaries.iter().filter(|boundary| role(boundary) == Role::Symmetry) {
        let Some((region, _)) = region_of(subject, boundary) else { continue };
        // A stated tilt turns the region against gravity, and says only how the hot plate stands.
        if !is_fluid(region) || region.tilt.is_some() {
            continue;
        }
        let sides = sides_of(subject.case, region);
        let across = covered_by(subject.case, region, boundary)
            .into_iter()
            .find(|side| sides.iter().any(|of| of.side == *side && dot(of.normal, gravity.direction).abs() > SLIGHT));
        if let Some(side) = across {
            let message = format!(
                "`{}` is a mirror plane on the side `{}`, and gravity points through it: buoyancy has no such symmetry.",
                boundary.name.text,
                word(side)
            );
            let finding = finding_of(CHECK.name, weighing.level, &boundary.name, message)
                .remedy("the whole height without a mirror, or a mirror on an upright side");
            findings.push(match gravity.place {
                Some(place) => finding.related(place, "gravity"),
                None => finding,
            });
        }
    }
    findings
}

fn dot(one: [f64; 3], other: [f64; 3]) -> f64 {
    one.iter().zip(&other).map(|(a, b)| a * b).sum()
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn mirrors() {
        expect_of(
            CHECK.name,
            r##"
case
    gravity 9.81 m/s^2 along -z
fluid a
    substance air
region room
    box 1 m by 2 m by 3 m
    filled with a
boundary ceiling of room  #! symmetry-across-gravity "`top`"
    side top
    symmetry
boundary middle of room
    side south
    symmetry
"##,
        );
    }

    #[test]
    fn without_gravity() {
        expect_of(
            CHECK.name,
            r##"
case
    gravity none
fluid a
    substance air
region room
    box 1 m by 2 m by 3 m
    filled with a
boundary ceiling of room
    side top
    symmetry
"##,
        );
    }
}
