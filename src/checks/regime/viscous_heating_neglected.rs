//! `viscous-heating-neglected`: friction that warms the fluid, in a case that leaves it out.

use super::viscous_heating::{brinkman_number, what_moves};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::closure::parts::add_below;
use crate::checks::look::{estimate_note, regions};
use crate::quantity::display::format_number;
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "viscous-heating-neglected",
    family: Family::Regime,
    limits: &[(Level::Information, 0.1), (Level::Warning, 1.0)],
    level: Level::Warning,
    basis: Basis {
        compares: "Where the heat of friction is not computed, holds it against the heat that conduction passes.",
        formula: "Br = μ v² / (k ΔT) = Pr Ec; v is the given or the buoyant velocity, whichever is faster",
        source: "Brinkman, Appl. Sci. Res. A2 (1951) 120 (recalled); for buoyant velocities Gebhart, J. Fluid Mech. 14 (1962) 225 (recalled). The \
                 limits are common practice",
        remedy: "`viscous-heating on`.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let mut findings = Vec::new();
    for (region, physics) in regions(subject) {
        if region.viscous_heating.is_some_and(|on| on.value) {
            continue;
        }
        let brinkman = brinkman_number(physics);
        // Without a difference of temperatures nothing conducts, and no share of it can be told.
        let Some((level, limit)) = brinkman.over(weighing).filter(|_| brinkman.value.is_finite()) else { continue };
        let place = region.viscous_heating.map_or(region.name.place, |off| off.place);
        let message = format!(
            "Friction is not computed in `{}`, and at {} it gives {} of the heat that conduction passes.{}",
            region.name.text,
            what_moves(physics),
            format_number(brinkman.value),
            estimate_note(physics.bracket.as_ref()),
        );
        let mut finding = Finding::new(CHECK.name, level, place, message)
            .about(&*region.name.text)
            .remedy("`viscous-heating on`")
            .weighing(brinkman.margin("Br", limit));
        match region.viscous_heating {
            Some(off) => {
                finding = finding.fix("Write `viscous-heating on`", off.place.span, "viscous-heating on", true)
            }
            None => finding.fixes.push(add_below(region.name.place, "viscous-heating on", true)),
        }
        findings.push(finding);
    }
    findings
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn a_sliding_plate() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    engine_oil
    reference    40 degC at 1 atm
    density-law  boussinesq
region c
    box          1 m by 1 mm
    filled with  a
    flow         laminar
boundary floor of c
    side bottom
    held at 39.5 degC
boundary lid of c
    side top
    moves at 0.2 m/s along x
    held at 40.5 degC
boundary rest of c
    side remaining
    insulated
"##,
        );
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    engine_oil
    reference    40 degC at 1 atm
    density-law  boussinesq
region c  #! viscous-heating-neglected
    box          1 m by 1 mm
    filled with  a
    flow         laminar
boundary floor of c
    side bottom
    held at 39.5 degC
boundary lid of c
    side top
    moves at 0.4 m/s along x
    held at 40.5 degC
boundary rest of c
    side remaining
    insulated
"##,
        );
    }

    #[test]
    fn computed() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    engine_oil
    reference    40 degC at 1 atm
    density-law  boussinesq
region c
    box          1 m by 1 mm
    filled with  a
    flow         laminar
    viscous-heating on
boundary floor of c
    side bottom
    held at 39.5 degC
boundary lid of c
    side top
    moves at 2 m/s along x
    held at 40.5 degC
boundary rest of c
    side remaining
    insulated
"##,
        );
    }
}
