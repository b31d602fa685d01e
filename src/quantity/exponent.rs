//! Exponents as they are written in a unit: `-2`, `0.5`, `1/2`, `⁻¹`.

use crate::quantity::dimension::{EXPONENT_LIMIT, Exponent};

/// `-2`, `+3` or `0.5` as an exact rational; `None` where it is none, or beyond [`EXPONENT_LIMIT`].
pub(crate) fn exponent_of(written: &str) -> Option<Exponent> {
    let (sign, digits) = match written.strip_prefix('-') {
        Some(rest) => (-1, rest),
        None => (1, written.strip_prefix('+').unwrap_or(written)),
    };
    let (whole, decimals) = digits.split_once('.').unwrap_or((digits, ""));
    let decimals = decimals.trim_end_matches('0');
    let all_digits = |text: &str| text.bytes().all(|byte| byte.is_ascii_digit());
    if whole.is_empty() || decimals.len() > 3 || !all_digits(whole) || !all_digits(decimals) {
        return None;
    }
    let denominator = 10_i32.checked_pow(u32::try_from(decimals.len()).ok()?)?;
    let fraction: i32 = if decimals.is_empty() { 0 } else { decimals.parse().ok()? };
    let whole: i32 = whole.parse().ok()?;
    let numerator = whole.checked_mul(denominator)?.checked_add(fraction)?;
    bounded(Exponent::new(sign * numerator, denominator))
}

/// An exponent over another; `None` where that is none, or beyond [`EXPONENT_LIMIT`].
pub(crate) fn quotient(above: Exponent, below: Exponent) -> Option<Exponent> {
    if *below.numer() == 0 {
        return None;
    }
    // Both are within the limit of 1000, so the products stay within 32 bits.
    bounded(above / below)
}

fn bounded(exponent: Exponent) -> Option<Exponent> {
    let within = |value: i32| (-EXPONENT_LIMIT..=EXPONENT_LIMIT).contains(&value);
    (within(*exponent.numer()) && within(*exponent.denom())).then_some(exponent)
}

/// The digit or sign that a superscript character stands for.
pub(crate) fn superscript(found: char) -> Option<char> {
    Some(match found {
        '⁰' => '0',
        '¹' => '1',
        '²' => '2',
        '³' => '3',
        '⁴' => '4',
        '⁵' => '5',
        '⁶' => '6',
        '⁷' => '7',
        '⁸' => '8',
        '⁹' => '9',
        '⁻' => '-',
        '⁺' => '+',
        _ => return None,
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn written_exponents_are_exact() {
        assert_eq!(exponent_of("-2"), Some(Exponent::from(-2)));
        assert_eq!(exponent_of("+3"), Some(Exponent::from(3)));
        assert_eq!(exponent_of("0.5"), Some(Exponent::new(1, 2)));
        assert_eq!(exponent_of("-1.250"), Some(Exponent::new(-5, 4)));
        for none in ["", "-", "+", ".", ".5", "1.2.3", "--1", "1e3", "1001", "0.1234", "99999999999", "1000.5", "é"] {
            assert_eq!(exponent_of(none), None, "{none}");
        }
    }

    #[test]
    fn quotients_stay_within_the_limit() {
        assert_eq!(quotient(Exponent::from(1), Exponent::from(-2)), Some(Exponent::new(-1, 2)));
        assert_eq!(quotient(Exponent::from(1), Exponent::from(0)), None);
        assert_eq!(quotient(Exponent::new(999, 1000), Exponent::new(1, 999)), None);
    }
}
