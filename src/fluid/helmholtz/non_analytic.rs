//! The non-analytic term of water and carbon dioxide near the critical point.

use super::residual::Derivatives;

#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct NonAnalytic {
    pub(super) n: f64,
    pub(super) a: f64,
    pub(super) b: f64,
    pub(super) beta: f64,
    pub(super) big_a: f64,
    pub(super) big_b: f64,
    pub(super) big_c: f64,
    pub(super) big_d: f64,
}

/// exp(−80) is 2e-35; the derivatives' prefactors are below 1e6.
const FADED: f64 = 80.0;

impl NonAnalytic {
    /// IAPWS R6-95(2018), table 5, scaled by powers of δ and τ.
    pub(super) fn derivatives(&self, tau: f64, delta: f64) -> Derivatives {
        // (δ−1)² stands under a root: at δ = 1 the second derivative does not
        // exist. A step far below a double's resolution of any density moves off it.
        let off = if (delta - 1.0).abs() < 1e-14 {
            1e-14
        } else {
            delta - 1.0
        };
        let Self {
            n,
            a,
            b,
            beta,
            big_a,
            big_b,
            big_c,
            big_d,
        } = *self;
        let square = off * off;
        // Far from the critical point ψ puts the term below the last digit of everything.
        let fade = big_c * square + big_d * (tau - 1.0).powi(2);
        if fade > FADED {
            return Derivatives::default();
        }
        let root = square.powf(0.5 / beta);
        let theta = (1.0 - tau) + big_a * root;
        let bump = big_b * square.powf(a);
        let distance = theta * theta + bump;
        if distance <= 0.0 {
            return Derivatives::default();
        }
        let psi = (-fade).exp();
        let psi_d = -2.0 * big_c * off * psi;
        let psi_dd = (2.0 * big_c * square - 1.0) * 2.0 * big_c * psi;
        let psi_t = -2.0 * big_d * (tau - 1.0) * psi;
        let psi_tt = (2.0 * big_d * (tau - 1.0).powi(2) - 1.0) * 2.0 * big_d * psi;
        let psi_dt = 4.0 * big_c * big_d * off * (tau - 1.0) * psi;

        // root/off² and bump/off², written so that nothing divides by zero.
        let slope = big_a * theta * (2.0 / beta) * root / square + 2.0 * a * bump / square;
        let distance_d = off * slope;
        let distance_dd = slope
            + 4.0 * a * (a - 1.0) * bump / square
            + 2.0 * (big_a / beta).powi(2) * root * root / square
            + big_a * theta * (4.0 / beta) * (0.5 / beta - 1.0) * root / square;

        let power = distance.powf(b);
        let over = power / distance;
        let power_d = b * over * distance_d;
        let power_dd =
            b * (over * distance_dd + (b - 1.0) * over / distance * distance_d * distance_d);
        let power_t = -2.0 * theta * b * over;
        let power_tt = 2.0 * b * over + 4.0 * theta * theta * b * (b - 1.0) * over / distance;
        let power_dt = -big_a * b * (2.0 / beta) * over * root / square * off
            - 2.0 * theta * b * (b - 1.0) * over / distance * distance_d;

        let d = delta;
        Derivatives {
            a: n * power * d * psi,
            d1: n * d * (power * (psi + d * psi_d) + power_d * d * psi),
            d2: n
                * d
                * d
                * (power * (2.0 * psi_d + d * psi_dd)
                    + 2.0 * power_d * (psi + d * psi_d)
                    + power_dd * d * psi),
            t1: n * tau * d * (power_t * psi + power * psi_t),
            t2: n * tau * tau * d * (power_tt * psi + 2.0 * power_t * psi_t + power * psi_tt),
            d1t1: n
                * d
                * tau
                * (power * (psi_t + d * psi_dt)
                    + d * power_d * psi_t
                    + power_t * (psi + d * psi_d)
                    + power_dt * d * psi),
        }
    }
}
