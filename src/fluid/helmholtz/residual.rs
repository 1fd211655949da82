//! The residual Helmholtz energy αʳ(τ, δ), sorted for evaluation on one isotherm.
//!
//! Every form but the non-analytic one is a product `n·A(τ)·B(δ)`. On an
//! isotherm the A(τ) are constants, so they are worked out once and a density
//! costs three multiplications a term. That is what makes a saturation solve,
//! which asks for a dozen densities at one temperature, cheap.

use super::non_analytic::NonAnalytic;
use super::tau::{TauFactor, TauTerm, raise};
use super::terms::ResidualTerms;

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
