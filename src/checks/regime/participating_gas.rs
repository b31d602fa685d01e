//! `participating-gas`: radiation through a fluid that is not transparent to it, computed as if it were.

use crate::case::model::{Radiation, Region};
use crate::checks::check::{Basis, Check, Family, Subject, Weighing};
use crate::checks::look::{Weighed, estimate_note, regions};
use crate::physics::model::{Geometry, RegionPhysics};
use crate::quantity::display::{format_number, format_si};
use crate::substances::Medium;
use crate::syntax::{Finding, Level};
use crate::vocabulary::statements::LENGTH;

/// The check.
pub const CHECK: Check = Check {
    name: "participating-gas",
    family: Family::Regime,
    limits: &[(Level::Information, 0.1), (Level::Warning, 1.0)],
    level: Level::Warning,
    basis: Basis {
        compares: "Where radiation passes from surface to surface, holds the optical thickness of carbon dioxide, steam or methane between them against \
                   that of a transparent gas; and looks for liquids, which are opaque to heat radiation.",
        formula: "τ = κ p L; κ is the Planck mean absorption coefficient, L = 3.6 V / A the mean beam length",
        source: "κ: the fits to the narrow-band model of Grosshandler, NIST Technical Note 1402 (1993), that Barlow, Karpetis, Frank and Chen, \
                 Combust. Flame 127 (2001) 2102, give for 300 K to 2500 K (coefficients as in a public radiation library). L: Hottel and Sarofim, \
                 Radiative Transfer, 1967 (recalled). The limits are common practice; a Planck mean overstates what thick layers absorb",
        remedy: "`radiation participating`.",
    },
    run: Some(run),
};

/// Pressure of a standard atmosphere, Pa, in which the fits count.
const ATMOSPHERE: f64 = 101_325.0;

/// Planck mean absorption coefficient over the partial pressure, 1/(m atm), of a pure gas at a temperature in K. `None` for
/// gases that do not absorb heat radiation, or are not in the table. The fits begin at 300 K and are held there below.
fn absorption(substance: &str, temperature: f64) -> Option<f64> {
    let temperature = temperature.max(300.0);
    let polynomial = |coefficients: &[f64], x: f64| coefficients.iter().rev().fold(0.0, |sum, c| sum * x + c);
    match substance {
        "carbon_dioxide" => {
            Some(polynomial(&[18.741, -121.310, 273.500, -194.050, 56.310, -5.8169], 1000.0 / temperature))
        }
        "steam" => {
            Some(polynomial(&[-0.23093, -1.12390, 9.41530, -2.99880, 0.51382, -1.86840e-5], 1000.0 / temperature))
        }
        "methane" => Some(polynomial(&[6.6334, -0.0035686, 1.6682e-8, 2.5611e-10, -2.6558e-14], temperature)),
        _ => None,
    }
}

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    regions(subject).filter_map(|(region, physics)| of_region(subject, region, physics, weighing)).collect()
}

fn of_region(subject: &Subject<'_>, region: &Region, physics: &RegionPhysics, weighing: &Weighing) -> Option<Finding> {
    let radiation = region.radiation.filter(|radiation| radiation.value == Radiation::SurfaceToSurface)?;
    let fluid = subject.case.fluid_of(region)?;
    let medium = Medium::of(subject.case, fluid)?;
    let finding = |level: Level, message: String| {
        Finding::new(CHECK.name, level, radiation.place, message).about(&*region.name.text)
    };
    let substance = &*fluid.substance.as_ref()?.text;
    if !medium.is_gas() {
        let message = format!(
            "`{}` is a liquid, and liquids are opaque to heat radiation within millimetres: none passes from surface to surface.",
            fluid.name.text
        );
        let finding = finding(weighing.level, message).remedy("`radiation none`");
        return Some(finding.fix("Write `radiation none`", radiation.place.span, "radiation none", false));
    }
    let pressure = physics.fluid.as_ref()?.pressure / ATMOSPHERE;
    let path = beam_length(&physics.geometry);
    let thickness = Weighed::given(absorption(substance, physics.numbers.film_temperature)? * pressure * path);
    let (level, limit) = thickness.over(weighing)?;
    let message = format!(
        "{} absorbs heat radiation: its optical thickness over the mean path of {} in `{}` is {}, and it is taken as transparent.{}",
        substance.replace('_', " "),
        format_si(path, LENGTH),
        region.name.text,
        format_number(thickness.value),
        estimate_note(physics.bracket.as_ref()),
    );
    Some(finding(level, message).remedy("`radiation participating`").weighing(thickness.margin("κpL", limit)).fix(
        "Write `radiation participating`",
        radiation.place.span,
        "radiation participating",
        false,
    ))
}

/// Mean beam length of a volume, m: 3.6 V / A; the characteristic length where volume or surface is not known, or the fluid is
/// wide.
fn beam_length(geometry: &Geometry) -> f64 {
    let surface: f64 = geometry.sides.iter().map(|side| side.area).sum();
    let path = 3.6 * geometry.volume / surface;
    if path.is_finite() && path > 0.0 { path } else { geometry.length }
}

#[cfg(test)]
mod tests {
    use super::{CHECK, absorption};
    use crate::testing::expect_of;

    #[test]
    fn gases_that_absorb() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    carbon_dioxide
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          0.3 m by 0.3 m
    filled with  a
    flow         laminar
    radiation surface-to-surface  #! participating-gas
boundary hot of c
    side west
    held at 30 degC
boundary cold of c
    side east
    held at 10 degC
boundary rest of c
    side remaining
    insulated
"##,
        );
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    carbon_dioxide
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          1 mm by 10 mm
    filled with  a
    flow         laminar
    radiation surface-to-surface
boundary hot of c
    side west
    held at 30 degC
boundary cold of c
    side east
    held at 10 degC
boundary rest of c
    side remaining
    insulated
"##,
        );
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    air
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          0.3 m by 0.3 m
    filled with  a
    flow         laminar
    radiation surface-to-surface
boundary hot of c
    side west
    held at 30 degC
boundary cold of c
    side east
    held at 10 degC
boundary rest of c
    side remaining
    insulated
"##,
        );
    }

    #[test]
    fn liquids() {
        expect_of(
            CHECK.name,
            r##"
fluid a
    substance    water
    reference    20 degC at 1 atm
    density-law  boussinesq
region c
    box          0.3 m by 0.3 m
    filled with  a
    flow         laminar
    radiation surface-to-surface  #! participating-gas "is a liquid"
boundary hot of c
    side west
    held at 30 degC
boundary cold of c
    side east
    held at 10 degC
boundary rest of c
    side remaining
    insulated
"##,
        );
    }

    #[test]
    fn planck_means() {
        // Carbon dioxide and steam near 300 K absorb some 25 and 50 per metre and atmosphere, at 1000 K some 20 and 6 (handbook charts of
        // Planck mean coefficients, recalled).
        let near = |substance: &str, temperature: f64, expected: f64| {
            let got = absorption(substance, temperature).unwrap();
            assert!((got / expected - 1.0).abs() < 0.4, "{substance} at {temperature} K: {got}");
        };
        near("carbon_dioxide", 300.0, 25.0);
        near("carbon_dioxide", 1000.0, 24.0);
        near("steam", 300.0, 50.0);
        near("steam", 1000.0, 6.0);
        assert_eq!(absorption("air", 300.0), None);
    }
}
