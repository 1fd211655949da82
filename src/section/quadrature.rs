//! Integrals of functions that are smooth inside and rise like a root at the ends.

use std::f64::consts::PI;
use std::sync::LazyLock;

const POINTS: usize = 24;

/// Nodes in 0 to 1 and their weights, which sum to 1.
static RULE: LazyLock<[(f64, f64); POINTS]> = LazyLock::new(rule);

/// ∫ f dx from `low` to `high`.
///
/// Gauss-Legendre of 24 points in u, x = low + (high − low) u² (3 − 2u): near an end the
/// distance goes as u², so that a half-integer power of it, which is how a plane leaves
/// a round body, becomes a polynomial.
///
/// Source: Gauss-Legendre quadrature in any text on numerical analysis; the map is
/// common practice.
pub(super) fn integral(f: impl Fn(f64) -> f64, low: f64, high: f64) -> f64 {
    let span = high - low;
    RULE.iter()
        .map(|(u, weight)| {
            let x = low + span * u * u * (3.0 - 2.0 * u);
            weight * 6.0 * u * (1.0 - u) * f(x)
        })
        .sum::<f64>()
        * span
}

/// Roots of the Legendre polynomial by Newton's steps from Tricomi's guess.
fn rule() -> [(f64, f64); POINTS] {
    let n = POINTS as f64;
    std::array::from_fn(|i| {
        let mut x = (PI * (i as f64 + 0.75) / (n + 0.5)).cos();
        let mut slope = 1.0;
        // Four steps reach the last digit; more do no harm.
        for _ in 0..8 {
            let (mut before, mut p) = (1.0, x);
            for k in 2..=POINTS {
                let k = k as f64;
                (before, p) = (p, ((2.0 * k - 1.0) * x * p - (k - 1.0) * before) / k);
            }
            slope = n * (x * p - before) / (x * x - 1.0);
            x -= p / slope;
        }
        (0.5 * (1.0 - x), 1.0 / ((1.0 - x * x) * slope * slope))
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn powers_and_their_roots_are_exact() {
        for (power, expected) in [(0.0, 1.0), (7.0, 0.125), (0.5, 2.0 / 3.0), (1.5, 0.4)] {
            let got = integral(|x| x.powf(power), 0.0, 1.0);
            assert!((got - expected).abs() < 1e-14, "{power}: {got}");
            let got = integral(|x| (3.0 - x).powf(power), 1.0, 3.0);
            let expected = expected * 2f64.powf(power + 1.0);
            assert!((got - expected).abs() < 1e-13, "{power}: {got}");
        }
    }
}
