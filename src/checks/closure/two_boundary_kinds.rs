//! `two-boundary-kinds`: a boundary that is said to be two things.

use super::parts::kind_word;
use crate::case::model::BoundaryKind;
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::finding_of;
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "two-boundary-kinds",
    family: Family::Closure,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Looks for boundaries that are said to be two things: a wall and an outlet, say.",
        formula: "",
        source: "common practice: the momentum equations take one set of conditions at every point of the surface",
        remedy: "Keep one of them, or split the boundary in two.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let mut findings = Vec::new();
    for boundary in &subject.case.boundaries {
        // A face that meets another region may well be a wall.
        let meets = boundary.kinds.iter().any(|(kind, _)| matches!(kind, BoundaryKind::Meets(_)));
        let kinds: Vec<_> =
            boundary.kinds.iter().filter(|(kind, _)| !(meets && matches!(kind, BoundaryKind::Wall { .. }))).collect();
        let [(one, one_place), (other, other_place), ..] = kinds.as_slice() else { continue };
        let message = format!("`{}` is both `{}` and `{}`.", boundary.name.text, kind_word(one), kind_word(other));
        findings.push(
            finding_of(CHECK.name, weighing.level, &boundary.name, message)
                .remedy("keep one of them, or split the boundary in two")
                .related(*one_place, "one kind")
                .related(*other_place, "the other"),
        );
    }
    findings
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn two_kinds() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary one of room  #! two-boundary-kinds "both `wall` and `outlet`"
    side west
    wall
    outlet
boundary two of room
    side east
    wall
    insulated
"##,
        );
    }
}
