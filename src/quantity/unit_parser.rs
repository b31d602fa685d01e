//! Reads units. The shape, without white space:
//!
//! ```text
//! unit   = term (("." | "*" | "·" | "/") term)*
//! term   = (symbol | "1" | "(" unit ")") power?
//! power  = "^" number | "^(" number ("/" number)? ")" | superscript digits
//! ```

use std::ops::Range;

use num_traits::One;

use crate::quantity::dimension::{Dimension, EXPONENT_LIMIT, Exponent};
use crate::quantity::exponent::{exponent_of, quotient, superscript};
use crate::quantity::mend;
use crate::quantity::problem::UnitProblem;
use crate::quantity::unit::{Scale, Unit};
use crate::quantity::unit_table;

/// Longest unit, in bytes.
pub const LONGEST_UNIT: usize = 128;
/// Most parentheses open at once.
pub const DEEPEST_UNIT: usize = 8;

/// A part of the unit, and where it was written.
struct Part {
    unit: Unit,
    at: Range<usize>,
}

struct Parser<'a> {
    text: &'a str,
    position: usize,
    depth: usize,
}

/// Reads `text` as a unit; see [`crate::quantity::unit::parse_unit`].
pub(crate) fn parse(text: &str) -> Result<Unit, UnitProblem> {
    if text.len() > LONGEST_UNIT {
        return Err(UnitProblem::TooLong);
    }
    let mut parser = Parser { text, position: 0, depth: 0 };
    let part = parser.product()?;
    match parser.peek() {
        None => Ok(part.unit),
        Some(')') => Err(parser.malformed_here("this `)` closes nothing".to_string())),
        Some(other) => Err(parser.stray(other)),
    }
}

