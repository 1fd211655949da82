//! Working fluids: two kinds of model behind one interface.
//!
//! [`Fluid`] is the door. A fluid is data (`assets/fluids/*.ron`), read by
//! `asset`, evaluated by [`helmholtz`] or [`correlated`], and looked up in the
//! [`Catalog`].

mod asset;
mod catalog;
pub mod correlated;
mod curve;
mod density;
mod divide;
mod entry;
mod error;
pub mod helmholtz;
pub mod lines;
mod model;
mod own;
mod rules;
mod safety;
mod solubility;
mod sound;
mod state;
pub mod viscosity;

use std::sync::OnceLock;

pub use asset::{FluidFileError, SurfaceTension, parse as parse_fluid};
pub use catalog::{Catalog, NameTaken, UnknownFluid};
pub use curve::{CurvePoint, SaturationCurve};
pub use divide::{Divide, Squeezed};
pub use entry::Entry;
pub use error::FluidError;
pub use lines::FrozenPressure;
pub use model::{Critical, Model, SaturationPoint};
pub use own::read_own;
pub use safety::{Safety, Stability, StabilityKind};
pub use solubility::Solubility;
pub use state::{Crossing, DomeSide, Regime, State};

use crate::source::Sourced;
use crate::text::OwnFile;
use crate::units::{Density, Pressure, Temperature};

/// A working fluid with everything that is known of it.
#[derive(Debug, Clone)]
pub struct Fluid {
    id: String,
    name: String,
    also: Vec<String>,
    cas: String,
    refrigerant: Option<String>,
    formula: String,
    molar_mass: f64,
    melting_point: Sourced<f64>,
    solid_density: Option<Sourced<f64>>,
    surface_tension: Option<SurfaceTension>,
    viscosity: viscosity::Viscosity,
    lines: lines::Lines,
    safety: Safety,
    model: Model,
    own_file: Option<OwnFile>,
    entry: OnceLock<Entry>,
    curve: OnceLock<Result<SaturationCurve, FluidError>>,
}

/// One fluid is the same as another if its file is.
impl PartialEq for Fluid {
    fn eq(&self, other: &Self) -> bool {
        self.id == other.id && self.model == other.model && self.own_file == other.own_file
    }
}

impl Fluid {
    pub fn id(&self) -> &str {
        &self.id
    }

    pub fn name(&self) -> &str {
        &self.name
    }

    /// Other names it is known by.
    pub fn also(&self) -> &[String] {
        &self.also
    }

    pub fn cas(&self) -> &str {
        &self.cas
    }

    pub fn refrigerant(&self) -> Option<&str> {
        self.refrigerant.as_deref()
    }

    pub fn formula(&self) -> &str {
        &self.formula
    }

    /// kg/mol.
    pub fn molar_mass(&self) -> f64 {
        self.molar_mass
    }

    /// Density of the solid at its melting point, kg/m³; given where it is lighter than the liquid.
    pub fn solid_density(&self) -> Option<&Sourced<f64>> {
        self.solid_density.as_ref()
    }

    pub fn melting_point(&self) -> &Sourced<f64> {
        &self.melting_point
    }

    pub fn safety(&self) -> &Safety {
        &self.safety
    }

    /// What lists show of it.
    pub fn entry(&self) -> &Entry {
        self.entry.get_or_init(|| Entry::of(self))
    }

    /// The user's file it was read from; `None` for a fluid that comes with the program.
    pub fn own_file(&self) -> Option<&OwnFile> {
        self.own_file.as_ref()
    }

    pub fn model(&self) -> &Model {
        &self.model
    }

