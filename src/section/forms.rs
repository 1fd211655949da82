//! The forms by their sizes: what a device is put together from.

use super::piece::Form;
use super::stretch::{Curve, Stretch};
use crate::chamber::{DishedForm, TORISPHERE_KNUCKLE as KNUCKLE};

impl Form {
    pub fn cylinder(diameter_m: f64, length_m: f64) -> Self {
        Self::cone(diameter_m, diameter_m, length_m)
    }

    pub fn cone(first_diameter_m: f64, last_diameter_m: f64, length_m: f64) -> Self {
        let (first, last) = (0.5 * first_diameter_m, 0.5 * last_diameter_m);
        Self::Round(vec![Stretch::line(0.0, length_m, first, last)])
    }

    /// A sphere with round openings on the axis; each takes a cap off it. An opening as
    /// wide as the sphere leaves the half beyond.
    ///
    /// Distance of the opening from the centre √(R² − r²).
    pub fn sphere(diameter_m: f64, first_opening_m: f64, last_opening_m: f64) -> Self {
        let radius = 0.5 * diameter_m;
        let (first, last) = (
            off_centre_m(diameter_m, first_opening_m),
            off_centre_m(diameter_m, last_opening_m),
        );
        Self::Round(vec![Stretch::sphere(0.0, first + last, first, radius)])
    }

    /// A sphere with a neck that leads on, its length from where it leaves the sphere.
    pub fn bulb(
        diameter_m: f64,
        first_opening_m: f64,
        neck_diameter_m: f64,
        neck_length_m: f64,
    ) -> Self {
        let sphere = Self::sphere(diameter_m, first_opening_m, neck_diameter_m);
        let length_m = sphere.length_m();
        let neck = 0.5 * neck_diameter_m.min(diameter_m);
        let Self::Round(mut stretches) = sphere else {
            return sphere;
        };
        stretches.push(Stretch::line(
            length_m,
            length_m + neck_length_m,
            neck,
            neck,
        ));
        Self::Round(stretches)
    }

    /// A dished end that closes the beginning of a device: its apex comes first.
    pub fn dome(form: DishedForm, diameter_m: f64) -> Self {
        let radius = 0.5 * diameter_m;
        Self::Round(match form {
            DishedForm::Hemispherical => vec![Stretch::sphere(0.0, radius, radius, radius)],
            DishedForm::TwoToOneEllipsoidal => vec![Stretch {
                from_m: 0.0,
                to_m: 0.5 * radius,
                curve: Curve::Arc {
                    centre_m: 0.5 * radius,
                    lift_m: 0.0,
                    along_m: 0.5 * radius,
                    across_m: radius,
                },
            }],
            DishedForm::Torispherical => torisphere(diameter_m),
        })
    }
}

/// Crown and knuckle; the angle φ at which they meet as in `chamber/solid.rs`.
fn torisphere(diameter_m: f64) -> Vec<Stretch> {
    let crown = diameter_m;
    let knuckle = KNUCKLE * diameter_m;
    let lift_m = 0.5 * diameter_m - knuckle;
    let sin_phi = (0.5 - KNUCKLE) / (1.0 - KNUCKLE);
    let cos_phi = (1.0 - sin_phi * sin_phi).sqrt();
    let meet = crown * (1.0 - cos_phi);
    let depth = meet + knuckle * cos_phi;
    vec![
        Stretch::sphere(0.0, meet, crown, crown),
        Stretch {
            from_m: meet,
            to_m: depth,
            curve: Curve::Arc {
                centre_m: depth,
                lift_m,
                along_m: knuckle,
                across_m: knuckle,
            },
        },
    ]
}

fn off_centre_m(diameter_m: f64, opening_m: f64) -> f64 {
    let (radius, opening) = (0.5 * diameter_m, 0.5 * opening_m);
    ((radius - opening) * (radius + opening)).max(0.0).sqrt()
}

#[cfg(test)]
mod tests {
    use super::super::piece::Side;
    use super::super::quadrature::integral;
    use super::*;
    use std::f64::consts::PI;

    fn close(got: f64, expected: f64) {
        assert!((got / expected - 1.0).abs() < 1e-12, "{got:e} {expected:e}");
    }

