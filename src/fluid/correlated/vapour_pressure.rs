//! Vapour pressure over temperature, and its slope.

use serde::Deserialize;

use super::validity::{Validity, list, paired, powers};
use crate::source::Source;

/// θ = 1 − T/T_c; T in K, p in Pa.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum VapourPressure {
    /// ln(p/p_c) = (T_c/T)(Aθ + Bθ^1.5 + Cθ^2.5 + Dθ⁵); Wagner, W. 1973, Cryogenics 13, 470.
    Wagner25 {
        #[serde(deserialize_with = "list")]
        a: [f64; 4],
        critical_temperature_k: f64,
        critical_pressure_pa: f64,
        temperature_range_k: (f64, f64),
        uncertainty_percent: f64,
        source: Source,
    },
    /// ln(p/p_c) = (T_c/T)(Aθ + Bθ^1.5 + Cθ³ + Dθ⁶); the older exponents of the same author.
    Wagner36 {
        #[serde(deserialize_with = "list")]
        a: [f64; 4],
        critical_temperature_k: f64,
        critical_pressure_pa: f64,
        temperature_range_k: (f64, f64),
        uncertainty_percent: f64,
        source: Source,
    },
    /// ln(p/p_c) = (T_c/T) Σ nθᵗ.
    WagnerGeneral {
        n: Vec<f64>,
        t: Vec<f64>,
        critical_temperature_k: f64,
        critical_pressure_pa: f64,
        temperature_range_k: (f64, f64),
        uncertainty_percent: f64,
        source: Source,
    },
    /// ln(p/Pa) = A + B/T + C ln T + D T^E.
    Dippr101 {
        #[serde(deserialize_with = "list")]
        a: [f64; 5],
        temperature_range_k: (f64, f64),
        uncertainty_percent: f64,
        source: Source,
    },
}

impl VapourPressure {
    pub fn validity(&self) -> Validity<'_> {
        let (Self::Wagner25 {
            temperature_range_k,
            uncertainty_percent,
            source,
            ..
        }
        | Self::Wagner36 {
            temperature_range_k,
            uncertainty_percent,
            source,
            ..
        }
        | Self::WagnerGeneral {
            temperature_range_k,
            uncertainty_percent,
            source,
            ..
        }
        | Self::Dippr101 {
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

    /// Pressure and its slope, Pa and Pa/K.
    pub fn at(&self, temperature: f64) -> (f64, f64) {
        let wagner = |tc: f64, pc: f64, terms: &mut dyn Iterator<Item = (f64, f64)>| {
            let (sum, slope) = powers(terms, 1.0 - temperature / tc);
            let ln = tc / temperature * sum;
            (pc * ln.exp(), -(ln + slope) / temperature)
        };
        let (pressure, relative_slope) = match self {
            Self::Wagner25 {
                a,
                critical_temperature_k: tc,
                critical_pressure_pa: pc,
                ..
            } => wagner(*tc, *pc, &mut paired(a, [1.0, 1.5, 2.5, 5.0])),
            Self::Wagner36 {
                a,
                critical_temperature_k: tc,
                critical_pressure_pa: pc,
                ..
            } => wagner(*tc, *pc, &mut paired(a, [1.0, 1.5, 3.0, 6.0])),
            Self::WagnerGeneral {
                n,
                t,
                critical_temperature_k: tc,
                critical_pressure_pa: pc,
                ..
            } => wagner(*tc, *pc, &mut n.iter().copied().zip(t.iter().copied())),
            Self::Dippr101 {
                a: [a, b, c, d, e], ..
            } => {
                let last = d * temperature.powf(*e);
                let ln = a + b / temperature + c * temperature.ln() + last;
                (ln.exp(), (c - b / temperature + e * last) / temperature)
            }
        };
        (pressure, pressure * relative_slope)
    }

    /// Where the pressure is reached between two temperatures; the lower one if nowhere.
    pub(super) fn temperature_at(&self, pressure: f64, (low, high): (f64, f64)) -> f64 {
        crate::solve::bracketed_root(|t| self.at(t).0.ln() - pressure.ln(), low, high, 1e-12)
            .unwrap_or(low)
    }
}
