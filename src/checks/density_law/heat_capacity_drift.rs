//! `heat-capacity-drift`: the change of heat capacity over the span of temperatures.

use super::assess::Weighed;
use super::drift::{self, Drifting};
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::quantity::dimension_names::SPECIFIC_HEAT_CAPACITY;
use crate::syntax::{Finding, Level};

/// The check.
pub static CHECK: Check = Check {
    name: "heat-capacity-drift",
    family: Family::DensityLaw,
    limits: &[(Level::Information, 0.1), (Level::Warning, 0.5)],
    level: Level::Information,
    basis: Basis {
        compares: "The change of specific heat capacity over the span with its value at the reference, which a solver with constant properties takes everywhere.",
        formula: "(greatest cp − least cp) / cp(T0), between the lowest and the highest temperature",
        source: "Gray and Giorgini, Int. J. Heat Mass Transfer 19 (1976) 545-551 (0.1); the warning at 0.5 is common practice",
        remedy: "Let heat capacity follow temperature in the solver, or keep the span smaller.",
    },
    run: Some(run),
};

/// Its number.
pub static NUMBER: Weighed = Weighed { check: &CHECK, symbol: "δcp", value: |_, values| (DRIFTING.drift)(values) };

const DRIFTING: Drifting = Drifting {
    name: "heat capacity",
    dimension: SPECIFIC_HEAT_CAPACITY,
    drift: |values| values.heat_capacity_drift,
    property: |properties| properties.heat_capacity,
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    NUMBER.findings(subject, weighing, |region, value, limit| {
        drift::said(region, value, limit, &DRIFTING, "a heat capacity that follows temperature".to_string())
    })
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn oil() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   engine_oil
    reference   80 degC
    density-law boussinesq   #! heat-capacity-drift "heat capacity of `content` rises"
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     140 degC
boundary cool of tank
    side        east
    wall
    held at     40 degC
"##,
        );
    }

    #[test]
    fn carbon_dioxide() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   carbon_dioxide
    reference   100 degC
    density-law boussinesq   #! heat-capacity-drift
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     200 degC
boundary cool of tank
    side        east
    wall
    held at     0 degC
"##,
        );
    }

    #[test]
    fn water() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   water
    reference   25 degC
    density-law boussinesq
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     90 degC
boundary cool of tank
    side        east
    wall
    held at     5 degC
"##,
        );
    }
}
