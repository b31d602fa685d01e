//! Gives each line to the grammar and builds the tree.

use super::cut;
use super::expression::expression;
use super::limits;
use super::span::Span;
use super::tree::{
    Comparison, Content, Definition, Entry, Expression, Line, LineProblem, LinkPart, Phrase, PlacedEntry, Requirement,
    Row, Tree, Word,
};
use super::unreadable;
use pest::Parser;
use pest::iterators::Pair;
use std::collections::HashMap;
use std::sync::Arc;

mod generated {
    #![allow(missing_docs)] // the derive writes an enum of rules without any

    #[derive(pest_derive::Parser)]
    #[grammar = "../grammar/deck.pest"]
    pub(in crate::syntax) struct DeckGrammar;
}

use generated::DeckGrammar;
pub(super) use generated::Rule;

pub(super) type Node<'a> = Pair<'a, Rule>;

/// The tree of a text. Never fails: what cannot be read is noted on its line.
pub fn parse(text: &str) -> Tree {
    parse_again(text, &Tree::default())
}

/// The tree of a text that is a changed version of the one that `before` was made from. Entries whose text is
/// the same are taken over; the result equals that of [`parse`].
pub fn parse_again(text: &str, before: &Tree) -> Tree {
    let known: HashMap<&str, &Arc<Entry>> =
        before.entries.iter().map(|placed| (&*placed.entry.text, &placed.entry)).collect();
    let place = |span: Span| {
        let piece = span.of(text);
        let entry = known.get(piece).map_or_else(|| Arc::new(parse_entry(piece)), |&entry| entry.clone());
        PlacedEntry { start: span.start, entry }
    };
    Tree { entries: cut::entries(text).into_iter().map(place).collect() }
}

/// The tree of the text of one entry.
pub fn parse_entry(text: &str) -> Entry {
    let lines: Vec<Line> = cut::lines(text).map(|span| parse_line(text, span)).collect();
    let head = lines.iter().position(|line| {
        let first = line.span.of(text).trim_start_matches('\u{feff}').chars().next();
        first.is_some_and(|first| first != '#' && !first.is_whitespace())
    });
    Entry { text: text.into(), lines, head }
}

fn parse_line(text: &str, span: Span) -> Line {
    let whole = span.of(text);
    let body = whole.trim_end_matches('\n').trim_end_matches('\r');
    // A byte-order mark may open a file; it is skipped, not parsed.
    let mark = body.len() - body.trim_start_matches('\u{feff}').len();
    let body = body.get(mark..).unwrap_or("");
    let offset = span.start + mark;
    let mut line = Line { span, content: Content::Blank, comment: None, problem: None };
    if let Some(problem) = over_limit(body, offset) {
        line.problem = Some(problem);
        return line;
    }
    match DeckGrammar::parse(Rule::line, body) {
        Ok(pairs) => fill(&mut line, pairs, offset),
        Err(error) => {
            line.problem = Some(unreadable::explain(body, offset, &error));
            if let Ok(pairs) = DeckGrammar::parse(Rule::line_start, body) {
                fill(&mut line, pairs, offset);
            }
        }
    }
    line
}

fn over_limit(body: &str, offset: usize) -> Option<LineProblem> {
    let message = if body.len() > limits::LINE_BYTES {
        format!("This line is {} bytes long; up to {} are read.", body.len(), limits::LINE_BYTES)
    } else if deepest_nesting(body) > limits::NESTING {
        format!("Brackets are nested more than {} deep here; give inner parts names.", limits::NESTING)
    } else {
        return None;
    };
    let span = Span::new(offset, offset + body.len());
    Some(LineProblem { span, message, check: "line-too-complex", fix: None })
}

fn deepest_nesting(body: &str) -> usize {
    let mut depth = 0_usize;
    let mut deepest = 0;
    for byte in body.bytes() {
        match byte {
            b'(' | b'[' => {
                depth += 1;
                deepest = deepest.max(depth);
            }
            b')' | b']' => depth = depth.saturating_sub(1),
            _ => {}
        }
    }
    deepest
}

