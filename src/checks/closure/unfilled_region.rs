//! `unfilled-region`: a region of nothing, or of two things at once.

use super::parts::add_below;
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::finding_of;
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "unfilled-region",
    family: Family::Closure,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Looks at every region for the one fluid or solid that it is of.",
        formula: "",
        source: "common practice: the equations of a region take their coefficients from its material",
        remedy: "`filled with` a fluid, `surrounded by` one, or `made of` a solid.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let case = subject.case;
    let mut findings = Vec::new();
    for region in &case.regions {
        let name = &region.name.text;
        match (&region.filled_with, &region.made_of) {
            (None, None) => {
                let mut finding = finding_of(
                    CHECK.name,
                    weighing.level,
                    &region.name,
                    format!("Nothing says what `{name}` is filled with."),
                )
                .remedy("`filled with` a fluid, `surrounded by` one, or `made of` a solid");
                let sure = case.solids.is_empty();
                if let [only] = case.fluids.as_slice() {
                    finding.fixes.push(add_below(region.name.place, &format!("filled with  {}", only.name.text), sure));
                }
                findings.push(finding);
            }
            (Some(fluid), Some(solid)) => findings.push(
                finding_of(
                    CHECK.name,
                    weighing.level,
                    &region.name,
                    format!("`{name}` is both of the fluid `{}` and made of the solid `{}`.", fluid.text, solid.text),
                )
                .remedy("one of them, or a region each")
                .related(fluid.place, "the fluid")
                .related(solid.place, "the solid"),
            ),
            _ => {}
        }
    }
    findings
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::{after_fix, expect_of};

    #[test]
    fn nothing_or_two_things() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance air
solid brick
    conductivity 0.8 W/m/K
region room  #! unfilled-region "Nothing says"
    box 1 m by 2 m by 3 m
region hall  #! unfilled-region "both"
    box 1 m by 2 m by 3 m
    filled with a
    made of brick
region masonry
    box 1 m by 2 m by 3 m
    made of brick
"##,
        );
    }

    #[test]
    fn the_fix_fills_it() {
        let text = r##"
fluid a
    substance air
region room
    box 1 m by 2 m by 3 m
"##;
        let mended = r##"
fluid a
    substance air
region room
    filled with  a
    box 1 m by 2 m by 3 m
"##;
        assert_eq!(after_fix(CHECK.name, text), mended);
    }
}
