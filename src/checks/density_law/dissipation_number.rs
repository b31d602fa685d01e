//! `dissipation-number`: the heat of friction against the heat that is carried by convection.

use super::assess::{Said, Weighed, three_digits};
use super::{criterion::CriterionValues, remedy};
use crate::checks::look::named;
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::quantity::display::format_number;
use crate::syntax::{Finding, Level};

/// The check.
pub static CHECK: Check = Check {
    name: "dissipation-number",
    family: Family::DensityLaw,
    limits: &[(Level::Warning, 0.1)],
    level: Level::Warning,
    basis: Basis {
        compares: "The heat of friction of the buoyant flow with the heat that it carries. The Boussinesq energy equation leaves friction out.",
        formula: "α g H / cp",
        source: "Gray and Giorgini, Int. J. Heat Mass Transfer 19 (1976) 545-551; Gebhart, J. Fluid Mech. 14 (1962) 225-232",
        remedy: "Let the solver compute the heat of friction (viscous-heating on).",
    },
    run: Some(run),
};

/// Its number; unknown where the heat of friction is computed, and so not left out.
pub static NUMBER: Weighed = Weighed {
    check: &CHECK,
    symbol: "αgH/cp",
    value: |assessed, values| {
        let is_computed = assessed.region.viscous_heating.is_some_and(|stated| stated.value);
        if is_computed { f64::NAN } else { PICK(values) }
    },
};

const PICK: fn(&CriterionValues) -> f64 = |values| values.dissipation_number;

/// |α| g H / cp.
pub fn dissipation(expansion: f64, gravity: f64, height: f64, heat_capacity: f64) -> f64 {
    expansion.abs() * gravity * height / heat_capacity
}

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    NUMBER.findings(subject, weighing, |region, value, limit| Said {
        message: format!(
            "αgH/cp is {} over the {} m of {}: the heat of friction is no longer small; the Boussinesq energy equation leaves it out and is held to {}",
            three_digits(value),
            format_number(region.conditions.height),
            named(&region.region.name),
            format_number(limit),
        ),
        remedy: remedy::join(&[
            Some("`viscous-heating on`".to_string()),
            Some(remedy::height_below(region.conditions.height, value, limit)),
        ]),
        fixes: Vec::new(),
    })
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn a_column_of_air_as_high_as_a_mountain() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   10 degC
    density-law boussinesq   #! dissipation-number "4000 m of `tank`"
region tank
    box         5 km by 5 km by 4 km
    filled with content
boundary warm of tank
    side        west
    wall
    held at     20 degC
boundary cool of tank
    side        east
    wall
    held at     0 degC
"##,
        );
    }

    #[test]
    fn of_heavy_gas() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   carbon_dioxide
    reference   20 degC
    density-law boussinesq   #! dissipation-number
region tank
    box         5 km by 5 km by 3 km
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
    fn computed_it_is_not_left_out() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   10 degC
    density-law boussinesq
region tank
    box         5 km by 5 km by 4 km
    filled with content
    viscous-heating on
boundary warm of tank
    side        west
    wall
    held at     20 degC
boundary cool of tank
    side        east
    wall
    held at     0 degC
"##,
        );
    }

    #[test]
    fn a_room() {
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
