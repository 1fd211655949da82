//! What every fluid of the catalogue must keep to, and the ones that are easily got wrong.

use std::collections::HashMap;

use chargewright::fluid::{Catalog, FluidError, Model, Regime, StabilityKind};
use chargewright::units::{Density, Temperature};

use crate::given::{density, fluid, kelvin};

#[test]
fn the_catalogue_holds_109_equations_and_28_correlated_fluids() {
    let equation = |fluid: &std::sync::Arc<_>| {
        let fluid: &chargewright::fluid::Fluid = fluid;
        matches!(fluid.model(), Model::Equation(_))
    };
    let all: Vec<_> = Catalog::built_in().iter().collect();
    let equations = all.iter().filter(|fluid| equation(fluid)).count();
    assert_eq!(equations, 109);
    assert!(all.len() - equations >= 28, "{}", all.len());
}

/// No two fluids answer to one name, and each answers to all of its own.
#[test]
fn every_name_is_one_fluids() {
    let catalog = Catalog::built_in();
    let mut known: HashMap<String, String> = HashMap::new();
    for fluid in catalog.iter() {
        let names = [fluid.id(), fluid.name(), fluid.cas()];
        let mut names: Vec<&str> = names.into_iter().chain(fluid.refrigerant()).collect();
        names.extend(fluid.also().iter().map(String::as_str));
        for name in names {
            let folded: String = name
                .chars()
                .filter(|c| !matches!(c, ' ' | '-' | '_'))
                .flat_map(char::to_lowercase)
                .collect();
            let other = known.insert(folded, fluid.id().to_owned());
            assert!(
                other.as_ref().is_none_or(|other| other == fluid.id()),
                "{name}: {} and {other:?}",
                fluid.id()
            );
            assert_eq!(catalog.find(name).expect(name).id(), fluid.id(), "{name}");
        }
    }
}

/// The reference library's number for parahydrogen; the bare CAS number is the mixture
/// that hydrogen is at room temperature.
#[test]
fn hydrogen_and_parahydrogen_are_told_apart() {
    let catalog = Catalog::built_in();
    assert_eq!(catalog.find("1333-74-0").expect("normal").id(), "hydrogen");
    assert_eq!(
        catalog.find("1333-74-0p").expect("para").id(),
        "parahydrogen"
    );
    // Boiling points, ITS-90 (parahydrogen, 20.271 K, equilibrium hydrogen) and Leachman et
    // al. 2009 (normal, 20.369 K): the two equations are not one.
    let boils = |id: &str, t: f64| fluid(id).saturation_pressure(kelvin(t)).expect(id).pascal();
    assert!((boils("parahydrogen", 20.271) / 101_325.0 - 1.0).abs() < 1e-3);
    assert!((boils("hydrogen", 20.369) / 101_325.0 - 1.0).abs() < 1e-3);
}

/// The stability marks that must not be missing, and with them no design is fit.
#[test]
fn the_fluids_that_do_not_stay_what_they_are_say_so() {
    use StabilityKind::{Oxidising, PeroxideForming, Pyrophoric, SelfDecomposing, WaterReactive};
    for (id, kinds) in [
        ("ethylene-oxide", &[SelfDecomposing][..]),
        ("propyne", &[SelfDecomposing]),
        ("nitrous-oxide", &[Oxidising, SelfDecomposing]),
        ("oxygen", &[Oxidising]),
        ("diethyl-ether", &[PeroxideForming]),
        ("dimethyl-ether", &[PeroxideForming]),
        ("tetrahydrofuran", &[PeroxideForming]),
        ("titanium-tetrachloride", &[WaterReactive]),
        ("tin-tetrachloride", &[WaterReactive]),
        ("lithium", &[WaterReactive, Pyrophoric]),
        ("sodium", &[WaterReactive, Pyrophoric]),
        ("potassium", &[WaterReactive, Pyrophoric]),
        ("rubidium", &[WaterReactive, Pyrophoric]),
        ("caesium", &[WaterReactive, Pyrophoric]),
    ] {
        let fluid = fluid(id);
        let marks = &fluid.safety().stability;
        for kind in kinds {
            assert!(
                marks.iter().any(|mark| mark.kind == *kind),
                "{id}: {kind:?}"
            );
        }
        assert!(marks.iter().all(|mark| !mark.note.is_empty()), "{id}");
    }
    // Carbon disulfide's vapour lights on a steam pipe: about 90 °C (IEC 60079-20-1).
    let sulfide = fluid("carbon-disulfide");
    let ignites = sulfide
        .safety()
        .autoignition_k
        .as_ref()
        .expect("known")
        .value;
    assert!((360.0..=376.0).contains(&ignites), "{ignites} K");
}

