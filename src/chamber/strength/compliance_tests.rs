use super::*;
use PlateEdge::{Clamped, SimplySupported};

fn alike(got: f64, expected: f64, share: f64) {
    assert!((got / expected - 1.0).abs() <= share, "{got} {expected}");
}

#[test]
fn thick_shells_tend_to_thin_ones() {
    for nu in [0.0, 0.2, 0.34, 0.5] {
        for (ratio, share) in [(1e-2, 2e-2), (1e-3, 2e-3), (1e-5, 2e-5)] {
            let (ri, ro) = (1.0, 1.0 + ratio);
            let thin = thin_cylinder_per_pa(2.0, nu, ri + ro, ratio);
            alike(cylinder_per_pa(2.0, nu, ri, ro), thin, share);
            let thin = thin_sphere_per_pa(2.0, nu, ri + ro, ratio);
            alike(sphere_per_pa(2.0, nu, ri, ro), thin, share);
        }
    }
}

/// A hole in an endless body: u/r = (1 + ν) p/E around a bore, half that around a cavity.
#[test]
fn holes_in_an_endless_body() {
    alike(cylinder_per_pa(2.0, 0.3, 1.0, 1e6), 2.0 * 1.3 / 2.0, 1e-9);
    alike(sphere_per_pa(2.0, 0.3, 1.0, 1e6), 3.0 * 0.65 / 2.0, 1e-9);
}

/// The work of the pressure, p ΔV/2, is the energy stored in the wall, summed over it.
#[test]
fn growth_agrees_with_the_energy_in_the_wall() {
    let (nu, ri, ro) = (0.3, 1.0, 1.7);
    let steps = 20_000;
    let (mut tube, mut ball) = (0.0, 0.0);
    for i in 0..steps {
        let dr = (ro - ri) / f64::from(steps);
        let r: f64 = ri + (f64::from(i) + 0.5) * dr;
        let energy =
            |x: f64, y: f64, z: f64| 0.5 * (x * x + y * y + z * z) - nu * (x * y + y * z + z * x);
        let axial = ri * ri / (ro * ro - ri * ri);
        let swing = axial * ro * ro / (r * r);
        tube += energy(axial - swing, axial + swing, axial) * 2.0 * PI * r * dr;
        let level = ri.powi(3) / (ro.powi(3) - ri.powi(3));
        let swing = level * (ro / r).powi(3);
        let hoop = level + 0.5 * swing;
        ball += energy(level - swing, hoop, hoop) * 4.0 * PI * r * r * dr;
    }
    alike(cylinder_per_pa(1.0, nu, ri, ro), 2.0 * tube / PI, 1e-7);
    alike(sphere_per_pa(1.0, nu, ri, ro), 2.0 * ball * 0.75 / PI, 1e-7);
}

/// Volume by rings of the deflection that Roark gives (E = 1, t = 1).
#[test]
fn circular_plates_by_rings() {
    let (nu, a, steps) = (0.3, 2.0f64, 20_000);
    let k = plate_stiffness_n_m(1.0, nu, 1.0);
    let deflection = |r: f64, edge| {
        let rest = a * a - r * r;
        let other = match edge {
            Clamped => rest,
            SimplySupported => (5.0 + nu) / (1.0 + nu) * a * a - r * r,
        };
        rest * other / (64.0 * k)
    };
    for edge in [Clamped, SimplySupported] {
        let dr = a / f64::from(steps);
        let volume: f64 = (0..steps)
            .map(|i| (f64::from(i) + 0.5) * dr)
            .map(|r| 2.0 * PI * r * dr * deflection(r, edge))
            .sum();
        alike(
            circular_plate_m3_per_pa(1.0, nu, a, 1.0, edge),
            volume,
            1e-7,
        );
    }
}

/// With K = 1 and b = 1: V/(a b⁵).
fn rectangle(ratio: f64, edge: PlateEdge) -> f64 {
    rectangular_plate_m3_per_pa(12.0, 0.0, ratio, 1.0, 1.0, edge) / ratio
}

/// Navier's double series for supported plates.
#[test]
fn supported_rectangle_is_naviers() {
    for ratio in [1.0f64, 1.3, 2.0, 4.0, 10.0] {
        let mut sum = 0.0;
        for m in (1..200).step_by(2) {
            for n in (1..50).step_by(2) {
                let (m, n) = (f64::from(m), f64::from(n));
                let stiff = (m * m / (ratio * ratio) + n * n).powi(2);
                sum += 64.0 / (PI.powi(8) * m * m * n * n * stiff);
            }
        }
        alike(rectangle(ratio, SimplySupported), sum, 1e-5);
    }
    alike(rectangle(1e6, SimplySupported), 1.0 / 120.0, 1e-5);
}

