//! Hints between the lines: what a deck comes to.
//!
//! ```text
//! given
//!     width = 2 * height              = 2.2 m
//!     dT    = T_hot - T_room          = 22 K
//! region cabinet                      Ra 4.1e9, Pr 0.71, αΔT 0.09, ΔT 22 K
//! ```

use super::amount::literal;
use super::names_here::value_of;
use crate::case::resolution::ResolvedGiven;
use crate::physics::model::RegionPhysics;
use crate::quantity::display::{format_difference, format_number};
use crate::syntax::tree::{Content, Definition, PlacedEntry};
use crate::syntax::{FileId, Place, Span};
use crate::vocabulary::EntryKind;
use crate::workspace::Deck;
use std::collections::{HashMap, HashSet};

/// A hint.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Hint {
    /// Behind which byte of the file.
    pub offset: usize,
    /// What it says.
    pub label: String,
    /// More, in Markdown.
    pub tooltip: String,
}

/// What a deck's names are, by where they are defined: looked up once, for a whole file asks for thousands.
struct Known<'d> {
    given: HashMap<Place, &'d ResolvedGiven>,
    varying: HashSet<usize>,
    regions: HashMap<Place, usize>,
}

/// The hints of the lines in `span`.
pub fn hints(deck: &Deck, file: FileId, span: Span) -> Vec<Hint> {
    let Some(source) = deck.file(file) else { return Vec::new() };
    let entries = &source.tree.entries;
    let from = source.tree.entry_at(span.start).unwrap_or(0);
    let mut hints = Vec::new();
    let known = Known {
        given: deck.resolution.given.iter().map(|given| (given.name.place, given)).collect(),
        varying: deck.resolution.varying.iter().copied().collect(),
        regions: deck.case.regions.iter().enumerate().map(|(index, region)| (region.name.place, index)).collect(),
    };
    for placed in entries.iter().skip(from).take_while(|placed| placed.start <= span.end) {
        let kind = placed.entry.head_phrase().and_then(|head| crate::vocabulary::entry_row(&head.word.text));
        match kind.map(|row| row.kind) {
            Some(EntryKind::Given) => {
                for line in placed.entry.statements() {
                    if let Content::Definition(definition) = &line.content {
                        hints.extend(of_definition(deck, &known, file, placed, definition));
                    }
                }
            }
            Some(EntryKind::Region) => hints.extend(of_region(deck, &known, file, placed)),
            _ => {}
        }
    }
    hints.retain(|hint| span.touches(hint.offset));
    hints
}

/// The value of a definition that is no plain literal.
fn of_definition(
    deck: &Deck,
    known: &Known<'_>,
    file: FileId,
    placed: &PlacedEntry,
    definition: &Definition,
) -> Option<Hint> {
    let value = definition.value.as_ref().filter(|value| literal(value).is_none())?;
    let place = Place::new(file, definition.name.span.shifted(placed.start));
    let given = *known.given.get(&place)?;
    let is_known = deck.resolution.nominal.values.get(given.number).is_some_and(|si| si.is_finite());
    let varies = known.varying.contains(&given.number);
    is_known.then(|| Hint {
        offset: value.span.shifted(placed.start).end,
        label: format!("= {}{}", value_of(deck, given), if varies { ", .." } else { "" }),
        tooltip: if varies { "At the first point of `vary`.".to_string() } else { given.dimension.words() },
    })
}

/// The characteristic numbers of a region, behind its head.
fn of_region(deck: &Deck, known: &Known<'_>, file: FileId, placed: &PlacedEntry) -> Option<Hint> {
    let head = placed.entry.head_phrase()?;
    let span = head.arguments.first()?.span.shifted(placed.start);
    let physics = deck.physics.regions.get(*known.regions.get(&Place::new(file, span))?)?;
    let label = numbers(physics);
    (!label.is_empty()).then(|| Hint {
        offset: head.span.shifted(placed.start).end,
        label,
        tooltip: physics.arrangement.why.clone(),
    })
}

fn numbers(physics: &RegionPhysics) -> String {
    let numbers = &physics.numbers;
    let known = |symbol: &str, value: f64| value.is_finite().then(|| format!("{symbol} {}", format_number(value)));
    let mut parts: Vec<String> =
        [known("Ra", numbers.rayleigh), known("Pr", numbers.prandtl), known("αΔT", numbers.expansion_span)]
            .into_iter()
            .flatten()
            .collect();
    if let Some(bracket) = physics.bracket.as_ref().filter(|bracket| bracket.span().is_finite()) {
        parts.push(format!("ΔT {}", format_difference(bracket.span())));
    }
    parts.join(", ")
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ide::testing::{DECK, at, text};

    fn shown(marked: &str) -> Vec<String> {
        let (deck, _) = at(marked);
        let all = Span::new(0, text(&deck).len());
        hints(&deck, DECK, all)
            .into_iter()
            .map(|hint| {
                let line = text(&deck)[..hint.offset].rsplit('\n').next().unwrap().trim().to_string();
                format!("{line} {}", hint.label)
            })
            .collect()
    }

    #[test]
    fn values_of_definitions_that_are_no_literals() {
        assert_eq!(
            shown(
                "$0given\n    h  = 1.1 m\n    w  = 2 * h \"wide\"\n    T  = 30 degC\n    dT = T - 8 degC\n    q  = h / no\n    T2 = T + 5 K\n"
            ),
            ["w  = 2 * h = 2.2 m", "dT = T - 8 degC = 22 K", "T2 = T + 5 K = 35 degC"]
        );
    }

    #[test]
    fn at_a_region_its_numbers() {
        let (mut deck, _) = at("$0region r\n    box 1 m by 1 m\n");
        let physics = &mut deck.physics.regions[0];
        physics.numbers.rayleigh = 4.1e9;
        physics.numbers.prandtl = 0.71;
        physics.numbers.expansion_span = f64::NAN;
        physics.bracket = None;
        let found = hints(&deck, DECK, Span::new(0, 5));
        assert!(found.is_empty(), "behind the head, so not within the first bytes");
        let found = hints(&deck, DECK, Span::new(0, 12));
        assert_eq!((found[0].label.as_str(), found[0].offset), ("Ra 4.1e9, Pr 0.71", 8));
    }

    #[test]
    fn what_varies_says_so() {
        assert_eq!(
            shown("$0vary\n    T over [30 degC, 40 degC]\ngiven\n    dT = T - 8 degC\n"),
            ["dT = T - 8 degC = 22 K, .."]
        );
    }
}
