//! Strength values: one at room temperature, or published points over temperature.

use serde::{Deserialize, Serialize};

use crate::source::Source;
use crate::units::Temperature;

/// Ambient temperature of a tensile test, K: where a room-temperature value is
/// known. Source: ISO 6892-1, test at 10 °C to 35 °C [from memory].
pub const ROOM_K: (f64, f64) = (283.15, 308.15);

/// A finite number above 0; its unit is in the file key that holds it.
#[derive(Debug, Clone, Copy, PartialEq, PartialOrd, Serialize, Deserialize)]
#[serde(try_from = "f64", into = "f64")]
pub struct Positive(f64);

impl Positive {
    /// # Errors
    /// [`CurveError::NotPositive`] for NaN, infinity, 0 and below.
    pub fn new(value: f64) -> Result<Self, CurveError> {
        if value.is_finite() && value > 0.0 {
            Ok(Self(value))
        } else {
            Err(CurveError::NotPositive { value })
        }
    }

    pub const fn get(self) -> f64 {
        self.0
    }
}

/// Published points, straight lines between them, nothing outside.
///
/// File form: `(points_k_pa: [(293.15, 170e6), (373.15, 145e6)], source: ...)`.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(try_from = "CurveFile", into = "CurveFile")]
pub struct Curve {
    points: Vec<(f64, f64)>,
    source: Source,
}

/// Why points are not a curve, or a curve has no value.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum CurveError {
    #[error("{value} is not a finite number above 0")]
    NotPositive { value: f64 },
    #[error("a curve needs two points at least, not {count}")]
    TooFewPoints { count: usize },
    #[error("temperatures must rise from point to point: {next_k} K follows {previous_k} K")]
    NotAscending { previous_k: f64, next_k: f64 },
    #[error("{at_k} K is outside the published points, {least_k} K to {greatest_k} K")]
    Outside {
        at_k: f64,
        least_k: f64,
        greatest_k: f64,
    },
}

impl Curve {
    /// From points (K, value).
    ///
    /// # Errors
    /// [`CurveError`] for fewer than two points, temperatures that do not rise,
    /// and temperatures or values that are not above 0.
    pub fn new(points: Vec<(f64, f64)>, source: Source) -> Result<Self, CurveError> {
        if points.len() < 2 {
            return Err(CurveError::TooFewPoints {
                count: points.len(),
            });
        }
        for &(temperature_k, value) in &points {
            Positive::new(temperature_k)?;
            Positive::new(value)?;
        }
        for pair in points.windows(2) {
            let (previous_k, next_k) = (pair[0].0, pair[1].0);
            if next_k <= previous_k {
                return Err(CurveError::NotAscending { previous_k, next_k });
            }
        }
        Ok(Self { points, source })
    }

    /// Linear between the two nearest points.
    ///
    /// # Errors
    /// [`CurveError::Outside`] beyond the first or last point: never extrapolated.
    pub fn at(&self, temperature: Temperature) -> Result<f64, CurveError> {
        let t = temperature.kelvin();
        let above = self.points.partition_point(|(k, _)| *k < t);
        match (
            self.points.get(above),
            above.checked_sub(1).map(|below| self.points[below]),
        ) {
            (Some(&(k, value)), _) if k == t => Ok(value),
            (Some(&(k1, v1)), Some((k0, v0))) => Ok(v0 + (v1 - v0) * (t - k0) / (k1 - k0)),
            _ => {
                let (least_k, greatest_k) = (self.first().0, self.last().0);
                Err(CurveError::Outside {
                    at_k: t,
                    least_k,
                    greatest_k,
                })
            }
        }
    }

    pub fn points(&self) -> &[(f64, f64)] {
        &self.points
    }

    pub const fn source(&self) -> &Source {
        &self.source
    }

    pub(super) fn first(&self) -> (f64, f64) {
        self.points[0] // two points at least, by construction
    }

    pub(super) fn last(&self) -> (f64, f64) {
        self.points[self.points.len() - 1]
    }
}

/// A strength, as far as it is known.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
pub enum Strength {
    AtRoomTemperature(RoomValue),
    OverTemperature(Curve),
}

/// `(value_pa: 207e6, source: ...)`.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct RoomValue {
    #[serde(rename = "value_pa")]
    pub value: Positive,
    pub source: Source,
}

/// What a [`Strength`] says at one temperature.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum StrengthAt {
    Known(f64),
    /// Hotter than it is known: not more than this, since heat does not strengthen
    /// a metal; how much less is not known.
    AtMost(f64),
}

impl StrengthAt {
    pub const fn is_known(self) -> bool {
        matches!(self, Self::Known(_))
    }

    /// The value, or what it cannot exceed.
    pub const fn ceiling(self) -> f64 {
        match self {
            Self::Known(value) | Self::AtMost(value) => value,
        }
    }

    /// The same knowledge of something that grows with the strength.
    pub fn map(self, growing: impl FnOnce(f64) -> f64) -> Self {
        match self {
            Self::Known(value) => Self::Known(growing(value)),
            Self::AtMost(value) => Self::AtMost(growing(value)),
        }
    }
}

