//! Fluids without a reference equation: published correlations joined so that
//! pressure is continuous at the phase boundary.
//!
//! * vapour pressure and liquid density from their correlations;
//! * saturated vapour density from Clausius and Clapeyron with the correlated
//!   latent heat, ρ″ = 1/(1/ρ′ + h/(T dp/dT)), down to a stated pressure; below
//!   it the second virial coefficient is held, Z″ = 1 − (1 − Z₁)(p/p₁)(T₁/T);
//! * superheated vapour by the virial equation truncated after the second
//!   coefficient, p = ρRT/M·(1 + Bρ), with B from the saturated vapour, so that
//!   p(ρ″, T) is the vapour pressure exactly;
//! * compressed liquid by Thomson, Brobst and Hankinson, exact at ρ′.
//!
//! Above 0.95 T_c the pieces do not join: refused by name.

use serde::{Deserialize, Deserializer};

use crate::source::Source;

/// Above this share of the critical temperature the model is refused.
pub const HIGHEST_REDUCED_TEMPERATURE: f64 = 0.95;
/// J/(mol K), CODATA 2018, exact.
pub const GAS_CONSTANT: f64 = 8.314_462_618_153_24;

/// A correlated fluid as its asset carries it; every form with range and source.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Correlated {
    pub critical: CorrelatedCritical,
    pub acentric_factor: f64,
    pub critical_source: Source,
    pub vapour_pressure: VapourPressure,
    pub liquid_density: LiquidDensity,
    pub latent_heat: LatentHeat,
    pub compressed_liquid: CompressedLiquid,
    pub vapour: VapourForm,
}

/// Critical point that the forms use.
#[derive(Debug, Clone, Copy, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct CorrelatedCritical {
    pub temperature_k: f64,
    pub pressure_pa: f64,
    pub density_kg_per_m3: f64,
}

/// θ = 1 − T/T_c in all forms.
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
}

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
}

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

#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum CompressedLiquid {
    /// Thomson, G. H.; Brobst, K. R.; Hankinson, R. W. 1982, AIChE J. 28, 671–676,
    /// doi 10.1002/aic.690280420.
    ThomsonBrobstHankinson { source: Source },
}

#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum VapourForm {
    Clapeyron { lowest_pressure_pa: f64 },
}

/// Saturation state in SI mass units.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct CorrelatedPair {
    pub pressure: f64,
    pub liquid: f64,
    pub vapour: f64,
    pub slope: f64,
    pub latent_heat: f64,
}

impl Correlated {
    /// Temperatures at which every form holds, K.
    pub fn temperature_range_k(&self) -> (f64, f64) {
        let VapourPressure::Wagner25 {
            temperature_range_k: p,
            ..
        } = &self.vapour_pressure;
        let LiquidDensity::Ppds {
            temperature_range_k: rho,
            ..
        } = &self.liquid_density;
        let LatentHeat::Ppds12 {
            temperature_range_k: h,
            ..
        } = &self.latent_heat;
        let low = p.0.max(rho.0).max(h.0);
        let high =
            p.1.min(rho.1)
                .min(h.1)
                .min(HIGHEST_REDUCED_TEMPERATURE * self.critical.temperature_k);
        (low, high)
    }

    /// Largest stated uncertainty of the vapour pressure, as a fraction.
    pub fn pressure_uncertainty(&self) -> f64 {
        let VapourPressure::Wagner25 {
            uncertainty_percent,
            ..
        } = &self.vapour_pressure;
        uncertainty_percent / 100.0
    }

