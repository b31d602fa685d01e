//! Numbers and quantities as people read them.

use crate::quantity::dimension::Dimension;
use crate::quantity::dimension_names;
use crate::quantity::unit::parse_unit;

/// Significant digits of a written number.
pub const SIGNIFICANT_DIGITS: usize = 4;

/// A number with 4 significant digits and no trailing zeros, in powers of ten below 1e-3 and from 1e5 on: `0.0123`,
/// `1234`, `1.58e9`. Zero has no sign.
#[must_use]
pub fn format_number(value: f64) -> String {
    if value.is_nan() {
        return "not a number".to_string();
    }
    if value.is_infinite() {
        return if value > 0.0 { "infinite" } else { "minus infinite" }.to_string();
    }
    if value == 0.0 {
        return "0".to_string();
    }
    let scientific = format!("{value:.*e}", SIGNIFICANT_DIGITS - 1);
    let (mantissa, exponent) = scientific.split_once('e').unwrap_or((&scientific, "0"));
    let exponent: i32 = exponent.parse().unwrap_or(0);
    if (-3..5).contains(&exponent) {
        let rounded: f64 = scientific.parse().unwrap_or(value);
        let decimals = usize::try_from(SIGNIFICANT_DIGITS as i32 - 1 - exponent).unwrap_or(0);
        return without_trailing_zeros(&format!("{rounded:.decimals$}")).to_string();
    }
    format!("{}e{exponent}", without_trailing_zeros(mantissa))
}

fn without_trailing_zeros(number: &str) -> &str {
    if number.contains('.') { number.trim_end_matches('0').trim_end_matches('.') } else { number }
}

/// An SI value written in a unit: `62 degC` for 335.15 and `degC`. For a gauge unit, `si` is the pressure above ambient.
/// `None` where the text is no unit or the value is not finite.
#[must_use]
pub fn format_in(si: f64, unit_text: &str) -> Option<String> {
    let value = parse_unit(unit_text).ok()?.from_si(si);
    if !value.is_finite() {
        return None;
    }
    let number = format_number(value);
    Some(if unit_text == "1" { number } else { format!("{number} {unit_text}") })
}

/// An SI value with the usual unit of its dimension and a prefix that suits its size: `1.5 mm`, `20 degC`, `18.2 µPa.s`. A
/// temperature is taken as a point; see [`format_difference`].
#[must_use]
pub fn format_si(si: f64, dimension: Dimension) -> String {
    let kind = dimension_names::kind_of(dimension);
    let usual = kind.and_then(|kind| kind.units.first()).copied();
    // A value that will be written as the threshold is taken as the threshold: 0.99999 W is 1 W.
    let size = rounded(si).abs();
    let stepped = kind
        .filter(|_| si != 0.0)
        .and_then(|kind| kind.ladder.iter().rev().find(|(_, from)| size >= *from))
        .map(|(unit, _)| *unit);
    let base = dimension.base_units();
    let unit = stepped.or(usual).unwrap_or(&base);
    format_in(si, unit).unwrap_or_else(|| match unit {
        "1" => format_number(si),
        _ => format!("{} {unit}", format_number(si)),
    })
}

/// A difference of temperatures, in kelvin: `53 K`.
#[must_use]
pub fn format_difference(kelvin: f64) -> String {
    format!("{} K", format_number(kelvin))
}

