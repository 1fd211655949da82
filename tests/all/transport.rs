//! Transport filling ratios: published numbers that no equation of state was fitted to.
//!
//! UN Model Regulations, packing instruction P200, for low-pressure liquefied gases:
//! the greatest mass per litre of water capacity is 0.95 of the liquid's density at
//! 50 °C, and the receptacle is not liquid-full at any temperature up to 60 °C; the
//! test pressure is at least the vapour pressure at 65 °C less 1 bar. The rule was
//! seen (UN Model Regulations 2011, P200(3)(c)); the table's values are from memory
//! of P200, table 2.

use chargewright::assess::{Requirement, Side};
use chargewright::fluid::Regime;

use crate::given::{Vessel, celsius, density, fluid};

/// Fluid, filling ratio in kg/L, and test pressure in bar where the table follows its own
/// rule. For the others it carries an older, higher figure.
const TABLE: [(&str, f64, Option<f64>); 21] = [
    ("ammonia", 0.54, Some(29.0)),
    ("carbonyl-sulfide", 0.87, Some(30.0)),
    ("cyclopropane", 0.55, Some(18.0)),
    ("dimethyl-ether", 0.59, None),
    ("ethylene-oxide", 0.78, None),
    ("isobutane", 0.49, Some(10.0)),
    ("n-butane", 0.52, Some(10.0)),
    ("propane", 0.43, Some(23.0)),
    ("propylene", 0.43, Some(27.0)),
    ("r-114", 1.30, Some(10.0)),
    ("r-12", 1.15, None),
    ("r-124", 1.20, Some(10.0)),
    ("r-134a", 1.05, Some(18.0)),
    ("r-142b", 0.99, Some(10.0)),
    ("r-152a", 0.79, Some(16.0)),
    ("r-22", 1.03, None),
    ("r-227ea", 1.21, None),
    ("r-40", 0.81, None),
    ("r-c318", 1.32, None),
    ("sulfur-dioxide", 1.23, Some(12.0)),
    ("hydrogen-sulfide", 0.67, None),
];

/// High-pressure liquefied gases: fluid, filling ratio in kg/L, test pressure in bar. At
/// 65 °C the pressure of the full receptacle is the test pressure: P200(5)(b), seen in ADR
/// 4.3.3.2; the pairs are from memory of P200, table 2. No equation was fitted to them.
const HIGH_PRESSURE: [(&str, f64, f64); 22] = [
    ("carbon-dioxide", 0.68, 190.0),
    ("carbon-dioxide", 0.76, 250.0),
    ("ethane", 0.25, 95.0),
    ("ethane", 0.30, 120.0),
    ("ethane", 0.40, 300.0),
    ("ethylene", 0.34, 225.0),
    ("ethylene", 0.38, 300.0),
    ("nitrous-oxide", 0.68, 180.0),
    ("nitrous-oxide", 0.74, 225.0),
    ("r-116", 1.13, 200.0),
    ("r-13", 0.83, 100.0),
    ("r-13", 0.90, 120.0),
    ("r-13", 1.04, 190.0),
    ("r-13", 1.11, 250.0),
    ("r-14", 0.71, 200.0),
    ("r-14", 0.90, 300.0),
    ("r-23", 0.88, 190.0),
    ("r-23", 0.96, 250.0),
    ("r-41", 0.63, 300.0),
    ("sulfur-hexafluoride", 1.06, 70.0),
    ("sulfur-hexafluoride", 1.34, 140.0),
    ("xenon", 1.28, 130.0),
];

/// The published pressure lies between those of the ratio's rounding, 0.006 kg/L to either
/// side, 1 % allowed for the data of then.
#[test]
fn high_pressure_gases_stand_at_their_test_pressure_at_65_degrees() {
    for (id, ratio, published) in HIGH_PRESSURE {
        let gauge = |ratio: f64| {
            let state = fluid(id).state(density(1000.0 * ratio), celsius(65.0));
            state.expect(id).pressure.pascal() * 1e-5 - 1.0
        };
        let (low, high) = (gauge(ratio - 0.006), gauge(ratio + 0.006));
        assert!(
            (0.99 * low..=1.01 * high).contains(&published),
            "{id} at {ratio} kg/L: {low:.1} to {high:.1} bar against {published}"
        );
    }
}

/// Seen: 49 CFR 173.304a, table 1 (the last four from memory of it): filling density in per
/// cent of the mass of water at 60 °F, 999.04 kg/m³. The liquid may not fill the cylinder at
/// 55 °C; for the three whose density the rule sets it does so within 2 K above.
#[test]
fn filling_densities_leave_room_at_55_degrees() {
    for (id, percent, is_set_by_the_rule) in [
        ("ammonia", 54.0, false),
        ("r-142b", 100.0, false),
        ("r-22", 105.0, true),
        ("r-115", 110.0, true),
        ("cyclopropane", 55.0, false),
        ("r-12", 119.0, true),
        ("sulfur-dioxide", 125.0, false),
        ("r-40", 84.0, false),
        ("r-152a", 79.0, false),
        ("hydrogen-sulfide", 62.5, false),
    ] {
        let crossings = fluid(id)
            .crossings(density(percent / 100.0 * 999.04))
            .expect(id);
        let full = crossings.last().expect(id).temperature.celsius();
        assert!(full > 55.0, "{id}: {full:.2} °C");
        assert!(!is_set_by_the_rule || full < 57.0, "{id}: {full:.2} °C");
    }
}

