//! Levels against closed forms and against brute-force sums over thin slices.

use std::f64::consts::PI;

use super::stack::{Place, Stacked};
use super::*;
use crate::chamber::DishedForm;

fn one(place: Place) -> Stacked {
    Stacked {
        place,
        count: 1,
        wall_m: 0.001,
        part: 0,
        text: String::new(),
    }
}

fn device(places: Vec<Place>) -> Device {
    let parts: Vec<Stacked> = places
        .into_iter()
        .enumerate()
        .map(|(part, place)| Stacked { part, ..one(place) })
        .collect();
    Device::assemble(&parts).expect("a section")
}

fn close(got: f64, expected: f64, share: f64, what: &str) {
    assert!(
        (got / expected - 1.0).abs() < share,
        "{what}: {got:e} {expected:e}"
    );
}

/// Cap of a sphere, π h² (3R − h)/3, whatever the tilt.
#[test]
fn a_sphere_fills_as_its_cap_at_any_tilt() {
    let ball = device(vec![Place::Sphere { diameter_m: 0.04 }]);
    for tilt in [0.0, 17.0, 45.0, 89.9, 90.0, 120.0, -30.0, -90.0] {
        let centre = 0.02 * f64::to_radians(tilt).sin();
        for h in [1e-4, 0.005, 0.02, 0.031, 0.0399] {
            let expected = PI * h * h * (0.06 - h) / 3.0;
            let got = ball.volume_below_m3(tilt, centre - 0.02 + h);
            close(got, expected, 1e-9, &format!("{tilt}, {h}"));
        }
        let (low, high) = ball.reach_m(tilt);
        assert!((low - centre + 0.02).abs() < 1e-15 && (high - centre - 0.02).abs() < 1e-15);
    }
}

/// Lying cylinder: l (r² acos((r − h)/r) − (r − h) √(2rh − h²)).
#[test]
fn a_lying_cylinder_fills_as_its_segment() {
    let pipe = device(vec![Place::Along(Form::cylinder(0.02, 0.3))]);
    for h in [1e-3f64, 0.004, 0.01, 0.0199] {
        let up = 0.01 - h;
        let expected = 0.3 * (1e-4 * (up / 0.01).acos() - up * (0.02 * h - h * h).sqrt());
        let got = pipe.volume_below_m3(0.0, h - 0.01);
        close(got, expected, 1e-10, &format!("{h}"));
        close(pipe.level_m(0.0, expected) + 0.01, h, 1e-9, "level");
    }
}

/// Upright frustum to height h: π h (r₁² + r₁ r + r²)/3; a cone on its point: a cube of h.
#[test]
fn an_upright_cone_fills_as_a_smaller_one() {
    let cone = device(vec![Place::Along(Form::cone(0.0, 0.05, 0.1))]);
    let whole = cone.volume_m3();
    for share in [1e-3, 0.2, 0.9] {
        close(
            cone.volume_below_m3(90.0, 0.1 * share),
            whole * share.powi(3),
            1e-12,
            "point down",
        );
        close(
            cone.level_m(90.0, whole * share),
            0.1 * share.cbrt(),
            1e-9,
            "level",
        );
        // Turned over, the vapour is the smaller cone.
        let over = cone.volume_below_m3(-90.0, -0.1 * share);
        close(over, whole * (1.0 - share.powi(3)), 1e-12, "point up");
    }
}

/// A cone through whose point the cut goes level: half an elliptic cone is left. With the
/// axis lying and the level at it, half of anything.
#[test]
fn a_level_at_the_axis_halves_a_lying_device() {
    for place in every_place() {
        let device = device(vec![place]);
        close(
            device.volume_below_m3(0.0, 0.0),
            0.5 * device.volume_m3(),
            1e-10,
            "half",
        );
    }
}

/// An oblique cylinder whose cut runs from wall to wall holds as much as to its middle.
#[test]
fn a_tilted_cylinder_cut_from_wall_to_wall_is_filled_to_the_middle_of_the_cut() {
    let pipe = device(vec![Place::Along(Form::cylinder(0.02, 0.3))]);
    for tilt in [20.0f64, 60.0, 89.0, 89.999_999] {
        let h = 0.15 * tilt.to_radians().sin();
        close(
            pipe.volume_below_m3(tilt, h),
            PI * 1e-4 * 0.15,
            1e-9,
            &format!("{tilt}"),
        );
    }
    // The hoof whose cut just reaches the bottom's far wall: 2/3 r² × its height.
    let hoof = 2.0 / 3.0 * 1e-4 * 0.01;
    let got = pipe.volume_below_m3(45.0, 0.0);
    close(got, hoof, 1e-9, "hoof over half the bottom");
}

