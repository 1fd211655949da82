//! Why a fluid has no answer at a state. Data first; each sentence names the limit.

use crate::units::{Density, Pressure, Temperature};

/// Out of range is an answer: it names the fluid, the value and the limit.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum FluidError {
    #[error("{fluid} is frozen at {} K: it melts at {} K", .temperature.kelvin(), .melting.kelvin())]
    Frozen {
        fluid: String,
        temperature: Temperature,
        melting: Temperature,
    },
    #[error("{} K is outside the equation of {fluid}: it starts at {} K", .temperature.kelvin(), .low.kelvin())]
    TooCold {
        fluid: String,
        temperature: Temperature,
        low: Temperature,
    },
    #[error("{} K is outside the model of {fluid}: it ends at {} K", .temperature.kelvin(), .high.kelvin())]
    TooHot {
        fluid: String,
        temperature: Temperature,
        high: Temperature,
    },
    #[error(
        "{fluid} has no saturation at {} K: it is given up to {} K (critical point {} K)",
        .temperature.kelvin(), .high.kelvin(), .critical.kelvin()
    )]
    NoSaturation {
        fluid: String,
        temperature: Temperature,
        high: Temperature,
        critical: Temperature,
    },
    #[error(
        "a density of {} kg/m3 is outside the model of {fluid}: it ends at {} kg/m3",
        .density.kilogram_per_cubic_metre(), .high.kilogram_per_cubic_metre()
    )]
    TooDense {
        fluid: String,
        density: Density,
        high: Density,
    },
    #[error("the pressure would be above {} Pa, where the model of {fluid} ends", .high.pascal())]
    PressureTooHigh { fluid: String, high: Pressure },
    #[error(
        "{fluid} is solid at {} K above {} Pa, its melting pressure",
        .temperature.kelvin(), .melting.pascal()
    )]
    Solid {
        fluid: String,
        temperature: Temperature,
        /// At this temperature.
        melting: Pressure,
    },
    #[error("the saturation of {fluid} was not found at {} K", .temperature.kelvin())]
    NotConverged {
        fluid: String,
        temperature: Temperature,
    },
    #[error("liquid-full {fluid} cannot be computed: {reason}")]
    NoCompressedLiquid { fluid: String, reason: String },
    #[error("energies of {fluid} are not computed: its model has no heat capacity")]
    NoEnergy { fluid: String },
}
