//! `viscosity-drift`: the change of viscosity over the span of temperatures.

use super::assess::Weighed;
use super::drift::{self, Drifting};
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::quantity::dimension_names::DYNAMIC_VISCOSITY;
use crate::syntax::{Finding, Level};

/// The check.
pub static CHECK: Check = Check {
    name: "viscosity-drift",
    family: Family::DensityLaw,
    limits: &[(Level::Information, 0.1), (Level::Warning, 0.5)],
    level: Level::Information,
    basis: Basis {
        compares: "The change of viscosity over the span with its value at the reference, which a solver with constant properties takes everywhere.",
        formula: "(greatest μ − least μ) / μ(T0), between the lowest and the highest temperature",
        source: "Gray and Giorgini, Int. J. Heat Mass Transfer 19 (1976) 545-551 (0.1); the warning at 0.5 is common practice",
        remedy: "Let viscosity follow temperature in the solver, or keep the span smaller.",
    },
    run: Some(run),
};

/// Its number.
pub static NUMBER: Weighed = Weighed { check: &CHECK, symbol: "δμ", value: |_, values| (DRIFTING.drift)(values) };

const DRIFTING: Drifting = Drifting {
    name: "viscosity",
    dimension: DYNAMIC_VISCOSITY,
    drift: |values| values.viscosity_drift,
    property: |properties| properties.viscosity,
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    NUMBER.findings(subject, weighing, |region, value, limit| {
        drift::said(region, value, limit, &DRIFTING, "a viscosity that follows temperature".to_string())
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
    reference   60 degC
    density-law boussinesq   #! viscosity-drift "falls from"
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     80 degC
boundary cool of tank
    side        east
    wall
    held at     40 degC
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
    density-law boussinesq   #! viscosity-drift "taken to 10 %"
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
    held at     22 degC
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
