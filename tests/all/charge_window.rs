//! Each requirement's end of the charge window: a charge there is just allowed, one a
//! thousandth beyond is a finding that says so.

use chargewright::assess::{Assessment, FindingKind, Requirement, Severity, Verdict};
use chargewright::design::ChargeAim;
use chargewright::store;
use chargewright::units::Temperature;

use crate::given::{Vessel, assessed, celsius, fluid, kilogram};

/// What the vessel must leave for its tolerance of 0.01 g.
const TOLERANCE_KG: f64 = 1e-5;

fn errors(a: &Assessment) -> Vec<&FindingKind> {
    a.findings
        .iter()
        .filter(|finding| finding.severity == Severity::Error)
        .map(|finding| &finding.kind)
        .collect()
}

/// The upper end belongs to `requirement`; a greatest charge just below it is fit, one
/// 0.1 % above it has an error that `is` recognises, and the remedy takes that away.
fn upper_end(vessel: &Vessel, requirement: Requirement, is: fn(&FindingKind) -> bool) -> f64 {
    let name = format!("{} for {requirement:?}", vessel.fluid);
    let a = vessel.assessed();
    let window = a.window.as_ref().expect(&name);
    let upper = window.upper.as_ref().expect(&name);
    assert_eq!(upper.requirement, requirement, "{name}: {window:#?}");
    let upper = upper.mass.kilogram();
    let at = |share: f64| Vessel {
        mass: upper * share - TOLERANCE_KG,
        ..vessel.clone()
    };
    let allowed = at(1.0 - 1e-9).assessed();
    assert_ne!(
        allowed.verdict,
        Verdict::NotFit,
        "{name}: {:#?}",
        errors(&allowed)
    );
    let beyond = at(1.001);
    let refused = beyond.assessed();
    assert_eq!(refused.verdict, Verdict::NotFit, "{name}");
    let found = refused.findings.iter().find(|finding| is(&finding.kind));
    let found = found.unwrap_or_else(|| panic!("{name}: {:#?}", errors(&refused)));
    let remedy = found
        .remedy
        .unwrap_or_else(|| panic!("{name}: no remedy in {found:?}"));
    let mut mended = beyond.design();
    mended.apply(remedy);
    let a = assessed(&mended);
    assert_ne!(a.verdict, Verdict::NotFit, "{name}: {:#?}", errors(&a));
    upper
}

/// The smallest volume with its wall at a temperature: 3 × 16e-6/K for 316L.
fn smallest_m3(vessel: &Vessel, at: Temperature) -> f64 {
    let drawn = vessel.assessed().volumes.expect("a volume").least;
    drawn.cubic_metre() * (1.0 + 48e-6 * (at.celsius() - 20.0))
}

#[test]
fn ullage() {
    let vessel = Vessel::default();
    upper_end(&vessel, Requirement::Ullage, |kind| {
        matches!(kind, FindingKind::Ullage { .. })
    });
}

#[test]
fn temperature_margin_to_liquid_full() {
    let vessel = Vessel {
        margin: 15.0,
        ..Vessel::default()
    };
    let mass = upper_end(&vessel, Requirement::LiquidFullMargin, |kind| {
        matches!(kind, FindingKind::LiquidFullNear { .. })
    });
    // Its meaning: liquid-full at 65 °C in the smallest volume.
    let volume = smallest_m3(&vessel, celsius(65.0));
    let full = fluid("r-134a")
        .saturation(celsius(65.0))
        .expect("in range")
        .liquid_kg_per_m3;
    assert!((mass / (full * volume) - 1.0).abs() < 1e-9);
}

/// Within the margin of the critical temperature the unit must dry out and not fill.
#[test]
fn a_margin_beyond_the_critical_temperature_asks_for_the_critical_density() {
    let vessel = Vessel {
        hottest: 95.0,
        margin: 15.0,
        ..Vessel::default()
    };
    let mass = upper_end(&vessel, Requirement::LiquidFullMargin, |kind| {
        matches!(kind, FindingKind::LiquidFullNear { .. })
    });
    let r134a = fluid("r-134a");
    let critical = r134a.critical();
    let critical_point = celsius(critical.temperature_k - 273.15);
    let volume = smallest_m3(&vessel, critical_point);
    assert!((mass / (critical.density_kg_per_m3 * volume) - 1.0).abs() < 1e-12);
}

/// The wall bears less than the vapour pressure at the hottest: a limited charge, all
/// vapour there.
#[test]
fn allowable_pressure_below_the_vapour_pressure() {
    let vessel = Vessel {
        wall_mm: 0.3,
        hottest: 85.0,
        mass: 0.001,
        ..Vessel::default()
    };
    upper_end(&vessel, Requirement::AllowablePressure, |kind| {
        matches!(kind, FindingKind::OverAllowable { .. })
    });
}

