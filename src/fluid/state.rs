//! The state at a density and a temperature: regime, pressure, how much is liquid.

use super::correlated::GAS_CONSTANT;
use super::lines::FrozenPressure;
use super::model::{Model, PhaseIsotherm};
use super::{Fluid, FluidError, clamped};
use crate::solve::roots_between;
use crate::units::{Density, Pressure, Temperature};

/// A liquid this little above its vapour pressure, as a share of it or in Pa, is not solid:
/// the melting line meets the triple point of the equation within its own error only, and a
/// kilopascal of it is a tenth of a millikelvin.
const BESIDE_THE_LINE: (f64, f64) = (1e-3, 1e3);
/// A density found for the melting pressure gives it back with a rounding.
const MELTING_SLACK: f64 = 1e-9;

/// What the inside of a sealed unit looks like.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum Regime {
    TwoPhase,
    AllVapour,
    LiquidFull,
    Supercritical,
    Frozen,
}

/// The fluid at one mean density and temperature.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct State {
    pub regime: Regime,
    /// Absolute.
    pub pressure: Pressure,
    /// The pressure is not known, only that it is not above this: a frozen fluid without a
    /// sublimation equation, or too little of it for any solid.
    pub is_bound: bool,
    /// Volume of liquid over the whole volume; none where the phases are not told apart.
    pub liquid_share: Option<f64>,
    /// Mass of vapour over the whole mass.
    pub quality: Option<f64>,
    /// What permanent gas adds, and [`Self::pressure`] includes: its partial pressure
    /// wherever it has room. `None` where no gas is counted. Regime and shares are the
    /// fluid's alone.
    pub gas: Option<Pressure>,
}

/// Which side of the dome a line of constant density leaves it by.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum DomeSide {
    /// The last liquid evaporates: dry-out.
    Vapour,
    /// The last vapour is squeezed out: liquid-full.
    Liquid,
    /// Within a double's reach of the critical point.
    Critical,
}

/// Where a line of constant density crosses the dome.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Crossing {
    pub temperature: Temperature,
    pub side: DomeSide,
}

impl State {
    /// The fluid's own pressure, without permanent gas.
    pub fn own_pressure(&self) -> Pressure {
        let gas = self.gas.map_or(0.0, Pressure::pascal);
        Pressure::from_pascal(self.pressure.pascal() - gas).unwrap_or(self.pressure)
    }
}

impl Fluid {
    /// Regime, pressure and liquid share at a mean density and a temperature.
    ///
    /// # Errors
    /// [`FluidError`] outside the model; a frozen fluid is a state, not an error.
    pub fn state(&self, density: Density, temperature: Temperature) -> Result<State, FluidError> {
        let rho = density.kilogram_per_cubic_metre();
        let t = temperature.kelvin();
        if temperature < self.freezing_point() {
            return self.frozen_state(density, temperature);
        }
        self.not_outside(temperature)?;
        let critical = self.critical();
        if t >= critical.temperature_k {
            return self.single(Regime::Supercritical, density, temperature, None);
        }
        let (_, top) = self.saturation_range();
        let curve = self.curve()?;
        let at = curve.at(t.min(top.kelvin()));
        if rho >= at.liquid_kg_per_m3 {
            let mut state = self.single(Regime::LiquidFull, density, temperature, Some(1.0))?;
            // Beside its line a cold liquid's pressure is lost in the rounding of large
            // terms, to below zero even: it is never below the vapour pressure.
            if state.pressure.pascal() < at.pressure_pa {
                state.pressure =
                    Pressure::from_pascal(at.pressure_pa).expect("a vapour pressure is finite");
            }
            Ok(state)
        } else if rho <= at.vapour_kg_per_m3 {
            self.single(Regime::AllVapour, density, temperature, Some(0.0))
        } else if temperature > top {
            // Between 0.9999 T_c and T_c the equation's own loop is flatter than a
            // part in a million: its pressure is the answer, the shares are not.
            let mut state = self.single(Regime::TwoPhase, density, temperature, None)?;
            state.quality = None;
            Ok(state)
        } else {
            let (l, v) = (at.liquid_kg_per_m3, at.vapour_kg_per_m3);
            Ok(State {
                regime: Regime::TwoPhase,
                pressure: Pressure::from_pascal(at.pressure_pa)
                    .expect("a vapour pressure is finite"),
                is_bound: false,
                liquid_share: Some((rho - v) / (l - v)),
                quality: Some((1.0 / rho - 1.0 / l) / (1.0 / v - 1.0 / l)),
                gas: None,
            })
        }
    }

