//! What the place at the cursor wants: the slot of the statement, and the dimension of a number there.
//!
//! ```text
//! exchanges 6 W/m^2/K with $0      the slot "temperature": a point on the temperature scale
//! peak_temperature(cabinet) < 6$0  a temperature, because that is what stands on the left
//! ```

use super::half_line::Piece;
use crate::case::Resolution;
use crate::case::bind::Bound;
use crate::quantity::Dimension;
use crate::syntax::Place;
use crate::syntax::links::is_link;
use crate::vocabulary::functions::REGION_NUMBERS;
use crate::vocabulary::statements::{CONDUCTIVITY, DENSITY, HEAT_CAPACITY, NUMBER, PRESSURE, TEMPERATURE, VISCOSITY};
use crate::vocabulary::{Slot, Takes, Temperature};

/// The dimensions that a number may have at the cursor, the usual one first, and of what kind.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Wanted {
    /// The dimensions; empty where nothing tells.
    pub dimensions: Vec<Dimension>,
    /// Point or difference.
    pub kind: Temperature,
}

impl Wanted {
    /// Nothing is known.
    pub const fn anything() -> Wanted {
        Wanted { dimensions: Vec::new(), kind: Temperature::Point }
    }

    /// One dimension.
    pub fn of(dimension: Dimension, kind: Temperature) -> Wanted {
        Wanted { dimensions: vec![dimension], kind }
    }

    /// The usual units, the usual one first: of each dimension in turn. A difference of temperatures has no degC.
    pub fn units(&self) -> Vec<&'static str> {
        let mut units = Vec::new();
        for (rank, dimension) in self.dimensions.iter().enumerate() {
            let usual = crate::quantity::usual_units(*dimension);
            let is_difference = self.kind == Temperature::Difference;
            let fitting = usual.iter().copied().filter(|unit| {
                let is_point = *dimension == TEMPERATURE && matches!(*unit, "degC" | "degF");
                let is_gauge = *dimension == PRESSURE && unit.ends_with('g') && *unit != "mmHg";
                *unit != "1" && !(is_difference && (is_point || is_gauge))
            });
            // Pascals are usual for pressures above ambient, bar for absolute ones.
            let mut fitting: Vec<&str> = fitting.collect();
            if *dimension == PRESSURE && !is_difference {
                fitting.sort_by_key(|unit| usize::from(*unit != "bar"));
            }
            if rank == 0 {
                units.append(&mut fitting);
            } else {
                // The first unit of each further dimension comes right behind the first of the first.
                let at = rank.min(units.len());
                let mut fitting = fitting.into_iter();
                if let Some(first) = fitting.next() {
                    units.insert(at, first);
                }
                units.extend(fitting);
            }
        }
        units
    }
}

/// The slot that stands open at the end of `pieces`, which follow the word that takes `slots`, and the pieces of it that
/// stand already.
pub fn open_slot<'p, 't>(slots: &'static [Slot], pieces: &'p [Piece<'t>]) -> (Option<&'static Slot>, &'p [Piece<'t>]) {
    let mut depth = 0_usize;
    let mut link = "";
    let mut from = 0;
    let mut passed: Vec<&str> = Vec::new();
    for (index, piece) in pieces.iter().enumerate() {
        match piece {
            Piece::Mark('(' | '[') => depth += 1,
            Piece::Mark(')' | ']') => depth = depth.saturating_sub(1),
            // The `step` of a range belongs to the range, where no slot has the link.
            Piece::Word(word) if depth == 0 && is_link(word) && slots.iter().any(|slot| slot.link == *word) => {
                passed.push(link);
                link = word;
                from = index + 1;
            }
            _ => {}
        }
    }
    let turn = passed.iter().filter(|earlier| **earlier == link).count();
    let slot = slots.iter().filter(|slot| slot.link == link).nth(turn);
    (slot, pieces.get(from..).unwrap_or(&[]))
}

