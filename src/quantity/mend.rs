//! What was meant by a unit that is not one, or that has the wrong dimension.
//!
//! `Mpa` is mended to `MPa`, `celsius` to `degC`, `W/m2K` to `W/m^2/K`; `W/mK` (watt per millikelvin), where a conductivity
//! is wanted, to `W/m/K`.

use crate::quantity::dimension::Dimension;
use crate::quantity::dimension_names;
use crate::quantity::prefix::PREFIXES;
use crate::quantity::problem::UnitProblem;
use crate::quantity::suggest;
use crate::quantity::unit::parse_unit;
use crate::quantity::unit_parser::{LONGEST_UNIT, begins_symbol, symbol_length};
use crate::quantity::unit_table::{self, UNITS};

/// Longest symbol, in characters, that is searched for units run together.
const LONGEST_RUN: usize = 16;
/// Most units run together that are told apart.
const MOST_RUN_TOGETHER: usize = 4;
/// Most slips mended in one unit.
const MOST_SLIPS: usize = 8;

/// Spellings that people use and no rule below finds: the slip, in lower case where case
/// does not matter, and what is meant.
const SPOKEN: [(&str, &str); 51] = [
    ("celsius", "degC"),
    ("centigrade", "degC"),
    ("deg_c", "degC"),
    ("degreec", "degC"),
    ("degreesc", "degC"),
    ("c°", "degC"),
    ("fahrenheit", "degF"),
    ("deg_f", "degF"),
    ("f°", "degF"),
    ("rankine", "degR"),
    ("deg_r", "degR"),
    ("degk", "K"),
    ("°k", "K"),
    ("deg_k", "K"),
    ("sec", "s"),
    ("secs", "s"),
    ("hr", "h"),
    ("hrs", "h"),
    ("mins", "min"),
    ("days", "d"),
    ("meter", "m"),
    ("meters", "m"),
    ("liter", "L"),
    ("liters", "L"),
    ("ltr", "L"),
    ("feet", "ft"),
    ("inches", "in"),
    ("micron", "µm"),
    ("microns", "µm"),
    ("cc", "cm^3"),
    ("ccm", "cm^3"),
    ("sqm", "m^2"),
    ("cbm", "m^3"),
    ("sqft", "ft^2"),
    ("cuft", "ft^3"),
    ("sqin", "in^2"),
    ("lps", "L/s"),
    ("lpm", "L/min"),
    ("mph", "mi/h"),
    ("kph", "km/h"),
    ("kmh", "km/h"),
    ("fpm", "ft/min"),
    ("ach", "1/h"),
    ("ton", "t"),
    ("gm", "g"),
    ("kgs", "kg"),
    ("psia", "psi"),
    ("bara", "bar"),
    ("Nm", "N.m"),
    ("pct", "%"),
    ("percent", "%"),
];

/// The text with every slip mended, where it then is a unit; `None` where it is one already, or cannot be mended.
#[must_use]
pub fn mended(text: &str) -> Option<String> {
    let mut text = text.to_string();
    for slips in 0..=MOST_SLIPS {
        match parse_unit(&text) {
            Ok(_) => return (slips > 0).then_some(text),
            Err(UnitProblem::Unknown { at, suggestion: Some(meant), .. }) => {
                text = replaced(&text, at, &meant)?;
            }
            Err(_) => return None,
        }
    }
    None
}

/// A unit that looks like `text` and has the dimension `wanted`, for a text that is a unit of another dimension: `C`
/// (coulomb) where a temperature is wanted gives `degC`; `W/mK` gives `W/m/K`.
#[must_use]
pub fn meant_instead(text: &str, wanted: Dimension) -> Option<String> {
    if text.len() > LONGEST_UNIT {
        return None;
    }
    let mut position = 0;
    while let Some(rest) = text.get(position..)
        && let Some(first) = rest.chars().next()
    {
        if !begins_symbol(first) {
            position += first.len_utf8();
            continue;
        }
        let length = symbol_length(rest);
        let symbol = rest.get(..length)?;
        let after_quotient = text.get(..position)?.ends_with('/');
        for other in lookalikes(symbol, after_quotient) {
            let candidate = replaced(text, position..position + length, &other)?;
            if parse_unit(&candidate).is_ok_and(|unit| unit.dimension == wanted) {
                return Some(candidate);
            }
        }
        position += length;
    }
    None
}

