//! What the deck records: requirements, waivers, and what rests on estimates.

pub mod region_numbers;
pub mod waivers;

pub mod requirement_failed;
pub mod requirement_unknown;
pub mod rests_on_estimate;
pub mod waiver_expired;
pub mod waiver_idle;

pub use waivers::apply_waivers;
