//! Runs every deck of `tests/decks` and holds what is found against the marks in it.
//!
//! A mark is a comment at the end of a line, `#! check-name "part of the message"`. Every finding of level information
//! or above must be marked on its line, and every mark must be met. `UPDATE=1 cargo test --test decks` writes the marks
//! anew; read the difference before it is committed.

#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)] // a test fails loudly

use deckline::syntax::Level;
use deckline::testing::{TODAY, differences, marks};
use deckline::workspace::{Deck, Disk, Options, analyse, walk};
use std::path::{Path, PathBuf};

fn folder(name: &str) -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join("tests").join(name)
}

fn check_all(name: &str) -> usize {
    let (decks, problems) = walk::decks(&[folder(name)]);
    assert!(problems.is_empty(), "{problems:?}");
    let mut wrong = Vec::new();
    for path in &decks {
        let options = Options { today: TODAY.to_string(), folder: Some(folder(name)), ..Options::default() };
        match analyse(&Disk, path, &options) {
            Ok(deck) if std::env::var_os("UPDATE").is_some() => write_marks(path, &deck),
            Ok(deck) => wrong.extend(differences(&deck).into_iter().map(|line| format!("{}: {line}", path.display()))),
            Err(problem) => wrong.push(problem.to_string()),
        }
    }
    assert!(wrong.is_empty(), "\n{}\n", wrong.join("\n"));
    decks.len()
}

/// Writes a deck with its findings as marks in place of those that stand in it. A mark that is met keeps its part of the
/// message.
fn write_marks(path: &Path, deck: &Deck) {
    if differences(deck).is_empty() {
        return;
    }
    let text = &deck.files[0].text;
    let old = marks(text);
    let mut found: Vec<(usize, &str, &str)> = deck
        .findings
        .iter()
        .filter(|finding| finding.place.file.0 == 0 && finding.waived.is_none())
        .filter(|finding| finding.level >= Level::Information || old.iter().any(|mark| mark.check == finding.check))
        .map(|finding| {
            (text[..finding.place.span.start].matches('\n').count() + 1, finding.check, finding.message.as_str())
        })
        .collect();
    found.sort_unstable();
    let mut lines = Vec::new();
    for (index, line) in text.lines().enumerate() {
        let bare = line.split("#! ").next().unwrap_or(line).trim_end();
        let here: Vec<String> = found
            .iter()
            .filter(|(number, ..)| *number == index + 1)
            .map(|(number, check, message)| {
                let kept = old
                    .iter()
                    .find(|mark| mark.line == *number && mark.check == *check && message.contains(&mark.part));
                match kept {
                    Some(mark) if !mark.part.is_empty() => format!("{check} \"{}\"", mark.part),
                    _ => (*check).to_string(),
                }
            })
            .collect();
        lines.push(if here.is_empty() { bare.to_string() } else { format!("{bare}  #! {}", here.join(", ")) });
    }
    std::fs::write(path, lines.join("\n") + "\n").expect("a deck that can be written");
}

#[test]
fn every_deck_draws_what_it_is_marked_with() {
    assert!(check_all("decks") > 0);
}

#[test]
fn published_cases_draw_no_false_alarm() {
    assert!(check_all("published") >= 25);
}

/// At least three decks a check: two that draw it, each in its way, and one that must not.
#[test]
fn every_check_has_its_decks() {
    for check in deckline::checks::CHECKS.iter().filter(|check| check.run.is_some()) {
        let (decks, _) = walk::decks(&[folder("decks/checks").join(check.name)]);
        let draws = |path: &PathBuf| {
            let text = std::fs::read_to_string(path).expect("a deck");
            marks(&text).iter().any(|mark| mark.check == check.name)
        };
        let (drawing, sound): (Vec<&PathBuf>, Vec<&PathBuf>) = decks.iter().partition(|path| draws(path));
        assert!(
            drawing.len() >= 2 && !sound.is_empty(),
            "{}: {} decks draw it, {} do not",
            check.name,
            drawing.len(),
            sound.len()
        );
    }
}
