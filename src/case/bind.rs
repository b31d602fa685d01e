//! What fills the slots of heads and statements, checked against what each slot takes.

use super::compiled::Compiled;
use super::declare::{DeclaredEntry, DeclaredStatement, join};
use super::expression::{Base, Scope, Typed, Worker, in_words};
use super::kinds::Kind;
use super::model::{Name, Origin};
use crate::quantity::suggest::nearest;
use crate::quantity::{Dimension, mend, usual_units};
use crate::syntax::tree::{Expression, ExpressionKind};
use crate::syntax::{Finding, Level, Place};
use crate::vocabulary::rows::Choice;
use crate::vocabulary::statements::{NUMBER, PRESSURE, TEMPERATURE};
use crate::vocabulary::{EntryRow, NameOf, Slot, StatementRow, Takes, Temperature};

/// What fills a slot.
#[derive(Clone, Debug)]
pub enum Bound {
    /// A quantity.
    Value(BoundValue),
    /// A property of a substance.
    Property(Compiled),
    /// One of the slot's words.
    Choice(&'static str, Place),
    /// The name of something.
    Name(Name),
    /// A text, a path, a day or the name of a check, as written.
    Text(Name),
    /// A direction, not yet of length one.
    Direction([Compiled; 3]),
    /// Three quantities.
    Vector(Box<[BoundValue; 3]>),
    /// A level; `None` is off.
    Level(Option<Level>),
    /// Something that does not fit, which has been reported.
    Unfit,
}

/// A quantity in a slot.
#[derive(Clone, Debug)]
pub struct BoundValue {
    /// Its expression.
    pub compiled: Compiled,
    /// Its dimension: one of those that the slot takes.
    pub dimension: Dimension,
    /// Where it stands.
    pub origin: Origin,
}

/// A statement with its slots filled.
#[derive(Clone, Debug)]
pub struct BoundStatement {
    /// Its row in the vocabulary.
    pub row: &'static StatementRow,
    /// Its place.
    pub place: Place,
    /// What fills each slot.
    pub slots: Vec<Vec<Bound>>,
}

/// An entry with its slots filled.
#[derive(Clone, Debug)]
pub struct BoundEntry {
    /// Its row in the vocabulary.
    pub row: &'static EntryRow,
    /// The place of its head.
    pub head: Place,
    /// Its own name.
    pub name: Option<Name>,
    /// What fills each slot of the head.
    pub slots: Vec<Vec<Bound>>,
    /// Its statements.
    pub statements: Vec<BoundStatement>,
    /// The comment lines above it.
    pub description: Option<String>,
}

/// Names from outside the deck that slots may take.
#[derive(Clone, Copy, Debug, Default)]
pub struct Known<'k> {
    /// Built-in substances.
    pub substances: &'k [&'k str],
    /// Checks.
    pub checks: &'k [&'k str],
}

/// Fills the slots of an entry's head and statements.
pub fn bind_entry<'t>(worker: &mut Worker<'_, 't>, entry: &DeclaredEntry<'t>, known: Known<'_>) -> BoundEntry {
    let base = base_of(entry);
    let slots = bind_slots(worker, entry.row.word, entry.row.slots, &entry.arguments, base, known);
    let statements = entry.statements.iter().map(|statement| bind_statement(worker, statement, base, known)).collect();
    let name = entry.name().map(|(text, place)| Name { text: text.into(), place });
    let description = entry.entry.head.and_then(|head| entry.entry.description_above(head));
    BoundEntry { row: entry.row, head: entry.head, name, slots, statements, description }
}

/// Where the spans of an entry count from.
pub fn base_of<'t>(entry: &DeclaredEntry<'t>) -> Base<'t> {
    Base { file: entry.file, offset: entry.offset, text: &entry.entry.text }
}

