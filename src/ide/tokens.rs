//! What each piece of a file is, for colouring: as the tree has it, with names told apart by what they name.

use super::spot::{slots_filled, word_of};
use crate::syntax::tokens as syntax_tokens;
use crate::syntax::tokens::TokenKind as Leaf;
use crate::syntax::tree::{Content, Entry, Phrase};
use crate::syntax::{FileId, Span};
use crate::vocabulary::{self, EntryRow, Takes};
use crate::workspace::Deck;
use std::collections::HashMap;

/// What a piece of text is.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum TokenKind {
    /// A comment.
    Comment,
    /// The word that opens an entry.
    EntryWord,
    /// The word that opens a statement.
    StatementWord,
    /// A link.
    Link,
    /// A name where it is defined.
    Definition,
    /// The name of a value.
    Value,
    /// The name of an entry or a substance.
    Entity,
    /// A word that a statement offers, the name of a check, or a level.
    Choice,
    /// A function, or a number of a region.
    Function,
    /// A number or a day.
    Number,
    /// A unit.
    Unit,
    /// A text in quotes.
    Text,
    /// An operator.
    Operator,
}

/// Every piece of a file that has a colour, in order, none overlapping another; none spans lines.
pub fn tokens(deck: &Deck, file: FileId) -> Vec<(Span, TokenKind)> {
    let Some(source) = deck.file(file) else { return Vec::new() };
    let mut found = Vec::new();
    for placed in &source.tree.entries {
        let words = names(&placed.entry);
        for token in syntax_tokens::tokens(&placed.entry) {
            let kind = match token.kind {
                Leaf::Plain | Leaf::Unreadable => continue,
                Leaf::Comment => TokenKind::Comment,
                Leaf::EntryWord => TokenKind::EntryWord,
                // The name in `T over 30 degC .. 80 degC` is no word of the language.
                Leaf::StatementWord => words.get(&token.span.start).copied().unwrap_or(TokenKind::StatementWord),
                Leaf::Link => TokenKind::Link,
                Leaf::DefinedName => TokenKind::Definition,
                Leaf::Name => words.get(&token.span.start).copied().unwrap_or(TokenKind::Value),
                Leaf::Function => TokenKind::Function,
                Leaf::Number => TokenKind::Number,
                Leaf::Unit => TokenKind::Unit,
                Leaf::Text => TokenKind::Text,
                Leaf::Operator => TokenKind::Operator,
            };
            let text = token.span.of(&placed.entry.text);
            let trimmed = text.trim_start();
            let start = token.span.start + (text.len() - trimmed.len());
            let span = Span::new(start, start + trimmed.trim_end().len());
            if span.start < span.end {
                found.push((span.shifted(placed.start), kind));
            }
        }
    }
    found
}

/// What the lone words in the slots of an entry are, by where they start.
fn names(entry: &Entry) -> HashMap<usize, TokenKind> {
    let mut found = HashMap::new();
    let Some(row) = entry.head_phrase().and_then(|head| vocabulary::entry_row(&head.word.text)) else { return found };
    for (index, line) in entry.lines.iter().enumerate() {
        if let Content::Phrase(phrase) = &line.content {
            in_phrase(row, phrase, entry.head == Some(index), &mut found);
        }
        super::spot::roots(&line.content).into_iter().for_each(|root| {
            crate::case::resolution::walk(root, &mut |part| match &part.kind {
                crate::syntax::tree::ExpressionKind::Member(owner, _) => {
                    found.insert(owner.span.start, TokenKind::Entity);
                }
                crate::syntax::tree::ExpressionKind::Call(function, arguments) => {
                    // The region in `Ra(cabinet)`.
                    let is_number = vocabulary::functions::REGION_NUMBERS.iter().any(|row| row.name == &*function.text);
                    found.extend(
                        arguments.iter().filter(|_| is_number).map(|argument| (argument.span.start, TokenKind::Entity)),
                    );
                }
                _ => {}
            });
        });
    }
    found
}

fn in_phrase(row: &'static EntryRow, phrase: &Phrase, is_head: bool, found: &mut HashMap<usize, TokenKind>) {
    let slots = if is_head {
        row.slots
    } else {
        match vocabulary::statement_row(row.kind, &phrase.word.text) {
            Some(statement) => statement.slots,
            None => {
                found.insert(phrase.word.span.start, TokenKind::Definition);
                return;
            }
        }
    };
    for (slot, argument) in slots_filled(slots, phrase) {
        let Some(word) = word_of(argument) else { continue };
        let kind = match slot.takes {
            Takes::NewName => TokenKind::Definition,
            Takes::Name(vocabulary::NameOf::Varied) => TokenKind::Value,
            Takes::Name(_) => TokenKind::Entity,
            Takes::Choice(_) | Takes::CheckName | Takes::LevelName | Takes::Direction => TokenKind::Choice,
            Takes::ChoiceOrQuantity(choices, _) if choices.iter().any(|choice| choice.word == word) => {
                TokenKind::Choice
            }
            _ => TokenKind::Value,
        };
        found.insert(argument.span.start, kind);
    }
}

#[cfg(test)]
mod tests {
    use super::TokenKind::*;
    use super::*;
    use crate::ide::testing::{DECK, at, text};

    #[test]
    fn names_by_what_they_name() {
        let (deck, _) = at(
            "boundary skin of cab$0\n    side east # x\n    held at T + 5 K\nvary\n    q over [1, 2]\n    together q\nrequire\n    Ra(cab) < cab.width\n",
        );
        let found: Vec<(&str, TokenKind)> =
            tokens(&deck, DECK).into_iter().map(|(span, kind)| (span.of(text(&deck)), kind)).collect();
        assert_eq!(
            found,
            [
                ("boundary", EntryWord),
                ("skin", Definition),
                ("of", Link),
                ("cab", Entity),
                ("side", StatementWord),
                ("east", Choice),
                ("# x", Comment),
                ("held", StatementWord),
                ("at", Link),
                ("T", Value),
                ("+", Operator),
                ("5", Number),
                ("K", Unit),
                ("vary", EntryWord),
                ("q", Definition),
                ("over", Link),
                ("1", Number),
                ("2", Number),
                ("together", StatementWord),
                ("q", Value),
                ("require", EntryWord),
                ("Ra", Function),
                ("cab", Entity),
                ("cab", Entity),
                ("width", Value),
            ]
        );
    }
}
