//! Sets aside what waivers cover.

use super::{waiver_expired, waiver_idle};
use crate::case::model::{Case, Waiver};
use crate::syntax::Finding;

/// The findings with those that a waiver in force covers marked as waived (by its reason), and a finding for every waiver
/// that is past its last day or covers nothing. `today` is a day as `2027-03-01`, as are the waivers' own: such days are in
/// order as texts.
///
/// A waiver `of` a name covers the findings about the entity of that name; `of case` and no name cover every one. A waiver
/// never covers a finding about waivers.
pub fn apply_waivers(case: &Case, mut findings: Vec<Finding>, today: &str) -> Vec<Finding> {
    let mut about_waivers = Vec::new();
    for waiver in &case.waivers {
        let covered: Vec<&mut Finding> = findings.iter_mut().filter(|finding| covers(waiver, finding)).collect();
        if is_past(waiver, today) {
            about_waivers.push(waiver_expired::finding(waiver, covered.len(), today));
            continue;
        }
        // A check that does not exist is reported where the name is read.
        if covered.is_empty() && crate::checks::find(&waiver.check.text).is_some() {
            about_waivers.push(waiver_idle::finding(waiver));
        }
        for finding in covered {
            let reason = waiver.because.as_ref().map_or("no reason given", |reason| &reason.text);
            finding.waived.get_or_insert_with(|| reason.to_string());
        }
    }
    findings.extend(crate::checks::at_practice_level(about_waivers, &case.practice));
    findings
}

fn covers(waiver: &Waiver, finding: &Finding) -> bool {
    let is_meant = match &waiver.of {
        None => true,
        Some(of) => &*of.text == "case" || *of.text == *finding.subject,
    };
    finding.check == &*waiver.check.text && is_meant
}

fn is_past(waiver: &Waiver, today: &str) -> bool {
    waiver.until.as_ref().is_some_and(|until| &*until.text < today)
}

#[cfg(test)]
mod tests {
    use crate::testing::{expect_of, findings};

    const ROOM: &str = r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a
boundary one of room
    side         west
    wall
boundary two of room
    side         east
    wall
"##;

    fn waived(waiver: &str) -> Vec<(String, Option<String>)> {
        findings(&format!("{ROOM}{waiver}"))
            .into_iter()
            .filter(|finding| finding.check == "no-heat-condition")
            .map(|finding| (finding.subject, finding.waived))
            .collect()
    }

    #[test]
    fn a_waiver_covers_what_it_names() {
        let of_one = waived("waive no-heat-condition of one\n    because \"Later.\" until 2027-01-01\n");
        assert_eq!(of_one, [("one".into(), Some("Later.".into())), ("two".into(), None)]);
    }

    #[test]
    fn a_waiver_without_a_name_covers_all() {
        for waiver in ["waive no-heat-condition", "waive no-heat-condition of case"] {
            let all = waived(&format!("{waiver}\n    because \"Later.\"\n"));
            assert!(all.len() == 2 && all.iter().all(|(_, waived)| waived.as_deref() == Some("Later.")), "{all:?}");
        }
    }

    #[test]
    fn the_last_day_counts() {
        let on = |day: &str| waived(&format!("waive no-heat-condition\n    because \"Later.\" until {day}\n"));
        assert!(on(crate::testing::TODAY).iter().all(|(_, waived)| waived.is_some()));
        assert!(on("2026-11-30").iter().all(|(_, waived)| waived.is_none()));
    }

    #[test]
    fn waivers_that_are_past_or_idle() {
        expect_of(
            "waiver-expired",
            &format!(
                "{ROOM}{}",
                r##"
waive no-heat-condition of one
    because "Later." until 2026-11-30  #! waiver-expired "the finding that it covered counts again"
waive no-heat-condition of two
    because "Later." until 2026-12-01
"##
            ),
        );
        expect_of(
            "waiver-idle",
            &format!(
                "{ROOM}{}",
                r##"
waive no-heat-condition of room  #! waiver-idle "of `room`"
    because "Later." until 2026-12-02
waive no-heat-condition of two
    because "Later."
"##
            ),
        );
    }
}
