//! The layout of a deck: one way to set every line, for `align` and for the editor.
//!
//! ```text
//! given                                     given
//!  height=1.1 m   "inside height"               height   =1.1 m            "inside height"
//!  T_floor = 8 degC                  →          T_floor  = 8 degC
//!
//! fluid  cabinet_air                        fluid cabinet_air
//!   substance air                               substance      air
//!   reference  25 degC  at 0.79 bar             reference      25 degC at 0.79 bar
//! ```
//!
//! Only white space changes, and only where it has no meaning: none is put between two tokens that touch, and none taken
//! away between two that do not. A line that cannot be read stays as it is, and so does what stands before the first
//! entry.

use super::change::apply;
use super::parse::parse;
use super::span::Span;
use super::tree::{Content, Entry, ExpressionKind, Line, Phrase, Tree};
use unicode_width::UnicodeWidthStr;

/// How far statements are indented.
const INDENT: usize = 4;
/// Least width of what stands before the values of an entry.
const KEY_WIDTH: usize = 15;
/// Least width of the values before their descriptions.
const VALUE_WIDTH: usize = 17;
/// Least white space between two columns.
const BETWEEN: usize = 2;

/// The text laid out.
pub fn laid_out(text: &str) -> String {
    let changes = changes(text, &parse(text));
    apply(text, changes.iter().map(|(span, new)| (*span, new.as_str())))
}

/// The changes that lay a text out, in order, none overlapping another: each within one line.
pub fn changes(text: &str, tree: &Tree) -> Vec<(Span, String)> {
    let line_end = if text.split_once('\n').is_some_and(|(first, _)| first.ends_with('\r')) { "\r\n" } else { "\n" };
    let mut changes = Vec::new();
    for (index, placed) in tree.entries.iter().enumerate() {
        let next = tree.entries.get(index + 1).map(|next| &*next.entry);
        for (span, new) in entry_changes(&placed.entry, next, line_end) {
            changes.push((span.shifted(placed.start), new));
        }
    }
    changes
}

/// The changes of one entry; `next` is the entry behind it.
fn entry_changes(entry: &Entry, next: Option<&Entry>, line_end: &str) -> Vec<(Span, String)> {
    if entry.head.is_none() {
        return Vec::new();
    }
    let columns = Columns::of(entry);
    let last_written = entry.lines.iter().rposition(|line| !is_empty(entry, line)).unwrap_or(0);
    let mut changes = Vec::new();
    let mut after_empty = false;
    for (index, line) in entry.lines.iter().enumerate() {
        let whole = line.span.of(&entry.text);
        let is_dropped = is_empty(entry, line) && (after_empty || (next.is_none() && index > last_written));
        after_empty = is_empty(entry, line);
        if is_dropped {
            changes.push((line.span, String::new()));
            continue;
        }
        let body = whole.trim_end_matches('\n').trim_end_matches('\r');
        let mut new = laid_line(entry, index, line, &columns).unwrap_or_else(|| body.to_string());
        let mut end = whole.get(body.len()..).unwrap_or("").to_string();
        if end.is_empty() {
            end = line_end.to_string();
        }
        new.push_str(&end);
        let is_last = index + 1 == entry.lines.len();
        if is_last && !is_empty(entry, line) && next.is_some_and(|next| stands_apart(entry, next)) {
            new.push_str(line_end);
        }
        if new != whole {
            changes.push(smallest(line.span, whole, new));
        }
    }
    changes
}

/// Whether an empty line stands between two entries: it does where one of them has statements.
fn stands_apart(entry: &Entry, next: &Entry) -> bool {
    let has_statements = |entry: &Entry| entry.statements().any(|line| !is_empty(entry, line));
    next.head.is_some() && (has_statements(entry) || has_statements(next))
}

/// Whether a line holds nothing at all; a byte-order mark is something.
fn is_empty(entry: &Entry, line: &Line) -> bool {
    line.content == Content::Blank
        && line.comment.is_none()
        && line.problem.is_none()
        && !line.span.of(&entry.text).starts_with('\u{feff}')
}

