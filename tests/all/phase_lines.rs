//! Melting and sublimation lines against printed values, and where they meet the equation.

use chargewright::fluid::{Catalog, Fluid, FluidError, FrozenPressure, Regime};
use chargewright::units::{Density, Pressure, Temperature};

fn kelvin(t: f64) -> Temperature {
    Temperature::from_kelvin(t).expect("a temperature")
}

fn fluid(id: &str) -> std::sync::Arc<Fluid> {
    Catalog::built_in().by_id(id).expect(id)
}

/// Every piece of the melting line that holds at a temperature, Pa.
fn melting(fluid: &Fluid, t: f64) -> Vec<f64> {
    fluid
        .lines()
        .melting()
        .iter()
        .filter_map(|piece| piece.at(t))
        .collect()
}

/// IAPWS R14-08 (2011), table 3: T in K, p in MPa, for ice Ih, III, V, VI and VII.
#[test]
fn water_melts_as_the_release_prints() {
    let water = fluid("water");
    for (t, expected, rounding) in [
        (260.0, 138.268, 5e-6),
        (254.0, 268.685, 5e-6),
        (265.0, 479.640, 5e-6),
        (320.0, 1356.76, 5e-6),
        (550.0, 6308.71, 5e-6),
    ] {
        let near = melting(&water, t)
            .into_iter()
            .map(|p| p / 1e6)
            .min_by(|a, b| (a - expected).abs().total_cmp(&(b - expected).abs()))
            .expect("a piece");
        println!("water melts at {t} K under {near:.4} MPa, printed {expected}");
        assert!(
            (near / expected - 1.0).abs() < rounding,
            "{t} K: {near} against {expected}"
        );
    }
}

/// Herrig et al. 2018, check values of the melting and sublimation pressure of heavy water.
#[test]
fn heavy_water_melts_as_its_paper_prints() {
    let heavy = fluid("heavy-water");
    for (t, expected) in [
        (270.0, 83.788_841_3),
        (255.0, 236.470_168),
        (275.0, 619.526_971),
        (300.0, 959.203_594),
    ] {
        let near = melting(&heavy, t)
            .into_iter()
            .map(|p| (p / 1e6 / expected - 1.0).abs())
            .min_by(f64::total_cmp)
            .expect("a piece");
        assert!(near < 1e-8, "{t} K: off {near}");
    }
    let line = heavy.lines().sublimation().expect("a line");
    let found = line.at(245.0).expect("in range") / 1e6;
    assert!((found / 3.273_909_34e-5 - 1.0).abs() < 1e-8, "{found}");
}

/// IAPWS R14-08 prints p_sub(230 K) = 8.94735e-6 MPa; dry ice stands at one atmosphere at
/// 194.6857 K (Span and Wagner 1996).
#[test]
fn ice_and_dry_ice_sublime_as_printed() {
    let at = |id: &str, t: f64| {
        let line = fluid(id).lines().sublimation().expect("a line").clone();
        line.at(t).expect("in range")
    };
    let ice = at("water", 230.0) / 1e6;
    assert!((ice / 8.94735e-6 - 1.0).abs() < 1e-6, "{ice}");
    let dry_ice = at("carbon-dioxide", 194.6857);
    assert!((dry_ice / 101_325.0 - 1.0).abs() < 2e-5, "{dry_ice}");
    // Vapour pressure of the solid at the boiling point of nitrogen, from memory of cryogenic
    // tables: argon near 200 torr, methane near 9.7 torr.
    let torr = 133.322;
    let argon = at("argon", 77.35) / torr;
    assert!((195.0..205.0).contains(&argon), "{argon} torr");
    let methane = at("methane", 77.35) / torr;
    assert!((9.0..10.5).contains(&methane), "{methane} torr");
}

