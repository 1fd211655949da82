//! Permanent gas in a sealed unit, against closed forms, by continuity and by order of
//! magnitude; then its way through a design to the sheet.

use chargewright::assess::{
    Assessment, DissolvedAir, FindingKind, Requirement, ResidualGas, Severity, Verdict,
};
use chargewright::cli::sheet_text;
use chargewright::design::Design;
use chargewright::fluid::Regime;
use chargewright::sealed::{SealedUnit, densest_within};
use chargewright::units::{Amount, Volume};

use chargewright::store;

use crate::given::{Vessel, assessed, fluid, grid, kelvin, kilogram, pascal, preset_with};

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

fn residual(a: &Assessment) -> &ResidualGas {
    a.gas.as_ref().expect("gas")
}

fn has(a: &Assessment, is: fn(&FindingKind) -> bool) -> Option<Severity> {
    let found = a.findings.iter().find(|finding| is(&finding.kind));
    found.map(|finding| finding.severity)
}

/// A file of an earlier day says nothing of gas: it is warned of, and no pressure has any.
#[test]
fn what_is_not_stated_is_warned_of_and_not_counted() {
    let a = Vessel::default().assessed();
    let is = |kind: &FindingKind| matches!(kind, FindingKind::VacuumNotStated);
    assert_eq!(has(&a, is), Some(Severity::Warning));
    assert_ne!(a.verdict, Verdict::NotFit);
    let gas = residual(&a);
    assert_eq!(
        (gas.headspace, gas.dissolved),
        (None, DissolvedAir::NotStated)
    );
    assert_eq!(a.worst.as_ref().expect("known").state.gas, None);
    let sheet = sheet_text(&Vessel::default().design(), None);
    assert!(sheet.contains("not stated: no gas is counted"), "{sheet}");
    assert!(!sheet.contains("RESIDUAL GAS"));
}

fn lift(changes: &[(&str, &str)]) -> Design {
    preset_with("glass-liquid-lift", changes)
}

const NOT_DEGASSED: (&str, &str) = ("degassed: true", "degassed: false");

/// Air-saturated ethanol stands above its own vapour pressure when cold: not fit, and said
/// what to change. Ethanol at the bench is in balance with the barometer less its vapour.
#[test]
fn a_fluid_with_the_benchs_air_in_it_is_not_fit_for_a_lift() {
    let a = assessed(&lift(&[NOT_DEGASSED]));
    let is = |kind: &FindingKind| matches!(kind, FindingKind::GasAboveShare { .. });
    assert_eq!(has(&a, is), Some(Severity::Error), "{:#?}", a.findings);
    let is = |kind: &FindingKind| matches!(kind, FindingKind::NotDegassed { .. });
    assert_eq!(has(&a, is), Some(Severity::Warning));
    let DissolvedAir::Saturated(amount) = residual(&a).dissolved else {
        panic!("{:?}", residual(&a).dissolved);
    };
    let ethanol = fluid("ethanol").saturation(kelvin(293.15)).expect("known");
    let charge = a.charge.as_ref().expect("known");
    let inside = a.volumes.as_ref().expect("known").nominal.cubic_metre();
    let liquid = charge.bench_fill.as_ref().expect("known") * inside;
    let expected = 0.17 * (101_325.0 - ethanol.pressure_pa) * liquid / (R * 293.15);
    assert!((amount.mole() / expected - 1.0).abs() < 1e-9, "{amount:?}");
}

/// How much air dichloromethane takes up is not recorded with confidence.
#[test]
fn degassing_is_mandatory_where_the_air_is_not_known() {
    let swapped = ("fluid: \"ethanol\"", "fluid: \"dichloromethane\"");
    let design = lift(&[NOT_DEGASSED, swapped]);
    let is = |kind: &FindingKind| matches!(kind, FindingKind::DissolvedAirNotKnown);
    assert_eq!(has(&assessed(&design), is), Some(Severity::Warning));
    let sheet = sheet_text(&design, None);
    assert!(sheet.contains("mandatory: how much air"), "{sheet}");
    let design = lift(&[swapped]);
    assert_eq!(has(&assessed(&design), is), None);
}

