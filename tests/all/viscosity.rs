//! Viscosity: the forms in use against another program's evaluation of them, against values
//! that the papers print, and the handbook tables against each other.

use std::collections::HashMap;

use chargewright::fluid::{Catalog, Fluid};
use chargewright::units::{Density, Temperature};

use crate::tables::{Worst, rows};

fn kelvin(t: f64) -> Temperature {
    Temperature::from_kelvin(t).expect("a temperature")
}

fn viscosity(fluid: &Fluid, t: f64, rho: f64) -> Option<f64> {
    let rho = Density::from_kilogram_per_cubic_metre(rho).expect("a density");
    fluid.viscosity(kelvin(t), rho)
}

fn fluid(id: &str) -> std::sync::Arc<Fluid> {
    Catalog::built_in().by_id(id).expect(id)
}

/// Corresponding states: CoolProp stops its search for the conformal state at 1e-9.
fn tolerance(fluid: &Fluid) -> f64 {
    let form = fluid
        .viscosity_forms()
        .reference()
        .expect("a reference form");
    if form.is_by_corresponding_states() {
        1e-6
    } else {
        1e-9
    }
}

#[test]
fn every_reference_form_agrees_with_the_reference_table() {
    let mut seen: HashMap<String, Worst> = HashMap::new();
    let catalog = Catalog::built_in();
    for row in rows("viscosity.csv") {
        let fluid = catalog.by_id(&row.name).expect(&row.name);
        let [t, rho, expected] = row.values[..] else {
            panic!("three numbers a row")
        };
        let found = viscosity(&fluid, t, rho);
        seen.entry(row.name.clone()).or_default().see(
            "viscosity",
            found.unwrap_or(f64::NAN),
            expected,
            || format!("{t} K, {rho} kg/m3"),
        );
    }
    for (name, worst) in &seen {
        worst.check(name, tolerance(&fluid(name)));
    }
    for fluid in catalog.iter() {
        if fluid.viscosity_forms().reference().is_some() {
            assert!(seen.contains_key(fluid.id()), "{} has no rows", fluid.id());
        }
    }
}

/// IAPWS R12-08, tables 4 and 5 (from memory): µPa·s at (K, kg/m³). Table 4 is without the
/// critical enhancement, which at these states is below the last digit but one.
#[test]
fn water_gives_the_values_of_the_release() {
    let water = fluid("water");
    for (t, rho, expected, digits) in [
        (298.15, 998.0, 889.735_100, 1e-8),
        (373.15, 1000.0, 307.883_622, 1e-8),
        (433.15, 1.0, 14.538_324, 1e-7),
        (433.15, 1000.0, 217.685_358, 1e-8),
        (873.15, 1.0, 32.619_287, 1e-7),
        (873.15, 100.0, 35.802_262, 1e-6),
        (873.15, 600.0, 77.430_195, 1e-6),
        (1173.15, 1.0, 44.217_245, 1e-7),
        (1173.15, 100.0, 47.640_433, 1e-6),
        (1173.15, 400.0, 64.154_608, 1e-6),
        // Near the critical point, with the enhancement (table 5).
        (647.35, 122.0, 25.520_677, 1e-7),
        (647.35, 222.0, 31.337_589, 1e-7),
        (647.35, 272.0, 36.228_143, 1e-7),
        (647.35, 322.0, 42.961_579, 1e-6),
        (647.35, 372.0, 45.688_204, 1e-7),
        (647.35, 422.0, 49.436_256, 1e-7),
    ] {
        let found = 1e6 * viscosity(&water, t, rho).expect("in range");
        let off = (found / expected - 1.0).abs();
        println!("water {t} K {rho} kg/m3: {found:.6} µPa·s, printed {expected}, off {off:.1e}");
        assert!(
            off < digits,
            "{t} K, {rho} kg/m3: {found} against {expected}"
        );
    }
}

/// Lemmon and Jacobsen 2004, table V (from memory): µPa·s at (K, mol/L).
#[test]
fn nitrogen_argon_and_oxygen_give_the_values_of_their_paper() {
    for (id, t, moles_per_litre, expected) in [
        ("nitrogen", 100.0, 25.0, 79.7418),
        ("nitrogen", 200.0, 10.0, 21.0810),
        ("nitrogen", 300.0, 5.0, 20.7430),
        ("argon", 100.0, 33.0, 184.232),
        ("argon", 200.0, 10.0, 25.5662),
        ("argon", 300.0, 5.0, 26.3706),
        ("oxygen", 100.0, 35.0, 172.136),
        ("oxygen", 200.0, 10.0, 22.4445),
        ("oxygen", 300.0, 5.0, 23.7577),
    ] {
        let gas = fluid(id);
        let rho = 1000.0 * moles_per_litre * gas.molar_mass();
        let found = 1e6 * viscosity(&gas, t, rho).expect("in range");
        let off = (found / expected - 1.0).abs();
        println!("{id} {t} K {moles_per_litre} mol/L: {found:.4} µPa·s, printed {expected}");
        assert!(off < 5e-6, "{id} at {t} K: {found} against {expected}");
    }
}

