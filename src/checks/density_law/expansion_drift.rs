//! `expansion-drift`: the change of thermal expansion over the span of temperatures.

use super::assess::Weighed;
use super::criterion::CriterionValues;
use super::drift;
use super::remedy;
use crate::checks::{Basis, Check, Family, Subject, Weighing};
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
pub static NUMBER: Weighed = Weighed { check: &CHECK, symbol: "δα", value: |_, values| PICK(values) };

const PICK: fn(&CriterionValues) -> f64 = |values| values.expansion_drift;

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    NUMBER.findings(subject, weighing, |region, value, limit| {
        let by_function = remedy::by_other_law(region);
        drift::said(region, value, limit, "thermal expansion", by_function, PICK, |properties| properties.expansion)
    })
}
