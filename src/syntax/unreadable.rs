//! Says what is wrong with a line that the grammar cannot read, in the reader's words.

use super::parse::Rule;
use super::span::Span;
use super::tree::LineProblem;
use pest::error::{Error, InputLocation};

/// The problem of the line `body`, which starts `offset` bytes into its entry.
pub(super) fn explain(body: &str, offset: usize, error: &Error<Rule>) -> LineProblem {
    let at = match error.location {
        InputLocation::Pos(at) | InputLocation::Span((at, _)) => at,
    };
    let at = at.min(body.len());
    let rest = body.get(at..).unwrap_or("");
    let span = Span::new(offset + at, offset + body.trim_end().len().max(at));
    let (message, fix) = message(body, at, rest);
    LineProblem { span, message, check: "unreadable-line", fix }
}

fn message(body: &str, at: usize, rest: &str) -> (String, Option<(String, String)>) {
    let quotes = body.matches('"').count();
    let first = rest.chars().next();
    if quotes % 2 == 1 {
        return ("The text that a quote opens here is not closed on this line.".into(), None);
    }
    let opened = body.matches(['(', '[']).count();
    let closed = body.matches([')', ']']).count();
    if opened > closed && rest.trim().is_empty() {
        return ("A bracket is opened and not closed on this line.".into(), None);
    }
    match first {
        None => ("The line ends where a value is expected.".into(), None),
        Some('{' | '}' | ';') => (
            "Braces and semicolons have no place in a deck: one statement a line, indented below its entry.".into(),
            None,
        ),
        Some(',') if body.get(..at).is_some_and(|before| before.trim_end().ends_with(|c: char| c.is_ascii_digit())) => {
            ("A comma stands between the values of a list; the decimal mark is a point.".into(), None)
        }
        Some('=') => {
            ("Only a definition takes `=`: a name at the start of the line, then `=`, then a value.".into(), None)
        }
        Some(other) => (format!("This cannot be read from `{}` on.", shown(rest, other)), None),
    }
}

/// The first word of `rest`, short enough for a message.
fn shown(rest: &str, first: char) -> String {
    let word: String = rest.chars().take_while(|c| !c.is_whitespace()).take(24).collect();
    if word.is_empty() { first.escape_default().to_string() } else { word }
}
