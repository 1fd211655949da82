//! Flattened tubes: two flat sides joined by two half circles.

use std::f64::consts::PI;

/// Elastic stresses of a flattened tube, tension positive, each the greatest over the
/// thickness at its place.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct FlattenedStresses {
    /// In the middle of a flat side, at its outer face.
    pub mid_side_pa: f64,
    /// Where flat and half circle meet.
    pub junction_pa: f64,
    /// In the middle of a half circle, at its inner face.
    pub edge_pa: f64,
}

impl FlattenedStresses {
    /// Always the middle of the side or of the half circle: between them the stress of
    /// either face runs from one to the other without a peak.
    pub fn worst_pa(&self) -> f64 {
        [self.junction_pa, self.edge_pa]
            .into_iter()
            .fold(self.mid_side_pa, |worst, stress| {
                if stress.abs() > worst.abs() {
                    stress
                } else {
                    worst
                }
            })
    }
}

/// Moments around a quarter of the section, per length of tube; positive stretches the
/// outer face.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct FlattenedMoments {
    pub mid_side_n: f64,
    pub junction_n: f64,
    pub edge_n: f64,
}

/// Bending moments per length of a flattened tube.
///
/// The section is a closed frame, cut in the middle of a flat side, where for symmetry
/// there are a pull p R, a moment M₀ and no shear, and in the middle of a half circle.
/// By equilibrium
///
/// flat: M = M₀ − p x²/2;  half circle: M = M₀ − p a²/8 − (p a R/2) sin θ
///
/// Neither end of the quarter turns, so that ∫M ds = 0 (Castigliano, ∂U/∂M₀ = 0):
///
/// M₀ = p a (a²/24 + π a R/8 + R²)/(a + π R)
/// M_j = p a (R² − a²/12)/(a + π R)
/// M_e = −p a (a²/12 + a R/2 + (π/2 − 1) R²)/(a + π R)
///
/// | symbol        | meaning                                           | unit |
/// |---------------|---------------------------------------------------|------|
/// | p             | inside minus outside                              | Pa   |
/// | a             | width of the flat side, inside width − height     | m    |
/// | R             | mean radius of the half circle, (height + t)/2    | m    |
/// | x, θ          | from the middle of the side, from the junction    | m, – |
/// | M₀, M_j, M_e  | moment in mid side, at the junction, in mid circle| N    |
///
/// Pressure that acts on the bore instead of the mean line gives the same moments.
/// Valid: thin wall (R/t > 3 or so), small deflection, away from the ends, which stiffen.
/// Source: own, Castigliano's theorem; checked below against a stepwise solution.
pub fn moments(p_pa: f64, flat_m: f64, mean_radius_m: f64) -> FlattenedMoments {
    let (a, r) = (flat_m, mean_radius_m);
    let per = p_pa * a / (a + PI * r);
    FlattenedMoments {
        mid_side_n: per * (a * a / 24.0 + PI * a * r / 8.0 + r * r),
        junction_n: per * (r * r - a * a / 12.0),
        edge_n: -per * (a * a / 12.0 + 0.5 * a * r + (0.5 * PI - 1.0) * r * r),
    }
}

/// Greatest elastic stresses of a flattened tube.
///
/// σ = N/t + k 6 |M|/t²;  N = p R in the side and at the junction, p (R + a/2) in the
/// middle of the half circle
///
/// k = 1, but where the inner face of the half circle is stretched its curvature raises
/// the stress there (Winkler): with u = t/(2R) and g = 1 − u/artanh u,
/// k = u (u − g)/(3 g (1 − u)), about 1 + t/(3 R).
///
/// | symbol    | meaning                                     | unit |
/// |-----------|---------------------------------------------|------|
/// | p         | inside minus outside                        | Pa   |
/// | w, h      | inside width, inside height, w ≥ h          | m    |
/// | t         | least wall thickness                        | m    |
/// | a, R, M   | as in [`moments`]; a = w − h, R = (h + t)/2 | m, N |
///
/// The pulls are those on the mean line: for w = h the stress is the round tube's by
/// mean diameter, and no bending. Linear in p; under pressure from outside the same
/// stress with the other sign (the flat sides may buckle before). The pressure itself,
/// which presses on the inner face, is not added (Tresca would). Given sides in the wrong
/// order are swapped.
/// Valid: deflection of the flat side below t/2; beyond it the stress is overestimated.
/// Source: own, see [`moments`]; E. Winkler's curved beam, in any text on strength.
pub fn stresses(
    p_pa: f64,
    inside_width_m: f64,
    inside_height_m: f64,
    t_m: f64,
) -> FlattenedStresses {
    let height = inside_width_m.min(inside_height_m);
    let flat = inside_width_m.max(inside_height_m) - height;
    let radius = 0.5 * (height + t_m);
    let moment = moments(p_pa, flat, radius);
    let curvature = curved_inner_face(t_m / (2.0 * radius));
    let stress = |pull: f64, moment: f64, raised: f64| {
        p_pa.signum() * (pull.abs() / t_m + raised * 6.0 * moment.abs() / (t_m * t_m))
    };
    let inner = |moment: f64| if moment * p_pa < 0.0 { curvature } else { 1.0 };
    FlattenedStresses {
        mid_side_pa: stress(p_pa * radius, moment.mid_side_n, 1.0),
        junction_pa: stress(p_pa * radius, moment.junction_n, inner(moment.junction_n)),
        edge_pa: stress(
            p_pa * (radius + 0.5 * flat),
            moment.edge_n,
            inner(moment.edge_n),
        ),
    }
}

/// k of [`stresses`], from u = t/(2R) below 1.
fn curved_inner_face(u: f64) -> f64 {
    let g = if u < 0.01 {
        // The difference loses its digits; its series does not.
        u * u * (1.0 / 3.0 + 4.0 / 45.0 * u * u)
    } else {
        1.0 - u / u.atanh()
    };
    u * (u - g) / (3.0 * g * (1.0 - u))
}

#[cfg(test)]
#[path = "obround_tests.rs"]
mod tests;
