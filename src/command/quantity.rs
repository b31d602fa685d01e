//! Quantities on the command line: `40 degC`, as one word or two.

use crate::quantity::{Dimension, Scale, parse_unit};

/// Standard atmosphere, Pa: what gauge pressures count from here.
const ATMOSPHERE: f64 = 101_325.0;

/// The SI value of a quantity of a dimension. Temperatures are points, pressures absolute.
///
/// # Errors
/// Says what is wrong.
pub fn read(words: &[String], dimension: Dimension) -> Result<f64, String> {
    let text = words.join(" ");
    let (number, unit) = split(text.trim()).ok_or_else(|| format!("`{text}` does not start with a number"))?;
    if unit.is_empty() {
        if dimension.is_none() {
            return Ok(number);
        }
        let usual = crate::quantity::usual_units(dimension).first().copied().unwrap_or_default();
        return Err(format!("`{text}` has no unit; `{text} {usual}`, for one, has"));
    }
    let found = parse_unit(unit).map_err(|problem| problem.message())?;
    if found.dimension != dimension {
        return Err(format!("`{text}` is {}, not {}", found.dimension.words(), dimension.words()));
    }
    let above = if found.scale == Scale::Gauge { ATMOSPHERE } else { 0.0 };
    let value = found.to_si(number) + above;
    if value.is_finite() { Ok(value) } else { Err(format!("`{text}` is too large")) }
}

/// The number at the start of a text, and the rest.
fn split(text: &str) -> Option<(f64, &str)> {
    let may_be_in_number =
        |character: char| character.is_ascii_digit() || matches!(character, '.' | '+' | '-' | 'e' | 'E');
    let longest = text.find(|character| !may_be_in_number(character)).unwrap_or(text.len());
    (1..=longest).rev().find_map(|end| {
        let number = text.get(..end)?.parse::<f64>().ok().filter(|number| number.is_finite())?;
        Some((number, text.get(end..)?.trim()))
    })
}

#[allow(clippy::unwrap_used, clippy::panic)]
#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::dimension_names::{PRESSURE, TEMPERATURE};

    fn temperature(text: &str) -> Result<f64, String> {
        read(&text.split(' ').map(str::to_string).collect::<Vec<_>>(), TEMPERATURE)
    }

    #[test]
    fn quantities() {
        for (text, kelvin) in [
            ("40 degC", 313.15),
            ("40degC", 313.15),
            ("-10 °C", 263.15),
            ("300 K", 300.0),
            ("3e2 K", 300.0),
            ("3e+2K", 300.0),
            ("32 degF", 273.15),
        ] {
            assert!((temperature(text).unwrap() - kelvin).abs() < 1e-9, "{text}");
        }
        assert!((read(&["1".into(), "barg".into()], PRESSURE).unwrap() - 201_325.0).abs() < 1e-6);
        assert!((read(&["30".into(), "%".into()], Dimension::NONE).unwrap() - 0.3).abs() < 1e-12);
        assert!((read(&["0.3".into()], Dimension::NONE).unwrap() - 0.3).abs() < 1e-12);
    }

    #[test]
    fn what_is_wrong_is_said() {
        assert_eq!(temperature("40"), Err("`40` has no unit; `40 degC`, for one, has".to_string()));
        assert_eq!(temperature("40 bar"), Err("`40 bar` is a pressure, not a temperature".to_string()));
        assert_eq!(temperature("warm"), Err("`warm` does not start with a number".to_string()));
        assert!(temperature("40 degX").is_err());
        assert!(temperature("").is_err() && temperature("e").is_err() && temperature("nan K").is_err());
        assert!(temperature("1e999 K").is_err() && temperature("α K").is_err());
    }
}
