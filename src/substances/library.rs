//! The built-in substances. Each is a `.buoy` file like one that a user writes, read when it is first asked for.

use crate::case::model::Substance;
use crate::case::{Known, Point, Role, Source, resolve};
use crate::syntax::{FileId, Finding, parse};
use std::sync::{LazyLock, OnceLock};

macro_rules! data {
    ($($name:literal),* $(,)?) => { &[$(($name, include_str!(concat!("data/", $name, ".buoy")))),*] };
}

/// Name and text of each.
pub const FILES: &[(&str, &str)] = data![
    "air",
    "argon",
    "carbon_dioxide",
    "engine_oil",
    "ethanol",
    "ethylene_glycol",
    "glycerol",
    "helium",
    "hydrogen",
    "lead_bismuth",
    "mercury",
    "methane",
    "nitrogen",
    "oxygen",
    "propylene_glycol",
    "sea_water",
    "silicone_oil",
    "sodium",
    "solar_salt",
    "steam",
    "transformer_oil",
    "water",
];

/// Their names, in alphabetical order.
pub static NAMES: LazyLock<Vec<&'static str>> = LazyLock::new(|| FILES.iter().map(|(name, _)| *name).collect());

static SUBSTANCES: LazyLock<Vec<OnceLock<Option<Substance>>>> =
    LazyLock::new(|| FILES.iter().map(|_| OnceLock::new()).collect());

/// The built-in substance of a name.
pub fn find(name: &str) -> Option<&'static Substance> {
    let index = FILES.iter().position(|(known, _)| *known == name)?;
    let text = FILES.get(index)?.1;
    SUBSTANCES.get(index)?.get_or_init(|| read(text).0).as_ref()
}

/// Every built-in substance, by name.
pub fn library() -> impl Iterator<Item = &'static Substance> {
    FILES.iter().filter_map(|(name, _)| find(name))
}

/// The substance in a text, and what reading it found.
fn read(text: &str) -> (Option<Substance>, Vec<Finding>) {
    let tree = parse(text);
    let sources = [Source { file: FileId(0), tree: &tree, role: Role::Deck }];
    let resolution = resolve(&sources, Known::default());
    let case = resolution.case(&Point::default());
    (case.substances.into_iter().next(), resolution.findings)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_file_reads_without_a_finding_and_holds_the_substance_of_its_name() {
        for (name, text) in FILES {
            let (substance, findings) = read(text);
            let serious: Vec<&Finding> = findings.iter().filter(|finding| finding.check != "unused-name").collect();
            assert!(serious.is_empty(), "{name}: {serious:#?}");
            let substance = substance.expect(name);
            assert_eq!(&*substance.name.text, *name);
            assert!(
                !substance.source.is_empty() && !substance.deviation.is_empty(),
                "{name} lacks source or deviation"
            );
            assert!(substance.state.is_some() && substance.valid.is_some(), "{name} lacks state or range");
        }
    }

    #[test]
    fn the_list_is_the_folder() {
        let folder = concat!(env!("CARGO_MANIFEST_DIR"), "/src/substances/data");
        let mut found: Vec<String> = std::fs::read_dir(folder)
            .expect("the data folder")
            .filter_map(|entry| entry.ok()?.file_name().into_string().ok()?.strip_suffix(".buoy").map(str::to_string))
            .collect();
        found.sort();
        assert_eq!(found, *NAMES);
    }

    #[test]
    fn every_substance_has_all_properties_over_its_range() {
        for substance in library() {
            let medium = crate::substances::Medium {
                substance,
                fraction: substance.fraction.map_or(0.0, |(low, high)| 0.5 * (low + high)),
            };
            let (low, high) = medium.range();
            for step in 0..=10 {
                let temperature = low + (high - low) * f64::from(step) / 10.0;
                // Steam and water hold on their side of boiling only.
                let pressure = match &*substance.name.text {
                    "water" => 20.0e6,
                    "steam" => 500.0,
                    _ => 101_325.0,
                };
                let properties = medium.properties(temperature, pressure);
                let all = properties.map(|p| [p.density, p.heat_capacity, p.viscosity, p.conductivity]);
                assert!(
                    all.is_some_and(|all| all.iter().all(|value| value.is_finite() && *value > 0.0)),
                    "{} at {temperature} K: {properties:?}",
                    substance.name.text
                );
                assert!(
                    properties.is_some_and(|p| p.expansion.is_finite()),
                    "{} at {temperature} K",
                    substance.name.text
                );
            }
        }
    }
}
