//! Wick relations against handbook forms and published examples.

use super::*;

fn close(got: Result<f64, WickError>, expected: f64, relative: f64) {
    let got = got.expect("within validity");
    assert!((got / expected - 1.0).abs() <= relative, "{got} {expected}");
}

/// 500 mesh per inch of 0.02159 mm wire, S = 1.05: ε = 0.65; an example in an
/// article on the conductivity of heat pipe wicks (Qpedia 97, after Chi), and 0.5 %
/// for its two digits.
#[test]
fn porosity_of_a_published_screen() {
    close(
        screen_porosity(500.0 / 0.0254, 0.02159e-3, CRIMPING),
        0.65,
        5e-3,
    );
}

/// By hand: 100 mesh per inch (N = 3937.0 1/m) of 0.11 mm wire, N d = 0.43307:
/// ε = 1 − 0.25 π · 1.05 · 0.43307 = 0.64286;
/// K = 1.21e-8 · 0.26568/(122 · 0.12755) = 2.0658e-10 m²;
/// r = 0.0127 mm · 10 = 0.127 mm; three layers 0.66 mm.
#[test]
fn a_hundred_mesh_screen_by_hand() {
    let n = 100.0 / 0.0254;
    let eps = screen_porosity(n, 0.11e-3, CRIMPING);
    close(eps, 0.64286, 1e-5);
    close(
        screen_permeability_m2(0.11e-3, eps.expect("above")),
        2.0658e-10,
        1e-4,
    );
    close(screen_pore_radius_m(n), 0.127e-3, 1e-12);
    close(screen_thickness_m(3, 0.11e-3), 0.66e-3, 1e-12);
}

/// The void of one layer, 2 d thick, is what its two sets of wire leave: the
/// porosity is counted here from lengths of wire on a square metre.
#[test]
fn porosity_is_what_the_wires_leave() {
    let (n, d) = (4000.0, 0.1e-3);
    let wire = 2.0 * n * CRIMPING * 0.25 * PI * d * d;
    let thickness = screen_thickness_m(1, d).expect("valid");
    close(
        screen_porosity(n, d, CRIMPING),
        1.0 - wire / thickness,
        1e-14,
    );
}

/// The crimp that the documentation warns of, and the sensitivity it states.
#[test]
fn stated_sensitivities_hold() {
    assert!(((1.0f64 + 0.32 * 0.32).sqrt() - 1.05).abs() < 1e-3);
    let with = |s| screen_porosity(5000.0, 0.1e-3, s).expect("valid");
    assert!((with(CRIMPING) - with(1.25f64.sqrt()) - 0.027).abs() < 1e-3);
    let k = |eps| screen_permeability_m2(1e-4, eps).expect("valid");
    assert!((k(0.67) / k(0.65) - 1.23).abs() < 0.01);
}

/// By hand: d = 0.1 mm, ε = 0.4: K = 1e-8 · 0.064/(150 · 0.36) = 1.18519e-11 m²;
/// the same as r_s² ε³/(37.5 (1 − ε)²), the other form in print [from memory].
#[test]
fn spheres_by_hand() {
    close(sphere_permeability_m2(1e-4, 0.4), 1.18519e-11, 1e-5);
    close(
        sphere_permeability_m2(1e-4, 0.4),
        0.25e-8 * 0.064 / (37.5 * 0.36),
        1e-14,
    );
    close(sphere_pore_radius_m(1e-4), 20.5e-6, 1e-14);
}

