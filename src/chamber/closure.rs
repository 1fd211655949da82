//! How the filled chamber is closed, and what stays and what comes off.

use serde::{Deserialize, Serialize};

use super::capacity::Capacity;
use super::part::{Part, Rating};
use super::shape::Shape;
use crate::units::{Mass, Pressure};

#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Closure {
    pub kind: ClosureKind,
    /// Of the fill port, inside the sealed unit for good.
    #[serde(default)]
    pub dead_volume: Capacity,
    /// What is removed when the unit is closed; `None` where nothing is.
    #[serde(default)]
    pub stub: Option<Stub>,
    /// Whether the unit can be opened and filled again.
    #[serde(default)]
    pub refillable: bool,
    /// Without it nothing is known of the closure's strength, but for a flame seal,
    /// which is judged as the glass it is.
    #[serde(default)]
    pub rating: Option<Rating>,
    pub relief: Relief,
}

#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Serialize, Deserialize)]
pub enum ClosureKind {
    ColdPinchOff,
    PinchOffWelded,
    PinchOffSoldered,
    WeldedPlug,
    FlameSeal,
    Valve,
    ScrewPlug,
}

/// The piece of fill tube that comes off with what is in it.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Stub {
    /// Inside it, while the unit is filled.
    pub volume: Capacity,
    /// Of its metal or glass.
    #[serde(rename = "mass_kg")]
    pub mass: Mass,
}

/// What opens before the wall does.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum Relief {
    /// A device that opens at this pressure, inside less outside.
    Device {
        #[serde(rename = "opens_at_pa")]
        opens_at: Pressure,
        what: String,
    },
    /// The reason there is none.
    None { because: String },
}

impl ClosureKind {
    pub const ALL: [Self; 7] = [
        Self::ColdPinchOff,
        Self::PinchOffWelded,
        Self::PinchOffSoldered,
        Self::WeldedPlug,
        Self::FlameSeal,
        Self::Valve,
        Self::ScrewPlug,
    ];

    pub const fn name(self) -> &'static str {
        match self {
            Self::ColdPinchOff => "cold pinch-off",
            Self::PinchOffWelded => "pinch-off, welded over",
            Self::PinchOffSoldered => "pinch-off, soldered over",
            Self::WeldedPlug => "welded plug",
            Self::FlameSeal => "flame seal",
            Self::Valve => "valve",
            Self::ScrewPlug => "screw plug",
        }
    }

    /// Whether the closing itself parts a stub from the unit.
    pub const fn parts_a_stub(self) -> bool {
        matches!(
            self,
            Self::ColdPinchOff | Self::PinchOffWelded | Self::PinchOffSoldered | Self::FlameSeal
        )
    }
}

impl Closure {
    /// Inside what comes off, m³; 0 where nothing does.
    pub fn stub_m3(&self) -> f64 {
        let stub = self.stub.as_ref();
        stub.map_or(0.0, |stub| stub.volume.nominal.cubic_metre())
    }

    /// The closure as the part it is to volume and strength.
    pub(super) fn part(&self) -> Part {
        Part {
            rating: self.rating.clone(),
            ..Part::new(
                self.kind.name(),
                Shape::Fitting {
                    dead_volume: self.dead_volume,
                },
                None,
            )
        }
    }

    /// Strength comes from a rating, or for a flame seal from the glass around it.
    pub(super) const fn bears_by_rating(&self) -> bool {
        !matches!(self.kind, ClosureKind::FlameSeal) || self.rating.is_some()
    }
}
