//! Flat ends and the faces of boxes: bending stress and deflection.

use super::super::shape::PlateEdge;

/// Greatest bending stress of a circular plate under even pressure.
///
/// clamped: σ = 0.75 q a²/t², at the rim
/// simply supported: σ = (3/8)(3 + ν) q a²/t², in the middle
///
/// | symbol | meaning              | unit |
/// |--------|----------------------|------|
/// | q      | inside minus outside | Pa   |
/// | a      | radius of the plate  | m    |
/// | t      | thickness            | m    |
/// | ν      | Poisson's ratio      | –    |
///
/// Valid: deflection below t/2; beyond it the stress is overestimated.
/// Source: Roark's Formulas for Stress and Strain, table 11.2 [from memory].
pub fn circular_stress_pa(q_pa: f64, a_m: f64, t_m: f64, nu: f64, edge: PlateEdge) -> f64 {
    let factor = match edge {
        PlateEdge::Clamped => 0.75,
        PlateEdge::SimplySupported => 0.375 * (3.0 + nu),
    };
    factor * q_pa * (a_m / t_m).powi(2)
}

/// Deflection in the middle of a circular plate.
///
/// clamped: w = q a⁴/(64 D); simply supported: (5 + ν)/(1 + ν) times that;
/// D = E t³/(12 (1 − ν²))
///
/// Symbols as in [`circular_stress_pa`], E the modulus, Pa. Source: the same.
pub fn circular_deflection_m(
    q_pa: f64,
    a_m: f64,
    t_m: f64,
    modulus_pa: f64,
    nu: f64,
    edge: PlateEdge,
) -> f64 {
    let stiffness = modulus_pa * t_m.powi(3) / (12.0 * (1.0 - nu * nu));
    let clamped = q_pa * a_m.powi(4) / (64.0 * stiffness);
    match edge {
        PlateEdge::Clamped => clamped,
        PlateEdge::SimplySupported => (5.0 + nu) / (1.0 + nu) * clamped,
    }
}

/// Attachment factor of the code form for flat ends, the highest of usual ones.
pub const FLAT_END_C: f64 = 0.33;

/// Code-form pressure of a flat end, p = S E t²/(C d²).
///
/// | symbol | meaning                             | unit |
/// |--------|-------------------------------------|------|
/// | S E    | allowable stress × joint efficiency | Pa   |
/// | d      | inside diameter                     | m    |
/// | t      | least thickness                     | m    |
/// | C      | attachment, 0.17 to 0.33            | –    |
///
/// Source: ASME BPVC VIII-1, UG-34 [from memory].
pub fn flat_end_code_form_pa(s_pa: f64, inside_diameter_m: f64, t_m: f64) -> f64 {
    s_pa / FLAT_END_C * (t_m / inside_diameter_m).powi(2)
}

/// Greatest bending stress of a rectangular plate, σ = β q b²/t², ν = 0.3.
///
/// | symbol | meaning                              | unit |
/// |--------|--------------------------------------|------|
/// | q      | inside minus outside                 | Pa   |
/// | b, a   | shorter, longer side (in any order)  | m    |
/// | t      | thickness                            | m    |
/// | β      | of b/a, from the tables below        | –    |
///
/// Between the printed points β is not interpolated but bounded from above.
/// Valid: deflection below t/2; beyond it the stress is overestimated.
/// Source: Roark's Formulas for Stress and Strain, table 11.4, cases 1a and 8a;
/// Timoshenko and Woinowsky-Krieger, Theory of Plates and Shells [from memory].
pub fn rectangular_stress_pa(
    q_pa: f64,
    side_m: f64,
    other_side_m: f64,
    t_m: f64,
    edge: PlateEdge,
) -> f64 {
    let (b, a) = (side_m.min(other_side_m), side_m.max(other_side_m));
    let table = match edge {
        PlateEdge::Clamped => CLAMPED,
        PlateEdge::SimplySupported => SUPPORTED,
    };
    bounded_above(table, b / a) * q_pa * (b / t_m).powi(2)
}

/// Deflection in the middle of a square plate, w = 0.0138 q b⁴/(E t³) clamped,
/// 0.0444 simply supported; ν = 0.3.
///
/// Symbols and source as in [`rectangular_stress_pa`], E the modulus, Pa.
pub fn square_deflection_m(
    q_pa: f64,
    side_m: f64,
    t_m: f64,
    modulus_pa: f64,
    edge: PlateEdge,
) -> f64 {
    let factor = match edge {
        PlateEdge::Clamped => 0.0138,
        PlateEdge::SimplySupported => 0.0444,
    };
    factor * q_pa * side_m.powi(4) / (modulus_pa * t_m.powi(3))
}

/// β over b/a of a plate clamped on four sides, stress at the long edge.
const CLAMPED: &[(f64, f64)] = &[
    (0.0, 0.5),
    (1.0 / 2.0, 0.4974),
    (1.0 / 1.8, 0.4872),
    (1.0 / 1.6, 0.4680),
    (1.0 / 1.4, 0.4356),
    (1.0 / 1.2, 0.3834),
    (1.0, 0.3078),
];

/// β over b/a of a plate simply supported on four sides, stress in the middle.
const SUPPORTED: &[(f64, f64)] = &[
    (0.0, 0.75),
    (1.0 / 5.0, 0.7476),
    (1.0 / 4.0, 0.7410),
    (1.0 / 3.0, 0.7134),
    (1.0 / 2.0, 0.6102),
    (1.0 / 1.8, 0.5688),
    (1.0 / 1.6, 0.5172),
    (1.0 / 1.4, 0.4530),
    (1.0 / 1.2, 0.3762),
    (1.0, 0.2874),
];