/// At the temperature of the seal the gas stands at the vacuum that was stated, whatever the
/// liquid holds of it; it tells in the worst case and presses on no wall from outside.
#[test]
fn the_vacuum_stated_is_the_pressure_at_the_bench() {
    for name in store::preset_names() {
        let a = assessed(&store::preset(name).expect(name));
        let nominal = &a.corners.as_ref().expect(name).nominal;
        let gas = nominal.state(kelvin(293.15)).expect(name).gas.expect(name);
        assert!((gas.pascal() / 10.0 - 1.0).abs() < 1e-6, "{name}: {gas:?}");
        let case = a.worst.as_ref().expect(name);
        let alone = a
            .corners
            .as_ref()
            .expect(name)
            .heaviest
            .clone()
            .without_gas();
        let alone = alone.state(case.temperature).expect(name);
        let gas = case.state.gas.expect(name).pascal();
        assert!(gas > 5.0, "{name}");
        let both = alone.pressure.pascal() + gas;
        assert!(
            (case.state.pressure.pascal() / both - 1.0).abs() < 1e-12,
            "{name}"
        );
        let lightest = a.corners.as_ref().expect(name).lightest.as_ref();
        assert!(lightest.expect(name).gas().is_none());
    }
}

/// Gas made over life adds to that of the seal, and none of it is credited to the liquid.
#[test]
fn gas_made_over_life_counts() {
    let made = ("gas_generated_mol: 0.0", "gas_generated_mol: 0.00001");
    let a = assessed(&lift(&[made]));
    let gas = residual(&a);
    let parts = gas.headspace.expect("stated").mole() + 1e-5;
    assert!((gas.total.mole() / parts - 1.0).abs() < 0.01);
    assert!(!gas.is_taken_up);
    let heaviest = &a.corners.as_ref().expect("corners").heaviest;
    let t = kelvin(333.15);
    let alone = heaviest.clone().without_gas().state(t).expect("a state");
    let room = heaviest.volume_at_m3(t) * (1.0 - alone.liquid_share.expect("two phases"));
    let expected = heaviest.gas().expect("gas").amount.mole() * R * 333.15 / room;
    let found = gas.at_hottest.as_ref().expect("a state").gas.expect("gas");
    assert!((found.pascal() / expected - 1.0).abs() < 1e-4, "{found:?}");
}

/// The upper end of the window with gas is where fluid and gas together reach the allowable.
#[test]
fn the_windows_upper_end_keeps_the_allowable_with_gas() {
    for (fluid, hottest, wall_mm, vacuum_pa, mass) in [
        // Squeezed liquid, two phases, and all vapour.
        ("r-134a", 50.0, 0.3, 1e3, 0.01),
        ("r-134a", 85.0, 0.3, 1e4, 0.001),
        ("n-hexane", 80.0, 0.1, 4e4, 0.001),
        ("carbon-dioxide", 60.0, 2.0, 1e5, 0.005),
    ] {
        let vessel = Vessel {
            fluid,
            hottest,
            wall_mm,
            mass,
            ullage: 0.0,
            ..Vessel::default()
        };
        let at = |mass_kg: f64| {
            let mut design = Vessel {
                mass: mass_kg,
                ..vessel.clone()
            }
            .design();
            design.bench.vacuum = Some(pascal(vacuum_pa));
            design.bench.degassed = true;
            assessed(&design)
        };
        let a = at(mass);
        let window = a.window.as_ref().expect(fluid);
        let bound = window
            .bounds
            .iter()
            .find(|bound| bound.requirement == Requirement::AllowablePressure)
            .expect(fluid);
        // The vessel's own tolerance of 0.01 g.
        let share = |mass_kg: f64| {
            let a = at(mass_kg - 1e-5);
            let case = a.worst.as_ref().map(|case| case.of_allowable.clone());
            case.unwrap_or_else(|e| panic!("{fluid}: {e}"))
                .expect(fluid)
        };
        let end = bound.mass.kilogram();
        let (below, beyond) = (share(end * (1.0 - 1e-6)), share(end * (1.0 + 1e-6)));
        assert!(
            below <= 1.0 && beyond >= 1.0,
            "{fluid}: {below} {beyond} at {end}"
        );
    }
}

/// physics.md: a part at 77 K holds 3.8 times the moles of one at the bench; the liquid
/// freezes into it.
#[test]
fn a_frozen_bulb_is_counted_at_its_own_temperature() {
    let warm = assessed(&lift(&[]));
    let mut design = lift(&[]);
    design.chamber.parts[0].sealing_temperature = Some(kelvin(77.36));
    let cold = assessed(&design);
    let moles = |a: &Assessment| residual(a).headspace.expect("stated").mole();
    let ratio = moles(&cold) / moles(&warm);
    // 60 % of the inside is that bulb, 40 % of it are the liquid's: between 1 and 3.8.
    assert!((1.5..3.8).contains(&ratio), "{ratio}");
    let sheet = sheet_text(&design, None);
    assert!(sheet.contains("lower bulb at -195.8"), "{sheet}");
}