    /// Name of the kind of model, in a word.
    pub fn model_kind(&self) -> &'static str {
        match self.model {
            Model::Equation(_) => "equation",
            Model::Correlated(_) => "correlations",
        }
    }

    /// Where the fluid's numbers come from, one line each.
    pub fn model_sources(&self) -> Vec<String> {
        match &self.model {
            Model::Equation(equation) => vec![equation.data().source.to_string()],
            Model::Correlated(model) => model
                .sources()
                .iter()
                .map(|(what, source)| format!("{what}: {source}"))
                .collect(),
        }
    }

    /// What the source states of its uncertainty.
    pub fn uncertainty(&self) -> String {
        match &self.model {
            Model::Equation(equation) => equation.data().uncertainty.clone(),
            Model::Correlated(model) => {
                format!(
                    "vapour pressure within {:.1} %",
                    100.0 * model.pressure_uncertainty()
                )
            }
        }
    }

    /// Relative uncertainty of the saturation pressure that a worst case must carry.
    /// Reference equations state tenths of a per cent, far inside the wall factors: 0,
    /// but for the few whose file states more.
    pub fn pressure_uncertainty(&self) -> f64 {
        match &self.model {
            Model::Equation(equation) => {
                let percent = equation.data().pressure_uncertainty_percent;
                percent.unwrap_or(0.0) / 100.0
            }
            Model::Correlated(model) => model.pressure_uncertainty(),
        }
    }

    /// Critical point of the model.
    pub fn critical(&self) -> Critical {
        self.model.critical(self.molar_mass)
    }

    /// Lowest and highest temperature of the model.
    pub fn range(&self) -> (Temperature, Temperature) {
        typed_range(self.model.range_k())
    }

    /// Lowest and highest temperature at which saturation is given.
    pub fn saturation_range(&self) -> (Temperature, Temperature) {
        typed_range(self.model.saturation_range_k())
    }

    /// Below this the sealed fluid is frozen.
    ///
    /// The sourced melting point; where the equation starts within 0.05 K above
    /// it (water: 273.16 K against 273.15 K), that start, since a sealed unit
    /// freezes at the triple point and not under an atmosphere.
    pub fn freezing_point(&self) -> Temperature {
        let melting = self.melting_point.value;
        let low = self.model.range_k().0;
        let point = if low > melting && low - melting <= 0.05 {
            low
        } else {
            melting
        };
        Temperature::from_kelvin(point).expect("a fluid file's melting point is checked when read")
    }

    /// Saturation by the direct solve.
    ///
    /// # Errors
    /// [`FluidError`] outside [`Self::saturation_range`], or frozen.
    pub fn saturation(&self, temperature: Temperature) -> Result<SaturationPoint, FluidError> {
        self.saturation_allowed(temperature)?;
        self.model
            .saturation(temperature.kelvin(), self.molar_mass)
            .map_err(|_| FluidError::NotConverged {
                fluid: self.name.clone(),
                temperature,
            })
    }

    /// Saturation expansions over the whole range, built on first use.
    ///
    /// # Errors
    /// [`FluidError::NotConverged`] if the direct solve fails somewhere.
    pub fn curve(&self) -> Result<&SaturationCurve, FluidError> {
        self.curve
            .get_or_init(|| {
                SaturationCurve::build(
                    self.critical().temperature_k,
                    self.model.saturation_range_k(),
                    &self.model.joints_k(),
                    |t| self.model.curve_point(t, self.molar_mass),
                )
                .map_err(|e| FluidError::NotConverged {
                    fluid: self.name.clone(),
                    temperature: clamped(e.temperature_k),
                })
            })
            .as_ref()
            .map_err(Clone::clone)
    }

    /// Whether [`Self::curve`] answers without building.
    pub fn has_curve(&self) -> bool {
        self.curve.get().is_some_and(Result::is_ok)
    }

    /// Vapour pressure from the expansions; the same numbers as [`Self::saturation`] to 1e-10.
    ///
    /// # Errors
    /// As [`Self::saturation`].
    pub fn saturation_pressure(&self, temperature: Temperature) -> Result<Pressure, FluidError> {
        self.saturation_allowed(temperature)?;
        let p = self.curve()?.at(temperature.kelvin()).pressure_pa;
        Ok(Pressure::from_pascal(p).expect("a vapour pressure is finite"))
    }

    /// Slope of the vapour pressure in Pa/K, from the expansions.
    ///
    /// # Errors
    /// As [`Self::saturation`].
    pub fn saturation_slope(&self, temperature: Temperature) -> Result<f64, FluidError> {
        self.saturation_allowed(temperature)?;
        Ok(self.curve()?.slope_at(temperature.kelvin()))
    }

    /// Surface tension in N/m, where known.
    pub fn surface_tension(&self, temperature: Temperature) -> Option<f64> {
        self.surface_tension.as_ref()?.at(temperature.kelvin())
    }

    /// How much air the liquid takes up, where known; of the user's own fluid nothing is.
    pub fn air_solubility(&self) -> Option<&'static Solubility> {
        match self.own_file {
            Some(_) => None,
            None => Solubility::of(&self.id),
        }
    }

    /// Mass in molecules of two atoms over the mass of the saturated vapour; `None` for a
    /// vapour that does not associate, and outside the saturation.
    pub fn dimer_mass_fraction(&self, temperature: Temperature) -> Option<f64> {
        let Model::Correlated(model) = &self.model else {
            return None;
        };
        self.saturation_allowed(temperature).ok()?;
        let t = temperature.kelvin();
        let vapour = model.saturation(t, self.molar_mass).vapour;
        model
            .vapour_isotherm(t, self.molar_mass)
            .mass_fraction(2.0, vapour)
    }

    /// Greatest density given, kg/m³, and greatest pressure.
    pub fn limits(&self) -> (Option<Density>, Pressure) {
        let (pressure, density) = self.model.limits(self.molar_mass);
        (
            Density::from_kilogram_per_cubic_metre(density).ok(),
            Pressure::from_pascal(pressure).expect("a fluid file's limits are checked when read"),
        )
    }

    fn not_frozen(&self, temperature: Temperature) -> Result<(), FluidError> {
        let melting = self.freezing_point();
        if temperature >= melting {
            return Ok(());
        }
        let fluid = self.name.clone();
        Err(FluidError::Frozen {
            fluid,
            temperature,
            melting,
        })
    }

    fn not_below(&self, low: Temperature, temperature: Temperature) -> Result<(), FluidError> {
        if temperature >= low {
            return Ok(());
        }
        let fluid = self.name.clone();
        Err(FluidError::TooCold {
            fluid,
            temperature,
            low,
        })
    }

    /// Inside the temperatures of the model.
    fn not_outside(&self, temperature: Temperature) -> Result<(), FluidError> {
        let (low, high) = self.range();
        self.not_below(low, temperature)?;
        if temperature <= high {
            return Ok(());
        }
        let fluid = self.name.clone();
        Err(FluidError::TooHot {
            fluid,
            temperature,
            high,
        })
    }

    fn saturation_allowed(&self, temperature: Temperature) -> Result<(), FluidError> {
        let (low, high) = self.saturation_range();
        self.not_frozen(temperature)?;
        self.not_below(low, temperature)?;
        if temperature > high {
            let critical = clamped(self.critical().temperature_k);
            return Err(FluidError::NoSaturation {
                fluid: self.name.clone(),
                temperature,
                high,
                critical,
            });
        }
        Ok(())
    }
}

fn typed_range((low, high): (f64, f64)) -> (Temperature, Temperature) {
    (clamped(low), clamped(high))
}

/// A temperature from a model's own finite figures.
fn clamped(kelvin: f64) -> Temperature {
    Temperature::from_kelvin(kelvin.clamp(1e-3, 1e5)).expect("clamped into the type's range")
}