impl Parser<'_> {
    fn peek(&self) -> Option<char> {
        self.text.get(self.position..)?.chars().next()
    }

    fn bump(&mut self) -> Option<char> {
        let next = self.peek()?;
        self.position += next.len_utf8();
        Some(next)
    }

    fn accept(&mut self, wanted: char) -> bool {
        let found = self.peek() == Some(wanted);
        if found {
            self.bump();
        }
        found
    }

    fn malformed_here(&self, why: String) -> UnitProblem {
        let end = self.position + self.peek().map_or(0, char::len_utf8);
        UnitProblem::Malformed { at: self.position..end, why }
    }

    fn stray(&self, found: char) -> UnitProblem {
        self.malformed_here(if found.is_whitespace() {
            "a unit is written without white space".to_string()
        } else if found.is_ascii_digit() {
            format!("the number {found} has no place here; a power is written as in `m^2` or `m^(1/2)`")
        } else if matches!(found, '-' | '\u{2212}' | '×') {
            "a product is written with `.`, as in `Pa.s`, and a negative power as in `s^-1`".to_string()
        } else if found == '^' {
            "one power only: write `m^(1/2)` for a broken one".to_string()
        } else {
            format!("`{}` has no place in a unit", found.escape_debug())
        })
    }

    fn product(&mut self) -> Result<Part, UnitProblem> {
        let mut whole = self.term(None)?;
        while let Some(sign @ ('.' | '*' | '·' | '⋅' | '/')) = self.peek() {
            self.bump();
            let next = self.term(Some(sign))?;
            let at = whole.at.start..next.at.end;
            let (left, right) = (amount(whole)?, amount(next)?);
            let (factor, dimension) = if sign == '/' {
                (left.factor / right.factor, left.dimension.over(right.dimension))
            } else {
                (left.factor * right.factor, left.dimension.times(right.dimension))
            };
            whole = Part { unit: plain(factor, dimension)?, at };
        }
        Ok(whole)
    }

    fn term(&mut self, after: Option<char>) -> Result<Part, UnitProblem> {
        let start = self.position;
        let unit = match self.peek() {
            None => return Err(self.missing(after)),
            Some('(') => self.group()?,
            // A leading 1, as in `1/s`.
            Some('1') if after.is_none() => {
                self.bump();
                plain(1.0, Some(Dimension::NONE))?
            }
            Some(first) if begins_symbol(first) => self.symbol(after == Some('/'))?,
            Some('.' | '*' | '·' | '⋅' | '/' | ')' | '^') => return Err(self.missing(after)),
            Some(other) => return Err(self.stray(other)),
        };
        let part = Part { unit, at: start..self.position };
        match self.power()? {
            Some(exponent) if !exponent.is_one() => {
                let base = amount(part)?;
                let unit = plain(raised(base.factor, exponent), base.dimension.power(exponent))?;
                Ok(Part { unit, at: start..self.position })
            }
            _ => Ok(part),
        }
    }

    fn missing(&self, after: Option<char>) -> UnitProblem {
        self.malformed_here(match (after, self.text.is_empty()) {
            (Some(sign), _) => format!("a unit is missing after `{sign}`"),
            (None, true) => "there is no unit here".to_string(),
            (None, false) => "a unit is missing here".to_string(),
        })
    }

    fn group(&mut self) -> Result<Unit, UnitProblem> {
        let opening = self.position..self.position + 1;
        if self.depth == DEEPEST_UNIT {
            let why = format!("more than {DEEPEST_UNIT} parentheses are open at once");
            return Err(UnitProblem::Malformed { at: opening, why });
        }
        self.bump();
        self.depth += 1;
        let inner = self.product()?;
        self.depth -= 1;
        if self.accept(')') {
            return Ok(inner.unit);
        }
        Err(match self.peek() {
            None => UnitProblem::Malformed { at: opening, why: "this `(` is not closed".to_string() },
            Some(other) => self.stray(other),
        })
    }

    fn symbol(&mut self, after_quotient: bool) -> Result<Unit, UnitProblem> {
        let start = self.position;
        let length = symbol_length(self.text.get(start..).unwrap_or_default());
        self.position += length;
        let at = start..self.position;
        let symbol = self.text.get(at.clone()).unwrap_or_default();
        match unit_table::find(symbol) {
            Some(found) => Ok(found.unit()),
            None => Err(UnitProblem::Unknown {
                symbol: symbol.to_string(),
                at,
                suggestion: mend::instead_of(symbol, after_quotient),
            }),
        }
    }

    fn power(&mut self) -> Result<Option<Exponent>, UnitProblem> {
        let start = self.position;
        let exponent = if self.accept('^') {
            if self.accept('(') {
                let above = self.number()?;
                let below = if self.accept('/') { self.number()? } else { Exponent::one() };
                if !self.accept(')') {
                    return Err(self.malformed_here("a `)` must close this power".to_string()));
                }
                quotient(above, below)
            } else {
                Some(self.number()?)
            }
        } else if self.peek().is_some_and(|next| superscript(next).is_some()) {
            let written = std::iter::from_fn(|| {
                let next = superscript(self.peek()?)?;
                self.bump();
                Some(next)
            });
            let written: String = written.collect();
            exponent_of(&written)
        } else {
            return Ok(None);
        };
        match exponent {
            Some(exponent) => Ok(Some(exponent)),
            None => {
                let at = start..self.position;
                let written = self.text.get(at.clone()).unwrap_or_default();
                let why = format!(
                    "`{written}` is not a power; powers have numerators and denominators up to {EXPONENT_LIMIT}"
                );
                Err(UnitProblem::Malformed { at, why })
            }
        }
    }

    /// A whole or decimal number, signed, inside a power.
    fn number(&mut self) -> Result<Exponent, UnitProblem> {
        let start = self.position;
        if matches!(self.peek(), Some('+' | '-' | '\u{2212}')) {
            self.bump();
        }
        while self.peek().is_some_and(|next| next.is_ascii_digit()) {
            self.bump();
        }
        // A `.` that no digit follows is the product sign: `m^2.K`.
        let rest = self.text.get(self.position..).unwrap_or_default();
        if rest.starts_with('.') && rest.chars().nth(1).is_some_and(|next| next.is_ascii_digit()) {
            self.bump();
            while self.peek().is_some_and(|next| next.is_ascii_digit()) {
                self.bump();
            }
        }
        let at = start..self.position;
        let written = self.text.get(at.clone()).unwrap_or_default().replace('\u{2212}', "-");
        exponent_of(&written).ok_or_else(|| UnitProblem::Malformed {
            at,
            why: if written.is_empty() {
                "a power must follow `^`, as in `m^2`".to_string()
            } else {
                format!("`{written}` is not a power; powers have numerators and denominators up to {EXPONENT_LIMIT}")
            },
        })
    }
}

