//! Thermal stress of glass, which adds to that of the pressure.

/// Stress of a wall hotter on one face than on the other, σ = E α ΔT/(2 (1 − ν)).
///
/// The colder face is stretched, the hotter one pressed, by as much.
///
/// | symbol | meaning                                     | unit  |
/// |--------|---------------------------------------------|-------|
/// | E, ν   | modulus, Poisson's ratio                    | Pa, – |
/// | α      | mean linear expansion                       | 1/K   |
/// | ΔT     | difference across the wall, either sign     | K     |
///
/// Valid: thin wall, even gradient, away from free ends (some 25 % more there
/// [from memory]); thick tubes by [`tube_gradient_stress_pa`].
/// Source: Timoshenko and Goodier, Theory of Elasticity, chapter on thermal stress
/// [from memory].
pub fn gradient_stress_pa(e_pa: f64, alpha_per_k: f64, nu: f64, across_k: f64) -> f64 {
    0.5 * quench_stress_pa(e_pa, alpha_per_k, nu, across_k)
}

/// Stress of a face that a quench takes to the bath before the rest of the wall follows,
/// at most σ = E α ΔT/(1 − ν).
///
/// Symbols as in [`gradient_stress_pa`], ΔT from wall to bath. An upper bound: a bath
/// that boils, or a wall that conducts well, cools the face less suddenly.
/// Source: the same.
pub fn quench_stress_pa(e_pa: f64, alpha_per_k: f64, nu: f64, bath_k: f64) -> f64 {
    e_pa * alpha_per_k * bath_k.abs() / (1.0 - nu)
}

/// Stress at the bore of a tube of any thickness with a steady flow of heat through it.
///
/// σ = E α ΔT/(2 (1 − ν) ln k) · [2 k² ln k/(k² − 1) − 1],  k = r_o/r_i
///
/// Tension when the bore is the colder face. It is the greater of the two faces: for
/// k = 2 it is 22 % above [`gradient_stress_pa`], to which it tends for thin walls.
///
/// | symbol   | meaning                | unit |
/// |----------|------------------------|------|
/// | r_i, r_o | inside, outside radius | m    |
///
/// Other symbols as in [`gradient_stress_pa`]. Valid: long tube, away from its ends.
/// Source: the same, section on the long circular cylinder; checked below by integration.
pub fn tube_gradient_stress_pa(
    e_pa: f64,
    alpha_per_k: f64,
    nu: f64,
    across_k: f64,
    ri_m: f64,
    ro_m: f64,
) -> f64 {
    let wall = (ro_m - ri_m) / ri_m;
    let ln_k = wall.ln_1p();
    let shape = if wall < 1e-3 {
        1.0 + wall / 3.0 // the difference loses its digits; its series does not
    } else {
        let k2 = (ro_m / ri_m).powi(2);
        (2.0 * k2 * ln_k / (k2 - 1.0) - 1.0) / ln_k
    };
    shape * gradient_stress_pa(e_pa, alpha_per_k, nu, across_k)
}

/// Difference across the wall that a permissible stress allows, 2 σ (1 − ν)/(E α).
///
/// Symbols as in [`gradient_stress_pa`]; σ what the pressure leaves of the permissible
/// stress. Infinite for a material that does not expand.
pub fn gradient_limit_k(permissible_pa: f64, e_pa: f64, alpha_per_k: f64, nu: f64) -> f64 {
    2.0 * quench_limit_k(permissible_pa, e_pa, alpha_per_k, nu)
}

/// Difference between wall and bath that a permissible stress allows in any quench,
/// σ (1 − ν)/(E α).
///
/// Symbols as in [`gradient_limit_k`], the careful side of [`quench_stress_pa`].
pub fn quench_limit_k(permissible_pa: f64, e_pa: f64, alpha_per_k: f64, nu: f64) -> f64 {
    permissible_pa * (1.0 - nu) / (e_pa * alpha_per_k)
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Borosilicate glass 3.3: E 63 GPa, α 3.3e-6/K, ν 0.2.
    const GLASS: (f64, f64, f64) = (63e3, 3.3e-6, 0.2);

    fn close(got: f64, expected: f64, digit: f64) {
        assert!((got - expected).abs() <= 0.5 * digit, "{got} {expected}");
    }

    /// 0.13 MPa per kelvin across the wall, 56 MPa from 293 K into liquid nitrogen at
    /// 77 K, 27 K for 7 MPa; calculated for methods.md, E8.
    #[test]
    fn glass() {
        let (e, alpha, nu) = GLASS;
        close(gradient_stress_pa(e, alpha, nu, 1.0), 0.13, 0.001);
        close(quench_stress_pa(e, alpha, nu, 216.0), 56.0, 1.0);
        close(quench_limit_k(7.0, e, alpha, nu), 27.0, 1.0);
        close(gradient_limit_k(7.0, e, alpha, nu), 54.0, 1.0);
    }

    #[test]
    fn limits_give_back_their_stress_and_sign_does_not_matter() {
        let (e, alpha, nu) = GLASS;
        let quench = quench_limit_k(7.0, e, alpha, nu);
        close(quench_stress_pa(e, alpha, nu, -quench), 7.0, 1e-12);
        let across = gradient_limit_k(7.0, e, alpha, nu);
        close(gradient_stress_pa(e, alpha, nu, -across), 7.0, 1e-12);
        assert_eq!(quench_limit_k(7.0, e, 0.0, nu), f64::INFINITY);
    }

    /// Hoop stress at the bore of a tube by integration of T r, T = ΔT ln(r/r_i)/ln k:
    /// (E α/(1 − ν)) [2/(r_o² − r_i²) ∫T r dr − T(r_i)].
    #[test]
    fn tube_by_integration() {
        for k in [1.0001, 1.0009, 1.0011, 1.01, 1.2, 2.0, 5.0f64] {
            let steps = 20_000;
            let dr = (k - 1.0) / f64::from(steps);
            let sum: f64 = (0..steps)
                .map(|i| 1.0 + (f64::from(i) + 0.5) * dr)
                .map(|r| r * r.ln() / k.ln() * dr)
                .sum();
            let expected = 2.0 * sum / (k * k - 1.0) / 0.8;
            let got = tube_gradient_stress_pa(1.0, 1.0, 0.2, 1.0, 1.0, k);
            assert!((got / expected - 1.0).abs() < 1e-6, "{k}: {got} {expected}");
        }
        let thin = tube_gradient_stress_pa(1.0, 1.0, 0.2, 1.0, 1.0, 1.0 + 1e-9);
        close(thin, gradient_stress_pa(1.0, 1.0, 0.2, 1.0), 1e-8);
        let double = tube_gradient_stress_pa(1.0, 1.0, 0.2, 1.0, 1.0, 2.0);
        close(double / gradient_stress_pa(1.0, 1.0, 0.2, 1.0), 1.22, 0.01);
    }
}