/// Measured or tabulated saturated liquids at 298.15 K, from memory of the named tables, with
/// what two sources differ by: a form that went astray would be far outside.
#[test]
fn known_liquids_at_room_temperature() {
    for (id, expected, percent, source) in [
        ("water", 890.0, 0.5, "IAPWS"),
        ("methanol", 544.0, 2.0, "CRC Handbook"),
        ("ethanol", 1074.0, 3.0, "CRC Handbook"),
        ("acetone", 306.0, 3.0, "CRC Handbook"),
        ("n-pentane", 224.0, 3.0, "CRC Handbook"),
        ("n-hexane", 300.0, 3.0, "CRC Handbook"),
        ("toluene", 560.0, 3.0, "CRC Handbook"),
        ("benzene", 604.0, 3.0, "CRC Handbook"),
        ("dichloromethane", 413.0, 4.0, "CRC Handbook"),
        ("chloroform", 537.0, 3.0, "CRC Handbook"),
        ("acetonitrile", 369.0, 10.0, "CRC Handbook"),
        ("diethyl-ether", 224.0, 5.0, "CRC Handbook"),
        ("isopropanol", 2038.0, 5.0, "CRC Handbook"),
        ("1-propanol", 1945.0, 5.0, "CRC Handbook"),
        ("r-134a", 195.0, 3.0, "ASHRAE Handbook"),
        ("r-22", 165.0, 5.0, "ASHRAE Handbook"),
        ("r-32", 113.6, 3.0, "Assael et al. 1999"),
        ("r-123", 418.0, 3.0, "ASHRAE Handbook"),
        ("r-125", 141.0, 4.0, "ASHRAE Handbook"),
        ("r-152a", 163.0, 3.0, "ASHRAE Handbook"),
        ("r-245fa", 403.0, 4.0, "Laesecke and Hafer 1998"),
        ("r-1234yf", 152.0, 7.0, "Meng et al. 2013"),
        ("ammonia", 129.0, 5.0, "ASHRAE Handbook"),
    ] {
        let found = 1e6
            * fluid(id)
                .liquid_viscosity(kelvin(298.15))
                .unwrap_or(f64::NAN);
        let off = 100.0 * (found / expected - 1.0);
        println!("{id}: {found:.1} µPa·s, {source} {expected}: {off:+.1} %");
        assert!(
            off.abs() <= percent,
            "{id}: {found} against {expected}, {source}"
        );
    }
}

/// Liquids thin with warmth and are more viscous than their vapour; no figure leaves the range
/// of what fluids do.
#[test]
fn at_saturation_every_answer_is_possible() {
    let (mut known, mut partly) = (0, Vec::new());
    for fluid in Catalog::built_in().iter() {
        let (low, high) = fluid.saturation_range();
        let low = low.max(fluid.freezing_point()).kelvin();
        let at = |i: i32| kelvin(low + (high.kelvin() - low) * f64::from(i) / 60.0);
        let mut answers = (0, 0);
        for i in 0..=60 {
            let t = at(i);
            let (liquid, vapour) = (fluid.liquid_viscosity(t), fluid.vapour_viscosity(t));
            answers.0 += i32::from(liquid.is_some());
            answers.1 += i32::from(vapour.is_some());
            for eta in liquid.iter().chain(&vapour) {
                assert!((1e-7..1e6).contains(eta), "{} at {t:?}: {eta}", fluid.id());
            }
            if let (Some(liquid), Some(vapour)) = (liquid, vapour) {
                assert!(
                    liquid > 0.9 * vapour,
                    "{} at {t:?}: liquid {liquid}, vapour {vapour}",
                    fluid.id()
                );
            }
            // A joint between a form and a table may step by their disagreement.
            if let (Some(here), Some(next)) = (liquid, fluid.liquid_viscosity(at((i + 1).min(60))))
            {
                assert!(
                    next < 1.12 * here,
                    "{} thickens with warmth at {t:?}: {here} to {next}",
                    fluid.id()
                );
            }
        }
        known += i32::from(answers.0 > 0);
        if answers.0 < 61 || answers.1 < 61 {
            partly.push(format!(
                "{} {} %/{} %",
                fluid.id(),
                answers.0 * 100 / 61,
                answers.1 * 100 / 61
            ));
        }
    }
    println!(
        "liquid known of {known} fluids; share of the saturation range, liquid/vapour, where not whole:"
    );
    partly.iter().for_each(|line| println!("  {line}"));
    assert!(known >= 90, "only {known} fluids have a liquid viscosity");
}
