//! What hover shows of an entry by its name: a region with its arrangement and numbers, a fluid with its state, a
//! substance with its data; and the criteria of a density law.

use super::library;
use super::spot::Spot;
use crate::case::bind::BoundEntry;
use crate::case::model::{Case, DensityLaw, Fluid, Region, Substance};
use crate::checks::Subject;
use crate::checks::density_law::criteria::{Criterion, of_laws};
use crate::physics::model::RegionPhysics;
use crate::quantity::display::{format_difference, format_number, format_si};
use crate::vocabulary::arrangements::ARRANGEMENTS;
use crate::vocabulary::statements::{LENGTH, NUMBER, TEMPERATURE};
use crate::vocabulary::{EntryKind, NameOf};
use crate::workspace::Deck;

/// Markdown for the entry of a name.
pub fn entity(deck: &Deck, of: NameOf, name: &str) -> Option<String> {
    let kinds: &[NameOf] = match of {
        NameOf::Anything => &[NameOf::Region, NameOf::Boundary, NameOf::Fluid, NameOf::Solid, NameOf::Substance],
        NameOf::Substance => &[NameOf::Substance],
        NameOf::Fluid => &[NameOf::Fluid],
        NameOf::Solid => &[NameOf::Solid],
        NameOf::Region => &[NameOf::Region],
        NameOf::Boundary => &[NameOf::Boundary],
        NameOf::Varied => &[],
    };
    kinds.iter().find_map(|kind| of_kind(deck, *kind, name))
}

fn of_kind(deck: &Deck, kind: NameOf, name: &str) -> Option<String> {
    let case = &deck.case;
    let entry = deck.resolution.entries.iter().find(|entry| {
        crate::case::declare::named_kind(entry.row.kind) == Some(kind)
            && entry.name.as_ref().is_some_and(|own| &*own.text == name)
    });
    if kind == NameOf::Substance {
        let own = case.substances.iter().find(|substance| &*substance.name.text == name);
        return own.or_else(|| crate::substances::library::find(name)).map(substance);
    }
    let entry = entry?;
    let mut markdown = format!("**{} {name}**", entry.row.word);
    if let Some(description) = &entry.description {
        markdown.push_str(&format!("  \n{}", description.replace('\n', "  \n")));
    }
    match entry.row.kind {
        EntryKind::Region => {
            let index = case.regions.iter().position(|region| &*region.name.text == name);
            if let Some((region, physics)) = index.and_then(|at| case.regions.get(at).zip(deck.physics.regions.get(at)))
            {
                markdown.push_str(&region_lines(case, region, physics));
            }
        }
        EntryKind::Fluid => {
            if let Some(fluid) = case.fluid(name) {
                markdown.push_str(&fluid_lines(case, fluid));
            }
        }
        _ => markdown.push_str(&statements(deck, entry)),
    }
    Some(markdown)
}

/// The statements of an entry as they stand in the deck.
fn statements(deck: &Deck, entry: &BoundEntry) -> String {
    let Some(file) = deck.file(entry.head.file) else { return String::new() };
    let lines: Vec<&str> = entry.statements.iter().map(|statement| statement.place.span.of(&file.text)).collect();
    if lines.is_empty() { String::new() } else { format!("\n\n```buoy\n{}\n```", lines.join("\n")) }
}

fn region_lines(case: &Case, region: &Region, physics: &RegionPhysics) -> String {
    let mut lines: Vec<String> = Vec::new();
    let word = crate::report::numbers::word(physics.arrangement.kind);
    if !word.is_empty() {
        let about = ARRANGEMENTS.iter().find(|choice| choice.word == word).map_or("", |choice| choice.description);
        lines.push(format!("{word}: {about}. {}", physics.arrangement.why));
    }
    if let Some(bracket) = &physics.bracket {
        let rests = if bracket.rests_on_estimate() { ", estimated" } else { "" };
        lines.push(format!(
            "{} ({}) to {} ({}){rests}",
            format_si(bracket.lowest.value, TEMPERATURE),
            bracket.lowest.set_by,
            format_si(bracket.highest.value, TEMPERATURE),
            bracket.highest.set_by
        ));
    }
    let numbers = &physics.numbers;
    let rows = [
        ("Ra", numbers.rayleigh, NUMBER),
        ("Pr", numbers.prandtl, NUMBER),
        ("Nu", numbers.nusselt, NUMBER),
        ("αΔT", numbers.expansion_span, NUMBER),
        ("L", physics.geometry.length, LENGTH),
    ];
    let mut shown: Vec<String> = rows
        .into_iter()
        .filter(|(_, value, _)| value.is_finite())
        .map(|(symbol, value, dimension)| format!("{symbol} {}", format_si(value, dimension)))
        .collect();
    if numbers.difference.is_finite() {
        shown.push(format!("ΔT {}", format_difference(numbers.difference)));
    }
    if !shown.is_empty() {
        lines.push(shown.join(", "));
    }
    if !numbers.nusselt_basis.is_empty() && numbers.nusselt.is_finite() {
        let range = if numbers.nusselt_inside_range { "" } else { "; outside its published range" };
        lines.push(format!("Nu by {}{range}", numbers.nusselt_basis));
    }
    if let Some(fluid) = case.fluid_of(region) {
        lines.push(format!("filled with {}", fluid.name.text));
    }
    lines.iter().map(|line| format!("\n\n{line}")).collect()
}

