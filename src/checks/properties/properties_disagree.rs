//! `properties-disagree`: more properties are stated than are independent, and they contradict one another.

use super::slip;
use super::stated::{PROPERTIES, PropertyRow, as_written, at_reference, deviation};
use crate::case::model::{DensityLaw, Fluid, Value};
use crate::checks::density_law::assess::{per_cent, temperature, two_digits};
use crate::checks::look::{named, sentence};
use crate::checks::{Basis, Check, Family, Subject, Weighing};
use crate::quantity::dimension_names::PRESSURE;
use crate::quantity::display::{format_number, format_si};
use crate::syntax::{Finding, Level, Margin};

/// The check.
pub static CHECK: Check = Check {
    name: "properties-disagree",
    family: Family::Properties,
    limits: &[(Level::Warning, 0.05), (Level::Error, 1.0)],
    level: Level::Warning,
    basis: Basis {
        compares: "Stated properties that depend on one another; and the stated density of an ideal gas with the ideal-gas law at the reference.",
        formula: "ν = μ/ρ, a = k/(ρ cp), Pr = ν/a and what follows from them; ρ = p M/(R T)",
        source: "Definitions of ISO 80000-4, 80000-5 and 80000-11; the limit, which leaves room for rounded values, is common practice",
        remedy: "State only independent ones: density, viscosity, conductivity and heat capacity.",
    },
    run: Some(run),
};

/// A product of powers that is 1: symbols above the line, symbols below it.
struct Identity {
    left: &'static str,
    above: &'static [&'static str],
    below: &'static [&'static str],
}

