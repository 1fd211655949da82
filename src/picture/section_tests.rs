//! The drawn areas against the figures they stand for.

use super::plane::signed_area;
use super::*;
use crate::chamber::DishedForm;
use crate::section::{Body, BodyOutline, Device, Form, Layer, Lies, Lining, Made, Place, Stacked};
use crate::units::Units;

pub(super) fn device(places: Vec<Place>) -> Device {
    let parts: Vec<Stacked> = places
        .into_iter()
        .enumerate()
        .map(|(part, place)| Stacked {
            place,
            count: 1,
            wall_m: 0.001,
            part,
            text: format!("part {part}"),
        })
        .collect();
    Device::assemble(&parts).expect("a section")
}

fn slab() -> Place {
    Place::Along(Form::Slab {
        length_m: 0.06,
        height_m: 0.02,
        depth_m: 0.05,
    })
}

fn tube() -> Place {
    Place::Along(Form::cylinder(0.02, 0.1))
}

fn half_full(device: &Device) -> Filling {
    Filling {
        liquid_m3: 0.5 * device.volume_m3(),
        hold: Hold::Gravity,
        wet_share: 0.0,
        frozen: false,
    }
}

fn drawn(device: &Device, filling: &Filling, tilt_deg: f64) -> Picture {
    let view = View {
        tilt_deg,
        turn_deg: 0.0,
    };
    section(device, filling, &view, "a title", &Units::default())
}

fn area_of(picture: &Picture, paint: Paint) -> f64 {
    let areas = picture.areas.iter().filter(|area| area.paint == paint);
    areas.map(|area| signed_area(&area.outline).abs()).sum()
}

fn close(got: f64, expected: f64, share: f64) {
    assert!((got / expected - 1.0).abs() < share, "{got:e} {expected:e}");
}

/// In a box the drawn share is the share of the volume, at any tilt.
#[test]
fn the_liquid_of_a_box_is_drawn_with_its_share() {
    let device = device(vec![slab()]);
    for tilt in [0.0, 20.0, 45.0, 90.0, 135.0] {
        for share in [0.1, 0.5, 0.9] {
            let filling = Filling {
                liquid_m3: share * device.volume_m3(),
                ..half_full(&device)
            };
            let picture = drawn(&device, &filling, tilt);
            close(area_of(&picture, Paint::Liquid), share * 0.06 * 0.02, 1e-9);
            close(area_of(&picture, Paint::Vapour), 0.06 * 0.02, 1e-12);
            // Six plates: the outside is larger by the wall all around.
            close(area_of(&picture, Paint::Wall), 0.062 * 0.022, 1e-12);
        }
    }
}

/// Two bulbs on a tube, from closed forms: circle segments joined to the tube.
#[test]
fn areas_of_round_bodies_are_right_to_their_two_degrees() {
    let device = device(vec![
        Place::Sphere { diameter_m: 0.036 },
        Place::Along(Form::cylinder(0.004, 0.12)),
        Place::Sphere { diameter_m: 0.03 },
    ]);
    let sphere = |d: f64| {
        let (r, half) = (0.5 * d, (0.002 / (0.5 * d)).asin());
        r * r * (std::f64::consts::PI - half) + 0.002 * r * half.cos()
    };
    let expected = sphere(0.036) + sphere(0.03) + 0.004 * 0.12;
    let picture = drawn(&device, &half_full(&device), 90.0);
    close(area_of(&picture, Paint::Vapour), expected, 5e-4);
    assert_eq!(
        picture
            .areas
            .iter()
            .filter(|a| a.paint == Paint::Liquid)
            .count(),
        1
    );
    // Lying and less than half full, two pools.
    let filling = Filling {
        liquid_m3: 0.2 * device.volume_m3(),
        ..half_full(&device)
    };
    let picture = drawn(&device, &filling, 0.0);
    assert_eq!(
        picture
            .areas
            .iter()
            .filter(|a| a.paint == Paint::Liquid)
            .count(),
        2
    );
}

