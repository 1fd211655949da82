//! What density adds beyond the first order.

use serde::Deserialize;

use super::{Here, powers};

/// Δη(T, ρ), Pa·s; δ = ρ/ρ_r and τ = T_r/T with the paper's own reducing point.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum Residual {
    /// Σ a δᵈ τᵗ exp(−γ δˡ), as (a, d, t, γ, l), plus
    /// Σ f δᵈ τᵗ · (1/(δ₀ − δ) − 1/δ₀), as (f, d, t), with the close-packed density
    /// δ₀(τ) = Σ g τʰ/Σ p τ^q: Batschinski and Hildebrand's free volume.
    FreeVolume {
        reducing: Reducing,
        terms: Vec<(f64, f64, f64, f64, f64)>,
        #[serde(default)]
        free_volume: Vec<(f64, f64, f64)>,
        #[serde(default)]
        close_packed: Vec<(f64, f64)>,
        #[serde(default)]
        close_packed_under: Vec<(f64, f64)>,
    },
    /// Σ of fractions, above and below sums of n δᵈ (T/T_r)ᵗ; nothing below is 1.
    Fractions {
        reducing: Reducing,
        terms: Vec<Fraction>,
    },
    /// c δ² exp(a₁T_r + a₂/T_r + a₃δ²/(a₄ + T_r) + a₅δ⁶), T_r = T/T_reducing: Muzny, Huber
    /// and Kazakov 2013, hydrogen.
    Hydrogen {
        reducing: Reducing,
        c: f64,
        a: (f64, f64, f64, f64, f64),
    },
    /// From the pressure's attractive and repulsive parts: Quiñones-Cisneros and Deiters 2006.
    Friction(Box<Friction>),
}

#[derive(Debug, Clone, Copy, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Reducing {
    pub temperature_k: f64,
    pub density_mol_per_m3: f64,
}

/// Each term is (n, d, t).
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Fraction {
    over: Vec<(f64, f64, f64)>,
    #[serde(default)]
    under: Vec<(f64, f64, f64)>,
}

/// Friction coefficients k = (A₀ + A₁ψ₁ + A₂ψ₂)·τᴺ with ψ₁ = exp(τ) − c₁ and
/// ψ₂ = exp(τ²) − c₂; pressures in bar. `None` is 0.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Friction {
    reducing_temperature_k: f64,
    c1: f64,
    c2: f64,
    /// Of the ideal pressure ρRT.
    ideal: Coefficient,
    /// Of the attractive pressure p − T ∂p/∂T.
    attractive: Coefficient,
    /// Of the repulsive pressure T ∂p/∂T less the ideal.
    repulsive: Coefficient,
    attractive_squared: Coefficient,
    #[serde(default)]
    ideal_squared: Option<Coefficient>,
    /// Of (T ∂p/∂T)².
    #[serde(default)]
    thermal_squared: Option<Coefficient>,
    /// Of (T ∂p/∂T − ρRT)².
    #[serde(default)]
    repulsive_squared: Option<Coefficient>,
    #[serde(default)]
    attractive_cubed: Option<Coefficient>,
    /// Of (T ∂p/∂T)³.
    #[serde(default)]
    thermal_cubed: Option<Coefficient>,
}

/// (A₀, A₁, A₂, N).
type Coefficient = (f64, f64, f64, f64);

impl Residual {
    pub fn at(&self, here: Here) -> f64 {
        match self {
            Self::FreeVolume {
                reducing,
                terms,
                free_volume,
                close_packed,
                close_packed_under,
            } => {
                let (delta, tau) = (reducing.delta(here), reducing.temperature_k / here.t);
                let plain: f64 = terms
                    .iter()
                    .map(|(a, d, t, gamma, l)| {
                        a * delta.powf(*d) * tau.powf(*t) * (-gamma * delta.powf(*l)).exp()
                    })
                    .sum();
                if free_volume.is_empty() {
                    return plain;
                }
                let under = if close_packed_under.is_empty() {
                    1.0
                } else {
                    powers(close_packed_under, tau)
                };
                let packed = powers(close_packed, tau) / under;
                let free = 1.0 / (packed - delta) - 1.0 / packed;
                plain + monomials(free_volume, delta, tau) * free
            }
            Self::Fractions { reducing, terms } => {
                let (delta, tr) = (reducing.delta(here), here.t / reducing.temperature_k);
                terms
                    .iter()
                    .map(|fraction| {
                        let over = monomials(&fraction.over, delta, tr);
                        match fraction.under.as_slice() {
                            [] => over,
                            under => over / monomials(under, delta, tr),
                        }
                    })
                    .sum()
            }
            Self::Hydrogen { reducing, c, a } => {
                let (delta, tr) = (reducing.delta(here), here.t / reducing.temperature_k);
                let exponent =
                    a.0 * tr + a.1 / tr + a.2 * delta.powi(2) / (a.3 + tr) + a.4 * delta.powi(6);
                c * delta.powi(2) * exponent.exp()
            }
            Self::Friction(form) => form.at(here),
        }
    }
}

impl Reducing {
    fn delta(&self, here: Here) -> f64 {
        here.rho / self.density_mol_per_m3
    }
}

impl Friction {
    fn at(&self, here: Here) -> f64 {
        let tau = self.reducing_temperature_k / here.t;
        let psi = (tau.exp() - self.c1, (tau * tau).exp() - self.c2);
        let k = |a: Coefficient| (a.0 + a.1 * psi.0 + a.2 * psi.1) * tau.powf(a.3);
        let maybe = |a: Option<Coefficient>| a.map_or(0.0, k);
        let bar = 1e-5;
        let p = here.equation.isotherm(here.t).pressure(here.rho) * bar;
        let thermal = here.t * here.equation.caloric(here.t, here.rho).pressure_slope * bar;
        let ideal = here.rho * here.equation.data().gas_constant_j_per_mol_k * here.t * bar;
        let (attractive, repulsive) = (p - thermal, thermal - ideal);
        k(self.ideal) * ideal
            + k(self.attractive) * attractive
            + k(self.repulsive) * repulsive
            + k(self.attractive_squared) * attractive.powi(2)
            + maybe(self.ideal_squared) * ideal.powi(2)
            + maybe(self.thermal_squared) * thermal.powi(2)
            + maybe(self.repulsive_squared) * repulsive.powi(2)
            + maybe(self.attractive_cubed) * attractive.powi(3)
            + maybe(self.thermal_cubed) * thermal.powi(3)
    }
}

/// Σ n xᵈ yᵗ.
fn monomials(terms: &[(f64, f64, f64)], x: f64, y: f64) -> f64 {
    terms
        .iter()
        .map(|(n, d, t)| n * x.powf(*d) * y.powf(*t))
        .sum()
}
