//! The points of `vary`: which names take which values together.

use super::expression::{Typed, Worker};
use super::names::ValueKind;
use crate::syntax::tree::{Expression, ExpressionKind};
use crate::syntax::{Finding, Level, Place};

/// Most points of a sweep.
pub const SWEEP_POINTS: usize = 1_000_000;

/// Names that step together.
#[derive(Clone, Debug, Default)]
pub struct Axis {
    /// The numbers of the values, the deck's order.
    pub names: Vec<usize>,
    /// The values of each name; all of one length.
    pub values: Vec<Vec<f64>>,
}

/// All that varies. Its points are every combination of the axes, the last axis fastest.
#[derive(Clone, Debug, Default)]
pub struct Sweep {
    /// The axes.
    pub axes: Vec<Axis>,
}

impl Axis {
    /// How many steps it has.
    pub fn len(&self) -> usize {
        self.values.first().map_or(0, Vec::len)
    }

    /// Whether it has none.
    pub fn is_empty(&self) -> bool {
        self.len() == 0
    }
}

impl Sweep {
    /// How many points there are; 1 where nothing varies.
    pub fn points(&self) -> usize {
        self.axes.iter().map(Axis::len).product()
    }

    /// The values of the varied names at a point.
    pub fn at(&self, point: usize) -> Vec<(usize, f64)> {
        let mut rest = point;
        let mut found = Vec::new();
        for axis in self.axes.iter().rev() {
            let length = axis.len().max(1);
            let step = rest % length;
            rest /= length;
            for (name, values) in axis.names.iter().zip(&axis.values) {
                found.push((*name, values.get(step).copied().unwrap_or(f64::NAN)));
            }
        }
        found.reverse();
        found
    }
}

/// The expressions that a varied name runs over: the members of a list, or the ends and step of a range.
pub fn parts(expression: &Expression) -> Vec<&Expression> {
    match &expression.kind {
        ExpressionKind::List(items) => items.iter().collect(),
        ExpressionKind::Range(range) => {
            [Some(&range.from), Some(&range.to), range.step.as_ref()].into_iter().flatten().collect()
        }
        _ => vec![expression],
    }
}

/// The values that a varied name runs over, and its type, from the worked parts. `value` evaluates.
pub fn run_over(
    worker: &mut Worker<'_, '_>,
    expression: &Expression,
    place: Place,
    worked: &[Typed],
    value: &dyn Fn(&Typed) -> f64,
) -> (Vec<f64>, Typed) {
    let Some(first) = worked.first().cloned() else {
        worker.findings.push(Finding::new("missing-argument", Level::Error, place, "This list is empty."));
        return (Vec::new(), Typed::unknown());
    };
    if let Some(other) = worked.iter().find(|other| other.dimension != first.dimension) {
        if let (Some(a), Some(b)) = (first.dimension, other.dimension) {
            let message = format!("These values are of different dimensions: {} and {}.", a.words(), b.words());
            worker.findings.push(Finding::new("dimension-mismatch", Level::Error, place, message));
        }
        return (Vec::new(), Typed::unknown());
    }
    let is_range = matches!(expression.kind, ExpressionKind::Range(_));
    for (index, other) in worked.iter().enumerate().skip(1) {
        if let (Some(a), Some(b)) = (first.kind, other.kind) {
            if is_range && index == 2 {
                worker.kinds.is(b, super::kinds::Kind::Difference, place);
            } else {
                worker.kinds.same(a, b, place);
            }
        }
    }
    let numbers: Vec<f64> = worked.iter().map(value).collect();
    let typed = Typed { literal: None, is_bare_number: false, ..first };
    match (is_range, numbers.as_slice()) {
        (true, [from, to, step]) => match steps(*from, *to, *step) {
            Ok(values) => (values, typed),
            Err(message) => {
                worker.findings.push(Finding::new("sweep-without-end", Level::Error, place, message));
                (vec![*from], typed)
            }
        },
        (true, _) => {
            let finding = Finding::new("missing-argument", Level::Error, place, "A range to run over needs its step.");
            worker.findings.push(finding.remedy("`step` and a difference behind the range"));
            (numbers.into_iter().take(1).collect(), typed)
        }
        (false, _) => (numbers, typed),
    }
}

