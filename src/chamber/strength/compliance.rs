//! Elastic growth: how much volume a wall gives per pascal of inside minus outside.
//!
//! Shells give a share of their volume (1/Pa), plates a volume (m³/Pa). A wall that
//! gives way lowers the pressure of a unit full of liquid, which is never counted on; it
//! makes room for vapour, which is: a bound here is one from above.

use std::f64::consts::PI;

use super::super::shape::PlateEdge;
use super::{cylinder, sphere};

/// Relative growth of a thin closed cylinder per pascal, D (5 − 4ν)/(4 E t).
///
/// Twice the hoop strain and once the axial one.
///
/// | symbol | meaning                  | unit  |
/// |--------|--------------------------|-------|
/// | D      | mean diameter            | m     |
/// | E, ν   | modulus, Poisson's ratio | Pa, – |
/// | t      | wall thickness           | m     |
///
/// Valid: elastic, ends left out, length free to grow. Source: any text on elasticity.
pub fn thin_cylinder_per_pa(e_pa: f64, nu: f64, mean_diameter_m: f64, t_m: f64) -> f64 {
    mean_diameter_m * (5.0 - 4.0 * nu) / (4.0 * e_pa * t_m)
}

/// Relative growth of a thin sphere per pascal, 3 D (1 − ν)/(4 E t).
///
/// Symbols and source as in [`thin_cylinder_per_pa`].
pub fn thin_sphere_per_pa(e_pa: f64, nu: f64, mean_diameter_m: f64, t_m: f64) -> f64 {
    3.0 * mean_diameter_m * (1.0 - nu) / (4.0 * e_pa * t_m)
}

/// Relative growth of the bore of a closed cylinder of any thickness per pascal.
///
/// ΔV/V = 2 u/r_i + ε_z,  u/r_i = [σ_θ − ν (σ_r + σ_z)]/E,  ε_z = (1 − 2ν) σ_z/E,
/// with Lamé's stresses at the bore
///
/// | symbol   | meaning                  | unit  |
/// |----------|--------------------------|-------|
/// | u        | growth of the radius     | m     |
/// | r_i, r_o | inside, outside radius   | m     |
/// | E, ν     | modulus, Poisson's ratio | Pa, – |
///
/// Valid: elastic, ends left out. Source: own, from [`cylinder::lame`].
pub fn cylinder_per_pa(e_pa: f64, nu: f64, ri_m: f64, ro_m: f64) -> f64 {
    let stress = cylinder::lame(1.0, ri_m, ro_m);
    let hoop = stress.hoop_inside_pa - nu * (stress.axial_pa - 1.0);
    // σ_θ + σ_r is 2 σ_z at every radius.
    let axial = stress.axial_pa * (1.0 - 2.0 * nu);
    (2.0 * hoop + axial) / e_pa
}

/// Relative growth of the inside of a sphere of any thickness per pascal.
///
/// ΔV/V = 3 u/r_i = 3 [(1 − ν) σ_θ − ν σ_r]/E, with Lamé's stresses at the inside
///
/// Symbols as in [`cylinder_per_pa`]. Source: own, from [`sphere::lame_hoop_inside_pa`].
pub fn sphere_per_pa(e_pa: f64, nu: f64, ri_m: f64, ro_m: f64) -> f64 {
    3.0 * ((1.0 - nu) * sphere::lame_hoop_inside_pa(1.0, ri_m, ro_m) + nu) / e_pa
}

/// Volume swept by a circular plate per pascal.
///
/// clamped: V = π a⁶/(192 K); simply supported: (7 + ν)/(1 + ν) times that;
/// K = E t³/(12 (1 − ν²))
///
/// | symbol | meaning                  | unit  |
/// |--------|--------------------------|-------|
/// | a      | radius of the plate      | m     |
/// | t      | thickness                | m     |
/// | E, ν   | modulus, Poisson's ratio | Pa, – |
///
/// Valid: deflection below t/2; beyond it the plate stiffens and this is too much.
/// Source: own integration of the deflections w = (a² − r²)²/(64 K) and
/// w = (a² − r²)[(5 + ν)/(1 + ν) a² − r²]/(64 K) of Roark, table 11.2 [from memory].
pub fn circular_plate_m3_per_pa(
    e_pa: f64,
    nu: f64,
    radius_m: f64,
    t_m: f64,
    edge: PlateEdge,
) -> f64 {
    let clamped = PI * radius_m.powi(6) / (192.0 * plate_stiffness_n_m(e_pa, nu, t_m));
    match edge {
        PlateEdge::Clamped => clamped,
        PlateEdge::SimplySupported => (7.0 + nu) / (1.0 + nu) * clamped,
    }
}

/// Volume swept by a rectangular plate per pascal.
///
/// clamped: V ≤ a b⁵/(720 K) · (1 − 0.7198 b/a)
///
/// A long plate is a clamped strip but for its ends, which take as much away as
/// 0.737 b of length; a square is held by less. With 0.7198 the square's own figure, the
/// line is a bound from above, at most 4 % too much.
///
/// simply supported: V = (8 a b⁵/(π⁶ K)) Σ f(n π a/(2 b))/n⁶, n = 1, 3 … 9,
/// f(α) = (3/2)(1 − tanh α/α) − (1/2) tanh² α
///
/// | symbol | meaning                             | unit |
/// |--------|-------------------------------------|------|
/// | b, a   | shorter, longer side (in any order) | m    |
/// | K      | as in [`circular_plate_m3_per_pa`]  | N m  |
///
/// Valid: as there. Source: own; clamped by Ritz' method (repeated below), supported by
/// integration of M. Lévy's series (Timoshenko and Woinowsky-Krieger, section 30
/// [from memory]).
pub fn rectangular_plate_m3_per_pa(
    e_pa: f64,
    nu: f64,
    side_m: f64,
    other_side_m: f64,
    t_m: f64,
    edge: PlateEdge,
) -> f64 {
    let (b, a) = (side_m.min(other_side_m), side_m.max(other_side_m));
    let factor = match edge {
        PlateEdge::Clamped => (1.0 - 0.7198 * b / a) / 720.0,
        PlateEdge::SimplySupported => {
            let terms = [1.0, 3.0, 5.0, 7.0, 9.0].map(|n: f64| {
                let alpha = 0.5 * n * PI * a / b;
                let tanh = alpha.tanh();
                (1.5 * (1.0 - tanh / alpha) - 0.5 * tanh * tanh) / n.powi(6)
            });
            8.0 / PI.powi(6) * terms.iter().sum::<f64>()
        }
    };
    factor * a * b.powi(5) / plate_stiffness_n_m(e_pa, nu, t_m)
}

/// Bending stiffness of a plate per width, K = E t³/(12 (1 − ν²)), N m.
fn plate_stiffness_n_m(e_pa: f64, nu: f64, t_m: f64) -> f64 {
    e_pa * t_m.powi(3) / (12.0 * (1.0 - nu * nu))
}

#[cfg(test)]
#[path = "compliance_tests.rs"]
mod tests;
