//! `no-shape`: a region without a size.

use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::finding_of;
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "no-shape",
    family: Family::Closure,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Looks at every region for its shape.",
        formula: "",
        source: "common practice: every characteristic number of buoyant flow needs a length",
        remedy: "`box`, `cylinder`, `sphere`, `annulus`, `gap`, `plate` or `channel`, with lengths.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let mut findings = Vec::new();
    for region in subject.case.regions.iter().filter(|region| region.shape.is_none() && region.shape_place.is_none()) {
        let message = format!("Nothing says what shape and size `{}` has.", region.name.text);
        findings.push(
            finding_of(CHECK.name, weighing.level, &region.name, message)
                .remedy("`box`, `cylinder`, `sphere`, `annulus`, `gap`, `plate` or `channel`, with its lengths"),
        );
    }
    findings
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn no_size() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance air
region room  #! no-shape
    filled with a
region hall
    box 1 m by 2 m by 3 m
    filled with a
"##,
        );
    }
}
