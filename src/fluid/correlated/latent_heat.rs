//! Latent heat of evaporation over temperature: for vapours that have it from Clapeyron.

use serde::Deserialize;

use super::GAS_CONSTANT;
use super::validity::{Validity, list, paired, powers};
use crate::source::Source;

/// θ = 1 − T/T_c.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum LatentHeat {
    /// h = (R T_c/M)(Aθ^(1/3) + Bθ^(2/3) + Cθ + Dθ² + Eθ⁶).
    Ppds12 {
        #[serde(deserialize_with = "list")]
        a: [f64; 5],
        critical_temperature_k: f64,
        temperature_range_k: (f64, f64),
        uncertainty_percent: f64,
        source: Source,
    },
}

impl LatentHeat {
    pub fn validity(&self) -> Validity<'_> {
        let Self::Ppds12 {
            temperature_range_k,
            uncertainty_percent,
            source,
            ..
        } = self;
        Validity {
            temperature_range_k: *temperature_range_k,
            uncertainty_percent: *uncertainty_percent,
            source,
        }
    }

    /// J/kg at a temperature in K; the molar mass in kg/mol.
    pub fn at(&self, temperature: f64, molar_mass: f64) -> f64 {
        let Self::Ppds12 {
            a,
            critical_temperature_k: tc,
            ..
        } = self;
        let exponents = [1.0 / 3.0, 2.0 / 3.0, 1.0, 2.0, 6.0];
        let (sum, _) = powers(paired(a, exponents), 1.0 - temperature / tc);
        GAS_CONSTANT * tc / molar_mass * sum
    }
}
