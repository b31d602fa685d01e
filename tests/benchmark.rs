//! Where the time of a deck goes. Not a test of speed: `cargo test --release --test benchmark -- --ignored --nocapture`
//! prints medians.

#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)] // a test fails loudly

use deckline::case::{Known, Role, Source, resolve};
use deckline::checks::{self, CHECKS};
use deckline::physics;
use deckline::substances::library::NAMES;
use deckline::syntax::{FileId, parse};
use deckline::testing::TODAY;
use deckline::workspace::analyse_text;
use std::path::Path;
use std::time::{Duration, Instant};

fn median(rounds: usize, mut work: impl FnMut()) -> Duration {
    let mut times: Vec<Duration> = (0..rounds)
        .map(|_| {
            let start = Instant::now();
            work();
            start.elapsed()
        })
        .collect();
    times.sort();
    times[times.len() / 2]
}

#[test]
#[ignore = "measures"]
fn where_the_time_of_a_deck_goes() {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("tests/decks/observatory");
    for name in ["instrument_cabinet.buoy", "dome.buoy", "water_tank.buoy"] {
        let text = std::fs::read_to_string(folder.join(name)).unwrap().replace("include \"shared/materials.buoy\"", "");
        let text = text.replace("p_site", "0.76 bar");
        let names: Vec<&str> = CHECKS.iter().map(|check| check.name).collect();
        let tree = parse(&text);
        let sources = [Source { file: FileId(0), tree: &tree, role: Role::Deck }];
        let known = Known { substances: &NAMES, checks: &names };
        let resolution = resolve(&sources, known);
        let case = resolution.case(&resolution.nominal);
        let physics_of = physics::work_out(&case);
        let rounds = 51;
        let parts = [
            ("parse", median(rounds, || drop(parse(&text)))),
            ("resolve", median(rounds, || drop(resolve(&sources, known)))),
            ("case", median(rounds, || drop(resolution.case(&resolution.nominal)))),
            ("physics", median(rounds, || drop(physics::work_out(&case)))),
            ("checks", median(rounds, || drop(checks::run(&case, &physics_of, TODAY)))),
            ("all", median(rounds, || drop(analyse_text(&text, TODAY)))),
        ];
        println!("{name}, {} lines: {parts:?}", text.lines().count());
        let subject = checks::Subject { case: &case, physics: &physics_of, today: TODAY };
        let mut by_check: Vec<(Duration, &str)> = CHECKS
            .iter()
            .filter_map(|check| {
                let run = check.run?;
                let weighing = checks::weighing(check, &case.practice);
                Some((median(11, || drop(run(&subject, &weighing))), check.name))
            })
            .collect();
        by_check.sort();
        by_check.reverse();
        println!("    slowest: {:?}", &by_check[..8]);
    }
}
