//! What the tests start from: fluids, quantities, designs, in few words.

use std::sync::Arc;

use chargewright::assess::{Assessment, Library, assess};
use chargewright::design::Design;
use chargewright::fluid::helmholtz::Equation;
use chargewright::fluid::{Catalog, Fluid, Model};
use chargewright::store;
use chargewright::units::{Density, Mass, Pressure, Temperature};

pub fn fluid(id: &str) -> Arc<Fluid> {
    Catalog::built_in().by_id(id).expect(id)
}

pub fn kelvin(value: f64) -> Temperature {
    Temperature::from_kelvin(value).expect("a temperature")
}

pub fn celsius(value: f64) -> Temperature {
    Temperature::from_celsius(value).expect("a temperature")
}

pub fn density(value: f64) -> Density {
    Density::from_kilogram_per_cubic_metre(value).expect("a density")
}

pub fn pascal(value: f64) -> Pressure {
    Pressure::from_pascal(value).expect("a pressure")
}

pub fn kilogram(value: f64) -> Mass {
    Mass::from_kilogram(value).expect("a mass")
}

/// The equation of a fluid that has one.
pub fn equation(fluid: &Fluid) -> Option<&Equation> {
    match fluid.model() {
        Model::Equation(equation) => Some(equation),
        Model::Correlated(_) => None,
    }
}

/// `steps` temperatures from `low` to `high`, both included, K.
pub fn grid(low: f64, high: f64, steps: usize) -> impl Iterator<Item = f64> {
    (0..steps).map(move |i| (low + (high - low) * i as f64 / (steps - 1) as f64).min(high))
}

pub fn assessed(design: &Design) -> Assessment {
    assess(design, &Library::built_in())
}

/// A ready design with pieces of its text replaced; each piece must be there.
pub fn preset_with(name: &str, changes: &[(&str, &str)]) -> Design {
    let preset = store::preset(name).expect(name);
    let mut text = store::to_text(&preset);
    for (old, new) in changes {
        assert!(text.contains(old), "{name} has no “{old}”:\n{text}");
        text = text.replace(old, new);
    }
    store::from_text(&text).unwrap_or_else(|error| panic!("{name}: {error}"))
}

/// A fluid in a strong steel sphere of 50 mm with a drawn tolerance: what the walls
/// bear governs nothing unless the wall is thinned. Temperatures in °C.
#[derive(Clone)]
pub struct Vessel {
    pub duty: &'static str,
    pub fluid: &'static str,
    pub coldest: f64,
    pub hottest: f64,
    /// The extremes, where left out.
    pub working: Option<(f64, f64)>,
    pub ullage: f64,
    pub margin: f64,
    pub wall_mm: f64,
    pub mass: f64,
}

impl Default for Vessel {
    fn default() -> Self {
        Self {
            duty: "PlainVessel",
            fluid: "r-134a",
            coldest: 0.0,
            hottest: 50.0,
            working: None,
            ullage: 0.05,
            margin: 0.0,
            wall_mm: 5.0,
            mass: 0.02,
        }
    }
}

impl Vessel {
    pub fn design(&self) -> Design {
        let (working_low, working_high) = self.working.unwrap_or((self.coldest, self.hottest));
        let text = format!(
            r#"(
  format: 1,
  design: (
    title: "vessel of the tests",
    duty: {},
    conditions: (
      bench_temperature_k: 293.15,
      working_low_k: {:?},
      working_high_k: {:?},
      coldest_k: {low},
      hottest_k: {high},
      least_outside_pressure_pa: 0.0,
      barometer_pa: 101325.0,
    ),
    fluid: "{}",
    chamber: (parts: [(
      name: "sphere",
      shape: Sphere(inside_diameter: (nominal_m: 0.05, tolerance_m: 0.0002)),
      wall: Some((material: "stainless-316l", thickness: (nominal_m: {:?}, tolerance_m: 0.0))),
    )],
      closure: Some((
        kind: WeldedPlug,
        rating: Some((
          inside_pressure_pa: 1e9, outside_pressure_pa: Some(1e9), coldest_k: 1.0, hottest_k: 2000.0,
          stated_by: "the tests",
        )),
        relief: None(because: "a test"),
      )),
    ),
    charge: (aim: Mass(mass_kg: {:?}), tolerance_kg: 0.00001),
    demands: (ullage: {:?}, liquid_full_margin_k: {:?}),
    room: (volume_m3: 60.0, temperature_k: 293.15, consumers: false),
    bench: (balance_uncertainty_kg: 0.000001, purge_loss_kg: 0.0, gauge: false),
  ),
)"#,
            self.duty,
            working_low + 273.15,
            working_high + 273.15,
            self.fluid,
            1e-3 * self.wall_mm,
            self.mass,
            self.ullage,
            self.margin,
            low = self.coldest + 273.15,
            high = self.hottest + 273.15,
        );
        store::from_text(&text).unwrap_or_else(|error| panic!("{error}\n{text}"))
    }

    pub fn assessed(&self) -> Assessment {
        assessed(&self.design())
    }
}