/// Each line against the equation where both end: a melting line starts near the pressure at
/// which the fluid boils there, a sublimation line stays below it.
#[test]
fn lines_meet_the_vapour_pressure_at_the_triple_point() {
    for fluid in Catalog::built_in().iter() {
        let (low, _) = fluid.saturation_range();
        let end = low.max(fluid.freezing_point());
        let boiling = fluid.saturation_pressure(end).expect("saturation").pascal();
        if let Some(piece) = fluid.lines().melting().first() {
            let (from, to) = piece.temperature_range_k;
            // Water's line runs down from the triple point, every other one up.
            let falls = piece.at(from) > piece.at(to);
            let start = if falls { to } else { from };
            let p = piece.at(start).expect("an end of the range");
            let slope = (piece
                .at(start * (1.0 + if falls { -1e-6 } else { 1e-6 }))
                .expect("in range")
                - p)
                .abs()
                / (start * 1e-6);
            let kelvins = (p - boiling).abs() / slope + (start - end.kelvin()).abs();
            println!(
                "{}: melting line starts at {start:.3} K with {p:.4e} Pa; it boils at {:.3} K under {boiling:.4e} Pa: \
                 {kelvins:.3} K apart",
                fluid.id(),
                end.kelvin()
            );
            // Helium has no such point: its solid needs 2.5 MPa however cold it is.
            let most = if fluid.id() == "helium" { 1.5 } else { 1.0 };
            assert!(kelvins < most, "{}: {kelvins} K apart", fluid.id());
        }
        if let Some(line) = fluid.lines().sublimation() {
            let (from, to) = line.temperature_range_k;
            let p = line.at(to).expect("an end of the range");
            let gap = p / boiling - 1.0;
            println!(
                "{}: sublimation {from} to {to:.3} K ends with {p:.4e} Pa; it boils at {:.3} K under {boiling:.4e} Pa ({:+.1} %)",
                fluid.id(),
                end.kelvin(),
                100.0 * gap
            );
            assert!(gap < 0.05, "{}: {p} above {boiling}", fluid.id());
            let rising = (0..100).all(|i| {
                let t = |i: i32| from + (to - from) * f64::from(i) / 100.0;
                line.at(t(i)) < line.at(t(i + 1))
            });
            assert!(
                rising,
                "{}: the sublimation pressure falls somewhere",
                fluid.id()
            );
        }
        if let Some(triple) = &fluid.lines().triple_point {
            let melts = fluid.melting_point().value;
            assert!(
                (triple.temperature_k - melts).abs() < 0.7,
                "{}: triple point {} K, melting point {melts} K",
                fluid.id(),
                triple.temperature_k
            );
        }
    }
}

#[test]
fn a_frozen_fluid_stands_at_its_sublimation_pressure() {
    let rho = |value| Density::from_kilogram_per_cubic_metre(value).expect("a density");
    let state = |id: &str, rho_value: f64, t: f64| {
        fluid(id).state(rho(rho_value), kelvin(t)).expect("a state")
    };
    let ice = state("water", 500.0, 230.0);
    assert_eq!(ice.regime, Regime::Frozen);
    assert!(!ice.is_bound && (ice.pressure.pascal() / 8.94735 - 1.0).abs() < 1e-6);
    // Too little water for any ice: less than the sublimation pressure.
    let trace = state("water", 1e-6, 230.0);
    assert!(trace.is_bound && trace.pressure < ice.pressure);
    // No sublimation equation: at most the pressure where it freezes.
    let acetone = state("acetone", 500.0, 170.0);
    assert!(acetone.is_bound && acetone.pressure.pascal() < 3.0);
    assert!(matches!(
        fluid("acetone").frozen_pressure(kelvin(170.0)),
        Ok(FrozenPressure::AtMostTriplePoint(_))
    ));
    // Colder than the line reaches.
    assert!(matches!(
        fluid("carbon-dioxide").frozen_pressure(kelvin(100.0)),
        Ok(FrozenPressure::BelowEquation(p)) if p.pascal() < 4000.0
    ));
}

#[test]
fn a_liquid_pressed_above_its_melting_pressure_is_refused_as_solid() {
    let dioxide = fluid("carbon-dioxide");
    let t = kelvin(225.0);
    let melting = dioxide.melting_pressure(t).expect("a line");
    // 225 K is 8.4 K above the triple point, and the line rises by 4.7 MPa a kelvin.
    assert!((38e6..45e6).contains(&melting.pascal()), "{melting:?}");
    let just = dioxide
        .density_at(melting, t)
        .expect("in the model")
        .expect("a density");
    assert!(dioxide.state(just, t).is_ok());
    let denser = Density::from_kilogram_per_cubic_metre(just.kilogram_per_cubic_metre() * 1.001);
    match dioxide.state(denser.expect("a density"), t) {
        Err(error @ FluidError::Solid { melting: named, .. }) => {
            assert_eq!(named, melting);
            assert!(error.to_string().contains("solid"), "{error}");
        }
        other => panic!("{other:?}"),
    }
    // Asked for more pressure than a liquid can have, the densest liquid answers.
    let more = Pressure::from_pascal(200e6).expect("a pressure");
    assert_eq!(dioxide.density_at(more, t), Ok(Some(just)));
}
