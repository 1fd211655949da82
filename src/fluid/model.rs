//! The two kinds of model behind one interface, in SI mass units and f64.

use super::correlated::{Correlated, LiquidIsotherm, VapourIsotherm};
use super::curve::CurvePoint;
use super::helmholtz::{CLOSEST_TO_CRITICAL, Equation, Isotherm, NotConverged};

/// What gives a fluid its properties.
#[derive(Debug, Clone, PartialEq)]
pub enum Model {
    Equation(Box<Equation>),
    Correlated(Box<Correlated>),
}

/// Critical point in mass units.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Critical {
    pub temperature_k: f64,
    pub pressure_pa: f64,
    pub density_kg_per_m3: f64,
}

/// Saturation state in mass units.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct SaturationPoint {
    pub pressure_pa: f64,
    pub liquid_kg_per_m3: f64,
    pub vapour_kg_per_m3: f64,
    pub latent_heat_j_per_kg: f64,
    pub slope_pa_per_k: f64,
}

impl Model {
    pub fn critical(&self, molar_mass: f64) -> Critical {
        match self {
            Self::Equation(equation) => {
                let c = equation.data().critical;
                Critical {
                    temperature_k: c.temperature_k,
                    pressure_pa: c.pressure_pa,
                    density_kg_per_m3: c.density_mol_per_m3 * molar_mass,
                }
            }
            Self::Correlated(model) => Critical {
                temperature_k: model.critical.temperature_k,
                pressure_pa: model.critical.pressure_pa,
                density_kg_per_m3: model.critical.density_kg_per_m3,
            },
        }
    }

    /// Temperatures at which any state is given, K.
    pub fn range_k(&self) -> (f64, f64) {
        match self {
            Self::Equation(equation) => equation.data().temperature_range_k,
            Self::Correlated(model) => model.temperature_range_k(),
        }
    }

    /// Temperatures at which saturation is given, K.
    pub fn saturation_range_k(&self) -> (f64, f64) {
        match self {
            Self::Equation(equation) => {
                let data = equation.data();
                let top = CLOSEST_TO_CRITICAL * data.critical.temperature_k;
                (
                    data.temperature_range_k.0,
                    top.min(data.temperature_range_k.1),
                )
            }
            Self::Correlated(model) => model.temperature_range_k(),
        }
    }

    /// Temperatures at which saturation passes from one form to another, K.
    pub fn joints_k(&self) -> Vec<f64> {
        match self {
            Self::Equation(_) => Vec::new(),
            Self::Correlated(model) => model.joint_k().into_iter().collect(),
        }
    }

    /// Greatest pressure and density given, Pa and kg/m³.
    pub fn limits(&self, molar_mass: f64) -> (f64, f64) {
        match self {
            Self::Equation(equation) => {
                let data = equation.data();
                (
                    data.highest_pressure_pa,
                    data.highest_density_mol_per_m3 * molar_mass,
                )
            }
            // The compressed-liquid form was fitted to 69 MPa (10 000 psi); source there.
            Self::Correlated(_) => (69e6, f64::INFINITY),
        }
    }

    /// Why the pressure of the liquid-full state is not known, where it is not.
    pub fn no_compressed_liquid(&self) -> Option<&str> {
        match self {
            Self::Equation(_) => None,
            Self::Correlated(model) => model.compressed_liquid.not_known(),
        }
    }

    /// Saturation by the direct solve, inside [`Self::saturation_range_k`].
    pub fn saturation(&self, t: f64, molar_mass: f64) -> Result<SaturationPoint, NotConverged> {
        Ok(match self {
            Self::Equation(equation) => {
                let pair = equation.saturation(t)?;
                SaturationPoint {
                    pressure_pa: pair.pressure,
                    liquid_kg_per_m3: pair.liquid * molar_mass,
                    vapour_kg_per_m3: pair.vapour * molar_mass,
                    latent_heat_j_per_kg: pair.latent_heat / molar_mass,
                    slope_pa_per_k: pair.slope,
                }
            }
            Self::Correlated(model) => {
                let pair = model.saturation(t, molar_mass);
                SaturationPoint {
                    pressure_pa: pair.pressure,
                    liquid_kg_per_m3: pair.liquid,
                    vapour_kg_per_m3: pair.vapour,
                    latent_heat_j_per_kg: pair.latent_heat,
                    slope_pa_per_k: pair.slope,
                }
            }
        })
    }

    /// Only p, ρ′, ρ″: what the expansions are built from.
    pub fn curve_point(&self, t: f64, molar_mass: f64) -> Result<CurvePoint, NotConverged> {
        Ok(match self {
            Self::Equation(equation) => {
                let (pressure, liquid, vapour) = equation.saturated_state(t)?;
                CurvePoint {
                    pressure_pa: pressure,
                    liquid_kg_per_m3: liquid * molar_mass,
                    vapour_kg_per_m3: vapour * molar_mass,
                }
            }
            Self::Correlated(model) => {
                let pair = model.saturation(t, molar_mass);
                CurvePoint {
                    pressure_pa: pair.pressure,
                    liquid_kg_per_m3: pair.liquid,
                    vapour_kg_per_m3: pair.vapour,
                }
            }
        })
    }

    /// Pressure of one phase over density on an isotherm; `liquid` tells a correlated
    /// fluid which of its branches is meant. `None` where that branch is not known.
    pub fn isotherm(&self, t: f64, molar_mass: f64, liquid: bool) -> Option<PhaseIsotherm<'_>> {
        Some(match self {
            Self::Equation(equation) => PhaseIsotherm::Equation(equation.isotherm(t), molar_mass),
            Self::Correlated(model) if liquid => {
                PhaseIsotherm::Liquid(model.liquid_isotherm(t, molar_mass)?)
            }
            Self::Correlated(model) => PhaseIsotherm::Vapour(model.vapour_isotherm(t, molar_mass)),
        })
    }

    /// Pressure of one phase at one density, as [`Self::isotherm`], which it does not keep.
    pub fn pressure(&self, t: f64, molar_mass: f64, density: f64, liquid: bool) -> Option<f64> {
        Some(match self {
            Self::Equation(equation) => equation.isotherm(t).pressure(density / molar_mass),
            Self::Correlated(_) => self.isotherm(t, molar_mass, liquid)?.at(density).0,
        })
    }
}

/// One phase at one temperature.
#[expect(
    clippy::large_enum_variant,
    reason = "made on the stack for one solve, never kept"
)]
pub enum PhaseIsotherm<'a> {
    /// With the molar mass in kg/mol.
    Equation(Isotherm<'a>, f64),
    Liquid(LiquidIsotherm),
    Vapour(VapourIsotherm),
}

impl PhaseIsotherm<'_> {
    /// Pressure and its slope over density at a density in kg/m³: Pa and Pa m³/kg.
    pub fn at(&self, density: f64) -> (f64, f64) {
        match self {
            Self::Equation(isotherm, molar_mass) => {
                let (p, slope) = isotherm.pressure_and_slope(density / molar_mass);
                (p, slope / molar_mass)
            }
            Self::Liquid(isotherm) => isotherm.pressure_and_slope(density),
            Self::Vapour(isotherm) => isotherm.pressure_and_slope(density),
        }
    }
}
