//! What the walls of whole chambers bear, against figures worked by hand.

use super::super::tests::{TUBE, chamber};
use super::super::{Dimension, Material, Shape, Wall};
use super::AllowableBasis as Basis;
use super::*;
use crate::units::Length;

/// A chamber of one part, sizes in mm, without tolerance.
fn one(shape: &str, thickness_mm: f64, material: &str, treatment: HeatTreatment) -> Chamber {
    let mut chamber = chamber(TUBE);
    chamber.parts.truncate(1);
    let mut shape: Shape = ron::from_str(shape).expect(shape);
    let mm = |length: Length| Length::from_metre(0.001 * length.metre()).expect("a length");
    for (_, dimension) in shape.dimensions_mut() {
        *dimension = Dimension::exact(mm(dimension.nominal));
    }
    let thickness = Length::from_metre(0.001 * thickness_mm).map(Dimension::exact);
    let thickness = thickness.expect("a length");
    chamber.parts[0].wall = Some(Wall {
        treatment,
        ..Wall::new(material, thickness)
    });
    chamber.parts[0].shape = shape;
    chamber
}

fn envelope(chamber: &Chamber) -> Envelope {
    across(chamber, 0.0)
}

/// The same with this difference of temperature across the walls, K.
fn across(chamber: &Chamber, kelvin: f64) -> Envelope {
    let across = TemperatureDifference::from_kelvin(kelvin).expect("a difference");
    Envelope::new(chamber, &Materials::built_in(), Factors::default(), across)
}

fn celsius(value: f64) -> Temperature {
    Temperature::from_celsius(value).expect("a temperature")
}

fn tube(material: &str, treatment: HeatTreatment) -> Envelope {
    let shape = "Tube(inside_diameter: (nominal_m: 11), length: (nominal_m: 200))";
    envelope(&one(shape, 0.5, material, treatment))
}

/// Allowable and burst of the only part, in bar.
fn bar(envelope: &Envelope, at: Temperature) -> (Option<(f64, Basis)>, Option<f64>) {
    let strength = envelope.part(0, at).expect("a wall");
    let bar = |pressure: Pressure| 1e-5 * pressure.pascal();
    let allowable = strength.allowable.ok().map(|a| (bar(a.pressure), a.basis));
    (allowable, strength.burst.ok().map(bar))
}

fn close(got: f64, expected: f64) {
    assert!((got / expected - 1.0).abs() < 2e-3, "{got} {expected}");
}

/// Tube 12 × 0.5 mm by hand: burst 105.9 (Faupel, 62 and 207 MPa), a quarter of it
/// allowed; at 66 °C S = 5100 psi would allow 30.3 bar, and does not.
#[test]
fn annealed_copper_is_never_stronger_hot_than_at_room_temperature() {
    let tube = tube("copper-c12200-annealed", HeatTreatment::AsSupplied);
    let (allowable, burst) = bar(&tube, celsius(20.0));
    let (allowable, basis) = allowable.expect("known");
    let burst = burst.expect("known");
    close(burst, 105.9);
    close(allowable, burst / 4.0);
    assert_eq!(basis, Basis::Burst);

    let (hot, burst) = bar(&tube, celsius(66.0));
    assert_eq!((hot, burst), (Some((allowable, Basis::BurstAtMost)), None));

    // Near the top the code stress is below it: 3000 psi × 2 t/(D − 0.8 t).
    let (hot, _) = bar(&tube, celsius(204.4));
    let (hot, basis) = hot.expect("known");
    close(hot, 10.0 * 20.684 * 1.0 / 11.6);
    assert_eq!(basis, Basis::CodeForm);
}

#[test]
fn brazing_takes_the_temper_out_of_drawn_copper() {
    let annealed = tube("copper-c12200-annealed", HeatTreatment::AsSupplied);
    let drawn = tube("copper-c12200-drawn", HeatTreatment::AsSupplied);
    let brazed = tube("copper-c12200-drawn", HeatTreatment::Brazed);
    let at = celsius(25.0);
    assert_eq!(bar(&brazed, at), bar(&annealed, at));
    assert!(bar(&drawn, at).1 > bar(&annealed, at).1);
}

