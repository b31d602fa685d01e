//! Dimension, kind and compiled form of every expression, with what does not fit as findings.

use super::compiled::{Arithmetic, Compiled, Function, Variable};
use super::declare::DeclaredEntry;
use super::kinds::{Kind, KindVariable, Kinds};
use super::names::Names;
use crate::quantity::suggest::nearest;
use crate::quantity::{Dimension, Exponent, Scale, UnitProblem, mend, parse_unit};
use crate::syntax::tree::{Binary, Expression, ExpressionKind, Mark, Operator, Quantity, Word};
use crate::syntax::{FileId, Finding, Level, Place, Span};
use crate::vocabulary::NameOf;
use crate::vocabulary::functions::{CONSTANTS, FUNCTIONS, REGION_NUMBERS};
use crate::vocabulary::statements::{NUMBER, PRESSURE, TEMPERATURE};

/// An expression worked through.
#[derive(Clone, Debug)]
pub struct Typed {
    /// Ready to evaluate.
    pub compiled: Compiled,
    /// Its dimension; `None` where it has an error that has been reported.
    pub dimension: Option<Dimension>,
    /// Its kind, for a temperature or a pressure.
    pub kind: Option<KindVariable>,
    /// Whether a temperature in it was written in degC or degF, so that scaling it is a slip.
    pub on_relative_scale: bool,
    /// Whether it is a number without a unit, perhaps signed.
    pub is_bare_number: bool,
    /// The unit as written, where it is one quantity; else empty.
    pub unit: Box<str>,
    /// The quantity as a literal.
    pub literal: Option<Place>,
}

impl Typed {
    /// What stands where an error has been reported.
    pub fn unknown() -> Typed {
        Typed {
            compiled: Compiled::Constant(f64::NAN),
            dimension: None,
            kind: None,
            on_relative_scale: false,
            is_bare_number: false,
            unit: "".into(),
            literal: None,
        }
    }

    fn number(value: f64) -> Typed {
        Typed { compiled: Compiled::Constant(value), dimension: Some(NUMBER), ..Typed::unknown() }
    }
}

/// A use of a name.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Reference {
    /// Where the name is used.
    pub place: Place,
    /// Where it is defined.
    pub target: Place,
}

/// A `+-` in the deck.
#[derive(Clone, Debug)]
pub struct Tolerance {
    /// Where.
    pub place: Place,
    /// What it belongs to, as written.
    pub text: Box<str>,
    /// Half its width, SI.
    pub half_width: Compiled,
}

/// What names an expression may use besides those of the deck.
#[derive(Clone, Copy, Debug)]
pub enum Scope<'s> {
    /// None.
    Deck,
    /// The numbers of regions.
    Requirement,
    /// `T`, `p`, `x` and the substance's definitions before this one.
    Property(&'s [(String, Typed, Place)]),
}

impl Scope<'_> {
    /// Whether a name is one of the scope's own.
    fn has(&self, name: &str) -> bool {
        match self {
            Scope::Property(locals) => {
                matches!(name, "T" | "p" | "x") || locals.iter().any(|(local, _, _)| local == name)
            }
            Scope::Deck | Scope::Requirement => false,
        }
    }
}

/// What working through expressions needs and fills.
#[derive(Debug)]
pub struct Worker<'w, 't> {
    /// The entries.
    pub entries: &'w [DeclaredEntry<'t>],
    /// The names.
    pub names: Names<'t>,
    /// Values already worked through, by number; `None` for those not yet, and those that are circular.
    pub typed: Vec<Option<Typed>>,
    /// Ambient pressure: the number of its value, if the case states one.
    pub ambient_pressure: Option<usize>,
    /// Kinds.
    pub kinds: Kinds,
    /// Uses of names.
    pub references: Vec<Reference>,
    /// Tolerances.
    pub tolerances: Vec<Tolerance>,
    /// Findings.
    pub findings: Vec<Finding>,
    /// Kind variables of literals whose unit is open, with their places: what a fix may mark.
    pub open_literals: Vec<(KindVariable, Place)>,
}

/// Where the spans of an expression count from.
#[derive(Clone, Copy, Debug)]
pub struct Base<'t> {
    /// The file.
    pub file: FileId,
    /// The offset of the entry.
    pub offset: usize,
    /// The entry's text.
    pub text: &'t str,
}

