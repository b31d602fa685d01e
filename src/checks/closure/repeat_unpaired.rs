//! `repeat-unpaired`: a repeating face whose partner does not fit it.

use super::parts::{Role, role};
use super::sides::{covered_by, word};
use crate::case::model::{Boundary, BoundaryKind, Side};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::region_of;
use crate::physics::geometry::area_of;
use crate::syntax::{Edit, Finding, Fix, Level, Place, Span};

/// The check.
pub const CHECK: Check = Check {
    name: "repeat-unpaired",
    family: Family::Closure,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Holds each repeating face against its partner: of the same region, naming it back, on the opposite side, as large.",
        formula: "",
        source: "common practice: a flow that repeats is mapped from one face onto the other",
        remedy: "`repeats with` the boundary on the opposite side, which repeats with this one.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let mut findings = Vec::new();
    for boundary in subject.case.boundaries.iter().filter(|boundary| role(boundary) == Role::Repeats) {
        let Some((partner_name, place)) = partner_of(boundary) else { continue };
        // A name that no boundary has is reported where names are read.
        let Some(partner) = subject.case.boundaries.iter().find(|other| *other.name.text == *partner_name) else {
            continue;
        };
        if let Some((message, remedy)) = misfit(subject, boundary, partner) {
            let mut finding = Finding::new(CHECK.name, weighing.level, place, message)
                .about(&*boundary.name.text)
                .remedy(remedy)
                .related(partner.name.place, "the partner");
            finding.fixes.extend(name_back(boundary, partner));
            findings.push(finding);
        }
    }
    findings
}

fn partner_of(boundary: &Boundary) -> Option<(&str, Place)> {
    boundary.kinds.iter().find_map(|(kind, place)| match kind {
        BoundaryKind::Repeats(partner) => Some((&*partner.text, *place)),
        _ => None,
    })
}

fn misfit(subject: &Subject<'_>, boundary: &Boundary, partner: &Boundary) -> Option<(String, String)> {
    let (one, other) = (&boundary.name.text, &partner.name.text);
    if one == other {
        return Some((format!("`{one}` repeats with itself."), "the boundary on the opposite side".into()));
    }
    let (region, _) = region_of(subject, boundary)?;
    if partner.region.as_ref().is_some_and(|of| of.text != region.name.text) {
        let message = format!("`{one}` repeats with `{other}`, which belongs to another region.");
        return Some((message, format!("a boundary of `{}`", region.name.text)));
    }
    if partner_of(partner).is_none_or(|(back, _)| *back != **one) {
        let message = format!("`{one}` repeats with `{other}`, and `{other}` does not repeat with `{one}`.");
        return Some((message, format!("`repeats with {one}` in `{other}`")));
    }
    let (here, there) = (covered_by(subject.case, region, boundary), covered_by(subject.case, region, partner));
    if let ([here], [there]) = (here.as_slice(), there.as_slice())
        && opposite(*here) != Some(*there)
    {
        let message = format!(
            "`{one}` on the side `{}` repeats with `{other}` on the side `{}`, which does not face it.",
            word(*here),
            word(*there)
        );
        let remedy =
            opposite(*here).map_or("sides that face each other".into(), |side| format!("the side `{}`", word(side)));
        return Some((message, remedy));
    }
    let size = |boundary| area_of(subject.case, region, boundary);
    let (here, there) = (size(boundary), size(partner));
    if (here - there).abs() > 0.01 * here.max(there) {
        let message = format!("`{one}` and `{other}` repeat with each other and are not of one size.");
        return Some((message, "the same `patch` or `area` on both".into()));
    }
    None
}

const fn opposite(side: Side) -> Option<Side> {
    Some(match side {
        Side::West => Side::East,
        Side::East => Side::West,
        Side::South => Side::North,
        Side::North => Side::South,
        Side::Bottom => Side::Top,
        Side::Top => Side::Bottom,
        _ => return None,
    })
}

/// Where the partner says nothing of itself yet, it can name this one back.
fn name_back(boundary: &Boundary, partner: &Boundary) -> Option<Fix> {
    let says_nothing = partner.kinds.is_empty() && partner.heat.is_empty();
    let differs = partner.name.text != boundary.name.text;
    let same_region = partner.region.as_ref().map(|of| &of.text) == boundary.region.as_ref().map(|of| &of.text);
    let head = partner.region.as_ref()?.place;
    (says_nothing && differs && same_region).then(|| {
        let statement = format!("repeats with {}", boundary.name.text);
        let at = Span::new(head.span.end, head.span.end);
        let edit = Edit { file: head.file, span: at, text: format!("\n    {statement}") };
        Fix { title: format!("Add `{statement}` to `{}`", partner.name.text), edits: vec![edit], sure: true }
    })
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::{after_fix, expect_of};

    #[test]
    fn pairs_that_do_not_fit() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary one of room
    side west
    repeats with two  #! repeat-unpaired "`two` does not repeat with `one`"
boundary two of room
    side east
    repeats with three  #! repeat-unpaired
boundary three of room
    side south
    repeats with two  #! repeat-unpaired "does not face it"
boundary four of room
    side top
    repeats with four  #! repeat-unpaired "itself"
"##,
        );
    }

    #[test]
    fn a_pair() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary one of room
    side west
    repeats with two
boundary two of room
    side east
    repeats with one
"##,
        );
    }

    #[test]
    fn the_fix_names_it_back() {
        let text = r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary one of room
    side west
    repeats with two
boundary two of room
    side east
"##;
        let mended = r##"
fluid a
    substance    air
    density-law  boussinesq
region room
    box          1 m by 2 m by 3 m
    filled with  a

boundary one of room
    side west
    repeats with two
boundary two of room
    repeats with one
    side east
"##;
        assert_eq!(after_fix(CHECK.name, text), mended);
    }
}
