//! Runs every deck of `tests/decks` and holds what is found against the marks in it.
//!
//! A mark is a comment at the end of a line, `#! check-name "part of the message"`. Every finding of level information
//! or above must be marked on its line, and every mark must be met.

use deckline::testing::{TODAY, differences, marks};
use deckline::workspace::{Disk, Options, analyse, walk};
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
            Ok(deck) => wrong.extend(differences(&deck).into_iter().map(|line| format!("{}: {line}", path.display()))),
            Err(problem) => wrong.push(problem.to_string()),
        }
    }
    assert!(wrong.is_empty(), "\n{}\n", wrong.join("\n"));
    decks.len()
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
