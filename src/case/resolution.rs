//! From trees to a resolution: everything about a deck that does not depend on the point of its sweep.

use super::bind::{BoundEntry, Known, base_of, bind_entry};
use super::build::{Point, build};
use super::compiled::{Compiled, Variable};
use super::declare::{self, DeclaredEntry};
use super::expression::{Reference, Scope, Tolerance, Typed, Worker};
use super::kinds::{Conflict, ConflictKind, Kind, KindVariable, Kinds};
use super::model::{Case, Name, Origin, Requirement, Substance};
use super::names::{self, NamedValue, ValueKind};
use super::sweep::{self, Sweep};
use crate::case::{Role, Source};
use crate::quantity::{Dimension, Scale, parse_unit};
use crate::syntax::tree::{Comparison, Content, Definition, Entry, Expression, ExpressionKind, Phrase};
use crate::syntax::{FileId, Finding, Level, Place, Span};
use crate::vocabulary::statements::TEMPERATURE;
use crate::vocabulary::{EntryKind, NameOf};
use std::collections::{HashMap, HashSet};

/// A deck resolved: names, bound statements, the sweep, and what was found on the way.
#[derive(Debug, Default)]
pub struct Resolution {
    /// The definitions of `given`.
    pub given: Vec<ResolvedGiven>,
    /// Names that take several values.
    pub varied: Vec<ResolvedGiven>,
    /// Every named value's expression, by number; `None` for varied names.
    pub values: Vec<Option<Compiled>>,
    /// The order in which values are worked out.
    pub order: Vec<usize>,
    /// Of these, the ones that depend on a varied name.
    pub varying: Vec<usize>,
    /// The entries with their slots filled.
    pub entries: Vec<BoundEntry>,
    /// Substances of the deck.
    pub substances: Vec<Substance>,
    /// Requirements.
    pub requirements: Vec<Requirement>,
    /// The sweep.
    pub sweep: Sweep,
    /// Tolerances.
    pub tolerances: Vec<Tolerance>,
    /// Uses of names.
    pub references: Vec<Reference>,
    /// The values at the first point.
    pub nominal: Point,
    /// What was found.
    pub findings: Vec<Finding>,
}

/// A definition of `given`, or a varied name.
#[derive(Clone, Debug)]
pub struct ResolvedGiven {
    /// The name.
    pub name: Name,
    /// The number of its value.
    pub number: usize,
    /// Its dimension; of a plain number where it is unknown.
    pub dimension: Dimension,
    /// Where its value stands.
    pub origin: Origin,
    /// Its description: the text behind it, or the comment lines above.
    pub description: Box<str>,
    /// Whether it is a point on the temperature scale, where that is settled.
    pub kind: Option<super::kinds::Kind>,
}

impl Resolution {
    /// The values at a point of the sweep. Only what depends on a varied name is worked out again.
    pub fn point(&self, index: usize) -> Point {
        let mut point = self.nominal.clone();
        for (number, value) in self.sweep.at(index) {
            if let Some(slot) = point.values.get_mut(number) {
                *slot = value;
            }
        }
        self.work_out(&self.varying, &mut point);
        point
    }

    /// The values at the first point with one tolerance at `share` of its half width: -1 is its lower end.
    pub fn deviated(&self, tolerance: usize, share: f64) -> Point {
        let mut point = self.nominal.clone();
        if let Some(tolerance_row) = self.tolerances.get(tolerance)
            && let half_width = point.evaluate(&tolerance_row.half_width)
            && let Some(slot) = point.deviations.get_mut(tolerance)
        {
            *slot = share * half_width;
        }
        self.work_out(&self.order, &mut point);
        point
    }

    fn work_out(&self, numbers: &[usize], point: &mut Point) {
        for &number in numbers {
            if let Some(Some(compiled)) = self.values.get(number) {
                let value = point.evaluate(compiled);
                if let Some(slot) = point.values.get_mut(number) {
                    *slot = value;
                }
            }
        }
    }

    /// The case at a point.
    pub fn case(&self, point: &Point) -> Case {
        build(self, point)
    }
}

