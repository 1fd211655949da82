//! What permanent gas finds in a sealed unit at one temperature: a dense phase that its
//! pressure squeezes, and a light one that it shares its space with.

use super::model::PhaseIsotherm;
use super::{Fluid, FluidError};
use crate::solve::rising_root;
use crate::units::Temperature;

/// The two phases of a fluid at a temperature, and how the dense one gives way.
///
/// Below the critical temperature they are liquid and vapour. Above it the line of critical
/// density carries the vapour pressure's curve on, and both are that density: what is
/// denser counts as dense phase, so that nothing jumps at the critical temperature.
pub struct Divide<'a> {
    /// Pressure at which the two stand together, Pa.
    pub pressure_pa: f64,
    pub dense_kg_per_m3: f64,
    pub light_kg_per_m3: f64,
    /// Greatest pressure of the model above that, Pa.
    pub most_excess_pa: f64,
    /// `None` where nothing is known of the squeezed liquid: it does not give way then.
    dense: Option<Dense<'a>>,
}

struct Dense<'a> {
    isotherm: PhaseIsotherm<'a>,
    /// By the isotherm itself, whose digits differ from the vapour pressure's.
    base_pa: f64,
    slope: f64,
    most_kg_per_m3: f64,
}

/// The dense phase under an excess pressure.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Squeezed {
    pub excess_pa: f64,
    pub kg_per_m3: f64,
    /// dρ/dp, kg/(m³ Pa).
    pub yields: f64,
}

impl Fluid {
    /// The two phases at a temperature at which the fluid is not frozen.
    ///
    /// # Errors
    /// [`FluidError`] outside the model's temperatures.
    pub fn divide(&self, temperature: Temperature) -> Result<Divide<'_>, FluidError> {
        self.not_frozen(temperature)?;
        self.not_outside(temperature)?;
        let t = temperature.kelvin();
        let critical = self.critical();
        let (most_pa, most_kg_per_m3) = self.model.limits(self.molar_mass);
        let beyond = t >= critical.temperature_k;
        let (dense_kg_per_m3, light_kg_per_m3, saturated_pa) = if beyond {
            let rho = critical.density_kg_per_m3;
            (rho, rho, None)
        } else {
            let (_, top) = self.saturation_range();
            let at = self.curve()?.at(t.min(top.kelvin()));
            let saturated = (temperature <= top).then_some(at.pressure_pa);
            (at.liquid_kg_per_m3, at.vapour_kg_per_m3, saturated)
        };
        let dense = self.isotherm(temperature, true).ok().map(|isotherm| {
            let (base_pa, slope) = isotherm.at(dense_kg_per_m3);
            // A correlated liquid has no stated densest state: twice ρ′ is beyond its limit.
            let most_kg_per_m3 =
                most_kg_per_m3.min(2.0 * dense_kg_per_m3.max(critical.density_kg_per_m3 * 2.0));
            Dense {
                isotherm,
                base_pa,
                slope,
                most_kg_per_m3,
            }
        });
        let base = dense.as_ref().map_or(critical.pressure_pa, |d| d.base_pa);
        let pressure_pa = saturated_pa.unwrap_or(base);
        Ok(Divide {
            pressure_pa,
            dense_kg_per_m3,
            light_kg_per_m3,
            most_excess_pa: most_pa - pressure_pa,
            dense,
        })
    }
}

impl Divide<'_> {
    /// Whether nothing is known of the squeezed liquid.
    pub fn is_stiff(&self) -> bool {
        self.dense.is_none()
    }

    /// The dense phase as it stands without any excess.
    pub fn at_rest(&self) -> Squeezed {
        Squeezed {
            excess_pa: 0.0,
            kg_per_m3: self.dense_kg_per_m3,
            yields: self
                .dense
                .as_ref()
                .map_or(0.0, |d| if d.slope > 0.0 { 1.0 / d.slope } else { 0.0 }),
        }
    }

    /// Excess pressure of the dense phase at a density; 0 for one that does not give way.
    pub fn excess_pa(&self, density_kg_per_m3: f64) -> f64 {
        self.dense.as_ref().map_or(0.0, |d| {
            (d.isotherm.at(density_kg_per_m3).0 - d.base_pa).max(0.0)
        })
    }

    /// The dense phase under `excess_pa`, sooner found from a state that is `near` it.
    /// Beyond the model's greatest density it is that.
    pub fn squeezed(&self, excess_pa: f64, near: Squeezed) -> Squeezed {
        /// Squeezed by so little, the square of it is lost among the digits of a density.
        const LINEAR: f64 = 1e-6;
        let rest = self.at_rest();
        let Some(dense) = &self.dense else {
            return Squeezed { excess_pa, ..rest };
        };
        let by = excess_pa * rest.yields;
        if dense.slope > 0.0 && by < LINEAR * rest.kg_per_m3 {
            return Squeezed {
                excess_pa,
                kg_per_m3: rest.kg_per_m3 + by,
                yields: rest.yields,
            };
        }
        let mut slope = dense.slope;
        let gap = |rho: f64| {
            let (p, found) = dense.isotherm.at(rho);
            slope = found;
            (p - dense.base_pa - excess_pa, found)
        };
        let start = near.kg_per_m3 + (excess_pa - near.excess_pa) * near.yields;
        let between = (rest.kg_per_m3, dense.most_kg_per_m3);
        let kg_per_m3 = rising_root(gap, between, start, 1e-9).unwrap_or(rest.kg_per_m3);
        Squeezed {
            excess_pa,
            kg_per_m3,
            yields: if slope > 0.0 { 1.0 / slope } else { 0.0 },
        }
    }
}
