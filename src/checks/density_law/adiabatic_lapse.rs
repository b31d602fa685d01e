//! `adiabatic-lapse`: the work of pressure against the heat that is carried by convection.

use super::assess::{Said, Weighed, three_digits};
use super::{criterion::CriterionValues, remedy};
use crate::checks::look::named;
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::quantity::display::{format_difference, format_number};
use crate::syntax::{Edit, Finding, Fix, Level, Span};

/// The check.
pub static CHECK: Check = Check {
    name: "adiabatic-lapse",
    family: Family::DensityLaw,
    limits: &[(Level::Warning, 0.1)],
    level: Level::Warning,
    basis: Basis {
        compares: "The temperature by which rising fluid cools as it expands (the adiabatic lapse over the height) with the span of temperatures. The Boussinesq energy equation leaves the work of pressure out.",
        formula: "α g H T0 / (cp ΔT)",
        source: "Gray and Giorgini, Int. J. Heat Mass Transfer 19 (1976) 545-551; Mihaljan, Astrophys. J. 136 (1962) 1126-1133",
        remedy: "Let the solver compute the work of pressure (pressure-work on).",
    },
    run: Some(run),
};

/// Its number; unknown where the work of pressure is computed, and so not left out.
pub static NUMBER: Weighed = Weighed {
    check: &CHECK,
    symbol: "αgHT0/(cpΔT)",
    value: |assessed, values| {
        let is_computed = assessed.region.pressure_work.is_some_and(|stated| stated.value);
        if is_computed { f64::NAN } else { PICK(values) }
    },
};

const PICK: fn(&CriterionValues) -> f64 = |values| values.adiabatic_lapse;

/// |α| g H T0 / (cp ΔT); `NaN` where nothing drives a flow.
pub fn pressure_work(expansion: f64, gravity: f64, height: f64, reference: f64, heat_capacity: f64, span: f64) -> f64 {
    if span > 0.0 { expansion.abs() * gravity * height * reference / (heat_capacity * span) } else { f64::NAN }
}

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    NUMBER.findings(subject, weighing, |region, value, limit| Said {
        message: format!(
            "fluid that rises the {} m of {} cools by {} as it expands, {} of the {} that drive the flow; the Boussinesq energy equation leaves that out and is held to {}",
            format_number(region.conditions.height),
            named(&region.region.name),
            format_difference(value * region.bracket.span()),
            three_digits(value),
            format_difference(region.bracket.span()),
            format_number(limit),
        ),
        remedy: remedy::join(&[
            Some("`pressure-work on`".to_string()),
            Some(remedy::height_below(region.conditions.height, value, limit)),
        ]),
        fixes: region.region.pressure_work.map(|stated| switch_on(stated.place)).into_iter().collect(),
    })
}

/// Turns a switch on: the last word of its statement, `off`.
fn switch_on(place: crate::syntax::Place) -> Fix {
    let span = Span::new(place.span.end.saturating_sub("off".len()).max(place.span.start), place.span.end);
    Fix {
        title: "Compute the work of pressure".to_string(),
        edits: vec![Edit { file: place.file, span, text: "on".to_string() }],
        sure: false,
    }
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::{after_fix, expect_of};

    #[test]
    fn a_high_hall_of_nearly_one_temperature() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   20 degC
    density-law boussinesq   #! adiabatic-lapse "cools by 0.29"
region tank
    box         20 m by 20 m by 30 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     21 degC
boundary cool of tank
    side        east
    wall
    held at     19 degC
"##,
        );
    }

    #[test]
    fn a_cleanroom_to_a_hundredth() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   20 degC
    density-law boussinesq   #! adiabatic-lapse
region tank
    box         2 m by 2 m by 1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     20.01 degC
boundary cool of tank
    side        east
    wall
    held at     19.99 degC
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
    reference   20 degC
    density-law boussinesq
region tank
    box         20 m by 20 m by 30 m
    filled with content
    pressure-work on
boundary warm of tank
    side        west
    wall
    held at     21 degC
boundary cool of tank
    side        east
    wall
    held at     19 degC
"##,
        );
    }

    #[test]
    fn an_ordinary_room() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   20 degC
    density-law boussinesq
region tank
    box         5 m by 4 m by 3 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     25 degC
boundary cool of tank
    side        east
    wall
    held at     15 degC
"##,
        );
    }

    #[test]
    fn the_fix_switches_it_on() {
        let text = r##"
fluid content
    substance   air
    reference   20 degC
    density-law boussinesq
region tank
    box         20 m by 20 m by 30 m
    filled with content
    pressure-work off
boundary warm of tank
    side        west
    wall
    held at     21 degC
boundary cool of tank
    side        east
    wall
    held at     19 degC
"##;
        assert!(after_fix(CHECK.name, text).contains("pressure-work on"), "{}", after_fix(CHECK.name, text));
    }
}