fn bind_statement<'t>(
    worker: &mut Worker<'_, 't>,
    statement: &DeclaredStatement<'t>,
    base: Base<'t>,
    known: Known<'_>,
) -> BoundStatement {
    let slots = bind_slots(worker, statement.row.word, statement.row.slots, &statement.arguments, base, known);
    BoundStatement { row: statement.row, place: statement.place, slots }
}

fn bind_slots<'t>(
    worker: &mut Worker<'_, 't>,
    word: &str,
    slots: &'static [Slot],
    arguments: &[Vec<&'t Expression>],
    base: Base<'t>,
    known: Known<'_>,
) -> Vec<Vec<Bound>> {
    slots
        .iter()
        .zip(arguments)
        .map(|(slot, list)| {
            list.iter().map(|expression| bind_slot(worker, word, slot, expression, base, known)).collect()
        })
        .collect()
}

fn bind_slot<'t>(
    worker: &mut Worker<'_, 't>,
    word: &str,
    slot: &'static Slot,
    expression: &'t Expression,
    base: Base<'t>,
    known: Known<'_>,
) -> Bound {
    let place = base.place(expression.span);
    match slot.takes {
        Takes::Quantity(dimensions, kind) => {
            let typed = worker.work(expression, base, Scope::Deck);
            Bound::Value(fit(worker, word, slot, dimensions, kind, typed, expression, base))
        }
        Takes::ChoiceOrQuantity(choices, dimension) => match chosen(expression, choices) {
            Some(choice) => Bound::Choice(choice.word, place),
            None => {
                let typed = worker.work(expression, base, Scope::Deck);
                Bound::Value(fit(worker, word, slot, &[dimension], Temperature::Point, typed, expression, base))
            }
        },
        // Worked through with the substance's own definitions, by `substance`.
        Takes::PropertyForm(_) => Bound::Unfit,
        Takes::Choice(choices) => match chosen(expression, choices) {
            Some(choice) => Bound::Choice(choice.word, place),
            None => {
                worker.findings.push(no_choice(word, choices, expression, base));
                Bound::Unfit
            }
        },
        Takes::Name(of) => bind_name(worker, of, expression, base, known),
        Takes::NewName => new_name(worker, word, expression, base),
        Takes::Text | Takes::Path => match &expression.kind {
            ExpressionKind::Text(text) => Bound::Text(Name { text: text.clone(), place }),
            _ => unfit(worker, place, format!("`{word}` takes a text in quotes here.")),
        },
        Takes::Date => match &expression.kind {
            ExpressionKind::Date(day) if is_a_day(day) => Bound::Text(Name { text: day.clone(), place }),
            _ => unfit(worker, place, "A day is written as 2027-03-01.".into()),
        },
        Takes::Direction => bind_direction(worker, expression, base),
        Takes::Vector(dimension) => bind_vector(worker, word, slot, dimension, expression, base),
        Takes::CheckName => bind_check(worker, expression, place, known),
        Takes::LevelName => match &expression.kind {
            ExpressionKind::Word(level) if &**level == "off" => Bound::Level(None),
            ExpressionKind::Word(level) if Level::from_word(level).is_some() => Bound::Level(Level::from_word(level)),
            _ => unfit(worker, place, "A level is `error`, `warning`, `information`, `hint` or `off`.".into()),
        },
    }
}

fn unfit(worker: &mut Worker<'_, '_>, place: Place, message: String) -> Bound {
    worker.findings.push(Finding::new("unexpected-argument", Level::Error, place, message));
    Bound::Unfit
}

