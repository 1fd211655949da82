//! The density that belongs to a pressure: the inverse of the state.

use super::correlated::GAS_CONSTANT;
use super::{Fluid, FluidError};
use crate::solve::rising_root;
use crate::units::{Density, Pressure, Temperature};

impl Fluid {
    /// The density at which a sealed unit at `temperature` stands at `pressure`;
    /// `None` where every density of the model is below it.
    ///
    /// Below the critical temperature the pressure is constant through the dome:
    /// a pressure above saturation answers with a compressed liquid, one below
    /// with a superheated vapour. Above the melting pressure it answers with the densest
    /// liquid there is, that at the melting pressure.
    ///
    /// # Errors
    /// [`FluidError`] outside the model's temperatures, frozen, or of an unknown compressed liquid.
    pub fn density_at(
        &self,
        pressure: Pressure,
        temperature: Temperature,
    ) -> Result<Option<Density>, FluidError> {
        self.density_near(pressure, temperature, None)
    }

    /// [`Self::density_at`], sooner found from a density that is `near` it.
    ///
    /// # Errors
    /// As [`Self::density_at`].
    pub fn density_near(
        &self,
        pressure: Pressure,
        temperature: Temperature,
        near: Option<Density>,
    ) -> Result<Option<Density>, FluidError> {
        self.not_frozen(temperature)?;
        self.not_outside(temperature)?;
        let t = temperature.kelvin();
        let melting = self.melting_pressure(temperature);
        let most = melting.map_or(f64::INFINITY, Pressure::pascal);
        let mut p = pressure.pascal().min(most);
        let critical = self.critical();
        let (_, most) = self.model.limits(self.molar_mass);
        let (from, to, liquid) = if t < critical.temperature_k {
            let (_, top) = self.saturation_range();
            let at = self.curve()?.at(t.min(top.kelvin()));
            if pressure.pascal() > at.pressure_pa {
                // A melting line that starts a little below the vapour pressure, by its own
                // error, does not turn the liquid into a vapour.
                p = p.max(at.pressure_pa);
                // A correlated liquid has no stated densest state: twice ρ′ is beyond its pressure limit.
                let densest = if most.is_finite() {
                    most
                } else {
                    2.0 * at.liquid_kg_per_m3
                };
                (at.liquid_kg_per_m3, densest, true)
            } else {
                (1e-9 * at.vapour_kg_per_m3, at.vapour_kg_per_m3, false)
            }
        } else {
            (1e-9 * critical.density_kg_per_m3, most, false)
        };
        let isotherm = self.isotherm(temperature, liquid)?;
        let gap = |rho: f64| {
            let (found, slope) = isotherm.at(rho);
            (found - p, slope)
        };
        // A liquid from its saturated density, anything else from the ideal gas. After a
        // step of 1e-8 an error of some 1e-16 is left.
        let ideal = p * self.molar_mass / (GAS_CONSTANT * t);
        let start = match near.map(Density::kilogram_per_cubic_metre) {
            Some(near) if (from..=to).contains(&near) => near,
            _ if liquid => from,
            _ => ideal,
        };
        let root = rising_root(gap, (from, to), start, 1e-8);
        let root = root.map_err(|_| FluidError::NotConverged {
            fluid: self.name.clone(),
            temperature,
        })?;
        // Driven to the densest state, the pressure may still not be reached there. A vapour
        // at its own line may miss the vapour pressure by a rounding only.
        let at_end = root > to * (1.0 - 1e-6);
        let is_out = at_end && (liquid || t >= critical.temperature_k) && gap(to).0 <= 0.0;
        Ok(Density::from_kilogram_per_cubic_metre(root)
            .ok()
            .filter(|_| !is_out))
    }

    /// As [`Self::density_near`], but where the pressure of a liquid-full unit is not known
    /// it answers with the saturated liquid: nothing denser is known to stay within.
    ///
    /// # Errors
    /// [`FluidError`] outside the model's temperatures, or frozen.
    pub fn densest_within(
        &self,
        pressure: Pressure,
        temperature: Temperature,
        near: Option<Density>,
    ) -> Result<Option<Density>, FluidError> {
        match self.density_near(pressure, temperature, near) {
            Err(FluidError::NoCompressedLiquid { .. }) => {
                let liquid = self.curve()?.at(temperature.kelvin()).liquid_kg_per_m3;
                Ok(Density::from_kilogram_per_cubic_metre(liquid).ok())
            }
            answer => answer,
        }
    }
}
