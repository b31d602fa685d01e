//! Turbulent plume over a point or a line source in still, uniform surroundings: volume flow and reduced gravity.
//!
//! Top-hat averages over the plume; on the axis the excess is about twice (point) the average. Heights are from the virtual
//! origin. Momentum and volume of the source are neglected, and so is stratification.

use super::{Correlation, Estimate};

const SOURCE: &str = "Morton, Taylor and Turner, Turbulent gravitational convection from maintained and instantaneous sources, \
     Proc. R. Soc. A 234 (1956) 1-23";

/// Plume over a point source.
pub const POINT: Correlation = Correlation {
    name: "plume over a point source",
    source: SOURCE,
    range: "turbulent, still and unstratified surroundings, height several source widths over the source, temperature excess small",
    scatter: 0.25,
    scatter_basis: "entrainment coefficient 0.117 (top-hat; Linden, Annu. Rev. Fluid Mech. 31 (1999) 201-238), 0.10 to 0.14 in the \
     literature (both recalled)",
};

/// Plume over a line source.
pub const LINE: Correlation = Correlation {
    name: "plume over a line source",
    source: "Lee and Emmons, A study of natural convection above a line fire, J. Fluid Mech. 11 (1961) 353-368, after Morton, Taylor and \
     Turner 1956",
    range: "turbulent, still and unstratified surroundings, height several source widths over the source, temperature excess small",
    scatter: 0.20,
    scatter_basis: "entrainment coefficient 0.16 (top-hat), 0.13 to 0.22 in the literature (both recalled)",
};

/// Entrainment coefficient of the point plume, top-hat: value, least and largest.
const POINT_ENTRAINMENT: [f64; 3] = [0.117, 0.10, 0.14];
/// Entrainment coefficient of the line plume, top-hat: value, least and largest.
const LINE_ENTRAINMENT: [f64; 3] = [0.16, 0.13, 0.22];

/// A plume at one height.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Plume {
    /// Volume flow: m³/s over a point source, m²/s (per metre) over a line source.
    pub volume_flow: Estimate,
    /// Reduced gravity g α ΔT of the average excess, m/s².
    pub reduced_gravity: Estimate,
}

/// Buoyancy flux g α P / (ρ cp): m⁴/s³ from a power in W, m³/s³ from a power per metre in W/m.
///
/// Gravity in m/s², expansion in 1/K, density in kg/m³, heat capacity in J/(kg K). 0 where an input is negative, zero in the
/// denominator or not finite.
pub fn buoyancy_flux(gravity: f64, thermal_expansion: f64, power: f64, density: f64, heat_capacity: f64) -> f64 {
    let flux = gravity * thermal_expansion * power / (density * heat_capacity);
    let usable = [gravity, thermal_expansion, power, density, heat_capacity].iter().all(|x| x.is_finite() && *x >= 0.0);
    if usable && flux.is_finite() { flux } else { 0.0 }
}

/// Average temperature excess in K from a reduced gravity: g' / (g α); 0 where that is no number.
pub fn temperature_excess(reduced_gravity: f64, gravity: f64, thermal_expansion: f64) -> f64 {
    let excess = reduced_gravity / (gravity * thermal_expansion);
    if excess.is_finite() && excess >= 0.0 { excess } else { 0.0 }
}

/// Point source of buoyancy flux B (m⁴/s³) at height z (m):
/// Q = (6 e/5) (9 e/10)^(1/3) π^(2/3) B^(1/3) z^(5/3) with the entrainment coefficient e, and g' = B / Q.
///
/// Both 0 without a source, at no height, or where an input is negative or not finite.
pub fn point(buoyancy_flux: f64, height: f64) -> Plume {
    plume(buoyancy_flux, height, POINT_ENTRAINMENT, |entrainment| {
        let constant = 1.2 * entrainment * (0.9 * entrainment).cbrt() * core::f64::consts::PI.powf(2.0 / 3.0);
        constant * buoyancy_flux.cbrt() * height.powf(5.0 / 3.0)
    })
}

