//! `stable-layer`: heat from above, which moves nothing.

use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{celsius, estimate_note, finding_of, gravity_acts, has_density_maximum, regions};
use crate::physics::model::ArrangementKind;
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "stable-layer",
    family: Family::Regime,
    limits: &[],
    level: Level::Information,
    basis: Basis {
        compares: "Looks for enclosures with the light fluid above the heavy one. Silent where the deck itself says `arrangement stable-layer`.",
        formula: "",
        source: "Chandrasekhar, Hydrodynamic and Hydromagnetic Stability, 1961, chapter II: a layer that is heavier below is at rest at every \
                 temperature difference",
        remedy: "Look whether the hot and the cold side, or the direction of gravity, are the wrong way round; else say `arrangement stable-layer`.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    if !gravity_acts(subject.case) {
        return Vec::new();
    }
    let mut findings = Vec::new();
    for (region, physics) in regions(subject) {
        let is_stable = physics.arrangement.kind == ArrangementKind::StableLayer;
        let is_meant = region.arrangement.is_some();
        if !is_stable || is_meant || has_density_maximum(subject.case, region, physics) {
            continue;
        }
        let ends =
            physics.bracket.as_ref().filter(|bracket| bracket.span().is_finite()).map_or(String::new(), |bracket| {
                format!(" ({} and {})", celsius(bracket.highest.value), celsius(bracket.lowest.value))
            });
        let message = format!(
            "`{}` has its light fluid above its heavy fluid{ends}: it lies at rest, and heat passes by conduction alone.{}",
            region.name.text,
            estimate_note(physics.bracket.as_ref()),
        );
        findings.push(finding_of(CHECK.name, weighing.level, &region.name, message).remedy(
            "hot and cold side, or gravity, the other way round; `arrangement stable-layer` where it is meant",
        ));
    }
    findings
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn hot_above_cold() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c  #! stable-layer
    box          1 m by 20 mm
    filled with  a
    flow         laminar
boundary floor of c
    side bottom
    held at 10 degC
boundary lid of c
    side top
    held at 30 degC
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
    box          1 m by 20 mm
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
    fn where_it_is_meant() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          1 m by 20 mm
    filled with  a
    flow         laminar
    arrangement stable-layer
boundary floor of c
    side bottom
    held at 10 degC
boundary lid of c
    side top
    held at 30 degC
boundary rest of c
    side remaining
    insulated
"##,
        );
    }

    #[test]
    fn no_gravity() {
        expect_of(
            CHECK.name,
            r##"
case
    gravity none
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          1 m by 20 mm
    filled with  a
    flow         laminar
boundary floor of c
    side bottom
    held at 10 degC
boundary lid of c
    side top
    held at 30 degC
boundary rest of c
    side remaining
    insulated
"##,
        );
    }
}
