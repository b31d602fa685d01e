//! Signature help: what the word before the cursor takes, and which part of it stands at the cursor.
//!
//! ```text
//! exchanges 6 W/m^2/K with $0     exchanges COEFFICIENT [with TEMPERATURE]   the second part
//! a = max(1 m, $0                 max(a, b, ..)                              the second argument
//! ```

use super::half_line::{self, Piece, Typing};
use super::spot::spot;
use super::wanted::open_slot;
use crate::syntax::FileId;
use crate::vocabulary::functions::{FUNCTIONS, REGION_NUMBERS};
use crate::vocabulary::print::{shape, takes};
use crate::vocabulary::{self, Slot};
use crate::workspace::Deck;
use std::ops::Range;

/// What a word takes.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Signature {
    /// All of it on one line.
    pub label: String,
    /// Each part: its bytes in the label, and what stands there.
    pub parameters: Vec<(Range<usize>, String)>,
    /// The part at the cursor; as many as there are parts where none is.
    pub active: usize,
    /// What the word says.
    pub documentation: String,
}

/// What the word or function that the cursor stands behind takes.
pub fn signature(deck: &Deck, file: FileId, offset: usize) -> Option<Signature> {
    let spot = spot(deck, file, offset)?;
    let half = half_line::read(spot.before().0);
    if half.typing == Typing::Comment {
        return None;
    }
    if let Some(call) = of_call(&half.pieces) {
        return Some(call);
    }
    let (first, rest) = half.pieces.split_first()?;
    let Piece::Word(word) = first else { return None };
    let (word, slots, description): (&str, &'static [Slot], &str) = if half.indented {
        let row = vocabulary::statement_row(spot.row?.kind, word)?;
        (row.word, row.slots, row.description)
    } else {
        let row = vocabulary::entry_row(word)?;
        (row.word, row.slots, row.description)
    };
    let mut label = word.to_string();
    let mut parameters = Vec::new();
    for slot in slots.chunks(1) {
        let from = label.len() + 1;
        label.push_str(&shape("", slot));
        parameters.push((from..label.len(), slot.first().map_or_else(String::new, takes)));
    }
    let (open, _) = open_slot(slots, rest);
    let active = open.and_then(|open| slots.iter().position(|slot| std::ptr::eq(slot, open))).unwrap_or(slots.len());
    Some(Signature { label, parameters, active, documentation: description.to_string() })
}

/// The innermost call whose bracket is open.
fn of_call(pieces: &[Piece<'_>]) -> Option<Signature> {
    let mut open: Vec<(Option<&str>, usize)> = Vec::new();
    for (index, piece) in pieces.iter().enumerate() {
        match piece {
            Piece::Mark('(' | '[') => {
                let before = index.checked_sub(1).and_then(|before| pieces.get(before));
                let name = match before {
                    Some(Piece::Word(name)) if *piece == Piece::Mark('(') => Some(*name),
                    _ => None,
                };
                open.push((name, 0));
            }
            Piece::Mark(')' | ']') => {
                open.pop();
            }
            Piece::Mark(',') => {
                if let Some((_, count)) = open.last_mut() {
                    *count += 1;
                }
            }
            _ => {}
        }
    }
    let (name, count) = *open.last()?;
    let name = name?;
    if let Some(number) = REGION_NUMBERS.iter().find(|number| number.name == name) {
        let label = format!("{name}(REGION)");
        let parameters = vec![(name.len() + 1..label.len() - 1, "the name of a region".to_string())];
        return Some(Signature { label, parameters, active: count, documentation: number.description.to_string() });
    }
    let function = FUNCTIONS.iter().find(|function| function.name == name)?;
    let is_many = function.arguments.1 > 1;
    let inside = if is_many { "a, b, .." } else { "x" };
    let label = format!("{name}({inside})");
    let from = name.len() + 1;
    let parameters = if is_many {
        vec![
            (from..from + 1, "a value".to_string()),
            (from + 3..from + 4, "a value of the same dimension".to_string()),
            (from + 6..from + 8, "more of them".to_string()),
        ]
    } else {
        vec![(from..from + 1, "a value".to_string())]
    };
    let active = count.min(parameters.len().saturating_sub(usize::from(is_many)));
    Some(Signature { label, parameters, active, documentation: function.description.to_string() })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ide::testing::{DECK, at};

    fn shown(marked: &str) -> Option<(String, Option<String>)> {
        let (deck, offset) = at(marked);
        let signature = signature(&deck, DECK, offset)?;
        let active =
            signature.parameters.get(signature.active).map(|(range, _)| signature.label[range.clone()].to_string());
        Some((signature.label, active))
    }

    #[test]
    fn of_a_statement() {
        let (label, active) = shown("boundary b of r\n    exchanges 6 W/m^2/K with $0\n").unwrap();
        assert_eq!(
            (label.as_str(), active.as_deref()),
            ("exchanges COEFFICIENT with TEMPERATURE", Some("with TEMPERATURE"))
        );
        let (_, active) = shown("boundary b of r\n    exchanges $0\n").unwrap();
        assert_eq!(active.as_deref(), Some("COEFFICIENT"));
        let (label, active) = shown("region r\n    box 1 m by 2 m by $0").unwrap();
        assert_eq!((label.as_str(), active.as_deref()), ("box WIDTH by DEPTH [by HEIGHT]", Some("[by HEIGHT]")));
    }

    #[test]
    fn of_a_head_and_a_call() {
        assert_eq!(shown("boundary b of $0").unwrap().1.as_deref(), Some("of REGION"));
        assert_eq!(shown("given\n    a = max(1 m, $0").unwrap(), ("max(a, b, ..)".into(), Some("b".into())));
        assert_eq!(shown("given\n    a = sqrt($0").unwrap().1.as_deref(), Some("x"));
        assert_eq!(shown("require\n    Ra($0").unwrap().1.as_deref(), Some("REGION"));
        assert_eq!(shown("given\n    a = (1 m) + $0"), None);
        assert_eq!(shown("run # ste$0"), None);
    }
}
