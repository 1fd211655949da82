//! The residual Helmholtz energy αʳ(τ, δ), sorted for evaluation on one isotherm.
//!
//! Every form but the non-analytic one is a product `n·A(τ)·B(δ)`. On an
//! isotherm the A(τ) are constants, so they are worked out once and a density
//! costs three multiplications a term. That is what makes a saturation solve,
//! which asks for half a dozen densities at one temperature, cheap.

mod sorting;

use super::non_analytic::NonAnalytic;
use super::powers::{Exponents, Powers};
use super::tau::TauTerm;

pub use sorting::UnequalLists;

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

/// Terms that share exp(−g δˡ).
#[derive(Debug, Clone, PartialEq)]
struct DecayBlock {
    g: f64,
    l: f64,
    l_slot: usize,
    /// First and one past the last term, in `Residual::decay_terms`.
    range: (usize, usize),
}

/// δᵈ inside a block. Published terms that differ in τ only are one term here.
#[derive(Debug, Clone, Copy, PartialEq)]
struct DecayTerm {
    d: f64,
    slot: usize,
}

#[derive(Debug, Clone, Copy, PartialEq)]
struct Bell {
    d: f64,
    slot: usize,
    eta: f64,
    epsilon: f64,
}

/// The τ side of a published term and the term of δ that it belongs to.
#[derive(Debug, Clone, Copy, PartialEq)]
struct Published {
    tau: TauTerm,
    term: usize,
}

/// The residual part, sorted for evaluation.
#[derive(Debug, Clone, Default, PartialEq)]
pub struct Residual {
    exponents: Exponents,
    decays: Vec<DecayBlock>,
    decay_terms: Vec<DecayTerm>,
    bells: Vec<Bell>,
    /// Published terms n τᵗ by their exponent, with the term of δ each belongs to: a power
    /// of τ that several share is worked out once.
    plain: Vec<(f64, Vec<(f64, usize)>)>,
    /// The others. The bells' terms count on from the decays'.
    tau: Vec<Published>,
    non_analytic: Vec<NonAnalytic>,
}

impl Residual {
    /// Terms of δ, each with a τ-factor of its own.
    pub fn count(&self) -> usize {
        self.decay_terms.len() + self.bells.len()
    }

    /// Whether every exponent of δ has a place in the table of powers.
    pub fn fits(&self) -> bool {
        self.count() <= TERM_LIMIT && self.exponents.other.len() <= Exponents::MOST_OTHER
    }

    /// The terms' τ-factors at one reduced inverse temperature τ = T_r/T.
    #[inline]
    pub fn isotherm(&self, tau: f64) -> ResidualIsotherm<'_> {
        let ln_tau = tau.ln();
        let mut factors = [0.0; TERM_LIMIT];
        for (t, published) in &self.plain {
            let power = (t * ln_tau).exp();
            for (n, term) in published {
                factors[*term] += n * power;
            }
        }
        for published in &self.tau {
            factors[published.term] += published.tau.value(tau, ln_tau);
        }
        ResidualIsotherm {
            terms: self,
            tau,
            factors,
        }
    }

    /// Residual entropy over R, τ·∂αʳ/∂τ − αʳ, at two densities of one temperature.
    pub fn entropies(&self, tau: f64, deltas: [f64; 2]) -> [f64; 2] {
        let ln_tau = tau.ln();
        let mut factors = [0.0; TERM_LIMIT];
        for (t, published) in &self.plain {
            let power = (t * ln_tau).exp() * (t - 1.0);
            for (n, term) in published {
                factors[*term] += n * power;
            }
        }
        for published in &self.tau {
            let value = published.tau.value(tau, ln_tau);
            factors[published.term] += value * (published.tau.log_derivatives(tau)[1] - 1.0);
        }
        deltas.map(|delta| {
            let powers = self.exponents.powers(delta);
            let [separable, ..] = self.sum(&factors, delta, &powers);
            let others = self.non_analytic.iter().map(|term| {
                let x = term.derivatives(tau, delta);
                x.t1 - x.a
            });
            separable + others.sum::<f64>()
        })
    }

    /// All derivatives to second order at (τ, δ).
    pub fn derivatives(&self, tau: f64, delta: f64) -> Derivatives {
        let ln_tau = tau.ln();
        let mut by_order = [[0.0; TERM_LIMIT]; 3];
        for (t, published) in &self.plain {
            let power = (t * ln_tau).exp();
            for (factors, derivative) in by_order.iter_mut().zip([1.0, *t, t * (t - 1.0)]) {
                for (n, term) in published {
                    factors[*term] += n * power * derivative;
                }
            }
        }
        for published in &self.tau {
            let value = published.tau.value(tau, ln_tau);
            let derivatives = published.tau.log_derivatives(tau);
            for (factors, derivative) in by_order.iter_mut().zip(derivatives) {
                factors[published.term] += value * derivative;
            }
        }
        let powers = self.exponents.powers(delta);
        let [s0, s1, s2] = by_order.map(|factors| self.sum(&factors, delta, &powers));
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

    /// (αʳ, δαʳ_δ, δ²αʳ_δδ) of the separable terms for given τ-factors.
    fn sum(&self, factors: &[f64; TERM_LIMIT], delta: f64, powers: &Powers) -> [f64; 3] {
        let (mut a, mut d1, mut d2) = (0.0, 0.0, 0.0);
        for block in &self.decays {
            let (mut s0, mut s1, mut s2) = (0.0, 0.0, 0.0);
            let (from, to) = block.range;
            for (term, c) in self.decay_terms[from..to].iter().zip(&factors[from..to]) {
                let x = c * powers[term.slot];
                let y = x * term.d;
                s0 += x;
                s1 += y;
                s2 += y * (term.d - 1.0);
            }
            if block.g == 0.0 {
                a += s0;
                d1 += s1;
                d2 += s2;
            } else {
                let decayed = block.g * powers[block.l_slot];
                let e = (-decayed).exp();
                let u = block.l * decayed;
                a += e * s0;
                d1 += e * (s1 - u * s0);
                d2 += e * (s2 - 2.0 * u * s1 + u * (1.0 + u - block.l) * s0);
            }
        }
        for (term, c) in self.bells.iter().zip(&factors[self.decay_terms.len()..]) {
            let off = delta - term.epsilon;
            let x = c * powers[term.slot] * (-term.eta * off * off).exp();
            let q = term.d - 2.0 * term.eta * delta * off;
            a += x;
            d1 += x * q;
            d2 += x * (q * q - term.d - 2.0 * term.eta * delta * delta);
        }
        [a, d1, d2]
    }
}

/// Largest number of terms of δ that an equation may have; the published ones have 44
/// at most once terms that differ in τ only are one.
pub const TERM_LIMIT: usize = 64;

/// αʳ on one isotherm.
#[derive(Debug, Clone)]
pub struct ResidualIsotherm<'a> {
    terms: &'a Residual,
    tau: f64,
    factors: [f64; TERM_LIMIT],
}

impl ResidualIsotherm<'_> {
    /// (αʳ, δαʳ_δ, δ²αʳ_δδ) at a reduced density δ = ρ/ρ_r.
    #[inline]
    pub fn at(&self, delta: f64) -> [f64; 3] {
        let powers = self.terms.exponents.powers(delta);
        let mut sum = self.terms.sum(&self.factors, delta, &powers);
        for term in &self.terms.non_analytic {
            let x = term.derivatives(self.tau, delta);
            sum[0] += x.a;
            sum[1] += x.d1;
            sum[2] += x.d2;
        }
        sum
    }
}
