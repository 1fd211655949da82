//! Metals and sulfur: vapours that associate, and a liquid-full state that is not known.

use chargewright::assess::{FindingKind, Missing, Severity, Verdict};
use chargewright::design::{ChargeAim, Design};
use chargewright::fluid::{FluidError, Regime};
use chargewright::units::Temperature;

use crate::given::{assessed, density, fluid, kelvin, kilogram, pascal, preset_with};

/// Share by mass of the molecules of two atoms in the saturated vapour.
fn pairs(id: &str, at_kelvin: f64) -> f64 {
    fluid(id).dimer_mass_fraction(kelvin(at_kelvin)).expect(id)
}

/// Rubidium at 677 °C: 7.4 % of the pressure, 13.8 % of the mass (published in the article
/// on dirubidium of a public encyclopedia, without its source). Sodium at 1100 K: 18.0 %
/// by the constants of McBride et al. 2002, NASA/TP-2002-211556, which the model does not
/// use. To half a per cent of the mass.
#[test]
fn pairs_of_atoms_in_saturated_vapour() {
    assert!((pairs("rubidium", 950.15) - 0.138).abs() < 0.005);
    assert!((pairs("sodium", 1100.0) - 0.180).abs() < 0.005);
    assert_eq!(fluid("mercury").dimer_mass_fraction(kelvin(600.0)), None);
    assert_eq!(fluid("sodium").dimer_mass_fraction(kelvin(1600.0)), None);
}

/// Molecules fall apart as the vapour thins: sulfur's pressure falls less than its density.
/// Far out it is S2 alone, twice 32.065 g/mol.
#[test]
fn thin_sulfur_vapour_dissociates() {
    let sulfur = fluid("sulfur");
    let t = kelvin(800.0);
    let at = |rho: f64| {
        let state = sulfur.state(density(rho), t).expect("vapour");
        assert_eq!(state.regime, Regime::AllVapour);
        state.pressure.pascal()
    };
    assert!(at(4.0) > 0.52 * at(8.0));
    let alone = 1e-6 * 8.314_462_618 * 800.0 / 0.064_13;
    assert!((at(1e-6) / alone - 1.0).abs() < 1e-3, "{}", at(1e-6));
}

#[test]
fn a_liquid_full_metal_is_refused_by_name() {
    for id in [
        "sodium",
        "potassium",
        "rubidium",
        "caesium",
        "lithium",
        "mercury",
        "sulfur",
    ] {
        let metal = fluid(id);
        let (low, high) = metal.saturation_range();
        let t = kelvin(0.5 * (low.kelvin() + high.kelvin()));
        let liquid = metal.saturation(t).expect(id).liquid_kg_per_m3;
        let squeezed = metal.state(density(1.01 * liquid), t);
        let Err(error @ FluidError::NoCompressedLiquid { .. }) = squeezed else {
            panic!("{id}: {squeezed:?}");
        };
        let name = metal.name();
        assert!(
            error
                .to_string()
                .starts_with(&format!("liquid-full {name} cannot be computed: ")),
            "{error}"
        );
        let p = pascal(50e6);
        assert!(matches!(
            metal.density_at(p, t),
            Err(FluidError::NoCompressedLiquid { .. })
        ));
        let within = metal.densest_within(p, t, None).expect(id).expect(id);
        assert!((within.kilogram_per_cubic_metre() / liquid - 1.0).abs() < 1e-9);
    }
}

/// Sodium in steel: 20 g is two-phase and known, 100 g is liquid-full before the
/// hottest. The second is an unanswered question, never a pressure.
#[test]
fn an_unknown_liquid_full_state_is_not_fit() {
    let with = |mass: f64| {
        let mut design = preset_with(
            "aluminium-ammonia-pipe",
            &[
                ("aluminium-6061-t6", "stainless-316l"),
                ("fluid: \"ammonia\"", "fluid: \"sodium\""),
                ("working_low_k: 233.15", "working_low_k: 600.0"),
                ("working_high_k: 323.15", "working_high_k: 700.0"),
                ("hottest_k: 353.15", "hottest_k: 700.0"),
                ("hottest_k: 373.15", "hottest_k: 800.0"),
                // A bubble of gas would reach the walls' limit just before the liquid fills them.
                ("vacuum_pa: Some(10.0)", "vacuum_pa: None"),
            ],
        );
        design.charge.aim = ChargeAim::Mass {
            mass: kilogram(mass),
        };
        design
    };
    let some = assessed(&with(0.02));
    assert!(some.worst.is_ok(), "{:?}", some.worst);
    assert_eq!(some.heaviest_over_at, Ok(None));
    // Full before anything melts, and full at some 260 °C, where the strength of the steel is known.
    for mass in [0.1043, 0.0997] {
        full_and_unknown(&with(mass));
    }
}

fn full_and_unknown(design: &Design) {
    let full = assessed(design);
    let unknown = |missing: &Missing| {
        matches!(
            missing,
            Missing::Fluid(FluidError::NoCompressedLiquid { .. })
        )
    };
    assert!(matches!(&full.worst, Err(missing) if unknown(missing)));
    assert_eq!(full.verdict, Verdict::NotFit);
    assert!(full.findings.iter().any(|finding| {
        finding.severity == Severity::Error
            && matches!(&finding.kind, FindingKind::NotKnown(missing) if unknown(missing))
    }));
    // The walls count as at their limit from where the liquid fills them.
    let at = |figure: &Result<Option<Temperature>, Missing>| {
        figure.clone().expect("known").expect("reached").kelvin()
    };
    assert!((at(&full.heaviest_over_at) - at(&full.heaviest_full_at)).abs() < 1e-6);
}
