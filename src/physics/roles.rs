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