/// The dimensions of a number at the end of `pieces`, which stand in a slot.
pub fn in_slot(slot: &Slot, pieces: &[Piece<'_>]) -> Wanted {
    let whole = match slot.takes {
        Takes::Quantity(dimensions, kind) => Wanted { dimensions: dimensions.to_vec(), kind },
        Takes::ChoiceOrQuantity(_, dimension) | Takes::Vector(dimension) | Takes::PropertyForm(dimension) => {
            Wanted::of(dimension, Temperature::Point)
        }
        _ => Wanted::anything(),
    };
    in_expression(whole, pieces)
}

/// The dimensions of a number at the end of an expression that is to have these dimensions.
pub fn in_expression(whole: Wanted, pieces: &[Piece<'_>]) -> Wanted {
    let earlier = match pieces.split_last() {
        Some((Piece::Number(_), earlier)) => earlier,
        _ => pieces,
    };
    if earlier.iter().any(|piece| matches!(piece, Piece::Mark('*' | '/' | '^'))) {
        return Wanted::anything();
    }
    match earlier.last() {
        // What is added to or taken from a point is most often a difference.
        Some(Piece::Mark('+' | '-' | '±')) if earlier.len() > 1 => Wanted { kind: Temperature::Difference, ..whole },
        Some(Piece::Word("step")) => Wanted { kind: Temperature::Difference, ..whole },
        _ => whole,
    }
}

/// What a comparison wants on its right: the dimension of its left.
pub fn of_comparison(resolution: &Resolution, pieces: &[Piece<'_>]) -> Wanted {
    let compares = |piece: &Piece<'_>| matches!(piece, Piece::Mark('<' | '>') | Piece::Word("within"));
    let Some(at) = pieces.iter().position(compares) else { return Wanted::anything() };
    let whole = match pieces.first() {
        Some(Piece::Word(word)) => match REGION_NUMBERS.iter().find(|number| number.name == *word) {
            Some(number) => {
                let kind = if number.is_temperature_point { Temperature::Point } else { Temperature::Difference };
                Wanted::of(number.dimension, kind)
            }
            None => of_name(resolution, word),
        },
        _ => Wanted::anything(),
    };
    in_expression(whole, pieces.get(at + 1..).unwrap_or(&[]))
}

/// What a name's value should be, by the slots that the name alone fills; else what it is.
pub fn of_name(resolution: &Resolution, name: &str) -> Wanted {
    let all = || resolution.given.iter().chain(&resolution.varied);
    let Some(given) = all().find(|given| &*given.name.text == name) else { return Wanted::anything() };
    // One use is enough to look through the entries for.
    if let Some(use_of) = resolution.references.iter().find(|reference| reference.target == given.name.place)
        && let Some(slot) = filled_by(resolution, use_of.place)
    {
        return in_slot(slot, &[]);
    }
    if given.origin.unit.is_empty() && given.dimension == NUMBER {
        return Wanted::anything();
    }
    let kind = match given.kind {
        Some(crate::case::kinds::Kind::Difference) => Temperature::Difference,
        _ => Temperature::Point,
    };
    Wanted::of(given.dimension, kind)
}

/// The slot that the expression at a place fills alone.
fn filled_by(resolution: &Resolution, place: Place) -> Option<&'static Slot> {
    let entries = resolution.entries.iter().filter(|entry| entry.head.file == place.file);
    entries.flat_map(|entry| &entry.statements).find_map(|statement| {
        let mut slots = statement.row.slots.iter().zip(&statement.slots);
        slots
            .find(|(_, bound)| {
                bound.iter().any(|bound| matches!(bound, Bound::Value(value) if value.origin.place == place))
            })
            .map(|(slot, _)| slot)
    })
}

/// The dimension of a column of a property table.
pub fn of_column(column: &str) -> Wanted {
    let dimension = match column {
        "temperature" => TEMPERATURE,
        "density" => DENSITY,
        "heat-capacity" => HEAT_CAPACITY,
        "viscosity" => VISCOSITY,
        "conductivity" => CONDUCTIVITY,
        _ => return Wanted::anything(),
    };
    Wanted::of(dimension, Temperature::Point)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ide::half_line::read;
    use crate::vocabulary::statements::{HEAT_FLUX, POWER};
    use crate::vocabulary::{EntryKind, statement_row};

    #[test]
    fn slots_of_one_link_in_turn() {
        let slots = statement_row(EntryKind::Region, "box").unwrap().slots;
        let half = read(" box 1 m by 2 m by ");
        assert_eq!(open_slot(slots, &half.pieces[1..]).0.unwrap().name, "height");
        let half = read(" box 1 m by ");
        assert_eq!(open_slot(slots, &half.pieces[1..]).0.unwrap().name, "depth");
    }

    #[test]
    fn units_of_two_dimensions_alternate() {
        let wanted = Wanted { dimensions: vec![HEAT_FLUX, POWER], kind: Temperature::Point };
        assert_eq!(wanted.units()[..3], ["W/m^2", "W", "kW/m^2"]);
        assert_eq!(Wanted::of(TEMPERATURE, Temperature::Difference).units(), ["K", "degR"]);
        assert_eq!(Wanted::of(PRESSURE, Temperature::Point).units()[..2], ["bar", "Pa"]);
    }
}