const fn identity(left: &'static str, above: &'static [&'static str], below: &'static [&'static str]) -> Identity {
    Identity { left, above, below }
}

/// Every identity among the properties that no shorter one contains.
const IDENTITIES: &[Identity] = &[
    identity("ν", &["μ"], &["ρ"]),
    identity("Pr", &["ν"], &["a"]),
    identity("a", &["k"], &["ρ", "cp"]),
    identity("Pr", &["μ", "cp"], &["k"]),
    identity("Pr", &["μ"], &["ρ", "a"]),
    identity("Pr", &["ν", "ρ", "cp"], &["k"]),
    identity("a", &["ν", "k"], &["μ", "cp"]),
];

fn stated<'a>(fluid: &'a Fluid, symbol: &str) -> Option<(&'static PropertyRow, &'a Value)> {
    let row = PROPERTIES.iter().find(|row| row.symbol == symbol)?;
    let value = (row.stated)(fluid).filter(|value| value.si > 0.0)?;
    Some((row, value))
}

fn run(subject: &Subject<'_>, weighing: &Weighing) -> Vec<Finding> {
    let slips = slip::slips(subject);
    let mut findings: Vec<Finding> = Vec::new();
    for fluid in &subject.case.fluids {
        // A value that one finding names is not named by another.
        let mut named: Vec<&str> = Vec::new();
        for identity in IDENTITIES {
            let symbols = || std::iter::once(&identity.left).chain(identity.above).chain(identity.below);
            if symbols().any(|symbol| named.contains(symbol)) {
                continue;
            }
            let Some(values) = symbols().map(|symbol| stated(fluid, symbol)).collect::<Option<Vec<_>>>() else {
                continue;
            };
            if values.iter().any(|(_, value)| slip::is_slip(&slips, value)) {
                continue;
            }
            if let Some(finding) = disagreement(subject, fluid, identity, &values, weighing) {
                named.extend(symbols());
                findings.push(finding);
            }
        }
    }
    findings.extend(at_reference(subject).iter().filter_map(|fluid| {
        let density = fluid.fluid.density.as_ref().filter(|value| !slip::is_slip(&slips, value))?;
        let is_ideal = fluid.fluid.density_law.is_some_and(|law| law.value == DensityLaw::IdealGas);
        let (level, limit) = weighing.over(deviation(density.si, fluid.own.density)).filter(|_| is_ideal)?;
        let message = format!(
            "the density of {}, {}, is not that of an ideal gas at the reference, {} and {}: {} {} there; with density-law ideal-gas a solver takes that one",
            named(&fluid.fluid.name),
            as_written(density),
            temperature(fluid.temperature),
            format_si(fluid.pressure, PRESSURE),
            fluid.medium.substance.name.text,
            super::stated::in_unit_of(fluid.own.density, density),
        );
        let finding = Finding::new(CHECK.name, level, density.origin.place, sentence(&message))
            .remedy("no density statement: the law and the reference give it")
            .about(&*fluid.fluid.name.text);
        Some(finding.weighing(Margin {
            quantity: "ρ off by".to_string(),
            value: deviation(density.si, fluid.own.density),
            limit,
            band: None,
            unit: String::new(),
        }))
    }));
    findings
}

fn disagreement(
    subject: &Subject<'_>,
    fluid: &Fluid,
    identity: &Identity,
    values: &[(&'static PropertyRow, &Value)],
    weighing: &Weighing,
) -> Option<Finding> {
    let of = |symbol: &&str| stated(fluid, symbol).map_or(f64::NAN, |(_, value)| value.si);
    let right: f64 = identity.above.iter().map(of).product::<f64>() / identity.below.iter().map(of).product::<f64>();
    let (left_row, left) = values.first().copied()?;
    let off = deviation(left.si, right);
    let (level, limit) = weighing.over(off)?;
    let below = match identity.below {
        [one] => (*one).to_string(),
        several => format!("({})", several.join(" ")),
    };
    let far = if off >= 1.0 { format!("a factor {}", two_digits(off + 1.0)) } else { per_cent(off) };
    let message = format!(
        "the {} of {} is stated as {}, but {}/{below} of what is stated beside it is {}: {far} apart{}",
        left_row.name,
        named(&fluid.name),
        as_written(left),
        identity.above.join(" "),
        if left.dimension.is_none() { format_number(right) } else { super::stated::in_unit_of(right, left) },
        blamed(subject, fluid, values),
    );
    let mut finding = Finding::new(CHECK.name, level, left.origin.place, sentence(&message))
        .remedy(format!("state only independent ones: without {}, it follows from the others", left_row.name))
        .about(&*fluid.name.text)
        .weighing(Margin {
            quantity: format!("{} off by", identity.left),
            value: off,
            limit,
            band: None,
            unit: String::new(),
        });
    for (row, value) in values.iter().skip(1) {
        finding = finding.related(value.origin.place, format!("states the {}", row.name));
    }
    Some(finding)
}

/// "; the library agrees with all but the density", where the substance settles which of the values is off.
fn blamed(subject: &Subject<'_>, fluid: &Fluid, values: &[(&'static PropertyRow, &Value)]) -> String {
    let known = at_reference(subject);
    let Some(known) = known.iter().find(|known| std::ptr::eq(known.fluid, fluid)) else { return String::new() };
    let is_off = |(row, value): &&(&'static PropertyRow, &Value)| deviation(value.si, (row.own)(&known.own)) > 0.05;
    match values.iter().filter(is_off).collect::<Vec<_>>().as_slice() {
        [(row, _)] => format!("; {} agrees with all of them but the {}", known.medium.substance.name.text, row.name),
        _ => String::new(),
    }
}

#[cfg(test)]
mod tests {
    use super::CHECK;
    use crate::testing::expect_of;

    #[test]
    fn three_viscosities() {
        expect_of(
            CHECK.name,
            r##"
fluid custom
    density             900 kg/m^3
    viscosity           0.09 Pa.s
    kinematic-viscosity 1.2e-4 m^2/s   #! properties-disagree "20 % apart"
"##,
        );
    }

    #[test]
    fn the_library_tells_which_one_is_off() {
        expect_of(
            CHECK.name,
            r##"
fluid bath
    substance           water
    reference           20 degC
    density             1060 kg/m^3
    viscosity           1.002 mPa.s
    kinematic-viscosity 1.004 mm^2/s   #! properties-disagree "agrees with all of them but the density"
"##,
        );
    }

    #[test]
    fn prandtl_number_beside_its_parts() {
        expect_of(
            CHECK.name,
            r##"
fluid custom
    viscosity     1.8e-5 Pa.s
    heat-capacity 1005 J/kg/K
    conductivity  0.026 W/m/K
    prandtl       7.1   #! properties-disagree "factor 10"
"##,
        );
    }

    #[test]
    fn an_ideal_gas_has_the_density_of_its_law() {
        expect_of(
            CHECK.name,
            r##"
fluid smoke
    substance   air
    reference   300 degC
    density-law ideal-gas
    density     1.2 kg/m^3   #! properties-disagree "0.6159 kg/m^3"
"##,
        );
    }

    #[test]
    fn rounded_values_agree() {
        expect_of(
            CHECK.name,
            r##"
fluid custom
    density             1.2 kg/m^3
    viscosity           1.8e-5 Pa.s
    kinematic-viscosity 1.5e-5 m^2/s
    heat-capacity       1005 J/kg/K
    conductivity        0.026 W/m/K
    diffusivity         2.15e-5 m^2/s
    prandtl             0.7
"##,
        );
    }
}
