//! Gives a value a name in `given`, and puts a named value back where it is used.
//!
//! ```text
//! boundary skin of cabinet              given
//!     held at 4$0 degC            →         skin_temperature = 4 degC
//!                                       boundary skin of cabinet
//!                                           held at skin_temperature
//! ```

use super::actions::Action;
use super::amount::literal;
use super::navigate::{named, references};
use super::rename::{is_a_name, is_defined};
use super::spot::{Spot, children, roots, spot};
use crate::case::resolution::walk;
use crate::syntax::tree::{Content, Definition, Expression, ExpressionKind, Operator, PlacedEntry};
use crate::syntax::{Edit, FileId, Place, Span};
use crate::vocabulary::functions::CONSTANTS;
use crate::vocabulary::rows::Holds;
use crate::vocabulary::{EntryKind, Takes};
use crate::workspace::Deck;

/// Gives the quantity at a range a name.
pub fn extract(deck: &Deck, file: FileId, span: Span) -> Option<Action> {
    let spot = spot(deck, file, span.start)?;
    let row = spot.row?;
    let has_values = matches!(row.holds, Holds::Phrases | Holds::Requirements)
        && !matches!(row.kind, EntryKind::Practice | EntryKind::Waive);
    if spot.is_head() || !has_values {
        return None;
    }
    let path = spot.expressions();
    let whole = path.iter().rev().find(|expression| literal(expression).is_some())?;
    let outermost = path.last()?;
    let slot = spot.slot_of(outermost);
    if slot
        .is_some_and(|slot| !matches!(slot.takes, Takes::Quantity(..) | Takes::ChoiceOrQuantity(..) | Takes::Vector(_)))
    {
        return None;
    }
    let (quantity, _) = literal(whole)?;
    quantity.unit.as_ref()?;
    let name = new_name(deck, &spot, slot.map_or("value", |slot| slot.name));
    let written = whole.span.of(&spot.entry.text);
    let line_end = line_end_of(spot.text);
    let insertion = match last_given(deck, file) {
        Some((placed, line)) => {
            let end = line.shifted(placed.start).end;
            let before = spot.text.get(..end).unwrap_or("");
            let break_before = if before.ends_with('\n') { "" } else { line_end };
            let break_behind = if break_before.is_empty() { line_end } else { "" };
            let text = format!("{break_before}    {name} = {written}{break_behind}");
            Edit { file, span: Span::new(end, end), text }
        }
        None => {
            let text = format!("given{line_end}    {name} = {written}{line_end}{line_end}");
            Edit { file, span: Span::new(spot.start, spot.start), text }
        }
    };
    let use_of = Edit { file, span: spot.placed(whole.span), text: name.clone() };
    Some(Action::refactor(format!("Give {written} a name in `given`: `{name}`"), vec![insertion, use_of]))
}

fn line_end_of(text: &str) -> &'static str {
    if text.split_once('\n').is_some_and(|(first, _)| first.ends_with('\r')) { "\r\n" } else { "\n" }
}

/// A name that the deck does not have yet: of the entry and the slot.
fn new_name(deck: &Deck, spot: &Spot<'_>, slot: &str) -> String {
    let slot = slot.replace('-', "_");
    let of_entry = spot.entry_name().filter(|_| spot.row.is_some_and(|row| row.kind != EntryKind::Case));
    let base = of_entry.map_or_else(|| slot.clone(), |entry| format!("{entry}_{slot}"));
    let base = if is_a_name(&base) { base } else { slot };
    let is_free = |name: &str| {
        is_a_name(name) && !is_defined(deck, name) && !CONSTANTS.iter().any(|constant| constant.name == name)
    };
    let numbered = (2..10_000).map(|number| format!("{base}_{number}"));
    std::iter::once(base.clone()).chain(numbered).find(|name| is_free(name)).unwrap_or(base)
}

/// The last `given` of a file and its last definition's line.
fn last_given(deck: &Deck, file: FileId) -> Option<(&PlacedEntry, Span)> {
    let source = deck.file(file)?;
    source.tree.entries.iter().rev().find_map(|placed| {
        let head = placed.entry.head_phrase()?;
        if &*head.word.text != EntryKind::Given.word() {
            return None;
        }
        let line = placed.entry.lines.iter().rev().find(|line| line.content != Content::Blank)?;
        Some((placed, line.span))
    })
}

/// Puts the named value at an offset back in every place that uses it.
pub fn inline(deck: &Deck, file: FileId, offset: usize) -> Option<Action> {
    let target = named(deck, file, offset)?.target;
    if !deck.resolution.given.iter().any(|given| given.name.place == target) {
        return None;
    }
    let home = spot(deck, target.file, target.span.start)?;
    let line = home.line()?;
    let Content::Definition(definition) = &line.content else { return None };
    let value = definition.value.as_ref()?;
    let uses: Vec<Place> = references(deck, file, offset).into_iter().filter(|place| *place != target).collect();
    let stays = uses.is_empty() || line.problem.is_some() || refers_to(value, &definition.name.text);
    if stays {
        return None;
    }
    let written = value.span.of(&home.entry.text);
    let mut edits = vec![deletion(deck, target.file, &home, definition)?];
    for place in &uses {
        let at = spot(deck, place.file, place.span.start)?;
        // In a substance other names may hide those that the value is made of.
        if at.row.is_some_and(|row| row.kind == EntryKind::Substance) && literal(value).is_none() {
            return None;
        }
        let text = if needs_brackets(&at, *place, value) { format!("({written})") } else { written.to_string() };
        edits.push(Edit { file: place.file, span: place.span, text });
    }
    let count = if uses.len() == 1 { "its place".to_string() } else { format!("its {} places", uses.len()) };
    Some(Action::refactor(format!("Put the value of `{}` back in {count}", definition.name.text), edits))
}

