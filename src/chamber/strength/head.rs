//! Cones and dished ends: the code forms.
//!
//! With the proof strength or [`flow_strength_pa`] in the place of S they serve as
//! estimates of yield and burst, since the code keeps one margin over all its shapes.
//! The inside of a knuckle yields locally before that, which the code accepts.

use super::super::solid::TORISPHERE_KNUCKLE;

/// Steepest half-angle of a cone for which the code form stands without a knuckle.
pub const CONE_HALF_ANGLE_DEGREES: f64 = 30.0;

/// Half-angle of a cone from its end diameters, in degrees; 90 for one without length.
pub fn half_angle_degrees(first_diameter_m: f64, second_diameter_m: f64, length_m: f64) -> f64 {
    (0.5 * (first_diameter_m - second_diameter_m).abs())
        .atan2(length_m)
        .to_degrees()
}

/// Inside radius of the cylinder that bears like the wide end of a cone,
/// R = D / (2 cos α).
///
/// The hoop stress of a cone is that of a cylinder with the radius measured square
/// to its wall; put into [`super::cylinder::code_form_pa`] it gives the code's
/// p = 2 S E t cos α / (D + 1.2 t cos α).
///
/// | symbol | meaning                  | unit   |
/// |--------|--------------------------|--------|
/// | D      | greatest inside diameter | m      |
/// | α      | half-angle, at most 30   | degree |
///
/// Valid: α ≤ 30°; the junction's bending is not counted.
/// Source: ASME BPVC VIII-1, UG-32(g) [from memory].
pub fn cone_radius_m(greatest_diameter_m: f64, half_angle_degrees: f64) -> f64 {
    0.5 * greatest_diameter_m / half_angle_degrees.to_radians().cos()
}

/// Code-form pressure of a 2:1 ellipsoidal end, p = 2 S E t / (D + 0.2 t).
///
/// | symbol | meaning                             | unit |
/// |--------|-------------------------------------|------|
/// | S E    | allowable stress × joint efficiency | Pa   |
/// | D      | inside diameter                     | m    |
/// | t      | least wall thickness                | m    |
///
/// Source: ASME BPVC VIII-1, UG-32(d) [from memory].
pub fn ellipsoidal_pa(s_pa: f64, inside_diameter_m: f64, t_m: f64) -> f64 {
    2.0 * s_pa * t_m / (inside_diameter_m + 0.2 * t_m)
}

/// Code-form pressure of a torispherical end, p = 2 S E t / (M L + 0.2 t),
/// M = (3 + √(L/r))/4.
///
/// | symbol | meaning                                         | unit |
/// |--------|-------------------------------------------------|------|
/// | S E    | allowable stress × joint efficiency             | Pa   |
/// | L      | crown radius, here the inside diameter          | m    |
/// | r      | knuckle radius, here 0.06 L: M = 1.77 = 2 × 0.885 | m  |
/// | t      | least wall thickness                            | m    |
///
/// Source: ASME BPVC VIII-1, UG-32(e) and appendix 1-4 [from memory].
pub fn torispherical_pa(s_pa: f64, crown_radius_m: f64, t_m: f64) -> f64 {
    let m = 0.25 * (3.0 + (1.0 / TORISPHERE_KNUCKLE).sqrt());
    2.0 * s_pa * t_m / (m * crown_radius_m + 0.2 * t_m)
}

/// Stress at which a ductile wall gives way, the lower of σ_u and σ_y (2 − σ_y/σ_u):
/// Faupel's allowance for hardening, for shapes that have no burst formula.
pub fn flow_strength_pa(sy_pa: f64, su_pa: f64) -> f64 {
    su_pa.min(sy_pa * (2.0 - sy_pa / su_pa))
}

#[cfg(test)]
mod tests {
    use super::super::cylinder;
    use super::*;

    fn close(got: f64, expected: f64, digit: f64) {
        assert!((got - expected).abs() <= 0.5 * digit, "{got} {expected}");
    }

    /// P = 2 MPa, R = 5.5 mm, S = 41 MPa: thickness by the form that the code prints,
    /// then the pressure back. Forms from memory of ASME VIII-1 UG-32.
    #[test]
    fn code_forms_give_back_their_pressure() {
        let (p, d, s) = (2.0, 11.0, 41.0);
        let ellipsoid = p * d / (2.0 * s - 0.2 * p);
        close(ellipsoid, 0.2696, 1e-4);
        close(ellipsoidal_pa(s, d, ellipsoid), p, 1e-12);

        let torisphere = 0.885 * p * d / (s - 0.1 * p);
        close(torisphere, 0.4772, 1e-4);
        // 0.885 is the code's rounding of M/2 = 0.88531.
        close(torispherical_pa(s, d, torisphere), p, 2e-3);

        let cos = 30f64.to_radians().cos();
        let cone = p * d / (2.0 * cos * (s - 0.6 * p));
        close(cone, 0.3191, 1e-4);
        close(
            cylinder::code_form_pa(s, cone_radius_m(d, 30.0), cone),
            p,
            1e-12,
        );
    }

    #[test]
    fn half_angle_of_a_cone() {
        close(half_angle_degrees(2.0, 0.0, 1.0), 45.0, 1e-9);
        close(half_angle_degrees(1.0, 1.0, 1.0), 0.0, 1e-9);
        close(half_angle_degrees(0.0, 1.0, 0.0), 90.0, 1e-9);
    }

    #[test]
    fn flow_strength_lies_between_proof_and_tensile() {
        for (sy, su) in [
            (62.0, 207.0),
            (240.0, 290.0),
            (170.0, 485.0),
            (100.0, 100.0),
        ] {
            let flow = flow_strength_pa(sy, su);
            assert!((sy..=su).contains(&flow), "{flow}");
        }
    }
}
