//! Finds the entries of a case by name without walking through all: what makes checks of a long deck quick.

use super::model::Case;

/// The numbers of regions, fluids and boundaries, each in the order of a name; of equal names in the order of the deck.
/// Made when first asked for, so a case may not lose, gain or rename any of these afterwards.
#[derive(Clone, Debug, Default)]
pub struct Index {
    regions: Vec<usize>,
    fluids: Vec<usize>,
    /// By the name of their region.
    boundaries: Vec<usize>,
}

impl Index {
    /// The index of a case.
    pub fn of(case: &Case) -> Index {
        Index {
            regions: sorted(case.regions.len(), &|number| region_name(case, number)),
            fluids: sorted(case.fluids.len(), &|number| fluid_name(case, number)),
            boundaries: sorted(case.boundaries.len(), &|number| boundary_region(case, number)),
        }
    }

    /// The number of the first region of a name.
    pub fn region(&self, case: &Case, name: &str) -> Option<usize> {
        named(&self.regions, name, &|number| region_name(case, number)).first().copied()
    }

    /// The number of the first fluid of a name.
    pub fn fluid(&self, case: &Case, name: &str) -> Option<usize> {
        named(&self.fluids, name, &|number| fluid_name(case, number)).first().copied()
    }

    /// The numbers of the boundaries of the region of a name.
    pub fn boundaries_of(&self, case: &Case, region: &str) -> &[usize] {
        named(&self.boundaries, region, &|number| boundary_region(case, number))
    }
}

fn sorted<'c>(count: usize, name_of: &dyn Fn(usize) -> &'c str) -> Vec<usize> {
    let mut numbers: Vec<usize> = (0..count).collect();
    numbers.sort_by(|a, b| name_of(*a).cmp(name_of(*b)));
    numbers
}

fn named<'i, 'c>(numbers: &'i [usize], name: &str, name_of: &dyn Fn(usize) -> &'c str) -> &'i [usize] {
    let start = numbers.partition_point(|number| name_of(*number) < name);
    let rest = numbers.get(start..).unwrap_or_default();
    let count = rest.partition_point(|number| name_of(*number) == name);
    rest.get(..count).unwrap_or_default()
}

fn region_name(case: &Case, number: usize) -> &str {
    case.regions.get(number).map_or("", |region| &region.name.text)
}

fn fluid_name(case: &Case, number: usize) -> &str {
    case.fluids.get(number).map_or("", |fluid| &fluid.name.text)
}

/// Empty for a boundary that names no region; no region is called that.
fn boundary_region(case: &Case, number: usize) -> &str {
    case.boundaries.get(number).and_then(|boundary| boundary.region.as_ref()).map_or("", |name| &name.text)
}