/// Line source of buoyancy flux B per length (m³/s³) at height z (m): Q = (2 e)^(2/3) B^(1/3) z, g' = B / Q.
///
/// As [`point`] otherwise.
pub fn line(buoyancy_flux: f64, height: f64) -> Plume {
    plume(buoyancy_flux, height, LINE_ENTRAINMENT, |entrainment| {
        (2.0 * entrainment).powf(2.0 / 3.0) * buoyancy_flux.cbrt() * height
    })
}

fn plume(buoyancy_flux: f64, height: f64, entrainment: [f64; 3], flow: impl Fn(f64) -> f64) -> Plume {
    let nothing = Estimate { value: 0.0, low: 0.0, high: 0.0, inside_range: false };
    let [usual, least, largest] = entrainment;
    let flows = [flow(usual), flow(least), flow(largest)];
    let dilutions = flows.map(|volume_flow| buoyancy_flux / volume_flow);
    let usable = |x: &f64| x.is_finite() && *x > 0.0;
    if !(buoyancy_flux > 0.0 && height > 0.0 && flows.iter().all(usable) && dilutions.iter().all(usable)) {
        return Plume { volume_flow: nothing, reduced_gravity: nothing };
    }
    let [value, low, high] = flows;
    let [gravity_value, gravity_high, gravity_low] = dilutions;
    Plume {
        volume_flow: Estimate { value, low, high, inside_range: true },
        reduced_gravity: Estimate { value: gravity_value, low: gravity_low, high: gravity_high, inside_range: true },
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn ventilation_handbook_figures() {
        // Displacement-ventilation practice: Q = 0.005 P^(1/3) z^(5/3) over a point source, 0.013 P^(1/3) z per metre over a
        // line source, P the convected power in W, air at room temperature (recalled).
        let flux = buoyancy_flux(9.81, 1.0 / 293.0, 100.0, 1.2, 1005.0);
        let got = point(flux, 2.0).volume_flow;
        let handbook = 0.005 * 100_f64.cbrt() * 2_f64.powf(5.0 / 3.0);
        assert!(got.low < handbook && handbook < got.high, "{got:?} {handbook}");
        let got = line(flux, 2.0).volume_flow;
        let handbook = 0.013 * 100_f64.cbrt() * 2.0;
        assert!(got.low < handbook && handbook < got.high, "{got:?} {handbook}");
    }

    #[test]
    fn buoyancy_is_conserved_and_unusable_inputs_are_nothing() {
        let got = point(0.01, 3.0);
        assert!((got.volume_flow.value * got.reduced_gravity.value / 0.01 - 1.0).abs() < 1e-12);
        assert!(got.reduced_gravity.low < got.reduced_gravity.high);
        for (flux, height) in
            [(0.0, 1.0), (1.0, 0.0), (-1.0, 1.0), (f64::NAN, 1.0), (1.0, f64::INFINITY), (1e-300, 1e-300)]
        {
            for got in [point(flux, height), line(flux, height)] {
                assert!(got.volume_flow.value.is_finite() && got.reduced_gravity.value.is_finite());
            }
        }
        assert!(!point(-1.0, 1.0).volume_flow.inside_range);
        assert_eq!(buoyancy_flux(9.81, 0.003, 100.0, 0.0, 1005.0), 0.0);
        assert_eq!(temperature_excess(0.1, 0.0, 0.003), 0.0);
    }

    #[test]
    fn rows_state_a_band_that_covers_the_entrainment_range() {
        for (row, got) in [(POINT, point(0.01, 3.0)), (LINE, line(0.01, 3.0))] {
            let flow = got.volume_flow;
            let half = ((flow.high - flow.low) / (2.0 * flow.value)).abs();
            assert!((half - row.scatter).abs() < 0.05, "{} {half}", row.name);
        }
    }
}
