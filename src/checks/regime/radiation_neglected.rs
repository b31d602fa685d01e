//! `radiation-neglected`: surfaces that exchange heat by radiation as well, in a case that leaves it out.

use crate::case::model::{Boundary, BoundaryKind, Case, Heat, Radiation, Region};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::closure::parts::{Role, role};
use crate::checks::look::{Weighed, estimate_note, regions};
use crate::physics::conditions::STEFAN_BOLTZMANN;
use crate::quantity::display::format_number;
use crate::substances::Medium;
use crate::syntax::{Finding, Level};

/// Emissivity of a surface that states none: paint, paper, plastics, stone, glass and oxides lie at 0.85 to 0.95 (common practice).
const USUAL_EMISSIVITY: f64 = 0.9;

/// The check.
pub const CHECK: Check = Check {
    name: "radiation-neglected",
    family: Family::Regime,
    limits: &[(Level::Information, 0.1), (Level::Warning, 0.5)],
    level: Level::Warning,
    basis: Basis {
        compares: "In a gas whose region computes no radiation, holds the coefficient of radiation between its warm and cold surfaces against \
                   that of convection. Where no surface states an emissivity, 0.9 is taken and it is a hint.",
        formula: "4 ε σ T³ / h; T is the mean temperature, h = Nu k / L, and ε = 1 / (1/ε₁ + 1/ε₂ − 1) between two faces",
        source: "linearised law of Stefan and Boltzmann between large parallel faces: Siegel and Howell, Thermal Radiation Heat Transfer, chapter on \
                 exchange between grey surfaces (recalled). The limits are common practice",
        remedy: "`radiation surface-to-surface`, with the `emissivity` of the surfaces.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    regions(subject).filter_map(|(region, physics)| of_region(subject, region, physics, weighing)).collect()
}

fn of_region(
    subject: &Subject<'_>,
    region: &Region,
    physics: &crate::physics::model::RegionPhysics,
    weighing: &Weighing,
) -> Option<Finding> {
    let case = subject.case;
    if region.radiation.is_some_and(|radiation| radiation.value != Radiation::None) {
        return None;
    }
    let medium = Medium::of(case, case.fluid_of(region)?)?;
    if !medium.is_gas() {
        return None;
    }
    let (emissivity, is_stated) = effective_emissivity(case, region);
    let numbers = &physics.numbers;
    let radiative = 4.0 * emissivity * STEFAN_BOLTZMANN * numbers.film_temperature.powi(3);
    let by = |convective: f64| radiative / convective;
    // The band of the Nusselt number is that of h.
    let (least, most) = numbers.nusselt_band;
    let band = |nusselt: f64| by(numbers.heat_transfer_coefficient * nusselt / numbers.nusselt);
    let ratio = Weighed { value: by(numbers.heat_transfer_coefficient), band: (band(most), band(least)) };
    if !(ratio.value.is_finite() && radiative > 0.0) {
        return None;
    }
    let (level, limit) = if is_stated { ratio.over(weighing)? } else { (Level::Hint, weighing.over(ratio.value)?.1) };
    let place = region.radiation.map_or(region.name.place, |radiation| radiation.place);
    let assumed = if is_stated { "" } else { ", taken as no surface states one," };
    let message = format!(
        "No radiation is computed in `{}`: at an emissivity of {}{assumed} it passes {} W/m^2/K, {} times the {} W/m^2/K of convection.{}",
        region.name.text,
        format_number(emissivity),
        format_number(radiative),
        format_number((ratio.value * 100.0).round() / 100.0),
        format_number(numbers.heat_transfer_coefficient),
        estimate_note(physics.bracket.as_ref()),
    );
    let mut finding = Finding::new(CHECK.name, level, place, message)
        .about(&*region.name.text)
        .remedy("`radiation surface-to-surface`, with the `emissivity` of the surfaces")
        .weighing(ratio.margin("4εσT³ / h", limit));
    let statement = "radiation surface-to-surface";
    match region.radiation {
        Some(radiation) => {
            finding = finding.fix(format!("Write `{statement}`"), radiation.place.span, statement, false)
        }
        None => finding.fixes.push(crate::checks::closure::parts::add_below(region.name.place, statement, false)),
    }
    Some(finding)
}

/// The emissivity between the surfaces that exchange heat, and whether any states its own.
fn effective_emissivity(case: &Case, region: &Region) -> (f64, bool) {
    let passes_heat = |boundary: &&Boundary| {
        matches!(role(boundary), Role::Wall | Role::Meets)
            && !boundary.heat.iter().any(|(heat, _)| matches!(heat, Heat::Insulated))
    };
    let stated: Vec<Option<f64>> =
        case.boundaries_of(region).filter(passes_heat).map(|boundary| emissivity_of(case, boundary)).collect();
    let is_stated = stated.iter().any(Option::is_some);
    let inverses: Vec<f64> = stated.iter().map(|emissivity| 1.0 / emissivity.unwrap_or(USUAL_EMISSIVITY)).collect();
    let effective = match inverses.as_slice() {
        [] => USUAL_EMISSIVITY,
        // One face that sees wide surroundings.
        [only] => 1.0 / only,
        // Two faces, or several taken as two with the mean resistance.
        several => {
            let mean = several.iter().sum::<f64>() / several.iter().map(|_| 1.0).sum::<f64>();
            1.0 / (2.0 * mean - 1.0)
        }
    };
    (effective, is_stated)
}

/// The emissivity that a boundary states, or the solid behind it.
fn emissivity_of(case: &Case, boundary: &Boundary) -> Option<f64> {
    let behind = || {
        boundary.kinds.iter().find_map(|(kind, _)| match kind {
            BoundaryKind::Meets(region) => {
                let solid = case.region(&region.text)?.made_of.as_ref()?;
                case.solids.iter().find(|of| of.name.text == solid.text)?.emissivity.as_ref()
            }
            _ => None,
        })
    };
    let value = boundary.emissivity.as_ref().or_else(behind)?.si;
    (value > 0.0 && value <= 1.0).then_some(value)
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn bright_and_dark_faces() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c  #! radiation-neglected
    box          0.3 m by 0.3 m
    filled with  a
    flow         laminar
boundary hot of c
    side west
    held at 30 degC
    emissivity 0.9
boundary cold of c
    side east
    held at 10 degC
    emissivity 0.9
boundary rest of c
    side remaining
    insulated
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
    box          0.3 m by 0.3 m
    filled with  a
    flow         laminar
boundary hot of c
    side west
    held at 30 degC
    emissivity 0.03
boundary cold of c
    side east
    held at 10 degC
    emissivity 0.03
boundary rest of c
    side remaining
    insulated
"##,
        );
    }

    #[test]
    fn computed() {
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
    radiation surface-to-surface
boundary hot of c
    side west
    held at 30 degC
    emissivity 0.9
boundary cold of c
    side east
    held at 10 degC
    emissivity 0.9
boundary rest of c
    side remaining
    insulated
"##,
        );
    }

    #[test]
    fn a_hint_where_no_surface_says() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c  #! radiation-neglected "taken as no surface states one"
    box          0.3 m by 0.3 m
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

    #[test]
    fn liquids_are_opaque() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    water
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          0.3 m by 0.3 m
    filled with  a
    flow         laminar
boundary hot of c
    side west
    held at 30 degC
    emissivity 0.9
boundary cold of c
    side east
    held at 10 degC
    emissivity 0.9
boundary rest of c
    side remaining
    insulated
"##,
        );
    }
}
