//! `side-twice`: two boundaries on the same part of a region's surface.

use super::sides::{is_partial, names, sides_of, stated_area, word};
use crate::case::model::{Boundary, Case, Region, Side};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{finding_of, listed};
use crate::physics::model::SideGeometry;
use crate::quantity::display::format_si;
use crate::syntax::{Finding, Level, Place};
use crate::vocabulary::statements::AREA;

/// The check.
pub const CHECK: Check = Check {
    name: "side-twice",
    family: Family::Closure,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Looks for a side that two boundaries cover wholly, for patches that together are larger than their side, and for \
                   `remaining` where nothing remains.",
        formula: "",
        source: "common practice: one set of conditions at every point of the surface",
        remedy: "Give each side to one boundary; give a part of it by `patch` or `area`.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let mut findings = Vec::new();
    for region in &subject.case.regions {
        let sides = sides_of(subject.case, region);
        for side in sides.iter().map(|of| of.side).chain([Side::Remaining]) {
            findings.extend(covered_twice(subject.case, region, side, weighing.level));
        }
        findings.extend(sides.iter().filter_map(|side| too_large(subject.case, region, side, weighing.level)));
        findings.extend(nothing_remains(subject.case, region, &sides));
    }
    findings
}

/// A side that one boundary covers wholly, and another as well.
fn covered_twice(case: &Case, region: &Region, side: Side, level: Level) -> Option<Finding> {
    let mut on_it: Vec<(&Boundary, Place)> = case
        .boundaries_of(region)
        .flat_map(|boundary| boundary.sides.iter().map(move |stated| (boundary, stated)))
        .filter(|(_, stated)| stated.value == side)
        .map(|(boundary, stated)| (boundary, stated.place))
        .collect();
    // The whole ones first: a part beside a whole one is too much, parts beside each other are not.
    on_it.sort_by_key(|(boundary, _)| is_partial(boundary) && side != Side::Remaining);
    let [(first, first_place), (second, second_place), ..] = on_it.as_slice() else { return None };
    if is_partial(first) && side != Side::Remaining {
        return None;
    }
    let (one, other) = (&first.name.text, &second.name.text);
    let is_part = is_partial(second) && side != Side::Remaining;
    let message = if one == other {
        format!("`{one}` names the side `{}` twice.", word(side))
    } else if is_part {
        format!(
            "`{other}` is a part of the side `{}` of `{}`, and `{one}` covers all of it.",
            word(side),
            region.name.text
        )
    } else {
        format!("Both {} cover the side `{}` of `{}`.", listed(&[one, other]), word(side), region.name.text)
    };
    let remedy = if is_part {
        format!("`side remaining` for `{one}`")
    } else {
        "give the side to one of them; a part of it is given by `patch` or `area`".into()
    };
    Some(
        Finding::new(CHECK.name, level, *second_place, message)
            .about(&**other)
            .remedy(remedy)
            .related(*first_place, "the other time"),
    )
}

/// Patches that are larger than their side.
fn too_large(case: &Case, region: &Region, side: &SideGeometry, level: Level) -> Option<Finding> {
    // A stated area over several sides cannot be told apart by side.
    let parts: Vec<(&Boundary, f64)> = case
        .boundaries_of(region)
        .filter(|boundary| boundary.sides.len() == 1 && names(boundary, side.side))
        .filter_map(|boundary| Some((boundary, stated_area(boundary)?)))
        .collect();
    let covered: f64 = parts.iter().map(|(_, area)| area).sum();
    let (last, _) = parts.last()?;
    // A hundredth is left to rounding in the deck.
    (covered > 1.01 * side.area).then(|| {
        let names: Vec<&str> = parts.iter().map(|(boundary, _)| &*boundary.name.text).collect();
        let message = format!(
            "{} {} {}, and the side `{}` of `{}` has only {}.",
            listed(&names),
            if names.len() == 1 { "covers" } else { "together cover" },
            format_si(covered, AREA),
            word(side.side),
            region.name.text,
            format_si(side.area, AREA)
        );
        finding_of(CHECK.name, level, &last.name, message).remedy("a smaller `patch` or `area`, or another side")
    })
}

/// `remaining` where the other boundaries cover everything.
fn nothing_remains(case: &Case, region: &Region, sides: &[SideGeometry]) -> Option<Finding> {
    let boundary = case.boundaries_of(region).find(|boundary| names(boundary, Side::Remaining))?;
    let stated = boundary.sides.iter().find(|stated| stated.value == Side::Remaining)?;
    let is_taken =
        |side: &SideGeometry| case.boundaries_of(region).any(|other| names(other, side.side) && !is_partial(other));
    (!sides.is_empty() && sides.iter().all(is_taken)).then(|| {
        let message = format!(
            "Nothing remains for `{}`: other boundaries cover every side of `{}`.",
            boundary.name.text, region.name.text
        );
        Finding::new(CHECK.name, Level::Warning, stated.place, message)
            .about(&*boundary.name.text)
            .remedy("leave the boundary out, or free the sides that it is meant for")
    })
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn twice() {
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
    side west, east
    insulated
boundary two of room
    side east  #! side-twice "Both `one` and `two`"
    insulated
boundary three of room
    side top, top  #! side-twice "twice"
    insulated
"##,
        );
    }

    #[test]
    fn nothing_remains() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance air
region slab
    box 1 m by 2 m
    filled with a
boundary one of slab
    side west, east, bottom, top
    insulated
boundary rest of slab
    side remaining  #! side-twice "Nothing remains"
    insulated
"##,
        );
    }

    #[test]
    fn patches() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance air
region room
    box 1 m by 2 m by 3 m
    filled with a
boundary heater of room
    side west  #! side-twice "`heater` is a part of the side `west`"
    patch 0.2 m by 0.3 m
    held at 40 degC
boundary behind of room
    side west
    insulated
boundary poster of room  #! side-twice "`poster` covers 3.5 m^2, and the side `top` of `room` has only 2 m^2"
    side top
    area 3.5 m^2
    insulated
boundary lamp of room
    side bottom
    patch 0.2 m by 0.3 m
    held at 40 degC
boundary rest of room
    side remaining
    insulated
"##,
        );
    }
}
