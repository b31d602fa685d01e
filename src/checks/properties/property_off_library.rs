//! `property-off-library`: a stated property differs from the substance's own at the reference.

use super::judge::{Judged, Verdict, judged};
use super::stated::{AtReference, as_written, in_unit_of};
use crate::checks::density_law::assess::{per_cent, temperature, two_digits};
use crate::checks::look::{named, sentence};
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
    let finding =
        Finding::new(CHECK.name, level, judged.value.origin.place, sentence(&(compared(fluid, judged) + &elsewhere)));
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
        named(&fluid.fluid.name),
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
        .remedy(format!("{own}, or no statement: the substance then gives it"))
        .about(&*fluid.fluid.name.text)
        .weighing(margin);
    if let Some(literal) = judged.value.origin.literal {
        let title = format!("Take the library's value at {}, {own}", temperature(fluid.temperature));
        finding.fixes.push(super::slip::replacement(title, literal, own, false));
    }
    finding
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::{after_fix, expect_of};

    #[test]
    fn off_by_more_than_the_library_has_within_reach() {
        expect_of(
            CHECK.name,
            r##"
fluid water_15
    substance     water
    reference     15 degC
    heat-capacity 4400 J/kg/K  #! property-off-library "5 % above"
    conductivity  0.9 W/m/K    #! property-off-library "53 % above"
    density       2100 kg/m^3  #! property-off-library "2.1 times"
"##,
        );
    }

    #[test]
    fn density_of_sea_level_on_a_mountain() {
        expect_of(
            CHECK.name,
            r##"
fluid cabinet_air
    substance   air
    reference   25 degC at 0.79 bar
    density-law boussinesq
    density     1.184 kg/m^3  #! property-off-library "one standard atmosphere"
"##,
        );
    }

    #[test]
    fn handbook_values_rounded() {
        expect_of(
            CHECK.name,
            r##"
fluid bath
    substance     water
    reference     20 degC
    density       998 kg/m^3
    viscosity     1.0 mPa.s
    conductivity  0.6 W/m/K
    heat-capacity 4.18 kJ/kg/K
    expansion     2.1e-4 1/K
    prandtl       7.0
fluid room
    substance     air
    reference     25 degC
    density       1.2 kg/m^3
    viscosity     1.8e-5 Pa.s
    conductivity  0.026 W/m/K
    heat-capacity 1005 J/kg/K
    prandtl       0.71
"##,
        );
    }

    #[test]
    fn the_fix_takes_the_library_value() {
        let text = r##"
fluid water_15
    substance     water
    reference     15 degC
    heat-capacity 4400 J/kg/K
"##;
        assert!(after_fix(CHECK.name, text).contains("heat-capacity 4189 J/kg/K"), "{}", after_fix(CHECK.name, text));
    }

    #[test]
    fn where_a_name_carries_the_value_its_definition_is_mended() {
        let text = r##"
given
    cp = 4.4 kJ/kg/K
fluid water_15
    substance     water
    reference     15 degC
    heat-capacity cp
"##;
        assert!(after_fix(CHECK.name, text).contains("cp = 4.189 kJ/kg/K"), "{}", after_fix(CHECK.name, text));
    }
}
