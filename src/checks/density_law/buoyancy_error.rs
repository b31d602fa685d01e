//! `buoyancy-error`: by how much the linear law misstates the driving force.

use super::assess::{Said, Weighed, per_cent, temperature};
use super::criterion::{CriterionValues, Sample};
use super::remedy;
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::quantity::display::format_difference;
use crate::substances::Properties;
use crate::syntax::{Finding, Level};

/// The check.
pub static CHECK: Check = Check {
    name: "buoyancy-error",
    family: Family::DensityLaw,
    limits: &[(Level::Warning, 0.1), (Level::Error, 0.3)],
    level: Level::Warning,
    basis: Basis {
        compares: "The density that the linear law gives with the substance's own, at every temperature of the span, as a share of the greatest buoyancy that the linear law gives.",
        formula: "max |ρ(T) − ρ0 (1 − α (T − T0))| / (ρ0 α max |T − T0|)",
        source: "The linear law is that of Boussinesq 1903, its remainder as in Gray and Giorgini, Int. J. Heat Mass Transfer 19 (1976) 545-551; the limits are common practice",
        remedy: "Move the reference to mid-span, or take density-law ideal-gas or variable.",
    },
    run: Some(run),
};

/// Its number.
pub static NUMBER: Weighed = Weighed { check: &CHECK, symbol: "buoyancy error", value: |_, values| PICK(values) };

const PICK: fn(&CriterionValues) -> f64 = |values| values.buoyancy_error;

/// By how much the linear law is off, and where.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Misstatement {
    /// As a share of the greatest linear buoyancy.
    pub share: f64,
    /// The temperature of the largest error, K.
    pub at: f64,
    /// Whether the true buoyancy there is the greater.
    pub is_understated: bool,
}

/// The largest error of ρ0 (1 − α (T − T0)) over the samples. ρ0 is the substance's own density at T0, for a constant
/// offset of density drives nothing. 0 where every sample lies at T0.
pub fn misstatement(samples: &[Sample], reference: f64, at_reference: &Properties) -> Misstatement {
    let Properties { density: rho0, expansion: alpha, .. } = *at_reference;
    let farthest = samples.iter().map(|(temperature, _)| (temperature - reference).abs()).fold(0.0, f64::max);
    let greatest_buoyancy = rho0 * alpha.abs() * farthest;
    let mut largest = Misstatement { share: f64::NAN, at: f64::NAN, is_understated: false };
    for (temperature, properties) in samples {
        let true_buoyancy = rho0 - properties.density;
        let linear_buoyancy = rho0 * alpha * (temperature - reference);
        let error = (true_buoyancy - linear_buoyancy).abs();
        let share = if farthest == 0.0 { 0.0 } else { error / greatest_buoyancy };
        // The first known share replaces the unknown one.
        if share.is_finite() && (largest.share.is_nan() || share > largest.share) {
            let is_understated = true_buoyancy.abs() > linear_buoyancy.abs();
            largest = Misstatement { share, at: *temperature, is_understated };
        }
    }
    largest
}

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    NUMBER.findings(subject, weighing, |region, value, limit| {
        let first = weighing.first_limit();
        let (at, reference) = (region.values.buoyancy_error_at, region.conditions.reference);
        let bracket = region.bracket;
        // The worst place is an end of the span, but for substances whose density turns.
        let ends = [(&bracket.lowest, "goes down to"), (&bracket.highest, "reaches")];
        let end = ends.into_iter().find(|(bound, _)| (bound.value - at).abs() < 1e-6);
        let place = end.map_or_else(
            || format!("{} comes to {}", region.region.name.text, temperature(at)),
            |(bound, verb)| format!("{} {verb} {}", bound.set_by, temperature(at)),
        );
        let side = if at >= reference { "above" } else { "below" };
        let amount = if region.values.buoyancy_is_understated { "too little" } else { "too much" };
        let centred = remedy::centred(region, PICK, first);
        let move_reference = centred.as_ref().and_then(|_| {
            let (middle, _) = remedy::at_mid_span(region)?;
            remedy::move_reference(region.fluid, middle, false)
        });
        Said {
            message: format!(
                "{place}, {} {side} the reference of {}: the linear law gives {amount} buoyancy there, by {} of the greatest that it gives in {}; it is held to {}",
                format_difference((at - reference).abs()),
                region.fluid.name.text,
                per_cent(value),
                region.region.name.text,
                per_cent(limit),
            ),
            remedy: remedy::join(&[
                Some(remedy::by_other_law(region)),
                centred,
                remedy::narrower(region, PICK, first),
            ]),
            fixes: move_reference.into_iter().chain(remedy::to_other_law(region)).collect(),
        }
    })
}
