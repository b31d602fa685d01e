//! `no-run`: a case that does not say whether a steady state is sought or the flow is followed in time.

use super::parts::add_below;
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "no-run",
    family: Family::Closure,
    limits: &[],
    level: Level::Warning,
    basis: Basis {
        compares: "Looks for `steady` or `transient`, and for only one of them.",
        formula: "",
        source: "common practice: whether the time derivatives stand decides which conditions close the equations",
        remedy: "`steady`, or `transient for` a time `step` a time.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let case = subject.case;
    // A file of materials, taken in by decks, has nothing to run.
    if case.boundaries.is_empty() {
        return Vec::new();
    }
    let either = "`steady`, or `transient for` a time `step` a time";
    let Some(run) = &case.run else {
        let message = "Nothing says whether a steady state is sought or the flow is followed in time.";
        return vec![
            Finding::new(CHECK.name, weighing.level, case.place, message)
                .remedy(format!("an entry `run` with {either}")),
        ];
    };
    match (run.steady, &run.transient) {
        (None, None) => {
            let message = "The run is neither steady nor transient.";
            let mut finding = Finding::new(CHECK.name, weighing.level, run.place, message).remedy(either);
            finding.fixes.push(add_below(run.place, "steady", false));
            vec![finding]
        }
        (Some(place), Some(_)) => {
            let message = "The run is said to be steady and transient at once.";
            vec![Finding::new(CHECK.name, Level::Error, place, message).remedy("one of them")]
        }
        _ => Vec::new(),
    }
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn neither() {
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
    side remaining
    insulated
run  #! no-run "neither"
    time-stepping implicit
"##,
        );
    }

    #[test]
    fn both() {
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
    side remaining
    insulated
run
    steady  #! no-run "at once"
    transient for 1 h step 1 s
"##,
        );
    }

    #[test]
    fn no_entry() {
        expect_of(
            CHECK.name,
            r##"
case "Room"  #! no-run
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary one of room
    side remaining
    insulated
"##,
        );
    }

    #[test]
    fn materials_alone() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a
"##,
        );
    }
}