/// The melting point is its own figure with its own source. Where an equation starts far
/// above it, the two are not one.
#[test]
fn a_melting_point_is_not_the_equations_lower_limit() {
    for (id, melts, starts) in [
        ("diethyl-ether", 157.0, 270.0),
        ("propyne", 170.0, 273.0),
        ("cyclopropane", 145.0, 273.0),
        ("r-114", 180.0, 273.15),
        ("r-236ea", 170.0, 243.0),
    ] {
        let fluid = fluid(id);
        assert!((fluid.melting_point().value - melts).abs() < 2.0, "{id}");
        assert!((fluid.range().0.kelvin() - starts).abs() < 0.01, "{id}");
        let between = fluid.state(density(700.0), kelvin(0.5 * (melts + starts)));
        assert!(
            matches!(between, Err(FluidError::TooCold { .. })),
            "{id}: {between:?}"
        );
    }
}

/// One last digit outside the range is outside, by name; at its ends there is an answer.
#[test]
fn one_last_digit_outside_the_range_is_refused_by_name() {
    for fluid in Catalog::built_in().iter() {
        let id = fluid.id();
        let (low, high) = fluid.range();
        let rho = density(1e-6 * fluid.critical().density_kg_per_m3);
        let hotter = kelvin(high.kelvin().next_up());
        let above = fluid.state(rho, hotter);
        assert!(
            matches!(above, Err(FluidError::TooHot { .. })),
            "{id}: {above:?}"
        );
        assert!(
            fluid.state(rho, high).is_ok(),
            "{id}: {:?}",
            fluid.state(rho, high)
        );
        let colder = kelvin(low.kelvin().next_down());
        match fluid.state(rho, colder) {
            Err(FluidError::TooCold { .. }) => {}
            Ok(state) => assert_eq!(state.regime, Regime::Frozen, "{id}"),
            Err(error) => panic!("{id}: {error}"),
        }
        let (_, top) = fluid.saturation_range();
        let beyond = fluid.saturation(kelvin(top.kelvin().next_up()));
        assert!(
            matches!(beyond, Err(FluidError::NoSaturation { .. })),
            "{id}: {beyond:?}"
        );
        assert!(fluid.saturation(top).is_ok(), "{id}");
    }
}

/// No density of 0, below it or not a number can be made; one too great is refused by name.
#[test]
fn impossible_densities_do_not_get_in() {
    for bad in [0.0, -1.0, f64::NAN, f64::INFINITY, f64::NEG_INFINITY] {
        assert!(
            Density::from_kilogram_per_cubic_metre(bad).is_err(),
            "{bad}"
        );
        assert!(Temperature::from_kelvin(bad).is_err(), "{bad}");
    }
    let Ok(dense) = Density::from_kilogram_per_cubic_metre(1e9) else {
        return; // the type itself refuses it
    };
    for fluid in Catalog::built_in().iter() {
        let middle = 0.5
            * (fluid
                .freezing_point()
                .kelvin()
                .max(fluid.range().0.kelvin())
                + fluid.saturation_range().1.kelvin());
        let state = fluid.state(dense, kelvin(middle));
        assert!(
            matches!(
                state,
                Err(FluidError::TooDense { .. }
                    | FluidError::PressureTooHigh { .. }
                    | FluidError::NoCompressedLiquid { .. })
            ),
            "{}: {state:?}",
            fluid.id()
        );
    }
}

/// Four equations are so far from other published tables that the worst case carries it.
#[test]
fn a_weak_equation_says_so_and_the_worst_case_carries_it() {
    for (id, percent) in [
        ("cyclopropane", 6.0),
        ("propyne", 3.5),
        ("r-161", 4.0),
        ("r-40", 2.0),
    ] {
        assert!(
            (100.0 * fluid(id).pressure_uncertainty() - percent).abs() < 1e-9,
            "{id}"
        );
    }
    assert_eq!(fluid("water").pressure_uncertainty(), 0.0);
    assert!(fluid("sodium").pressure_uncertainty() > 0.04);
}
