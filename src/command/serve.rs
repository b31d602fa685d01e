//! `serve`: the language server on standard input and output.

use crate::command::{FOUND, SOUND};

/// Serves until the client leaves. A client that leaves without asking the server to shut down gets status 1, as the
/// protocol has it.
pub fn run() -> u8 {
    match crate::server::serve() {
        Ok(()) => SOUND,
        Err(error) => {
            anstream::eprintln!("deckline serve: {error}");
            FOUND
        }
    }
}
