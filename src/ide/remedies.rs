//! Changes that need the vocabulary, the units, the library or the physics: another unit, the missing statements, the
//! library's value, the reference at mid-span, another density law, a waiver.

use super::actions::{Action, findings_at};
use super::amount::{amount, literal};
use super::library;
use super::numbers;
use super::snippet::names_of;
use super::spot::{Spot, spot};
use crate::case::model::Fluid;
use crate::quantity::{Scale, parse_unit};
use crate::syntax::tree::Content;
use crate::syntax::{Edit, FileId, Level, Span};
use crate::vocabulary::statements::TEMPERATURE;
use crate::vocabulary::{self, EntryKind, Need, StatementRow, Takes, Temperature, Times};
use crate::workspace::Deck;

/// Most other units that are offered for one quantity.
const OTHER_UNITS: usize = 5;

/// All of them at a range.
pub fn all(deck: &Deck, file: FileId, span: Span) -> Vec<Action> {
    let Some(spot) = spot(deck, file, span.start) else { return Vec::new() };
    let mut actions = other_units(&spot);
    actions.extend(of_library(deck, &spot));
    actions.extend(mid_span(deck, &spot));
    actions.extend(other_laws(&spot));
    actions.extend(missing_statements(deck, &spot));
    actions
}

/// `68 degF` as `20 degC`.
fn other_units(spot: &Spot<'_>) -> Vec<Action> {
    let path = spot.expressions();
    let Some(whole) = path.iter().rev().find(|expression| literal(expression).is_some()) else { return Vec::new() };
    let Some((quantity, negative)) = literal(whole) else { return Vec::new() };
    let is_alone = path.last().is_some_and(|outermost| outermost.span == whole.span);
    let kind = match path.last().and_then(|outermost| spot.slot_of(outermost)).map(|slot| slot.takes) {
        Some(Takes::Quantity(_, kind)) if is_alone => Some(kind),
        Some(Takes::ChoiceOrQuantity(..) | Takes::Vector(_)) if is_alone => Some(Temperature::Point),
        _ => None,
    };
    let Some(amount) = amount(quantity, negative, kind) else { return Vec::new() };
    let Some(unit_word) = &quantity.unit else { return Vec::new() };
    let mut actions = Vec::new();
    for (number, other) in amount.elsewhere() {
        let scale = parse_unit(other).map_or(Scale::Plain, |unit| unit.scale);
        // A point in degC is a point by its unit; in K the statement must tell.
        let keeps_kind = kind.is_some() || quantity.mark.is_some() || scale == amount.unit.scale;
        let Some(number) = numbers::exact(number).filter(|_| keeps_kind) else { continue };
        let span = Span::new(whole.span.start, unit_word.span.end);
        let text = format!("{number} {other}");
        let title = format!("Write as {text}");
        actions.push(Action::refactor(title, vec![Edit { file: spot.file, span: spot.placed(span), text }]));
    }
    actions.truncate(OTHER_UNITS);
    actions
}

/// The library's value of a property that a fluid states.
fn of_library(deck: &Deck, spot: &Spot<'_>) -> Vec<Action> {
    let found = || {
        let row = library::property(spot.statement()?.word).filter(|_| is_fluid(spot))?;
        let argument = spot.phrase()?.arguments.first()?;
        let fluid = library::fluid_at(spot, &deck.case)?;
        let temperature = fluid.reference_temperature.as_ref()?.si;
        let value = (row.value)(&library::properties_at(&deck.case, fluid, temperature)?);
        let written = literal(argument).and_then(|(quantity, _)| quantity.unit.as_ref());
        let usual = crate::quantity::usual_units(row.dimension).first().copied().unwrap_or("1");
        let fits = |text: &str| parse_unit(text).is_ok_and(|unit| unit.dimension == row.dimension);
        let unit_text = written.map(|unit| &*unit.text).filter(|text| fits(text)).unwrap_or(usual);
        let number = parse_unit(unit_text).ok()?.from_si(value);
        if !number.is_finite() {
            return None;
        }
        let unit = if unit_text == "1" { String::new() } else { format!(" {unit_text}") };
        let text = format!("{}{unit}", numbers::rounded(number, 4));
        let line = spot.placed(spot.line()?.span);
        let leave = Edit { file: spot.file, span: line, text: String::new() };
        let state = library::state_in_words(&deck.case, fluid, temperature);
        let take = Edit { file: spot.file, span: spot.placed(argument.span), text: text.clone() };
        Some(vec![
            Action::refactor(format!("Take the library's value, {text} ({state})"), vec![take]),
            Action::refactor(format!("Leave the {} to the library", row.word.replace('-', " ")), vec![leave]),
        ])
    };
    found().unwrap_or_default()
}

