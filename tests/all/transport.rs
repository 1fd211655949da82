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

/// Fluid, filling ratio in kg/L, test pressure in bar.
const TABLE: [(&str, f64, f64); 4] = [
    ("ammonia", 0.54, 29.0),
    ("propane", 0.43, 23.0),
    ("isobutane", 0.49, 10.0),
    ("r-134a", 1.05, 18.0),
];

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
    for (id, _, published) in TABLE {
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
        let volume = a.volumes.as_ref().expect(id).least.cubic_metre();
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