/// Resolves the trees of a deck, its includes and its practice file.
pub fn resolve(sources: &[Source<'_>], known: Known<'_>) -> Resolution {
    let mut findings = Vec::new();
    let mut entries = declare::declare(sources, &mut findings);
    drop_what_is_out_of_place(&mut entries, sources, &mut findings);
    let names = names::collect(&entries, &mut findings);
    let mut worker = Worker {
        entries: &entries,
        names,
        typed: Vec::new(),
        ambient_pressure: None,
        kinds: Kinds::default(),
        references: Vec::new(),
        tolerances: Vec::new(),
        findings,
        open_literals: Vec::new(),
    };
    let mut resolution = Resolution::default();
    work_out_values(&mut worker, &mut resolution);
    let mut requirement_kinds: Vec<Option<KindVariable>> = Vec::new();
    for entry in &entries {
        let bound = bind_entry(&mut worker, entry, known);
        match entry.row.kind {
            EntryKind::Substance => {
                let nominal = resolution.nominal.clone();
                let evaluate = |compiled: &Compiled| nominal.evaluate(compiled);
                resolution.substances.push(super::substance::substance(&mut worker, entry, &bound, &evaluate));
            }
            EntryKind::Require => requirement_kinds.extend(add_requirements(&mut worker, entry, &mut resolution)),
            _ => {}
        }
        resolution.entries.push(bound);
    }
    // A tolerance in a statement came after the values were sized.
    resolution.nominal.deviations.resize(worker.tolerances.len(), 0.0);
    let conflicts = worker.kinds.settle();
    worker.findings.extend(conflicts.into_iter().map(|conflict| kind_finding(conflict, sources)));
    for (requirement, kind) in resolution.requirements.iter_mut().zip(requirement_kinds) {
        requirement.is_difference = kind.and_then(|kind| worker.kinds.kind(kind)) == Some(Kind::Difference);
    }
    describe_values(&worker, &mut resolution);
    unsettled_kinds(&mut worker, &resolution);
    unused_names(&mut worker);
    resolution.references = worker.references;
    resolution.tolerances = worker.tolerances;
    resolution.findings = worker.findings;
    resolution
}

/// House rules count only in a practice file, and nothing else counts there.
fn drop_what_is_out_of_place(
    entries: &mut Vec<DeclaredEntry<'_>>,
    sources: &[Source<'_>],
    findings: &mut Vec<Finding>,
) {
    let role =
        |file: FileId| sources.iter().find(|source| source.file == file).map_or(Role::Deck, |source| source.role);
    entries.retain(|entry| {
        let message = match (role(entry.file), entry.row.kind) {
            (Role::Deck, EntryKind::Practice) => {
                "House rules stand in a file `practice.buoy` in this folder or one above it; here they have no effect."
            }
            (Role::Practice, EntryKind::Practice) | (Role::Deck, _) => return true,
            (Role::Practice, _) => "A practice file holds `practice` and nothing else.",
        };
        findings.push(Finding::new("misplaced-statement", Level::Error, entry.head, message));
        false
    });
}

fn work_out_values<'t>(worker: &mut Worker<'_, 't>, resolution: &mut Resolution) {
    add_ambient_pressure(worker);
    let dependencies = all_dependencies(worker);
    let (order, circular) = names::order(&dependencies);
    let count = worker.names.values.len();
    worker.typed = vec![None; count];
    resolution.values = vec![None; count];
    resolution.nominal.values = vec![f64::NAN; count];
    report_circles(worker, &circular);
    let mut varied_values = Vec::new();
    let mut varies = vec![false; count];
    for &number in &order {
        let Some(value) = worker.names.values.get(number) else { continue };
        let (kind, expression, place) = (value.kind, value.expression, value.place);
        let Some(base) = worker.entries.get(value.entry).map(base_of) else { continue };
        let Some(expression) = expression else {
            if kind != ValueKind::Member {
                let message = "This definition has no value.";
                worker.findings.push(Finding::new("missing-argument", Level::Error, place, message));
            }
            continue;
        };
        if kind == ValueKind::Varied {
            let worked: Vec<Typed> =
                sweep::parts(expression).into_iter().map(|part| worker.work(part, base, Scope::Deck)).collect();
            let evaluate = |typed: &Typed| resolution.nominal.evaluate(&typed.compiled);
            let (values, typed) = sweep::run_over(worker, expression, base.place(expression.span), &worked, &evaluate);
            set(&mut resolution.nominal.values, number, values.first().copied().unwrap_or(f64::NAN));
            set(&mut varies, number, true);
            set(&mut worker.typed, number, Some(typed));
            varied_values.push((number, values));
            continue;
        }
        let typed = worker.work(expression, base, Scope::Deck);
        let result = resolution.nominal.evaluate(&typed.compiled);
        no_finite_value(worker, &typed, result, &resolution.nominal, base.place(expression.span));
        set(&mut resolution.nominal.values, number, result);
        set(&mut resolution.values, number, Some(typed.compiled.clone()));
        set(&mut worker.typed, number, Some(typed));
        if dependencies.get(number).into_iter().flatten().any(|needed| varies.get(*needed) == Some(&true)) {
            set(&mut varies, number, true);
            resolution.varying.push(number);
        }
    }
    varied_values.sort_by_key(|(number, _)| *number);
    let together = together_groups(worker);
    resolution.sweep = sweep::assemble(worker, &varied_values, &together);
    resolution.order = order;
}

fn set<T>(list: &mut [T], index: usize, value: T) {
    if let Some(slot) = list.get_mut(index) {
        *slot = value;
    }
}

/// The ambient pressure is a value that gauge pressures refer to.
fn add_ambient_pressure(worker: &mut Worker<'_, '_>) {
    let stated = worker.entries.iter().enumerate().filter(|(_, entry)| entry.row.kind == EntryKind::Case).find_map(
        |(index, entry)| {
            let statement = entry.statements.iter().find(|statement| statement.row.word == "ambient")?;
            Some((index, statement.arguments.get(1)?.first().copied()?, entry))
        },
    );
    if let Some((index, expression, entry)) = stated {
        worker.ambient_pressure = Some(worker.names.values.len());
        worker.names.values.push(NamedValue {
            name: "ambient pressure".to_string(),
            kind: ValueKind::Member,
            expression: Some(expression),
            entry: index,
            place: entry.place(expression.span),
        });
    }
}

/// What each value needs, members of entries made on the way included.
fn all_dependencies<'t>(worker: &mut Worker<'_, 't>) -> Vec<Vec<usize>> {
    let mut dependencies: Vec<Vec<usize>> = Vec::new();
    while let Some(value) = worker.names.values.get(dependencies.len()) {
        let mut needed = Vec::new();
        if let Some(expression) = value.expression {
            let mut members = Vec::new();
            let ambient = worker.ambient_pressure;
            let names = &worker.names;
            walk(expression, &mut |part| match &part.kind {
                ExpressionKind::Word(name) => needed.extend(names.value(name)),
                ExpressionKind::Member(owner, member) => members.push((owner.text.clone(), member.text.clone())),
                ExpressionKind::Quantity(quantity) => {
                    let unit = quantity.unit.as_ref().map_or("", |unit| &*unit.text);
                    if ambient.is_some()
                        && unit.ends_with('g')
                        && parse_unit(unit).is_ok_and(|unit| unit.scale == Scale::Gauge)
                    {
                        needed.extend(ambient);
                    }
                }
                _ => {}
            });
            for (owner, member) in members {
                needed.extend(worker.names.member(worker.entries, &owner, &member));
            }
        }
        needed.sort_unstable();
        needed.dedup();
        dependencies.push(needed);
    }
    // Members that only statements refer to are made here too, so that all are in the order.
    dependencies
}