fn every_place() -> Vec<Place> {
    vec![
        Place::Along(Form::cylinder(0.02, 0.05)),
        Place::Along(Form::cone(0.03, 0.01, 0.04)),
        Place::Along(Form::cone(0.0, 0.03, 0.04)),
        Place::Sphere { diameter_m: 0.04 },
        Place::Bulb {
            diameter_m: 0.04,
            neck_diameter_m: 0.01,
            neck_length_m: 0.03,
        },
        Place::End(Form::dome(DishedForm::Hemispherical, 0.04)),
        Place::End(Form::dome(DishedForm::TwoToOneEllipsoidal, 0.04)),
        Place::End(Form::dome(DishedForm::Torispherical, 0.04)),
        Place::Along(Form::Slab {
            length_m: 0.06,
            height_m: 0.013,
            depth_m: 0.05,
        }),
        Place::Along(Form::Obround {
            length_m: 0.05,
            height_m: 0.008,
            across_m: 0.02,
        }),
        Place::Along(Form::Obround {
            length_m: 0.05,
            height_m: 0.03,
            across_m: 0.02,
        }),
        Place::Along(Form::Annulus {
            length_m: 0.05,
            inside_m: 0.03,
            core_m: 0.02,
            core_wall_m: 0.001,
        }),
        Place::Along(Form::Bellows {
            root_m: 0.01,
            crest_m: 0.014,
            length_m: 0.02,
        }),
    ]
}

/// Width of a form square to the drawing, at a place and a height, from its definition.
fn width_m(form: &Form, x: f64, y: f64) -> f64 {
    let chord = |r: f64| 2.0 * ((r - y) * (r + y)).max(0.0).sqrt();
    match form {
        Form::Slab { depth_m, .. } => *depth_m,
        Form::Obround {
            height_m, across_m, ..
        } => {
            let r = 0.5 * height_m.min(*across_m);
            let off = (y.abs() - 0.5 * (height_m - across_m).max(0.0)).max(0.0);
            across_m - 2.0 * r + 2.0 * ((r - off) * (r + off)).max(0.0).sqrt()
        }
        Form::Annulus {
            inside_m, core_m, ..
        } => chord(0.5 * inside_m) - chord(0.5 * core_m),
        _ => chord(form.half_height_m(x)),
    }
}

/// Sum over columns, each from the bottom to the level in steps that crowd at both its
/// ends, where widths have infinite slopes.
fn by_brute_force(device: &Device, tilt: f64, h: f64) -> f64 {
    let (sin, cos) = tilt.to_radians().sin_cos();
    let (columns, steps) = (3000, 1000);
    let mut sum = 0.0;
    for piece in &device.pieces {
        let dx = piece.form.length_m() / f64::from(columns);
        for i in 0..columns {
            let x = (f64::from(i) + 0.5) * dx;
            let half = piece.form.half_height_m(x);
            let top = ((h - (piece.start_m + x) * sin) / cos).min(half);
            if top <= -half {
                continue;
            }
            let du = PI / f64::from(steps);
            for k in 0..steps {
                let u = (f64::from(k) + 0.5) * du;
                let y = -half + 0.5 * (top + half) * (1.0 - u.cos());
                // The cell's own height, so that even widths sum exactly.
                let dy = (top + half) * u.sin() * (0.5 * du).sin();
                sum += piece.open_share() * width_m(&piece.form, x, y) * dx * dy;
            }
        }
    }
    sum
}

#[test]
fn tilted_volumes_agree_with_brute_force() {
    let mut devices: Vec<Device> = every_place()
        .into_iter()
        .map(|place| device(vec![place]))
        .collect();
    devices.push(device(vec![
        Place::Sphere { diameter_m: 0.036 },
        Place::Along(Form::cylinder(0.004, 0.12)),
        Place::Sphere { diameter_m: 0.03 },
    ]));
    for device in &devices {
        let whole = device.volume_m3();
        for (tilt, share) in [(30.0, 0.5), (75.0, 0.1), (5.0, 0.8), (-40.0, 0.3)] {
            let (low, high) = device.reach_m(tilt);
            let h = low + share * (high - low);
            let (got, sum) = (
                device.volume_below_m3(tilt, h),
                by_brute_force(device, tilt, h),
            );
            // What the brute sum itself is good for, with its columns and steps.
            assert!(
                (got - sum).abs() < 1e-6 * whole,
                "{:?} at {tilt}, {share}: {got:e} {sum:e}",
                device.pieces[0].form
            );
        }
    }
}

#[test]
fn nothing_is_below_the_lowest_point_and_all_below_the_highest() {
    for place in every_place() {
        let device = device(vec![place, Place::Along(Form::cylinder(0.008, 0.03))]);
        for tilt in [0.0, 30.0, 90.0, -60.0, 180.0] {
            let (low, high) = device.reach_m(tilt);
            let whole = device.volume_m3();
            assert!(device.volume_below_m3(tilt, low) < 1e-12 * whole);
            close(device.volume_below_m3(tilt, high), whole, 1e-12, "whole");
            // Tight: a little inside, a little is cut.
            let step = 1e-3 * (high - low);
            assert!(device.volume_below_m3(tilt, low + step) > 0.0);
            assert!(device.volume_below_m3(tilt, high - step) < whole);
            assert_eq!(device.level_m(tilt, -1.0), low);
            assert_eq!(device.level_m(tilt, whole), high);
            assert_eq!(device.level_m(tilt, f64::NAN), low);
        }
    }
}
