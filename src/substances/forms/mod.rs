//! Published property forms that are too long to be written as expressions: water and steam.
//!
//! Every function takes SI values (kelvin, pascal, kg/m³), returns SI values, and returns `None` outside
//! the range that its release states.

pub mod iapws_conductivity;
pub mod iapws_if97;
pub mod iapws_if97_steam;
pub mod iapws_melting;
pub mod iapws_viscosity;

use super::medium::Quantity;
use iapws_if97::WaterState;

/// The value of a property by the form of this word (see the vocabulary), at a temperature in K and a pressure in Pa.
/// `NaN` where the form has none.
pub fn code(form: &str, quantity: Quantity, temperature: f64, pressure: f64) -> f64 {
    let state = match form {
        "iapws-if97" if quantity == Quantity::Boiling => {
            return iapws_if97::saturation_temperature(pressure).unwrap_or(f64::NAN);
        }
        "iapws-melting" => return iapws_melting::melting_temperature(pressure).unwrap_or(f64::NAN),
        "iapws-if97" => iapws_if97::liquid(temperature, pressure),
        "iapws-if97-steam" => iapws_if97_steam::steam(temperature, pressure),
        // Viscosity and conductivity are functions of density, which the region of the state decides.
        "iapws-viscosity" | "iapws-conductivity" => {
            iapws_if97::liquid(temperature, pressure).or_else(|| iapws_if97_steam::steam(temperature, pressure))
        }
        _ => None,
    };
    state.and_then(|state| of_state(&state, quantity, temperature)).unwrap_or(f64::NAN)
}

fn of_state(state: &WaterState, quantity: Quantity, temperature: f64) -> Option<f64> {
    match quantity {
        Quantity::Density => Some(state.density),
        Quantity::HeatCapacity => Some(state.heat_capacity),
        Quantity::Expansion => Some(state.thermal_expansion),
        Quantity::Compressibility => Some(state.compressibility),
        Quantity::Viscosity => iapws_viscosity::viscosity(temperature, state.density),
        Quantity::Conductivity => iapws_conductivity::conductivity(temperature, state),
        Quantity::Boiling | Quantity::Freezing => None,
    }
}