/// The part as an amount, fit for products, quotients and powers: a temperature point or open temperature becomes a
/// difference; a gauge pressure is refused.
fn amount(part: Part) -> Result<Unit, UnitProblem> {
    if part.unit.scale == Scale::Gauge {
        let why =
            "a gauge pressure is a point above ambient and cannot be part of a compound unit; use the absolute unit";
        return Err(UnitProblem::Malformed { at: part.at, why: why.to_string() });
    }
    Ok(Unit { offset: 0.0, scale: Scale::Plain, ..part.unit })
}

fn plain(factor: f64, dimension: Option<Dimension>) -> Result<Unit, UnitProblem> {
    match dimension {
        Some(dimension) if factor.is_normal() => Ok(Unit { factor, offset: 0.0, dimension, scale: Scale::Plain }),
        _ => Err(UnitProblem::Overflow),
    }
}

fn raised(factor: f64, exponent: Exponent) -> f64 {
    if exponent.is_integer() {
        factor.powi(*exponent.numer())
    } else {
        factor.powf(f64::from(*exponent.numer()) / f64::from(*exponent.denom()))
    }
}

/// Whether a unit symbol can begin with this character.
pub(crate) fn begins_symbol(found: char) -> bool {
    found.is_alphabetic() || matches!(found, '%' | '°' | '′' | '″' | '\u{b5}' | '\u{2103}' | '\u{2109}')
}

