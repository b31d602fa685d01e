//! A line up to the cursor, read as far as it goes: what stands there, and what is just being typed.
//!
//! ```text
//! heated by 180 k$0        before: heated, by, 180            being typed: the unit `k`
//! exchanges 6 W/m^2/K w$0  before: exchanges, 6 W/m^2/K       being typed: the word `w`
//! ```
//!
//! The tree holds whole lines; a line that is being written is whole only now and then.

use crate::syntax::links::is_link;

/// A part of the line.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Piece<'t> {
    /// A word, name or link.
    Word(&'t str),
    /// A number without a unit.
    Number(&'t str),
    /// A number and its unit.
    Quantity(&'t str, &'t str),
    /// A text in quotes, without them.
    Text(&'t str),
    /// Any other character.
    Mark(char),
}

/// What is being typed at the cursor.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Typing<'t> {
    /// The start of a word; empty where nothing of it stands yet.
    Word(&'t str),
    /// The unit of the number before; `glued` where no white space stands between them.
    Unit {
        /// What stands of it.
        start: &'t str,
        /// Whether a space is missing before it.
        glued: bool,
    },
    /// A text whose quote is open; what stands in it.
    Text(&'t str),
    /// A comment.
    Comment,
}

/// The line before the cursor.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct HalfLine<'t> {
    /// Whether it starts with white space, and so is no head.
    pub indented: bool,
    /// What stands before the part that is being typed.
    pub pieces: Vec<Piece<'t>>,
    /// What is being typed.
    pub typing: Typing<'t>,
}

/// Reads the text of a line before the cursor.
pub fn read(before: &str) -> HalfLine<'_> {
    let indented = before.starts_with(char::is_whitespace);
    let mut pieces: Vec<Piece<'_>> = Vec::new();
    let done = |pieces, typing| HalfLine { indented, pieces, typing };
    let mut rest = before;
    // Whether white space stands before `rest`.
    let mut spaced = true;
    while let Some(first) = rest.chars().next() {
        if first.is_whitespace() {
            rest = rest.trim_start();
            spaced = true;
            continue;
        }
        if first == '#' {
            return done(pieces, Typing::Comment);
        }
        if first == '"' {
            let inside = rest.get(1..).unwrap_or("");
            let Some((text, after)) = inside.split_once('"') else { return done(pieces, Typing::Text(inside)) };
            pieces.push(Piece::Text(text));
            (rest, spaced) = (after, false);
            continue;
        }
        if let Some(Piece::Number(number)) = pieces.last().copied()
            && let Some((unit, after)) = unit_at(rest)
        {
            if after.is_empty() {
                return done(pieces, Typing::Unit { start: unit, glued: !spaced });
            }
            pieces.pop();
            pieces.push(Piece::Quantity(number, unit));
            (rest, spaced) = (after, false);
            continue;
        }
        let length = number_length(rest).unwrap_or(0);
        if length > 0 {
            let (number, after) = rest.split_at(length);
            pieces.push(Piece::Number(number));
            (rest, spaced) = (after, false);
            continue;
        }
        if is_start(first) {
            let (word, after) = rest.split_at(word_length(rest));
            if after.is_empty() {
                return done(pieces, Typing::Word(word));
            }
            pieces.push(Piece::Word(word));
            (rest, spaced) = (after, false);
            continue;
        }
        pieces.push(Piece::Mark(first));
        rest = rest.get(first.len_utf8()..).unwrap_or("");
        spaced = false;
    }
    let typing = match pieces.last() {
        Some(Piece::Number(_)) => Typing::Unit { start: "", glued: !spaced },
        // Behind a word without white space nothing else can start.
        _ => Typing::Word(""),
    };
    done(pieces, typing)
}

/// The unit at the start of a text, and what follows it. A link is none, and neither is a word that settles a kind.
fn unit_at(text: &str) -> Option<(&str, &str)> {
    let starts = text.starts_with("1/") || text.chars().next().is_some_and(|c| is_start(c) || "%‰°(".contains(c));
    if !starts {
        return None;
    }
    let end = text
        .char_indices()
        .find(|(_, c)| !(is_continue(*c) || "%‰°./*·^()-⁻²³¹⁰⁴⁵⁶⁷⁸⁹".contains(*c)))
        .map_or(text.len(), |(at, _)| at);
    let (unit, after) = text.split_at(end);
    // `30 degC .. 80 degC`, `(0.1 m/s, 0 m/s)` and `[1 m]`: brackets and dots that the unit did not open end it.
    let unit_end = unit.find("..").unwrap_or(unit.len());
    let unit_end = unit_end.min(closing_beyond(unit).unwrap_or(unit.len()));
    let (unit, _) = unit.split_at(unit_end);
    let word = unit.split(|c: char| !is_continue(c)).next().unwrap_or("");
    let is_word = matches!(word, "difference" | "absolute") || (is_link(word) && word != "in" && unit == word);
    (!is_word && !unit.is_empty()).then(|| (unit, text.get(unit_end..).unwrap_or(after)))
}

/// Where a bracket closes that the text did not open.
fn closing_beyond(text: &str) -> Option<usize> {
    let mut depth = 0_usize;
    for (at, c) in text.char_indices() {
        match c {
            '(' => depth += 1,
            ')' if depth == 0 => return Some(at),
            ')' => depth -= 1,
            _ => {}
        }
    }
    None
}

/// The length of the number at the start of a text, as the grammar has numbers.
fn number_length(text: &str) -> Option<usize> {
    let digits = |from: usize| text.bytes().skip(from).take_while(u8::is_ascii_digit).count();
    let byte = |at: usize| text.as_bytes().get(at).copied();
    let mut end = digits(0);
    if byte(end) == Some(b'.') && digits(end + 1) > 0 {
        end += 1 + digits(end + 1);
    }
    if end == 0 {
        return None;
    }
    if matches!(byte(end), Some(b'e' | b'E')) {
        let sign = usize::from(matches!(byte(end + 1), Some(b'+' | b'-')));
        let exponent = digits(end + 1 + sign);
        if exponent > 0 {
            end += 1 + sign + exponent;
        }
    }
    Some(end)
}

/// The length of the word at the start of a text; a hyphen belongs to it where a letter follows.
fn word_length(text: &str) -> usize {
    let mut characters = text.char_indices().peekable();
    while let Some((at, c)) = characters.next() {
        let next = characters.peek().map(|(_, next)| *next);
        // A hyphen at the very end is one that is being typed.
        let is_inner_hyphen = c == '-' && at > 0 && next.is_none_or(is_start);
        if !is_continue(c) && !is_inner_hyphen {
            return at;
        }
    }
    text.len()
}

fn is_start(c: char) -> bool {
    c.is_alphabetic() || c == '_'
}

fn is_continue(c: char) -> bool {
    // Combining marks belong to the letter before them.
    c.is_alphanumeric() || c == '_' || ('\u{300}'..='\u{36f}').contains(&c) || ('\u{2080}'..='\u{2089}').contains(&c)
}

#[cfg(test)]
mod tests {
    use super::Piece::{Mark, Number, Quantity, Text, Word};
    use super::*;

    #[test]
    fn pieces_and_what_is_being_typed() {
        for (before, pieces, typing) in [
            ("", vec![], Typing::Word("")),
            ("    gra", vec![], Typing::Word("gra")),
            ("    gravity ", vec![Word("gravity")], Typing::Word("")),
            (
                " heated by 180 k",
                vec![Word("heated"), Word("by"), Number("180")],
                Typing::Unit { start: "k", glued: false },
            ),
            (
                " heated by 180 ",
                vec![Word("heated"), Word("by"), Number("180")],
                Typing::Unit { start: "", glued: false },
            ),
            (" side 180k", vec![Word("side"), Number("180")], Typing::Unit { start: "k", glued: true }),
            (" a 6 W/(m^2", vec![Word("a"), Number("6")], Typing::Unit { start: "W/(m^2", glued: false }),
            (" a 6 W/m^2/K w", vec![Word("a"), Quantity("6", "W/m^2/K")], Typing::Word("w")),
            (" a 6 with ", vec![Word("a"), Number("6"), Word("with")], Typing::Word("")),
            (
                " v (0.1 m/s, 2 ",
                vec![Word("v"), Mark('('), Quantity("0.1", "m/s"), Mark(','), Number("2")],
                Typing::Unit { start: "", glued: false },
            ),
            (" (1 m) ", vec![Mark('('), Quantity("1", "m"), Mark(')')], Typing::Word("")),
            (" T over 1e1 .. ", vec![Word("T"), Word("over"), Number("1e1"), Mark('.'), Mark('.')], Typing::Word("")),
            (" density-l", vec![], Typing::Word("density-l")),
            (" density-", vec![], Typing::Word("density-")),
            (" a - b", vec![Word("a"), Mark('-')], Typing::Word("b")),
            (" cabinet.", vec![Word("cabinet"), Mark('.')], Typing::Word("")),
            ("include \"sha", vec![Word("include")], Typing::Text("sha")),
            (" purpose \"a\" # b", vec![Word("purpose"), Text("a")], Typing::Comment),
            (" T = 5 °", vec![Word("T"), Mark('='), Number("5")], Typing::Unit { start: "°", glued: false }),
            (" ΔT = Tα", vec![Word("ΔT"), Mark('=')], Typing::Word("Tα")),
        ] {
            let half = read(before);
            assert_eq!((half.pieces, half.typing), (pieces, typing), "{before}");
        }
    }
}
