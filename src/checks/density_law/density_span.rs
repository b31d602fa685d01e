//! `density-span`: αΔT, the share by which density changes over the span.

use super::assess::{Said, Weighed, temperature, three_digits};
use super::{criterion::CriterionValues, remedy};
use crate::checks::look::named;
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::quantity::display::{format_difference, format_number};
use crate::syntax::{Finding, Level};

/// The check.
pub static CHECK: Check = Check {
    name: "density-span",
    family: Family::DensityLaw,
    limits: &[(Level::Warning, 0.1), (Level::Error, 0.2)],
    level: Level::Warning,
    basis: Basis {
        compares: "The change of density over the whole span of temperatures with the density itself. The Boussinesq law keeps density constant but in the buoyancy term, which holds while this is small.",
        formula: "αΔT (Gay-Lussac number): α the thermal expansion at the reference, ΔT the highest less the lowest temperature",
        source: "Gray and Giorgini, Int. J. Heat Mass Transfer 19 (1976) 545-551 (0.1); Spiegel and Veronis, Astrophys. J. 131 (1960) 442-447; the error at 0.2 is common practice",
        remedy: "Take density-law ideal-gas for a gas or variable for a liquid, or keep the span of temperatures smaller.",
    },
    run: Some(run),
};

/// Its number.
pub static NUMBER: Weighed = Weighed { check: &CHECK, symbol: "αΔT", value: |_, values| PICK(values) };

const PICK: fn(&CriterionValues) -> f64 = |values| values.density_span;

/// |α| ΔT.
pub fn gay_lussac(expansion: f64, span: f64) -> f64 {
    expansion.abs() * span
}

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    NUMBER.findings(subject, weighing, |region, value, limit| {
        let (low, high) = (&region.bracket.lowest, &region.bracket.highest);
        Said {
            message: format!(
                "αΔT is {} in {}, between {} ({}) and {} ({}), {} apart; the Boussinesq law is held to {}",
                three_digits(value),
                named(&region.region.name),
                temperature(low.value),
                low.set_by,
                temperature(high.value),
                high.set_by,
                format_difference(region.bracket.span()),
                format_number(limit),
            ),
            remedy: remedy::join(&[
                Some(remedy::by_other_law(region)),
                remedy::narrower(region, PICK, weighing.first_limit()),
            ]),
            fixes: remedy::to_other_law(region).into_iter().collect(),
        }
    })
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::{after_fix, expect_of};

    #[test]
    fn the_case_s_own_numbers() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   25 degC at 0.79 bar
    density-law boussinesq   #! density-span "αΔT is 0.151"
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     70 degC
boundary cool of tank
    side        east
    wall
    held at     25 degC
"##,
        );
    }

    #[test]
    fn beyond_twice_the_limit() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   100 degC
    density-law boussinesq   #! density-span "held to 0.2"
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     180 degC
boundary cool of tank
    side        east
    wall
    held at     20 degC
"##,
        );
    }

    #[test]
    fn within() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   30 degC
    density-law boussinesq
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     42 degC
boundary cool of tank
    side        east
    wall
    held at     18 degC
"##,
        );
    }

    #[test]
    fn another_law_is_not_weighed() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   25 degC
    density-law ideal-gas
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     70 degC
boundary cool of tank
    side        east
    wall
    held at     25 degC
"##,
        );
    }

    #[test]
    fn without_gravity_nothing_is_misstated() {
        expect_of(
            CHECK.name,
            r##"
case
    gravity none
fluid content
    substance   air
    reference   25 degC
    density-law boussinesq
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     70 degC
boundary cool of tank
    side        east
    wall
    held at     25 degC
"##,
        );
    }

    #[test]
    fn the_fix_changes_the_law() {
        let text = r##"
fluid content
    substance   air
    reference   25 degC
    density-law boussinesq
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     70 degC
boundary cool of tank
    side        east
    wall
    held at     25 degC
"##;
        assert!(after_fix(CHECK.name, text).contains("density-law ideal-gas"), "{}", after_fix(CHECK.name, text));
    }

    #[test]
    fn the_advice_is_within_the_limit() {
        let text = r##"

fluid content
    substance   air
    reference   25 degC
    density-law boussinesq
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     70 degC
boundary cool of tank
    side        east
    wall
    held at     25 degC
"##;
        let found = crate::testing::findings(text);
        let advice = found.iter().find(|finding| finding.check == CHECK.name).map(|finding| finding.remedy.clone());
        assert_eq!(advice.as_deref(), Some("`density-law ideal-gas`, or boundary warm below 54.8 degC"));
        // 29.8 K / 298.15 K is 0.09995, 29.9 K would be 0.1003.
        expect_of(CHECK.name, &text.replace("70 degC", "54.8 degC"));
    }
}
