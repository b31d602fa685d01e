//! The syntax tree: entries, lines, phrases and expressions, with the place of every part.
//!
//! Spans count from the start of the entry, so an entry keeps its tree when text before it changes.
//! The lines of an entry cover its text without a gap, and the entries cover the deck: nothing is lost,
//! whatever its state (`tokens` lists every byte; a test puts them together again).

use super::span::Span;
use std::sync::Arc;

/// A deck as entries in order. What stands before the first entry (comments, stray lines) is an entry
/// without a head.
#[derive(Clone, Debug, Default)]
pub struct Tree {
    /// The entries, each with its offset in the file.
    pub entries: Vec<PlacedEntry>,
}

/// An entry and where it starts.
#[derive(Clone, Debug)]
pub struct PlacedEntry {
    /// Offset of its first byte in the file.
    pub start: usize,
    /// The entry itself, shared between versions of a file that hold the same text.
    pub entry: Arc<Entry>,
}

/// One entry: the comment lines directly above it, its head line and its statements.
#[derive(Debug, PartialEq)]
pub struct Entry {
    /// Its text.
    pub text: Box<str>,
    /// Its lines, in order, blank and comment lines too.
    pub lines: Vec<Line>,
    /// Which line is the head; `None` where an entry has none (the text before the first entry).
    pub head: Option<usize>,
}

/// One line.
#[derive(Debug, PartialEq)]
pub struct Line {
    /// All of it, with its line end.
    pub span: Span,
    /// What stands on it.
    pub content: Content,
    /// The comment at its end, with its `#`.
    pub comment: Option<Span>,
    /// What could not be read. `content` then holds what was understood before it.
    pub problem: Option<LineProblem>,
}

/// Why a line could not be read.
#[derive(Clone, Debug, PartialEq)]
pub struct LineProblem {
    /// From where on.
    pub span: Span,
    /// What is wrong, as a sentence.
    pub message: String,
    /// The check that it belongs to: `unreadable-line` or one of the limits.
    pub check: &'static str,
    /// A replacement of `span`, where it is plain what was meant.
    pub fix: Option<(String, String)>,
}

/// What a line says.
#[derive(Debug, PartialEq)]
pub enum Content {
    /// Nothing, or only a comment.
    Blank,
    /// `word arguments (link arguments)*`
    Phrase(Phrase),
    /// `name = expression "description"`
    Definition(Definition),
    /// `| cell | cell |`
    Row(Row),
    /// `expression < expression`, `expression within a .. b`
    Requirement(Requirement),
}

/// `word arguments (link arguments)*`: the head of an entry, or a statement.
#[derive(Debug, PartialEq)]
pub struct Phrase {
    /// From the word to the last argument.
    pub span: Span,
    /// The word.
    pub word: Word,
    /// What follows the word without a link.
    pub arguments: Vec<Expression>,
    /// The links, each with what follows it.
    pub links: Vec<LinkPart>,
    /// A text behind it all, without quotes: the description of a sweep.
    pub description: Option<Word>,
}

/// A link and its arguments.
#[derive(Debug, PartialEq)]
pub struct LinkPart {
    /// The link.
    pub link: Word,
    /// What follows; empty where nothing was written yet.
    pub arguments: Vec<Expression>,
}

/// `name = expression "description"`
#[derive(Debug, PartialEq)]
pub struct Definition {
    /// From the name to the end of the expression or description.
    pub span: Span,
    /// The name defined.
    pub name: Word,
    /// Its value; `None` where nothing was written yet.
    pub value: Option<Expression>,
    /// The text behind it, without quotes.
    pub description: Option<Word>,
}

/// `| cell | cell |`
#[derive(Debug, PartialEq)]
pub struct Row {
    /// From the first bar to the last.
    pub span: Span,
    /// The cells.
    pub cells: Vec<Expression>,
}

/// `left < right`, or `left within range`
#[derive(Debug, PartialEq)]
pub struct Requirement {
    /// All of it.
    pub span: Span,
    /// What is compared.
    pub left: Expression,
    /// How.
    pub comparison: Comparison,
    /// With what; a range under `Within`.
    pub right: Expression,
}

/// How a requirement compares.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Comparison {
    /// `<`
    Less,
    /// `<=`
    LessOrEqual,
    /// `>`
    Greater,
    /// `>=`
    GreaterOrEqual,
    /// `within a .. b`
    Within,
}

/// A word or name and its place.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Word {
    /// Its letters; for a text, without the quotes.
    pub text: Box<str>,
    /// Its place; for a text, with the quotes.
    pub span: Span,
}

