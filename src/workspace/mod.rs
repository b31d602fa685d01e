//! Files, includes, practice files, and the pass over a deck from text to findings.

pub mod deck;