#[test]
fn brazed_6061_is_unknown_and_names_the_part_and_the_state() {
    let tube = tube("aluminium-6061-t6", HeatTreatment::Brazed);
    let error = tube.weakest(celsius(20.0)).expect_err("no annealed values");
    assert_eq!((error.part, error.name.as_ref()), (Some(0), "body"));
    assert_eq!(
        error.reason,
        StrengthGap::NoValuesAfter {
            treatment: HeatTreatment::Brazed
        }
    );
    assert!(error.to_string().contains("brazed"), "{error}");
}

/// 6061-T6, 12 × 0.5 mm at 150 °C: tensile 0.8 × 290 MPa on the mean diameter, 201.7 bar.
#[test]
fn aluminium_is_derated_and_ends_where_its_points_end() {
    let tube = tube("aluminium-6061-t6", HeatTreatment::AsSupplied);
    let (allowable, burst) = bar(&tube, celsius(150.0));
    close(burst.expect("known"), 10.0 * 232.0 / 11.5);
    close(allowable.expect("known").0, 10.0 * 232.0 / 11.5 / 4.0);
    assert_eq!(bar(&tube, celsius(201.0)), (None, None));
    let error = tube.weakest(celsius(201.0)).expect_err("too hot");
    assert!(matches!(error.reason, StrengthGap::TooHot { .. }));
}

#[test]
fn steel_has_a_burst_pressure_at_room_temperature_only() {
    let tube = tube("stainless-316l", HeatTreatment::Welded);
    close(bar(&tube, celsius(20.0)).1.expect("known"), 281.7);
    assert_eq!(bar(&tube, celsius(36.0)).1, None);
    let (allowable, _) = bar(&tube, celsius(300.0));
    // Proof 110 MPa, tensile at most the 485 MPa of room temperature: by Faupel burst
    // is at most (2/√3) 110 ln(6/5.5) (2 − 110/485) = 19.60 MPa; a quarter of it is
    // below yield, (110/√3)(1 − (5.5/6)²)/1.5 = 6.76 MPa.
    assert_eq!(allowable.map(|(_, basis)| basis), Some(Basis::BurstAtMost));
    close(allowable.expect("known").0, 10.0 * 19.60 / 4.0);
    // Service goes on, the values do not.
    let error = tube.weakest(celsius(301.0)).expect_err("no values");
    assert_eq!(error.reason, StrengthGap::NoValueThere);
}

#[test]
fn cold_values_hold_down_to_the_stated_limit_and_no_further() {
    let tube = tube("stainless-316l", HeatTreatment::AsSupplied);
    let kelvin = |k| Temperature::from_kelvin(k).expect("a temperature");
    assert_eq!(bar(&tube, kelvin(20.0)), bar(&tube, celsius(20.0)));
    let error = tube.weakest(kelvin(18.0)).expect_err("too cold");
    assert!(matches!(error.reason, StrengthGap::TooCold { .. }));
}

/// EN 1595: 10 × 1 mm 15.56 bar, 30 × 1.2 mm 5.83 bar (two makers' technical data).
#[test]
fn glass_has_a_permissible_pressure_and_no_burst() {
    let glass = "borosilicate-3.3";
    for (inside, t, expected) in [(8.0, 1.0, 15.556), (27.6, 1.2, 5.833)] {
        let shape =
            format!("Tube(inside_diameter: (nominal_m: {inside}), length: (nominal_m: 100))");
        for (treatment, share) in [
            (HeatTreatment::AsSupplied, 1.0),
            (HeatTreatment::FlameSealed, 0.5),
        ] {
            let envelope = envelope(&one(&shape, t, glass, treatment));
            let (allowable, burst) = bar(&envelope, celsius(60.0));
            let (allowable, basis) = allowable.expect("known");
            close(allowable, share * expected);
            assert_eq!((basis, burst), (Basis::Permissible, None));
        }
    }
    // A bulb is blown, whatever it says; halved once, not twice.
    let bulb = "Sphere(inside_diameter: (nominal_m: 28.4))";
    for treatment in HeatTreatment::ALL {
        let (allowable, _) = bar(&envelope(&one(bulb, 0.8, glass, treatment)), celsius(20.0));
        close(allowable.expect("known").0, 5.0 * 3.5 / 4.5625);
    }
}

