//! `conduction-only`: a layer heated from below in which nothing moves.

use super::onsets::motion;
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{estimate_note, finding_of, regions};
use crate::quantity::display::format_number;
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "conduction-only",
    family: Family::Regime,
    limits: &[(Level::Information, 1.0)],
    level: Level::Information,
    basis: Basis {
        compares: "Holds the Rayleigh number of a layer heated from below against the onset of motion.",
        formula: "Ra_onset / Ra on the depth; 1707.76 between walls, 1100.65 with one face that slips, 657.51 with two",
        source: "Chandrasekhar, Hydrodynamic and Hydromagnetic Stability, 1961, chapter II. Side walls only raise the onset",
        remedy: "Nothing needs doing where conduction is what is meant: the Nusselt number is 1, and no flow need be computed.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let mut findings = Vec::new();
    for (region, physics) in regions(subject) {
        let Some(held) = motion(subject.case, region, physics) else { continue };
        let ratio = held.under_onset();
        let Some((level, limit)) = ratio.over(weighing) else { continue };
        let message = format!(
            "Ra of `{}` is {}, below {} for {}: nothing moves, and heat passes by conduction alone.{}",
            region.name.text,
            format_number(held.rayleigh.value),
            format_number(held.onset.rayleigh),
            held.onset.name,
            estimate_note(physics.bracket.as_ref()),
        );
        findings.push(
            finding_of(CHECK.name, level, &region.name, message)
                .remedy("a conduction calculation, unless a larger difference or depth is meant")
                .weighing(ratio.margin("Ra_onset / Ra", limit)),
        );
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
region c  #! conduction-only "both faces rigid"
    box          1 m by 9.2 mm
    filled with  a
    flow         laminar
boundary floor of c
    side bottom
    held at 30 degC
boundary lid of c
    side top
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
    box          1 m by 9.6 mm
    filled with  a
    flow         laminar
boundary floor of c
    side bottom
    held at 30 degC
boundary lid of c
    side top
    held at 10 degC
boundary rest of c
    side remaining
    insulated
"##,
        );
    }

    #[test]
    fn a_lid_that_slips() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c  #! conduction-only "one face rigid, one free"
    box          1 m by 8 mm
    filled with  a
    flow         laminar
boundary floor of c
    side bottom
    held at 30 degC
boundary lid of c
    side top
    wall slip
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
    box          1 m by 8.3 mm
    filled with  a
    flow         laminar
boundary floor of c
    side bottom
    held at 30 degC
boundary lid of c
    side top
    wall slip
    held at 10 degC
boundary rest of c
    side remaining
    insulated
"##,
        );
    }

    #[test]
    fn water_over_its_density_maximum() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    water
    reference    20 degC at 1 atm
    density-law  variable
region c
    box          1 m by 9.9 mm
    filled with  a
    flow         laminar
boundary floor of c
    side bottom
    held at 8 degC
boundary lid of c
    side top
    held at 0.1 degC
boundary rest of c
    side remaining
    insulated
"##,
        );
    }
}
