//! The sealed unit: a mass of fluid in a fixed volume, at any temperature.
//!
//! The wall is rigid. That is careful for the liquid-full pressure; for dry-out
//! the caller takes the largest volume.

mod path;

use std::sync::Arc;

use crate::fluid::{Crossing, Fluid, FluidError, State};
use crate::solve::roots_between;
use crate::units::{Density, Mass, Pressure, Temperature, Volume};

pub use path::{PathPoint, path};

/// A fluid, a mass and a volume that will not change any more.
#[derive(Debug, Clone, PartialEq)]
pub struct SealedUnit {
    fluid: Arc<Fluid>,
    mass: Mass,
    volume: Volume,
    density: Density,
}

/// A unit needs some fluid in some volume.
#[derive(Debug, Clone, Copy, PartialEq, thiserror::Error)]
pub enum SealedError {
    #[error("the inside volume is zero")]
    NoVolume,
    #[error("the charge is zero")]
    NoCharge,
}

impl SealedUnit {
    /// # Errors
    /// [`SealedError`] for an empty volume or an empty charge.
    pub fn new(fluid: Arc<Fluid>, mass: Mass, volume: Volume) -> Result<Self, SealedError> {
        if volume.cubic_metre() <= 0.0 {
            return Err(SealedError::NoVolume);
        }
        let density =
            Density::from_kilogram_per_cubic_metre(mass.kilogram() / volume.cubic_metre())
                .map_err(|_| SealedError::NoCharge)?;
        Ok(Self {
            fluid,
            mass,
            volume,
            density,
        })
    }

    pub fn fluid(&self) -> &Arc<Fluid> {
        &self.fluid
    }

    pub fn mass(&self) -> Mass {
        self.mass
    }

    pub fn volume(&self) -> Volume {
        self.volume
    }

    /// Mass over inside volume.
    pub fn mean_density(&self) -> Density {
        self.density
    }

    /// The same fluid and volume with another mass.
    ///
    /// # Errors
    /// [`SealedError::NoCharge`].
    pub fn with_mass(&self, mass: Mass) -> Result<Self, SealedError> {
        Self::new(Arc::clone(&self.fluid), mass, self.volume)
    }

    /// Regime, pressure and liquid share at a temperature.
    ///
    /// # Errors
    /// [`FluidError`] outside the model.
    pub fn state(&self, temperature: Temperature) -> Result<State, FluidError> {
        self.fluid.state(self.density, temperature)
    }

    /// Where the unit dries out or goes liquid-full, ascending.
    ///
    /// # Errors
    /// [`FluidError`] if the fluid's saturation cannot be solved.
    pub fn crossings(&self) -> Result<Vec<Crossing>, FluidError> {
        self.fluid.crossings(self.density)
    }

    /// Temperatures between two bounds at which the pressure meets `limit`.
    /// `knots` are temperatures where `limit` bends; the unit's own kinks are added.
    ///
    /// # Errors
    /// [`FluidError`] if the fluid's saturation cannot be solved.
    pub fn meets(
        &self,
        limit: impl Fn(Temperature) -> Option<Pressure>,
        between: (Temperature, Temperature),
        knots: &[Temperature],
    ) -> Result<Vec<Temperature>, FluidError> {
        let (low, high) = between;
        if low >= high {
            return Ok(Vec::new());
        }
        // Between kinks both curves are smooth and the pressure rises steadily; the
        // added samples separate two meetings in one stretch, should the limit bend back.
        const SAMPLES: usize = 16;
        let (low, high) = (low.kelvin(), high.kelvin());
        let mut all: Vec<f64> = (0..=SAMPLES)
            .map(|i| low + (high - low) * i as f64 / SAMPLES as f64)
            .chain(
                knots
                    .iter()
                    .flat_map(|t| [t.kelvin() - 1e-9, t.kelvin(), t.kelvin() + 1e-9]),
            )
            .chain(self.crossings()?.iter().map(|c| c.temperature.kelvin()))
            .filter(|t| (low..=high).contains(t))
            .collect();
        all.sort_by(f64::total_cmp);
        all.dedup();
        let gap = |t: f64| {
            let at = Temperature::from_kelvin(t).ok()?;
            let pressure = match self.state(at) {
                Ok(state) => state.pressure,
                // Beyond the model it is at least the model's greatest pressure.
                Err(FluidError::PressureTooHigh { high, .. }) => high,
                // The solid may stand at more.
                Err(FluidError::Solid { melting, .. }) => melting,
                // Not known, but a liquid that fills its vessel gains megapascals per kelvin:
                // the limit counts as reached where the vessel is full.
                Err(FluidError::NoCompressedLiquid { .. }) => return limit(at).and(Some(1e9)),
                Err(_) => return None,
            };
            Some(pressure.pascal() - limit(at)?.pascal())
        };
        Ok(roots_between(|t| gap(t).unwrap_or(f64::NAN), &all, 1e-10)
            .into_iter()
            .filter_map(|t| Temperature::from_kelvin(t).ok())
            .collect())
    }
}
