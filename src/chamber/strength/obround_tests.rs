use super::super::cylinder;
use super::*;

fn close(got: f64, expected: f64, digit: f64) {
    assert!((got - expected).abs() <= 0.5 * digit, "{got} {expected}");
}

/// Forces on the section (along x and y), its moment, its shift and its turn.
type State = [f64; 6];

/// Follows the mean line from the middle of the flat side to that of the half circle
/// by small steps of a stretching and bending beam under pressure 1, and finds the
/// pull, moment and shift at the start that leave no shear, turn and sideways shift
/// at the end: nothing of it is taken from the formula.
fn stepwise(a: f64, r: f64, t: f64) -> (f64, FlattenedMoments) {
    let run = |start: [f64; 3], load: f64| {
        let [pull, moment, lift] = start;
        let mut s: State = [pull, 0.0, moment, 0.0, lift, 0.0];
        s = march(s, load, 0.5 * a, 0.0, t);
        let junction = s[2];
        s = march(s, load, 0.5 * PI * r, 1.0 / r, t);
        (junction, s)
    };
    let (j0, s0) = run([0.0; 3], 1.0);
    let by: Vec<_> = (0..3)
        .map(|i| {
            let mut unit = [0.0; 3];
            unit[i] = 1.0;
            run(unit, 0.0)
        })
        .collect();
    // At the end the line runs down (−y): shear is along x.
    let end = |s: &State| [s[0], s[5], s[4]];
    let matrix: Vec<[f64; 3]> = by.iter().map(|(_, s)| end(s)).collect();
    let x = solve3(&matrix, end(&s0).map(|m| -m));
    let total =
        |base: f64, part: &dyn Fn(usize) -> f64| base + (0..3).map(|i| x[i] * part(i)).sum::<f64>();
    (
        x[0],
        FlattenedMoments {
            mid_side_n: x[1],
            junction_n: total(j0, &|i| by[i].0),
            edge_n: total(s0[2], &|i| by[i].1[2]),
        },
    )
}

/// Runge-Kutta along a line of even curvature that starts along x.
fn march(mut s: State, load: f64, length: f64, curvature: f64, t: f64) -> State {
    let steps = 4000;
    let ds = length / f64::from(steps);
    let slope = |s: &State, at: f64| -> State {
        let (sin, cos) = (curvature * at).sin_cos(); // line runs along (cos, −sin)
        let [fx, fy, moment, _, _, turn] = *s;
        let pull = fx * cos - fy * sin;
        let stretch = pull / t;
        let bend = 12.0 * moment / t.powi(3);
        [
            // Pressure pushes along the outward normal (sin, cos).
            -load * sin,
            -load * cos,
            // Moment of the force on the far side about the section.
            fx * sin + fy * cos,
            stretch * cos + turn * sin,
            -stretch * sin + turn * cos,
            -bend,
        ]
    };
    for i in 0..steps {
        let at = f64::from(i) * ds;
        let add =
            |s: &State, k: &State, h: f64| -> State { std::array::from_fn(|j| s[j] + h * k[j]) };
        let k1 = slope(&s, at);
        let k2 = slope(&add(&s, &k1, 0.5 * ds), at + 0.5 * ds);
        let k3 = slope(&add(&s, &k2, 0.5 * ds), at + 0.5 * ds);
        let k4 = slope(&add(&s, &k3, ds), at + ds);
        s = std::array::from_fn(|j| s[j] + ds / 6.0 * (k1[j] + 2.0 * k2[j] + 2.0 * k3[j] + k4[j]));
    }
    s
}

/// Σᵢ xᵢ columnᵢ = right, by Cramer.
fn solve3(column: &[[f64; 3]], right: [f64; 3]) -> [f64; 3] {
    let det = |m: [[f64; 3]; 3]| {
        m[0][0] * (m[1][1] * m[2][2] - m[1][2] * m[2][1])
            - m[1][0] * (m[0][1] * m[2][2] - m[0][2] * m[2][1])
            + m[2][0] * (m[0][1] * m[1][2] - m[0][2] * m[1][1])
    };
    let all = [column[0], column[1], column[2]];
    std::array::from_fn(|i| {
        let mut with = all;
        with[i] = right;
        det(with) / det(all)
    })
}

