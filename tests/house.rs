//! Holds the rules of the house that can be held: which folder may import which, who may do input and output, and
//! that knowledge stands once.

#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)] // a test fails loudly

use std::collections::BTreeMap;
use std::fs;
use std::path::{Path, PathBuf};

/// The rooms from top to bottom. A room imports from rooms below it only.
const ROOMS: [&str; 12] = [
    "command",
    "server",
    "ide",
    "report",
    "workspace",
    "checks",
    "physics",
    "substances",
    "case",
    "vocabulary",
    "syntax",
    "quantity",
];

fn source() -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join("src")
}

fn rust_files(folder: &Path, into: &mut Vec<PathBuf>) {
    let mut entries: Vec<PathBuf> =
        fs::read_dir(folder).expect("a folder").map(|entry| entry.expect("an entry").path()).collect();
    entries.sort();
    for path in entries {
        if path.is_dir() {
            rust_files(&path, into);
        } else if path.extension().is_some_and(|extension| extension == "rs") {
            into.push(path);
        }
    }
}

/// A file's text without its tests, which may call the whole pipeline, and without comments.
fn code(path: &Path) -> String {
    let text = fs::read_to_string(path).expect("a source file");
    let text = text.split("#[cfg(test)]\nmod ").next().unwrap_or_default().to_string();
    let lines = text.lines().filter(|line| !line.trim_start().starts_with("//"));
    lines.collect::<Vec<_>>().join("\n")
}

fn files_by_room() -> BTreeMap<&'static str, Vec<(PathBuf, String)>> {
    let mut rooms = BTreeMap::new();
    for room in ROOMS {
        let folder = source().join(room);
        let mut files = Vec::new();
        if folder.is_dir() {
            rust_files(&folder, &mut files);
        }
        rooms.insert(room, files.into_iter().map(|path| (path.clone(), code(&path))).collect());
    }
    rooms
}

#[test]
fn arrows_run_down_the_list() {
    let mut wrong = Vec::new();
    for (room, files) in files_by_room() {
        let floor = ROOMS.iter().position(|other| *other == room).expect("a room");
        for (path, text) in files {
            for above in &ROOMS[..floor] {
                if text.contains(&format!("crate::{above}")) || text.contains(&format!("super::super::{above}")) {
                    wrong.push(format!("{} ({room}) imports from {above}", path.display()));
                }
            }
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
}

#[test]
fn every_folder_is_a_room() {
    let folders = fs::read_dir(source()).expect("src").filter_map(|entry| {
        let path = entry.expect("an entry").path();
        path.is_dir().then(|| path.file_name().expect("a name").to_string_lossy().into_owned())
    });
    for folder in folders {
        assert!(ROOMS.contains(&folder.as_str()), "src/{folder} is not in the list of rooms");
    }
}

#[test]
fn only_the_upper_rooms_do_input_and_output() {
    let mut wrong = Vec::new();
    for room in ["checks", "physics", "substances", "case", "vocabulary", "syntax", "quantity", "ide"] {
        for (path, text) in &files_by_room()[room] {
            for forbidden in
                ["std::fs", "std::net", "std::process", "std::env::", "println!", "eprintln!", "SystemTime"]
            {
                if text.contains(forbidden) {
                    wrong.push(format!("{} uses {forbidden}", path.display()));
                }
            }
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
}

#[test]
fn only_the_server_knows_the_protocol() {
    for (room, files) in files_by_room() {
        if room == "server" {
            continue;
        }
        for (path, text) in files {
            assert!(!text.contains("lsp_types") && !text.contains("tower_lsp"), "{} knows LSP types", path.display());
        }
    }
}

#[test]
fn every_check_that_is_named_is_in_the_list() {
    let listed: Vec<&str> = deckline::checks::CHECKS.iter().map(|check| check.name).collect();
    let mut files = Vec::new();
    rust_files(&source(), &mut files);
    for path in files {
        let text = code(&path);
        for (at, _) in text.match_indices("Finding::new(") {
            let rest = text[at + "Finding::new(".len()..].trim_start();
            if let Some(name) = rest.strip_prefix('"').and_then(|rest| rest.split('"').next()) {
                assert!(listed.contains(&name), "{} makes a finding of `{name}`, which is no check", path.display());
            }
        }
    }
}

#[test]
fn names_of_checks_are_unique_words_with_a_basis() {
    let mut names: Vec<&str> = deckline::checks::CHECKS.iter().map(|check| check.name).collect();
    for check in deckline::checks::CHECKS {
        assert!(check.name.chars().all(|letter| letter.is_ascii_lowercase() || letter == '-'), "{}", check.name);
        let basis = &check.basis;
        for (what, text) in [("compares", basis.compares), ("source", basis.source), ("remedy", basis.remedy)] {
            assert!(!text.trim().is_empty(), "{} has no {what}", check.name);
        }
    }
    let count = names.len();
    names.sort_unstable();
    names.dedup();
    assert_eq!(names.len(), count);
}

#[test]
fn limits_rise_with_their_levels() {
    for check in deckline::checks::CHECKS {
        assert!(
            check.limits.windows(2).all(|pair| pair[0].0 < pair[1].0 && pair[0].1 < pair[1].1),
            "{}: {:?}",
            check.name,
            check.limits
        );
    }
}

#[test]
fn the_vocabulary_is_coherent() {
    use deckline::vocabulary::{ENTRIES, STATEMENTS};
    for row in STATEMENTS {
        assert!(!row.description.is_empty() && !row.example.is_empty() && !row.entries.is_empty(), "{}", row.word);
        assert!(row.example.starts_with(row.word), "the example of `{}` is of another word", row.word);
        for kind in row.entries {
            let same = STATEMENTS.iter().filter(|other| other.word == row.word && other.entries.contains(kind)).count();
            assert_eq!(same, 1, "`{}` stands {same} times in {}", row.word, kind.word());
        }
    }
    for row in ENTRIES {
        assert!(row.example.starts_with(row.word), "the example of `{}` is of another word", row.word);
    }
}
