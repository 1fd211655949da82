//! The sealed unit: a mass of fluid in a fixed volume, at any temperature.
//!
//! The volume moves with the temperature of its walls and, where asked, yields to the
//! pressure; without the latter the liquid-full pressure is on the careful side. For
//! dry-out the caller takes the largest volume. Permanent gas adds to the pressure; regime
//! and crossings are the fluid's alone.

pub mod effects;
mod gas;
mod path;

use std::sync::Arc;

use crate::chamber::Movement;
use crate::fluid::{Crossing, Fluid, FluidError, State};
use crate::solve::{bracketed_root, roots_between};
use crate::units::{Amount, Density, Mass, Pressure, Temperature, Volume};

pub use gas::{Gas, densest_within};
pub use path::{PathPoint, path};

/// A fluid, a mass and a volume that will not change any more.
#[derive(Debug, Clone, PartialEq)]
pub struct SealedUnit {
    fluid: Arc<Fluid>,
    mass: Mass,
    /// At the reference temperature, without load.
    volume: Volume,
    /// In that volume.
    density: Density,
    movement: Movement,
    outside: Pressure,
    gas: Option<Gas>,
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
            movement: Movement::default(),
            outside: Pressure::from_pascal(0.0).expect("0 is a pressure"),
            gas: None,
        })
    }

    /// The same unit in walls that move, against a pressure outside.
    #[must_use]
    pub fn with_walls(self, movement: Movement, outside: Pressure) -> Self {
        Self {
            movement,
            outside,
            ..self
        }
    }

    /// The same unit with permanent gas sealed in, of which the liquid takes up `ostwald`
    /// times the concentration in the space above it (0: nothing).
    #[must_use]
    pub fn with_gas(self, amount: Amount, ostwald: f64) -> Self {
        Self {
            gas: Some(Gas { amount, ostwald }),
            ..self
        }
    }

    /// The same unit as if no gas were in it.
    #[must_use]
    pub fn without_gas(self) -> Self {
        Self { gas: None, ..self }
    }

    pub fn gas(&self) -> Option<&Gas> {
        self.gas.as_ref()
    }

    pub fn fluid(&self) -> &Arc<Fluid> {
        &self.fluid
    }

    pub fn mass(&self) -> Mass {
        self.mass
    }

    /// Inside volume at a temperature, the walls without load, m³.
    pub fn volume_at_m3(&self, temperature: Temperature) -> f64 {
        self.volume.cubic_metre() * self.movement.growth(temperature.kelvin())
    }

    /// Mass over that volume.
    pub fn mean_density_at(&self, temperature: Temperature) -> Density {
        self.density_in(self.movement.growth(temperature.kelvin()))
    }

    /// The same fluid, volume and gas with another mass.
    ///
    /// # Errors
    /// [`SealedError::NoCharge`].
    pub fn with_mass(&self, mass: Mass) -> Result<Self, SealedError> {
        let same = Self::new(Arc::clone(&self.fluid), mass, self.volume)?;
        Ok(Self {
            gas: self.gas,
            ..same.with_walls(self.movement, self.outside)
        })
    }

    /// Regime, pressure and liquid share at a temperature; the pressure with that of the gas.
    ///
    /// # Errors
    /// [`FluidError`] outside the model.
    pub fn state(&self, temperature: Temperature) -> Result<State, FluidError> {
        let rigid = self.state_in(self.movement.growth(temperature.kelvin()), temperature);
        if self.movement.compliance_per_pa == 0.0 {
            return rigid;
        }
        self.yielding_state(temperature, rigid)
    }

    /// Where the unit dries out or goes liquid-full, ascending; by the fluid alone. That the walls yield to
    /// pressure is not credited here.
    ///
    /// # Errors
    /// [`FluidError`] if the fluid's saturation cannot be solved.
    pub fn crossings(&self) -> Result<Vec<Crossing>, FluidError> {
        self.fluid
            .crossings_growing(self.density, |t| self.movement.growth(t))
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

    /// The state whose pressure the walls have given way to: p = p(m/V(T, p), T).
    ///
    /// The more the walls give the lower the pressure, so there is one answer, between the
    /// pressure outside, where they stand as drawn, and that in rigid walls.
    fn yielding_state(
        &self,
        temperature: Temperature,
        rigid: Result<State, FluidError>,
    ) -> Result<State, FluidError> {
        let outside = self.outside.pascal();
        let stretched = |p: f64| {
            let load = (p - outside).max(0.0);
            let growth = self.movement.growth(temperature.kelvin());
            let growth = growth * (1.0 + self.movement.compliance_per_pa * load);
            self.state_in(growth, temperature)
        };
        let most = match &rigid {
            Ok(state) => state.pressure.pascal(),
            // Too dense for the model in rigid walls; perhaps not in these.
            Err(FluidError::PressureTooHigh { .. } | FluidError::TooDense { .. }) => MOST_PA,
            Err(FluidError::Solid { melting, .. }) => melting.pascal(),
            Err(_) => return rigid,
        };
        if most <= outside {
            return rigid;
        }
        // Above the model's pressures counts as above any asked for.
        let gap = |p: f64| match stretched(p) {
            Ok(state) => state.pressure.pascal() - p,
            Err(_) => MOST_PA,
        };
        match bracketed_root(gap, outside, most, 1e-12 * most) {
            Ok(p) => stretched(p),
            Err(_) => rigid,
        }
    }

    /// In the volume at its reference times `growth`.
    fn state_in(&self, growth: f64, temperature: Temperature) -> Result<State, FluidError> {
        let density = self.density_in(growth);
        let alone = self.fluid.state(density, temperature)?;
        match &self.gas {
            None => Ok(alone),
            Some(gas) => {
                let volume_m3 = self.volume.cubic_metre() * growth;
                gas.joins(&self.fluid, alone, density, volume_m3, temperature)
            }
        }
    }

    fn density_in(&self, growth: f64) -> Density {
        let density = self.density.kilogram_per_cubic_metre() / growth;
        Density::from_kilogram_per_cubic_metre(density).unwrap_or(self.density)
    }
}

/// Beyond every model, Pa.
const MOST_PA: f64 = 1e11;
