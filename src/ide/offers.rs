//! The answers of completion, kind by kind: units, choices, names, values, members. `completion` says which of them fit.

use super::half_line::Piece;
use super::names_here;
use super::snippet::{names_of, plain};
use super::spot::Spot;
use super::wanted::Wanted;
use crate::case::Resolution;
use crate::quantity::dimension_names::KINDS;
use crate::quantity::{Dimension, parse_unit};
use crate::substances::library::FILES;
use crate::syntax::Span;
use crate::vocabulary::functions::{CONSTANTS, FUNCTIONS, REGION_NUMBERS};
use crate::vocabulary::rows::Choice;
use crate::vocabulary::{EntryKind, NameOf, Slot, Takes};
use crate::workspace::Deck;

/// One answer.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Completion {
    /// What the list shows.
    pub label: String,
    /// A few words beside it.
    pub detail: String,
    /// More, in Markdown; may be empty.
    pub documentation: String,
    /// What is inserted: a snippet, with places to fill in as `${1:..}`.
    pub insert: String,
    /// What it replaces, in bytes of the file.
    pub replace: Span,
    /// What it is.
    pub kind: CompletionKind,
    /// Answers stand in the order of this text.
    pub sort: String,
}

/// What an answer is.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum CompletionKind {
    /// A word that opens an entry.
    Entry,
    /// A word that opens a statement.
    Statement,
    /// A link.
    Link,
    /// A unit.
    Unit,
    /// A value with a name.
    Value,
    /// A member of an entry.
    Member,
    /// A fluid, solid, region or boundary.
    Entity,
    /// A substance.
    Substance,
    /// A word that a slot offers.
    Choice,
    /// A function, or a number of a region.
    Function,
    /// A constant.
    Constant,
    /// A check.
    Check,
}

/// The answers so far.
pub struct List<'d> {
    /// The deck.
    pub deck: &'d Deck,
    /// Its resolution.
    pub resolution: &'d Resolution,
    /// What an answer replaces.
    pub replace: Span,
    /// The answers.
    pub found: Vec<Completion>,
}

impl List<'_> {
    /// Adds an answer.
    pub fn add(&mut self, kind: CompletionKind, label: &str, detail: &str, documentation: String, insert: String) {
        let sort = format!("{:05}", self.found.len());
        self.found.push(Completion {
            label: label.to_string(),
            detail: detail.to_string(),
            documentation,
            insert,
            replace: self.replace,
            kind,
            sort,
        });
    }

    /// Adds an answer that is inserted as it is listed.
    pub fn plain(&mut self, kind: CompletionKind, label: &str, detail: &str) {
        self.add(kind, label, detail, String::new(), plain(label));
    }

    /// Adds the units of the dimensions that are wanted; where nothing tells, the usual unit of each.
    pub fn units(&mut self, wanted: &Wanted, glued: bool) {
        let mut units = wanted.units();
        if wanted.dimensions.is_empty() {
            units = KINDS.iter().filter_map(|kind| kind.units.first().copied()).filter(|unit| *unit != "1").collect();
        }
        for unit in units {
            let words = parse_unit(unit).map_or_else(|_| String::new(), |unit| unit.dimension.words());
            let space = if glued && !unit.starts_with(['%', '°']) { " " } else { "" };
            self.add(CompletionKind::Unit, unit, &words, String::new(), format!("{space}{}", plain(unit)));
        }
    }

    /// Adds the words that a slot offers, but those that stand already.
    pub fn choices(&mut self, choices: &[Choice], taken: &[Piece<'_>]) {
        for choice in choices.iter().filter(|choice| !taken.contains(&Piece::Word(choice.word))) {
            self.plain(CompletionKind::Choice, choice.word, choice.description);
        }
    }

    /// Adds the names of a kind, but those that stand already.
    pub fn names(&mut self, of: NameOf, taken: &[Piece<'_>]) {
        let kind = if of == NameOf::Substance { CompletionKind::Substance } else { CompletionKind::Entity };
        for name in names_of(self.resolution, of) {
            if !taken.contains(&Piece::Word(name)) {
                self.plain(kind, name, of.word());
            }
        }
        match of {
            NameOf::Substance => {
                for (name, text) in FILES {
                    // The comment at the head of the data says what it is.
                    let about = text.lines().next().unwrap_or("").trim_start_matches('#').trim();
                    self.plain(CompletionKind::Substance, name, about);
                }
            }
            NameOf::Anything => self.plain(CompletionKind::Entity, "case", "the whole deck"),
            _ => {}
        }
    }

    /// What an expression may name: values, those of a wanted dimension first, then constants and functions.
    pub fn values(&mut self, spot: &Spot<'_>, wanted: &Wanted) {
        let fits = |dimension: Dimension| wanted.dimensions.is_empty() || wanted.dimensions.contains(&dimension);
        let scope = names_here::scope(spot, self.deck);
        for is_fitting in [true, false] {
            for value in scope.iter().filter(|value| fits(value.dimension) == is_fitting) {
                self.add(
                    CompletionKind::Value,
                    &value.name,
                    &value.detail,
                    value.description.clone(),
                    plain(&value.name),
                );
            }
            for constant in CONSTANTS.iter().filter(|constant| fits(constant.dimension) == is_fitting) {
                self.plain(CompletionKind::Constant, constant.name, constant.description);
            }
        }
        for function in FUNCTIONS {
            let insert = format!("{}(${{1:x}})", function.name);
            self.add(CompletionKind::Function, function.name, function.description, String::new(), insert);
        }
    }

    /// What a requirement compares.
    pub fn comparands(&mut self, spot: &Spot<'_>) {
        let regions = names_of(self.resolution, NameOf::Region);
        let place = match regions.as_slice() {
            [] => "${1:region}".to_string(),
            [only] => plain(only),
            several => format!("${{1|{}|}}", several.join(",")),
        };
        for number in REGION_NUMBERS {
            let insert = format!("{}({place})", number.name);
            self.add(CompletionKind::Function, number.name, number.description, String::new(), insert);
        }
        self.values(spot, &Wanted::anything());
    }

    /// The members of an entry: what it states that has a value.
    pub fn members(&mut self, owner: &str) {
        for entry in &self.resolution.entries {
            let is_owner = entry.name.as_ref().is_some_and(|name| &*name.text == owner)
                && matches!(entry.row.kind, EntryKind::Fluid | EntryKind::Solid | EntryKind::Region);
            if !is_owner {
                continue;
            }
            for statement in &entry.statements {
                for (index, slot) in statement.row.slots.iter().enumerate() {
                    let is_value = matches!(slot.takes, Takes::Quantity(..)) && !self.is_empty_slot(statement, index);
                    let name =
                        if index == 0 && !is_shape(statement.row.slots) { statement.row.word } else { slot.name };
                    if is_value {
                        self.plain(CompletionKind::Member, name, statement.row.description);
                    }
                }
            }
        }
    }

    /// Whether nothing fills a slot of a statement.
    pub fn is_empty_slot(&self, statement: &crate::case::bind::BoundStatement, index: usize) -> bool {
        statement.slots.get(index).is_none_or(Vec::is_empty)
    }
}

/// Whether a statement has several values of its own names, as shapes do.
fn is_shape(slots: &[Slot]) -> bool {
    slots.len() > 1
}
