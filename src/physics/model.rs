//! What the physics of a case comes to, region by region: plain data that the checks and the reports read.
//!
//! SI throughout; `NaN` where something needed for a number is not known.

use crate::case::model::Side;
use crate::substances::Properties;
use crate::syntax::Place;

/// The physics of every region of a case, in the order of `Case::regions`.
#[derive(Clone, Debug, Default)]
pub struct Physics {
    /// One for each region.
    pub regions: Vec<RegionPhysics>,
}

/// The physics of one region.
#[derive(Clone, Debug, Default)]
pub struct RegionPhysics {
    /// The fluid's state and constants; `None` for a solid, or where no fluid is named.
    pub fluid: Option<FluidState>,
    /// Sizes.
    pub geometry: Geometry,
    /// The arrangement and why it was taken.
    pub arrangement: Arrangement,
    /// The temperatures that the fluid can reach; `None` where nothing tells.
    pub bracket: Option<Bracket>,
    /// Characteristic numbers and scales.
    pub numbers: Numbers,
}

/// A fluid as a region has it.
#[derive(Clone, Debug)]
pub struct FluidState {
    /// Index in `Case::fluids`.
    pub index: usize,
    /// T0, K: the reference as stated; mid-span where none is stated.
    pub reference_temperature: f64,
    /// Pressure, Pa: the reference's, else ambient, else 101325 Pa.
    pub pressure: f64,
    /// The constants that the solver takes: what the deck states, the rest from the substance at the reference.
    pub constants: Properties,
}

/// Sizes of a region, m, m², m³.
#[derive(Clone, Debug)]
pub struct Geometry {
    /// Extent along gravity, H.
    pub height: f64,
    /// Characteristic length of the arrangement, L.
    pub length: f64,
    /// Distance between the hot and the cold side, for an enclosure.
    pub spacing: f64,
    /// Volume; per metre of depth for a plane case.
    pub volume: f64,
    /// The sides that the shape has, each with its area (per metre of depth for a plane case) and the unit vector
    /// out of the fluid.
    pub sides: Vec<SideGeometry>,
}

/// One side of a region.
#[derive(Clone, Debug)]
pub struct SideGeometry {
    /// Which.
    pub side: Side,
    /// Area.
    pub area: f64,
    /// Unit vector out of the fluid; zero for a curved side.
    pub normal: [f64; 3],
}

/// How the heated fluid is arranged.
#[derive(Clone, Debug, Default)]
pub struct Arrangement {
    /// Which.
    pub kind: ArrangementKind,
    /// Why it was taken, as a sentence.
    pub why: String,
}

/// The arrangements; words and descriptions stand in the vocabulary.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum ArrangementKind {
    /// Hot and cold sides stand upright.
    SideHeatedCavity,
    /// Hot below cold.
    LayerHeatedFromBelow,
    /// Hot above cold.
    StableLayer,
    /// Hot and cold sides inclined.
    TiltedCavity,
    /// An upright plate.
    VerticalPlate,
    /// A horizontal plate, heated face up or cooled face down.
    PlateFacingUp,
    /// A horizontal plate, heated face down or cooled face up.
    PlateFacingDown,
    /// An inclined plate.
    InclinedPlate,
    /// A horizontal cylinder in a wide fluid.
    HorizontalCylinder,
    /// A sphere in a wide fluid.
    Sphere,
    /// Between horizontal cylinders.
    Annulus,
    /// Two upright plates, open below and above.
    VerticalChannel,
    /// Fluid flows through.
    ThroughFlow,
    /// Heat inside, or one condition all round.
    UniformHeating,
    /// A solid, or too little is known.
    #[default]
    Unknown,
}

/// The temperatures that the fluid can reach.
#[derive(Clone, Debug)]
pub struct Bracket {
    /// The lowest.
    pub lowest: Bound,
    /// The highest.
    pub highest: Bound,
}

