//! The table as text: the shape of a word on one line, and the tables of the printed reference as Markdown.

use super::functions::{CONSTANTS, FUNCTIONS, REGION_NUMBERS};
use super::rows::{Choice, EntryKind, EntryRow, NameOf, Need, Slot, Takes, Temperature, Times};
use super::{ENTRIES, arrangements, choices, statements_of};
use crate::quantity::dimension_names::KINDS;
use crate::quantity::prefix::PREFIXES;
use crate::quantity::unit_table::{Prefixes, UNITS, UnitRow};
use crate::quantity::{Dimension, Scale, usual_units};

/// A word and what it takes, on one line: `box WIDTH by DEPTH [by HEIGHT]`. Brackets stand around what may be left
/// out; `..` behind what may be several.
pub fn shape(word: &str, slots: &[Slot]) -> String {
    let mut line = word.to_string();
    for slot in slots {
        let link = if slot.link.is_empty() { String::new() } else { format!("{} ", slot.link) };
        let mut part = format!("{link}{}", placeholder(slot));
        if matches!(slot.need, Need::Several | Need::OneOrMore) {
            part.push_str(", ..");
        }
        if matches!(slot.need, Need::Optional | Need::Several) {
            part = format!("[{part}]");
        }
        line.push(' ');
        line.push_str(&part);
    }
    line
}

/// What stands for a slot: its one word where it offers one, else its name in capitals.
fn placeholder(slot: &Slot) -> String {
    match slot.takes {
        Takes::Choice([only]) => only.word.to_string(),
        Takes::Text | Takes::Path => format!("\"{}\"", slot.name.to_uppercase()),
        _ => slot.name.to_uppercase(),
    }
}

/// What a slot takes, in words: `a temperature (degC, K, ..)`.
pub fn takes(slot: &Slot) -> String {
    match slot.takes {
        Takes::Quantity(dimensions, kind) => {
            let each: Vec<String> = dimensions.iter().map(|dimension| quantity(*dimension, kind)).collect();
            each.join(", or ")
        }
        Takes::PropertyForm(dimension) => {
            format!("an expression in `T`, `p` and `x` that gives {}", quantity(dimension, Temperature::Point))
        }
        Takes::Choice(offered) => words(offered),
        Takes::ChoiceOrQuantity(offered, dimension) => {
            format!("{}, or {}", words(offered), quantity(dimension, Temperature::Point))
        }
        Takes::Name(of) => format!("the name of {}", named(of)),
        Takes::NewName => "a new name".to_string(),
        Takes::Text => "a text in quotes".to_string(),
        Takes::Path => "the path of a deck, in quotes".to_string(),
        Takes::Date => "a day such as `2027-03-01`".to_string(),
        Takes::Direction => "a direction: `x`, `-z`, or a vector `(0, 0, -1)`".to_string(),
        Takes::Vector(dimension) => format!("a vector, each part {}", quantity(dimension, Temperature::Point)),
        Takes::CheckName => "the name of a check".to_string(),
        Takes::LevelName => "`error`, `warning`, `information`, `hint`, or `off`".to_string(),
    }
}

fn quantity(dimension: Dimension, kind: Temperature) -> String {
    let units: Vec<String> = usual_units(dimension).iter().take(3).map(|unit| format!("`{unit}`")).collect();
    let what = match kind {
        Temperature::Difference => format!("{} above another", dimension.words()),
        Temperature::Point => dimension.words(),
    };
    if units.is_empty() || dimension.is_none() { what } else { format!("{what} ({})", units.join(", ")) }
}

fn words(offered: &[Choice]) -> String {
    let each: Vec<String> = offered.iter().map(|choice| format!("`{}`", choice.word)).collect();
    match each.as_slice() {
        [one] => one.clone(),
        _ => format!("one of {}", each.join(", ")),
    }
}

fn named(of: NameOf) -> &'static str {
    match of {
        NameOf::Substance => "a substance",
        NameOf::Fluid => "a fluid",
        NameOf::Solid => "a solid",
        NameOf::Region => "a region",
        NameOf::Boundary => "a boundary",
        NameOf::Varied => "a varied value",
        NameOf::Anything => "an entry, or `case` for the deck as a whole",
    }
}

/// How often, in words.
pub fn how_often(times: Times) -> &'static str {
    match times {
        Times::Once => "once",
        Times::AtMostOnce => "at most once",
        Times::Any => "any number of times",
    }
}

/// A table of the reference: its name, which the marker comments of the reference bear, and its text.
pub type Table = (String, String);

