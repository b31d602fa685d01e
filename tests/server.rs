//! The language server over pipes, as an editor meets it: order of edits, ends of the process, broken messages, findings
//! that come and go.

#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)] // a test fails loudly

#[path = "lsp/client.rs"]
mod client;
#[path = "lsp/decks.rs"]
mod decks;

use client::{Client, PATIENCE};
use serde_json::{Value, json};
use std::path::{Path, PathBuf};
use std::time::Duration;

const URI: &str = "file:///deckline-nowhere/deck.buoy";
/// A deck with one finding that is easy to make and to mend.
const FAULTY: &str = "given\n    height = 1.1 furlongs_of_old\n\nrun\n    steady\n";

fn codes(findings: &Value) -> Vec<String> {
    let list = findings.as_array().expect("a list of findings");
    list.iter().map(|finding| finding["code"].as_str().unwrap_or("").to_string()).collect()
}

fn folder(name: &str) -> PathBuf {
    let folder = std::env::temp_dir().join(format!("deckline-server-{name}-{}", std::process::id()));
    std::fs::create_dir_all(&folder).expect("a temporary folder");
    folder.canonicalize().expect("its path")
}

fn uri(path: &Path) -> String {
    format!("file://{}", path.display())
}

fn place(line: u64, character: u64) -> Value {
    json!({"line": line, "character": character})
}

#[test]
fn findings_come_with_their_version_and_go_when_the_deck_is_mended_and_closed() {
    let mut client = Client::initialized(json!({}));
    client.open(URI, 7, FAULTY);
    let (_, found) = client.findings(URI, 7);
    assert!(codes(&found).contains(&"unknown-unit".to_string()), "{found}");
    let range = json!({"start": place(1, 17), "end": place(1, 32)});
    client.change(URI, 8, json!([{"range": range, "text": "m"}]));
    let (_, found) = client.findings(URI, 8);
    assert!(!codes(&found).contains(&"unknown-unit".to_string()), "{found}");
    client.close(URI);
    assert_eq!(client.any_findings(URI), json!([]));
    client.leave();
}

#[test]
fn findings_that_are_asked_for_are_not_pushed_and_are_told_to_be_unchanged() {
    let mut client = Client::initialized(json!({"capabilities": {"textDocument": {"diagnostic": {}}}}));
    client.open(URI, 1, FAULTY);
    let document = json!({"uri": URI});
    let first = client.ask("textDocument/diagnostic", json!({"textDocument": document}));
    assert_eq!(first["kind"], "full");
    assert!(codes(&first["items"]).contains(&"unknown-unit".to_string()), "{first}");
    let again = json!({"textDocument": document, "previousResultId": first["resultId"]});
    assert_eq!(client.ask("textDocument/diagnostic", again.clone())["kind"], "unchanged");
    let known = json!({"previousResultIds": [{"uri": URI, "value": first["resultId"]}, {"uri": "file:///gone.buoy", "value": "x"}]});
    let all = client.ask("workspace/diagnostic", known);
    let kinds: Vec<(&str, &str)> = all["items"]
        .as_array()
        .expect("reports")
        .iter()
        .map(|report| (report["uri"].as_str().unwrap_or(""), report["kind"].as_str().unwrap_or("")))
        .collect();
    assert_eq!(kinds, [(URI, "unchanged"), ("file:///gone.buoy", "full")]);
    client.change(URI, 2, json!([{"text": "run\n    steady\n"}]));
    let after = client.ask("textDocument/diagnostic", again);
    assert_eq!(after["kind"], "full");
    assert!(!codes(&after["items"]).contains(&"unknown-unit".to_string()));
    client.leave();
}

#[test]
fn a_deck_is_checked_again_when_a_file_that_it_includes_is_edited() {
    let folder = folder("include");
    let (deck, shared) = (folder.join("deck.buoy"), folder.join("shared.buoy"));
    std::fs::write(&deck, "include \"shared.buoy\"\n\nrequire\n    height < 3 m\n").expect("written");
    std::fs::write(&shared, "given\n    height = 1 m\n").expect("written");
    let mut client = Client::initialized(json!({}));
    client.open(&uri(&deck), 1, &std::fs::read_to_string(&deck).expect("read"));
    let (_, found) = client.findings(&uri(&deck), 1);
    assert!(!codes(&found).contains(&"unknown-name".to_string()), "{found}");
    client.open(&uri(&shared), 1, "given\n    height = 1 m\n");
    client.findings(&uri(&deck), 1);
    client.change(&uri(&shared), 2, json!([{"range": {"start": place(1, 4), "end": place(1, 10)}, "text": "depth"}]));
    let (_, found) = client.findings(&uri(&deck), 1);
    assert!(codes(&found).contains(&"unknown-name".to_string()), "{found}");
    // Closed, it counts as it is on disk.
    client.close(&uri(&shared));
    let (_, found) = client.findings(&uri(&deck), 1);
    assert!(!codes(&found).contains(&"unknown-name".to_string()), "{found}");
    // And so it does when the disk changes, and is said to.
    std::fs::write(&shared, "given\n    width = 1 m\n").expect("written");
    client.notify("workspace/didChangeWatchedFiles", json!({"changes": [{"uri": uri(&shared), "type": 2}]}));
    let (_, found) = client.findings(&uri(&deck), 1);
    assert!(codes(&found).contains(&"unknown-name".to_string()), "{found}");
    client.leave();
    std::fs::remove_dir_all(folder).expect("removed");
}

