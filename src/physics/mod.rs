//! What a case implies: arrangement, temperatures reached, characteristic numbers, scales, correlations.

pub mod model;

/// The physics of every region of a case.
pub fn work_out(case: &crate::case::model::Case) -> model::Physics {
    model::Physics { regions: case.regions.iter().map(|_| model::RegionPhysics::default()).collect() }
}
