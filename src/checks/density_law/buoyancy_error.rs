//! `buoyancy-error`: by how much the linear law misstates the driving force.

use super::assess::{Said, Weighed, per_cent, temperature, three_digits};
use super::criterion::{CriterionValues, Sample};
use super::remedy;
use crate::checks::look::named;
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::quantity::display::{format_difference, format_number};
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

const PICK: fn(&CriterionValues) -> f64 = |values| {
    // Where α changes sign, `density-maximum` speaks, and a share of a vanishing buoyancy says nothing.
    if values.densest_at.is_finite() { f64::NAN } else { values.buoyancy_error }
};

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
            || format!("{} comes to {}", named(&region.region.name), temperature(at)),
            |(bound, verb)| format!("{} {verb} {}", bound.set_by, temperature(at)),
        );
        let side = if at >= reference { "above" } else { "below" };
        let more = if region.values.buoyancy_is_understated { "more" } else { "less" };
        // At the end that is farther from the reference, the share is that of the linear buoyancy there.
        let is_farther_end = (at - reference).abs() + 1e-6 >= (bracket.lowest.value - reference).abs()
            && (at - reference).abs() + 1e-6 >= (bracket.highest.value - reference).abs();
        let off = if is_farther_end {
            format!("buoyancy there is {} {more} than the linear law gives", per_cent(value))
        } else {
            format!(
                "buoyancy there is {more} than the linear law gives, by {} of the greatest that it gives",
                per_cent(value)
            )
        };
        let centred = remedy::centred(region, PICK, first);
        let move_reference = centred.as_ref().and_then(|_| {
            let (middle, _) = remedy::at_mid_span(region)?;
            remedy::move_reference(region.fluid, middle, false)
        });
        Said {
            message: format!(
                "{place}, {} {side} the reference of {}: {off}; the error, {}, is held to {}",
                format_difference((at - reference).abs()),
                named(&region.fluid.name),
                three_digits(value),
                format_number(limit),
            ),
            remedy: remedy::join(&[Some(remedy::by_other_law(region)), centred, remedy::narrower(region, PICK, first)]),
            fixes: move_reference.into_iter().chain(remedy::to_other_law(region)).collect(),
        }
    })
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::{after_fix, expect_of};

    #[test]
    fn a_lid_far_above_the_reference() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   water
    reference   40 degC
    density-law boussinesq   #! buoyancy-error "53 K above the reference of `content`: buoyancy there is 43 % more than the linear law gives"
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     93 degC
boundary cool of tank
    side        east
    wall
    held at     40 degC
"##,
        );
    }

    #[test]
    fn a_gas_far_above_the_reference() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   20 degC
    density-law boussinesq   #! buoyancy-error "17 % less than"
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
    held at     20 degC
"##,
        );
    }

    #[test]
    fn within() {
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
    held at     50 degC
boundary cool of tank
    side        east
    wall
    held at     10 degC
"##,
        );
    }

    #[test]
    fn a_stated_expansion_is_the_slope_of_the_law() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   water
    reference   40 degC
    density-law boussinesq
    expansion   5e-4 1/K
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
    fn a_constant_density_beside_an_expansion_is_one_for_the_reference() {
        expect_of(
            CHECK.name,
            r##"
substance my_oil
    state         liquid
    valid         from 0 degC to 100 degC
    density       900 kg/m^3
    expansion     9e-4 1/K
    heat-capacity 1.5 kJ/kg/K
    conductivity  0.15 W/m/K
    viscosity     0.1 Pa.s

fluid content
    substance   my_oil
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

    #[test]
    fn an_expansion_that_rises_beside_it() {
        expect_of(
            CHECK.name,
            r##"
substance my_oil
    state         liquid
    valid         from 0 degC to 100 degC
    density       900 kg/m^3
    expansion     9e-4 1/K + 3e-5 1/K^2 * (T - 293.15 K)
    heat-capacity 1.5 kJ/kg/K
    conductivity  0.15 W/m/K
    viscosity     0.1 Pa.s

fluid content
    substance   my_oil
    reference   20 degC
    density-law boussinesq   #! buoyancy-error "32 % more"
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

    /// ρ = p M/(R T) about T0 gives α = 1/T0 and an error of αx/(1 + αx) of the linear buoyancy at x = T − T0.
    #[test]
    fn an_ideal_gas_by_hand() {
        use crate::substances::{Medium, library};
        let air = Medium { substance: library::find("air").unwrap(), fraction: 0.0 };
        let values = crate::checks::density_law::evaluate(&air, 300.0, 300.0, 360.0, 1e5, 1.0, 9.81);
        assert!((values.buoyancy_error - 0.2 / 1.2).abs() < 1e-6, "{}", values.buoyancy_error);
        assert_eq!(values.buoyancy_error_at, 360.0);
        assert!(!values.buoyancy_is_understated);
    }

    #[test]
    fn a_reference_at_mid_span_where_it_serves() {
        let text = r##"
fluid content
    substance   air
    reference   20 degC
    density-law boussinesq
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     70 degC
boundary cool of tank
    side        east
    wall
    held at     20 degC
"##;
        assert!(after_fix(CHECK.name, text).contains("reference   45 degC"), "{}", after_fix(CHECK.name, text));
    }
}
