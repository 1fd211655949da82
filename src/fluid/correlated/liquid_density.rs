//! Density of the saturated liquid over temperature.

use serde::Deserialize;

use super::validity::{Validity, list, paired, powers};
use crate::source::Source;

/// θ = 1 − T/T_c; T in K, ρ in kg/m³.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum LiquidDensity {
    /// ρ = ρ_c + Aθ^0.35 + Bθ^(2/3) + Cθ + Dθ^(4/3), kg/m³.
    Ppds {
        #[serde(deserialize_with = "list")]
        a: [f64; 4],
        critical_temperature_k: f64,
        critical_density_kg_per_m3: f64,
        temperature_range_k: (f64, f64),
        uncertainty_percent: f64,
        source: Source,
    },
    /// The same powers with the coefficients in kmol/m³; ρ_c stays in kg/m³.
    Dippr116 {
        #[serde(deserialize_with = "list")]
        a: [f64; 4],
        critical_temperature_k: f64,
        critical_density_kg_per_m3: f64,
        temperature_range_k: (f64, f64),
        uncertainty_percent: f64,
        source: Source,
    },
    /// ρ = ρ_c + Σ nθᵗ, kg/m³.
    PowersOfTheta {
        n: Vec<f64>,
        t: Vec<f64>,
        critical_temperature_k: f64,
        critical_density_kg_per_m3: f64,
        temperature_range_k: (f64, f64),
        uncertainty_percent: f64,
        source: Source,
    },
    /// ρ = M·A/B^(1 + (1 − T/C)^D), A in kmol/m³, C in K.
    Dippr105 {
        #[serde(deserialize_with = "list")]
        a: [f64; 4],
        temperature_range_k: (f64, f64),
        uncertainty_percent: f64,
        source: Source,
    },
    /// ρ = Σ aᵢTⁱ from i = 0, kg/m³ and K.
    Polynomial {
        a: Vec<f64>,
        temperature_range_k: (f64, f64),
        uncertainty_percent: f64,
        source: Source,
    },
}

const PPDS: [f64; 4] = [0.35, 2.0 / 3.0, 1.0, 4.0 / 3.0];

impl LiquidDensity {
    pub fn validity(&self) -> Validity<'_> {
        let (Self::Ppds {
            temperature_range_k,
            uncertainty_percent,
            source,
            ..
        }
        | Self::Dippr116 {
            temperature_range_k,
            uncertainty_percent,
            source,
            ..
        }
        | Self::PowersOfTheta {
            temperature_range_k,
            uncertainty_percent,
            source,
            ..
        }
        | Self::Dippr105 {
            temperature_range_k,
            uncertainty_percent,
            source,
            ..
        }
        | Self::Polynomial {
            temperature_range_k,
            uncertainty_percent,
            source,
            ..
        }) = self;
        Validity {
            temperature_range_k: *temperature_range_k,
            uncertainty_percent: *uncertainty_percent,
            source,
        }
    }

    /// kg/m³ at a temperature in K; the molar mass in kg/mol.
    pub fn at(&self, temperature: f64, molar_mass: f64) -> f64 {
        let theta = |tc: f64| 1.0 - temperature / tc;
        let kilomole = 1000.0 * molar_mass;
        match self {
            Self::Ppds {
                a,
                critical_temperature_k: tc,
                critical_density_kg_per_m3: rc,
                ..
            } => rc + powers(paired(a, PPDS), theta(*tc)).0,
            Self::Dippr116 {
                a,
                critical_temperature_k: tc,
                critical_density_kg_per_m3: rc,
                ..
            } => rc + kilomole * powers(paired(a, PPDS), theta(*tc)).0,
            Self::PowersOfTheta {
                n,
                t,
                critical_temperature_k: tc,
                critical_density_kg_per_m3: rc,
                ..
            } => rc + powers(n.iter().copied().zip(t.iter().copied()), theta(*tc)).0,
            Self::Dippr105 {
                a: [a, b, c, d], ..
            } => kilomole * a / b.powf(1.0 + theta(*c).powf(*d)),
            Self::Polynomial { a, .. } => a.iter().rev().fold(0.0, |sum, a| sum * temperature + a),
        }
    }
}
