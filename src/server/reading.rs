//! Answers that only tell: hover, signature help, inlay hints, links, folds, selections, highlights.

use super::handlers::OWN;
use super::places::Places;
use crate::ide;
use crate::syntax::Span;
use tower_lsp::lsp_types::*;

/// Text as Markdown; `None` for none.
pub fn markdown(value: String) -> Option<MarkupContent> {
    (!value.is_empty()).then_some(MarkupContent { kind: MarkupKind::Markdown, value })
}

/// What stands under the cursor.
pub fn hover(places: &Places<'_>, position: Position) -> Option<Hover> {
    let hover = ide::hover::hover(places.deck, OWN, places.offset(OWN, position)?)?;
    Some(Hover { contents: HoverContents::Markup(markdown(hover.markdown)?), range: places.span(OWN, hover.span) })
}

/// What the statement under the cursor takes.
pub fn signature(places: &Places<'_>, position: Position) -> Option<SignatureHelp> {
    let signature = ide::signature::signature(places.deck, OWN, places.offset(OWN, position)?)?;
    let units = |offset: usize| {
        let before = signature.label.get(..offset).unwrap_or(&signature.label);
        u32::try_from(before.encode_utf16().count()).unwrap_or(u32::MAX)
    };
    let parameters = signature
        .parameters
        .iter()
        .map(|(range, documentation)| ParameterInformation {
            // Always in units of UTF-16, whatever was agreed for positions.
            label: ParameterLabel::LabelOffsets([units(range.start), units(range.end)]),
            documentation: markdown(documentation.clone()).map(Documentation::MarkupContent),
        })
        .collect();
    let active = u32::try_from(signature.active).ok();
    Some(SignatureHelp {
        signatures: vec![SignatureInformation {
            label: signature.label.clone(),
            documentation: markdown(signature.documentation).map(Documentation::MarkupContent),
            parameters: Some(parameters),
            active_parameter: active,
        }],
        active_signature: Some(0),
        active_parameter: active,
    })
}

/// Values beside the words of a range.
pub fn hints(places: &Places<'_>, range: Range) -> Option<Vec<InlayHint>> {
    let hints = ide::inlay::hints(places.deck, OWN, places.span_of(OWN, range)?);
    let hint = |hint: ide::inlay::Hint| {
        Some(InlayHint {
            position: places.position(OWN, hint.offset)?,
            label: InlayHintLabel::String(hint.label),
            kind: None,
            text_edits: None,
            tooltip: markdown(hint.tooltip).map(InlayHintTooltip::MarkupContent),
            padding_left: Some(true),
            padding_right: None,
            data: None,
        })
    };
    Some(hints.into_iter().filter_map(hint).collect())
}

/// The files that includes name.
pub fn links(places: &Places<'_>) -> Option<Vec<DocumentLink>> {
    let links = ide::links::links(places.deck, OWN);
    let link = |(span, path): (Span, std::path::PathBuf)| {
        Some(DocumentLink {
            range: places.span(OWN, span)?,
            target: places.world.uri(&path),
            tooltip: None,
            data: None,
        })
    };
    Some(links.into_iter().filter_map(link).collect())
}

/// What can be folded.
pub fn folds(places: &Places<'_>) -> Option<Vec<FoldingRange>> {
    let folds = ide::folding::folds(places.deck, OWN);
    let fold = |fold: ide::folding::Fold| {
        let range = places.span(OWN, fold.span)?;
        Some(FoldingRange {
            start_line: range.start.line,
            end_line: range.end.line,
            kind: Some(if fold.is_comment { FoldingRangeKind::Comment } else { FoldingRangeKind::Region }),
            ..FoldingRange::default()
        })
    };
    Some(folds.into_iter().filter_map(fold).collect())
}

/// For each cursor, the ever wider pieces of text around it.
pub fn selections(places: &Places<'_>, positions: &[Position]) -> Option<Vec<SelectionRange>> {
    positions
        .iter()
        .map(|position| {
            let offset = places.offset(OWN, *position)?;
            let mut spans = ide::selection::ranges(places.deck, OWN, offset);
            spans.sort_by_key(|span| std::cmp::Reverse(span.end - span.start));
            let around = spans.into_iter().filter_map(|span| places.span(OWN, span));
            let nested = around.fold(None, |parent: Option<SelectionRange>, range| {
                Some(SelectionRange { range, parent: parent.map(Box::new) })
            });
            // The protocol wants one for each cursor.
            let here = places.span(OWN, Span::new(offset, offset))?;
            Some(nested.unwrap_or(SelectionRange { range: here, parent: None }))
        })
        .collect()
}

/// All uses of what stands under the cursor, in its file.
pub fn highlights(places: &Places<'_>, position: Position) -> Option<Vec<DocumentHighlight>> {
    let found = ide::navigate::highlights(places.deck, OWN, places.offset(OWN, position)?);
    let highlight = |place: crate::syntax::Place| {
        Some(DocumentHighlight { range: places.range(place)?, kind: Some(DocumentHighlightKind::TEXT) })
    };
    Some(found.into_iter().filter(|place| place.file == OWN).filter_map(highlight).collect())
}
