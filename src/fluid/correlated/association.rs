//! A vapour of molecules of several sizes in equilibrium, each an ideal gas.
//!
//! The partial pressure of a molecule of a atoms is p⁰·K(p₁/p⁰)^(a/a₁), with p₁ that
//! of the smallest molecule and log₁₀K = A + B/T; p is the sum of the partial
//! pressures and ρRT/M, M of one atom, the sum of each times its atoms.
//!
//! Solved in u = ln(p₁/p⁰), where both sums are logarithms of sums of exponentials:
//! convex and rising, so Newton's method comes down on the root from any start.

use serde::Deserialize;

use super::validity::list;

/// A molecule larger than the smallest.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Molecule {
    pub atoms: f64,
    /// A and B in log₁₀K = A + B/T.
    #[serde(deserialize_with = "list")]
    pub log10_k: [f64; 2],
}

/// The mixture at one temperature.
#[derive(Debug, Clone, PartialEq)]
pub struct Association {
    /// RT over the molar mass of the atoms, J/kg.
    rt: f64,
    unit_pa: f64,
    species: Vec<Species>,
}

/// Partial pressure over p⁰ is exp(ln_k + size·u).
#[derive(Debug, Clone, Copy, PartialEq)]
struct Species {
    atoms: f64,
    size: f64,
    ln_k: f64,
}

/// Steps are quadratic at the end; this many are never needed.
const MOST_STEPS: usize = 60;

impl Association {
    pub(super) fn new(
        smallest_atoms: f64,
        larger: &[Molecule],
        unit_pa: f64,
        temperature: f64,
        rt: f64,
    ) -> Self {
        let smallest = Species {
            atoms: smallest_atoms,
            size: 1.0,
            ln_k: 0.0,
        };
        let others = larger.iter().map(|molecule| {
            let [a, b] = molecule.log10_k;
            Species {
                atoms: molecule.atoms,
                size: molecule.atoms / smallest_atoms,
                ln_k: (a + b / temperature) * std::f64::consts::LN_10,
            }
        });
        Self {
            rt,
            unit_pa,
            species: std::iter::once(smallest).chain(others).collect(),
        }
    }

    /// Pressure and its slope over density, Pa and Pa m³/kg.
    pub(super) fn pressure_and_slope(&self, density: f64) -> (f64, f64) {
        let u = self.solve(density * self.rt, |species| species.atoms);
        let (pressure, rise) = self.sum(u, |_| 1.0);
        let (_, rise_of_atoms) = self.sum(u, |species| species.atoms);
        (pressure, rise / rise_of_atoms * self.rt)
    }

    pub(super) fn density(&self, pressure: f64) -> f64 {
        let u = self.solve(pressure, |_| 1.0);
        self.sum(u, |species| species.atoms).0 / self.rt
    }

    pub(super) fn mass_fraction(&self, atoms: f64, density: f64) -> f64 {
        let u = self.solve(density * self.rt, |species| species.atoms);
        let (all, _) = self.sum(u, |species| species.atoms);
        let (of_these, _) = self.sum(
            u,
            |species| {
                if species.atoms == atoms { atoms } else { 0.0 }
            },
        );
        of_these / all
    }

    /// Weighted sum of the partial pressures and its slope over u, Pa.
    fn sum(&self, u: f64, weight: impl Fn(&Species) -> f64) -> (f64, f64) {
        self.species
            .iter()
            .fold((0.0, 0.0), |(sum, slope), species| {
                let part = weight(species) * self.unit_pa * (species.ln_k + species.size * u).exp();
                (sum + part, slope + species.size * part)
            })
    }

    /// u at which the weighted sum is `wanted`.
    fn solve(&self, wanted: f64, weight: impl Fn(&Species) -> f64) -> f64 {
        // Were all of one kind: the least of these is near and above the root.
        let mut u = self
            .species
            .iter()
            .map(|s| ((wanted / (weight(s) * self.unit_pa)).ln() - s.ln_k) / s.size)
            .fold(f64::INFINITY, f64::min);
        for _ in 0..MOST_STEPS {
            let (sum, slope) = self.sum(u, &weight);
            let step = (sum / wanted).ln() * sum / slope;
            u -= step;
            // `<=` would loop on NaN too, but a NaN is the answer to a NaN.
            if step.is_nan() || step.abs() < 1e-15 * (1.0 + u.abs()) {
                break;
            }
        }
        u
    }
}
