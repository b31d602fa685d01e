//! `two-heat-conditions`: heat conditions on one boundary that contradict each other.

use super::parts::{Role, heat_word, role};
use crate::case::model::{Boundary, Heat};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::finding_of;
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "two-heat-conditions",
    family: Family::Closure,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Looks for heat conditions on one boundary that cannot hold together: a given temperature or no heat beside \
                   anything else, heating beside cooling, and any but `insulated` on a mirror or a repeating face.",
        formula: "",
        source: "the energy equation takes one condition at every point of the surface: Carslaw and Jaeger, Conduction of Heat in \
                 Solids, 2nd edition, 1959, section 1.9 (recalled); heat flows that add up (a heater on a wall that also loses heat) \
                 are one condition",
        remedy: "Keep one of them, or split the boundary in two.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    subject.case.boundaries.iter().filter_map(|boundary| of_boundary(boundary, weighing.level)).collect()
}

fn of_boundary(boundary: &Boundary, level: Level) -> Option<Finding> {
    let name = &boundary.name.text;
    let finding = |message: String| finding_of(CHECK.name, level, &boundary.name, message);
    for (index, (one, one_place)) in boundary.heat.iter().enumerate() {
        for (other, other_place) in boundary.heat.iter().skip(index + 1) {
            if contradict(one, other) {
                let message =
                    format!("`{name}` is both `{}` and `{}`: only one can hold.", heat_word(one), heat_word(other));
                return Some(
                    finding(message)
                        .remedy("keep one of them, or split the boundary in two")
                        .related(*one_place, "one condition")
                        .related(*other_place, "the other"),
                );
            }
        }
    }
    let beside = |what: &str, remedy: &str| {
        let (heat, place) = boundary.heat.iter().find(|(heat, _)| !matches!(heat, Heat::Insulated))?;
        let message = format!("`{name}` is {what}, which settles its heat already, and yet `{}`.", heat_word(heat));
        Some(finding(message).remedy(remedy).related(*place, "the heat condition"))
    };
    match role(boundary) {
        Role::Symmetry => beside("a mirror plane", "leave the heat condition out, or make it a `wall`"),
        Role::Repeats => beside("a repeating face", "leave the heat condition out, or make it a `wall`"),
        Role::Inlet if boundary.carries.is_some() => beside("an inlet with `carries`", "leave the heat condition out"),
        _ => None,
    }
}

fn contradict(one: &Heat, other: &Heat) -> bool {
    let settles = |heat: &Heat| matches!(heat, Heat::HeldAt(_) | Heat::Insulated);
    let heats = |heat: &Heat| matches!(heat, Heat::HeatedBy(_));
    let cools = |heat: &Heat| matches!(heat, Heat::CooledBy(_));
    settles(one) || settles(other) || (heats(one) && cools(other)) || (cools(one) && heats(other))
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn contradictions() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary one of room  #! two-heat-conditions "`held at` and `heated by`"
    side west
    held at 40 degC
    heated by 100 W
boundary two of room  #! two-heat-conditions
    side east
    insulated
    exchanges 6 W/m^2/K with 8 degC
boundary three of room  #! two-heat-conditions
    side south
    heated by 10 W
    cooled by 5 W
boundary four of room  #! two-heat-conditions "mirror"
    side north
    symmetry
    held at 20 degC
"##,
        );
    }

    #[test]
    fn heat_flows_that_add_up() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary one of room
    side west
    heated by 100 W
    exchanges 6 W/m^2/K with 8 degC
    radiates to -40 degC
boundary two of room
    side north
    symmetry
    insulated
"##,
        );
    }
}