fn chosen(expression: &Expression, choices: &'static [Choice]) -> Option<&'static Choice> {
    match &expression.kind {
        ExpressionKind::Word(word) => choices.iter().find(|choice| choice.word == &**word),
        _ => None,
    }
}

fn no_choice(word: &str, choices: &'static [Choice], expression: &Expression, base: Base<'_>) -> Finding {
    let place = base.place(expression.span);
    let words: Vec<&str> = choices.iter().map(|choice| choice.word).collect();
    let written = expression.span.of(base.text);
    let finding =
        Finding::new("unknown-word", Level::Error, place, format!("`{word}` does not take `{written}` here."));
    match nearest(written, words.iter().copied()) {
        Some(meant) => finding.remedy(format!("`{meant}`")).fix(format!("Write `{meant}`"), place.span, meant, true),
        None => finding.remedy(format!("one of {}", join(&words))),
    }
}

fn bind_name(
    worker: &mut Worker<'_, '_>,
    of: NameOf,
    expression: &Expression,
    base: Base<'_>,
    known: Known<'_>,
) -> Bound {
    let place = base.place(expression.span);
    let ExpressionKind::Word(name) = &expression.kind else {
        return unfit(worker, place, format!("The name of {} stands here.", of.words()));
    };
    let bound = Bound::Name(Name { text: name.clone(), place });
    if of == NameOf::Varied {
        let target =
            worker.names.value(name).and_then(|number| worker.names.values.get(number)).map(|value| value.place);
        if let Some(target) = target {
            worker.references.push(super::expression::Reference { place, target });
            return bound;
        }
    } else if let Some(index) = worker.names.entity(of, name) {
        if let Some((_, target)) = worker.entries.get(index).and_then(DeclaredEntry::name) {
            worker.references.push(super::expression::Reference { place, target });
        }
        return bound;
    }
    let is_built_in = of == NameOf::Substance && known.substances.contains(&&**name);
    if is_built_in || (of == NameOf::Anything && &**name == "case") {
        return bound;
    }
    let mut candidates: Vec<&str> = match of {
        NameOf::Varied => worker.names.value_names().collect(),
        _ => worker.names.entity_names(of).collect(),
    };
    if of == NameOf::Substance {
        candidates.extend(known.substances);
    }
    candidates.sort_unstable();
    candidates.dedup();
    let mut finding =
        Finding::new("unknown-name", Level::Error, place, format!("No {} is called `{name}`.", of.word()));
    if let Some(meant) = nearest(name, candidates.iter().copied()) {
        finding = finding.remedy(format!("`{meant}`")).fix(format!("Write `{meant}`"), place.span, meant, true);
    } else if !candidates.is_empty() && candidates.len() <= 12 {
        finding = finding.remedy(format!("one of {}", join(&candidates)));
    }
    worker.findings.push(finding);
    bound
}

fn new_name(worker: &mut Worker<'_, '_>, word: &str, expression: &Expression, base: Base<'_>) -> Bound {
    let place = base.place(expression.span);
    match &expression.kind {
        ExpressionKind::Word(name) if !name.contains('-') => Bound::Name(Name { text: name.clone(), place }),
        ExpressionKind::Word(name) => {
            let mended = name.replace('-', "_");
            let finding = Finding::new(
                "unexpected-argument",
                Level::Error,
                place,
                "A name holds letters, digits and `_`, no hyphen.",
            );
            worker.findings.push(finding.fix(format!("Write `{mended}`"), place.span, mended, false));
            Bound::Unfit
        }
        _ => unfit(worker, place, format!("`{word}` takes a name here.")),
    }
}

fn bind_check(worker: &mut Worker<'_, '_>, expression: &Expression, place: Place, known: Known<'_>) -> Bound {
    let ExpressionKind::Word(name) = &expression.kind else {
        return unfit(worker, place, "The name of a check stands here, such as `density-span`.".into());
    };
    if !known.checks.contains(&&**name) {
        let mut finding = Finding::new("unknown-name", Level::Error, place, format!("No check is called `{name}`."));
        if let Some(meant) = nearest(name, known.checks.iter().copied()) {
            finding = finding.remedy(format!("`{meant}`")).fix(format!("Write `{meant}`"), place.span, meant, true);
        }
        worker.findings.push(finding);
    }
    Bound::Text(Name { text: name.clone(), place })
}

fn bind_direction<'t>(worker: &mut Worker<'_, 't>, expression: &Expression, base: Base<'t>) -> Bound {
    let axis = |word: &str| match word {
        "x" => Some([1.0, 0.0, 0.0]),
        "y" => Some([0.0, 1.0, 0.0]),
        "z" => Some([0.0, 0.0, 1.0]),
        _ => None,
    };
    let place = base.place(expression.span);
    let fixed = match &expression.kind {
        ExpressionKind::Word(word) => axis(word),
        ExpressionKind::Negative(inner) => match &inner.kind {
            ExpressionKind::Word(word) => axis(word).map(|unit| unit.map(|part| -part)),
            _ => None,
        },
        ExpressionKind::Vector(parts) => {
            let worked: Vec<Typed> = parts.iter().map(|part| worker.work(part, base, Scope::Deck)).collect();
            let fits = worked.iter().all(|part| part.dimension.is_none_or(|dimension| dimension == NUMBER));
            return match <[Typed; 3]>::try_from(worked) {
                Ok(three) if fits => Bound::Direction(three.map(|part| part.compiled)),
                _ => unfit(worker, place, "A direction has three plain numbers: `(0, 0, -1)`.".into()),
            };
        }
        _ => None,
    };
    match fixed {
        // Adding 0 turns -0 into 0, which would show in a record.
        Some(unit) => Bound::Direction(unit.map(|part: f64| Compiled::Constant(part + 0.0))),
        None => unfit(worker, place, "A direction is `x`, `-z` or a vector such as `(0, 0, -1)`.".into()),
    }
}

