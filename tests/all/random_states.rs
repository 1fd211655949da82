//! Random states: any fluid, any density, any temperature.
//!
//! The number of cases comes from `CHARGEWRIGHT_CASES`, 10 000 unless told.

use std::sync::{Arc, LazyLock};

use chargewright::fluid::{Catalog, Fluid, FluidError, Regime, State};
use proptest::prelude::*;
use proptest::test_runner::{Config, TestRunner};

use crate::given::{density, kelvin};

static FLUIDS: LazyLock<Vec<Arc<Fluid>>> = LazyLock::new(|| Catalog::built_in().iter().collect());

/// Runs a property with the number of cases asked for by the environment.
fn check<S: Strategy>(strategy: S, property: impl Fn(S::Value) -> Result<(), TestCaseError>) {
    check_every(1, strategy, property);
}

/// The same for a property so slow that one case in `so_many` has to do.
pub fn check_every<S: Strategy>(
    so_many: u32,
    strategy: S,
    property: impl Fn(S::Value) -> Result<(), TestCaseError>,
) {
    let cases: u32 = match std::env::var("CHARGEWRIGHT_CASES") {
        Ok(text) => text
            .parse()
            .expect("CHARGEWRIGHT_CASES is a number of cases"),
        Err(_) => 10_000,
    };
    let config = Config {
        cases: (cases / so_many).max(1),
        failure_persistence: None,
        ..Config::default()
    };
    TestRunner::new(config)
        .run(&strategy, property)
        .unwrap_or_else(|error| panic!("{error}"));
}

/// A fluid, a density from a dilute gas to a crushed liquid (1e-8 to 10 ρc, evenly in
/// its logarithm, or 0 to 4 ρc) and a temperature from cold to hot (0.05 to 3 Tc, or
/// within a hundredth of Tc, or anything at all).
fn states() -> impl Strategy<Value = (usize, f64, f64)> {
    let densities = prop_oneof![(-8.0..1.0_f64).prop_map(|x| 10_f64.powf(x)), 1e-3..4.0];
    let temperatures =
        prop_oneof![4 => 0.3..1.5, 1 => 0.99..1.01, 1 => 0.05..3.0, 1 => 1e-5..100.0];
    (0..FLUIDS.len(), densities, temperatures)
}

fn at(case: (usize, f64, f64)) -> (&'static Fluid, f64, f64) {
    let fluid = &FLUIDS[case.0];
    let critical = fluid.critical();
    let rho = case.1 * critical.density_kg_per_m3;
    (
        fluid,
        rho,
        (case.2 * critical.temperature_k).clamp(1e-3, 1e5),
    )
}

fn is_single(state: &State) -> bool {
    matches!(
        state.regime,
        Regime::AllVapour | Regime::LiquidFull | Regime::Supercritical
    )
}

#[test]
fn a_state_is_a_number_or_a_named_refusal() {
    check(states(), |case| {
        let (fluid, rho, t) = at(case);
        let place = format!("{}: {rho} kg/m³ at {t} K", fluid.id());
        match fluid.state(density(rho), kelvin(t)) {
            Ok(state) => {
                let p = state.pressure.pascal();
                prop_assert!(p.is_finite() && p > 0.0, "{place}: {state:?}");
                for share in [state.liquid_share, state.quality].into_iter().flatten() {
                    prop_assert!((0.0..=1.0).contains(&share), "{place}: {state:?}");
                }
                let frozen = kelvin(t) < fluid.freezing_point();
                prop_assert_eq!(state.regime == Regime::Frozen, frozen, "{}", place);
            }
            Err(error) => {
                prop_assert!(
                    !matches!(error, FluidError::NotConverged { .. }),
                    "{place}: {error}"
                );
                prop_assert!(error.to_string().contains(fluid.name()), "{place}: {error}");
            }
        }
        Ok(())
    });
}

/// A single phase only ever stands higher when there is more in it. One part in a
/// thousand more mass: even at the critical point, where the isotherm is flattest, that
/// is seen. Two parts in 1e12 of pressure are the equation's own rounding.
#[test]
fn pressure_rises_with_density() {
    check(states(), |case| {
        let (fluid, rho, t) = at(case);
        let state = |rho: f64| fluid.state(density(rho), kelvin(t)).ok();
        if let (Some(less), Some(more)) = (state(rho), state(1.001 * rho))
            && is_single(&less)
            && less.regime == more.regime
        {
            let (p, higher) = (less.pressure.pascal(), more.pressure.pascal());
            prop_assert!(
                higher > p * (1.0 - 2e-12),
                "{}: {rho} kg/m³ at {t} K: {p} then {higher} Pa",
                fluid.id()
            );
        }
        Ok(())
    });
}

/// Through the dome the pressure is the one of saturation, whatever the density.
#[test]
fn between_the_lines_the_pressure_is_the_vapour_pressure() {
    check(states(), |case| {
        let (fluid, rho, t) = at(case);
        if let Ok(state) = fluid.state(density(rho), kelvin(t))
            && state.regime == Regime::TwoPhase
            && let Ok(saturated) = fluid.saturation_pressure(kelvin(t))
        {
            prop_assert_eq!(state.pressure, saturated);
            let share = state.liquid_share.expect("two phases");
            let at = fluid.curve().expect("built").at(t);
            // F1 of methods.md: the mass is that of liquid and vapour.
            let mass = share * at.liquid_kg_per_m3 + (1.0 - share) * at.vapour_kg_per_m3;
            prop_assert!(
                (mass / rho - 1.0).abs() < 1e-9,
                "{}: {mass} {rho}",
                fluid.id()
            );
        }
        Ok(())
    });
}

/// Just beside either line, where the digits of the liquid's pressure are fewest (a
/// vapour pressure of less than a pascal against a stiffness of a gigapascal): never a
/// liquid below its own vapour pressure, never a vapour above it.
#[test]
fn beside_the_lines_the_pressure_stays_on_its_side() {
    let cases = (0..FLUIDS.len(), 0.0..1.0_f64, -16.0..-6.0_f64);
    check(cases, |(index, along, distance)| {
        let fluid = &FLUIDS[index];
        let (low, high) = fluid.saturation_range();
        let low = low.max(fluid.freezing_point()).kelvin();
        let t = (low + along * (high.kelvin() - low)).min(high.kelvin());
        let at = fluid.curve().expect("built").at(t);
        let beside = 10_f64.powf(distance);
        let place = format!("{} at {t} K, {beside:e} beside", fluid.id());
        for rho in [
            at.liquid_kg_per_m3 * (1.0 + beside),
            at.vapour_kg_per_m3 * (1.0 - beside),
        ] {
            let state = match fluid.state(density(rho), kelvin(t)) {
                Err(FluidError::NoCompressedLiquid { .. }) => continue,
                state => state.expect(&place),
            };
            let p = state.pressure.pascal() / at.pressure_pa;
            match state.regime {
                Regime::LiquidFull => prop_assert!(p >= 1.0 - 1e-9, "{place}: {p} of saturation"),
                Regime::AllVapour => prop_assert!(p <= 1.0 + 1e-9, "{place}: {p} of saturation"),
                _ => {}
            }
        }
        Ok(())
    });
}
