//! Pressure from outside: elastic collapse, yield and what an oval tube bears.
//!
//! Every pressure here is outside minus inside, in Pa. The elastic figures are those of
//! the formula, without a design factor (at least 3 on elastic collapse in ASME BPVC
//! VIII-1, UG-28 [from memory]).
//!
//! An annular core tube, with the vapour around it, is a cylinder under pressure from
//! outside like any other: its length is that between the ends that hold it round.

use super::super::shape::DishedForm;
use super::{cylinder, sphere};

/// Elastic collapse of a long cylinder, into two lobes.
///
/// p_c = 2 E/(1 − ν²) · (t/D_m)³
///
/// | symbol | meaning              | unit |
/// |--------|----------------------|------|
/// | E      | modulus              | Pa   |
/// | ν      | Poisson's ratio      | –    |
/// | D_m    | mean diameter        | m    |
/// | t      | least wall thickness | m    |
///
/// Valid: elastic, round, any length (ends only stiffen).
/// Source: M. Bresse, Cours de mécanique appliquée, 1866; G. H. Bryan, 1888; in
/// Timoshenko and Gere, Theory of Elastic Stability, chapter 7 [from memory].
pub fn long_cylinder_pa(e_pa: f64, nu: f64, mean_diameter_m: f64, t_m: f64) -> f64 {
    2.0 * e_pa / (1.0 - nu * nu) * (t_m / mean_diameter_m).powi(3)
}

/// Elastic collapse of a cylinder between round ends, pressed on its side and ends.
///
/// p_c = 2.42 E (t/D)^2.5 / [(1 − ν²)^0.75 (L/D − 0.45 √(t/D))]
///
/// | symbol | meaning                                          | unit |
/// |--------|--------------------------------------------------|------|
/// | E, ν   | modulus, Poisson's ratio                         | Pa, –|
/// | D      | mean diameter                                    | m    |
/// | t      | least wall thickness                             | m    |
/// | L      | length between the ends or rings that hold it round | m |
///
/// Valid: elastic, thin, L below [`critical_length_m`]; beyond it too low. The pole at
/// L = 0.45 √(t D) is one of the approximation: no L below twice that is put in (own
/// choice; the figure stays finite and falls with D). There the hoop stress is near
/// 3 E t/D, so that yield governs nearly always.
/// Against von Mises' formula −20 to +11 %; against its more exact form for two lobes
/// up to 16 % too high between a half of L_c and L_c, which the design factor must bear.
/// Source: D. F. Windenburg and C. Trilling, Trans. ASME 56 (1934) 819, paper APM-56-20,
/// a simplification of R. von Mises' formula; coefficients [from memory].
pub fn short_cylinder_pa(e_pa: f64, nu: f64, mean_diameter_m: f64, t_m: f64, length_m: f64) -> f64 {
    let thinness = t_m / mean_diameter_m;
    let pole = 0.45 * thinness.sqrt();
    let slenderness = (length_m / mean_diameter_m).max(2.0 * pole);
    2.42 * e_pa * thinness.powf(2.5) / ((1.0 - nu * nu).powf(0.75) * (slenderness - pole))
}

/// Length from which the ends no longer stiffen a cylinder, L_c = 1.11 D √(D/t).
///
/// Symbols as in [`short_cylinder_pa`]; 1.11 is 4π√6/27 · (1 − ν²)^¼ with ν = 0.3.
/// Source: R. V. Southwell, Phil. Mag. 25 (1913) 687, in Windenburg and Trilling
/// [from memory].
pub fn critical_length_m(mean_diameter_m: f64, t_m: f64) -> f64 {
    1.11 * mean_diameter_m * (mean_diameter_m / t_m).sqrt()
}

