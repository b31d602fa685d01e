//! `no-reference`: a Boussinesq law without the temperature that it counts from.

use super::parts::add_below;
use crate::case::model::DensityLaw;
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{celsius, finding_of, regions};
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "no-reference",
    family: Family::Closure,
    limits: &[],
    level: Level::Warning,
    basis: Basis {
        compares: "Looks at every fluid under the Boussinesq law for its reference temperature.",
        formula: "ρ = ρ0 (1 − α (T − T0))",
        source: "Spiegel and Veronis, Astrophys. J. 131 (1960) 442",
        remedy: "`reference` the middle of the temperatures that the fluid takes.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let mut findings = Vec::new();
    for fluid in &subject.case.fluids {
        let is_boussinesq = fluid.density_law.is_some_and(|law| law.value == DensityLaw::Boussinesq);
        let region = regions(subject)
            .find(|(region, _)| subject.case.fluid_of(region).is_some_and(|of| of.name.text == fluid.name.text));
        let (true, None, Some((_, physics))) = (is_boussinesq, &fluid.reference_temperature, region) else { continue };
        let message = format!(
            "`{}` follows the Boussinesq law, and nothing says from which temperature it counts.",
            fluid.name.text
        );
        let finding = finding_of(CHECK.name, weighing.level, &fluid.name, message);
        findings.push(
            match physics.bracket.as_ref().map(|bracket| bracket.middle()).filter(|middle| middle.is_finite()) {
                Some(middle) => {
                    let statement = format!("reference {}", celsius((middle - 273.15).round() + 273.15));
                    let mut finding = finding.remedy(format!("`{statement}`, the middle of what it takes"));
                    finding.fixes.push(add_below(fluid.name.place, &statement, false));
                    finding
                }
                None => finding.remedy("`reference` with the middle of the temperatures that it takes"),
            },
        );
    }
    findings
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn no_reference() {
        expect_of(
            CHECK.name,
            r##"
fluid a  #! no-reference
    substance air
    density-law boussinesq
fluid b
    substance air
    reference 20 degC at 1 bar
    density-law boussinesq
fluid c
    substance air
    density-law ideal-gas
region room
    box 1 m by 2 m by 3 m
    filled with a
region hall
    box 1 m by 2 m by 3 m
    filled with b
region attic
    box 1 m by 2 m by 3 m
    filled with c
"##,
        );
    }
}