/// Every table of the reference.
pub fn tables() -> Vec<Table> {
    let mut tables = vec![("entries".to_string(), entries())];
    for row in ENTRIES.iter().filter(|row| statements_of(row.kind).next().is_some()) {
        tables.push((format!("statements of {}", row.word), statements(row.kind)));
    }
    let offered: [(&str, &[Choice]); 9] = [
        ("density laws", choices::DENSITY_LAWS),
        ("turbulence models", choices::TURBULENCE_MODELS),
        ("radiation", choices::RADIATION),
        ("sides", choices::SIDES),
        ("arrangements", arrangements::ARRANGEMENTS),
        ("time stepping", choices::TIME_STEPPING),
        ("spacings", choices::SPACINGS),
        ("property forms", choices::PROPERTY_FORMS),
        ("columns", choices::COLUMNS),
    ];
    tables.extend(offered.map(|(name, offered)| (name.to_string(), choice_table(offered))));
    tables.push(("functions".to_string(), functions()));
    tables.push(("constants".to_string(), constants()));
    tables.push(("numbers of a region".to_string(), region_numbers()));
    tables.push(("kinds of quantity".to_string(), kinds()));
    tables.push(("units".to_string(), units()));
    tables.push(("prefixes".to_string(), prefixes()));
    tables
}

/// The name of the marker comment of a table begins so.
const MARKER: &str = "table: ";

/// The reference with every table between its marker comments (`<!-- table: entries -->` to `<!-- end -->`) made anew.
///
/// # Errors
/// Names a marker without a table, a table without a marker, or a marker without an end.
pub fn with_tables(reference: &str) -> Result<String, String> {
    let tables = tables();
    let mut missing: Vec<&str> = tables.iter().map(|(name, _)| name.as_str()).collect();
    let mut out = String::new();
    let mut rest = reference;
    let opening = format!("<!-- {MARKER}");
    while let Some((before, after)) = rest.split_once(&opening) {
        let (name, after) = after.split_once(" -->\n").ok_or("a marker comment does not end")?;
        let (_, after) = after.split_once("<!-- end -->").ok_or(format!("the table `{name}` has no end"))?;
        let (_, table) = tables.iter().find(|(known, _)| known == name).ok_or(format!("there is no table `{name}`"))?;
        missing.retain(|known| *known != name);
        out.push_str(&format!("{before}{opening}{name} -->\n{table}<!-- end -->"));
        rest = after;
    }
    out.push_str(rest);
    match missing.first() {
        Some(name) => Err(format!("the table `{name}` stands nowhere")),
        None => Ok(out),
    }
}

fn table(head: &[&str], rows: impl IntoIterator<Item = Vec<String>>) -> String {
    let line = |cells: &[String]| format!("| {} |\n", cells.join(" | "));
    let mut out = line(&head.iter().map(|cell| (*cell).to_string()).collect::<Vec<_>>());
    out.push_str(&format!("|{}\n", "---|".repeat(head.len())));
    for row in rows {
        out.push_str(&line(&row.iter().map(|cell| cell.replace('|', "\\|")).collect::<Vec<_>>()));
    }
    out
}

fn code(text: &str) -> String {
    format!("`{text}`")
}

fn entries() -> String {
    let head = |row: &EntryRow| code(&shape(row.word, row.slots));
    table(
        &["entry", "how often", "what it says"],
        ENTRIES.iter().map(|row| vec![head(row), how_often(row.times).to_string(), row.description.to_string()]),
    )
}

fn statements(kind: EntryKind) -> String {
    table(
        &["statement", "what it says", "example"],
        statements_of(kind).map(|row| {
            let mut description = row.description.to_string();
            match row.times {
                Times::Once => description.push_str(" Must be there."),
                Times::Any => description.push_str(" May stand several times."),
                Times::AtMostOnce => {}
            }
            vec![code(&shape(row.word, row.slots)), description, code(row.example)]
        }),
    )
}

fn choice_table(offered: &[Choice]) -> String {
    table(
        &["word", "what it means"],
        offered.iter().map(|choice| vec![code(choice.word), choice.description.to_string()]),
    )
}

fn functions() -> String {
    table(
        &["function", "what it gives"],
        FUNCTIONS.iter().map(|function| {
            let arguments = if function.arguments.1 > 1 { "a, b, .." } else { "a" };
            vec![code(&format!("{}({arguments})", function.name)), function.description.to_string()]
        }),
    )
}

fn constants() -> String {
    let rows = CONSTANTS.iter().map(|constant| vec![code(constant.name), constant.description.to_string()]);
    table(&["name", "what it is"], rows)
}

fn region_numbers() -> String {
    let row = |name: &str, description: &str| vec![code(&format!("{name}(cabinet)")), description.to_string()];
    table(&["number", "what it is"], REGION_NUMBERS.iter().map(|number| row(number.name, number.description)))
}

fn kinds() -> String {
    table(
        &["quantity", "usual units"],
        KINDS.iter().map(|kind| {
            let name = kind.name.trim_start_matches("an ").trim_start_matches("a ");
            let units: Vec<String> = kind.units.iter().map(|unit| code(unit)).collect();
            vec![name.to_string(), units.join(", ")]
        }),
    )
}

