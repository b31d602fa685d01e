//! Semantic tokens, whole, by range, and as the difference to what was sent before.

use super::handlers::OWN;
use super::places::Places;
use super::shared::locked;
use super::world::World;
use crate::ide::tokens::{TokenKind, tokens};
use crate::syntax::Span;
use std::collections::HashMap;
use std::sync::Mutex;
use tower_lsp::lsp_types::*;

/// The kinds of tokens that are sent, by their numbers, and the one modifier.
pub fn legend() -> SemanticTokensLegend {
    SemanticTokensLegend { token_types: TYPES.to_vec(), token_modifiers: vec![SemanticTokenModifier::DECLARATION] }
}

/// The protocol's kinds: editors have colours for these.
const TYPES: [SemanticTokenType; 12] = [
    SemanticTokenType::COMMENT,
    SemanticTokenType::KEYWORD,
    SemanticTokenType::PROPERTY,
    SemanticTokenType::MODIFIER,
    SemanticTokenType::VARIABLE,
    SemanticTokenType::CLASS,
    SemanticTokenType::ENUM_MEMBER,
    SemanticTokenType::FUNCTION,
    SemanticTokenType::NUMBER,
    SemanticTokenType::TYPE,
    SemanticTokenType::STRING,
    SemanticTokenType::OPERATOR,
];

/// The number of a kind in [`TYPES`].
const fn number(kind: TokenKind) -> u32 {
    match kind {
        TokenKind::Comment => 0,
        TokenKind::EntryWord => 1,
        TokenKind::StatementWord => 2,
        TokenKind::Link => 3,
        TokenKind::Definition | TokenKind::Value => 4,
        TokenKind::Entity => 5,
        TokenKind::Choice => 6,
        TokenKind::Function => 7,
        TokenKind::Number => 8,
        TokenKind::Unit => 9,
        TokenKind::Text => 10,
        TokenKind::Operator => 11,
    }
}

/// The tokens of a document that were sent last, with the text that names them.
#[derive(Default)]
pub struct Sent {
    sent: Mutex<HashMap<Url, (u64, Vec<SemanticToken>)>>,
}

impl Sent {
    /// Notes what is sent, and forgets what belongs to closed documents; gives the text that names it.
    pub fn note(&self, world: &World, uri: &Url, tokens: &[SemanticToken]) -> String {
        let mut sent = locked(&self.sent);
        sent.retain(|uri, _| world.documents.contains_key(uri));
        let number = sent.get(uri).map_or(1, |(number, _)| number + 1);
        sent.insert(uri.clone(), (number, tokens.to_vec()));
        number.to_string()
    }

    /// The change from what was sent under a name to these; `None` where that is not known any more.
    pub fn change(&self, uri: &Url, name: &str, tokens: &[SemanticToken]) -> Option<Vec<SemanticTokensEdit>> {
        let sent = locked(&self.sent);
        let (number, before) = sent.get(uri)?;
        (number.to_string() == name).then(|| difference(before, tokens))
    }
}

/// The one piece that differs.
fn difference(before: &[SemanticToken], after: &[SemanticToken]) -> Vec<SemanticTokensEdit> {
    let start = before.iter().zip(after).take_while(|(a, b)| a == b).count();
    let rest = before.len().min(after.len()) - start;
    let end = before.iter().rev().zip(after.iter().rev()).take(rest).take_while(|(a, b)| a == b).count();
    let removed = before.len() - start - end;
    let inserted = after.get(start..after.len() - end).unwrap_or_default();
    if removed == 0 && inserted.is_empty() {
        return Vec::new();
    }
    // Counted in numbers, of which a token has five.
    let count = |tokens: usize| u32::try_from(5 * tokens).unwrap_or(u32::MAX);
    vec![SemanticTokensEdit { start: count(start), delete_count: count(removed), data: Some(inserted.to_vec()) }]
}

/// The tokens of a document, or of a range of it.
pub fn of(places: &Places<'_>, range: Option<Range>) -> Option<Vec<SemanticToken>> {
    let wanted = match range {
        Some(range) => Some(places.span_of(OWN, range)?),
        None => None,
    };
    let mut found: Vec<(Span, TokenKind)> = tokens(places.deck, OWN);
    if let Some(wanted) = wanted {
        found.retain(|(span, _)| span.end > wanted.start && span.start < wanted.end);
    }
    let mut last = Position::default();
    let mut list = Vec::with_capacity(found.len());
    for (span, kind) in found {
        let range = places.span(OWN, span)?;
        // A token lies on one line; one that did not could not be said.
        if range.start.line != range.end.line || range.start < last {
            continue;
        }
        let delta_line = range.start.line - last.line;
        let from = if delta_line == 0 { last.character } else { 0 };
        list.push(SemanticToken {
            delta_line,
            delta_start: range.start.character - from,
            length: range.end.character - range.start.character,
            token_type: number(kind),
            token_modifiers_bitset: u32::from(kind == TokenKind::Definition),
        });
        last = range.start;
    }
    Some(list)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn tokens(starts: &[u32]) -> Vec<SemanticToken> {
        let token = |start: &u32| SemanticToken {
            delta_line: 0,
            delta_start: *start,
            length: 1,
            token_type: 0,
            token_modifiers_bitset: 0,
        };
        starts.iter().map(token).collect()
    }

    /// Carries out an edit as a client does, on numbers.
    fn carried_out(before: &[SemanticToken], edits: &[SemanticTokensEdit]) -> Vec<SemanticToken> {
        let mut list = before.to_vec();
        for edit in edits {
            let (start, removed) = (edit.start as usize / 5, edit.delete_count as usize / 5);
            list.splice(start..start + removed, edit.data.clone().unwrap_or_default());
        }
        list
    }

    #[test]
    fn a_difference_carried_out_gives_what_is_there_now() {
        for (before, after) in [
            (&[][..], &[][..]),
            (&[], &[1, 2]),
            (&[1, 2], &[]),
            (&[1, 2, 3], &[1, 9, 3]),
            (&[1, 1, 1], &[1, 1]),
            (&[1, 2], &[1, 2, 1, 2]),
        ] {
            let (before, after) = (tokens(before), tokens(after));
            assert_eq!(carried_out(&before, &difference(&before, &after)), after);
        }
    }
}