/// Above the critical temperature the pressure alone governs.
#[test]
fn allowable_pressure_above_the_critical_temperature() {
    let vessel = Vessel {
        fluid: "carbon-dioxide",
        hottest: 60.0,
        wall_mm: 2.0,
        mass: 0.005,
        ..Vessel::default()
    };
    upper_end(&vessel, Requirement::AllowablePressure, |kind| {
        matches!(kind, FindingKind::OverAllowable { .. })
    });
}

/// The heat of a correlated fluid's worst case carries its uncertainty in both places.
#[test]
fn allowable_pressure_of_a_correlated_fluid() {
    let vessel = Vessel {
        fluid: "dichloromethane",
        hottest: 115.0,
        wall_mm: 0.09,
        mass: 0.0003,
        ..Vessel::default()
    };
    upper_end(&vessel, Requirement::AllowablePressure, |kind| {
        matches!(kind, FindingKind::OverAllowable { .. })
    });
}

#[test]
fn room_for_the_frozen_fluid() {
    let vessel = Vessel {
        fluid: "water",
        coldest: -20.0,
        working: Some((5.0, 40.0)),
        ..Vessel::default()
    };
    let mass = upper_end(&vessel, Requirement::FrozenVolume, |kind| {
        matches!(kind, FindingKind::FrozenVolume { .. })
    });
    // 0.95 of ice, 916.7 kg/m³ (physics.md; ice from memory of IAPWS-06).
    let volume = smallest_m3(&vessel, celsius(0.0));
    assert!((mass / (0.95 * 916.7 * volume) - 1.0).abs() < 1e-4);
}

#[test]
fn liquid_when_hot_is_the_lower_end() {
    for fluid in ["water", "r-134a", "ammonia"] {
        let vessel = Vessel {
            duty: "HeatPipe",
            fluid,
            coldest: 5.0,
            ..Vessel::default()
        };
        let a = vessel.assessed();
        let lower = a.window.as_ref().expect(fluid).lower.clone().expect(fluid);
        assert_eq!(lower.requirement, Requirement::LiquidWhenHot);
        let at = |share: f64| {
            Vessel {
                mass: lower.mass.kilogram() * share + TOLERANCE_KG,
                ..vessel.clone()
            }
            .assessed()
        };
        let wet = at(1.0 + 1e-9);
        assert_ne!(wet.verdict, Verdict::NotFit, "{fluid}: {:#?}", errors(&wet));
        let dry = at(0.999);
        let found = errors(&dry);
        assert!(
            found
                .iter()
                .any(|kind| matches!(kind, FindingKind::Dry { .. })),
            "{fluid}: {found:?}"
        );
    }
}

/// A wall too thin for the vapour pressure and a duty that asks for liquid collide, and
/// both are named.
#[test]
fn an_empty_window_names_the_two_that_collide() {
    let a = Vessel {
        duty: "HeatPipe",
        wall_mm: 0.3,
        hottest: 85.0,
        ..Vessel::default()
    }
    .assessed();
    assert!(a.window.as_ref().expect("a window").is_empty());
    let found = errors(&a).into_iter().any(|kind| {
        matches!(
            kind,
            FindingKind::EmptyWindow {
                lower: Requirement::LiquidWhenHot,
                upper: Requirement::AllowablePressure,
                ..
            }
        )
    });
    assert!(found, "{:#?}", errors(&a));
    assert_eq!(a.nearest_charge(kilogram(0.0)), None);
}

/// More charge never lowers the governing pressure, nor the share of the allowable.
#[test]
fn more_charge_never_lowers_the_worst_case() {
    for (name, design) in store::presets() {
        let nominal = assessed(&design).charge.expect(name).nominal.kilogram();
        let mut before = (f64::NEG_INFINITY, f64::NEG_INFINITY);
        for step in 1..=60 {
            let mut design = design.clone();
            let mass = kilogram(nominal * 0.05 * f64::from(step));
            design.charge.aim = ChargeAim::Mass { mass };
            let a = assessed(&design);
            // Too much of it leaves the equation: a named refusal, never a figure.
            let Ok(case) = &a.worst else {
                assert_eq!(a.verdict, Verdict::NotFit, "{name}");
                continue;
            };
            let now = (
                case.pressure.pascal(),
                *case.of_allowable.as_ref().expect(name),
            );
            assert!(
                now.0 >= before.0 && now.1 >= before.1,
                "{name}: {before:?} then {now:?}"
            );
            before = now;
        }
        assert!(before.0 > 0.0, "{name}");
    }
}
