//! A design: what the user decided, and nothing that can be derived from it.

use serde::{Deserialize, Serialize};

use crate::chamber::{Chamber, Factors};
use crate::conditions::{Conditions, Room};
use crate::fluid::{Entry, Fluid};
use crate::units::{Mass, Pressure, Ratio, Temperature, TemperatureDifference, Volume};

/// What the user decided.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Design {
    pub title: String,
    #[serde(default)]
    pub note: String,
    pub duty: Duty,
    pub conditions: Conditions,
    pub fluid: FluidId,
    pub chamber: Chamber,
    pub charge: Charge,
    #[serde(default)]
    pub demands: Demands,
    pub room: Room,
    pub bench: Bench,
}

/// What the device is for.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Serialize, Deserialize)]
pub enum Duty {
    HeatPipe,
    Thermosyphon,
    VapourChamber,
    PulsatingLoop,
    SensingBulb,
    LiquidLift,
    PlainVessel,
}

/// Id of a fluid in the catalogue that the design is assessed against. In a file any of
/// the fluid's names may stand: `store` looks it up as it reads, and refuses an unknown one.
#[derive(Debug, Clone, PartialEq, Eq, Hash, Serialize, Deserialize)]
#[serde(transparent)]
pub struct FluidId(String);

/// How much goes in.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Charge {
    pub aim: ChargeAim,
    /// Greatest deviation of the sealed mass from the aim.
    #[serde(rename = "tolerance_kg")]
    pub tolerance: Mass,
}

/// How the charge is stated.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum ChargeAim {
    /// Sealed mass of fluid, liquid and vapour together.
    Mass {
        #[serde(rename = "mass_kg")]
        mass: Mass,
    },
    /// Liquid volume over the named volume, at a temperature.
    FillRatio {
        ratio: Ratio,
        /// Left out: the bench temperature.
        #[serde(rename = "temperature_k", default)]
        temperature: Option<Temperature>,
        of: NamedVolume,
    },
    /// Liquid measured out at bench temperature.
    Dispensed {
        #[serde(rename = "volume_m3")]
        volume: Volume,
    },
}

/// Which volume a fill ratio is of.
#[derive(Debug, Clone, PartialEq, Eq, Serialize, Deserialize)]
pub enum NamedVolume {
    /// The whole inside.
    Inside,
    /// The inside without the space of wicks.
    VapourCore,
    /// The pores, grooves and arteries of all wicks.
    WickVoid,
    /// The inside of all parts in the evaporator zone.
    Evaporator,
    /// The parts of this name together, each with all of its count.
    Part(String),
}

/// What the charge window must keep to.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Demands {
    /// Least share of the volume that stays vapour at the hottest temperature.
    pub ullage: Ratio,
    /// The liquid-full temperature of the largest charge lies at least this far above the hottest.
    #[serde(rename = "liquid_full_margin_k")]
    pub liquid_full_margin: TemperatureDifference,
    #[serde(default)]
    pub factors: Factors,
    /// Greatest partial pressure of residual gas at the lower end of the working range, over
    /// the vapour pressure there.
    #[serde(default = "usual_gas_share")]
    pub gas_share: Ratio,
}

/// What the fill bench can do.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Bench {
    /// Greatest error of a weighing by difference.
    #[serde(rename = "balance_uncertainty_kg")]
    pub balance: Mass,
    /// Mass boiled off or purged after dispensing, before the seal.
    #[serde(rename = "purge_loss_kg")]
    pub purge_loss: Mass,
    /// Whether a pressure gauge stays on the sealed unit.
    pub gauge: bool,
    /// Gas left in the inside as it is sealed, absolute, besides the fluid's own vapour;
    /// `None`: not stated.
    #[serde(rename = "vacuum_pa", default)]
    pub vacuum: Option<Pressure>,
    /// Whether the air dissolved in the fluid is taken out before the seal. What a file does
    /// not say counts as no.
    #[serde(default)]
    pub degassed: bool,
}

/// What one click may change: fluid, wall, volume or charge. Temperatures, outside
/// pressure, room and factors are facts and are never changed by a click.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Change {
    SetCharge(Mass),
}

impl Design {
    /// Makes a change.
    pub fn apply(&mut self, change: Change) {
        match change {
            Change::SetCharge(mass) => self.charge.aim = ChargeAim::Mass { mass },
        }
    }
}

impl FluidId {
    pub fn as_str(&self) -> &str {
        &self.0
    }
}

impl From<&Fluid> for FluidId {
    fn from(fluid: &Fluid) -> Self {
        Self(fluid.id().to_owned())
    }
}

impl From<&Entry> for FluidId {
    fn from(entry: &Entry) -> Self {
        Self(entry.id().to_owned())
    }
}

impl Default for Demands {
    /// Customary: 5 % ullage and 15 K to liquid-full; a tenth of the vapour pressure for
    /// residual gas is our own mark. Physics decides nothing here.
    fn default() -> Self {
        Self {
            ullage: Ratio::from_fraction(0.05).expect("a share"),
            liquid_full_margin: TemperatureDifference::from_kelvin(15.0).expect("finite"),
            factors: Factors::default(),
            gas_share: usual_gas_share(),
        }
    }
}

impl Duty {
    pub const ALL: [Self; 7] = [
        Self::HeatPipe,
        Self::Thermosyphon,
        Self::VapourChamber,
        Self::PulsatingLoop,
        Self::SensingBulb,
        Self::LiquidLift,
        Self::PlainVessel,
    ];

    pub const fn name(self) -> &'static str {
        match self {
            Self::HeatPipe => "heat pipe",
            Self::Thermosyphon => "thermosyphon",
            Self::VapourChamber => "vapour chamber",
            Self::PulsatingLoop => "pulsating loop",
            Self::SensingBulb => "sensing bulb",
            Self::LiquidLift => "liquid lift",
            Self::PlainVessel => "plain sealed vessel",
        }
    }

    /// Whether both ends of the charge window harm equally, so that its centre is the
    /// place to aim at. The others aim at the inventory of their wick or film, which
    /// is not computed here: they have no aim, only a window.
    pub const fn aims_at_centre(self) -> bool {
        match self {
            Self::HeatPipe | Self::VapourChamber | Self::Thermosyphon => false,
            Self::PulsatingLoop | Self::SensingBulb | Self::LiquidLift | Self::PlainVessel => true,
        }
    }
}

fn usual_gas_share() -> Ratio {
    Ratio::from_fraction(0.1).expect("a share")
}