/// Seen: TRG 300, annex 1, filling of pressurised packages, kg/L in metal and in glass. The
/// glass ones are filled to 90 % of their volume at 50 °C, to the rounding of the ratio
/// (0.895 to 0.907).
#[test]
fn glass_packages_are_filled_to_nine_tenths_at_50_degrees() {
    for (id, ratio) in [
        ("r-12", 1.09),
        ("r-21", 1.17),
        ("r-114", 1.23),
        ("r-227ea", 1.14),
        ("r-c318", 1.26),
    ] {
        let state = fluid(id).state(density(1000.0 * ratio), celsius(50.0));
        let share = state.expect(id).liquid_share.expect("two phases");
        assert!((0.890..=0.907).contains(&share), "{id}: {share:.4}");
    }
}

/// Tolerance 0.006 kg/L: the table has two decimals (half a digit, 0.005) and the
/// densities behind it a few parts in a thousand.
#[test]
fn filling_ratios_are_95_percent_of_the_liquid_at_50_degrees() {
    for (id, ratio, _) in TABLE {
        let at = fluid(id).saturation(celsius(50.0)).expect(id);
        let found = 0.95 * at.liquid_kg_per_m3 / 1000.0;
        assert!(
            (found - ratio).abs() <= 0.006,
            "{id}: {found:.4} kg/L against {ratio}"
        );
    }
}

/// Propane's published figure is rounded up from 0.426: filled to 0.43 it is
/// liquid-full at 59.1 °C. The unrounded rule holds for it.
#[test]
fn a_receptacle_filled_by_the_table_is_not_liquid_full_at_60_degrees() {
    for (id, ratio, _) in TABLE {
        let fluid = fluid(id);
        let by_rule = 0.95 * fluid.saturation(celsius(50.0)).expect(id).liquid_kg_per_m3;
        let ratio = if id == "propane" {
            by_rule
        } else {
            1000.0 * ratio
        };
        let state = fluid.state(density(ratio), celsius(60.0)).expect(id);
        assert_eq!(state.regime, Regime::TwoPhase, "{id}");
        let full = fluid.crossings(density(ratio)).expect(id);
        assert!(full[0].temperature > celsius(60.0), "{id}: {full:?}");
    }
    let propane = fluid("propane");
    let full = propane.crossings(density(430.0)).expect("propane");
    // methods.md section 2 gives 59.1 °C, to its last digit.
    assert!(
        (full[0].temperature.celsius() - 59.1).abs() <= 0.05,
        "{full:?}"
    );
}

/// The table's test pressure is the vapour pressure at 65 °C less 1 bar, rounded to a
/// whole bar (half a bar and a little for the densities of then: 0.6 bar), and never
/// below 10 bar.
#[test]
fn test_pressures_are_the_vapour_pressure_at_65_degrees_less_1_bar() {
    for (id, published) in TABLE.iter().filter_map(|(id, _, p)| Some((*id, (*p)?))) {
        let p = fluid(id).saturation_pressure(celsius(65.0)).expect(id);
        let found = (p.pascal() * 1e-5 - 1.0).max(10.0);
        assert!(
            (found - published).abs() <= 0.6,
            "{id}: {found:.2} bar against {published}"
        );
    }
}

/// The same rule through the whole program: 5 % of a plain vessel's volume left at
/// 50 °C. The vapour in the ullage counts as mass, which the transport rule leaves out.
#[test]
fn the_windows_upper_end_is_the_transport_rule_and_the_vapour_in_the_ullage() {
    for (id, ratio, _) in TABLE {
        let vessel = Vessel {
            fluid: id,
            ..Vessel::default()
        };
        let a = vessel.assessed();
        // Water capacity is by the bench; at 50 °C the steel has grown by 3 × 16e-6/K.
        let drawn = a.volumes.as_ref().expect(id).least.cubic_metre();
        let volume = drawn * (1.0 + 48e-6 * 30.0);
        let upper = a.window.as_ref().expect(id).upper.as_ref().expect(id);
        assert_eq!(upper.requirement, Requirement::Ullage, "{id}");
        assert_eq!(upper.side, Side::AtMost);
        assert_eq!(upper.temperature, celsius(50.0));
        let at = fluid(id).saturation(celsius(50.0)).expect(id);
        let expected = (0.95 * at.liquid_kg_per_m3 + 0.05 * at.vapour_kg_per_m3) * volume;
        // The expansions agree with the direct solve to 1e-9.
        let found = upper.mass.kilogram();
        assert!((found / expected - 1.0).abs() < 1e-9, "{id}");
        let by_table = 1000.0 * ratio * volume + 0.05 * at.vapour_kg_per_m3 * volume;
        assert!((found - by_table).abs() <= 6.0 * volume, "{id}");
    }
}