fn is_fluid(spot: &Spot<'_>) -> bool {
    spot.row.is_some_and(|row| row.kind == EntryKind::Fluid)
}

/// The reference in the middle of the temperatures that the fluid reaches.
fn mid_span(deck: &Deck, spot: &Spot<'_>) -> Option<Action> {
    let row = spot.statement().filter(|row| row.word == "reference" && is_fluid(spot))?;
    let fluid = library::fluid_at(spot, &deck.case)?;
    let (lowest, highest) = reached(deck, fluid)?;
    let argument = spot.phrase()?.arguments.first()?;
    let slot_unit = literal(argument).and_then(|(quantity, _)| quantity.unit.as_ref()).map(|unit| &*unit.text);
    let fits = |text: &str| parse_unit(text).is_ok_and(|unit| unit.dimension == TEMPERATURE);
    let unit_text = slot_unit.filter(|text| fits(text)).unwrap_or("degC");
    let middle = parse_unit(unit_text).ok()?.from_si(0.5 * (lowest + highest));
    // Half degrees: no case knows its temperatures better.
    let text = format!("{} {unit_text}", numbers::rounded((2.0 * middle).round() / 2.0, 6));
    if argument.span.of(&spot.entry.text) == text {
        return None;
    }
    let edit = Edit { file: spot.file, span: spot.placed(argument.span), text: text.clone() };
    Some(Action::refactor(format!("Move the {} to mid-span, {text}", row.word), vec![edit]))
}

/// The lowest and highest temperature that a fluid reaches in any region, K.
fn reached(deck: &Deck, fluid: &Fluid) -> Option<(f64, f64)> {
    let regions = deck.case.regions.iter().zip(&deck.physics.regions);
    let brackets = regions
        .filter(|(region, _)| deck.case.fluid_of(region).is_some_and(|of| of.name.place == fluid.name.place))
        .filter_map(|(_, physics)| physics.bracket.as_ref())
        .map(|bracket| (bracket.lowest.value, bracket.highest.value));
    brackets
        .reduce(|(low, high), (lowest, highest)| (low.min(lowest), high.max(highest)))
        .filter(|(low, high)| low.is_finite() && high.is_finite())
}

/// The other density laws.
fn other_laws(spot: &Spot<'_>) -> Vec<Action> {
    let statement = spot.statement().filter(|row| row.word == "density-law" && is_fluid(spot));
    let argument = spot.phrase().and_then(|phrase| phrase.arguments.first());
    let (Some(row), Some(argument)) = (statement, argument) else { return Vec::new() };
    let Some(Takes::Choice(choices)) = row.slots.first().map(|slot| slot.takes) else { return Vec::new() };
    let written = argument.span.of(&spot.entry.text);
    choices
        .iter()
        .filter(|choice| choice.word != written)
        .map(|choice| {
            let edit = Edit { file: spot.file, span: spot.placed(argument.span), text: choice.word.to_string() };
            Action::refactor(format!("Use density-law {}: {}", choice.word, choice.description), vec![edit])
        })
        .collect()
}

/// The statements that an entry of a kind usually has; the first of a group that is there stands for all of it.
fn usual(kind: EntryKind) -> &'static [&'static [&'static str]] {
    match kind {
        EntryKind::Fluid => &[&["substance"], &["reference"], &["density-law"]],
        EntryKind::Region => &[
            &["box", "cylinder", "sphere", "annulus", "gap", "plate", "channel"],
            &["filled", "made", "surrounded"],
            &["flow", "made"],
        ],
        EntryKind::Boundary => &[
            &["side"],
            &["wall", "inlet", "outlet", "opening", "symmetry", "repeats", "meets"],
            &[
                "held",
                "heated",
                "cooled",
                "insulated",
                "exchanges",
                "radiates",
                "carries",
                "backflow",
                "outlet",
                "symmetry",
                "repeats",
                "meets",
            ],
        ],
        EntryKind::Mesh => &[&["cells", "spacing"], &["first-cell"], &["growth"]],
        EntryKind::Run => &[&["steady", "transient"]],
        EntryKind::Initial => &[&["temperature", "stratified"], &["at", "velocity"]],
        _ => &[],
    }
}

