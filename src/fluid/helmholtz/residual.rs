//! The residual Helmholtz energy αʳ(τ, δ): term forms as published, and their
//! evaluation on one isotherm.
//!
//! Every form but the non-analytic one is a product `n·A(τ)·B(δ)`. On an
//! isotherm the A(τ) are constants, so they are worked out once and a density
//! costs three multiplications a term. That is what makes a saturation solve,
//! which asks for a dozen densities at one temperature, cheap.

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

/// Scaled derivatives of αʳ: `d1 = δ·∂αʳ/∂δ`, `d2 = δ²·∂²αʳ/∂δ²`, and with τ
/// likewise (`t1`, `t2`, `d1t1`).
#[derive(Debug, Clone, Copy, Default, PartialEq)]
pub struct Derivatives {
    pub a: f64,
    pub d1: f64,
    pub d2: f64,
    pub t1: f64,
    pub t2: f64,
    pub d1t1: f64,
}

/// The τ-dependent factor beside n τᵗ.
#[derive(Debug, Clone, Copy, PartialEq)]
enum TauFactor {
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
struct TauTerm {
    n: f64,
    t: f64,
    factor: TauFactor,
}

/// δᵈ of a block that shares exp(−g δˡ).
#[derive(Debug, Clone, PartialEq)]
struct DecayBlock {
    g: f64,
    l: f64,
    /// First and one past the last term, in `Residual::decay_terms`.
    range: (usize, usize),
}

#[derive(Debug, Clone, Copy, PartialEq)]
struct DeltaPower {
    /// Index into the table of distinct exponents.
    slot: usize,
    d: f64,
}

#[derive(Debug, Clone, Copy, PartialEq)]
struct Bell {
    d: f64,
    eta: f64,
    epsilon: f64,
}

#[derive(Debug, Clone, Copy, PartialEq)]
struct NonAnalytic {
    n: f64,
    a: f64,
    b: f64,
    beta: f64,
    big_a: f64,
    big_b: f64,
    big_c: f64,
    big_d: f64,
}

/// The residual part, sorted for evaluation.
#[derive(Debug, Clone, Default, PartialEq)]
pub struct Residual {
    exponents: Vec<f64>,
    decays: Vec<DecayBlock>,
    decay_powers: Vec<DeltaPower>,
    decay_tau: Vec<TauTerm>,
    bells: Vec<Bell>,
    bell_tau: Vec<TauTerm>,
    non_analytic: Vec<NonAnalytic>,
}

/// Lists of one block differ in length.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
#[error("residual block {block}: its lists must have equal length, {expected} as in n")]
pub struct UnequalLists {
    pub block: usize,
    pub expected: usize,
}

impl Residual {
    /// Sorts published blocks for evaluation.
    ///
    /// # Errors
    /// [`UnequalLists`] if the lists of a block differ in length.
    pub fn new(blocks: &[ResidualTerms]) -> Result<Self, UnequalLists> {
        let mut decays: Vec<(f64, f64, f64, TauTerm)> = Vec::new();
        let mut residual = Self::default();
        for (block, terms) in blocks.iter().enumerate() {
            let lists = terms.lists();
            let expected = lists[0].len();
            if lists.iter().any(|list| list.len() != expected) {
                return Err(UnequalLists { block, expected });
            }
            for i in 0..expected {
                residual.add(terms, i, &mut decays);
            }
        }
        decays.sort_by(|x, y| {
            (x.1, x.0)
                .partial_cmp(&(y.1, y.0))
                .unwrap_or(std::cmp::Ordering::Equal)
        });
        for (g, l, d, tau) in decays {
            let slot = match residual.exponents.iter().position(|known| *known == d) {
                Some(slot) => slot,
                None => {
                    residual.exponents.push(d);
                    residual.exponents.len() - 1
                }
            };
            let index = residual.decay_powers.len();
            residual.decay_powers.push(DeltaPower { slot, d });
            residual.decay_tau.push(tau);
            match residual.decays.last_mut() {
                Some(last) if last.g == g && last.l == l => last.range.1 = index + 1,
                _ => residual.decays.push(DecayBlock {
                    g,
                    l,
                    range: (index, index + 1),
                }),
            }
        }
        Ok(residual)
    }

