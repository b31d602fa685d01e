//! Numbers as they are written into a deck: as short as they can be without losing value.

/// The shortest decimal form that is `value` within a part in 1e9: what a conversion of units writes. `None` for what is
/// not finite.
pub fn exact(value: f64) -> Option<String> {
    (3..=15).map(|digits| rounded(value, digits)).find(|text| is_near(text, value)).filter(|_| value.is_finite())
}

/// `value` to a number of significant digits, without trailing zeros; in powers of ten only where it is very small or
/// large.
pub fn rounded(value: f64, digits: usize) -> String {
    if value == 0.0 || !value.is_finite() {
        return if value == 0.0 { "0".to_string() } else { value.to_string() };
    }
    let scientific = format!("{value:.*e}", digits.saturating_sub(1));
    let (mantissa, exponent) = scientific.split_once('e').unwrap_or((&scientific, "0"));
    let power: i32 = exponent.parse().unwrap_or(0);
    if (-4..7).contains(&power) {
        let decimals = usize::try_from(digits as i32 - 1 - power).unwrap_or(0);
        let value: f64 = scientific.parse().unwrap_or(value);
        return without_trailing_zeros(&format!("{value:.decimals$}")).to_string();
    }
    format!("{}e{power}", without_trailing_zeros(mantissa))
}

fn is_near(text: &str, value: f64) -> bool {
    text.parse::<f64>().is_ok_and(|read| (read - value).abs() <= 1e-9 * value.abs())
}

fn without_trailing_zeros(number: &str) -> &str {
    if number.contains('.') { number.trim_end_matches('0').trim_end_matches('.') } else { number }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn short_and_without_loss() {
        for (value, text) in [
            (0.0, "0"),
            (21.0, "21"),
            (70.0_f64.mul_add(5.0 / 9.0, -160.0 / 9.0), "21.111111111"),
            (101_325.0, "101325"),
            (1.5e-5, "1.5e-5"),
            (1.506e-6, "1.506e-6"),
            (-40.0, "-40"),
            (6.022e23, "6.022e23"),
        ] {
            let written = exact(value).unwrap();
            assert!(text.starts_with(&written) || written == text, "{written} for {text}");
            assert!(is_near(&written, value));
        }
        assert_eq!(exact(f64::NAN), None);
        assert_eq!(rounded(313.15, 6), "313.15");
    }
}
