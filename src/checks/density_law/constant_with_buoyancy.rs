//! `constant-with-buoyancy`: density held constant everywhere, where buoyancy drives or bends the flow.

use super::assess::{Assessed, assessed, temperature, with_ends};
use super::remedy;
use crate::case::model::DensityLaw;
use crate::checks::look::sentence;
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::physics::model::ArrangementKind;
use crate::quantity::display::format_number;
use crate::syntax::{Finding, Level, Margin};

/// The check.
pub static CHECK: Check = Check {
    name: "constant-with-buoyancy",
    family: Family::DensityLaw,
    limits: &[(Level::Warning, 0.1)],
    level: Level::Warning,
    basis: Basis {
        compares: "Buoyancy with the inertia of the given flow, where gravity acts and the density law is constant: the solver then has no buoyancy at all. Without a given flow, the Rayleigh number says whether buoyancy moves the fluid.",
        formula: "Ri = Gr / Re²; without a given velocity, Ra > 1708 for a layer heated from below, Ra > 1000 for other arrangements that are not stable",
        source: "Ri: common practice (below 0.1 the flow is forced); 1708: Chandrasekhar, Hydrodynamic and Hydromagnetic Stability, 1961; 1000: common practice, conduction rules below it",
        remedy: "Take density-law boussinesq, or say gravity none where buoyancy is left out on purpose.",
    },
    run: Some(run),
};

/// Ra above which the fluid moves, without a given flow.
fn onset(kind: ArrangementKind) -> f64 {
    match kind {
        ArrangementKind::LayerHeatedFromBelow => 1707.76,
        ArrangementKind::StableLayer => f64::INFINITY,
        _ => 1000.0,
    }
}

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let constant = assessed(subject, &[DensityLaw::Constant]);
    constant.iter().filter_map(|region| finding(region, weighing)).collect()
}

fn finding(region: &Assessed<'_>, weighing: &Weighing) -> Option<Finding> {
    let numbers = &region.physics.numbers;
    let law = region.fluid.density_law?;
    let name = &region.region.name.text;
    let (level, what, margin) = if numbers.given_velocity > 0.0 {
        let (level, limit) = weighing.over(numbers.richardson)?;
        let what =
            format!("Ri is {} there, so buoyancy counts beside the given flow", format_number(numbers.richardson));
        (level, what, ("Ri", numbers.richardson, limit))
    } else {
        let onset = onset(region.physics.arrangement.kind);
        let moves = numbers.rayleigh > onset;
        if !moves {
            return None;
        }
        let what = format!("Ra is {} there, so buoyancy alone moves the fluid", format_number(numbers.rayleigh));
        (weighing.limits.first()?.0, what, ("Ra", numbers.rayleigh, onset))
    };
    let level = if region.bracket.rests_on_estimate() { level.milder() } else { level };
    let bracket = region.bracket;
    let message = format!(
        "density-law constant leaves buoyancy out of `{name}`, where gravity acts between {} and {}; {what}",
        temperature(bracket.lowest.value),
        temperature(bracket.highest.value),
    );
    let (quantity, value, limit) = margin;
    let mut finding = Finding::new(CHECK.name, level, law.place, sentence(&message))
        .remedy("`density-law boussinesq`, or `gravity none` where buoyancy is left out on purpose")
        .about(&**name)
        .weighing(Margin { quantity: quantity.to_string(), value, limit, band: None, unit: String::new() });
    finding.fixes.push(remedy::change_law(law, DensityLaw::Boussinesq, false));
    Some(with_ends(finding, bracket))
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::{after_fix, expect_of};

    #[test]
    fn natural_convection() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   30 degC
    density-law constant   #! constant-with-buoyancy "buoyancy alone moves the fluid"
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
"##,
        );
    }

    #[test]
    fn mixed_convection() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   30 degC
    density-law constant   #! constant-with-buoyancy "Ri is"
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     40 degC
    moves at    0.5 m/s
boundary cool of tank
    side        east
    wall
    held at     20 degC
"##,
        );
    }

    #[test]
    fn forced_convection() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   30 degC
    density-law constant
region tank
    box         0.5 m by 0.6 m by 1.1 m
    filled with content
boundary warm of tank
    side        west
    wall
    held at     40 degC
    moves at    30 m/s
boundary cool of tank
    side        east
    wall
    held at     20 degC
"##,
        );
    }

    #[test]
    fn without_gravity() {
        expect_of(
            CHECK.name,
            r##"
case
    gravity none
fluid content
    substance   air
    reference   30 degC
    density-law constant
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
"##,
        );
    }

    #[test]
    fn the_fix_takes_the_linear_law() {
        let text = r##"
fluid content
    substance   air
    reference   30 degC
    density-law constant
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
"##;
        assert!(after_fix(CHECK.name, text).contains("density-law boussinesq"), "{}", after_fix(CHECK.name, text));
    }
}
