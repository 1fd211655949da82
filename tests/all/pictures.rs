//! Sections of devices from outside the crate: levels at random, and the ready designs
//! as files.
//!
//! The golden picture is our own output, no reference: `CHARGEWRIGHT_BLESS=1` writes it
//! anew, to be looked at before it is committed.

use std::path::Path;

use chargewright::chamber::DishedForm;
use chargewright::picture::{Filling, Hold, Picture, View, section, svg};
use chargewright::section::{Device, Form, Place, Stacked};
use chargewright::store;
use chargewright::units::{UnitSystem, Units};
use proptest::prelude::*;

use crate::random_states::check_every;

fn drawn(name: &str, tilt_deg: f64, units: &Units) -> Picture {
    let design = store::preset(name).expect(name);
    let device = Device::of(&design.chamber, units).expect(name);
    let filling = Filling {
        liquid_m3: 0.5 * device.volume_m3(),
        hold: Hold::Gravity,
        wet_share: 0.0,
        frozen: false,
    };
    let view = View {
        tilt_deg,
        turn_deg: 0.0,
    };
    section(&device, &filling, &view, &design.title, units)
}

#[test]
fn a_picture_is_the_golden_file_to_the_byte() {
    let path = Path::new(env!("CARGO_MANIFEST_DIR")).join("tests/pictures/refrigerant-vessel.svg");
    let text = svg(&drawn("refrigerant-vessel", 30.0, &Units::default()));
    if std::env::var_os("CHARGEWRIGHT_BLESS").is_some() {
        std::fs::create_dir_all(path.parent().expect("a folder")).expect("a folder");
        std::fs::write(&path, &text).expect("writes");
    }
    let golden = std::fs::read_to_string(&path).expect("the golden file; bless it");
    for (number, (found, expected)) in text.lines().zip(golden.lines()).enumerate() {
        assert_eq!(found, expected, "line {}", number + 1);
    }
    assert!(text == golden, "one is longer");
}

#[test]
fn every_ready_design_is_drawn_soundly_in_every_unit_and_tilt() {
    for name in store::preset_names() {
        for system in [UnitSystem::Metric, UnitSystem::Kelvin, UnitSystem::Inch] {
            for tilt in [0.0, 30.0, 90.0, -45.0] {
                let picture = drawn(name, tilt, &Units::new(system));
                let text = svg(&picture);
                assert_eq!(text, svg(&picture), "{name}");
                sound(&text);
                let parts = store::preset(name).expect(name).chamber.parts.len();
                assert_eq!(picture.key.len(), parts, "{name}");
                assert_eq!(
                    text.contains("\u{a0}in"),
                    system == UnitSystem::Inch,
                    "{name}"
                );
            }
        }
    }
}

/// Each tag that opens closes, in order; no number is none.
fn sound(text: &str) {
    assert!(text.starts_with("<?xml") && text.ends_with("</svg>\n"));
    assert!(!text.contains("NaN") && !text.contains("inf ") && !text.contains("-0 "));
    let mut open: Vec<&str> = Vec::new();
    for tag in text.split('<').skip(2) {
        let (tag, _) = tag.split_once('>').expect("a tag ends");
        let name = tag
            .split([' ', '/'])
            .find(|part| !part.is_empty())
            .expect("a name");
        if let Some(closed) = tag.strip_prefix('/') {
            assert_eq!(open.pop(), Some(closed));
        } else if !tag.ends_with('/') {
            open.push(name);
        }
    }
    assert!(open.is_empty(), "{open:?}");
}

#[test]
fn words_of_a_design_cannot_break_the_file() {
    let mut design = store::preset("glass-liquid-lift").expect("a preset");
    design.title = "</title> & \"quotes\" \u{7} <svg>".to_owned();
    design.chamber.parts[0].name = "a < b & c".to_owned();
    let units = Units::default();
    let device = Device::of(&design.chamber, &units).expect("a section");
    let filling = Filling {
        liquid_m3: 1e-6,
        hold: Hold::Slugs(5),
        wet_share: 1.0,
        frozen: true,
    };
    let text = svg(&section(
        &device,
        &filling,
        &View::default(),
        &design.title,
        &units,
    ));
    sound(&text);
    assert!(text.contains("a &lt; b &amp; c"));
}

fn places() -> impl Strategy<Value = Place> {
    let d = || 0.001..0.1_f64;
    prop_oneof![
        (d(), d()).prop_map(|(d, l)| Place::Along(Form::cylinder(d, l))),
        (d(), d(), d()).prop_map(|(a, b, l)| Place::Along(Form::cone(a, b, l))),
        d().prop_map(|diameter_m| Place::Sphere { diameter_m }),
        (d(), d(), d()).prop_map(|(diameter_m, neck, neck_length_m)| Place::Bulb {
            diameter_m,
            neck_diameter_m: neck.min(diameter_m),
            neck_length_m,
        }),
        (d(), 0..3_usize).prop_map(|(d, i)| {
            let dome = [
                DishedForm::Hemispherical,
                DishedForm::TwoToOneEllipsoidal,
                DishedForm::Torispherical,
            ][i];
            Place::End(Form::dome(dome, d))
        }),
        (d(), d(), d()).prop_map(|(length_m, height_m, depth_m)| Place::Along(Form::Slab {
            length_m,
            height_m,
            depth_m,
        })),
        (d(), d(), d()).prop_map(
            |(length_m, height_m, across_m)| Place::Along(Form::Obround {
                length_m,
                height_m,
                across_m,
            })
        ),
        (d(), d(), 0.1..0.9).prop_map(|(length_m, inside_m, share)| Place::Along(Form::Annulus {
            length_m,
            inside_m,
            core_m: share * inside_m,
            core_wall_m: 0.0,
        })),
    ]
}

/// Any device at any tilt: the level of a volume has that volume below it, and the volume
/// rises with the height. One case in ten: each solves for a level.
#[test]
fn the_level_of_a_volume_gives_it_back() {
    let places = prop::collection::vec(places(), 1..6);
    let tilts = prop_oneof![-180.0..180.0_f64, Just(0.0), Just(90.0), 89.99..90.01];
    check_every(
        10,
        (places, tilts, 0.0..1.0_f64),
        |(places, tilt, share)| {
            let parts: Vec<Stacked> = places
                .into_iter()
                .enumerate()
                .map(|(part, place)| Stacked {
                    place,
                    count: 1,
                    wall_m: 0.001,
                    part,
                    text: String::new(),
                })
                .collect();
            let Ok(device) = Device::assemble(&parts) else {
                return Ok(());
            };
            let whole = device.volume_m3();
            let level = device.level_m(tilt, share * whole);
            let got = device.volume_below_m3(tilt, level) / whole;
            prop_assert!(
                (got - share).abs() < 1e-9,
                "{got} {share} at {tilt}: {parts:?}"
            );
            let (low, high) = device.reach_m(tilt);
            let mut last = 0.0;
            for i in 0..=10 {
                let h = low + (high - low) * f64::from(i) / 10.0;
                let below = device.volume_below_m3(tilt, h) / whole;
                prop_assert!(
                    below >= last - 1e-12,
                    "falls at {h}, tilt {tilt}: {parts:?}"
                );
                last = below;
            }
            prop_assert!((last - 1.0).abs() < 1e-9, "{last} at {tilt}: {parts:?}");
            Ok(())
        },
    );
}
