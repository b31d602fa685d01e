//! The arrangements of heated fluid, as words a deck may use.

use super::rows::Choice;

const fn choice(word: &'static str, description: &'static str) -> Choice {
    Choice { word, description }
}

/// `arrangement`
pub const ARRANGEMENTS: &[Choice] = &[
    choice("side-heated-cavity", "an enclosure whose hot and cold sides stand upright"),
    choice("layer-heated-from-below", "an enclosure with its hot side below its cold one"),
    choice("stable-layer", "an enclosure with its hot side above its cold one"),
    choice("tilted-cavity", "an enclosure whose hot and cold sides are inclined"),
    choice("vertical-plate", "an upright plate in a wide fluid"),
    choice("plate-facing-up", "a horizontal plate whose heated face looks up, or cooled face down"),
    choice("plate-facing-down", "a horizontal plate whose heated face looks down, or cooled face up"),
    choice("inclined-plate", "an inclined plate in a wide fluid"),
    choice("horizontal-cylinder", "a horizontal cylinder in a wide fluid"),
    choice("sphere", "a sphere in a wide fluid"),
    choice("annulus", "the space between two horizontal cylinders"),
    choice("vertical-channel", "two upright plates, open below and above"),
    choice("through-flow", "a space that fluid flows through"),
    choice("uniform-heating", "an enclosure with no hot and cold side: heat inside, or one condition all round"),
];