    fn each() -> Vec<Form> {
        vec![
            Form::cylinder(0.02, 0.3),
            Form::cone(0.02, 0.05, 0.1),
            Form::cone(0.0, 0.05, 0.1),
            Form::sphere(0.04, 0.0, 0.0),
            Form::sphere(0.04, 0.01, 0.039),
            Form::bulb(0.04, 0.005, 0.01, 0.03),
            Form::dome(DishedForm::Hemispherical, 0.04),
            Form::dome(DishedForm::TwoToOneEllipsoidal, 0.04),
            Form::dome(DishedForm::Torispherical, 0.04),
            Form::dome(DishedForm::Torispherical, 0.04).reversed(),
            Form::Bellows {
                root_m: 0.01,
                crest_m: 0.014,
                length_m: 0.02,
            },
            Form::Slab {
                length_m: 0.06,
                height_m: 0.003,
                depth_m: 0.05,
            },
            Form::Obround {
                length_m: 0.2,
                height_m: 0.003,
                across_m: 0.01,
            },
            Form::Annulus {
                length_m: 0.2,
                inside_m: 0.02,
                core_m: 0.012,
                core_wall_m: 0.001,
            },
        ]
    }

    /// Closed forms of elementary geometry, those of dished ends as in the chamber.
    #[test]
    fn whole_volumes_are_the_closed_forms() {
        let d3 = 0.04f64.powi(3);
        let volume = |form: &Form| form.volume_to_m3(form.length_m());
        close(volume(&Form::cylinder(0.02, 0.3)), PI * 0.0001 * 0.3);
        close(volume(&Form::sphere(0.04, 0.0, 0.0)), PI * d3 / 6.0);
        close(volume(&Form::sphere(0.04, 0.0, 0.04)), PI * d3 / 12.0);
        close(
            volume(&Form::dome(DishedForm::Hemispherical, 0.04)),
            PI * d3 / 12.0,
        );
        close(
            volume(&Form::dome(DishedForm::TwoToOneEllipsoidal, 0.04)),
            PI * d3 / 24.0,
        );
        // Roughly only; stack_tests.rs compares all digits with the closed form of the chamber.
        let torisphere = volume(&Form::dome(DishedForm::Torispherical, 1.0));
        assert!((torisphere - 0.0810).abs() < 5e-5, "{torisphere}");
        // A cap of height e = R − √(R² − r²) is gone: π e² (3R − e)/3.
        let e = 0.02 - (0.0004f64 - 0.000025).sqrt();
        close(
            volume(&Form::sphere(0.04, 0.01, 0.0)),
            PI * d3 / 6.0 - PI * e * e * (0.06 - e) / 3.0,
        );
        close(
            volume(&Form::bulb(0.04, 0.0, 0.01, 0.03)),
            PI * d3 / 6.0 - PI * e * e * (0.06 - e) / 3.0 + PI * 0.000025 * 0.03,
        );
    }

    #[test]
    fn volume_to_any_place_is_the_integral_of_the_cross_section() {
        for form in each() {
            let length = form.length_m();
            for share in [0.01, 0.3, 0.77, 1.0] {
                let x = share * length;
                let mut places: Vec<f64> = match &form {
                    Form::Round(stretches) => stretches.iter().map(|s| s.to_m).collect(),
                    _ => Vec::new(),
                };
                places.retain(|place| *place < x);
                places.insert(0, 0.0);
                places.push(x);
                let sum: f64 = places
                    .windows(2)
                    .map(|p| integral(|x| form.area_below_m2(x, 1.0), p[0], p[1]))
                    .sum();
                let got = form.volume_to_m3(x);
                assert!(
                    (got / sum - 1.0).abs() < 1e-10,
                    "{form:?} {share}: {got:e} {sum:e}"
                );
            }
        }
    }

    #[test]
    fn a_form_turned_round_has_the_same_volume_and_its_mouths_changed() {
        for form in each() {
            let turned = form.reversed();
            let length = form.length_m();
            close(turned.length_m(), length);
            close(turned.volume_to_m3(length), form.volume_to_m3(length));
            let rest = form.volume_to_m3(length) - form.volume_to_m3(0.3 * length);
            close(turned.volume_to_m3(0.7 * length), rest);
            let (first, last) = (form.mouth_m(Side::First), form.mouth_m(Side::Last));
            assert!((turned.mouth_m(Side::First) - last).abs() < 1e-15);
            assert!((turned.mouth_m(Side::Last) - first).abs() < 1e-15);
        }
    }

    #[test]
    fn what_is_drawn_lies_on_the_profile_with_the_wall_outside() {
        for form in each() {
            if matches!(form, Form::Bellows { .. }) {
                continue; // Drawn with its waves, and counted by its mean.
            }
            for ([x, r], [outside_x, outside_r]) in form.drawn(0.001) {
                let half = form.half_height_m(x.clamp(0.0, form.length_m()));
                assert!((r - half).abs() < 1e-8, "{form:?} at {x}: {r} {half}");
                let wall = (outside_x - x).hypot(outside_r - r);
                assert!((0.999e-3..1.2e-3).contains(&wall), "{form:?}: {wall}");
            }
        }
    }
}
