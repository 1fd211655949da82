//! Residual gas from a design to its findings, its window and its sheet.

use chargewright::assess::{
    Assessment, DissolvedAir, FindingKind, Requirement, ResidualGas, Severity, Verdict,
};
use chargewright::cli::sheet_text;
use chargewright::design::Design;
use chargewright::store;

use crate::given::{Vessel, assessed, fluid, kelvin, pascal, preset_with};

const R: f64 = 8.314_462_618_153_24;

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