    /// Sources of the forms in use, named for what each gives.
    pub fn sources(&self) -> [(&'static str, &Source); 5] {
        let VapourPressure::Wagner25 { source: p, .. } = &self.vapour_pressure;
        let LiquidDensity::Ppds { source: rho, .. } = &self.liquid_density;
        let LatentHeat::Ppds12 { source: h, .. } = &self.latent_heat;
        let CompressedLiquid::ThomsonBrobstHankinson { source: compressed } =
            &self.compressed_liquid;
        [
            ("vapour pressure", p),
            ("liquid density", rho),
            ("latent heat", h),
            ("compressed liquid", compressed),
            ("critical point", &self.critical_source),
        ]
    }

    /// Saturation at a temperature in range.
    pub fn saturation(&self, temperature: f64, molar_mass: f64) -> CorrelatedPair {
        let (pressure, slope) = self.vapour_pressure.at(temperature);
        let liquid = self.liquid_density.at(temperature);
        let specific = GAS_CONSTANT / molar_mass;
        let VapourForm::Clapeyron { lowest_pressure_pa } = self.vapour;
        let clapeyron = |t: f64| {
            let (p, slope) = self.vapour_pressure.at(t);
            let latent = self.latent_heat.at(t, molar_mass);
            (
                p,
                1.0 / (1.0 / self.liquid_density.at(t) + latent / (t * slope)),
            )
        };
        let vapour = if pressure >= lowest_pressure_pa {
            clapeyron(temperature).1
        } else {
            let joint = self
                .vapour_pressure
                .temperature_at(lowest_pressure_pa, self.temperature_range_k());
            let (p1, rho1) = clapeyron(joint);
            let z1 = p1 / (rho1 * specific * joint);
            let z = 1.0 - (1.0 - z1) * (pressure / p1) * (joint / temperature);
            pressure / (z * specific * temperature)
        };
        // Consistent with the densities above by Clausius and Clapeyron, whichever branch.
        let latent_heat = temperature * slope * (1.0 / vapour - 1.0 / liquid);
        CorrelatedPair {
            pressure,
            liquid,
            vapour,
            slope,
            latent_heat,
        }
    }

    /// Pressure and its slope over density of vapour at ρ ≤ ρ″, Pa and Pa m³/kg.
    pub fn vapour_isotherm(&self, t: f64, molar_mass: f64) -> impl Fn(f64) -> (f64, f64) + use<> {
        let pair = self.saturation(t, molar_mass);
        let rt = GAS_CONSTANT / molar_mass * t;
        let b = (pair.pressure / (rt * pair.vapour) - 1.0) / pair.vapour;
        move |density| {
            (
                density * rt * (1.0 + b * density),
                rt * (1.0 + 2.0 * b * density),
            )
        }
    }

    /// Pressure and its slope over density of compressed liquid at ρ ≥ ρ′.
    ///
    /// 1/ρ = (1/ρ′)(1 − C ln((B + p)/(B + p_s))), solved for p.
    pub fn liquid_isotherm(&self, t: f64, molar_mass: f64) -> impl Fn(f64) -> (f64, f64) + use<> {
        let pair = self.saturation(t, molar_mass);
        let (b, c) = self.tait(t);
        move |density| {
            let squeezed = (b + pair.pressure) * ((1.0 - pair.liquid / density) / c).exp();
            (
                squeezed - b,
                squeezed * pair.liquid / (c * density * density),
            )
        }
    }

    /// B (Pa) and C of the compressed-liquid form.
    fn tait(&self, temperature: f64) -> (f64, f64) {
        let omega = self.acentric_factor;
        let theta = 1.0 - temperature / self.critical.temperature_k;
        let e = (4.79594 + 0.250047 * omega + 1.14188 * omega * omega).exp();
        let b = -1.0 - 9.070217 * theta.cbrt() + 62.45326 * theta.powf(2.0 / 3.0)
            - 135.1102 * theta
            + e * theta.powf(4.0 / 3.0);
        (self.critical.pressure_pa * b, 0.0861488 + 0.0344483 * omega)
    }
}

impl VapourPressure {
    /// Pressure and its slope, Pa and Pa/K.
    fn at(&self, temperature: f64) -> (f64, f64) {
        let Self::Wagner25 {
            a,
            critical_temperature_k: tc,
            critical_pressure_pa: pc,
            ..
        } = self;
        let theta = 1.0 - temperature / tc;
        let powers = [1.0, 1.5, 2.5, 5.0];
        let sum: f64 = a.iter().zip(powers).map(|(a, e)| a * theta.powf(e)).sum();
        let sum_slope: f64 = a
            .iter()
            .zip(powers)
            .map(|(a, e)| a * e * theta.powf(e - 1.0))
            .sum();
        let ln = tc / temperature * sum;
        let p = pc * ln.exp();
        (p, p * (-ln / temperature - sum_slope / temperature))
    }

    fn temperature_at(&self, pressure: f64, (low, high): (f64, f64)) -> f64 {
        crate::solve::bracketed_root(|t| self.at(t).0.ln() - pressure.ln(), low, high, 1e-12)
            .unwrap_or(low)
    }
}

impl LiquidDensity {
    fn at(&self, temperature: f64) -> f64 {
        let Self::Ppds {
            a,
            critical_temperature_k: tc,
            critical_density_kg_per_m3: rc,
            ..
        } = self;
        let theta = 1.0 - temperature / tc;
        let powers = [0.35, 2.0 / 3.0, 1.0, 4.0 / 3.0];
        rc + a
            .iter()
            .zip(powers)
            .map(|(a, e)| a * theta.powf(e))
            .sum::<f64>()
    }
}

impl LatentHeat {
    fn at(&self, temperature: f64, molar_mass: f64) -> f64 {
        let Self::Ppds12 {
            a,
            critical_temperature_k: tc,
            ..
        } = self;
        let theta = 1.0 - temperature / tc;
        let powers = [1.0 / 3.0, 2.0 / 3.0, 1.0, 2.0, 6.0];
        let sum: f64 = a.iter().zip(powers).map(|(a, e)| a * theta.powf(e)).sum();
        GAS_CONSTANT * tc / molar_mass * sum
    }
}

/// Coefficients are written as a list, `[..]`, of just the form's length.
fn list<'de, D: Deserializer<'de>, const N: usize>(deserializer: D) -> Result<[f64; N], D::Error> {
    let list = Vec::<f64>::deserialize(deserializer)?;
    let found = list.len();
    list.try_into()
        .map_err(|_| serde::de::Error::custom(format!("{N} coefficients are needed, not {found}")))
}
