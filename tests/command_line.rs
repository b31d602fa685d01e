//! The program as it is called: exit status, what goes to which stream, and what becomes of bad input.

#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)]

use std::fs;
use std::io::Write;
use std::path::Path;
use std::process::{Command, Output, Stdio};
use std::time::{Duration, Instant};

/// A folder with a sound deck, one with an error, and one with an unused name (information).
fn folder() -> tempfile::TempDir {
    let folder = tempfile::tempdir().unwrap();
    let begin = deckline(folder.path(), &["begin", "."]);
    assert_eq!(begin.status.code(), Some(0), "{}", text(&begin.stderr));
    folder
}

fn sound(folder: &Path) -> String {
    fs::read_to_string(folder.join("cell.buoy")).unwrap()
}

/// Writes a deck with an unknown unit: an error, whatever else is checked.
fn write_faulty(folder: &Path, name: &str) {
    let deck = sound(folder).replace("40 mm ", "40 xyz");
    assert!(deck.contains("40 xyz"));
    fs::write(folder.join(name), deck).unwrap();
}

/// Writes a deck in which nothing but an unused name is to be found.
fn write_with_unused_name(folder: &Path, name: &str) {
    fs::write(folder.join(name), sound(folder).replace("given\n", "given\n    spare     = 3 mm\n")).unwrap();
}

fn command(folder: &Path, arguments: &[&str]) -> Command {
    let mut command = Command::new(env!("CARGO_BIN_EXE_deckline"));
    command.args(arguments).current_dir(folder).env_remove("NO_COLOR").env_remove("CLICOLOR_FORCE");
    command
}

fn deckline(folder: &Path, arguments: &[&str]) -> Output {
    command(folder, arguments).output().unwrap()
}

fn text(bytes: &[u8]) -> String {
    String::from_utf8(bytes.to_vec()).unwrap()
}

fn status(folder: &Path, arguments: &[&str]) -> i32 {
    deckline(folder, arguments).status.code().unwrap()
}

#[test]
fn a_sound_deck_gives_0_and_says_nothing() {
    let folder = folder();
    let out = deckline(folder.path(), &["assess", "cell.buoy"]);
    assert_eq!((out.status.code(), text(&out.stdout), text(&out.stderr)), (Some(0), String::new(), String::new()));
    let cards = deckline(folder.path(), &["assess", "--as", "cards"]);
    assert_eq!(text(&cards.stdout), "1 deck checked: nothing to report.\n");
}

#[test]
fn what_begin_writes_is_sound_and_is_never_written_over() {
    let folder = folder();
    let json = deckline(folder.path(), &["assess", "--as", "json"]);
    let report: serde_json::Value = serde_json::from_slice(&json.stdout).unwrap();
    assert_eq!(report["findings"], serde_json::json!([]), "not even a hint");
    fs::write(folder.path().join("cell.buoy"), "mine").unwrap();
    let again = deckline(folder.path(), &["begin", "."]);
    assert_eq!(again.status.code(), Some(2));
    assert!(text(&again.stderr).contains("cell.buoy and practice.buoy already"), "{}", text(&again.stderr));
    assert_eq!(sound(folder.path()), "mine");
    let other = tempfile::tempdir().unwrap();
    fs::write(other.path().join("practice.buoy"), "mine").unwrap();
    assert_eq!(status(other.path(), &["begin", "."]), 2);
    assert!(!other.path().join("cell.buoy").exists(), "all or nothing");
}

#[test]
fn the_gate_decides_between_0_and_1() {
    let folder = folder();
    write_faulty(folder.path(), "faulty.buoy");
    write_with_unused_name(folder.path(), "unused.buoy");
    let (faulty, unused) = ("faulty.buoy", "unused.buoy");
    assert_eq!(status(folder.path(), &["assess", faulty]), 1);
    assert_eq!(status(folder.path(), &["assess", "--gate", "error", faulty]), 1);
    assert_eq!(status(folder.path(), &["assess", unused]), 0);
    assert_eq!(status(folder.path(), &["assess", "--gate", "information", unused]), 1);
    assert_eq!(status(folder.path(), &["assess"]), 1, "the folder, where no path is given");
    // A practice's gate holds where the option does not say otherwise.
    fs::write(folder.path().join("practice.buoy"), "practice\n    gate information\n").unwrap();
    assert_eq!(status(folder.path(), &["assess", unused]), 1);
    assert_eq!(status(folder.path(), &["assess", "--gate", "error", unused]), 0);
    fs::write(folder.path().join("house.buoy.txt"), "practice\n    gate error\n").unwrap();
    assert_eq!(status(folder.path(), &["assess", "--practice", "house.buoy.txt", unused]), 0);
}

