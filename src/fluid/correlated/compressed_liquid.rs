//! Pressure of the liquid that fills its vessel, exact at the saturated density.

use serde::Deserialize;

use super::{CorrelatedCritical, CorrelatedPair};
use crate::source::Source;

#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum CompressedLiquid {
    /// Thomson, G. H.; Brobst, K. R.; Hankinson, R. W. 1982, AIChE J. 28, 671–676,
    /// doi 10.1002/aic.690280420: 1/ρ = (1/ρ′)(1 − C ln((B + p)/(B + p_s))).
    ThomsonBrobstHankinson { source: Source },
    /// No published form: the liquid-full state is refused by name.
    NotKnown { reason: String },
}

/// The form at one temperature, ready for many densities.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct LiquidIsotherm {
    saturation: CorrelatedPair,
    b: f64,
    c: f64,
}

impl CompressedLiquid {
    /// Why there is no form.
    pub fn not_known(&self) -> Option<&str> {
        match self {
            Self::ThomsonBrobstHankinson { .. } => None,
            Self::NotKnown { reason } => Some(reason),
        }
    }

    /// `None` where there is no form.
    pub(super) fn isotherm(
        &self,
        saturation: CorrelatedPair,
        temperature: f64,
        critical: CorrelatedCritical,
        acentric_factor: f64,
    ) -> Option<LiquidIsotherm> {
        if self.not_known().is_some() {
            return None;
        }
        let omega = acentric_factor;
        let theta = 1.0 - temperature / critical.temperature_k;
        let e = (4.79594 + 0.250047 * omega + 1.14188 * omega * omega).exp();
        let b = -1.0 - 9.070217 * theta.cbrt() + 62.45326 * theta.powf(2.0 / 3.0)
            - 135.1102 * theta
            + e * theta.powf(4.0 / 3.0);
        Some(LiquidIsotherm {
            saturation,
            b: critical.pressure_pa * b,
            c: 0.0861488 + 0.0344483 * omega,
        })
    }
}

impl LiquidIsotherm {
    /// Pressure and its slope over density at ρ ≥ ρ′, Pa and Pa m³/kg.
    pub fn pressure_and_slope(&self, density: f64) -> (f64, f64) {
        let Self { saturation, b, c } = *self;
        let squeezed = (b + saturation.pressure) * ((1.0 - saturation.liquid / density) / c).exp();
        (
            squeezed - b,
            squeezed * saturation.liquid / (c * density * density),
        )
    }
}
