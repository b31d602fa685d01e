//! Completion: what may be written at the cursor.
//!
//! ```text
//! boundary boards of cabinet
//!     he$0                  heated by ..., held at ...      words of a boundary that it does not have yet
//!     heated by 180 $0      W/m^2, W, kW/m^2, ...           units of a heat flux or a power, the usual first
//!     held at $0            T_floor, T_room, ...            names, those of the dimension that is wanted first
//! ```
//!
//! The line may be half-written: it is read up to the cursor. Everything else comes from the tree and the resolution.

use super::half_line::{self, HalfLine, Piece, Typing};
use super::offers::List;
pub use super::offers::{Completion, CompletionKind};
use super::snippet::{self, plain};
use super::spot::{Spot, spot};
use super::wanted::{self, Wanted};
use crate::checks::CHECKS;
use crate::syntax::tree::Content;
use crate::syntax::{FileId, Level, Span};
use crate::vocabulary::functions::REGION_NUMBERS;
use crate::vocabulary::rows::Holds;
use crate::vocabulary::{self, ENTRIES, EntryKind, NameOf, Need, Slot, Takes, Times};
use crate::workspace::Deck;

/// Everything that may stand at the cursor, the likeliest first. The path of an `include` is the caller's to complete.
pub fn complete(deck: &Deck, file: FileId, offset: usize) -> Vec<Completion> {
    let Some(spot) = spot(deck, file, offset) else { return Vec::new() };
    let (before, _) = spot.before();
    let half = half_line::read(before);
    let (start, glued) = match half.typing {
        Typing::Comment | Typing::Text(_) => return Vec::new(),
        Typing::Word(start) => (start, false),
        Typing::Unit { start, glued } => (start, glued),
    };
    let mut list = List {
        deck,
        resolution: &deck.resolution,
        replace: Span::new(spot.offset - start.len(), spot.offset),
        found: Vec::new(),
    };
    match half.typing {
        Typing::Unit { .. } => list.units(&wanted_at(deck, &spot, &half), glued),
        _ => list.words(&spot, &half),
    }
    list.found
}

