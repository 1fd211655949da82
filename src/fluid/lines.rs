//! The solid's borders: triple point, melting line, sublimation line.
//!
//! All optional: where a fluid's file gives none, the program says what is not known. A
//! line holds in its own range and is not carried on.

use serde::Deserialize;

use super::{Fluid, FluidError};
use crate::source::Source;
use crate::units::{Pressure, Temperature};

/// What is published of a fluid's solid.
#[derive(Debug, Clone, Default, PartialEq, Deserialize)]
#[serde(deny_unknown_fields, default)]
pub struct Lines {
    pub triple_point: Option<TriplePoint>,
    /// Pieces of the melting line, one for each solid that melts.
    melting: Vec<MeltingPiece>,
    sublimation: Option<SublimationLine>,
}

/// Where solid, liquid and vapour meet.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct TriplePoint {
    pub temperature_k: f64,
    #[serde(default)]
    pub pressure_pa: Option<f64>,
    pub source: Source,
}

/// The melting pressure over a range of temperature.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct MeltingPiece {
    form: MeltingForm,
    pub temperature_range_k: (f64, f64),
    pub source: Source,
}

/// p(T), with θ = T/T₀.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
enum MeltingForm {
    /// p₀ + a(θᶜ − 1): Simon and Glatzel.
    Simon {
        t0_k: f64,
        p0_pa: f64,
        a_pa: f64,
        c: f64,
    },
    /// p₀(1 + Σ a(θᵗ − 1)).
    Powers {
        t0_k: f64,
        p0_pa: f64,
        terms: Vec<(f64, f64)>,
    },
    /// p₀(1 + Σ a(θ − 1)ᵗ).
    PowersOfRise {
        t0_k: f64,
        p0_pa: f64,
        terms: Vec<(f64, f64)>,
    },
    /// ln(p/p₀) = Σ a(1 − θᵗ).
    LogPowers {
        t0_k: f64,
        p0_pa: f64,
        terms: Vec<(f64, f64)>,
    },
}

/// The vapour pressure of the solid.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct SublimationLine {
    form: SublimationForm,
    pub temperature_range_k: (f64, f64),
    pub source: Source,
}

/// p(T), with θ = T/T_t, T_t and p_t at the triple point.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
enum SublimationForm {
    /// ln(p/p_t) = Σ a(1 − θ)ᵗ/θ.
    PowersOfFall {
        t0_k: f64,
        p0_pa: f64,
        terms: Vec<(f64, f64)>,
    },
    /// ln(p/p_t) = Σ aθᵗ/θ.
    Powers {
        t0_k: f64,
        p0_pa: f64,
        terms: Vec<(f64, f64)>,
    },
    /// ln(p/p_t) = Σ a(1 − θᵗ).
    LogPowers {
        t0_k: f64,
        p0_pa: f64,
        terms: Vec<(f64, f64)>,
    },
    /// ln p = A − B/(T + C), in Pa and K.
    Antoine(f64, f64, f64),
    /// ln p = A + B/T + C ln T + DT^E, in Pa and K.
    Alcock(f64, f64, f64, f64, f64),
}

/// The vapour pressure of a frozen fluid, as far as it is known.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum FrozenPressure {
    /// By the sublimation equation.
    Known(Pressure),
    /// Not above this one: the sublimation pressure where the equation starts, or the triple
    /// point's.
    AtMost(Pressure),
}

impl FrozenPressure {
    pub fn highest(self) -> Pressure {
        match self {
            Self::Known(pressure) | Self::AtMost(pressure) => pressure,
        }
    }
}

impl Lines {
    pub fn melting(&self) -> &[MeltingPiece] {
        &self.melting
    }

    pub fn sublimation(&self) -> Option<&SublimationLine> {
        self.sublimation.as_ref()
    }
}

impl MeltingPiece {
    /// Pa, at a temperature in K; `None` outside the range.
    pub fn at(&self, t: f64) -> Option<f64> {
        let (low, high) = self.temperature_range_k;
        (low..=high).contains(&t).then(|| self.form.at(t))
    }
}

impl SublimationLine {
    /// Pa, at a temperature in K; `None` outside the range.
    pub fn at(&self, t: f64) -> Option<f64> {
        let (low, high) = self.temperature_range_k;
        (low..=high).contains(&t).then(|| self.form.at(t))
    }
}

