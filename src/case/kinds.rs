//! Point or difference: the kinds of temperatures and pressures, settled by use over the whole deck.
//!
//! ```text
//! T_hot  = 60 degC            a point, by its unit
//! dT     = 5 K                open
//! T_wall = T_hot + dT         point + open: dT is a difference, T_wall a point
//! ```
//!
//! Every expression of that dimension has a kind variable. Uses put constraints between them; they are worked off
//! until nothing changes. A constraint that cannot hold is a conflict, reported once at its place.

use crate::syntax::Place;

/// What a temperature or pressure is.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Kind {
    /// A point on a scale.
    Point,
    /// A difference of two points.
    Difference,
}

/// The number of a kind variable.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct KindVariable(usize);

/// How kinds hang together.
#[derive(Clone, Copy, Debug)]
enum Constraint {
    /// result = left + right
    Sum { left: KindVariable, right: KindVariable, result: KindVariable },
    /// result = left - right
    Difference { left: KindVariable, right: KindVariable, result: KindVariable },
    /// both the same
    Same { left: KindVariable, right: KindVariable },
    /// stands in a product, and so should be a difference
    Scaled { of: KindVariable },
    /// is of a kind
    Is { of: KindVariable, kind: Kind },
}

/// A use that cannot hold.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct Conflict {
    /// Where the use stands.
    pub place: Place,
    /// What is wrong with it.
    pub what: ConflictKind,
}

/// How a use fails.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum ConflictKind {
    /// Two points added.
    PointsAdded,
    /// A point taken from a difference.
    PointFromDifference,
    /// A point multiplied or divided.
    PointScaled,
    /// A point where a difference is wanted.
    PointForDifference,
    /// A difference where a point is wanted.
    DifferenceForPoint,
    /// A point and a difference where both must be the same.
    Mixed,
}

/// All kind variables and constraints of a deck.
#[derive(Debug, Default)]
pub struct Kinds {
    states: Vec<Option<Kind>>,
    constraints: Vec<(Constraint, Place)>,
    /// Constraints by variable.
    users: Vec<Vec<usize>>,
}

impl Kinds {
    /// A new variable, settled or open.
    pub fn variable(&mut self, kind: Option<Kind>) -> KindVariable {
        self.states.push(kind);
        self.users.push(Vec::new());
        KindVariable(self.states.len() - 1)
    }

    /// What a variable is; `None` while open.
    pub fn kind(&self, variable: KindVariable) -> Option<Kind> {
        self.states.get(variable.0).copied().flatten()
    }

    /// `left + right`; gives the variable of the sum.
    pub fn sum(&mut self, left: KindVariable, right: KindVariable, place: Place) -> KindVariable {
        let result = self.variable(None);
        self.constrain(Constraint::Sum { left, right, result }, &[left, right, result], place);
        result
    }

    /// `left - right`; gives the variable of the difference.
    pub fn difference(&mut self, left: KindVariable, right: KindVariable, place: Place) -> KindVariable {
        let result = self.variable(None);
        self.constrain(Constraint::Difference { left, right, result }, &[left, right, result], place);
        result
    }

    /// Both are the same.
    pub fn same(&mut self, left: KindVariable, right: KindVariable, place: Place) {
        self.constrain(Constraint::Same { left, right }, &[left, right], place);
    }

    /// It stands in a product.
    pub fn scaled(&mut self, of: KindVariable, place: Place) {
        self.constrain(Constraint::Scaled { of }, &[of], place);
    }

    /// It is of a kind.
    pub fn is(&mut self, of: KindVariable, kind: Kind, place: Place) {
        self.constrain(Constraint::Is { of, kind }, &[of], place);
    }

    fn constrain(&mut self, constraint: Constraint, variables: &[KindVariable], place: Place) {
        let index = self.constraints.len();
        self.constraints.push((constraint, place));
        for variable in variables {
            if let Some(users) = self.users.get_mut(variable.0) {
                users.push(index);
            }
        }
    }

    /// Settles what can be settled and gives the conflicts, in the order of their constraints.
    pub fn settle(&mut self) -> Vec<Conflict> {
        let mut waiting: Vec<usize> = (0..self.constraints.len()).rev().collect();
        self.work_off(&mut waiting);
        // Only now: a product makes a difference of what nothing else has settled.
        for index in 0..self.constraints.len() {
            if let Some((Constraint::Scaled { of }, _)) = self.constraints.get(index).copied()
                && self.kind(of).is_none()
            {
                self.set(of, Kind::Difference, &mut waiting);
                self.work_off(&mut waiting);
            }
        }
        self.constraints
            .iter()
            .filter_map(|(constraint, place)| self.conflict(*constraint).map(|what| Conflict { place: *place, what }))
            .collect()
    }

