//! Text laid out to a width.

use std::io::{self, Write};
use textwrap::{Options, WordSplitter, WrapAlgorithm};

/// Narrowest and widest text that is laid out: below the first nothing reads well, beyond the second neither.
pub const NARROWEST: usize = 40;
/// See [`NARROWEST`].
pub const WIDEST: usize = 100;

/// Writes a paragraph, every line behind `indent` spaces and at most `width` columns wide (a single longer word stays
/// whole). Further lines are indented by `hanging` more.
///
/// # Errors
/// Those of `out`.
pub fn paragraph(out: &mut dyn Write, text: &str, indent: usize, hanging: usize, width: usize) -> io::Result<()> {
    for line in lines(text, indent, hanging, width) {
        writeln!(out, "{line}")?;
    }
    Ok(())
}

/// The lines of such a paragraph.
pub fn lines(text: &str, indent: usize, hanging: usize, width: usize) -> Vec<String> {
    let (first, further) = (" ".repeat(indent), " ".repeat(indent + hanging));
    let options = Options::new(width.clamp(NARROWEST, WIDEST))
        .initial_indent(&first)
        .subsequent_indent(&further)
        .break_words(false)
        .word_splitter(WordSplitter::NoHyphenation)
        .wrap_algorithm(WrapAlgorithm::FirstFit);
    // A number and its unit stay together.
    let bound = keep_quantities_whole(text);
    textwrap::wrap(&bound, options).into_iter().map(|line| line.replace(BOND, " ")).collect()
}

/// The text with a full stop, where it does not end a sentence yet.
pub fn sentence(text: &str) -> String {
    if text.is_empty() || text.ends_with(['.', '!', '?', ':']) { text.to_string() } else { format!("{text}.") }
}

/// Stands for a space at which no line may end. A private character of the width of a space.
const BOND: char = '\u{e000}';

/// Binds a number to the word behind it: `28.6 K` is never cut in two.
fn keep_quantities_whole(text: &str) -> String {
    let mut bound = String::with_capacity(text.len());
    let mut word_is_number = false;
    let mut word_start = true;
    for character in text.chars() {
        if character == ' ' && word_is_number {
            bound.push(BOND);
        } else {
            bound.push(if character == BOND { ' ' } else { character });
        }
        if character == ' ' {
            (word_start, word_is_number) = (true, false);
        } else if word_start {
            (word_start, word_is_number) = (false, character.is_ascii_digit() || character == '-');
        } else {
            word_is_number &= character.is_ascii_digit() || matches!(character, '.' | 'e' | '-' | '+');
        }
    }
    bound
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn lines_keep_to_the_width_and_numbers_to_their_units() {
        let text = "the lid reaches 93 degC, 53 K above the reference: the linear law gives 31 % too little buoyancy";
        for width in 40..100 {
            let lines = lines(text, 4, 2, width);
            assert_eq!(lines.iter().map(|line| line.trim()).collect::<Vec<_>>().join(" "), text);
            for line in &lines {
                assert!(unicode_width::UnicodeWidthStr::width(line.as_str()) <= width, "{line}");
                assert!(line.starts_with("    ") && !line.trim_end().ends_with(" 53"), "{line}");
                assert!(!line.trim().starts_with("degC") && !line.trim().starts_with('%'), "{line}");
            }
        }
    }

    #[test]
    fn a_long_word_stays_whole() {
        let word = "x".repeat(200);
        assert_eq!(lines(&format!("a {word} b"), 2, 0, 80), ["  a".to_string(), format!("  {word}"), "  b".into()]);
        assert!(lines("", 4, 0, 80).concat().trim().is_empty());
    }
}