#[test]
fn one_file_that_cannot_be_read_does_not_hide_the_others() {
    let folder = folder();
    write_faulty(folder.path(), "faulty.buoy");
    fs::write(folder.path().join("latin.buoy"), b"case \"caf\xe9\"\n").unwrap();
    fs::create_dir(folder.path().join("empty")).unwrap();
    let out = deckline(folder.path(), &["assess", "latin.buoy", "gone.buoy", "faulty.buoy", "cell.buoy"]);
    assert_eq!(out.status.code(), Some(2));
    let (results, said) = (text(&out.stdout), text(&out.stderr));
    assert!(
        results.lines().any(|line| line.starts_with("faulty.buoy:9:") && line.ends_with("[unknown-unit]")),
        "{results}"
    );
    assert!(results.lines().all(|line| line.starts_with("faulty.buoy:")), "{results}");
    assert_eq!(said, "deckline: gone.buoy: no such file\ndeckline: latin.buoy: not UTF-8 text (line 1)\n");
    // In the machine forms as well.
    let out = deckline(folder.path(), &["assess", "--as", "json", "latin.buoy", "faulty.buoy"]);
    let report: serde_json::Value = serde_json::from_slice(&out.stdout).unwrap();
    assert_eq!(report["unreadable"][0]["path"], "latin.buoy");
    assert_eq!((out.status.code(), &report["decks"][0]["path"]), (Some(2), &"faulty.buoy".into()));
    assert_eq!(status(folder.path(), &["assess", "--practice", "gone.buoy", "cell.buoy"]), 2);
    assert_eq!(status(folder.path(), &["assess", "empty"]), 0);
}

#[test]
fn bad_options_give_2_and_a_message_on_standard_error() {
    let folder = folder();
    for arguments in [
        vec![],
        vec!["mend"],
        vec!["assess", "--gate", "fatal"],
        vec!["assess", "--as", "poem"],
        vec!["assess", "--jobs", "0"],
        vec!["assess", "--on", "yesterday"],
        vec!["assess", "--from-list", "gone"],
        vec!["assess", "--nothing"],
        vec!["assess", "--watch", "--from-list", "-"],
        vec!["basis", "no-such-check"],
        vec!["substances", "wather"],
        vec!["substances", "water", "--at", "40"],
        vec!["substances", "water", "--at", "40", "bar"],
        vec!["substances", "water", "--at", "4000", "degC"],
        vec!["substances", "water", "--at", "-300", "degC"],
        vec!["substances", "water", "--fraction", "3", "%"],
        vec!["vocabulary", "regin"],
        vec!["numbers"],
        vec!["numbers", "gone.buoy"],
        vec!["completions", "abacus"],
        vec!["begin"],
    ] {
        let out = deckline(folder.path(), &arguments);
        assert_eq!(out.status.code(), Some(2), "{arguments:?}");
        assert!(out.stdout.is_empty(), "{arguments:?}: {}", text(&out.stdout));
        assert!(!out.stderr.is_empty(), "{arguments:?}");
    }
    assert!(text(&deckline(folder.path(), &["substances", "wather"]).stderr).contains("`water` may be meant"));
    assert!(text(&deckline(folder.path(), &["vocabulary", "regin"]).stderr).contains("`region` may be meant"));
}

#[test]
fn results_do_not_change_from_one_run_to_the_next_or_with_the_number_of_jobs() {
    let folder = folder();
    for number in 0..12 {
        write_faulty(folder.path(), &format!("faulty-{number}.buoy"));
        write_with_unused_name(folder.path(), &format!("unused-{number}.buoy"));
    }
    for form in ["cards", "lines", "json", "sarif"] {
        let one = deckline(folder.path(), &["assess", "--as", form, "--jobs", "1"]).stdout;
        let many = deckline(folder.path(), &["assess", "--as", form, "--jobs", "4"]).stdout;
        assert!(!one.is_empty() && one == many, "{form}");
        let turned = deckline(folder.path(), &["assess", "--as", form, "unused-3.buoy", ".", "faulty-1.buoy"]).stdout;
        if form == "lines" {
            let mut sorted: Vec<String> = text(&turned).lines().map(str::to_string).collect();
            sorted.dedup();
            assert_eq!(text(&one).lines().collect::<Vec<_>>(), sorted, "each deck once, however often it is named");
        }
    }
}

#[test]
fn colour_is_for_terminals_only() {
    let folder = folder();
    write_faulty(folder.path(), "faulty.buoy");
    let cards = ["assess", "--as", "cards", "faulty.buoy"];
    let plain = deckline(folder.path(), &cards);
    assert!(!plain.stdout.contains(&0x1b), "standard output is no terminal here");
    let forced = command(folder.path(), &cards).env("CLICOLOR_FORCE", "1").output().unwrap();
    assert!(forced.stdout.contains(&0x1b));
    let forbidden = command(folder.path(), &cards).env("CLICOLOR_FORCE", "0").env("NO_COLOR", "1").output().unwrap();
    assert_eq!(forbidden.stdout, plain.stdout);
    assert_eq!(anstream::adapter::strip_str(&text(&forced.stdout)).to_string(), text(&plain.stdout));
}

