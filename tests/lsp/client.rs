//! A small client of its own making for the tests: it starts the real program, sends messages, and keeps what comes
//! back with the time of its coming.
#![allow(dead_code, clippy::unwrap_used, clippy::expect_used, clippy::panic)]

use serde_json::{Value, json};
use std::collections::VecDeque;
use std::io::{BufRead, BufReader, Write};
use std::process::{Child, ChildStdin, Command, ExitStatus, Stdio};
use std::sync::mpsc::{Receiver, channel};
use std::time::{Duration, Instant};

/// How long anything is waited for before the test fails.
pub const PATIENCE: Duration = Duration::from_secs(60);

/// A running server and the client's side of it.
pub struct Client {
    pub child: Child,
    pub stdin: Option<ChildStdin>,
    incoming: Receiver<(Instant, Value)>,
    /// What came while something else was waited for.
    kept: VecDeque<(Instant, Value)>,
    next_id: i64,
}

impl Client {
    /// Starts a server and says nothing to it.
    pub fn start() -> Client {
        let mut child = Command::new(env!("CARGO_BIN_EXE_deckline"))
            .arg("serve")
            .stdin(Stdio::piped())
            .stdout(Stdio::piped())
            .stderr(Stdio::inherit())
            .spawn()
            .expect("the program starts");
        let mut output = BufReader::new(child.stdout.take().expect("its output"));
        let (sender, incoming) = channel();
        std::thread::spawn(move || {
            while let Some(body) = read_message(&mut output) {
                let value = serde_json::from_slice(&body).expect("the server sends JSON");
                if sender.send((Instant::now(), value)).is_err() {
                    return;
                }
            }
        });
        let stdin = child.stdin.take();
        Client { child, stdin, incoming, kept: VecDeque::new(), next_id: 1 }
    }

    /// Starts a server and initializes it with these parameters on top of the least ones.
    pub fn initialized(more: Value) -> Client {
        let mut client = Client::start();
        let mut params = json!({"processId": null, "rootUri": null, "capabilities": {}});
        for (key, value) in more.as_object().expect("an object") {
            params[key] = value.clone();
        }
        let id = client.request("initialize", params);
        let answer = client.answer(id);
        assert!(answer["result"]["capabilities"].is_object(), "{answer}");
        client.notify("initialized", json!({}));
        client
    }

    /// Sends these bytes, without a header of their own.
    pub fn send_raw(&mut self, bytes: &[u8]) {
        let stdin = self.stdin.as_mut().expect("an open pipe");
        // A server that has ended on purpose closes the pipe.
        let _ = stdin.write_all(bytes);
        let _ = stdin.flush();
    }

    pub fn send(&mut self, message: &Value) {
        let body = message.to_string();
        self.send_raw(format!("Content-Length: {}\r\n\r\n{body}", body.len()).as_bytes());
    }

    pub fn notify(&mut self, method: &str, params: Value) {
        self.send(&json!({"jsonrpc": "2.0", "method": method, "params": params}));
    }

    pub fn request(&mut self, method: &str, params: Value) -> i64 {
        let id = self.next_id;
        self.next_id += 1;
        self.send(&json!({"jsonrpc": "2.0", "id": id, "method": method, "params": params}));
        id
    }

    /// The first message, of those that came and those that will, that is wanted.
    pub fn wait(&mut self, what: &str, wanted: impl Fn(&Value) -> bool) -> (Instant, Value) {
        if let Some(index) = self.kept.iter().position(|(_, message)| wanted(message)) {
            return self.kept.remove(index).expect("kept");
        }
        let until = Instant::now() + PATIENCE;
        loop {
            let left = until.saturating_duration_since(Instant::now());
            match self.incoming.recv_timeout(left) {
                Ok((at, message)) if wanted(&message) => return (at, message),
                Ok(other) => self.kept.push_back(other),
                Err(_) => panic!("{what} did not come; came: {:?}", self.kept.iter().rev().take(5).collect::<Vec<_>>()),
            }
        }
    }

    pub fn answer(&mut self, id: i64) -> Value {
        self.wait(&format!("the answer to {id}"), |message| message["id"] == id && message.get("method").is_none()).1
    }

    /// Asks, and gives the result.
    pub fn ask(&mut self, method: &str, params: Value) -> Value {
        let id = self.request(method, params);
        let answer = self.answer(id);
        assert!(answer.get("error").is_none(), "{method}: {answer}");
        answer["result"].clone()
    }

    /// The findings pushed for a version of a document.
    pub fn findings(&mut self, uri: &str, version: i64) -> (Instant, Value) {
        let (at, message) = self.wait(&format!("findings of {uri}, version {version}"), |message| {
            message["method"] == "textDocument/publishDiagnostics"
                && message["params"]["uri"] == uri
                && message["params"]["version"] == version
        });
        (at, message["params"]["diagnostics"].clone())
    }

    /// The next findings pushed for a document, of any version.
    pub fn any_findings(&mut self, uri: &str) -> Value {
        let (_, message) = self.wait(&format!("findings of {uri}"), |message| {
            message["method"] == "textDocument/publishDiagnostics" && message["params"]["uri"] == uri
        });
        message["params"]["diagnostics"].clone()
    }

    pub fn open(&mut self, uri: &str, version: i64, text: &str) {
        let document = json!({"uri": uri, "languageId": "buoy", "version": version, "text": text});
        self.notify("textDocument/didOpen", json!({"textDocument": document}));
    }

    pub fn change(&mut self, uri: &str, version: i64, changes: Value) {
        let document = json!({"uri": uri, "version": version});
        self.notify("textDocument/didChange", json!({"textDocument": document, "contentChanges": changes}));
    }

    pub fn close(&mut self, uri: &str) {
        self.notify("textDocument/didClose", json!({"textDocument": {"uri": uri}}));
    }

    /// Waits for the server to end by itself.
    pub fn ended_within(&mut self, patience: Duration) -> Option<ExitStatus> {
        let until = Instant::now() + patience;
        while Instant::now() < until {
            if let Some(status) = self.child.try_wait().expect("its state") {
                return Some(status);
            }
            std::thread::sleep(Duration::from_millis(5));
        }
        None
    }

    /// Takes the usual leave.
    pub fn leave(mut self) {
        let id = self.request("shutdown", Value::Null);
        assert!(self.answer(id).get("error").is_none());
        self.notify("exit", Value::Null);
        let status = self.ended_within(PATIENCE).expect("the server ends");
        assert!(status.success(), "{status}");
    }
}

impl Drop for Client {
    fn drop(&mut self) {
        // Only a failed test leaves one behind.
        let _ = self.child.kill();
        let _ = self.child.wait();
    }
}

fn read_message(output: &mut impl BufRead) -> Option<Vec<u8>> {
    let mut length = None;
    loop {
        let mut line = String::new();
        if output.read_line(&mut line).ok()? == 0 {
            return None;
        }
        match line.trim_end() {
            "" => break,
            header => {
                if let Some(value) = header.strip_prefix("Content-Length: ") {
                    length = Some(value.parse().expect("a length"));
                }
            }
        }
    }
    let mut body = vec![0; length.expect("a length")];
    output.read_exact(&mut body).ok()?;
    Some(body)
}