    /// Each variable is settled at most once, so this ends.
    fn work_off(&mut self, waiting: &mut Vec<usize>) {
        use Kind::{Difference, Point};
        while let Some(index) = waiting.pop() {
            let Some((constraint, _)) = self.constraints.get(index).copied() else { continue };
            match constraint {
                Constraint::Is { of, kind } => self.set(of, kind, waiting),
                Constraint::Scaled { .. } => {}
                Constraint::Same { left, right } => match (self.kind(left), self.kind(right)) {
                    (Some(kind), None) => self.set(right, kind, waiting),
                    (None, Some(kind)) => self.set(left, kind, waiting),
                    _ => {}
                },
                Constraint::Sum { left, right, result } => {
                    match (self.kind(left), self.kind(right), self.kind(result)) {
                        (Some(Point), _, _) => {
                            self.set(right, Difference, waiting);
                            self.set(result, Point, waiting);
                        }
                        (_, Some(Point), _) => {
                            self.set(left, Difference, waiting);
                            self.set(result, Point, waiting);
                        }
                        (_, _, Some(Difference)) => {
                            self.set(left, Difference, waiting);
                            self.set(right, Difference, waiting);
                        }
                        (Some(Difference), Some(Difference), None) => self.set(result, Difference, waiting),
                        (Some(Difference), None, Some(Point)) => self.set(right, Point, waiting),
                        (None, Some(Difference), Some(Point)) => self.set(left, Point, waiting),
                        _ => {}
                    }
                }
                Constraint::Difference { left, right, result } => {
                    match (self.kind(left), self.kind(right), self.kind(result)) {
                        (_, Some(Point), _) => {
                            self.set(left, Point, waiting);
                            self.set(result, Difference, waiting);
                        }
                        (Some(Difference), _, _) => {
                            self.set(right, Difference, waiting);
                            self.set(result, Difference, waiting);
                        }
                        (_, _, Some(Point)) => {
                            self.set(left, Point, waiting);
                            self.set(right, Difference, waiting);
                        }
                        (Some(Point), Some(Difference), None) => self.set(result, Point, waiting),
                        (Some(Point), None, Some(Difference)) => self.set(right, Point, waiting),
                        _ => {}
                    }
                }
            }
        }
    }

    fn set(&mut self, variable: KindVariable, kind: Kind, waiting: &mut Vec<usize>) {
        if let Some(state @ None) = self.states.get_mut(variable.0) {
            *state = Some(kind);
            waiting.extend(self.users.get(variable.0).into_iter().flatten());
        }
    }

    fn conflict(&self, constraint: Constraint) -> Option<ConflictKind> {
        use Kind::{Difference, Point};
        let kind = |variable| self.kind(variable);
        match constraint {
            Constraint::Is { of, kind: Point } => {
                (kind(of) == Some(Difference)).then_some(ConflictKind::DifferenceForPoint)
            }
            Constraint::Is { of, kind: Difference } => {
                (kind(of) == Some(Point)).then_some(ConflictKind::PointForDifference)
            }
            Constraint::Scaled { of } => (kind(of) == Some(Point)).then_some(ConflictKind::PointScaled),
            Constraint::Same { left, right } => match (kind(left), kind(right)) {
                (Some(a), Some(b)) if a != b => Some(ConflictKind::Mixed),
                _ => None,
            },
            Constraint::Sum { left, right, result } => match (kind(left), kind(right), kind(result)) {
                (Some(Point), Some(Point), _) => Some(ConflictKind::PointsAdded),
                (Some(Difference), Some(Difference), Some(Point)) => Some(ConflictKind::DifferenceForPoint),
                (Some(Point), _, Some(Difference)) | (_, Some(Point), Some(Difference)) => {
                    Some(ConflictKind::PointForDifference)
                }
                _ => None,
            },
            Constraint::Difference { left, right, result } => match (kind(left), kind(right), kind(result)) {
                (Some(Difference), Some(Point), _) => Some(ConflictKind::PointFromDifference),
                (Some(Point), Some(Point), Some(Point)) => Some(ConflictKind::DifferenceForPoint),
                (Some(Point), Some(Difference), Some(Difference)) => Some(ConflictKind::PointForDifference),
                (Some(Difference), _, Some(Point)) => Some(ConflictKind::DifferenceForPoint),
                _ => None,
            },
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use Kind::{Difference, Point};

    const HERE: Place = Place { file: crate::syntax::FileId(0), span: crate::syntax::Span { start: 0, end: 0 } };

    #[test]
    fn use_settles_an_open_kelvin() {
        let mut kinds = Kinds::default();
        let hot = kinds.variable(Some(Point));
        let open = kinds.variable(None);
        let wall = kinds.sum(hot, open, HERE);
        assert_eq!(kinds.settle(), []);
        assert_eq!((kinds.kind(open), kinds.kind(wall)), (Some(Difference), Some(Point)));
    }

    #[test]
    fn a_later_use_settles_an_earlier_one() {
        let mut kinds = Kinds::default();
        let (a, b) = (kinds.variable(None), kinds.variable(None));
        let gap = kinds.difference(a, b, HERE);
        kinds.is(b, Point, HERE);
        assert_eq!(kinds.settle(), []);
        assert_eq!((kinds.kind(a), kinds.kind(gap)), (Some(Point), Some(Difference)));
    }

    #[test]
    fn adding_or_scaling_points_is_a_conflict() {
        let mut kinds = Kinds::default();
        let (a, b) = (kinds.variable(Some(Point)), kinds.variable(Some(Point)));
        kinds.sum(a, b, HERE);
        kinds.scaled(a, HERE);
        let what: Vec<ConflictKind> = kinds.settle().into_iter().map(|conflict| conflict.what).collect();
        assert_eq!(what, [ConflictKind::PointsAdded, ConflictKind::PointScaled]);
    }

    #[test]
    fn a_product_settles_what_nothing_else_does() {
        let mut kinds = Kinds::default();
        let open = kinds.variable(None);
        kinds.scaled(open, HERE);
        assert_eq!(kinds.settle(), []);
        assert_eq!(kinds.kind(open), Some(Difference));
    }
}