    fn add(&mut self, terms: &ResidualTerms, i: usize, decays: &mut Vec<(f64, f64, f64, TauTerm)>) {
        let plain = |n: f64, t: f64| TauTerm {
            n,
            t,
            factor: TauFactor::One,
        };
        match terms {
            ResidualTerms::Power { n, t, d, l } => {
                let g = if l[i] == 0.0 { 0.0 } else { 1.0 };
                decays.push((g, l[i], d[i], plain(n[i], t[i])));
            }
            ResidualTerms::Exponential { n, t, d, g, l } => {
                decays.push((g[i], l[i], d[i], plain(n[i], t[i])));
            }
            ResidualTerms::DoubleExponential {
                n,
                t,
                d,
                gd,
                ld,
                gt,
                lt,
            } => {
                let factor = TauFactor::Decay { g: gt[i], l: lt[i] };
                decays.push((
                    gd[i],
                    ld[i],
                    d[i],
                    TauTerm {
                        n: n[i],
                        t: t[i],
                        factor,
                    },
                ));
            }
            ResidualTerms::Lemmon2005 { n, t, d, l, m } => {
                let g = if l[i] == 0.0 { 0.0 } else { 1.0 };
                let factor = if m[i] == 0.0 {
                    TauFactor::One
                } else {
                    TauFactor::Decay { g: 1.0, l: m[i] }
                };
                decays.push((
                    g,
                    l[i],
                    d[i],
                    TauTerm {
                        n: n[i],
                        t: t[i],
                        factor,
                    },
                ));
            }
            ResidualTerms::Gaussian {
                n,
                t,
                d,
                eta,
                epsilon,
                beta,
                gamma,
            } => {
                self.bells.push(Bell {
                    d: d[i],
                    eta: eta[i],
                    epsilon: epsilon[i],
                });
                let factor = TauFactor::Bell {
                    beta: beta[i],
                    gamma: gamma[i],
                };
                self.bell_tau.push(TauTerm {
                    n: n[i],
                    t: t[i],
                    factor,
                });
            }
            ResidualTerms::GaoB {
                n,
                t,
                d,
                eta,
                epsilon,
                beta,
                gamma,
                b,
            } => {
                // Published with exp(+η(δ−ε)²) and η negative.
                self.bells.push(Bell {
                    d: d[i],
                    eta: -eta[i],
                    epsilon: epsilon[i],
                });
                let factor = TauFactor::GaoB {
                    b: b[i],
                    beta: beta[i],
                    gamma: gamma[i],
                };
                self.bell_tau.push(TauTerm {
                    n: n[i],
                    t: t[i],
                    factor,
                });
            }
            ResidualTerms::NonAnalytic {
                n,
                a,
                b,
                beta,
                big_a,
                big_b,
                big_c,
                big_d,
            } => {
                self.non_analytic.push(NonAnalytic {
                    n: n[i],
                    a: a[i],
                    b: b[i],
                    beta: beta[i],
                    big_a: big_a[i],
                    big_b: big_b[i],
                    big_c: big_c[i],
                    big_d: big_d[i],
                });
            }
        }
    }

    /// The terms' τ-factors at one reduced inverse temperature τ = T_r/T.
    pub fn isotherm(&self, tau: f64) -> ResidualIsotherm<'_> {
        let ln_tau = tau.ln();
        let factors =
            |terms: &[TauTerm]| terms.iter().map(|term| term.value(tau, ln_tau)).collect();
        ResidualIsotherm {
            terms: self,
            tau,
            decay: factors(&self.decay_tau),
            bell: factors(&self.bell_tau),
        }
    }

    /// All derivatives to second order at (τ, δ).
    pub fn derivatives(&self, tau: f64, delta: f64) -> Derivatives {
        let ln_tau = tau.ln();
        let mut by_order = [(); 3].map(|()| (Vec::new(), Vec::new()));
        for (order, (decay, bell)) in by_order.iter_mut().enumerate() {
            let scaled =
                |term: &TauTerm| term.value(tau, ln_tau) * term.log_derivatives(tau)[order];
            decay.extend(self.decay_tau.iter().map(scaled));
            bell.extend(self.bell_tau.iter().map(scaled));
        }
        let powers = self.powers(delta);
        let [s0, s1, s2] = by_order.map(|(decay, bell)| self.sum(&decay, &bell, delta, &powers));
        let mut total = Derivatives {
            a: s0[0],
            d1: s0[1],
            d2: s0[2],
            t1: s1[0],
            t2: s2[0],
            d1t1: s1[1],
        };
        for term in &self.non_analytic {
            let x = term.derivatives(tau, delta);
            total.a += x.a;
            total.d1 += x.d1;
            total.d2 += x.d2;
            total.t1 += x.t1;
            total.t2 += x.t2;
            total.d1t1 += x.d1t1;
        }
        total
    }

