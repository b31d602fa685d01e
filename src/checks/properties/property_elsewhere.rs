//! `property-elsewhere`: a stated property is the substance's, but at another temperature than the reference.

use super::judge::{Judged, Verdict, judged};
use super::property_off_library::{compared, with_own_value};
use super::stated::{AtReference, deviation};
use crate::checks::density_law::assess::temperature;
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
        temperature(at)
    );
    let finding = Finding::new(CHECK.name, level, judged.value.origin.place, message);
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
