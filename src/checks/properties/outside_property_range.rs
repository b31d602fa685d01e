//! `outside-property-range`: the fluid comes to temperatures, or the deck names a fraction, for which the substance has no
//! data.

use super::phase_change;
use super::slip;
use super::stated::reference_pressure;
use crate::case::model::Value;
use crate::checks::density_law::assess::temperature;
use crate::checks::look::{named, sentence};
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::physics::model::Bound;
use crate::quantity::display::format_number;
use crate::substances::Medium;
use crate::syntax::{Finding, Level};

/// The check.
pub static CHECK: Check = Check {
    name: "outside-property-range",
    family: Family::Properties,
    limits: &[],
    level: Level::Warning,
    basis: Basis {
        compares: "The reference temperature, the lowest and the highest temperature of the fluid and its fraction with the range over which the substance's data hold.",
        formula: "valid from ≤ T ≤ valid to; fraction from ≤ x ≤ fraction to",
        source: "The range that stands with the substance (deckline substances)",
        remedy: "Give data that cover the range (a substance of the deck), or keep the fluid within it.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let slips = slip::slips(subject);
    let mut findings = at_reference(subject, &slips);
    for (case_region, region) in subject.case.regions.iter().zip(&subject.physics.regions) {
        let (Some(state), Some(bracket)) = (&region.fluid, &region.bracket) else { continue };
        let Some(fluid) = subject.case.fluids.get(state.index) else { continue };
        let Some(medium) = Medium::of(subject.case, fluid) else { continue };
        for bound in [&bracket.lowest, &bracket.highest] {
            let changes_phase = phase_change::phase_at(&medium, bound.value, state.pressure).is_some();
            // Absolute zero and below is `not-physical`; a slip of unit is no temperature of the fluid.
            let is_meant = bound.value > 0.0 && !slip::is_slip_of_bound(&slips, bound);
            if medium.holds_at(bound.value) || changes_phase || !is_meant {
                continue;
            }
            let is_sure = bound.estimate.is_none() || !(medium.holds_at(bound.band.0) || medium.holds_at(bound.band.1));
            let level = if is_sure { weighing.level } else { weighing.level.milder() };
            findings.push(beyond(bound, &medium, level, case_region.name.place, &case_region.name.text));
        }
    }
    findings
}

fn beyond(bound: &Bound, medium: &Medium<'_>, level: Level, region: crate::syntax::Place, name: &str) -> Finding {
    let message = format!(
        "{} {} {}{}, and the data of {} hold {}: nothing that depends on its properties there is checked",
        bound.set_by,
        if bound.value > medium.range().1 { "reaches" } else { "goes down to" },
        temperature(bound.value),
        if bound.estimate.is_some() { " (an estimate)" } else { "" },
        medium.substance.name.text,
        range_of(medium),
    );
    Finding::new(CHECK.name, level, bound.place.unwrap_or(region), sentence(&message))
        .remedy("a substance whose data cover it, or temperatures within them")
        .about(name)
}

/// The reference and the fraction of each fluid.
fn at_reference(subject: &Subject<'_>, slips: &[slip::Slip]) -> Vec<Finding> {
    let mut findings = Vec::new();
    for fluid in &subject.case.fluids {
        let Some(medium) = Medium::of(subject.case, fluid) else { continue };
        let pressure = reference_pressure(subject.case, fluid);
        let speaks = |value: &&Value| value.is_known() && !slip::is_slip(slips, value);
        let substance = &medium.substance.name.text;
        if let Some(value) = fluid.reference_temperature.as_ref().filter(speaks)
            && !medium.holds_at(value.si)
            && value.si > 0.0
            && phase_change::phase_at(&medium, value.si, pressure).is_none()
        {
            let message = format!(
                "the reference of {}, {}, lies outside the data of {substance}, which hold {}",
                named(&fluid.name),
                temperature(value.si),
                range_of(&medium),
            );
            findings.push(
                Finding::new(CHECK.name, Level::Error, value.origin.place, sentence(&message))
                    .remedy("a reference within the data, or a substance whose data cover it")
                    .about(&*fluid.name.text),
            );
        }
        if let Some(value) = fluid.fraction.as_ref().filter(speaks)
            && let Some((least, most)) = medium.substance.fraction
            && (value.si < least - 1e-9 || value.si > most + 1e-9)
            && (0.0..=1.0).contains(&value.si)
        {
            let per_cent = |share: f64| format!("{} %", format_number(100.0 * share));
            let message = format!(
                "the fraction of {}, {}, lies outside the data of {substance}, which hold from {} to {}",
                named(&fluid.name),
                per_cent(value.si),
                per_cent(least),
                per_cent(most),
            );
            findings.push(
                Finding::new(CHECK.name, Level::Error, value.origin.place, sentence(&message))
                    .remedy("a fraction within the data, or a substance whose data cover it")
                    .about(&*fluid.name.text),
            );
        }
    }
    findings
}

fn range_of(medium: &Medium<'_>) -> String {
    let (lowest, highest) = medium.range();
    format!("from {} to {}", temperature(lowest), temperature(highest))
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn the_reference() {
        expect_of(
            CHECK.name,
            r##"
fluid hot_air
    substance   air
    reference   1400 degC   #! outside-property-range "from -73.15 degC to 1227 degC"
"##,
        );
    }

    #[test]
    fn the_fraction() {
        expect_of(
            CHECK.name,
            r##"
fluid brine
    substance   ethylene_glycol at 85 %   #! outside-property-range "85 %"
    reference   20 degC
"##,
        );
    }

    #[test]
    fn within() {
        expect_of(
            CHECK.name,
            r##"
fluid hot_air
    substance   air
    reference   300 degC
fluid brine
    substance   ethylene_glycol at 30 %
    reference   20 degC
"##,
        );
    }
}
