//! A substance entry as property data.

use super::bind::{Bound, BoundEntry, base_of};
use super::compiled::{Compiled, Variable};
use super::declare::DeclaredEntry;
use super::expression::{Scope, Typed, Worker, in_words};
use super::model::{Name, Property, State, Substance};
use crate::quantity::Dimension;
use crate::syntax::tree::{Expression, ExpressionKind};
use crate::syntax::{Finding, Level, Place};
use crate::vocabulary::Takes;
use crate::vocabulary::statements::{CONDUCTIVITY, DENSITY, EXPANSION, HEAT_CAPACITY, TEMPERATURE, VISCOSITY};

/// Most definitions in a substance. They may refer to one another, and each is evaluated where it is used.
const LOCALS: usize = 200;

/// The property data of a substance entry. `evaluate` gives a value that depends on nothing of the substance.
pub fn substance<'t>(
    worker: &mut Worker<'_, 't>,
    entry: &DeclaredEntry<'t>,
    bound: &BoundEntry,
    evaluate: &dyn Fn(&Compiled) -> f64,
) -> Substance {
    let base = base_of(entry);
    let mut locals: Vec<(String, Typed, Place)> = Vec::new();
    for definition in entry.definitions.iter().take(LOCALS) {
        let place = entry.place(definition.name.span);
        let name = definition.name.text.to_string();
        if locals.iter().any(|(other, _, _)| *other == name) {
            let message = format!("`{name}` is defined already in this substance.");
            worker.findings.push(Finding::new("repeated-name", Level::Error, place, message));
            continue;
        }
        let typed = match &definition.value {
            Some(expression) => worker.work(expression, base, Scope::Property(&locals)),
            None => missing_value(worker, place),
        };
        locals.push((name, typed, place));
    }
    if let Some(over) = entry.definitions.get(LOCALS) {
        let message = format!("A substance holds up to {LOCALS} definitions.");
        worker.findings.push(Finding::new("line-too-complex", Level::Error, entry.place(over.span), message));
    }
    let text = |word: &str| match slot_of(bound, word, 0) {
        Some(Bound::Text(text)) => text.text.clone(),
        _ => "".into(),
    };
    let pair = |word: &str| match (slot_of(bound, word, 0), slot_of(bound, word, 1)) {
        (Some(Bound::Value(low)), Some(Bound::Value(high))) => {
            Some((evaluate(&low.compiled), evaluate(&high.compiled)))
        }
        _ => None,
    };
    let state = match slot_of(bound, "state", 0) {
        Some(Bound::Choice("gas", _)) => Some(State::Gas),
        Some(Bound::Choice("liquid", _)) => Some(State::Liquid),
        _ => None,
    };
    let mut property = |word: &str| {
        let index = entry.statements.iter().position(|statement| statement.row.word == word)?;
        property_of(worker, entry, index, bound, &locals, evaluate)
    };
    let mut substance = Substance {
        name: bound.name.clone().unwrap_or(Name { text: "".into(), place: bound.head }),
        description: bound.description.clone().unwrap_or_default().into(),
        source: text("source"),
        deviation: text("deviation"),
        state,
        valid: pair("valid"),
        fraction: pair("fraction"),
        locals: Vec::new(),
        density: property("density"),
        heat_capacity: property("heat-capacity"),
        viscosity: property("viscosity"),
        conductivity: property("conductivity"),
        expansion: property("expansion"),
        compressibility: property("compressibility"),
        boils: property("boils"),
        freezes: property("freezes"),
    };
    fill_from_table(worker, entry, bound, &mut substance, evaluate);
    substance.locals = locals.into_iter().map(|(_, typed, _)| settled(typed.compiled, evaluate)).collect();
    for property in [
        &mut substance.density,
        &mut substance.heat_capacity,
        &mut substance.viscosity,
        &mut substance.conductivity,
        &mut substance.expansion,
        &mut substance.compressibility,
        &mut substance.boils,
        &mut substance.freezes,
    ] {
        if let Some(Property::Expression(compiled)) = property {
            *compiled = settled(compiled.clone(), evaluate);
        }
    }
    check_whole(worker, bound, &substance);
    substance
}

fn missing_value(worker: &mut Worker<'_, '_>, place: Place) -> Typed {
    worker.findings.push(Finding::new(
        "missing-argument",
        Level::Error,
        place,
        "This definition has no value behind `=`.",
    ));
    Typed::unknown()
}

/// The first thing in a slot of a statement.
fn slot_of<'b>(bound: &'b BoundEntry, word: &str, slot: usize) -> Option<&'b Bound> {
    bound.statements.iter().find(|statement| statement.row.word == word)?.slots.get(slot)?.first()
}