#[test]
fn moments_agree_with_a_stepwise_beam() {
    for (a, r) in [(4.0, 1.0), (1.0, 1.0), (0.1, 1.0), (10.0, 0.5), (2.0, 3.0)] {
        let got = moments(1.0, a, r);
        let (pull, expected) = stepwise(a, r, 0.01 * r);
        let scale = expected.mid_side_n.abs();
        for (g, e) in [
            (got.mid_side_n, expected.mid_side_n),
            (got.junction_n, expected.junction_n),
            (got.edge_n, expected.edge_n),
        ] {
            assert!(
                (g - e).abs() < 1e-6 * scale,
                "{a} {r}: {got:?} {expected:?}"
            );
        }
        close(pull, r, 1e-6);
    }
}

#[test]
fn a_round_tube_has_no_bending() {
    let (d, t) = (10.0, 0.5);
    let s = stresses(2.0, d, d, t);
    let round = cylinder::thin_hoop_pa(2.0, d + t, t);
    for got in [s.mid_side_pa, s.junction_pa, s.edge_pa, s.worst_pa()] {
        close(got, round, 1e-12);
    }
}

/// Clamped beam: p a²/24 in the middle, p a²/12 at its ends.
#[test]
fn sharp_edges_clamp_the_flat_side() {
    let m = moments(1.0, 1.0, 1e-6);
    close(m.mid_side_n, 1.0 / 24.0, 1e-5);
    close(m.junction_n, -1.0 / 12.0, 1e-5);
    close(m.edge_n, -1.0 / 12.0, 1e-5);
}

#[test]
fn moments_balance_each_other() {
    // Simpson over the quarter: ∫M ds = 0.
    let (a, r) = (3.0, 0.8);
    let m = moments(1.0, a, r);
    let simpson = |f: &dyn Fn(f64) -> f64, to: f64| {
        let h = to / 1000.0;
        (0..1000)
            .map(|i| {
                let x = f64::from(i) * h;
                h / 6.0 * (f(x) + 4.0 * f(x + 0.5 * h) + f(x + h))
            })
            .sum::<f64>()
    };
    let flat = simpson(&|x| m.mid_side_n - 0.5 * x * x, 0.5 * a);
    let arc = simpson(
        &|s| m.junction_n - 0.5 * a * r * (s / r).sin(),
        0.5 * PI * r,
    );
    close(flat + arc, 0.0, 1e-10);
    close(m.junction_n, m.mid_side_n - a * a / 8.0, 1e-12);
    close(m.edge_n, m.junction_n - 0.5 * a * r, 1e-12);
}

/// Curved rectangular beam at R = t: inner face 1.52 times the straight one; texts on
/// strength print it for R/c = 2 (Roark, table of curved beams [from memory]).
#[test]
fn curvature_of_the_inner_face() {
    close(curved_inner_face(0.5), 1.52, 0.01);
    close(curved_inner_face(1e-9), 1.0, 1e-8);
    close(
        curved_inner_face(0.01 - 1e-12),
        curved_inner_face(0.01),
        1e-8,
    );
    close(curved_inner_face(0.01), 1.0 + 0.02 / 3.0, 2e-4);
}

#[test]
fn the_junction_is_never_the_worst_and_pressure_is_linear() {
    for (w, h, t) in [
        (10.0, 2.0, 0.3),
        (12.0, 11.0, 0.5),
        (6.0, 1.0, 0.3),
        (50.0, 3.0, 1.0),
    ] {
        let s = stresses(1.0, w, h, t);
        assert!(s.junction_pa <= s.mid_side_pa.max(s.edge_pa), "{s:?}");
        assert_eq!(s, stresses(1.0, h, w, t));
        close(stresses(3.0, w, h, t).worst_pa(), 3.0 * s.worst_pa(), 1e-9);
        let outside = stresses(-1.0, w, h, t);
        close(outside.edge_pa, -s.edge_pa, 1e-9);
        close(outside.mid_side_pa, -s.mid_side_pa, 1e-9);
        close(outside.junction_pa, -s.junction_pa, 1e-9);
        assert!(stresses(1.0, w + 0.1, h, t).worst_pa() > s.worst_pa());
        assert!(stresses(1.0, w, h, 0.9 * t).worst_pa() > s.worst_pa());
    }
}