/// An expression and its place.
#[derive(Clone, Debug, PartialEq)]
pub struct Expression {
    /// What it is.
    pub kind: ExpressionKind,
    /// Its place.
    pub span: Span,
}

/// The forms of an expression.
#[derive(Clone, Debug, PartialEq)]
pub enum ExpressionKind {
    /// A number, with or without a unit.
    Quantity(Quantity),
    /// A name, or a word that a statement offers as a choice.
    Word(Box<str>),
    /// `owner.member`
    Member(Word, Word),
    /// `function(argument, ..)`
    Call(Word, Vec<Expression>),
    /// `-operand`
    Negative(Box<Expression>),
    /// `left operator right`
    Binary(Box<Binary>),
    /// `(inner)`
    Group(Box<Expression>),
    /// `(x, y, z)`
    Vector(Vec<Expression>),
    /// `[a, b]`
    List(Vec<Expression>),
    /// `from .. to step by`
    Range(Box<RangeExpression>),
    /// `"text"`, without the quotes.
    Text(Box<str>),
    /// `2027-03-01`
    Date(Box<str>),
    /// An expression with more operators than [`super::limits::OPERATORS`], left unread.
    TooComplex,
}

/// A number as written, its unit, and the word that says what kind of temperature it is.
#[derive(Clone, Debug, PartialEq)]
pub struct Quantity {
    /// The number; infinite where it is too large to hold.
    pub number: f64,
    /// Its digits.
    pub number_span: Span,
    /// The unit as written.
    pub unit: Option<Word>,
    /// `difference` or `absolute`.
    pub mark: Option<(Mark, Span)>,
}

/// The word behind a quantity that settles its kind.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Mark {
    /// A difference of two temperatures or pressures.
    Difference,
    /// A point on the absolute scale.
    Absolute,
}

/// `left operator right`
#[derive(Clone, Debug, PartialEq)]
pub struct Binary {
    /// Left operand.
    pub left: Expression,
    /// The operator.
    pub operator: Operator,
    /// The operator with the white space around it.
    pub operator_span: Span,
    /// Whether white space stands on both sides.
    pub spaced: bool,
    /// Right operand.
    pub right: Expression,
}

/// `from .. to step by`
#[derive(Clone, Debug, PartialEq)]
pub struct RangeExpression {
    /// First value.
    pub from: Expression,
    /// Last value.
    pub to: Expression,
    /// Distance of two values.
    pub step: Option<Expression>,
}

/// The operators, by rising precedence.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Operator {
    /// `+-`: a value and its tolerance.
    PlusMinus,
    /// `+`
    Add,
    /// `-`
    Subtract,
    /// `*`
    Multiply,
    /// `/`
    Divide,
    /// `^`
    Power,
}

impl Operator {
    /// As a deck spells it.
    pub const fn symbol(self) -> &'static str {
        match self {
            Operator::PlusMinus => "+-",
            Operator::Add => "+",
            Operator::Subtract => "-",
            Operator::Multiply => "*",
            Operator::Divide => "/",
            Operator::Power => "^",
        }
    }
}

impl Comparison {
    /// As a deck spells it.
    pub const fn symbol(self) -> &'static str {
        match self {
            Comparison::Less => "<",
            Comparison::LessOrEqual => "<=",
            Comparison::Greater => ">",
            Comparison::GreaterOrEqual => ">=",
            Comparison::Within => "within",
        }
    }
}

impl Entry {
    /// The phrase at its head.
    pub fn head_phrase(&self) -> Option<&Phrase> {
        match &self.lines.get(self.head?)?.content {
            Content::Phrase(phrase) => Some(phrase),
            _ => None,
        }
    }

    /// The lines below the head.
    pub fn statements(&self) -> impl Iterator<Item = &Line> {
        let from = self.head.map_or(0, |head| head + 1);
        self.lines.iter().skip(from)
    }

    /// The comment lines directly above line `index`, without their `#`, joined by line breaks.
    pub fn description_above(&self, index: usize) -> Option<String> {
        let above = self.lines.get(..index)?;
        let mut texts: Vec<&str> = above
            .iter()
            .rev()
            .take_while(|line| line.content == Content::Blank && line.problem.is_none() && line.comment.is_some())
            .filter_map(|line| line.comment.map(|span| span.of(&self.text).trim_start_matches('#').trim()))
            .collect();
        texts.reverse();
        (!texts.is_empty()).then(|| texts.join("\n"))
    }
}

impl Tree {
    /// The index of the entry that holds the byte `offset`; the last one for an offset past the end.
    pub fn entry_at(&self, offset: usize) -> Option<usize> {
        let after = self.entries.partition_point(|placed| placed.start <= offset);
        after.checked_sub(1)
    }
}
