//! `phase-change`: the fluid boils, freezes or condenses within the temperatures that it comes to.

use super::slip;
use super::stated::reference_pressure;
use crate::checks::density_law::assess::{temperature, to_a_tenth};
use crate::checks::look::{named, sentence};
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::physics::model::{Bound, FluidState, Geometry};
use crate::quantity::dimension_names::PRESSURE;
use crate::quantity::display::format_si;
use crate::substances::Medium;
use crate::syntax::{Finding, Level, Place};

/// The check.
pub static CHECK: Check = Check {
    name: "phase-change",
    family: Family::Properties,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "The temperatures of the fluid with the temperatures at which the substance boils (or a gas condenses) and freezes at the pressure of the fluid.",
        formula: "T_freezes ≤ T ≤ T_boils(p); between T_boils(p) and T_boils(p + ρ g H) the depth decides, and the finding is a warning",
        source: "The substance's data, whose source stands with each (deckline substances)",
        remedy: "Keep the temperatures on one side, raise the pressure, or take a model with phase change.",
    },
    run: Some(run),
};

/// What a fluid does beyond a temperature.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Phase {
    /// "boils", "freezes", "condenses".
    pub verb: &'static str,
    /// The temperature at which it does, K.
    pub at: f64,
}

/// What the fluid does at `temperature` (K) and `pressure` (Pa) instead of being what its data are for; `None` where it
/// is that.
pub fn phase_at(medium: &Medium<'_>, temperature: f64, pressure: f64) -> Option<Phase> {
    let boiling = medium.boiling(pressure);
    if medium.is_gas() {
        return boiling.filter(|at| temperature < *at).map(|at| Phase { verb: "condenses", at });
    }
    let boils = boiling.filter(|at| temperature > *at).map(|at| Phase { verb: "boils", at });
    boils.or_else(|| {
        let freezing = medium.freezing(pressure);
        // Held at the freezing point itself, it is still a liquid: an ice-water bath.
        freezing.filter(|at| temperature < *at - 1e-2).map(|at| Phase { verb: "freezes", at })
    })
}

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let case = subject.case;
    let slips = slip::slips(subject);
    let mut findings = Vec::new();
    for fluid in &case.fluids {
        let Some(medium) = Medium::of(case, fluid) else { continue };
        let Some(value) = fluid.reference_temperature.as_ref().filter(|value| value.is_known() && value.si > 0.0)
        else {
            continue;
        };
        let pressure = reference_pressure(case, fluid);
        let is_slip =
            slip::is_slip(&slips, value) || fluid.reference_pressure.as_ref().is_some_and(|p| slip::is_slip(&slips, p));
        if let Some(phase) = phase_at(&medium, value.si, pressure).filter(|_| !is_slip) {
            let message = format!(
                "at the reference of {}, {} and {}, {}",
                named(&fluid.name),
                temperature(value.si),
                format_si(pressure, PRESSURE),
                what_it_does(&medium, phase)
            );
            findings.push(
                Finding::new(CHECK.name, weighing.level, value.origin.place, sentence(&message))
                    .remedy(remedy(phase))
                    .about(&*fluid.name.text),
            );
        }
    }
    for (case_region, region) in case.regions.iter().zip(&subject.physics.regions) {
        let (Some(state), Some(bracket)) = (&region.fluid, &region.bracket) else { continue };
        let Some(fluid) = case.fluids.get(state.index) else { continue };
        let Some(medium) = Medium::of(case, fluid) else { continue };
        if fluid.reference_pressure.as_ref().is_some_and(|value| slip::is_slip(&slips, value)) {
            continue;
        }
        for bound in [&bracket.lowest, &bracket.highest] {
            let is_slip = slip::is_slip_of_bound(&slips, bound);
            if let Some(phase) = phase_at(&medium, bound.value, state.pressure).filter(|_| !is_slip) {
                let level = level(&medium, bound, state, &region.geometry, case.gravity.magnitude, weighing.level);
                findings.push(of_bound(
                    &medium,
                    bound,
                    state,
                    phase,
                    level,
                    (&case_region.name.text, case_region.name.place),
                ));
            }
        }
    }
    findings
}

/// The level for an end of the span: milder where the depth of a liquid keeps it from boiling, or where the band of an
/// estimate reaches back.
fn level(
    medium: &Medium<'_>,
    bound: &Bound,
    state: &FluidState,
    sizes: &Geometry,
    gravity: f64,
    level: Level,
) -> Level {
    let head = state.constants.density * gravity * sizes.height;
    let deep = if head.is_finite() && !medium.is_gas() { state.pressure + head } else { state.pressure };
    let depth_decides = phase_at(medium, bound.value, deep).is_none();
    let reaches_back = bound.estimate.is_some()
        && (phase_at(medium, bound.band.0, state.pressure).is_none()
            || phase_at(medium, bound.band.1, state.pressure).is_none());
    let milder = |level: Level, is: bool| if is { level.milder() } else { level };
    milder(milder(level, depth_decides), reaches_back)
}

fn of_bound(
    medium: &Medium<'_>,
    bound: &Bound,
    state: &FluidState,
    phase: Phase,
    level: Level,
    (name, place): (&str, Place),
) -> Finding {
    let message = format!(
        "{} {} {}{}; {} at {}",
        bound.set_by,
        if phase.verb == "boils" { "reaches" } else { "goes down to" },
        temperature(bound.value),
        if bound.estimate.is_some() { " (an estimate)" } else { "" },
        what_it_does(medium, phase),
        format_si(state.pressure, PRESSURE),
    );
    Finding::new(CHECK.name, level, bound.place.unwrap_or(place), sentence(&message)).remedy(remedy(phase)).about(name)
}

fn what_it_does(medium: &Medium<'_>, phase: Phase) -> String {
    format!("{} {} at {}", medium.substance.name.text, phase.verb, to_a_tenth(phase.at))
}

fn remedy(phase: Phase) -> String {
    match phase.verb {
        "boils" => format!("temperatures below {}, or a higher pressure", to_a_tenth(phase.at)),
        verb => format!("temperatures above {}, where it no longer {verb}", to_a_tenth(phase.at)),
    }
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn a_reference_that_boils_or_freezes() {
        expect_of(
            CHECK.name,
            r##"
fluid steam_kettle
    substance   water
    reference   110 degC at 1 bar   #! phase-change "water boils at 99.6"
fluid ice_pond
    substance   water
    reference   -5 degC   #! phase-change "water freezes at 0"
"##,
        );
    }

    #[test]
    fn pressure_keeps_it_liquid() {
        expect_of(
            CHECK.name,
            r##"
fluid boiler
    substance   water
    reference   110 degC at 3 bar
fluid ice_bath
    substance   water
    reference   0 degC
"##,
        );
    }

    #[test]
    fn on_a_mountain() {
        expect_of(
            CHECK.name,
            r##"
fluid kettle
    substance   water
    reference   95 degC at 0.79 bar   #! phase-change "boils at 93"
"##,
        );
    }
}
