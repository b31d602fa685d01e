//! The outline of a file: its entries, and in each its definitions and statements.
//!
//! ```text
//! boundary skin of cabinet        skin (boundary of cabinet)
//!     side  east                      side east
//!     wall                            wall
//! ```

use crate::syntax::tree::{Content, Line, Phrase, PlacedEntry};
use crate::syntax::{FileId, Span};
use crate::vocabulary::{self, EntryKind};
use crate::workspace::Deck;

/// One line of the outline.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Symbol {
    /// Its name.
    pub name: String,
    /// A few words beside it.
    pub detail: String,
    /// What it is.
    pub kind: SymbolKind,
    /// All of it, in bytes of the file.
    pub span: Span,
    /// Its name; inside `span`.
    pub name_span: Span,
    /// What it holds.
    pub children: Vec<Symbol>,
}

/// What a line of the outline is.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum SymbolKind {
    /// An entry of a kind.
    Entry(EntryKind),
    /// A definition, or a name that is varied.
    Value,
    /// A statement.
    Statement,
    /// What must hold.
    Requirement,
}

/// The outline of a file.
pub fn document(deck: &Deck, file: FileId) -> Vec<Symbol> {
    let Some(source) = deck.file(file) else { return Vec::new() };
    source.tree.entries.iter().filter_map(entry).collect()
}

fn entry(placed: &PlacedEntry) -> Option<Symbol> {
    let entry = &placed.entry;
    let text = &*entry.text;
    let head = entry.head_phrase()?;
    let row = vocabulary::entry_row(&head.word.text)?;
    // The name of an entry is what its first argument says; without one, its word.
    let first = head.arguments.first();
    let name = first.map_or(row.word, |first| first.span.of(text).trim_matches('"'));
    let name = if name.is_empty() { row.word } else { name };
    let name_span = first.map_or(head.word.span, |first| first.span);
    let links = head
        .links
        .first()
        .map_or_else(String::new, |first| format!(" {}", Span::new(first.link.span.start, head.span.end).of(text)));
    let detail = if first.is_some() { format!("{}{links}", row.word) } else { links.trim_start().to_string() };
    let last = entry.lines.iter().rev().find(|line| line.content != Content::Blank || line.problem.is_some());
    let end = last.map_or(head.span.end, |line| line.span.end.min(line_end(text, line)));
    Some(Symbol {
        name: name.to_string(),
        detail,
        kind: SymbolKind::Entry(row.kind),
        span: Span::new(head.span.start, end.max(head.span.end)).shifted(placed.start),
        name_span: name_span.shifted(placed.start),
        children: entry.statements().filter_map(|line| statement(placed, line)).collect(),
    })
}

/// Where a line ends, without its line end.
fn line_end(text: &str, line: &Line) -> usize {
    line.span.start + line.span.of(text).trim_end().len()
}

fn statement(placed: &PlacedEntry, line: &Line) -> Option<Symbol> {
    let text = &*placed.entry.text;
    let symbol = |name: &str, detail: &str, kind, span: Span, name_span: Span| Symbol {
        name: name.to_string(),
        detail: detail.to_string(),
        kind,
        span: span.shifted(placed.start),
        name_span: name_span.shifted(placed.start),
        children: Vec::new(),
    };
    match &line.content {
        Content::Blank | Content::Row(_) => None,
        Content::Definition(definition) => {
            let value = definition.value.as_ref().map_or("", |value| value.span.of(text));
            let name = &definition.name;
            Some(symbol(&name.text, value, SymbolKind::Value, definition.span, name.span))
        }
        Content::Phrase(phrase) => {
            let kind = if is_sweep(placed, phrase) { SymbolKind::Value } else { SymbolKind::Statement };
            let detail = Span::new(phrase.word.span.end, phrase.span.end).of(text).trim_start();
            Some(symbol(&phrase.word.text, detail, kind, phrase.span, phrase.word.span))
        }
        Content::Requirement(requirement) => {
            let all = requirement.span;
            Some(symbol(all.of(text), "", SymbolKind::Requirement, all, requirement.left.span))
        }
    }
}

fn is_sweep(placed: &PlacedEntry, phrase: &Phrase) -> bool {
    let is_vary = placed.entry.head_phrase().is_some_and(|head| &*head.word.text == EntryKind::Vary.word());
    is_vary && phrase.links.iter().any(|part| &*part.link.text == "over")
}

/// The entries and values of a deck's own file whose name holds `part`, in any case of letters: for a search through
/// many decks.
pub fn named_like(deck: &Deck, file: FileId, part: &str) -> Vec<Symbol> {
    let part = part.to_lowercase();
    let mut found = Vec::new();
    for symbol in document(deck, file) {
        let children: Vec<Symbol> =
            symbol.children.iter().filter(|child| child.kind == SymbolKind::Value).cloned().collect();
        for one in std::iter::once(Symbol { children: Vec::new(), ..symbol }).chain(children) {
            if one.name.to_lowercase().contains(&part) {
                found.push(one);
            }
        }
    }
    found
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ide::testing::{DECK, at};

    fn outline(text: &str) -> Vec<String> {
        let (deck, _) = at(&format!("{text}$0"));
        let mut lines = Vec::new();
        for symbol in document(&deck, DECK) {
            assert!(symbol.span.start <= symbol.name_span.start && symbol.name_span.end <= symbol.span.end);
            lines.push(format!("{} | {}", symbol.name, symbol.detail));
            for child in symbol.children {
                assert!(child.span.start <= child.name_span.start && child.name_span.end <= child.span.end);
                lines.push(format!("  {} | {} | {:?}", child.name, child.detail, child.kind));
            }
        }
        lines
    }

    #[test]
    fn entries_and_what_they_hold() {
        assert_eq!(
            outline(
                "case \"A box\"\ngiven\n    h = 2 m \"high\"\n# the skin\nboundary skin of cabinet\n    side east\n    wall\nvary\n    T over [1 K, 2 K]\nrequire\n    Ra(a) < 5\n\n"
            ),
            [
                "A box | case",
                "given | ",
                "  h | 2 m | Value",
                "skin | boundary of cabinet",
                "  side | east | Statement",
                "  wall |  | Statement",
                "vary | ",
                "  T | over [1 K, 2 K] | Value",
                "require | ",
                "  Ra(a) < 5 |  | Requirement",
            ]
        );
    }

    #[test]
    fn broken_lines_and_heads_are_passed_over() {
        assert_eq!(outline("  stray\nregion\n   {\nnonsense x\ncase \"\"\n"), ["region | ", "case | case"]);
    }

    #[test]
    fn by_part_of_a_name() {
        let (deck, _) = at("given\n    T_Floor = 8 degC\nregion floor\n    box 1 m$0 by 1 m\n");
        let names: Vec<String> = named_like(&deck, DECK, "FLOOR").into_iter().map(|symbol| symbol.name).collect();
        assert_eq!(names, ["T_Floor", "floor"]);
    }
}
