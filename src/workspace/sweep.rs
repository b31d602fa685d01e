//! Runs the physics and the checks at every point of a sweep and sums the findings up.

use super::deck::Deck;
use crate::case::Point;
use crate::case::model::Case;
use crate::checks;
use crate::physics::{self, model::Physics};
use crate::quantity::display;
use crate::syntax::{Finding, Place, SweepPoints};
use crate::vocabulary::statements::TEMPERATURE;
use std::collections::BTreeMap;

/// A finding and the points that have it.
struct Summed {
    finding: Finding,
    count: usize,
    first: usize,
}

/// Fills the deck's case and physics with those of the first point, and gives the findings of all points.
pub fn over_all_points(deck: &mut Deck, today: &str) -> Vec<Finding> {
    let nominal = deck.resolution.nominal.clone();
    (deck.case, deck.physics) = at(deck, &nominal);
    let first = checks::run(&deck.case, &deck.physics, today);
    let total = deck.resolution.sweep.points();
    if total <= 1 {
        return first;
    }
    let mut summed: BTreeMap<(Place, &'static str, String), Summed> = BTreeMap::new();
    add(&mut summed, first, 0);
    for index in 1..total {
        let (case, physics) = at(deck, &deck.resolution.point(index));
        add(&mut summed, checks::run(&case, &physics, today), index);
    }
    summed
        .into_values()
        .map(|one| {
            let mut finding = one.finding;
            finding.points = Some(SweepPoints { count: one.count, total, first: in_words(deck, one.first) });
            finding
        })
        .collect()
}

fn at(deck: &Deck, point: &Point) -> (Case, Physics) {
    let case = deck.resolution.case(point);
    let physics = physics::work_out(&case);
    (case, physics)
}

/// The worst finding stands for all of its check at its place; the first of equals.
fn add(summed: &mut BTreeMap<(Place, &'static str, String), Summed>, findings: Vec<Finding>, index: usize) {
    for finding in findings {
        let key = (finding.place, finding.check, finding.subject.clone());
        match summed.get_mut(&key) {
            None => {
                summed.insert(key, Summed { finding, count: 1, first: index });
            }
            Some(known) => {
                known.count += 1;
                if finding.level > known.finding.level {
                    known.finding = finding;
                }
            }
        }
    }
}

/// A point in words: "T_hot = 60 degC, height = 1.2 m".
pub fn in_words(deck: &Deck, index: usize) -> String {
    let values = deck.resolution.sweep.at(index);
    let parts = values.iter().filter_map(|(number, si)| {
        let varied = deck.resolution.varied.iter().find(|varied| varied.number == *number)?;
        let is_difference =
            varied.dimension == TEMPERATURE && varied.kind == Some(crate::case::kinds::Kind::Difference);
        let value = if is_difference {
            display::format_difference(*si)
        } else {
            display::format_in(*si, &varied.origin.unit).unwrap_or_else(|| display::format_si(*si, varied.dimension))
        };
        Some(format!("{} = {value}", varied.name.text))
    });
    parts.collect::<Vec<_>>().join(", ")
}
