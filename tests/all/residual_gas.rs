//! Permanent gas in a sealed unit, against closed forms, by continuity and by order of
//! magnitude.

use chargewright::fluid::Regime;
use chargewright::sealed::{SealedUnit, densest_within};
use chargewright::units::{Amount, Volume};

use crate::given::{fluid, grid, kelvin, kilogram, pascal};

const R: f64 = 8.314_462_618_153_24;

fn mole(amount: f64) -> Amount {
    Amount::from_mole(amount).expect("an amount")
}

fn unit(id: &str, mass: f64, volume_m3: f64) -> SealedUnit {
    let volume = Volume::from_cubic_metre(volume_m3).expect("a volume");
    SealedUnit::new(fluid(id), kilogram(mass), volume).expect("a unit")
}

/// Liquid that fills `liquid_m3` of `volume_m3` at a temperature.
fn filled(id: &str, liquid_m3: f64, volume_m3: f64, at: f64) -> SealedUnit {
    let s = fluid(id).curve().expect(id).at(at);
    let mass = s.liquid_kg_per_m3 * liquid_m3 + s.vapour_kg_per_m3 * (volume_m3 - liquid_m3);
    unit(id, mass, volume_m3)
}

fn gas_pa(unit: &SealedUnit, at: f64) -> f64 {
    let state = unit.state(kelvin(at)).expect("a state");
    state.gas.expect("there is gas").pascal()
}

/// An incompressible liquid: y = n R T/(V_v + L V_l). Mercury's compressed liquid is not
/// known, so it does not give way at all; the others are asked for so little gas that they
/// do not.
#[test]
fn the_ideal_limit_has_a_closed_form() {
    for (id, t, amount) in [
        ("mercury", 400.0, 1e-3),
        ("n-hexane", 293.15, 1e-12),
        ("water", 350.0, 1e-12),
        ("dichloromethane", 300.0, 1e-12),
    ] {
        for share in [0.02, 0.3, 0.9, 0.99] {
            for ostwald in [0.0, 0.0191, 0.3] {
                let volume = 50e-6;
                let filled = filled(id, share * volume, volume, t).with_gas(mole(amount), ostwald);
                let found = gas_pa(&filled, t);
                let room = volume * ((1.0 - share) + ostwald * share);
                let expected = amount * R * t / room;
                let off = found / expected - 1.0;
                // The share itself is told to the digits of a mass: 1e-16 over the ullage.
                assert!(off.abs() < 1e-9, "{id} {share} {ostwald}: {off:e}");
            }
        }
    }
}

/// All vapour, and supercritical below the critical density: Dalton.
#[test]
fn in_one_phase_pressures_add_up() {
    for (id, rho, t) in [("r-134a", 5.0, 340.0), ("carbon-dioxide", 300.0, 350.0)] {
        let alone = unit(id, rho * 1e-4, 1e-4);
        let with = alone.clone().with_gas(mole(1e-4), 0.2);
        let (alone, with) = (alone.state(kelvin(t)), with.state(kelvin(t)));
        let (alone, with) = (alone.expect(id), with.expect(id));
        let added = with.pressure.pascal() - alone.pressure.pascal();
        assert!((added / (1e-4 * R * t / 1e-4) - 1.0).abs() < 1e-9, "{id}");
        assert_eq!(
            with.own_pressure().pascal().round(),
            alone.pressure.pascal().round()
        );
    }
}

