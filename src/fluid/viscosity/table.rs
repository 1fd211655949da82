//! Correlations over temperature alone, as handbooks print them.

use serde::Deserialize;

/// η(T), Pa·s and K.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum TableForm {
    /// exp(c₁ + c₂/T + c₃ ln T + c₄T^c₅): DIPPR 101, a liquid.
    Dippr101(f64, f64, f64, f64, f64),
    /// c₁T^c₂/(1 + c₃/T + c₄/T²): DIPPR 102, a vapour.
    Dippr102(f64, f64, f64, f64),
    /// E·exp(A x^(1/3) + B x^(4/3)), x = (C − T)/(T − D), as (A, B, C, D, E): PPDS 9, a liquid.
    Ppds9(f64, f64, f64, f64, f64),
    /// A + BT + CT² + DT³ + ET⁴, a vapour.
    Polynomial(f64, f64, f64, f64, f64),
    /// 10^(A + B/(C − T)) mPa·s: Viswanath and Natarajan, a liquid.
    Viswanath(f64, f64, f64),
}

impl TableForm {
    pub fn at(&self, t: f64) -> f64 {
        match *self {
            Self::Dippr101(c1, c2, c3, c4, c5) => {
                (c1 + c2 / t + c3 * t.ln() + c4 * t.powf(c5)).exp()
            }
            Self::Dippr102(c1, c2, c3, c4) => c1 * t.powf(c2) / (1.0 + c3 / t + c4 / (t * t)),
            Self::Ppds9(a, b, c, d, e) => {
                let x = (c - t) / (t - d);
                let third = x.cbrt();
                e * (a * third + b * x * third).exp()
            }
            Self::Polynomial(a, b, c, d, e) => a + t * (b + t * (c + t * (d + t * e))),
            Self::Viswanath(a, b, c) => 10.0_f64.powf(a + b / (c - t)) * 1e-3,
        }
    }
}