#[test]
fn clamped_rectangle_bounds_ritz_from_above_and_closely() {
    for ratio in [1.0, 1.1, 1.2, 1.4, 1.6, 2.0, 2.5, 3.0, 5.0] {
        let ritz = clamped_by_ritz(ratio);
        let bound = rectangle(ratio, Clamped);
        assert!(
            (1.0..1.041).contains(&(bound / ritz)),
            "{ratio}: {bound} {ritz}"
        );
    }
    alike(rectangle(1e9, Clamped), 1.0 / 720.0, 1e-8);
}

/// Middle of a clamped square 0.00126 b⁴/K (Timoshenko and Woinowsky-Krieger, table 35
/// [from memory]); the first term of Ritz' shape has its mean at (8/15)² of the middle.
#[test]
fn clamped_square_agrees_with_its_deflection() {
    alike(
        rectangle(1.0, Clamped),
        0.00126 * (8.0f64 / 15.0).powi(2),
        0.1,
    );
}

/// V K/(a b⁵) by Ritz' method, from below: w = Σ c (1 − x²)² x^2i (1 − y²)² y^2j over a
/// plate of half sides `ratio` and 1, with K = 1. Seven by four shapes; five by three
/// change the result by less than 1e-5.
fn clamped_by_ritz(ratio: f64) -> f64 {
    let shapes: Vec<(usize, usize)> = (0..7).flat_map(|i| (0..4).map(move |j| (i, j))).collect();
    let r2 = ratio.powi(-2);
    let load: Vec<f64> = shapes
        .iter()
        .map(|&(i, j)| integral(&shape(i)) * integral(&shape(j)))
        .collect();
    let matrix: Vec<Vec<f64>> = shapes
        .iter()
        .map(|&(i, j)| {
            let entry = |&(k, l): &(usize, usize)| {
                let [x00, x20, x02, x22] = products(i, k);
                let [y00, y20, y02, y22] = products(j, l);
                r2 * r2 * x22 * y00 + x00 * y22 + r2 * (x20 * y02 + x02 * y20)
            };
            shapes.iter().map(entry).collect()
        })
        .collect();
    let solution = gauss(matrix, load.clone());
    let volume: f64 = solution.iter().zip(&load).map(|(c, f)| c * f).sum();
    volume / 64.0 // a b⁵ is 64 for half sides of 1
}

/// Coefficients of (1 − x²)² x^2i.
fn shape(i: usize) -> Vec<f64> {
    let mut p = vec![0.0; 2 * i + 5];
    (p[2 * i], p[2 * i + 2], p[2 * i + 4]) = (1.0, -2.0, 1.0);
    p
}

/// ∫f g, ∫f″ g, ∫f g″, ∫f″ g″ of two shapes over −1 to 1.
fn products(i: usize, k: usize) -> [f64; 4] {
    let bent = |p: &[f64]| -> Vec<f64> {
        p.iter()
            .enumerate()
            .skip(2)
            .map(|(n, c)| c * (n * (n - 1)) as f64)
            .collect()
    };
    let product = |p: &[f64], q: &[f64]| {
        let mut out = vec![0.0; p.len() + q.len() - 1];
        for (m, x) in p.iter().enumerate() {
            for (n, y) in q.iter().enumerate() {
                out[m + n] += x * y;
            }
        }
        integral(&out)
    };
    let (f, g) = (shape(i), shape(k));
    let (f2, g2) = (bent(&f), bent(&g));
    [
        product(&f, &g),
        product(&f2, &g),
        product(&f, &g2),
        product(&f2, &g2),
    ]
}

fn integral(p: &[f64]) -> f64 {
    p.iter()
        .enumerate()
        .step_by(2)
        .map(|(n, c)| 2.0 * c / (n + 1) as f64)
        .sum()
}

/// Elimination; the matrix is symmetric and positive, so that no pivot is sought.
fn gauss(mut m: Vec<Vec<f64>>, mut f: Vec<f64>) -> Vec<f64> {
    let n = f.len();
    for k in 0..n {
        let (row, right) = (m[k].clone(), f[k]);
        for r in k + 1..n {
            let share = m[r][k] / row[k];
            for c in k..n {
                m[r][c] -= share * row[c];
            }
            f[r] -= share * right;
        }
    }
    for k in (0..n).rev() {
        let known: f64 = (k + 1..n).map(|c| m[k][c] * f[c]).sum();
        f[k] = (f[k] - known) / m[k][k];
    }
    f
}