/// By hand: d = 8 µm, ε = 0.9: d² ε³/(1 − ε)² = 6.4e-11 · 72.9 = 4.6656e-9 m²,
/// X = 1.153965, X² = 1.331635, K = 6e-10 · 0.331635/2.331635 = 8.5340e-11 m².
/// Measured felts of fine wire, porosity above 0.9, lie at 30 to 300 µm² and 40 to
/// 120 µm (N. Andreas, H. Cole, SAND94-0657C, abstract); the wires there are
/// not all of this diameter, so that only the range is compared.
#[test]
fn felt_by_hand_and_within_measured_ranges() {
    close(felt_permeability_m2(8e-6, 0.9), 8.5340e-11, 1e-4);
    close(felt_pore_radius_m(8e-6, 0.9), 40e-6, 1e-12);
    for eps in [0.9, 0.92, 0.95] {
        let k = felt_permeability_m2(8e-6, eps).expect("valid");
        let r = felt_pore_radius_m(8e-6, eps).expect("valid");
        assert!((30e-12..=300e-12).contains(&k), "{k}");
        assert!((39.9e-6..=120e-6).contains(&r), "{r}");
    }
    // Never above A.
    assert!(felt_permeability_m2(1e-3, 0.98).expect("valid") <= 6.0e-10);
}

#[test]
fn artery_open_and_closed() {
    close(artery_permeability_m2(1.6e-3), 8e-8, 1e-14);
    close(artery_pore_radius_m(1.6e-3, None), 0.8e-3, 1e-14);
    close(artery_pore_radius_m(1.6e-3, Some(1e4)), 50e-6, 1e-14);
}

/// Sintered ring 18/16 mm, 200 mm long, ε = 0.5: 5.341 mL of void, and water/copper
/// wick 16/14 × 400 mm: 9.266 g at 983.2 kg/m³; calculated for methods.md, F3 and P4.
#[test]
fn void_of_a_sintered_ring() {
    let void = |outside: f64, inside: f64, length: f64| {
        0.5 * super::super::solid::annulus_m3(outside, inside, length).expect("valid")
    };
    assert!((void(0.018, 0.016, 0.2) - 5.341e-6).abs() < 0.5e-9);
    assert!((983.2 * void(0.016, 0.014, 0.4) - 9.266e-3).abs() < 0.5e-6);
}

#[test]
fn nonsense_is_refused_and_never_becomes_nan() {
    let bad = [0.0, -1.0, f64::NAN, f64::INFINITY];
    for x in bad {
        assert!(screen_porosity(x, 1e-4, CRIMPING).is_err());
        assert!(screen_porosity(4e3, x, CRIMPING).is_err());
        assert!(screen_porosity(4e3, 1e-4, x).is_err());
        assert!(screen_thickness_m(1, x).is_err());
        assert!(screen_permeability_m2(x, 0.6).is_err());
        assert!(screen_permeability_m2(1e-4, x).is_err());
        assert!(screen_pore_radius_m(x).is_err());
        assert!(sphere_permeability_m2(x, 0.4).is_err());
        assert!(sphere_permeability_m2(1e-4, x).is_err());
        assert!(sphere_pore_radius_m(x).is_err());
        assert!(felt_permeability_m2(x, 0.9).is_err());
        assert!(felt_permeability_m2(8e-6, x).is_err());
        assert!(felt_pore_radius_m(x, 0.9).is_err());
        assert!(felt_pore_radius_m(8e-6, x).is_err());
        assert!(artery_permeability_m2(x).is_err());
        assert!(artery_pore_radius_m(x, None).is_err());
        assert!(artery_pore_radius_m(1e-3, Some(x)).is_err());
    }
    // Squares that leave the range of numbers are no answer either.
    for x in [1e-200, 1e200] {
        assert!(screen_permeability_m2(x, 0.6).is_err());
        assert!(sphere_permeability_m2(x, 0.4).is_err());
        assert!(felt_permeability_m2(x, 0.9).is_err());
        assert!(artery_permeability_m2(x).is_err());
    }
    assert!(screen_pore_radius_m(1e-320).is_err());
    assert!(screen_thickness_m(0, 1e-4).is_err());
    assert_eq!(
        screen_porosity(1e4, 1e-4, CRIMPING),
        Err(WickError::WiresTouch {
            mesh_times_wire: 1.0
        })
    );
    assert!(matches!(
        screen_porosity(9.9e3, 1e-4, 1.5),
        Err(WickError::Porosity { .. })
    ));
    assert!(sphere_permeability_m2(1e-4, 0.75).is_err());
}
