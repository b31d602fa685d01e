//! `conductivity-drift`: the change of conductivity over the span of temperatures.

use super::assess::Weighed;
use super::drift::{self, Drifting};
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::quantity::dimension_names::THERMAL_CONDUCTIVITY;
use crate::syntax::{Finding, Level};

/// The check.
pub static CHECK: Check = Check {
    name: "conductivity-drift",
    family: Family::DensityLaw,
    limits: &[(Level::Information, 0.1), (Level::Warning, 0.5)],
    level: Level::Information,
    basis: Basis {
        compares: "The change of thermal conductivity over the span with its value at the reference, which a solver with constant properties takes everywhere.",
        formula: "(greatest k − least k) / k(T0), between the lowest and the highest temperature",
        source: "Gray and Giorgini, Int. J. Heat Mass Transfer 19 (1976) 545-551 (0.1); the warning at 0.5 is common practice",
        remedy: "Let conductivity follow temperature in the solver, or keep the span smaller.",
    },
    run: Some(run),
};

/// Its number.
pub static NUMBER: Weighed = Weighed { check: &CHECK, symbol: "δk", value: |_, values| (DRIFTING.drift)(values) };

const DRIFTING: Drifting = Drifting {
    name: "conductivity",
    dimension: THERMAL_CONDUCTIVITY,
    drift: |values| values.conductivity_drift,
    property: |properties| properties.conductivity,
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    NUMBER.findings(subject, weighing, |region, value, limit| {
        drift::said(region, value, limit, &DRIFTING, "a conductivity that follows temperature".to_string())
    })
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn hot_air() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   200 degC
    density-law boussinesq   #! conductivity-drift "rises from"
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     300 degC
boundary cool of tank
    side        east
    wall
    held at     100 degC
"##,
        );
    }

    #[test]
    fn a_tracer_of_steam() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   steam
    reference   200 degC
    density-law boussinesq   #! conductivity-drift
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     250 degC
boundary cool of tank
    side        east
    wall
    held at     150 degC
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
    held at     30 degC
boundary cool of tank
    side        east
    wall
    held at     20 degC
"##,
        );
    }
}
