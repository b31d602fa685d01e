//! `temperature-kind`

use crate::checks::check::{Basis, Check, Family};
use crate::syntax::Level;

/// The check.
pub const CHECK: Check = Check {
    name: "temperature-kind",
    family: Family::Units,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Whether a temperature is a point or a difference where the other is wanted. Degrees Celsius and Fahrenheit are points; kelvin is settled by use over the whole deck.",
        formula: "",
        source: "common practice",
        remedy: "Write a difference in K, or put difference or absolute behind the quantity.",
    },
    run: None, // found while the deck is read and resolved
};

#[cfg(test)]
mod tests {
    use crate::testing::expect_reading as expect;

    #[test]
    fn two_points_added() {
        expect(
            r##"
given
    a = 20 degC + 30 degC  #! temperature-kind "adds two points"
"##,
        );
    }

    #[test]
    fn a_point_scaled() {
        expect(
            r##"
given
    q = 6 W/m^2/K * 20 degC  #! temperature-kind "absolute zero"
"##,
        );
    }

    #[test]
    fn a_point_for_a_difference() {
        expect(
            r##"
given
    T = 20 degC +- 2 degC  #! temperature-kind
"##,
        );
    }

    #[test]
    fn use_settles_kelvin() {
        expect(
            r##"
given
    dT = 5 K
    T_hot = 20 degC + dT
    q = 6 W/m^2/K * dT
    r = 6 W/m^2/K * (T_hot - 10 degC)
"##,
        );
    }

    #[test]
    fn an_absolute_temperature_may_be_scaled() {
        expect(
            r##"
given
    T0 = 300 K
    rho = 1 bar * 28.97 g/mol / (R * T0)
    T1 = T0 - 10 degC
"##,
        );
    }
}
