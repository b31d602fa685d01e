//! `closed-gas-pressure`: a sealed gas that warms rises in pressure, which a law of constant density does not show.

use super::assess::{Assessed, Said, Weighed, per_cent, temperature};
use super::criterion::CriterionValues;
use super::remedy;
use crate::case::model::{BoundaryKind, Case, Region, Shape};
use crate::checks::look::named;
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::quantity::display::format_si;
use crate::syntax::{Finding, Level};

/// The check.
pub static CHECK: Check = Check {
    name: "closed-gas-pressure",
    family: Family::DensityLaw,
    limits: &[(Level::Warning, 0.05)],
    level: Level::Warning,
    basis: Basis {
        compares: "The pressure that a sealed gas comes to at its mean temperature with the pressure at the reference.",
        formula: "|T_mean / T0 − 1|, T_mean midway between the lowest and the highest temperature",
        source: "The ideal-gas law at constant volume; the limit is common practice",
        remedy: "Take density-law ideal-gas with the mass of gas held, or put the reference where the gas was sealed in and keep in mind that the pressure is not computed.",
    },
    run: Some(run),
};

/// Its number; unknown for what is no sealed gas.
pub static NUMBER: Weighed = Weighed { check: &CHECK, symbol: "Δp/p0", value: pressure_rise };

fn pressure_rise(assessed: &Assessed<'_>, values: &CriterionValues) -> f64 {
    if is_sealed_gas(assessed) { rise(values.mean, assessed.conditions.reference) } else { f64::NAN }
}

/// Whether the region holds a gas that cannot leave it.
pub fn is_sealed_gas(assessed: &Assessed<'_>) -> bool {
    assessed.medium.is_some_and(|medium| medium.is_gas()) && is_sealed(assessed.case, assessed.region)
}

/// |T_mean / T0 − 1|, what pressure changes by at constant volume and mass.
pub fn rise(mean: f64, reference: f64) -> f64 {
    (mean / reference - 1.0).abs()
}

/// Whether no fluid can pass out of the region.
fn is_sealed(case: &Case, region: &Region) -> bool {
    let is_enclosure = !region.is_surrounded
        && matches!(
            region.shape,
            Some(
                Shape::Box { .. }
                    | Shape::Cylinder { .. }
                    | Shape::Sphere { .. }
                    | Shape::Annulus { .. }
                    | Shape::Gap { .. }
            )
        );
    let mut kinds = case.boundaries_of(region).flat_map(|boundary| &boundary.kinds);
    is_enclosure
        && !kinds.any(|(kind, _)| matches!(kind, BoundaryKind::Inlet | BoundaryKind::Outlet | BoundaryKind::Opening))
}

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    NUMBER.findings(subject, weighing, |region, value, limit| {
        let (mean, reference) = (region.bracket.middle(), region.conditions.reference);
        let pressure = |at: f64| format_si(at, crate::quantity::dimension_names::PRESSURE);
        Said {
            message: format!(
                "{} seals its gas in, at {} and {}, and comes to {} in the mean: the pressure {} by {}, to {}, which no constant-density law shows; this is held to {}",
                named(&region.region.name),
                temperature(reference),
                pressure(region.conditions.pressure),
                temperature(mean),
                if mean > reference { "rises" } else { "falls" },
                per_cent(value),
                pressure(region.conditions.pressure * mean / reference),
                per_cent(limit),
            ),
            remedy: remedy::join(&[
                Some("`density-law ideal-gas`, with the mass of gas held".to_string()),
                Some("an opening, where the real space has one".to_string()),
            ]),
            fixes: remedy::to_other_law(region).into_iter().collect(),
        }
    })
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn a_sealed_cabinet_that_warms() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   15 degC
    density-law boussinesq   #! closed-gas-pressure "the pressure rises by 10 %"
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     55 degC
boundary cool of tank
    side        east
    wall
    held at     35 degC
"##,
        );
    }

    #[test]
    fn a_cold_store_sealed_warm() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   20 degC
    density-law boussinesq   #! closed-gas-pressure "falls by"
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     10 degC
boundary cool of tank
    side        east
    wall
    held at     -20 degC
"##,
        );
    }

    #[test]
    fn an_opening_lets_it_out() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   15 degC
    density-law boussinesq
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     55 degC
boundary cool of tank
    side        east
    wall
    held at     35 degC
boundary vent of tank
    side        top
    opening
"##,
        );
    }

    #[test]
    fn a_liquid_is_another_matter() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   water
    reference   15 degC
    density-law boussinesq
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     55 degC
boundary cool of tank
    side        east
    wall
    held at     35 degC
"##,
        );
    }

    #[test]
    fn sealed_at_the_mean() {
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
    held at     40 degC
boundary cool of tank
    side        east
    wall
    held at     20 degC
"##,
        );
    }
}
