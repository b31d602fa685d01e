//! How long the editor's questions take on a deck of 10,000 lines. The times are printed; the bound is that of the design
//! (2 ms) in a release build and a loose one otherwise.

#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)] // a test fails loudly

use deckline::ide::{
    actions, completion, folding, format, hover, inlay, navigate, selection, signature, symbols, tokens,
};
use deckline::syntax::{FileId, Span};
use deckline::testing::TODAY;
use deckline::workspace::{Deck, analyse_text};
use std::fmt::Write as _;
use std::time::{Duration, Instant};

/// A deck of some 10,000 lines: definitions that build on one another, and many regions.
fn long_deck() -> String {
    let mut text = String::from("case \"long\"\n    gravity 9.81 m/s^2 along -z\n\ngiven\n    h0 = 1 m\n");
    for index in 1..=3000 {
        let _ = writeln!(text, "    h{index} = h{} + 1 mm  \"step {index}\"", index - 1);
    }
    text.push_str("\nfluid f\n    substance air\n    reference 25 degC at 1 bar\n    density-law boussinesq\n");
    for index in 0..400 {
        let _ = write!(
            text,
            "\nregion r{index}\n    box 1 m by 1 m by h{index}\n    filled with f\n    flow laminar\n\nboundary hot of r{index}\n    \
             side west\n    wall\n    held at 30 degC\n\nboundary cold of r{index}\n    side east\n    wall\n    held at 20 degC\n\n\
             boundary rest of r{index}\n    side remaining\n    wall\n    insulated\n"
        );
    }
    text
}

/// The median and the 99th percentile of the time of a question at many places.
fn times(deck: &Deck, ask: &dyn Fn(&Deck, usize) -> usize) -> (Duration, Duration) {
    let length = deck.files[0].text.len();
    let mut times = Vec::new();
    let mut answers = 0;
    for index in 0..200 {
        let offset = (length / 200) * index + index % 17;
        let start = Instant::now();
        answers += ask(deck, offset);
        times.push(start.elapsed());
    }
    assert!(answers > 0, "a question that nothing answers is not measured");
    times.sort();
    (times[100], times[198])
}

#[test]
fn a_deck_of_ten_thousand_lines() {
    const DECK: FileId = FileId(0);
    let text = long_deck();
    assert!(text.lines().count() > 9_500);
    let deck = analyse_text(&text, TODAY);
    let all = Span::new(0, text.len());
    let here = |offset: usize| Span::new(offset, offset + 2000);
    type Ask<'a> = (&'a str, u64, Box<dyn Fn(&Deck, usize) -> usize + 'a>);
    let questions: Vec<Ask<'_>> = vec![
        ("completion", 2, Box::new(|deck, offset| completion::complete(deck, DECK, offset).len())),
        ("hover", 2, Box::new(|deck, offset| usize::from(hover::hover(deck, DECK, offset).is_some()))),
        ("signature", 2, Box::new(|deck, offset| usize::from(signature::signature(deck, DECK, offset).is_some()))),
        ("references", 2, Box::new(|deck, offset| navigate::references(deck, DECK, offset).len())),
        ("selection", 2, Box::new(|deck, offset| selection::ranges(deck, DECK, offset).len())),
        ("hints, a screen", 5, Box::new(move |deck, offset| inlay::hints(deck, DECK, here(offset)).len())),
        ("actions", 5, Box::new(move |deck, offset| actions::actions(deck, DECK, Span::new(offset, offset)).len())),
        ("colours, all", 50, Box::new(|deck, _| tokens::tokens(deck, DECK).len())),
        ("outline, all", 50, Box::new(|deck, _| symbols::document(deck, DECK).len())),
        ("folds, all", 50, Box::new(|deck, _| folding::folds(deck, DECK).len())),
        ("hints, all", 50, Box::new(move |deck, _| inlay::hints(deck, DECK, all).len())),
        ("layout, all", 100, Box::new(|deck, _| format::document(deck, DECK).len())),
    ];
    // Without optimisation, and on a machine that is busy with other tests.
    let slack = if cfg!(debug_assertions) { 100 } else { 1 };
    for (name, bound, ask) in &questions {
        let (median, slowest) = times(&deck, ask);
        println!("{name:18} {median:>10.1?} {slowest:>10.1?}");
        assert!(median < Duration::from_millis(bound * slack), "{name}: {median:?}");
    }
}
