//! The residual term forms as published, as an asset carries them.

use serde::Deserialize;

/// One block of terms of one published form; lists run in parallel.
///
/// | form | term |
/// |---|---|
/// | `Power` | n τᵗ δᵈ exp(−δˡ), no exponential where l = 0 |
/// | `Exponential` | n τᵗ δᵈ exp(−g δˡ) |
/// | `Gaussian` | n τᵗ δᵈ exp(−η(δ−ε)² − β(τ−γ)²) |
/// | `NonAnalytic` | n Δᵇ δ ψ, IAPWS R6-95 table 2, terms 55 and 56 |
/// | `GaoB` | n τᵗ δᵈ exp(η(δ−ε)² + 1/(b + β(τ−γ)²)), Gao et al. 2020 |
/// | `DoubleExponential` | n τᵗ δᵈ exp(−g_d δ^l_d − g_t τ^l_t), de Reuck and Craven 1993 |
/// | `Lemmon2005` | n τᵗ δᵈ exp(−δˡ) exp(−τᵐ), no factor where the exponent is 0 |
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum ResidualTerms {
    Power {
        n: Vec<f64>,
        t: Vec<f64>,
        d: Vec<f64>,
        l: Vec<f64>,
    },
    Exponential {
        n: Vec<f64>,
        t: Vec<f64>,
        d: Vec<f64>,
        g: Vec<f64>,
        l: Vec<f64>,
    },
    Gaussian {
        n: Vec<f64>,
        t: Vec<f64>,
        d: Vec<f64>,
        eta: Vec<f64>,
        epsilon: Vec<f64>,
        beta: Vec<f64>,
        gamma: Vec<f64>,
    },
    NonAnalytic {
        n: Vec<f64>,
        a: Vec<f64>,
        b: Vec<f64>,
        beta: Vec<f64>,
        big_a: Vec<f64>,
        big_b: Vec<f64>,
        big_c: Vec<f64>,
        big_d: Vec<f64>,
    },
    GaoB {
        n: Vec<f64>,
        t: Vec<f64>,
        d: Vec<f64>,
        eta: Vec<f64>,
        epsilon: Vec<f64>,
        beta: Vec<f64>,
        gamma: Vec<f64>,
        b: Vec<f64>,
    },
    DoubleExponential {
        n: Vec<f64>,
        t: Vec<f64>,
        d: Vec<f64>,
        gd: Vec<f64>,
        ld: Vec<f64>,
        gt: Vec<f64>,
        lt: Vec<f64>,
    },
    Lemmon2005 {
        n: Vec<f64>,
        t: Vec<f64>,
        d: Vec<f64>,
        l: Vec<f64>,
        m: Vec<f64>,
    },
}

impl ResidualTerms {
    /// Every list of the block; `n` first.
    pub(super) fn lists(&self) -> Vec<&Vec<f64>> {
        match self {
            Self::Power { n, t, d, l } => vec![n, t, d, l],
            Self::Exponential { n, t, d, g, l } => vec![n, t, d, g, l],
            Self::Gaussian {
                n,
                t,
                d,
                eta,
                epsilon,
                beta,
                gamma,
            } => {
                vec![n, t, d, eta, epsilon, beta, gamma]
            }
            Self::NonAnalytic {
                n,
                a,
                b,
                beta,
                big_a,
                big_b,
                big_c,
                big_d,
            } => {
                vec![n, a, b, beta, big_a, big_b, big_c, big_d]
            }
            Self::GaoB {
                n,
                t,
                d,
                eta,
                epsilon,
                beta,
                gamma,
                b,
            } => {
                vec![n, t, d, eta, epsilon, beta, gamma, b]
            }
            Self::DoubleExponential {
                n,
                t,
                d,
                gd,
                ld,
                gt,
                lt,
            } => vec![n, t, d, gd, ld, gt, lt],
            Self::Lemmon2005 { n, t, d, l, m } => vec![n, t, d, l, m],
        }
    }
}