/// Known symbols that the hand writes for others.
fn lookalikes(symbol: &str, after_quotient: bool) -> Vec<String> {
    let swapped = match symbol {
        "C" => Some("degC"),
        "F" => Some("degF"),
        "S" => Some("s"),
        "H" => Some("h"),
        "L" | "l" => None,
        "deg" | "°" => Some("degC"),
        "lb" => Some("lbf"),
        "kg" => Some("kgf"),
        _ => None,
    };
    let sign = if after_quotient { "/" } else { "." };
    // A prefix that is a unit too: the m of mK.
    let parted = PREFIXES.iter().filter_map(|prefix| {
        let rest = symbol.strip_prefix(prefix.symbol)?;
        let both = unit_table::find(prefix.symbol).is_some() && unit_table::find(rest).is_some();
        both.then(|| format!("{}{sign}{rest}", prefix.symbol))
    });
    swapped.map(str::to_string).into_iter().chain(parted).collect()
}

/// What to write instead of an unknown symbol. After a quotient, units run together are parted by `/`, else by `.`.
pub(crate) fn instead_of(symbol: &str, after_quotient: bool) -> Option<String> {
    let lowered = symbol.to_lowercase();
    if let Some((_, meant)) = SPOKEN.iter().find(|(slip, _)| *slip == lowered || *slip == symbol) {
        return Some((*meant).to_string());
    }
    if let Some(named) = named(&lowered) {
        return Some(named);
    }
    if let Some(single) = symbol.strip_suffix('s')
        && single.chars().count() > 1
        && single != "Pa"
        && single != "mPa"
        && unit_table::find(single).is_some()
    {
        return Some(single.to_string());
    }
    let parted = run_together(symbol);
    let sign = if after_quotient { "/" } else { "." };
    if let Some(parts) = &parted
        && symbol.contains(|found: char| found.is_ascii_digit())
    {
        return Some(parts.join(sign));
    }
    if let Some(other_case) = other_case(symbol) {
        return Some(other_case);
    }
    if let Some(parts) = &parted
        && parts.len() == 2
    {
        return Some(parts.join(sign));
    }
    let near = suggest::nearest(symbol, UNITS.iter().flat_map(|row| row.spellings()));
    near.map(str::to_string).or(parted.map(|parts| parts.join(sign)))
}

/// The symbol of a unit named in words: `kilowatts`, `pascal`.
fn named(lowered: &str) -> Option<String> {
    let single = lowered.strip_suffix('s').unwrap_or(lowered);
    let symbol_of = |name: &str, prefixed: bool| {
        let mut rows = UNITS.iter().filter(|row| row.takes_prefixes() || !prefixed);
        rows.find(|row| row.name.eq_ignore_ascii_case(name)).map(|row| row.symbol)
    };
    for name in [lowered, single] {
        if let Some(symbol) = symbol_of(name, false) {
            return Some(symbol.to_string());
        }
        for prefix in &PREFIXES {
            if let Some(rest) = name.strip_prefix(prefix.name)
                && let Some(symbol) = symbol_of(rest, true)
            {
                return Some(format!("{}{symbol}", prefix.symbol));
            }
        }
    }
    None
}

/// A symbol that differs in case only. The field's usual units come first: `mpa` is `MPa`.
fn other_case(symbol: &str) -> Option<String> {
    let usual = dimension_names::KINDS.iter().flat_map(|kind| kind.units).copied();
    if let Some(found) = same_but_case(symbol, usual) {
        return Some(found.to_string());
    }
    if let Some(found) = same_but_case(symbol, UNITS.iter().flat_map(|row| row.spellings())) {
        return Some(found.to_string());
    }
    let prefixed: Vec<String> = PREFIXES
        .iter()
        .filter(|prefix| prefix.common)
        .flat_map(|prefix| {
            let rows = UNITS.iter().filter(|row| row.takes_prefixes());
            rows.map(move |row| format!("{}{}", prefix.symbol, row.symbol))
        })
        .filter(|candidate| unit_table::find(candidate).is_some())
        .collect();
    same_but_case(symbol, prefixed.iter().map(String::as_str)).map(str::to_string)
}

/// The candidate that is `symbol` but for case, with the fewest characters changed; ties in alphabetical order.
fn same_but_case<'a>(symbol: &str, candidates: impl Iterator<Item = &'a str>) -> Option<&'a str> {
    let lowered = symbol.to_lowercase();
    candidates.filter(|candidate| candidate.to_lowercase() == lowered).min_by_key(|candidate| {
        let changed = candidate.chars().zip(symbol.chars()).filter(|(a, b)| a != b).count();
        (changed, *candidate)
    })
}

