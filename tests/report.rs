//! The faces of a report, shown findings that are made by hand.

#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)]

use deckline::case::Resolution;
use deckline::case::model::{Case, Name};
use deckline::physics::model::Physics;
use deckline::report::{Face, Layout, Paint, Report, Sheet, Unreadable, json, numbers, write};
use deckline::syntax::{FileId, Finding, Level, Margin, Place, Span, SweepPoints, parse};
use deckline::workspace::deck::{Deck, SourceFile};
use std::path::Path;
use std::sync::Arc;

const CABINET: &str = r#"# Instrument cabinet on the observing floor, fans off.

include "shared/materials.buoy"

case "Instrument cabinet, natural cooling"
    gravity        9.81 m/s^2 along -z

given
    T_floor   = 8 degC           "air of the observing floor"
    T_hot     = 70 degC
    P_spare   = 20 W

fluid cabinet_air
    substance      air
    reference      25 degC at 0.79 bar   # at 2400 m
    density-law    boussinesq

region cabinet
    box            0.5 m by 0.6 m by 1.1 m
    filled with    cabinet_air
    flow           laminar
"#;

const MATERIALS: &str = "solid steel\r\n    conductivity  16 W/m\r\n";

fn file(path: &str, text: &str) -> Arc<SourceFile> {
    Arc::new(SourceFile { path: path.into(), text: text.into(), tree: parse(text) })
}

/// The place of a piece of a text.
fn at(file: u32, text: &str, piece: &str) -> Place {
    let start = text.find(piece).unwrap_or_else(|| panic!("{piece}"));
    Place::new(FileId(file), Span::new(start, start + piece.len()))
}

fn margin(quantity: &str, value: f64, limit: f64, band: Option<(f64, f64)>, unit: &str) -> Option<Margin> {
    Some(Margin { quantity: quantity.into(), value, limit, band, unit: unit.into() })
}

fn findings() -> Vec<Finding> {
    let law = at(0, CABINET, "boussinesq");
    let mut span = Finding::new(
        "density-span",
        Level::Warning,
        law,
        "αΔT is 0.148 between 25 and 70 degC; the Boussinesq law is held to 0.1.",
    )
    .remedy("density-law ideal-gas, or T_hot below 55 degC.")
    .related(at(0, CABINET, "T_hot     = 70 degC"), "T_hot sets the highest temperature.")
    .about("cabinet_air")
    .fix("change the law to ideal-gas", law.span, "ideal-gas", false);
    span.margin = margin("αΔT", 0.148, 0.1, None, "");

    let mut buoyancy = Finding::new(
        "buoyancy-error",
        Level::Error,
        law,
        "The lid reaches 93 degC, 68 K above the reference: the linear law gives 31 % too little buoyancy there, and \
         more than that at the boards, whose temperature is an estimate.",
    )
    .remedy("With density-law variable, or a reference of 67 degC, it is within 10 %.")
    .about("cabinet_air");
    buoyancy.margin = margin("error", 31.0, 30.0, Some((24.0, 38.0)), "%");
    buoyancy.points = Some(SweepPoints { count: 3, total: 6, first: "T_hot = 60 degC".into() });

    let mut unused =
        Finding::new("unused-name", Level::Hint, at(0, CABINET, "P_spare"), "Nothing uses P_spare.").about("P_spare");
    unused.unnecessary = true;

    let mut laminar = Finding::new(
        "laminar-above-onset",
        Level::Warning,
        at(0, CABINET, "flow           laminar"),
        "Ra is 4.1e9; the flow in a side-heated cavity turns turbulent from about 1e6.",
    )
    .about("cabinet");
    laminar.margin = margin("Ra", 4.1e9, 1e6, None, "");

    let mut radiation = Finding::new(
        "radiation-neglected",
        Level::Warning,
        at(0, CABINET, "region cabinet"),
        "Radiation carries as much heat as convection.",
    )
    .about("cabinet");
    radiation.waived = Some("Faces are polished; see the test report.".into());

    let reference = Finding::new(
        "reference-off-centre",
        Level::Information,
        at(0, CABINET, "25 degC"),
        "A reference at mid-span, 39 degC, would bring the error of the buoyancy down to 12 %.",
    )
    .about("cabinet_air")
    .fix("move the reference to mid-span", at(0, CABINET, "25 degC").span, "39 degC", true);

    let units = Finding::new(
        "dimension-mismatch",
        Level::Error,
        at(1, MATERIALS, "16 W/m"),
        "`conductivity` takes a thermal conductivity (W/m/K); 16 W/m is a power per length.",
    )
    .fix("write 16 W/m/K", at(1, MATERIALS, "16 W/m").span, "16 W/m/K", true)
    .about("steel");
    vec![laminar, unused, span, buoyancy, radiation, reference, units]
}

