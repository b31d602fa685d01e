//! The built-in substances, read once from `data/*.buoy`.

use crate::case::model::Substance;
use std::sync::LazyLock;

static LIBRARY: LazyLock<Vec<Substance>> = LazyLock::new(Vec::new);

/// Every built-in substance, by name.
pub fn library() -> &'static [Substance] {
    &LIBRARY
}

/// The built-in substance of a name.
pub fn find(name: &str) -> Option<&'static Substance> {
    LIBRARY.iter().find(|substance| &*substance.name.text == name)
}
