//! Does the model suit the regime of the flow?

mod onsets;
mod viscous_heating;

pub mod buoyancy_negligible;
pub mod conduction_only;
pub mod laminar_above_onset;
pub mod participating_gas;
pub mod radiation_neglected;
pub mod stable_layer;
pub mod steady_above_onset;
pub mod turbulent_below_onset;
pub mod viscous_heating_neglected;
pub mod viscous_heating_negligible;
