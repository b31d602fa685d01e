//! `low-mach`: velocities small against the speed of sound.

use super::assess::{Assessed, Said, Weighed, three_digits};
use super::criterion::CriterionValues;
use super::remedy;
use crate::checks::look::named;
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::quantity::dimension_names::SPEED;
use crate::quantity::display::{format_number, format_si};
use crate::syntax::{Finding, Level};

/// The check.
pub static CHECK: Check = Check {
    name: "low-mach",
    family: Family::DensityLaw,
    limits: &[(Level::Warning, 0.1), (Level::Error, 0.3)],
    level: Level::Warning,
    basis: Basis {
        compares: "The fastest velocity, given or buoyant, with the speed of sound. The Boussinesq law leaves out the change of density with dynamic pressure, which goes with the square of this.",
        formula: "Ma = v / c, v the greater of the fastest given velocity and the buoyant velocity √(g α ΔT H)",
        source: "Spiegel and Veronis, Astrophys. J. 131 (1960) 442-447; the limits are common practice (0.3: density changes by 4.5 %)",
        remedy: "Take density-law ideal-gas or variable in a compressible solver.",
    },
    run: Some(run),
};

/// Its number.
pub static NUMBER: Weighed = Weighed { check: &CHECK, symbol: "Ma", value: mach };

fn mach(assessed: &Assessed<'_>, values: &CriterionValues) -> f64 {
    let mach = assessed.physics.numbers.mach;
    // The buoyant velocity goes with √ΔT, and so follows the band of an estimated ΔT.
    let share = (values.density_span / assessed.values.density_span).sqrt();
    if is_buoyant(assessed) && share.is_finite() { mach * share } else { mach }
}

/// Whether the buoyant velocity is the faster one, or the only one.
fn is_buoyant(assessed: &Assessed<'_>) -> bool {
    let numbers = &assessed.physics.numbers;
    numbers.given_velocity.is_nan() || numbers.given_velocity < numbers.buoyant_velocity
}

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    NUMBER.findings(subject, weighing, |region, value, limit| {
        let numbers = &region.physics.numbers;
        let is_buoyant = is_buoyant(region);
        let fastest = if is_buoyant { numbers.buoyant_velocity } else { numbers.given_velocity };
        Said {
            message: format!(
                "the fastest velocity in {}, {} ({}), is Mach {}; the Boussinesq law is held to {}",
                named(&region.region.name),
                format_si(fastest, SPEED),
                if is_buoyant { "√(g α ΔT H)" } else { "given" },
                three_digits(value),
                format_number(limit),
            ),
            remedy: remedy::join(&[
                Some(remedy::by_other_law(region)),
                Some(format!("velocities below {}", format_si(fastest * limit / value, SPEED))),
            ]),
            fixes: remedy::to_other_law(region).into_iter().collect(),
        }
    })
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn a_jet() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   30 degC
    density-law boussinesq   #! low-mach "50 m/s (given)"
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     40 degC
boundary cool of tank
    side        east
    wall
    held at     20 degC
boundary jet of tank
    side        bottom
    inlet
    enters at   50 m/s
    carries     30 degC
"##,
        );
    }

    #[test]
    fn a_fast_jet() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   30 degC
    density-law boussinesq   #! low-mach "held to 0.3"
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     40 degC
boundary cool of tank
    side        east
    wall
    held at     20 degC
boundary jet of tank
    side        bottom
    inlet
    enters at   120 m/s
    carries     30 degC
"##,
        );
    }

    #[test]
    fn a_draught() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   30 degC
    density-law boussinesq
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     40 degC
boundary cool of tank
    side        east
    wall
    held at     20 degC
boundary jet of tank
    side        bottom
    inlet
    enters at   2 m/s
    carries     30 degC
"##,
        );
    }
}
