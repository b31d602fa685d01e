//! What was meant by a unit that is not one, or that has the wrong dimension.
//!
//! `Mpa` is mended to `MPa`, `celsius` to `degC`, `W/m2K` to `W/m^2/K`; `W/mK` (watt per millikelvin), where a conductivity
//! is wanted, to `W/m/K`.

use std::collections::HashMap;
use std::ops::Range;
use std::sync::LazyLock;

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
/// Shortest symbol, in characters, that is taken for a misspelling.
const SHORTEST_MISSPELT: usize = 4;
/// Most slips mended in one unit.
const MOST_SLIPS: usize = 8;

/// Spellings that people use and no rule below finds: the slip, in lower case where case
/// does not matter, and what is meant.
const SPOKEN: [(&str, &str); 53] = [
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
    ("Nm", "N.m"),
    ("mmwc", "mmH2O"),
    ("mmwg", "mmH2O"),
    ("inwc", "inH2O"),
    ("inwg", "inH2O"),
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
    if let Some(named) = named(symbol, &lowered) {
        return Some(named);
    }
    if let Some(single) = symbol.strip_suffix('s')
        && single.chars().count() > 1
        // mPas is a viscosity, not some pascals.
        && !single.ends_with("Pa")
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
    // sec2: a slip with a power behind it.
    if let Some((head, power)) = symbol.split_at_checked(symbol.len().saturating_sub(1))
        && power.bytes().all(|byte| byte.is_ascii_digit())
        && !head.ends_with(|last: char| last.is_ascii_digit())
    {
        let meant = unit_table::find(head).map(|_| head.to_string()).or_else(|| instead_of(head, after_quotient));
        let whole = meant.filter(|meant| unit_table::find(meant).is_some());
        return whole.map(|meant| format!("{meant}^{power}"));
    }
    nearest_unit(symbol)
}

/// The unit whose name, else whose symbol, is one slip away. Short words are near to everything: for them, none. Two slips
/// are too many: they make `metre` of `kmetr` and lose the power of ten.
fn nearest_unit(symbol: &str) -> Option<String> {
    if symbol.chars().count() < SHORTEST_MISSPELT {
        return None;
    }
    let lowered = symbol.to_lowercase();
    let one_slip = |known: &&str| strsim::damerau_levenshtein(&lowered, &known.to_lowercase()) <= 1;
    if let Some(name) = suggest::nearest(symbol, UNITS.iter().map(|row| row.name)).filter(one_slip) {
        return UNITS.iter().find(|row| row.name == name).map(|row| row.symbol.to_string());
    }
    let near = suggest::nearest(symbol, UNITS.iter().flat_map(|row| row.spellings()));
    near.filter(one_slip).map(str::to_string)
}

/// The symbol of a unit named in words: `kilowatts`, `pascal`, `kWatt`.
fn named(symbol: &str, lowered: &str) -> Option<String> {
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
    PREFIXES.iter().find_map(|prefix| {
        let rest = prefix.spellings().find_map(|spelling| symbol.strip_prefix(spelling))?;
        let unit = symbol_of(rest, true).or_else(|| symbol_of(rest.strip_suffix('s')?, true))?;
        Some(format!("{}{unit}", prefix.symbol))
    })
}

/// A symbol that differs in case only, with the fewest characters changed. The field's usual units come first: `mpa` is
/// `MPa`; then every unit; then those with a daily prefix.
fn other_case(symbol: &str) -> Option<String> {
    let candidates = BY_LOWER_CASE.get(&symbol.to_lowercase())?;
    let changed = |other: &str| other.chars().zip(symbol.chars()).filter(|(a, b)| a != b).count();
    candidates.iter().min_by_key(|(rank, other)| (*rank, changed(other), other)).map(|(_, other)| other.clone())
}

/// Symbols by their lower case, each with the rank of its group in [`other_case`].
static BY_LOWER_CASE: LazyLock<HashMap<String, Vec<(usize, String)>>> = LazyLock::new(|| {
    let mut by_lower_case: HashMap<String, Vec<(usize, String)>> = HashMap::new();
    let mut add = |rank: usize, symbol: String| {
        by_lower_case.entry(symbol.to_lowercase()).or_default().push((rank, symbol));
    };
    for unit in dimension_names::KINDS.iter().flat_map(|kind| kind.units) {
        add(0, (*unit).to_string());
    }
    for row in UNITS {
        row.spellings().for_each(|spelling| add(1, spelling.to_string()));
        for prefix in PREFIXES.iter().filter(|prefix| prefix.common && row.takes(prefix)) {
            add(2, format!("{}{}", prefix.symbol, row.symbol));
        }
    }
    by_lower_case
});

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

fn replaced(text: &str, at: Range<usize>, meant: &str) -> Option<String> {
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
            ("kWatt", "kW"),
            ("kwatts", "kW"),
            ("kmetre", "km"),
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
            ("µPas", "µPa.s"),
            ("m/sec2", "m/s^2"),
            ("m/Sec2", "m/s^2"),
            ("degres", "deg"),
            ("pascel", "Pa"),
            ("inWC", "inH2O"),
            ("btu/hr", "Btu/h"),
        ] {
            let found = mended(slip);
            assert_eq!(found.as_deref(), Some(meant), "{slip}");
        }
    }

    #[test]
    fn a_sound_unit_and_a_hopeless_one_are_left_alone() {
        assert_eq!(mended("W/m^2/K"), None);
        assert_eq!(mended("W/"), None);
        for hopeless in ["kmetr", "qqqqq", "mmWQ", "q2", "m/q", "KgQ", "2"] {
            assert_eq!(mended(hopeless), None, "{hopeless}");
        }
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
