//! Which part of a region's surface each boundary covers.

use super::geometry::{sides, sizes};
use super::model::SideGeometry;
use crate::case::model::{Boundary, Case, Region, Side};

/// A part of a boundary that lies on one side.
#[derive(Clone, Copy, Debug)]
pub struct Piece<'a> {
    /// The boundary.
    pub boundary: &'a Boundary,
    /// The side; `Remaining` where the boundary names none that the shape has.
    pub side: Side,
    /// Area, m² (m²/m in a plane case).
    pub area: f64,
    /// Area of the whole side.
    pub side_area: f64,
    /// Unit vector out of the fluid; zero where curved.
    pub normal: [f64; 3],
}

/// The sides of a region, each with the boundaries that cover it or a part of it.
///
/// `remaining` stands for every side that no other boundary names, and for the rest of a side of which the others cover
/// only a part (`patch`, `area`).
pub fn covered_sides<'a>(case: &'a Case, region: &'a Region) -> Vec<(Side, Vec<&'a Boundary>)> {
    let Some(sizes) = sizes(region) else { return Vec::new() };
    let sides = sides(case, region, &sizes);
    let pieces = pieces(case, region, &sides);
    sides
        .iter()
        .map(|side| {
            let on_it = pieces.iter().filter(|piece| piece.side == side.side).map(|piece| piece.boundary).collect();
            (side.side, on_it)
        })
        .collect()
}

/// The area that a boundary of a region covers, m² (m²/m in a plane case): as stated, by its patch, or of its sides.
/// `NaN` for the far fluid and where the shape is not known.
pub fn area_of(case: &Case, region: &Region, boundary: &Boundary) -> f64 {
    if let Some(area) = &boundary.area {
        return area.si;
    }
    let sides = sizes(region).map(|sizes| sides(case, region, &sizes)).unwrap_or_default();
    let mut own = pieces(case, region, &sides);
    own.retain(|piece| std::ptr::eq(piece.boundary, boundary));
    if own.is_empty() { f64::NAN } else { own.iter().map(|piece| piece.area).sum() }
}

/// The pieces of all boundaries of a region, in the order of the boundaries.
pub fn pieces<'a>(case: &'a Case, region: &'a Region, sides: &[SideGeometry]) -> Vec<Piece<'a>> {
    let mut pieces: Vec<Piece<'a>> = Vec::with_capacity(sides.len() + 2);
    for boundary in case.boundaries_of(region) {
        let named = || sides.iter().filter(|side| names(boundary, side.side, region));
        let total: f64 = named().map(|side| side.area).sum();
        let before = pieces.len();
        pieces.extend(named().map(|side| {
            let area = match (&boundary.area, &boundary.patch) {
                (Some(area), _) => area.si * if total > 0.0 { side.area / total } else { 1.0 },
                (None, Some((width, height))) => width.si * height.si,
                (None, None) => side.area,
            };
            Piece { boundary, side: side.side, area, side_area: side.area, normal: side.normal }
        }));
        // A boundary that gives an area and no side still carries heat.
        if pieces.len() == before && !boundary.sides.iter().any(|side| side.value == Side::Remaining) {
            let patch = boundary.patch.as_ref().map(|(width, height)| width.si * height.si);
            let area = boundary.area.as_ref().map(|area| area.si).or(patch).unwrap_or(f64::NAN);
            pieces.push(Piece { boundary, side: Side::Remaining, area, side_area: area, normal: [0.0; 3] });
        }
    }
    let named = pieces.len();
    for boundary in case.boundaries_of(region) {
        if boundary.sides.iter().any(|side| side.value == Side::Remaining) {
            add_remaining(&mut pieces, named, boundary, sides);
        }
    }
    pieces
}

/// Adds what the first `named` pieces leave of the sides, for a boundary that takes what remains.
fn add_remaining<'a>(pieces: &mut Vec<Piece<'a>>, named: usize, boundary: &'a Boundary, sides: &[SideGeometry]) {
    let left = |pieces: &[Piece<'a>], side: &SideGeometry| {
        let on_it = || pieces.iter().take(named).filter(|piece| piece.side == side.side);
        let is_free = on_it().next().is_none();
        let is_partly_free = on_it().all(|piece| piece.boundary.patch.is_some() || piece.boundary.area.is_some());
        let taken: f64 = on_it().map(|piece| piece.area).sum();
        let rest = side.area - taken;
        if is_free {
            Some(side.area)
        } else if is_partly_free && rest > 1e-9 * side.area {
            Some(rest)
        } else {
            None
        }
    };
    let total: f64 = sides.iter().filter_map(|side| left(pieces, side)).filter(|area| area.is_finite()).sum();
    for side in sides {
        if let Some(rest) = left(pieces, side) {
            let area = match &boundary.area {
                Some(area) => area.si * if total > 0.0 { rest / total } else { 1.0 },
                None => rest,
            };
            pieces.push(Piece { boundary, side: side.side, area, side_area: side.area, normal: side.normal });
        }
    }
}

