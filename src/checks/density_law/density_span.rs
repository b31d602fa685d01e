//! `density-span`: αΔT, the share by which density changes over the span.

use super::assess::{Said, Weighed, temperature};
use super::{criterion::CriterionValues, remedy};
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
                format_number(value),
                region.region.name.text,
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
