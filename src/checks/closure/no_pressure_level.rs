//! `no-pressure-level`: nothing settles the level of the pressure where the flow or the density depends on it.

use super::parts::{Role, is_open_by_shape, lets_fluid_pass, role};
use crate::case::model::{Boundary, Case, DensityLaw, Fluid, Region};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{finding_of, is_fluid};
use crate::substances::Medium;
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "no-pressure-level",
    family: Family::Closure,
    limits: &[],
    level: Level::Warning,
    basis: Basis {
        compares: "Looks for a pressure where one is needed: in a region all of whose openings have a given rate, and for a gas whose \
                   density follows the pressure.",
        formula: "ρ = p / (R T) for the second",
        source: "common practice: in a flow of constant density the equations hold only the gradient of the pressure. A closed region \
                 under the Boussinesq law needs no level",
        remedy: "An `outlet` without a rate or with a `gauge` pressure; for a gas, the pressure of the reference state.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let case = subject.case;
    let of_regions = case
        .regions
        .iter()
        .filter(|region| is_fluid(region))
        .filter_map(|region| of_region(case, region, weighing.level));
    let of_fluids = case.fluids.iter().filter_map(|fluid| of_fluid(case, fluid, weighing.level));
    of_regions.chain(of_fluids).collect()
}

fn of_region(case: &Case, region: &Region, level: Level) -> Option<Finding> {
    let passing: Vec<&Boundary> =
        case.boundaries_of(region).filter(|boundary| lets_fluid_pass(role(boundary))).collect();
    let has_outlet = passing.iter().any(|boundary| role(boundary) == Role::Outlet);
    let all_have_rates = passing.iter().all(|boundary| boundary.enters.is_some() && boundary.gauge.is_none());
    (has_outlet && all_have_rates && !is_open_by_shape(case, region)).then(|| {
        let message = format!(
            "Every opening of `{}` has a given rate, so nothing settles the level of the pressure.",
            region.name.text
        );
        finding_of(CHECK.name, level, &region.name, message).remedy("an `outlet` without a rate, or with `gauge 0 Pa`")
    })
}

fn of_fluid(case: &Case, fluid: &Fluid, level: Level) -> Option<Finding> {
    let law = fluid.density_law?;
    let is_gas = || Medium::of(case, fluid).is_some_and(|medium| medium.is_gas());
    let follows_pressure = match law.value {
        DensityLaw::IdealGas => true,
        DensityLaw::Variable => is_gas(),
        DensityLaw::Boussinesq | DensityLaw::Constant => false,
    };
    let is_used =
        case.regions.iter().any(|region| case.fluid_of(region).is_some_and(|of| of.name.text == fluid.name.text));
    let unsaid = fluid.reference_pressure.is_none() && case.ambient_pressure.is_none();
    (follows_pressure && is_used && unsaid).then(|| {
        let message = format!(
            "The density of `{}` follows the pressure, and no pressure is given: 101.3 kPa is taken.",
            fluid.name.text
        );
        // The pressure that is taken is the usual one.
        finding_of(CHECK.name, level.milder(), &fluid.name, message)
            .remedy("`reference` a temperature `at` a pressure, or `ambient` with a pressure")
            .related(law.place, "its density law")
    })
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn all_rates_given() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance air
    density-law boussinesq
region room  #! no-pressure-level "Every opening"
    box 1 m by 2 m by 3 m
    filled with a
boundary vent of room
    side west
    inlet
    enters at 0.1 m^3/s
    carries 20 degC
boundary grille of room
    side east
    outlet
    enters at 0.1 m^3/s
"##,
        );
    }

    #[test]
    fn a_gas_at_no_pressure() {
        expect_of(
            CHECK.name,
            r##"
fluid a  #! no-pressure-level "101.3 kPa"
    substance air
    density-law ideal-gas
fluid b
    substance water
    density-law variable
region room
    box 1 m by 2 m by 3 m
    filled with a
region tank
    box 1 m by 2 m by 3 m
    filled with b
"##,
        );
    }

    #[test]
    fn pressure_given() {
        expect_of(
            CHECK.name,
            r##"
case
    ambient 20 degC at 1 bar
fluid a
    substance air
    density-law ideal-gas
region room
    box 1 m by 2 m by 3 m
    filled with a
boundary vent of room
    side west
    inlet
    enters at 0.1 m^3/s
    carries 20 degC
boundary grille of room
    side east
    outlet
"##,
        );
    }
}
