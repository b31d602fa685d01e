//! What a check, or reading a deck, has to say: plain data, made anywhere, shown by `report` and `server`.

use super::span::{FileId, Place, Span};
use serde::Serialize;

/// How much a finding matters, the mildest first.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug, Serialize)]
#[serde(rename_all = "lowercase")]
pub enum Level {
    /// Worth knowing; nothing is wrong.
    Hint,
    /// A fact that bears on the result.
    Information,
    /// Probably wrong, or past a limit that practice holds.
    Warning,
    /// Wrong: the case as written is not the case that is meant, or cannot be solved.
    Error,
}

impl Level {
    /// All levels, the mildest first.
    pub const ALL: [Level; 4] = [Level::Hint, Level::Information, Level::Warning, Level::Error];

    /// The word for the level, as decks and options spell it.
    pub const fn word(self) -> &'static str {
        match self {
            Level::Hint => "hint",
            Level::Information => "information",
            Level::Warning => "warning",
            Level::Error => "error",
        }
    }

    /// The level that a word names.
    pub fn from_word(word: &str) -> Option<Level> {
        Level::ALL.into_iter().find(|level| level.word() == word)
    }

    /// One level milder; a hint stays a hint.
    pub const fn milder(self) -> Level {
        match self {
            Level::Error => Level::Warning,
            Level::Warning => Level::Information,
            Level::Information | Level::Hint => Level::Hint,
        }
    }
}

/// A change of text: the bytes of `span` become `text`.
#[derive(Clone, PartialEq, Eq, Debug, Serialize)]
pub struct Edit {
    /// Which file.
    pub file: FileId,
    /// What is replaced; empty for an insertion.
    pub span: Span,
    /// What stands there afterwards.
    pub text: String,
}

/// A remedy that can be carried out by changing text.
#[derive(Clone, PartialEq, Eq, Debug, Serialize)]
pub struct Fix {
    /// What it does, as a short imperative.
    pub title: String,
    /// The changes, none overlapping another.
    pub edits: Vec<Edit>,
    /// Whether it is certain to be what was meant, so that it may be applied without looking.
    pub sure: bool,
}

/// A weighed number with the limit it was held against.
#[derive(Clone, PartialEq, Debug, Serialize)]
pub struct Margin {
    /// What is weighed, by its symbol: "αΔT".
    pub quantity: String,
    /// Its value; dimensionless, or in the unit of `unit`.
    pub value: f64,
    /// The limit that the level of the finding rests on.
    pub limit: f64,
    /// Lowest and highest value, where an estimate stands behind it.
    pub band: Option<(f64, f64)>,
    /// The unit of value, limit and band; empty for a pure number.
    pub unit: String,
}

/// Another place that a finding speaks of.
#[derive(Clone, PartialEq, Eq, Debug, Serialize)]
pub struct Related {
    /// Where.
    pub place: Place,
    /// What about it.
    pub message: String,
}

/// One thing to say about one place in a deck.
#[derive(Clone, PartialEq, Debug, Serialize)]
pub struct Finding {
    /// The name of the check, as `deckline basis` lists it.
    pub check: &'static str,
    /// How much it matters.
    pub level: Level,
    /// Where in the deck.
    pub place: Place,
    /// What is wrong, in the case's own numbers. One sentence or two, no final advice.
    pub message: String,
    /// What would put it right, in words; empty where nothing is sure.
    pub remedy: String,
    /// Remedies as changes of text.
    pub fixes: Vec<Fix>,
    /// Other places that belong to it.
    pub related: Vec<Related>,
    /// The number and its limit, where the finding weighs one.
    pub margin: Option<Margin>,
    /// The entity it is about ("cabinet"), which a waiver names; empty for the deck as a whole.
    pub subject: String,
    /// Whether the text at the place has no use and may be shown faded.
    pub unnecessary: bool,
    /// In a sweep: at how many of how many points, and the first of them in words.
    pub points: Option<SweepPoints>,
    /// Why it does not count, where a waiver covers it.
    pub waived: Option<String>,
}

/// At which points of a sweep a finding holds.
#[derive(Clone, PartialEq, Eq, Debug, Serialize)]
pub struct SweepPoints {
    /// How many points have the finding.
    pub count: usize,
    /// How many points there are.
    pub total: usize,
    /// The first of them: "T_hot = 60 degC".
    pub first: String,
}

impl Finding {
    /// A finding with the given essentials and nothing else.
    pub fn new(check: &'static str, level: Level, place: Place, message: impl Into<String>) -> Finding {
        Finding {
            check,
            level,
            place,
            message: message.into(),
            remedy: String::new(),
            fixes: Vec::new(),
            related: Vec::new(),
            margin: None,
            subject: String::new(),
            unnecessary: false,
            points: None,
            waived: None,
        }
    }

    /// The same with advice in words.
    pub fn remedy(mut self, remedy: impl Into<String>) -> Finding {
        self.remedy = remedy.into();
        self
    }

    /// The same with a further place.
    pub fn related(mut self, place: Place, message: impl Into<String>) -> Finding {
        self.related.push(Related { place, message: message.into() });
        self
    }

    /// The same with the entity that it is about.
    pub fn about(mut self, subject: impl Into<String>) -> Finding {
        self.subject = subject.into();
        self
    }

    /// The same with a weighed number.
    pub fn weighing(mut self, margin: Margin) -> Finding {
        self.margin = Some(margin);
        self
    }

    /// The same with a remedy that replaces `span` of the finding's own file. `sure` says that it is certain.
    pub fn fix(mut self, title: impl Into<String>, span: Span, text: impl Into<String>, sure: bool) -> Finding {
        let edits = vec![Edit { file: self.place.file, span, text: text.into() }];
        self.fixes.push(Fix { title: title.into(), edits, sure });
        self
    }
}
