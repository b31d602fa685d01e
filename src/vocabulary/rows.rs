//! The shape of the table: what a row says of a word.

use crate::quantity::Dimension;

/// The kinds of entry.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug)]
pub enum EntryKind {
    /// `include "path"`
    Include,
    /// `case "title"`
    Case,
    /// `given`
    Given,
    /// `vary`
    Vary,
    /// `substance NAME`
    Substance,
    /// `fluid NAME`
    Fluid,
    /// `solid NAME`
    Solid,
    /// `region NAME`
    Region,
    /// `boundary NAME of REGION`
    Boundary,
    /// `initial REGION`
    Initial,
    /// `source NAME in REGION`
    Source,
    /// `mesh of REGION`
    Mesh,
    /// `run`
    Run,
    /// `require`
    Require,
    /// `waive CHECK of NAME`
    Waive,
    /// `practice`
    Practice,
}

/// What an entry is, and what its head takes.
#[derive(Debug)]
pub struct EntryRow {
    /// Which entry.
    pub kind: EntryKind,
    /// The word that opens it.
    pub word: &'static str,
    /// What follows the word on the head line.
    pub slots: &'static [Slot],
    /// What it may hold besides the statements of its rows.
    pub holds: Holds,
    /// How often a deck has it.
    pub times: Times,
    /// What it says, as a sentence.
    pub description: &'static str,
    /// A small example, as lines of a deck.
    pub example: &'static str,
}

/// Lines that an entry may hold besides phrases.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Holds {
    /// Only phrases.
    Phrases,
    /// Nothing at all.
    Nothing,
    /// Definitions.
    Definitions,
    /// Sweeps: `NAME over values`.
    Sweeps,
    /// Comparisons.
    Requirements,
    /// Definitions and table rows beside phrases.
    DefinitionsAndRows,
}

/// A statement: the word, where it may stand and what it takes.
#[derive(Debug)]
pub struct StatementRow {
    /// The word that opens it.
    pub word: &'static str,
    /// The entries that may hold it.
    pub entries: &'static [EntryKind],
    /// What it takes.
    pub slots: &'static [Slot],
    /// How often it may stand in one entry.
    pub times: Times,
    /// What it says, as a sentence.
    pub description: &'static str,
    /// An example line.
    pub example: &'static str,
}

/// One argument list of a word.
#[derive(Debug)]
pub struct Slot {
    /// The link before it; empty for what follows the word itself.
    pub link: &'static str,
    /// What it is called: in messages, in signature help, and as a member (`cabinet.height`).
    pub name: &'static str,
    /// What stands there.
    pub takes: Takes,
    /// Whether it may be left out.
    pub need: Need,
}

/// Whether something may be left out.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Need {
    /// Must be there.
    Required,
    /// May be left out.
    Optional,
    /// May be left out, and several may be given, separated by commas.
    Several,
    /// At least one, separated by commas.
    OneOrMore,
}

/// How often something may stand.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Times {
    /// Exactly once.
    Once,
    /// At most once.
    AtMostOnce,
    /// As often as wanted.
    Any,
}

/// What kind of temperature or pressure a slot wants.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Temperature {
    /// A point on the scale.
    Point,
    /// A difference of two points.
    Difference,
}

/// What stands in a slot.
#[derive(Clone, Copy, Debug)]
pub enum Takes {
    /// A quantity of one of these dimensions, the usual one first. A temperature or a pressure is of the kind
    /// that stands beside.
    Quantity(&'static [Dimension], Temperature),
    /// An expression of the property in `T`, `p` and `x`, of this dimension.
    PropertyForm(Dimension),
    /// One of these words.
    Choice(&'static [Choice]),
    /// One of these words, or a quantity of this dimension.
    ChoiceOrQuantity(&'static [Choice], Dimension),
    /// The name of something in the deck or the library.
    Name(NameOf),
    /// A new name, which this entry defines.
    NewName,
    /// A text in quotes.
    Text,
    /// The path of a deck, in quotes.
    Path,
    /// A day, `2027-03-01`.
    Date,
    /// A direction: `x`, `-z`, or a vector `(0, 0, -1)`.
    Direction,
    /// A vector of quantities of this dimension.
    Vector(Dimension),
    /// The name of a check.
    CheckName,
    /// A level of a finding.
    LevelName,
}

/// What a name may name.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum NameOf {
    /// A substance of the deck or the library.
    Substance,
    /// A fluid.
    Fluid,
    /// A solid.
    Solid,
    /// A region.
    Region,
    /// A boundary.
    Boundary,
    /// A varied name.
    Varied,
    /// Anything with a name, or `case` for the whole.
    Anything,
}

/// A word that a slot offers.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct Choice {
    /// The word.
    pub word: &'static str,
    /// What it means.
    pub description: &'static str,
}
