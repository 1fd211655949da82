//! The dilute gas, and the first step away from it.

use serde::Deserialize;

use super::{AVOGADRO, Here, powers};

/// η₀(T), Pa·s. σ is the molecule's diameter, ε/k its well depth in K; T* = T/(ε/k), M in g/mol.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum Dilute {
    /// c·√(M T)/(σ²·exp(Σ a (ln T*)ᵗ)), σ in nm.
    CollisionIntegral {
        c: f64,
        molar_mass_g_per_mol: f64,
        molecule: Molecule,
        terms: Vec<(f64, f64)>,
    },
    /// As above with the Lennard-Jones integral of Neufeld, Janzen and Aziz 1972,
    /// J. Chem. Phys. 57, 1100.
    LennardJones { molecule: Molecule },
    /// Σ a (T/T_r)ᵗ.
    Powers {
        reducing_temperature_k: f64,
        terms: Vec<(f64, f64)>,
    },
    /// c·√T/Σ a (T/T_r)ᵗ.
    OverPowers {
        c: f64,
        reducing_temperature_k: f64,
        terms: Vec<(f64, f64)>,
    },
    /// c·√T/exp(Σ a Tᵗ).
    CrossSection { c: f64, terms: Vec<(f64, f64)> },
    /// c·√T/(a₀ + a₁T^(1/6) + a₂ exp(a₃T^(1/3)) + (a₄ + a₅T^(1/3))/exp(T^(1/3)) + a₆√T):
    /// Laesecke and Muzny 2017, carbon dioxide.
    LaeseckeMuzny {
        c: f64,
        a: (f64, f64, f64, f64, f64, f64, f64),
    },
}

/// A molecule as a Lennard-Jones sphere.
#[derive(Debug, Clone, Copy, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Molecule {
    pub well_depth_temperature_k: f64,
    pub diameter_nm: f64,
}

/// What is of first order in density.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum InitialDensity {
    /// η₀·B·ρ with B = N_A σ³ Σ b T*ᵗ: Rainwater and Friend 1987, Phys. Rev. A 36, 4062.
    RainwaterFriend {
        molecule: Molecule,
        terms: Vec<(f64, f64)>,
    },
    /// ρ·Σ n Tᵗ, ρ in mol/m³.
    Powers { terms: Vec<(f64, f64)> },
}

impl Dilute {
    pub fn at(&self, here: Here) -> f64 {
        let t = here.t;
        match self {
            Self::CollisionIntegral {
                c,
                molar_mass_g_per_mol,
                molecule,
                terms,
            } => {
                let integral = powers(terms, molecule.reduced(t).ln()).exp();
                c * (molar_mass_g_per_mol * t).sqrt() / (molecule.diameter_nm.powi(2) * integral)
            }
            Self::LennardJones { molecule } => lennard_jones(*molecule, here),
            Self::Powers {
                reducing_temperature_k,
                terms,
            } => powers(terms, t / reducing_temperature_k),
            Self::OverPowers {
                c,
                reducing_temperature_k,
                terms,
            } => c * t.sqrt() / powers(terms, t / reducing_temperature_k),
            Self::CrossSection { c, terms } => c * t.sqrt() / powers(terms, t).exp(),
            Self::LaeseckeMuzny { c, a } => {
                let third = t.cbrt();
                let under = a.0
                    + a.1 * t.powf(1.0 / 6.0)
                    + a.2 * (a.3 * third).exp()
                    + (a.4 + a.5 * third) / third.exp()
                    + a.6 * t.sqrt();
                c * t.sqrt() / under
            }
        }
    }
}

impl Molecule {
    pub fn reduced(&self, t: f64) -> f64 {
        t / self.well_depth_temperature_k
    }
}

/// The dilute gas of Lennard-Jones spheres.
pub fn lennard_jones(molecule: Molecule, here: Here) -> f64 {
    let integral = neufeld(molecule.reduced(here.t));
    26.692e-9 * (here.molar_mass * 1000.0 * here.t).sqrt()
        / (molecule.diameter_nm.powi(2) * integral)
}

/// Ω(2,2)* of the Lennard-Jones potential.
pub fn neufeld(t: f64) -> f64 {
    1.16145 * t.powf(-0.14874) + 0.52487 * (-0.77320 * t).exp() + 2.16178 * (-2.43787 * t).exp()
}

impl InitialDensity {
    pub fn at(&self, here: Here, dilute: f64) -> f64 {
        match self {
            Self::RainwaterFriend { molecule, terms } => {
                let volume = AVOGADRO * (molecule.diameter_nm * 1e-9).powi(3);
                dilute * volume * powers(terms, molecule.reduced(here.t)) * here.rho
            }
            Self::Powers { terms } => here.rho * powers(terms, here.t),
        }
    }
}
