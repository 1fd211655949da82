//! Whether a fluid's model makes physical sense over the whole range that it states.
//!
//! Asked through the same door as every figure the program prints; the limits are laws
//! of nature, except where a line says otherwise.

use super::helmholtz::Equation;
use super::{Fluid, FluidError, Model, SaturationPoint, SurfaceTension};
use crate::units::{Density, Temperature};

/// Temperatures looked at, besides the ends.
const SAMPLES: usize = 200;
/// Saturated vapour is never less compressible than the ideal gas; what is allowed
/// above 1 is the rounding of coefficients.
const GREATEST_COMPRESSIBILITY: f64 = 1.002;
/// No gas stores less heat than free atoms do, 3/2 R; allowed is the rounding of it.
const LEAST_HEAT_CAPACITY: f64 = 1.5 - 0.01;
/// How far the pressure at the stated critical point may be off, as a share of it, and
/// its slope, as a share of p/ρ: a mistyped digit gives a hundred times more.
const CRITICAL_SLACK: f64 = 1e-3;
/// No sealed unit goes beyond, Pa; far above it an equation's own range reaches into the
/// solid, where it need not make sense (hydrogen at 33 K).
const HIGHEST_PRESSURE: f64 = 100e6;

/// What contradicts physics, and where.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum Unsound {
    #[error(
        "nothing is left of the range: it melts at {melting_k} K and saturation ends at {high_k} K"
    )]
    NoRange { melting_k: f64, high_k: f64 },
    #[error("at {temperature_k:.2} K no saturation is found")]
    NotConverged { temperature_k: f64 },
    #[error("at {temperature_k:.2} K the vapour pressure does not rise with temperature")]
    PressureFalls { temperature_k: f64 },
    #[error("at {temperature_k:.2} K the liquid is not denser than the vapour")]
    LiquidNotDenser { temperature_k: f64 },
    #[error("at {temperature_k:.2} K the saturated vapour does not grow denser with temperature")]
    VapourThins { temperature_k: f64 },
    #[error("at {temperature_k:.2} K the latent heat is {value:.4e} J/kg, not above 0")]
    LatentHeat { temperature_k: f64, value: f64 },
    #[error(
        "at {temperature_k:.2} K the saturated vapour has a compressibility factor of {value:.4}, above 1: vapour pressure, latent heat and liquid density do not belong together"
    )]
    Compressibility { temperature_k: f64, value: f64 },
    #[error("at {temperature_k:.2} K the surface tension is {value:.4e} N/m, below 0")]
    SurfaceTension { temperature_k: f64, value: f64 },
    #[error(
        "at {temperature_k:.2} K and {density:.5} kg/m3 the pressure falls as the density grows"
    )]
    Unstable { temperature_k: f64, density: f64 },
    #[error(
        "the critical point is not the equation's own: there the pressure is {found:.6e} Pa, stated {stated:.6e} Pa"
    )]
    CriticalPressure { found: f64, stated: f64 },
    #[error(
        "the critical point is not the equation's own: there dp/drho is {share:.2e} of p/rho, not 0"
    )]
    CriticalSlope { share: f64 },
    #[error(
        "the vapour pressure reaches {highest:.4e} Pa, above the critical pressure {critical:.4e} Pa"
    )]
    AboveCritical { highest: f64, critical: f64 },
    #[error(
        "at {temperature_k:.2} K the ideal gas has a heat capacity of {value:.3} R at constant volume: less than 3/2, the ideal part is missing or wrong"
    )]
    IdealPart { temperature_k: f64, value: f64 },
    #[error("at {temperature_k:.2} K and {density:.5} kg/m3 the heat capacity is not above 0")]
    HeatCapacity { temperature_k: f64, density: f64 },
}