/// Calls `visit` with every part of an expression. As deep as the expression, which `syntax` bounds.
pub fn walk<'t>(expression: &'t Expression, visit: &mut dyn FnMut(&'t Expression)) {
    visit(expression);
    match &expression.kind {
        ExpressionKind::Negative(inner) | ExpressionKind::Group(inner) => walk(inner, visit),
        ExpressionKind::Binary(binary) => {
            walk(&binary.left, visit);
            walk(&binary.right, visit);
        }
        ExpressionKind::Call(_, items) | ExpressionKind::Vector(items) | ExpressionKind::List(items) => {
            items.iter().for_each(|item| walk(item, visit));
        }
        ExpressionKind::Range(range) => {
            walk(&range.from, visit);
            walk(&range.to, visit);
            if let Some(step) = &range.step {
                walk(step, visit);
            }
        }
        ExpressionKind::Quantity(_)
        | ExpressionKind::Word(_)
        | ExpressionKind::Member(..)
        | ExpressionKind::Text(_)
        | ExpressionKind::Date(_)
        | ExpressionKind::TooComplex => {}
    }
}

fn report_circles(worker: &mut Worker<'_, '_>, circular: &[usize]) {
    let members: Vec<(Place, String)> = circular
        .iter()
        .filter_map(|number| worker.names.values.get(*number))
        .map(|value| (value.place, value.name.clone()))
        .collect();
    for (place, name) in &members {
        let mut finding =
            Finding::new("circular-definition", Level::Error, *place, format!("`{name}` is defined by itself."));
        for (other, other_name) in members.iter().filter(|(other, _)| other != place).take(8) {
            finding = finding.related(*other, format!("by way of `{other_name}`"));
        }
        worker.findings.push(finding);
    }
}

