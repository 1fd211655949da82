//! Root finding; knows no physics.

/// Why a root was not found.
#[derive(Debug, Clone, Copy, PartialEq, thiserror::Error)]
pub enum SolveError {
    #[error("the function has the same sign at both ends of {low:e} to {high:e}")]
    NotBracketed { low: f64, high: f64 },
    #[error("the function is not a number at {at:e}")]
    NotANumber { at: f64 },
}

/// A root of a continuous `f` between `low` and `high`, to `tolerance` in the
/// argument (or to the last digits of a double, whichever is wider).
///
/// Brent's method: the bracket always holds the root, so it always ends.
/// Source: R. P. Brent, Algorithms for Minimization without Derivatives,
/// Prentice-Hall 1973, chapter 4.
///
/// # Errors
/// [`SolveError::NotBracketed`] without a sign change,
/// [`SolveError::NotANumber`] where `f` returns NaN.
pub fn bracketed_root(
    mut f: impl FnMut(f64) -> f64,
    low: f64,
    high: f64,
    tolerance: f64,
) -> Result<f64, SolveError> {
    let checked = |x: f64, y: f64| {
        if y.is_nan() {
            Err(SolveError::NotANumber { at: x })
        } else {
            Ok(y)
        }
    };
    let (mut a, mut b) = (low, high);
    let mut fa = checked(a, f(a))?;
    let mut fb = checked(b, f(b))?;
    if fa == 0.0 {
        return Ok(a);
    }
    if fb == 0.0 {
        return Ok(b);
    }
    if fa.signum() == fb.signum() {
        return Err(SolveError::NotBracketed { low, high });
    }
    let (mut c, mut fc) = (a, fa);
    let mut step = b - a;
    let mut before_last = step;
    // Brent's bound on the count is far below this; the loop is a guard only.
    for _ in 0..300 {
        if fb.signum() == fc.signum() {
            (c, fc) = (a, fa);
            step = b - a;
            before_last = step;
        }
        if fc.abs() < fb.abs() {
            (a, b, c) = (b, c, b);
            (fa, fb, fc) = (fb, fc, fb);
        }
        let tol = 2.0 * f64::EPSILON * b.abs() + 0.5 * tolerance;
        let half = 0.5 * (c - b);
        if half.abs() <= tol || fb == 0.0 {
            return Ok(b);
        }
        let (mut p, mut q);
        if before_last.abs() < tol || fa.abs() <= fb.abs() {
            step = half;
            before_last = half;
        } else {
            let s = fb / fa;
            if a == c {
                p = 2.0 * half * s;
                q = 1.0 - s;
            } else {
                let (r, t) = (fb / fc, fa / fc);
                p = s * (2.0 * half * t * (t - r) - (b - a) * (r - 1.0));
                q = (t - 1.0) * (r - 1.0) * (s - 1.0);
            }
            if p > 0.0 {
                q = -q
            } else {
                p = -p
            }
            if 2.0 * p < (3.0 * half * q - (tol * q).abs()).min((before_last * q).abs()) {
                before_last = step;
                step = p / q;
            } else {
                step = half;
                before_last = half;
            }
        }
        (a, fa) = (b, fb);
        b += if step.abs() > tol {
            step
        } else {
            tol.copysign(half)
        };
        fb = checked(b, f(b))?;
    }
    Ok(b)
}