fn fill(line: &mut Line, pairs: pest::iterators::Pairs<'_, Rule>, offset: usize) {
    for outer in pairs {
        for pair in outer.into_inner() {
            match pair.as_rule() {
                Rule::phrase => line.content = Content::Phrase(phrase(pair, offset)),
                Rule::definition => line.content = definition(pair, offset),
                Rule::row => line.content = row(pair, offset),
                Rule::requirement => line.content = requirement(pair, offset),
                Rule::comment => line.comment = Some(span_of(&pair, offset)),
                _ => {}
            }
        }
    }
}

/// The place of a grammar node, counted from the start of the entry.
pub(super) fn span_of(node: &Node<'_>, offset: usize) -> Span {
    let span = node.as_span();
    Span::new(span.start(), span.end()).shifted(offset)
}

/// A grammar node as a word; quotes of a text are dropped from its letters.
pub(super) fn word(node: &Node<'_>, offset: usize) -> Word {
    let text = node.as_str();
    let bare = text.strip_prefix('"').and_then(|rest| rest.strip_suffix('"')).unwrap_or(text);
    Word { text: bare.into(), span: span_of(node, offset) }
}

fn phrase(node: Node<'_>, offset: usize) -> Phrase {
    let span = span_of(&node, offset);
    let mut phrase = Phrase {
        span,
        word: Word { text: "".into(), span },
        arguments: Vec::new(),
        links: Vec::new(),
        description: None,
    };
    for part in node.into_inner() {
        match part.as_rule() {
            Rule::word => phrase.word = word(&part, offset),
            Rule::arguments => phrase.arguments = arguments(part, offset),
            Rule::text => phrase.description = Some(word(&part, offset)),
            Rule::link_part => {
                let mut link_part = LinkPart { link: Word { text: "".into(), span }, arguments: Vec::new() };
                for inner in part.into_inner() {
                    match inner.as_rule() {
                        Rule::link => link_part.link = word(&inner, offset),
                        Rule::arguments => link_part.arguments = arguments(inner, offset),
                        _ => {}
                    }
                }
                phrase.links.push(link_part);
            }
            _ => {}
        }
    }
    phrase
}

fn arguments(node: Node<'_>, offset: usize) -> Vec<Expression> {
    node.into_inner()
        .filter(|part| matches!(part.as_rule(), Rule::date | Rule::text | Rule::expression))
        .map(|part| expression(part, offset))
        .collect()
}

fn definition(node: Node<'_>, offset: usize) -> Content {
    let span = span_of(&node, offset);
    let mut definition = Definition { span, name: Word { text: "".into(), span }, value: None, description: None };
    for part in node.into_inner() {
        match part.as_rule() {
            Rule::name => definition.name = word(&part, offset),
            Rule::expression => definition.value = Some(expression(part, offset)),
            Rule::text => definition.description = Some(word(&part, offset)),
            _ => {}
        }
    }
    Content::Definition(definition)
}

fn row(node: Node<'_>, offset: usize) -> Content {
    let span = span_of(&node, offset);
    let cells = node
        .into_inner()
        .filter(|part| matches!(part.as_rule(), Rule::text | Rule::expression))
        .map(|part| expression(part, offset))
        .collect();
    Content::Row(Row { span, cells })
}

fn requirement(node: Node<'_>, offset: usize) -> Content {
    let span = span_of(&node, offset);
    let mut comparison = Comparison::Within;
    let mut sides = Vec::new();
    for part in node.into_inner() {
        match part.as_rule() {
            Rule::comparison => {
                comparison = match part.as_str() {
                    "<" => Comparison::Less,
                    "<=" => Comparison::LessOrEqual,
                    ">" => Comparison::Greater,
                    _ => Comparison::GreaterOrEqual,
                };
            }
            Rule::expression => sides.push(expression(part, offset)),
            _ => {}
        }
    }
    match (sides.pop(), sides.pop()) {
        (Some(right), Some(left)) => Content::Requirement(Requirement { span, left, comparison, right }),
        _ => Content::Blank,
    }
}