#[test]
fn a_list_of_decks_comes_from_a_file_or_standard_input() {
    let folder = folder();
    write_faulty(folder.path(), "faulty.buoy");
    write_faulty(folder.path(), "not-listed.buoy");
    fs::write(folder.path().join("list"), "cell.buoy\r\n\nfaulty.buoy\n").unwrap();
    let from_file = deckline(folder.path(), &["assess", "--from-list", "list"]);
    let mut child = command(folder.path(), &["assess", "--from-list", "-"])
        .stdin(Stdio::piped())
        .stdout(Stdio::piped())
        .spawn()
        .unwrap();
    child.stdin.take().unwrap().write_all(b"faulty.buoy\ncell.buoy\n").unwrap();
    let from_input = child.wait_with_output().unwrap();
    assert_eq!((from_file.status.code(), from_input.status.code()), (Some(1), Some(1)));
    assert_eq!(from_file.stdout, from_input.stdout);
    assert!(text(&from_file.stdout).lines().all(|line| line.starts_with("faulty.buoy:")));
    // An empty list names nothing; it does not stand for the folder.
    fs::write(folder.path().join("list"), "").unwrap();
    assert_eq!(status(folder.path(), &["assess", "--from-list", "list"]), 0);
}

#[test]
fn a_reader_that_goes_away_ends_it_quietly() {
    let folder = folder();
    for number in 0..60 {
        write_faulty(folder.path(), &format!("faulty-{number}.buoy"));
    }
    for arguments in [vec!["assess", "--as", "json"], vec!["vocabulary"], vec!["manual"], vec!["completions", "bash"]] {
        let mut child =
            command(folder.path(), &arguments).stdout(Stdio::piped()).stderr(Stdio::piped()).spawn().unwrap();
        drop(child.stdout.take());
        let out = child.wait_with_output().unwrap();
        assert_eq!(text(&out.stderr), "", "{arguments:?}");
        assert!(matches!(out.status.code(), Some(0 | 1)), "{arguments:?}: {:?}", out.status);
    }
}

#[test]
fn every_file_is_shown_by_its_path_from_here() {
    let folder = folder();
    let decks = folder.path().join("decks");
    fs::create_dir_all(decks.join("shared")).unwrap();
    fs::write(decks.join("shared/materials.buoy"), "solid steel\n    conductivity 16 W/m\n").unwrap();
    let deck = format!("include \"shared/materials.buoy\"\n\n{}", sound(folder.path()));
    fs::write(decks.join("a.buoy"), deck).unwrap();
    let line_of = |arguments: &[&str], from: &Path| {
        let out = text(&deckline(from, arguments).stdout);
        out.lines().find(|line| line.contains("dimension-mismatch")).map(str::to_string).unwrap_or(out)
    };
    assert!(line_of(&["assess", "decks/a.buoy"], folder.path()).starts_with("decks/shared/materials.buoy:2:"));
    assert!(line_of(&["assess"], folder.path()).starts_with("decks/shared/materials.buoy:2:"));
    assert!(line_of(&["assess", "../a.buoy"], &decks.join("shared")).starts_with("materials.buoy:2:"));
    let said = text(&deckline(folder.path(), &["assess", "decks"]).stdout);
    let count = said.lines().filter(|line| line.contains("dimension-mismatch")).count();
    assert_eq!(count, 1, "what two decks share is said once: {said}");
}

#[test]
fn what_it_knows_is_printed() {
    let folder = folder();
    let said = |arguments: &[&str]| {
        let out = deckline(folder.path(), arguments);
        assert_eq!(out.status.code(), Some(0), "{arguments:?}: {}", text(&out.stderr));
        text(&out.stdout)
    };
    assert!(said(&["basis"]).contains("unused-name"));
    assert!(said(&["basis", "unused-name"]).contains("What to do"));
    assert!(said(&["vocabulary"]).contains("density-law LAW"));
    assert!(said(&["vocabulary", "density-law"]).contains("boussinesq: density constant"));
    assert!(said(&["substances"]).contains("water, 0 degC to"));
    // IAPWS R12-08 and IF97 by another program: 0.6527 mPa.s at 40 degC, 2 bar (iapws 1.5.4: 0.00065274).
    let water = said(&["substances", "water", "--at", "40", "degC", "--pressure", "2 bar"]);
    assert!(water.contains("0.6527 mPa.s"), "{water}");
    assert!(said(&["manual"]).starts_with(".ie"));
    for shell in ["bash", "zsh", "fish", "powershell", "elvish"] {
        assert!(said(&["completions", shell]).contains("assess"), "{shell}");
    }
    let numbers: serde_json::Value = serde_json::from_str(&said(&["numbers", "cell.buoy", "--as", "json"])).unwrap();
    for (schema, report) in [
        (said(&["numbers", "--schema"]), numbers),
        (said(&["assess", "--schema"]), serde_json::from_str(&said(&["assess", "--as", "json"])).unwrap()),
    ] {
        let schema: serde_json::Value = serde_json::from_str(&schema).unwrap();
        let errors: Vec<String> =
            jsonschema::validator_for(&schema).unwrap().iter_errors(&report).map(|error| error.to_string()).collect();
        assert!(errors.is_empty(), "{errors:?}");
    }
}

