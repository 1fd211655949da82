//! From published blocks to terms sorted for evaluation.

use super::super::non_analytic::NonAnalytic;
use super::super::tau::{TauFactor, TauTerm};
use super::super::terms::ResidualTerms;
use super::{Bell, DecayBlock, DecayTerm, Published, Residual};

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
        let mut bell_tau = Vec::new();
        let mut residual = Self::default();
        for (block, terms) in blocks.iter().enumerate() {
            let lists = terms.lists();
            let expected = lists[0].len();
            if lists.iter().any(|list| list.len() != expected) {
                return Err(UnequalLists { block, expected });
            }
            for i in 0..expected {
                residual.add(terms, i, &mut decays, &mut bell_tau);
            }
        }
        decays.sort_by(|x, y| {
            x.1.total_cmp(&y.1)
                .then(x.0.total_cmp(&y.0))
                .then(x.2.total_cmp(&y.2))
        });
        for (g, l, d, tau) in decays {
            let block_goes_on =
                matches!(residual.decays.last(), Some(last) if last.g == g && last.l == l);
            let same_term =
                block_goes_on && matches!(residual.decay_terms.last(), Some(last) if last.d == d);
            if !same_term {
                let slot = residual.exponents.slot(d);
                residual.decay_terms.push(DecayTerm { d, slot });
            }
            let end = residual.decay_terms.len();
            if !block_goes_on {
                let l_slot = residual.exponents.slot(l);
                residual.decays.push(DecayBlock {
                    g,
                    l,
                    l_slot,
                    range: (end - 1, end),
                });
            }
            if let Some(block) = residual.decays.last_mut() {
                block.range.1 = end;
            }
            residual.add_tau(tau, end - 1);
        }
        let first_bell = residual.decay_terms.len();
        for (i, tau) in bell_tau.into_iter().enumerate() {
            residual.add_tau(tau, first_bell + i);
        }
        Ok(residual)
    }

    fn add_tau(&mut self, tau: TauTerm, term: usize) {
        if tau.factor != TauFactor::One {
            self.tau.push(Published { tau, term });
            return;
        }
        match self.plain.iter_mut().find(|(t, _)| *t == tau.t) {
            Some((_, published)) => published.push((tau.n, term)),
            None => self.plain.push((tau.t, vec![(tau.n, term)])),
        }
    }

    fn add(
        &mut self,
        terms: &ResidualTerms,
        i: usize,
        decays: &mut Vec<(f64, f64, f64, TauTerm)>,
        bell_tau: &mut Vec<TauTerm>,
    ) {
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
                let slot = self.exponents.slot(d[i]);
                self.bells.push(Bell {
                    d: d[i],
                    slot,
                    eta: eta[i],
                    epsilon: epsilon[i],
                });
                let factor = TauFactor::Bell {
                    beta: beta[i],
                    gamma: gamma[i],
                };
                bell_tau.push(TauTerm {
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
                let slot = self.exponents.slot(d[i]);
                self.bells.push(Bell {
                    d: d[i],
                    slot,
                    eta: -eta[i],
                    epsilon: epsilon[i],
                });
                let factor = TauFactor::GaoB {
                    b: b[i],
                    beta: beta[i],
                    gamma: gamma[i],
                };
                bell_tau.push(TauTerm {
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
}
