//! The values that an expression may name at a place: those of `given` and `vary`, and in a substance its own.

use super::spot::Spot;
use crate::case::kinds::Kind;
use crate::case::resolution::ResolvedGiven;
use crate::quantity::{Dimension, Scale, display, parse_unit};
use crate::syntax::tree::Content;
use crate::vocabulary::EntryKind;
use crate::vocabulary::statements::{NUMBER, PRESSURE, TEMPERATURE};
use crate::workspace::Deck;

/// A value with a name.
#[derive(Clone, Debug, PartialEq)]
pub struct NamedHere {
    /// Its name.
    pub name: String,
    /// Its dimension.
    pub dimension: Dimension,
    /// Its value in words: "8 degC".
    pub detail: String,
    /// What it is for.
    pub description: String,
}

/// Every value that an expression at the spot may name, the nearest first.
pub fn scope(spot: &Spot<'_>, deck: &Deck) -> Vec<NamedHere> {
    let mut found = Vec::new();
    if spot.row.is_some_and(|row| row.kind == EntryKind::Substance) {
        let own = |name: &str, dimension, detail: &str| NamedHere {
            name: name.to_string(),
            dimension,
            detail: detail.to_string(),
            description: String::new(),
        };
        found.push(own("T", TEMPERATURE, "absolute temperature"));
        found.push(own("p", PRESSURE, "absolute pressure"));
        found.push(own("x", NUMBER, "mass fraction of the dissolved substance"));
        for (index, line) in spot.entry.lines.iter().enumerate() {
            if let Content::Definition(definition) = &line.content
                && spot.line.is_none_or(|at| index < at)
            {
                found.push(own(&definition.name.text, NUMBER, "defined above"));
            }
        }
    }
    let resolution = &deck.resolution;
    for given in resolution.given.iter().chain(&resolution.varied) {
        // A definition does not name itself.
        let is_own = spot.line().is_some_and(|line| {
            given.name.place.file == spot.file && spot.placed(line.span).touches(given.name.place.span.start)
        });
        if !is_own {
            found.push(NamedHere {
                name: given.name.text.to_string(),
                dimension: given.dimension,
                detail: value_of(deck, given),
                description: given.description.to_string(),
            });
        }
    }
    found
}

/// The value of a name, at the first point of a sweep, in the unit that it is written in: "8 degC".
pub fn value_of(deck: &Deck, given: &ResolvedGiven) -> String {
    let si = deck.resolution.nominal.values.get(given.number).copied().unwrap_or(f64::NAN);
    in_words(si, given)
}

/// A value of a name in the unit that the name's definition is written in.
pub fn in_words(si: f64, given: &ResolvedGiven) -> String {
    if !si.is_finite() {
        return given.dimension.words();
    }
    if given.dimension == TEMPERATURE && given.kind == Some(Kind::Difference) {
        return display::format_difference(si);
    }
    // A gauge unit counts from the ambient pressure, which is not known here.
    let is_gauge = parse_unit(&given.origin.unit).is_ok_and(|unit| unit.scale == Scale::Gauge);
    let written = if is_gauge { None } else { display::format_in(si, &given.origin.unit) };
    written.unwrap_or_else(|| display::format_si(si, given.dimension))
}