fn bind_vector<'t>(
    worker: &mut Worker<'_, 't>,
    word: &str,
    slot: &'static Slot,
    dimension: Dimension,
    expression: &'t Expression,
    base: Base<'t>,
) -> Bound {
    let place = base.place(expression.span);
    let ExpressionKind::Vector(parts) = &expression.kind else {
        return unfit(worker, place, format!("`{word}` takes three values in brackets: `(0.1 m/s, 0 m/s, 0 m/s)`."));
    };
    let mut values = Vec::new();
    for part in parts {
        let typed = worker.work(part, base, Scope::Deck);
        values.push(fit(worker, word, slot, &[dimension], Temperature::Point, typed, part, base));
    }
    match <[BoundValue; 3]>::try_from(values) {
        Ok(three) => Bound::Vector(Box::new(three)),
        Err(_) => unfit(worker, place, format!("`{word}` takes three values in brackets.")),
    }
}

/// Holds a worked expression against the dimensions and the kind that a slot takes.
#[expect(clippy::too_many_arguments, reason = "what a slot wants and what stands in it, each once")]
pub fn fit<'t>(
    worker: &mut Worker<'_, 't>,
    word: &str,
    slot: &Slot,
    dimensions: &[Dimension],
    kind: Temperature,
    typed: Typed,
    expression: &Expression,
    base: Base<'t>,
) -> BoundValue {
    let place = base.place(expression.span);
    let usual = dimensions.first().copied().unwrap_or(NUMBER);
    let mut value = BoundValue {
        compiled: typed.compiled.clone(),
        dimension: typed.dimension.unwrap_or(usual),
        origin: Origin { place, unit: typed.unit.clone(), literal: literal_of(worker, &typed, expression) },
    };
    let Some(dimension) = typed.dimension else { return value };
    if !dimensions.contains(&dimension) {
        worker.findings.push(misfit(word, slot, dimensions, &typed, expression, base));
        value.compiled = Compiled::Constant(f64::NAN);
        value.dimension = usual;
        return value;
    }
    if let Some(variable) = typed.kind {
        match kind {
            // A plain pressure is open and fits either; only a gauge one is settled.
            Temperature::Point if dimension == TEMPERATURE => worker.kinds.is(variable, Kind::Point, place),
            Temperature::Difference if dimension == TEMPERATURE || dimension == PRESSURE => {
                worker.kinds.is(variable, Kind::Difference, place);
            }
            _ => {}
        }
    }
    value
}

