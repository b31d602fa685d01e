//! Where a cursor stands: the entry, its line, the word that opens the line, and the expression under the cursor.

use crate::syntax::tree::{Content, Entry, Expression, ExpressionKind, Line, Phrase};
use crate::syntax::{FileId, Span};
use crate::vocabulary::{self, EntryRow, Slot, StatementRow};
use crate::workspace::Deck;

/// A place in a deck, with what surrounds it.
#[derive(Clone, Copy, Debug)]
pub struct Spot<'d> {
    /// The file.
    pub file: FileId,
    /// All of its text.
    pub text: &'d str,
    /// The entry.
    pub entry: &'d Entry,
    /// Where the entry starts in the file: its spans count from there.
    pub start: usize,
    /// The entry's row, where its word is known.
    pub row: Option<&'static EntryRow>,
    /// Which line of the entry; `None` on the empty line behind the last line end.
    pub line: Option<usize>,
    /// The cursor, from the start of the file.
    pub offset: usize,
}

/// The surroundings of an offset. One inside a character counts as before it; one past the end as the end.
pub fn spot(deck: &Deck, file: FileId, offset: usize) -> Option<Spot<'_>> {
    let source = deck.file(file)?;
    let text: &str = &source.text;
    let mut offset = offset.min(text.len());
    while !text.is_char_boundary(offset) {
        offset = offset.saturating_sub(1);
    }
    let placed = source.tree.entries.get(source.tree.entry_at(offset)?)?;
    let entry = &*placed.entry;
    let inside = offset - placed.start;
    let after = entry.lines.partition_point(|line| line.span.end <= inside);
    let line = match entry.lines.get(after) {
        Some(_) => Some(after),
        None if entry.text.ends_with('\n') => None,
        None => entry.lines.len().checked_sub(1),
    };
    let row = entry.head_phrase().and_then(|phrase| vocabulary::entry_row(&phrase.word.text));
    Some(Spot { file, text, entry, start: placed.start, row, line, offset })
}

impl<'d> Spot<'d> {
    /// The cursor, from the start of the entry.
    pub fn inside(&self) -> usize {
        self.offset - self.start
    }

    /// The line.
    pub fn line(&self) -> Option<&'d Line> {
        self.entry.lines.get(self.line?)
    }

    /// Whether the line is the entry's head.
    pub fn is_head(&self) -> bool {
        self.line.is_some() && self.line == self.entry.head
    }

    /// The text of the line before the cursor, and where it starts in the file.
    pub fn before(&self) -> (&'d str, usize) {
        let start = self.line().map_or(self.offset, |line| line.span.start + self.start);
        let before = Span::new(start, self.offset).of(self.text);
        let mark = before.len() - before.trim_start_matches('\u{feff}').len();
        (before.get(mark..).unwrap_or(""), start + mark)
    }

    /// The phrase on the line.
    pub fn phrase(&self) -> Option<&'d Phrase> {
        match &self.line()?.content {
            Content::Phrase(phrase) => Some(phrase),
            _ => None,
        }
    }

    /// The row of the statement on the line.
    pub fn statement(&self) -> Option<&'static StatementRow> {
        if self.is_head() {
            return None;
        }
        vocabulary::statement_row(self.row?.kind, &self.phrase()?.word.text)
    }

    /// What the word that opens the line takes.
    pub fn slots(&self) -> &'static [Slot] {
        if self.is_head() {
            self.row.map_or(&[], |row| row.slots)
        } else {
            self.statement().map_or(&[], |row| row.slots)
        }
    }

    /// A span of the entry as a span of the file.
    pub fn placed(&self, span: Span) -> Span {
        span.shifted(self.start)
    }

    /// The expressions under the cursor, the innermost first. Of two that touch, the one that starts at the cursor.
    pub fn expressions(&self) -> Vec<&'d Expression> {
        let mut path = Vec::new();
        let Some(line) = self.line() else { return path };
        let mut level = roots(&line.content);
        while let Some(found) = level.iter().rev().copied().find(|expression| expression.span.touches(self.inside())) {
            path.push(found);
            level = children(found);
        }
        path.reverse();
        path
    }

    /// The slot that an argument of the line's phrase fills.
    pub fn slot_of(&self, argument: &Expression) -> Option<&'static Slot> {
        slots_filled(self.slots(), self.phrase()?)
            .into_iter()
            .find(|(_, filled)| filled.span == argument.span)
            .map(|(slot, _)| slot)
    }

    /// The name of the entry: its first argument, where that is a word.
    pub fn entry_name(&self) -> Option<&'d str> {
        word_of(self.entry.head_phrase()?.arguments.first()?)
    }

    /// The word behind a link on the entry's head: the region in `boundary boards of cabinet`.
    pub fn head_link(&self, link: &str) -> Option<&'d str> {
        let part = self.entry.head_phrase()?.links.iter().find(|part| &*part.link.text == link)?;
        word_of(part.arguments.first()?)
    }
}

