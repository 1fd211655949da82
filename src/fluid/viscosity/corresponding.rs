//! Viscosity by likeness: scaled from what other fluids do.

use std::sync::Arc;

use serde::Deserialize;

use super::dilute::{Molecule, lennard_jones};
use super::{Fluid, Here, Model};
use crate::fluid::Catalog;

/// η = η₀·(1 + C(exp f(x) − 1)), where x is ρs^r over its value at the critical point and f
/// one curve of many refrigerants, in two branches; η₀ is the gas of Lennard-Jones spheres.
///
/// Source: Bell, Laesecke 2016, 16th International Refrigeration and Air Conditioning
/// Conference at Purdue.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct ResidualEntropy {
    molecule: Molecule,
    scale: f64,
    /// ρs^r at the critical point, J/(m³ K), below 0.
    critical: f64,
    /// Of the liquid-like branch in powers of x from 0 up, and of the gas-like one.
    liquid: (f64, f64, f64, f64),
    vapour: (f64, f64, f64, f64),
    /// x at which the branches meet, and how sharply.
    crossover: f64,
    steepness: f64,
}

impl ResidualEntropy {
    pub fn at(&self, here: Here) -> f64 {
        let x = here.rho * here.equation.residual_entropy(here.t, here.rho) / self.critical;
        let cubic = |c: (f64, f64, f64, f64)| c.0 + x * (c.1 + x * (c.2 + x * c.3));
        let liquid_like = 1.0 / (1.0 + (-self.steepness * (x - self.crossover)).exp());
        let f = liquid_like * cubic(self.liquid) + (1.0 - liquid_like) * cubic(self.vapour);
        lennard_jones(self.molecule, here) * (1.0 + self.scale * (f.exp() - 1.0))
    }
}

/// Extended corresponding states: the reference fluid's background at the state (T₀, ρ₀)
/// where it has the same residual energy and compressibility, its density stretched by a
/// fitted ψ = Σ a (ρ/ρ_r)ᵗ, scaled by masses, temperatures and densities.
///
/// Source: Klein, McLinden and Laesecke 1997, Int. J. Refrig. 20, 208; Huber, Laesecke and
/// Perkins 2003, Ind. Eng. Chem. Res. 42, 3163.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct ConformalFluid {
    /// Id of the reference fluid.
    like: String,
    molecule: Molecule,
    reducing_density_mol_per_m3: f64,
    stretch: Vec<(f64, f64)>,
}

/// Sum of the squares of both mismatches, its root, at which the state is found.
const FOUND: f64 = 1e-11;

impl ConformalFluid {
    /// `None` where no such state is found, or it lies outside the reference fluid's equation.
    pub fn at(&self, here: Here) -> Option<f64> {
        let like: Arc<Fluid> = Catalog::built_in().by_id(&self.like)?;
        let Model::Equation(equation) = like.model() else {
            return None;
        };
        let reference = like.viscosity_forms().reference()?;
        let (t0, rho0) = self.conformal(here, &like)?;
        let (low, high) = equation.data().temperature_range_k;
        if !(low..=high).contains(&t0) {
            return None;
        }
        let psi = super::powers(&self.stretch, here.rho / self.reducing_density_mol_per_m3);
        let there = Here {
            t: t0,
            rho: rho0 * psi,
            molar_mass: like.molar_mass(),
            equation,
        };
        let f = here.t / t0;
        let h = rho0 / here.rho;
        let scale = f.sqrt() * h.powf(-2.0 / 3.0) * (here.molar_mass / there.molar_mass).sqrt();
        Some(lennard_jones(self.molecule, here) + reference.form.background(there)? * scale)
    }

    /// Newton in (T₀, ρ₀) with halved steps, from the ratio of the critical points.
    fn conformal(&self, here: Here, like: &Fluid) -> Option<(f64, f64)> {
        let Model::Equation(other) = like.model() else {
            return None;
        };
        let own = here.equation.residual_derivatives(here.t, here.rho);
        let (a, z) = (own.a, 1.0 + own.d1);
        let (mine, theirs) = (here.equation.data().critical, other.data().critical);
        let mut t = here.t * theirs.temperature_k / mine.temperature_k;
        let mut rho = here.rho * theirs.density_mol_per_m3 / mine.density_mol_per_m3;
        let miss = |t: f64, rho: f64| {
            let x = other.residual_derivatives(t, rho);
            let r = (x.a - a, 1.0 + x.d1 - z);
            (x, r, r.0.hypot(r.1))
        };
        let (mut x, mut r, mut size) = miss(t, rho);
        for _ in 0..50 {
            if size < FOUND {
                return Some((t, rho));
            }
            // τ∂/∂τ = −T∂/∂T, δ∂/∂δ = ρ∂/∂ρ; in ln T and ln ρ. t1 = τα_τ, d1 = δα_δ.
            let j = [[-x.t1, x.d1], [-x.d1t1, x.d1 + x.d2]];
            let determinant = j[0][0] * j[1][1] - j[0][1] * j[1][0];
            let step_t = -(r.0 * j[1][1] - r.1 * j[0][1]) / determinant * t;
            let step_rho = -(r.1 * j[0][0] - r.0 * j[1][0]) / determinant * rho;
            let mut share = 1.0;
            loop {
                let next = (t + share * step_t, rho + share * step_rho);
                if next.0 > 0.0 && next.1 > 0.0 {
                    let found = miss(next.0, next.1);
                    if found.2 <= size {
                        (t, rho) = next;
                        (x, r, size) = found;
                        break;
                    }
                }
                share /= 2.0;
                if share < 1e-3 {
                    return (size < 1e-8).then_some((t, rho));
                }
            }
        }
        (size < 1e-8).then_some((t, rho))
    }
}
