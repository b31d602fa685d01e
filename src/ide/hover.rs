//! Hover: what stands under the cursor, with its physics.
//!
//! ```text
//!     viscosity  0.9 m$0Pa.s       0.9 mPa.s, a dynamic viscosity; in Pa.s, cP ..; water at 40 degC, 2 bar: 0.653 mPa.s
//!     held at    T_fl$0oor         T_floor = 8 degC, "air of the observing floor"
//!     den$0sity-law boussinesq     what the statement says, and every criterion of the law with limit and margin
//! region cab$0inet                 the arrangement and why, Ra, Pr, Nu
//! ```

use super::amount::{amount, literal};
use super::hover_entity;
use super::library;
use super::names_here::{in_words, value_of};
use super::numbers;
use super::spot::{Spot, spot};
use crate::case::resolution::ResolvedGiven;
use crate::quantity::display;
use crate::syntax::tree::{Content, Expression, ExpressionKind, Word};
use crate::syntax::{FileId, Place, Span};
use crate::vocabulary::functions::{CONSTANTS, FUNCTIONS, REGION_NUMBERS};
use crate::vocabulary::statements::TEMPERATURE;
use crate::vocabulary::{self, Takes, Temperature};
use crate::workspace::Deck;

/// What to show, and for which bytes of the file.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Hover {
    /// The text that it is about.
    pub span: Span,
    /// Markdown.
    pub markdown: String,
}

/// What is known of the thing under the cursor.
pub fn hover(deck: &Deck, file: FileId, offset: usize) -> Option<Hover> {
    let spot = spot(deck, file, offset)?;
    let line = spot.line()?;
    if let Content::Definition(definition) = &line.content
        && definition.name.span.touches(spot.inside())
    {
        return name(deck, &spot, &definition.name.text, definition.name.span);
    }
    let path = spot.expressions();
    if let Some(innermost) = path.first() {
        return expression(deck, &spot, innermost, &path);
    }
    opening_word(deck, &spot)
}

/// The word that opens the line.
fn opening_word(deck: &Deck, spot: &Spot<'_>) -> Option<Hover> {
    let phrase = spot.phrase()?;
    if !phrase.word.span.touches(spot.inside()) {
        return None;
    }
    let span = spot.placed(phrase.word.span);
    if spot.is_head() {
        let row = spot.row?;
        let markdown = format!("**{}**  \n{}\n\n```buoy\n{}\n```", row.word, row.description, row.example);
        return Some(Hover { span, markdown });
    }
    if let Some(row) = spot.statement() {
        let form = crate::case::declare::form(row.word, row.slots);
        let mut markdown = format!("**{form}**  \n{}\n\n```buoy\n{}\n```", row.description, row.example);
        if row.word == "density-law" {
            markdown.push_str(&hover_entity::criteria(deck, spot).unwrap_or_default());
        }
        if let Some(says) = library_at_reference(deck, spot, row.word) {
            markdown.push_str(&format!("\n\n{says}"));
        }
        return Some(Hover { span, markdown });
    }
    // The varied name of a sweep.
    name(deck, spot, &phrase.word.text, phrase.word.span)
}

fn expression(deck: &Deck, spot: &Spot<'_>, innermost: &Expression, path: &[&Expression]) -> Option<Hover> {
    let span = spot.placed(innermost.span);
    match &innermost.kind {
        ExpressionKind::Quantity(_) => quantity(deck, spot, path),
        ExpressionKind::Word(word) => word_in_slot(deck, spot, innermost, path.len() == 1, word),
        ExpressionKind::Member(owner, member) => member_of(deck, spot, owner, member),
        ExpressionKind::Call(function, _) if function.span.touches(spot.inside()) => {
            let described = REGION_NUMBERS.iter().find(|row| row.name == &*function.text).map(|row| row.description);
            let described = described
                .or_else(|| FUNCTIONS.iter().find(|row| row.name == &*function.text).map(|row| row.description))?;
            Some(Hover { span: spot.placed(function.span), markdown: format!("**{}**  \n{described}", function.text) })
        }
        ExpressionKind::Text(path) if spot.is_head() && spot.row.is_some_and(|row| row.word == "include") => {
            Some(Hover { span, markdown: format!("Entries of `{path}` are taken in.") })
        }
        _ => None,
    }
}