/// Elastic collapse of a cylinder of any length: the greater of [`long_cylinder_pa`] and
/// [`short_cylinder_pa`], since a finite length only stiffens.
///
/// They cross at 1.18 D √(D/t), a little beyond [`critical_length_m`], where both are
/// below von Mises' figure. Rises with t; falls with D; falls, or stays, with L.
/// An unlimited length may be given as infinity.
pub fn cylinder_pa(e_pa: f64, nu: f64, mean_diameter_m: f64, t_m: f64, length_m: f64) -> f64 {
    long_cylinder_pa(e_pa, nu, mean_diameter_m, t_m).max(short_cylinder_pa(
        e_pa,
        nu,
        mean_diameter_m,
        t_m,
        length_m,
    ))
}

/// Outside pressure at which the bore of a round cylinder yields in the hoop direction,
/// p = σ_y (r_o² − r_i²)/(2 r_o²).
///
/// The hoop stress at the bore is the greatest, and nothing presses on the bore to
/// relieve it (Tresca). For thin walls this is σ_y t/R; von Mises would allow up to 15 %
/// more, [`cylinder::first_yield_pa`], which does not ask on which side the pressure is.
///
/// | symbol   | meaning                | unit |
/// |----------|------------------------|------|
/// | σ_y      | proof strength         | Pa   |
/// | r_i, r_o | inside, outside radius | m    |
///
/// Source: Lamé's stresses.
pub fn cylinder_yield_pa(sy_pa: f64, ri_m: f64, ro_m: f64) -> f64 {
    0.5 * 3f64.sqrt() * cylinder::first_yield_pa(sy_pa, ri_m, ro_m)
}

/// Outside pressure at which an oval tube first yields.
///
/// p² − [σ_y/m + (1 + 6 m n) p_c] p + (σ_y/m) p_c = 0, the smaller root;
/// m = R/t, n = w₀/R
///
/// The pressure makes the oval more oval, by 1/(1 − p/p_c), and bends the wall with
/// M = p R w₀/(1 − p/p_c): σ_y = p R/t + 6 M/t² is the equation above. With r(θ) = R +
/// w₀ cos 2θ the diameters lie between 2 (R − w₀) and 2 (R + w₀), so that the ovality
/// (D_max − D_min)/D is 4 w₀/(2 R) = 2 n.
///
/// | symbol | meaning                                       | unit |
/// |--------|-----------------------------------------------|------|
/// | p_c    | elastic collapse when round, [`cylinder_pa`]  | Pa   |
/// | σ_y    | proof strength                                | Pa   |
/// | R      | mean radius                                   | m    |
/// | t      | least wall thickness                          | m    |
/// | w₀     | greatest deviation of the radius              | m    |
/// | 2 n    | `out_of_round`, (D_max − D_min)/D nominal     | –    |
///
/// For n = 0 it is the lesser of p_c and σ_y t/R. The root is taken as 2c/(b + √…), and
/// b² − 4c as a sum of terms that are never negative, so that no digits cancel.
/// Valid: thin wall, small ovality (some per cent). With a short tube's p_c, which
/// belongs to more than two lobes, the growth of the oval is overestimated.
/// For thick walls take the lesser of this and [`cylinder_yield_pa`].
/// Source: Timoshenko and Gere, Theory of Elastic Stability, section 7.5 [from memory];
/// derivation above.
pub fn cylinder_out_of_round_pa(
    elastic_pa: f64,
    sy_pa: f64,
    mean_radius_m: f64,
    t_m: f64,
    out_of_round: f64,
) -> f64 {
    let m = mean_radius_m / t_m;
    let squash = sy_pa / m;
    let growth = 6.0 * m * (0.5 * out_of_round) * elastic_pa;
    let sum = squash + elastic_pa + growth;
    let root = ((squash - elastic_pa).powi(2) + growth * (2.0 * (squash + elastic_pa) + growth))
        .max(0.0)
        .sqrt();
    2.0 * squash * elastic_pa / (sum + root)
}

