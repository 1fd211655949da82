//! Factors on strength, as the user or his customer demands them.

use serde::{Deserialize, Serialize};

use crate::units::{Kind, Quantity, QuantityError};

/// Factor by which a strength is divided, 1 or more.
#[derive(Debug, Clone, Copy, PartialEq, PartialOrd, Serialize, Deserialize)]
#[serde(try_from = "f64", into = "f64")]
pub struct Factor(f64);

/// Share of the wall's strength that its joints have, above 0, at most 1.
#[derive(Debug, Clone, Copy, PartialEq, PartialOrd, Serialize, Deserialize)]
#[serde(try_from = "f64", into = "f64")]
pub struct JointEfficiency(f64);

/// What stands between strength and allowable pressure.
///
/// The defaults are burst 4, after NASA's payload safety rule for ground systems
/// without a code (burst over working pressure), yield 1.5, common practice, and collapse
/// 3, as in ASME BPVC VIII-1, UG-28 [from memory].
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields, default)]
pub struct Factors {
    pub on_burst: Factor,
    pub on_yield: Factor,
    /// Divides elastic collapse under outside pressure.
    pub on_collapse: Factor,
    /// Multiplies every strength of every metal wall, the burst pressure as well.
    pub joint_efficiency: JointEfficiency,
}

impl Factors {
    /// Whether any factor demands less than the default does.
    pub fn below_default(&self) -> bool {
        let default = Self::default();
        self.on_burst < default.on_burst
            || self.on_yield < default.on_yield
            || self.on_collapse < default.on_collapse
    }
}

impl Default for Factors {
    fn default() -> Self {
        Self {
            on_burst: Factor(4.0),
            on_yield: Factor(1.5),
            on_collapse: Factor(3.0),
            joint_efficiency: JointEfficiency(1.0),
        }
    }
}

macro_rules! number {
    ($name:ident, $label:literal, $low:expr, $high:expr) => {
        impl $name {
            /// # Errors
            /// [`QuantityError`] for NaN, infinity and values out of range.
            pub fn from_number(value: f64) -> Result<Self, QuantityError> {
                let (quantity, unit) = ($label, "");
                let (low, high) = Self::RANGE;
                if !value.is_finite() {
                    Err(QuantityError::NotFinite { quantity, value })
                } else if value < low {
                    Err(QuantityError::Below {
                        quantity,
                        value,
                        low,
                        unit,
                    })
                } else if value > high {
                    Err(QuantityError::Above {
                        quantity,
                        value,
                        high,
                        unit,
                    })
                } else {
                    Ok(Self(value))
                }
            }

            pub const fn number(self) -> f64 {
                self.0
            }
        }

        impl Quantity for $name {
            const KIND: Kind = Kind::Number;
            const RANGE: (f64, f64) = ($low, $high);
            fn from_si(value: f64) -> Result<Self, QuantityError> {
                Self::from_number(value)
            }
            fn si(self) -> f64 {
                self.0
            }
        }

        impl TryFrom<f64> for $name {
            type Error = QuantityError;
            fn try_from(value: f64) -> Result<Self, QuantityError> {
                Self::from_number(value)
            }
        }

        impl From<$name> for f64 {
            fn from(value: $name) -> Self {
                value.0
            }
        }
    };
}

number!(Factor, "a factor", 1.0, 1000.0);
number!(JointEfficiency, "a joint efficiency", 0.01, 1.0);

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_factor_below_one_or_not_finite_is_refused_in_a_file_too() {
        for bad in [
            "(on_burst: 0.9)",
            "(on_yield: NaN)",
            "(joint_efficiency: 1.1)",
            "(burst: 4)",
        ] {
            assert!(ron::from_str::<Factors>(bad).is_err(), "{bad}");
        }
        assert_eq!(ron::from_str::<Factors>("()"), Ok(Factors::default()));
    }

    #[test]
    fn a_lower_factor_shows() {
        let low: Factors = ron::from_str("(on_burst: 2.5)").expect("reads");
        assert!(low.below_default() && !Factors::default().below_default());
        assert_eq!((low.on_burst.number(), low.on_yield.number()), (2.5, 1.5));
    }
}
