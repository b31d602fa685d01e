//! Findings as the protocol's diagnostics.

use super::places::Places;
use super::world::{WorkedOut, World};
use crate::syntax::{FileId, Finding, Level};
use crate::workspace::includes::{include_paths, normalised};
use crate::workspace::practice::PRACTICE_FILE;
use std::hash::{DefaultHasher, Hash, Hasher};
use std::path::Path;
use tower_lsp::lsp_types::{
    Diagnostic, DiagnosticRelatedInformation, DiagnosticSeverity, DiagnosticTag, NumberOrString, Range,
};

/// The name that findings carry as their source.
pub const SOURCE: &str = "deckline";

/// What is shown at a deck: its own findings, and at its includes those of weight in what they take in.
pub fn of(world: &World, worked_out: &WorkedOut) -> Vec<Diagnostic> {
    let deck = match &worked_out.deck {
        Ok(deck) => deck,
        Err(problem) => {
            return vec![Diagnostic {
                severity: Some(DiagnosticSeverity::ERROR),
                source: Some(SOURCE.into()),
                message: format!("This file is not checked: {}.", problem.message),
                ..Diagnostic::default()
            }];
        }
    };
    let places = Places::new(world, deck);
    let shown = |finding: &&Finding| finding.waived.is_none() && finding.level >= world.settings.gate;
    deck.findings
        .iter()
        .filter(shown)
        .filter_map(|finding| {
            if finding.place.file == FileId(0) {
                Some(diagnostic(finding, places.range(finding.place)?, &places))
            } else if finding.level >= Level::Warning {
                at_the_include(finding, &places)
            } else {
                None
            }
        })
        .collect()
}

/// A text that is the same for the same diagnostics.
pub fn result_id(diagnostics: &[Diagnostic]) -> String {
    let mut hasher = DefaultHasher::new();
    serde_json::to_string(diagnostics).unwrap_or_default().hash(&mut hasher);
    format!("{:016x}", hasher.finish())
}

fn diagnostic(finding: &Finding, range: Range, places: &Places<'_>) -> Diagnostic {
    let related: Vec<DiagnosticRelatedInformation> = finding
        .related
        .iter()
        .filter_map(|related| {
            Some(DiagnosticRelatedInformation {
                location: places.location(related.place)?,
                message: related.message.clone(),
            })
        })
        .collect();
    Diagnostic {
        range,
        severity: Some(severity(finding.level)),
        code: Some(NumberOrString::String(finding.check.into())),
        source: Some(SOURCE.into()),
        message: message(finding),
        related_information: (!related.is_empty()).then_some(related),
        tags: finding.unnecessary.then(|| vec![DiagnosticTag::UNNECESSARY]),
        ..Diagnostic::default()
    }
}

/// What a finding says, where it holds in a sweep, and what would put it right.
fn message(finding: &Finding) -> String {
    let mut message = finding.message.clone();
    if let Some(points) = &finding.points {
        message.push_str(&format!("\nAt {} of {} points, first at {}.", points.count, points.total, points.first));
    }
    if !finding.remedy.is_empty() {
        message.push_str(&format!("\nPut right by: {}", finding.remedy.trim_end_matches('.')));
        message.push('.');
    }
    message
}

/// A finding in another file, told at the include that leads there; the file itself shows its own. `None` where it is
/// in the house rules, which are not this deck's business.
fn at_the_include(finding: &Finding, places: &Places<'_>) -> Option<Diagnostic> {
    let (deck, root) = (places.deck, places.deck.files.first()?);
    let file = deck.file(finding.place.file)?;
    if file.path.file_name().is_some_and(|name| name == PRACTICE_FILE) {
        return None;
    }
    let folder = root.path.parent().unwrap_or(Path::new(""));
    let mut includes = include_paths(root);
    let first = includes.next()?;
    let direct = |(_, written): &(_, &str)| normalised(&folder.join(written)) == file.path;
    let (place, _) = if direct(&first) { first } else { includes.find(direct).unwrap_or(first) };
    let location = places.location(finding.place)?;
    let name = file.path.file_name().map_or_else(String::new, |name| name.to_string_lossy().into_owned());
    let line = location.range.start.line + 1;
    let mut told = diagnostic(finding, places.range(place)?, places);
    told.message = format!("In `{name}`, line {line}: {}", told.message);
    told.tags = None;
    let there = DiagnosticRelatedInformation { location, message: "there".into() };
    told.related_information.get_or_insert_default().insert(0, there);
    Some(told)
}

fn severity(level: Level) -> DiagnosticSeverity {
    match level {
        Level::Error => DiagnosticSeverity::ERROR,
        Level::Warning => DiagnosticSeverity::WARNING,
        Level::Information => DiagnosticSeverity::INFORMATION,
        Level::Hint => DiagnosticSeverity::HINT,
    }
}

/// Drops what a client does not understand.
pub fn without_related(diagnostics: &mut [Diagnostic]) {
    for diagnostic in diagnostics {
        diagnostic.related_information = None;
    }
}