#[test]
fn slugs_share_the_liquid_and_lie_apart() {
    let device = device(vec![tube()]);
    let filling = Filling {
        hold: Hold::Slugs(7),
        ..half_full(&device)
    };
    let picture = drawn(&device, &filling, 90.0);
    let slugs: Vec<&Area> = picture
        .areas
        .iter()
        .filter(|a| a.paint == Paint::Liquid)
        .collect();
    assert_eq!(slugs.len(), 7);
    for slug in slugs {
        close(signed_area(&slug.outline).abs(), 0.02 * 0.1 / 14.0, 1e-9);
    }
    let levels = picture
        .lines
        .iter()
        .filter(|line| line.stroke == Stroke::Level);
    assert_eq!(levels.count(), 14);
}

#[test]
fn a_wick_is_wet_by_its_share_and_below_the_level() {
    let device = device(vec![
        tube(),
        Place::OnWall(Lining {
            bore_m: 0.02,
            length_m: 0.06,
            solid_m2: 1e-5,
            layer: Layer {
                lies: Lies::OnTheWall,
                thickness_m: 0.002,
                part: 1,
                text: "wick".to_owned(),
            },
        }),
    ]);
    let filling = Filling {
        liquid_m3: 0.0,
        wet_share: 0.25,
        ..half_full(&device)
    };
    let picture = drawn(&device, &filling, 0.0);
    close(area_of(&picture, Paint::Wick), 2.0 * 0.06 * 0.002, 1e-9);
    close(
        area_of(&picture, Paint::Liquid),
        0.25 * 2.0 * 0.06 * 0.002,
        1e-9,
    );
    assert!(
        picture
            .hatches
            .iter()
            .any(|hatch| hatch.paint == Paint::Wick)
    );
    // Full of liquid, all of it is wet.
    let filling = Filling {
        liquid_m3: device.volume_m3(),
        ..filling
    };
    let picture = drawn(&device, &filling, 30.0);
    let wet = area_of(&picture, Paint::Liquid) - 0.02 * 0.1;
    close(wet, 1.25 * 2.0 * 0.06 * 0.002, 1e-9);
    assert_eq!(
        picture.text_at(middle_of(&picture, Paint::Wick)),
        Some("wick")
    );
}

fn middle_of(picture: &Picture, paint: Paint) -> Point {
    let area = picture
        .areas
        .iter()
        .find(|area| area.paint == paint)
        .expect("an area");
    let n = area.outline.len() as f64;
    let sum = |f: fn(&Point) -> f64| area.outline.iter().map(f).sum::<f64>() / n;
    Point::new(sum(|p| p.x), sum(|p| p.y))
}

#[test]
fn an_outside_covers_every_inside_and_triangles_cover_every_area() {
    let domes = [
        DishedForm::Hemispherical,
        DishedForm::TwoToOneEllipsoidal,
        DishedForm::Torispherical,
    ];
    let mut devices: Vec<Device> = domes
        .into_iter()
        .map(|dome| device(vec![Place::End(Form::dome(dome, 0.02)), tube()]))
        .collect();
    devices.push(device(vec![
        Place::Bulb {
            diameter_m: 0.03,
            neck_diameter_m: 0.008,
            neck_length_m: 0.01,
        },
        Place::Along(Form::Bellows {
            root_m: 0.01,
            crest_m: 0.016,
            length_m: 0.03,
        }),
        Place::Along(Form::cone(0.012, 0.02, 0.015)),
        Place::Along(Form::Annulus {
            length_m: 0.04,
            inside_m: 0.02,
            core_m: 0.01,
            core_wall_m: 0.001,
        }),
        Place::End(Form::Plate { height_m: 0.02 }),
    ]));
    for device in &devices {
        for tilt in [0.0, 33.0, 90.0] {
            let picture = drawn(device, &half_full(device), tilt);
            let wall = &picture.areas[0];
            assert_eq!(wall.paint, Paint::Wall);
            for point in &picture.areas[1].outline {
                let middle = middle_of(&picture, Paint::Vapour);
                // A hair inward of the inside is inside the outside.
                let near = Point::new(
                    point.x + 1e-6 * (middle.x - point.x),
                    point.y + 1e-6 * (middle.y - point.y),
                );
                assert!(plane::inside(&wall.outline, near), "{point:?}");
            }
            for area in &picture.areas {
                let sum: f64 = area
                    .triangles()
                    .iter()
                    .map(|t| {
                        0.5 * plane::turn(
                            area.outline[t[0]],
                            area.outline[t[1]],
                            area.outline[t[2]],
                        )
                        .abs()
                    })
                    .sum();
                close(sum, signed_area(&area.outline).abs(), 1e-6);
            }
        }
    }
}

