//! `wall-distance`: a first cell that does not suit the turbulence model.

use super::boundary_layer_cells::{LARGE_EDDY, WALL_FUNCTIONS};
use super::cells::{Row, first_cell, heated_directions, mesh_of, rows};
use super::friction::friction_velocity;
use crate::case::model::{Flow, Mesh, Region};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{Weighed, regions, rounded_down};
use crate::physics::model::RegionPhysics;
use crate::quantity::display::{format_number, format_si};
use crate::syntax::{Finding, Level};
use crate::vocabulary::statements::LENGTH;

/// y+ that wall functions are made for, and the largest that models carried to the wall take.
const LOGARITHMIC: (f64, f64) = (30.0, 300.0);
const AT_THE_WALL: f64 = 1.0;
/// How far the estimate of the wall shear may be off in y+, either way.
const BAND: f64 = 2.0;

/// The check.
pub const CHECK: Check = Check {
    name: "wall-distance",
    family: Family::Resolution,
    limits: &[(Level::Information, 2.0), (Level::Warning, 5.0)],
    level: Level::Warning,
    basis: Basis {
        compares: "Estimates y+ at the middle of the first cell and holds it against what the turbulence model takes: 30 to 300 with wall functions, 1 and \
                   less for models carried to the wall.",
        formula: "the factor by which y+ = u_τ y / ν is outside that range; y is half of the first cell",
        source: "30 to 300: Launder and Spalding, Comput. Methods Appl. Mech. Eng. 3 (1974) 269 (recalled); 1: common practice. u_τ of a buoyant layer: Eckert and \
                 Jackson, NACA TN 2207 (1950) (formulas recalled); of a driven flow: cf = 0.0592 Re^(-1/5), Schlichting, Boundary-Layer Theory (recalled). \
                 The estimate is taken as good to a factor of 2",
        remedy: "Another `first-cell`, or a model that suits it.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let mut findings = Vec::new();
    for (region, physics) in regions(subject) {
        let Some(Flow::Turbulent(Some(model))) = region.flow.map(|flow| flow.value) else { continue };
        // Direct simulation has a check of its own, and how large-eddy simulation treats walls is not known here.
        if matches!(model, "direct-simulation" | LARGE_EDDY) {
            continue;
        }
        if let Some(mesh) = mesh_of(subject.case, region) {
            findings.extend(of_mesh(subject, region, physics, mesh, model, weighing));
        }
    }
    findings
}

fn of_mesh(
    subject: &Subject<'_>,
    region: &Region,
    physics: &RegionPhysics,
    mesh: &Mesh,
    model: &str,
    weighing: &Weighing,
) -> Option<Finding> {
    let first = wall_cell(subject, region, mesh)?;
    let properties = physics.numbers.properties.as_ref()?;
    let wall_unit = properties.kinematic_viscosity() / friction_velocity(physics);
    let distance = 0.5 * first / wall_unit;
    let (lowest, highest) = if WALL_FUNCTIONS.contains(&model) { LOGARITHMIC } else { (0.0, AT_THE_WALL) };
    let factor = (distance / highest).max(lowest / distance);
    let factor = Weighed { value: factor, band: (factor / BAND, factor * BAND) };
    let (level, limit) = factor.over(weighing)?;
    let range = if lowest > 0.0 {
        format!("between {} and {}", format_number(lowest), format_number(highest))
    } else {
        format!("{} or less", format_number(highest))
    };
    let cell = |plus: f64| format_si(rounded_down(2.0 * plus * wall_unit), LENGTH);
    let remedy = if lowest > 0.0 {
        format!("`first-cell` between {} and {}, or a model carried to the wall", cell(lowest), cell(highest))
    } else {
        format!("`first-cell` of {} or less", cell(highest))
    };
    let place = mesh.first_cell.as_ref().map_or(mesh.place, |first| first.origin.place);
    let message = format!(
        "The first cell at the walls of `{}` is {} high, y+ at its middle some {}; `{model}` takes {range}. This rests on an estimate of the wall shear.",
        region.name.text,
        format_si(first, LENGTH),
        one_digit(distance),
    );
    let finding = Finding::new(CHECK.name, level, place, message).about(&*region.name.text).remedy(remedy);
    let finding = match region.flow {
        Some(flow) => finding.related(flow.place, "the model"),
        None => finding,
    };
    Some(finding.weighing(factor.margin("y+ outside its range, as a factor", limit)))
}

/// The first cell at the walls that pass heat; the largest where they differ.
fn wall_cell(subject: &Subject<'_>, region: &Region, mesh: &Mesh) -> Option<f64> {
    let rows = rows(region, mesh);
    let heated = heated_directions(subject.case, region);
    let at_walls = |row: &&Row| heated.is_empty() || heated.contains(&row.direction);
    let first = rows.iter().filter(at_walls).map(|row| first_cell(mesh, Some(row))).fold(f64::NAN, f64::max);
    let first = if first.is_nan() { first_cell(mesh, None) } else { first };
    (first > 0.0 && first.is_finite()).then_some(first)
}

/// An estimate, to the digit that it deserves.
fn one_digit(value: f64) -> String {
    let step = 10_f64.powf(value.log10().floor());
    format_number((value / step).round() * step)
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn carried_to_the_wall() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          1 m by 1 m
    filled with  a
    flow         turbulent by k-omega
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
    first-cell 12 mm  #! wall-distance "takes 1 or less"
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
    box          1 m by 1 m
    filled with  a
    flow         turbulent by k-omega
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
    first-cell 1 mm
"##,
        );
    }

    #[test]
    fn wall_functions() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          3 m by 3 m
    filled with  a
    flow         turbulent by k-epsilon
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
    first-cell 2 mm  #! wall-distance "between 30 and 300"
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
    box          3 m by 3 m
    filled with  a
    flow         turbulent by k-epsilon
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
    first-cell 50 mm
"##,
        );
    }

    #[test]
    fn without_a_model() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          1 m by 1 m
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
    first-cell 12 mm
"##,
        );
    }
}