/// The whole question.
///
/// # Errors
/// The first contradiction.
pub fn check(fluid: &Fluid) -> Result<(), Unsound> {
    let (low, high) = fluid.saturation_range();
    let low = low.max(fluid.freezing_point());
    if low >= high {
        return Err(Unsound::NoRange {
            melting_k: fluid.freezing_point().kelvin(),
            high_k: high.kelvin(),
        });
    }
    if let Model::Equation(equation) = fluid.model() {
        critical_point(equation)?;
    }
    let mut before: Option<SaturationPoint> = None;
    for t in between(low, high) {
        let here = fluid.saturation(t).map_err(|_| Unsound::NotConverged {
            temperature_k: t.kelvin(),
        })?;
        saturated(fluid, t, here, before)?;
        single_phase(fluid, t, here)?;
        before = Some(here);
    }
    if let Some(form) = &fluid.surface_tension {
        surface_tension(form)?;
    }
    let critical = fluid.critical().pressure_pa;
    if let Some(last) = before.filter(|last| last.pressure_pa >= critical) {
        return Err(Unsound::AboveCritical {
            highest: last.pressure_pa,
            critical,
        });
    }
    // The expansions stand on the same solve, at temperatures of their own.
    fluid.curve().map_err(|error| Unsound::NotConverged {
        temperature_k: match error {
            FluidError::NotConverged { temperature, .. } => temperature.kelvin(),
            _ => low.kelvin(),
        },
    })?;
    match fluid.model() {
        Model::Equation(equation) => above_critical(fluid, equation),
        Model::Correlated(_) => Ok(()),
    }
}

/// Both ends and the samples between.
fn between(low: Temperature, high: Temperature) -> impl Iterator<Item = Temperature> {
    (0..=SAMPLES).map(move |i| {
        let share = i as f64 / SAMPLES as f64;
        let kelvin = low.kelvin() + (high.kelvin() - low.kelvin()) * share;
        Temperature::from_kelvin(kelvin).map_or(high, |t| t.min(high))
    })
}

fn saturated(
    fluid: &Fluid,
    t: Temperature,
    here: SaturationPoint,
    before: Option<SaturationPoint>,
) -> Result<(), Unsound> {
    let temperature_k = t.kelvin();
    let rises = here.slope_pa_per_k > 0.0
        && here.pressure_pa > before.map_or(0.0, |before| before.pressure_pa);
    if !rises {
        return Err(Unsound::PressureFalls { temperature_k });
    }
    let (liquid, vapour) = (here.liquid_kg_per_m3, here.vapour_kg_per_m3);
    if !(liquid > vapour && vapour > 0.0) {
        return Err(Unsound::LiquidNotDenser { temperature_k });
    }
    if before.is_some_and(|before| vapour <= before.vapour_kg_per_m3) {
        return Err(Unsound::VapourThins { temperature_k });
    }
    let value = here.latent_heat_j_per_kg;
    if !(value > 0.0 && value.is_finite()) {
        return Err(Unsound::LatentHeat {
            temperature_k,
            value,
        });
    }
    let rt = super::correlated::GAS_CONSTANT / fluid.molar_mass() * temperature_k;
    let value = here.pressure_pa / (vapour * rt);
    if !(0.0..=GREATEST_COMPRESSIBILITY).contains(&value) {
        return Err(Unsound::Compressibility {
            temperature_k,
            value,
        });
    }
    Ok(())
}

/// The tension is not below zero anywhere in its own range; where a form misses its zero
/// at the critical point, it does so close to it.
fn surface_tension(form: &SurfaceTension) -> Result<(), Unsound> {
    let (low, high) = form.temperature_range_k;
    let close = (1..=50).map(|i| high - (high - low) * 10_f64.powf(-0.1 * f64::from(i)));
    let even = (0..=SAMPLES).map(|i| low + (high - low) * i as f64 / SAMPLES as f64);
    for temperature_k in even.chain(close) {
        if let Some(value) = form.at(temperature_k)
            && !(value >= 0.0 && value.is_finite())
        {
            return Err(Unsound::SurfaceTension {
                temperature_k,
                value,
            });
        }
    }
    Ok(())
}