/// The wall of a pipe with round ends, from the outside: a capsule.
#[test]
fn the_outside_is_the_inside_and_the_wall() {
    let mut pipe = device(vec![
        Place::End(Form::dome(DishedForm::Hemispherical, 0.02)),
        tube(),
        Place::End(Form::dome(DishedForm::Hemispherical, 0.02)),
    ]);
    pipe.bodies.push(Body {
        outline: BodyOutline::Disc { diameter_m: 0.004 },
        along_m: 0.05,
        over_m: 0.0,
        made: Made::Solid,
        part: 3,
        text: "ball".to_owned(),
    });
    let picture = drawn(&pipe, &half_full(&pipe), 0.0);
    let capsule = |r: f64| std::f64::consts::PI * r * r + 2.0 * r * 0.1;
    close(area_of(&picture, Paint::Wall), capsule(0.011), 3e-4);
    close(area_of(&picture, Paint::Vapour), capsule(0.010), 3e-4);
    assert_eq!(picture.text_at(Point::new(0.05, 0.0)), Some("ball"));
    assert_eq!(picture.text_at(Point::new(0.05, 0.0105)), Some("part 1"));
    assert_eq!(picture.text_at(Point::new(0.05, 0.02)), None);
    let key: Vec<usize> = picture.key.iter().map(|(number, _)| *number).collect();
    assert_eq!(key, [1, 2, 3, 4]);
}

#[test]
fn a_turned_picture_keeps_its_liquid_and_turns_down_with_it() {
    let device = device(vec![tube()]);
    let view = View {
        tilt_deg: 90.0,
        turn_deg: -90.0,
    };
    let units = Units::default();
    let picture = section(&device, &half_full(&device), &view, "t", &units);
    assert!(picture.bounds.width() > picture.bounds.height());
    close(area_of(&picture, Paint::Liquid), 0.5 * 0.02 * 0.1, 1e-9);
    // The first end lies left, and down is left.
    let liquid = middle_of(&picture, Paint::Liquid);
    assert!(liquid.x < 0.05);
    let down = picture
        .labels
        .iter()
        .find(|label| label.text == "down")
        .expect("an arrow");
    assert_eq!(down.anchor, Anchor::End);
}

/// Nothing, everything, sizes of nothing: a picture all the same, without NaN.
#[test]
fn odd_fillings_and_walls_are_drawn_too() {
    let mut thin = device(vec![Place::Along(Form::cone(0.0, 0.02, 0.1))]);
    thin.pieces[0].wall_m = 0.0;
    for liquid_m3 in [-1.0, 0.0, 1.0, f64::NAN] {
        for hold in [Hold::Gravity, Hold::Slugs(0)] {
            let filling = Filling {
                liquid_m3,
                hold,
                wet_share: f64::NAN,
                frozen: true,
            };
            let picture = drawn(&thin, &filling, 17.0);
            let text = svg(&picture);
            assert!(
                !text.contains("NaN") && !text.contains("inf"),
                "{liquid_m3}"
            );
        }
    }
}
