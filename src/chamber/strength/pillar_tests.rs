use super::*;

fn close(got: f64, expected: f64, digit: f64) {
    assert!((got - expected).abs() <= 0.5 * digit, "{got} {expected}");
}

/// Cell 6 × 6 mm, t = 0.3 mm, 1 bar; calculated for methods.md, E7.
#[test]
fn walled_cell() {
    close(walled_cell_stress_pa(0.1, 6.0, 6.0, 0.3), 12.3, 0.1);
}

/// The same on pillars of 2 mm at its corners: about twice that.
#[test]
fn pillars_hold_less_than_walls() {
    let rim = rim_stress_pa(0.1, 6.0, 1.0, 0.3);
    close(rim / 12.3, 2.1, 0.2);
    assert_eq!(plate_stress_pa(0.1, 6.0, 6.0, 1.0, 0.3), rim);
    close(plate_stress_pa(0.1, 6.0, 6.0, 2.9, 0.3), 12.3, 0.1);
    close(plate_stress_pa(-0.1, 6.0, 6.0, 1.0, 0.3), -rim, 1e-12);
    assert_eq!(rim_stress_pa(0.1, 6.0, 3.0, 0.3), 0.0);
    assert_eq!(plate_stress_pa(0.1, 6.0, 6.0, 0.0, 0.3), f64::INFINITY);
    let mut before = f64::INFINITY;
    for i in 1..300 {
        let now = rim_stress_pa(0.1, 6.0, 0.01 * f64::from(i), 0.3);
        assert!(now < before && now > 0.0, "{i}");
        before = now;
    }
}

/// Plate on points: 0.00581 q s⁴/K in the middle of the cell (Timoshenko and
/// Woinowsky-Krieger, section 54 [from memory]).
#[test]
fn square_cell_sags_like_a_plate_on_points() {
    close(square_cell(0.001).sag, 0.00581, 3e-5);
}

#[test]
fn rim_stress_bounds_the_square_cell_from_above_and_closely() {
    for share in [0.001, 0.01, 0.05, 0.1, 0.15, 0.2, 0.25, 0.3, 0.35, 0.4] {
        let got = rim_stress_pa(1.0, 1.0, share, 1.0) / 6.0;
        let exact = square_cell(share).rim_moment;
        let most = if share <= 0.37 { 1.05 } else { 1.12 };
        assert!(
            (0.9999..most).contains(&(got / exact)),
            "{share}: {got} {exact}"
        );
    }
}

struct SquareCell {
    /// Greatest moment at the rim, over q s².
    rim_moment: f64,
    /// Deflection farthest from the pillars, over q s⁴/K.
    sag: f64,
}

/// A square cell of half side 1 with a rigid round pillar in its middle: w is a sum of
/// solutions of ∇⁴w = q in rings around the pillar, each clamped at its rim; on the side
/// of the cell slope and shear vanish, in the mean of squares.
fn square_cell(radius_over_pitch: f64) -> SquareCell {
    let c = 2.0 * radius_over_pitch;
    let load = clamped(c, 0, |r| {
        [r.powi(4) / 64.0, r.powi(3) / 16.0, r * r / 4.0, r / 2.0]
    });
    let mut terms: Vec<(f64, Ring)> = Vec::new();
    for m in (0..=24).step_by(4) {
        let x = f64::from(m);
        let far = 2f64.sqrt();
        if m == 0 {
            terms.push((x, clamped(c, 0, |r| [r * r, 2.0 * r, 4.0, 0.0])));
            terms.push((
                x,
                clamped(c, 0, move |r| {
                    let ln = (r / c).ln();
                    [r * r * ln, r * (2.0 * ln + 1.0), 4.0 * (ln + 1.0), 4.0 / r]
                }),
            ));
        } else {
            terms.push((
                x,
                clamped(c, m, move |r| {
                    let p = (r / far).powi(m);
                    [p, x / r * p, 0.0, 0.0]
                }),
            ));
            terms.push((
                x,
                clamped(c, m, move |r| {
                    let p = (r / far).powi(m);
                    let lap = 4.0 * (x + 1.0) * p;
                    [r * r * p, (x + 2.0) * r * p, lap, lap * x / r]
                }),
            ));
        }
    }
    // Slope (0) and shear (2) square to the side, of one term at one point of it.
    let across = |m: f64, f: [f64; 4], r: f64, angle: f64, of: usize| {
        f[of + 1] * angle.cos() * (m * angle).cos()
            + f[of] * m * (m * angle).sin() * angle.sin() / r
    };
    let points = 60;
    let (mut columns, mut right) = (vec![Vec::new(); terms.len()], Vec::new());
    for i in 0..points {
        let y = (f64::from(i) + 0.5) / f64::from(points);
        let (r, angle) = (y.hypot(1.0), y.atan());
        for of in [0, 2] {
            for (column, (m, ring)) in columns.iter_mut().zip(&terms) {
                column.push(across(*m, ring(r), r, angle, of));
            }
            right.push(-across(0.0, load(r), r, angle, of));
        }
    }
    let share = least_squares(columns, &right);
    // The sum of all terms at a place: `of` 0 deflection, 2 curvature.
    let sum = |r: f64, angle: f64, of: usize| {
        let parts = terms.iter().zip(&share);
        load(r)[of]
            + parts
                .map(|((m, ring), x)| x * ring(r)[of] * (m * angle).cos())
                .sum::<f64>()
    };
    let moments = (0..=20).map(|i| sum(c, 0.25 * PI * f64::from(i) / 20.0, 2) / 4.0);
    SquareCell {
        rim_moment: moments.fold(0.0, f64::max),
        sag: sum(2f64.sqrt(), 0.25 * PI, 0) / 16.0,
    }
}

