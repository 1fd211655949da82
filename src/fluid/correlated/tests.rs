//! Each form against numbers printed with it elsewhere, and the joints between them.

use super::*;

/// Common fields of a form, from the melting point of nothing in particular.
const REST: &str =
    "temperature_range_k: (50.0, 600.0), uncertainty_percent: 1.0, source: Practice(\"a test\")";

fn read<T: for<'de> Deserialize<'de>>(form: &str) -> T {
    ron::from_str(&form.replace("REST", REST)).expect(form)
}

fn near(found: f64, expected: f64, relative: f64) {
    assert!(
        (found / expected - 1.0).abs() < relative,
        "{found}, expected {expected}"
    );
}

/// The slope is the derivative of the pressure.
fn pressure(form: &str, t: f64) -> f64 {
    let form: VapourPressure = read(form);
    let step = 1e-4 * t;
    let secant = (form.at(t + step).0 - form.at(t - step).0) / (2.0 * step);
    near(form.at(t).1, secant, 1e-6);
    form.at(t).0
}

/// Examples printed in the documentation of the library chemicals 1.5.2: methane by
/// both of Wagner's forms (Poling et al. 2001, McGarry 1983), water by DIPPR 101.
#[test]
fn vapour_pressures() {
    let methane = "critical_temperature_k: 190.53, critical_pressure_pa: 4596420.0, REST";
    let wagner36 = format!("Wagner36(a: [-6.00435, 1.1885, -0.834082, -1.22833], {methane})");
    near(pressure(&wagner36, 100.0), 34_520.446_014_504_96, 1e-12);
    let general = format!(
        "WagnerGeneral(n: [-6.00435, 1.1885, -0.834082, -1.22833], t: [1.0, 1.5, 3.0, 6.0], {methane})"
    );
    near(pressure(&general, 100.0), 34_520.446_014_504_96, 1e-12);
    let wagner25 = "Wagner25(a: [-6.02242, 1.26652, -0.5707, -1.366], critical_temperature_k: 190.551, critical_pressure_pa: 4599200.0, REST)";
    near(pressure(wagner25, 100.0), 34_415.004_762_637, 1e-12);
    let water = "Dippr101(a: [73.649, -7258.2, -7.3037, 4.1653e-6, 2.0], REST)";
    near(pressure(water, 300.0), 3_537.448_345_455_49, 1e-12);
}

/// Same documentation: n-hexane by DIPPR 105, water by DIPPR 116, in kmol/m³.
#[test]
fn liquid_densities() {
    let hexane: LiquidDensity = read("Dippr105(a: [0.70824, 0.26411, 507.6, 0.27537], REST)");
    near(hexane.at(300.0, 0.086), 86.0 * 7.593_170_096_339_237, 1e-12);
    let water = "critical_temperature_k: 647.096, critical_density_kg_per_m3: 321.534, REST";
    let form: LiquidDensity = read(&format!(
        "Dippr116(a: [58.606, -95.396, 213.89, -141.26], {water})"
    ));
    near(form.at(300.0, 0.018), 18.0 * 55.176_154_464_065_27, 1e-12);
    let form: LiquidDensity = read(&format!(
        "Ppds(a: [1054.908, -1717.128, 3850.02, -2542.68], {water})"
    ));
    near(form.at(300.0, 0.018), 18.0 * 55.176_154_464_065_27, 1e-12);
    let form: LiquidDensity = read(&format!(
        "PowersOfTheta(n: [100.0, 50.0], t: [0.5, 1.0], {water})"
    ));
    let theta: f64 = 1.0 - 300.0 / 647.096;
    let by_hand = 321.534 + 100.0 * theta.sqrt() + 50.0 * theta;
    near(form.at(300.0, 0.018), by_hand, 1e-14);
    let form: LiquidDensity = read("Polynomial(a: [1000.0, -0.5, 1e-4], REST)");
    near(form.at(400.0, 0.018), 816.0, 1e-14);
}

