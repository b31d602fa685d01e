//! deckline checks decks of buoyancy-driven flow before they run.
//!
//! A deck is plain text in the language Buoy. It flows one way: text, tree (`syntax`), case (`case`), physics
//! (`substances`, `physics`), findings (`checks`), a face (`report`, `ide`, `server`, `command`).

// A test that fails should fail loudly; the lints keep panics out of everything else.
#![cfg_attr(test, allow(clippy::unwrap_used, clippy::expect_used, clippy::panic))]

pub mod case;
pub mod checks;
pub mod command;
pub mod ide;
pub mod physics;
pub mod quantity;
pub mod report;
pub mod server;
pub mod substances;
pub mod syntax;
#[doc(hidden)]
pub mod testing;
pub mod vocabulary;
pub mod workspace;
