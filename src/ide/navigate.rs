//! Where a name is defined, and where it is used.
//!
//! ```text
//! given
//!     T_floor = 8 degC            the definition
//! boundary skin of cabinet
//!     held at T_fl$0oor           definition: the line above; references: both
//! ```
//!
//! Files that the deck includes are looked at like the deck itself.

use super::spot::spot;
use crate::syntax::tree::{Content, Expression, ExpressionKind};
use crate::syntax::{FileId, Place};
use crate::vocabulary::EntryKind;
use crate::workspace::Deck;

/// A name under the cursor.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Named {
    /// The name where the cursor stands.
    pub here: Place,
    /// The name where it is defined.
    pub target: Place,
}

/// The name under the cursor, where the deck defines it.
pub fn named(deck: &Deck, file: FileId, offset: usize) -> Option<Named> {
    let references = &deck.resolution.references;
    let is_here = |place: &Place| place.file == file && place.span.touches(offset);
    if let Some(found) = references.iter().find(|reference| is_here(&reference.place)) {
        return Some(Named { here: found.place, target: found.target });
    }
    let own = definitions(deck).find(is_here)?;
    Some(Named { here: own, target: own })
}

/// The place of every name that the deck defines.
pub fn definitions(deck: &Deck) -> impl Iterator<Item = Place> + '_ {
    let resolution = &deck.resolution;
    let values = resolution.given.iter().chain(&resolution.varied).map(|given| given.name.place);
    let entries = resolution.entries.iter().filter_map(|entry| entry.name.as_ref()).map(|name| name.place);
    // The definitions inside a substance are its own, and known by their uses.
    let used = resolution.references.iter().map(|reference| reference.target);
    values.chain(entries).chain(used)
}

/// Where the name under the cursor is defined; the statement, for a member.
pub fn definition(deck: &Deck, file: FileId, offset: usize) -> Vec<Place> {
    if let Some(place) = member_at(deck, file, offset) {
        return vec![place];
    }
    named(deck, file, offset).map(|named| named.target).into_iter().collect()
}

/// Every place of the name under the cursor, its definition first, then its uses in order.
pub fn references(deck: &Deck, file: FileId, offset: usize) -> Vec<Place> {
    let Some(Named { target, .. }) = named(deck, file, offset) else { return Vec::new() };
    let mut uses: Vec<Place> = deck
        .resolution
        .references
        .iter()
        .filter(|reference| reference.target == target)
        .map(|reference| reference.place)
        .collect();
    uses.sort_unstable();
    uses.dedup();
    std::iter::once(target).chain(uses.into_iter().filter(|place| *place != target)).collect()
}

/// The places of the name under the cursor in its own file.
pub fn highlights(deck: &Deck, file: FileId, offset: usize) -> Vec<Place> {
    references(deck, file, offset).into_iter().filter(|place| place.file == file).collect()
}

/// Where the member under the cursor is stated.
fn member_at(deck: &Deck, file: FileId, offset: usize) -> Option<Place> {
    let spot = spot(deck, file, offset)?;
    match &spot.expressions().first()?.kind {
        ExpressionKind::Member(owner, member) if member.span.touches(spot.inside()) => {
            member_place(deck, &owner.text, &member.text)
        }
        _ => None,
    }
}

/// Where an entry states a member: the place of its value.
pub fn member_place(deck: &Deck, owner: &str, member: &str) -> Option<Place> {
    let entry = deck.resolution.entries.iter().find(|entry| {
        matches!(entry.row.kind, EntryKind::Region | EntryKind::Fluid | EntryKind::Solid)
            && entry.name.as_ref().is_some_and(|name| &*name.text == owner)
    })?;
    crate::vocabulary::member_slot(entry.row.kind, member).find_map(|(row, index, _)| {
        let statement = entry.statements.iter().find(|statement| std::ptr::eq(statement.row, row))?;
        match statement.slots.get(index)?.first()? {
            crate::case::bind::Bound::Value(value) => Some(value.origin.place),
            _ => None,
        }
    })
}

/// Every word in the expressions of a file's definitions, with its place: names that a circular definition uses are no
/// references of the resolution, but are uses all the same.
pub fn words_in_definitions(deck: &Deck, file: FileId) -> Vec<(&str, Place)> {
    let mut found = Vec::new();
    let Some(source) = deck.file(file) else { return found };
    for placed in &source.tree.entries {
        let is_given = placed.entry.head_phrase().is_some_and(|phrase| &*phrase.word.text == EntryKind::Given.word());
        if !is_given {
            continue;
        }
        for line in &placed.entry.lines {
            if let Content::Definition(definition) = &line.content
                && let Some(value) = &definition.value
            {
                crate::case::resolution::walk(value, &mut |part: &Expression| {
                    if let ExpressionKind::Word(word) = &part.kind {
                        found.push((&**word, Place::new(file, part.span.shifted(placed.start))));
                    }
                });
            }
        }
    }
    found
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ide::testing::{DECK, at, of_files, text};

    fn texts(deck: &Deck, places: &[Place]) -> Vec<String> {
        places
            .iter()
            .map(|place| {
                let text = &deck.files[place.file.0 as usize].text;
                let line = text[..place.span.start].matches('\n').count() + 1;
                format!("{}:{line} {}", place.file.0, place.span.of(text))
            })
            .collect()
    }

    const DECK_TEXT: &str = "
given
    T_floor = 8 degC
    T_warm  = T_floor + 5 K
boundary skin of cabinet
    held at T_fl$0oor
region cabinet
    box 1 m by 2 m
    tilt cabinet.width / 1 m * 1 deg
require
    Ra(cabinet) < 1e9
";

    #[test]
    fn a_value() {
        let (deck, offset) = at(DECK_TEXT);
        assert_eq!(texts(&deck, &definition(&deck, DECK, offset)), ["0:2 T_floor"]);
        assert_eq!(texts(&deck, &references(&deck, DECK, offset)), ["0:2 T_floor", "0:3 T_floor", "0:5 T_floor"]);
    }

    #[test]
    fn a_region_from_its_own_name_and_a_member() {
        let (deck, _) = at(DECK_TEXT);
        let on = |piece: &str| text(&deck).find(piece).unwrap();
        let uses = references(&deck, DECK, on("cabinet\n    box"));
        assert_eq!(texts(&deck, &uses), ["0:6 cabinet", "0:4 cabinet", "0:8 cabinet", "0:10 cabinet"]);
        let member = definition(&deck, DECK, on("width"));
        assert_eq!(texts(&deck, &member), ["0:7 1 m"]);
    }

    #[test]
    fn across_an_include() {
        let deck = of_files(&[
            ("/project/deck.buoy", "include \"shared.buoy\"\nrun\n    transient for 1 h step dt\n"),
            ("/project/shared.buoy", "given\n    dt = 1 s\n"),
        ]);
        let offset = text(&deck).find("dt").unwrap();
        assert_eq!(texts(&deck, &definition(&deck, DECK, offset)), ["1:2 dt"]);
        assert_eq!(highlights(&deck, DECK, offset).len(), 1);
        assert_eq!(references(&deck, FileId(1), 12).len(), 2);
    }

    #[test]
    fn nothing_on_a_word_of_the_language() {
        let (deck, offset) = at("run\n    ste$0ady\n");
        assert!(definition(&deck, DECK, offset).is_empty() && references(&deck, DECK, offset).is_empty());
    }
}
