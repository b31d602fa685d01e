//! Finds where a monotone function crosses zero: bracketed, bounded, never past the bracket.

/// A crossing.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Root {
    /// Where.
    pub at: f64,
    /// Whether the bracket shrank to the tolerance within the steps allowed.
    pub converged: bool,
}

/// Steps at most. Halving alone takes a bracket of 1e5 K to 1e-6 K in 37.
const STEPS: usize = 60;

/// The crossing of `function` between `low` and `high`, to within `tolerance`; `None` where the ends do not bracket one or
/// a value is not a number.
///
/// Inverse quadratic interpolation where it is safe, else halving: Chandrupatla, A new hybrid quadratic/bisection algorithm
/// for finding the zero of a nonlinear function, Adv. Eng. Software 28 (1997) 145-149 (recalled).
pub fn between(low: f64, high: f64, tolerance: f64, mut function: impl FnMut(f64) -> f64) -> Option<Root> {
    let (at_low, at_high) = (function(low), function(high));
    bracketed((low, at_low), (high, at_high), tolerance, &mut function)
}

fn bracketed(low: (f64, f64), high: (f64, f64), tolerance: f64, function: &mut impl FnMut(f64) -> f64) -> Option<Root> {
    let ((mut b, mut at_b), (mut a, mut at_a)) = (low, high);
    if at_a == 0.0 {
        return Some(Root { at: a, converged: true });
    }
    if at_b == 0.0 {
        return Some(Root { at: b, converged: true });
    }
    if at_a.is_nan() || at_b.is_nan() || at_a.is_sign_negative() == at_b.is_sign_negative() {
        return None;
    }
    let mut share = 0.5;
    for _ in 0..STEPS {
        let x = a + share * (b - a);
        let at_x = function(x);
        if at_x.is_nan() {
            return None;
        }
        // `c` is the point that `x` pushed out of the bracket.
        let (c, at_c) = if at_x.is_sign_negative() == at_a.is_sign_negative() {
            (a, at_a)
        } else {
            let pushed = (b, at_b);
            (b, at_b) = (a, at_a);
            pushed
        };
        (a, at_a) = (x, at_x);
        let best = if at_a.abs() < at_b.abs() { a } else { b };
        let least = tolerance / (b - a).abs();
        if least > 0.5 || at_a == 0.0 {
            return Some(Root { at: best, converged: true });
        }
        if !least.is_finite() {
            return None;
        }
        let xi = (a - b) / (c - b);
        let phi = (at_a - at_b) / (at_c - at_b);
        let interpolates = phi * phi < xi && (1.0 - phi) * (1.0 - phi) < 1.0 - xi;
        share = if interpolates {
            at_a / (at_b - at_a) * at_c / (at_b - at_c)
                + (c - a) / (b - a) * at_a / (at_c - at_a) * at_b / (at_c - at_b)
        } else {
            0.5
        };
        share = if share.is_nan() { 0.5 } else { share.max(least).min(1.0 - least) };
    }
    Some(Root { at: if at_a.abs() < at_b.abs() { a } else { b }, converged: false })
}

/// The crossing near `guess`: the bracket starts `reach` to either side and grows until it holds the crossing, not past
/// `least` and `most`.
pub fn near(
    guess: f64,
    reach: f64,
    (least, most): (f64, f64),
    tolerance: f64,
    mut function: impl FnMut(f64) -> f64,
) -> Option<Root> {
    // `max` and `min` would turn a guess that is no number into a bound.
    if !guess.is_finite() {
        return None;
    }
    let mut reach = reach.max(tolerance);
    let mut low = (guess - reach).max(least).min(most);
    let mut high = (guess + reach).max(least).min(most);
    let mut at_low = function(low);
    let mut at_high = function(high);
    for _ in 0..STEPS {
        if at_low.is_nan() || at_high.is_nan() {
            return None;
        }
        if at_low == 0.0 || at_high == 0.0 || at_low.is_sign_negative() != at_high.is_sign_negative() {
            return bracketed((low, at_low), (high, at_high), tolerance, &mut function);
        }
        if low <= least && high >= most {
            return None;
        }
        reach *= 4.0;
        // The end nearer to the crossing is the one to move; the other one becomes the new inner end.
        if at_low.abs() < at_high.abs() && low > least {
            (high, at_high) = (low, at_low);
            low = (low - reach).max(least);
            at_low = function(low);
        } else if high < most {
            (low, at_low) = (high, at_high);
            high = (high + reach).min(most);
            at_high = function(high);
        } else {
            (high, at_high) = (low, at_low);
            low = (low - reach).max(least);
            at_low = function(low);
        }
    }
    None
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn finds_crossings_that_are_known() {
        let root = between(0.0, 2.0, 1e-12, |x| x * x - 2.0).unwrap();
        assert!(root.converged && (root.at - 2.0_f64.sqrt()).abs() < 1e-11, "{root:?}");
        // A triple root, at which secants stall.
        let root = between(-1.0, 4.0, 1e-9, |x| (x - 1.0).powi(3)).unwrap();
        assert!(root.converged && (root.at - 1.0).abs() < 1e-3, "{root:?}");
        // A jump counts as a crossing.
        let root = between(0.0, 1.0, 1e-9, |x| if x < 0.3 { -1.0 } else { 1.0 }).unwrap();
        assert!((root.at - 0.3).abs() < 1e-8, "{root:?}");
    }

    #[test]
    fn smooth_functions_take_few_steps() {
        let mut calls = 0;
        let root = between(-1.0, 3.0, 1e-8, |x| {
            calls += 1;
            x.exp() - 3.0
        })
        .unwrap();
        assert!((root.at - 3.0_f64.ln()).abs() < 1e-8 && calls <= 12, "{root:?} {calls}");
    }

    #[test]
    fn no_crossing_and_no_number_give_none() {
        assert_eq!(between(0.0, 1.0, 1e-9, |x| x + 1.0), None);
        assert_eq!(between(0.0, 1.0, 1e-9, |_| f64::NAN), None);
        assert_eq!(near(0.0, 1.0, (-10.0, 10.0), 1e-9, |x| x * x + 1.0), None);
        assert_eq!(near(f64::NAN, 1.0, (-10.0, 10.0), 1e-9, |x| x - 1.0), None);
    }

    #[test]
    fn the_bracket_grows_to_a_far_crossing() {
        for target in [-950.0, -3.0, 0.2, 7.0, 999.0] {
            let root = near(0.0, 0.5, (-1e3, 1e3), 1e-9, |x| x - target).unwrap();
            assert!(root.converged && (root.at - target).abs() < 1e-8, "{root:?} {target}");
            let root = near(0.0, 0.5, (-1e3, 1e3), 1e-9, |x| target - x).unwrap();
            assert!(root.converged && (root.at - target).abs() < 1e-8, "{root:?} {target}");
        }
        assert_eq!(near(0.0, 0.5, (-1e3, 1e3), 1e-9, |x| x - 2e3), None);
    }
}