/// Share of the classical pressure at which real spheres collapse; tests and codes lie
/// between 0.14 and 0.25 [from memory].
///
/// ASME BPVC VIII-1, UG-28(d) allows 0.0625 E (t/R)² [the factor A = 0.125/(R_o/t) as
/// printed in several guides], a quarter of what this share gives with ν = 0.3 and 3 %
/// more: on a sphere a design factor of 4, not 3, meets the code.
pub const SPHERE_KNOCK_DOWN: f64 = 0.2;

/// Collapse of a sphere or a dished crown.
///
/// p_c = 0.2 · 2 E (t/R)²/√(3 (1 − ν²))
///
/// | symbol | meaning                  | unit  |
/// |--------|--------------------------|-------|
/// | E, ν   | modulus, Poisson's ratio | Pa, – |
/// | R      | mean radius              | m     |
/// | t      | least wall thickness     | m     |
///
/// The small share, [`SPHERE_KNOCK_DOWN`], is for dents no deeper than codes tolerate.
/// Source: R. Zoelly, 1915, in Timoshenko and Gere, section 11.13 [from memory].
pub fn sphere_pa(e_pa: f64, nu: f64, mean_radius_m: f64, t_m: f64) -> f64 {
    let classical = 2.0 * e_pa * (t_m / mean_radius_m).powi(2) / (3.0 * (1.0 - nu * nu)).sqrt();
    SPHERE_KNOCK_DOWN * classical
}

/// Outside pressure at which a thin sphere yields, p = 2 σ_y t/R.
///
/// Symbols as in [`sphere_pa`], σ_y the proof strength, Pa. For thick walls
/// [`sphere::first_yield_pa`] holds, on whichever side the pressure is.
pub fn sphere_yield_pa(sy_pa: f64, mean_radius_m: f64, t_m: f64) -> f64 {
    sy_pa / sphere::thin_stress_pa(1.0, 2.0 * mean_radius_m, t_m)
}

/// Radius of the sphere that collapses like a dished end.
///
/// hemisphere D/2; 2:1 ellipsoid 0.9 D; torisphere its crown radius, here D
///
/// | symbol | meaning              | unit |
/// |--------|----------------------|------|
/// | D      | outside diameter     | m    |
///
/// Valid: pressure on the domed side. The knuckle is in tension then; the crown governs.
/// Source: ASME BPVC VIII-1, UG-33(a) to (e), K_o = 0.9 [from memory].
pub fn dished_radius_m(form: DishedForm, outside_diameter_m: f64) -> f64 {
    outside_diameter_m
        * match form {
            DishedForm::Hemispherical => 0.5,
            DishedForm::TwoToOneEllipsoidal => 0.9,
            DishedForm::Torispherical => 1.0,
        }
}

/// The cylinder that collapses like a cone.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct EquivalentCylinder {
    pub diameter_m: f64,
    pub length_m: f64,
    pub t_m: f64,
}

/// The cylinder that collapses like a cone, by its wide end.
///
/// t_e = t cos α,  L_e = (L/2)(1 + D_s/D_L),  D_e = D_L
///
/// | symbol   | meaning                                  | unit   |
/// |----------|------------------------------------------|--------|
/// | t        | least wall thickness                     | m      |
/// | α        | half-angle, at most 60                   | degree |
/// | L        | length along the axis                    | m      |
/// | D_s, D_L | diameter at the small and the large end  | m      |
///
/// Valid: α ≤ 60°; a flatter one is a flat end. Both ends must be held round.
/// Source: ASME BPVC VIII-1, UG-33(f), with outside diameters [from memory].
pub fn cone_as_cylinder(
    first_diameter_m: f64,
    second_diameter_m: f64,
    length_m: f64,
    t_m: f64,
    half_angle_degrees: f64,
) -> EquivalentCylinder {
    let large = first_diameter_m.max(second_diameter_m);
    let small = first_diameter_m.min(second_diameter_m);
    EquivalentCylinder {
        diameter_m: large,
        length_m: 0.5 * length_m * (1.0 + small / large),
        t_m: t_m * half_angle_degrees.to_radians().cos(),
    }
}

#[cfg(test)]
#[path = "collapse_tests.rs"]
mod tests;