/// One end of the bracket.
#[derive(Clone, Debug)]
pub struct Bound {
    /// Temperature, K.
    pub value: f64,
    /// Band of an estimate, K; both equal to `value` for a given temperature.
    pub band: (f64, f64),
    /// What sets it, for a message: "boundary skin", "the floor by its flux".
    pub set_by: String,
    /// Where in the deck.
    pub place: Option<Place>,
    /// How it was estimated (correlation or balance and its source); `None` for a given temperature.
    pub estimate: Option<String>,
    /// The quantity as a literal in the deck, where a given temperature is one.
    pub literal: Option<Place>,
}

/// Characteristic numbers (ISO 80000-11) and scales. Properties at the film temperature (mid-span) and the
/// reference pressure, but where the deck overrides them.
#[derive(Clone, Debug)]
pub struct Numbers {
    /// Temperature at which the properties were taken, K.
    pub film_temperature: f64,
    /// The properties there.
    pub properties: Option<Properties>,
    /// Driving temperature difference, K (hot less cold side, or wall less far fluid).
    pub difference: f64,
    /// Ra = g α ΔT L³ / (ν a).
    pub rayleigh: f64,
    /// Gr = Ra / Pr.
    pub grashof: f64,
    /// Pr = ν / a.
    pub prandtl: f64,
    /// Re of the fastest given velocity; `NaN` without one.
    pub reynolds: f64,
    /// Ri = Gr / Re².
    pub richardson: f64,
    /// Nu by the correlation of the arrangement.
    pub nusselt: f64,
    /// Its band.
    pub nusselt_band: (f64, f64),
    /// The correlation's name and source.
    pub nusselt_basis: String,
    /// Whether Ra, Pr and shape lie inside the correlation's published range.
    pub nusselt_inside_range: bool,
    /// h = Nu k / L, W/(m² K).
    pub heat_transfer_coefficient: f64,
    /// Buoyant velocity √(g α ΔT H), m/s.
    pub buoyant_velocity: f64,
    /// Fastest given velocity, m/s; `NaN` without one.
    pub given_velocity: f64,
    /// Ma of the faster of the two.
    pub mach: f64,
    /// αΔT over the whole bracket.
    pub expansion_span: f64,
    /// Thickness of the thermal boundary layer, m.
    pub thermal_layer: f64,
    /// Thickness of the viscous boundary layer, m.
    pub viscous_layer: f64,
    /// Buoyancy frequency N of the stratification, rad/s; `NaN` or 0 where not stable.
    pub buoyancy_frequency: f64,
    /// Boundary-layer time of Patterson and Imberger 1980, s.
    pub boundary_layer_time: f64,
    /// Filling time of Patterson and Imberger 1980, s.
    pub filling_time: f64,
}

impl Default for Geometry {
    fn default() -> Self {
        Geometry { height: f64::NAN, length: f64::NAN, spacing: f64::NAN, volume: f64::NAN, sides: Vec::new() }
    }
}

impl Default for Numbers {
    fn default() -> Self {
        let unknown = f64::NAN;
        Numbers {
            film_temperature: unknown,
            properties: None,
            difference: unknown,
            rayleigh: unknown,
            grashof: unknown,
            prandtl: unknown,
            reynolds: unknown,
            richardson: unknown,
            nusselt: unknown,
            nusselt_band: (unknown, unknown),
            nusselt_basis: String::new(),
            nusselt_inside_range: false,
            heat_transfer_coefficient: unknown,
            buoyant_velocity: unknown,
            given_velocity: unknown,
            mach: unknown,
            expansion_span: unknown,
            thermal_layer: unknown,
            viscous_layer: unknown,
            buoyancy_frequency: unknown,
            boundary_layer_time: unknown,
            filling_time: unknown,
        }
    }
}

impl Bracket {
    /// Highest less lowest, K.
    pub fn span(&self) -> f64 {
        self.highest.value - self.lowest.value
    }

    /// Midway between them, K.
    pub fn middle(&self) -> f64 {
        0.5 * (self.highest.value + self.lowest.value)
    }

    /// Whether an estimate stands behind either end.
    pub fn rests_on_estimate(&self) -> bool {
        self.lowest.estimate.is_some() || self.highest.estimate.is_some()
    }
}
