//! The quantities that pass between modules: finite, in range, in SI.

use serde::{Deserialize, Deserializer, Serialize, Serializer};

use super::unit::Kind;

/// Why a number is not a value of a quantity.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum QuantityError {
    #[error("{quantity} must be a finite number, not {value}")]
    NotFinite { quantity: &'static str, value: f64 },
    #[error("{quantity} of {value} {unit} is below the least allowed, {low} {unit}")]
    Below {
        quantity: &'static str,
        value: f64,
        low: f64,
        unit: &'static str,
    },
    #[error("{quantity} of {value} {unit} is above the greatest allowed, {high} {unit}")]
    Above {
        quantity: &'static str,
        value: f64,
        high: f64,
        unit: &'static str,
    },
}

/// What every quantity can do: read and give its SI value, name its kind.
///
/// # Errors
/// [`Quantity::from_si`] refuses NaN, infinity and values outside [`Quantity::RANGE`].
pub trait Quantity: Copy + PartialEq + PartialOrd + 'static {
    const KIND: Kind;
    /// Inclusive range of the SI value.
    const RANGE: (f64, f64);
    fn from_si(value: f64) -> Result<Self, QuantityError>;
    fn si(self) -> f64;
}

fn checked(
    quantity: &'static str,
    unit: &'static str,
    (low, high): (f64, f64),
    value: f64,
) -> Result<f64, QuantityError> {
    if !value.is_finite() {
        return Err(QuantityError::NotFinite { quantity, value });
    }
    if value < low {
        return Err(QuantityError::Below {
            quantity,
            value,
            low,
            unit,
        });
    }
    if value > high {
        return Err(QuantityError::Above {
            quantity,
            value,
            high,
            unit,
        });
    }
    Ok(value + 0.0) // turns −0 into 0
}

macro_rules! quantities {
    ($($(#[$doc:meta])* $name:ident, $kind:ident, $label:literal, $unit:literal, $from:ident, $get:ident, $low:expr, $high:expr;)*) => {$(
        $(#[$doc])*
        #[derive(Debug, Clone, Copy, PartialEq, PartialOrd)]
        pub struct $name(f64);

        impl $name {
            #[doc = concat!("From a value in ", $unit, ".")]
            ///
            /// # Errors
            /// [`QuantityError`] for NaN, infinity and values out of range.
            pub fn $from(value: f64) -> Result<Self, QuantityError> {
                checked($label, $unit, Self::RANGE, value).map(Self)
            }

            #[doc = concat!("The value in ", $unit, ".")]
            pub const fn $get(self) -> f64 {
                self.0
            }
        }

        impl Quantity for $name {
            const KIND: Kind = Kind::$kind;
            const RANGE: (f64, f64) = ($low, $high);
            fn from_si(value: f64) -> Result<Self, QuantityError> {
                Self::$from(value)
            }
            fn si(self) -> f64 {
                self.0
            }
        }

        impl Serialize for $name {
            fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
                serializer.serialize_f64(self.0)
            }
        }

        impl<'de> Deserialize<'de> for $name {
            fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Self, D::Error> {
                let value = f64::deserialize(deserializer)?;
                Self::$from(value).map_err(serde::de::Error::custom)
            }
        }
    )*};
}

quantities! {
    /// Thermodynamic temperature, ITS-90.
    Temperature, Temperature, "a temperature", "K", from_kelvin, kelvin, 1e-3, 1e5;
    /// Difference of two temperatures; may be negative.
    TemperatureDifference, TemperatureDifference, "a temperature difference", "K", from_kelvin, kelvin, -1e5, 1e5;
    /// Absolute pressure; negative only where a liquid is under tension.
    Pressure, Pressure, "a pressure", "Pa", from_pascal, pascal, -1e12, 1e12;
    /// Length, 0 or more.
    Length, Length, "a length", "m", from_metre, metre, 0.0, 1e4;
    /// Volume, 0 or more.
    Volume, Volume, "a volume", "m3", from_cubic_metre, cubic_metre, 0.0, 1e9;
    /// Mass, 0 or more.
    Mass, Mass, "a mass", "kg", from_kilogram, kilogram, 0.0, 1e12;
    /// Mass density, more than 0.
    Density, Density, "a density", "kg/m3", from_kilogram_per_cubic_metre, kilogram_per_cubic_metre, 1e-30, 1e6;
    /// Ratio of two like quantities, 0 to 1; a percentage only on screen.
    Ratio, Ratio, "a ratio", "", from_fraction, fraction, 0.0, 1.0;
    /// Amount of substance, 0 or more.
    Amount, Amount, "an amount", "mol", from_mole, mole, 0.0, 1e9;
    /// Energy.
    Energy, Energy, "an energy", "J", from_joule, joule, -1e18, 1e18;
    /// Permeability of a wick, more than 0.
    Permeability, Area, "a permeability", "m2", from_square_metre, square_metre, 1e-24, 1.0;
    /// Openings of a screen per length.
    MeshNumber, MeshNumber, "a mesh number", "1/m", from_per_metre, per_metre, 1.0, 1e7;
    /// Tilt of an axis against the horizontal, 0 to a right angle.
    Tilt, Angle, "a tilt", "rad", from_radian, radian, 0.0, std::f64::consts::FRAC_PI_2;
}

impl Temperature {
    /// From degrees Celsius.
    ///
    /// # Errors
    /// [`QuantityError`] below absolute zero or not finite.
    pub fn from_celsius(value: f64) -> Result<Self, QuantityError> {
        Self::from_kelvin(value + 273.15)
    }

    /// The value in degrees Celsius.
    pub const fn celsius(self) -> f64 {
        self.0 - 273.15
    }

    /// The warmer of two.
    pub fn max(self, other: Self) -> Self {
        if self.0 >= other.0 { self } else { other }
    }

    /// The colder of two.
    pub fn min(self, other: Self) -> Self {
        if self.0 <= other.0 { self } else { other }
    }

    /// This temperature shifted by a difference, held inside the type's range.
    pub fn shifted(self, by: TemperatureDifference) -> Self {
        let (low, high) = <Self as Quantity>::RANGE;
        Self((self.0 + by.0).clamp(low, high))
    }
}

impl std::ops::Sub for Temperature {
    type Output = TemperatureDifference;
    fn sub(self, other: Self) -> TemperatureDifference {
        TemperatureDifference(self.0 - other.0)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn nan_infinity_and_out_of_range_are_refused_by_name() {
        for bad in [f64::NAN, f64::INFINITY, f64::NEG_INFINITY] {
            assert!(matches!(
                Length::from_metre(bad),
                Err(QuantityError::NotFinite { .. })
            ));
        }
        let text = Length::from_metre(-0.001).map_err(|e| e.to_string());
        assert_eq!(
            text,
            Err("a length of -0.001 m is below the least allowed, 0 m".to_owned())
        );
        assert!(Temperature::from_celsius(-274.0).is_err());
        assert!(Ratio::from_fraction(1.01).is_err());
    }

    #[test]
    fn minus_zero_becomes_zero() {
        let zero = Mass::from_kilogram(-0.0).expect("zero is a mass");
        assert!(zero.kilogram().is_sign_positive());
    }
}
