//! The vapour: how dense it is on its boundary, and its pressure when superheated.
//! On the boundary its pressure is the vapour pressure exactly, in every form.

use serde::Deserialize;

use super::association::{Association, Molecule};
use super::validity::Validity;
use crate::source::Source;

#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum VapourForm {
    /// Saturated density by Clausius and Clapeyron with the correlated latent heat,
    /// ρ″ = 1/(1/ρ′ + h/(T dp/dT)), down to a stated pressure; below it the second
    /// virial coefficient is held, Z″ = 1 − (1 − Z₁)(p/p₁)(T₁/T). Superheated by the
    /// virial equation with B from the saturated vapour.
    Clapeyron { lowest_pressure_pa: f64 },
    /// An ideal mixture of molecules of several sizes in equilibrium with each other:
    /// alkali metals, sulfur. See [`Association`].
    Associating {
        /// Atoms in the molecule that the constants are written for.
        smallest_atoms: f64,
        larger: Vec<Molecule>,
        /// p⁰, the unit of pressure of the constants.
        unit_pa: f64,
        temperature_range_k: (f64, f64),
        /// Of the density at a given pressure.
        uncertainty_percent: f64,
        source: Source,
    },
    /// An ideal gas, p = ρRT/M.
    Ideal {
        temperature_range_k: (f64, f64),
        /// Of the density at a given pressure.
        uncertainty_percent: f64,
        source: Source,
    },
}

/// Pressure over density at one temperature.
#[derive(Debug, Clone, PartialEq)]
pub enum VapourIsotherm {
    /// p = ρ(RT/M)(1 + Bρ); RT/M in J/kg, B in m³/kg.
    Virial {
        rt: f64,
        b: f64,
    },
    Association(Association),
}

impl VapourForm {
    /// Of the form's own constants; Clapeyron has none.
    pub fn validity(&self) -> Option<Validity<'_>> {
        match self {
            Self::Clapeyron { .. } => None,
            Self::Associating {
                temperature_range_k,
                uncertainty_percent,
                source,
                ..
            }
            | Self::Ideal {
                temperature_range_k,
                uncertainty_percent,
                source,
            } => Some(Validity {
                temperature_range_k: *temperature_range_k,
                uncertainty_percent: *uncertainty_percent,
                source,
            }),
        }
    }

    /// At a temperature in K, where the form does not lean on the saturation; `rt` is RT
    /// over the molar mass of the atoms.
    pub(super) fn isotherm(&self, temperature: f64, rt: f64) -> Option<VapourIsotherm> {
        match self {
            Self::Clapeyron { .. } => None,
            Self::Associating {
                smallest_atoms,
                larger,
                unit_pa,
                ..
            } => Some(VapourIsotherm::Association(Association::new(
                *smallest_atoms,
                larger,
                *unit_pa,
                temperature,
                rt,
            ))),
            Self::Ideal { .. } => Some(VapourIsotherm::Virial { rt, b: 0.0 }),
        }
    }
}

impl VapourIsotherm {
    /// Pressure and its slope over density, Pa and Pa m³/kg.
    pub fn pressure_and_slope(&self, density: f64) -> (f64, f64) {
        match self {
            Self::Virial { rt, b } => (
                density * rt * (1.0 + b * density),
                rt * (1.0 + 2.0 * b * density),
            ),
            Self::Association(mixture) => mixture.pressure_and_slope(density),
        }
    }

    /// The density at a pressure, kg/m³.
    pub(super) fn density(&self, pressure: f64) -> f64 {
        match self {
            // ρ(1 + Bρ) = p/(RT/M), the root that joins the ideal gas.
            Self::Virial { rt, b } => {
                let ideal = pressure / rt;
                2.0 * ideal / (1.0 + (1.0 + 4.0 * b * ideal).sqrt())
            }
            Self::Association(mixture) => mixture.density(pressure),
        }
    }

    /// Mass in molecules of so many atoms over the whole mass; none for a vapour of one kind.
    pub fn mass_fraction(&self, atoms: f64, density: f64) -> Option<f64> {
        match self {
            Self::Virial { .. } => None,
            Self::Association(mixture) => Some(mixture.mass_fraction(atoms, density)),
        }
    }
}