/// Adds the statements that the entry lacks: their words, and what is certain of their values. What is left to fill in is
/// then found as missing; no value is made up.
fn missing_statements(deck: &Deck, spot: &Spot<'_>) -> Option<Action> {
    let row = spot.row?;
    let has = |word: &str| {
        spot.entry
            .statements()
            .any(|line| matches!(&line.content, Content::Phrase(phrase) if &*phrase.word.text == word))
    };
    let required = vocabulary::statements_of(row.kind).filter(|statement| statement.times == Times::Once);
    let mut missing: Vec<&'static StatementRow> = required.filter(|statement| !has(statement.word)).collect();
    for group in usual(row.kind) {
        if !group.iter().any(|word| has(word))
            && let Some(statement) = group.first().and_then(|word| vocabulary::statement_row(row.kind, word))
        {
            missing.push(statement);
        }
    }
    missing.dedup_by_key(|statement| statement.word);
    let last = spot.entry.lines.iter().rev().find(|line| line.content != Content::Blank || line.problem.is_some())?;
    if missing.is_empty() {
        return None;
    }
    let whole = last.span.of(&spot.entry.text);
    let line_end = if whole.ends_with("\r\n") { "\r\n" } else { "\n" };
    let mut text = String::new();
    for statement in &missing {
        text.push_str(&format!("    {}{line_end}", begun(deck, statement)));
    }
    if !whole.ends_with('\n') {
        text.insert_str(0, line_end);
    }
    let end = spot.placed(last.span).end;
    let words: Vec<String> = missing.iter().map(|statement| format!("`{}`", statement.word)).collect();
    let edit = Edit { file: spot.file, span: Span::new(end, end), text };
    Some(Action::refactor(format!("Add the missing {}", words.join(", ")), vec![edit]))
}

/// A statement as far as it is certain: its word and first link, and the only thing that can stand there.
fn begun(deck: &Deck, statement: &StatementRow) -> String {
    let mut line = statement.word.to_string();
    let Some(slot) = statement.slots.first().filter(|slot| slot.need != Need::Optional) else { return line };
    if !slot.link.is_empty() {
        line.push(' ');
        line.push_str(slot.link);
    }
    if let Takes::Name(of) = slot.takes
        && let [only] = names_of(&deck.resolution, of).as_slice()
    {
        line.push(' ');
        line.push_str(only);
    }
    line
}

