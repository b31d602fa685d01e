//! `reference-outside-span`: the reference temperature lies outside the temperatures that the fluid can reach.

use super::assess::{assessed, temperature, with_ends};
use super::reference::{Span, span_of};
use super::{closed_gas_pressure, remedy};
use crate::case::model::DensityLaw;
use crate::checks::look::{named, sentence};
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::quantity::display::format_difference;
use crate::syntax::{Finding, Level};

/// The check.
pub static CHECK: Check = Check {
    name: "reference-outside-span",
    family: Family::DensityLaw,
    limits: &[],
    level: Level::Warning,
    basis: Basis {
        compares: "The reference temperature with the lowest and the highest temperature of the fluid. The linear law is a tangent: outside the span it touches nowhere that the fluid comes to.",
        formula: "T_lowest ≤ T0 ≤ T_highest",
        source: "Gray and Giorgini, Int. J. Heat Mass Transfer 19 (1976) 545-551, who take T0 within the span; common practice",
        remedy: "Move the reference to mid-span, with the properties that belong to it.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let regions = assessed(subject, &[DensityLaw::Boussinesq]);
    let fluids = subject.case.fluids.iter();
    fluids
        .filter_map(|fluid| {
            let stated = fluid.reference_temperature.as_ref().filter(|value| value.is_known())?;
            let Span { lowest, highest } = span_of(fluid, &regions)?;
            let beyond = (stated.si - highest.value).max(lowest.value - stated.si);
            // A reference that is one end of the span, written in another unit, differs in the last digit.
            let is_outside = beyond > 1e-6;
            if !is_outside {
                return None;
            }
            let is_above = stated.si > highest.value;
            let end = if is_above { highest } else { lowest };
            let is_sure = end.estimate.is_none() || stated.si > highest.band.1 || stated.si < lowest.band.0;
            let level = if is_sure { weighing.level } else { weighing.level.milder() };
            let middle = remedy::mid_span(lowest.value, highest.value, remedy::unit_of_reference(fluid))?;
            let message = format!(
                "the reference of {}, {}, is {} {} the {} temperature that the fluid comes to, {} ({}{})",
                named(&fluid.name),
                temperature(stated.si),
                format_difference(beyond),
                if is_above { "above" } else { "below" },
                if is_above { "highest" } else { "lowest" },
                temperature(end.value),
                end.set_by,
                if end.estimate.is_some() { ", an estimate" } else { "" },
            );
            let mut finding = Finding::new(CHECK.name, level, stated.origin.place, sentence(&message))
                .remedy(format!("a reference at mid-span, {}", temperature(middle)))
                .about(&*fluid.name.text);
            let rests_on_estimate = lowest.estimate.is_some() || highest.estimate.is_some();
            // A sealed gas may have its reference where it was sealed in.
            let own = || regions.iter().filter(|region| std::ptr::eq(region.fluid, fluid));
            let is_certain =
                !rests_on_estimate && !states_a_property(fluid) && !own().any(closed_gas_pressure::is_sealed_gas);
            finding.fixes.extend(remedy::move_reference(fluid, middle, is_certain));
            Some(
                regions
                    .iter()
                    .filter(|region| std::ptr::eq(region.fluid, fluid))
                    .fold(finding, |finding, region| with_ends(finding, region.bracket)),
            )
        })
        .collect()
}

/// Whether the deck states properties, which would belong to the old reference.
fn states_a_property(fluid: &crate::case::model::Fluid) -> bool {
    [
        &fluid.density,
        &fluid.expansion,
        &fluid.viscosity,
        &fluid.kinematic_viscosity,
        &fluid.conductivity,
        &fluid.diffusivity,
        &fluid.heat_capacity,
        &fluid.prandtl,
    ]
    .into_iter()
    .any(Option::is_some)
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::{after_fix, expect_of};

    #[test]
    fn above() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   50 degC   #! reference-outside-span "10 K above the highest temperature that the fluid comes to, 40 degC (boundary warm)"
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
"##,
        );
    }

    #[test]
    fn below() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   0 degC   #! reference-outside-span "20 K below the lowest"
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
"##,
        );
    }

    #[test]
    fn at_an_end() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   20 degC
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
"##,
        );
    }

    #[test]
    fn the_end_in_another_unit() {
        expect_of(
            CHECK.name,
            r##"
fluid content
    substance   air
    reference   68 degF
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
"##,
        );
    }

    #[test]
    fn the_fix_moves_it_in_its_own_unit() {
        let text = r##"
fluid content
    substance   air
    reference   130 degF
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
"##;
        assert!(after_fix(CHECK.name, text).contains("reference   86 degF"), "{}", after_fix(CHECK.name, text));
    }

    #[test]
    fn a_name_keeps_its_value() {
        let text = r##"
given
    T_out = 0 degC

fluid content
    substance   air
    reference   T_out
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
"##;
        assert!(after_fix(CHECK.name, text).contains("T_out = 0 degC"), "{}", after_fix(CHECK.name, text));
    }
}
