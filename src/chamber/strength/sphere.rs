//! Bulbs and hemispherical ends: stresses, yield, burst and the code form.

/// Stress of a thin sphere on its mean diameter, σ = p D_m / (4 t).
///
/// | symbol | meaning                | unit |
/// |--------|------------------------|------|
/// | p      | inside minus outside   | Pa   |
/// | D_m    | mean diameter, D_i + t | m    |
/// | t      | wall thickness         | m    |
///
/// Valid: D_o/t > 20 to some per cent. Source: elementary strength of materials.
pub fn thin_stress_pa(p_pa: f64, mean_diameter_m: f64, t_m: f64) -> f64 {
    p_pa * mean_diameter_m / (4.0 * t_m)
}

/// Elastic hoop stress at the inside of a thick sphere.
///
/// σ_θ(r_i) = p (r_o³ + 2 r_i³) / (2 (r_o³ − r_i³))
///
/// | symbol   | meaning                | unit |
/// |----------|------------------------|------|
/// | p        | inside minus outside   | Pa   |
/// | r_i, r_o | inside, outside radius | m    |
///
/// Source: G. Lamé, Leçons sur la théorie de l'élasticité, 1852; in any text on elasticity.
pub fn lame_hoop_inside_pa(p_pa: f64, ri_m: f64, ro_m: f64) -> f64 {
    let (ri3, ro3) = (ri_m.powi(3), ro_m.powi(3));
    p_pa * (ro3 + 2.0 * ri3) / (2.0 * (ro3 - ri3))
}

/// Pressure at which the inside of a sphere first yields.
///
/// p = (2/3) σ_y (1 − (r_i/r_o)³)
///
/// Symbols as in [`lame_hoop_inside_pa`], σ_y the proof strength, Pa (von Mises and
/// Tresca agree on a sphere). Source: Lamé's stresses.
pub fn first_yield_pa(sy_pa: f64, ri_m: f64, ro_m: f64) -> f64 {
    2.0 / 3.0 * sy_pa * (1.0 - (ri_m / ro_m).powi(3))
}

/// Pressure at which the whole wall of a sphere has yielded, p = 2 σ_y ln(r_o/r_i).
///
/// Symbols as in [`first_yield_pa`]. Valid: no hardening.
/// Source: Hill, The Mathematical Theory of Plasticity, 1950 [from memory].
pub fn full_plastic_pa(sy_pa: f64, ri_m: f64, ro_m: f64) -> f64 {
    2.0 * sy_pa * (ro_m / ri_m).ln()
}

/// Burst pressure of a ductile sphere, p_b = 2 σ_y ln(r_o/r_i) · (2 − σ_y/σ_u).
///
/// Symbols as in [`super::cylinder::faupel_burst_pa`], whose allowance for hardening
/// is taken over by analogy.
pub fn plastic_burst_pa(sy_pa: f64, su_pa: f64, ri_m: f64, ro_m: f64) -> f64 {
    full_plastic_pa(sy_pa, ri_m, ro_m) * (2.0 - sy_pa / su_pa)
}

/// Burst pressure by tensile strength on the mean diameter, p_b = 4 t σ_u / D_m.
///
/// The lower of this and [`plastic_burst_pa`] is taken.
/// Source: mean-diameter formula, common practice.
pub fn tensile_burst_pa(su_pa: f64, mean_diameter_m: f64, t_m: f64) -> f64 {
    4.0 * t_m * su_pa / mean_diameter_m
}

/// Code-form pressure of a sphere or hemispherical end.
///
/// p = 2 S E t / (R + 0.2 t)                        t ≤ 0.356 R
/// p = 2 S E (Y − 1)/(Y + 2),  Y = ((R + t)/R)³     above
///
/// | symbol | meaning                             | unit |
/// |--------|-------------------------------------|------|
/// | S E    | allowable stress × joint efficiency | Pa   |
/// | R      | inside radius                       | m    |
/// | t      | least wall thickness                | m    |
///
/// The lower of the two is taken above 0.356 R.
/// Source: ASME BPVC VIII-1, UG-27(d), UG-32(e) and appendix 1-3 [from memory].
pub fn code_form_pa(s_pa: f64, inside_radius_m: f64, t_m: f64) -> f64 {
    let thin = 2.0 * s_pa * t_m / (inside_radius_m + 0.2 * t_m);
    if t_m <= 0.356 * inside_radius_m {
        return thin;
    }
    let y = ((inside_radius_m + t_m) / inside_radius_m).powi(3);
    thin.min(2.0 * s_pa * (y - 1.0) / (y + 2.0))
}

#[cfg(test)]
mod tests {
    use super::*;

    fn close(got: f64, expected: f64, digit: f64) {
        assert!((got - expected).abs() <= 0.5 * digit, "{got} {expected}");
    }

    /// Textbook case r_i = 100, r_o = 200, p = 100 MPa [from memory of texts on elasticity].
    #[test]
    fn lame_textbook_case() {
        close(lame_hoop_inside_pa(100.0, 100.0, 200.0), 71.43, 0.01);
        // Tresca at the bore: hoop plus pressure is the proof strength.
        let equivalent = lame_hoop_inside_pa(100.0, 100.0, 200.0) + 100.0;
        close(first_yield_pa(equivalent, 100.0, 200.0), 100.0, 1e-9);
    }

    #[test]
    fn thin_and_thick_forms_meet_where_the_wall_is_thin() {
        let (ri, t) = (100.0, 0.01);
        let thin = 1.0 / thin_stress_pa(1.0, 2.0 * ri + t, t);
        for p in [
            1.0 / lame_hoop_inside_pa(1.0, ri, ri + t),
            first_yield_pa(1.0, ri, ri + t),
            full_plastic_pa(1.0, ri, ri + t),
            plastic_burst_pa(1.0, 1.0, ri, ri + t),
            tensile_burst_pa(1.0, 2.0 * ri + t, t),
            code_form_pa(1.0, ri, t),
        ] {
            assert!((p / thin - 1.0).abs() < 2e-4, "{p} {thin}");
        }
    }

    /// P = 2 MPa, R = 5.5 mm, S = 41 MPa; form from memory of ASME VIII-1 UG-27(d).
    #[test]
    fn code_form_gives_back_its_pressure() {
        let t = 2.0 * 5.5 / (2.0 * 41.0 - 0.2 * 2.0);
        close(t, 0.1348, 1e-4);
        close(code_form_pa(41.0, 5.5, t), 2.0, 1e-12);
        let (below, above) = (
            code_form_pa(1.0, 1.0, 0.356),
            code_form_pa(1.0, 1.0, 0.356_001),
        );
        assert!((below - above).abs() < 2e-4, "{below} {above}");
    }
}
