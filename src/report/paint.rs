//! Colour, and text that is safe to show on a terminal.

use crate::syntax::Level;
use anstyle::{AnsiColor, Style};
use std::fmt;

/// Whether colours are written.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Paint {
    /// Text alone.
    Plain,
    /// With the escape sequences of a terminal.
    Coloured,
}

/// A text in a style.
pub struct Painted<'a> {
    text: &'a str,
    style: Style,
}

impl Paint {
    /// Bold, for headings.
    pub fn strong<'a>(self, text: &'a str) -> Painted<'a> {
        self.with(Style::new().bold(), text)
    }

    /// Faint, for what stands beside.
    pub fn faint<'a>(self, text: &'a str) -> Painted<'a> {
        self.with(Style::new().dimmed(), text)
    }

    /// In the colour of a level.
    pub fn level<'a>(self, level: Level, text: &'a str) -> Painted<'a> {
        self.with(style_of(level).bold(), text)
    }

    /// In the colour of what holds.
    pub fn good<'a>(self, text: &'a str) -> Painted<'a> {
        self.with(AnsiColor::Green.on_default(), text)
    }

    fn with(self, style: Style, text: &str) -> Painted<'_> {
        Painted { text, style: if self == Paint::Coloured { style } else { Style::new() } }
    }
}

fn style_of(level: Level) -> Style {
    match level {
        Level::Error => AnsiColor::Red.on_default(),
        Level::Warning => AnsiColor::Yellow.on_default(),
        Level::Information => AnsiColor::Cyan.on_default(),
        Level::Hint => AnsiColor::Blue.on_default(),
    }
}

impl fmt::Display for Painted<'_> {
    fn fmt(&self, out: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(out, "{}{}{}", self.style.render(), self.text, self.style.render_reset())
    }
}

/// A text on one line, with nothing in it that a terminal would obey: a deck is anybody's text, and what it quotes
/// must not move the cursor, change colours or turn the direction of reading.
pub fn harmless(text: &str) -> String {
    text.chars()
        .map(|character| match character {
            '\n' | '\r' | '\t' => ' ',
            '\u{202a}'..='\u{202e}' | '\u{2066}'..='\u{2069}' | '\u{200e}' | '\u{200f}' | '\u{61c}' => '\u{fffd}',
            '\u{2028}' | '\u{2029}' | '\u{feff}' => '\u{fffd}',
            other if other.is_control() => '\u{fffd}',
            other => other,
        })
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn plain_paint_leaves_no_trace() {
        assert_eq!(Paint::Plain.strong("deck").to_string(), "deck");
        assert_eq!(Paint::Coloured.strong("deck").to_string(), "\u{1b}[1mdeck\u{1b}[0m");
    }

    #[test]
    fn nothing_reaches_the_terminal_that_it_would_obey() {
        let said = harmless("a\u{1b}[2J\r\nb\u{9b}31m\u{202e}c\u{7}");
        assert_eq!(said, "a\u{fffd}[2J  b\u{fffd}31m\u{fffd}c\u{fffd}");
        assert!(!said.chars().any(char::is_control));
        assert_eq!(harmless("αΔT µPa.s 水"), "αΔT µPa.s 水");
    }
}
