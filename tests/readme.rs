//! Every command in the README with the output that stands below it, run again. `UPDATE=1 cargo test --test readme` writes
//! what comes out now; read the difference before it is committed.

#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)]

use std::path::Path;
use std::process::Command;

/// What the shell shows for a line `$ deckline ...`. The day is fixed, because waivers end.
fn output_of(line: &str, root: &Path) -> String {
    let words: Vec<&str> = line.trim_start_matches("$ deckline").split_whitespace().collect();
    let mut command = Command::new(env!("CARGO_BIN_EXE_deckline"));
    command.args(&words).current_dir(root).env("NO_COLOR", "1").env("COLUMNS", "80");
    if words.first() == Some(&"assess") {
        command.args(["--on", "2026-12-01"]);
    }
    let output = command.output().unwrap();
    let mut text = String::from_utf8(output.stdout).unwrap();
    text.push_str(&String::from_utf8(output.stderr).unwrap());
    text.trim_end().to_string()
}

#[test]
fn commands_print_what_the_readme_shows() {
    let root = Path::new(env!("CARGO_MANIFEST_DIR"));
    let path = root.join("README.md");
    let text = std::fs::read_to_string(&path).unwrap();
    let mut again = String::new();
    let mut rest = text.as_str();
    let mut commands = 0;
    while let Some((before, from)) = rest.split_once("```console\n$ deckline ") {
        let (block, after) = from.split_once("\n```").unwrap();
        let line = format!("$ deckline {}", block.lines().next().unwrap());
        // A block may end in `...`: then it shows the first lines only.
        let shown = block.lines().count() - 1;
        let mut output = output_of(&line, root);
        if block.ends_with("\n...") {
            let lines: Vec<&str> = output.lines().take(shown - 1).collect();
            output = lines.join("\n") + "\n...";
        }
        again.push_str(&format!("{before}```console\n{line}\n{output}\n```"));
        rest = after;
        commands += 1;
    }
    again.push_str(rest);
    assert!(commands >= 5, "the README shows {commands} commands");
    if std::env::var_os("UPDATE").is_some() {
        std::fs::write(&path, again).unwrap();
    } else {
        assert_eq!(text, again);
    }
}
