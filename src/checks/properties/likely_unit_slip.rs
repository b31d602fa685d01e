//! `likely-unit-slip`: the value fits the substance, or what is usual, in another unit.

use super::slip::{replacement, slips};
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::syntax::{Finding, Level};

/// The check.
pub static CHECK: Check = Check {
    name: "likely-unit-slip",
    family: Family::Units,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Values that cannot be meant as written (a property a factor away from the substance's own, a first cell wider than the space, a temperature outside the substance's data) with the same number in another unit.",
        formula: "number × other unit, within 20 % of the substance's own or within the range that the rest of the deck gives",
        source: "The substance's data, whose source stands with each (deckline substances); common practice",
        remedy: "Write the unit that was meant.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, _: &Weighing) -> Vec<Finding> {
    let findings = slips(subject).into_iter().map(|slip| {
        let mut finding = Finding::new(CHECK.name, slip.level, slip.place, slip.message)
            .remedy(format!("{}.", slip.meant))
            .about(slip.subject);
        if let Some(literal) = slip.literal {
            finding.fixes.push(replacement(format!("Write {}", slip.meant), literal, slip.meant, slip.sure));
            if literal != slip.place {
                finding = finding.related(literal, "the quantity is written here");
            }
        }
        finding
    });
    findings.collect()
}
