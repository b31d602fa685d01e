//! `conductivity-drift`: the change of conductivity over the span of temperatures.

use super::assess::Weighed;
use super::criterion::CriterionValues;
use super::drift;
use crate::checks::{Basis, Check, Family, Subject, Weighing};
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
pub static NUMBER: Weighed = Weighed { check: &CHECK, symbol: "δk", value: |_, values| PICK(values) };

const PICK: fn(&CriterionValues) -> f64 = |values| values.conductivity_drift;

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    NUMBER.findings(subject, weighing, |region, value, limit| {
        let by_function = "a conductivity that follows temperature".to_string();
        drift::said(region, value, limit, "conductivity", by_function, PICK, |properties| properties.conductivity)
    })
}