#[test]
fn the_decks_of_a_folder_are_checked_with_progress_and_cleared_when_deleted() {
    let folder = folder("folder");
    for number in 0..30 {
        let unit = if number == 17 { "furlongs_of_old" } else { "m" };
        std::fs::write(folder.join(format!("{number:02}.buoy")), format!("given\n    a = 1 {unit}\n"))
            .expect("written");
    }
    let mut client = Client::initialized(json!({
        "workspaceFolders": [{"uri": uri(&folder), "name": "decks"}],
        "capabilities": {"window": {"workDoneProgress": true}}
    }));
    let (_, create) = client.wait("progress", |message| message["method"] == "window/workDoneProgress/create");
    client.send(&json!({"jsonrpc": "2.0", "id": create["id"], "result": null}));
    let faulty = uri(&folder.join("17.buoy"));
    let found = client.any_findings(&faulty);
    assert!(codes(&found).contains(&"unknown-unit".to_string()), "{found}");
    let token = create["params"]["token"].clone();
    let progress = |kind: &'static str| {
        let token = token.clone();
        move |message: &Value| {
            message["method"] == "$/progress"
                && message["params"]["token"] == token
                && message["params"]["value"]["kind"] == kind
        }
    };
    let (began, _) = client.wait("the beginning", progress("begin"));
    let (ended, _) = client.wait("the end", progress("end"));
    assert!(began <= ended);
    std::fs::remove_file(folder.join("17.buoy")).expect("removed");
    client.notify("workspace/didChangeWatchedFiles", json!({"changes": [{"uri": faulty, "type": 3}]}));
    assert_eq!(client.any_findings(&faulty), json!([]));
    let gone = json!({"event": {"added": [], "removed": [{"uri": uri(&folder), "name": "decks"}]}});
    client.notify("workspace/didChangeWorkspaceFolders", gone);
    assert_eq!(client.any_findings(&uri(&folder.join("03.buoy"))), json!([]));
    client.leave();
    std::fs::remove_dir_all(folder).expect("removed");
}

#[test]
fn settings_count_from_the_start_and_when_they_change() {
    let mut client = Client::initialized(json!({"initializationOptions": {"gate": "error"}}));
    client.open(URI, 1, "case \"x\"\ngiven\n    height = 1 m\n");
    let (_, found) = client.findings(URI, 1);
    assert!(!codes(&found).contains(&"unused-name".to_string()), "{found}");
    client.notify("workspace/didChangeConfiguration", json!({"settings": {"deckline": {"gate": "hint"}}}));
    let (_, found) = client.findings(URI, 1);
    let unused = found.as_array().expect("a list").iter().find(|finding| finding["code"] == "unused-name");
    assert_eq!(unused.expect("a finding")["tags"], json!([1]));
    client.leave();
}

#[test]
fn positions_count_as_agreed() {
    // In front of the unit stand α (2 bytes, 1 unit) and 🌡 (4 bytes, 2 units).
    let text = "given\r\n    α = 1 m \"🌡\"\r\n    b = α + 1 furlongs_of_old";
    for (offered, chosen) in
        [(json!(["utf-8", "utf-16"]), "utf-8"), (json!(["utf-16"]), "utf-16"), (Value::Null, "utf-16")]
    {
        let mut client = Client::start();
        let capabilities = json!({"general": {"positionEncodings": offered}});
        let id =
            client.request("initialize", json!({"processId": null, "rootUri": null, "capabilities": capabilities}));
        assert_eq!(client.answer(id)["result"]["capabilities"]["positionEncoding"], chosen);
        client.notify("initialized", json!({}));
        client.open(URI, 1, text);
        let (_, found) = client.findings(URI, 1);
        let unit = found.as_array().expect("a list").iter().find(|finding| finding["code"] == "unknown-unit");
        let extra = u64::from(chosen == "utf-8");
        assert_eq!(
            unit.expect("a finding")["range"],
            json!({"start": place(2, 14 + extra), "end": place(2, 29 + extra)})
        );
        client.leave();
    }
}

