//! `rests-on-estimate`: temperatures of a region that are estimated, not given.

use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{celsius, finding_of, regions};
use crate::physics::model::Bound;
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "rests-on-estimate",
    family: Family::Record,
    limits: &[],
    level: Level::Hint,
    basis: Basis {
        compares: "Says which ends of the temperatures of a region are estimated, by what, and with which band.",
        formula: "",
        source: "the correlation or balance that the finding names",
        remedy: "Hold the estimate against a measurement or a finer method where a verdict depends on it.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let mut findings = Vec::new();
    for (region, physics) in regions(subject) {
        let Some(bracket) = &physics.bracket else { continue };
        let ends = [("lowest", &bracket.lowest), ("highest", &bracket.highest)];
        let parts: Vec<String> = ends.iter().filter_map(|(which, bound)| in_words(which, bound)).collect();
        if parts.is_empty() {
            continue;
        }
        let numbers = &physics.numbers;
        let is_outside = numbers.nusselt.is_finite() && !numbers.nusselt_inside_range;
        let note = if is_outside { " The correlation of the region is used outside its published range." } else { "" };
        let message = format!("In `{}` {}.{note}", region.name.text, parts.join("; "));
        findings.push(
            finding_of(CHECK.name, weighing.level, &region.name, message)
                .remedy("hold it against a measurement or a finer method where a verdict depends on it"),
        );
    }
    findings
}

fn in_words(which: &str, bound: &Bound) -> Option<String> {
    let by = bound.estimate.as_ref()?;
    let (low, high) = bound.band;
    if !(bound.value.is_finite() && low.is_finite() && high.is_finite()) {
        return None;
    }
    Some(format!(
        "the {which} temperature is an estimate, {} ({} to {}): {}; {by}",
        celsius(bound.value),
        celsius(low),
        celsius(high),
        bound.set_by
    ))
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn a_flux() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c  #! rests-on-estimate "the highest temperature is an estimate"
    box          0.3 m by 0.3 m
    filled with  a
    flow         laminar
boundary hot of c
    side west
    heated by 20 W/m^2
boundary cold of c
    side east
    held at 10 degC
boundary rest of c
    side remaining
    insulated
"##,
        );
    }

    #[test]
    fn given_ends() {
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
"##,
        );
    }
}