/// `from`, `from + step` and so on up to `to`, with `to` itself where a whole number of steps reaches it.
fn steps(from: f64, to: f64, step: f64) -> Result<Vec<f64>, String> {
    if !(from.is_finite() && to.is_finite() && step.is_finite()) {
        return Ok(vec![from]);
    }
    if step == 0.0 || (to - from) * step < 0.0 {
        return Err("This step never reaches the end of the range.".into());
    }
    let count = (to - from) / step;
    #[expect(clippy::cast_precision_loss, reason = "the limit is far below 2^52")]
    if count > SWEEP_POINTS as f64 {
        return Err(format!("This range has more than {SWEEP_POINTS} steps."));
    }
    // A step that divides the range in decimal does so in binary only to rounding.
    #[expect(clippy::cast_possible_truncation, clippy::cast_sign_loss, reason = "bounded just above, and not negative")]
    let last = (count + 1e-9).floor() as usize;
    #[expect(clippy::cast_precision_loss, reason = "bounded just above")]
    Ok((0..=last).map(|index| from + step * index as f64).collect())
}

/// The sweep from the varied names' values and the groups that step together.
pub fn assemble(worker: &mut Worker<'_, '_>, values: &[(usize, Vec<f64>)], together: &[(Vec<usize>, Place)]) -> Sweep {
    let mut sweep = Sweep::default();
    let mut taken: Vec<usize> = Vec::new();
    for (number, list) in values {
        if taken.contains(number) || list.is_empty() {
            continue;
        }
        let mut axis = Axis { names: vec![*number], values: vec![list.clone()] };
        taken.push(*number);
        if let Some((group, place)) = together.iter().find(|(group, _)| group.contains(number)) {
            for (other, other_list) in values.iter().filter(|(other, _)| group.contains(other) && other != number) {
                if taken.contains(other) {
                    continue;
                }
                taken.push(*other);
                if other_list.len() == list.len() {
                    axis.names.push(*other);
                    axis.values.push(other_list.clone());
                } else {
                    let name = |number: usize| worker.names.values.get(number).map_or("", |value| value.name.as_str());
                    let message = format!(
                        "Names that step together have as many values: `{}` has {}, `{}` has {}.",
                        name(*number),
                        list.len(),
                        name(*other),
                        other_list.len()
                    );
                    worker.findings.push(Finding::new("sweep-unpaired", Level::Error, *place, message));
                }
            }
        }
        sweep.axes.push(axis);
    }
    let points = sweep.axes.iter().try_fold(1_usize, |product, axis| product.checked_mul(axis.len()));
    if points.is_none_or(|points| points > SWEEP_POINTS) {
        let place = worker
            .names
            .values
            .iter()
            .find(|value| value.kind == ValueKind::Varied)
            .map(|value| value.place)
            .unwrap_or_default();
        let message = format!("This sweep has more than {SWEEP_POINTS} points; only its first is looked at.");
        worker.findings.push(Finding::new("sweep-too-large", Level::Error, place, message));
        sweep.axes.clear();
    }
    sweep
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_range_holds_its_end_when_steps_reach_it() {
        assert_eq!(steps(0.0, 0.3, 0.1).map(|values| values.len()), Ok(4));
        assert_eq!(steps(0.0, 0.35, 0.1).map(|values| values.len()), Ok(4));
        assert_eq!(steps(3.0, 1.0, -1.0), Ok(vec![3.0, 2.0, 1.0]));
        assert!(steps(0.0, 1.0, -1.0).is_err() && steps(0.0, 1.0, 0.0).is_err() && steps(0.0, 1.0, 1e-9).is_err());
    }

    #[test]
    fn the_last_axis_is_the_fastest() {
        let axis = |name, values: &[f64]| Axis { names: vec![name], values: vec![values.to_vec()] };
        let sweep = Sweep { axes: vec![axis(0, &[1.0, 2.0]), axis(1, &[10.0, 20.0, 30.0])] };
        assert_eq!(sweep.points(), 6);
        assert_eq!(sweep.at(1), [(0, 1.0), (1, 20.0)]);
        assert_eq!(sweep.at(3), [(0, 2.0), (1, 10.0)]);
    }
}
