//! Text to tree: the grammar's glue, places, findings, and the layout of a deck.
//!
//! Parsing never fails. It gives a tree that covers every byte and notes what it could not read.

pub mod change;
pub mod cut;
pub mod expression;
pub mod finding;
pub mod layout;
pub mod limits;
pub mod links;
pub mod parse;
pub mod span;
pub mod tokens;
pub mod tree;
pub mod unreadable;

pub use finding::{Edit, Finding, Fix, Level, Margin, Related, SweepPoints};
pub use parse::{parse, parse_again};
pub use span::{FileId, Place, Span};
