//! Carries out changes of text.

use super::span::Span;

/// The text with each span replaced by its new text. Changes may come in any order. One that overlaps a change before it,
/// or does not fit the text, is left out.
pub fn apply<'c>(text: &str, changes: impl IntoIterator<Item = (Span, &'c str)>) -> String {
    let mut changes: Vec<(Span, &str)> = changes.into_iter().collect();
    // Insertions at one place keep their order.
    changes.sort_by_key(|(span, _)| (span.start, span.end));
    let mut changed = String::with_capacity(text.len());
    let mut at = 0;
    for (span, new) in changes {
        if span.start < at || span.start > span.end || text.get(span.start..span.end).is_none() {
            continue;
        }
        changed.push_str(text.get(at..span.start).unwrap_or(""));
        changed.push_str(new);
        at = span.end;
    }
    changed.push_str(text.get(at..).unwrap_or(""));
    changed
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn changes_in_any_order() {
        let changes = [(Span::new(4, 5), "E"), (Span::new(0, 1), ""), (Span::new(2, 2), "--")];
        assert_eq!(apply("abcde", changes), "b--cdE");
    }

    #[test]
    fn what_does_not_fit_is_left_out() {
        let changes =
            [(Span::new(0, 2), "x"), (Span::new(1, 3), "y"), (Span::new(9, 12), "z"), (Span::new(4, 5), "no")];
        assert_eq!(apply("abcä", changes), "xcä");
    }
}