fn deck(path: &str, findings: Vec<Finding>) -> Sheet {
    let title = Name { text: "Instrument cabinet, natural cooling".into(), place: at(0, CABINET, "\"Instrument") };
    let deck = Deck {
        files: vec![file(path, CABINET), file("shared/materials.buoy", MATERIALS)],
        resolution: Resolution::default(),
        case: Case { title: Some(title), ..Case::default() },
        physics: Physics::default(),
        findings,
    };
    Sheet::of(&deck, Path::new(""))
}

fn shown(sheets: &[Sheet], face: Face, layout: Layout) -> String {
    with_unreadable(sheets, face, layout, Vec::new())
}

fn with_unreadable(sheets: &[Sheet], face: Face, layout: Layout, unreadable: Vec<Unreadable>) -> String {
    let mut out = Vec::new();
    write(&Report::of(sheets.to_vec(), None, unreadable), face, &mut out, layout).unwrap();
    String::from_utf8(out).unwrap()
}

#[test]
fn cards_at_80_columns() {
    let sheets = [deck("instrument-cabinet.buoy", findings())];
    insta::assert_snapshot!(shown(&sheets, Face::Cards, Layout::default()));
}

#[test]
fn cards_at_40_columns() {
    let sheets = [deck("instrument-cabinet.buoy", findings())];
    insta::assert_snapshot!(shown(&sheets, Face::Cards, Layout { width: 40, ..Layout::default() }));
}

#[test]
fn cards_of_decks_that_share_a_file_say_it_once() {
    let units = || findings().into_iter().filter(|finding| finding.check == "dimension-mismatch").collect();
    let sheets = [deck("b.buoy", units()), deck("c.buoy", units()), deck("a.buoy", units())];
    insta::assert_snapshot!(shown(&sheets, Face::Cards, Layout::default()));
}

#[test]
fn cards_of_a_sound_deck() {
    insta::assert_snapshot!(shown(&[deck("a.buoy", Vec::new())], Face::Cards, Layout::default()), @"1 deck checked: nothing to report.");
}

#[test]
fn colour_adds_only_escape_sequences() {
    let sheets = [deck("instrument-cabinet.buoy", findings())];
    let plain = shown(&sheets, Face::Cards, Layout::default());
    let coloured = shown(&sheets, Face::Cards, Layout { paint: Paint::Coloured, ..Layout::default() });
    assert!(coloured.contains("\u{1b}[") && !plain.contains('\u{1b}'));
    assert_eq!(anstream::adapter::strip_str(&coloured).to_string(), plain);
}

#[test]
fn no_card_is_wider_than_the_terminal() {
    let sheets = [deck("instrument-cabinet.buoy", findings())];
    for width in [80, 100, 120] {
        for line in shown(&sheets, Face::Cards, Layout { width, ..Layout::default() }).lines() {
            assert!(unicode_width::UnicodeWidthStr::width(line) <= width, "{width}: {line}");
        }
    }
}