/// The compiled form with every part that depends on nothing of the substance worked out, so that a property is
/// evaluated with no look at the deck. Recursion is as deep as the expression, which `syntax` bounds.
fn settled(compiled: Compiled, evaluate: &dyn Fn(&Compiled) -> f64) -> Compiled {
    let mut is_own = false;
    compiled.variables(&mut |variable| is_own |= !matches!(variable, Variable::Given(_) | Variable::Deviation(_)));
    if !is_own {
        return Compiled::Constant(evaluate(&compiled));
    }
    let again = |inner: Box<Compiled>| Box::new(settled(*inner, evaluate));
    match compiled {
        Compiled::Binary(operation, left, right) => Compiled::Binary(operation, again(left), again(right)),
        Compiled::Negative(inner) => Compiled::Negative(again(inner)),
        Compiled::Function(function, inner) => Compiled::Function(function, again(inner)),
        Compiled::Extreme { greatest, of } => {
            Compiled::Extreme { greatest, of: of.into_iter().map(|inner| settled(inner, evaluate)).collect() }
        }
        other => other,
    }
}

fn property_of<'t>(
    worker: &mut Worker<'_, 't>,
    entry: &DeclaredEntry<'t>,
    index: usize,
    bound: &BoundEntry,
    locals: &[(String, Typed, Place)],
    evaluate: &dyn Fn(&Compiled) -> f64,
) -> Option<Property> {
    let statement = entry.statements.get(index)?;
    let word = statement.row.word;
    for (number, slot) in statement.row.slots.iter().enumerate() {
        match (slot.takes, slot_of(bound, word, number)) {
            (Takes::Choice(_), Some(Bound::Choice(form, _))) => return Some(Property::Code(form)),
            (Takes::PropertyForm(dimension), Some(_)) => {
                let expression: &'t Expression = statement.arguments.get(number)?.first()?;
                let typed = worker.work(expression, base_of(entry), Scope::Property(locals));
                return Some(Property::Expression(hold_dimension(
                    worker,
                    word,
                    dimension,
                    typed,
                    entry.place(expression.span),
                )));
            }
            _ => {}
        }
    }
    if entry.rows.iter().any(|(follows, _)| *follows == Some(index)) {
        let cells = rows_below(worker, entry, index, &["temperature", word], evaluate);
        return Some(Property::Table(column_of(&cells, 1)));
    }
    let message =
        format!("`{word}` needs a value, an expression, `by` a form, or rows of temperature and value below it.");
    worker.findings.push(Finding::new("missing-argument", Level::Error, statement.place, message));
    None
}

fn hold_dimension(worker: &mut Worker<'_, '_>, word: &str, wanted: Dimension, typed: Typed, place: Place) -> Compiled {
    match typed.dimension {
        Some(found) if found != wanted => {
            let message = format!(
                "`{word}` is {} ({}); this comes out as {} ({}).",
                wanted.words(),
                wanted.base_units(),
                in_words(Some(found)),
                found.base_units()
            );
            worker.findings.push(Finding::new("dimension-mismatch", Level::Error, place, message));
            Compiled::Constant(f64::NAN)
        }
        _ => typed.compiled,
    }
}

/// What a table of several columns gives, for the properties that no statement of their own gives.
fn fill_from_table<'t>(
    worker: &mut Worker<'_, 't>,
    entry: &DeclaredEntry<'t>,
    bound: &BoundEntry,
    substance: &mut Substance,
    evaluate: &dyn Fn(&Compiled) -> f64,
) {
    for (follows, row) in &entry.rows {
        let is_below_nothing = follows.and_then(|index| entry.statements.get(index)).is_none_or(|statement| {
            statement.row.word != "table" && statement.arguments.iter().any(|list| !list.is_empty())
        });
        if is_below_nothing {
            let message = "This row follows neither `table` nor a property without a value, such as `viscosity`.";
            worker.findings.push(Finding::new("misplaced-statement", Level::Error, entry.place(row.span), message));
        }
    }
    let Some(index) = entry.statements.iter().position(|statement| statement.row.word == "table") else { return };
    let Some(table) = bound.statements.get(index) else { return };
    let columns: Vec<&'static str> =
        table.slots.iter().flatten().map(|bound| if let Bound::Choice(word, _) = bound { *word } else { "" }).collect();
    if columns.first() != Some(&"temperature") {
        worker.findings.push(Finding::new(
            "unexpected-argument",
            Level::Error,
            table.place,
            "The first column is `temperature`.",
        ));
        return;
    }
    let cells = rows_below(worker, entry, index, &columns, evaluate);
    for (property, name) in [
        (&mut substance.density, "density"),
        (&mut substance.heat_capacity, "heat-capacity"),
        (&mut substance.viscosity, "viscosity"),
        (&mut substance.conductivity, "conductivity"),
    ] {
        if let (None, Some(column)) = (&property, columns.iter().position(|column| *column == name)) {
            *property = Some(Property::Table(column_of(&cells, column)));
        }
    }
    if let (None, Some(first), Some(last)) = (substance.valid, cells.first(), cells.last()) {
        substance.valid = first.first().copied().zip(last.first().copied());
    }
}