/// A quantity: in SI and other usual units, its dimension, and what the library says there.
fn quantity(deck: &Deck, spot: &Spot<'_>, path: &[&Expression]) -> Option<Hover> {
    let signed = path.get(1).and_then(|outer| literal(outer)).filter(|(_, negative)| *negative).is_some();
    let whole = if signed { *path.get(1)? } else { *path.first()? };
    let (quantity, negative) = literal(whole)?;
    let outermost = path.last()?;
    let slot = spot.slot_of(outermost);
    let kind = match slot.map(|slot| slot.takes) {
        Some(Takes::Quantity(_, kind)) if outermost.span == whole.span => Some(kind),
        Some(Takes::Quantity(..)) => Some(Temperature::Difference),
        _ => None,
    };
    let span = spot.placed(whole.span);
    let written = whole.span.of(&spot.entry.text);
    let Some(amount) = amount(quantity, negative, kind) else {
        return quantity.unit.is_none().then(|| Hover { span, markdown: format!("**{written}**  \na plain number") });
    };
    let mut what = amount.dimension().words();
    if amount.dimension() == TEMPERATURE && amount.is_difference {
        what = "a difference of temperatures".to_string();
    }
    let elsewhere: Vec<String> = amount
        .elsewhere()
        .into_iter()
        .map(|(number, unit)| format!("{} {unit}", numbers::rounded(number, 6)))
        .collect();
    let mut markdown = format!("**{written}**  \n{what} ({})", amount.dimension().base_units());
    if !elsewhere.is_empty() {
        markdown.push_str(&format!("\n\n= {}", elsewhere.join(" = ")));
    }
    let says = match spot.statement().and_then(|row| library_at_reference(deck, spot, row.word)) {
        Some(says) => Some(says),
        None if amount.dimension() == TEMPERATURE && !amount.is_difference => library_at(deck, spot, amount.si()),
        None => None,
    };
    if let Some(says) = says {
        markdown.push_str(&format!("\n\n{says}"));
    }
    Some(Hover { span, markdown })
}

/// What the library says of a property that a fluid states: "water at 40 degC, 2 bar: 0.653 mPa.s".
fn library_at_reference(deck: &Deck, spot: &Spot<'_>, word: &str) -> Option<String> {
    let row = library::property(word).filter(|_| spot.row.is_some_and(|row| row.word == "fluid"))?;
    let fluid = library::fluid_at(spot, &deck.case)?;
    let temperature = fluid.reference_temperature.as_ref()?.si;
    let properties = library::properties_at(&deck.case, fluid, temperature)?;
    let value = (row.value)(&properties);
    if !value.is_finite() {
        return None;
    }
    let state = library::state_in_words(&deck.case, fluid, temperature);
    Some(format!("{state}: {}", display::format_si(value, row.dimension)))
}

/// What the library says of the fluid here at a temperature.
fn library_at(deck: &Deck, spot: &Spot<'_>, temperature: f64) -> Option<String> {
    let fluid = library::fluid_at(spot, &deck.case)?;
    let properties = library::properties_at(&deck.case, fluid, temperature)?;
    let values: Vec<String> = library::PROPERTIES
        .iter()
        .map(|row| (row, (row.value)(&properties)))
        .filter(|(_, value)| value.is_finite())
        .map(|(row, value)| format!("{} {}", row.symbol, display::format_si(value, row.dimension)))
        .collect();
    Some(format!("{}: {}", library::state_in_words(&deck.case, fluid, temperature), values.join(", ")))
}