impl Strength {
    /// In Pa. Below the first point the first value holds; how far down that may be
    /// trusted is a limit of the material, tested before.
    pub fn at(&self, temperature: Temperature) -> StrengthAt {
        let t = temperature.kelvin();
        match self {
            Self::AtRoomTemperature(room) => {
                let value = room.value.get();
                if t <= ROOM_K.1 {
                    StrengthAt::Known(value)
                } else {
                    StrengthAt::AtMost(value)
                }
            }
            Self::OverTemperature(curve) => match curve.at(temperature) {
                Ok(value) => StrengthAt::Known(value),
                Err(_) if t < curve.first().0 => StrengthAt::Known(curve.first().1),
                Err(_) => StrengthAt::AtMost(curve.last().1),
            },
        }
    }

    pub const fn source(&self) -> &Source {
        match self {
            Self::AtRoomTemperature(room) => &room.source,
            Self::OverTemperature(curve) => curve.source(),
        }
    }

    /// Temperatures where the line bends or ends, K.
    pub(super) fn knots_k(&self) -> Vec<f64> {
        match self {
            Self::AtRoomTemperature(_) => vec![ROOM_K.1],
            Self::OverTemperature(curve) => curve.points.iter().map(|(k, _)| *k).collect(),
        }
    }
}

#[derive(Serialize, Deserialize)]
#[serde(rename = "Curve", deny_unknown_fields)]
struct CurveFile {
    points_k_pa: Vec<(f64, f64)>,
    source: Source,
}

impl TryFrom<CurveFile> for Curve {
    type Error = CurveError;
    fn try_from(file: CurveFile) -> Result<Self, CurveError> {
        Self::new(file.points_k_pa, file.source)
    }
}

impl From<Curve> for CurveFile {
    fn from(curve: Curve) -> Self {
        Self {
            points_k_pa: curve.points,
            source: curve.source,
        }
    }
}

impl TryFrom<f64> for Positive {
    type Error = CurveError;
    fn try_from(value: f64) -> Result<Self, CurveError> {
        Self::new(value)
    }
}

impl From<Positive> for f64 {
    fn from(value: Positive) -> Self {
        value.0
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn kelvin(value: f64) -> Temperature {
        Temperature::from_kelvin(value).expect("a temperature")
    }

    fn curve(points: &[(f64, f64)]) -> Result<Curve, CurveError> {
        Curve::new(points.to_vec(), Source::Practice("a test".to_owned()))
    }

    #[test]
    fn a_curve_meets_its_points_and_is_straight_between() {
        let curve = curve(&[(300.0, 10.0), (400.0, 8.0), (500.0, 2.0)]).expect("a curve");
        for (k, value) in [
            (300.0, 10.0),
            (350.0, 9.0),
            (400.0, 8.0),
            (475.0, 3.5),
            (500.0, 2.0),
        ] {
            assert_eq!(curve.at(kelvin(k)), Ok(value));
        }
    }

    #[test]
    fn a_curve_is_never_extrapolated() {
        let curve = curve(&[(300.0, 10.0), (400.0, 8.0)]).expect("a curve");
        for k in [299.999, 400.001] {
            let outside = CurveError::Outside {
                at_k: k,
                least_k: 300.0,
                greatest_k: 400.0,
            };
            assert_eq!(curve.at(kelvin(k)), Err(outside));
        }
    }

    #[test]
    fn points_that_are_no_curve_are_refused() {
        assert_eq!(
            curve(&[(300.0, 1.0)]),
            Err(CurveError::TooFewPoints { count: 1 })
        );
        assert_eq!(
            curve(&[(300.0, 1.0), (300.0, 2.0)]),
            Err(CurveError::NotAscending {
                previous_k: 300.0,
                next_k: 300.0
            })
        );
        assert_eq!(
            curve(&[(300.0, 1.0), (400.0, 0.0)]),
            Err(CurveError::NotPositive { value: 0.0 })
        );
        assert!(curve(&[(300.0, 1.0), (f64::NAN, 1.0)]).is_err());
    }

    #[test]
    fn a_file_without_source_or_order_is_refused_with_the_reason() {
        let error = |text: &str| {
            ron::from_str::<Curve>(text)
                .map_err(|error| error.to_string())
                .expect_err(text)
        };
        assert!(error("(points_k_pa: [(300, 2), (400, 1)])").contains("source"));
        let text = r#"(points_k_pa: [(400, 2), (300, 1)], source: Memory("x"))"#;
        assert!(error(text).contains("must rise"), "{}", error(text));
        let text = r#"(points_k_pa: [(300, 2), (400, -1)], source: Memory("x"))"#;
        assert!(error(text).contains("above 0"), "{}", error(text));
    }

    #[test]
    fn hotter_than_known_is_a_ceiling_not_a_value() {
        let source = Source::Practice("a test".to_owned());
        let value = Positive::new(207e6).expect("positive");
        let room = Strength::AtRoomTemperature(RoomValue { value, source });
        assert_eq!(room.at(kelvin(ROOM_K.1)), StrengthAt::Known(207e6));
        assert_eq!(room.at(kelvin(ROOM_K.1 + 0.01)), StrengthAt::AtMost(207e6));
        let over = curve(&[(300.0, 10.0), (400.0, 8.0)]).map(Strength::OverTemperature);
        let over = over.expect("a curve");
        assert_eq!(over.at(kelvin(200.0)), StrengthAt::Known(10.0));
        assert_eq!(over.at(kelvin(350.0)), StrengthAt::Known(9.0));
        assert_eq!(over.at(kelvin(401.0)), StrengthAt::AtMost(8.0));
    }
}
