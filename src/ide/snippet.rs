//! The line to insert for a word, with places to fill in: made from the word's own example in the vocabulary.
//!
//! ```text
//! exchanges 6 W/m^2/K with 8 degC   becomes   exchanges ${1:6} W/m^2/K with ${2:8} degC
//! density-law boussinesq            becomes   density-law ${1|boussinesq,ideal-gas,variable,constant|}
//! ```

use super::spot::{slots_filled, word_of};
use crate::case::Resolution;
use crate::case::bind::Bound;
use crate::syntax::Span;
use crate::syntax::parse::parse_entry;
use crate::syntax::tree::{Content, Expression, ExpressionKind};
use crate::vocabulary::{EntryKind, EntryRow, NameOf, Slot, StatementRow, Takes};

/// A statement's line, from its word on.
pub fn statement(row: &StatementRow, resolution: &Resolution) -> String {
    from_example(row.example, row.slots, resolution)
}

/// An entry's head, and the start of its first statement.
pub fn entry(row: &EntryRow, resolution: &Resolution) -> String {
    let head = row.example.lines().next().unwrap_or(row.word);
    let head = from_example(head, row.slots, resolution);
    if row.kind == EntryKind::Include { head } else { format!("{head}\n    $0") }
}

/// A text that stands for itself in a snippet.
pub fn plain(text: &str) -> String {
    text.replace('\\', "\\\\").replace('$', "\\$").replace('}', "\\}")
}

/// The names of a kind in the deck, in its order.
pub fn names_of(resolution: &Resolution, of: NameOf) -> Vec<&str> {
    if of == NameOf::Varied {
        return resolution.varied.iter().map(|varied| &*varied.name.text).collect();
    }
    let mut names: Vec<&str> = Vec::new();
    for entry in &resolution.entries {
        let kind = crate::case::declare::named_kind(entry.row.kind);
        let Some(name) = entry.name.as_ref().filter(|_| kind.is_some_and(|kind| of == NameOf::Anything || kind == of))
        else {
            continue;
        };
        names.push(&name.text);
    }
    // Boundaries of several regions may share a name.
    let mut seen = std::collections::HashSet::new();
    names.retain(|name| seen.insert(*name));
    names
}

/// The name in a slot of a bound statement.
pub fn bound_name(bound: Option<&Bound>) -> Option<&str> {
    match bound {
        Some(Bound::Name(name) | Bound::Text(name)) => Some(&name.text),
        _ => None,
    }
}

fn from_example(example: &str, slots: &'static [Slot], resolution: &Resolution) -> String {
    let parsed = parse_entry(example);
    let Some(Content::Phrase(phrase)) = parsed.lines.first().map(|line| &line.content) else { return plain(example) };
    let mut snippet = String::new();
    let mut at = 0;
    for (index, (slot, argument)) in slots_filled(slots, phrase).into_iter().enumerate() {
        let (span, text) = place_holder(index + 1, slot, argument, example, resolution);
        snippet.push_str(&plain(Span::new(at, span.start).of(example)));
        snippet.push_str(&text);
        at = span.end;
    }
    snippet.push_str(&plain(example.get(at..).unwrap_or("")));
    snippet
}

/// What of an argument is to be filled in, and how.
fn place_holder(
    number: usize,
    slot: &Slot,
    argument: &Expression,
    example: &str,
    resolution: &Resolution,
) -> (Span, String) {
    let written = argument.span.of(example);
    let one_of = |words: &[&str]| {
        // The example's own word comes first.
        let mut words: Vec<&str> = words.to_vec();
        words.sort_by_key(|word| *word != written);
        format!("${{{number}|{}|}}", words.join(","))
    };
    let free = |text: &str| format!("${{{number}:{}}}", plain(text));
    match (slot.takes, &argument.kind) {
        (Takes::Choice(choices) | Takes::ChoiceOrQuantity(choices, _), ExpressionKind::Word(_)) => {
            (argument.span, one_of(&choices.iter().map(|choice| choice.word).collect::<Vec<_>>()))
        }
        (Takes::Name(of), _) if of != NameOf::Anything => {
            let names = names_of(resolution, of);
            let text = match names.as_slice() {
                [] => free(written),
                [only] => free(only),
                several => one_of(several),
            };
            (argument.span, text)
        }
        (_, ExpressionKind::Quantity(quantity)) => (quantity.number_span, free(quantity.number_span.of(example))),
        (_, ExpressionKind::Text(text)) => {
            (Span::new(argument.span.start + 1, argument.span.end.saturating_sub(1)), free(text))
        }
        _ => (argument.span, free(word_of(argument).unwrap_or(written))),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::vocabulary::{ENTRIES, STATEMENTS, statement_row};

    /// The text after the editor put every first answer in.
    fn filled(snippet: &str) -> String {
        let mut text = String::new();
        let mut rest = snippet;
        while let Some((before, after)) = rest.split_once("${") {
            text.push_str(before);
            let (inside, behind) = after.split_once('}').unwrap();
            text.push_str(match inside.split_once('|') {
                Some((_, choices)) => choices.trim_end_matches('|').split(',').next().unwrap(),
                None => inside.split_once(':').unwrap().1,
            });
            rest = behind;
        }
        text.push_str(rest);
        text.replace("$0", "")
    }

    #[test]
    fn quantities_choices_and_names() {
        let none = Resolution::default();
        let row = |kind, word| statement(statement_row(kind, word).unwrap(), &none);
        assert_eq!(row(EntryKind::Boundary, "exchanges"), "exchanges ${1:6} W/m^2/K with ${2:8} degC");
        assert_eq!(row(EntryKind::Fluid, "density-law"), "density-law ${1|boussinesq,ideal-gas,variable,constant|}");
        assert_eq!(row(EntryKind::Case, "purpose"), "purpose \"${1:Does the cabinet need a fan?}\"");
        assert_eq!(row(EntryKind::Region, "filled"), "filled with ${1:cabinet_air}");
    }

    #[test]
    fn filled_with_the_first_answers_it_is_the_example() {
        let none = Resolution::default();
        for row in STATEMENTS {
            assert_eq!(filled(&statement(row, &none)), row.example);
        }
        for row in ENTRIES {
            let head = row.example.lines().next().unwrap();
            assert_eq!(filled(&entry(row, &none)).lines().next().unwrap(), head);
        }
    }
}
