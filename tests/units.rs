//! The unit table against outside sources: pint (units_reference.csv, made by units_reference.py) and the printed factors of
//! NIST SP 811, appendix B (units_sp811.csv).

#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)] // a test fails loudly

use deckline::quantity::unit::{Unit, parse_unit};

/// The relative difference allowed where both sides hold the same definition: rounding only.
const ROUNDING: f64 = 1e-12;

fn rows(text: &'static str) -> impl Iterator<Item = Vec<&'static str>> {
    text.lines().filter(|line| !line.starts_with('#')).skip(1).map(|line| line.split(';').collect())
}

fn unit(text: &str) -> Unit {
    parse_unit(text).unwrap_or_else(|problem| panic!("{text}: {problem:?}"))
}

fn relative(mine: f64, theirs: f64) -> f64 {
    if mine == theirs { 0.0 } else { (mine - theirs).abs() / theirs.abs().max(f64::MIN_POSITIVE) }
}

#[test]
fn as_pint_converts() {
    let (mut count, mut differing, mut largest, mut at) = (0, 0, 0.0, "");
    for row in rows(include_str!("units_reference.csv")) {
        let [text, _, factor, offset, one, some, known_difference] = row[..] else { panic!("{row:?}") };
        let unit = unit(text);
        let number = |text: &str| -> f64 { text.parse().unwrap() };
        let difference = [
            relative(unit.factor, number(factor)),
            relative(unit.offset, number(offset)),
            relative(unit.to_si(1.0), number(one)),
            relative(unit.to_si(7.3), number(some)),
        ]
        .into_iter()
        .fold(0.0, f64::max);
        count += 1;
        if known_difference.is_empty() {
            assert!(difference <= ROUNDING, "{text}: {difference:e}");
            if difference > largest {
                (largest, at) = (difference, text);
            }
        } else {
            // Another definition of the same unit: near, but not the same, or the reason given is stale.
            differing += 1;
            assert!(difference > ROUNDING && difference < 1e-5, "{text}: {difference:e}");
            println!("{text} differs by {difference:.2e}: {known_difference}");
        }
    }
    println!("{count} conversions, {differing} by another definition; largest difference {largest:.2e} at {at}");
    assert!(count >= 60 && differing <= 2);
}

#[test]
fn as_printed_in_sp811() {
    let (mut count, mut largest, mut at) = (0, 0.0, "");
    for row in rows(include_str!("units_sp811.csv")) {
        let [_, text, printed, exact, origin] = row[..] else { panic!("{row:?}") };
        assert!(matches!(origin, "transcribed" | "recalled"), "{text}");
        let factor = unit(text).factor;
        let value: f64 = printed.parse().unwrap();
        let difference = relative(factor, value);
        if exact == "yes" {
            assert!(difference <= ROUNDING, "{text}: {factor} against {printed}");
        } else {
            // Rounded there: rounding mine to as many digits must give what is printed.
            let digits = printed.split_once('E').unwrap().0.split_once('.').unwrap().1.len();
            let rounded: f64 = format!("{factor:.digits$e}").parse().unwrap();
            assert_eq!(rounded, value, "{text}: {factor} against {printed}");
        }
        count += 1;
        if difference > largest {
            (largest, at) = (difference, text);
        }
    }
    println!("{count} printed factors; largest difference {largest:.2e} at {at}");
    assert!(count >= 40);
}