fn refers_to(value: &Expression, name: &str) -> bool {
    let mut found = false;
    walk(value, &mut |part| found |= matches!(&part.kind, ExpressionKind::Word(word) if &**word == name));
    found
}

/// Takes the definition's line away; with it the entry, where nothing else stands in it.
fn deletion(deck: &Deck, file: FileId, home: &Spot<'_>, definition: &Definition) -> Option<Edit> {
    let others = home.entry.statements().filter(|line| {
        line.problem.is_some()
            || match &line.content {
                Content::Blank => line.comment.is_some(),
                Content::Definition(other) => other.name.span != definition.name.span,
                _ => true,
            }
    });
    let is_alone = others.count() == 0 && home.entry.description_above(home.entry.head?).is_none();
    let span = if is_alone {
        Span::new(home.start, home.start + home.entry.text.len())
    } else {
        home.placed(home.line()?.span)
    };
    deck.file(file)?;
    Some(Edit { file, span, text: String::new() })
}

/// Whether a value must be bracketed at a place where its name stands now.
fn needs_brackets(at: &Spot<'_>, place: Place, value: &Expression) -> bool {
    let Some(line) = at.line() else { return true };
    let inside = Span::new(place.span.start - at.start, place.span.end - at.start);
    let mut level = roots(&line.content);
    let mut parent: Option<&Expression> = None;
    while let Some(found) = level.into_iter().find(|one| one.span.start <= inside.start && inside.end <= one.span.end) {
        if found.span == inside {
            break;
        }
        parent = Some(found);
        level = children(found);
    }
    match parent.map(|parent| &parent.kind) {
        None
        | Some(
            ExpressionKind::Call(..) | ExpressionKind::Group(_) | ExpressionKind::Vector(_) | ExpressionKind::List(_),
        ) => false,
        Some(ExpressionKind::Binary(binary)) => {
            let is_plain = literal(value).is_some_and(|(_, negative)| !negative);
            !(is_plain && binary.spaced && binary.operator != Operator::Power)
        }
        Some(_) => true,
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ide::testing::{DECK, at, edited};

    fn extracted(marked: &str) -> Option<String> {
        let (deck, offset) = at(marked);
        extract(&deck, DECK, Span::new(offset, offset)).map(|action| edited(&deck, &action.edits))
    }

    fn inlined(marked: &str) -> Option<String> {
        let (deck, offset) = at(marked);
        inline(&deck, DECK, offset).map(|action| edited(&deck, &action.edits))
    }

    #[test]
    fn a_name_from_entry_and_slot() {
        assert_eq!(
            extracted("given\n    a = 1 m\n\nboundary skin of r\n    held at 4$0 degC\n").unwrap(),
            "given\n    a = 1 m\n    skin_temperature = 4 degC\n\nboundary skin of r\n    held at skin_temperature\n"
        );
        assert_eq!(
            extracted("# why\nregion r\n    box 1 m by 2$0 m by a\n").unwrap(),
            "given\n    r_depth = 2 m\n\n# why\nregion r\n    box 1 m by r_depth by a\n"
        );
        assert_eq!(
            extracted("run\n    transient for 1 h step 1$0 s\ngiven\n    step = 5 s").unwrap().lines().last(),
            Some("    step_2 = 1 s")
        );
    }

    #[test]
    fn a_sign_and_a_part_of_an_expression() {
        assert!(
            extracted("boundary b of r\n    radiates to -40$0 degC\n").unwrap().contains("radiates to b_temperature\n")
        );
        assert!(extracted("region r\n    box 2 * 3$0 m by 1 m\n").unwrap().contains("box 2 * r_width by 1 m\n"));
    }

    #[test]
    fn what_has_no_unit_or_is_defined_already_is_left() {
        assert_eq!(extracted("mesh of r\n    cells 10$00\n"), None);
        assert_eq!(extracted("given\n    a = 5$0 m\n"), None);
        assert_eq!(extracted("case \"a\"\n    gravity 9.8 m/s^2 along (0, 0, -1$0)\n"), None);
    }

    #[test]
    fn back_in_every_place() {
        assert_eq!(
            inlined("given\n    T$0 = 4 degC \"cold\"\n    b = 1 m\nboundary skin of r\n    held at T\n    carries T + 5 K\n").unwrap(),
            "given\n    b = 1 m\nboundary skin of r\n    held at 4 degC\n    carries 4 degC + 5 K\n"
        );
        assert_eq!(
            inlined("given\n    a = b + 1 m\n    b = 1 m\nregion r\n    box 2 * a$0 by a\n").unwrap(),
            "given\n    b = 1 m\nregion r\n    box 2 * (b + 1 m) by b + 1 m\n"
        );
        assert_eq!(
            inlined("given\n    a = 2 m\n\nboundary b of r\n    area a$0 ^ 2\n").unwrap(),
            "boundary b of r\n    area (2 m) ^ 2\n"
        );
    }

    #[test]
    fn there_and_back() {
        let before = "boundary skin of r\n    held at 4 degC\n";
        let there = extracted("boundary skin of r\n    held at 4$0 degC\n").unwrap();
        let back = inlined(&there.replacen("skin_temp", "skin_$0temp", 1)).unwrap();
        assert_eq!(back, before);
    }

    #[test]
    fn a_circle_and_an_unused_name_stay() {
        assert_eq!(inlined("given\n    a$0 = a + 1 m\n"), None);
        assert_eq!(inlined("given\n    a$0 = 1 m\n"), None);
    }
}