fn units() -> String {
    let spellings = |row: &UnitRow| row.spellings().map(code).collect::<Vec<_>>().join(", ");
    let prefixed = |row: &UnitRow| match row.prefixes {
        Prefixes::Never => "",
        Prefixes::All => "all",
        Prefixes::KiloAndLarger => "kilo and larger",
    };
    let notes = |row: &UnitRow| {
        let kind = match row.scale {
            Scale::TemperaturePoint => "a point on the scale",
            Scale::Gauge => "a point above ambient pressure",
            Scale::TemperatureOpen | Scale::Plain => "",
        };
        [kind, row.note].into_iter().filter(|note| !note.is_empty()).collect::<Vec<_>>().join("; ")
    };
    table(
        &["unit", "name", "in SI", "prefixes", "note", "source of the factor"],
        UNITS.iter().map(|row| {
            let cells = [spellings(row), row.name.to_string(), in_si(row), prefixed(row).to_string(), notes(row)];
            cells.into_iter().chain([row.source.to_string()]).collect()
        }),
    )
}

/// What one of a unit is in SI.
fn in_si(row: &UnitRow) -> String {
    let base = row.dimension.base_units();
    let offset = if row.offset == 0.0 { String::new() } else { format!(", from {} {base}", exact(row.offset)) };
    format!("{}{}{offset}", exact(row.factor), if base == "1" { String::new() } else { format!(" {base}") })
}

/// All digits that a factor has, up to 12.
fn exact(value: f64) -> String {
    let rounded: f64 = format!("{value:.11e}").parse().unwrap_or(value);
    if (1e-3..1e7).contains(&rounded.abs()) { rounded.to_string() } else { format!("{rounded:e}") }
}

fn prefixes() -> String {
    table(
        &["prefix", "name", "factor"],
        PREFIXES.iter().map(|prefix| {
            let spellings: Vec<String> = prefix.spellings().map(code).collect();
            vec![spellings.join(", "), prefix.name.to_string(), format!("{:e}", prefix.factor)]
        }),
    )
}

#[allow(clippy::unwrap_used, clippy::panic)]
#[cfg(test)]
mod tests {
    use super::*;
    use crate::vocabulary::{entry_row, statement_row};

    #[test]
    fn shapes() {
        let shape_of = |kind, word| statement_row(kind, word).map(|row| shape(row.word, row.slots)).unwrap();
        assert_eq!(shape_of(EntryKind::Region, "box"), "box WIDTH by DEPTH [by HEIGHT]");
        assert_eq!(shape_of(EntryKind::Fluid, "reference"), "reference TEMPERATURE [at PRESSURE]");
        assert_eq!(shape_of(EntryKind::Boundary, "side"), "side SIDES, ..");
        assert_eq!(shape_of(EntryKind::Initial, "at"), "at rest");
        assert_eq!(shape_of(EntryKind::Waive, "because"), "because \"REASON\" [until DAY]");
        let boundary = entry_row("boundary").unwrap();
        assert_eq!(shape(boundary.word, boundary.slots), "boundary NAME of REGION");
    }

    #[test]
    fn every_word_says_what_it_takes() {
        for row in super::super::STATEMENTS {
            for slot in row.slots {
                assert!(!takes(slot).is_empty(), "{}", row.word);
            }
        }
        let gravity = statement_row(EntryKind::Case, "gravity").unwrap();
        assert_eq!(takes(&gravity.slots[0]), "`none`, or an acceleration (`m/s^2`, `ft/s^2`)");
    }

    #[test]
    fn tables_are_put_between_their_markers() {
        let all: String = tables()
            .iter()
            .map(|(name, _)| format!("# {name}\n<!-- table: {name} -->\nSTALE\n<!-- end -->\n"))
            .collect();
        let made = with_tables(&all).unwrap();
        assert!(!made.contains("STALE") && made.contains("| `case [\"TITLE\"]` |"));
        assert_eq!(with_tables(&made).unwrap(), made);
        assert_eq!(with_tables("").unwrap_err(), "the table `entries` stands nowhere");
        assert_eq!(with_tables("<!-- table: x -->\n<!-- end -->").unwrap_err(), "there is no table `x`");
        assert_eq!(with_tables("<!-- table: entries -->\n").unwrap_err(), "the table `entries` has no end");
        for (name, text) in tables() {
            let columns = text.lines().next().unwrap_or("").matches(" | ").count();
            for line in text.lines().skip(2) {
                assert_eq!(line.replace("\\|", "").matches(" | ").count(), columns, "{name}: {line}");
            }
        }
    }

    /// The reference that a user reads has the tables as they are now.
    #[test]
    fn the_reference_is_up_to_date() {
        let path = concat!(env!("CARGO_MANIFEST_DIR"), "/grammar/README.md");
        let reference = std::fs::read_to_string(path).unwrap().replace("\r\n", "\n");
        let made = with_tables(&reference).unwrap();
        if made != reference {
            if std::env::var_os("UPDATE").is_some() {
                std::fs::write(path, made).unwrap();
            } else {
                panic!(
                    "grammar/README.md is behind the vocabulary. This updates it: UPDATE=1 cargo test --lib the_reference"
                );
            }
        }
    }
}
