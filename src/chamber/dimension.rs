//! A length as drawn: nominal and symmetric tolerance.

use serde::{Deserialize, Serialize};

use crate::units::Length;

/// Which corner of the tolerances a size is taken at.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum Pick {
    Nominal,
    Least,
    Greatest,
}

impl Pick {
    /// The corner that has the opposite effect: what a solid insert is taken at.
    pub const fn opposite(self) -> Self {
        match self {
            Self::Nominal => Self::Nominal,
            Self::Least => Self::Greatest,
            Self::Greatest => Self::Least,
        }
    }
}

/// A length with its tolerance: `(nominal_m: 0.012, tolerance_m: 0.0001)` in a
/// file, the tolerance 0 where left out.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Dimension {
    #[serde(rename = "nominal_m")]
    pub nominal: Length,
    /// Plus and minus.
    #[serde(rename = "tolerance_m", default = "no_tolerance")]
    pub tolerance: Length,
}

impl Dimension {
    pub const fn new(nominal: Length, tolerance: Length) -> Self {
        Self { nominal, tolerance }
    }

    /// Without tolerance.
    pub fn exact(nominal: Length) -> Self {
        Self {
            nominal,
            tolerance: no_tolerance(),
        }
    }

    /// Nominal minus tolerance, not below 0.
    pub fn least(&self) -> Length {
        length_m(self.nominal.metre() - self.tolerance.metre())
    }

    /// Nominal plus tolerance.
    pub fn greatest(&self) -> Length {
        length_m(self.nominal.metre() + self.tolerance.metre())
    }

    pub fn at(&self, pick: Pick) -> Length {
        match pick {
            Pick::Nominal => self.nominal,
            Pick::Least => self.least(),
            Pick::Greatest => self.greatest(),
        }
    }
}

/// A length held inside the range of [`Length`]; a sum of two stays at its end.
pub(super) fn length_m(value_m: f64) -> Length {
    use crate::units::Quantity;
    let (low, high) = Length::RANGE;
    Length::from_metre(value_m.clamp(low, high)).expect("clamped to the range, and not NaN")
}

fn no_tolerance() -> Length {
    length_m(0.0)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn read(text: &str) -> Result<Dimension, String> {
        ron::from_str(text).map_err(|error| error.to_string())
    }

    #[test]
    fn the_tolerance_may_be_left_out_and_nothing_else_may_be_added() {
        let plain = read("(nominal_m: 0.012)").expect("reads");
        assert_eq!(plain, Dimension::exact(length_m(0.012)));
        assert_eq!(plain.at(Pick::Least), plain.at(Pick::Greatest));
        for bad in [
            "(tolerance_m: 0.1)",
            "(nominal_m: -0.1)",
            "(nominal_m: 0.1, tol: 0.1)",
        ] {
            assert!(read(bad).is_err(), "{bad}");
        }
    }

    #[test]
    fn least_stops_at_nothing_and_greatest_at_the_range_of_a_length() {
        let wide = Dimension::new(length_m(0.001), length_m(0.002));
        assert_eq!(wide.least(), length_m(0.0));
        assert_eq!(wide.greatest().metre(), 0.003);
        let huge = Dimension::new(length_m(1e4), length_m(1e4));
        assert_eq!(huge.greatest().metre(), 1e4);
    }
}