/// A value that comes out as no number, though all that it needs is known.
fn no_finite_value(worker: &mut Worker<'_, '_>, typed: &Typed, result: f64, point: &Point, place: Place) {
    if result.is_finite() || typed.dimension.is_none() {
        return;
    }
    let mut all_known = true;
    typed.compiled.variables(&mut |variable| {
        all_known &= match variable {
            Variable::Given(number) => point.values.get(*number).is_some_and(|value| value.is_finite()),
            _ => true,
        };
    });
    if all_known && typed.compiled != Compiled::Constant(f64::NAN) {
        let message = "This has no finite value: a division by zero, a root or logarithm of a negative number, or a number too large.";
        worker.findings.push(Finding::new("no-finite-value", Level::Error, place, message));
    }
}

fn together_groups(worker: &Worker<'_, '_>) -> Vec<(Vec<usize>, Place)> {
    let statements = worker
        .entries
        .iter()
        .filter(|entry| entry.row.kind == EntryKind::Vary)
        .flat_map(|entry| entry.statements.iter().filter(|statement| statement.row.word == "together"));
    statements
        .map(|statement| {
            let numbers = statement.arguments.iter().flatten().filter_map(|expression| match &expression.kind {
                ExpressionKind::Word(name) => worker.names.value(name),
                _ => None,
            });
            (numbers.collect(), statement.place)
        })
        .collect()
}

/// Adds the requirements of an entry; gives the kind of each.
fn add_requirements<'t>(
    worker: &mut Worker<'_, 't>,
    entry: &DeclaredEntry<'t>,
    resolution: &mut Resolution,
) -> Vec<Option<KindVariable>> {
    let base = base_of(entry);
    let mut kinds = Vec::new();
    for requirement in &entry.requirements {
        let place = entry.place(requirement.span);
        let left = worker.work(&requirement.left, base, Scope::Requirement);
        let bounds: Vec<(&Expression, Typed)> = match (&requirement.comparison, &requirement.right.kind) {
            (Comparison::Within, ExpressionKind::Range(range)) => {
                [&range.from, &range.to].map(|bound| (bound, worker.work(bound, base, Scope::Requirement))).into()
            }
            (Comparison::Within, _) => {
                let at = entry.place(requirement.right.span);
                let message = "A range stands behind `within`: `1e4 .. 1e9`.";
                worker.findings.push(Finding::new("unexpected-argument", Level::Error, at, message));
                continue;
            }
            _ => vec![(&requirement.right, worker.work(&requirement.right, base, Scope::Requirement))],
        };
        let mut fits = left.dimension.is_some();
        for (expression, bound) in &bounds {
            if let (Some(a), Some(b)) = (left.kind, bound.kind) {
                worker.kinds.same(a, b, entry.place(expression.span));
            }
            fits &= bound.dimension.is_some();
            if let (Some(wanted), Some(found)) = (left.dimension, bound.dimension)
                && wanted != found
            {
                fits = false;
                let check = if bound.is_bare_number { "bare-number" } else { "dimension-mismatch" };
                let message =
                    format!("{} cannot be compared with {}.", declare::capitalised(&wanted.words()), found.words());
                worker.findings.push(Finding::new(check, Level::Error, entry.place(expression.span), message));
            }
        }
        if !fits {
            continue;
        }
        let mut bounds = bounds.into_iter().map(|(_, typed)| typed.compiled);
        let (Some(right), upper) = (bounds.next(), bounds.next()) else { continue };
        kinds.push(left.kind);
        resolution.requirements.push(Requirement {
            place,
            text: requirement.span.of(&entry.entry.text).into(),
            file: entry.file,
            offset: entry.offset,
            dimension: left.dimension.unwrap_or(Dimension::NONE),
            is_difference: false,
            left: left.compiled,
            comparison: requirement.comparison,
            right,
            upper,
            expression: requirement.left.clone(),
        });
    }
    kinds
}

