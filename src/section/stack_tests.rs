//! What becomes of lists of parts: order, ends, openings, inserts.

use super::stack::{NoSection, Place, Stacked};
use super::*;
use crate::chamber::{Chamber, DishedForm, Materials, Shape};
use crate::units::Units;

fn stacked(place: Place, count: u32, part: usize) -> Stacked {
    Stacked {
        place,
        count,
        wall_m: 0.001,
        part,
        text: String::new(),
    }
}

fn tube(diameter_m: f64) -> Place {
    Place::Along(Form::cylinder(diameter_m, 0.1))
}

fn dome(diameter_m: f64) -> Place {
    Place::End(Form::dome(DishedForm::Hemispherical, diameter_m))
}

/// Parts in order along the axis.
fn order(places: Vec<(Place, u32)>) -> Vec<usize> {
    let parts: Vec<Stacked> = places
        .into_iter()
        .enumerate()
        .map(|(part, (place, count))| stacked(place, count, part))
        .collect();
    let device = Device::assemble(&parts).expect("a section");
    device.pieces.iter().map(|piece| piece.part).collect()
}

#[test]
fn two_ends_close_both_and_single_ones_what_is_open() {
    assert_eq!(order(vec![(tube(0.02), 1), (dome(0.02), 2)]), [1, 0, 1]);
    assert_eq!(
        order(vec![(dome(0.02), 1), (tube(0.02), 1), (dome(0.02), 1)]),
        [0, 1, 2]
    );
    // The later end comes last, the one before it closes the beginning.
    assert_eq!(
        order(vec![(tube(0.02), 1), (dome(0.02), 1), (dome(0.02), 1)]),
        [1, 0, 2]
    );
    assert_eq!(
        order(vec![(dome(0.02), 1), (dome(0.02), 1), (tube(0.02), 1)]),
        [0, 2, 1]
    );
    // By the bore, where the list leaves it open.
    assert_eq!(
        order(vec![(tube(0.02), 1), (dome(0.01), 1), (tube(0.01), 1)]),
        [0, 2, 1]
    );
    // Lids lie outside ends, and what is repeated stands in a row.
    let plate = Place::End(Form::Plate { height_m: 0.02 });
    let cone = Place::Along(Form::cone(0.02, 0.01, 0.1));
    assert_eq!(
        order(vec![(cone, 3), (dome(0.02), 2), (plate, 2)]),
        [2, 1, 0, 0, 0, 1, 2]
    );
}

#[test]
fn an_end_opens_towards_the_device() {
    let parts = [stacked(tube(0.02), 1, 0), stacked(dome(0.02), 2, 1)];
    let device = Device::assemble(&parts).expect("a section");
    let mouths: Vec<_> = device
        .pieces
        .iter()
        .map(|p| (p.form.mouth_m(Side::First), p.form.mouth_m(Side::Last)))
        .collect();
    assert_eq!(mouths, [(0.0, 0.02), (0.02, 0.02), (0.02, 0.0)]);
    assert!((device.length_m() - 0.12).abs() < 1e-15);
    assert_eq!(device.pieces[2].start_m, 0.01 + 0.1);
}

#[test]
fn bores_open_spheres_and_a_last_bulb_looks_back() {
    let sphere = Place::Sphere { diameter_m: 0.04 };
    let bulb = Place::Bulb {
        diameter_m: 0.03,
        neck_diameter_m: 0.01,
        neck_length_m: 0.02,
    };
    let parts = [
        stacked(sphere, 1, 0),
        stacked(tube(0.01), 1, 1),
        stacked(bulb, 1, 2),
    ];
    let device = Device::assemble(&parts).expect("a section");
    let mouth = |i: usize, side| device.pieces[i].form.mouth_m(side);
    assert_eq!(mouth(0, Side::First), 0.0);
    assert!((mouth(0, Side::Last) - 0.01).abs() < 1e-15);
    assert!((mouth(2, Side::First) - 0.01).abs() < 1e-15);
    assert_eq!(mouth(2, Side::Last), 0.0);
    // The neck comes first now: its length of even bore.
    assert!((device.pieces[2].form.half_height_m(0.019) - 0.005).abs() < 1e-15);
}

#[test]
fn a_dead_volume_is_a_stretch_of_the_bore_beside_it() {
    let fitting = Place::DeadVolume { volume_m3: 2e-7 };
    let parts = [stacked(tube(0.004), 1, 0), stacked(fitting, 1, 1)];
    let device = Device::assemble(&parts).expect("a section");
    assert!((device.pieces[1].volume_m3() / 2e-7 - 1.0).abs() < 1e-12);
    assert!((device.pieces[1].form.mouth_m(Side::First) - 0.004).abs() < 1e-15);
}

