//! The dome's edges: what must hold across the phase boundaries and at their ends.

use chargewright::fluid::{Catalog, DomeSide, FluidError, Regime};

use crate::consistency::dome;
use crate::given::{density, fluid, grid, kelvin, pascal};

/// Across either line the pressure of the one phase meets the saturation pressure, and
/// the regime changes there. 1e-8 of the pressure, and what 1e-9 of the liquid's
/// density (the digits of the line) make of a stiff liquid.
#[test]
fn pressure_is_continuous_at_both_phase_boundaries() {
    for fluid in Catalog::built_in().iter() {
        let id = fluid.id();
        for t in dome(&fluid, 50, 0.9999) {
            let at = fluid.curve().expect(id).at(t);
            let state = |rho: f64| fluid.state(density(rho), kelvin(t)).expect(id);
            let place = format!("{} at {t:.3} K", fluid.id());
            let saturated = at.pressure_pa;

            let vapour = at.vapour_kg_per_m3;
            let outside = state(vapour * (1.0 - 1e-10));
            let inside = state(vapour * (1.0 + 1e-10));
            assert_eq!(outside.regime, Regime::AllVapour, "{place}");
            assert_eq!(inside.regime, Regime::TwoPhase, "{place}");
            assert_eq!(
                (outside.liquid_share, outside.quality),
                (Some(0.0), Some(1.0))
            );
            assert!(
                (outside.pressure.pascal() / saturated - 1.0).abs() < 1e-8,
                "{place}"
            );
            let off = inside.pressure.pascal() / saturated - 1.0;
            assert!(off.abs() < 1e-8, "{place}");

            let liquid = at.liquid_kg_per_m3;
            let inside = state(liquid * (1.0 - 1e-10));
            if fluid.model().no_compressed_liquid().is_some() {
                let outside = fluid.state(density(liquid * (1.0 + 1e-10)), kelvin(t));
                assert!(
                    matches!(outside, Err(FluidError::NoCompressedLiquid { .. })),
                    "{place}: {outside:?}"
                );
                continue;
            }
            let outside = state(liquid * (1.0 + 1e-10));
            assert_eq!(outside.regime, Regime::LiquidFull, "{place}");
            assert_eq!(inside.regime, Regime::TwoPhase, "{place}");
            assert_eq!(
                (outside.liquid_share, outside.quality),
                (Some(1.0), Some(0.0))
            );
            let stiff = (state(liquid * (1.0 + 1e-6)).pressure.pascal() - saturated) * 1e6;
            let gap = (outside.pressure.pascal() - saturated).abs();
            let allowed = 1e-8 * saturated + 1e-9 * stiff;
            assert!(gap <= allowed, "{place}: {gap} Pa, {allowed}");
        }
    }
}

/// A crossing is where the regime changes: just below and just above it.
#[test]
fn regimes_differ_on_both_sides_of_every_crossing() {
    for fluid in Catalog::built_in().iter() {
        let id = fluid.id();
        let critical = fluid.critical();
        for share in [
            1e-5, 1e-3, 0.05, 0.4, 0.9, 0.999, 1.0, 1.001, 1.1, 1.5, 2.0, 2.4, 2.9,
        ] {
            let rho = density(share * critical.density_kg_per_m3);
            for crossing in fluid.crossings(rho).expect(id) {
                let t = crossing.temperature.kelvin();
                let step = 1e-7 * t;
                // Refused for want of its pressure, it is liquid-full all the same.
                let regime = |t: f64| match fluid.state(rho, kelvin(t)) {
                    Err(FluidError::NoCompressedLiquid { .. }) => Ok(Regime::LiquidFull),
                    state => state.map(|state| state.regime),
                };
                let sides = (regime(t - step), regime(t + step));
                let place = format!("{} at {share} ρc, {t} K: {sides:?}", fluid.id());
                match crossing.side {
                    DomeSide::Liquid => {
                        let wet = Ok(Regime::LiquidFull);
                        assert!(sides.1 == wet || sides.0 == wet, "{place}");
                        assert_ne!(sides.0, sides.1, "{place}");
                    }
                    DomeSide::Vapour => assert_eq!(
                        sides,
                        (Ok(Regime::TwoPhase), Ok(Regime::AllVapour)),
                        "{place}"
                    ),
                    DomeSide::Critical => {
                        assert_eq!(
                            sides,
                            (Ok(Regime::TwoPhase), Ok(Regime::Supercritical)),
                            "{place}"
                        );
                    }
                }
            }
        }
    }
}

