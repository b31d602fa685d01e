//! `density-maximum`: the substance is densest at a temperature within the span, so buoyancy changes its direction there.

use super::assess::{assessed, temperature, to_a_tenth, with_ends};
use super::criterion::Sample;
use super::remedy;
use crate::case::model::DensityLaw;
use crate::checks::look::{named, sentence};
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::substances::Medium;
use crate::syntax::{Finding, Level};

/// The check.
pub static CHECK: Check = Check {
    name: "density-maximum",
    family: Family::DensityLaw,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "The sign of thermal expansion at the lowest and the highest temperature. Where it changes between them (water near 4 degC), fluid on both sides of that temperature is lighter, which no linear law can give.",
        formula: "−(least α) / (greatest α) over the span, above 0 where α changes sign",
        source: "IAPWS R7-97(2012) for the density of water; common practice",
        remedy: "Take density-law variable, or stay on one side of the temperature of greatest density.",
    },
    run: Some(run),
};

/// −(least α) / (greatest α): above 0 where α changes sign, and then the share of the reversed expansion.
pub fn reversal(samples: &[Sample]) -> f64 {
    let expansions = || samples.iter().map(|(_, properties)| properties.expansion).filter(|value| value.is_finite());
    let least = expansions().fold(f64::INFINITY, f64::min);
    let greatest = expansions().fold(f64::NEG_INFINITY, f64::max);
    let share = -least / greatest;
    if share.is_finite() { share } else { f64::NAN }
}

/// The temperature within the samples at which α passes 0, K; `NaN` where it does not.
pub fn densest_at(medium: &Medium<'_>, samples: &[Sample], pressure: f64) -> f64 {
    let turn = samples.windows(2).find_map(|pair| match pair {
        [(low, below), (high, above)] if below.expansion < 0.0 && above.expansion > 0.0 => Some((*low, *high)),
        _ => None,
    });
    let Some((mut low, mut high)) = turn else { return f64::NAN };
    for _ in 0..40 {
        let middle = 0.5 * (low + high);
        match medium.expansion(middle, pressure) {
            Some(expansion) if expansion < 0.0 => low = middle,
            Some(_) => high = middle,
            None => return f64::NAN,
        }
    }
    0.5 * (low + high)
}

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let regions = assessed(subject, &[DensityLaw::Boussinesq]);
    let turning = regions.iter().filter(|region| region.values.densest_at.is_finite());
    turning
        .map(|region| {
            let at = to_a_tenth(region.values.densest_at);
            let bracket = region.bracket;
            let is_sure = region.band.iter().flatten().all(|corner| corner.densest_at.is_finite());
            let message = format!(
                "{} is densest at {}, and {} spans {} to {}: fluid on either side of that is lighter, where the linear law has buoyancy change its sign at the reference alone{}",
                named(&region.fluid.name),
                at,
                named(&region.region.name),
                temperature(bracket.lowest.value),
                temperature(bracket.highest.value),
                if is_sure { "" } else { "; an end of the span is an estimate" },
            );
            let level = if is_sure { weighing.level } else { weighing.level.milder() };
            let mut finding = Finding::new(CHECK.name, level, region.place(), sentence(&message))
                .remedy(remedy::join(&[
                    Some("`density-law variable`".to_string()),
                    Some(format!("temperatures all above or all below {at}")),
                ]))
                .about(&*region.region.name.text);
            finding.fixes.extend(remedy::to_other_law(region));
            with_ends(finding, bracket)
        })
        .collect()
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::{after_fix, expect_of};

    #[test]
    fn a_pond_under_ice() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   water
    reference   4 degC
    density-law boussinesq   #! density-maximum "densest at 4 degC"
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     8 degC
boundary cool of tank
    side        east
    wall
    held at     0 degC
"##,
        );
    }

    #[test]
    fn a_cold_store() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   water
    reference   8 degC
    density-law boussinesq   #! density-maximum "spans 2 degC to 14 degC"
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     14 degC
boundary cool of tank
    side        east
    wall
    held at     2 degC
"##,
        );
    }

    #[test]
    fn above_it() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   water
    reference   8 degC
    density-law boussinesq
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     14 degC
boundary cool of tank
    side        east
    wall
    held at     5 degC
"##,
        );
    }

    #[test]
    fn below_it() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   water
    reference   2 degC
    density-law boussinesq
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     3.5 degC
boundary cool of tank
    side        east
    wall
    held at     0.5 degC
"##,
        );
    }

    #[test]
    fn the_variable_law_follows_it() {
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
    held at     8 degC
boundary cool of tank
    side        east
    wall
    held at     0 degC
"##,
        );
    }

    #[test]
    fn the_fix_changes_the_law() {
        let text = r##"
fluid content
    substance   water
    reference   4 degC
    density-law boussinesq
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     8 degC
boundary cool of tank
    side        east
    wall
    held at     0 degC
"##;
        assert!(after_fix(CHECK.name, text).contains("density-law variable"), "{}", after_fix(CHECK.name, text));
    }
}