    fn powers(&self, delta: f64) -> [f64; MOST_EXPONENTS] {
        let mut powers = [0.0; MOST_EXPONENTS];
        for (power, d) in powers.iter_mut().zip(&self.exponents) {
            *power = raise(delta, *d);
        }
        powers
    }

    /// (αʳ, δαʳ_δ, δ²αʳ_δδ) of the separable terms for given τ-factors.
    fn sum(
        &self,
        decay: &[f64],
        bell: &[f64],
        delta: f64,
        powers: &[f64; MOST_EXPONENTS],
    ) -> [f64; 3] {
        let (mut a, mut d1, mut d2) = (0.0, 0.0, 0.0);
        for block in &self.decays {
            let (mut s0, mut s1, mut s2) = (0.0, 0.0, 0.0);
            let (from, to) = block.range;
            for (power, c) in self.decay_powers[from..to].iter().zip(&decay[from..to]) {
                let x = c * powers[power.slot];
                let y = x * power.d;
                s0 += x;
                s1 += y;
                s2 += y * (power.d - 1.0);
            }
            if block.g == 0.0 {
                a += s0;
                d1 += s1;
                d2 += s2;
            } else {
                let decayed = block.g * raise(delta, block.l);
                let e = (-decayed).exp();
                let u = block.l * decayed;
                a += e * s0;
                d1 += e * (s1 - u * s0);
                d2 += e * (s2 - 2.0 * u * s1 + u * (1.0 + u - block.l) * s0);
            }
        }
        for (term, c) in self.bells.iter().zip(bell) {
            let off = delta - term.epsilon;
            let x = c * raise(delta, term.d) * (-term.eta * off * off).exp();
            let q = term.d - 2.0 * term.eta * delta * off;
            a += x;
            d1 += x * q;
            d2 += x * (q * q - term.d - 2.0 * term.eta * delta * delta);
        }
        [a, d1, d2]
    }
}

/// More distinct exponents of δ than any published equation has (at most 16 so far).
const MOST_EXPONENTS: usize = 32;

/// Largest number of distinct exponents of δ that an equation may have.
pub const EXPONENT_LIMIT: usize = MOST_EXPONENTS;

/// αʳ on one isotherm.
#[derive(Debug, Clone)]
pub struct ResidualIsotherm<'a> {
    terms: &'a Residual,
    tau: f64,
    decay: Vec<f64>,
    bell: Vec<f64>,
}

impl ResidualIsotherm<'_> {
    /// (αʳ, δαʳ_δ, δ²αʳ_δδ) at a reduced density δ = ρ/ρ_r.
    pub fn at(&self, delta: f64) -> [f64; 3] {
        let powers = self.terms.powers(delta);
        let mut sum = self.terms.sum(&self.decay, &self.bell, delta, &powers);
        for term in &self.terms.non_analytic {
            let x = term.derivatives(self.tau, delta);
            sum[0] += x.a;
            sum[1] += x.d1;
            sum[2] += x.d2;
        }
        sum
    }
}

impl Residual {
    /// Number of distinct exponents of δ.
    pub fn distinct_exponents(&self) -> usize {
        self.exponents.len()
    }
}

impl ResidualTerms {
    fn lists(&self) -> Vec<&Vec<f64>> {
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

impl TauTerm {
    fn value(&self, tau: f64, ln_tau: f64) -> f64 {
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
    fn log_derivatives(&self, tau: f64) -> [f64; 3] {
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

impl NonAnalytic {
    /// IAPWS R6-95(2018), table 5, scaled by powers of δ and τ.
    fn derivatives(&self, tau: f64, delta: f64) -> Derivatives {
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
        let root = square.powf(0.5 / beta);
        let theta = (1.0 - tau) + big_a * root;
        let bump = big_b * square.powf(a);
        let distance = theta * theta + bump;
        if distance <= 0.0 {
            return Derivatives::default();
        }
        let psi = (-big_c * square - big_d * (tau - 1.0).powi(2)).exp();
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

/// xᵉ, by multiplication where the exponent is a small whole number.
fn raise(x: f64, exponent: f64) -> f64 {
    let whole = exponent as i32;
    if f64::from(whole) == exponent {
        x.powi(whole)
    } else {
        x.powf(exponent)
    }
}
