//! `waiver-idle`: a waiver that covers no finding.

use crate::case::model::Waiver;
use crate::checks::check::{Basis, Check, Family};
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "waiver-idle",
    family: Family::Record,
    limits: &[],
    level: Level::Information,
    basis: Basis {
        compares: "Looks for waivers that cover no finding.",
        formula: "",
        source: "common practice: a concession that nothing needs hides the next fault of its kind",
        remedy: "Leave the waiver out.",
    },
    run: None, // found where waivers are applied
};

/// A waiver that covers nothing.
pub fn finding(waiver: &Waiver) -> Finding {
    let of = waiver.of.as_ref().map(|of| format!(" of `{}`", of.text)).unwrap_or_default();
    let message = format!("There is no finding of `{}`{of} to waive.", waiver.check.text);
    let subject = waiver.of.as_ref().map(|of| of.text.to_string()).unwrap_or_default();
    let mut finding =
        Finding::new(CHECK.name, CHECK.level, waiver.place, message).about(subject).remedy("leave the waiver out");
    finding.unnecessary = true;
    finding
}
