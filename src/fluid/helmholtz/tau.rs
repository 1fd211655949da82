//! The temperature side A(τ) of a separable term, with its derivatives.

/// The τ-dependent factor beside n τᵗ.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) enum TauFactor {
    One,
    /// exp(−β(τ−γ)²)
    Bell {
        beta: f64,
        gamma: f64,
    },
    /// exp(1/(b + β(τ−γ)²))
    GaoB {
        b: f64,
        beta: f64,
        gamma: f64,
    },
    /// exp(−g τˡ)
    Decay {
        g: f64,
        l: f64,
    },
}

#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct TauTerm {
    pub(super) n: f64,
    pub(super) t: f64,
    pub(super) factor: TauFactor,
}

impl TauTerm {
    pub(super) fn value(&self, tau: f64, ln_tau: f64) -> f64 {
        let exponent = self.t * ln_tau;
        let exponent = match self.factor {
            TauFactor::One => exponent,
            TauFactor::Bell { beta, gamma } => exponent - beta * (tau - gamma).powi(2),
            TauFactor::GaoB { b, beta, gamma } => {
                exponent + 1.0 / (b + beta * (tau - gamma).powi(2))
            }
            TauFactor::Decay { g, l } => exponent - g * raise(tau, l),
        };
        self.n * exponent.exp()
    }

    /// [1, τA′/A, τ²A″/A].
    pub(super) fn log_derivatives(&self, tau: f64) -> [f64; 3] {
        // (τL′, τ²L″) of the logarithm L of the factor.
        let (first, second) = match self.factor {
            TauFactor::One => (0.0, 0.0),
            TauFactor::Bell { beta, gamma } => {
                (-2.0 * beta * tau * (tau - gamma), -2.0 * beta * tau * tau)
            }
            TauFactor::GaoB { b, beta, gamma } => {
                let off = tau - gamma;
                let v = b + beta * off * off;
                let v1 = 2.0 * beta * off;
                let v2 = 2.0 * beta;
                (
                    -tau * v1 / (v * v),
                    tau * tau * (2.0 * v1 * v1 / v - v2) / (v * v),
                )
            }
            TauFactor::Decay { g, l } => {
                let x = g * raise(tau, l);
                (-l * x, -l * (l - 1.0) * x)
            }
        };
        let q = self.t + first;
        [1.0, q, q * q - self.t + second]
    }
}

/// xᵉ, by multiplication where the exponent is a small whole number.
pub(super) fn raise(x: f64, exponent: f64) -> f64 {
    let whole = exponent as i32;
    if f64::from(whole) == exponent {
        x.powi(whole)
    } else {
        x.powf(exponent)
    }
}
