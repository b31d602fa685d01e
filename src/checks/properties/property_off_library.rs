//! `property-off-library`: a stated property differs from the substance's own at the reference.

use super::judge::{Judged, Verdict, judged};
use super::stated::{AtReference, as_written, in_unit_of};
use crate::checks::density_law::assess::{per_cent, temperature, two_digits};
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::quantity::dimension_names::PRESSURE;
use crate::quantity::display::format_si;
use crate::syntax::{Finding, Level, Margin};

/// The check.
pub static CHECK: Check = Check {
    name: "property-off-library",
    family: Family::Properties,
    limits: &[(Level::Information, 0.05), (Level::Warning, 0.2), (Level::Error, 1.0)],
    level: Level::Information,
    basis: Basis {
        compares: "A property value of the deck with the substance's own at the reference temperature and pressure.",
        formula: "max(stated/own, own/stated) − 1: 0.05 is 5 %, 1 a factor 2",
        source: "The substance's data, whose source stands with each (deckline substances); the limits are common practice",
        remedy: "Take the library's value, or state the substance that the value belongs to.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let mut findings = Vec::new();
    for (fluid, values) in judged(subject) {
        let off = values.iter().filter(|judged| matches!(judged.verdict, Verdict::Off | Verdict::AtOneAtmosphere));
        findings.extend(off.filter_map(|judged| finding(&fluid, judged, weighing)));
    }
    findings
}

fn finding(fluid: &AtReference<'_>, judged: &Judged<'_>, weighing: &Weighing) -> Option<Finding> {
    let (level, limit) = weighing.over(judged.deviation)?;
    let elsewhere = if judged.verdict == Verdict::AtOneAtmosphere {
        "; it is the value at one standard atmosphere, 101.3 kPa".to_string()
    } else {
        String::new()
    };
    let finding = Finding::new(CHECK.name, level, judged.value.origin.place, compared(fluid, judged) + &elsewhere);
    Some(with_own_value(finding, fluid, judged, limit))
}

/// "the viscosity of tank_water, 1.2 mPa.s, is 20 % above that of water at the reference, 20 degC and 101.3 kPa: 1.002 mPa.s".
pub fn compared(fluid: &AtReference<'_>, judged: &Judged<'_>) -> String {
    let ratio = judged.value.si / judged.own;
    let by = if ratio <= 0.0 {
        "of the other sign than".to_string()
    } else if judged.deviation >= 1.0 {
        let factor = two_digits(judged.deviation + 1.0);
        if ratio > 1.0 { format!("{factor} times") } else { format!("{factor} times less than") }
    } else {
        format!("{} {}", per_cent((ratio - 1.0).abs()), if ratio > 1.0 { "above" } else { "below" })
    };
    format!(
        "the {} of {}, {}, is {by} that of {} at the reference, {} and {}: {}",
        judged.property.name,
        fluid.fluid.name.text,
        as_written(judged.value),
        fluid.medium.substance.name.text,
        temperature(fluid.temperature),
        format_si(fluid.pressure, PRESSURE),
        in_unit_of(judged.own, judged.value),
    )
}

/// The finding with the substance's own value as remedy.
pub fn with_own_value(finding: Finding, fluid: &AtReference<'_>, judged: &Judged<'_>, limit: f64) -> Finding {
    let own = in_unit_of(judged.own, judged.value);
    let margin = Margin {
        quantity: format!("{} off by", judged.property.symbol),
        value: judged.deviation,
        limit,
        band: None,
        unit: String::new(),
    };
    let mut finding = finding
        .remedy(format!("{own}, or no statement: the substance then gives it."))
        .about(&*fluid.fluid.name.text)
        .weighing(margin);
    if let Some(literal) = judged.value.origin.literal {
        let title = format!("Take the library's value at {}, {own}", temperature(fluid.temperature));
        finding.fixes.push(super::slip::replacement(title, literal, own, false));
    }
    finding
}
