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

#[cfg(test)]
mod tests {
    use super::*;
    use crate::testing::TODAY;
    use crate::workspace::analyse::analyse_text;

    const TANK: &str = r##"
fluid bath
    substance   water
    reference   25 degC
    density-law boussinesq
region tank
    box         0.1 m by 0.1 m by 0.1 m
    filled with bath
boundary warm of tank
    side        west
    wall
    held at     40 degC
boundary cool of tank
    side        east
    wall
    held at     10 degC
"##;

    fn of(text: &str, laws: &[DensityLaw]) -> Vec<Criterion> {
        let deck = analyse_text(text, TODAY);
        of_laws(&Subject { case: &deck.case, physics: &deck.physics, today: TODAY }, laws)
    }

    #[test]
    fn every_number_is_listed_once_with_its_limits() {
        let criteria = of(TANK, &[DensityLaw::Boussinesq]);
        let names: Vec<&str> = criteria.iter().map(|criterion| criterion.check.name).collect();
        assert_eq!(names.len(), NUMBERS.len() + 1);
        assert!(names.iter().enumerate().all(|(index, name)| !names[..index].contains(name)));
        assert!(criteria.iter().all(|criterion| !criterion.limits.is_empty() && criterion.region == "tank"));
    }

    #[test]
    fn a_criterion_agrees_with_its_check() {
        let findings = crate::testing::findings(TANK);
        for criterion in of(TANK, &[DensityLaw::Boussinesq]) {
            let found = findings.iter().find(|finding| finding.check == criterion.check.name);
            assert_eq!(found.map(|finding| finding.level), criterion.level, "{}", criterion.check.name);
            if let Some(margin) = found.and_then(|finding| finding.margin.as_ref()) {
                assert_eq!(margin.value, criterion.value);
                assert!(criterion.margin_left < 0.0);
            }
        }
    }

    #[test]
    fn under_another_law_they_are_what_the_linear_one_would_meet() {
        let variable = TANK.replace("boussinesq", "variable");
        assert!(of(&variable, &[DensityLaw::Boussinesq]).is_empty());
        let (linear, other) = (of(TANK, &[DensityLaw::Boussinesq]), of(&variable, &[DensityLaw::Variable]));
        let same = |a: f64, b: f64| a == b || (a.is_nan() && b.is_nan());
        assert!(linear.iter().zip(&other).all(|(a, b)| same(a.value, b.value)));
    }
}
