//! `law-heavier-than-needed`: a density law that follows the true density, where the linear one would do.

use super::assess::{Assessed, assessed, temperature, two_digits};
use super::criteria::NUMBERS;
use super::criterion::Conditions;
use super::remedy;
use crate::case::model::DensityLaw;
use crate::checks::look::{named, sentence};
use crate::checks::{Basis, Check, Family, Subject, Weighing, weighing};
use crate::syntax::{Finding, Fix, Level};

/// The check.
pub static CHECK: Check = Check {
    name: "law-heavier-than-needed",
    family: Family::DensityLaw,
    limits: &[],
    level: Level::Information,
    basis: Basis {
        compares: "Every criterion of the Boussinesq law, with the reference at mid-span, with half of the limit at which it warns. Below that the linear law serves as well, and a solver needs fewer iterations and smaller memory for it.",
        formula: "every criterion ≤ limit / 2, and no density maximum within the span",
        source: "common practice",
        remedy: "Take density-law boussinesq, unless another reason (pressure in a sealed space, comparison with a hotter case) asks for the heavier law.",
    },
    run: Some(run),
};

/// The part of a criterion's warning limit within which the margin counts as wide.
const WIDE: f64 = 0.5;

fn run(subject: &Subject<'_>, own: &Weighing) -> Vec<Finding> {
    let heavier = assessed(subject, &[DensityLaw::IdealGas, DensityLaw::Variable]);
    heavier.iter().filter_map(|region| finding(subject, region, own.level)).collect()
}

fn finding(subject: &Subject<'_>, region: &Assessed<'_>, level: Level) -> Option<Finding> {
    region.medium?;
    let (lowest, highest) = (region.bracket.lowest.band.0, region.bracket.highest.band.1);
    let unit = remedy::unit_of_reference(region.fluid);
    let middle = remedy::mid_span(region.conditions.lowest, region.conditions.highest, unit)?;
    let conditions = Conditions { reference: middle, lowest, highest, stated_expansion: None, ..region.conditions };
    let values = region.under(&conditions);
    // A density span that cannot be worked out, or is nothing, is no ground for advice.
    let is_known =
        values.density_span > 0.0 && values.buoyancy_error.is_finite() && values.covered == (lowest, highest);
    if !is_known || values.densest_at.is_finite() {
        return None;
    }
    let mut tightest = ("", 0.0, f64::INFINITY);
    for number in NUMBERS {
        let value = (number.value)(region, &values);
        let limits = weighing(number.check, &subject.case.practice).limits;
        let warns =
            limits.iter().find(|(level, _)| *level >= Level::Warning).map_or(f64::INFINITY, |(_, limit)| *limit);
        if value > WIDE * warns {
            return None;
        }
        if value / warns > tightest.1 / tightest.2 || tightest.0.is_empty() {
            tightest = (number.check.name, value, warns);
        }
    }
    let law = region.fluid.density_law?;
    let message = format!(
        "the Boussinesq law would hold in {} with a wide margin: of all criteria {} comes nearest to its limit, {} of {}; density-law {} costs solver time and gains little",
        named(&region.region.name),
        tightest.0,
        two_digits(tightest.1),
        two_digits(tightest.2),
        remedy::law_word(law.value),
    );
    let mut finding = Finding::new(CHECK.name, level, law.place, sentence(&message))
        .remedy(format!("`density-law boussinesq` with a reference of {}", temperature(middle)))
        .about(&*region.region.name.text);
    let Fix { mut edits, title, sure } = remedy::change_law(law, DensityLaw::Boussinesq, false);
    let is_off = region.fluid.reference_temperature.as_ref().is_some_and(|stated| (stated.si - middle).abs() > 0.5);
    edits.extend(
        remedy::move_reference(region.fluid, middle, false).filter(|_| is_off).into_iter().flat_map(|fix| fix.edits),
    );
    // The Boussinesq law needs a reference; where none is stated, the words say which, and no single change is enough.
    if region.fluid.reference_temperature.is_some() {
        finding.fixes.push(Fix { title, edits, sure });
    }
    Some(finding)
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::{after_fix, expect_of};

    #[test]
    fn a_room_as_an_ideal_gas() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   20 degC
    density-law ideal-gas   #! law-heavier-than-needed "density-span comes nearest"
region tank
    box         0.5 m by 0.6 m by 1.1 m
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
    fn a_tank_to_a_kelvin() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   water
    reference   20 degC
    density-law variable   #! law-heavier-than-needed
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     20.5 degC
boundary cool of tank
    side        east
    wall
    held at     19.5 degC
"##,
        );
    }

    #[test]
    fn a_hot_plate_needs_it() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   20 degC
    density-law ideal-gas
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
    fn the_density_maximum_needs_it() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   water
    reference   4 degC
    density-law variable
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     6 degC
boundary cool of tank
    side        east
    wall
    held at     2 degC
"##,
        );
    }

    #[test]
    fn the_fix_takes_the_lighter_law() {
        let text = r##"
fluid content
    substance   air
    reference   20 degC
    density-law ideal-gas
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     25 degC
boundary cool of tank
    side        east
    wall
    held at     15 degC
"##;
        assert!(after_fix(CHECK.name, text).contains("density-law boussinesq"), "{}", after_fix(CHECK.name, text));
    }
}
