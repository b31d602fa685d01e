//! `viscous-heating-negligible`: the heat of friction computed where there is next to none.

use super::viscous_heating::{brinkman_number, what_moves};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{Weighed, estimate_note, regions};
use crate::quantity::display::format_number;
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "viscous-heating-negligible",
    family: Family::Regime,
    limits: &[(Level::Information, 1000.0)],
    level: Level::Information,
    basis: Basis {
        compares: "Where the heat of friction is computed, holds the heat that conduction passes against it.",
        formula: "1 / Br = k ΔT / (μ v²)",
        source: "as `viscous-heating-neglected`; a thousandth is below what any boundary condition of the trade is known to (common practice)",
        remedy: "`viscous-heating off`.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let mut findings = Vec::new();
    for (region, physics) in regions(subject) {
        let Some(on) = region.viscous_heating.filter(|on| on.value) else { continue };
        let brinkman = brinkman_number(physics);
        if brinkman.value.is_nan() || brinkman.value <= 0.0 {
            continue;
        }
        let inverse = Weighed { value: 1.0 / brinkman.value, band: (1.0 / brinkman.band.1, 1.0 / brinkman.band.0) };
        let Some((level, limit)) = inverse.over(weighing) else { continue };
        let message = format!(
            "Friction is computed in `{}`, and at {} it gives {} of the heat that conduction passes.{}",
            region.name.text,
            what_moves(physics),
            format_number(brinkman.value),
            estimate_note(physics.bracket.as_ref()),
        );
        findings.push(
            Finding::new(CHECK.name, level, on.place, message)
                .about(&*region.name.text)
                .remedy("`viscous-heating off` changes nothing and is quicker")
                .weighing(inverse.margin("1 / Br", limit))
                .fix("Write `viscous-heating off`", on.place.span, "viscous-heating off", false),
        );
    }
    findings
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn for_nothing() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          0.3 m by 0.3 m
    filled with  a
    flow         laminar
    viscous-heating on  #! viscous-heating-negligible "at the buoyant velocity"
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
    fn for_something() {
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
    moves at 0.4 m/s along x
    held at 40.5 degC
boundary rest of c
    side remaining
    insulated
"##,
        );
    }
}