/// A word: one that the slot offers, the name of an entry, a check, or a value.
fn word_in_slot(deck: &Deck, spot: &Spot<'_>, word: &Expression, is_alone: bool, text: &str) -> Option<Hover> {
    let span = spot.placed(word.span);
    let takes = spot.slot_of(word).filter(|_| is_alone).map(|slot| slot.takes);
    let show = |markdown: String| Some(Hover { span, markdown });
    match takes {
        Some(Takes::Choice(choices) | Takes::ChoiceOrQuantity(choices, _))
            if choices.iter().any(|choice| choice.word == text) =>
        {
            let choice = choices.iter().find(|choice| choice.word == text)?;
            let mut markdown = format!("**{text}**  \n{}", choice.description);
            if spot.statement().is_some_and(|row| row.word == "density-law") {
                markdown.push_str(&hover_entity::criteria(deck, spot).unwrap_or_default());
            }
            show(markdown)
        }
        Some(Takes::CheckName) => {
            let check = crate::checks::find(text)?;
            let basis = &check.basis;
            let mut markdown = format!("**{text}** ({})  \n{}", check.family.word(), basis.compares);
            if !basis.formula.is_empty() {
                markdown.push_str(&format!("\n\n{}", basis.formula));
            }
            markdown.push_str(&format!("\n\n{}\n\nSource: {}", basis.remedy, basis.source));
            show(markdown)
        }
        Some(Takes::Name(of)) if of != vocabulary::NameOf::Varied => {
            hover_entity::entity(deck, of, text).and_then(show)
        }
        Some(Takes::NewName) => {
            let of = crate::case::declare::named_kind(spot.row?.kind);
            match of {
                Some(of) => hover_entity::entity(deck, of, text).and_then(show),
                None => None,
            }
        }
        _ => name(deck, spot, text, word.span),
    }
}

/// A named value, or a constant. The owner of a region's number is a region.
fn name(deck: &Deck, spot: &Spot<'_>, text: &str, span: Span) -> Option<Hover> {
    let show = |markdown: String| Some(Hover { span: spot.placed(span), markdown });
    let place = Place::new(spot.file, spot.placed(span));
    if let Some(given) = value_named(deck, place, text) {
        return show(describe_value(deck, given));
    }
    if let Some(constant) = CONSTANTS.iter().find(|constant| constant.name == text) {
        return show(format!("**{text}**  \n{}", constant.description));
    }
    hover_entity::entity(deck, vocabulary::NameOf::Region, text).and_then(show)
}

/// The definition of a named value.
fn value_named<'d>(deck: &'d Deck, place: Place, text: &str) -> Option<&'d ResolvedGiven> {
    let resolution = &deck.resolution;
    let mut all = resolution.given.iter().chain(&resolution.varied);
    let target = resolution.references.iter().find(|reference| reference.place == place).map(|found| found.target);
    match target {
        Some(target) => all.find(|given| given.name.place == target),
        None => all.find(|given| &*given.name.text == text),
    }
}

fn describe_value(deck: &Deck, given: &ResolvedGiven) -> String {
    let varied = deck.resolution.sweep.axes.iter().find_map(|axis| {
        let index = axis.names.iter().position(|number| *number == given.number)?;
        axis.values.get(index)
    });
    let value = match varied.map(Vec::as_slice) {
        Some([first, .., last]) => {
            let count = varied.map_or(0, Vec::len);
            format!("{} .. {}, {count} values", in_words(*first, given), in_words(*last, given))
        }
        _ => value_of(deck, given),
    };
    let mut markdown = format!("**{} = {value}**", given.name.text);
    let is_difference = given.dimension == TEMPERATURE && given.kind == Some(crate::case::kinds::Kind::Difference);
    let what = if is_difference { "a difference of temperatures".to_string() } else { given.dimension.words() };
    markdown.push_str(&format!("  \n{what}"));
    if !given.description.is_empty() {
        markdown.push_str(&format!("\n\n{}", given.description));
    }
    let uses = deck.resolution.references.iter().filter(|reference| reference.target == given.name.place).count();
    markdown.push_str(&format!("\n\nused {}", if uses == 1 { "once".to_string() } else { format!("{uses} times") }));
    markdown
}