/// Water is densest at 4 °C (3.98 °C under an atmosphere, from memory of the CRC
/// Handbook): between 999.79 kg/m³ at 0 °C and that top a unit is liquid-full when
/// cold, has a bubble near 4 °C, and is liquid-full again.
#[test]
fn waters_liquid_line_turns_at_4_degrees() {
    let water = fluid("water");
    let turning = water.curve().expect("water").turning_points();
    assert_eq!(turning.len(), 1, "{turning:?}");
    assert!((turning[0] - 273.15 - 3.98).abs() < 0.05, "{turning:?}");
    let rho = density(999.9);
    let crossings = water.crossings(rho).expect("water");
    assert_eq!(crossings.len(), 2, "{crossings:?}");
    assert!(
        crossings
            .iter()
            .all(|crossing| crossing.side == DomeSide::Liquid)
    );
    for (celsius, regime) in [
        (1.0, Regime::LiquidFull),
        (4.0, Regime::TwoPhase),
        (10.0, Regime::LiquidFull),
    ] {
        let state = water.state(rho, kelvin(celsius + 273.15)).expect("water");
        assert_eq!(state.regime, regime, "{celsius} °C");
    }
    // A little less than at 0 °C: one crossing, on the warm side.
    assert_eq!(water.crossings(density(999.7)).expect("water").len(), 1);
    // Denser than the densest: never a bubble.
    assert!(water.crossings(density(1000.1)).expect("water").is_empty());
}

/// `density_at` is the inverse of `state().pressure`; 1e-8 in density, and in pressure
/// where the liquid is too soft for that near the critical point.
#[test]
fn the_density_at_a_pressure_gives_that_pressure() {
    for fluid in Catalog::built_in().iter() {
        let (low, high) = fluid.range();
        let low = low.max(fluid.freezing_point()).kelvin();
        let top = high.kelvin().min(1.5 * fluid.critical().temperature_k);
        for t in grid(low, top, 17) {
            for share in [1e-3, 0.1, 0.5, 0.99, 1.01, 1.5, 2.2, 2.6, 2.9] {
                let rho = share * fluid.critical().density_kg_per_m3;
                let place = format!("{} at {t:.2} K, {share} ρc", fluid.id());
                let state = match fluid.state(density(rho), kelvin(t)) {
                    Ok(state) if state.regime != Regime::TwoPhase => state,
                    _ => continue,
                };
                let saturated = fluid.saturation_pressure(kelvin(t));
                if saturated.is_ok_and(|p| p == state.pressure) {
                    continue;
                }
                let found = fluid
                    .density_at(state.pressure, kelvin(t))
                    .unwrap_or_else(|error| panic!("{place}: {error}"))
                    .unwrap_or_else(|| panic!("{place}: no density"));
                let again = fluid
                    .state(found, kelvin(t))
                    .expect(&place)
                    .pressure
                    .pascal();
                let off = (found.kilogram_per_cubic_metre() / rho - 1.0).abs();
                let off_pressure = (again / state.pressure.pascal() - 1.0).abs();
                assert!(
                    off.min(off_pressure) < 1e-8,
                    "{place}: {off:e}, {off_pressure:e}"
                );
            }
        }
    }
}

/// Refusals of the inverse are named, as those of the state are.
#[test]
fn outside_the_model_the_answer_is_its_name() {
    let ether = fluid("diethyl-ether");
    // Its equation starts at 270 K, it melts near 157 K: neither frozen nor known.
    for t in [200.0, 260.0] {
        let state = ether.state(density(700.0), kelvin(t));
        assert!(
            matches!(state, Err(FluidError::TooCold { .. })),
            "{state:?}"
        );
        let inverse = ether.density_at(pascal(1e6), kelvin(t));
        assert!(
            matches!(inverse, Err(FluidError::TooCold { .. })),
            "{inverse:?}"
        );
    }
    let frozen = ether.state(density(700.0), kelvin(150.0));
    assert_eq!(frozen.map(|state| state.regime), Ok(Regime::Frozen));
    let hot = ether.state(density(100.0), kelvin(700.0));
    assert!(matches!(hot, Err(FluidError::TooHot { .. })), "{hot:?}");
    let dense = fluid("water").state(density(5000.0), kelvin(300.0));
    assert!(
        matches!(dense, Err(FluidError::TooDense { .. })),
        "{dense:?}"
    );
    let solvent = fluid("dichloromethane");
    let near_critical = solvent.state(density(800.0), kelvin(505.0));
    assert!(
        matches!(near_critical, Err(FluidError::TooHot { .. })),
        "{near_critical:?}"
    );
    let squeezed = solvent.state(density(1500.0), kelvin(300.0));
    assert!(
        matches!(squeezed, Err(FluidError::PressureTooHigh { .. })),
        "{squeezed:?}"
    );
}