/// How many bytes at the start of `text` belong to one symbol, digits inside it included (`inH2O`, and so `m2` and
/// `s-1` too, that they may be mended).
pub(crate) fn symbol_length(text: &str) -> usize {
    let mut characters = text.char_indices().peekable();
    while let Some((at, found)) = characters.next() {
        let next_is_digit = characters.peek().is_some_and(|(_, next)| next.is_ascii_digit());
        let belongs = begins_symbol(found)
            || (at > 0 && (found.is_ascii_digit() || found == '_' || (found == '-' && next_is_digit)));
        if !belongs {
            return at;
        }
    }
    text.len()
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::unit::parse_unit;

    fn factor(text: &str) -> f64 {
        parse_unit(text).unwrap_or_else(|problem| panic!("{text}: {problem:?}")).factor
    }

    fn same(a: &str, b: &str) {
        let (a_unit, b_unit) = (parse_unit(a).unwrap(), parse_unit(b).unwrap());
        assert_eq!(a_unit.dimension, b_unit.dimension, "{a} {b}");
        assert!((a_unit.factor / b_unit.factor - 1.0).abs() < 1e-14, "{a} {b}");
    }

    #[test]
    fn products_quotients_and_parentheses() {
        same("W/m^2/K", "W/(m^2.K)");
        same("W/m^2/K", "W·m⁻²·K⁻¹");
        same("W/m^2/K", "W*m^-2*K^-1");
        same("W/m²/K", "kg/s^3/K");
        same("Pa.s", "kg/(m.s)");
        same("m/s/s", "m/s^2");
        same("1/s", "Hz");
        same("1/(m.K)", "m^-1.K^-1");
        same("((m))", "m");
        same("m^1", "m");
        same("J/(kg.(K))", "m^2/s^2/K");
        assert_eq!(factor("km/h"), 1000.0 / 3600.0);
        assert_eq!(factor("1"), 1.0);
    }

    #[test]
    fn powers_are_exact_rationals() {
        same("m^0.5.m^(1/2)", "m");
        same("m^(-3/2)", "m^-1.5");
        same("m^0.25.m^0.750", "m");
        same("m^−1", "m⁻¹");
        same("m^2.K", "m².K");
        same("(m/s)^2", "J/kg");
        same("(m^2)^(1/2)", "m");
        assert_eq!(parse_unit("s^0").unwrap().dimension, Dimension::NONE);
        assert!((factor("cm^3") / 1e-6 - 1.0).abs() < 1e-15);
        assert!((factor("L^(1/3)") - 0.1).abs() < 1e-16);
    }

    #[test]
    fn malformed_units_say_where() {
        let at = |text: &str| match parse_unit(text) {
            Err(UnitProblem::Malformed { at, why }) => {
                assert!(!why.is_empty());
                at
            }
            other => panic!("{text}: {other:?}"),
        };
        assert_eq!(at(""), 0..0);
        assert_eq!(at("W/"), 2..2);
        assert_eq!(at("W//m"), 2..3);
        assert_eq!(at("W m"), 1..2);
        assert_eq!(at("(m"), 0..1);
        assert_eq!(at("m)"), 1..2);
        assert_eq!(at("()"), 1..2);
        assert_eq!(at("m^"), 2..2);
        assert_eq!(at("m^K"), 2..2);
        assert_eq!(at("m^1/2"), 4..5);
        assert_eq!(at("m^2^2"), 3..4);
        assert_eq!(at("m^(1/0)"), 1..7);
        assert_eq!(at("m^0.1234"), 2..8);
        assert_eq!(at("m^9999999999999"), 2..15);
        assert_eq!(at("m^1001"), 2..6);
        assert_eq!(at("m⁻"), 1..4);
        assert_eq!(at("2/s"), 0..1);
        assert_eq!(at("m.1"), 2..3);
        assert_eq!(at("m**2"), 2..3);
        assert_eq!(at("barg/m"), 0..4);
        assert_eq!(at("m/barg"), 2..6);
        assert_eq!(at(&format!("{}m{}", "(".repeat(9), ")".repeat(9))), 8..9);
        assert!(parse_unit(&format!("{}m{}", "(".repeat(8), ")".repeat(8))).is_ok());
    }

    #[test]
    fn limits_hold() {
        assert_eq!(parse_unit(&"m".repeat(LONGEST_UNIT + 1)), Err(UnitProblem::TooLong));
        assert_eq!(parse_unit("km^300"), Err(UnitProblem::Overflow));
        assert_eq!(parse_unit("mm^300"), Err(UnitProblem::Overflow));
        assert_eq!(parse_unit("(m^500)^3"), Err(UnitProblem::Overflow));
        assert_eq!(parse_unit("m^900.m^900"), Err(UnitProblem::Overflow));
    }

    /// A small linear congruential generator (Knuth, MMIX constants, recalled): the same texts on every run.
    struct Dice(u64);

    impl Dice {
        fn below(&mut self, bound: usize) -> usize {
            self.0 = self.0.wrapping_mul(6_364_136_223_846_793_005).wrapping_add(1_442_695_040_888_963_407);
            (self.0 >> 33) as usize % bound
        }
    }

    #[test]
    fn no_text_makes_it_panic() {
        let pieces = [
            "m",
            "kg",
            "W",
            "K",
            "degC",
            "°C",
            "barg",
            "inH2O",
            "%",
            "µ",
            "Ω",
            "q",
            "foo",
            "1",
            "2",
            "0",
            "9999999999",
            ".",
            "/",
            "*",
            "·",
            "^",
            "(",
            ")",
            "-",
            "−",
            "²",
            "⁻",
            "¹",
            "_",
            " ",
            "\t",
            "\u{301}",
            "é",
            "🦆",
            "\0",
            "^(1/2)",
            "^-1",
            "^0.5",
            "s-1",
            "m2",
            "km^99",
            "°",
            "′",
            "a̐",
            "ﬁ",
            "İ",
            "ß",
            "\u{202e}",
        ];
        let mut dice = Dice(20_260_101);
        let (mut read, mut refused) = (0, 0);
        let signs = [".", "/", "*", "·", "^2.", "⁻¹/"];
        let symbols = ["m", "kg", "W", "degC", "inH2O", "µPa", "(K)", "(m/s)^2", "Ω^(1/2)", "ft^-1", "bar"];
        for _ in 0..15_000 {
            let mut text = String::new();
            // Every other text has the shape of a unit, so that sound ones come up often.
            let shaped = dice.below(2) == 0;
            for at in 0..=dice.below(8) {
                if shaped {
                    text.push_str(if at == 0 { "" } else { signs[dice.below(signs.len())] });
                    text.push_str(symbols[dice.below(symbols.len())]);
                } else if dice.below(4) == 0 {
                    text.extend(char::from_u32(dice.below(0x3100) as u32));
                } else {
                    text.push_str(pieces[dice.below(pieces.len())]);
                }
            }
            match parse_unit(&text) {
                Ok(unit) => {
                    read += 1;
                    assert!(unit.factor.is_normal() && unit.factor > 0.0, "{text}");
                }
                Err(problem) => {
                    refused += 1;
                    assert!(!problem.message().is_empty());
                    if let Some(at) = problem.at() {
                        assert!(text.get(at.clone()).is_some(), "{text} {at:?}");
                    }
                }
            }
            let _ = mend::mended(&text);
        }
        // Both kinds must have come up, or the test says nothing.
        assert!(read > 1000 && refused > 1000, "{read} {refused}");
    }
}
