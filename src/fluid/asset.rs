//! A fluid's file: what it must hold, and what is refused.

use serde::Deserialize;

use super::Fluid;
use super::correlated::{Correlated, CorrelatedError};
use super::helmholtz::{Equation, EquationData, EquationError};
use super::lines::Lines;
use super::model::Model;
use super::safety::Safety;
use super::viscosity::Viscosity;
use crate::source::{Source, Sourced};
use crate::text::{self, TextError};

pub(super) const FORMAT: u32 = 1;

#[derive(Debug, Deserialize)]
#[serde(deny_unknown_fields)]
struct FluidFile {
    format: u32,
    id: String,
    name: String,
    #[serde(default)]
    also: Vec<String>,
    cas: String,
    #[serde(default)]
    refrigerant: Option<String>,
    formula: String,
    molar_mass_kg_per_mol: f64,
    melting_point_k: Sourced<f64>,
    #[serde(default)]
    solid_density_kg_per_m3: Option<Sourced<f64>>,
    model: ModelFile,
    #[serde(default)]
    surface_tension: Option<SurfaceTension>,
    #[serde(default)]
    viscosity: Viscosity,
    #[serde(default)]
    lines: Lines,
    safety: Safety,
}

#[derive(Debug, Deserialize)]
enum ModelFile {
    Helmholtz(Box<EquationData>),
    Correlated(Box<Correlated>),
}

/// σ = Σ a(1 − T/T_c)ⁿ, N/m.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct SurfaceTension {
    pub critical_temperature_k: f64,
    pub a: Vec<f64>,
    pub n: Vec<f64>,
    pub temperature_range_k: (f64, f64),
    pub source: Source,
}

impl SurfaceTension {
    /// What the form says at a temperature in K, inside its range and below its critical
    /// temperature.
    pub(super) fn at(&self, temperature_k: f64) -> Option<f64> {
        let (low, high) = self.temperature_range_k;
        let theta = 1.0 - temperature_k / self.critical_temperature_k;
        let terms = self.a.iter().zip(&self.n);
        ((low..=high).contains(&temperature_k) && theta > 0.0)
            .then(|| terms.map(|(a, n)| a * theta.powf(*n)).sum())
    }
}

/// Why a fluid file is refused.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum FluidFileError {
    #[error(transparent)]
    Text(#[from] TextError),
    #[error("format {found} is not one this program reads ({FORMAT})")]
    Format { found: u32 },
    #[error("{field} must be a finite number above 0, not {value}")]
    NotPositive { field: &'static str, value: f64 },
    #[error("model: {0}")]
    Equation(#[from] EquationError),
    #[error("model: {0}")]
    Correlated(#[from] CorrelatedError),
}

/// Reads one fluid's file.
///
/// # Errors
/// [`FluidFileError`] says what is wrong and where.
pub fn parse(text: &str) -> Result<Fluid, FluidFileError> {
    let file: FluidFile = text::read(text)?;
    if file.format != FORMAT {
        return Err(FluidFileError::Format { found: file.format });
    }
    for (field, value) in [
        ("molar_mass_kg_per_mol", file.molar_mass_kg_per_mol),
        ("melting_point_k", file.melting_point_k.value),
    ] {
        if !(value.is_finite() && value > 0.0) {
            return Err(FluidFileError::NotPositive { field, value });
        }
    }
    let model = match file.model {
        ModelFile::Helmholtz(data) => Model::Equation(Box::new(Equation::new(*data)?)),
        ModelFile::Correlated(data) => {
            data.check()?;
            Model::Correlated(data)
        }
    };
    Ok(Fluid {
        id: file.id,
        name: file.name,
        also: file.also,
        cas: file.cas,
        refrigerant: file.refrigerant,
        formula: file.formula,
        molar_mass: file.molar_mass_kg_per_mol,
        melting_point: file.melting_point_k,
        solid_density: file.solid_density_kg_per_m3,
        surface_tension: file.surface_tension,
        viscosity: file.viscosity,
        lines: file.lines,
        safety: file.safety,
        model,
        own_file: None,
        entry: std::sync::OnceLock::new(),
        curve: std::sync::OnceLock::new(),
    })
}
