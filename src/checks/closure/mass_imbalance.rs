//! `mass-imbalance`: fluid that enters and cannot leave, or the other way about.

use super::parts::{Role, is_open_by_shape, lets_fluid_pass, role};
use crate::case::model::{Boundary, Case, DensityLaw, Region};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{Weighed, finding_of, is_fluid, is_steady, listed, regions};
use crate::physics::geometry::area_of;
use crate::physics::model::RegionPhysics;
use crate::quantity::display::format_si;
use crate::syntax::{Finding, Level};
use crate::vocabulary::statements::{MASS_FLOW, SPEED, VOLUME_FLOW};

/// The check.
pub const CHECK: Check = Check {
    name: "mass-imbalance",
    family: Family::Closure,
    limits: &[(Level::Error, 0.01)],
    level: Level::Error,
    basis: Basis {
        compares: "Holds what enters each region against what can leave it.",
        formula: "|ṁ_in − ṁ_out| / max(ṁ_in, ṁ_out), where every rate is given",
        source: "conservation of mass: under the Boussinesq law the velocity has no divergence, so as much leaves as enters (Spiegel and \
                 Veronis, Astrophys. J. 131 (1960) 442)",
        remedy: "An `outlet` or `opening` for what enters; `opening` rather than `outlet` where nothing else lets fluid in.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    regions(subject)
        .filter(|(region, _)| is_fluid(region))
        .filter_map(|(region, physics)| of_region(subject.case, region, physics, weighing))
        .collect()
}

fn of_region(case: &Case, region: &Region, physics: &RegionPhysics, weighing: &Weighing) -> Option<Finding> {
    let passing: Vec<&Boundary> =
        case.boundaries_of(region).filter(|boundary| lets_fluid_pass(role(boundary))).collect();
    let has = |wanted: Role| passing.iter().any(|boundary| role(boundary) == wanted);
    // A gas may be pressed into a closed vessel while time passes.
    let may_fill = !is_steady(case)
        && case
            .fluid_of(region)
            .and_then(|fluid| fluid.density_law)
            .is_some_and(|law| law.value == DensityLaw::IdealGas);
    if has(Role::Opening) || has(Role::Far) || is_open_by_shape(case, region) || may_fill {
        return None;
    }
    let named = |wanted: Role| -> Vec<&str> {
        passing.iter().filter(|boundary| role(boundary) == wanted).map(|boundary| &*boundary.name.text).collect()
    };
    let first = passing.first()?;
    let finding = |level, message: String| finding_of(CHECK.name, level, &first.name, message);
    match (has(Role::Inlet), has(Role::Outlet)) {
        (true, false) if passing.iter().any(|boundary| boundary.enters.is_some()) => Some(
            finding(
                weighing.level,
                format!(
                    "Fluid enters `{}` at {} and can leave nowhere.",
                    region.name.text,
                    listed(&named(Role::Inlet))
                ),
            )
            .remedy("an `outlet` or an `opening`"),
        ),
        (false, true) => {
            let backflow = passing.iter().any(|boundary| boundary.backflow.is_some());
            (!backflow).then(|| {
                let message = format!(
                    "Fluid leaves `{}` at {} and enters nowhere.",
                    region.name.text,
                    listed(&named(Role::Outlet))
                );
                finding(Level::Warning, message).remedy("an `inlet`, or `opening` instead of `outlet`")
            })
        }
        (true, true) => rates_differ(case, region, physics, &passing, weighing),
        _ => None,
    }
}

/// Where every inlet and outlet states its rate.
fn rates_differ(
    case: &Case,
    region: &Region,
    physics: &RegionPhysics,
    passing: &[&Boundary],
    weighing: &Weighing,
) -> Option<Finding> {
    let density = physics.fluid.as_ref()?.constants.density;
    let (mut entering, mut leaving) = (0.0, 0.0);
    for boundary in passing {
        let stated = boundary.enters.as_ref()?;
        let dimension = stated.dimension;
        let rate = if dimension == SPEED {
            density * stated.si * area_of(case, region, boundary)
        } else if dimension == VOLUME_FLOW {
            density * stated.si
        } else if dimension == MASS_FLOW {
            stated.si
        } else {
            return None;
        };
        match role(boundary) {
            Role::Inlet => entering += rate,
            // On an outlet the rate is that of what leaves, whichever sign it is written with.
            _ => leaving += rate.abs(),
        }
    }
    let share = Weighed::given((entering - leaving).abs() / entering.max(leaving));
    let (level, limit) = share.over(weighing)?;
    let message = format!(
        "{} enters `{}` and {} leaves.",
        format_si(entering, MASS_FLOW),
        region.name.text,
        format_si(leaving, MASS_FLOW)
    );
    Some(
        finding_of(CHECK.name, level, &region.name, message)
            .remedy("equal rates, or an `outlet` without a rate, which takes what comes")
            .weighing(share.margin("|ṁ_in − ṁ_out| / max(ṁ_in, ṁ_out)", limit)),
    )
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn no_way_out() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary vent of room  #! mass-imbalance "can leave nowhere"
    side west
    inlet
    enters at 0.2 m/s
    carries 20 degC
boundary rest of room
    side remaining
    insulated
"##,
        );
    }

    #[test]
    fn no_way_in() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary grille of room  #! mass-imbalance "enters nowhere"
    side west
    outlet
boundary rest of room
    side remaining
    insulated
"##,
        );
    }

    #[test]
    fn both_ways() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary vent of room
    side west
    inlet
    enters at 0.2 m/s
    carries 20 degC
boundary grille of room
    side east
    outlet
"##,
        );
    }
}
