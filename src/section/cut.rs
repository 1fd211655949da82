//! Cross-sections below a straight cut: circle, rectangle, obround.
//!
//! The cut lies at the height `y_m` over the middle of the figure.

use std::f64::consts::PI;

/// Part of a circle below a chord.
///
/// A = r² (θ − sin θ cos θ),  cos θ = −y/r
///
/// | symbol | meaning                          | unit |
/// |--------|----------------------------------|------|
/// | r      | radius                           | m    |
/// | y      | height of the chord over centre  | m    |
/// | θ      | half the angle the chord spans   | rad  |
///
/// Near the bottom the difference is taken from its series, which keeps every digit.
/// Source: elementary geometry.
pub fn circle_below_m2(radius_m: f64, y_m: f64) -> f64 {
    if y_m <= -radius_m || radius_m <= 0.0 {
        return 0.0;
    }
    if y_m >= radius_m {
        return PI * radius_m * radius_m;
    }
    let theta = 2.0 * (0.5 * (1.0 + y_m / radius_m)).sqrt().asin();
    radius_m * radius_m * theta_less_sine(theta)
}

/// Part of a rectangle below a level line; it is `height_m` high and `across_m` wide.
pub fn rectangle_below_m2(height_m: f64, across_m: f64, y_m: f64) -> f64 {
    across_m * (y_m + 0.5 * height_m).clamp(0.0, height_m)
}

/// Part of an obround below a level line: a rectangle whose short sides are half circles.
///
/// Source: circle and rectangle put together.
pub fn obround_below_m2(height_m: f64, across_m: f64, y_m: f64) -> f64 {
    let radius_m = 0.5 * height_m.min(across_m);
    let straight_m = (height_m - across_m).max(0.0);
    if straight_m == 0.0 {
        return circle_below_m2(radius_m, y_m)
            + rectangle_below_m2(height_m, across_m - height_m, y_m);
    }
    let half = 0.5 * straight_m;
    circle_below_m2(radius_m, (y_m + half).min(0.0))
        + rectangle_below_m2(straight_m, across_m, y_m)
        + circle_below_m2(radius_m, (y_m - half).max(0.0))
        - circle_below_m2(radius_m, 0.0)
}

/// θ − sin θ cos θ.
fn theta_less_sine(theta: f64) -> f64 {
    if theta > 0.2 {
        return theta - theta.sin() * theta.cos();
    }
    // (x − sin x)/2 with x = 2θ: terms x³/12, each next one smaller by x²/((2k)(2k+1)).
    let x = 2.0 * theta;
    let (mut term, mut sum) = (x * x * x / 12.0, 0.0);
    for k in 2..9 {
        sum += term;
        let k = f64::from(k);
        term *= -x * x / ((2.0 * k) * (2.0 * k + 1.0));
    }
    sum
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Area below y by the midpoint rule over the width at each height.
    fn by_strips(width: impl Fn(f64) -> f64, bottom: f64, y: f64) -> f64 {
        let steps = 200_000;
        let dy = (y - bottom) / f64::from(steps);
        (0..steps)
            .map(|i| width(bottom + (f64::from(i) + 0.5) * dy) * dy)
            .sum()
    }

    fn obround_width(height: f64, across: f64, y: f64) -> f64 {
        let r = 0.5 * height.min(across);
        let off = (y.abs() - 0.5 * (height - across).max(0.0)).max(0.0);
        (across - 2.0 * r) + 2.0 * (r * r - off * off).max(0.0).sqrt()
    }

    #[test]
    fn figures_agree_with_strips() {
        for y in [-1.9, -1.0, -0.3, 0.0, 0.7, 1.99] {
            let circle = by_strips(|y| 2.0 * (4.0 - y * y).max(0.0).sqrt(), -2.0, y);
            assert!((circle_below_m2(2.0, y) - circle).abs() < 1e-7, "{y}");
            for (height, across) in [(4.0, 7.0), (4.0, 4.0), (4.0, 1.5)] {
                let strips = by_strips(|y| obround_width(height, across, y), -2.0, y);
                let got = obround_below_m2(height, across, y);
                assert!((got - strips).abs() < 1e-7, "{height} {across} {y}: {got}");
            }
            assert!((rectangle_below_m2(4.0, 3.0, y) - 3.0 * (y + 2.0)).abs() < 1e-15);
        }
    }

    #[test]
    fn a_cut_outside_takes_all_or_nothing() {
        for y in [2.0, 3.0, f64::INFINITY] {
            assert_eq!(circle_below_m2(2.0, y), 4.0 * PI);
            assert_eq!(circle_below_m2(2.0, -y), 0.0);
            assert_eq!(rectangle_below_m2(4.0, 3.0, y), 12.0);
            assert_eq!(obround_below_m2(4.0, 7.0, -y), 0.0);
            assert!((obround_below_m2(4.0, 1.0, y) - (0.25 * PI + 3.0)).abs() < 1e-14);
        }
    }

    #[test]
    fn the_series_joins_the_closed_form_and_keeps_its_digits() {
        let (below, above) = (theta_less_sine(0.2), theta_less_sine(0.2 + 1e-12));
        assert!((above / below - 1.0).abs() < 1e-10);
        // (2/3) θ³ (1 − θ²/5) for small angles.
        let tiny: f64 = 1e-4;
        let expected = 2.0 / 3.0 * tiny.powi(3) * (1.0 - tiny * tiny / 5.0);
        assert!((theta_less_sine(tiny) / expected - 1.0).abs() < 1e-14);
    }
}
