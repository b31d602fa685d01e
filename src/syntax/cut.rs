//! Cuts a text into entries and an entry into lines, before any grammar sees it.
//!
//! An entry starts at a line whose first column holds neither white space nor `#`; the comment lines
//! directly above that line belong to it.

use super::span::Span;

/// The byte ranges of the entries of `text`. They follow one another without a gap and cover the text.
pub fn entries(text: &str) -> Vec<Span> {
    let mut starts: Vec<usize> = Vec::new();
    // Start of the comment lines that the line being looked at follows directly.
    let mut comments: Option<usize> = None;
    for line in lines(text) {
        match line.of(text).trim_start_matches('\u{feff}').bytes().next() {
            Some(b'#') => comments = comments.or(Some(line.start)),
            Some(b' ' | b'\t' | b'\r' | b'\n') | None => comments = None,
            Some(_) => {
                starts.push(comments.take().unwrap_or(line.start));
            }
        }
    }
    match starts.first() {
        Some(0) => {}
        // A text of nothing at all still has one entry, so that a place in it can be named.
        _ => starts.insert(0, 0),
    }
    let ends = starts.iter().skip(1).copied().chain([text.len()]);
    starts.iter().zip(ends).map(|(&start, end)| Span::new(start, end)).collect()
}

/// The byte ranges of the lines of `text`, each with its line end. LF and CRLF end a line.
pub fn lines(text: &str) -> impl Iterator<Item = Span> + '_ {
    let mut start = 0;
    text.split_inclusive('\n').map(move |line| {
        let span = Span::new(start, start + line.len());
        start = span.end;
        span
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    fn cut(text: &str) -> Vec<&str> {
        entries(text).into_iter().map(|span| span.of(text)).collect()
    }

    #[test]
    fn an_entry_takes_the_comments_directly_above_it() {
        assert_eq!(
            cut("# deck\n\n# walls\nregion a\n    box 1 m\n# gas\nfluid b\n"),
            ["# deck\n\n", "# walls\nregion a\n    box 1 m\n", "# gas\nfluid b\n"]
        );
    }

    #[test]
    fn every_byte_is_in_one_entry() {
        for text in ["", "\n", "  stray\n", "a", "\u{feff}case \"x\"\r\n  gravity none\r\n", "#\n#\na\n#"] {
            assert_eq!(cut(text).concat(), text);
        }
    }
}
