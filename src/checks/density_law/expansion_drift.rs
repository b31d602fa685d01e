//! `expansion-drift`: the change of thermal expansion over the span of temperatures.

use super::assess::Weighed;
use super::drift::{self, Drifting};
use super::remedy;
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::quantity::dimension_names::THERMAL_EXPANSION;
use crate::syntax::{Finding, Level};

/// The check.
pub static CHECK: Check = Check {
    name: "expansion-drift",
    family: Family::DensityLaw,
    limits: &[(Level::Information, 0.1), (Level::Warning, 0.5)],
    level: Level::Information,
    basis: Basis {
        compares: "The change of thermal expansion over the span with its value at the reference, which the linear law takes for the whole span.",
        formula: "(greatest α − least α) / α(T0), between the lowest and the highest temperature",
        source: "Gray and Giorgini, Int. J. Heat Mass Transfer 19 (1976) 545-551 (0.1); the warning at 0.5 is common practice",
        remedy: "Take density-law ideal-gas or variable, move the reference to mid-span, or keep the span smaller.",
    },
    run: Some(run),
};

/// Its number.
pub static NUMBER: Weighed = Weighed { check: &CHECK, symbol: "δα", value: |_, values| (DRIFTING.drift)(values) };

const DRIFTING: Drifting = Drifting {
    name: "thermal expansion",
    dimension: THERMAL_EXPANSION,
    drift: |values| {
        // Where α changes sign, `density-maximum` speaks, and a change in parts of a vanishing α says nothing.
        if values.densest_at.is_finite() { f64::NAN } else { values.expansion_drift }
    },
    property: |properties| properties.expansion,
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    NUMBER.findings(subject, weighing, |region, value, limit| {
        drift::said(region, value, limit, &DRIFTING, remedy::by_other_law(region))
    })
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn water_within_a_few_kelvin() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   water
    reference   25 degC
    density-law boussinesq   #! expansion-drift "expansion of `content` rises from"
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     28 degC
boundary cool of tank
    side        east
    wall
    held at     22 degC
"##,
        );
    }

    #[test]
    fn water_over_a_wide_span() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   water
    reference   25 degC
    density-law boussinesq   #! expansion-drift "taken to 50 %"
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     40 degC
boundary cool of tank
    side        east
    wall
    held at     10 degC
"##,
        );
    }

    #[test]
    fn air() {
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
    held at     43 degC
boundary cool of tank
    side        east
    wall
    held at     17 degC
"##,
        );
    }
}
