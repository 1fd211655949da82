//! The ideal-gas Helmholtz energy α⁰(τ, δ): term forms as published.

use serde::Deserialize;

/// One block of terms of one published form.
///
/// | form | α⁰ |
/// |---|---|
/// | `Lead` | ln δ + a₁ + a₂τ |
/// | `LogTau` | a ln τ |
/// | `Power` | Σ n τᵗ |
/// | `PlanckEinstein` | Σ n ln(1 − exp(−θτ)) |
/// | `PlanckEinsteinGeneral` | Σ n ln(c + d exp(θτ)) |
/// | `PlanckEinsteinKelvin` | the same as `PlanckEinstein` with θ = v/T_c |
/// | `HeatCapacityConstant` | from c_p⁰/R = c, integrated from T₀ |
/// | `HeatCapacityPoly` | from c_p⁰/R = Σ c Tᵗ, integrated from T₀ |
/// | `HeatCapacityAlyLee` | from c_p⁰/R = A + B(C/T / sinh(C/T))² + D(E/T / cosh(E/T))² |
/// | `Offset` | a₁ + a₂τ, sets the zero of energy and entropy |
///
/// The heat-capacity forms stand beside an explicit `LogTau(a: -1)` in the data.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum IdealTerms {
    Lead {
        a1: f64,
        a2: f64,
    },
    LogTau {
        a: f64,
    },
    Power {
        n: Vec<f64>,
        t: Vec<f64>,
    },
    PlanckEinstein {
        n: Vec<f64>,
        theta: Vec<f64>,
    },
    PlanckEinsteinGeneral {
        n: Vec<f64>,
        theta: Vec<f64>,
        c: Vec<f64>,
        d: Vec<f64>,
    },
    PlanckEinsteinKelvin {
        n: Vec<f64>,
        v_k: Vec<f64>,
        critical_temperature_k: f64,
        #[serde(default)]
        gas_constant: Option<f64>,
    },
    HeatCapacityConstant {
        cp_over_r: f64,
        critical_temperature_k: f64,
        t0_k: f64,
    },
    HeatCapacityPoly {
        c: Vec<f64>,
        t: Vec<f64>,
        critical_temperature_k: f64,
        t0_k: f64,
        #[serde(default)]
        gas_constant: Option<f64>,
    },
    HeatCapacityAlyLee {
        c: Vec<f64>,
        critical_temperature_k: f64,
        t0_k: f64,
    },
    Offset {
        a1: f64,
        a2: f64,
    },
}

/// α⁰ without ln δ, and τα⁰_τ, τ²α⁰_ττ.
pub fn ideal(terms: &[IdealTerms], tau: f64, gas_constant: f64) -> [f64; 3] {
    let mut sum = [0.0; 3];
    for term in terms {
        let part = term.at(tau, gas_constant);
        for (total, x) in sum.iter_mut().zip(part) {
            *total += x;
        }
    }
    sum
}

impl IdealTerms {
    fn at(&self, tau: f64, gas_constant: f64) -> [f64; 3] {
        match self {
            Self::Lead { a1, a2 } | Self::Offset { a1, a2 } => [a1 + a2 * tau, a2 * tau, 0.0],
            Self::LogTau { a } => [a * tau.ln(), *a, -a],
            Self::Power { n, t } => fold(n.iter().zip(t).map(|(n, t)| {
                let x = n * tau.powf(*t);
                [x, x * t, x * t * (t - 1.0)]
            })),
            Self::PlanckEinstein { n, theta } => fold(
                n.iter()
                    .zip(theta)
                    .map(|(n, theta)| planck_einstein(*n, theta * tau)),
            ),
            Self::PlanckEinsteinKelvin {
                n,
                v_k,
                critical_temperature_k,
                gas_constant: own,
            } => {
                let scale = own.map_or(1.0, |own| own / gas_constant);
                fold(
                    n.iter()
                        .zip(v_k)
                        .map(|(n, v)| planck_einstein(scale * n, v / critical_temperature_k * tau)),
                )
            }
            Self::PlanckEinsteinGeneral { n, theta, c, d } => fold(
                n.iter()
                    .zip(theta)
                    .zip(c.iter().zip(d))
                    .map(|((n, theta), (c, d))| {
                        let x = theta * tau;
                        let e = x.exp();
                        let bottom = c + d * e;
                        [
                            n * bottom.ln(),
                            n * x * d * e / bottom,
                            n * x * x * c * d * e / (bottom * bottom),
                        ]
                    }),
            ),
            Self::HeatCapacityConstant {
                cp_over_r,
                critical_temperature_k,
                t0_k,
            } => heat_capacity_power(*cp_over_r, 0.0, critical_temperature_k / tau, *t0_k),
            Self::HeatCapacityPoly {
                c,
                t,
                critical_temperature_k,
                t0_k,
                gas_constant: own,
            } => {
                let scale = own.map_or(1.0, |own| own / gas_constant);
                let temperature = critical_temperature_k / tau;
                fold(
                    c.iter()
                        .zip(t)
                        .map(|(c, t)| heat_capacity_power(scale * c, *t, temperature, *t0_k)),
                )
            }
            Self::HeatCapacityAlyLee {
                c,
                critical_temperature_k,
                t0_k,
            } => aly_lee(c, critical_temperature_k / tau, *t0_k),
        }
    }
}

