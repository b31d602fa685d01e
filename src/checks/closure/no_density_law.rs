//! `no-density-law`: a fluid of which the buoyancy term learns nothing.

use super::parts::add_below;
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::finding_of;
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "no-density-law",
    family: Family::Closure,
    limits: &[],
    level: Level::Warning,
    basis: Basis {
        compares: "Looks at the fluid of every region for its density law.",
        formula: "",
        source: "common practice: how density depends on temperature closes the momentum equations",
        remedy: "`density-law` with `boussinesq`, `ideal-gas`, `variable` or `constant`.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let case = subject.case;
    let mut findings = Vec::new();
    for fluid in case.fluids.iter().filter(|fluid| fluid.density_law.is_none()) {
        let is_used =
            case.regions.iter().any(|region| case.fluid_of(region).is_some_and(|of| of.name.text == fluid.name.text));
        if is_used {
            let message = format!("Nothing says how the density of `{}` depends on temperature.", fluid.name.text);
            let mut finding = finding_of(CHECK.name, weighing.level, &fluid.name, message)
                .remedy("`density-law` with `boussinesq`, `ideal-gas`, `variable` or `constant`");
            finding.fixes.push(add_below(fluid.name.place, "density-law boussinesq", false));
            findings.push(finding);
        }
    }
    findings
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::{after_fix, expect_of};

    #[test]
    fn no_law() {
        expect_of(
            CHECK.name,
            r##"
fluid a  #! no-density-law
    substance air
fluid spare
    substance air
region room
    box 1 m by 2 m by 3 m
    filled with a
"##,
        );
    }

    #[test]
    fn the_fix_takes_the_linear_one() {
        let text = r##"
fluid a
    substance air
region room
    box 1 m by 2 m by 3 m
    filled with a
"##;
        let mended = r##"
fluid a
    density-law boussinesq
    substance air
region room
    box 1 m by 2 m by 3 m
    filled with a
"##;
        assert_eq!(after_fix(CHECK.name, text), mended);
    }
}