/// Deflection, its slope along r, its Laplacian and the slope of that, without cos mθ.
type Ring = Box<dyn Fn(f64) -> [f64; 4]>;

/// Adds the two solutions that fall outward (1 and ln r for m = 0, r^−m and r^(2−m)
/// else) so that deflection and slope vanish at the rim c.
fn clamped(c: f64, m: i32, ring: impl Fn(f64) -> [f64; 4] + 'static) -> Ring {
    let x = f64::from(m);
    let first = move |r: f64| match m {
        0 => [1.0, 0.0, 0.0, 0.0],
        _ => {
            let p = (r / c).powi(-m);
            [p, -x / r * p, 0.0, 0.0]
        }
    };
    let second = move |r: f64| match m {
        0 => [(r / c).ln(), 1.0 / r, 0.0, 0.0],
        _ => {
            let p = (r / c).powi(-m);
            let lap = 4.0 * (1.0 - x) * p;
            [r * r * p, (2.0 - x) * r * p, lap, -lap * x / r]
        }
    };
    let (f, a, b) = (ring(c), first(c), second(c));
    let det = a[0] * b[1] - b[0] * a[1];
    let p = (b[0] * f[1] - f[0] * b[1]) / det;
    let q = (a[1] * f[0] - a[0] * f[1]) / det;
    Box::new(move |r| {
        let (f, a, b) = (ring(r), first(r), second(r));
        std::array::from_fn(|i| f[i] + p * a[i] + q * b[i])
    })
}

/// Least squares of Σ xⱼ columnⱼ = right, by Gram and Schmidt, each column twice.
fn least_squares(mut columns: Vec<Vec<f64>>, right: &[f64]) -> Vec<f64> {
    let dot = |a: &[f64], b: &[f64]| a.iter().zip(b).map(|(x, y)| x * y).sum::<f64>();
    let n = columns.len();
    let mut shares: Vec<Vec<f64>> = Vec::new(); // of the columns before, and its length
    for j in 0..n {
        let (before, rest) = columns.split_at_mut(j);
        let column = &mut rest[0];
        let mut own = vec![0.0; j];
        for _ in 0..2 {
            for (q, total) in before.iter().zip(&mut own) {
                let share = dot(q, column);
                *total += share;
                column.iter_mut().zip(q).for_each(|(x, y)| *x -= share * y);
            }
        }
        let length = dot(column, column).sqrt();
        column.iter_mut().for_each(|x| *x /= length);
        own.push(length);
        shares.push(own);
    }
    let mut x: Vec<f64> = columns.iter().map(|q| dot(q, right)).collect();
    for j in (0..n).rev() {
        let known: f64 = (j + 1..n).map(|k| shares[k][j] * x[k]).sum();
        x[j] = (x[j] - known) / shares[j][j];
    }
    x
}

#[test]
fn one_cell_is_in_equilibrium() {
    let (p, cell, pillar) = (2.0, 36.0, 4.0);
    close(tension_pa(p, cell, pillar), 16.0, 1e-12);
    close(compression_pa(p, cell, pillar), 18.0, 1e-12);
    // Tresca under inside pressure: pull against the pressure on the side.
    close(
        tension_pa(p, cell, pillar) + p,
        compression_pa(p, cell, pillar),
        1e-12,
    );
}

/// Copper pillar of 2 mm, 100 mm high: i = d/4, σ = π² E d²/(4 L²).
#[test]
fn buckling() {
    let expected = PI * PI * 117e3 * 4.0 / (4.0 * 1e4);
    close(euler_pa(117e3, 0.5, 100.0), expected, 1e-9);
    let mut before = 0.0;
    for i in 1..1000 {
        let now = column_strength_pa(70.0, f64::from(i));
        assert!(now > before && now < 70.0 && now <= f64::from(i));
        before = now;
    }
    close(
        column_strength_pa(70.0, 35.0 - 1e-9),
        column_strength_pa(70.0, 35.0),
        1e-8,
    );
}