fn kind_finding(conflict: Conflict, sources: &[Source<'_>]) -> Finding {
    let written = written_at(conflict.place, sources);
    let (message, remedy) = match conflict.what {
        ConflictKind::PointsAdded => (
            format!("`{written}` adds two points of a scale; their sum has no meaning."),
            "a point and a difference, such as `T_room + 5 K`, or the difference of the two",
        ),
        ConflictKind::PointFromDifference => {
            (format!("`{written}` takes a point of a scale from a difference."), "point - point, or point - difference")
        }
        ConflictKind::PointScaled => (
            format!(
                "`{written}` multiplies or divides a temperature that was written on the Celsius or Fahrenheit scale: it would count from absolute zero."
            ),
            "a difference, such as `T_hot - T_cold`",
        ),
        ConflictKind::PointForDifference => (
            format!("`{written}` is a point of a scale where a difference is wanted: 20 degC would count as 293 K."),
            "a difference in K, or the word `difference` behind the quantity",
        ),
        ConflictKind::DifferenceForPoint => (
            format!("`{written}` is a difference where a point of a scale is wanted."),
            "a point, such as `T_room + 5 K` or `20 degC`",
        ),
        ConflictKind::Mixed => (format!("`{written}` mixes points and differences."), "all points, or all differences"),
    };
    let check = if is_pressure_text(&written) { "gauge-or-absolute" } else { "temperature-kind" };
    let mut finding = Finding::new(check, Level::Error, conflict.place, message).remedy(remedy);
    if conflict.what == ConflictKind::PointForDifference {
        if let Some(number) =
            written.strip_suffix("degC").map(str::trim_end).filter(|number| number.parse::<f64>().is_ok())
        {
            finding = finding.fix(format!("Write `{number} K`"), conflict.place.span, format!("{number} K"), true);
        } else if let Some(bare) = written
            .strip_suffix('g')
            .filter(|bare| bare.ends_with("bar") || bare.ends_with("Pa") || bare.ends_with("psi"))
        {
            finding.message =
                format!("`{written}` counts from the ambient pressure by its unit, and so does this statement.");
            finding.remedy = format!("`{bare}`");
            finding = finding.fix(format!("Write `{bare}`"), conflict.place.span, bare.to_string(), true);
        }
    }
    finding
}

/// Whether the units in a piece of a deck are gauge pressures.
fn is_pressure_text(written: &str) -> bool {
    written.split_whitespace().any(|word| parse_unit(word).is_ok_and(|unit| unit.scale == Scale::Gauge))
}

fn written_at(place: Place, sources: &[Source<'_>]) -> String {
    let text = sources.iter().find(|source| source.file == place.file).and_then(|source| {
        let index = source.tree.entry_at(place.span.start)?;
        let placed = source.tree.entries.get(index)?;
        let start = place.span.start.checked_sub(placed.start)?;
        placed.entry.text.get(start..start + (place.span.end - place.span.start))
    });
    text.unwrap_or("").to_string()
}

/// The line of every definition and sweep, by the place of its name.
fn lines_of_names<'t>(entries: &[DeclaredEntry<'t>]) -> HashMap<Place, (&'t Entry, usize)> {
    let mut lines = HashMap::new();
    for declared in entries.iter().filter(|entry| matches!(entry.row.kind, EntryKind::Given | EntryKind::Vary)) {
        for (index, line) in declared.entry.lines.iter().enumerate() {
            let name = match &line.content {
                Content::Definition(definition) => definition.name.span,
                Content::Phrase(phrase) => phrase.word.span,
                _ => continue,
            };
            lines.insert(declared.place(name), (declared.entry, index));
        }
    }
    lines
}

