//! `buoyancy-negligible`: a driven flow on which buoyancy has no say.

use crate::case::model::DensityLaw;
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{Weighed, estimate_note, finding_of, gravity_acts, regions};
use crate::quantity::display::format_number;
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "buoyancy-negligible",
    family: Family::Regime,
    limits: &[(Level::Information, 10.0)],
    level: Level::Information,
    basis: Basis {
        compares: "Holds the Richardson number of a region with a given velocity against that of forced flow.",
        formula: "1 / Ri = Re² / Gr, over 10 where Ri is below 0.1",
        source: "common practice: below 0.1 the flow is forced, over 10 natural, between them mixed (Incropera and DeWitt, Fundamentals of Heat and \
                 Mass Transfer, section 9.9, recalled)",
        remedy: "`density-law constant` saves the coupling of the equations, where the temperature is not needed for anything else.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    if !gravity_acts(subject.case) {
        return Vec::new();
    }
    let mut findings = Vec::new();
    for (region, physics) in regions(subject) {
        let law = subject.case.fluid_of(region).and_then(|fluid| fluid.density_law);
        let is_buoyant = law.is_some_and(|law| law.value != DensityLaw::Constant);
        let richardson = physics.numbers.richardson;
        // Without any temperature difference the number is 0, and nothing is said of buoyancy at all.
        if !is_buoyant || richardson.is_nan() || richardson <= 0.0 {
            continue;
        }
        let inverse = Weighed::power(1.0 / richardson, -1.0, physics.bracket.as_ref());
        let Some((level, limit)) = inverse.over(weighing) else { continue };
        let message = format!(
            "Ri of `{}` is {}: the given velocity drives the flow, and buoyancy has no say in it.{}",
            region.name.text,
            format_number(richardson),
            estimate_note(physics.bracket.as_ref()),
        );
        findings.push(
            finding_of(CHECK.name, level, &region.name, message)
                .remedy("`density-law constant` would do")
                .weighing(inverse.margin("1 / Ri", limit)),
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
    box          1 m by 1 m
    filled with  a
    flow         laminar
boundary hot of c
    side west
    held at 30 degC
boundary cold of c
    side east
    held at 10 degC
boundary vent of c
    side bottom
    inlet
    enters at 2.4 m/s
    carries 20 degC
boundary grille of c
    side top
    outlet
    backflow 20 degC
"##,
        );
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c  #! buoyancy-negligible
    box          1 m by 1 m
    filled with  a
    flow         laminar
boundary hot of c
    side west
    held at 30 degC
boundary cold of c
    side east
    held at 10 degC
boundary vent of c
    side bottom
    inlet
    enters at 2.8 m/s
    carries 20 degC
boundary grille of c
    side top
    outlet
    backflow 20 degC
"##,
        );
    }

    #[test]
    fn nothing_drives_it() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          1 m by 1 m
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
    }
}
