//! Correlated fluids against what a second published source prints, and against what
//! thermodynamics says of any fluid.

use std::sync::Arc;

use chargewright::fluid::Fluid;

use crate::given::{fluid, grid, kelvin};
use crate::tables::reference;

/// J/(mol K), CODATA 2018.
const GAS_CONSTANT: f64 = 8.314_462_618_153_24;

/// One printed figure.
pub struct Printed {
    pub fluid: String,
    pub quantity: String,
    temperature_k: f64,
    value: f64,
    tolerance_percent: f64,
    source: String,
}

/// Liquids of ordinary kind, and the metals, sulfur and mercury, whose vapour is of another.
const LIQUIDS: &str = "second-source.csv";
const METALS: &str = "second-source-metals.csv";

/// Every printed figure.
pub fn printed() -> Vec<Printed> {
    [LIQUIDS, METALS].into_iter().flat_map(printed_in).collect()
}

/// Only the last column, the source, may hold commas.
fn printed_in(file: &str) -> Vec<Printed> {
    let text = std::fs::read_to_string(reference(file)).expect(file);
    text.lines()
        .filter(|line| !line.starts_with('#'))
        .skip(1)
        .map(|line| {
            let cells: Vec<&str> = line.splitn(6, ',').collect();
            let number = |i: usize| cells[i].parse().expect(line);
            Printed {
                fluid: cells[0].to_owned(),
                quantity: cells[1].to_owned(),
                temperature_k: number(2),
                value: number(3),
                tolerance_percent: number(4),
                source: cells[5].trim_matches('"').to_owned(),
            }
        })
        .collect()
}

/// The liquids of ordinary kind, each once.
fn correlated() -> Vec<Arc<Fluid>> {
    let mut ids: Vec<String> = printed_in(LIQUIDS)
        .into_iter()
        .map(|row| row.fluid)
        .collect();
    ids.dedup();
    ids.iter().map(|id| fluid(id)).collect()
}

fn vapour_compressibility(fluid: &Fluid, temperature_k: f64) -> f64 {
    let at = fluid
        .saturation(kelvin(temperature_k))
        .unwrap_or_else(|error| panic!("{}: {error}", fluid.id()));
    let rt = GAS_CONSTANT * temperature_k / fluid.molar_mass();
    at.pressure_pa / (at.vapour_kg_per_m3 * rt)
}

impl Printed {
    /// How far the model is from the printed figure.
    pub fn deviation_percent(&self) -> f64 {
        let fluid = fluid(&self.fluid);
        let at = fluid
            .saturation(kelvin(self.temperature_k))
            .unwrap_or_else(|error| panic!("{}: {error}", self.fluid));
        let found = match self.quantity.as_str() {
            "vapour_pressure" => at.pressure_pa,
            "liquid_density" => at.liquid_kg_per_m3,
            "vapour_density" => at.vapour_kg_per_m3,
            "latent_heat" => at.latent_heat_j_per_kg,
            "vapour_compressibility" => vapour_compressibility(&fluid, self.temperature_k),
            other => panic!("no quantity is called {other}"),
        };
        100.0 * (found / self.value - 1.0)
    }
}

/// The tolerances stand in the table, each with its reason; printed is the worst of each fluid.
#[test]
fn a_second_source_agrees() {
    let mut worst: Vec<(String, f64, String)> = Vec::new();
    let mut beyond = Vec::new();
    for row in printed() {
        let off = row.deviation_percent();
        let said = format!(
            "{} at {} K {off:+.2} % ({})",
            row.quantity, row.temperature_k, row.source
        );
        if off.is_nan() || off.abs() > row.tolerance_percent {
            beyond.push(format!("{}: {said}", row.fluid));
        }
        match worst.iter_mut().find(|(id, _, _)| *id == row.fluid) {
            Some(entry) if entry.1 >= off.abs() => {}
            Some(entry) => *entry = (row.fluid, off.abs(), said),
            None => worst.push((row.fluid, off.abs(), said)),
        }
    }
    for (id, _, said) in &worst {
        println!("{id}: {said}");
    }
    assert!(beyond.is_empty(), "{beyond:#?}");
    assert!(worst.len() >= 26, "{}", worst.len());
}

/// Compressibility factor of the saturated vapour near one atmosphere: 0.94 to 0.98 for
/// liquids of ordinary kind, 0.91 for acetonitrile, whose vapour associates. Nowhere above 1,
/// and falling with temperature but for 2e-5, what the fit of the latent heat may ripple.
#[test]
fn the_vapour_is_one_that_can_be() {
    for fluid in correlated() {
        let id = fluid.id();
        let (low, high) = fluid.saturation_range();
        let mut last = 1.0;
        let mut near_one_atmosphere = f64::NAN;
        for t in grid(low.kelvin(), high.kelvin() - 1e-6, 200) {
            let z = vapour_compressibility(&fluid, t);
            let p = fluid.saturation(kelvin(t)).expect(id).pressure_pa;
            assert!(
                z <= 1.0 && z < last + 2e-5,
                "{id} at {t} K: {z} after {last}"
            );
            last = z;
            if p < 101_325.0 {
                near_one_atmosphere = z;
            }
        }
        println!("{id}: {near_one_atmosphere:.4} near one atmosphere");
        assert!(
            (0.9..1.0).contains(&near_one_atmosphere),
            "{id}: {near_one_atmosphere}"
        );
    }
}

/// Pressure and its slope rise, the liquid thins and the vapour thickens with temperature,
/// and the liquid stays the denser.
#[test]
fn saturation_rises_and_the_phases_approach() {
    for fluid in correlated() {
        let id = fluid.id();
        let (low, high) = fluid.saturation_range();
        let states: Vec<_> = grid(low.kelvin(), high.kelvin() - 1e-6, 200)
            .map(|t| fluid.saturation(kelvin(t)).expect(id))
            .collect();
        for pair in states.windows(2) {
            let (a, b) = (&pair[0], &pair[1]);
            assert!(
                b.pressure_pa > a.pressure_pa && b.slope_pa_per_k > a.slope_pa_per_k,
                "{id}: {a:?}"
            );
            assert!(b.liquid_kg_per_m3 < a.liquid_kg_per_m3, "{id}: {a:?}");
            assert!(b.vapour_kg_per_m3 > a.vapour_kg_per_m3, "{id}: {a:?}");
            assert!(b.liquid_kg_per_m3 > b.vapour_kg_per_m3, "{id}: {b:?}");
        }
    }
}