/// The change without the text that stays at its two ends, so that a cursor there is not moved.
fn smallest(span: Span, old: &str, new: String) -> (Span, String) {
    let before: usize = old.chars().zip(new.chars()).take_while(|(a, b)| a == b).map(|(a, _)| a.len_utf8()).sum();
    let (old_rest, new_rest) = (old.get(before..).unwrap_or(""), new.get(before..).unwrap_or(""));
    let behind: usize =
        old_rest.chars().rev().zip(new_rest.chars().rev()).take_while(|(a, b)| a == b).map(|(a, _)| a.len_utf8()).sum();
    let kept = new_rest.get(..new_rest.len() - behind).unwrap_or("").to_string();
    (Span::new(span.start + before, span.end - behind), kept)
}

/// Where the parts of an entry's lines stand, counted from the indentation.
#[derive(Debug, Default)]
struct Columns {
    /// Values of statements.
    value: usize,
    /// The `=` of definitions.
    equals: usize,
    /// Width of values before descriptions.
    described: usize,
    /// Widths of the cells of table rows.
    cells: Vec<usize>,
    /// Comments at the ends of lines.
    comment: usize,
}

impl Columns {
    fn of(entry: &Entry) -> Columns {
        let mut columns = Columns { value: KEY_WIDTH, described: VALUE_WIDTH, ..Columns::default() };
        let mut names = 0;
        let mut has_statements = false;
        let readable = || entry.statements().filter(|line| line.problem.is_none());
        for line in readable() {
            match &line.content {
                Content::Phrase(phrase) => {
                    if let Parts::Aligned(key, _) = parts(entry, phrase) {
                        has_statements = true;
                        columns.value = columns.value.max(key.width() + BETWEEN);
                    }
                }
                Content::Definition(definition) => {
                    names = names.max(definition.name.text.width());
                    if let (Some(value), Some(_)) = (&definition.value, &definition.description) {
                        let width = gathered(value.span.of(&entry.text)).width();
                        columns.described = columns.described.max(width + BETWEEN);
                    }
                }
                Content::Row(row) => {
                    for (index, cell) in row.cells.iter().enumerate() {
                        let width = gathered(cell.span.of(&entry.text)).width();
                        match columns.cells.get_mut(index) {
                            Some(widest) => *widest = width.max(*widest),
                            None => columns.cells.push(width),
                        }
                    }
                }
                Content::Blank | Content::Requirement(_) => {}
            }
        }
        // Beside statements, values of definitions stand in the column of theirs.
        if has_statements {
            columns.value = columns.value.max(names + BETWEEN + 2);
            columns.equals = columns.value - 2;
        } else {
            columns.equals = names + BETWEEN;
        }
        let widths = readable().filter(|line| line.comment.is_some()).filter_map(|line| content(entry, line, &columns));
        columns.comment = widths.map(|content| content.width() + BETWEEN).max().unwrap_or(0);
        columns
    }
}

/// A line laid out, without its end; `None` for one that stays as it is.
fn laid_line(entry: &Entry, index: usize, line: &Line, columns: &Columns) -> Option<String> {
    if line.problem.is_some() {
        return None;
    }
    let whole = line.span.of(&entry.text);
    let comment = line.comment.map(|span| span.of(&entry.text).trim_end());
    let is_head = entry.head == Some(index);
    // A byte-order mark stays where it is.
    let unmarked = whole.trim_start_matches('\u{feff}');
    let mark = whole.get(..whole.len() - unmarked.len()).unwrap_or("");
    if line.content == Content::Blank {
        // A comment in the first column stays there: it may describe the entry below it.
        let indent = if unmarked.starts_with('#') { 0 } else { INDENT };
        return Some(match comment {
            Some(comment) => format!("{mark}{}{comment}", " ".repeat(indent)),
            None => mark.to_string(),
        });
    }
    let (mut laid, comment_column) = if is_head {
        let Content::Phrase(phrase) = &line.content else { return None };
        (format!("{mark}{}", gathered(phrase.span.of(&entry.text))), 0)
    } else {
        (format!("{mark}{}{}", " ".repeat(INDENT), content(entry, line, columns)?), INDENT + columns.comment)
    };
    if let Some(comment) = comment {
        let width = laid.trim_start_matches('\u{feff}').width();
        laid.push_str(&" ".repeat(comment_column.saturating_sub(width).max(BETWEEN)));
        laid.push_str(comment);
    }
    Some(laid)
}