/// The word that an expression is.
pub fn word_of(expression: &Expression) -> Option<&str> {
    match &expression.kind {
        ExpressionKind::Word(word) => Some(word),
        _ => None,
    }
}

/// The expressions of a line.
pub fn roots(content: &Content) -> Vec<&Expression> {
    match content {
        Content::Blank => Vec::new(),
        Content::Phrase(phrase) => {
            phrase.arguments.iter().chain(phrase.links.iter().flat_map(|part| &part.arguments)).collect()
        }
        Content::Definition(definition) => definition.value.iter().collect(),
        Content::Row(row) => row.cells.iter().collect(),
        Content::Requirement(requirement) => vec![&requirement.left, &requirement.right],
    }
}

/// The parts of an expression.
pub fn children(expression: &Expression) -> Vec<&Expression> {
    match &expression.kind {
        ExpressionKind::Negative(inner) | ExpressionKind::Group(inner) => vec![inner],
        ExpressionKind::Binary(binary) => vec![&binary.left, &binary.right],
        ExpressionKind::Call(_, items) | ExpressionKind::Vector(items) | ExpressionKind::List(items) => {
            items.iter().collect()
        }
        ExpressionKind::Range(range) => {
            [Some(&range.from), Some(&range.to), range.step.as_ref()].into_iter().flatten().collect()
        }
        ExpressionKind::Quantity(_)
        | ExpressionKind::Word(_)
        | ExpressionKind::Member(..)
        | ExpressionKind::Text(_)
        | ExpressionKind::Date(_)
        | ExpressionKind::TooComplex => Vec::new(),
    }
}

/// Which slot each argument of a phrase fills. Slots of one link are filled in turn, as `case` does it.
pub fn slots_filled<'p>(slots: &'static [Slot], phrase: &'p Phrase) -> Vec<(&'static Slot, &'p Expression)> {
    let mut taken = vec![false; slots.len()];
    let direct = (!phrase.arguments.is_empty()).then_some(("", &phrase.arguments));
    let linked = phrase.links.iter().map(|part| (&*part.link.text, &part.arguments));
    let mut filled = Vec::new();
    for (link, arguments) in direct.into_iter().chain(linked) {
        let free = slots.iter().zip(&mut taken).find(|(slot, taken)| slot.link == link && !**taken);
        if let Some((slot, taken)) = free {
            *taken = true;
            filled.extend(arguments.iter().map(|argument| (slot, argument)));
        }
    }
    filled
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ide::testing::{DECK, at};

    #[test]
    fn the_expression_under_the_cursor_and_its_slot() {
        let (deck, offset) = at("
boundary skin of cabinet
    exchanges 6 W/m^2/K with 2 * (T_$0out + 5 K)
");
        let spot = spot(&deck, DECK, offset).unwrap();
        let path: Vec<&str> =
            spot.expressions().iter().map(|expression| expression.span.of(&spot.entry.text)).collect();
        assert_eq!(path, ["T_out", "T_out + 5 K", "(T_out + 5 K)", "2 * (T_out + 5 K)"]);
        let outer = spot.expressions().pop().unwrap();
        assert_eq!(spot.slot_of(outer).unwrap().name, "temperature");
        assert_eq!((spot.entry_name(), spot.head_link("of")), (Some("skin"), Some("cabinet")));
    }

    #[test]
    fn behind_the_last_line_end() {
        let (deck, offset) = at("run\n    steady\n$0");
        let spot = spot(&deck, DECK, offset).unwrap();
        assert!(spot.line().is_none() && spot.row.is_some() && spot.before() == ("", offset));
    }
}