/// The value to the digits that are written.
fn rounded(value: f64) -> f64 {
    format!("{value:.*e}", SIGNIFICANT_DIGITS - 1).parse().unwrap_or(value)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::dimension_names::*;

    #[test]
    fn numbers() {
        for (value, text) in [
            (0.0, "0"),
            (-0.0, "0"),
            (1.0, "1"),
            (-1.5, "-1.5"),
            (0.148_21, "0.1482"),
            (1.58e9, "1.58e9"),
            (100_000.0, "1e5"),
            (99_999.0, "1e5"),
            (99_990.0, "99990"),
            (12_346.0, "12350"),
            (1013.25, "1013"),
            (101_325.0, "1.013e5"),
            (1e-3, "0.001"),
            (0.001_234_56, "0.001235"),
            (9.9999e-4, "0.001"),
            (1.506e-5, "1.506e-5"),
            (9.999_96, "10"),
            (f64::MAX, "1.798e308"),
            (5e-324, "4.941e-324"),
            (f64::NAN, "not a number"),
            (f64::INFINITY, "infinite"),
            (f64::NEG_INFINITY, "minus infinite"),
        ] {
            assert_eq!(format_number(value), text, "{value:e}");
        }
    }

    #[test]
    fn in_a_given_unit() {
        assert_eq!(format_in(335.15, "degC").as_deref(), Some("62 degC"));
        assert_eq!(format_in(273.15, "degC").as_deref(), Some("0 degC"));
        assert_eq!(format_in(459.67 * 5.0 / 9.0, "degF").as_deref(), Some("0 degF"));
        assert_eq!(format_in(0.5, "%").as_deref(), Some("50 %"));
        assert_eq!(format_in(0.5, "1").as_deref(), Some("0.5"));
        assert_eq!(format_in(1e5, "barg").as_deref(), Some("1 barg"));
        assert_eq!(format_in(1.0, "W/m2"), None);
        assert_eq!(format_in(f64::NAN, "m"), None);
        assert_eq!(format_in(1e300, "qm"), None);
    }

    #[test]
    fn in_the_usual_unit() {
        for (si, dimension, text) in [
            (0.0015, LENGTH, "1.5 mm"),
            (1.1, LENGTH, "1.1 m"),
            (0.5, LENGTH, "0.5 m"),
            (-0.02, LENGTH, "-20 mm"),
            (0.0, LENGTH, "0 m"),
            (25e-6, LENGTH, "25 µm"),
            (180.0, POWER, "180 W"),
            (3516.85, POWER, "3.517 kW"),
            (0.999_99, POWER, "1 W"),
            (79_000.0, PRESSURE, "79 kPa"),
            (101_325.0, PRESSURE, "101.3 kPa"),
            (1.82e-5, DYNAMIC_VISCOSITY, "18.2 µPa.s"),
            (1.002e-3, DYNAMIC_VISCOSITY, "1.002 mPa.s"),
            (1.506e-5, KINEMATIC_VISCOSITY, "1.506e-5 m^2/s"),
            (293.15, TEMPERATURE, "20 degC"),
            (0.029, MOLAR_MASS, "29 g/mol"),
            (90.0, TIME, "90 s"),
            (5400.0, TIME, "90 min"),
            (36_000.0, TIME, "10 h"),
            (0.85, Dimension::NONE, "0.85"),
            (7.0, Dimension::of(-2, 1, 0, 0, 0, 0, 0), "7 kg.m^-2"),
            (f64::NAN, LENGTH, "not a number m"),
            (f64::INFINITY, Dimension::NONE, "infinite"),
        ] {
            assert_eq!(format_si(si, dimension), text);
        }
        assert_eq!(format_difference(53.0), "53 K");
        assert_eq!(format_difference(-0.0), "0 K");
    }

    #[test]
    fn what_is_written_reads_back() {
        for kind in KINDS {
            for step in -40..40 {
                let si = 1.234 * 10_f64.powi(step) + if kind.dimension == TEMPERATURE { 273.15 } else { 0.0 };
                let text = format_si(si, kind.dimension);
                let (number, unit) = text.split_once(' ').unwrap_or((&text, "1"));
                let unit = parse_unit(unit).unwrap();
                let back = unit.to_si(number.parse().unwrap());
                // A point near 0 degC keeps 4 digits of the degrees, not of the kelvins: compare in kelvins.
                assert!((back - si).abs() <= 5.1e-4 * si.abs(), "{text} for {si:e}");
            }
        }
    }
}