/// `owner.member`: the owner, or the statement that gives the member.
fn member_of(deck: &Deck, spot: &Spot<'_>, owner: &Word, member: &Word) -> Option<Hover> {
    let kinds = [vocabulary::NameOf::Region, vocabulary::NameOf::Fluid, vocabulary::NameOf::Solid];
    if owner.span.touches(spot.inside()) {
        let markdown = kinds.into_iter().find_map(|of| hover_entity::entity(deck, of, &owner.text))?;
        return Some(Hover { span: spot.placed(owner.span), markdown });
    }
    let place = super::navigate::member_place(deck, &owner.text, &member.text)?;
    let written = place.span.of(&deck.file(place.file)?.text);
    let markdown = format!("**{}.{} = {written}**", owner.text, member.text);
    Some(Hover { span: spot.placed(member.span), markdown })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ide::testing::{DECK, at};

    fn shown(marked: &str) -> String {
        let (deck, offset) = at(marked);
        hover(&deck, DECK, offset).map_or_else(String::new, |hover| hover.markdown)
    }

    fn says(marked: &str, parts: &[&str]) {
        let markdown = shown(marked);
        for part in parts {
            assert!(markdown.contains(part), "no `{part}` in:\n{markdown}");
        }
    }

    const FLUID: &str = "fluid room_water\n    substance water\n    reference 40 degC at 2 bar\n";

    #[test]
    fn a_quantity_in_other_units_and_by_the_library() {
        // Outside: iapws 1.5.5 (IF97 with R12-08) gives 6.5274e-4 Pa.s at 313.15 K and 0.2 MPa.
        says(
            &format!("{FLUID}    viscosity 0.9 m$0Pa.s\n"),
            &["0.9 mPa.s", "a dynamic viscosity", "0.0009 Pa.s", "0.9 cP", "water at 40 degC, 2 bar: 0.6527 mPa.s"],
        );
    }

    #[test]
    fn a_temperature_in_kelvin_with_the_properties_there() {
        says(
            "fluid f\n    substance air\n    reference 2$05 degC at 1 bar\n",
            &["298.15 K", "77 degF", "a temperature", "air at 25 degC, 1 bar: ρ 1.1", "Pr 0.7"],
        );
        says("fluid f\n    reference -4$00 degC\n", &["**-40 degC**", "233.15 K", "-40 degF"]);
    }

    #[test]
    fn a_difference_is_not_a_temperature() {
        let markdown = shown("given\n    T = 20 degC + 5$0 K difference\n");
        assert!(markdown.contains("a difference of temperatures") && markdown.contains("9 degR"), "{markdown}");
        assert!(!markdown.contains("degC"), "{markdown}");
    }

    #[test]
    fn a_name() {
        let deck = "given\n    T_floor = 8 degC \"air of the floor\"\nboundary b of r\n    held at T_fl$0oor\n";
        says(deck, &["**T_floor = 8 degC**", "air of the floor", "used once"]);
        says("given\n    # the big one\n    a$0 = 2 * 1 m\n    b = a\n", &["**a = 2 m**", "the big one"]);
        says(
            "vary\n    T over 30 degC .. 80 degC step 10 K\nboundary b of r\n    held at T$0\n",
            &["30 degC .. 80 degC, 6 values"],
        );
        says("given\n    a = p$0i\n", &["circumference"]);
    }

    #[test]
    fn words_of_the_language() {
        says("fluid f\n    dens$0ity-law boussinesq\n", &["density-law BOUSSINESQ / ".to_lowercase().as_str()]);
        says("fluid f\n    density-law ideal$0-gas\n", &["ideal-gas law"]);
        says("ru$0n\n    steady\n", &["How the case is run in time."]);
        says("waive unkno$0wn-unit\n    because \"a\"\n", &["units", "BIPM"]);
    }

    #[test]
    fn entries_by_name() {
        says("# behind glass\nregion cab\n    box 1 m by 1 m\nboundary b of c$0ab\n", &["region cab", "behind glass"]);
        says("fluid f\n    substance wa$0ter\n", &["IAPWS", "valid from 0 degC"]);
        says(
            &format!("{FLUID}region r\n    filled with room_wa$0ter\n"),
            &["| μ | viscosity | 0.6527 mPa.s", "by the library"],
        );
        says("region r\n    box 2 m by 1 m\ngiven\n    a = r.wid$0th\n", &["r.width = 2 m"]);
    }

    #[test]
    fn at_every_place_of_a_broken_deck_nothing_breaks() {
        let text = format!(
            "{FLUID}    viscosity 1e999 mPa.s\n    density 5\nboundary é of (\n  held at -\"\nrequire\n  Ra(q < 5 ..\n"
        );
        let deck = crate::workspace::analyse_text(&text, crate::testing::TODAY);
        for offset in 0..=text.len() + 2 {
            hover(&deck, DECK, offset);
        }
    }
}
