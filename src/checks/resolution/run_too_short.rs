//! `run-too-short`: a run that ends before the flow has come to be.

use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{Weighed, estimate_note, regions};
use crate::quantity::display::format_si;
use crate::syntax::{Finding, Level};
use crate::vocabulary::statements::TIME;

/// The check.
pub const CHECK: Check = Check {
    name: "run-too-short",
    family: Family::Resolution,
    limits: &[(Level::Information, 1.0)],
    level: Level::Warning,
    basis: Basis {
        compares: "In a transient run, holds its length against the time in which the layers on the walls form (a warning) and that in which their flow \
                   fills the region (an information).",
        formula: "t_filling / t and t_layer / t; t_layer = h² / (a Ra^(1/2)), t_filling = h l / (a Ra^(1/4))",
        source: "Patterson and Imberger, J. Fluid Mech. 100 (1980) 65-86",
        remedy: "A longer run, unless the beginning alone is what is wanted.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let Some((duration, _)) = subject.case.run.as_ref().and_then(|run| run.transient.as_ref()) else {
        return Vec::new();
    };
    let mut findings = Vec::new();
    for (region, physics) in regions(subject) {
        let numbers = &physics.numbers;
        let bracket = physics.bracket.as_ref();
        let over = |time: f64, exponent: f64| Weighed::power(time / duration.si, exponent, bracket);
        let layer = over(numbers.boundary_layer_time, -0.5);
        let filling = over(numbers.filling_time, -0.25);
        let found = match layer.over(weighing) {
            Some((level, limit)) => {
                // The level of this check is that of the graver of its two findings.
                let level = if level < Level::Information { level } else { weighing.level };
                Some((level, limit, layer, numbers.boundary_layer_time, "the layers on its walls need {} to form"))
            }
            None => filling
                .over(weighing)
                .map(|(level, limit)| (level, limit, filling, numbers.filling_time, "their flow needs {} to fill it")),
        };
        let Some((level, limit, ratio, time, what)) = found else { continue };
        let message = format!(
            "The run lasts {}, and in `{}` {}.{}",
            format_si(duration.si, TIME),
            region.name.text,
            what.replace("{}", &format_si(time, TIME)).replace("their flow", "the flow of its layers"),
            estimate_note(bracket),
        );
        findings.push(
            Finding::new(CHECK.name, level, duration.origin.place, message)
                .about(&*region.name.text)
                .remedy("a longer run, unless the beginning alone is what is wanted")
                .weighing(ratio.margin("t_needed / t", limit)),
        );
    }
    findings
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn before_the_layers_and_before_it_is_full() {
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
initial c
    temperature 20 degC
run
    transient for 0.5 s step 1 ms  #! run-too-short "layers on its walls"
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
initial c
    temperature 20 degC
run
    transient for 1 min step 1 ms  #! run-too-short "to fill it"
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
initial c
    temperature 20 degC
run
    transient for 1 h step 1 ms
"##,
        );
    }
}
