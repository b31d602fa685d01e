//! The cells of a region's mesh, direction by direction.

use crate::case::model::{Case, Heat, Mesh, Region, Side};
use crate::checks::closure::parts::{Role, role};
use crate::checks::closure::sides::covered_by;
use crate::physics::geometry::{has_no_depth, sizes};

/// The cells along one direction.
#[derive(Clone, Copy, Debug)]
pub struct Row {
    /// Index of the direction: 0 is x, 1 y, 2 z.
    pub direction: usize,
    /// Extent of the region, m.
    pub extent: f64,
    /// Number of cells.
    pub cells: f64,
}

impl Row {
    /// Mean size of the cells, m.
    pub fn mean_size(&self) -> f64 {
        self.extent / self.cells
    }
}

/// The mesh of a region.
pub fn mesh_of<'a>(case: &'a Case, region: &Region) -> Option<&'a Mesh> {
    case.meshes.iter().find(|mesh| mesh.region.as_ref().is_some_and(|of| of.text == region.name.text))
}

/// The directions of a box, gap or channel with the cells along each; empty for other shapes, for numbers of cells that do not
/// fit the shape, and where something is not known.
pub fn rows(region: &Region, mesh: &Mesh) -> Vec<Row> {
    let Some(sizes) = sizes(region).filter(|_| !region.is_surrounded) else { return Vec::new() };
    let directions: &[usize] = if has_no_depth(region) { &[0, 2] } else { &[0, 1, 2] };
    if directions.len() != mesh.cells.len() {
        return Vec::new();
    }
    let is_flat = matches!(sizes.roundness, crate::physics::geometry::Roundness::Flat);
    let rows: Vec<Row> = directions
        .iter()
        .zip(&mesh.cells)
        .filter_map(|(direction, cells)| {
            let extent = sizes.extent.get(*direction).copied()?;
            let usable = extent > 0.0 && extent.is_finite() && cells.si >= 1.0 && cells.si.is_finite();
            usable.then_some(Row { direction: *direction, extent, cells: cells.si })
        })
        .collect();
    if is_flat && rows.len() == directions.len() { rows } else { Vec::new() }
}

/// Height of the cells at a wall, m: as stated; else by growth from both walls to the middle where the cells are graded; else the
/// mean size. `NaN` where nothing tells.
pub fn first_cell(mesh: &Mesh, row: Option<&Row>) -> f64 {
    if let Some(first) = &mesh.first_cell {
        return first.si;
    }
    let Some(row) = row else { return f64::NAN };
    match (&mesh.graded, &mesh.growth) {
        (Some(graded), _) if !graded.value => row.mean_size(),
        (_, Some(growth)) if growth.si > 1.0 => {
            // A half of the extent is the sum of a half of the cells, each `growth` times the one before.
            let half = 0.5 * row.cells;
            0.5 * row.extent * (growth.si - 1.0) / (growth.si.powf(half) - 1.0)
        }
        _ => row.mean_size(),
    }
}

/// How many cells of a wall's grading lie within a thickness.
pub fn cells_within(thickness: f64, first: f64, growth: f64) -> f64 {
    if growth > 1.0 { (thickness * (growth - 1.0) / first).ln_1p() / growth.ln() } else { thickness / first }
}

/// The growth that a mesh states; 1 where it states none.
pub fn growth(mesh: &Mesh) -> f64 {
    match (&mesh.graded, &mesh.growth) {
        (Some(graded), _) if !graded.value => 1.0,
        (_, Some(growth)) => growth.si,
        _ => 1.0,
    }
}

/// The directions across the walls through which heat passes.
pub fn heated_directions(case: &Case, region: &Region) -> Vec<usize> {
    let passes_heat = case.boundaries_of(region).filter(|boundary| {
        matches!(role(boundary), Role::Wall | Role::Meets)
            && !boundary.heat.iter().any(|(heat, _)| matches!(heat, Heat::Insulated))
    });
    let mut directions: Vec<usize> =
        passes_heat.flat_map(|boundary| covered_by(case, region, boundary)).filter_map(across).collect();
    directions.sort_unstable();
    directions.dedup();
    directions
}

const fn across(side: Side) -> Option<usize> {
    match side {
        Side::West | Side::East => Some(0),
        Side::South | Side::North => Some(1),
        Side::Bottom | Side::Top => Some(2),
        _ => None,
    }
}

/// The direction that gravity lies nearest to.
pub fn upright(case: &Case) -> usize {
    let size = |direction: usize| case.gravity.direction.get(direction).map_or(0.0, |part| part.abs());
    (0..3).max_by(|a, b| size(*a).total_cmp(&size(*b))).unwrap_or(2)
}

#[cfg(test)]
mod tests {
    use super::cells_within;

    #[test]
    fn cells_of_a_geometric_series() {
        // 1 + 2 + 4 + 8 = 15.
        assert!((cells_within(15.0, 1.0, 2.0) - 4.0).abs() < 1e-12);
        assert_eq!(cells_within(15.0, 1.5, 1.0), 10.0);
        // 1.5 mm growing by 1.15: 1.5, 1.725, 1.984 add up to 5.209.
        assert!((cells_within(5.20875, 1.5, 1.15) - 3.0).abs() < 1e-9);
    }
}
