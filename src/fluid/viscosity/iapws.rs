//! Water and heavy water, in the form of the IAPWS releases.

use serde::Deserialize;

use super::Here;

/// η = η*·√T̄/(Σ h/T̄ᵗ)·exp(ρ̄ Σ h (1/T̄ − 1)ⁱ (ρ̄ − 1)ʲ)·μ₂, T̄ = T/T*, ρ̄ = ρ/ρ*.
///
/// Source: IAPWS R12-08, Huber et al. 2009, J. Phys. Chem. Ref. Data 38, 101 (water);
/// IAPWS R4-84 as revised 2007 (heavy water). μ₂, the critical enhancement, is 1 where
/// `critical` is not given.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Iapws {
    reference_temperature_k: f64,
    reference_density_kg_per_m3: f64,
    /// η*, Pa·s.
    reference_viscosity: f64,
    /// (h, t)
    dilute: Vec<(f64, f64)>,
    /// (h, i, j)
    residual: Vec<(f64, i32, i32)>,
    #[serde(default)]
    critical: Option<CriticalEnhancement>,
}

/// Near the critical point the correlation length ξ of the fluctuations counts.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
struct CriticalEnhancement {
    reference_pressure_pa: f64,
    /// x_μ
    exponent: f64,
    /// ξ₀ and 1/q_C, 1/q_D, nm.
    amplitude_nm: f64,
    cut_off_c_nm: f64,
    cut_off_d_nm: f64,
    /// Γ₀
    susceptibility: f64,
    nu: f64,
    gamma: f64,
    /// T̄_R, at which nothing is critical.
    reference_reduced: f64,
    /// Below this ξ in nm a series stands for the exact function.
    series_below_nm: f64,
}

impl Iapws {
    pub fn at(&self, here: Here) -> f64 {
        let t = here.t / self.reference_temperature_k;
        let rho = here.mass_density() / self.reference_density_kg_per_m3;
        let under: f64 = self.dilute.iter().map(|(h, k)| h / t.powf(*k)).sum();
        let (x, y) = (1.0 / t - 1.0, rho - 1.0);
        let sum: f64 = self
            .residual
            .iter()
            .map(|(h, i, j)| h * x.powi(*i) * y.powi(*j))
            .sum();
        let enhancement = self
            .critical
            .as_ref()
            .map_or(1.0, |critical| critical.at(self, here));
        self.reference_viscosity * t.sqrt() / under * (rho * sum).exp() * enhancement
    }
}

impl CriticalEnhancement {
    /// μ₂ = exp(x_μ Y(ξ)).
    fn at(&self, water: &Iapws, here: Here) -> f64 {
        let t = here.t / water.reference_temperature_k;
        let rho = here.mass_density() / water.reference_density_kg_per_m3;
        // ζ = (∂ρ̄/∂p̄) at constant temperature.
        let zeta = |kelvin: f64| {
            let (_, slope) = here.equation.isotherm(kelvin).pressure_and_slope(here.rho);
            let slope_per_mass = slope / here.molar_mass;
            self.reference_pressure_pa / water.reference_density_kg_per_m3 / slope_per_mass
        };
        let far = self.reference_reduced * water.reference_temperature_k;
        let excess = rho * (zeta(here.t) - zeta(far) * self.reference_reduced / t);
        if excess.is_nan() || excess <= 0.0 {
            return 1.0;
        }
        let xi = self.amplitude_nm * (excess / self.susceptibility).powf(self.nu / self.gamma);
        (self.exponent * self.crossover(xi)).exp()
    }

    /// Y(ξ), equations 17 to 20 of R12-08.
    fn crossover(&self, xi: f64) -> f64 {
        let (c, d) = (xi / self.cut_off_c_nm, xi / self.cut_off_d_nm);
        if xi <= self.series_below_nm {
            return 0.2 * c * d.powi(5) * (1.0 - c + c * c - 765.0 / 504.0 * d * d);
        }
        let psi = (1.0 + d * d).powf(-0.5).acos();
        let w = ((c - 1.0) / (c + 1.0)).abs().sqrt() * (psi / 2.0).tan();
        let l = if c > 1.0 {
            ((1.0 + w) / (1.0 - w)).ln()
        } else {
            2.0 * w.abs().atan()
        };
        (3.0 * psi).sin() / 12.0 - (2.0 * psi).sin() / (4.0 * c)
            + (1.0 - 1.25 * c * c) * psi.sin() / (c * c)
            - ((1.0 - 1.5 * c * c) * psi - (c * c - 1.0).abs().powf(1.5) * l) / c.powi(3)
    }
}
