//! What the checks of closure share: what a boundary is to the equations, and where a fix may write.

use crate::case::model::{Boundary, BoundaryKind, Case, Heat, Region, Shape, Side};
use crate::syntax::{Edit, Finding, Fix, Place, Span};

/// What a boundary is to the equations.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Role {
    /// A wall.
    Wall,
    /// Fluid enters.
    Inlet,
    /// Fluid leaves.
    Outlet,
    /// Either.
    Opening,
    /// A mirror.
    Symmetry,
    /// One of a pair.
    Repeats,
    /// Shared with another region.
    Meets,
    /// The wide fluid far from a plate or body.
    Far,
    /// The boundary does not say.
    Unsaid,
}

/// What a boundary is. One that names no kind but a heat condition counts as a wall.
pub fn role(boundary: &Boundary) -> Role {
    if !boundary.sides.is_empty() && boundary.sides.iter().all(|side| side.value == Side::Far) {
        return Role::Far;
    }
    // A face that meets another region is that first, though it may be a wall as well.
    let meets = boundary.kinds.iter().find(|(kind, _)| matches!(kind, BoundaryKind::Meets(_)));
    match meets.or(boundary.kinds.first()).map(|(kind, _)| kind) {
        Some(BoundaryKind::Wall { .. }) => Role::Wall,
        Some(BoundaryKind::Inlet) => Role::Inlet,
        Some(BoundaryKind::Outlet) => Role::Outlet,
        Some(BoundaryKind::Opening) => Role::Opening,
        Some(BoundaryKind::Symmetry) => Role::Symmetry,
        Some(BoundaryKind::Repeats(_)) => Role::Repeats,
        Some(BoundaryKind::Meets(_)) => Role::Meets,
        None if !boundary.heat.is_empty() => Role::Wall,
        None => Role::Unsaid,
    }
}

/// Whether fluid can pass.
pub const fn lets_fluid_pass(role: Role) -> bool {
    matches!(role, Role::Inlet | Role::Outlet | Role::Opening | Role::Far)
}

/// Whether the shape itself is open where no boundary says otherwise: the ends of a channel.
pub fn is_open_by_shape(case: &Case, region: &Region) -> bool {
    let end_is_unnamed = |side| !case.boundaries_of(region).any(|boundary| super::sides::names(boundary, side));
    matches!(region.shape, Some(Shape::Channel { .. })) && (end_is_unnamed(Side::Bottom) || end_is_unnamed(Side::Top))
}

/// A heat condition as the deck words it.
pub const fn heat_word(heat: &Heat) -> &'static str {
    match heat {
        Heat::HeldAt(_) => "held at",
        Heat::HeatedBy(_) => "heated by",
        Heat::CooledBy(_) => "cooled by",
        Heat::Insulated => "insulated",
        Heat::Exchanges { .. } => "exchanges",
        Heat::RadiatesTo(_) => "radiates to",
    }
}

/// A kind of boundary as the deck words it.
pub const fn kind_word(kind: &BoundaryKind) -> &'static str {
    match kind {
        BoundaryKind::Wall { .. } => "wall",
        BoundaryKind::Inlet => "inlet",
        BoundaryKind::Outlet => "outlet",
        BoundaryKind::Opening => "opening",
        BoundaryKind::Symmetry => "symmetry",
        BoundaryKind::Repeats(_) => "repeats with",
        BoundaryKind::Meets(_) => "meets",
    }
}

/// Whether a heat condition ties the temperature of the fluid to one that is given.
pub const fn ties_temperature(heat: &Heat) -> bool {
    matches!(heat, Heat::HeldAt(_) | Heat::Exchanges { .. } | Heat::RadiatesTo(_))
}

/// The finding with a fix that writes a statement right below the head of a boundary.
pub fn add_to_boundary(mut finding: Finding, boundary: &Boundary, statement: &str, sure: bool) -> Finding {
    let head = boundary.region.as_ref().unwrap_or(&boundary.name).place;
    finding.fixes.push(add_below(head, statement, sure));
    finding
}

/// A fix that writes a statement on a line of its own below a head, of which `head` is the last word.
pub fn add_below(head: Place, statement: &str, sure: bool) -> Fix {
    let end = head.span.end;
    let edit = Edit { file: head.file, span: Span::new(end, end), text: format!("\n    {statement}") };
    Fix { title: format!("Add `{statement}`"), edits: vec![edit], sure }
}

/// A fix that writes a whole entry, before one that usually comes later. `None` where the deck has no such entry.
pub fn add_entry(case: &Case, title: &str, entry: &str) -> Option<Fix> {
    let run = case.run.as_ref().map(|run| run.place);
    let place = run.or_else(|| case.meshes.first().map(|mesh| mesh.place))?;
    let at = Span::new(place.span.start, place.span.start);
    let edit = Edit { file: place.file, span: at, text: format!("{entry}\n\n") };
    Some(Fix { title: title.into(), edits: vec![edit], sure: false })
}