impl List<'_> {
    /// Words, where no unit is being typed.
    fn words(&mut self, spot: &Spot<'_>, half: &HalfLine<'_>) {
        let Some((first, rest)) = half.pieces.split_first() else { return self.opening(spot, half.indented) };
        if let [.., Piece::Word(owner), Piece::Mark('.')] = half.pieces.as_slice() {
            return self.members(owner);
        }
        let holds = spot.row.map(|row| row.holds);
        let (word, rest, slots) = match (half.indented, first, holds) {
            (false, Piece::Word(word), _) => {
                let Some(row) = vocabulary::entry_row(word) else { return };
                (*word, rest, row.slots)
            }
            (true, _, Some(Holds::Definitions | Holds::DefinitionsAndRows))
                if half.pieces.contains(&Piece::Mark('=')) || *first == Piece::Mark('|') =>
            {
                let wanted = wanted_at(self.deck, spot, half);
                if ends_open(&half.pieces) {
                    self.values(spot, &wanted);
                }
                return;
            }
            (true, _, Some(Holds::Requirements)) => return self.requirement(spot, half),
            (true, Piece::Word(word), Some(Holds::Sweeps)) if *word != "together" => {
                return self.sweep(spot, word, half);
            }
            (true, Piece::Word(word), Some(_)) => {
                let row = spot.row.and_then(|row| vocabulary::statement_row(row.kind, word));
                let Some(row) = row else { return };
                (*word, rest, row.slots)
            }
            _ => return,
        };
        self.argument(spot, half, word, rest, slots);
    }

    /// The first word of a line.
    fn opening(&mut self, spot: &Spot<'_>, indented: bool) {
        if !indented {
            let has = |kind| self.resolution.entries.iter().any(|entry| entry.row.kind == kind);
            let is_practice = self.deck.file(spot.file).is_some_and(|file| {
                file.path.file_name().is_some_and(|name| name == crate::workspace::practice::PRACTICE_FILE)
            });
            for row in ENTRIES {
                let is_used = row.times == Times::AtMostOnce && has(row.kind);
                if !is_used && (row.kind == EntryKind::Practice) == is_practice {
                    let insert = snippet::entry(row, self.resolution);
                    self.add(CompletionKind::Entry, row.word, row.description, example(row.example), insert);
                }
            }
            return;
        }
        let Some(row) = spot.row else { return };
        for statement in vocabulary::statements_of(row.kind) {
            if statement.times != Times::Any && has_statement(spot, statement.word) {
                continue;
            }
            let insert = snippet::statement(statement, self.resolution);
            let label = label_of(statement.word, statement.slots);
            let documentation = example(statement.example);
            self.add(CompletionKind::Statement, &label, statement.description, documentation, insert);
        }
        match row.holds {
            Holds::Requirements => self.comparands(spot),
            Holds::Sweeps => {
                let insert = "${1:name} over ${2:30 degC} .. ${3:80 degC} step ${4:10 K}".to_string();
                self.add(CompletionKind::Statement, "name over range", "values of a name", String::new(), insert);
            }
            Holds::Definitions => {
                let insert = "${1:name} = ${2:value}  \"${3:description}\"".to_string();
                self.add(CompletionKind::Statement, "name = value", "a name for a value", String::new(), insert);
            }
            _ => {}
        }
    }

    /// Behind the word of a statement or a head.
    fn argument(
        &mut self,
        spot: &Spot<'_>,
        half: &HalfLine<'_>,
        word: &str,
        rest: &[Piece<'_>],
        slots: &'static [Slot],
    ) {
        let (slot, pieces) = wanted::open_slot(slots, rest);
        // Several values are separated by commas.
        let begun = pieces.iter().rposition(|piece| *piece == Piece::Mark(',')).map_or(0, |at| at + 1);
        let is_vector = slot.is_some_and(|slot| matches!(slot.takes, Takes::Vector(_) | Takes::Direction));
        let value = if is_vector { pieces } else { pieces.get(begun..).unwrap_or(&[]) };
        if let Some(slot) = slot
            && (value.is_empty() || ends_open(value))
        {
            self.slot(spot, half, slot, value, pieces);
            if slot.need != Need::Optional || !pieces.is_empty() {
                return;
            }
        }
        self.links(word, rest, slots);
    }

    /// The links that may still follow.
    fn links(&mut self, word: &str, rest: &[Piece<'_>], slots: &'static [Slot]) {
        let mut offered: Vec<&str> = Vec::new();
        for slot in slots.iter().filter(|slot| !slot.link.is_empty()) {
            let all = slots.iter().filter(|other| other.link == slot.link).count();
            let written = rest.iter().filter(|piece| **piece == Piece::Word(slot.link)).count();
            if written >= all || offered.contains(&slot.link) {
                continue;
            }
            offered.push(slot.link);
            let named = slots.iter().filter(|other| other.link == slot.link).nth(written).unwrap_or(slot);
            let detail = format!("the {} of `{word}`", named.name.replace('-', " "));
            self.add(CompletionKind::Link, slot.link, &detail, String::new(), format!("{} ", slot.link));
        }
    }

    /// What stands in a slot.
    fn slot(
        &mut self,
        spot: &Spot<'_>,
        half: &HalfLine<'_>,
        slot: &'static Slot,
        value: &[Piece<'_>],
        pieces: &[Piece<'_>],
    ) {
        match slot.takes {
            Takes::Choice(choices) => self.choices(choices, pieces),
            Takes::ChoiceOrQuantity(choices, _) => {
                if value.is_empty() {
                    self.choices(choices, &[]);
                }
                self.values(spot, &wanted_at(self.deck, spot, half));
            }
            Takes::Quantity(..) | Takes::Vector(_) | Takes::PropertyForm(_) => {
                self.values(spot, &wanted_at(self.deck, spot, half));
            }
            Takes::Name(of) => self.names(of, pieces),
            Takes::Direction if value.is_empty() => {
                for axis in ["-z", "z", "x", "-x", "y", "-y"] {
                    self.plain(CompletionKind::Choice, axis, "a direction");
                }
            }
            Takes::CheckName => {
                for check in CHECKS {
                    let documentation = check.basis.compares.to_string();
                    let name = check.name;
                    self.add(CompletionKind::Check, name, check.family.word(), documentation, plain(name));
                }
            }
            Takes::LevelName => {
                for level in Level::ALL.iter().rev() {
                    self.plain(CompletionKind::Choice, level.word(), "a level");
                }
                self.plain(CompletionKind::Choice, "off", "the check does not run");
            }
            Takes::NewName | Takes::Text | Takes::Path | Takes::Date | Takes::Direction => {}
        }
    }

    fn requirement(&mut self, spot: &Spot<'_>, half: &HalfLine<'_>) {
        // `Ra(` takes a region.
        if let [.., Piece::Word(function), Piece::Mark('(')] = half.pieces.as_slice()
            && REGION_NUMBERS.iter().any(|number| number.name == *function)
        {
            return self.names(NameOf::Region, &[]);
        }
        if ends_open(&half.pieces) {
            if half.pieces.iter().any(|piece| matches!(piece, Piece::Mark('<' | '>') | Piece::Word("within"))) {
                let wanted = wanted_at(self.deck, spot, half);
                return self.values(spot, &wanted);
            }
            return self.comparands(spot);
        }
        for (symbol, detail) in [("<", "less"), ("<=", "at most"), (">", "more"), (">=", "at least")] {
            self.plain(CompletionKind::Link, symbol, detail);
        }
        let insert = "within ${1:1e4} .. ${2:1e9}".to_string();
        self.add(CompletionKind::Link, "within", "between two values", String::new(), insert);
    }

    fn sweep(&mut self, spot: &Spot<'_>, word: &str, half: &HalfLine<'_>) {
        if !half.pieces.contains(&Piece::Word("over")) {
            self.add(CompletionKind::Link, "over", &format!("the values of `{word}`"), String::new(), "over ".into());
        } else if ends_open(&half.pieces) {
            let wanted = wanted_at(self.deck, spot, half);
            self.values(spot, &wanted);
        } else if !half.pieces.contains(&Piece::Word("step")) && half.pieces.contains(&Piece::Mark('.')) {
            self.add(CompletionKind::Link, "step", "the distance of two values", String::new(), "step ".into());
        }
    }
}

/// What a word is called in the list: with the link that always follows it, `held at`.
fn label_of(word: &str, slots: &[Slot]) -> String {
    match slots.first() {
        Some(slot) if !slot.link.is_empty() && slot.need == Need::Required => format!("{word} {}", slot.link),
        _ => word.to_string(),
    }
}

fn example(text: &str) -> String {
    format!("```buoy\n{text}\n```")
}

/// Whether another line of the entry has the statement already.
fn has_statement(spot: &Spot<'_>, word: &str) -> bool {
    spot.entry.lines.iter().enumerate().any(|(index, line)| match &line.content {
        Content::Phrase(phrase) => {
            Some(index) != spot.line && Some(index) != spot.entry.head && &*phrase.word.text == word
        }
        _ => false,
    })
}

/// Whether an operand may follow: nothing stands yet, or an operator, an opening bracket, a comma or a link.
fn ends_open(pieces: &[Piece<'_>]) -> bool {
    match pieces.last() {
        None => true,
        Some(Piece::Mark(mark)) => !matches!(mark, ')' | ']'),
        Some(Piece::Word(word)) => crate::syntax::links::is_link(word),
        Some(Piece::Number(_) | Piece::Quantity(..) | Piece::Text(_)) => false,
    }
}

/// The dimension that a number at the cursor should have.
fn wanted_at(deck: &Deck, spot: &Spot<'_>, half: &HalfLine<'_>) -> Wanted {
    let Some((first, rest)) = half.pieces.split_first() else { return Wanted::anything() };
    let holds = spot.row.map(|row| row.holds);
    match (half.indented, first, holds) {
        (true, Piece::Word(name), Some(Holds::Definitions | Holds::DefinitionsAndRows))
            if rest.first() == Some(&Piece::Mark('=')) =>
        {
            wanted::in_expression(wanted::of_name(&deck.resolution, name), rest.get(1..).unwrap_or(&[]))
        }
        (true, Piece::Mark('|'), Some(Holds::DefinitionsAndRows)) => {
            let column = rest.iter().filter(|piece| **piece == Piece::Mark('|')).count();
            column_at(spot, column).map_or_else(Wanted::anything, wanted::of_column)
        }
        (true, _, Some(Holds::Requirements)) => wanted::of_comparison(&deck.resolution, &half.pieces),
        (true, Piece::Word(name), Some(Holds::Sweeps)) => {
            let values = rest.get(1..).unwrap_or(&[]);
            wanted::in_expression(wanted::of_name(&deck.resolution, name), values)
        }
        (indented, Piece::Word(word), _) => {
            let slots = match (indented, spot.row) {
                (false, _) => vocabulary::entry_row(word).map(|row| row.slots),
                (true, Some(row)) => vocabulary::statement_row(row.kind, word).map(|row| row.slots),
                (true, None) => None,
            };
            let (slot, pieces) = wanted::open_slot(slots.unwrap_or(&[]), rest);
            slot.map_or_else(Wanted::anything, |slot| wanted::in_slot(slot, pieces))
        }
        _ => Wanted::anything(),
    }
}

/// The word of a column of the substance's table.
fn column_at<'d>(spot: &Spot<'d>, index: usize) -> Option<&'d str> {
    let table = spot.entry.lines.iter().find_map(|line| match &line.content {
        Content::Phrase(phrase) if &*phrase.word.text == "table" => Some(phrase),
        _ => None,
    })?;
    super::spot::word_of(table.arguments.get(index)?)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ide::testing::{DECK, at};

    fn labels(marked: &str) -> Vec<String> {
        let (deck, offset) = at(marked);
        complete(&deck, DECK, offset).into_iter().map(|one| one.label).collect()
    }

    /// The answer with this label, as the text that replaces what is being typed.
    fn inserted(marked: &str, label: &str) -> String {
        let (deck, offset) = at(marked);
        let all = complete(&deck, DECK, offset);
        let one = all.iter().find(|one| one.label == label).unwrap_or_else(|| panic!("no {label} in {all:#?}"));
        assert_eq!(one.replace.end, offset);
        one.insert.clone()
    }

    const CABINET: &str = "
given
    T_floor = 8 degC
    height  = 1.1 m  \"inside height\"
fluid cabinet_air
    substance air
region cabinet
    box 0.5 m by height
    filled with cabinet_air
";

    fn below(line: &str) -> String {
        format!("{CABINET}{line}")
    }

    #[test]
    fn words_of_the_entry_that_it_does_not_have_yet() {
        let words = labels(&below("boundary boards of cabinet\n    side west\n    he$0\n    held at 5 degC\n"));
        assert!(words.contains(&"heated by".to_string()) && words.contains(&"wall".to_string()));
        assert!(!words.contains(&"side".to_string()) && !words.contains(&"held at".to_string()));
        assert!(!words.contains(&"gravity".to_string()));
    }

    #[test]
    fn a_statement_comes_as_a_snippet_with_its_unit() {
        let boundary = below("boundary boards of cabinet\n    he$0\n");
        assert_eq!(inserted(&boundary, "held at"), "held at ${1:40} degC");
        assert_eq!(inserted(&boundary, "heated by"), "heated by ${1:180} W");
        assert_eq!(inserted(&below("region other\n    $0"), "filled with"), "filled with ${1:cabinet_air}");
    }

    #[test]
    fn entries_in_the_first_column() {
        let words = labels(&below("run\n    steady\nbo$0"));
        assert!(words.contains(&"boundary".to_string()) && words.contains(&"given".to_string()));
        assert!(!words.contains(&"run".to_string()) && !words.contains(&"practice".to_string()));
        assert_eq!(inserted("reg$0", "region"), "region ${1:cabinet}\n    $0");
        assert_eq!(inserted(&below("bo$0"), "boundary"), "boundary ${1:boards} of ${2:cabinet}\n    $0");
    }

    #[test]
    fn units_of_the_wanted_dimension() {
        let first = |line: &str, count: usize| labels(&below(line))[..count].to_vec();
        assert_eq!(first("boundary a of cabinet\n    heated by 180 $0", 2), ["W/m^2", "W"]);
        assert_eq!(first("boundary a of cabinet\n    exchanges 6 W/m^2/K with 8 $0", 2), ["degC", "K"]);
        assert_eq!(first("boundary a of cabinet\n    exchanges 6 W/$0 with T_floor", 1), ["W/m^2/K"]);
        assert_eq!(first("fluid f\n    reference 25 degC at 0.79 $0", 2), ["bar", "Pa"]);
        assert_eq!(first("boundary a of cabinet\n    held at T_floor + 5 $0", 1), ["K"]);
        assert_eq!(first("require\n    peak_temperature(cabinet) < 60 $0", 1), ["degC"]);
        assert_eq!(
            first("vary\n    T_hot over 30 degC .. 80 degC step 5 $0\nboundary a of cabinet\n    held at T_hot\n", 1),
            ["K"]
        );
        assert_eq!(first("vary\n    T_hot over 30 $0\nboundary a of cabinet\n    held at T_hot\n", 1), ["degC"]);
        assert_eq!(first("substance s\n    table temperature, viscosity\n    | 20 degC | 0.8 $0", 1), ["Pa.s"]);
        assert_eq!(first("initial cabinet\n    velocity (0.1 m/s, 2 $0", 1), ["m/s"]);
    }

    #[test]
    fn a_unit_glued_to_its_number_gets_a_space() {
        assert_eq!(inserted("run\n    transient for 2$0", "s"), " s");
        assert_eq!(inserted("run\n    transient for 2 m$0", "min"), "min");
    }

    #[test]
    fn a_name_of_the_deck_by_its_use() {
        assert_eq!(labels("given\n    a = 5 $0\nboundary b of r\n    heated by a\n")[..2], ["W/m^2", "W"]);
    }

    #[test]
    fn names_of_the_wanted_dimension_first() {
        assert_eq!(labels(&below("boundary a of cabinet\n    held at $0"))[..2], ["T_floor", "height"]);
        assert_eq!(labels(&below("region b\n    box $0"))[..2], ["height", "T_floor"]);
        assert_eq!(labels(&below("region b\n    box 2 * h$0"))[..1], ["T_floor"]);
        // No definition names itself.
        assert!(!labels(&below("given\n    other = $0")).contains(&"other".to_string()));
    }

    #[test]
    fn names_of_the_right_kind() {
        assert_eq!(labels(&below("region b\n    filled with $0")), ["cabinet_air"]);
        assert_eq!(labels(&below("boundary b of $0")), ["cabinet"]);
        let substances = labels("fluid f\n    substance wa$0");
        assert!(substances.contains(&"water".to_string()) && substances.contains(&"air".to_string()));
        assert_eq!(labels(&below("require\n    Ra($0")), ["cabinet"]);
        assert!(labels(&below("given\n    a = cabinet_air.$0")).is_empty());
        assert_eq!(labels(&below("given\n    a = cabinet.$0")), ["width", "depth"]);
    }

    #[test]
    fn choices_not_yet_taken() {
        let sides = labels(&below("boundary a of cabinet\n    side west, $0"));
        assert!(sides.contains(&"east".to_string()) && !sides.contains(&"west".to_string()));
        assert_eq!(labels(&below("region b\n    flow turbulent by k-$0"))[0], "k-epsilon");
        assert_eq!(labels("case \"a\"\n    gravity $0")[0], "none");
    }

    #[test]
    fn links_that_may_follow() {
        assert_eq!(labels("case \"a\"\n    gravity 9.81 m/s^2 $0"), ["along"]);
        assert_eq!(labels("fluid f\n    reference 25 degC $0"), ["at"]);
        assert_eq!(labels("region r\n    box 1 m by 2 m by 3 m $0"), [""; 0]);
        assert_eq!(labels("boundary b $0"), ["of"]);
    }

    #[test]
    fn check_names() {
        let checks = labels("waive $0");
        assert!(checks.contains(&"unknown-unit".to_string()));
    }

    #[test]
    fn nothing_in_comments_and_texts() {
        assert!(labels("run # st$0").is_empty() && labels("include \"sha$0").is_empty());
    }

    #[test]
    fn at_every_place_of_any_text_it_answers() {
        let text = below(
            "vary\n    T over [1 m, 2 m\nboundary ä of cabinet\n   side west,, by (\n | 5 \"\n\u{feff}x .. 1e5e5 é",
        );
        for offset in 0..=text.len() + 2 {
            let deck = crate::workspace::analyse_text(&text, crate::testing::TODAY);
            if offset % 7 == 0 || offset > text.len() - 80 {
                complete(&deck, DECK, offset);
            }
        }
    }
}
