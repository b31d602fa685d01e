//! Precedence: the flat run of operands and operators that the grammar gives becomes a tree.

use super::limits;
use super::parse::{Node, Rule, span_of, word};
use super::span::Span;
use super::tree::{Binary, Expression, ExpressionKind, Mark, Operator, Quantity, RangeExpression, Word};
use pest::pratt_parser::{Assoc, Op, PrattParser};
use std::sync::LazyLock;

static PRECEDENCE: LazyLock<PrattParser<Rule>> = LazyLock::new(|| {
    PrattParser::new()
        .op(Op::infix(Rule::plus_minus, Assoc::Left))
        .op(Op::infix(Rule::add, Assoc::Left) | Op::infix(Rule::subtract, Assoc::Left))
        .op(Op::infix(Rule::multiply, Assoc::Left) | Op::infix(Rule::divide, Assoc::Left))
        .op(Op::prefix(Rule::sign))
        .op(Op::infix(Rule::power, Assoc::Right))
});

/// The tree of a grammar node that is an expression or one of its operands.
pub(super) fn expression(node: Node<'_>, offset: usize) -> Expression {
    let span = span_of(&node, offset);
    let kind = match node.as_rule() {
        Rule::expression => return range_or_sum(node, offset),
        Rule::sum => return sum(node, offset),
        Rule::quantity => quantity(node, offset),
        Rule::name_or_choice => ExpressionKind::Word(node.as_str().into()),
        Rule::member => {
            let mut words = node.into_inner().map(|part| word(&part, offset));
            match (words.next(), words.next()) {
                (Some(owner), Some(member)) => ExpressionKind::Member(owner, member),
                _ => ExpressionKind::Word("".into()),
            }
        }
        Rule::call => {
            let mut function = Word { text: "".into(), span };
            let mut arguments = Vec::new();
            for part in node.into_inner() {
                match part.as_rule() {
                    Rule::word => function = word(&part, offset),
                    Rule::expression => arguments.push(expression(part, offset)),
                    _ => {}
                }
            }
            ExpressionKind::Call(function, arguments)
        }
        Rule::group => {
            let mut inner = members(node, offset);
            match (inner.pop(), inner.is_empty()) {
                (Some(only), true) => ExpressionKind::Group(Box::new(only)),
                (Some(last), false) => {
                    inner.push(last);
                    ExpressionKind::Vector(inner)
                }
                (None, _) => ExpressionKind::Vector(Vec::new()),
            }
        }
        Rule::list => ExpressionKind::List(members(node, offset)),
        Rule::text => ExpressionKind::Text(word(&node, offset).text),
        Rule::date => ExpressionKind::Date(node.as_str().into()),
        _ => ExpressionKind::Word(node.as_str().into()),
    };
    Expression { kind, span }
}

fn members(node: Node<'_>, offset: usize) -> Vec<Expression> {
    node.into_inner().filter(|part| part.as_rule() == Rule::expression).map(|part| expression(part, offset)).collect()
}

fn range_or_sum(node: Node<'_>, offset: usize) -> Expression {
    let span = span_of(&node, offset);
    let mut parts = node.into_inner().filter(|part| part.as_rule() == Rule::sum).map(|part| sum(part, offset));
    let (first, second, third) = (parts.next(), parts.next(), parts.next());
    match (first, second) {
        (Some(from), Some(to)) => {
            Expression { kind: ExpressionKind::Range(Box::new(RangeExpression { from, to, step: third })), span }
        }
        (Some(only), None) => only,
        (None, _) => Expression { kind: ExpressionKind::Word("".into()), span },
    }
}

fn sum(node: Node<'_>, offset: usize) -> Expression {
    let span = span_of(&node, offset);
    // The operator stands alone in its infix node, whose own span tells whether it is spaced.
    let mut spans: Vec<(Span, bool)> = Vec::new();
    let mut flat: Vec<Node<'_>> = Vec::new();
    for part in node.into_inner() {
        if part.as_rule() == Rule::infix {
            let around = span_of(&part, offset);
            let text = part.as_str();
            let spaced = text.starts_with(char::is_whitespace) && text.ends_with(char::is_whitespace);
            let operator = part.into_inner().find(|inner| inner.as_rule() == Rule::operator);
            if let Some(which) = operator.and_then(|operator| operator.into_inner().next()) {
                spans.push((around, spaced));
                flat.push(which);
            }
        } else {
            flat.push(part);
        }
    }
    if spans.len() > limits::OPERATORS {
        return Expression { kind: ExpressionKind::TooComplex, span };
    }
    PRECEDENCE
        .map_primary(|operand| expression(operand, offset))
        .map_prefix(|sign, operand| {
            let span = span_of(&sign, offset).cover(operand.span);
            Expression { kind: ExpressionKind::Negative(Box::new(operand)), span }
        })
        .map_infix(|left, operator, right| {
            let at = span_of(&operator, offset);
            let (operator_span, spaced) = spans
                .iter()
                .find(|(around, _)| around.start <= at.start && at.end <= around.end)
                .copied()
                .unwrap_or((at, true));
            let operator = match operator.as_rule() {
                Rule::plus_minus => Operator::PlusMinus,
                Rule::add => Operator::Add,
                Rule::subtract => Operator::Subtract,
                Rule::multiply => Operator::Multiply,
                Rule::divide => Operator::Divide,
                _ => Operator::Power,
            };
            let span = left.span.cover(right.span);
            let binary = Binary { left, operator, operator_span, spaced, right };
            Expression { kind: ExpressionKind::Binary(Box::new(binary)), span }
        })
        .parse(flat.into_iter())
}

fn quantity(node: Node<'_>, offset: usize) -> ExpressionKind {
    let span = span_of(&node, offset);
    let mut quantity = Quantity { number: 0.0, number_span: span, unit: None, mark: None };
    for part in node.into_inner() {
        match part.as_rule() {
            Rule::number => {
                quantity.number_span = span_of(&part, offset);
                // The grammar admits only what the standard library reads; too large a number becomes infinite.
                quantity.number = part.as_str().parse().unwrap_or(f64::INFINITY);
            }
            Rule::unit => quantity.unit = Some(word(&part, offset)),
            Rule::mark => {
                let mark = if part.as_str() == "difference" { Mark::Difference } else { Mark::Absolute };
                quantity.mark = Some((mark, span_of(&part, offset)));
            }
            _ => {}
        }
    }
    ExpressionKind::Quantity(quantity)
}
