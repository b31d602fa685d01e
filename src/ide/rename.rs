//! Rename: a name and all its uses, in the deck and what it includes.
//!
//! ```text
//! given                                given
//!     T_fl$0oor = 8 degC                   T_ground = 8 degC
//! boundary skin of cabinet             boundary skin of cabinet
//!     held at T_floor                      held at T_ground
//! ```
//!
//! What would change the meaning of the deck is refused, in words.

use super::navigate::{Named, definitions, named, references, words_in_definitions};
use crate::syntax::links::is_link;
use crate::syntax::parse::parse_entry;
use crate::syntax::tree::Content;
use crate::syntax::{Edit, FileId, Place, Span};
use crate::vocabulary::functions::CONSTANTS;
use crate::vocabulary::{EntryKind, Takes};
use crate::workspace::Deck;

/// The bytes of the name under the cursor, and the name.
///
/// # Errors
/// Says why nothing here can be renamed.
pub fn prepare(deck: &Deck, file: FileId, offset: usize) -> Result<(Span, String), String> {
    let Some(Named { here, target }) = named(deck, file, offset) else {
        return Err(
            "No name of the deck stands here; words of the language and of the library stay as they are.".into()
        );
    };
    let Some(name) = written(deck, here) else { return Err("The file of this name is not at hand.".into()) };
    if let Some(problem) = shared_boundary(deck, target) {
        return Err(problem);
    }
    Ok((here.span, name.to_string()))
}

/// The changes that give the name under the cursor another.
///
/// # Errors
/// Says why the new name will not do.
pub fn rename(deck: &Deck, file: FileId, offset: usize, new_name: &str) -> Result<Vec<Edit>, String> {
    let (_, old_name) = prepare(deck, file, offset)?;
    let Some(Named { target, .. }) = named(deck, file, offset) else { return Err(String::new()) };
    if new_name == old_name {
        return Ok(Vec::new());
    }
    if !is_a_name(new_name) {
        return Err(format!("`{new_name}` is no name: a name is a letter or `_`, then letters, digits and `_`."));
    }
    if is_link(new_name) {
        return Err(format!("`{new_name}` is a word that labels arguments, so nothing can be called that."));
    }
    let mut places = references(deck, file, offset);
    let all_files = (0..deck.files.len()).filter_map(|index| u32::try_from(index).ok()).map(FileId);
    let known: std::collections::HashSet<Place> = deck.resolution.references.iter().map(|found| found.place).collect();
    let is_value = deck.resolution.given.iter().chain(&deck.resolution.varied).any(|given| given.name.place == target);
    // Uses in circular definitions, and what already goes by the new name without being defined.
    let loose: Vec<(&str, Place)> = all_files
        .flat_map(|file| words_in_definitions(deck, file))
        .filter(|(_, place)| !known.contains(place))
        .collect();
    if is_value {
        places.extend(loose.iter().filter(|(word, _)| *word == old_name).map(|(_, place)| *place));
    }
    if let Some(problem) = conflict(deck, target, &places, is_value, new_name) {
        return Err(problem);
    }
    if is_value && loose.iter().any(|(word, _)| *word == new_name) {
        return Err(format!(
            "`{new_name}` is used in the deck already, without a definition; it would come to mean this."
        ));
    }
    places.sort_unstable();
    places.dedup();
    Ok(places
        .into_iter()
        .map(|place| Edit { file: place.file, span: place.span, text: new_name.to_string() })
        .collect())
}

fn written(deck: &Deck, place: Place) -> Option<&str> {
    deck.file(place.file).map(|file| place.span.of(&file.text))
}

/// Whether the grammar takes a text as a name.
pub fn is_a_name(text: &str) -> bool {
    let entry = parse_entry(&format!(" {text} = 1"));
    match entry.lines.first().map(|line| (&line.content, &line.problem)) {
        Some((Content::Definition(definition), None)) => &*definition.name.text == text,
        _ => false,
    }
}

/// Boundaries of several regions may share a name; which of them a use means is then not known here.
fn shared_boundary(deck: &Deck, target: Place) -> Option<String> {
    let entries = &deck.resolution.entries;
    let own = entries.iter().find(|entry| entry.name.as_ref().is_some_and(|name| name.place == target))?;
    let name = own.name.as_ref()?;
    let is_shared = own.row.kind == EntryKind::Boundary
        && entries.iter().any(|other| {
            other.row.kind == EntryKind::Boundary
                && other.name.as_ref().is_some_and(|other| other.text == name.text && other.place != target)
        });
    is_shared.then(|| {
        format!("Several boundaries are called `{}`, each of its region; rename them in their entries.", name.text)
    })
}

/// Why the new name would change what the deck says.
fn conflict(deck: &Deck, target: Place, places: &[Place], is_value: bool, new_name: &str) -> Option<String> {
    let resolution = &deck.resolution;
    let own = resolution.entries.iter().find(|entry| entry.name.as_ref().is_some_and(|name| name.place == target));
    if let Some(own) = own {
        let word = own.row.word;
        let again = resolution.entries.iter().find(|other| {
            other.row.kind == own.row.kind && other.name.as_ref().is_some_and(|name| &*name.text == new_name)
        });
        if again.is_some() {
            return Some(format!("A {word} called `{new_name}` is there already."));
        }
        if new_name == EntryKind::Case.word() {
            return Some("`case` means the whole deck where a finding is waived.".to_string());
        }
        if own.row.kind == EntryKind::Substance && crate::substances::library::NAMES.contains(&new_name) {
            return Some(format!("The library has a substance `{new_name}`; fluids that use it would get this one."));
        }
        return None;
    }
    if is_value {
        let again = resolution.given.iter().chain(&resolution.varied).any(|given| &*given.name.text == new_name);
        if again {
            return Some(format!("`{new_name}` is defined already."));
        }
        if CONSTANTS.iter().any(|constant| constant.name == new_name) {
            return Some(format!("`{new_name}` is a constant of the language; its uses would come to mean this."));
        }
    }
    captured(deck, target, places, is_value, new_name)
}

