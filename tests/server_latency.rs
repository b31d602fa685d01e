//! How long a client waits, over pipes to the real program: from sending an edit to having its findings, and for
//! completion and hover sent right behind an edit. Run on an idle machine, as
//! `cargo test --release --test server_latency -- --ignored --nocapture`.

#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)] // a test fails loudly

#[path = "lsp/client.rs"]
mod client;
#[path = "lsp/decks.rs"]
mod decks;

use client::Client;
use serde_json::json;
use std::time::{Duration, Instant};

const URI: &str = "file:///deckline-nowhere/rooms.buoy";

fn spread(name: &str, mut times: Vec<Duration>) -> Duration {
    times.sort();
    let at = |share: f64| times[((times.len() - 1) as f64 * share).round() as usize];
    println!("{name}: p50 {:.2?}, p99 {:.2?}, most {:.2?} of {}", at(0.5), at(0.99), at(1.0), times.len());
    at(0.99)
}

/// Edits a number on lines all over the deck, one edit after the other, as someone who types.
fn measure(lines: usize, rounds: usize) -> [Duration; 3] {
    let text = decks::deck(lines);
    let places: Vec<(usize, usize)> = text
        .lines()
        .enumerate()
        .filter_map(|(line, text)| text.find("= 2.4 m").map(|column| (line, column + 2)))
        .collect();
    let mut client = Client::initialized(json!({}));
    client.open(URI, 1, &text);
    client.findings(URI, 1);
    let (mut findings, mut completions, mut hovers) = (Vec::new(), Vec::new(), Vec::new());
    for round in 0..rounds {
        let version = round as i64 + 2;
        let (line, column) = places[(round * 7919) % places.len()];
        let range =
            json!({"start": {"line": line, "character": column}, "end": {"line": line, "character": column + 1}});
        let digit = (round % 7 + 1).to_string();
        let position = json!({"textDocument": {"uri": URI}, "position": {"line": line, "character": column + 1}});
        let begun = Instant::now();
        client.change(URI, version, json!([{"range": range, "text": digit}]));
        match round % 3 {
            0 => findings.push(client.findings(URI, version).0 - begun),
            1 => {
                let id = client.request("textDocument/completion", position);
                let at = client.wait("completion", |message| message["id"] == id).0;
                completions.push(at - begun);
                client.findings(URI, version);
            }
            _ => {
                let id = client.request("textDocument/hover", position);
                let at = client.wait("hover", |message| message["id"] == id).0;
                hovers.push(at - begun);
                client.findings(URI, version);
            }
        }
        // A pause, so that each edit finds the server at rest.
        std::thread::sleep(Duration::from_millis(2));
    }
    let all = [
        spread(&format!("{lines} lines, findings"), findings),
        spread(&format!("{lines} lines, completion"), completions),
        spread(&format!("{lines} lines, hover"), hovers),
    ];
    println!("{lines} lines, resident memory: {} MiB", resident(client.child.id()) / 1024);
    client.leave();
    all
}

/// Resident memory of a process, KiB.
fn resident(process: u32) -> usize {
    let status = std::fs::read_to_string(format!("/proc/{process}/status")).unwrap_or_default();
    let line = status.lines().find_map(|line| line.strip_prefix("VmRSS:"));
    line.and_then(|line| line.trim().trim_end_matches("kB").trim().parse().ok()).unwrap_or(0)
}

#[test]
#[ignore = "takes an idle machine and a release build to mean anything"]
fn a_client_does_not_wait() {
    let small = measure(300, 1500);
    let large = measure(10_000, 900);
    assert!(small[0] < Duration::from_millis(3), "findings of 300 lines: {:?}", small[0]);
    assert!(large[0] < Duration::from_millis(10), "findings of 10,000 lines: {:?}", large[0]);
    for time in small[1..].iter().chain(&large[1..]) {
        assert!(*time < Duration::from_millis(5), "behind an edit: {time:?}");
    }
}
