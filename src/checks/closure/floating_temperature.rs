//! `floating-temperature`: a steady case in which no temperature is given anywhere.

use super::network::{Network, networks};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{finding_of, is_steady, listed};
use crate::syntax::{Finding, Level};

/// The check.
pub const CHECK: Check = Check {
    name: "floating-temperature",
    family: Family::Closure,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "In a steady run, looks in each region (and all that share faces with it) for one temperature that is given.",
        formula: "",
        source: "a steady conduction problem with fluxes alone is settled only up to a constant: Carslaw and Jaeger, Conduction of Heat \
                 in Solids, 2nd edition, 1959, section 1.9 (recalled)",
        remedy: "Hold one face at a temperature or let it exchange heat with surroundings, or follow the case in time from an initial state.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    if !is_steady(subject.case) {
        return Vec::new();
    }
    floating(subject)
        .into_iter()
        .filter_map(|network| {
            let budget = network.budget(subject);
            // Out of balance there is no steady state at all, which `heat-imbalance` says.
            if budget.imbalance() > super::heat_imbalance::TOLERANCE {
                return None;
            }
            let names: Vec<&str> = network.regions.iter().map(|(region, _)| &*region.name.text).collect();
            let (first, _) = network.regions.first()?;
            let message = format!(
                "No temperature is given anywhere on {}: its faces are insulated or pass a given heat, which settles the steady \
                 temperatures only up to a constant.",
                listed(&names)
            );
            Some(
                finding_of(CHECK.name, weighing.level, &first.name, message)
                    .remedy("`held at` or `exchanges` on one face, or a `transient` run from an `initial` temperature"),
            )
        })
        .collect()
}

/// The networks of regions in which no temperature is given and no condition is missing.
pub fn floating<'a>(subject: &Subject<'a>) -> Vec<Network<'a>> {
    let is_floating =
        |network: &Network<'_>| !network.has_given_temperature(subject) && !network.is_unfinished(subject);
    networks(subject).into_iter().filter(is_floating).collect()
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn nothing_is_given() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance air
region room  #! floating-temperature "`room`"
    box 1 m by 2 m by 3 m
    filled with a
boundary all_round of room
    side remaining
    insulated
run
    steady
"##,
        );
    }

    #[test]
    fn a_neighbour_that_exchanges() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance air
solid brick
    conductivity 0.8 W/m/K
region room
    box 1 m by 2 m by 3 m
    filled with a
boundary inside of room
    side west
    meets masonry
boundary rest of room
    side remaining
    insulated
region masonry
    box 0.2 m by 2 m by 3 m
    made of brick
boundary outside of masonry
    side west
    exchanges 20 W/m^2/K with 0 degC
boundary back of masonry
    side east
    meets room
boundary rim of masonry
    side remaining
    insulated
run
    steady
"##,
        );
    }

    #[test]
    fn in_time_the_start_settles_it() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance air
region room
    box 1 m by 2 m by 3 m
    filled with a
boundary all_round of room
    side remaining
    insulated
run
    transient for 1 h step 1 s
"##,
        );
    }
}
