//! The layout of decks: the sample of the language, and what holds for every text.

#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)]

use deckline::syntax::layout::laid_out;
use deckline::syntax::parse;
use deckline::syntax::tokens::{TokenKind, tokens};
use deckline::testing::TODAY;
use deckline::workspace::{analyse_text, walk};
use std::path::Path;

/// The tokens of a text without white space, entry by entry.
fn without_white_space(text: &str) -> Vec<(TokenKind, String)> {
    let tree = parse(text);
    let all = tree.entries.iter().flat_map(|placed| {
        tokens(&placed.entry).into_iter().map(|token| {
            let text = token.span.of(&placed.entry.text);
            let bare = match token.kind {
                TokenKind::Text => text.to_string(),
                TokenKind::Comment => text.trim_end().to_string(),
                _ => text.chars().filter(|c| !c.is_whitespace()).collect(),
            };
            (token.kind, bare)
        })
    });
    // Runs of marks join and part with the white space between them.
    let mut found: Vec<(TokenKind, String)> = Vec::new();
    for (kind, bare) in all.filter(|(_, bare)| !bare.is_empty()) {
        match found.last_mut() {
            Some((TokenKind::Plain, last)) if kind == TokenKind::Plain => last.push_str(&bare),
            _ => found.push((kind, bare)),
        }
    }
    found
}

/// What is found, without places.
fn found(text: &str) -> Vec<String> {
    let strip = |text: &str| text.chars().filter(|c| !c.is_whitespace()).collect::<String>();
    let mut all: Vec<String> = analyse_text(text, TODAY)
        .findings
        .iter()
        .map(|finding| format!("{} {:?} {}", finding.check, finding.level, strip(&finding.message)))
        .collect();
    all.sort();
    all
}

/// Fails where laying a text out changes more than white space.
#[track_caller]
fn holds(text: &str) {
    let laid = laid_out(text);
    assert_eq!(laid_out(&laid), laid, "laid out twice it differs:\n{text}");
    assert_eq!(without_white_space(text), without_white_space(&laid), "tokens of:\n{text}\nand:\n{laid}");
    assert_eq!(found(text), found(&laid), "findings of:\n{text}\nand:\n{laid}");
}

#[test]
fn the_sample_of_the_language_stands_as_it_is_and_comes_back_when_squeezed() {
    let sample = include_str!("layout/sample.buoy");
    assert_eq!(laid_out(sample), sample);
    let squeezed: String = sample
        .lines()
        .map(|line| {
            let indent = if line.starts_with(' ') && !line.trim_start().starts_with("because") { " " } else { "" };
            let indent = if line.trim_start().starts_with("because") { "\t" } else { indent };
            format!("{indent}{}\n", line.split_whitespace().collect::<Vec<_>>().join(" "))
        })
        .collect();
    assert_eq!(laid_out(&squeezed), sample);
    holds(sample);
}

#[test]
fn comments_and_empty_lines() {
    assert_eq!(
        laid_out(
            "# top\n\n\n# of run\nrun   # why\n\n\n  # note\n  steady # a\n  time-stepping implicit # b\nmesh of a\n  growth 1.2\n\n\n"
        ),
        "# top\n\n\n# of run\nrun  # why\n\n    # note\n    steady                   # a\n    time-stepping  implicit  # b\n\nmesh of a\n    growth         1.2\n"
    );
}

#[test]
fn rows_and_definitions_beside_statements() {
    assert_eq!(
        laid_out(
            "substance oil\n a = 2\n density a * 1 kg/m^3\n table temperature, viscosity\n |20 degC|0.8 Pa.s|\n | 100 degC | 0.02 Pa.s |\n"
        ),
        "substance oil\n    a            = 2\n    density        a * 1 kg/m^3\n    table          temperature, viscosity\n    | 20 degC  | 0.8 Pa.s  |\n    | 100 degC | 0.02 Pa.s |\n"
    );
}

#[test]
fn line_ends_and_a_mark_are_kept() {
    assert_eq!(laid_out("\u{feff}run\r\n  steady  \r\n"), "\u{feff}run\r\n    steady\r\n");
    assert_eq!(laid_out("run\r\n  steady"), "run\r\n    steady\r\n");
    assert_eq!(laid_out("run\n  steady"), "run\n    steady\n");
    assert_eq!(laid_out(""), "");
}

#[test]
fn what_cannot_be_read_stays() {
    let text = "run\n  steady {   }\n  time-stepping   implicit\n";
    assert_eq!(laid_out(text), "run\n  steady {   }\n    time-stepping  implicit\n");
}

#[test]
fn wide_letters_take_their_width() {
    assert_eq!(laid_out("given\n 高さ = 1 m\n ab = 2 m\n"), "given\n    高さ  = 1 m\n    ab    = 2 m\n");
}

/// A small generator of pseudo-random numbers (xorshift64), so that a failure can be repeated.
struct Random(u64);

impl Random {
    fn below(&mut self, bound: usize) -> usize {
        self.0 ^= self.0 << 13;
        self.0 ^= self.0 >> 7;
        self.0 ^= self.0 << 17;
        usize::try_from(self.0 % bound as u64).unwrap()
    }
}

#[test]
fn for_any_text_only_white_space_changes() {
    const PIECES: &[&str] = &[
        "region",
        "boundary",
        "given",
        "substance",
        "a",
        "b_c",
        " ",
        "  ",
        "\t",
        "\u{a0}",
        "\n",
        "\n    ",
        "\n  ",
        "\r\n",
        "\n\n",
        "# note",
        "#",
        "\"text  two\"",
        "\"",
        "5",
        "1e3",
        "5 m",
        "5m",
        "20 degC",
        "-",
        " - ",
        "*",
        "/",
        " / ",
        "(",
        ")",
        "[1 m,2 m]",
        ",",
        "=",
        " = ",
        "|",
        "| 1 m | 2 |",
        "<",
        "within",
        " .. ",
        "of",
        "by",
        "at",
        "held at",
        "because",
        "until",
        "2027-03-01",
        "box 1 m by 2 m",
        "density-law",
        "boussinesq",
        "+-",
        "é",
        "高",
        "\u{feff}",
        "Ra(a)",
        "require",
        "waive",
        "table",
        "f(x)",
        "x.y",
        "difference",
    ];
    let mut random = Random(0x9E37_79B9_7F4A_7C15);
    for _ in 0..1500 {
        let mut text = String::new();
        for _ in 0..=random.below(40) {
            text.push_str(PIECES[random.below(PIECES.len())]);
        }
        holds(&text);
    }
}

#[test]
fn the_decks_of_the_project_keep_their_meaning() {
    for (_, text) in deckline::substances::library::FILES {
        holds(text);
    }
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("tests");
    let (decks, _) = walk::decks(&[folder.join("decks"), folder.join("published")]);
    assert!(decks.len() > 50);
    for path in decks {
        holds(&std::fs::read_to_string(path).expect("a deck"));
    }
}