#[test]
fn what_a_deck_quotes_cannot_reach_the_terminal() {
    let text = "case \"x\u{1b}[31m\"\n    gravity \u{1b}]0;owned\u{7}\n";
    let mut finding =
        Finding::new("unreadable-line", Level::Error, at(0, text, "gravity"), "It says \u{1b}[2J here.\nTwo.");
    finding.remedy = "\u{9b}5A".into();
    let deck = Deck {
        files: vec![file("a\u{1b}.buoy", text)],
        resolution: Resolution::default(),
        case: Case::default(),
        physics: Physics::default(),
        findings: vec![finding],
    };
    let sheet = Sheet::of(&deck, Path::new(""));
    for face in [Face::Cards, Face::Lines] {
        let said = shown(std::slice::from_ref(&sheet), face, Layout::default());
        assert!(!said.chars().any(|character| character.is_control() && character != '\n'), "{face:?}: {said:?}");
        if face == Face::Lines {
            assert_eq!(said.lines().count(), 1);
        }
    }
}

#[test]
fn lines() {
    let sheets = [deck("instrument-cabinet.buoy", findings())];
    insta::assert_snapshot!(shown(&sheets, Face::Lines, Layout::default()));
}

fn with_problem(sheets: &[Sheet], face: Face) -> String {
    let bad = Unreadable { path: "bad.buoy".into(), message: "not UTF-8 text (line 2)".into() };
    with_unreadable(sheets, face, Layout::default(), vec![bad])
}

#[test]
fn json_says_everything_and_fits_its_schema() {
    let sheets = [deck("b.buoy", findings()), deck("instrument-cabinet.buoy", findings())];
    let text = with_problem(&sheets, Face::Json);
    let value: serde_json::Value = serde_json::from_str(&text).unwrap();
    let schema = serde_json::to_value(json::schema()).unwrap();
    jsonschema::meta::validate(&schema).unwrap();
    let validator = jsonschema::validator_for(&schema).unwrap();
    let errors: Vec<String> = validator.iter_errors(&value).map(|error| error.to_string()).collect();
    assert!(errors.is_empty(), "{errors:?}");
    let mut wrong = value.clone();
    wrong["findings"][0]["level"] = "fatal".into();
    assert!(!validator.is_valid(&wrong));

    assert_eq!(value["count"]["errors"], 3, "the finding in the shared file counts once");
    assert_eq!(value["unreadable"][0]["path"], "bad.buoy");
    let shared = value["findings"].as_array().unwrap().iter().find(|one| one["check"] == "dimension-mismatch").unwrap();
    assert_eq!(shared["decks"], serde_json::json!(["b.buoy", "instrument-cabinet.buoy"]));
    assert_eq!(shared["file"], "shared/materials.buoy");
    assert_eq!(shared["start"], serde_json::json!({ "line": 2, "column": 19, "byte": 31 }));
    assert_eq!(shared["fixes"][0]["edits"][0]["text"], "16 W/m/K");
}

#[test]
fn json_has_stable_names() {
    let sheets =
        [deck("instrument-cabinet.buoy", findings().into_iter().filter(|one| one.check == "density-span").collect())];
    insta::assert_snapshot!(with_problem(&sheets, Face::Json).replace(env!("CARGO_PKG_VERSION"), "VERSION"));
}

#[test]
fn sarif_fits_the_schema_of_the_standard() {
    let sheets = [deck("b.buoy", findings()), deck("decks/instrument cabinet.buoy", findings())];
    let value: serde_json::Value = serde_json::from_str(&with_problem(&sheets, Face::Sarif)).unwrap();
    // The published pattern of a language has a stray bracket, which is no regular expression to a strict reader.
    let schema = include_str!("schemas/sarif-2.1.0.json").replace("-[a-zA-Z]{2}]?$", "-[a-zA-Z]{2}$");
    let schema: serde_json::Value = serde_json::from_str(&schema).unwrap();
    let validator = jsonschema::options().should_validate_formats(true).build(&schema).unwrap();
    let errors: Vec<String> = validator.iter_errors(&value).map(|error| error.to_string()).collect();
    assert!(errors.is_empty(), "{errors:?}");
    let mut wrong = value.clone();
    wrong["runs"][0]["results"][0]["level"] = "fatal".into();
    assert!(!validator.is_valid(&wrong));

    let run = &value["runs"][0];
    let results = run["results"].as_array().unwrap();
    assert_eq!(results.len(), 13, "seven of each deck, one of them shared");
    for result in results {
        let rule = &run["tool"]["driver"]["rules"][result["ruleIndex"].as_u64().unwrap() as usize];
        assert_eq!(rule["id"], result["ruleId"]);
    }
    let waived = results.iter().find(|result| result["ruleId"] == "radiation-neglected").unwrap();
    assert_eq!(waived["suppressions"][0]["justification"], "Faces are polished; see the test report.");
    let region = &results.iter().find(|result| result["ruleId"] == "dimension-mismatch").unwrap()["locations"][0]["physicalLocation"];
    assert_eq!(region["artifactLocation"]["uri"], "shared/materials.buoy");
    assert_eq!(
        region["region"],
        serde_json::json!({ "startLine": 2, "startColumn": 19, "endLine": 2, "endColumn": 25 })
    );
    assert_eq!(run["invocations"][0]["executionSuccessful"], false);
}

