//! `likely-unit-slip`: the value fits the substance, or what is usual, in another unit.

use super::slip::{replacement, slips};
use crate::checks::look::sentence;
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::syntax::{Finding, Level};

/// The check.
pub static CHECK: Check = Check {
    name: "likely-unit-slip",
    family: Family::Units,
    limits: &[],
    level: Level::Error,
    basis: Basis {
        compares: "Values that cannot be meant as written (a property a factor away from the substance's own, a first cell wider than the space, a temperature outside the substance's data) with the same number in another unit.",
        formula: "number × other unit, within 20 % of the substance's own or within the range that the rest of the deck gives",
        source: "The substance's data, whose source stands with each (deckline substances); common practice",
        remedy: "Write the unit that was meant.",
    },
    run: Some(run),
};

fn run(subject: &Subject<'_>, _: &Weighing) -> Vec<Finding> {
    let findings = slips(subject).into_iter().map(|slip| {
        let mut finding = Finding::new(CHECK.name, slip.level, slip.place, sentence(&slip.message))
            .remedy(slip.meant.clone())
            .about(slip.subject);
        if let Some(literal) = slip.literal {
            finding.fixes.push(replacement(format!("Write {}", slip.meant), literal, slip.meant, slip.sure));
            if literal != slip.place {
                finding = finding.related(literal, "the quantity is written here");
            }
        }
        finding
    });
    findings.collect()
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::{after_fix, expect_of};

    #[test]
    fn a_property_in_another_unit() {
        expect_of(
            CHECK.name,
            r##"
fluid bath
    substance     water
    reference     20 degC
    viscosity     1.002 Pa.s     #! likely-unit-slip "1.002 mPa.s fits"
    heat-capacity 4.18 J/kg/K    #! likely-unit-slip "4.18 kJ/kg/K fits"
    density       0.998 kg/m^3   #! likely-unit-slip "0.998 g/cm^3 fits"
fluid oil
    substance           engine_oil
    reference           40 degC
    kinematic-viscosity 240 m^2/s   #! likely-unit-slip "240 mm^2/s fits"
"##,
        );
    }

    #[test]
    fn kinematic_for_dynamic() {
        expect_of(
            CHECK.name,
            r##"
fluid bath
    substance   water
    reference   20 degC
    viscosity   1.004e-6 Pa.s   #! likely-unit-slip "kinematic viscosity of water"
fluid room
    substance   air
    reference   20 degC
    viscosity   1.51e-5 Pa.s   #! likely-unit-slip "kinematic viscosity of air"
"##,
        );
    }

    #[test]
    fn temperatures() {
        expect_of(
            CHECK.name,
            r##"
fluid room_air
    substance  air
    reference  20 degC
region room
    box          1 m by 1 m by 3 m
    filled with  room_air
boundary w of room
    side west
    wall
    held at  25 K   #! likely-unit-slip "25 degC was probably meant"
boundary e of room
    side east
    wall
    held at  15 degC
fluid bath
    substance  water
    reference  293 degC   #! likely-unit-slip "293 K, 19.85 degC, was"
"##,
        );
    }

    #[test]
    fn pressures() {
        expect_of(
            CHECK.name,
            r##"
fluid room_air
    substance  air
    reference  20 degC at 101.3 Pa   #! likely-unit-slip "101.3 kPa"
fluid cellar_air
    substance  air
    reference  20 degC at 0 bar   #! likely-unit-slip "gauge"
fluid heating
    substance  water
    reference  90 degC at 0.3 bar   #! likely-unit-slip "gauge"
"##,
        );
    }

    #[test]
    fn lengths() {
        expect_of(
            CHECK.name,
            r##"
region room
    box       1 m by 1 m by 3 m
region slot
    gap       16 m by 1.2 m   #! likely-unit-slip "16 mm"
mesh of room
    cells      10 by 10 by 10
    first-cell 1.5 m   #! likely-unit-slip "1.5 mm"
region cabinet
    box        500 m by 600 m by 1100 m   #! likely-unit-slip "500 mm", likely-unit-slip "600 mm", likely-unit-slip "1100 mm"
"##,
        );
    }

    #[test]
    fn plain_numbers() {
        expect_of(
            CHECK.name,
            r##"
case "A room"
    gravity 981 m/s^2 along -z   #! likely-unit-slip "981 cm/s^2"
solid steel
    emissivity 85   #! likely-unit-slip "85 %"
fluid brine
    substance  ethylene_glycol at 30   #! likely-unit-slip "30 %"
region room
    box        1 m by 1 m by 3 m
    tilt       60   #! likely-unit-slip "60 deg"
mesh of room
    cells      10 by 10 by 10
    growth     15 %   #! likely-unit-slip "1.15"
"##,
        );
    }

    #[test]
    fn sound() {
        expect_of(
            CHECK.name,
            r##"
case "Nothing here is a slip"
    gravity 3.71 m/s^2 along -z
    ambient -60 degC at 600 Pa
fluid mars_air
    substance  carbon_dioxide
    reference  -55 degC at 600 Pa
fluid cold_nitrogen
    substance  nitrogen
    reference  120 K
fluid oven_air
    substance  air
    reference  300 degC
region valley
    box          5 km by 4 km by 1 km
    filled with  oven_air
    flow         turbulent by large-eddy
region oven
    box          0.5 m by 0.5 m by 0.4 m
    filled with  oven_air
boundary hot of oven
    side west
    wall
    held at      320 degC
boundary sky of oven
    side top
    wall
    radiates to  3 K
mesh of oven
    cells        50 by 50 by 40
    first-cell   2 mm
    growth       115 %
"##,
        );
    }

    #[test]
    fn the_fix_writes_the_unit() {
        let text = r##"
fluid bath
    substance  water
    reference  20 degC
    viscosity  1.002 Pa.s
"##;
        assert!(after_fix(CHECK.name, text).contains("viscosity  1.002 mPa.s"), "{}", after_fix(CHECK.name, text));
    }

    #[test]
    fn the_fix_mends_the_definition() {
        let text = r##"
given
    T_wall = 25 K
fluid bath
    substance  water
    reference  20 degC
region tank
    box          1 m by 1 m by 3 m
    filled with  bath
boundary w of tank
    side west
    wall
    held at  T_wall
"##;
        assert!(after_fix(CHECK.name, text).contains("T_wall = 25 degC"), "{}", after_fix(CHECK.name, text));
    }
}