#[test]
fn the_process_ends_with_its_client_however_it_leaves() {
    // `exit` while the pipe stays open.
    let mut client = Client::initialized(json!({}));
    let id = client.request("shutdown", Value::Null);
    client.answer(id);
    client.notify("exit", Value::Null);
    assert_eq!(client.ended_within(PATIENCE).and_then(|status| status.code()), Some(0));
    // Without a word before, it is status 1.
    let mut client = Client::initialized(json!({}));
    client.notify("exit", Value::Null);
    assert_eq!(client.ended_within(PATIENCE).and_then(|status| status.code()), Some(1));
    // A closed pipe, before and after the first message.
    for mut client in [Client::start(), Client::initialized(json!({}))] {
        client.stdin = None;
        assert_eq!(client.ended_within(PATIENCE).and_then(|status| status.code()), Some(0));
    }
    // A client whose process is gone while something holds the pipe open.
    let mut gone = std::process::Command::new("sleep").arg("0.3").spawn().expect("a process");
    let mut client = Client::initialized(json!({"processId": gone.id()}));
    gone.wait().expect("its end");
    assert!(client.ended_within(Duration::from_secs(20)).is_some());
}

#[test]
fn what_follows_before_the_answer_to_initialize_is_not_lost() {
    let mut client = Client::start();
    client.request("initialize", json!({"processId": null, "rootUri": null, "capabilities": {}}));
    client.notify("initialized", json!({}));
    client.open(URI, 1, FAULTY);
    client.findings(URI, 1);
    client.leave();
}

#[test]
fn unknown_and_broken_messages_are_answered_and_harm_nothing() {
    let mut client = Client::start();
    let early = client.request("textDocument/hover", json!({}));
    assert_eq!(client.answer(early)["error"]["code"], -32002);
    let id = client.request("initialize", json!({"processId": null, "rootUri": null, "capabilities": {}}));
    client.answer(id);
    client.notify("initialized", json!({}));
    let again = client.request("initialize", json!({"processId": null, "rootUri": null, "capabilities": {}}));
    assert!(client.answer(again)["error"].is_object());
    for body in ["", "{", "[]", "3", "null", "{}", "{\"jsonrpc\":\"2.0\"}", "\u{0}", "\"α", &"[".repeat(100_000)] {
        client.send_raw(format!("Content-Length: {}\r\n\r\n{body}", body.len()).as_bytes());
        let (_, answer) =
            client.wait("an answer to nothing", |message| message["id"].is_null() && message.get("error").is_some());
        assert!(answer["error"]["code"].is_number(), "{answer}");
    }
    client.send_raw(b"Content-Length: 4\r\n\r\n\xff\xfe\xff\xfe");
    client.wait("an answer to no text", |message| message["error"]["code"] == -32700);
    client.notify("textDocument/didChange", json!({"nonsense": true}));
    client.notify("textDocument/didOpen", json!([1, 2, 3]));
    client.notify("deckline/noSuchThing", json!(null));
    client.notify("$/noSuchThing", json!({}));
    client.change("file:///never/opened.buoy", 3, json!([{"text": "x"}]));
    client.close("file:///never/opened.buoy");
    client.send(&json!({"jsonrpc": "2.0", "id": 99, "result": "an answer to nothing"}));
    client.notify("$/cancelRequest", json!({"id": 12345}));
    let unknown = client.request("deckline/noSuchThing", json!({}));
    assert_eq!(client.answer(unknown)["error"]["code"], -32601);
    let wrong = client.request("textDocument/hover", json!({"textDocument": 3}));
    assert_eq!(client.answer(wrong)["error"]["code"], -32602);
    client.open(URI, 1, FAULTY);
    client.findings(URI, 1);
    client.leave();
}

#[test]
fn a_stream_that_holds_no_messages_ends_the_server_cleanly() {
    for stream in [
        &b"Content-Length: 99999999999\r\n\r\n"[..],
        b"Content-Length: 18446744073709551615\r\n\r\n{}",
        b"GET / HTTP/1.1\r\n\r\n",
        b"hello\n\n",
        &[0_u8; 5000],
    ] {
        let mut client = Client::start();
        client.send_raw(stream);
        assert_eq!(client.ended_within(PATIENCE).and_then(|status| status.code()), Some(1));
    }
}

#[test]
fn huge_and_binary_documents_are_told_of_and_harm_nothing() {
    let mut client = Client::initialized(json!({}));
    client.open(URI, 1, &"#\n".repeat(5 * 1024 * 1024));
    let (_, found) = client.findings(URI, 1);
    assert!(found[0]["message"].as_str().is_some_and(|message| message.contains("8 MiB")), "{found}");
    let binary: String = (0..20_000_u32).filter_map(|code| char::from_u32(code * 7 % 0x11_0000)).collect();
    client.open("untitled:Untitled-1", 1, &binary);
    client.findings("untitled:Untitled-1", 1);
    client.open("untitled:Untitled-2", 1, &format!("require\n    {} < 1\n", "(".repeat(20_000)));
    client.findings("untitled:Untitled-2", 1);
    client.leave();
}
