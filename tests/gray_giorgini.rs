//! The criteria of Gray and Giorgini against the ranges that their paper gives for air and water.
//!
//! D. D. Gray and A. Giorgini, "The validity of the Boussinesq approximation for liquids and gases", Int. J. Heat Mass
//! Transfer 19 (1976) 545-551: every criterion at most 10 %, at 15 degC and 1 atm. Recalled from the paper: air
//! ΔT ≤ 28.6 K and H ≤ 830 m, water ΔT ≤ 1.25 K. By CoolProp 8.0.0 (gray_giorgini_reference.py): air 28.73 K for αΔT and
//! 28.48 K for the change of α, 842.7 m; water 1.275 K.

#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)] // a test fails loudly

use deckline::checks::density_law::criterion::{CriterionValues, evaluate};
use deckline::substances::{Medium, library};

const REFERENCE: f64 = 288.15;
const PRESSURE: f64 = 101_325.0;
const GRAVITY: f64 = 9.806_65;
const LIMIT: f64 = 0.1;

type Pick = fn(&CriterionValues) -> f64;

/// The criteria that bound ΔT whatever the height.
const OF_SPAN: [(&str, Pick); 6] = [
    ("density span", |values| values.density_span),
    ("buoyancy error", |values| values.buoyancy_error),
    ("expansion drift", |values| values.expansion_drift),
    ("viscosity drift", |values| values.viscosity_drift),
    ("conductivity drift", |values| values.conductivity_drift),
    ("heat-capacity drift", |values| values.heat_capacity_drift),
];

fn medium(name: &str) -> Medium<'static> {
    Medium { substance: library::find(name).unwrap(), fraction: 0.0 }
}

/// The greatest `x` below `most` with `value(x)` at most the limit; `value` rises.
fn greatest(most: f64, value: impl Fn(f64) -> f64) -> f64 {
    let (mut within, mut over) = (0.0, most);
    for _ in 0..60 {
        let middle = 0.5 * (within + over);
        if value(middle) <= LIMIT {
            within = middle;
        } else {
            over = middle;
        }
    }
    within
}

/// The ΔT about the reference at which each criterion comes to 10 %, the least first.
fn spans(name: &str) -> Vec<(&'static str, f64)> {
    let medium = medium(name);
    let mut spans: Vec<(&str, f64)> = OF_SPAN
        .iter()
        .map(|(criterion, pick)| {
            let at = |span: f64| {
                let (lowest, highest) = (REFERENCE - 0.5 * span, REFERENCE + 0.5 * span);
                pick(&evaluate(&medium, REFERENCE, lowest, highest, PRESSURE, 1.0, GRAVITY))
            };
            // Liquid water has no data below 0 degC.
            (*criterion, greatest(if name == "water" { 29.0 } else { 150.0 }, at))
        })
        .collect();
    spans.sort_by(|a, b| a.1.total_cmp(&b.1));
    spans
}

/// The height at which the weight of the fluid changes its density by 10 %.
fn height(name: &str) -> f64 {
    let medium = medium(name);
    greatest(1e6, |height| {
        evaluate(&medium, REFERENCE, REFERENCE - 0.5, REFERENCE + 0.5, PRESSURE, height, GRAVITY).hydrostatic_span
    })
}

#[track_caller]
fn within(value: f64, expected: f64, share: f64) {
    assert!((value / expected - 1.0).abs() <= share, "{value} is not within {share} of {expected}");
}

#[test]
fn air_is_bounded_by_its_expansion() {
    let spans = spans("air");
    println!("air: {spans:?}");
    let (criterion, span) = spans[0];
    assert!(["density span", "expansion drift"].contains(&criterion), "{criterion}");
    within(span, 28.6, 0.01);
    let of = |name: &str| spans.iter().find(|(criterion, _)| *criterion == name).unwrap().1;
    within(of("density span"), 28.73, 0.005);
    within(of("expansion drift"), 28.48, 0.01);
}

#[test]
fn air_is_bounded_in_height_by_its_weight() {
    let height = height("air");
    println!("air: {height} m");
    within(height, 830.0, 0.02);
    within(height, 842.7, 0.002);
}

#[test]
fn water_is_bounded_by_the_change_of_its_expansion() {
    let spans = spans("water");
    println!("water: {spans:?}");
    let (criterion, span) = spans[0];
    assert_eq!(criterion, "expansion drift");
    within(span, 1.25, 0.03);
    within(span, 1.275, 0.005);
}

#[test]
fn the_work_of_pressure_bounds_the_height_for_a_small_span() {
    // α g H T0 / (cp ΔT) ≤ 0.1: for an ideal gas H/ΔT ≤ 0.1 cp/g, 10.2 m/K for air with cp = 1004 to 1006 J/(kg K).
    let air = medium("air");
    let per_kelvin = greatest(1000.0, |height| {
        evaluate(&air, REFERENCE, REFERENCE - 0.5, REFERENCE + 0.5, PRESSURE, height, GRAVITY).adiabatic_lapse
    });
    within(per_kelvin, 0.1 * 1005.0 / GRAVITY, 0.01);
}
