//! The leaves of the tree: every byte of an entry, in order, each run with what it is. Colouring and layout read
//! them, and a test holds that nothing is lost.

use super::span::Span;
use super::tree::{Content, Entry, Expression, ExpressionKind, Line, Word};

/// What a run of bytes is.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum TokenKind {
    /// White space, line ends, operators and other marks.
    Plain,
    /// A comment.
    Comment,
    /// The word that opens an entry.
    EntryWord,
    /// The word that opens a statement.
    StatementWord,
    /// A link.
    Link,
    /// A name being defined.
    DefinedName,
    /// A name, or a word that a statement offers as a choice.
    Name,
    /// The function of a call.
    Function,
    /// The digits of a number, or a date.
    Number,
    /// A unit, or the word that settles a kind of temperature.
    Unit,
    /// A text in quotes.
    Text,
    /// An operator with the white space around it.
    Operator,
    /// What could not be read.
    Unreadable,
}

/// A run of bytes; its span counts from the start of the entry.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Token {
    /// What it is.
    pub kind: TokenKind,
    /// Where.
    pub span: Span,
}

/// All tokens of an entry. Their texts, one after another, are the text of the entry.
pub fn tokens(entry: &Entry) -> Vec<Token> {
    let mut marked = Vec::new();
    for (index, line) in entry.lines.iter().enumerate() {
        mark_line(line, entry.head == Some(index), &mut marked);
    }
    marked.sort_by_key(|token| (token.span.start, token.span.end));
    let mut tokens: Vec<Token> = Vec::with_capacity(marked.len() * 2);
    let mut at = 0;
    for token in marked {
        if token.span.start < at || token.span.start == token.span.end {
            continue;
        }
        if token.span.start > at {
            tokens.push(Token { kind: TokenKind::Plain, span: Span::new(at, token.span.start) });
        }
        at = token.span.end;
        tokens.push(token);
    }
    if at < entry.text.len() {
        tokens.push(Token { kind: TokenKind::Plain, span: Span::new(at, entry.text.len()) });
    }
    tokens
}

fn mark_line(line: &Line, is_head: bool, into: &mut Vec<Token>) {
    let mut put = |kind, span| into.push(Token { kind, span });
    if let Some(comment) = line.comment {
        put(TokenKind::Comment, comment);
    }
    if let Some(problem) = &line.problem {
        put(TokenKind::Unreadable, problem.span);
    }
    match &line.content {
        Content::Blank => {}
        Content::Phrase(phrase) => {
            put(if is_head { TokenKind::EntryWord } else { TokenKind::StatementWord }, phrase.word.span);
            for part in &phrase.links {
                put(TokenKind::Link, part.link.span);
            }
            if let Some(description) = &phrase.description {
                put(TokenKind::Text, description.span);
            }
            for argument in phrase.arguments.iter().chain(phrase.links.iter().flat_map(|part| &part.arguments)) {
                mark_expression(argument, into);
            }
        }
        Content::Definition(definition) => {
            put(TokenKind::DefinedName, definition.name.span);
            if let Some(Word { span, .. }) = &definition.description {
                put(TokenKind::Text, *span);
            }
            if let Some(value) = &definition.value {
                mark_expression(value, into);
            }
        }
        Content::Row(row) => row.cells.iter().for_each(|cell| mark_expression(cell, into)),
        Content::Requirement(requirement) => {
            mark_expression(&requirement.left, into);
            mark_expression(&requirement.right, into);
        }
    }
}

fn mark_expression(expression: &Expression, into: &mut Vec<Token>) {
    let whole = expression.span;
    match &expression.kind {
        ExpressionKind::Quantity(quantity) => {
            into.push(Token { kind: TokenKind::Number, span: quantity.number_span });
            if let Some(unit) = &quantity.unit {
                into.push(Token { kind: TokenKind::Unit, span: unit.span });
            }
            if let Some((_, span)) = quantity.mark {
                into.push(Token { kind: TokenKind::Unit, span });
            }
        }
        ExpressionKind::Word(_) => into.push(Token { kind: TokenKind::Name, span: whole }),
        ExpressionKind::Member(owner, member) => {
            into.push(Token { kind: TokenKind::Name, span: owner.span });
            into.push(Token { kind: TokenKind::Name, span: member.span });
        }
        ExpressionKind::Call(function, arguments) => {
            into.push(Token { kind: TokenKind::Function, span: function.span });
            arguments.iter().for_each(|argument| mark_expression(argument, into));
        }
        ExpressionKind::Negative(inner) | ExpressionKind::Group(inner) => mark_expression(inner, into),
        ExpressionKind::Binary(binary) => {
            mark_expression(&binary.left, into);
            into.push(Token { kind: TokenKind::Operator, span: binary.operator_span });
            mark_expression(&binary.right, into);
        }
        ExpressionKind::Vector(items) | ExpressionKind::List(items) => {
            items.iter().for_each(|item| mark_expression(item, into));
        }
        ExpressionKind::Range(range) => {
            mark_expression(&range.from, into);
            mark_expression(&range.to, into);
            if let Some(step) = &range.step {
                mark_expression(step, into);
            }
        }
        ExpressionKind::Text(_) => into.push(Token { kind: TokenKind::Text, span: whole }),
        ExpressionKind::Date(_) => into.push(Token { kind: TokenKind::Number, span: whole }),
        ExpressionKind::TooComplex => into.push(Token { kind: TokenKind::Unreadable, span: whole }),
    }
}
