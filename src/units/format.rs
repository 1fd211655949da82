//! Numbers as text: significant figures, and rounding to the careful side.

/// `value` to `digits` significant figures, in plain decimals where they are
/// readable and with an exponent elsewhere. Trailing zeros are kept: they say
/// how far the figure is known.
pub fn figures(value: f64, digits: usize) -> String {
    if value == 0.0 {
        return "0".to_owned();
    }
    let rounded = format!("{:.*e}", digits.saturating_sub(1), value);
    let exponent: i32 = rounded
        .split_once('e')
        .and_then(|(_, exponent)| exponent.parse().ok())
        .unwrap_or(0);
    let digits = digits as i32;
    if exponent < -4 || exponent >= digits.max(6) {
        return rounded;
    }
    let decimals = (digits - 1 - exponent).max(0) as usize;
    let number: f64 = rounded.parse().unwrap_or(value);
    format!("{number:.decimals$}")
}

/// The greatest number of `digits` significant figures not above `value`.
pub fn careful_down(value: f64, digits: i32) -> f64 {
    stepped(value, digits, f64::floor)
}

/// The least number of `digits` significant figures not below `value`.
pub fn careful_up(value: f64, digits: i32) -> f64 {
    stepped(value, digits, f64::ceil)
}

fn stepped(value: f64, digits: i32, round: fn(f64) -> f64) -> f64 {
    if value == 0.0 || !value.is_finite() {
        return value;
    }
    let exponent = digits - 1 - value.abs().log10().floor() as i32;
    // Scaling by a power of ten up to 1e22 is exact, so a value that already
    // has this many figures does not move.
    let scale = 10f64.powi(exponent.abs());
    let (scaled, back): (f64, fn(f64, f64) -> f64) = if exponent >= 0 {
        (value * scale, |x, s| x / s)
    } else {
        (value / scale, |x, s| x * s)
    };
    let nearest = scaled.round();
    let stepped = if (scaled - nearest).abs() <= 4.0 * f64::EPSILON * nearest.abs() {
        nearest
    } else {
        round(scaled)
    };
    back(stepped, scale)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn figures_keep_their_count() {
        assert_eq!(figures(3.21449, 4), "3.214");
        assert_eq!(figures(0.04, 3), "0.0400");
        assert_eq!(figures(9.9999, 3), "10.0");
        assert_eq!(figures(123_456.0, 4), "123500");
        assert_eq!(figures(1.0e-9, 3), "1.00e-9");
        assert_eq!(figures(-12.345, 3), "-12.3");
        assert_eq!(figures(0.0, 3), "0");
    }

    #[test]
    fn careful_rounding_moves_one_way_and_only_when_needed() {
        assert_eq!(careful_down(74.29, 3), 74.2);
        assert_eq!(careful_up(0.7012, 2), 0.71);
        assert_eq!(careful_down(0.3, 2), 0.3);
        assert_eq!(careful_up(0.3, 2), 0.3);
        assert_eq!(careful_down(-1.25, 2), -1.3);
    }
}