fn describe_values(worker: &Worker<'_, '_>, resolution: &mut Resolution) {
    let lines = lines_of_names(worker.entries);
    for (number, value) in worker.names.values.iter().enumerate() {
        if value.kind == ValueKind::Member {
            continue;
        }
        let typed = worker.typed.get(number).and_then(Option::as_ref);
        let entry = worker.entries.get(value.entry);
        let described = lines.get(&value.place).and_then(|(entry, index)| match &entry.lines.get(*index)?.content {
            Content::Definition(Definition { description: Some(text), .. })
            | Content::Phrase(Phrase { description: Some(text), .. }) => Some(text.text.to_string()),
            _ => entry.description_above(*index),
        });
        let place = match (entry, value.expression) {
            (Some(entry), Some(expression)) => entry.place(expression.span),
            _ => value.place,
        };
        let given = ResolvedGiven {
            name: Name { text: value.name.as_str().into(), place: value.place },
            number,
            dimension: typed.and_then(|typed| typed.dimension).unwrap_or(Dimension::NONE),
            origin: Origin {
                place,
                unit: typed.map_or_else(|| "".into(), |typed| typed.unit.clone()),
                literal: typed.and_then(|typed| typed.literal),
            },
            description: described.unwrap_or_default().into(),
            kind: typed.and_then(|typed| typed.kind).and_then(|kind| worker.kinds.kind(kind)),
        };
        match value.kind {
            ValueKind::Varied => resolution.varied.push(given),
            _ => resolution.given.push(given),
        }
    }
}

/// Asks for the word where use does not settle whether a temperature is a point or a difference.
fn unsettled_kinds(worker: &mut Worker<'_, '_>, resolution: &Resolution) {
    let used: HashSet<Place> = worker.references.iter().map(|reference| reference.target).collect();
    for given in &resolution.given {
        let is_open = given.dimension == TEMPERATURE && given.kind.is_none();
        let Some(literal) = given.origin.literal.filter(|_| is_open && used.contains(&given.name.place)) else {
            continue;
        };
        let message = format!(
            "Nothing in the deck tells whether `{}` is a temperature or a difference of temperatures.",
            given.name.text
        );
        let end = Span::new(literal.span.end, literal.span.end);
        worker.findings.push(
            Finding::new("temperature-kind", Level::Information, literal, message)
                .remedy("the word `difference` or `absolute` behind the unit")
                .fix("It is a difference", end, " difference", false)
                .fix("It is a temperature", end, " absolute", false),
        );
    }
}

/// Names of the deck itself that nothing uses. Included files offer names that a deck need not use.
fn unused_names(worker: &mut Worker<'_, '_>) {
    // A file of definitions alone is there for others to include.
    let is_a_case = |entry: &DeclaredEntry<'_>| matches!(entry.row.kind, EntryKind::Case | EntryKind::Region);
    if !worker.entries.iter().any(|entry| entry.file == FileId(0) && is_a_case(entry)) {
        return;
    }
    let used: HashSet<Place> = worker.references.iter().map(|reference| reference.target).collect();
    let mut unused: Vec<(Place, String)> = Vec::new();
    for (number, value) in worker.names.values.iter().enumerate() {
        // A circular one has a finding of its own.
        let is_circular = value.expression.is_some() && worker.typed.get(number).is_none_or(Option::is_none);
        if value.kind != ValueKind::Member
            && value.place.file == FileId(0)
            && !used.contains(&value.place)
            && !is_circular
        {
            unused.push((value.place, value.name.clone()));
        }
    }
    for (index, entry) in worker.entries.iter().enumerate() {
        let kind = declare::named_kind(entry.row.kind)
            .filter(|kind| matches!(kind, NameOf::Fluid | NameOf::Solid | NameOf::Substance));
        if let (Some(kind), FileId(0), Some((name, place))) = (kind, entry.file, entry.name())
            && worker.names.entity(kind, name) == Some(index)
            && !used.contains(&place)
        {
            unused.push((place, name.to_string()));
        }
    }
    for (place, name) in unused {
        let mut finding = Finding::new("unused-name", Level::Information, place, format!("Nothing uses `{name}`."));
        finding.unnecessary = true;
        worker.findings.push(finding);
    }
}