#[test]
fn the_weakest_governs_and_the_unknown_comes_first() {
    let mut chamber = chamber(TUBE);
    let at = celsius(25.0);
    let weakest = envelope(&chamber).weakest(at).expect("known");
    assert_eq!((weakest.part, weakest.name.as_ref()), (0, "body"));
    assert!(weakest.burst.is_ok());

    let wall = chamber.parts[1].wall.take();
    let error = envelope(&chamber)
        .weakest(at)
        .expect_err("a wall is missing");
    assert_eq!((error.part, error.reason), (Some(1), StrengthGap::NoWall));
    chamber.parts[1].wall = wall;
    chamber.parts[0].wall.as_mut().expect("a wall").material = "tin".to_owned();
    let error = envelope(&chamber)
        .weakest(at)
        .expect_err("no such material");
    assert_eq!(
        (error.material.as_ref(), error.reason),
        ("tin", StrengthGap::UnknownMaterial)
    );

    // A part that does not occur has no say; without any, nothing is known.
    chamber.parts[0].count = 0;
    assert_eq!(
        envelope(&chamber).weakest(at).map(|weakest| weakest.part),
        Ok(1)
    );
    chamber.parts.clear();
    let error = envelope(&chamber).weakest(at).expect_err("no walls");
    assert_eq!((error.part, error.reason), (None, StrengthGap::NoWall));
}

#[test]
fn factors_and_joint_efficiency_divide_and_multiply() {
    let chamber = chamber(TUBE);
    let factors: Factors = ron::from_str("(on_burst: 8.0, joint_efficiency: 0.7)").expect("reads");
    let weak = Envelope::new(
        &chamber,
        &Materials::built_in(),
        factors,
        TemperatureDifference::from_kelvin(0.0).expect("0"),
    );
    let at = celsius(25.0);
    let (weak, usual) = (weak.weakest(at), envelope(&chamber).weakest(at));
    let (weak, usual) = (weak.expect("known"), usual.expect("known"));
    close(
        weak.allowable.pressure.pascal(),
        0.35 * usual.allowable.pressure.pascal(),
    );
    close(
        weak.burst.expect("known").pascal(),
        0.7 * usual.burst.expect("known").pascal(),
    );
}

#[test]
fn tolerances_count_on_the_careful_side() {
    let mut exact = chamber(TUBE);
    for part in &mut exact.parts {
        for (_, dimension) in part.shape.dimensions_mut() {
            *dimension = Dimension::exact(dimension.nominal);
        }
        if let Some(wall) = &mut part.wall {
            wall.thickness = Dimension::exact(wall.thickness.nominal);
        }
    }
    let at = celsius(25.0);
    let allowable = |chamber: &Chamber| {
        envelope(chamber)
            .weakest(at)
            .expect("known")
            .allowable
            .pressure
    };
    assert!(allowable(&chamber(TUBE)) < allowable(&exact));
}

#[test]
fn allowable_pressure_falls_steadily_between_knots_for_every_metal() {
    let materials = Materials::built_in();
    let metals = materials
        .iter()
        .filter(|material| material.glass().is_none());
    for material in metals.map(|material: &Arc<Material>| &material.id) {
        for treatment in [HeatTreatment::AsSupplied, HeatTreatment::Welded] {
            let tube = tube(material, treatment);
            let knots = tube.knots();
            assert!(knots.windows(2).all(|pair| pair[0] < pair[1]), "{material}");
            let mut before = f64::INFINITY;
            for tenths in 0..6000 {
                let at = Temperature::from_kelvin(4.0 + 0.1 * f64::from(tenths));
                let Ok(weakest) = tube.weakest(at.expect("a temperature")) else {
                    continue;
                };
                let now = weakest.allowable.pressure.pascal();
                assert!(now <= before, "{material} {tenths}");
                assert!(
                    before.is_infinite() || before - now < 0.01 * before,
                    "{material} {tenths}"
                );
                before = now;
            }
            assert!(before.is_finite());
        }
    }
}

#[test]
fn each_bound_names_its_sources() {
    let tube = tube("copper-c12200-annealed", HeatTreatment::AsSupplied);
    let confirmed = |basis| -> Vec<bool> {
        tube.sources(0, basis)
            .into_iter()
            .map(Source::is_confirmed)
            .collect()
    };
    assert_eq!(confirmed(Basis::Burst), [false, false]);
    assert_eq!(confirmed(Basis::CodeForm), [true]);
    assert!(tube.sources(7, Basis::Burst).is_empty());
}
