//! `laminar-above-onset`: a flow computed without a turbulence model where it is turbulent.

use super::onsets::turbulence;
use crate::case::model::Flow;
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{estimate_note, regions};
use crate::quantity::display::format_number;
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "laminar-above-onset",
    family: Family::Regime,
    limits: &[(Level::Information, 1.0), (Level::Warning, 5.0)],
    level: Level::Warning,
    basis: Basis {
        compares: "Holds the Rayleigh number of a region whose flow is said to be laminar against the one at which its arrangement turns \
                   turbulent. The transition is gradual, so it speaks in two steps.",
        formula: "Ra / Ra_onset, both on the onset's own length",
        source: "upright plates, and cavities up to ten times as high as wide: Ra 1e9 on the height in gases (common practice), Gr 1e9 in \
                 other fluids (Bejan and Lage, J. Heat Transfer 112 (1990) 787, recalled). Taller cavities: 1e6 on the spacing (MacGregor and Emery, J. Heat Transfer 91 (1969) 391). \
                 Layers heated from below: 3e5 (common practice). Horizontal plates facing up: 8e6 on area over perimeter (Lloyd and Moran, J. \
                 Heat Transfer 96 (1974) 443, recalled). Horizontal cylinders: 1e9 (Churchill and Chu, Int. J. Heat Mass Transfer 18 (1975) 1049)",
        remedy: "A turbulence model, or direct simulation on a mesh that resolves every scale.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let mut findings = Vec::new();
    for (region, physics) in regions(subject) {
        let Some(flow) = region.flow.filter(|flow| flow.value == Flow::Laminar) else { continue };
        let Some(held) = turbulence(physics) else { continue };
        let ratio = held.over_onset();
        let Some((level, limit)) = ratio.over(weighing) else { continue };
        let message = format!(
            "Ra of `{}` is {} on the {}, and {} sets in near {}.{}",
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
                .remedy("`flow turbulent by` a model that suits walls with buoyancy, such as `k-omega`, or `by direct-simulation`")
                .weighing(ratio.margin("Ra / Ra_onset", limit))
                .fix("Write `flow turbulent by k-omega`", flow.place.span, "flow turbulent by k-omega", false),
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
region c
    box          0.77 m by 0.77 m
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
    box          0.8 m by 0.8 m
    filled with  a
    flow         laminar  #! laminar-above-onset "sets in near 1e9"
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
    fn a_model_or_none_named() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          2 m by 2 m
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
    box          2 m by 2 m
    filled with  a
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
    fn a_tall_gap_is_judged_by_its_spacing() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          16 mm by 3 m
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
    box          100 mm by 3 m
    filled with  a
    flow         laminar  #! laminar-above-onset "on the distance of the walls"
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