/// The quantity that a fix may replace: the expression itself, or, for a lone name, the literal in its definition.
fn literal_of(worker: &Worker<'_, '_>, typed: &Typed, expression: &Expression) -> Option<Place> {
    match &expression.kind {
        ExpressionKind::Word(name) => {
            let number = worker.names.value(name)?;
            worker.typed.get(number)?.as_ref()?.literal
        }
        _ => typed.literal,
    }
}

fn misfit(
    word: &str,
    slot: &Slot,
    dimensions: &[Dimension],
    typed: &Typed,
    expression: &Expression,
    base: Base<'_>,
) -> Finding {
    let place = base.place(expression.span);
    let usual = dimensions.first().copied().unwrap_or(NUMBER);
    let name = slot.name.replace('-', " ");
    let of_what = if name == word.replace('-', " ") { format!("`{word}`") } else { format!("The {name} of `{word}`") };
    let wanted: Vec<String> = dimensions.iter().map(|dimension| dimension.words()).collect();
    let wanted = wanted.join(" or ");
    let written = expression.span.of(base.text);
    let units = usual_units(usual);
    let example = units.first().map_or(String::new(), |unit| format!(", in {unit} for instance"));
    if typed.is_bare_number {
        let message = format!("{of_what} is {wanted}, and `{written}` has no unit.");
        let mut finding = Finding::new("bare-number", Level::Error, place, message);
        for unit in units.iter().take(3) {
            finding = finding.fix(format!("Write `{written} {unit}`"), place.span, format!("{written} {unit}"), false);
        }
        return finding.remedy(format!("a unit{example}"));
    }
    let found = in_words(typed.dimension);
    let base_units = typed.dimension.map(Dimension::base_units).unwrap_or_default();
    let message = format!("{of_what} is {wanted} ({}); `{written}` is {found} ({base_units}).", usual.base_units());
    let mut finding = Finding::new("dimension-mismatch", Level::Error, place, message);
    if let (Some(literal), Some(meant)) = (typed.literal, mend::meant_instead(&typed.unit, usual))
        && literal == place
        && let Some(number) = written.strip_suffix(&*typed.unit)
    {
        let text = format!("{}{meant}", number);
        finding = finding.remedy(format!("`{text}`")).fix(format!("Write `{text}`"), place.span, text, false);
    }
    finding
}

/// Whether a text is a day of the calendar.
fn is_a_day(day: &str) -> bool {
    let mut parts = day.split('-').map(|part| part.parse::<u32>().unwrap_or(0));
    let (Some(year), Some(month), Some(day)) = (parts.next(), parts.next(), parts.next()) else { return false };
    let is_leap = year % 4 == 0 && (year % 100 != 0 || year % 400 == 0);
    let days = match month {
        1 | 3 | 5 | 7 | 8 | 10 | 12 => 31,
        4 | 6 | 9 | 11 => 30,
        2 if is_leap => 29,
        2 => 28,
        _ => 0,
    };
    (1..=days).contains(&day)
}

impl NameOf {
    /// What it names: "region".
    pub fn word(self) -> &'static str {
        match self {
            NameOf::Substance => "substance",
            NameOf::Fluid => "fluid",
            NameOf::Solid => "solid",
            NameOf::Region => "region",
            NameOf::Boundary => "boundary",
            NameOf::Varied => "varied name",
            NameOf::Anything => "entry",
        }
    }

    /// The same with its article.
    pub fn words(self) -> String {
        let article = if self == NameOf::Anything { "an" } else { "a" };
        format!("{article} {}", self.word())
    }
}

#[cfg(test)]
mod tests {
    use super::is_a_day;

    #[test]
    fn days_are_those_of_the_calendar() {
        assert!(is_a_day("2028-02-29") && is_a_day("2027-12-31"));
        assert!(
            !is_a_day("2027-02-29") && !is_a_day("2027-13-01") && !is_a_day("2027-04-31") && !is_a_day("2027-00-10")
        );
    }
}
