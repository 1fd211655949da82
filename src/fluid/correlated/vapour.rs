//! The vapour: how dense it is on its boundary, and its pressure when superheated.
//! On the boundary its pressure is the vapour pressure exactly, in every form.

use serde::Deserialize;

use super::validity::{Validity, list};
use crate::source::Source;

#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum VapourForm {
    /// Saturated density by Clausius and Clapeyron with the correlated latent heat,
    /// ρ″ = 1/(1/ρ′ + h/(T dp/dT)), down to a stated pressure; below it the second
    /// virial coefficient is held, Z″ = 1 − (1 − Z₁)(p/p₁)(T₁/T). Superheated by the
    /// virial equation with B from the saturated vapour.
    Clapeyron { lowest_pressure_pa: f64 },
    /// Alkali metals: an ideal mixture of atoms and pairs of atoms in equilibrium,
    /// p₂/p₁² = K, with log₁₀(K·p⁰) = A + B/T.
    Dimer {
        #[serde(deserialize_with = "list")]
        log10_k: [f64; 2],
        /// p⁰, the unit of pressure in which the constant was published.
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
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum VapourIsotherm {
    /// p = ρ(RT/M)(1 + Bρ); RT/M in J/kg, B in m³/kg.
    Virial { rt: f64, b: f64 },
    /// Atoms and pairs; K in 1/Pa.
    Dimer { rt: f64, k: f64 },
}

impl VapourForm {
    /// Of the form's own constants; Clapeyron has none.
    pub fn validity(&self) -> Option<Validity<'_>> {
        match self {
            Self::Clapeyron { .. } => None,
            Self::Dimer {
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
}

impl VapourIsotherm {
    /// Association at a temperature in K, log₁₀(K·p⁰) = A + B/T; `rt` is RT/M of the atoms.
    pub(super) fn dimer(rt: f64, [a, b]: [f64; 2], unit_pa: f64, temperature: f64) -> Self {
        let k = 10_f64.powf(a + b / temperature) / unit_pa;
        Self::Dimer { rt, k }
    }

    /// Pressure and its slope over density, Pa and Pa m³/kg.
    pub fn pressure_and_slope(&self, density: f64) -> (f64, f64) {
        match *self {
            Self::Virial { rt, b } => (
                density * rt * (1.0 + b * density),
                rt * (1.0 + 2.0 * b * density),
            ),
            Self::Dimer { rt, k } => {
                // All atoms as a gas of their own, p₁ + 2Kp₁² = ρRT/M.
                let atoms = positive_root(2.0 * k, density * rt);
                let pairs = k * atoms;
                let slope = (1.0 + 2.0 * pairs) / (1.0 + 4.0 * pairs) * rt;
                (atoms * (1.0 + pairs), slope)
            }
        }
    }

    /// The density at a pressure, where the form gives it in closed form.
    pub(super) fn density(&self, pressure: f64) -> f64 {
        match *self {
            // ρ(1 + Bρ) = p/(RT/M), the root that joins the ideal gas.
            Self::Virial { rt, b } => positive_root(b, pressure / rt),
            Self::Dimer { rt, k } => {
                let atoms = positive_root(k, pressure);
                atoms * (1.0 + 2.0 * k * atoms) / rt
            }
        }
    }

    /// Mass of the pairs over the whole mass; none for a vapour of one kind.
    pub fn dimer_mass_fraction(&self, density: f64) -> Option<f64> {
        match *self {
            Self::Virial { .. } => None,
            Self::Dimer { rt, k } => {
                let pairs = 2.0 * k * positive_root(2.0 * k, density * rt);
                Some(pairs / (1.0 + pairs))
            }
        }
    }
}

/// x in x + qx² = s, free of cancellation for small q.
fn positive_root(q: f64, s: f64) -> f64 {
    2.0 * s / (1.0 + (1.0 + 4.0 * q * s).sqrt())
}
