//! `no-heat-condition`: a wall or an inlet of which the energy equation learns nothing.

use super::parts::{Role, add_to_boundary, role};
use crate::case::model::{Boundary, Heat};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{celsius, finding_of};
use crate::syntax::{Finding, Level, Span};

/// The check.
pub const CHECK: Check = Check {
    name: "no-heat-condition",
    family: Family::Closure,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Looks for a heat condition on every wall, and for the temperature of what every inlet brings.",
        formula: "",
        source: "the energy equation is of second order in space and takes one condition at every point of the surface: \
                 Carslaw and Jaeger, Conduction of Heat in Solids, 2nd edition, 1959, section 1.9 (recalled)",
        remedy: "Say `held at`, `heated by`, `cooled by`, `insulated`, `exchanges` or `radiates to` of a wall, and `carries` of an inlet.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let case = subject.case;
    let ambient = case.ambient_temperature.as_ref().filter(|value| value.is_known()).map(|value| value.si);
    case.boundaries.iter().filter_map(|boundary| of_boundary(boundary, ambient, weighing.level)).collect()
}

fn of_boundary(boundary: &Boundary, ambient: Option<f64>, level: Level) -> Option<Finding> {
    let name = &boundary.name.text;
    let finding = |message: String| finding_of(CHECK.name, level, &boundary.name, message);
    match role(boundary) {
        Role::Wall if boundary.heat.is_empty() => {
            let finding = finding(format!("Nothing says what heat passes through the wall `{name}`."))
                .remedy("`insulated`, `held at` a temperature, `heated by` a flux or power, or `exchanges` with the surroundings");
            Some(add_to_boundary(finding, boundary, "insulated", false))
        }
        Role::Unsaid => {
            Some(finding(format!("`{name}` says neither what it is nor what heat passes through it.")).remedy(
                "`wall` with a heat condition, `inlet`, `outlet`, `opening`, `symmetry`, `repeats with` or `meets`",
            ))
        }
        Role::Far if boundary.carries.is_none() && boundary.backflow.is_none() && boundary.heat.is_empty() => {
            let finding = finding(format!("Nothing says how warm the fluid is far away, at `{name}`."))
                .remedy("`held at` the temperature of the wide fluid");
            Some(with_ambient(finding, boundary, "held at", ambient))
        }
        Role::Inlet if boundary.carries.is_none() => {
            let message = format!("Nothing says how warm the fluid is that enters at `{name}`.");
            let held = boundary.heat.iter().find_map(|(heat, place)| match heat {
                Heat::HeldAt(value) => Some((value, *place)),
                _ => None,
            });
            Some(match held {
                // `held at T` on an inlet can only mean what it carries.
                Some((value, place)) => {
                    let words = Span::new(place.span.start, value.origin.place.span.start);
                    finding(format!("{message} `held at` is for walls."))
                        .remedy(format!("`carries {}`", celsius(value.si)))
                        .fix("Write `carries`", words, "carries ", true)
                }
                None => with_ambient(finding(message).remedy("`carries` a temperature"), boundary, "carries", ambient),
            })
        }
        _ => None,
    }
}

fn with_ambient(finding: Finding, boundary: &Boundary, word: &str, ambient: Option<f64>) -> Finding {
    match ambient {
        Some(kelvin) => add_to_boundary(finding, boundary, &format!("{word} {}", celsius(kelvin)), false),
        None => finding,
    }
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::{after_fix, expect_of};

    #[test]
    fn bare_walls_and_inlets() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary west_wall of room  #! no-heat-condition "the wall `west_wall`"
    side west
    wall
boundary vent of room  #! no-heat-condition "enters at `vent`"
    side top
    inlet
    enters at 0.2 m/s
boundary nothing of room  #! no-heat-condition "neither what it is"
    side east
boundary rest of room
    side remaining
    insulated
"##,
        );
    }

    #[test]
    fn complete_ones() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary west_wall of room
    side west
    held at 40 degC
boundary vent of room
    side top
    inlet
    enters at 0.2 m/s
    carries 18 degC
boundary grille of room
    side east
    outlet
boundary mirror of room
    side south
    symmetry
"##,
        );
    }

    #[test]
    fn the_fix_insulates() {
        let text = r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary west_wall of room
    side west
    wall
"##;
        let mended = r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary west_wall of room
    insulated
    side west
    wall
"##;
        assert_eq!(after_fix(CHECK.name, text), mended);
    }

    #[test]
    fn an_inlet_that_is_held() {
        let text = r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary vent of room
    side top
    inlet
    enters at 0.2 m/s
    held at 18 degC
"##;
        let mended = r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary vent of room
    side top
    inlet
    enters at 0.2 m/s
    carries 18 degC
"##;
        assert_eq!(after_fix(CHECK.name, text), mended);
    }
}