const METAL: &str = "(
    critical: (temperature_k: 2000.0, pressure_pa: 1e7, density_kg_per_m3: 200.0),
    critical_source: Practice(\"a test\"),
    vapour_pressure: Dippr101(a: [20.0, -4000.0, 0.0, 0.0, 0.0], REST),
    liquid_density: Polynomial(a: [1000.0, -0.2], REST),
    compressed_liquid: NotKnown(reason: \"no published form\"),
    vapour: VAPOUR,
)";

fn metal(vapour: &str) -> Correlated {
    read(&METAL.replace("VAPOUR", vapour))
}

const MOLAR_MASS: f64 = 0.023;

const PAIRS: &str =
    "Associating(smallest_atoms: 1, larger: [(atoms: 2, log10_k: [0.0, 0.0])], unit_pa: 1e5, REST)";

/// With K = 1 per bar and one bar of atoms there is one bar of pairs: two thirds of the
/// mass are pairs and the density is that of three bar of atoms.
#[test]
fn half_the_molecules_are_pairs() {
    let form: VapourForm = read(PAIRS);
    let rt = GAS_CONSTANT * 500.0 / MOLAR_MASS;
    let isotherm = form.isotherm(500.0, rt).expect("its own");
    let density = 3e5 / rt;
    let (pressure, slope) = isotherm.pressure_and_slope(density);
    near(pressure, 2e5, 1e-14);
    near(isotherm.density(2e5), density, 1e-14);
    near(
        isotherm.mass_fraction(2.0, density).expect("pairs"),
        2.0 / 3.0,
        1e-14,
    );
    let step = 1e-5 * density;
    let secant = (isotherm.pressure_and_slope(density + step).0
        - isotherm.pressure_and_slope(density - step).0)
        / (2.0 * step);
    near(slope, secant, 1e-8);
    // So thin that all pairs fall apart.
    let (thin, slope) = isotherm.pressure_and_slope(1e-9 * density);
    near(thin, 1e-9 * density * rt, 1e-8);
    near(slope, rt, 1e-8);
}

#[test]
fn the_vapour_meets_its_boundary_at_the_vapour_pressure() {
    for vapour in [
        "Associating(smallest_atoms: 1, larger: [(atoms: 2, log10_k: [-4.0, 4000.0]), (atoms: 4, log10_k: [-10.0, 8000.0])], unit_pa: 101325.0, REST)",
        "Associating(smallest_atoms: 2, larger: [(atoms: 3, log10_k: [-5.0, 5000.0]), (atoms: 8, log10_k: [-20.0, 15000.0])], unit_pa: 1e5, REST)",
        "Ideal(REST)",
    ] {
        let model = metal(vapour);
        model.check().expect(vapour);
        for t in [100.0, 300.0, 600.0] {
            let pair = model.saturation(t, MOLAR_MASS);
            let (p, _) = model
                .vapour_isotherm(t, MOLAR_MASS)
                .pressure_and_slope(pair.vapour);
            near(p, pair.pressure, 1e-12);
        }
    }
}

#[test]
fn an_unknown_compressed_liquid_has_no_isotherm() {
    let model = metal("Ideal(REST)");
    assert!(model.liquid_isotherm(300.0, MOLAR_MASS).is_none());
    assert_eq!(
        model.compressed_liquid.not_known(),
        Some("no published form")
    );
}

/// What syntax lets pass and the check does not.
#[test]
fn forms_that_are_not_whole_are_refused() {
    let refused = |from: &str, to: &str| {
        let text = METAL.replace("VAPOUR", "Ideal(REST)").replace(from, to);
        read::<Correlated>(&text).check()
    };
    use CorrelatedError as E;
    assert!(matches!(
        refused("Ideal(REST)", "Clapeyron(lowest_pressure_pa: 1000.0)"),
        Err(E::Missing {
            needed: "latent_heat",
            ..
        })
    ));
    assert!(matches!(
        refused(
            "NotKnown(reason: \"no published form\")",
            "ThomsonBrobstHankinson(source: Practice(\"a test\"))"
        ),
        Err(E::Missing {
            needed: "acentric_factor",
            ..
        })
    ));
    assert!(matches!(
        refused("temperature_k: 2000.0", "temperature_k: 40.0"),
        Err(E::NoCommonRange { .. })
    ));
    assert!(matches!(
        refused(
            "Polynomial(a: [1000.0, -0.2]",
            "PowersOfTheta(n: [1.0], t: [], critical_temperature_k: 2000.0, critical_density_kg_per_m3: 200.0"
        ),
        Err(E::UnequalLists { n: 1, t: 0, .. })
    ));
}
