//! The dimension of a quantity: a product of powers of the seven base quantities of ISO 80000-1.

use num_rational::Ratio;
use num_traits::{CheckedAdd, CheckedMul, CheckedSub, Zero};

/// The exponent of one base quantity: an exact rational, so that a square root loses nothing.
pub type Exponent = Ratio<i32>;

/// Largest numerator and denominator of an exponent. No physical dimension comes near it, and below it the arithmetic of
/// exponents cannot overflow 32 bits.
pub const EXPONENT_LIMIT: i32 = 1000;

/// Symbols of the SI base units, in the order of [`Dimension::exponents`].
const BASE_UNITS: [&str; 7] = ["m", "kg", "s", "A", "K", "mol", "cd"];

/// The order in which base units are written: mass first, as in `kg.m^-1.s^-1`.
const WRITING_ORDER: [usize; 7] = [1, 0, 2, 3, 4, 5, 6];

/// The dimension of a quantity.
#[derive(Clone, Copy, PartialEq, Eq, Hash, Debug)]
pub struct Dimension {
    /// Exponents of length, mass, time, electric current, thermodynamic temperature, amount of substance and luminous
    /// intensity, in this order (ISO 80000-1).
    pub exponents: [Exponent; 7],
}

impl Dimension {
    /// The dimension of a plain number.
    pub const NONE: Dimension = Dimension::of(0, 0, 0, 0, 0, 0, 0);

    /// A dimension with whole exponents, in the order length, mass, time, current, temperature, amount, luminous
    /// intensity.
    #[must_use]
    pub const fn of(l: i32, m: i32, t: i32, i: i32, theta: i32, n: i32, j: i32) -> Dimension {
        Dimension {
            exponents: [
                Exponent::new_raw(l, 1),
                Exponent::new_raw(m, 1),
                Exponent::new_raw(t, 1),
                Exponent::new_raw(i, 1),
                Exponent::new_raw(theta, 1),
                Exponent::new_raw(n, 1),
                Exponent::new_raw(j, 1),
            ],
        }
    }

    /// Whether this is the dimension of a plain number.
    #[must_use]
    pub fn is_none(self) -> bool {
        self.exponents.iter().all(Zero::is_zero)
    }

    /// The dimension of a product; `None` where an exponent leaves [`EXPONENT_LIMIT`].
    #[must_use]
    pub fn times(self, other: Dimension) -> Option<Dimension> {
        self.combined(other, |a, b| a.checked_add(&b))
    }

    /// The dimension of a quotient; `None` where an exponent leaves [`EXPONENT_LIMIT`].
    #[must_use]
    pub fn over(self, other: Dimension) -> Option<Dimension> {
        self.combined(other, |a, b| a.checked_sub(&b))
    }

    /// The dimension of a power; `None` where an exponent leaves [`EXPONENT_LIMIT`].
    #[must_use]
    pub fn power(self, exponent: Exponent) -> Option<Dimension> {
        let same = Dimension { exponents: [exponent; 7] };
        self.combined(same, |a, b| a.checked_mul(&b))
    }

    /// The dimension in SI base units: `kg.m^-1.s^-1`, or `1` for a plain number. A broken exponent is written
    /// `m^(1/2)`.
    #[must_use]
    pub fn base_units(self) -> String {
        let written: Vec<String> = WRITING_ORDER
            .iter()
            .filter_map(|&at| Some((BASE_UNITS.get(at)?, self.exponents.get(at)?)))
            .filter(|(_, exponent)| !exponent.is_zero())
            .map(|(unit, exponent)| match (*exponent.numer(), *exponent.denom()) {
                (1, 1) => (*unit).to_string(),
                (whole, 1) => format!("{unit}^{whole}"),
                (above, below) => format!("{unit}^({above}/{below})"),
            })
            .collect();
        if written.is_empty() { "1".to_string() } else { written.join(".") }
    }

    fn combined(
        self,
        other: Dimension,
        operation: impl Fn(Exponent, Exponent) -> Option<Exponent>,
    ) -> Option<Dimension> {
        let mut exponents = self.exponents;
        for (mine, theirs) in exponents.iter_mut().zip(other.exponents) {
            *mine = bounded(operation(bounded(*mine)?, bounded(theirs)?)?)?;
        }
        Some(Dimension { exponents })
    }
}

/// The exponent itself where it is within [`EXPONENT_LIMIT`] and in lowest terms' sign convention.
fn bounded(exponent: Exponent) -> Option<Exponent> {
    let within = (-EXPONENT_LIMIT..=EXPONENT_LIMIT).contains(exponent.numer())
        && (1..=EXPONENT_LIMIT).contains(exponent.denom());
    within.then_some(exponent)
}

#[cfg(test)]
mod tests {
    use super::*;

    const LENGTH: Dimension = Dimension::of(1, 0, 0, 0, 0, 0, 0);
    const TIME: Dimension = Dimension::of(0, 0, 1, 0, 0, 0, 0);
    const VISCOSITY: Dimension = Dimension::of(-1, 1, -1, 0, 0, 0, 0);

    #[test]
    fn products_quotients_and_powers() {
        let speed = LENGTH.over(TIME).unwrap();
        assert_eq!(speed, Dimension::of(1, 0, -1, 0, 0, 0, 0));
        assert_eq!(speed.times(TIME), Some(LENGTH));
        assert_eq!(LENGTH.over(LENGTH), Some(Dimension::NONE));
        assert!(LENGTH.over(LENGTH).unwrap().is_none());
        assert!(!speed.is_none());
    }

    #[test]
    fn a_square_root_is_exact() {
        let root = LENGTH.power(Exponent::new(1, 2)).unwrap();
        assert_eq!(root.base_units(), "m^(1/2)");
        assert_eq!(root.times(root), Some(LENGTH));
        assert_eq!(LENGTH.power(Exponent::new(1, 3)).and_then(|d| d.power(3.into())), Some(LENGTH));
    }

    #[test]
    fn base_units_are_written_mass_first() {
        assert_eq!(VISCOSITY.base_units(), "kg.m^-1.s^-1");
        assert_eq!(Dimension::NONE.base_units(), "1");
        assert_eq!(Dimension::of(1, 2, 3, 4, 5, 6, 7).base_units(), "kg^2.m.s^3.A^4.K^5.mol^6.cd^7");
    }

    #[test]
    fn nothing_overflows() {
        let huge = Dimension::of(i32::MAX, 0, 0, 0, 0, 0, 0);
        let least = Dimension::of(i32::MIN, 0, 0, 0, 0, 0, 0);
        assert_eq!(huge.times(huge), None);
        assert_eq!(least.over(huge), None);
        assert_eq!(least.power(Exponent::new_raw(i32::MIN, -1)), None);
        assert_eq!(LENGTH.power(Exponent::new_raw(1, 0)), None);
        let mut growing = LENGTH;
        let mut steps = 0;
        while let Some(next) = growing.power(Exponent::new(7, 3)) {
            growing = next;
            steps += 1;
            assert!(steps < 100);
        }
        assert!(steps > 1);
    }
}
