//! Selection that grows: the number, the quantity, the expression, the statement, the line, the entry, the file.

use super::spot::spot;
use crate::syntax::tree::{Content, ExpressionKind};
use crate::syntax::{FileId, Span};
use crate::workspace::Deck;

/// The ranges around an offset, the innermost first; each holds the one before it and is larger.
pub fn ranges(deck: &Deck, file: FileId, offset: usize) -> Vec<Span> {
    let Some(spot) = spot(deck, file, offset) else { return Vec::new() };
    let mut found: Vec<Span> = Vec::new();
    let touches = |span: &Span| span.touches(spot.offset);
    if let Some(line) = spot.line() {
        let expressions = spot.expressions();
        if let Some(innermost) = expressions.first() {
            match &innermost.kind {
                ExpressionKind::Quantity(quantity) => {
                    found.push(spot.placed(quantity.number_span));
                    found.extend(quantity.unit.as_ref().map(|unit| spot.placed(unit.span)));
                }
                ExpressionKind::Member(owner, member) => {
                    found.extend([spot.placed(owner.span), spot.placed(member.span)]);
                }
                ExpressionKind::Call(function, _) => found.push(spot.placed(function.span)),
                ExpressionKind::Text(_) if innermost.span.end > innermost.span.start + 1 => {
                    found.push(spot.placed(Span::new(innermost.span.start + 1, innermost.span.end - 1)));
                }
                _ => {}
            }
        }
        found.extend(expressions.iter().map(|expression| spot.placed(expression.span)));
        match &line.content {
            Content::Phrase(phrase) => {
                found.push(spot.placed(phrase.word.span));
                for part in &phrase.links {
                    found.push(spot.placed(part.link.span));
                    let last = part.arguments.last().map_or(part.link.span, |last| part.link.span.cover(last.span));
                    found.push(spot.placed(last));
                }
                found.push(spot.placed(phrase.span));
            }
            Content::Definition(definition) => {
                found.push(spot.placed(definition.name.span));
                found.extend(definition.description.as_ref().map(|text| spot.placed(text.span)));
                found.push(spot.placed(definition.span));
            }
            Content::Row(row) => found.push(spot.placed(row.span)),
            Content::Requirement(requirement) => found.push(spot.placed(requirement.span)),
            Content::Blank => {}
        }
        found.extend(line.comment.map(|span| spot.placed(span)));
        found.push(spot.placed(line.span));
    }
    found.push(Span::new(spot.start, spot.start + spot.entry.text.len()));
    found.push(Span::new(0, spot.text.len()));
    found.retain(touches);
    // Each must hold the one before it.
    let mut grown: Vec<Span> = Vec::new();
    found.sort_by_key(|span| span.end - span.start);
    for span in found {
        let holds = grown.last().is_none_or(|last| span.start <= last.start && last.end <= span.end && span != *last);
        if holds {
            grown.push(span);
        }
    }
    grown
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ide::testing::{DECK, at, text};

    #[test]
    fn from_a_number_to_the_file() {
        let (deck, offset) = at("case \"a\"\nboundary b of r\n    held at T + 1$05 K  # warm\n");
        let found: Vec<&str> = ranges(&deck, DECK, offset).into_iter().map(|span| span.of(text(&deck))).collect();
        assert_eq!(
            found,
            [
                "15",
                "15 K",
                "T + 15 K",
                "at T + 15 K",
                "held at T + 15 K",
                "    held at T + 15 K  # warm\n",
                "boundary b of r\n    held at T + 15 K  # warm\n",
                "case \"a\"\nboundary b of r\n    held at T + 15 K  # warm\n",
            ]
        );
    }

    #[test]
    fn always_growing() {
        let deck = crate::workspace::analyse_text("run\n  x (1, [2 m/s .. 3]) \"t\" # é\n| 1 |\nq = \n", "2026-12-01");
        for offset in 0..=text(&deck).len() {
            let found = ranges(&deck, DECK, offset);
            assert!(found.windows(2).all(|pair| pair[1].start <= pair[0].start && pair[0].end <= pair[1].end));
            assert!(found.iter().all(|span| span.touches(offset) || offset > 0));
        }
    }
}
