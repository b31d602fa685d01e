//! `wave-period`: a step too long for the waves of a stratified fluid.

use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{Weighed, estimate_note, regions, rounded_down};
use crate::quantity::display::{format_number, format_si};
use crate::syntax::{Finding, Level};
use crate::vocabulary::statements::TIME;
use std::f64::consts::PI;

/// The check.
pub const CHECK: Check = Check {
    name: "wave-period",
    family: Family::Resolution,
    limits: &[(Level::Information, 0.05), (Level::Warning, 0.1)],
    level: Level::Warning,
    basis: Basis {
        compares: "In a transient run of a stratified region, holds the step against the period of its fastest internal waves.",
        formula: "Δt N / (2π), N² = g α dT/dz: fewer than 20, and fewer than 10, steps in a period",
        source: "N is the highest frequency of internal waves: Turner, Buoyancy Effects in Fluids, 1973, chapter 2 (recalled). The number of steps is common \
                 practice",
        remedy: "A shorter `step`.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let Some((_, step)) = subject.case.run.as_ref().and_then(|run| run.transient.as_ref()) else { return Vec::new() };
    let mut findings = Vec::new();
    for (region, physics) in regions(subject) {
        let period = 2.0 * PI / physics.numbers.buoyancy_frequency;
        let share = Weighed::power(step.si / period, 0.5, physics.bracket.as_ref());
        let Some((level, limit)) = share.over(weighing) else { continue };
        let message = format!(
            "The fastest waves in the stratified `{}` take {}, which the step of {} divides into {}.{}",
            region.name.text,
            format_si(period, TIME),
            format_si(step.si, TIME),
            format_number((10.0 / share.value).round() / 10.0),
            estimate_note(physics.bracket.as_ref()),
        );
        findings.push(
            Finding::new(CHECK.name, level, step.origin.place, message)
                .about(&*region.name.text)
                .remedy(format!("a step of {} or less", format_si(rounded_down(period * weighing.first_limit()), TIME)))
                .weighing(share.margin("Δt N / (2π)", limit)),
        );
    }
    findings
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn steps_in_a_period() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    water
    reference    20 degC at 1 atm
    density-law  variable
region c
    box          1 m by 1 m
    filled with  a
    flow         laminar
boundary hot of c
    side west
    held at 25.1 degC
boundary cold of c
    side east
    held at 24.9 degC
boundary rest of c
    side remaining
    insulated
initial c
    stratified from 20 degC to 30 degC
run
    transient for 1 h step 1 s
"##,
        );
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    water
    reference    20 degC at 1 atm
    density-law  variable
region c
    box          1 m by 1 m
    filled with  a
    flow         laminar
boundary hot of c
    side west
    held at 25.1 degC
boundary cold of c
    side east
    held at 24.9 degC
boundary rest of c
    side remaining
    insulated
initial c
    stratified from 20 degC to 30 degC
run
    transient for 1 h step 5 s  #! wave-period
"##,
        );
    }
}