#[test]
fn pillars_and_inserts_take_their_room() {
    let form = Form::Slab {
        length_m: 0.06,
        height_m: 0.003,
        depth_m: 0.04,
    };
    let place = Place::Pillared {
        form,
        diameter_m: 0.002,
        columns: 5,
        rows: 4,
    };
    let device = Device::assemble(&[stacked(place, 1, 0)]).expect("a section");
    let feet = 20.0 * std::f64::consts::PI * 1e-6;
    let expected = (0.06 * 0.04 - feet) * 0.003;
    assert!((device.volume_m3() / expected - 1.0).abs() < 1e-12);
    assert_eq!(device.bodies.len(), 5);
}

#[test]
fn nothing_too_much_and_too_many_are_said() {
    let assemble = |parts: &[Stacked]| Device::assemble(parts).map(|device| device.volume_m3());
    assert_eq!(assemble(&[]), Err(NoSection::NothingEnclosed));
    let plate = Place::End(Form::Plate { height_m: 0.02 });
    assert_eq!(
        assemble(&[stacked(plate, 2, 0)]),
        Err(NoSection::NothingEnclosed)
    );
    let rod = Insert {
        solid: Solid::Rod {
            diameter_m: 0.019,
            length_m: 0.09,
        },
        made: Made::Solid,
        solidity: 1.0,
        count: 2,
        part: 1,
        text: String::new(),
    };
    let with_rods = |wide: u32| {
        assemble(&[
            stacked(tube(0.02), 1, 0),
            stacked(Place::Inside(rod.clone()), 2, 1),
            stacked(tube(0.015), wide, 2),
        ])
    };
    assert_eq!(with_rods(1), Err(NoSection::InsertsTooLarge));
    // Too much for their own part, but not for the device.
    assert!(with_rods(3).expect("room") > 0.0);
    assert_eq!(
        assemble(&[stacked(Place::Sphere { diameter_m: 0.02 }, u32::MAX, 0)]),
        Err(NoSection::TooManyPieces { most: 60 })
    );
    // Tubes alike in a row are one tube.
    let tubes = assemble(&[stacked(tube(0.02), 1000, 0)]).expect("a section");
    assert!((tubes / (1000.0 * std::f64::consts::PI * 1e-4 * 0.1) - 1.0).abs() < 1e-12);
}

/// Each shape of the menu, alone and with its neighbours, has the chamber's volume but
/// for the caps that bores take off spheres.
#[test]
fn every_shape_of_the_menu_has_its_place_and_its_volume() {
    let units = Units::default();
    for shape in Shape::default_of_each_kind() {
        let text = format!(
            "(parts: [(name: \"body\", shape: Tube(inside_diameter: (nominal_m: 0.1), length: (nominal_m: 0.3))), (name: \"it\", shape: {})])",
            ron::to_string(&shape).expect("writes")
        );
        let chamber: Chamber = ron::from_str(&text).expect("a chamber");
        let device = Device::of(&chamber, &units).expect("a section");
        // The bore beside it cuts a cap off.
        if matches!(shape, Shape::Sphere { .. } | Shape::Bulb { .. }) {
            continue;
        }
        // The section holds what is not in the wick.
        let named = chamber
            .named_volumes(&Materials::built_in())
            .expect("volumes");
        let volume = named.vapour_core.nominal.cubic_metre();
        let off = device.volume_m3() / volume - 1.0;
        assert!(off.abs() < 1e-12, "{}: {off:e}", shape.kind_name());
    }
}

#[test]
fn a_part_says_its_sizes_as_a_drawing_does() {
    let chamber: Chamber = ron::from_str(
        r#"(parts: [(name: "body", count: 2,
            shape: Tube(inside_diameter: (nominal_m: 0.011), length: (nominal_m: 0.25)),
            wall: Some((material: "copper", thickness: (nominal_m: 0.0005))))])"#,
    )
    .expect("a chamber");
    let device = Device::of(&chamber, &Units::default()).expect("a section");
    assert_eq!(
        device.pieces[0].text.replace('\u{a0}', " "),
        "body: tube, 2 alike\ninside diameter 11 mm\nlength 250 mm\nwall 0.5 mm, copper"
    );
}
