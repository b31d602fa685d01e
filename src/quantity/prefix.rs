//! The 24 SI prefixes (BIPM SI Brochure, 9th edition with the additions of 2022, table 7).

/// One SI prefix.
#[derive(Debug, PartialEq)]
pub struct Prefix {
    /// The symbol, as the SI Brochure writes it.
    pub symbol: &'static str,
    /// Other accepted spellings of the symbol.
    pub aliases: &'static [&'static str],
    /// The name, spelled out.
    pub name: &'static str,
    /// What the unit is multiplied by.
    pub factor: f64,
    /// Whether engineers meet it daily; only these are offered when a unit is mistyped.
    pub common: bool,
}

const fn prefix(symbol: &'static str, name: &'static str, factor: f64, common: bool) -> Prefix {
    Prefix { symbol, aliases: &[], name, factor, common }
}

/// All SI prefixes, largest first.
pub static PREFIXES: [Prefix; 24] = [
    prefix("Q", "quetta", 1e30, false),
    prefix("R", "ronna", 1e27, false),
    prefix("Y", "yotta", 1e24, false),
    prefix("Z", "zetta", 1e21, false),
    prefix("E", "exa", 1e18, false),
    prefix("P", "peta", 1e15, false),
    prefix("T", "tera", 1e12, false),
    prefix("G", "giga", 1e9, true),
    prefix("M", "mega", 1e6, true),
    prefix("k", "kilo", 1e3, true),
    prefix("h", "hecto", 1e2, true),
    prefix("da", "deca", 1e1, false),
    prefix("d", "deci", 1e-1, false),
    prefix("c", "centi", 1e-2, true),
    prefix("m", "milli", 1e-3, true),
    // U+00B5 (micro sign), U+03BC (Greek mu) and plain `u` (ISO 2955) all stand for micro.
    Prefix { symbol: "\u{b5}", aliases: &["\u{3bc}", "u"], name: "micro", factor: 1e-6, common: true },
    prefix("n", "nano", 1e-9, true),
    prefix("p", "pico", 1e-12, false),
    prefix("f", "femto", 1e-15, false),
    prefix("a", "atto", 1e-18, false),
    prefix("z", "zepto", 1e-21, false),
    prefix("y", "yocto", 1e-24, false),
    prefix("r", "ronto", 1e-27, false),
    prefix("q", "quecto", 1e-30, false),
];

impl Prefix {
    /// The symbol and the other spellings.
    pub fn spellings(&self) -> impl Iterator<Item = &'static str> {
        std::iter::once(self.symbol).chain(self.aliases.iter().copied())
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_spelling_is_used_once_and_factors_fall() {
        let mut spellings: Vec<&str> = PREFIXES.iter().flat_map(Prefix::spellings).collect();
        let count = spellings.len();
        spellings.sort_unstable();
        spellings.dedup();
        assert_eq!(spellings.len(), count);
        assert!(PREFIXES.is_sorted_by(|a, b| a.factor > b.factor));
    }
}