/// With more gas and with more heat the pressure only rises, without a jump: through the
/// last bubble, through the critical temperature and through dry-out.
#[test]
fn pressure_rises_with_gas_and_heat_and_never_jumps() {
    for (id, from, to, share) in [
        ("n-hexane", 280.0, 340.0, 0.93),
        ("n-pentane", 300.0, 480.0, 0.6),
        ("r-134a", 280.0, 372.0, 0.8),
        ("r-134a", 280.0, 390.0, 0.3),
        ("r-134a", 280.0, 390.0, 0.05),
        ("water", 300.0, 420.0, 0.97),
        ("dichloromethane", 290.0, 340.0, 0.95),
    ] {
        let volume = 50e-6;
        let start = filled(id, share * volume, volume, from);
        for ostwald in [0.0, 0.25] {
            let mut less: Option<Vec<f64>> = None;
            for amount in [1e-12, 1e-8, 1e-6, 1e-5, 1e-4] {
                let unit = start.clone().with_gas(mole(amount), ostwald);
                let mut now = Vec::new();
                let mut before: Option<(f64, f64)> = None;
                // Both sides of every kink, where a jump would be.
                let mut at: Vec<f64> = grid(from, to, 400).collect();
                let kinks = unit.crossings().expect(id);
                for kink in kinks.iter().map(|k| k.temperature.kelvin()) {
                    at.extend([kink - 1e-7, kink + 1e-7]);
                }
                at.retain(|t| (from..=to).contains(t));
                at.sort_by(f64::total_cmp);
                for t in at {
                    let Ok(state) = unit.state(kelvin(t)) else {
                        continue;
                    };
                    let p = state.pressure.pascal();
                    if let Some((earlier, lower)) = before {
                        let what = format!("{id} {share}, {amount} mol, {ostwald}, {t} K");
                        assert!(p > lower * (1.0 - 1e-8), "{what}: {lower} then {p}");
                        // A liquid that fills its vessel gains up to some MPa per kelvin.
                        let most = 1e-6 * p + 3e6 * (t - earlier);
                        assert!(p - lower < most, "{what}: {lower} then {p}");
                    }
                    before = Some((t, p));
                    now.push(p);
                }
                assert!(now.len() > 100, "{id}: {}", now.len());
                if let Some(less) = &less {
                    for (more, less) in now.iter().zip(less) {
                        assert!(*more >= less * (1.0 - 1e-9), "{id} {share}: {less} {more}");
                    }
                }
                less = Some(now);
            }
        }
    }
}

/// The balance itself, put together again from the fluid's own functions: what the bubble
/// and the liquid hold is the gas that was sealed in.
#[test]
fn nothing_of_the_gas_is_lost_in_the_last_bubble() {
    let hexane = fluid("n-hexane");
    for (amount, ostwald) in [(1e-5, 0.0), (1e-4, 0.0), (1e-4, 0.28)] {
        let start = filled("n-hexane", 49.9e-6, 50e-6, 293.15);
        for t in [290.0, 293.15, 294.0, 294.5, 295.0, 296.0] {
            let alone = start.state(kelvin(t)).expect("a state");
            let state = start.clone().with_gas(mole(amount), ostwald);
            let state = state.state(kelvin(t)).expect("a state");
            assert_eq!(state.regime, alone.regime);
            let saturated = hexane.curve().expect("hexane").at(t);
            let dense = hexane.density_at(state.pressure, kelvin(t)).expect("dense");
            let dense = dense.expect("dense").kilogram_per_cubic_metre();
            let mass = start.mass().kilogram();
            let light = saturated.vapour_kg_per_m3;
            let free = (50e-6 * dense - mass) / (dense - light);
            let y = state.pressure.pascal() - saturated.pressure_pa;
            let held = y * (free + ostwald * (50e-6 - free)) / (R * t);
            if state.regime == Regime::LiquidFull && held < amount * 0.999 {
                panic!("{t}: {held} of {amount}");
            }
            // 1e-5: the bubble is a difference of near volumes.
            if held > 0.0 && free > 1e-12 {
                assert!((held / amount - 1.0).abs() < 1e-5, "{t} {amount}: {held}");
            }
        }
    }
}

/// physics.md, "Residual gas": 45 mL of air-saturated hexane over 5 mL of ullage stands
/// near 0.7 atm of air; one millibar of headspace gas is a thousandth of that.
#[test]
fn orders_of_magnitude_of_air_in_hexane() {
    const OSTWALD: f64 = 0.28;
    let t = 293.15;
    let hexane = filled("n-hexane", 45e-6, 50e-6, t);
    let dissolved = OSTWALD * 45e-6 * 101_325.0 / (R * t);
    let saturated = gas_pa(&hexane.clone().with_gas(mole(dissolved), OSTWALD), t);
    assert!(
        (0.65..0.75).contains(&(saturated / 101_325.0)),
        "{saturated}"
    );
    let millibar = 100.0 * 5e-6 / (R * t);
    let left = gas_pa(&hexane.with_gas(mole(millibar), OSTWALD), t);
    assert!((2e-4..2e-3).contains(&(left / saturated)), "{left}");
}

