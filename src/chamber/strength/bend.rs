//! Bent tubes: what a bend leaves of the straight tube's pressure.

/// Stress at the inside of a bend (intrados) over that of the straight tube.
///
/// I = (4 R/D − 1)/(4 R/D − 2)
///
/// Membrane of a torus: the part of it between the inside of the bend and the crown is
/// held up by the hoop force at the inside alone, N·2π(R − r) = p π [R² − (R − r)²],
/// which with r = D/2 is I times p r.
///
/// | symbol | meaning                   | unit |
/// |--------|---------------------------|------|
/// | D      | outside diameter          | m    |
/// | R      | radius of the centre line | m    |
///
/// Valid: R > D/2, thin wall, section still round.
/// Source: ASME B31.3, 304.2.1, eq. 3d [from memory]; derivation above.
pub fn intrados_factor(outside_diameter_m: f64, bend_radius_m: f64) -> f64 {
    let x = 4.0 * bend_radius_m / outside_diameter_m;
    (x - 1.0) / (x - 2.0)
}

/// Stress at the outside of a bend (extrados) over that of the straight tube, at equal
/// wall thickness: I = (4 R/D + 1)/(4 R/D + 2).
///
/// Symbols, validity and source as in [`intrados_factor`], eq. 3e.
pub fn extrados_factor(outside_diameter_m: f64, bend_radius_m: f64) -> f64 {
    let x = 4.0 * bend_radius_m / outside_diameter_m;
    (x + 1.0) / (x + 2.0)
}

/// Wall left at the outside of a bend, over that before bending: R/(R + D/2).
///
/// The outside fibre is stretched by D/(2 R) and gives it all from its thickness, with
/// the neutral fibre in the middle. Symbols as in [`intrados_factor`].
/// Source: common practice, no source.
pub fn extrados_wall(outside_diameter_m: f64, bend_radius_m: f64) -> f64 {
    bend_radius_m / (bend_radius_m + 0.5 * outside_diameter_m)
}

/// Pressure that a bent tube bears over that of the straight one, by any stress.
///
/// The least over inside, side and outside of the bend of (t′/t)/I, the inside with
/// its full wall (it thickens, which is not counted), the side as the straight tube, the
/// outside with [`extrados_wall`]. The inside governs always:
/// (4 R/D − 2)/(4 R/D − 1) against 4 R/D/(4 R/D + 1).
///
/// None where R ≤ D/2: there is no such bend. Symbols as in [`intrados_factor`].
/// Valid: thin wall, no wrinkles, ovality of some per cent. Not for pressure from
/// outside, under which the bend's ovality counts.
pub fn pressure_factor(outside_diameter_m: f64, bend_radius_m: f64) -> Option<f64> {
    let wall = extrados_wall(outside_diameter_m, bend_radius_m);
    pressure_factor_with_wall(outside_diameter_m, bend_radius_m, wall)
}

/// [`pressure_factor`] with a measured wall at the outside of the bend, as a share of
/// that before bending; a bend much thinned there may be governed by it.
pub fn pressure_factor_with_wall(
    outside_diameter_m: f64,
    bend_radius_m: f64,
    wall: f64,
) -> Option<f64> {
    if bend_radius_m <= 0.5 * outside_diameter_m {
        return None;
    }
    let intrados = 1.0 / intrados_factor(outside_diameter_m, bend_radius_m);
    let extrados = wall / extrados_factor(outside_diameter_m, bend_radius_m);
    Some(intrados.min(extrados).min(1.0))
}

#[cfg(test)]
mod tests {
    use super::*;
    use std::f64::consts::PI;

    fn close(got: f64, expected: f64, digit: f64) {
        assert!((got - expected).abs() <= 0.5 * digit, "{got} {expected}");
    }

    /// Pressure on the torus from the crown to one side, summed ring by ring along its
    /// surface, against the hoop force at that side; `side` is −1 inside, 1 outside.
    fn hoop_over_straight(d: f64, bend: f64, side: f64) -> f64 {
        let (r, steps) = (0.5 * d, 20_000);
        let mut upward = 0.0;
        for i in 0..steps {
            let angle = 0.5 * PI * (f64::from(i) + 0.5) / f64::from(steps);
            let along = bend + side * r * angle.sin(); // distance from the torus' axis
            let strip = 2.0 * PI * along * r * 0.5 * PI / f64::from(steps);
            upward += angle.cos() * strip;
        }
        upward / (2.0 * PI * (bend + side * r)) / r
    }

    #[test]
    fn factors_are_those_of_a_torus_in_equilibrium() {
        for x in [0.6, 1.0, 1.5, 3.0, 10.0] {
            let (inside, outside) = (
                hoop_over_straight(2.0, 2.0 * x, -1.0),
                hoop_over_straight(2.0, 2.0 * x, 1.0),
            );
            close(intrados_factor(2.0, 2.0 * x), inside, 1e-7);
            close(extrados_factor(2.0, 2.0 * x), outside, 1e-7);
        }
    }

    /// R = 1.5 D: intrados 1.25, extrados 0.875, as tables for elbows give them.
    #[test]
    fn elbow_of_one_and_a_half() {
        close(intrados_factor(1.0, 1.5), 1.25, 1e-12);
        close(extrados_factor(1.0, 1.5), 0.875, 1e-12);
        close(extrados_wall(1.0, 1.5), 0.75, 1e-12);
        close(pressure_factor(1.0, 1.5).unwrap(), 0.8, 1e-12);
    }

    #[test]
    fn wide_bends_are_straight_and_the_inside_governs() {
        let mut before = 0.0;
        for i in 1..2000 {
            let bend = 0.5 + 0.01 * f64::from(i);
            let now = pressure_factor(1.0, bend).unwrap();
            close(now, 1.0 / intrados_factor(1.0, bend), 1e-12);
            assert!(now > before && now < 1.0);
            before = now;
        }
        close(pressure_factor(1.0, 1e9).unwrap(), 1.0, 1e-6);
        assert_eq!(pressure_factor(1.0, 0.5), None);
        assert_eq!(pressure_factor(1.0, 0.3), None);
    }

    #[test]
    fn a_measured_thin_outside_governs() {
        let (d, bend) = (1.0, 3.0);
        close(
            pressure_factor_with_wall(d, bend, 0.6).unwrap(),
            0.6 * 14.0 / 13.0,
            1e-12,
        );
        assert!(pressure_factor_with_wall(d, bend, 1.0) == pressure_factor(d, bend));
    }
}
