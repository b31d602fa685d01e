//! Which parts of a surface are hot and which are cold.

use super::conditions::Wall;

/// What a wall is to the fluid.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Role {
    /// Heats it.
    Hot,
    /// Cools it.
    Cold,
    /// Neither, or between the two.
    Neutral,
}

/// The role of each wall. `releases_heat` tells of a source inside.
///
/// Temperatures that are held decide where two of them differ; else the temperatures that walls draw to, and fluxes by
/// their sign. A wall within the middle half between the coldest and the hottest is neither. Where all walls draw to
/// one temperature, the heat released inside or by other walls makes them cold.
pub fn roles(walls: &[Wall<'_>], releases_heat: bool) -> Vec<Role> {
    let closed = || walls.iter().filter(|wall| !wall.is_open);
    let held = range(closed().filter_map(|wall| wall.condition.held.map(|held| held.si)));
    let anchors = range(closed().filter_map(|wall| wall.condition.anchor()));
    let only_held = differ(held);
    let (low, high) = if only_held { held } else { anchors };
    let has_spread = differ((low, high));
    let heats = releases_heat || closed().any(|wall| wall.condition.flux > 0.0);
    let cools = closed().any(|wall| wall.condition.flux < 0.0);
    let role = |wall: &Wall<'_>| {
        let condition = &wall.condition;
        if wall.is_open || !condition.is_active() {
            return Role::Neutral;
        }
        let Some(anchor) = condition.anchor() else {
            return if condition.flux > 0.0 { Role::Hot } else { Role::Cold };
        };
        if has_spread {
            if only_held && condition.held.is_none() {
                return Role::Neutral;
            }
            return match (anchor - low) / (high - low) {
                share if share > 0.75 => Role::Hot,
                share if share < 0.25 => Role::Cold,
                _ => Role::Neutral,
            };
        }
        let own = if condition.held.is_some() { 0.0 } else { condition.flux };
        if own != 0.0 {
            return if own > 0.0 { Role::Hot } else { Role::Cold };
        }
        match (heats, cools) {
            (true, false) => Role::Cold,
            (false, true) => Role::Hot,
            _ => Role::Neutral,
        }
    };
    walls.iter().map(role).collect()
}

/// Least and greatest; (∞, −∞) of nothing.
fn range(values: impl Iterator<Item = f64>) -> (f64, f64) {
    values
        .filter(|value| value.is_finite())
        .fold((f64::INFINITY, f64::NEG_INFINITY), |(low, high), value| (low.min(value), high.max(value)))
}

/// Whether two temperatures differ by more than rounding.
fn differ((low, high): (f64, f64)) -> bool {
    high - low > 1e-6
}

#[cfg(test)]
mod tests {
    use crate::testing::physics;

    /// The arrangement's sentence, which names what is hot and what is cold.
    fn why(boundaries: &str) -> String {
        let text = format!(
            "fluid a\n    substance air\n    reference 20 degC\nregion r\n    box 1 m by 1 m by 1 m\n    filled with a\n{boundaries}"
        );
        physics(&text).remove(0).arrangement.why
    }

    fn wall(name: &str, side: &str, heat: &str) -> String {
        format!("boundary {name} of r\n    side {side}\n    wall\n    {heat}\n")
    }

    #[test]
    fn held_temperatures_decide() {
        let text = wall("a1", "west", "held at 50 degC")
            + &wall("a2", "east", "held at 10 degC")
            + &wall("a3", "remaining", "exchanges 5 W/m^2/K with -20 degC");
        assert!(why(&text).starts_with("boundary a1 (west) is hot and boundary a2 (east) is cold"), "{}", why(&text));
    }

    #[test]
    fn one_between_is_neither() {
        let text = wall("a1", "west", "held at 50 degC")
            + &wall("a2", "east", "held at 10 degC")
            + &wall("a3", "top, bottom", "held at 30 degC");
        assert!(why(&text).starts_with("boundary a1 (west) is hot and boundary a2 (east) is cold"), "{}", why(&text));
    }

    #[test]
    fn a_flux_makes_the_others_cold() {
        let text = wall("a1", "west", "heated by 50 W/m^2") + &wall("a2", "east", "exchanges 5 W/m^2/K with 20 degC");
        assert!(why(&text).starts_with("boundary a1 (west) is hot and boundary a2 (east) is cold"), "{}", why(&text));
        let text = wall("a1", "west", "cooled by 50 W/m^2") + &wall("a2", "east", "exchanges 5 W/m^2/K with 20 degC");
        assert!(why(&text).starts_with("boundary a2 (east) is hot and boundary a1 (west) is cold"), "{}", why(&text));
    }

    #[test]
    fn a_source_makes_them_cold_too() {
        let text = wall("a1", "remaining", "held at 20 degC") + "source s in r\n    releases 10 W\n";
        assert_eq!(
            why(&text),
            "heat is released inside, and boundary a1 (6 sides) is cold: there is no pair of a hot and a cold side"
        );
    }
}
