//! Multiparameter Helmholtz-energy equations of state.
//!
//! Everything here is molar and in f64: symbols and units as in the papers
//! (T in K, ρ in mol/m³, p in Pa, R in J/(mol K)). The room's door is
//! [`Equation`]; [`crate::fluid::Fluid`] turns it into mass and types.

mod ancillary;
mod ideal;
mod non_analytic;
mod powers;
mod residual;
mod saturation;
mod tau;
mod terms;

use serde::Deserialize;

use crate::source::Citation;
use ancillary::Ancillaries;
use ideal::IdealTerms;
use residual::{Residual, ResidualIsotherm, TERM_LIMIT};
use terms::ResidualTerms;

pub use residual::{Derivatives, UnequalLists};
pub use saturation::{CLOSEST_TO_CRITICAL, NotConverged, SaturatedPair};

/// An equation as an asset carries it.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct EquationData {
    pub source: Citation,
    pub temperature_range_k: (f64, f64),
    pub highest_pressure_pa: f64,
    pub highest_density_mol_per_m3: f64,
    /// The paper's own statement.
    pub uncertainty: String,
    /// Of the vapour pressure, where it is so great that a worst case must carry it.
    #[serde(default)]
    pub pressure_uncertainty_percent: Option<f64>,
    pub gas_constant_j_per_mol_k: f64,
    pub reducing: ReducingPoint,
    /// The equation's own: ∂p/∂ρ = ∂²p/∂ρ² = 0.
    pub critical: CriticalPoint,
    ideal: Vec<IdealTerms>,
    residual: Vec<ResidualTerms>,
    ancillary: Ancillaries,
}

/// Scales of τ = T_r/T and δ = ρ/ρ_r.
#[derive(Debug, Clone, Copy, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct ReducingPoint {
    pub temperature_k: f64,
    pub density_mol_per_m3: f64,
}

/// Where liquid and vapour become one.
#[derive(Debug, Clone, Copy, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct CriticalPoint {
    pub temperature_k: f64,
    pub density_mol_per_m3: f64,
    pub pressure_pa: f64,
}

/// An equation of state, ready to evaluate.
#[derive(Debug, Clone, PartialEq)]
pub struct Equation {
    data: EquationData,
    residual: Residual,
}

/// Why an asset's equation cannot be used.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum EquationError {
    #[error(transparent)]
    Lists(#[from] UnequalLists),
    #[error(
        "more than {limit} residual terms that differ in density, or too many broken exponents"
    )]
    TooManyTerms { limit: usize },
    #[error("{field} must be a finite number above 0, not {value}")]
    NotPositive { field: &'static str, value: f64 },
    #[error("pressure_uncertainty_percent must be from 0 to 50, not {percent}")]
    NotAShare { percent: f64 },
    #[error("temperature_range_k must rise, not {low} to {high}")]
    EmptyRange { low: f64, high: f64 },
}

/// What the equation says at one state.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct CaloricState {
    /// J/mol, from the equation's own zero.
    pub internal_energy: f64,
    /// J/mol.
    pub enthalpy: f64,
    /// J/(mol K).
    pub entropy: f64,
    /// J/(mol K), at constant volume.
    pub heat_capacity_v: f64,
    /// J/(mol K), at constant pressure.
    pub heat_capacity_p: f64,
    /// m²/s² · kg/mol: speed of sound squared times the molar mass.
    pub sound_speed_squared_molar: f64,
    /// Pa/K, along a line of constant density.
    pub pressure_slope: f64,
}

impl Equation {
    /// Checks and sorts an asset's equation.
    ///
    /// # Errors
    /// [`EquationError`] names the field that is wrong.
    pub fn new(data: EquationData) -> Result<Self, EquationError> {
        let residual = Residual::new(&data.residual)?;
        if !residual.fits() {
            return Err(EquationError::TooManyTerms { limit: TERM_LIMIT });
        }
        let (low, high) = data.temperature_range_k;
        if low.partial_cmp(&high) != Some(std::cmp::Ordering::Less) {
            return Err(EquationError::EmptyRange { low, high });
        }
        for (field, value) in [
            ("temperature_range_k", low),
            ("highest_pressure_pa", data.highest_pressure_pa),
            (
                "highest_density_mol_per_m3",
                data.highest_density_mol_per_m3,
            ),
            ("gas_constant_j_per_mol_k", data.gas_constant_j_per_mol_k),
            ("reducing.temperature_k", data.reducing.temperature_k),
            (
                "reducing.density_mol_per_m3",
                data.reducing.density_mol_per_m3,
            ),
            ("critical.temperature_k", data.critical.temperature_k),
            (
                "critical.density_mol_per_m3",
                data.critical.density_mol_per_m3,
            ),
            ("critical.pressure_pa", data.critical.pressure_pa),
        ] {
            if !(value.is_finite() && value > 0.0) {
                return Err(EquationError::NotPositive { field, value });
            }
        }
        if let Some(percent) = data.pressure_uncertainty_percent
            && !(0.0..=50.0).contains(&percent)
        {
            return Err(EquationError::NotAShare { percent });
        }
        Ok(Self { data, residual })
    }

