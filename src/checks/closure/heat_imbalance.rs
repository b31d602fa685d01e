//! `heat-imbalance`: a steady case into which more heat flows than out of it.

use super::floating_temperature::floating;
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{Weighed, finding_of, is_steady};
use crate::quantity::display::format_si;
use crate::syntax::{Finding, Level};
use crate::vocabulary::statements::POWER;

/// What rounding in a deck may leave open.
pub const TOLERANCE: f64 = 0.01;

/// The check.
pub const CHECK: Check = Check {
    name: "heat-imbalance",
    family: Family::Closure,
    limits: &[(Level::Error, TOLERANCE)],
    level: Level::Error,
    basis: Basis {
        compares: "In a steady run whose faces all pass a given heat, holds the heat in against the heat out.",
        formula: "|P_in − P_out| / max(P_in, P_out)",
        source: "conservation of energy (Gauss's theorem on the steady energy equation)",
        remedy: "Make heat in and heat out equal, let a face exchange heat with surroundings, or follow the case in time.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    if !is_steady(subject.case) {
        return Vec::new();
    }
    let mut findings = Vec::new();
    for network in floating(subject) {
        let budget = network.budget(subject);
        let share = Weighed::given(budget.imbalance());
        let (Some((level, limit)), Some((first, _))) = (share.over(weighing), network.regions.first()) else {
            continue;
        };
        let message = format!(
            "{} of heat goes into `{}` and {} comes out, so it has no steady state: it {} without end.",
            format_si(budget.supplied, POWER),
            first.name.text,
            format_si(budget.withdrawn, POWER),
            if budget.supplied > budget.withdrawn { "warms" } else { "cools" },
        );
        findings.push(
            finding_of(CHECK.name, level, &first.name, message)
                .remedy("`held at` or `exchanges` on one face, equal heat in and out, or a `transient` run")
                .weighing(share.margin("|P_in − P_out| / max(P_in, P_out)", limit)),
        );
    }
    findings
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn more_in_than_out() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance air
region room  #! heat-imbalance "100 W of heat goes into `room` and 60 W comes out"
    box 1 m by 2 m by 3 m
    filled with a
boundary heater of room
    side west
    heated by 100 W
boundary cooler of room
    side east
    cooled by 60 W
boundary rest of room
    side remaining
    insulated
run
    steady
"##,
        );
    }

    #[test]
    fn a_source_that_a_wall_takes_up() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance air
region room
    box 1 m by 2 m by 3 m
    filled with a
source lamp in room
    releases 60 W
boundary cooler of room
    side east
    cooled by 60 W
boundary rest of room
    side remaining
    insulated
run
    steady
"##,
        );
    }
}
