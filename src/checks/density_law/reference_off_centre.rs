//! `reference-off-centre`: with the reference at mid-span, a criterion that is over its limit would be within it.

use super::assess::{Assessed, assessed, temperature, two_digits, weight};
use super::criteria::NUMBERS;
use super::criterion::{Conditions, CriterionValues};
use super::reference::{Span, span_of};
use super::remedy;
use crate::case::model::DensityLaw;
use crate::checks::look::{named, sentence};
use crate::checks::{Basis, Check, Family, Subject, Weighing, weighing};
use crate::syntax::{Finding, Level};

/// The check.
pub static CHECK: Check = Check {
    name: "reference-off-centre",
    family: Family::DensityLaw,
    limits: &[],
    level: Level::Information,
    basis: Basis {
        compares: "The verdict of every criterion at the reference as stated with that at mid-span, where the linear law errs least.",
        formula: "The criteria at T0 and at (T_lowest + T_highest) / 2",
        source: "The remainder of the linear law goes with (T − T0)², and is least for T0 at mid-span; common practice",
        remedy: "Move the reference to mid-span, with the properties that belong to it.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, own: &Weighing) -> Vec<Finding> {
    let regions = assessed(subject, &[DensityLaw::Boussinesq]);
    let found = subject.case.fluids.iter().filter_map(|fluid| {
        let stated = fluid.reference_temperature.as_ref().filter(|value| value.is_known())?;
        let Span { lowest, highest } = span_of(fluid, &regions)?;
        // Outside the span, `reference-outside-span` speaks.
        if !(lowest.value - 1e-6..=highest.value + 1e-6).contains(&stated.si) {
            return None;
        }
        let middle = remedy::mid_span(lowest.value, highest.value, remedy::unit_of_reference(fluid))?;
        let filled = regions.iter().filter(|region| std::ptr::eq(region.fluid, fluid) && region.medium.is_some());
        let won: Vec<String> = filled.flat_map(|region| won_by(subject, region, middle)).collect();
        if won.is_empty() {
            return None;
        }
        let message = format!(
            "the reference of {}, {}, lies off the middle of the span of {} to {}; at {} {}",
            named(&fluid.name),
            temperature(stated.si),
            temperature(lowest.value),
            temperature(highest.value),
            temperature(middle),
            won.join(" and "),
        );
        let rests_on_estimate = lowest.estimate.is_some() || highest.estimate.is_some();
        let level = if rests_on_estimate { own.level.milder() } else { own.level };
        let mut finding = Finding::new(CHECK.name, level, stated.origin.place, sentence(&message))
            .remedy(format!("a reference of {}", temperature(middle)))
            .about(&*fluid.name.text);
        finding.fixes.extend(remedy::move_reference(fluid, middle, false));
        Some(finding)
    });
    found.collect()
}

/// The criteria of a region that a reference at `middle` would bring to a milder verdict, in words; none where it would
/// bring any to a harsher one.
fn won_by(subject: &Subject<'_>, region: &Assessed<'_>, middle: f64) -> Vec<String> {
    let conditions = Conditions { reference: middle, stated_expansion: None, ..region.conditions };
    let there: CriterionValues = region.under(&conditions);
    let mut won = Vec::new();
    for number in NUMBERS {
        let limits = weighing(number.check, &subject.case.practice);
        let level = |value: f64| weight(value, None, &limits).over.map(|(level, _)| level);
        let (here, there) = ((number.value)(region, &region.values), (number.value)(region, &there));
        if level(there) > level(here) {
            return Vec::new();
        }
        // A hair's breadth is no reason to move.
        if there.is_finite() && level(there) < level(here) && there < 0.95 * here {
            won.push(format!("{} is {} instead of {}", number.check.name, two_digits(there), two_digits(here)));
        }
    }
    won
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::{after_fix, expect_of};

    #[test]
    fn at_the_cold_end() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   20 degC   #! reference-off-centre "at 45 degC buoyancy-error is"
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
"##,
        );
    }

    #[test]
    fn at_the_hot_end() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   water
    reference   70 degC   #! reference-off-centre "at 55 degC"
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
    held at     40 degC
"##,
        );
    }

    #[test]
    fn where_no_verdict_changes() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   25 degC
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
    fn at_mid_span() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   45 degC
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
"##,
        );
    }

    #[test]
    fn the_fix_moves_it() {
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