    pub fn data(&self) -> &EquationData {
        &self.data
    }

    /// The equation at one temperature in K, ready for many densities.
    #[inline]
    pub fn isotherm(&self, temperature_k: f64) -> Isotherm<'_> {
        let tau = self.data.reducing.temperature_k / temperature_k;
        Isotherm {
            residual: self.residual.isotherm(tau),
            rt: self.data.gas_constant_j_per_mol_k * temperature_k,
            reducing_density: self.data.reducing.density_mol_per_m3,
        }
    }

    /// Scaled derivatives of the residual energy at (T, ρ).
    pub fn residual_derivatives(&self, temperature_k: f64, density: f64) -> Derivatives {
        let tau = self.data.reducing.temperature_k / temperature_k;
        let delta = density / self.data.reducing.density_mol_per_m3;
        self.residual.derivatives(tau, delta)
    }

    /// Entropy less that of the ideal gas at the same temperature and density, J/(mol K).
    pub fn residual_entropy(&self, temperature_k: f64, density: f64) -> f64 {
        let x = self.residual_derivatives(temperature_k, density);
        self.data.gas_constant_j_per_mol_k * (x.t1 - x.a)
    }

    /// Entropy from one density up to another of the same temperature, J/(mol K).
    fn entropy_step(&self, temperature_k: f64, from: f64, to: f64) -> f64 {
        let tau = self.data.reducing.temperature_k / temperature_k;
        let deltas = [from, to].map(|density| density / self.data.reducing.density_mol_per_m3);
        let [below, above] = self.residual.entropies(tau, deltas);
        self.data.gas_constant_j_per_mol_k * (above - below - (to / from).ln())
    }

    /// Energies and heat capacities at (T, ρ).
    pub fn caloric(&self, temperature_k: f64, density: f64) -> CaloricState {
        let tau = self.data.reducing.temperature_k / temperature_k;
        let delta = density / self.data.reducing.density_mol_per_m3;
        let r = self.data.gas_constant_j_per_mol_k;
        let [a0, t0, tt0] = ideal::ideal(&self.data.ideal, tau, r);
        let x = self.residual.derivatives(tau, delta);
        let a0 = a0 + delta.ln();
        let u = t0 + x.t1;
        let squeeze = 1.0 + 2.0 * x.d1 + x.d2;
        let push = 1.0 + x.d1 - x.d1t1;
        let cv = -(tt0 + x.t2);
        let cp = cv + push * push / squeeze;
        CaloricState {
            internal_energy: r * temperature_k * u,
            enthalpy: r * temperature_k * (1.0 + u + x.d1),
            entropy: r * (u - a0 - x.a),
            heat_capacity_v: r * cv,
            heat_capacity_p: r * cp,
            sound_speed_squared_molar: r * temperature_k * (squeeze + push * push / cv),
            pressure_slope: r * density * push,
        }
    }
}

/// An equation at one temperature.
#[derive(Debug, Clone)]
pub struct Isotherm<'a> {
    residual: ResidualIsotherm<'a>,
    rt: f64,
    reducing_density: f64,
}

impl Isotherm<'_> {
    /// Pressure in Pa and its slope ∂p/∂ρ in Pa m³/mol at a density in mol/m³.
    #[inline]
    pub fn pressure_and_slope(&self, density: f64) -> (f64, f64) {
        let [_, d1, d2] = self.residual.at(density / self.reducing_density);
        (
            density * self.rt * (1.0 + d1),
            self.rt * (1.0 + 2.0 * d1 + d2),
        )
    }

    /// Pressure in Pa at a density in mol/m³.
    pub fn pressure(&self, density: f64) -> f64 {
        self.pressure_and_slope(density).0
    }

    /// (g − g⁰(T))/RT: the Gibbs energy's part that depends on density.
    pub fn gibbs_over_rt(&self, density: f64) -> f64 {
        let delta = density / self.reducing_density;
        let [a, d1, _] = self.residual.at(delta);
        a + d1 + delta.ln()
    }
}
