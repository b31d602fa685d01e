//! `turbulent-below-onset`: a turbulence model where the flow is laminar.

use super::onsets::turbulence;
use crate::case::model::Flow;
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{estimate_note, regions};
use crate::quantity::display::format_number;
use crate::syntax::{Finding, Level};

/// Reynolds number from which a given flow is turbulent whatever buoyancy does: the onset in pipes (Reynolds 1883).
const FORCED_TURBULENT: f64 = 2300.0;

/// The check.
pub const CHECK: Check = Check {
    name: "turbulent-below-onset",
    family: Family::Regime,
    limits: &[(Level::Information, 2.0), (Level::Warning, 10.0)],
    level: Level::Warning,
    basis: Basis {
        compares: "Holds the Rayleigh number of a region with a turbulence model against the one at which its arrangement turns turbulent. \
                   Direct simulation, and regions through which a flow with a Reynolds number over 2300 is driven, are left alone.",
        formula: "Ra_onset / Ra, both on the onset's own length",
        source: "the onsets of `laminar-above-onset`; 2300 for driven flow: Reynolds, Phil. Trans. R. Soc. 174 (1883) 935 (recalled). A model adds \
                 viscosity where there is no turbulence: common practice",
        remedy: "`flow laminar`, or a model that turns itself off where the flow is laminar.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let mut findings = Vec::new();
    for (region, physics) in regions(subject) {
        let Some(flow) = region.flow else { continue };
        let Flow::Turbulent(model) = flow.value else { continue };
        if model == Some("direct-simulation") || physics.numbers.reynolds > FORCED_TURBULENT {
            continue;
        }
        let Some(held) = turbulence(physics) else { continue };
        let ratio = held.under_onset();
        let Some((level, limit)) = ratio.over(weighing) else { continue };
        let message = format!(
            "Ra of `{}` is {} on the {}, and {} sets in near {}: the model adds viscosity to a laminar flow.{}",
            region.name.text,
            format_number(held.rayleigh.value),
            held.onset.length,
            held.onset.name,
            format_number(held.onset.rayleigh),
            estimate_note(physics.bracket.as_ref()),
        );
        findings.push(
            Finding::new(CHECK.name, level, flow.place, message)
                .about(&*region.name.text)
                .remedy("`flow laminar`")
                .weighing(ratio.margin("Ra_onset / Ra", limit))
                .fix("Write `flow laminar`", flow.place.span, "flow laminar", false),
        );
    }
    findings
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn on_either_side_of_the_limit() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          0.63 m by 0.63 m
    filled with  a
    flow         turbulent by k-omega
boundary hot of c
    side west
    held at 30 degC
boundary cold of c
    side east
    held at 10 degC
boundary rest of c
    side remaining
    insulated
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
    box          0.6 m by 0.6 m
    filled with  a
    flow         turbulent by k-omega  #! turbulent-below-onset
boundary hot of c
    side west
    held at 30 degC
boundary cold of c
    side east
    held at 10 degC
boundary rest of c
    side remaining
    insulated
"##,
        );
    }

    #[test]
    fn direct_simulation_models_nothing() {
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
"##,
        );
    }
}
