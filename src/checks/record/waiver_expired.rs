//! `waiver-expired`: a waiver past its last day, which covers nothing any more.

use crate::case::model::Waiver;
use crate::checks::check::{Basis, Check, Family};
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "waiver-expired",
    family: Family::Record,
    limits: &[],
    level: Level::Warning,
    basis: Basis {
        compares: "Holds the last day of each waiver against today.",
        formula: "",
        source: "common practice: a concession holds for a stated time",
        remedy: "Put the finding right, look at the reason again and set a new day, or leave the waiver out.",
    },
    run: None, // found where waivers are applied
};

/// A waiver that was past its day, and would have covered so many findings.
pub fn finding(waiver: &Waiver, covered: usize, today: &str) -> Finding {
    let (place, until) = waiver.until.as_ref().map_or((waiver.place, ""), |until| (until.place, &*until.text));
    let what = match covered {
        0 => "and would cover nothing".to_string(),
        1 => "so the finding that it covered counts again".to_string(),
        _ => format!("so the {covered} findings that it covered count again"),
    };
    let message = format!("The waiver of `{}` held until {until}, and today is {today}, {what}.", waiver.check.text);
    let subject = waiver.of.as_ref().map(|of| of.text.to_string()).unwrap_or_default();
    Finding::new(CHECK.name, CHECK.level, place, message).about(subject).remedy(if covered == 0 {
        "leave the waiver out"
    } else {
        "put the finding right, or look at the reason again and set a new day"
    })
}
