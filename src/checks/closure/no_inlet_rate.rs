//! `no-inlet-rate`: an inlet of which the momentum equations learn nothing.

use super::parts::{Role, role};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::finding_of;
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "no-inlet-rate",
    family: Family::Closure,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Looks at every inlet for a speed, a volume or mass rate, or a pressure.",
        formula: "",
        source: "common practice: the momentum equations take the velocity or the pressure at every opening",
        remedy: "`enters at` a rate, or `gauge` a pressure.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    subject
        .case
        .boundaries
        .iter()
        .filter(|boundary| role(boundary) == Role::Inlet && boundary.enters.is_none() && boundary.gauge.is_none())
        .map(|boundary| {
            let message = format!("Nothing says how fast fluid enters at `{}`.", boundary.name.text);
            finding_of(CHECK.name, weighing.level, &boundary.name, message).remedy(
                "`enters at` a speed or rate, `gauge` a pressure, or `opening` where buoyancy alone draws it in",
            )
        })
        .collect()
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn how_fast() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary vent of room  #! no-inlet-rate
    side west
    inlet
    carries 20 degC
boundary stack of room
    side top
    inlet
    gauge 2 Pa
    carries 20 degC
"##,
        );
    }
}