/// methods.md section 8, P7: 1 mbar at 20 °C in 50 mL squeezed to 45 mL stands at 111 Pa.
#[test]
fn a_millibar_in_50_ml_squeezed_to_45_ml() {
    let t = 293.15;
    let amount = 100.0 * 50e-6 / (R * t);
    let unit = filled("dichloromethane", 5e-6, 50e-6, t).with_gas(mole(amount), 0.0);
    assert!((gas_pa(&unit, t) - 111.1).abs() < 0.05);
}

/// Whatever its parts, the greatest charge within a pressure stands at that pressure.
#[test]
fn the_densest_within_a_pressure_stands_at_it() {
    let volume = 50e-6;
    for (id, t, limit, amount, ostwald) in [
        ("n-hexane", 330.0, 1.5e5, 1e-5, 0.28),
        ("n-hexane", 330.0, 6e6, 1e-4, 0.0),
        ("n-hexane", 330.0, 0.3e5, 1e-6, 0.0),
        ("r-134a", 340.0, 25e5, 1e-4, 0.0),
        ("r-134a", 340.0, 10e5, 1e-4, 0.0),
        ("carbon-dioxide", 330.0, 80e5, 1e-4, 0.0),
        ("carbon-dioxide", 330.0, 200e5, 1e-4, 0.0),
        ("dichloromethane", 330.0, 3e5, 1e-5, 0.0),
        ("mercury", 500.0, 2e5, 1e-5, 0.0),
    ] {
        // As headspace gas: the more fluid the less of it.
        let held = |rho: f64| amount * (1.0 - 1e-5 * rho);
        let found = densest_within(&fluid(id), pascal(limit), kelvin(t), volume, ostwald, held);
        let rho = found.expect(id).expect(id).kilogram_per_cubic_metre();
        let unit = unit(id, rho * volume, volume).with_gas(mole(held(rho)), ostwald);
        let p = unit.state(kelvin(t)).expect(id).pressure.pascal();
        assert!((p / limit - 1.0).abs() < 1e-6, "{id} {limit}: {p}");
        let none = densest_within(&fluid(id), pascal(limit), kelvin(t), volume, 0.0, |_| 0.0);
        let plain = fluid(id).densest_within(pascal(limit), kelvin(t), None);
        let (none, plain) = (none.expect(id).expect(id), plain.expect(id).expect(id));
        let off = none.kilogram_per_cubic_metre() / plain.kilogram_per_cubic_metre() - 1.0;
        assert!(off.abs() < 1e-9, "{id}: {off:e}");
    }
}

/// Where the fluid melts as it boils the walls' limit is far off, and a trace of gas changes
/// nothing of it: a vessel may be all but full of liquid there as a little warmer.
#[test]
fn at_the_triple_point_a_trace_of_gas_does_not_empty_the_vessel() {
    for id in ["water", "ammonia", "propane", "carbon-dioxide", "methanol"] {
        let (low, _) = fluid(id).saturation_range();
        let from = low.max(fluid(id).freezing_point());
        for above in [0.0, 1e-3, 0.1, 1.0] {
            let t = from.kelvin() + above;
            let found = densest_within(&fluid(id), pascal(2e6), kelvin(t), 2e-5, 0.0, |_| 1e-8);
            let found = found.expect(id).expect(id).kilogram_per_cubic_metre();
            let liquid = fluid(id).curve().expect(id).at(t).liquid_kg_per_m3;
            assert!(
                (found / liquid - 1.0).abs() < 2e-2,
                "{id} {t}: {found} {liquid}"
            );
        }
    }
}