/// A waiver for each finding at a range that a check of the case made. Its reason is left to write: until it is, the
/// deck is found to lack it.
pub fn waivers(deck: &Deck, file: FileId, span: Span) -> Vec<Action> {
    let Some(text) = deck.file(file).map(|source| &*source.text) else { return Vec::new() };
    let mut actions: Vec<Action> = Vec::new();
    let waivable = findings_at(deck, file, span).filter(|finding| {
        finding.waived.is_none()
            && finding.level > Level::Hint
            && crate::checks::find(finding.check).is_some_and(|check| check.run.is_some())
    });
    for finding in waivable {
        let of = if finding.subject.is_empty() { String::new() } else { format!(" of {}", finding.subject) };
        let title = format!("Waive {}{of}, with a reason to be written", finding.check);
        if actions.iter().any(|action| action.title == title) {
            continue;
        }
        let line_end = if text.contains("\r\n") { "\r\n" } else { "\n" };
        let before = if text.ends_with('\n') { line_end.to_string() } else { format!("{line_end}{line_end}") };
        let entry = format!("{before}waive {}{of}{line_end}    because{line_end}", finding.check);
        let edit = Edit { file, span: Span::new(text.len(), text.len()), text: entry };
        actions.push(Action::refactor(title, vec![edit]));
    }
    actions
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ide::testing::{DECK, at, edited};
    use crate::physics::model::{Bound, Bracket};

    fn done(marked: &str) -> Vec<(String, String)> {
        let (deck, offset) = at(marked);
        let all = all(&deck, DECK, Span::new(offset, offset));
        all.into_iter().map(|action| (edited(&deck, &action.edits), action.title)).collect()
    }

    fn texts_of(marked: &str, title: &str) -> Vec<String> {
        done(marked).into_iter().filter(|(_, of)| of.starts_with(title)).map(|(text, _)| text).collect()
    }

    #[test]
    fn another_unit_for_the_same_amount() {
        let as_units = texts_of("boundary b of r\n    held at 6$08 degF\n", "Write as");
        assert_eq!(
            as_units[..2],
            ["boundary b of r\n    held at 20 degC\n", "boundary b of r\n    held at 293.15 K\n"]
        );
        let sign = texts_of("boundary b of r\n    radiates to -4$00 degC\n", "Write as");
        assert!(sign.contains(&"boundary b of r\n    radiates to -40 degF\n".to_string()));
        // In a sum, kelvins would no longer say that this is a point.
        let sum = texts_of("boundary b of r\n    held at 6$08 degF + 5 K\n", "Write as");
        assert_eq!(sum, ["boundary b of r\n    held at 20 degC + 5 K\n"]);
        assert!(texts_of("run\n    steady$0\n", "Write as").is_empty());
    }

    #[test]
    fn the_value_of_the_library() {
        let fluid = "fluid f\n    substance water\n    reference 40 degC at 2 bar\n    viscosity 0.9$0 mPa.s\n";
        assert_eq!(
            texts_of(fluid, "Take the library's value"),
            ["fluid f\n    substance water\n    reference 40 degC at 2 bar\n    viscosity 0.6527 mPa.s\n"]
        );
        assert_eq!(
            texts_of(fluid, "Leave the viscosity"),
            ["fluid f\n    substance water\n    reference 40 degC at 2 bar\n"]
        );
    }

    #[test]
    fn the_reference_at_mid_span() {
        let (mut deck, offset) =
            at("fluid f\n    substance air\n    ref$0erence 20 degC at 1 bar\nregion r\n    filled with f\n");
        let end = |value| Bound {
            value,
            band: (value, value),
            set_by: String::new(),
            place: None,
            estimate: None,
            literal: None,
        };
        deck.physics.regions[0].bracket = Some(Bracket { lowest: end(293.15), highest: end(353.35) });
        let all = all(&deck, DECK, Span::new(offset, offset));
        let action = all.iter().find(|action| action.title.starts_with("Move the reference")).unwrap();
        assert!(edited(&deck, &action.edits).contains("reference 50 degC at 1 bar"), "{action:?}");
    }

    #[test]
    fn another_law() {
        let laws = texts_of("fluid f\n    density-law$0 boussinesq\n", "Use density-law");
        assert_eq!(laws.len(), 3);
        assert_eq!(laws[0], "fluid f\n    density-law ideal-gas\n");
    }

    #[test]
    fn missing_statements_without_made_up_values() {
        assert_eq!(
            texts_of("fluid air_here\n    substance air\nregion r$0\n    box 1 m by 1 m", "Add the missing"),
            ["fluid air_here\n    substance air\nregion r\n    box 1 m by 1 m\n    filled with air_here\n    flow\n"]
        );
        assert_eq!(texts_of("waive density-span$0\n", "Add the missing"), ["waive density-span\n    because\n"]);
        assert!(texts_of("run$0\n    steady\n", "Add the missing").is_empty());
    }

    #[test]
    fn a_waiver_stands_at_the_end_and_asks_for_its_reason() {
        let (deck, offset) = at("case \"a\"\nregion r$0\n    box 1 m by 1 m\n");
        let made = waivers(&deck, DECK, Span::new(offset, offset));
        let action = made.first().expect("a region without filling draws a finding");
        let after = edited(&deck, &action.edits);
        assert!(after.ends_with("\n    because\n") && after.contains("\n\nwaive "), "{after}");
        let again = crate::workspace::analyse_text(&after, crate::testing::TODAY);
        assert!(again.findings.iter().any(|finding| finding.check == "missing-argument"));
    }
}