impl MeltingForm {
    fn at(&self, t: f64) -> f64 {
        match self {
            Self::Simon {
                t0_k,
                p0_pa,
                a_pa,
                c,
            } => p0_pa + a_pa * ((t / t0_k).powf(*c) - 1.0),
            Self::Powers { t0_k, p0_pa, terms } => {
                let theta = t / t0_k;
                p0_pa * (1.0 + sum(terms, |e| theta.powf(e) - 1.0))
            }
            Self::PowersOfRise { t0_k, p0_pa, terms } => {
                let rise = t / t0_k - 1.0;
                p0_pa * (1.0 + sum(terms, |e| rise.powf(e)))
            }
            Self::LogPowers { t0_k, p0_pa, terms } => log_powers(t / t0_k, *p0_pa, terms),
        }
    }
}

impl SublimationForm {
    fn at(&self, t: f64) -> f64 {
        match self {
            Self::PowersOfFall { t0_k, p0_pa, terms } => {
                let theta = t / t0_k;
                p0_pa * (sum(terms, |e| (1.0 - theta).max(0.0).powf(e)) / theta).exp()
            }
            Self::Powers { t0_k, p0_pa, terms } => {
                let theta = t / t0_k;
                p0_pa * (sum(terms, |e| theta.powf(e)) / theta).exp()
            }
            Self::LogPowers { t0_k, p0_pa, terms } => log_powers(t / t0_k, *p0_pa, terms),
            Self::Antoine(a, b, c) => (a - b / (t + c)).exp(),
            Self::Alcock(a, b, c, d, e) => (a + b / t + c * t.ln() + d * t.powf(*e)).exp(),
        }
    }
}

fn log_powers(theta: f64, p0: f64, terms: &[(f64, f64)]) -> f64 {
    p0 * sum(terms, |e| 1.0 - theta.powf(e)).exp()
}

/// Σ a·f(e) over (a, e).
fn sum(terms: &[(f64, f64)], f: impl Fn(f64) -> f64) -> f64 {
    terms.iter().map(|(a, e)| a * f(*e)).sum()
}

impl Fluid {
    /// Triple point, melting line and sublimation line, with ranges and sources.
    pub fn lines(&self) -> &Lines {
        &self.lines
    }

    /// Pressure at which the liquid turns solid at a temperature above the freezing point;
    /// `None` where no line is given. Of several solids the one that comes first counts.
    pub fn melting_pressure(&self, temperature: Temperature) -> Option<Pressure> {
        let t = temperature.kelvin();
        let lowest = self
            .lines
            .melting
            .iter()
            .filter_map(|piece| piece.at(t))
            .filter(|p| p.is_finite() && *p > 0.0)
            .min_by(f64::total_cmp)?;
        Pressure::from_pascal(lowest).ok()
    }

    /// Vapour pressure of the frozen fluid below its freezing point: never above the vapour
    /// pressure at that point, to which the lines are only joined within their errors.
    ///
    /// # Errors
    /// [`FluidError::NotConverged`] if the fluid's saturation cannot be solved.
    pub fn frozen_pressure(&self, temperature: Temperature) -> Result<FrozenPressure, FluidError> {
        let (low, _) = self.saturation_range();
        let triple = self
            .curve()?
            .at(self.freezing_point().max(low).kelvin())
            .pressure_pa;
        let pascal = |p: f64| Pressure::from_pascal(p.min(triple)).ok();
        let t = temperature.kelvin();
        let line = self.lines.sublimation.as_ref();
        let known = line
            .and_then(|line| line.at(t))
            .and_then(pascal)
            .map(FrozenPressure::Known);
        // Colder than the line reaches, the pressure is below its lowest.
        let below = line
            .filter(|line| t < line.temperature_range_k.0)
            .and_then(|line| line.at(line.temperature_range_k.0))
            .and_then(pascal)
            .map(FrozenPressure::AtMost);
        Ok(known.or(below).unwrap_or_else(|| {
            let triple = Pressure::from_pascal(triple).expect("a vapour pressure is finite");
            FrozenPressure::AtMost(triple)
        }))
    }
}