/// Off the dome the pressure rises with density; heat capacities are above 0.
fn single_phase(fluid: &Fluid, t: Temperature, here: SaturationPoint) -> Result<(), Unsound> {
    let unstable = |density| Unsound::Unstable {
        temperature_k: t.kelvin(),
        density,
    };
    let (liquid, vapour) = (here.liquid_kg_per_m3, here.vapour_kg_per_m3);
    let on_vapour = [0.01, 0.1, 0.5, 0.9, 0.999].map(|share| share * vapour);
    let on_liquid = [1.001, 1.01, 1.03, 1.06, 1.1].map(|share| share * liquid);
    let mut last = 0.0;
    for density in on_vapour.into_iter().chain(on_liquid) {
        // Where the model ends it says so; that is an answer.
        let state = Density::from_kilogram_per_cubic_metre(density)
            .ok()
            .and_then(|density| fluid.state(density, t).ok());
        let Some(state) = state else { continue };
        let pressure = state.pressure.pascal();
        if pressure <= last {
            return Err(unstable(density));
        }
        last = pressure;
    }
    let Model::Equation(equation) = fluid.model() else {
        return Ok(());
    };
    ideal_part(equation, t.kelvin())?;
    for density in [vapour, liquid] {
        heat_capacity(fluid, equation, t.kelvin(), density)?;
    }
    Ok(())
}

fn ideal_part(equation: &Equation, temperature_k: f64) -> Result<(), Unsound> {
    let data = equation.data();
    let thin = 1e-12 * data.critical.density_mol_per_m3;
    let value =
        equation.caloric(temperature_k, thin).heat_capacity_v / data.gas_constant_j_per_mol_k;
    if !(value >= LEAST_HEAT_CAPACITY && value.is_finite()) {
        return Err(Unsound::IdealPart {
            temperature_k,
            value,
        });
    }
    Ok(())
}

fn heat_capacity(
    fluid: &Fluid,
    equation: &Equation,
    temperature_k: f64,
    density: f64,
) -> Result<(), Unsound> {
    let state = equation.caloric(temperature_k, density / fluid.molar_mass());
    if state.heat_capacity_v > 0.0 && state.heat_capacity_p > 0.0 {
        return Ok(());
    }
    Err(Unsound::HeatCapacity {
        temperature_k,
        density,
    })
}

fn critical_point(equation: &Equation) -> Result<(), Unsound> {
    let critical = equation.data().critical;
    let (found, slope) = equation
        .isotherm(critical.temperature_k)
        .pressure_and_slope(critical.density_mol_per_m3);
    let stated = critical.pressure_pa;
    let agrees = (found / stated - 1.0).abs() <= CRITICAL_SLACK;
    if !agrees {
        return Err(Unsound::CriticalPressure { found, stated });
    }
    let share = slope * critical.density_mol_per_m3 / stated;
    if share.is_nan() || share.abs() > CRITICAL_SLACK {
        return Err(Unsound::CriticalSlope { share });
    }
    Ok(())
}

/// Above the critical temperature, up to the end of the model: one phase throughout.
fn above_critical(fluid: &Fluid, equation: &Equation) -> Result<(), Unsound> {
    let (_, high) = fluid.range();
    let from = 1.001 * fluid.critical().temperature_k;
    let densest = fluid
        .limits()
        .0
        .map_or(0.0, Density::kilogram_per_cubic_metre);
    let steps = 20;
    for i in 0..=steps {
        let t = from + (high.kelvin() - from) * f64::from(i) / f64::from(steps);
        if t > high.kelvin() || from > high.kelvin() {
            break;
        }
        ideal_part(equation, t)?;
        let isotherm = equation.isotherm(t);
        for j in 1..=steps {
            let density = densest * f64::from(j) / f64::from(steps);
            let (pressure, slope) = isotherm.pressure_and_slope(density / fluid.molar_mass());
            if pressure > fluid.limits().1.pascal().min(HIGHEST_PRESSURE) {
                break;
            }
            if slope.is_nan() || slope <= 0.0 {
                return Err(Unsound::Unstable {
                    temperature_k: t,
                    density,
                });
            }
            heat_capacity(fluid, equation, t, density)?;
        }
    }
    Ok(())
}
