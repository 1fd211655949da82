//! Tubes: stresses, yield, burst and the code forms.

/// Hoop stress of a thin cylinder on its mean diameter; the axial one is half.
///
/// σ = p D_m / (2 t)
///
/// | symbol | meaning                | unit |
/// |--------|------------------------|------|
/// | p      | inside minus outside   | Pa   |
/// | D_m    | mean diameter, D_i + t | m    |
/// | t      | wall thickness         | m    |
///
/// Valid: D_o/t > 20 to about 5 %.
/// Source: elementary strength of materials.
pub fn thin_hoop_pa(p_pa: f64, mean_diameter_m: f64, t_m: f64) -> f64 {
    p_pa * mean_diameter_m / (2.0 * t_m)
}

/// Stresses of a thick closed cylinder under inside pressure.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct ThickStresses {
    pub hoop_inside_pa: f64,
    pub hoop_outside_pa: f64,
    pub axial_pa: f64,
    /// Equivalent stress at the bore after von Mises.
    pub mises_inside_pa: f64,
}

/// Elastic stresses of a thick closed cylinder.
///
/// σ_θ(r_i) = p (r_o² + r_i²)/(r_o² − r_i²),  σ_θ(r_o) = 2 p r_i²/(r_o² − r_i²),
/// σ_z = p r_i²/(r_o² − r_i²),  σ_r(r_i) = −p,
/// σ_vM(r_i) = √3 p r_o²/(r_o² − r_i²)
///
/// | symbol   | meaning                 | unit |
/// |----------|-------------------------|------|
/// | p        | inside minus outside    | Pa   |
/// | r_i, r_o | inside, outside radius  | m    |
///
/// Valid: elastic, away from the ends.
/// Source: G. Lamé, Leçons sur la théorie de l'élasticité, 1852; in any text on elasticity.
pub fn lame(p_pa: f64, ri_m: f64, ro_m: f64) -> ThickStresses {
    let (ri2, ro2) = (ri_m * ri_m, ro_m * ro_m);
    let wall = ro2 - ri2;
    ThickStresses {
        hoop_inside_pa: p_pa * (ro2 + ri2) / wall,
        hoop_outside_pa: 2.0 * p_pa * ri2 / wall,
        axial_pa: p_pa * ri2 / wall,
        mises_inside_pa: 3f64.sqrt() * p_pa * ro2 / wall,
    }
}

/// Pressure at which the bore of a closed cylinder first yields (von Mises).
///
/// p = (σ_y/√3) (1 − 1/k²),  k = r_o/r_i
///
/// Symbols as in [`lame`], σ_y the proof strength, Pa.
/// Source: Lamé's stresses with von Mises' criterion.
pub fn first_yield_pa(sy_pa: f64, ri_m: f64, ro_m: f64) -> f64 {
    let inverse_k = ri_m / ro_m;
    sy_pa / 3f64.sqrt() * (1.0 - inverse_k * inverse_k)
}

/// Pressure at which the whole wall of a closed cylinder has yielded.
///
/// p = (2/√3) σ_y ln k
///
/// Symbols as in [`first_yield_pa`]. Valid: no hardening.
/// Source: Hill, The Mathematical Theory of Plasticity, 1950 [from memory].
pub fn full_plastic_pa(sy_pa: f64, ri_m: f64, ro_m: f64) -> f64 {
    2.0 / 3f64.sqrt() * sy_pa * (ro_m / ri_m).ln()
}

/// Burst pressure of a ductile closed cylinder.
///
/// p_b = (2/√3) σ_y ln k · (2 − σ_y/σ_u)
///
/// | symbol | meaning                        | unit |
/// |--------|--------------------------------|------|
/// | σ_y    | proof strength                 | Pa   |
/// | σ_u    | tensile strength, at least σ_y | Pa   |
/// | k      | outside over inside radius     | –    |
///
/// Valid: ductile metal, ±15 %; far too low for thin tubes that harden strongly.
/// Source: J. H. Faupel, Trans. ASME 78 (1956) 1031 [from memory].
pub fn faupel_burst_pa(sy_pa: f64, su_pa: f64, ri_m: f64, ro_m: f64) -> f64 {
    full_plastic_pa(sy_pa, ri_m, ro_m) * (2.0 - sy_pa / su_pa)
}

