//! Interpolation in a table over temperature: monotone piecewise cubic, so that a property between two rows never
//! leaves their values.
//!
//! Source: F. N. Fritsch and R. E. Carlson, SIAM J. Numer. Anal. 17 (1980) 238-246, with the harmonic-mean slopes of
//! F. N. Fritsch and J. Butland, SIAM J. Sci. Stat. Comput. 5 (1984) 300-304.

/// The value at `at` in `rows` (rising temperatures). Between rows only: `NaN` outside, and for fewer than two rows.
/// `logarithmic` interpolates the logarithm, which suits viscosities that fall by factors.
pub fn interpolate(rows: &[(f64, f64)], at: f64, logarithmic: bool) -> f64 {
    let logarithmic = logarithmic && rows.iter().all(|(_, value)| *value > 0.0);
    let scale = |value: f64| if logarithmic { value.ln() } else { value };
    let after = rows.partition_point(|(temperature, _)| *temperature <= at);
    let upper = if after == rows.len() && rows.last().is_some_and(|(last, _)| at <= *last + 1e-9) {
        after.wrapping_sub(1)
    } else {
        after
    };
    let (Some(right), Some(left)) = (rows.get(upper), upper.checked_sub(1).and_then(|lower| rows.get(lower))) else {
        // At the very first row within rounding of it.
        return match rows.first() {
            Some((first, value)) if rows.len() > 1 && (at - first).abs() <= 1e-9 => *value,
            _ => f64::NAN,
        };
    };
    let width = right.0 - left.0;
    let chord = (scale(right.1) - scale(left.1)) / width;
    let before = upper
        .checked_sub(2)
        .and_then(|index| rows.get(index))
        .map(|row| (scale(left.1) - scale(row.1)) / (left.0 - row.0));
    let beyond = rows.get(upper + 1).map(|row| (scale(row.1) - scale(right.1)) / (row.0 - right.0));
    let slope = |other: Option<f64>| match other {
        None => chord,
        Some(other) if other * chord <= 0.0 => 0.0,
        Some(other) => 2.0 * other * chord / (other + chord),
    };
    let (slope_left, slope_right) = (slope(before), slope(beyond));
    let t = (at - left.0) / width;
    let (t2, t3) = (t * t, t * t * t);
    let value = (2.0 * t3 - 3.0 * t2 + 1.0) * scale(left.1)
        + (t3 - 2.0 * t2 + t) * width * slope_left
        + (3.0 * t2 - 2.0 * t3) * scale(right.1)
        + (t3 - t2) * width * slope_right;
    if logarithmic { value.exp() } else { value }
}

#[cfg(test)]
mod tests {
    use super::interpolate;

    const ROWS: &[(f64, f64)] = &[(273.15, 10.0), (293.15, 5.0), (313.15, 3.0), (353.15, 2.0)];

    #[test]
    fn rows_are_met_and_values_stay_between_them() {
        for (temperature, value) in ROWS {
            assert!((interpolate(ROWS, *temperature, true) - value).abs() < 1e-9);
        }
        for pair in ROWS.windows(2) {
            let middle = 0.5 * (pair[0].0 + pair[1].0);
            let value = interpolate(ROWS, middle, false);
            assert!(value < pair[0].1 && value > pair[1].1);
        }
    }

    #[test]
    fn nothing_is_said_outside() {
        assert!(interpolate(ROWS, 272.0, false).is_nan());
        assert!(interpolate(ROWS, 354.0, false).is_nan());
        assert!(interpolate(&[], 300.0, false).is_nan());
        assert!(interpolate(&ROWS[..1], 273.15, false).is_nan());
    }
}
