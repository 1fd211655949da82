//! Forms of one fluid each, whole.

use serde::Deserialize;

use super::dilute::{Molecule, neufeld};
use super::{AVOGADRO, Here, powers};

/// ln η = Σ a xᵗ + ρ Σ b xᵗ + ρ² Σ c xᵗ + ρ³ Σ d xᵗ with x = ln T, at most ln of the joint,
/// ρ in g/cm³ and η in 0.1 µPa·s; above the joint the dilute gas has a form of its own,
/// k T^e exp(f₀ + f₁/T + f₂/T²).
///
/// Source: Arp, McCarty and Friend 1998, NIST Technical Note 1334 (revised).
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Helium {
    dilute: Vec<(f64, f64)>,
    first: Vec<(f64, f64)>,
    second: Vec<(f64, f64)>,
    third: Vec<(f64, f64)>,
    /// Above this temperature x stands still.
    warmest_temperature_k: f64,
    /// Above this one the dilute gas is `warm`: (k, e, f₀, f₁, f₂).
    joint_temperature_k: f64,
    warm: (f64, f64, f64, f64, f64),
}

impl Helium {
    pub fn at(&self, here: Here) -> f64 {
        let t = here.t;
        let rho = here.mass_density() / 1000.0;
        let x = t.min(self.warmest_temperature_k).ln();
        let dilute = powers(&self.dilute, x);
        let excess = rho
            * (powers(&self.first, x)
                + rho * (powers(&self.second, x) + rho * powers(&self.third, x)));
        let total = (dilute + excess).exp();
        let (k, e, f0, f1, f2) = self.warm;
        let shift = if t <= self.joint_temperature_k {
            0.0
        } else {
            k * t.powf(e) * (f0 + f1 / t + f2 / (t * t)).exp() - dilute.exp()
        };
        (total + shift) * 1e-7
    }
}

/// A coefficient and its exponent.
type Pair = (f64, f64);

/// The gas of Stockmayer spheres with two viscosity virials, and Enskog's hard spheres of a
/// diameter that shrinks with temperature, crossed over at the critical density.
///
/// Source: Xiang, Laesecke and Huber 2006, J. Phys. Chem. Ref. Data 35, 1597.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Methanol {
    molecule: Molecule,
    molar_mass_g_per_mol: f64,
    /// Polarity δ of the Stockmayer potential.
    polarity: f64,
    /// Correction of the Lennard-Jones integral: (a, t), then (a, exponent), (a, exponent);
    /// and the factor of δ⁶.
    stockmayer: (Pair, Pair, Pair, f64),
    /// (b, t) of the second virial.
    second: Vec<(f64, f64)>,
    /// c·T*³·exp(e·T*^(−1/2)) of the third.
    third: (f64, f64),
    critical_temperature_k: f64,
    critical_density_kg_per_m3: f64,
    /// σ_c, nm; the hard sphere's diameter over it is Σ d T_rᵗ + Σ e ρ_rʲ.
    hard_sphere_nm: f64,
    by_temperature: Vec<(f64, f64)>,
    by_density: Vec<(f64, f64)>,
    /// Steepness of the crossover.
    steepness: f64,
}

impl Methanol {
    pub fn at(&self, here: Here) -> f64 {
        let t = self.molecule.reduced(here.t);
        let rho = here.rho;
        let rho_r = here.mass_density() / self.critical_density_kg_per_m3;
        let t_r = here.t / self.critical_temperature_k;

        let ((a, e), (b, f), (c, g), sixth) = self.stockmayer;
        let delta = self.polarity;
        let polar = a * t.powf(e) + b * (f * t).exp() + c * (g * t).exp();
        let integral = neufeld(t) * (1.0 + delta.powi(2) / (1.0 + sixth * delta.powi(6)) * polar);
        let diameter = self.molecule.diameter_nm * 1e-9;
        let dilute = 2.66957e-26 * (self.molar_mass_g_per_mol * here.t).sqrt()
            / (diameter.powi(2) * integral);

        let volume = AVOGADRO * diameter.powi(3);
        let second = volume * powers(&self.second, t);
        let third = volume.powi(2) * self.third.0 * t.powi(3) * (self.third.1 / t.sqrt()).exp();
        let gas = 1.0 + second * rho + third * rho * rho;

        let share = powers(&self.by_temperature, t_r) + powers(&self.by_density, rho_r);
        let sphere = share * self.hard_sphere_nm * 1e-9;
        let b = 2.0 * std::f64::consts::PI * AVOGADRO * sphere.powi(3) / 3.0;
        let zeta = b * rho / 4.0;
        let contact = (1.0 - 0.5 * zeta) / (1.0 - zeta).powi(3);
        let dense = 1.0 / contact + 0.8 * b * rho + 0.761 * contact * (b * rho).powi(2);

        let f = 1.0 / (1.0 + (self.steepness * (rho_r - 1.0)).exp());
        dilute * (f * gas + (1.0 - f) * dense)
    }
}

/// Dilute gas and a liquid of activated flow, mixed by density, with a bell at the critical
/// point: η = (1 − x)^c₁ η₀ + x^c₁ η_L + Δη, x = ρ/ρ_L, densities in mol/L, µPa·s.
///
/// Source: Shan, Penoncello and Jacobsen 2000, ASHRAE Transactions 106.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Shan {
    molecule: Molecule,
    molar_mass_g_per_mol: f64,
    /// (a, t): Ω = exp(Σ a (ln T*)ᵗ).
    integral: Vec<(f64, f64)>,
    c1: f64,
    c2: f64,
    activation_j_per_mol: f64,
    densest_mol_per_l: f64,
    critical_mol_per_l: f64,
    critical_temperature_k: f64,
    critical_excess: f64,
    gas_constant_j_per_mol_k: f64,
}

impl Shan {
    pub fn at(&self, here: Here) -> f64 {
        let t = here.t;
        let rho = here.rho / 1000.0;
        let integral = powers(&self.integral, self.molecule.reduced(t).ln()).exp();
        let dilute = 1.25 * 0.021357 * (self.molar_mass_g_per_mol * t).sqrt()
            / (self.molecule.diameter_nm.powi(2) * integral);
        let free = self.densest_mol_per_l - rho;
        let activation = self.activation_j_per_mol / (self.gas_constant_j_per_mol_k * t);
        let liquid = self.c2 * self.densest_mol_per_l.powi(2) / free
            * t.sqrt()
            * (rho / free * activation).exp();
        let bell = self.critical_excess
            / ((rho - self.critical_mol_per_l).cosh() * (t - self.critical_temperature_k).cosh());
        let x = rho / self.densest_mol_per_l;
        ((1.0 - x).powf(self.c1) * dilute + x.powf(self.c1) * liquid + bell) * 1e-6
    }
}