/// Burst pressure by tensile strength on the mean diameter.
///
/// p_b = 2 t σ_u / D_m
///
/// Symbols as in [`thin_hoop_pa`]. Too high where the metal hardens little or the
/// wall is thick: the lower of this and [`faupel_burst_pa`] is taken.
/// Source: mean-diameter formula, common practice.
pub fn tensile_burst_pa(su_pa: f64, mean_diameter_m: f64, t_m: f64) -> f64 {
    2.0 * t_m * su_pa / mean_diameter_m
}

/// Code-form pressure of a cylinder.
///
/// p = S E t / (R + 0.6 t)                     t ≤ R/2
/// p = S E (Z − 1)/(Z + 1),  Z = ((R + t)/R)²  above
///
/// | symbol | meaning                             | unit |
/// |--------|-------------------------------------|------|
/// | S E    | allowable stress × joint efficiency | Pa   |
/// | R      | inside radius                       | m    |
/// | t      | least wall thickness                | m    |
///
/// The two join at t = R/2 to 0.02 %; the lower is taken there.
/// Source: ASME BPVC VIII-1, UG-27(c)(1) and appendix 1-2 [from memory].
pub fn code_form_pa(s_pa: f64, inside_radius_m: f64, t_m: f64) -> f64 {
    let thin = s_pa * t_m / (inside_radius_m + 0.6 * t_m);
    if t_m <= 0.5 * inside_radius_m {
        return thin;
    }
    let z = ((inside_radius_m + t_m) / inside_radius_m).powi(2);
    thin.min(s_pa * (z - 1.0) / (z + 1.0))
}

