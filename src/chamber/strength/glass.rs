//! Glass: pressure by permissible tensile stress. There is no burst number.

use super::{cylinder, sphere};

/// Pressure of a glass tube by its permissible stress.
///
/// p = 2 t (K/S) / (D_o − t)
///
/// | symbol | meaning                       | unit |
/// |--------|-------------------------------|------|
/// | K/S    | permissible tensile stress    | Pa   |
/// | D_o    | outside diameter              | m    |
/// | t      | least wall thickness          | m    |
///
/// (In the standard's units p in bar is 20 t (K/S)/(D_o − t).)
/// Valid: thin tubes; see [`tube_pa`] for thick ones.
/// Source: EN 1595, as printed in two makers' technical data.
pub fn en_1595_tube_pa(permissible_pa: f64, outside_diameter_m: f64, t_m: f64) -> f64 {
    2.0 * t_m * permissible_pa / (outside_diameter_m - t_m)
}

/// Least wall of a glass tube for a pressure, t = D_o p / (2 K/S + p).
///
/// Symbols and source as in [`en_1595_tube_pa`], solved for t.
pub fn en_1595_thickness_m(permissible_pa: f64, outside_diameter_m: f64, p_pa: f64) -> f64 {
    outside_diameter_m * p_pa / (2.0 * permissible_pa + p_pa)
}

/// Pressure of a glass tube of any thickness.
///
/// The standard's form up to p = 0.385 K/S (D_o/D_i about 1.48), where it is 4 % above
/// Lamé's bore stress; no more than that until Lamé allows more, then Lamé. A capillary
/// would bear half again too much by the standard's form alone.
///
/// Source: own, from [`en_1595_tube_pa`] and [`cylinder::lame`]; 0.385 is the limit of
/// thin forms in ASME BPVC VIII-1, UG-27 [from memory].
pub fn tube_pa(permissible_pa: f64, inside_diameter_m: f64, t_m: f64) -> f64 {
    let ri = 0.5 * inside_diameter_m;
    let thin = en_1595_tube_pa(permissible_pa, inside_diameter_m + 2.0 * t_m, t_m);
    let thick = permissible_pa / cylinder::lame(1.0, ri, ri + t_m).hoop_inside_pa;
    thin.min(thick.max(0.385 * permissible_pa))
}

/// Pressure of a glass bulb: the lower of p = 4 t (K/S)/D_m and Lamé's.
///
/// Symbols as in [`en_1595_tube_pa`], D_m = D_i + t the mean diameter.
/// Source: by analogy with the tube of EN 1595; [`sphere::lame_hoop_inside_pa`].
pub fn sphere_pa(permissible_pa: f64, inside_diameter_m: f64, t_m: f64) -> f64 {
    let ri = 0.5 * inside_diameter_m;
    let thin = 4.0 * t_m * permissible_pa / (inside_diameter_m + t_m);
    thin.min(permissible_pa / sphere::lame_hoop_inside_pa(1.0, ri, ri + t_m))
}

#[cfg(test)]
mod tests {
    use super::*;

    fn close(got: f64, expected: f64, digit: f64) {
        assert!((got - expected).abs() <= 0.5 * digit, "{got} {expected}");
    }

    /// K/S = 7 N/mm². Source: EN 1595 form in two makers' technical data.
    #[test]
    fn en_1595_pressures_and_thickness() {
        close(10.0 * en_1595_tube_pa(7.0, 10.0, 1.0), 15.56, 0.01);
        close(10.0 * en_1595_tube_pa(7.0, 30.0, 1.2), 5.83, 0.01);
        close(en_1595_thickness_m(7.0, 30.0, 0.5), 1.034, 0.001);
        // The makers' own form, t = D p/(140 + p) with p in bar.
        close(
            en_1595_thickness_m(7.0, 30.0, 0.5),
            30.0 * 5.0 / 145.0,
            1e-12,
        );
        close(
            tube_pa(7.0, 8.0, 1.0),
            en_1595_tube_pa(7.0, 10.0, 1.0),
            1e-12,
        );
    }

    /// Bulb 30 × 0.8 mm at 5 bar: 4.56 MPa; calculated for methods.md, E8.
    #[test]
    fn bulb() {
        close(0.5 / sphere_pa(1.0, 28.4, 0.8), 4.56, 0.01);
    }

    #[test]
    fn thickness_never_lowers_the_pressure_and_lame_holds_capillaries() {
        let mut before = (0.0, 0.0);
        for i in 1..2000 {
            let t = f64::from(i) * 0.005;
            let now = (tube_pa(1.0, 1.0, t), sphere_pa(1.0, 1.0, t));
            assert!(now.0 >= before.0 && now.1 > before.1, "{t}");
            let lame = 1.0 / cylinder::lame(1.0, 0.5, 0.5 + t).hoop_inside_pa;
            assert!(now.0 <= 1.04 * lame, "{t}");
            before = now;
        }
        close(tube_pa(1.0, 1.0, 3.0), 48.0 / 50.0, 1e-12);
    }
}
