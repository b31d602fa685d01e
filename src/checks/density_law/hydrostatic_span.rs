//! `hydrostatic-span`: the change of density under the fluid's own weight.

use super::assess::{Said, Weighed, three_digits};
use super::{criterion::CriterionValues, remedy};
use crate::checks::look::named;
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::quantity::display::format_number;
use crate::syntax::{Finding, Level};

/// The check.
pub static CHECK: Check = Check {
    name: "hydrostatic-span",
    family: Family::DensityLaw,
    limits: &[(Level::Warning, 0.1)],
    level: Level::Warning,
    basis: Basis {
        compares: "The change of density between top and bottom under hydrostatic pressure with the density itself, which the Boussinesq law takes as independent of pressure.",
        formula: "ρ0 g H κ, κ the isothermal compressibility, H the extent along gravity",
        source: "Gray and Giorgini, Int. J. Heat Mass Transfer 19 (1976) 545-551; Spiegel and Veronis, Astrophys. J. 131 (1960) 442-447",
        remedy: "Take a density law that follows pressure, or the anelastic equations, for spaces this high.",
    },
    run: Some(run),
};

/// Its number.
pub static NUMBER: Weighed = Weighed { check: &CHECK, symbol: "ρgHκ", value: |_, values| PICK(values) };

const PICK: fn(&CriterionValues) -> f64 = |values| values.hydrostatic_span;

/// ρ0 g H κ.
pub fn compression(density: f64, gravity: f64, height: f64, compressibility: f64) -> f64 {
    density * gravity * height * compressibility
}

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    NUMBER.findings(subject, weighing, |region, value, limit| Said {
        message: format!(
            "over the {} m of {}, the weight of {} alone changes its density by {} of itself; the Boussinesq law is held to {}",
            format_number(region.conditions.height),
            named(&region.region.name),
            named(&region.fluid.name),
            three_digits(value),
            format_number(limit),
        ),
        remedy: remedy::join(&[
            Some(format!("{} with pressure in the density", remedy::by_other_law(region))),
            Some(remedy::height_below(region.conditions.height, value, limit)),
        ]),
        fixes: remedy::to_other_law(region).into_iter().collect(),
    })
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn a_shaft() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   15 degC
    density-law boussinesq   #! hydrostatic-span "900 m of `tank`"
region tank
    box         5 m by 5 m by 900 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     20 degC
boundary cool of tank
    side        east
    wall
    held at     10 degC
"##,
        );
    }

    #[test]
    fn a_heavy_gas_sooner() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   carbon_dioxide
    reference   20 degC
    density-law boussinesq   #! hydrostatic-span
region tank
    box         5 m by 5 m by 600 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     30 degC
boundary cool of tank
    side        east
    wall
    held at     10 degC
"##,
        );
    }

    #[test]
    fn a_shaft_of_water() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   water
    reference   15 degC
    density-law boussinesq
region tank
    box         5 m by 5 m by 900 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     15.2 degC
boundary cool of tank
    side        east
    wall
    held at     14.8 degC
"##,
        );
    }
}