fn fold(parts: impl Iterator<Item = [f64; 3]>) -> [f64; 3] {
    parts.fold([0.0; 3], |sum, x| {
        [sum[0] + x[0], sum[1] + x[1], sum[2] + x[2]]
    })
}

fn planck_einstein(n: f64, x: f64) -> [f64; 3] {
    // ln(1 − e⁻ˣ) keeps its digits for small x by expm1.
    let e = (-x).exp();
    let bottom = -(-x).exp_m1();
    [
        n * bottom.ln(),
        n * x * e / bottom,
        -n * x * x * e / (bottom * bottom),
    ]
}

/// The contribution of c_p⁰/R = c·Tᵗ: with h/RT = (1/T)∫c_p⁰/R dT and
/// s/R = ∫c_p⁰/(RT) dT from T₀, α⁰ = h/RT − s/R and τα⁰_τ = h/RT. The −1 of
/// c_v = c_p − R comes from the `LogTau` term beside it.
fn heat_capacity_power(c: f64, t: f64, temperature: f64, t0: f64) -> [f64; 3] {
    let enthalpy = if t == -1.0 {
        c * (temperature / t0).ln() / temperature
    } else {
        c * (temperature.powf(t + 1.0) - t0.powf(t + 1.0)) / ((t + 1.0) * temperature)
    };
    let entropy = if t == 0.0 {
        c * (temperature / t0).ln()
    } else {
        c * (temperature.powf(t) - t0.powf(t)) / t
    };
    [enthalpy - entropy, enthalpy, -c * temperature.powf(t)]
}

/// Aly, F. A.; Lee, L. L. 1981, Fluid Phase Equilib. 6, 169–179.
fn aly_lee(c: &[f64], temperature: f64, t0: f64) -> [f64; 3] {
    let [a, b, cc, d, e] = *c else {
        return [f64::NAN; 3];
    };
    let coth = |x: f64| 1.0 / x.tanh();
    let cp = |t: f64| {
        let (x, y) = (cc / t, e / t);
        let hyperbolic = |top: f64, bottom: f64| {
            if bottom.is_finite() {
                (top / bottom).powi(2)
            } else {
                0.0
            }
        };
        a + b * hyperbolic(x, x.sinh()) + d * hyperbolic(y, y.cosh())
    };
    let h = |t: f64| a * t + b * cc * coth(cc / t) - d * e * (e / t).tanh();
    let s = |t: f64| {
        let (x, y) = (cc / t, e / t);
        // ln sinh and ln cosh without overflow.
        let ln_sinh = x + (-(-2.0 * x).exp()).ln_1p() - std::f64::consts::LN_2;
        let ln_cosh = y + (-2.0 * y).exp().ln_1p() - std::f64::consts::LN_2;
        a * t.ln() + b * (x * coth(x) - ln_sinh) - d * (y * y.tanh() - ln_cosh)
    };
    let enthalpy = (h(temperature) - h(t0)) / temperature;
    let entropy = s(temperature) - s(t0);
    [enthalpy - entropy, enthalpy, -cp(temperature)]
}
