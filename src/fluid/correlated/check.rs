//! What a correlated fluid's file must hold beyond its syntax.

use super::{CompressedLiquid, Correlated, LiquidDensity, VapourForm, VapourPressure};

/// Why a set of forms is refused.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum CorrelatedError {
    #[error("{field} must be a finite number above 0, not {value}")]
    NotPositive { field: &'static str, value: f64 },
    #[error("temperature_range_k of the {form} must rise, not {low} to {high}")]
    EmptyRange {
        form: &'static str,
        low: f64,
        high: f64,
    },
    #[error(
        "the forms share no temperature: the last starts at {low} K, the first ends at {high} K"
    )]
    NoCommonRange { low: f64, high: f64 },
    #[error("{needed} is needed by {by}")]
    Missing {
        needed: &'static str,
        by: &'static str,
    },
    #[error("{form}: lists of unequal length, {n} and {t}")]
    UnequalLists {
        form: &'static str,
        n: usize,
        t: usize,
    },
}

impl Correlated {
    /// Whether the forms are whole and share a range; what they say there is asked elsewhere.
    ///
    /// # Errors
    /// [`CorrelatedError`] names what is wrong.
    pub fn check(&self) -> Result<(), CorrelatedError> {
        self.is_whole()?;
        let (low, high) = self.temperature_range_k();
        if low.partial_cmp(&high) != Some(std::cmp::Ordering::Less) {
            return Err(CorrelatedError::NoCommonRange { low, high });
        }
        Ok(())
    }

    fn is_whole(&self) -> Result<(), CorrelatedError> {
        for (field, value) in [
            ("critical.temperature_k", self.critical.temperature_k),
            ("critical.pressure_pa", self.critical.pressure_pa),
            (
                "critical.density_kg_per_m3",
                self.critical.density_kg_per_m3,
            ),
        ] {
            if !(value.is_finite() && value > 0.0) {
                return Err(CorrelatedError::NotPositive { field, value });
            }
        }
        for (form, validity) in self.validities() {
            let (low, high) = validity.temperature_range_k;
            if low.partial_cmp(&high) != Some(std::cmp::Ordering::Less) {
                return Err(CorrelatedError::EmptyRange { form, low, high });
            }
            let value = validity.uncertainty_percent;
            if !(value.is_finite() && value > 0.0) {
                let field = "uncertainty_percent";
                return Err(CorrelatedError::NotPositive { field, value });
            }
        }
        let lists = [
            match &self.vapour_pressure {
                VapourPressure::WagnerGeneral { n, t, .. } => {
                    Some(("vapour pressure", n.len(), t.len()))
                }
                _ => None,
            },
            match &self.liquid_density {
                LiquidDensity::PowersOfTheta { n, t, .. } => {
                    Some(("liquid density", n.len(), t.len()))
                }
                _ => None,
            },
        ];
        for (form, n, t) in lists.into_iter().flatten() {
            if n != t {
                return Err(CorrelatedError::UnequalLists { form, n, t });
            }
        }
        if let VapourForm::Associating {
            smallest_atoms,
            larger,
            unit_pa,
            ..
        } = &self.vapour
        {
            let sizes = larger.iter().map(|molecule| ("atoms", molecule.atoms));
            for (field, value) in
                sizes.chain([("smallest_atoms", *smallest_atoms), ("unit_pa", *unit_pa)])
            {
                if !(value.is_finite() && value > 0.0) {
                    return Err(CorrelatedError::NotPositive { field, value });
                }
            }
        }
        if matches!(self.vapour, VapourForm::Clapeyron { .. }) && self.latent_heat.is_none() {
            return Err(CorrelatedError::Missing {
                needed: "latent_heat",
                by: "vapour: Clapeyron",
            });
        }
        let squeezed = matches!(
            self.compressed_liquid,
            CompressedLiquid::ThomsonBrobstHankinson { .. }
        );
        if squeezed && !self.acentric_factor.is_some_and(f64::is_finite) {
            return Err(CorrelatedError::Missing {
                needed: "acentric_factor",
                by: "compressed_liquid: ThomsonBrobstHankinson",
            });
        }
        Ok(())
    }
}
