//! Every remedy that a finding offers as a change of text: carried out, the finding is gone and, in a whole deck, no other
//! has come. Over all decks of the tests, and over the texts in the tests of the checks themselves.

#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)]

use deckline::ide::actions::fix_all;
use deckline::syntax::change::apply;
use deckline::syntax::{Edit, FileId, parse};
use deckline::testing::TODAY;
use deckline::workspace::{Deck, Disk, Options, Problem, Read, SourceFile, analyse, walk};
use std::collections::BTreeMap;
use std::path::{Path, PathBuf};
use std::sync::Arc;

/// Remedies after which the deck has one more thing to say, and why that is right: the start of the title, the check that
/// speaks then, and the reason.
const EXCEPTIONS: &[(&str, &str, &str)] = &[
    (
        "Use density-law ideal-gas",
        "no-pressure-level",
        "density follows the pressure under the new law, and the deck states none",
    ),
    ("Use density-law", "waiver-idle", "the waiver of a finding that the other law clears has nothing left to waive"),
    (
        "Use density-law variable",
        "law-heavier-than-needed",
        "the deck's trouble is its reference; moved to mid-span, which is the other remedy, the lighter law would hold",
    ),
    (
        "Write `flow turbulent",
        "wall-distance",
        "the mesh was made for a laminar flow, and the model that is chosen asks for another",
    ),
    ("Write `0.3 m`", "likely-unit-slip", "a bare number has no sure unit: several are offered, of which one is meant"),
    (
        "Move the reference",
        "unused-name",
        "the reference was a name that nothing else uses; whether to keep it is the writer's to say",
    ),
];

/// The disk with one file that reads otherwise.
struct Overlay<'t> {
    path: &'t Path,
    text: &'t str,
}

impl Read for Overlay<'_> {
    fn read(&self, path: &Path) -> Result<Arc<SourceFile>, Problem> {
        if path == self.path {
            return Ok(Arc::new(SourceFile { path: path.into(), tree: parse(self.text), text: self.text.into() }));
        }
        Disk.read(path)
    }

    fn exists(&self, path: &Path) -> bool {
        path == self.path || Disk.exists(path)
    }

    fn real_path(&self, path: &Path) -> Option<PathBuf> {
        if path == self.path { Some(path.to_path_buf()) } else { Disk.real_path(path) }
    }
}

fn deck(path: &Path, text: &str) -> Deck {
    let options =
        Options { today: TODAY.to_string(), folder: path.parent().map(Path::to_path_buf), ..Options::default() };
    analyse(&Overlay { path, text }, path, &options).expect("a deck in memory")
}

/// How many findings each check has.
fn counts(deck: &Deck) -> BTreeMap<&'static str, usize> {
    let mut counts = BTreeMap::new();
    for finding in deck.findings.iter().filter(|finding| finding.waived.is_none()) {
        *counts.entry(finding.check).or_insert(0) += 1;
    }
    counts
}

fn changed(text: &str, edits: &[Edit]) -> String {
    apply(text, edits.iter().filter(|edit| edit.file == FileId(0)).map(|edit| (edit.span, edit.text.as_str())))
}

/// Every deck of the tests, and every text in the tests of the checks, with whether it is a whole deck. The small texts
/// leave out all that their check does not look at, so that a remedy there may well bring out what else is missing.
fn texts() -> Vec<(PathBuf, String, bool)> {
    let root = Path::new(env!("CARGO_MANIFEST_DIR"));
    let (decks, _) = walk::decks(&[root.join("tests/decks"), root.join("tests/published")]);
    let mut texts: Vec<(PathBuf, String, bool)> = decks
        .into_iter()
        .map(|path| {
            let text = std::fs::read_to_string(&path).expect("a deck");
            (path, text, true)
        })
        .collect();
    let mut folders = vec![root.join("src/checks")];
    while let Some(folder) = folders.pop() {
        for entry in std::fs::read_dir(folder).expect("a folder") {
            let path = entry.expect("an entry").path();
            if path.is_dir() {
                folders.push(path);
            } else {
                let source = std::fs::read_to_string(&path).expect("a source file");
                for (index, piece) in source.split("r##\"").skip(1).enumerate() {
                    let text = piece.split("\"##").next().unwrap_or_default().trim_start_matches('\n');
                    // Several files in one test are no deck by themselves.
                    if !text.contains("include ") {
                        texts.push((path.with_extension(format!("{index}.buoy")), text.to_string(), false));
                    }
                }
            }
        }
    }
    texts.sort();
    texts
}

#[test]
fn after_a_remedy_its_finding_is_gone_and_no_other_has_come() {
    let mut tried: BTreeMap<&str, usize> = BTreeMap::new();
    let mut wrong = Vec::new();
    let texts = texts();
    assert!(texts.len() > 100);
    for (path, text, is_whole) in &texts {
        let before = deck(path, text);
        let counts_before = counts(&before);
        for finding in before.findings.iter().filter(|finding| finding.waived.is_none()) {
            for fix in &finding.fixes {
                *tried.entry(finding.check).or_insert(0) += 1;
                let after_text = changed(text, &fix.edits);
                let counts_after = counts(&deck(path, &after_text));
                let is_excepted = |check: &str| {
                    EXCEPTIONS.iter().any(|(title, brought, _)| fix.title.starts_with(title) && *brought == check)
                };
                let at = |counts: &BTreeMap<&str, usize>, check: &str| counts.get(check).copied().unwrap_or(0);
                let is_there = at(&counts_after, finding.check) >= at(&counts_before, finding.check);
                let come = counts_after
                    .iter()
                    .filter(|(check, count)| **check != finding.check && **count > at(&counts_before, check))
                    .map(|(check, _)| *check)
                    .filter(|check| *is_whole && !is_excepted(check));
                let come: Vec<&str> = come.collect();
                if is_there || !come.is_empty() {
                    let place = finding.place.span.of(text);
                    wrong.push(format!(
                        "{}: {} at `{place}`: {}: {}{come:?}",
                        path.display(),
                        finding.check,
                        fix.title,
                        if is_there { "still there " } else { "" }
                    ));
                }
            }
        }
    }
    println!("{tried:#?}");
    assert!(wrong.is_empty(), "\n{}\n", wrong.join("\n"));
}

#[test]
fn all_sure_remedies_at_once_leave_none_that_is_sure() {
    let mut carried_out = 0;
    for (path, text, _) in texts() {
        let mut text = text;
        // A remedy may uncover another, so a few rounds are right; without end they are not.
        for round in 0..6 {
            let Some(action) = fix_all(&deck(&path, &text), FileId(0)) else { break };
            assert!(round < 5, "{}: {action:?}", path.display());
            let after = changed(&text, &action.edits);
            assert_ne!(after, text, "{}: {action:?}", path.display());
            text = after;
            carried_out += 1;
        }
    }
    assert!(carried_out > 5, "{carried_out}");
}

#[test]
fn every_exception_names_a_check_and_a_reason() {
    for (title, brought, why) in EXCEPTIONS {
        assert!(deckline::checks::find(brought).is_some(), "{brought}");
        assert!(!title.is_empty() && why.len() > 20);
    }
}
