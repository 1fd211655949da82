//! Fluids without a reference equation: published correlations joined so that
//! pressure is continuous at the phase boundary.
//!
//! Each thought has its file: [`VapourPressure`], [`LiquidDensity`], [`LatentHeat`],
//! [`VapourForm`], [`CompressedLiquid`]. What lies outside a form's own range is
//! refused by name, and so is all above 0.95 T_c, where the pieces do not join.

mod association;
mod check;
mod compressed_liquid;
mod latent_heat;
mod liquid_density;
#[cfg(test)]
mod tests;
mod validity;
mod vapour;
mod vapour_pressure;

use serde::{Deserialize, Deserializer};

pub use association::{Association, Molecule};
pub use check::CorrelatedError;
pub use compressed_liquid::{CompressedLiquid, LiquidIsotherm};
pub use latent_heat::LatentHeat;
pub use liquid_density::LiquidDensity;
pub use validity::Validity;
pub use vapour::{VapourForm, VapourIsotherm};
pub use vapour_pressure::VapourPressure;

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
    /// Only the compressed liquid asks for it.
    #[serde(default, deserialize_with = "given")]
    pub acentric_factor: Option<f64>,
    pub critical_source: Source,
    pub vapour_pressure: VapourPressure,
    pub liquid_density: LiquidDensity,
    /// Only the vapour by Clapeyron asks for it.
    #[serde(default, deserialize_with = "given")]
    pub latent_heat: Option<LatentHeat>,
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
        let all = (
            0.0,
            HIGHEST_REDUCED_TEMPERATURE * self.critical.temperature_k,
        );
        self.validities().fold(all, |(low, high), (_, validity)| {
            let (from, to) = validity.temperature_range_k;
            (low.max(from), high.min(to))
        })
    }

    /// Largest stated uncertainty of the pressure at a density, as a fraction: of the
    /// vapour pressure or of the vapour's own constants.
    pub fn pressure_uncertainty(&self) -> f64 {
        let of_vapour = self
            .vapour
            .validity()
            .map_or(0.0, |v| v.uncertainty_percent);
        self.vapour_pressure
            .validity()
            .uncertainty_percent
            .max(of_vapour)
            / 100.0
    }

    /// Sources of the forms in use, named for what each gives.
    pub fn sources(&self) -> Vec<(&'static str, &Source)> {
        let compressed = match &self.compressed_liquid {
            CompressedLiquid::ThomsonBrobstHankinson { source } => {
                Some(("compressed liquid", source))
            }
            CompressedLiquid::NotKnown { .. } => None,
        };
        self.validities()
            .map(|(what, validity)| (what, validity.source))
            .chain(compressed)
            .chain([("critical point", &self.critical_source)])
            .collect()
    }

    /// What the forms in use state of themselves, named for what each gives.
    fn validities(&self) -> impl Iterator<Item = (&'static str, Validity<'_>)> {
        let heat = self.latent_heat.as_ref().map(LatentHeat::validity);
        [
            ("vapour pressure", Some(self.vapour_pressure.validity())),
            ("liquid density", Some(self.liquid_density.validity())),
            ("latent heat", heat),
            ("vapour", self.vapour.validity()),
        ]
        .into_iter()
        .filter_map(|(what, validity)| Some((what, validity?)))
    }

    /// Saturation at a temperature in range.
    pub fn saturation(&self, temperature: f64, molar_mass: f64) -> CorrelatedPair {
        let (pressure, slope) = self.vapour_pressure.at(temperature);
        let liquid = self.liquid_density.at(temperature, molar_mass);
        let vapour = self.saturated_vapour(temperature, molar_mass, pressure);
        // Consistent with the densities by Clausius and Clapeyron, whichever form.
        let latent_heat = temperature * slope * (1.0 / vapour - 1.0 / liquid);
        CorrelatedPair {
            pressure,
            liquid,
            vapour,
            slope,
            latent_heat,
        }
    }

    /// Where the saturated vapour passes from Clapeyron's density to a constant second
    /// virial coefficient, K; none where the range has no such place.
    pub fn joint_k(&self) -> Option<f64> {
        let VapourForm::Clapeyron { lowest_pressure_pa } = self.vapour else {
            return None;
        };
        let range = self.temperature_range_k();
        let reached = |t| self.vapour_pressure.at(t).0 >= lowest_pressure_pa;
        (!reached(range.0) && reached(range.1)).then(|| {
            self.vapour_pressure
                .temperature_at(lowest_pressure_pa, range)
        })
    }

    /// ρ″ at the vapour pressure, kg/m³.
    fn saturated_vapour(&self, temperature: f64, molar_mass: f64, pressure: f64) -> f64 {
        let rt = GAS_CONSTANT / molar_mass * temperature;
        let VapourForm::Clapeyron { lowest_pressure_pa } = self.vapour else {
            return self
                .vapour
                .isotherm(temperature, rt)
                .map_or(f64::NAN, |isotherm| isotherm.density(pressure));
        };
        if pressure >= lowest_pressure_pa {
            return self.clapeyron(temperature, molar_mass).1;
        }
        let joint = self.joint_k().unwrap_or(temperature);
        let (p1, rho1) = self.clapeyron(joint, molar_mass);
        let z1 = p1 * molar_mass / (rho1 * GAS_CONSTANT * joint);
        let z = 1.0 - (1.0 - z1) * (pressure / p1) * (joint / temperature);
        pressure / (z * rt)
    }

    /// Vapour pressure and the saturated density that belongs to the latent heat.
    fn clapeyron(&self, temperature: f64, molar_mass: f64) -> (f64, f64) {
        let (pressure, slope) = self.vapour_pressure.at(temperature);
        let latent = self
            .latent_heat
            .as_ref()
            .map_or(f64::NAN, |heat| heat.at(temperature, molar_mass));
        let liquid = self.liquid_density.at(temperature, molar_mass);
        (
            pressure,
            1.0 / (1.0 / liquid + latent / (temperature * slope)),
        )
    }

    /// Vapour at ρ ≤ ρ″.
    pub fn vapour_isotherm(&self, temperature: f64, molar_mass: f64) -> VapourIsotherm {
        let rt = GAS_CONSTANT / molar_mass * temperature;
        self.vapour.isotherm(temperature, rt).unwrap_or_else(|| {
            let pair = self.saturation(temperature, molar_mass);
            let b = (pair.pressure / (rt * pair.vapour) - 1.0) / pair.vapour;
            VapourIsotherm::Virial { rt, b }
        })
    }

    /// Compressed liquid at ρ ≥ ρ′; `None` where no form is known.
    pub fn liquid_isotherm(&self, temperature: f64, molar_mass: f64) -> Option<LiquidIsotherm> {
        let pair = self.saturation(temperature, molar_mass);
        self.compressed_liquid
            .isotherm(pair, temperature, self.critical, self.acentric_factor?)
    }
}

/// A field that may be left out, and needs no `Some(..)` where it is given.
fn given<'de, D: Deserializer<'de>, T: Deserialize<'de>>(
    deserializer: D,
) -> Result<Option<T>, D::Error> {
    T::deserialize(deserializer).map(Some)
}