/// Whether a boundary names a side. The face of a body in a wide fluid may be called by its shape: `around`, or any
/// side but the far one.
fn names(boundary: &Boundary, side: Side, region: &Region) -> bool {
    boundary.sides.iter().any(|stated| {
        stated.value == side
            || region.is_surrounded && side == Side::Face && !matches!(stated.value, Side::Far | Side::Remaining)
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::testing::TODAY;
    use crate::workspace::analyse_text;

    const HEAD: &str =
        "fluid a\n    substance air\n    reference 20 degC\nregion r\n    box 2 m by 3 m by 4 m\n    filled with a\n";

    fn covers(boundaries: &str, expected: &[(&str, f64)]) {
        let deck = analyse_text(&format!("{HEAD}{boundaries}"), TODAY);
        let region = &deck.case.regions[0];
        for (name, area) in expected {
            let boundary = deck.case.boundaries.iter().find(|boundary| &*boundary.name.text == *name).unwrap();
            let got = area_of(&deck.case, region, boundary);
            assert!((got - area).abs() < 1e-9, "{name}: {got}, not {area}");
        }
    }

    #[test]
    fn named_sides_and_the_rest() {
        covers(
            "boundary a1 of r\n    side west, east\nboundary a2 of r\n    side remaining\n",
            &[("a1", 24.0), ("a2", 28.0)],
        );
    }

    #[test]
    fn a_patch_leaves_the_rest_of_its_side() {
        covers(
            "boundary a1 of r\n    side west\n    patch 0.5 m by 2 m\nboundary a2 of r\n    side remaining\n",
            &[("a1", 1.0), ("a2", 51.0)],
        );
        covers(
            "boundary a1 of r\n    side west\n    area 3 m^2\nboundary a2 of r\n    side west\n    area 4 m^2\n\
             boundary a3 of r\n    side remaining\n",
            &[("a1", 3.0), ("a2", 4.0), ("a3", 45.0)],
        );
        // One that covers the side whole leaves nothing of it.
        covers(
            "boundary a1 of r\n    side west\nboundary a2 of r\n    side west\n    area 4 m^2\n\
             boundary a3 of r\n    side remaining\n",
            &[("a1", 12.0), ("a2", 4.0), ("a3", 40.0)],
        );
    }

    #[test]
    fn sides_list_their_boundaries() {
        let text = format!(
            "{HEAD}boundary a1 of r\n    side west\n    patch 1 m by 1 m\nboundary a2 of r\n    side remaining\n"
        );
        let deck = analyse_text(&text, TODAY);
        let sides = covered_sides(&deck.case, &deck.case.regions[0]);
        let on = |side: Side| {
            let (_, own) = sides.iter().find(|(known, _)| *known == side).unwrap();
            own.iter().map(|boundary| &*boundary.name.text).collect::<Vec<_>>().join(" ")
        };
        assert_eq!(sides.len(), 6);
        assert_eq!((on(Side::West).as_str(), on(Side::Top).as_str()), ("a1 a2", "a2"));
    }

    #[test]
    fn a_body_has_a_face_and_a_far_side() {
        let text = "fluid a\n    substance air\n    reference 20 degC\nregion r\n    sphere 1 m\n    surrounded by a\n\
                    boundary a1 of r\n    side around\nboundary a2 of r\n    side far\n";
        let deck = analyse_text(text, TODAY);
        let sides = covered_sides(&deck.case, &deck.case.regions[0]);
        assert_eq!(
            sides.iter().map(|(side, own)| (*side, own.len())).collect::<Vec<_>>(),
            [(Side::Face, 1), (Side::Far, 1)]
        );
        let area = area_of(&deck.case, &deck.case.regions[0], &deck.case.boundaries[0]);
        assert!((area - std::f64::consts::PI).abs() < 1e-12);
    }
}