#[test]
fn watching_checks_again_when_a_deck_changes() {
    let folder = folder();
    let results = folder.path().join("results.txt");
    let out = fs::File::create(&results).unwrap();
    let mut child = command(folder.path(), &["assess", "--watch", "--as", "cards"]).stdout(out).spawn().unwrap();
    let wait_for = |piece: &str| {
        let start = Instant::now();
        while start.elapsed() < Duration::from_secs(20) {
            if fs::read_to_string(&results).unwrap().contains(piece) {
                return true;
            }
            std::thread::sleep(Duration::from_millis(20));
        }
        false
    };
    let first = wait_for("1 deck checked: nothing to report.");
    write_faulty(folder.path(), "faulty.buoy");
    let second = wait_for("2 decks checked: ");
    fs::remove_file(folder.path().join("faulty.buoy")).unwrap();
    let start = Instant::now();
    let sound_again =
        || fs::read_to_string(&results).unwrap().matches("1 deck checked: nothing to report.").count() > 1;
    while !sound_again() && start.elapsed() < Duration::from_secs(20) {
        std::thread::sleep(Duration::from_millis(20));
    }
    let third = sound_again();
    child.kill().unwrap();
    child.wait().unwrap();
    assert!(first && second && third, "{first} {second} {third}: {}", fs::read_to_string(&results).unwrap());
}

#[test]
fn align_lays_out_and_says_what_it_changed() {
    let folder = folder();
    let path = folder.path().join("cell.buoy");
    assert_eq!(status(folder.path(), &["align"]), 0);
    let laid = fs::read_to_string(&path).unwrap();
    let again = deckline(folder.path(), &["align", "--check"]);
    assert_eq!((again.status.code(), text(&again.stdout)), (Some(0), String::new()));
    let pulled = laid.replace("    side  ", "  side \t ");
    assert_ne!(pulled, laid);
    fs::write(&path, &pulled).unwrap();
    let looked = deckline(folder.path(), &["align", "--check"]);
    assert_eq!((looked.status.code(), text(&looked.stdout)), (Some(1), "./cell.buoy\n".to_string()));
    assert_eq!(fs::read_to_string(&path).unwrap(), pulled, "`--check` changes nothing");
    let done = deckline(folder.path(), &["align", "cell.buoy"]);
    assert_eq!((done.status.code(), text(&done.stdout)), (Some(0), "cell.buoy\n".to_string()));
    assert_eq!(fs::read_to_string(&path).unwrap(), laid);
    let left: Vec<_> = fs::read_dir(folder.path()).unwrap().map(|entry| entry.unwrap().file_name()).collect();
    assert_eq!(left.len(), 2, "{left:?}");
}

#[cfg(unix)]
#[test]
fn align_keeps_permissions_and_links_and_says_what_it_cannot_read() {
    use std::os::unix::fs::PermissionsExt;
    let folder = folder();
    let real = folder.path().join("real.buoy");
    fs::write(&real, "run\n  steady\n").unwrap();
    fs::set_permissions(&real, fs::Permissions::from_mode(0o640)).unwrap();
    std::os::unix::fs::symlink(&real, folder.path().join("link.buoy")).unwrap();
    assert_eq!(status(folder.path(), &["align", "link.buoy"]), 0);
    assert_eq!(fs::read_to_string(&real).unwrap(), "run\n    steady\n");
    assert_eq!(fs::metadata(&real).unwrap().permissions().mode() & 0o777, 0o640);
    assert!(folder.path().join("link.buoy").symlink_metadata().unwrap().file_type().is_symlink());
    fs::write(folder.path().join("bad.buoy"), [0xff, b'\n']).unwrap();
    let out = deckline(folder.path(), &["align", "bad.buoy", "gone.buoy"]);
    assert_eq!(out.status.code(), Some(2));
    let said = text(&out.stderr);
    assert!(said.contains("bad.buoy: not UTF-8") && said.contains("gone.buoy: no such file"), "{said}");
}
