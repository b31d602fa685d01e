//! `requirement-unknown`: a requirement on a number that the case does not settle.

use super::region_numbers::{End, region_number};
use super::requirement_failed::numbers_in;
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::listed;
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "requirement-unknown",
    family: Family::Record,
    limits: &[],
    level: Level::Warning,
    basis: Basis {
        compares: "Looks for requirements on a number of a region that cannot be worked out, and so are neither held nor failed.",
        formula: "",
        source: "common practice: what was not checked must not pass for checked",
        remedy: "State what the number needs, or check it by hand and leave the requirement out.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let mut findings = Vec::new();
    for requirement in &subject.case.requirements {
        let unknown: Vec<String> = numbers_in(requirement)
            .iter()
            .filter(|(number, region)| region_number(subject, number, region, End::Middle).is_nan())
            .map(|(number, region)| format!("{number}({region})"))
            .collect();
        if unknown.is_empty() {
            continue;
        }
        let names: Vec<&str> = unknown.iter().map(String::as_str).collect();
        let message = format!(
            "`{}` could not be checked: {} {} not known.",
            requirement.text.trim(),
            listed(&names),
            if names.len() > 1 { "are" } else { "is" }
        );
        findings.push(
            Finding::new(CHECK.name, weighing.level, requirement.place, message)
                .about(numbers_in(requirement).first().map(|(_, region)| region.to_string()).unwrap_or_default())
                .remedy("what the number needs: temperatures, a shape, a fluid; or another requirement"),
        );
    }
    findings
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn what_nothing_settles() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          0.3 m by 0.3 m
    filled with  a
    flow         laminar
boundary hot of c
    side west
    held at 30 degC
boundary cold of c
    side east
    held at 10 degC
boundary rest of c
    side remaining
    insulated
require
    Re(c) < 2000  #! requirement-unknown "`Re(c)` is not known"
    Ra(c) < 1e9
"##,
        );
    }
}
