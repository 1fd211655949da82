//! Closed-form volumes of the bodies that chambers are made of.

use std::f64::consts::{FRAC_PI_2, PI};

/// Knuckle radius of a torispherical end over its inside diameter.
pub const TORISPHERE_KNUCKLE: f64 = 0.06;

/// Right circular cylinder, V = π d² l / 4.
pub fn cylinder_m3(diameter_m: f64, length_m: f64) -> f64 {
    0.25 * PI * diameter_m * diameter_m * length_m
}

/// Sphere, V = π d³ / 6.
pub fn sphere_m3(diameter_m: f64) -> f64 {
    PI * diameter_m.powi(3) / 6.0
}

/// Frustum of a right circular cone, V = π l (d₁² + d₁ d₂ + d₂²) / 12.
pub fn frustum_m3(first_diameter_m: f64, second_diameter_m: f64, length_m: f64) -> f64 {
    let (d1, d2) = (first_diameter_m, second_diameter_m);
    PI * length_m * (d1 * d1 + d1 * d2 + d2 * d2) / 12.0
}

/// Half a sphere, V = π d³ / 12.
pub fn hemisphere_m3(diameter_m: f64) -> f64 {
    0.5 * sphere_m3(diameter_m)
}

/// End in the form of half an ellipsoid, depth a quarter of the diameter,
/// V = π d³ / 24.
pub fn ellipsoidal_end_m3(diameter_m: f64) -> f64 {
    0.25 * sphere_m3(diameter_m)
}

/// Torispherical end: crown radius L = d, knuckle radius r = 0.06 d, exact.
///
/// With c = d/2 − r the distance of the knuckle's centre from the axis and φ
/// the angle at which crown and knuckle meet, sin φ = c/(L − r):
///
/// crown   = π h² (3L − h)/3,  h = L (1 − cos φ)
/// knuckle = π [(c² + r²) z − z³/3 + c (z r sin φ + r² (π/2 − φ))],  z = r cos φ
///
/// | symbol | meaning                              | unit |
/// |--------|--------------------------------------|------|
/// | d      | inside diameter at the tangent plane | m    |
/// | h      | height of the crown's cap            | m    |
/// | z      | height of the knuckle                | m    |
///
/// Source: own integration of the meridian; checked against a numerical one below.
pub fn torispherical_end_m3(diameter_m: f64) -> f64 {
    let crown = diameter_m;
    let r = TORISPHERE_KNUCKLE * diameter_m;
    let c = 0.5 * diameter_m - r;
    if crown <= r {
        return 0.0; // only at diameter 0
    }
    let sin_phi = c / (crown - r);
    let cos_phi = (1.0 - sin_phi * sin_phi).sqrt();
    let phi = sin_phi.asin();
    let h = crown * (1.0 - cos_phi);
    let cap = PI * h * h * (3.0 * crown - h) / 3.0;
    let z = r * cos_phi;
    let knuckle = PI
        * ((c * c + r * r) * z - z.powi(3) / 3.0
            + c * (z * r * sin_phi + r * r * (FRAC_PI_2 - phi)));
    cap + knuckle
}

/// Round bulb with a neck of its own, such as a blown glass bulb.
///
/// V = π D³/6 − π h² (3R − h)/3 + π d² l/4,  h = R − √(R² − d²/4),  R = D/2
///
/// | symbol | meaning                                                    | unit |
/// |--------|------------------------------------------------------------|------|
/// | D      | inside diameter of the bulb                                | m    |
/// | d      | inside diameter of the neck                                | m    |
/// | l      | length of the neck, from the circle where it meets the bulb | m    |
/// | h      | height of the cap that the neck takes the place of         | m    |
///
/// Errs low where the edge between the two is rounded, as in blown glass: careful for
/// overfilling, not for dry-out.
/// `None` where the neck is wider than the bulb. Source: geometry.
pub fn necked_bulb_m3(
    bulb_diameter_m: f64,
    neck_diameter_m: f64,
    neck_length_m: f64,
) -> Option<f64> {
    let (radius, neck) = (0.5 * bulb_diameter_m, 0.5 * neck_diameter_m);
    (0.0..=radius).contains(&neck).then(|| {
        let to_circle = ((radius - neck) * (radius + neck)).sqrt();
        // Not R − √…, which loses the digits of a thin neck.
        let h = if neck > 0.0 {
            neck * neck / (radius + to_circle)
        } else {
            0.0
        };
        let cap = PI * h * h * (3.0 * radius - h) / 3.0;
        sphere_m3(bulb_diameter_m) - cap + cylinder_m3(neck_diameter_m, neck_length_m)
    })
}