/// The units in a run such as `m2K` or `Pas`, each with its power; the fewest units, the longest first.
fn run_together(symbol: &str) -> Option<Vec<String>> {
    if symbol.chars().count() > LONGEST_RUN {
        return None;
    }
    (1..=MOST_RUN_TOGETHER).find_map(|count| parted(symbol, count))
}

/// `symbol` as exactly `count` units.
fn parted(symbol: &str, count: usize) -> Option<Vec<String>> {
    if count == 0 || symbol.is_empty() {
        return (count == 0 && symbol.is_empty()).then(Vec::new);
    }
    let ends: Vec<usize> = symbol.char_indices().map(|(at, found)| at + found.len_utf8()).collect();
    ends.into_iter().rev().find_map(|end| {
        let (head, rest) = (symbol.get(..end)?, symbol.get(end..)?);
        unit_table::find(head)?;
        let sign = usize::from(rest.starts_with('-'));
        let digits = rest.get(sign..)?.bytes().take_while(u8::is_ascii_digit).count();
        let power = rest.get(..sign + digits)?;
        let tail = rest.get(sign + digits..)?;
        if digits > 1 || (sign == 1 && digits == 0) {
            return None;
        }
        let mut parts = parted(tail, count - 1)?;
        parts.insert(0, if digits == 0 { head.to_string() } else { format!("{head}^{power}") });
        Some(parts)
    })
}

fn replaced(text: &str, at: std::ops::Range<usize>, meant: &str) -> Option<String> {
    Some(format!("{}{meant}{}", text.get(..at.start)?, text.get(at.end..)?))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn slips_are_mended() {
        for (slip, meant) in [
            ("Mpa", "MPa"),
            ("mpa", "MPa"),
            ("KPA", "kPa"),
            ("Kg", "kg"),
            ("KG", "kg"),
            ("celsius", "degC"),
            ("Celsius", "degC"),
            ("degc", "degC"),
            ("DegF", "degF"),
            ("kelvin", "K"),
            ("Kelvins", "K"),
            ("sec", "s"),
            ("hr", "h"),
            ("hours", "h"),
            ("metres", "m"),
            ("kilowatts", "kW"),
            ("KW", "kW"),
            ("kw", "kW"),
            ("lbs", "lb"),
            ("bars", "bar"),
            ("BTU", "Btu"),
            ("PSI", "psi"),
            ("CFM", "cfm"),
            ("HZ", "Hz"),
            ("W/m2K", "W/m^2/K"),
            ("W/m2/K", "W/m^2/K"),
            ("W/(m2K)", "W/(m^2.K)"),
            ("W/(m2.k)", "W/(m^2.K)"),
            ("kg/m3", "kg/m^3"),
            ("kg.m-3", "kg.m^-3"),
            ("m3/hr", "m^3/h"),
            ("J/kgK", "J/kg/K"),
            ("m2", "m^2"),
            ("ft2", "ft^2"),
            ("Pas", "Pa.s"),
            ("mPas", "mPa.s"),
            ("Nm", "N.m"),
            ("mmhg", "mmHg"),
            ("MM", "mm"),
        ] {
            let found = mended(slip);
            assert_eq!(found.as_deref(), Some(meant), "{slip}");
        }
    }

    #[test]
    fn a_sound_unit_and_a_hopeless_one_are_left_alone() {
        assert_eq!(mended("W/m^2/K"), None);
        assert_eq!(mended("W/"), None);
        assert_eq!(mended("qqqqq"), None);
    }

    #[test]
    fn every_spoken_slip_is_unknown_and_its_mend_is_a_unit() {
        for (slip, meant) in SPOKEN {
            assert!(parse_unit(meant).is_ok(), "{meant}");
            assert!(parse_unit(slip).is_err(), "{slip} is a unit");
        }
    }

    #[test]
    fn lookalikes_of_the_wanted_dimension() {
        let temperature = parse_unit("K").unwrap().dimension;
        let conductivity = parse_unit("W/m/K").unwrap().dimension;
        let specific_heat = parse_unit("J/kg/K").unwrap().dimension;
        let viscosity = parse_unit("Pa.s").unwrap().dimension;
        assert_eq!(meant_instead("C", temperature).as_deref(), Some("degC"));
        assert_eq!(meant_instead("W/mK", conductivity).as_deref(), Some("W/m/K"));
        assert_eq!(meant_instead("W/(mK)", conductivity).as_deref(), Some("W/(m.K)"));
        assert_eq!(meant_instead("kJ/kg/C", specific_heat).as_deref(), Some("kJ/kg/degC"));
        assert_eq!(meant_instead("Pa.S", viscosity).as_deref(), Some("Pa.s"));
        assert_eq!(meant_instead("bar", temperature), None);
    }
}
