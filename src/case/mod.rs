//! The resolved case: names, SI values, kinds of temperature, origins.
//!
//! Resolving never fails: it gives a case, in which what could not be worked out is unknown, and findings.

pub mod bind;
pub mod build;
pub mod compiled;
pub mod declare;
pub mod expression;
pub mod index;
pub mod kinds;
pub mod model;
pub mod names;
pub mod resolution;
pub mod substance;
pub mod sweep;

use crate::syntax::FileId;
use crate::syntax::tree::Tree;
pub use bind::Known;
pub use build::Point;
pub use resolution::{Resolution, resolve};

/// A file that takes part in a case.
#[derive(Clone, Copy, Debug)]
pub struct Source<'t> {
    /// Its number.
    pub file: FileId,
    /// Its tree.
    pub tree: &'t Tree,
    /// What it is to the deck.
    pub role: Role,
}

/// What a file is to a deck.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Role {
    /// The deck itself, or a file that it includes.
    Deck,
    /// The house rules.
    Practice,
}