/// Prism with a section of two straight sides and two half circles: a flattened tube.
///
/// V = (h (w − h) + π h²/4) l
///
/// with w the inside width over all, h the inside height, l the length, m.
/// `None` where it is higher than wide. Source: geometry.
pub fn obround_m3(width_m: f64, height_m: f64, length_m: f64) -> Option<f64> {
    (0.0..=width_m)
        .contains(&height_m)
        .then(|| height_m * (width_m - height_m) * length_m + cylinder_m3(height_m, length_m))
}

/// Space between two coaxial cylinders, V = π (D² − d²) l / 4.
///
/// `None` where the inner one is the wider. Source: geometry.
pub fn annulus_m3(outside_diameter_m: f64, inside_diameter_m: f64, length_m: f64) -> Option<f64> {
    let (outside, inside) = (outside_diameter_m, inside_diameter_m);
    (0.0..=outside)
        .contains(&inside)
        .then_some(0.25 * PI * (outside - inside) * (outside + inside) * length_m)
}

/// Bellows, by the mean of its diameters.
///
/// V = (π/4) ((D_i + D_o)/2)² l
///
/// | symbol   | meaning                                                  | unit |
/// |----------|----------------------------------------------------------|------|
/// | D_i, D_o | inside diameter at the roots, at the crests              | m    |
/// | l        | length of the convolutions, as it stands                 | m    |
///
/// Errs low: with q = ((D_o − D_i)/(D_o + D_i))² by q/3 for V-shaped convolutions, q/2
/// for wavy ones and at most q for square ones; at D_o = 1.5 D_i that is 1.3 %, 2 %
/// and 4 %. A charge looks denser than it is: careful for overfilling, not for dry-out.
/// Source: common practice.
pub fn bellows_m3(root_diameter_m: f64, crest_diameter_m: f64, length_m: f64) -> f64 {
    cylinder_m3(0.5 * (root_diameter_m + crest_diameter_m), length_m)
}