#[test]
fn the_order_in_which_decks_and_findings_come_decides_nothing() {
    let mut turned = findings();
    turned.reverse();
    let one = [deck("a.buoy", findings()), deck("b.buoy", findings())];
    let other = [deck("b.buoy", turned.clone()), deck("a.buoy", turned)];
    for face in [Face::Cards, Face::Lines, Face::Json, Face::Sarif] {
        assert_eq!(shown(&one, face, Layout::default()), shown(&other, face, Layout::default()), "{face:?}");
    }
}

/// The numbers of the cabinet, with physics made by hand.
fn numbers_of_cabinet() -> numbers::Numbers {
    use deckline::physics::model::*;
    let mut deck = deckline::workspace::analyse_text(&CABINET.replace("include", "# include"), "2026-01-01");
    let properties = deckline::substances::Properties {
        density: 0.88,
        heat_capacity: 1007.0,
        viscosity: 1.95e-5,
        conductivity: 0.0275,
        expansion: 3.2e-3,
        compressibility: 1.27e-5,
    };
    let given = |value: f64, set_by: &str| Bound {
        value,
        band: (value, value),
        set_by: set_by.into(),
        place: None,
        estimate: None,
        literal: None,
    };
    let estimated = Bound {
        band: (330.15, 338.15),
        estimate: Some("flux correlation, Churchill and Chu 1975".into()),
        ..given(334.15, "boundary boards")
    };
    deck.physics.regions = vec![RegionPhysics {
        fluid: Some(FluidState { index: 0, reference_temperature: 298.15, pressure: 79_000.0, constants: properties }),
        geometry: Geometry { height: 1.1, length: 0.5, spacing: 0.5, volume: 0.33, sides: Vec::new() },
        arrangement: Arrangement {
            kind: ArrangementKind::SideHeatedCavity,
            why: "The hot side is west, the cold one east.".into(),
        },
        bracket: Some(Bracket { lowest: given(281.15, "boundary skin"), highest: estimated }),
        numbers: Numbers {
            film_temperature: 307.65,
            properties: Some(properties),
            difference: 53.0,
            rayleigh: 3.2e8,
            prandtl: 0.714,
            nusselt: 42.0,
            nusselt_band: (37.0, 47.0),
            nusselt_basis: "MacGregor and Emery 1969".into(),
            buoyant_velocity: 1.35,
            expansion_span: 0.17,
            thermal_layer: 0.006,
            ..Numbers::default()
        },
    }];
    deck.findings = findings().into_iter().filter(|finding| finding.place.file == FileId(0)).collect();
    numbers::Numbers::of(&deck)
}

#[test]
fn numbers_of_a_region() {
    let found = numbers_of_cabinet();
    let mut out = Vec::new();
    numbers::write(&found, &mut out, Layout::default()).unwrap();
    insta::assert_snapshot!(String::from_utf8(out).unwrap());
    let value = serde_json::to_value(&found).unwrap();
    let schema = serde_json::to_value(numbers::schema()).unwrap();
    assert!(jsonschema::validator_for(&schema).unwrap().is_valid(&value));
    assert_eq!(value["regions"][0]["numbers"][1]["symbol"], "Ra");
    assert_eq!(value["regions"][0]["numbers"][1]["value"], 3.2e8);
}