/// Temperatures and values of a column, where both are known.
fn column_of(cells: &[Vec<f64>], column: usize) -> Vec<(f64, f64)> {
    let rows = cells.iter().filter_map(|row| Some((*row.first()?, *row.get(column)?)));
    rows.filter(|(temperature, value)| temperature.is_finite() && value.is_finite()).collect()
}

/// The rows below a statement, in SI, with rising temperatures.
fn rows_below<'t>(
    worker: &mut Worker<'_, 't>,
    entry: &DeclaredEntry<'t>,
    statement: usize,
    columns: &[&str],
    evaluate: &dyn Fn(&Compiled) -> f64,
) -> Vec<Vec<f64>> {
    let mut cells: Vec<Vec<f64>> = Vec::new();
    for (_, row) in entry.rows.iter().filter(|(follows, _)| *follows == Some(statement)) {
        if row.cells.len() != columns.len() {
            let message = format!("This row has {} cells; the table has {} columns.", row.cells.len(), columns.len());
            worker.findings.push(Finding::new("unexpected-argument", Level::Error, entry.place(row.span), message));
            continue;
        }
        let mut values = Vec::new();
        for (cell, column) in row.cells.iter().zip(columns) {
            values.push(table_cell(worker, entry, cell, column, evaluate));
        }
        let temperature = values.first().copied().unwrap_or(f64::NAN);
        if cells.last().and_then(|last| last.first()).is_some_and(|last| temperature <= *last) {
            let message = "Temperatures of a table rise from row to row.";
            worker.findings.push(Finding::new("not-physical", Level::Error, entry.place(row.span), message));
            continue;
        }
        cells.push(values);
    }
    cells
}

fn table_cell<'t>(
    worker: &mut Worker<'_, 't>,
    entry: &DeclaredEntry<'t>,
    cell: &'t Expression,
    column: &str,
    evaluate: &dyn Fn(&Compiled) -> f64,
) -> f64 {
    let place = entry.place(cell.span);
    if let ExpressionKind::Text(_) = cell.kind {
        worker.findings.push(Finding::new(
            "unexpected-argument",
            Level::Error,
            place,
            "A value with its unit stands in a cell.",
        ));
        return f64::NAN;
    }
    let wanted = match column {
        "temperature" => TEMPERATURE,
        "density" => DENSITY,
        "heat-capacity" => HEAT_CAPACITY,
        "viscosity" => VISCOSITY,
        "conductivity" => CONDUCTIVITY,
        "expansion" => EXPANSION,
        _ => return f64::NAN,
    };
    let typed = worker.work(cell, base_of(entry), Scope::Deck);
    if typed.is_bare_number {
        let message = format!("A {column} has a unit.");
        worker.findings.push(Finding::new("bare-number", Level::Error, place, message));
        return f64::NAN;
    }
    evaluate(&hold_dimension(worker, column, wanted, typed, place))
}

fn check_whole(worker: &mut Worker<'_, '_>, bound: &BoundEntry, substance: &Substance) {
    let mut missing = Vec::new();
    if substance.density.is_none() {
        missing.push("density");
    }
    if substance.valid.is_none() {
        missing.push("valid");
    }
    if !missing.is_empty()
        && !worker.findings.iter().any(|finding| finding.place.file == bound.head.file && finding.level == Level::Error)
    {
        let message =
            format!("Substance `{}` says nothing of {}.", substance.name.text, super::declare::join(&missing));
        worker.findings.push(
            Finding::new("missing-statement", Level::Error, bound.head, message)
                .remedy("`valid from 0 degC to 100 degC` and a density, as statements or as a table"),
        );
    }
    if let Some((low, high)) = substance.valid
        && low >= high
    {
        let message = "The range of the data ends where it starts, or before.";
        worker.findings.push(Finding::new("not-physical", Level::Error, bound.head, message));
    }
}
