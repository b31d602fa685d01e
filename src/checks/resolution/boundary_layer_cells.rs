//! `boundary-layer-cells`: too few cells in the layers on the walls.

use super::cells::{Row, cells_within, first_cell, growth, heated_directions, mesh_of, rows};
use crate::case::model::{Flow, Mesh, Region};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{Weighed, estimate_note, regions, rounded_down};
use crate::physics::model::RegionPhysics;
use crate::quantity::display::{format_number, format_si};
use crate::syntax::{Finding, Level};
use crate::vocabulary::statements::LENGTH;

/// The check.
pub const CHECK: Check = Check {
    name: "boundary-layer-cells",
    family: Family::Resolution,
    limits: &[(Level::Warning, 1.0 / 3.0)],
    level: Level::Warning,
    basis: Basis {
        compares: "Counts the cells within the thinner of the thermal and the viscous layer on the walls that pass heat. Models with wall functions, \
                   which bridge the layer, and large-eddy simulation, which may, are left alone.",
        formula: "1 / n, where n cells from the wall make up δ: δ = Σ first-cell · growth^i; fewer than 3 cells are spoken of",
        source: "at least 3 nodes in the thermal layer: Grötzbach, J. Comput. Phys. 49 (1983) 241 (recalled); more with the Nusselt number: Shishkina et \
                 al., New J. Phys. 12 (2010) 075022. δ = L / Nu or the layers of Ostrach, NACA Report 1111 (1953)",
        remedy: "A smaller `first-cell`, or more cells with `growth` towards the walls.",
    },
    run: Some(run),
};

/// Models that bridge the layers on walls by wall functions.
pub const WALL_FUNCTIONS: [&str; 2] = ["k-epsilon", "reynolds-stress"];
/// A model whose treatment of walls the deck does not tell.
pub const LARGE_EDDY: &str = "large-eddy";

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let mut findings = Vec::new();
    for (region, physics) in regions(subject) {
        if let Some(Flow::Turbulent(Some(model))) = region.flow.map(|flow| flow.value)
            && (WALL_FUNCTIONS.contains(&model) || model == LARGE_EDDY)
        {
            continue;
        }
        if let Some(mesh) = mesh_of(subject.case, region) {
            findings.extend(of_mesh(subject, region, physics, mesh, weighing));
        }
    }
    findings
}

fn of_mesh(
    subject: &Subject<'_>,
    region: &Region,
    physics: &RegionPhysics,
    mesh: &Mesh,
    weighing: &Weighing,
) -> Option<Finding> {
    let (layer, which) = thinner_layer(physics)?;
    let first = coarsest_first_cell(subject, region, mesh)?;
    let cells = cells_within(layer, first, growth(mesh));
    if !(cells.is_finite() && cells > 0.0) {
        return None;
    }
    // The layers thin with the fourth root of the difference, and more cells fit into thicker ones.
    let share = Weighed::power(1.0 / cells, 0.25, physics.bracket.as_ref());
    let (level, limit) = share.over(weighing)?;
    let place = mesh.first_cell.as_ref().map_or(mesh.place, |first| first.origin.place);
    let wanted = first_for(layer, growth(mesh), 1.0 / weighing.first_limit());
    let message = format!(
        "The {which} layer on the walls of `{}` is {} thick, and {} cells lie in it: the first is {} high.{}",
        region.name.text,
        format_si(layer, LENGTH),
        format_number((cells * 10.0).round() / 10.0),
        format_si(first, LENGTH),
        estimate_note(physics.bracket.as_ref()),
    );
    Some(
        Finding::new(CHECK.name, level, place, message)
            .about(&*region.name.text)
            .remedy(format!("`first-cell` of {} or less", format_si(rounded_down(wanted), LENGTH)))
            .weighing(share.margin("1 / n", limit)),
    )
}

fn thinner_layer(physics: &RegionPhysics) -> Option<(f64, &'static str)> {
    let numbers = &physics.numbers;
    let usable = |layer: f64| layer.is_finite() && layer > 0.0;
    match (usable(numbers.thermal_layer), usable(numbers.viscous_layer)) {
        (true, true) if numbers.viscous_layer < numbers.thermal_layer => Some((numbers.viscous_layer, "viscous")),
        (true, _) => Some((numbers.thermal_layer, "thermal")),
        _ => None,
    }
}

/// The largest first cell on a wall that passes heat.
fn coarsest_first_cell(subject: &Subject<'_>, region: &Region, mesh: &Mesh) -> Option<f64> {
    let rows = rows(region, mesh);
    let heated = heated_directions(subject.case, region);
    let at_heated = |row: &&Row| heated.contains(&row.direction);
    let first = rows.iter().filter(at_heated).map(|row| first_cell(mesh, Some(row))).fold(f64::NAN, f64::max);
    let first = if first.is_nan() { first_cell(mesh, None) } else { first };
    (first > 0.0 && first.is_finite()).then_some(first)
}

/// The first cell of which so many fill the layer.
fn first_for(layer: f64, growth: f64, cells: f64) -> f64 {
    if growth > 1.0 { layer * (growth - 1.0) / (growth.powf(cells) - 1.0) } else { layer / cells }
}

#[cfg(test)]
mod tests {
    use super::{CHECK, cells_within, first_for, rounded_down};
    use crate::testing::expect_of;

    #[test]
    fn two_cells_or_four() {
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
    first-cell 2.5 mm  #! boundary-layer-cells "2 cells lie in it"
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
    first-cell 1.4 mm
"##,
        );
    }

    #[test]
    fn from_the_number_of_cells() {
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
mesh of c  #! boundary-layer-cells
    cells 100 by 300
    spacing uniform
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
    cells 300 by 100
    spacing uniform
"##,
        );
    }

    #[test]
    fn wall_functions_bridge_it() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          2 m by 2 m
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
    first-cell 40 mm
"##,
        );
    }

    #[test]
    fn what_is_advised_is_enough() {
        for (layer, growth) in [(0.018, 1.15), (0.0023, 1.0), (0.9, 1.3)] {
            let first = rounded_down(first_for(layer, growth, 5.0));
            assert!(cells_within(layer, first, growth) >= 5.0 - 1e-9);
        }
    }
}