fn fluid_lines(case: &Case, fluid: &Fluid) -> String {
    let Some(temperature) = fluid.reference_temperature.as_ref().map(|value| value.si) else { return String::new() };
    let state = library::state_in_words(case, fluid, temperature);
    let Some(properties) = library::properties_at(case, fluid, temperature) else {
        return format!("\n\n{state}");
    };
    let rows: Vec<String> = library::PROPERTIES
        .iter()
        .map(|row| (row, (row.value)(&properties)))
        .filter(|(_, value)| value.is_finite())
        .map(|(row, value)| format!("| {} | {} | {} |", row.symbol, row.word, format_si(value, row.dimension)))
        .collect();
    format!("\n\n{state}, by the library:\n\n| | | |\n|---|---|---|\n{}", rows.join("\n"))
}

fn substance(substance: &Substance) -> String {
    let mut markdown = format!("**substance {}**", substance.name.text);
    if !substance.description.is_empty() {
        markdown.push_str(&format!("  \n{}", substance.description));
    }
    if let Some((low, high)) = substance.valid {
        markdown.push_str(&format!(
            "\n\nvalid from {} to {}",
            format_si(low, TEMPERATURE),
            format_si(high, TEMPERATURE)
        ));
    }
    if let Some((least, most)) = substance.fraction {
        markdown.push_str(&format!(
            "\n\nmass fraction {} % to {} %",
            format_number(100.0 * least),
            format_number(100.0 * most)
        ));
    }
    for (word, text) in [("Source", &substance.source), ("Deviation", &substance.deviation)] {
        if !text.is_empty() {
            markdown.push_str(&format!("\n\n{word}: {text}"));
        }
    }
    markdown
}

/// Every criterion of the Boussinesq law for the fluid at the spot, region by region, as a table. Under another law: what
/// the Boussinesq law would meet.
pub fn criteria(deck: &Deck, spot: &Spot<'_>) -> Option<String> {
    let fluid = library::fluid_at(spot, &deck.case)?;
    let law = fluid.density_law?.value;
    // The day plays no part in a criterion.
    let subject = Subject { case: &deck.case, physics: &deck.physics, today: "" };
    let all = of_laws(&subject, &[law]);
    let of_fluid: Vec<&Criterion> =
        all.iter().filter(|one| *one.fluid == *fluid.name.text && one.value.is_finite()).collect();
    let mut regions: Vec<&str> = of_fluid.iter().map(|one| one.region.as_str()).collect();
    regions.dedup();
    let mut markdown = String::new();
    for region in regions {
        let title = match law {
            DensityLaw::Boussinesq => format!("The Boussinesq law in {region}"),
            _ => format!("What the Boussinesq law would meet in {region}"),
        };
        markdown.push_str(&format!("\n\n{title}\n\n| | value | limit | margin left |\n|---|---|---|---|"));
        for one in of_fluid.iter().filter(|one| one.region == region) {
            markdown.push_str(&format!("\n{}", row(one)));
        }
    }
    (!markdown.is_empty()).then_some(markdown)
}

fn row(one: &Criterion) -> String {
    let limit = one.limits.first().map_or_else(String::new, |(_, limit)| format_number(*limit));
    let margin = if one.margin_left.is_finite() {
        format!("{} %", format_number((100.0 * one.margin_left).round()))
    } else {
        String::new()
    };
    let level = one.level.map_or_else(String::new, |level| format!(" **{}**", level.word()));
    let band = one
        .band
        .map_or_else(String::new, |(least, most)| format!(" ({} .. {})", format_number(least), format_number(most)));
    format!("| {} {} | {}{band}{level} | {limit} | {margin} |", one.check.name, one.symbol, format_number(one.value))
}