/// The root of a rising `f`, which gives value and slope, between `low` and `high`.
///
/// Newton's steps from `start`; one that leaves the bracket or meets a slope that is
/// not positive is replaced by halving, so it always ends. Stops where a Newton step is
/// within `tolerance` of the argument: what is left is of the order of its square. Otherwise where a step
/// is in the last digits of a double.
///
/// # Errors
/// [`SolveError::NotANumber`] where `f` returns NaN. That the root lies in the bracket
/// is the caller's to know.
pub fn rising_root(
    mut f: impl FnMut(f64) -> (f64, f64),
    (mut low, mut high): (f64, f64),
    start: f64,
    tolerance: f64,
) -> Result<f64, SolveError> {
    let mut x = start.clamp(low, high);
    // Halving alone needs about fifty; the loop's end is a guard only.
    for _ in 0..300 {
        let (y, slope) = f(x);
        if y.is_nan() {
            return Err(SolveError::NotANumber { at: x });
        }
        if y == 0.0 {
            return Ok(x);
        }
        if y < 0.0 {
            low = x
        } else {
            high = x
        }
        let newton = x - y / slope;
        let is_newton = slope > 0.0 && newton > low && newton < high;
        let next = if is_newton {
            newton
        } else {
            0.5 * (low + high)
        };
        let step = (next - x).abs();
        x = next;
        if (is_newton && step <= tolerance * x.abs()) || step <= 2.0 * f64::EPSILON * x.abs() {
            return Ok(x);
        }
    }
    Ok(x)
}

/// Places in `knots` (ascending) between which `f` changes sign, each solved.
/// Finds every root that the knots separate.
pub fn roots_between(mut f: impl FnMut(f64) -> f64, knots: &[f64], tolerance: f64) -> Vec<f64> {
    let mut roots = Vec::new();
    let mut left = knots.first().map(|x| (*x, f(*x)));
    for &x in knots.iter().skip(1) {
        let y = f(x);
        if let Some((x0, y0)) = left
            && y0.is_finite()
            && y.is_finite()
            && (y0 == 0.0 || y0.signum() != y.signum())
            && let Ok(root) = bracketed_root(&mut f, x0, x, tolerance)
        {
            roots.push(root);
        }
        left = Some((x, y));
    }
    roots
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn root_of_a_cubic_and_of_a_steep_exponential() {
        // x³ − 2x − 5 = 0: the classic example of Wallis (1685), 2.0945514815423265.
        let root = bracketed_root(|x| x * x * x - 2.0 * x - 5.0, 2.0, 3.0, 0.0).expect("root");
        assert!((root - 2.094_551_481_542_326_5).abs() < 1e-15);
        let root = bracketed_root(|x| (50.0 * x).exp() - 1e10, 0.0, 1.0, 0.0).expect("root");
        assert!((root - 10.0 * 10f64.ln() / 50.0).abs() < 1e-14);
    }

    #[test]
    fn no_sign_change_and_nan_are_refused() {
        assert!(matches!(
            bracketed_root(|x| x * x + 1.0, -1.0, 1.0, 0.0),
            Err(SolveError::NotBracketed { .. })
        ));
        assert!(matches!(
            bracketed_root(|_| f64::NAN, -1.0, 1.0, 0.0),
            Err(SolveError::NotANumber { .. })
        ));
    }

    #[test]
    fn newton_within_a_bracket_meets_steep_flat_and_bent_functions() {
        let root = rising_root(|x| (x * x * x - 5.0, 3.0 * x * x), (0.0, 100.0), 100.0, 0.0);
        assert!((root.expect("root") - 5f64.cbrt()).abs() < 1e-15 * 2.0);
        let steep = |x: f64| ((50.0 * x).exp() - 1e10, 50.0 * (50.0 * x).exp());
        let root = rising_root(steep, (0.0, 1.0), 0.0, 0.0).expect("root");
        assert!((root - 10.0 * 10f64.ln() / 50.0).abs() < 1e-14);
        // A slope of 0 at the start: halving takes over.
        let root = rising_root(|x: f64| (x.powi(3), 3.0 * x * x), (-1.0, 3.0), 0.0, 0.0);
        assert_eq!(root, Ok(0.0));
        assert!(rising_root(|_| (f64::NAN, 1.0), (0.0, 1.0), 0.5, 0.0).is_err());
    }

    #[test]
    fn every_separated_root_is_found() {
        let roots = roots_between(f64::sin, &[0.5, 2.0, 4.0, 5.0, 7.0], 0.0);
        let expected = [1.0, 2.0].map(|k| k * std::f64::consts::PI);
        assert_eq!(roots.len(), 2);
        for (root, expected) in roots.iter().zip(expected) {
            assert!((root - expected).abs() < 1e-14);
        }
    }
}
