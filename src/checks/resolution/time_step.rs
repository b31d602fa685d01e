//! `time-step`: a step in which the flow crosses too many cells, or heat spreads too far.

use super::cells::{first_cell, heated_directions, mesh_of, rows, upright};
use crate::case::model::{Flow, Region, Value};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{Weighed, estimate_note, regions, rounded_down};
use crate::physics::model::RegionPhysics;
use crate::quantity::display::{format_number, format_si};
use crate::syntax::{Finding, Level};
use crate::vocabulary::statements::{LENGTH, TIME};

/// Courant numbers that a scheme takes.
const EXPLICIT: f64 = 1.0;
const FOLLOWING_EDDIES: f64 = 1.0;
const IMPLICIT: f64 = 10.0;
/// The diffusion number that an explicit scheme takes.
const DIFFUSION: f64 = 0.5;
/// Share of the buoyant velocity that the flow takes at least: 0.23 to 0.26 in de Vahl Davis's cavity (Int. J. Numer. Methods
/// Fluids 3 (1983) 249), 0.55 on a plate in air (Ostrach 1953).
const LEAST_SHARE: f64 = 0.23;

/// The check.
pub const CHECK: Check = Check {
    name: "time-step",
    family: Family::Resolution,
    limits: &[(Level::Warning, 1.0)],
    level: Level::Warning,
    basis: Basis {
        compares: "In a transient run, holds the Courant number of the fastest velocity, given or buoyant, against what the scheme takes: 1 for explicit steps and \
                   for models that follow eddies, 10 for implicit ones; and the diffusion number of explicit steps against a half. An explicit step over the \
                   limit is an error.",
        formula: "Co = v Δt / Δ over the limit of the scheme, v = √(g α ΔT H), √Pr times slower for Pr over 1; Fo = max(ν, a) Δt Σ 1/Δ²",
        source: "explicit steps: Courant, Friedrichs and Lewy, Math. Ann. 100 (1928) 32; diffusion: von Neumann's condition (Richtmyer and Morton, \
                 Difference Methods for Initial-Value Problems, 1967, recalled). 10 for implicit steps is common practice",
        remedy: "A shorter `step`.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let Some(run) = &subject.case.run else { return Vec::new() };
    let Some((_, step)) = &run.transient else { return Vec::new() };
    let is_explicit = run.explicit.is_some_and(|explicit| explicit.value);
    let mut findings = Vec::new();
    for (region, physics) in regions(subject) {
        findings.extend(courant(subject, region, physics, step, is_explicit, weighing));
        if is_explicit {
            findings.extend(diffusion(subject, region, physics, step, weighing));
        }
    }
    findings
}

fn courant(
    subject: &Subject<'_>,
    region: &Region,
    physics: &RegionPhysics,
    step: &Value,
    is_explicit: bool,
    weighing: &Weighing,
) -> Option<Finding> {
    let numbers = &physics.numbers;
    let rows = rows(region, mesh_of(subject.case, region)?);
    let along_gravity = rows.iter().find(|row| row.direction == upright(subject.case))?.mean_size();
    let smallest = rows.iter().map(super::cells::Row::mean_size).fold(f64::INFINITY, f64::min);
    let buoyant = numbers.buoyant_velocity / numbers.prandtl.sqrt().max(1.0);
    let by_buoyancy = buoyant * step.si / along_gravity;
    let by_given = numbers.given_velocity * step.si / smallest;
    let (value, least, velocity, cell, what) = if by_given > by_buoyancy || by_buoyancy.is_nan() {
        (by_given, by_given, numbers.given_velocity, smallest, "the given velocity")
    } else {
        (by_buoyancy, LEAST_SHARE * by_buoyancy, buoyant, along_gravity, "the buoyant velocity")
    };
    let follows_eddies = matches!(region.flow?.value, Flow::Turbulent(Some("large-eddy" | "direct-simulation")));
    let (taken, scheme) = match (is_explicit, follows_eddies) {
        (true, _) => (EXPLICIT, "explicit steps take"),
        (false, true) => (FOLLOWING_EDDIES, "a model that follows eddies takes"),
        (false, false) => (IMPLICIT, "implicit steps take"),
    };
    let ratio = Weighed { value: value / taken, band: (least / taken, value / taken) };
    let (level, limit) = ratio.over(weighing)?;
    let level = if is_explicit && ratio.band.0 > limit { Level::Error } else { level };
    let message = format!(
        "In one step of {} {what} of {} m/s crosses {} cells of {} in `{}`; {scheme} {}.{}",
        format_si(step.si, TIME),
        format_number(velocity),
        format_number(value),
        format_si(cell, LENGTH),
        region.name.text,
        format_number(taken),
        estimate_note(physics.bracket.as_ref()),
    );
    Some(
        Finding::new(CHECK.name, level, step.origin.place, message)
            .about(&*region.name.text)
            .remedy(format!("a step of {} or less", format_si(rounded_down(step.si / ratio.value * limit), TIME)))
            .weighing(ratio.margin("Co / Co_limit", limit)),
    )
}

fn diffusion(
    subject: &Subject<'_>,
    region: &Region,
    physics: &RegionPhysics,
    step: &Value,
    weighing: &Weighing,
) -> Option<Finding> {
    let properties = physics.numbers.properties.as_ref()?;
    let mesh = mesh_of(subject.case, region)?;
    let heated = heated_directions(subject.case, region);
    let inverse_squares: f64 = rows(region, mesh)
        .iter()
        .map(|row| if heated.contains(&row.direction) { first_cell(mesh, Some(row)) } else { row.mean_size() })
        .map(|size| 1.0 / (size * size))
        .sum();
    let spread = properties.kinematic_viscosity().max(properties.diffusivity());
    let number = spread * step.si * inverse_squares;
    let ratio = Weighed::given(number / DIFFUSION);
    let (_, limit) = ratio.over(weighing)?;
    let message = format!(
        "The diffusion number of `{}` is {} in one step of {}, and explicit steps take {}.",
        region.name.text,
        format_number(number),
        format_si(step.si, TIME),
        format_number(DIFFUSION),
    );
    Some(
        Finding::new(CHECK.name, Level::Error, step.origin.place, message)
            .about(&*region.name.text)
            .remedy(format!(
                "a step of {} or less, or `time-stepping implicit`",
                format_si(rounded_down(step.si / ratio.value * limit), TIME)
            ))
            .weighing(ratio.margin("Fo / 0.5", limit)),
    )
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn explicit_steps() {
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
boundary cold of c
    side east
    held at 10 degC
boundary rest of c
    side remaining
    insulated
mesh of c
    cells 300 by 300
    spacing uniform
initial c
    temperature 20 degC
run
    transient for 1 h step 3 ms  #! time-step "explicit steps take 1"
    time-stepping explicit
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
boundary cold of c
    side east
    held at 10 degC
boundary rest of c
    side remaining
    insulated
mesh of c
    cells 300 by 300
    spacing uniform
initial c
    temperature 20 degC
run
    transient for 1 h step 2 ms
    time-stepping explicit
"##,
        );
    }

    #[test]
    fn implicit_steps() {
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
boundary cold of c
    side east
    held at 10 degC
boundary rest of c
    side remaining
    insulated
mesh of c
    cells 300 by 300
    spacing uniform
initial c
    temperature 20 degC
run
    transient for 1 h step 30 ms  #! time-step "implicit steps take 10"
    time-stepping implicit
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
boundary cold of c
    side east
    held at 10 degC
boundary rest of c
    side remaining
    insulated
mesh of c
    cells 300 by 300
    spacing uniform
initial c
    temperature 20 degC
run
    transient for 1 h step 20 ms
    time-stepping implicit
"##,
        );
    }

    #[test]
    fn explicit_diffusion() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    engine_oil
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          10 mm by 10 mm
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
mesh of c
    cells 100 by 100
    spacing uniform
initial c
    temperature 20 degC
run
    transient for 1 h step 10 us  #! time-step "diffusion number"
    time-stepping explicit
"##,
        );
    }
}
