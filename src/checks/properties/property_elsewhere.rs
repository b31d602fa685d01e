//! `property-elsewhere`: a stated property is the substance's, but at another temperature than the reference.

use super::judge::{Judged, Verdict, judged};
use super::property_off_library::{compared, with_own_value};
use super::stated::{AtReference, about, deviation};
use crate::checks::look::sentence;
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::syntax::{Finding, Level};

/// The check.
pub static CHECK: Check = Check {
    name: "property-elsewhere",
    family: Family::Properties,
    limits: &[(Level::Information, 0.05), (Level::Warning, 0.2), (Level::Error, 1.0)],
    level: Level::Information,
    basis: Basis {
        compares: "A property value that is not the substance's at the reference with the substance's at other temperatures, up to 100 K away: a value taken from the wrong row of a table.",
        formula: "own(T) = stated, within 1 %, for a T other than T0; weighed by max(stated/own(T0), own(T0)/stated) − 1",
        source: "The substance's data, whose source stands with each (deckline substances); the limits are common practice",
        remedy: "Take the value at the reference, or move the reference to where the value belongs.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let mut findings = Vec::new();
    for (fluid, values) in judged(subject) {
        for judged in &values {
            if let Verdict::ElsewhereAt(at) = judged.verdict {
                findings.extend(finding(&fluid, judged, at, &values, weighing));
            }
        }
    }
    findings
}

fn finding(
    fluid: &AtReference<'_>,
    judged: &Judged<'_>,
    at: f64,
    all: &[Judged<'_>],
    weighing: &Weighing,
) -> Option<Finding> {
    let (level, limit) = weighing.over(judged.deviation)?;
    let others = companions(fluid, judged, at, all);
    let beside = match others.as_slice() {
        [] => String::new(),
        [one] => format!(", as is the {one}"),
        several => format!(", as are the {}", several.join(" and the ")),
    };
    let message = format!(
        "{}; it is that of {} at {}{beside}",
        compared(fluid, judged),
        fluid.medium.substance.name.text,
        about(at)
    );
    let finding = Finding::new(CHECK.name, level, judged.value.origin.place, sentence(&message));
    Some(with_own_value(finding, fluid, judged, limit))
}

/// The other stated properties that are the substance's at that temperature and not at the reference.
fn companions(fluid: &AtReference<'_>, judged: &Judged<'_>, at: f64, all: &[Judged<'_>]) -> Vec<&'static str> {
    let Some(there) = fluid.medium.properties(at, fluid.pressure) else { return Vec::new() };
    all.iter()
        .filter(|other| !std::ptr::eq(other.property, judged.property))
        .filter(|other| {
            let off_there = deviation(other.value.si, (other.property.own)(&there));
            off_there <= 0.02 && other.deviation > 2.0 * off_there.max(0.005)
        })
        .map(|other| other.property.name)
        .collect()
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::{after_fix, expect_of};

    #[test]
    fn the_row_of_another_temperature() {
        expect_of(
            CHECK.name,
            r##"
fluid bath
    substance  water
    reference  20 degC
    viscosity  0.653 mPa.s   #! property-elsewhere "it is that of water at 40 degC"
fluid oil
    substance  engine_oil
    reference  40 degC
    viscosity  0.84 Pa.s   #! property-elsewhere "at 19 degC"
"##,
        );
    }

    #[test]
    fn several_of_one_row() {
        expect_of(
            CHECK.name,
            r##"
fluid bath
    substance    water
    reference    20 degC
    viscosity    0.5465 mPa.s   #! property-elsewhere "as is the density"
    density      988.0 kg/m^3
"##,
        );
    }

    #[test]
    fn what_no_temperature_near_has_is_off() {
        expect_of(
            CHECK.name,
            r##"
fluid bath
    substance    water
    reference    20 degC
    conductivity 0.9 W/m/K
"##,
        );
    }

    #[test]
    fn the_value_at_the_reference() {
        expect_of(
            CHECK.name,
            r##"
fluid bath
    substance    water
    reference    40 degC
    viscosity    0.653 mPa.s
    expansion    3.85e-4 1/K
"##,
        );
    }

    #[test]
    fn the_fix_takes_the_value_at_the_reference() {
        let text = r##"
fluid bath
    substance  water
    reference  20 degC
    viscosity  0.653 mPa.s
"##;
        assert!(after_fix(CHECK.name, text).contains("viscosity  1.002 mPa.s"), "{}", after_fix(CHECK.name, text));
    }
}
