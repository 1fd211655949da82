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

#[cfg(test)]
mod tests {
    use super::*;

    /// Volume of a body of revolution by Simpson's rule over z = h sin²(u), which
    /// takes the infinite slope out of the meridian at both ends.
    fn revolved_m3(height_m: f64, radius_m: impl Fn(f64) -> f64) -> f64 {
        let steps = 20_000;
        let area = |u: f64| {
            let z = height_m * u.sin().powi(2);
            PI * radius_m(z).powi(2) * height_m * (2.0 * u).sin()
        };
        let du = FRAC_PI_2 / f64::from(steps);
        let inner: f64 = (1..steps)
            .map(|i| if i % 2 == 1 { 4.0 } else { 2.0 } * area(f64::from(i) * du))
            .sum();
        (area(0.0) + inner + area(FRAC_PI_2)) * du / 3.0
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
}
