//! What the client sets: by `initializationOptions`, or later by `workspace/didChangeConfiguration`.
//!
//! ```json
//! { "gate": "information", "practice": "rules/practice.buoy", "hints": true }
//! ```
//!
//! They may also stand one level down, under `deckline`. What is absent or makes no sense keeps its default.

use crate::syntax::Level;
use serde_json::Value;
use std::path::{Path, PathBuf};

/// The settings.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Settings {
    /// The mildest level that is shown.
    pub gate: Level,
    /// House rules to use in place of those found beside or above a deck; counted from the first folder where relative.
    pub practice: Option<PathBuf>,
    /// Whether values are shown between the words of a deck.
    pub hints: bool,
}

impl Default for Settings {
    fn default() -> Settings {
        Settings { gate: Level::Hint, practice: None, hints: true }
    }
}

impl Settings {
    /// The settings in what a client sent.
    pub fn from_value(value: &Value, first_folder: Option<&Path>) -> Settings {
        let value = value.get("deckline").unwrap_or(value);
        let default = Settings::default();
        let practice = value.get("practice").and_then(Value::as_str).filter(|path| !path.is_empty()).map(PathBuf::from);
        Settings {
            gate: value.get("gate").and_then(Value::as_str).and_then(Level::from_word).unwrap_or(default.gate),
            practice: practice.map(|path| first_folder.map_or_else(|| path.clone(), |folder| folder.join(&path))),
            hints: value.get("hints").and_then(Value::as_bool).unwrap_or(default.hints),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use serde_json::json;

    #[test]
    fn settings_are_taken_where_they_make_sense() {
        let read = |value| Settings::from_value(&value, Some(Path::new("/project")));
        assert_eq!(read(json!(null)), Settings::default());
        assert_eq!(read(json!({"gate": 3, "hints": "no", "practice": ""})), Settings::default());
        let all = Settings { gate: Level::Warning, practice: Some("/project/rules.buoy".into()), hints: false };
        assert_eq!(read(json!({"gate": "warning", "hints": false, "practice": "rules.buoy"})), all);
        assert_eq!(read(json!({"deckline": {"gate": "warning", "hints": false, "practice": "rules.buoy"}})), all);
    }
}
