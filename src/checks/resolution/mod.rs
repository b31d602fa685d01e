//! Does the mesh resolve the flow, and the run its course?

mod cells;
mod friction;

pub mod boundary_layer_cells;
pub mod direct_simulation_spacing;
pub mod run_too_short;
pub mod time_step;
pub mod wall_distance;
pub mod wave_period;
