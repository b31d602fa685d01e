//! Water and steam by IAPWS-IF97 against IAPWS-95 as two reference libraries give it
//! (`water_reference.csv`, made by `water_reference.py`).

#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)]

use deckline::substances::forms::iapws_conductivity::conductivity;
use deckline::substances::forms::iapws_if97::liquid;
use deckline::substances::forms::iapws_if97_steam::steam;
use deckline::substances::forms::iapws_viscosity::viscosity;

const PROPERTIES: [&str; 6] = ["rho", "cp", "mu", "k", "alpha", "kappa"];

/// Largest deviation allowed, relative, in the order of `PROPERTIES`.
const LIQUID_TOLERANCE: [f64; 6] = [2.0e-5, 1.0e-3, 3.0e-5, 3.0e-5, 5.0e-3, 4.0e-3];
const STEAM_TOLERANCE: [f64; 6] = [1.0e-4, 1.0e-3, 1.0e-6, 1.0e-6, 5.0e-4, 1.0e-4];

/// Near 4 °C the expansion passes zero, where a relative deviation says nothing: there it is taken relative
/// to this expansion (1/K), that of water at about 8 °C.
const EXPANSION_FLOOR: f64 = 6.0e-5;

#[test]
fn water_and_steam_agree_with_the_reference_libraries() {
    let table = std::fs::read_to_string(concat!(env!("CARGO_MANIFEST_DIR"), "/tests/water_reference.csv")).unwrap();
    let mut rows = 0;
    let mut largest = vec![vec![(0.0_f64, String::new()); PROPERTIES.len()]; 2];
    for line in table.lines().filter(|line| !line.starts_with('#')).skip(1) {
        let fields: Vec<&str> = line.split(',').collect();
        let number = |index: usize| fields[index].parse::<f64>().unwrap();
        let (temperature, pressure) = (number(1), number(2));
        let (phase, state) = match fields[0] {
            "water" => (0, liquid(temperature, pressure)),
            _ => (1, steam(temperature, pressure)),
        };
        let state = state.unwrap_or_else(|| panic!("no state for {line}"));
        let values = [
            state.density,
            state.heat_capacity,
            viscosity(temperature, state.density).unwrap(),
            conductivity(temperature, &state).unwrap(),
            state.thermal_expansion,
            state.compressibility,
        ];
        for (property, value) in values.into_iter().enumerate() {
            let reference = number(3 + property);
            let scale =
                if PROPERTIES[property] == "alpha" { reference.abs().max(EXPANSION_FLOOR) } else { reference.abs() };
            let deviation = (value - reference).abs() / scale;
            if deviation > largest[phase][property].0 {
                largest[phase][property] = (deviation, line.to_owned());
            }
        }
        rows += 1;
    }
    assert!(rows > 200, "only {rows} rows");
    for (phase, tolerances) in [LIQUID_TOLERANCE, STEAM_TOLERANCE].into_iter().enumerate() {
        for (property, tolerance) in tolerances.into_iter().enumerate() {
            let (deviation, line) = &largest[phase][property];
            println!("{} {} {deviation:.2e} at {line}", ["water", "steam"][phase], PROPERTIES[property]);
            assert!(*deviation <= tolerance, "{} off by {deviation:.2e} at {line}", PROPERTIES[property]);
        }
    }
}
