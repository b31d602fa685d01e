//! `direct-simulation-spacing`: a direct simulation on a mesh that does not hold its smallest scales.

use super::cells::{cells_within, first_cell, growth, heated_directions, mesh_of, rows};
use crate::case::model::{Flow, Mesh, Region};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{Weighed, estimate_note, regions};
use crate::physics::model::{ArrangementKind, RegionPhysics};
use crate::physics::scales_published::{KINETIC_LAYER_CONSTANT, direct_simulation_spacing, layer_nodes};
use crate::quantity::display::{format_number, format_si};
use crate::syntax::{Finding, Level};
use crate::vocabulary::statements::LENGTH;

/// The check.
pub const CHECK: Check = Check {
    name: "direct-simulation-spacing",
    family: Family::Resolution,
    limits: &[(Level::Warning, 1.0), (Level::Error, 2.0)],
    level: Level::Warning,
    basis: Basis {
        compares: "Under direct simulation, holds the mean size of the cells against the smallest scale of the flow, and in a layer heated from below the \
                   cells in the thermal layer against the number that it needs.",
        formula: "h / (π η), h = (Δx Δy Δz)^(1/3), η = L (Pr² / ((Nu − 1) Ra))^(1/4) up to Pr 1, over √Pr above; and N_needed / N in the thermal layer",
        source: "Grötzbach, J. Comput. Phys. 49 (1983) 241 (recalled); Shishkina, Stevens, Grossmann and Lohse, New J. Phys. 12 (2010) 075022. The mean \
                 dissipation behind η is exact for a layer heated from below and an estimate elsewhere",
        remedy: "More cells.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let mut findings = Vec::new();
    for (region, physics) in regions(subject) {
        if region.flow.is_some_and(|flow| flow.value == Flow::Turbulent(Some("direct-simulation")))
            && let Some(mesh) = mesh_of(subject.case, region)
        {
            findings.extend(spacing(region, physics, mesh, weighing));
            findings.extend(nodes(subject, region, physics, mesh, weighing));
        }
    }
    findings
}

fn spacing(region: &Region, physics: &RegionPhysics, mesh: &Mesh, weighing: &Weighing) -> Option<Finding> {
    let numbers = &physics.numbers;
    let rows = rows(region, mesh);
    if rows.is_empty() {
        return None;
    }
    let product: f64 = rows.iter().map(super::cells::Row::mean_size).product();
    let mean = product.powf(1.0 / rows.iter().map(|_| 1.0).sum::<f64>());
    let largest =
        direct_simulation_spacing(physics.geometry.length, numbers.rayleigh, numbers.prandtl, numbers.nusselt)?;
    // (Nu − 1) Ra goes with the difference to the power 4/3 or so, and the scale with its fourth root.
    let ratio = Weighed::power(mean / largest, 1.0 / 3.0, physics.bracket.as_ref());
    let (level, limit) = ratio.over(weighing)?;
    let message = format!(
        "The cells of `{}` are {} on average, and its smallest scales need {} or less.{}",
        region.name.text,
        format_si(mean, LENGTH),
        format_si(largest, LENGTH),
        estimate_note(physics.bracket.as_ref()),
    );
    Some(
        Finding::new(CHECK.name, level, mesh.place, message)
            .about(&*region.name.text)
            .remedy(format!(
                "{} times as many cells along each direction, or a turbulence model",
                format_number((ratio.value * 10.0).ceil() / 10.0)
            ))
            .weighing(ratio.margin("h / (π η)", limit)),
    )
}

fn nodes(
    subject: &Subject<'_>,
    region: &Region,
    physics: &RegionPhysics,
    mesh: &Mesh,
    weighing: &Weighing,
) -> Option<Finding> {
    let numbers = &physics.numbers;
    if physics.arrangement.kind != ArrangementKind::LayerHeatedFromBelow {
        return None;
    }
    let rows = rows(region, mesh);
    let heated = heated_directions(subject.case, region);
    let row = rows.iter().find(|row| heated.contains(&row.direction));
    let needed = layer_nodes(numbers.nusselt, numbers.prandtl, KINETIC_LAYER_CONSTANT)?.thermal;
    let layer = 0.5 * physics.geometry.length / numbers.nusselt;
    let cells = cells_within(layer, first_cell(mesh, row), growth(mesh));
    let ratio = Weighed::given(needed / cells);
    let (level, limit) = ratio.over(weighing)?;
    let message = format!(
        "The thermal layers of `{}` are {} thick and hold {} cells; a direct simulation needs {} there.{}",
        region.name.text,
        format_si(layer, LENGTH),
        format_number((cells * 10.0).round() / 10.0),
        format_number((needed * 10.0).ceil() / 10.0),
        estimate_note(physics.bracket.as_ref()),
    );
    let place = mesh.first_cell.as_ref().map_or(mesh.place, |first| first.origin.place);
    Some(
        Finding::new(CHECK.name, level, place, message)
            .about(&*region.name.text)
            .remedy("a smaller `first-cell`")
            .weighing(ratio.margin("N_needed / N", limit)),
    )
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn coarse_and_fine() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          0.8 m by 0.8 m by 0.2 m
    filled with  a
    flow         turbulent by direct-simulation
boundary floor of c
    side bottom
    held at 30 degC
boundary lid of c
    side top
    held at 10 degC
boundary rest of c
    side remaining
    insulated
mesh of c  #! direct-simulation-spacing "its smallest scales", direct-simulation-spacing "needs"
    cells 40 by 40 by 20
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
    box          0.8 m by 0.8 m by 0.2 m
    filled with  a
    flow         turbulent by direct-simulation
boundary floor of c
    side bottom
    held at 30 degC
boundary lid of c
    side top
    held at 10 degC
boundary rest of c
    side remaining
    insulated
mesh of c
    cells 200 by 200 by 160
"##,
        );
    }

    #[test]
    fn models_need_less() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          0.8 m by 0.8 m by 0.2 m
    filled with  a
    flow         turbulent by large-eddy
boundary floor of c
    side bottom
    held at 30 degC
boundary lid of c
    side top
    held at 10 degC
boundary rest of c
    side remaining
    insulated
mesh of c
    cells 40 by 40 by 20
"##,
        );
    }
}
