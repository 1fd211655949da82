//! Dynamic viscosity of liquid and vapour, Pa·s.
//!
//! Two kinds of form: a *reference form* over temperature and density, which needs the
//! fluid's equation of state, and *table forms* of the saturated liquid and of the vapour at
//! low pressure, over temperature alone. At saturation the reference form goes first, and
//! where it does not reach, the first table form that does. Outside every range the answer
//! is `None`: nothing is carried on.

mod corresponding;
mod dilute;
mod iapws;
mod residual;
mod table;
mod whole;

use serde::Deserialize;

use super::helmholtz::Equation;
use super::{Fluid, Model};
use crate::source::Source;
use crate::units::{Density, Temperature};
use corresponding::{ConformalFluid, ResidualEntropy};
use dilute::{Dilute, InitialDensity};
use iapws::Iapws;
use residual::Residual;
use table::TableForm;
use whole::{Helium, Methanol, Shan};

/// Avogadro's number as the papers carry it, 1/mol.
const AVOGADRO: f64 = 6.022_141_29e23;

/// What is known of a fluid's viscosity.
#[derive(Debug, Clone, Default, PartialEq, Deserialize)]
#[serde(deny_unknown_fields, default)]
pub struct Viscosity {
    reference: Option<Reference>,
    /// Of the saturated liquid; the first whose range holds the temperature is taken.
    liquid: Vec<Table>,
    /// Of the vapour at low pressure; the range ends where the saturated vapour is too dense.
    vapour: Vec<Table>,
}

/// A form over temperature and density.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Reference {
    form: Form,
    pub temperature_range_k: (f64, f64),
    /// What the paper or a comparison says of it.
    pub uncertainty: String,
    pub source: Source,
}

/// A form over temperature.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Table {
    form: TableForm,
    pub temperature_range_k: (f64, f64),
    pub source: Source,
}

#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
enum Form {
    /// η = η₀(T) + η₁(T, ρ) + Δη(T, ρ): dilute gas, first order in density, the rest.
    Sum {
        dilute: Dilute,
        #[serde(default)]
        initial: Option<InitialDensity>,
        residual: Residual,
    },
    Iapws(Iapws),
    Helium(Helium),
    Methanol(Methanol),
    Shan(Shan),
    ResidualEntropy(ResidualEntropy),
    ConformalFluid(ConformalFluid),
}

/// A homogeneous state as the forms see it.
#[derive(Clone, Copy)]
struct Here<'a> {
    /// K
    t: f64,
    /// mol/m³
    rho: f64,
    /// kg/mol
    molar_mass: f64,
    equation: &'a Equation,
}

impl Here<'_> {
    /// kg/m³
    fn mass_density(&self) -> f64 {
        self.rho * self.molar_mass
    }
}

impl Reference {
    /// Scaled from another fluid, whose state is searched for.
    pub fn is_by_corresponding_states(&self) -> bool {
        matches!(self.form, Form::ConformalFluid(_))
    }
}

impl Form {
    fn at(&self, here: Here) -> Option<f64> {
        Some(match self {
            Self::Sum { dilute, .. } => dilute.at(here) + self.background(here)?,
            Self::Iapws(form) => form.at(here),
            Self::Helium(form) => form.at(here),
            Self::Methanol(form) => form.at(here),
            Self::Shan(form) => form.at(here),
            Self::ResidualEntropy(form) => form.at(here),
            Self::ConformalFluid(form) => form.at(here)?,
        })
    }

    /// What density adds to the dilute gas; only a sum can be taken apart.
    fn background(&self, here: Here) -> Option<f64> {
        let Self::Sum {
            dilute,
            initial,
            residual,
        } = self
        else {
            return None;
        };
        let first = initial
            .as_ref()
            .map_or(0.0, |initial| initial.at(here, dilute.at(here)));
        Some(first + residual.at(here))
    }
}

impl Viscosity {
    pub fn reference(&self) -> Option<&Reference> {
        self.reference.as_ref()
    }

    pub fn liquid(&self) -> &[Table] {
        &self.liquid
    }

    pub fn vapour(&self) -> &[Table] {
        &self.vapour
    }
}

impl Fluid {
    /// Forms, ranges and sources.
    pub fn viscosity_forms(&self) -> &Viscosity {
        &self.viscosity
    }

    /// Viscosity of a homogeneous state by the reference form, Pa·s; `None` without one,
    /// and outside its range or the equation's.
    pub fn viscosity(&self, temperature: Temperature, density: Density) -> Option<f64> {
        let (_, most) = self.model.limits(self.molar_mass);
        let rho = density.kilogram_per_cubic_metre();
        (rho > 0.0 && rho <= most)
            .then(|| self.reference_viscosity(temperature.kelvin(), rho))
            .flatten()
    }

    /// Viscosity of the saturated liquid, Pa·s, where known.
    pub fn liquid_viscosity(&self, temperature: Temperature) -> Option<f64> {
        self.saturated_viscosity(temperature, &self.viscosity.liquid, |point| {
            point.liquid_kg_per_m3
        })
    }

    /// Viscosity of the saturated vapour, Pa·s, where known.
    pub fn vapour_viscosity(&self, temperature: Temperature) -> Option<f64> {
        self.saturated_viscosity(temperature, &self.viscosity.vapour, |point| {
            point.vapour_kg_per_m3
        })
    }

    fn saturated_viscosity(
        &self,
        temperature: Temperature,
        tables: &[Table],
        density: impl Fn(&super::CurvePoint) -> f64,
    ) -> Option<f64> {
        self.saturation_allowed(temperature).ok()?;
        let t = temperature.kelvin();
        let by_reference = || {
            self.viscosity.reference.as_ref()?;
            self.reference_viscosity(t, density(&self.curve().ok()?.at(t)))
        };
        by_reference().or_else(|| {
            let table = tables
                .iter()
                .find(|table| holds(table.temperature_range_k, t))?;
            possible(table.form.at(t))
        })
    }

    fn reference_viscosity(&self, t: f64, density: f64) -> Option<f64> {
        let reference = self.viscosity.reference.as_ref()?;
        let Model::Equation(equation) = &self.model else {
            return None;
        };
        let in_range = holds(reference.temperature_range_k, t) && holds(self.model.range_k(), t);
        let here = Here {
            t,
            rho: density / self.molar_mass,
            molar_mass: self.molar_mass,
            equation,
        };
        in_range
            .then(|| reference.form.at(here))
            .flatten()
            .and_then(possible)
    }
}

fn holds((low, high): (f64, f64), t: f64) -> bool {
    (low..=high).contains(&t)
}

/// No fluid is without friction: what is not a positive number is no answer.
fn possible(viscosity: f64) -> Option<f64> {
    (viscosity.is_finite() && viscosity > 0.0).then_some(viscosity)
}

/// Σ a·xᵗ over (a, t).
fn powers(terms: &[(f64, f64)], x: f64) -> f64 {
    terms.iter().map(|(a, t)| a * x.powf(*t)).sum()
}
