//! Findings as SARIF 2.1.0 (OASIS Standard, Static Analysis Results Interchange Format), for tools that gather the
//! findings of many programs. Each check is a rule, and its basis the rule's help.

use super::basis;
use super::sheet::{Remark, Report, Sheet, Spot, Unreadable};
use super::wrap::sentence;
use crate::checks::CHECKS;
use crate::syntax::Level;
use percent_encoding::{AsciiSet, NON_ALPHANUMERIC, utf8_percent_encode};
use serde_json::{Value, json};
use serde_sarif::sarif::{
    ArtifactChange, ArtifactContent, ArtifactLocation, Fix, Invocation, Location, LogicalLocation, Message,
    MultiformatMessageString, Notification, PhysicalLocation, PropertyBag, Region, Replacement, ReportingConfiguration,
    ReportingDescriptor, Result as SarifResult, ResultLevel, Run, Sarif, Suppression, Tool, ToolComponent,
};
use std::collections::{BTreeMap, BTreeSet};
use std::io::{self, Write};

/// Where the standard publishes its schema.
pub const SCHEMA: &str = "https://docs.oasis-open.org/sarif/sarif/v2.1.0/errata01/os/schemas/sarif-schema-2.1.0.json";

/// Writes the log.
///
/// # Errors
/// Those of `out`.
pub fn write(report: &Report, out: &mut dyn Write) -> io::Result<()> {
    serde_json::to_writer_pretty(&mut *out, &log(report)).map_err(io::Error::from)?;
    writeln!(out)
}

/// The log of a report.
pub fn log(report: &Report) -> Sarif {
    let sheets = &report.sheets;
    let rules = rules(sheets);
    let index = |check: &str| rules.iter().position(|rule| rule.id == check).and_then(|at| i64::try_from(at).ok());
    let remarks = || sheets.iter().flat_map(|sheet| &sheet.remarks);
    let results: Vec<SarifResult> = remarks().map(|remark| result(remark, index(remark.finding.check))).collect();
    let driver = ToolComponent::builder()
        .name(env!("CARGO_PKG_NAME"))
        .version(env!("CARGO_PKG_VERSION").to_string())
        .semantic_version(env!("CARGO_PKG_VERSION").to_string())
        .short_description(text(env!("CARGO_PKG_DESCRIPTION"), None))
        .rules(rules.clone())
        .build();
    let run = Run::builder()
        .tool(Tool::builder().driver(driver).build())
        .column_kind(Value::from("unicodeCodePoints"))
        .invocations(vec![invocation(report)])
        .results(results)
        .build();
    Sarif::builder().version(json!("2.1.0")).schema(SCHEMA.to_string()).runs(vec![run]).build()
}

/// A rule for every check, and for every name that a finding bears.
fn rules(sheets: &[Sheet]) -> Vec<ReportingDescriptor> {
    let mut rules: Vec<ReportingDescriptor> = CHECKS
        .iter()
        .map(|check| {
            let level = check.limits.last().map_or(check.level, |(level, _)| *level);
            ReportingDescriptor::builder()
                .id(check.name)
                .short_description(text(check.basis.compares, None))
                .help(text(&basis::plain(check), Some(basis::markdown(check))))
                .default_configuration(ReportingConfiguration::builder().level(json!(word(level))).build())
                .properties(bag(&[check.family.word()], BTreeMap::new()))
                .build()
        })
        .collect();
    let named: BTreeSet<&str> =
        sheets.iter().flat_map(|sheet| &sheet.remarks).map(|remark| remark.finding.check).collect();
    for name in named {
        if !rules.iter().any(|rule| rule.id == name) {
            rules.push(ReportingDescriptor::builder().id(name).build());
        }
    }
    rules
}

fn result(remark: &Remark, rule_index: Option<i64>) -> SarifResult {
    let finding = &remark.finding;
    let mut said = remark.whole_message();
    if !finding.remedy.is_empty() {
        said = sentence(&format!("{said} Put right by: {}", finding.remedy));
    }
    let mut here = location(&remark.spot);
    here.logical_locations = logical(remark);
    let level = match finding.level {
        Level::Error => ResultLevel::Error,
        Level::Warning => ResultLevel::Warning,
        Level::Information | Level::Hint => ResultLevel::Note,
    };
    let mut result = SarifResult::builder()
        .rule_id(finding.check.to_string())
        .level(level)
        .message(Message::builder().text(said).build())
        .locations(vec![here])
        .build();
    result.rule_index = rule_index;
    result.related_locations = related(remark);
    result.fixes = fixes(remark);
    result.suppressions = finding
        .waived
        .as_ref()
        .map(|reason| vec![Suppression::builder().kind(json!("inSource")).justification(reason.clone()).build()]);
    result.properties = properties(remark);
    result
}

fn logical(remark: &Remark) -> Option<Vec<LogicalLocation>> {
    let name = if remark.finding.subject.is_empty() { &remark.entry } else { &remark.finding.subject };
    (!name.is_empty()).then(|| vec![LogicalLocation::builder().name(name.clone()).build()])
}