/// Section of a trapezoid groove, A = (a + b) δ/2.
///
/// with a the width of the mouth, b of the bottom, δ the depth, m. Source: geometry.
pub fn trapezoid_m2(mouth_m: f64, bottom_m: f64, depth_m: f64) -> f64 {
    0.5 * (mouth_m + bottom_m) * depth_m
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Integral over 0 to h by Simpson's rule over z = h sin²(u), which takes an
    /// infinite slope out of both ends.
    fn integrated(height_m: f64, of: impl Fn(f64) -> f64) -> f64 {
        let steps = 20_000;
        let area = |u: f64| of(height_m * u.sin().powi(2)) * height_m * (2.0 * u).sin();
        let du = FRAC_PI_2 / f64::from(steps);
        let inner: f64 = (1..steps)
            .map(|i| if i % 2 == 1 { 4.0 } else { 2.0 } * area(f64::from(i) * du))
            .sum();
        (area(0.0) + inner + area(FRAC_PI_2)) * du / 3.0
    }

    /// Volume of a body of revolution.
    fn revolved_m3(height_m: f64, radius_m: impl Fn(f64) -> f64) -> f64 {
        integrated(height_m, |z| PI * radius_m(z).powi(2))
    }

    fn check(closed: f64, numerical: f64) {
        assert!(
            (closed / numerical - 1.0).abs() < 1e-9,
            "{closed} {numerical}"
        );
    }

    #[test]
    fn round_bodies_agree_with_numerical_integration() {
        check(cylinder_m3(0.02, 0.3), revolved_m3(0.3, |_| 0.01));
        check(
            frustum_m3(0.02, 0.05, 0.1),
            revolved_m3(0.1, |z| 0.01 + 0.15 * z),
        );
        check(
            sphere_m3(0.04),
            revolved_m3(0.04, |z| (z * (0.04 - z)).sqrt()),
        );
        check(
            hemisphere_m3(0.04),
            revolved_m3(0.02, |z| (0.0004 - z * z).max(0.0).sqrt()),
        );
        check(
            ellipsoidal_end_m3(0.04),
            revolved_m3(0.01, |z| (0.0004 - 4.0 * z * z).max(0.0).sqrt()),
        );
    }

    #[test]
    fn torispherical_end_agrees_with_numerical_integration_of_its_meridian() {
        let d: f64 = 0.06;
        let (crown, r) = (d, 0.06 * d);
        let c = 0.5 * d - r;
        // Centre of the crown below the tangent plane, and where the arcs meet.
        let drop = ((crown - r).powi(2) - c * c).sqrt();
        let meet = r * drop / (crown - r);
        let meridian = |z: f64| {
            if z <= meet {
                c + (r * r - z * z).max(0.0).sqrt()
            } else {
                (crown * crown - (z + drop).powi(2)).max(0.0).sqrt()
            }
        };
        assert!(
            (meridian(meet) - meridian(meet + 1e-12)).abs() < 1e-9,
            "the arcs join"
        );
        let knuckle = revolved_m3(meet, meridian);
        let cap = revolved_m3(crown - drop - meet, |z| meridian(z + meet));
        check(torispherical_end_m3(d), knuckle + cap);
        // From memory of vessel makers' tables for 6 % knuckles: 0.0809 d³ (3 digits).
        assert!((torispherical_end_m3(1.0) - 0.0809).abs() < 1e-4);
        assert_eq!(torispherical_end_m3(0.0), 0.0);
    }

    #[test]
    fn necked_bulb_agrees_with_numerical_integration_of_its_meridian() {
        let radius: f64 = 0.015;
        for neck in [0.0002, 0.004, 0.0149, 0.015] {
            let to_circle = (radius * radius - neck * neck).sqrt();
            let bulb = revolved_m3(radius + to_circle, |z| {
                (z * (2.0 * radius - z)).max(0.0).sqrt()
            });
            let expected = bulb + revolved_m3(0.03, |_| neck);
            let got = necked_bulb_m3(2.0 * radius, 2.0 * neck, 0.03).expect("narrower");
            check(got, expected);
        }
        assert_eq!(necked_bulb_m3(0.03, 0.0, 0.03), Some(sphere_m3(0.03)));
        assert_eq!(necked_bulb_m3(0.0, 0.0, 0.03), Some(0.0));
    }

    #[test]
    fn obround_and_annulus_agree_with_numerical_integration() {
        let (w, h) = (0.012, 0.003);
        let chord = |z: f64| w - h + 2.0 * (z * (h - z)).max(0.0).sqrt();
        check(
            obround_m3(w, h, 0.15).expect("wide"),
            0.15 * integrated(h, chord),
        );
        assert_eq!(obround_m3(h, h, 0.15), Some(cylinder_m3(h, 0.15)));
        let shells = integrated(0.001, |z| 2.0 * PI * (0.008 + z) * 0.2);
        check(annulus_m3(0.018, 0.016, 0.2).expect("wide"), shells);
    }

    #[test]
    fn bellows_by_the_mean_diameter_err_low_as_stated() {
        let (root, crest, pitch) = (0.010, 0.015, 0.002);
        let mean = bellows_m3(root, crest, pitch);
        let q = ((crest - root) / (crest + root)).powi(2);
        // V-shaped convolutions are two frusta each, an outside closed form.
        let frusta = 2.0 * frustum_m3(root, crest, 0.5 * pitch);
        check(mean * (1.0 + q / 3.0), frusta);
        let wave = |z: f64| 0.25 * (root + crest - (crest - root) * (2.0 * PI * z / pitch).cos());
        check(mean * (1.0 + 0.5 * q), revolved_m3(pitch, wave));
        let square = 0.5 * (cylinder_m3(root, pitch) + cylinder_m3(crest, pitch));
        check(mean * (1.0 + q), square);
        assert!((q - 0.04).abs() < 1e-12);
    }

    #[test]
    fn trapezoid_agrees_with_numerical_integration() {
        let width = |z: f64| 0.0004 + (0.001 - 0.0004) * z / 0.0012;
        check(
            trapezoid_m2(0.001, 0.0004, 0.0012),
            integrated(0.0012, width),
        );
    }

    #[test]
    fn impossible_shapes_have_no_volume() {
        for narrow in [0.011, -0.001, f64::NAN] {
            assert_eq!(necked_bulb_m3(0.010, narrow, 0.01), None);
            assert_eq!(obround_m3(0.010, narrow, 0.01), None);
            assert_eq!(annulus_m3(0.010, narrow, 0.01), None);
        }
    }
}
