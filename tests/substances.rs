//! Every built-in substance against the reference table that `substance_reference.py` made from public libraries.
//! `cargo test --test substances -- --nocapture` prints the largest deviations.

#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)] // a test fails loudly

use deckline::substances::Medium;
use deckline::substances::library::find;
use std::collections::BTreeMap;

/// Largest deviations allowed, as shares: density, heat capacity, viscosity, conductivity, expansion.
const TARGET: [f64; 5] = [0.01, 0.01, 0.01, 0.01, 0.02];

/// Where a substance misses the target, and why; its file says the same.
fn allowed(substance: &str) -> [f64; 5] {
    let [density, heat_capacity, _, conductivity, expansion] = TARGET;
    match substance {
        // The viscosity follows Cheng 2008, whose own scatter is 5 %.
        "glycerol" => [density, heat_capacity, 0.05, conductivity, expansion],
        _ => TARGET,
    }
}

#[test]
fn substances_agree_with_the_reference_libraries() {
    let table = include_str!("substance_reference.csv");
    let mut lines = table.lines().filter(|line| !line.starts_with('#'));
    let header: Vec<&str> = lines.next().unwrap().split(',').collect();
    let column = |name: &str| header.iter().position(|column| *column == name).unwrap();
    let columns = ["rho", "cp", "mu", "k", "alpha"].map(column);
    let mut largest: BTreeMap<String, [f64; 5]> = BTreeMap::new();
    let mut rows = 0;
    for line in lines {
        let cells: Vec<&str> = line.split(',').collect();
        let number = |index: usize| cells[index].parse::<f64>();
        let name = cells[column("substance")];
        let (temperature, pressure) = (number(column("T_K")).unwrap(), number(column("p_Pa")).unwrap());
        let substance = find(name).unwrap_or_else(|| panic!("no substance {name}"));
        let medium = Medium { substance, fraction: number(column("x")).unwrap_or(0.0) };
        // The deviations that a gas states are those at 1 bar; the rows at 5 bar show where the ideal-gas law ends.
        if medium.is_gas() && pressure > 2e5 {
            continue;
        }
        let Some(ours) = medium.properties(temperature, pressure) else { continue };
        let ours = [ours.density, ours.heat_capacity, ours.viscosity, ours.conductivity, ours.expansion];
        for (index, (ours, cell)) in ours.into_iter().zip(columns).enumerate() {
            let Ok(theirs) = number(cell) else { continue };
            let deviation = (ours / theirs - 1.0).abs();
            let most = &mut largest.entry(name.to_string()).or_default()[index];
            *most = most.max(deviation);
            // Near 4 degC the expansion of water passes through zero, where a share means nothing.
            let is_zero = index == 4 && theirs.abs() < 6e-5;
            assert!(
                is_zero || deviation <= allowed(name)[index],
                "{name} at {temperature} K, {pressure} Pa: {} is {ours}, {theirs} by the reference",
                ["density", "heat capacity", "viscosity", "conductivity", "expansion"][index]
            );
        }
        rows += 1;
    }
    assert!(rows > 250, "only {rows} rows were compared");
    for (name, deviations) in largest {
        println!("{name}: {}", deviations.map(|share| format!("{:.3} %", 100.0 * share)).join(", "));
    }
}
