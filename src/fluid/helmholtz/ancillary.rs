//! Ancillary equations: starting guesses for the saturation solve, never an answer.

use serde::Deserialize;

/// ρ or p = reducing · (1 + Σ n θᵗ) or reducing · exp(f Σ n θᵗ), θ = 1 − T/T_r,
/// f = T_r/T where `tau_first`, else 1.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Ancillary {
    form: Form,
    tau_first: bool,
    reducing_temperature_k: f64,
    reducing: f64,
    n: Vec<f64>,
    t: Vec<f64>,
}

#[derive(Debug, Clone, Copy, PartialEq, Deserialize)]
enum Form {
    Linear,
    Exponential,
}

/// The three that every equation has.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Ancillaries {
    /// Pa.
    pub pressure: Ancillary,
    /// mol/m³.
    pub liquid_density: Ancillary,
    /// mol/m³.
    pub vapour_density: Ancillary,
}

impl Ancillary {
    /// The estimate at a temperature in K; at the reducing temperature and above
    /// it is the reducing value.
    pub fn at(&self, temperature_k: f64) -> f64 {
        let theta = (1.0 - temperature_k / self.reducing_temperature_k).max(0.0);
        let ln_theta = theta.ln();
        // θ = 0 gives exp(−∞) = 0 for every positive exponent.
        let power = |t: f64| if t == 0.0 { 1.0 } else { (t * ln_theta).exp() };
        let sum: f64 = self.n.iter().zip(&self.t).map(|(n, t)| n * power(*t)).sum();
        let sum = if self.tau_first {
            sum * self.reducing_temperature_k / temperature_k
        } else {
            sum
        };
        match self.form {
            Form::Linear => self.reducing * (1.0 + sum),
            Form::Exponential => self.reducing * sum.exp(),
        }
    }
}
