//! Thousands of rapid edits, mixed with requests, over pipes to the real program: what the server has at the end is what
//! a fresh open of the final text gives. `DECKLINE_EDITS=20000` sets how many.

#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)] // a test fails loudly

#[path = "lsp/client.rs"]
mod client;
#[path = "lsp/decks.rs"]
mod decks;

use client::Client;
use serde_json::{Value, json};

const URI: &str = "file:///deckline-nowhere/edited.buoy";
const FRESH: &str = "file:///deckline-nowhere/fresh.buoy";

/// Numbers that only look random (xorshift, G. Marsaglia, J. Stat. Software 8(14), 2003), so that a failure can be had again.
struct Numbers(u64);

impl Numbers {
    fn below(&mut self, bound: usize) -> usize {
        self.0 ^= self.0 << 13;
        self.0 ^= self.0 >> 7;
        self.0 ^= self.0 << 17;
        (self.0 % bound.max(1) as u64) as usize
    }
}

/// The client's own copy of the text, in UTF-16 units, edited without any help from the server's code.
struct Copy(Vec<u16>);

impl Copy {
    /// The starts and ends (without line end) of the lines.
    fn lines(&self) -> Vec<(usize, usize)> {
        let (cr, lf) = (u16::from(b'\r'), u16::from(b'\n'));
        let mut lines = Vec::new();
        let (mut start, mut at) = (0, 0);
        while at < self.0.len() {
            let is_pair = self.0[at] == cr && self.0.get(at + 1) == Some(&lf);
            if self.0[at] == cr || self.0[at] == lf {
                lines.push((start, at));
                at += usize::from(is_pair);
                start = at + 1;
            }
            at += 1;
        }
        lines.push((start, self.0.len()));
        lines
    }

    /// A place, never inside a pair of surrogates, as offset and as position.
    fn place(&self, line: usize, column: usize) -> (usize, Value) {
        let lines = self.lines();
        let line = line.min(lines.len() - 1);
        let (start, end) = lines[line];
        let mut at = (start + column).min(end);
        if at > start && at < end && (0xdc00..0xe000).contains(&self.0[at]) {
            at -= 1;
        }
        (at, json!({"line": line, "character": at - start}))
    }

    fn text(&self) -> String {
        String::from_utf16(&self.0).expect("whole characters")
    }
}

const PIECES: &[&str] = &[
    "",
    "",
    "x",
    " ",
    "\n",
    "\r\n",
    "    ",
    "#",
    "\"",
    "(",
    ")",
    " m",
    " degC",
    "1.5e3",
    " = ",
    "α",
    "ΔT",
    "🌡",
    "e\u{301}",
    "日本",
    "given\n    T = 3 K\n",
    "region a\n",
    "# comment\n",
    "fluid air\n    substance air\n",
    " .. ",
    "| 1 m | 2 m |\n",
    "\t",
    "..",
];

fn one_change(copy: &mut Copy, numbers: &mut Numbers) -> Value {
    let count = copy.lines().len();
    let line = numbers.below(count);
    let (start, from) = copy.place(line, numbers.below(40));
    // Mostly within a line, now and then over several.
    let last = if numbers.below(8) == 0 { line + numbers.below(3) } else { line };
    let (end, to) = copy.place(last, numbers.below(44));
    let ((start, from), (end, to)) = if start <= end { ((start, from), (end, to)) } else { ((end, to), (start, from)) };
    let piece = PIECES[numbers.below(PIECES.len())];
    copy.0.splice(start..end, piece.encode_utf16());
    json!({"range": {"start": from, "end": to}, "text": piece})
}

#[test]
fn many_edits_leave_what_a_fresh_open_gives() {
    let edits: usize = std::env::var("DECKLINE_EDITS").ok().and_then(|edits| edits.parse().ok()).unwrap_or(1500);
    let original = decks::deck(200).replace("Room 0", "Room 0 🌡 α\r");
    let mut numbers = Numbers(0x9e37_79b9_7f4a_7c15);
    let mut copy = Copy(original.encode_utf16().collect());
    let mut client = Client::initialized(json!({}));
    let begun = std::time::Instant::now();
    client.open(URI, 0, &original);
    let mut asked = Vec::new();
    for version in 1..=edits {
        let changes: Vec<Value> = if version % 497 == 0 {
            // Everything anew, now and then, so that the text does not decay into noise.
            copy = Copy(original.encode_utf16().collect());
            vec![json!({"text": original})]
        } else {
            // Several in a message: each counts on the text that the one before it left, and may overlap it.
            (0..1 + numbers.below(4)).map(|_| one_change(&mut copy, &mut numbers)).collect()
        };
        client.change(URI, version as i64, Value::Array(changes));
        let at = copy.place(numbers.below(200), numbers.below(30)).1;
        let document = json!({"uri": URI});
        match version % 41 {
            0 => asked.push(client.request("textDocument/hover", json!({"textDocument": document, "position": at}))),
            10 => {
                asked.push(client.request("textDocument/completion", json!({"textDocument": document, "position": at})))
            }
            20 => asked.push(client.request("textDocument/documentSymbol", json!({"textDocument": document}))),
            30 => asked.push(client.request("textDocument/diagnostic", json!({"textDocument": document}))),
            _ => {}
        }
    }
    for id in asked {
        let answer = client.answer(id);
        assert_ne!(answer["error"]["code"], -32603, "{answer}");
    }
    let (_, edited) = client.findings(URI, edits as i64);
    let took = begun.elapsed();
    client.open(FRESH, 1, &copy.text());
    let (_, fresh) = client.findings(FRESH, 1);
    assert_eq!(text_of(&edited, URI), text_of(&fresh, FRESH));
    assert!(!fresh.as_array().expect("a list").is_empty(), "a text that was torn apart has findings");
    for (method, more) in TELL_ALL {
        let ask = |client: &mut Client, uri: &str| {
            let mut params: Value = serde_json::from_str(more).expect("JSON");
            params["textDocument"] = json!({"uri": uri});
            let id = client.request(method, params);
            text_of(&client.answer(id)["result"], uri)
        };
        assert_eq!(ask(&mut client, URI), ask(&mut client, FRESH), "{method}");
    }
    println!("{edits} edits in {took:.2?}");
    client.leave();
}

/// Requests whose answers show the server's text and tree from end to end.
const TELL_ALL: &[(&str, &str)] = &[
    ("textDocument/semanticTokens/full", "{}"),
    ("textDocument/documentSymbol", "{}"),
    ("textDocument/foldingRange", "{}"),
    ("textDocument/documentLink", "{}"),
    ("textDocument/formatting", r#"{"options": {"tabSize": 4, "insertSpaces": true}}"#),
    (
        "textDocument/inlayHint",
        r#"{"range": {"start": {"line": 0, "character": 0}, "end": {"line": 100000, "character": 0}}}"#,
    ),
    (
        "textDocument/selectionRange",
        r#"{"positions": [{"line": 3, "character": 2}, {"line": 40, "character": 9}, {"line": 99, "character": 0}]}"#,
    ),
];

/// An answer as text, without the name of the document.
fn text_of(value: &Value, uri: &str) -> String {
    let mut value = value.clone();
    if let Some(fields) = value.as_object_mut() {
        // Counts how often it was asked.
        fields.remove("resultId");
    }
    value.to_string().replace(uri, "DECK")
}
