//! Answers that change the text: code actions and formatting.

use super::handlers::OWN;
use super::places::Places;
use crate::ide;
use crate::ide::actions::{Action, ActionKind};
use tower_lsp::lsp_types::*;

/// What can be done about a range. Of the diagnostics that the client names, each action carries the one it resolves.
pub fn actions(places: &Places<'_>, params: &CodeActionParams) -> Option<CodeActionResponse> {
    let span = places.span_of(OWN, params.range)?;
    let is_wanted = |kind: &CodeActionKind| {
        let prefix = |wanted: &CodeActionKind| {
            kind.as_str().strip_prefix(wanted.as_str()).is_some_and(|rest| rest.is_empty() || rest.starts_with('.'))
        };
        params.context.only.as_ref().is_none_or(|only| only.iter().any(prefix))
    };
    let action = |action: Action| {
        let kind = match action.kind {
            ActionKind::QuickFix => CodeActionKind::QUICKFIX,
            ActionKind::Refactor => CodeActionKind::REFACTOR,
            ActionKind::FixAll => CodeActionKind::SOURCE_FIX_ALL,
        };
        if !is_wanted(&kind) {
            return None;
        }
        let resolved: Vec<Diagnostic> = params
            .context
            .diagnostics
            .iter()
            .filter(|diagnostic| match (&diagnostic.code, action.resolves) {
                (Some(NumberOrString::String(code)), Some(check)) => code == check,
                _ => false,
            })
            .cloned()
            .collect();
        Some(CodeActionOrCommand::CodeAction(CodeAction {
            title: action.title,
            is_preferred: (action.sure && kind == CodeActionKind::QUICKFIX).then_some(true),
            kind: Some(kind),
            diagnostics: (!resolved.is_empty()).then_some(resolved),
            edit: Some(WorkspaceEdit { changes: Some(places.edits(&action.edits)), ..WorkspaceEdit::default() }),
            ..CodeAction::default()
        }))
    };
    Some(ide::actions::actions(places.deck, OWN, span).into_iter().filter_map(action).collect())
}

/// The document laid out.
pub fn document(places: &Places<'_>) -> Option<Vec<TextEdit>> {
    Some(places.edits_of(OWN, &ide::format::document(places.deck, OWN)))
}

/// A range laid out.
pub fn range(places: &Places<'_>, range: Range) -> Option<Vec<TextEdit>> {
    let span = places.span_of(OWN, range)?;
    Some(places.edits_of(OWN, &ide::format::range(places.deck, OWN, span)))
}

/// The line before the cursor laid out, and the indent of the new one, after Enter.
pub fn on_enter(places: &Places<'_>, position: Position) -> Option<Vec<TextEdit>> {
    let offset = places.offset(OWN, position)?;
    Some(places.edits_of(OWN, &ide::format::on_enter(places.deck, OWN, offset)))
}
