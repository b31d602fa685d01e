//! `requirement-failed`: a comparison of `require` that does not hold.
//!
//! ```text
//! require
//!     peak_temperature(cabinet) < 60 degC     fails where the estimate is 64 degC
//! ```

use super::region_numbers::{End, is_estimate, region_number};
use crate::case::compiled::{Compiled, Variable};
use crate::case::model::Requirement;
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::quantity::display::{format_difference, format_si};
use crate::syntax::tree::Comparison;
use crate::syntax::{Finding, Level};
use crate::vocabulary::statements::TEMPERATURE;

/// The check.
pub const CHECK: Check = Check {
    name: "requirement-failed",
    family: Family::Record,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Works out both sides of each requirement with the deck's values and the numbers of its regions. Where an estimate \
                   stands behind them, a requirement that fails over the whole band is an error, one that fails only at the estimate itself a \
                   warning, and one that holds there but not over the whole band an information.",
        formula: "",
        source: "the deck's own requirements",
        remedy: "Change the case until it holds, or the requirement.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    subject
        .case
        .requirements
        .iter()
        .filter_map(|requirement| of_requirement(subject, requirement, weighing.level))
        .collect()
}

fn of_requirement(subject: &Subject<'_>, requirement: &Requirement, level: Level) -> Option<Finding> {
    let holds_at = |end| holds(requirement, &|side| value(subject, side, end));
    // What is not known neither holds nor fails; `requirement-unknown` says so.
    let (middle, least, most) = (holds_at(End::Middle)?, holds_at(End::Least)?, holds_at(End::Most)?);
    let rests_on_estimate = numbers_in(requirement).iter().any(|(number, region)| is_estimate(subject, number, region));
    let (level, verdict) = match (middle, least && most) {
        (true, true) => return None,
        (true, false) => (level.milder().milder(), "holds at the estimate, but not over its whole band"),
        (false, _) if least || most => (level.milder(), "does not hold at the estimate, though it may within its band"),
        (false, _) => (level, "does not hold"),
    };
    let show = |side: &Compiled, end| in_words(requirement, value(subject, side, end));
    let left = show(&requirement.left, End::Middle);
    let right = match &requirement.upper {
        Some(upper) => format!("{} to {}", show(&requirement.right, End::Middle), show(upper, End::Middle)),
        None => show(&requirement.right, End::Middle),
    };
    let band = if rests_on_estimate {
        format!(" ({} to {} as estimated)", show(&requirement.left, End::Least), show(&requirement.left, End::Most))
    } else {
        String::new()
    };
    let subject_name = numbers_in(requirement).first().map(|(_, region)| region.to_string()).unwrap_or_default();
    let message = format!(
        "`{}` {verdict}: the left side is {left}{band}, the {} {right}.",
        requirement.text.trim(),
        if requirement.upper.is_some() { "range" } else { "right side" }
    );
    Some(
        Finding::new(CHECK.name, level, requirement.place, message)
            .about(subject_name)
            .remedy("change the case until it holds, or the requirement"),
    )
}

/// Whether it holds; `None` where a side is not known.
fn holds(requirement: &Requirement, value: &dyn Fn(&Compiled) -> f64) -> Option<bool> {
    let (left, right) = (value(&requirement.left), value(&requirement.right));
    if left.is_nan() || right.is_nan() {
        return None;
    }
    Some(match requirement.comparison {
        Comparison::Less => left < right,
        Comparison::LessOrEqual => left <= right,
        Comparison::Greater => left > right,
        Comparison::GreaterOrEqual => left >= right,
        Comparison::Within => {
            let upper = value(requirement.upper.as_ref()?);
            if upper.is_nan() {
                return None;
            }
            right <= left && left <= upper
        }
    })
}

/// A side of a requirement, with estimates taken at one end of their bands.
pub fn value(subject: &Subject<'_>, side: &Compiled, end: End) -> f64 {
    side.value(&|variable| match variable {
        Variable::RegionNumber(number, region) => region_number(subject, number, region, end),
        _ => f64::NAN,
    })
}

/// The numbers of regions that a requirement names.
pub fn numbers_in(requirement: &Requirement) -> Vec<(&'static str, Box<str>)> {
    let mut numbers = Vec::new();
    let sides = [Some(&requirement.left), Some(&requirement.right), requirement.upper.as_ref()];
    for side in sides.into_iter().flatten() {
        side.variables(&mut |variable| {
            if let Variable::RegionNumber(number, region) = variable {
                numbers.push((*number, region.clone()));
            }
        });
    }
    numbers
}

/// A side as people write it.
fn in_words(requirement: &Requirement, si: f64) -> String {
    if requirement.dimension == TEMPERATURE && requirement.is_difference {
        format_difference(si)
    } else {
        format_si(si, requirement.dimension)
    }
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn given_temperatures() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          0.3 m by 0.3 m
    filled with  a
    flow         laminar
boundary hot of c
    side west
    held at 30 degC
boundary cold of c
    side east
    held at 10 degC
boundary rest of c
    side remaining
    insulated
require
    peak_temperature(c) < 29 degC  #! requirement-failed "does not hold: the left side is 30 degC, the right side 29 degC"
    peak_temperature(c) <= 30 degC
    temperature_span(c) > 20 K  #! requirement-failed "the left side is 20 K"
    temperature_span(c) >= 20 K
    Ra(c) within 1e3 .. 1e6  #! requirement-failed "the range 1000 to 1e6"
    Ra(c) within 1e3 .. 1e9
"##,
        );
    }

    #[test]
    fn with_names_of_the_deck() {
        expect_of(
            CHECK.name,
            r##"
given
    limit = 25 degC
    margin = 2 K
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          0.3 m by 0.3 m
    filled with  a
    flow         laminar
boundary hot of c
    side west
    held at 30 degC
boundary cold of c
    side east
    held at 10 degC
boundary rest of c
    side remaining
    insulated
require
    peak_temperature(c) + margin < limit  #! requirement-failed "the left side is 32 degC, the right side 25 degC"
    limit < peak_temperature(c)
"##,
        );
    }
}
