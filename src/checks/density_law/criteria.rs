//! Every criterion of the Boussinesq law for a case, with its limits and the margin left: what hover, `numbers` and
//! `envelope` list. The checks weigh the same numbers.

use super::assess::{Assessed, Weighed, assessed};
use super::*;
use crate::case::model::DensityLaw;
use crate::checks::{Check, Subject, weighing};
use crate::syntax::Level;

/// The numbers that are weighed, in the order in which they are listed.
pub static NUMBERS: &[&Weighed] = &[
    &density_span::NUMBER,
    &buoyancy_error::NUMBER,
    &expansion_drift::NUMBER,
    &viscosity_drift::NUMBER,
    &conductivity_drift::NUMBER,
    &heat_capacity_drift::NUMBER,
    &hydrostatic_span::NUMBER,
    &adiabatic_lapse::NUMBER,
    &dissipation_number::NUMBER,
    &closed_gas_pressure::NUMBER,
    &low_mach::NUMBER,
];

/// One criterion of one region.
#[derive(Clone, Debug)]
pub struct Criterion {
    /// The check that weighs it.
    pub check: &'static Check,
    /// Its symbol: "αΔT".
    pub symbol: &'static str,
    /// Its value; dimensionless. `NaN` where it is not known or does not apply.
    pub value: f64,
    /// Its least and greatest value, where an estimate stands behind it.
    pub band: Option<(f64, f64)>,
    /// The limits with the level that each brings, the mildest first, as the practice in force sets them.
    pub limits: Vec<(Level, f64)>,
    /// 1 − value / first limit: the part of the limit that is left, below 0 where the value is over it.
    pub margin_left: f64,
    /// The level that the value draws; `None` within the first limit.
    pub level: Option<Level>,
    /// The region, by name.
    pub region: String,
    /// The fluid, by name.
    pub fluid: String,
}

/// Every criterion of every region whose fluid follows the Boussinesq law.
pub fn criteria(subject: &Subject<'_>) -> Vec<Criterion> {
    of_laws(subject, &[DensityLaw::Boussinesq])
}

/// Every criterion of every region of these laws: under another law, what the Boussinesq law would meet.
pub fn of_laws(subject: &Subject<'_>, laws: &[DensityLaw]) -> Vec<Criterion> {
    assessed(subject, laws).iter().flat_map(|region| of_region(subject, region)).collect()
}

fn of_region(subject: &Subject<'_>, region: &Assessed<'_>) -> Vec<Criterion> {
    let criterion = |check, symbol, value, band, limits: Vec<(Level, f64)>, level| Criterion {
        check,
        symbol,
        value,
        band,
        margin_left: limits.first().map_or(f64::NAN, |(_, limit)| 1.0 - value / limit),
        limits,
        level,
        region: region.region.name.text.to_string(),
        fluid: region.fluid.name.text.to_string(),
    };
    let weighed = NUMBERS.iter().map(|number| {
        let limits = weighing(number.check, &subject.case.practice);
        let weight = number.weigh(region, &limits);
        criterion(
            number.check,
            number.symbol,
            weight.value,
            weight.band,
            limits.limits,
            weight.over.map(|(level, _)| level),
        )
    });
    // Whether α changes sign has no scale to leave a margin on: over 0 it does.
    let reversal = region.values.density_reversal;
    let turns = region.values.densest_at.is_finite().then_some(Level::Error);
    let limits = vec![(Level::Error, 0.0)];
    let maximum = criterion(&density_maximum::CHECK, "−α_least/α_greatest", reversal, None, limits, turns);
    weighed.chain(std::iter::once(Criterion { margin_left: f64::NAN, ..maximum })).collect()
}