    /// Temperatures at which a unit of this mean density leaves or enters the
    /// dome, ascending. Water's liquid line turns near 4 °C, so there can be
    /// two. A density whose line meets the dome above 0.9999 T_c is given the
    /// critical temperature.
    ///
    /// # Errors
    /// [`FluidError::NotConverged`] if the fluid's saturation cannot be solved.
    pub fn crossings(&self, density: Density) -> Result<Vec<Crossing>, FluidError> {
        self.crossings_growing(density, |_| 1.0)
    }

    /// The same for a volume that grows: `growth` is the volume at a temperature (K) over
    /// the one that `density` is counted in, smooth and near 1.
    ///
    /// # Errors
    /// As [`Self::crossings`].
    pub fn crossings_growing(
        &self,
        density: Density,
        growth: impl Fn(f64) -> f64,
    ) -> Result<Vec<Crossing>, FluidError> {
        let rho = density.kilogram_per_cubic_metre();
        let curve = self.curve()?;
        let liquid = |t: f64| curve.at(t).liquid_kg_per_m3 * growth(t);
        let vapour = |t: f64| curve.at(t).vapour_kg_per_m3 * growth(t);
        let (low, high) = curve.range_k();
        let top = curve.at(high);
        let critical = self.critical();
        let from = self.freezing_point().kelvin().max(low);
        let mut found = Vec::new();
        let tolerance = 1e-11 * critical.temperature_k;
        let at_critical = rho / growth(critical.temperature_k);
        let knots: Vec<f64> = std::iter::once(from)
            .chain(
                curve
                    .turning_points()
                    .iter()
                    .map(|&t| turning_near(t, (from, high), liquid))
                    .filter(|t| *t > from && *t < high),
            )
            .chain([high])
            .collect();
        if at_critical >= critical.density_kg_per_m3 {
            for t in roots_between(|t| liquid(t) - rho, &knots, tolerance) {
                found.push(Crossing {
                    temperature: clamped(t),
                    side: DomeSide::Liquid,
                });
            }
        } else {
            for t in roots_between(|t| vapour(t) - rho, &[from, high], tolerance) {
                found.push(Crossing {
                    temperature: clamped(t),
                    side: DomeSide::Vapour,
                });
            }
        }
        let at_top = rho / growth(high);
        let inside_at_top = at_top < top.liquid_kg_per_m3 && at_top > top.vapour_kg_per_m3;
        if inside_at_top && matches!(self.model, Model::Equation(_)) {
            found.push(Crossing {
                temperature: clamped(critical.temperature_k),
                side: DomeSide::Critical,
            });
        }
        Ok(found)
    }

    /// Specific internal energy and entropy of a homogeneous state, J/kg and J/(kg K).
    ///
    /// # Errors
    /// [`FluidError::NoEnergy`] for a correlated fluid.
    pub fn energy_and_entropy(
        &self,
        density_kg_per_m3: f64,
        temperature: Temperature,
    ) -> Result<(f64, f64), FluidError> {
        match &self.model {
            Model::Equation(equation) => {
                let c = equation.caloric(temperature.kelvin(), density_kg_per_m3 / self.molar_mass);
                Ok((
                    c.internal_energy / self.molar_mass,
                    c.entropy / self.molar_mass,
                ))
            }
            Model::Correlated(_) => Err(FluidError::NoEnergy {
                fluid: self.name.clone(),
            }),
        }
    }