/// A use that would come to mean something else: a property's own names, and words that a slot offers.
fn captured(deck: &Deck, target: Place, places: &[Place], is_value: bool, new_name: &str) -> Option<String> {
    for place in places {
        let Some(spot) = super::spot::spot(deck, place.file, place.span.start) else { continue };
        let kind = spot.row.map(|row| row.kind);
        if kind == Some(EntryKind::Substance) {
            if matches!(new_name, "T" | "p" | "x") {
                return Some(format!("`{new_name}` stands for the state in the properties of a substance."));
            }
            let is_taken = spot.entry.lines.iter().any(|line| match &line.content {
                Content::Definition(definition) => {
                    &*definition.name.text == new_name && spot.placed(definition.name.span) != target.span
                }
                _ => false,
            });
            if is_taken {
                return Some(format!("The substance here defines `{new_name}` already."));
            }
            if !is_value && deck.resolution.given.iter().any(|given| &*given.name.text == new_name) {
                return Some(format!("`{new_name}` is a value of the deck; in this substance it would be hidden."));
            }
        }
        let offers = spot.slots().iter().any(|slot| match slot.takes {
            Takes::ChoiceOrQuantity(choices, _) => choices.iter().any(|choice| choice.word == new_name),
            _ => false,
        });
        if offers {
            return Some(format!("`{new_name}` is a word of the statement that this name is used in."));
        }
    }
    None
}

/// Whether the deck defines a name, of any kind.
pub fn is_defined(deck: &Deck, name: &str) -> bool {
    definitions(deck).any(|place| written(deck, place) == Some(name))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ide::testing::{DECK, at, edited, of_files, text};
    use crate::syntax::change::apply;

    fn renamed(marked: &str, new_name: &str) -> Result<String, String> {
        let (deck, offset) = at(marked);
        rename(&deck, DECK, offset, new_name).map(|edits| edited(&deck, &edits))
    }

    const DECK_TEXT: &str = "
given
    T_fl$0oor = 8 degC
    T_warm  = T_floor + 5 K
case \"a\"
    gravity g_here
given
    g_here = 9.8 m/s^2
boundary skin of cabinet
    held at T_floor
";

    #[test]
    fn a_value_and_its_uses() {
        let after = renamed(DECK_TEXT, "T_ground").unwrap();
        let expected = DECK_TEXT.trim_start().replace("$0", "").replace("T_floor", "T_ground");
        assert_eq!(after, expected);
    }

    #[test]
    fn letters_of_any_script() {
        assert!(renamed(DECK_TEXT, "ΔT").unwrap().contains("held at ΔT"));
    }

    #[test]
    fn what_is_refused_and_why() {
        let why = |marked: &str, name: &str| renamed(marked, name).unwrap_err();
        assert!(why(DECK_TEXT, "T_warm").contains("defined already"));
        assert!(why(DECK_TEXT, "T-floor").contains("no name"));
        assert!(why(DECK_TEXT, "8T").contains("no name"));
        assert!(why(DECK_TEXT, "").contains("no name"));
        assert!(why(DECK_TEXT, "a b").contains("no name"));
        assert!(why(DECK_TEXT, "within").contains("labels arguments"));
        assert!(why(DECK_TEXT, "pi").contains("constant"));
        let gravity = DECK_TEXT.replace("$0", "").replace("gravity g_h", "gravity g$0_h");
        assert!(why(&gravity, "none").contains("word of the statement"));
        assert!(why("run\n    ste$0ady\n", "other").contains("No name of the deck"));
        let substance = "substance oil\n    a = 1 kg/m^3\n    density a$0 * b\n    b = 2\n";
        assert!(why(substance, "T").contains("state"));
        assert!(why(substance, "b").contains("defines `b` already"));
        let own = "substance o$0il\n    density 1 kg/m^3\nfluid f\n    substance oil\n";
        assert!(why(own, "water").contains("library"));
        assert!(renamed(own, "oil_2").unwrap().contains("    substance oil_2\n"));
        assert!(why("region a$0\nregion b\n", "b").contains("region called `b`"));
        let twice = "region a\nregion b\nboundary w$0 of a\nboundary w of b\n";
        assert!(why(twice, "v").contains("Several boundaries"));
    }

    #[test]
    fn a_circle_is_renamed_whole() {
        assert_eq!(renamed("given\n    a$0 = b\n    b = a\n", "c").unwrap(), "given\n    c = b\n    b = c\n");
    }

    #[test]
    fn across_includes_and_back() {
        let deck = of_files(&[
            ("/project/deck.buoy", "include \"shared.buoy\"\nrun\n    transient for 1 h step dt\n"),
            ("/project/shared.buoy", "given\n    dt = 1 s\n    two = 2 * dt\n"),
        ]);
        let offset = text(&deck).find("dt").unwrap();
        let edits = rename(&deck, DECK, offset, "step_size").unwrap();
        assert_eq!(edited(&deck, &edits), text(&deck).replace("dt", "step_size"));
        let shared = &deck.files[1].text;
        let there = edits.iter().filter(|edit| edit.file == FileId(1)).map(|edit| (edit.span, edit.text.as_str()));
        assert_eq!(apply(shared, there), shared.replace("dt", "step_size"));
    }
}
