//! `expansion-not-at-reference`: the expansion that is stated for a gas is not one over the reference temperature.

use super::slip;
use super::stated::{about, as_written, deviation, in_unit_of, is_gas, reference_pressure, reference_temperature};
use crate::checks::density_law::assess::{per_cent, temperature, two_digits};
use crate::checks::look::{named, sentence};
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::substances::Medium;
use crate::syntax::{Finding, Level, Margin};

/// The check.
pub static CHECK: Check = Check {
    name: "expansion-not-at-reference",
    family: Family::Properties,
    limits: &[(Level::Warning, 0.05), (Level::Error, 1.0)],
    level: Level::Warning,
    basis: Basis {
        compares: "The stated thermal expansion of a gas with that of an ideal gas at the reference temperature.",
        formula: "α = 1/T0, T0 in kelvin; max(α T0, 1/(α T0)) − 1",
        source: "The ideal-gas law; the limit, which leaves room for rounded values, is common practice",
        remedy: "State 1/T0, or leave the statement out: the substance then gives it.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let case = subject.case;
    let slips = slip::slips(subject);
    let fluids = case.fluids.iter().enumerate();
    fluids
        .filter_map(|(index, fluid)| {
            let stated = fluid.expansion.as_ref().filter(|_| is_gas(case, fluid))?;
            if slip::is_slip(&slips, stated) {
                return None;
            }
            let reference = reference_temperature(subject, index, fluid).filter(|reference| *reference > 0.0)?;
            let ideal = 1.0 / reference;
            // A gas near condensing differs from the ideal one; then its own value is as good.
            let own = Medium::of(case, fluid)
                .and_then(|medium| medium.expansion(reference, reference_pressure(case, fluid)))
                .unwrap_or(ideal);
            let off = deviation(stated.si, ideal).min(deviation(stated.si, own));
            let (level, limit) = weighing.over(off)?;
            let belongs = 1.0 / stated.si;
            let belongs = if (100.0..2000.0).contains(&belongs) {
                format!("; it belongs to {}", about(belongs))
            } else {
                String::new()
            };
            let far = if off >= 1.0 { format!("a factor {}", two_digits(off + 1.0)) } else { per_cent(off) };
            let right = in_unit_of(ideal, stated);
            let message = format!(
                "the expansion of {}, {}, is {far} off that of an ideal gas at the reference, 1/T0 = {right} at {}{belongs}",
                named(&fluid.name),
                as_written(stated),
                temperature(reference),
            );
            let mut finding = Finding::new(CHECK.name, level, stated.origin.place, sentence(&message))
                .remedy(format!("{right}, or no statement: the substance then gives it"))
                .about(&*fluid.name.text)
                .weighing(Margin {
                    quantity: "α off by".to_string(),
                    value: off,
                    limit,
                    band: None,
                    unit: String::new(),
                });
            if let Some(literal) = stated.origin.literal {
                let title = format!("Take 1/T0, {right}");
                finding.fixes.push(slip::replacement(title, literal, right, false));
            }
            Some(finding)
        })
        .collect()
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::{after_fix, expect_of};

    #[test]
    fn one_over_the_freezing_point() {
        expect_of(
            CHECK.name,
            r##"
fluid room
    substance   air
    reference   25 degC
    density-law boussinesq
    expansion   3.66e-3 1/K   #! expansion-not-at-reference "belongs to 0 degC"
"##,
        );
    }

    #[test]
    fn a_liquid_s_for_a_gas() {
        expect_of(
            CHECK.name,
            r##"
fluid room
    substance   air
    reference   25 degC
    expansion   2.1e-4 1/K   #! expansion-not-at-reference "factor 16"
"##,
        );
    }

    #[test]
    fn one_over_the_reference() {
        expect_of(
            CHECK.name,
            r##"
fluid room
    substance   air
    reference   25 degC
    expansion   0.0034 1/K
fluid bath
    substance   water
    reference   25 degC
    expansion   2.57e-4 1/K
"##,
        );
    }

    #[test]
    fn the_fix_is_one_over_the_reference() {
        let text = r##"
fluid room
    substance   air
    reference   300 K
    expansion   3.66e-3 1/K
"##;
        assert!(after_fix(CHECK.name, text).contains("expansion   0.003333 1/K"), "{}", after_fix(CHECK.name, text));
    }
}