    /// One branch at one temperature, Pa and Pa m³/kg over kg/m³.
    pub(super) fn isotherm(
        &self,
        temperature: Temperature,
        liquid: bool,
    ) -> Result<PhaseIsotherm<'_>, FluidError> {
        self.model
            .isotherm(temperature.kelvin(), self.molar_mass, liquid)
            .ok_or_else(|| self.no_compressed_liquid())
    }

    pub(crate) fn no_compressed_liquid(&self) -> FluidError {
        let reason = self.model.no_compressed_liquid().unwrap_or_default();
        FluidError::NoCompressedLiquid {
            fluid: self.name.clone(),
            reason: reason.to_owned(),
        }
    }

    /// Whether a liquid at this pressure stands so little above its vapour pressure that the
    /// melting line, which meets it at the triple point, says nothing of it.
    pub fn is_beside_its_line(&self, pressure: Pressure, temperature: Temperature) -> bool {
        self.saturation_pressure(temperature)
            .map(Pressure::pascal)
            .is_ok_and(|p| pressure.pascal() - p <= BESIDE_THE_LINE.1.max(BESIDE_THE_LINE.0 * p))
    }

    fn frozen_state(
        &self,
        density: Density,
        temperature: Temperature,
    ) -> Result<State, FluidError> {
        let solid = self.frozen_pressure(temperature)?;
        // As a gas the whole charge would stand no higher than an ideal one.
        let gas = density.kilogram_per_cubic_metre() * GAS_CONSTANT * temperature.kelvin()
            / self.molar_mass;
        let gas = Pressure::from_pascal(gas)
            .ok()
            .filter(|gas| *gas < solid.highest());
        Ok(State {
            regime: Regime::Frozen,
            pressure: gas.unwrap_or(solid.highest()),
            is_bound: gas.is_some() || !matches!(solid, FrozenPressure::Known(_)),
            liquid_share: None,
            quality: None,
            gas: None,
        })
    }

    fn single(
        &self,
        regime: Regime,
        density: Density,
        temperature: Temperature,
        liquid_share: Option<f64>,
    ) -> Result<State, FluidError> {
        let rho = density.kilogram_per_cubic_metre();
        let (most_pressure, most_density) = self.model.limits(self.molar_mass);
        let fluid = || self.name.clone();
        if rho > most_density {
            let high = Density::from_kilogram_per_cubic_metre(most_density)
                .expect("a fluid file's limits are checked when read");
            return Err(FluidError::TooDense {
                fluid: fluid(),
                density,
                high,
            });
        }
        let liquid = regime == Regime::LiquidFull;
        let p = self
            .model
            .pressure(temperature.kelvin(), self.molar_mass, rho, liquid)
            .ok_or_else(|| self.no_compressed_liquid())?;
        if p.is_nan() || p > most_pressure {
            let high = Pressure::from_pascal(most_pressure)
                .expect("a fluid file's limits are checked when read");
            return Err(FluidError::PressureTooHigh {
                fluid: fluid(),
                high,
            });
        }
        let pressure = Pressure::from_pascal(p).map_err(|_| FluidError::NotConverged {
            fluid: fluid(),
            temperature,
        })?;
        let quality = match regime {
            Regime::LiquidFull => Some(0.0),
            Regime::AllVapour => Some(1.0),
            _ => None,
        };
        let dense = matches!(regime, Regime::LiquidFull | Regime::Supercritical);
        if dense
            && let Some(melting) = self.melting_pressure(temperature)
            && pressure.pascal() > melting.pascal() * (1.0 + MELTING_SLACK)
            && !self.is_beside_its_line(pressure, temperature)
        {
            return Err(FluidError::Solid {
                fluid: fluid(),
                temperature,
                melting,
            });
        }
        Ok(State {
            regime,
            pressure,
            is_bound: false,
            liquid_share,
            quality,
            gas: None,
        })
    }
}

/// Where a curve that peaks near `t` has its peak, when something that grows slowly with
/// temperature is multiplied into it; by golden section, since the peak is flat.
fn turning_near(t: f64, (low, high): (f64, f64), f: impl Fn(f64) -> f64) -> f64 {
    const REACH_K: f64 = 25.0;
    const SHARE: f64 = 0.618_033_988_749_894_9;
    let (mut low, mut high) = ((t - REACH_K).max(low), (t + REACH_K).min(high));
    // The peak is as flat as the rounding at a tenth of a millikelvin.
    while high - low > 1e-4 {
        let (a, b) = (high - SHARE * (high - low), low + SHARE * (high - low));
        if f(a) < f(b) {
            low = a;
        } else {
            high = b;
        }
    }
    0.5 * (low + high)
}