/// What stands on a statement's line, in its columns, without indentation and comment.
fn content(entry: &Entry, line: &Line, columns: &Columns) -> Option<String> {
    let text = &*entry.text;
    match &line.content {
        Content::Blank => None,
        Content::Phrase(phrase) => Some(match parts(entry, phrase) {
            Parts::Aligned(key, value) => format!("{}{value}", padded(&key, columns.value)),
            Parts::Sentence(all) => all,
        }),
        Content::Definition(definition) => {
            let name = padded(&definition.name.text, columns.equals);
            let value_at = definition.value.as_ref().map(|value| value.span);
            let described_at = definition.description.as_ref().map(|description| description.span);
            let behind = value_at.or(described_at).map_or(definition.span.end, |span| span.start);
            // `=` and whether white space stands behind it; none is added where a value touches it.
            let between = Span::new(definition.name.span.end, behind).of(text);
            let is_touching = !between.ends_with(is_gap) && value_at.or(described_at).is_some();
            let mut line = format!("{name}={}", if is_touching { "" } else { " " });
            if let Some(span) = value_at {
                let value = gathered(span.of(text));
                let touches = described_at.is_some_and(|description| description.start == span.end);
                line.push_str(&match described_at {
                    Some(_) if !touches => padded(&value, columns.described),
                    _ => value,
                });
            }
            if let Some(span) = described_at {
                line.push_str(span.of(text));
            }
            Some(line.trim_end().to_string())
        }
        Content::Row(row) => {
            let cells = row.cells.iter().enumerate().map(|(index, cell)| {
                let width = columns.cells.get(index).copied().unwrap_or(0);
                padded(&gathered(cell.span.of(text)), width)
            });
            Some(format!("| {} |", cells.collect::<Vec<_>>().join(" | ")))
        }
        Content::Requirement(requirement) => Some(gathered(requirement.span.of(text))),
    }
}

/// A statement in its parts.
enum Parts {
    /// What stands before its first value, and the rest.
    Aligned(String, String),
    /// One without a value, or one that reads on: `because "..." until 2027-03-01`.
    Sentence(String),
}

fn parts(entry: &Entry, phrase: &Phrase) -> Parts {
    let text = &*entry.text;
    let first = phrase.arguments.first().or_else(|| phrase.links.first().and_then(|part| part.arguments.first()));
    let all = || Parts::Sentence(gathered(phrase.span.of(text)));
    let Some(first) = first else { return all() };
    let reads_on = super::links::is_link(&phrase.word.text) && matches!(first.kind, ExpressionKind::Text(_));
    let key = Span::new(phrase.span.start, first.span.start).of(text);
    // Where a value touches the word before it there is no place to put white space.
    if reads_on || !key.ends_with(is_gap) {
        return all();
    }
    Parts::Aligned(
        gathered(key.trim_end_matches(is_gap)),
        gathered(Span::new(first.span.start, phrase.span.end).of(text)),
    )
}

fn padded(text: &str, width: usize) -> String {
    format!("{text}{}", " ".repeat(width.saturating_sub(text.width())))
}

/// What the grammar takes as white space within a line.
fn is_gap(c: char) -> bool {
    matches!(c, ' ' | '\t' | '\u{a0}' | '\u{2009}' | '\u{202f}')
}

/// The text with every run of white space outside quotes as one space.
fn gathered(text: &str) -> String {
    let mut gathered = String::with_capacity(text.len());
    let mut quoted = false;
    let mut in_gap = false;
    for c in text.chars() {
        quoted ^= c == '"';
        if !quoted && c != '"' && is_gap(c) {
            if !in_gap {
                gathered.push(' ');
            }
            in_gap = true;
            continue;
        }
        in_gap = false;
        gathered.push(c);
    }
    gathered
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn columns_by_entry() {
        assert_eq!(
            laid_out("fluid  f\n  substance air\n  kinematic-viscosity   1e-5 m^2/s\nrun\n\tsteady\n"),
            "fluid f\n    substance            air\n    kinematic-viscosity  1e-5 m^2/s\n\nrun\n    steady\n"
        );
    }

    #[test]
    fn a_change_is_as_small_as_can_be() {
        let text = "run\n    steady \n";
        assert_eq!(changes(text, &parse(text)), [(Span::new(14, 15), String::new())]);
    }

    #[test]
    fn white_space_in_quotes_stays() {
        assert_eq!(gathered("a  \"b  c\"   d"), "a \"b  c\" d");
    }
}
