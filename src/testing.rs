//! Helps tests: decks with marks of what must be found in them.
//!
//! A mark is a comment at the end of a line: `#! check-name`, several with commas, each with a part of the message in
//! quotes where it matters: `#! density-span "0.148", no-initial`.

use crate::syntax::{Finding, Level, parse};
use crate::workspace::analyse::{analyse_text, resolved_text};
use crate::workspace::includes::{load, normalised};
use crate::workspace::{Deck, Problem, Read, SourceFile};
use std::collections::BTreeMap;
use std::path::{Path, PathBuf};
use std::sync::Arc;

/// The day that tests count from.
pub const TODAY: &str = "2026-12-01";

/// What is found in a text.
pub fn findings(text: &str) -> Vec<Finding> {
    analyse_text(text, TODAY).findings
}

/// The physics of the regions of a text, in their order.
pub fn physics(text: &str) -> Vec<crate::physics::model::RegionPhysics> {
    analyse_text(text, TODAY).physics.regions
}

/// A mark: the line (from 1), the check, and a part of the message.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Mark {
    /// Line, from 1.
    pub line: usize,
    /// Check.
    pub check: String,
    /// Part of the message; empty for any.
    pub part: String,
}

/// The marks in a text.
pub fn marks(text: &str) -> Vec<Mark> {
    let mut marks = Vec::new();
    for (index, line) in text.lines().enumerate() {
        let Some((_, behind)) = line.split_once("#! ") else { continue };
        let mut rest = behind.trim();
        while !rest.is_empty() {
            let end = rest.find([' ', ',']).unwrap_or(rest.len());
            let (check, after) = rest.split_at(end);
            let mut part = "";
            rest = after.trim_start();
            if let Some(quoted) = rest.strip_prefix('"')
                && let Some((inside, after)) = quoted.split_once('"')
            {
                part = inside;
                rest = after.trim_start();
            }
            rest = rest.trim_start_matches(',').trim_start();
            marks.push(Mark { line: index + 1, check: check.to_string(), part: part.to_string() });
        }
    }
    marks
}

/// What differs between a deck's findings (of level information and above, waived ones left out) and its marks, as lines;
/// empty where they agree.
pub fn differences(deck: &Deck) -> Vec<String> {
    let Some(file) = deck.files.first() else { return vec!["no file".into()] };
    let text = &file.text;
    let line_of = |offset: usize| text.get(..offset).map_or(0, |before| before.matches('\n').count() + 1);
    let mut wanted = marks(text);
    let mut wrong = Vec::new();
    for finding in &deck.findings {
        if finding.place.file.0 != 0 || finding.waived.is_some() {
            continue;
        }
        let line = line_of(finding.place.span.start);
        let is_met =
            |mark: &Mark| mark.line == line && mark.check == finding.check && finding.message.contains(&mark.part);
        match wanted.iter().position(is_met) {
            Some(index) => {
                wanted.remove(index);
            }
            None if finding.level >= Level::Information => {
                wrong.push(format!(
                    "not marked: line {line}: {} ({}): {}",
                    finding.check,
                    finding.level.word(),
                    finding.message
                ));
            }
            None => {}
        }
    }
    wrong.extend(wanted.iter().map(|mark| format!("not found: line {}: {} \"{}\"", mark.line, mark.check, mark.part)));
    wrong
}

/// Files in memory.
#[derive(Debug, Default)]
pub struct MemoryFiles {
    /// Text by path.
    pub files: BTreeMap<PathBuf, String>,
}

impl Read for MemoryFiles {
    fn read(&self, path: &Path) -> Result<Arc<SourceFile>, Problem> {
        match self.files.get(path) {
            Some(text) => Ok(Arc::new(SourceFile { path: path.into(), tree: parse(text), text: text.as_str().into() })),
            None => Err(Problem { path: path.into(), message: "no such file".into() }),
        }
    }

    fn exists(&self, path: &Path) -> bool {
        self.files.contains_key(path)
    }

    fn real_path(&self, path: &Path) -> Option<PathBuf> {
        Some(normalised(path))
    }
}

/// Fails where what loading the first of these files finds differs from the marks in all of them. The project folder is
/// `/project`.
#[track_caller]
pub fn expect_files(files: &[(&str, &str)]) {
    let memory =
        MemoryFiles { files: files.iter().map(|(path, text)| (PathBuf::from(path), (*text).to_string())).collect() };
    let Some(Ok(deck)) = files.first().map(|(path, _)| memory.read(Path::new(path))) else { return };
    let loaded = load(&memory, deck, Path::new("/project"));
    let mut found: Vec<(String, usize, &str)> = loaded
        .findings
        .iter()
        .filter_map(|finding| {
            let file = loaded.files.get(finding.place.file.0 as usize)?;
            let line = file.text.get(..finding.place.span.start)?.matches('\n').count() + 1;
            Some((file.path.display().to_string(), line, finding.check))
        })
        .collect();
    let marked: Vec<(String, Mark)> =
        files.iter().flat_map(|(path, text)| marks(text).into_iter().map(|mark| ((*path).to_string(), mark))).collect();
    let mut wanted: Vec<(String, usize, &str)> =
        marked.iter().map(|(path, mark)| (path.clone(), mark.line, mark.check.as_str())).collect();
    found.sort();
    wanted.sort();
    assert_eq!(found, wanted);
    for (_, mark) in &marked {
        assert!(
            loaded.findings.iter().any(|finding| finding.check == mark.check && finding.message.contains(&mark.part))
        );
    }
}

/// Fails where what reading and resolving a text finds differs from its marks; no check of the physics runs.
#[track_caller]
pub fn expect_reading(text: &str) {
    let wrong = differences(&resolved_text(text));
    assert!(wrong.is_empty(), "\n{}\n", wrong.join("\n"));
}

/// Fails where a text's findings and marks differ.
#[track_caller]
pub fn expect(text: &str) {
    let wrong = differences(&analyse_text(text, TODAY));
    assert!(wrong.is_empty(), "\n{}\n", wrong.join("\n"));
}

/// Fails where a text's findings of one check differ from its marks.
#[track_caller]
pub fn expect_of(check: &str, text: &str) {
    let mut deck = analyse_text(text, TODAY);
    deck.findings.retain(|finding| finding.check == check);
    let wrong = differences(&deck);
    assert!(wrong.is_empty(), "\n{}\n", wrong.join("\n"));
}

/// The text after the first fix of the first finding of a check; the text itself where there is none.
pub fn after_fix(check: &str, text: &str) -> String {
    let mut mended = text.to_string();
    let found = findings(text);
    let fix = found.iter().filter(|finding| finding.check == check).find_map(|finding| finding.fixes.first());
    let mut edits = fix.map(|fix| fix.edits.clone()).unwrap_or_default();
    edits.sort_by_key(|edit| std::cmp::Reverse(edit.span.start));
    for edit in edits {
        mended.replace_range(edit.span.start..edit.span.end, &edit.text);
    }
    mended
}
