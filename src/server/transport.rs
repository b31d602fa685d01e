//! Messages on a byte stream: `Content-Length: 42`, an empty line, 42 bytes of JSON.
//!
//! The framework's own reader believes any length that is sent, stops for good at the first message that is no JSON, and
//! reads on behind `exit` until the stream closes. This one has limits, tells broken messages from a broken stream, and
//! leaves the reading to whoever calls it.

use std::io::{self, BufRead, Read, Write};

/// Largest message that is read, in bytes: eight times the largest deck, for what JSON makes of it.
pub const MESSAGE_BYTES: usize = 64 * 1024 * 1024;
/// Longest line of a header, in bytes.
const HEADER_LINE_BYTES: u64 = 4096;
/// Most lines of a header.
const HEADER_LINES: usize = 32;

/// The body of the next message; `None` where the stream ends between two messages.
///
/// # Errors
/// Where the stream fails, ends inside a message, or what it holds is no message: then nothing behind it can be
/// trusted either.
pub fn read_message(input: &mut impl BufRead) -> io::Result<Option<Vec<u8>>> {
    let Some(length) = read_header(input)? else { return Ok(None) };
    // Grows as bytes come in, so a length alone takes no memory.
    let mut body = Vec::with_capacity(length.min(1024 * 1024));
    let read = input.take(length as u64).read_to_end(&mut body)?;
    if read < length { Err(io::ErrorKind::UnexpectedEof.into()) } else { Ok(Some(body)) }
}

fn read_header(input: &mut impl BufRead) -> io::Result<Option<usize>> {
    let mut length = None;
    for index in 0..HEADER_LINES {
        let mut line = Vec::new();
        input.by_ref().take(HEADER_LINE_BYTES).read_until(b'\n', &mut line)?;
        if line.is_empty() && index == 0 {
            return Ok(None);
        }
        let Some(line) = line.strip_suffix(b"\n").map(|line| line.strip_suffix(b"\r").unwrap_or(line)) else {
            return Err(broken("a line of a header does not end"));
        };
        if line.is_empty() {
            return match length {
                Some(length) => Ok(Some(length)),
                None => Err(broken("a header states no `Content-Length`")),
            };
        }
        let line = std::str::from_utf8(line).map_err(|_| broken("a header is no text"))?;
        let Some((name, value)) = line.split_once(':') else { return Err(broken("a line of a header has no colon")) };
        if name.trim().eq_ignore_ascii_case("content-length") {
            let stated: usize = value.trim().parse().map_err(|_| broken("`Content-Length` is no number"))?;
            if stated > MESSAGE_BYTES {
                return Err(broken("a message is longer than any that is read"));
            }
            length = Some(stated);
        }
    }
    Err(broken("a header does not end"))
}

fn broken(message: &str) -> io::Error {
    io::Error::new(io::ErrorKind::InvalidData, message)
}

/// Writes a message with its header, and no sooner returns than it is under way.
///
/// # Errors
/// Where the stream fails.
pub fn write_message(output: &mut impl Write, body: &[u8]) -> io::Result<()> {
    // One write: two would be two packets to a client that polls.
    let mut message = format!("Content-Length: {}\r\n\r\n", body.len()).into_bytes();
    message.extend_from_slice(body);
    output.write_all(&message)?;
    output.flush()
}

#[cfg(test)]
mod tests {
    use super::*;

    fn all(mut stream: &[u8]) -> Result<Vec<String>, String> {
        let mut bodies = Vec::new();
        while let Some(body) = read_message(&mut stream).map_err(|error| error.to_string())? {
            bodies.push(String::from_utf8(body).expect("text"));
        }
        Ok(bodies)
    }

    #[test]
    fn what_is_written_is_read() {
        let mut stream = Vec::new();
        for body in ["{}", "", "{\"a\":\"α\"}"] {
            write_message(&mut stream, body.as_bytes()).expect("written");
        }
        assert_eq!(all(&stream), Ok(vec!["{}".into(), String::new(), "{\"a\":\"α\"}".into()]));
    }

    #[test]
    fn other_headers_and_bare_line_feeds_are_read_over() {
        let stream = b"Content-Type: application/vscode-jsonrpc; charset=utf-8\r\ncontent-length: 2\n\r\n{}";
        assert_eq!(all(stream), Ok(vec!["{}".into()]));
    }

    #[test]
    fn a_length_that_no_message_has_is_refused_before_any_memory_is_taken() {
        for length in ["67108865", "18446744073709551615", "99999999999999999999999", "-1", "two"] {
            assert!(all(format!("Content-Length: {length}\r\n\r\n").as_bytes()).is_err(), "{length}");
        }
    }

    #[test]
    fn a_stream_that_holds_no_messages_is_refused() {
        let endless_line = [b'a'].repeat(1_000_000);
        let endless_header = b"a: b\r\n".repeat(1000);
        for stream in
            [&b"hello\r\n\r\n"[..], b"\r\n", b"a: b\r\n\r\n", b"\xff\xfe: 1\r\n\r\n", &endless_line, &endless_header]
        {
            assert!(all(stream).is_err(), "{:?}", stream.get(..20.min(stream.len())));
        }
    }

    #[test]
    fn a_stream_that_ends_inside_a_message_is_refused() {
        assert!(all(b"Content-Length: 67108864\r\n\r\n{}").is_err());
        assert!(all(b"Content-Le").is_err());
    }
}
