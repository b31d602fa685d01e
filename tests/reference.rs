//! Holds the language reference that a user reads (grammar/README.md) against the language.

#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)]

use deckline::case::sweep::SWEEP_POINTS;
use deckline::quantity::unit_parser::LONGEST_UNIT;
use deckline::syntax::{Level, limits, parse};
use deckline::vocabulary::{ENTRIES, STATEMENTS};
use deckline::workspace::analyse_text;
use deckline::workspace::includes::{INCLUDE_DEPTH, INCLUDE_FILES};

const REFERENCE: &str = include_str!("../grammar/README.md");

/// The blocks of code, each with the word behind its fence.
fn blocks() -> Vec<(&'static str, &'static str)> {
    REFERENCE.split("```").skip(1).step_by(2).filter_map(|block| block.split_once('\n')).collect()
}

#[test]
fn whole_decks_in_it_are_sound() {
    let decks: Vec<&str> = blocks().into_iter().filter(|(word, _)| *word == "buoy").map(|(_, deck)| deck).collect();
    assert!(!decks.is_empty());
    for deck in decks {
        let findings = analyse_text(deck, "2026-01-01").findings;
        assert!(findings.is_empty(), "{deck}\n{findings:#?}");
    }
}

#[test]
fn parts_of_decks_in_it_can_be_read() {
    let examples = ENTRIES.iter().map(|row| row.example.to_string());
    let statements = STATEMENTS.iter().map(|row| format!("{}\n    {}", row.entries[0].word(), row.example));
    let parts = blocks().into_iter().map(|(_, part)| part.to_string());
    for part in examples.chain(statements).chain(parts) {
        for entry in parse(&part).entries {
            for line in &entry.entry.lines {
                assert!(line.problem.is_none(), "{part}\n{:?}", line.problem);
            }
            if entry.entry.head.is_some() {
                assert!(entry.entry.head_phrase().is_some(), "{part}");
            }
        }
    }
    // A substance stands for itself.
    let substance = blocks().into_iter().find(|(_, part)| part.contains("substance test_oil")).unwrap().1;
    let findings = analyse_text(substance, "2026-01-01").findings;
    let serious: Vec<_> = findings.into_iter().filter(|one| one.level >= Level::Warning).collect();
    assert!(serious.is_empty(), "{serious:#?}");
}

#[test]
fn its_limits_are_those_of_the_code() {
    let mebibytes = format!("{} MiB", limits::FILE_BYTES / 1024 / 1024);
    let kibibytes = format!("{} KiB", limits::LINE_BYTES / 1024);
    for (what, limit) in [
        ("a file", mebibytes),
        ("a line", kibibytes),
        ("brackets inside brackets", limits::NESTING.to_string()),
        ("operators in one expression", limits::OPERATORS.to_string()),
        ("a unit", format!("{LONGEST_UNIT} bytes")),
        ("includes inside includes", INCLUDE_DEPTH.to_string()),
        ("files of one deck", INCLUDE_FILES.to_string()),
        ("points of a sweep", SWEEP_POINTS.to_string()),
    ] {
        let row = format!("| {what} | {limit} |");
        assert!(REFERENCE.contains(&row), "{row}");
    }
}
