//! `steady-above-onset`: a steady state sought where the flow has none.

use super::onsets::unsteadiness;
use crate::case::model::Flow;
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{estimate_note, is_steady, regions};
use crate::quantity::display::format_number;
use crate::syntax::{Finding, Level, Place};

/// The check.
pub const CHECK: Check = Check {
    name: "steady-above-onset",
    family: Family::Regime,
    limits: &[(Level::Warning, 1.0)],
    level: Level::Warning,
    basis: Basis {
        compares: "In a steady run, holds the Rayleigh number of a laminar region against the upper end of the onset of unsteadiness; and \
                   looks for models that follow eddies in time.",
        formula: "Ra / (Ra_onset (1 + width)), on the onset's own length; the width is the published band of the onset",
        source: "square cavities of air: 1.82e8 ± 0.01e8 (Le Quéré and Behnia, J. Fluid Mech. 359 (1998) 81-107). Other arrangements: the onsets \
                 of `laminar-above-onset`, beyond which no steady flow is stable",
        remedy: "A transient run, averaged where a mean is wanted.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let steady = subject.case.run.as_ref().and_then(|run| run.steady);
    let (true, Some(steady)) = (is_steady(subject.case), steady) else { return Vec::new() };
    let mut findings = Vec::new();
    for (region, physics) in regions(subject) {
        let Some(flow) = region.flow else { continue };
        let finding = |level: Level, message: String, place: Place| {
            Finding::new(CHECK.name, level, place, message)
                .about(&*region.name.text)
                .remedy("`transient for` a time `step` a time, averaged where a mean is wanted")
        };
        match flow.value {
            Flow::Laminar => {
                let Some(held) = unsteadiness(physics) else { continue };
                let ratio = held.over_band();
                let Some((level, limit)) = ratio.over(weighing) else { continue };
                let message = format!(
                    "A steady state is sought, Ra of `{}` is {} on the {}, and {} sets in at {}.{}",
                    region.name.text,
                    format_number(held.rayleigh.value),
                    held.onset.length,
                    held.onset.name,
                    format_number(held.onset.rayleigh),
                    estimate_note(physics.bracket.as_ref()),
                );
                let finding = finding(level, message, steady).related(flow.place, "the flow");
                findings.push(finding.weighing(ratio.margin("Ra / Ra_onset", limit)));
            }
            Flow::Turbulent(Some(model @ ("large-eddy" | "direct-simulation"))) => {
                let message = format!(
                    "`{model}` follows the eddies of `{}` in time, and a steady state is sought.",
                    region.name.text
                );
                findings.push(finding(weighing.level, message, steady).related(flow.place, "the flow"));
            }
            Flow::Turbulent(_) => {}
        }
    }
    findings
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn on_either_side_of_the_onset() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          0.44 m by 0.44 m
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
run
    steady
"##,
        );
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          0.45 m by 0.45 m
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
run
    steady  #! steady-above-onset "1.82e8"
"##,
        );
    }

    #[test]
    fn what_follows_eddies_is_not_steady() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          0.2 m by 0.2 m
    filled with  a
    flow         turbulent by direct-simulation
boundary hot of c
    side west
    held at 30 degC
boundary cold of c
    side east
    held at 10 degC
boundary rest of c
    side remaining
    insulated
run
    steady  #! steady-above-onset "`direct-simulation`"
"##,
        );
    }

    #[test]
    fn in_time() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          0.7 m by 0.7 m
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
run
    transient for 1 h step 1 s
"##,
        );
    }
}