/// A bound from above on a smooth curve, from points on it. Where the curve bends
/// upward the straight line between two points lies above it; where it bends downward
/// the chords of the neighbouring spans, drawn on, do. In the last span, where no chord
/// follows, the straight line is taken: it is low by 0.1 % at most.
fn bounded_above(points: &[(f64, f64)], x: f64) -> f64 {
    let chord = |i: usize| {
        let ((x0, y0), (x1, y1)) = (points[i], points[i + 1]);
        y0 + (y1 - y0) * (x - x0) / (x1 - x0)
    };
    let spans = points.len() - 1;
    let span = points[1..spans].partition_point(|(end, _)| *end < x);
    if span + 1 == spans {
        return chord(span);
    }
    // The curve falls, so the point before is above it too.
    let after = chord(span + 1).min(points[span].1);
    let neighbours = if span == 0 {
        after
    } else {
        after.min(chord(span - 1))
    };
    chord(span).max(neighbours)
}

#[cfg(test)]
mod tests {
    use super::*;
    use PlateEdge::{Clamped, SimplySupported};
    use std::f64::consts::PI;

    fn close(got: f64, expected: f64, digit: f64) {
        assert!((got - expected).abs() <= 0.5 * digit, "{got} {expected}");
    }

    /// q = 1 bar, a = 50 mm, t = 3 mm, E = 200 GPa, ν = 0.3; from memory of Roark.
    #[test]
    fn circular_plate() {
        let stress = |edge| circular_stress_pa(0.1, 50.0, 3.0, 0.3, edge);
        close(stress(Clamped), 20.83, 0.01);
        close(stress(SimplySupported), 34.4, 0.1);
        let bend = |edge| circular_deflection_m(0.1, 50.0, 3.0, 200e3, 0.3, edge);
        close(bend(Clamped), 0.0197, 1e-4);
        close(bend(SimplySupported), 0.0805, 1e-4);
    }

    /// 40 × 40 × 1 mm copper at 1 bar, and a pillar cell 6 × 6 × 0.3 mm; from memory of Roark.
    #[test]
    fn square_plate() {
        let stress = |edge| rectangular_stress_pa(0.1, 40.0, 40.0, 1.0, edge);
        // 49.248 and 45.984: methods.md prints three digits.
        close(stress(Clamped), 49.3, 0.11);
        close(stress(SimplySupported), 46.0, 0.1);
        close(
            square_deflection_m(0.1, 40.0, 1.0, 117e3, Clamped),
            0.0302,
            1e-4,
        );
        close(
            square_deflection_m(0.1, 40.0, 1.0, 117e3, SimplySupported),
            0.0971,
            1e-4,
        );
        close(
            rectangular_stress_pa(0.1, 6.0, 6.0, 0.3, Clamped),
            12.3,
            0.1,
        );
    }

    #[test]
    fn printed_ratios_are_met_and_sides_may_be_swapped() {
        for (edge, table) in [(Clamped, CLAMPED), (SimplySupported, SUPPORTED)] {
            for &(ratio, beta) in table.iter().skip(1) {
                let stress = rectangular_stress_pa(1.0, ratio, 1.0, ratio, edge);
                assert!(
                    (stress / beta - 1.0).abs() < 1e-12,
                    "{edge:?} {ratio}: {stress} {beta}"
                );
                assert_eq!(stress, rectangular_stress_pa(1.0, 1.0, ratio, ratio, edge));
            }
        }
    }

    /// Against the double series of Navier for a simply supported plate (1820; in
    /// Timoshenko and Woinowsky-Krieger, section 30), which owes nothing to the table.
    #[test]
    fn supported_plate_bounds_the_exact_series_from_above_and_closely() {
        for i in 2..=100 {
            let ratio = f64::from(i) / 100.0;
            let beta = rectangular_stress_pa(1.0, ratio, 1.0, ratio, SimplySupported);
            let exact = navier_beta(ratio);
            // 0.1 % for the four printed digits and the last span, 1.5 % for the bound.
            assert!(
                (0.999..1.015).contains(&(beta / exact)),
                "{ratio}: {beta} {exact}"
            );
        }
    }

    /// β in the middle of a plate with sides b = ratio, a = 1; ν = 0.3.
    fn navier_beta(ratio: f64) -> f64 {
        let (a, b) = (1.0, ratio);
        let mut moment = 0.0;
        for m in (1..400).step_by(2) {
            for n in (1..400).step_by(2) {
                let (m, n) = (f64::from(m), f64::from(n));
                let sign = ((0.5 * PI * m).sin() * (0.5 * PI * n).sin()).signum();
                let (along, across) = ((m / a).powi(2), (n / b).powi(2));
                let curvature = across + 0.3 * along;
                moment += sign * 16.0 * curvature / (PI.powi(4) * m * n * (along + across).powi(2));
            }
        }
        6.0 * moment / (b * b)
    }

    #[test]
    fn flat_end_code_form_gives_back_its_pressure() {
        // P = 2 MPa, d = 11 mm, S = 41 MPa, C = 0.33: 1.396 mm [from memory of UG-34].
        let t = 11.0 * (FLAT_END_C * 2.0 / 41.0f64).sqrt();
        close(t, 1.396, 1e-3);
        close(flat_end_code_form_pa(41.0, 11.0, t), 2.0, 1e-12);
    }
}