fn related(remark: &Remark) -> Option<Vec<Location>> {
    let places: Vec<Location> = remark
        .finding
        .related
        .iter()
        .zip(&remark.related)
        .zip(1..)
        .map(|((related, spot), id)| {
            let mut place = location(spot);
            place.id = Some(id);
            place.message = Some(Message::builder().text(related.message.clone()).build());
            place
        })
        .collect();
    (!places.is_empty()).then_some(places)
}

fn fixes(remark: &Remark) -> Option<Vec<Fix>> {
    let mut fixes = Vec::new();
    for (fix, spots) in remark.finding.fixes.iter().zip(&remark.edits) {
        let mut by_file: BTreeMap<&str, Vec<Replacement>> = BTreeMap::new();
        for (edit, spot) in fix.edits.iter().zip(spots) {
            let replacement = Replacement::builder()
                .deleted_region(region(spot))
                .inserted_content(ArtifactContent::builder().text(edit.text.clone()).build())
                .build();
            by_file.entry(&spot.file).or_default().push(replacement);
        }
        let changes: Vec<ArtifactChange> = by_file
            .into_iter()
            .map(|(file, replacements)| {
                ArtifactChange::builder().artifact_location(artifact(file)).replacements(replacements).build()
            })
            .collect();
        if !changes.is_empty() {
            let title = Message::builder().text(fix.title.clone()).build();
            fixes.push(Fix::builder().description(title).artifact_changes(changes).build());
        }
    }
    (!fixes.is_empty()).then_some(fixes)
}

/// What SARIF has no field for.
fn properties(remark: &Remark) -> Option<PropertyBag> {
    let finding = &remark.finding;
    let mut more = BTreeMap::from([("level".to_string(), json!(finding.level.word()))]);
    if let Some(margin) = finding.margin.as_ref().filter(|margin| margin.value.is_finite()) {
        more.insert("margin".to_string(), json!(margin));
    }
    if let Some(points) = &finding.points {
        more.insert("points".to_string(), json!(points));
    }
    if !remark.also_in.is_empty() {
        more.insert("alsoIn".to_string(), json!(remark.also_in));
    }
    Some(bag(&[], more))
}

fn bag(tags: &[&str], additional_properties: BTreeMap<String, Value>) -> PropertyBag {
    let tags = (!tags.is_empty()).then(|| tags.iter().map(|tag| (*tag).to_string()).collect());
    PropertyBag { tags, additional_properties }
}

fn invocation(report: &Report) -> Invocation {
    let mut invocation = Invocation::builder().execution_successful(report.unreadable.is_empty()).build();
    let notices: Vec<Notification> = report
        .unreadable
        .iter()
        .map(|Unreadable { path, message }| {
            let place = PhysicalLocation::builder().artifact_location(artifact(path)).build();
            Notification::builder()
                .level(json!("error"))
                .message(Message::builder().text(message.clone()).build())
                .locations(vec![Location::builder().physical_location(place).build()])
                .build()
        })
        .collect();
    invocation.tool_execution_notifications = (!notices.is_empty()).then_some(notices);
    invocation
}

fn location(spot: &Spot) -> Location {
    let place = PhysicalLocation::builder().artifact_location(artifact(&spot.file)).region(region(spot)).build();
    Location::builder().physical_location(place).build()
}

fn region(spot: &Spot) -> Region {
    let number = |number: usize| i64::try_from(number).unwrap_or(i64::MAX);
    Region::builder()
        .start_line(number(spot.start.line.max(1)))
        .start_column(number(spot.start.column.max(1)))
        .end_line(number(spot.end.line.max(1)))
        .end_column(number(spot.end.column.max(1)))
        .build()
}

fn artifact(path: &str) -> ArtifactLocation {
    ArtifactLocation::builder().uri(uri(path)).build()
}

/// Bytes that a path keeps as they are in a URI reference (RFC 3986, `pchar` without what could be mistaken, and `/`).
const KEPT: &AsciiSet = &NON_ALPHANUMERIC.remove(b'/').remove(b'-').remove(b'.').remove(b'_').remove(b'~');

/// A path as a URI reference: relative where the path is, else with the scheme `file`.
fn uri(path: &str) -> String {
    let slashed = if cfg!(windows) { path.replace('\\', "/") } else { path.to_string() };
    let encoded = utf8_percent_encode(&slashed, KEPT).to_string();
    match std::path::Path::new(path).is_absolute() {
        true if encoded.starts_with('/') => format!("file://{encoded}"),
        true => format!("file:///{encoded}"),
        false => encoded,
    }
}

fn text(plain: &str, markdown: Option<String>) -> MultiformatMessageString {
    MultiformatMessageString { markdown, properties: None, text: plain.to_string() }
}

const fn word(level: Level) -> &'static str {
    match level {
        Level::Error => "error",
        Level::Warning => "warning",
        Level::Information | Level::Hint => "note",
    }
}

#[cfg(test)]
mod tests {
    use super::uri;

    #[test]
    fn paths_become_uri_references() {
        assert_eq!(uri("decks/wall one.buoy"), "decks/wall%20one.buoy");
        assert_eq!(uri("α#?.buoy"), "%CE%B1%23%3F.buoy");
        assert_eq!(uri("a:b.buoy"), "a%3Ab.buoy", "no colon that reads as a scheme");
        #[cfg(unix)]
        assert_eq!(uri("/decks/a.buoy"), "file:///decks/a.buoy");
    }
}
