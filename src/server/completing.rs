//! Completion: what the language offers, and the paths of includes, which only the disk knows.

use super::handlers::OWN;
use super::places::Places;
use super::reading::markdown;
use crate::ide;
use crate::ide::completion::{Completion, CompletionKind};
use crate::syntax::Span;
use crate::workspace::includes::normalised;
use crate::workspace::practice::project_folder;
use std::path::Path;
use tower_lsp::lsp_types::*;

/// Most paths that are offered.
const PATHS: usize = 200;

/// Everything that may stand at the cursor.
pub fn complete(places: &Places<'_>, position: Position, with_snippets: bool) -> Option<CompletionList> {
    let offset = places.offset(OWN, position)?;
    let items = match half_path(places, offset) {
        Some((written, span)) => paths(places, written, span),
        None => ide::completion::complete(places.deck, OWN, offset)
            .into_iter()
            .filter_map(|completion| item(places, completion, with_snippets))
            .collect(),
    };
    Some(CompletionList { is_incomplete: false, items })
}

fn item(places: &Places<'_>, completion: Completion, with_snippets: bool) -> Option<CompletionItem> {
    let is_snippet = with_snippets && completion.insert.contains('$');
    let new_text = if is_snippet { completion.insert } else { without_stops(&completion.insert) };
    Some(CompletionItem {
        kind: Some(kind(completion.kind)),
        detail: (!completion.detail.is_empty()).then_some(completion.detail),
        documentation: markdown(completion.documentation).map(Documentation::MarkupContent),
        sort_text: Some(completion.sort),
        // An editor filters by what stands where the answer will.
        filter_text: Some(completion.label.clone()),
        insert_text_format: Some(if is_snippet { InsertTextFormat::SNIPPET } else { InsertTextFormat::PLAIN_TEXT }),
        text_edit: Some(CompletionTextEdit::Edit(TextEdit { range: places.span(OWN, completion.replace)?, new_text })),
        label: completion.label,
        ..CompletionItem::default()
    })
}

fn kind(kind: CompletionKind) -> CompletionItemKind {
    match kind {
        CompletionKind::Entry => CompletionItemKind::MODULE,
        CompletionKind::Statement => CompletionItemKind::PROPERTY,
        CompletionKind::Link => CompletionItemKind::KEYWORD,
        CompletionKind::Unit => CompletionItemKind::UNIT,
        CompletionKind::Value => CompletionItemKind::VARIABLE,
        CompletionKind::Member => CompletionItemKind::FIELD,
        CompletionKind::Entity => CompletionItemKind::CLASS,
        CompletionKind::Substance => CompletionItemKind::STRUCT,
        CompletionKind::Choice => CompletionItemKind::ENUM_MEMBER,
        CompletionKind::Function => CompletionItemKind::FUNCTION,
        CompletionKind::Constant => CompletionItemKind::CONSTANT,
        CompletionKind::Check => CompletionItemKind::EVENT,
    }
}

/// A snippet as plain text: `held at ${1:20 degC}$0` becomes `held at 20 degC`.
fn without_stops(snippet: &str) -> String {
    let mut plain = String::with_capacity(snippet.len());
    let mut characters = snippet.chars().peekable();
    let mut open = 0_usize;
    while let Some(character) = characters.next() {
        match character {
            '\\' => plain.extend(characters.next()),
            '$' => {
                let braced = characters.next_if_eq(&'{').is_some();
                while characters.next_if(char::is_ascii_digit).is_some() {}
                if braced {
                    open += 1;
                    // `${1}` has no text.
                    characters.next_if_eq(&':');
                }
            }
            '}' if open > 0 => open -= 1,
            other => plain.push(other),
        }
    }
    plain
}

/// The part of an include's path that stands before the cursor, and its place, where the cursor is in one.
fn half_path<'a>(places: &Places<'a>, offset: usize) -> Option<(&'a str, Span)> {
    let text = &places.deck.file(OWN)?.text;
    let before = text.get(..offset)?;
    let start = before.rfind('\n').map_or(0, |at| at + 1);
    let line = before.get(start..)?;
    let written = line.trim_start_matches('\u{feff}').strip_prefix("include")?.trim_start().strip_prefix('"')?;
    (!written.contains('"')).then_some((written, Span::new(offset - written.len(), offset)))
}

/// The decks and folders that a path may go on to.
fn paths(places: &Places<'_>, written: &str, span: Span) -> Vec<CompletionItem> {
    let Some(own) = places.deck.file(OWN) else { return Vec::new() };
    let folder = own.path.parent().unwrap_or(Path::new(""));
    let (inner, begun) = written.rsplit_once('/').map_or(("", written), |(inner, begun)| (inner, begun));
    let within = normalised(&folder.join(inner));
    let root =
        project_folder(&own.path, places.world.folders.iter().find(|it| own.path.starts_with(it)).map(|it| &**it));
    if !within.starts_with(&root) {
        return Vec::new();
    }
    let Ok(entries) = std::fs::read_dir(&within) else { return Vec::new() };
    let mut names: Vec<String> = entries
        .take(20 * PATHS)
        .flatten()
        .filter_map(|entry| {
            let name = entry.file_name().into_string().ok()?;
            let is_folder = entry.path().is_dir();
            let is_deck = name.ends_with(".buoy") && entry.path() != own.path;
            let is_wanted = (is_folder || is_deck) && !name.starts_with('.') && name.starts_with(begun);
            is_wanted.then(|| if is_folder { format!("{name}/") } else { name })
        })
        .collect();
    names.sort();
    names.truncate(PATHS);
    let begun_span = Span::new(span.end - begun.len(), span.end);
    names
        .into_iter()
        .filter_map(|name| {
            let is_folder = name.ends_with('/');
            Some(CompletionItem {
                kind: Some(if is_folder { CompletionItemKind::FOLDER } else { CompletionItemKind::FILE }),
                text_edit: Some(CompletionTextEdit::Edit(TextEdit {
                    range: places.span(OWN, begun_span)?,
                    new_text: name.clone(),
                })),
                label: name,
                ..CompletionItem::default()
            })
        })
        .collect()
}

#[cfg(test)]
mod tests {
    use super::without_stops;

    #[test]
    fn a_snippet_without_its_stops_is_text() {
        assert_eq!(without_stops("held at ${1:20 degC}$0"), "held at 20 degC");
        assert_eq!(without_stops("box $1 by ${2:1 m} by ${3}\n    \\$5 \\}"), "box  by 1 m by \n    $5 }");
    }
}