/// Working pressure of copper tube as the trade's tables give it.
///
/// p = 2 S t_min / (D_max − 0.8 t_min)
///
/// | symbol | meaning                    | unit |
/// |--------|----------------------------|------|
/// | S      | allowable stress           | Pa   |
/// | D_max  | greatest outside diameter  | m    |
/// | t_min  | least wall thickness       | m    |
///
/// The same as [`code_form_pa`] of a thin tube, written on the outside diameter.
/// Source: ASME B31 [from memory], as used by the Copper Tube Handbook.
pub fn copper_tube_rating_pa(s_pa: f64, outside_diameter_m: f64, t_m: f64) -> f64 {
    2.0 * s_pa * t_m / (outside_diameter_m - 0.8 * t_m)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn close(got: f64, expected: f64, digit: f64) {
        assert!((got - expected).abs() <= 0.5 * digit, "{got} {expected}");
    }

    /// Tube 12 × 0.5 mm at 20 bar; calculated for methods.md, E1 and E2.
    #[test]
    fn thin_and_thick_stresses_of_a_small_tube() {
        close(thin_hoop_pa(2.0, 11.5, 0.5), 23.0, 0.1);
        close(thin_hoop_pa(2.0, 12.0, 0.5), 24.0, 0.1);
        close(thin_hoop_pa(2.0, 11.0, 0.5), 22.0, 0.1);
        let stresses = lame(2.0, 5.5, 6.0);
        close(stresses.hoop_inside_pa, 23.04, 0.01);
        close(stresses.hoop_outside_pa, 21.04, 0.01);
        close(stresses.axial_pa, 10.52, 0.01);
        close(stresses.mises_inside_pa, 21.69, 0.01);
    }

    /// Textbook case r_i = 100, r_o = 200, p = 100 MPa [from memory of texts on elasticity].
    #[test]
    fn lame_textbook_case() {
        let stresses = lame(100.0, 100.0, 200.0);
        close(stresses.hoop_inside_pa, 166.7, 0.1);
        close(stresses.hoop_outside_pa, 66.7, 0.1);
        close(stresses.mises_inside_pa, 230.9, 0.1);
        // First yield is where the equivalent stress at the bore is the proof strength.
        close(
            first_yield_pa(stresses.mises_inside_pa, 100.0, 200.0),
            100.0,
            1e-9,
        );
    }

    /// k = 2, σ_y 250, σ_u 400 MPa; calculated for methods.md, E3.
    #[test]
    fn yield_full_plasticity_and_faupel_burst() {
        close(first_yield_pa(250.0, 1.0, 2.0), 108.25, 0.01);
        close(full_plastic_pa(250.0, 1.0, 2.0), 200.09, 0.01);
        close(faupel_burst_pa(250.0, 400.0, 1.0, 2.0), 275.1, 0.1);
    }

    /// Tube 12 × 0.5 mm, bar; calculated for methods.md, E3.
    #[test]
    fn faupel_and_tensile_burst_of_a_thin_tube() {
        for (sy, su, faupel, tensile) in [
            (62.0, 206.0, 105.8, 179.1),
            (276.0, 310.0, 307.7, 269.6),
            (170.0, 485.0, 281.7, 421.7),
        ] {
            close(10.0 * faupel_burst_pa(sy, su, 5.5, 6.0), faupel, 0.1);
            close(10.0 * tensile_burst_pa(su, 11.5, 0.5), tensile, 0.1);
        }
    }

    /// P = 2 MPa, R = 5.5 mm, S = 41 MPa; forms from memory of ASME VIII-1 UG-27, appendix 1-1.
    #[test]
    fn code_form_gives_back_its_pressure_and_agrees_with_the_outside_form() {
        close(code_form_pa(41.0, 5.5, 0.5), 3.534, 0.001);
        close(
            code_form_pa(41.0, 5.5, 2.0 * 5.5 / (41.0 - 0.6 * 2.0)),
            2.0,
            1e-12,
        );
        close(2.0 * 5.5 / (41.0 - 0.6 * 2.0), 0.2764, 1e-4);
        let outside = 41.0 * 0.5 / (6.0 - 0.4 * 0.5); // P = S t/(R_o − 0.4 t)
        close(code_form_pa(41.0, 5.5, 0.5), outside, 1e-12);
        close(copper_tube_rating_pa(41.0, 12.0, 0.5), outside, 1e-12);
    }

    #[test]
    fn thick_code_form_joins_the_thin_one_and_never_exceeds_the_stress() {
        let (below, above) = (
            code_form_pa(1.0, 2.0, 1.0),
            code_form_pa(1.0, 2.0, 1.000_001),
        );
        assert!((below - above).abs() < 2e-5, "{below} {above}");
        assert!(code_form_pa(1.0, 0.001, 1.0) < 1.0);
    }

    /// Published working pressures of annealed tube, psi, within 1 psi.
    /// ACR tube at 150 °F: 1/4 × 0.030 in 1195, 3/8 × 0.032 in 836 (maker's table);
    /// type M 3/8 in at 100 °F: 570 in the Copper Tube Handbook, table 3c, and
    /// 571.9 by its formula. Least walls and greatest diameters from memory of
    /// ASTM B280 and B88.
    #[test]
    fn copper_tube_ratings_are_the_published_ones() {
        for (s, d, t, published) in [
            (5100.0, 0.252, 0.027, 1195.0),
            (5100.0, 0.377, 0.029, 836.0),
            (6000.0, 0.501, 0.023, 571.9),
        ] {
            close(copper_tube_rating_pa(s, d, t), published, 2.0);
            close(code_form_pa(s, 0.5 * d - t, t), published, 2.0);
        }
        close(copper_tube_rating_pa(6000.0, 0.501, 0.023), 571.9, 0.1);
    }
}
