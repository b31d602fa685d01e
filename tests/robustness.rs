//! Nothing that is typed can do harm: whatever the text, reading it ends, loses no byte, and a bad line takes no finding
//! of another line with it.

#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)] // a test fails loudly

use deckline::syntax::{parse, parse_again, tokens};
use deckline::testing::TODAY;
use deckline::workspace::{analyse_text, walk};
use std::path::Path;

/// A small generator of pseudo-random numbers (xorshift64*, Vigna 2016): the same sequence on every machine.
struct Random(u64);

impl Random {
    fn next(&mut self) -> u64 {
        self.0 ^= self.0 >> 12;
        self.0 ^= self.0 << 25;
        self.0 ^= self.0 >> 27;
        self.0.wrapping_mul(0x2545_F491_4F6C_DD1D)
    }

    fn below(&mut self, bound: usize) -> usize {
        usize::try_from(self.next() >> 33).expect("31 bits") % bound.max(1)
    }
}

fn decks() -> Vec<String> {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("tests");
    let (paths, _) = walk::decks(&[folder.join("decks"), folder.join("published")]);
    paths.iter().map(|path| std::fs::read_to_string(path).expect("a deck")).collect()
}

fn together(text: &str) -> String {
    let tree = parse(text);
    let mut again = String::new();
    for placed in &tree.entries {
        assert_eq!(placed.start, again.len());
        for token in tokens::tokens(&placed.entry) {
            again.push_str(token.span.of(&placed.entry.text));
        }
    }
    again
}

const PIECES: [&str; 40] = [
    "(",
    ")",
    "[",
    "]",
    "\"",
    "#",
    "|",
    "=",
    "<",
    "..",
    " ",
    "\t",
    "\n",
    "\r\n",
    "    ",
    "+-",
    "-",
    "*",
    "/",
    "^",
    "1e999",
    "0",
    "degC",
    "K",
    "m/s^2",
    "barg",
    "by",
    "of",
    "within",
    "region a",
    "\nboundary b of a",
    "\u{feff}",
    "é",
    "🌡",
    "α",
    "\u{301}",
    "²",
    "T",
    "9999999999999999999999",
    "difference",
];

#[test]
fn mangled_decks_are_read_to_the_end_and_lose_nothing() {
    let decks = decks();
    let mut random = Random(0x5eed);
    for round in 0..1500 {
        let mut text: Vec<char> = decks[random.below(decks.len())].chars().collect();
        for _ in 0..=random.below(12) {
            let at = random.below(text.len() + 1);
            match random.below(3) {
                0 => {
                    let until = (at + random.below(40)).min(text.len());
                    text.drain(at..until);
                }
                1 => {
                    let piece: Vec<char> = PIECES[random.below(PIECES.len())].chars().collect();
                    text.splice(at..at, piece);
                }
                _ => {
                    let from = random.below(text.len() + 1);
                    let until = (from + random.below(60)).min(text.len());
                    let piece: Vec<char> = text[from..until].to_vec();
                    text.splice(at..at, piece);
                }
            }
        }
        let text: String = text.into_iter().collect();
        assert_eq!(together(&text), text, "round {round}");
        let deck = analyse_text(&text, TODAY);
        for finding in &deck.findings {
            let span = finding.place.span;
            assert!(text.get(span.start..span.end).is_some(), "round {round}: {finding:?}");
            assert!(
                !finding.message.contains("NaN") && !finding.message.contains("inf "),
                "round {round}: {finding:?}"
            );
            for edit in finding.fixes.iter().flat_map(|fix| &fix.edits) {
                assert!(text.get(edit.span.start..edit.span.end).is_some(), "round {round}: {finding:?}");
            }
        }
    }
}

#[test]
fn parsing_again_gives_what_parsing_afresh_gives() {
    let decks = decks();
    let mut random = Random(0xbeef);
    let mut text = decks[0].clone();
    let mut tree = parse(&text);
    for _ in 0..400 {
        let mut at = random.below(text.len() + 1);
        while !text.is_char_boundary(at) {
            at -= 1;
        }
        if random.below(2) == 0 {
            text.insert_str(at, PIECES[random.below(PIECES.len())]);
        } else {
            let mut until = (at + random.below(20)).min(text.len());
            while !text.is_char_boundary(until) {
                until += 1;
            }
            text.replace_range(at..until, "");
        }
        if text.len() < 200 {
            text = decks[random.below(decks.len())].clone();
        }
        tree = parse_again(&text, &tree);
        let fresh = parse(&text);
        assert_eq!(tree.entries.len(), fresh.entries.len());
        for (a, b) in tree.entries.iter().zip(&fresh.entries) {
            assert_eq!((a.start, &a.entry), (b.start, &b.entry));
        }
    }
}

#[test]
fn extremes_are_read_in_bounded_time_and_space() {
    let deep = format!("given\n    a = {}1{}\n", "(".repeat(30_000), ")".repeat(30_000));
    let units = format!("given\n    a = 1 {}m{}\n", "(".repeat(10_000), ")".repeat(10_000));
    let long = format!("given\n    a = 1{}\n", " + 1".repeat(100_000));
    let powers = format!("given\n    a = 2{}\n", "^2".repeat(5_000));
    let signs = format!("given\n    a = {}1\n", "-".repeat(20_000));
    let list = format!("vary\n    a over [{}1 s]\n", "1 s, ".repeat(3_000));
    let chain: String = "given\n    v0 = 1 m\n".to_string()
        + &(1..5_000).map(|n| format!("    v{n} = v{} + 1 m\n", n - 1)).collect::<String>();
    let circle: String =
        "given\n".to_string() + &(0..5_000).map(|n| format!("    v{n} = v{}\n", (n + 1) % 5_000)).collect::<String>();
    let regions: String = (0..3_000).map(|n| format!("region r{n}\n    box 1 m by 1 m\n")).collect();
    let unclosed = "\"".repeat(30_000);
    let bars = format!("substance s\n    {}\n", "|".repeat(20_000));
    let exponents = "given\n    a = (1 m)^1000000000000\n    b = (1 m^999)^999\n    c = 1 m^2147483647\n".to_string();
    for text in [deep, units, long, powers, signs, list, chain, circle, regions, unclosed, bars, exponents] {
        assert_eq!(together(&text), text);
        let _ = analyse_text(&text, TODAY);
    }
}

#[test]
fn one_bad_line_among_two_hundred_takes_no_other_finding_with_it() {
    let line = |n: usize| format!("    v{n} = 1 m + {n} s\n");
    let good: Vec<String> = (0..200).map(line).collect();
    let count = |text: &str| {
        analyse_text(text, TODAY).findings.iter().filter(|finding| finding.check == "dimension-mismatch").count()
    };
    assert_eq!(count(&format!("given\n{}", good.concat())), 200);
    let mut bad = good.clone();
    bad[100] = "    v100 = 1 m + ] \"} 5 {{ s\n".to_string();
    let deck = analyse_text(&format!("given\n{}", bad.concat()), TODAY);
    assert_eq!(deck.findings.iter().filter(|finding| finding.check == "dimension-mismatch").count(), 199);
    assert_eq!(deck.findings.iter().filter(|finding| finding.check == "unreadable-line").count(), 1);
}