impl Base<'_> {
    /// A span as a place in the file.
    pub fn place(&self, span: Span) -> Place {
        Place::new(self.file, span.shifted(self.offset))
    }
}

impl<'t> Worker<'_, 't> {
    fn error(&mut self, check: &'static str, place: Place, message: impl Into<String>) -> Typed {
        self.findings.push(Finding::new(check, Level::Error, place, message));
        Typed::unknown()
    }

    /// Works through an expression. Depth is bounded by the limits of `syntax`.
    pub fn work(&mut self, expression: &Expression, base: Base<'t>, scope: Scope<'_>) -> Typed {
        let place = base.place(expression.span);
        match &expression.kind {
            ExpressionKind::Quantity(quantity) => self.quantity(quantity, base, place),
            ExpressionKind::Word(name) => self.name(name, place, scope),
            ExpressionKind::Member(owner, member) => self.member(owner, member, base, place),
            ExpressionKind::Call(function, arguments) => self.call(function, arguments, base, place, scope),
            ExpressionKind::Negative(inner) => {
                let inner = self.work(inner, base, scope);
                self.negative(inner, place)
            }
            ExpressionKind::Group(inner) => Typed { literal: None, ..self.work(inner, base, scope) },
            ExpressionKind::Binary(binary) => self.binary(binary, base, place, scope),
            ExpressionKind::TooComplex => {
                self.error("line-too-complex", place, "This expression has too many operators; give its parts names.")
            }
            ExpressionKind::Vector(_) => {
                self.error("unexpected-argument", place, "One value is wanted here, not a vector.")
            }
            ExpressionKind::List(_) | ExpressionKind::Range(_) => {
                self.error("unexpected-argument", place, "One value is wanted here; only `vary` takes several.")
            }
            ExpressionKind::Text(_) => self.error("unexpected-argument", place, "A value is wanted here, not a text."),
            ExpressionKind::Date(_) => self.error("unexpected-argument", place, "A value is wanted here, not a day."),
        }
    }

    fn quantity(&mut self, quantity: &Quantity, base: Base<'t>, place: Place) -> Typed {
        if !quantity.number.is_finite() {
            let place = base.place(quantity.number_span);
            return self.error("no-finite-value", place, "This number is too large to compute with.");
        }
        let Some(unit_word) = &quantity.unit else {
            if let Some((_, span)) = quantity.mark {
                self.error("bare-number", base.place(span), "A unit is missing before this word.");
            }
            return Typed { is_bare_number: true, literal: Some(place), ..Typed::number(quantity.number) };
        };
        if quantity.number_span.end == unit_word.span.start && !unit_word.text.starts_with(['%', '°']) {
            let at = Span::new(unit_word.span.start, unit_word.span.start);
            let at = base.place(at);
            let finding =
                Finding::new("unit-spacing", Level::Hint, place, "White space stands between a number and its unit.");
            self.findings.push(finding.fix("Put a space before the unit", at.span, " ", true));
        }
        let unit = match parse_unit(&unit_word.text) {
            Ok(unit) => unit,
            Err(problem) => {
                self.unknown_unit(unit_word, &problem, base);
                return Typed::unknown();
            }
        };
        let mark = quantity.mark.map(|(mark, _)| mark);
        let is_point_unit = unit.scale == Scale::TemperaturePoint;
        let is_difference = mark == Some(Mark::Difference);
        let si = if is_point_unit && is_difference {
            unit.difference_to_si(quantity.number)
        } else {
            unit.to_si(quantity.number)
        };
        if !si.is_finite() {
            return self.error("no-finite-value", place, "This number is too large to compute with.");
        }
        let kind = match (unit.scale, mark) {
            (_, Some(Mark::Difference)) => Some(Kind::Difference),
            (_, Some(Mark::Absolute)) | (Scale::TemperaturePoint | Scale::Gauge, None) => Some(Kind::Point),
            (Scale::TemperatureOpen, None) => None,
            (Scale::Plain, None) => {
                if unit.dimension == TEMPERATURE {
                    Some(Kind::Difference)
                } else {
                    None
                }
            }
        };
        let variable = self.is_kinded(unit.dimension).then(|| self.kinds.variable(kind));
        if let (Scale::TemperatureOpen, None, Some(variable)) = (unit.scale, mark, variable) {
            self.open_literals.push((variable, place));
        }
        if let Some((_, span)) = quantity.mark
            && !self.is_kinded(unit.dimension)
        {
            let message = "`difference` and `absolute` are said of temperatures and pressures only.";
            self.findings.push(Finding::new("temperature-kind", Level::Warning, base.place(span), message));
        }
        let compiled =
            if unit.scale == Scale::Gauge && !is_difference { self.above_ambient(si) } else { Compiled::Constant(si) };
        Typed {
            compiled,
            dimension: Some(unit.dimension),
            kind: variable,
            on_relative_scale: is_point_unit && !is_difference,
            is_bare_number: false,
            unit: unit_word.text.clone(),
            literal: Some(place),
        }
    }

    /// A gauge pressure as an absolute one.
    fn above_ambient(&self, si: f64) -> Compiled {
        /// Standard atmosphere, Pa (CGPM 1954, Resolution 4): ambient pressure where the case states none.
        const STANDARD_ATMOSPHERE: f64 = 101_325.0;
        match self.ambient_pressure {
            Some(number) => Compiled::Binary(
                Arithmetic::Add,
                Box::new(Compiled::Variable(Variable::Given(number))),
                Box::new(Compiled::Constant(si)),
            ),
            None => Compiled::Constant(STANDARD_ATMOSPHERE + si),
        }
    }

    fn is_kinded(&self, dimension: Dimension) -> bool {
        dimension == TEMPERATURE || dimension == PRESSURE
    }

    fn unknown_unit(&mut self, unit: &Word, problem: &UnitProblem, base: Base<'t>) {
        let place = base.place(unit.span);
        let mut finding = Finding::new(
            "unknown-unit",
            Level::Error,
            place,
            format!("{}.", super::declare::capitalised(&problem.message())),
        );
        if let Some(mended) = mend::mended(&unit.text) {
            finding = finding.remedy(format!("`{mended}`")).fix(format!("Write `{mended}`"), place.span, mended, true);
        }
        self.findings.push(finding);
    }

    fn name(&mut self, name: &str, place: Place, scope: Scope<'_>) -> Typed {
        if let Scope::Property(locals) = scope {
            let special = match name {
                "T" => Some((Variable::Temperature, TEMPERATURE)),
                "p" => Some((Variable::Pressure, PRESSURE)),
                "x" => Some((Variable::Fraction, NUMBER)),
                _ => None,
            };
            if let Some((variable, dimension)) = special {
                return Typed {
                    compiled: Compiled::Variable(variable),
                    dimension: Some(dimension),
                    ..Typed::unknown()
                };
            }
            if let Some(index) = locals.iter().rposition(|(local, _, _)| local == name)
                && let Some((_, typed, target)) = locals.get(index)
            {
                self.references.push(Reference { place, target: *target });
                let compiled = Compiled::Variable(Variable::Local(index));
                return Typed { compiled, unit: "".into(), literal: None, is_bare_number: false, ..typed.clone() };
            }
        }
        if let Some(number) = self.names.value(name) {
            if let Some(target) = self.names.values.get(number).map(|value| value.place) {
                self.references.push(Reference { place, target });
            }
            return self.refer(number);
        }
        if let Some(constant) = CONSTANTS.iter().find(|constant| constant.name == name) {
            return Typed { dimension: Some(constant.dimension), ..Typed::number(constant.value) };
        }
        self.unknown_name(name, place)
    }

    /// The value of a number, as an operand.
    fn refer(&self, number: usize) -> Typed {
        match self.typed.get(number) {
            Some(Some(typed)) => {
                Typed { compiled: Compiled::Variable(Variable::Given(number)), is_bare_number: false, ..typed.clone() }
            }
            // Circular, or without a value: reported there.
            _ => Typed::unknown(),
        }
    }

    fn unknown_name(&mut self, name: &str, place: Place) -> Typed {
        let mut finding = Finding::new("unknown-name", Level::Error, place, format!("Nothing is called `{name}`."));
        if name.contains('-') {
            let spaced = name.replace('-', " - ");
            finding.message = format!("Nothing is called `{name}`; a subtraction is written with spaces.");
            finding = finding.fix(format!("Write `{spaced}`"), place.span, spaced, false);
        } else {
            let candidates = self.names.value_names().chain(CONSTANTS.iter().map(|constant| constant.name));
            let mut candidates: Vec<&str> = candidates.collect();
            candidates.sort_unstable();
            if let Some(meant) = nearest(name, candidates) {
                finding = finding.remedy(format!("`{meant}`")).fix(format!("Write `{meant}`"), place.span, meant, true);
            } else if [NameOf::Region, NameOf::Fluid, NameOf::Solid]
                .into_iter()
                .any(|kind| self.names.entity(kind, name).is_some())
            {
                finding.message =
                    format!("`{name}` is an entry, not a value; a member of it is, such as `{name}.density`.");
            } else {
                finding = finding.remedy(format!("a line `{name} = ...` below `given`"));
            }
        }
        self.findings.push(finding);
        Typed::unknown()
    }

    fn member(&mut self, owner: &Word, member: &Word, base: Base<'t>, place: Place) -> Typed {
        if let Some(target) = self.owner_place(&owner.text) {
            self.references.push(Reference { place: base.place(owner.span), target });
        }
        match self.names.member(self.entries, &owner.text, &member.text) {
            Ok(number) => self.refer(number),
            Err(message) => self.error("unknown-name", place, message),
        }
    }

    fn owner_place(&self, owner: &str) -> Option<Place> {
        let kinds = [NameOf::Region, NameOf::Fluid, NameOf::Solid];
        let index = kinds.into_iter().find_map(|kind| self.names.entity(kind, owner))?;
        self.entries.get(index)?.name().map(|(_, place)| place)
    }

    fn negative(&mut self, inner: Typed, place: Place) -> Typed {
        if let Some(kind) = inner.kind
            && inner.literal.is_none()
        {
            self.kinds.scaled(kind, place);
        }
        // `-40 degC` is the point forty below zero, not the mirror of one above.
        let compiled = match (&inner.compiled, inner.literal.is_some(), inner.on_relative_scale) {
            (Compiled::Constant(si), true, true) => match parse_unit(&inner.unit) {
                Ok(unit) => Compiled::Constant(unit.to_si(-unit.from_si(*si))),
                Err(_) => Compiled::Constant(f64::NAN),
            },
            (Compiled::Constant(si), _, _) => Compiled::Constant(-si),
            // A literal gauge pressure below ambient: p + a becomes p - a.
            (Compiled::Binary(Arithmetic::Add, ambient, above), true, _) => {
                Compiled::Binary(Arithmetic::Subtract, ambient.clone(), above.clone())
            }
            _ => Compiled::Negative(Box::new(inner.compiled.clone())),
        };
        let literal = inner.literal.map(|_| place);
        Typed { compiled, literal, ..inner }
    }

    fn binary(&mut self, binary: &Binary, base: Base<'t>, place: Place, scope: Scope<'_>) -> Typed {
        if self.is_a_split_unit(binary, base, scope) {
            return Typed::unknown();
        }
        if !binary.spaced && !matches!(binary.operator, Operator::Power | Operator::PlusMinus) {
            let symbol = binary.operator.symbol();
            let at = base.place(binary.operator_span);
            let message = format!(
                "White space stands on both sides of `{symbol}`, which tells it from a part of a unit or a word."
            );
            let finding = Finding::new("unit-spacing", Level::Information, at, message);
            self.findings.push(finding.fix(format!("Write ` {symbol} `"), at.span, format!(" {symbol} "), true));
        }
        let left = self.work(&binary.left, base, scope);
        let right = self.work(&binary.right, base, scope);
        match binary.operator {
            Operator::Add | Operator::Subtract => self.sum(binary, left, right, base, place),
            Operator::PlusMinus => self.tolerance(binary, left, right, base, place),
            Operator::Multiply | Operator::Divide => self.product(binary.operator, left, right, place),
            Operator::Power => self.power(left, right, base.place(binary.right.span), place),
        }
    }

    /// `2 m / s` where `s` is no name: a unit torn apart by white space.
    fn is_a_split_unit(&mut self, binary: &Binary, base: Base<'t>, scope: Scope<'_>) -> bool {
        let (ExpressionKind::Quantity(Quantity { unit: Some(unit), .. }), ExpressionKind::Word(name)) =
            (&binary.left.kind, &binary.right.kind)
        else {
            return false;
        };
        let joined = format!("{}{}{}", unit.text, binary.operator.symbol(), name);
        if !matches!(binary.operator, Operator::Divide | Operator::Multiply)
            || self.names.value(name).is_some()
            || CONSTANTS.iter().any(|constant| constant.name == &**name)
            || scope.has(name)
            || parse_unit(&joined).is_err()
        {
            return false;
        }
        let span = unit.span.cover(binary.right.span);
        let place = base.place(span);
        let message = format!("`{name}` is no name here, and a unit holds no white space.");
        let finding = Finding::new("unit-spacing", Level::Error, place, message).remedy(format!("`{joined}`"));
        self.findings.push(finding.fix(format!("Write `{joined}`"), place.span, joined, true));
        true
    }

    fn sum(&mut self, binary: &Binary, left: Typed, right: Typed, base: Base<'t>, place: Place) -> Typed {
        let (Some(dimension), Some(other)) = (left.dimension, right.dimension) else { return Typed::unknown() };
        if dimension != other {
            return self.do_not_add(binary, &left, &right, base, place);
        }
        let is_difference = binary.operator == Operator::Subtract;
        let kind = match (left.kind, right.kind) {
            (Some(left), Some(right)) if is_difference => Some(self.kinds.difference(left, right, place)),
            (Some(left), Some(right)) => Some(self.kinds.sum(left, right, place)),
            _ => None,
        };
        let operation = if is_difference { Arithmetic::Subtract } else { Arithmetic::Add };
        Typed {
            compiled: Compiled::Binary(operation, Box::new(left.compiled), Box::new(right.compiled)),
            dimension: Some(dimension),
            kind,
            on_relative_scale: left.on_relative_scale || right.on_relative_scale,
            ..Typed::unknown()
        }
    }

    fn do_not_add(&mut self, binary: &Binary, left: &Typed, right: &Typed, base: Base<'t>, place: Place) -> Typed {
        let verb = match binary.operator {
            Operator::Subtract => "subtracted from each other",
            Operator::PlusMinus => "a value and its tolerance",
            _ => "added",
        };
        let (left_words, right_words) = (in_words(left.dimension), in_words(right.dimension));
        let bare =
            [(left, binary.left.span), (right, binary.right.span)].into_iter().find(|(side, _)| side.is_bare_number);
        if let Some((_, span)) = bare {
            let other = if left.is_bare_number { right_words } else { left_words };
            return self.error(
                "bare-number",
                base.place(span),
                format!("This number has no unit, and it stands beside {other}."),
            );
        }
        self.error(
            "dimension-mismatch",
            place,
            format!("{} and {right_words} cannot be {verb}.", super::declare::capitalised(&left_words)),
        )
    }

    fn tolerance(&mut self, binary: &Binary, left: Typed, right: Typed, base: Base<'t>, place: Place) -> Typed {
        let (Some(dimension), Some(other)) = (left.dimension, right.dimension) else { return Typed::unknown() };
        // `5 m +- 2 %` is a share of the value.
        let is_share = other == NUMBER && dimension != NUMBER && &*right.unit == "%";
        if dimension != other && !is_share {
            return self.do_not_add(binary, &left, &right, base, place);
        }
        if let Some(kind) = right.kind {
            self.kinds.is(kind, Kind::Difference, base.place(binary.right.span));
        }
        let half_width = if is_share {
            Compiled::Binary(Arithmetic::Multiply, Box::new(left.compiled.clone()), Box::new(right.compiled))
        } else {
            right.compiled
        };
        let index = self.tolerances.len();
        let text = binary.left.span.cover(binary.right.span).of(base.text).into();
        self.tolerances.push(Tolerance { place, text, half_width });
        let deviation = Compiled::Variable(Variable::Deviation(index));
        let compiled = Compiled::Binary(Arithmetic::Add, Box::new(left.compiled), Box::new(deviation));
        Typed { compiled, is_bare_number: false, ..left }
    }

    fn product(&mut self, operator: Operator, left: Typed, right: Typed, place: Place) -> Typed {
        let (Some(first), Some(second)) = (left.dimension, right.dimension) else { return Typed::unknown() };
        let is_product = operator == Operator::Multiply;
        let dimension = if is_product { first.times(second) } else { first.over(second) };
        let Some(dimension) = dimension else {
            return self.error(
                "dimension-mismatch",
                place,
                "The powers of units in this product are beyond what can be computed.",
            );
        };
        for side in [&left, &right] {
            if let Some(kind) = side.kind {
                // An absolute temperature may be scaled (a gas law does it); one in degC is a slip. Pressures
                // are absolute unless written as gauge.
                if side.on_relative_scale || side.dimension == Some(PRESSURE) {
                    if side.dimension == Some(TEMPERATURE) {
                        self.kinds.scaled(kind, place);
                    }
                } else if dimension == TEMPERATURE {
                    self.kinds.scaled(kind, place);
                }
            }
        }
        let kind = self.is_kinded(dimension).then(|| {
            let settled =
                (dimension == TEMPERATURE && (left.kind.is_some() || right.kind.is_some())).then_some(Kind::Difference);
            self.kinds.variable(settled)
        });
        let operation = if is_product { Arithmetic::Multiply } else { Arithmetic::Divide };
        Typed {
            compiled: Compiled::Binary(operation, Box::new(left.compiled), Box::new(right.compiled)),
            dimension: Some(dimension),
            kind,
            ..Typed::unknown()
        }
    }

    fn power(&mut self, base: Typed, exponent: Typed, exponent_place: Place, place: Place) -> Typed {
        let (Some(dimension), Some(exponent_dimension)) = (base.dimension, exponent.dimension) else {
            return Typed::unknown();
        };
        if exponent_dimension != NUMBER {
            let message = format!("An exponent is a pure number; this is {}.", exponent_dimension.words());
            return self.error("dimension-mismatch", exponent_place, message);
        }
        let result = if dimension == NUMBER {
            NUMBER
        } else {
            let constant = exponent.compiled.value(&|_| f64::NAN);
            let rational = Exponent::approximate_float(constant).filter(|_| constant.is_finite());
            let Some(power) = rational.and_then(|exponent| dimension.power(exponent)) else {
                let message = "The exponent of a quantity with a unit is a plain number, so that the unit of the result is known.";
                return self.error("dimension-mismatch", exponent_place, message);
            };
            power
        };
        if let (Some(kind), true) = (base.kind, base.on_relative_scale) {
            self.kinds.scaled(kind, place);
        }
        let kind = self.is_kinded(result).then(|| self.kinds.variable(None));
        Typed {
            compiled: Compiled::Binary(Arithmetic::Power, Box::new(base.compiled), Box::new(exponent.compiled)),
            dimension: Some(result),
            kind,
            ..Typed::unknown()
        }
    }

    fn call(
        &mut self,
        function: &Word,
        arguments: &[Expression],
        base: Base<'t>,
        place: Place,
        scope: Scope<'_>,
    ) -> Typed {
        let name = &*function.text;
        if let Some(number) = REGION_NUMBERS.iter().find(|number| number.name == name) {
            return self.region_number(number, arguments, base, place, scope);
        }
        let Some(row) = FUNCTIONS.iter().find(|row| row.name == name) else {
            return self.unknown_function(function, base);
        };
        let (least, most) = row.arguments;
        if arguments.len() < least || arguments.len() > most {
            let wanted = if least == most { "one value" } else { "values, separated by commas," };
            return self.error("unexpected-argument", place, format!("`{name}` takes {wanted} in its brackets."));
        }
        let worked: Vec<Typed> = arguments.iter().map(|argument| self.work(argument, base, scope)).collect();
        if matches!(name, "min" | "max") {
            return self.extreme(name == "max", worked, place);
        }
        let Some(inner) = worked.into_iter().next() else { return Typed::unknown() };
        let Some(dimension) = inner.dimension else { return Typed::unknown() };
        let of = |function: Function| Compiled::Function(function, Box::new(inner.compiled.clone()));
        let (compiled, result) = match name {
            "sqrt" => match dimension.power(Exponent::new(1, 2)) {
                Some(half) => (of(Function::SquareRoot), half),
                None => {
                    return self.error("dimension-mismatch", place, "This root has no dimension that can be computed.");
                }
            },
            "abs" => {
                let compiled = of(Function::Magnitude);
                return Typed { compiled, literal: None, unit: "".into(), is_bare_number: false, ..inner };
            }
            _ if dimension != NUMBER => {
                let message = format!("`{name}` takes a pure number; this is {}.", dimension.words());
                return self.error("dimension-mismatch", place, message);
            }
            "exp" => (of(Function::Exponential), NUMBER),
            "ln" => (of(Function::Logarithm), NUMBER),
            "log10" => (of(Function::DecimalLogarithm), NUMBER),
            "sin" => (of(Function::Sine), NUMBER),
            "cos" => (of(Function::Cosine), NUMBER),
            _ => (of(Function::Tangent), NUMBER),
        };
        let kind = self.is_kinded(result).then(|| self.kinds.variable(None));
        Typed { compiled, dimension: Some(result), kind, ..Typed::unknown() }
    }

    fn unknown_function(&mut self, function: &Word, base: Base<'t>) -> Typed {
        let place = base.place(function.span);
        let names = FUNCTIONS.iter().map(|row| row.name).chain(REGION_NUMBERS.iter().map(|number| number.name));
        let mut finding =
            Finding::new("unknown-name", Level::Error, place, format!("No function is called `{}`.", function.text));
        if let Some(meant) = nearest(&function.text, names) {
            finding = finding.remedy(format!("`{meant}`")).fix(format!("Write `{meant}`"), place.span, meant, true);
        }
        self.findings.push(finding);
        Typed::unknown()
    }

    fn extreme(&mut self, greatest: bool, of: Vec<Typed>, place: Place) -> Typed {
        let Some(first) = of.first().cloned() else { return Typed::unknown() };
        let mut on_relative_scale = false;
        for other in &of {
            let (Some(dimension), Some(wanted)) = (other.dimension, first.dimension) else { return Typed::unknown() };
            if dimension != wanted {
                let message =
                    format!("These are of different dimensions: {} and {}.", wanted.words(), dimension.words());
                return self.error("dimension-mismatch", place, message);
            }
            on_relative_scale |= other.on_relative_scale;
            if let (Some(left), Some(right)) = (first.kind, other.kind) {
                self.kinds.same(left, right, place);
            }
        }
        let compiled = Compiled::Extreme { greatest, of: of.into_iter().map(|one| one.compiled).collect() };
        Typed { compiled, on_relative_scale, literal: None, unit: "".into(), is_bare_number: false, ..first }
    }

    fn region_number(
        &mut self,
        number: &'static crate::vocabulary::functions::RegionNumber,
        arguments: &[Expression],
        base: Base<'t>,
        place: Place,
        scope: Scope<'_>,
    ) -> Typed {
        if !matches!(scope, Scope::Requirement) {
            let message =
                format!("`{}` is worked out from the whole case, so only `require` may name it.", number.name);
            return self.error("unknown-name", place, message);
        }
        let region = match arguments {
            [Expression { kind: ExpressionKind::Word(name), span }] => match self.names.entity(NameOf::Region, name) {
                Some(index) => {
                    if let Some((_, target)) = self.entries.get(index).and_then(DeclaredEntry::name) {
                        self.references.push(Reference { place: base.place(*span), target });
                    }
                    name.clone()
                }
                None => return self.error("unknown-name", base.place(*span), format!("No region is called `{name}`.")),
            },
            _ => {
                return self.error(
                    "unexpected-argument",
                    place,
                    format!("`{}` takes the name of a region.", number.name),
                );
            }
        };
        let settled = if number.is_temperature_point { Kind::Point } else { Kind::Difference };
        let kind = self.is_kinded(number.dimension).then(|| self.kinds.variable(Some(settled)));
        let compiled = Compiled::Variable(Variable::RegionNumber(number.name, region));
        Typed { compiled, dimension: Some(number.dimension), kind, ..Typed::unknown() }
    }
}

/// A dimension in words; "something" where it is not known.
pub fn in_words(dimension: Option<Dimension>) -> String {
    dimension.map_or_else(|| "something".to_string(), Dimension::words)
}
