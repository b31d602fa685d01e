//! Is the problem well posed? Continuity, three momentum equations and the energy equation, for velocity, pressure and
//! temperature, need a condition at every point of the surface, and an initial state where they are followed in time.

mod network;
pub mod parts;
pub mod sides;

pub mod floating_temperature;
pub mod gravity_missing;
pub mod gravity_out_of_plane;
pub mod heat_imbalance;
pub mod mass_imbalance;
pub mod no_backflow_temperature;
pub mod no_density_law;
pub mod no_heat_condition;
pub mod no_initial;
pub mod no_inlet_rate;
pub mod no_pressure_level;
pub mod no_reference;
pub mod no_run;
pub mod no_shape;
pub mod region_unreached;
pub mod repeat_unpaired;
pub mod side_not_of_shape;
pub mod side_twice;
pub mod side_unassigned;
pub mod symmetry_across_gravity;
pub mod two_boundary_kinds;
pub mod two_heat_conditions;
pub mod unfilled_region;
