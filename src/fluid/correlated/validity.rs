//! What every published form states of itself, and how its numbers are read.

use serde::{Deserialize, Deserializer};

use crate::source::Source;

/// Where a form holds, how well, and who says so.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Validity<'a> {
    pub temperature_range_k: (f64, f64),
    pub uncertainty_percent: f64,
    pub source: &'a Source,
}

/// Σ nθᵗ and its slope over θ.
pub(super) fn powers(terms: impl Iterator<Item = (f64, f64)>, theta: f64) -> (f64, f64) {
    terms.fold((0.0, 0.0), |(sum, slope), (n, t)| {
        (sum + n * theta.powf(t), slope + n * t * theta.powf(t - 1.0))
    })
}

/// Coefficients with exponents that a form fixes.
pub(super) fn paired<const N: usize>(
    n: &[f64; N],
    t: [f64; N],
) -> impl Iterator<Item = (f64, f64)> {
    n.iter().copied().zip(t)
}

/// Coefficients are written as a list, `[..]`, of just the form's length.
pub(super) fn list<'de, D: Deserializer<'de>, const N: usize>(
    deserializer: D,
) -> Result<[f64; N], D::Error> {
    let list = Vec::<f64>::deserialize(deserializer)?;
    let found = list.len();
    list.try_into()
        .map_err(|_| serde::de::Error::custom(format!("{N} coefficients are needed, not {found}")))
}
