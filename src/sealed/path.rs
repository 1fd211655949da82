//! A sealed unit's path over temperature, with a point on every kink.

use super::SealedUnit;
use crate::fluid::{FluidError, State};
use crate::units::Temperature;

/// One point of the path.
#[derive(Debug, Clone, PartialEq)]
pub struct PathPoint {
    pub temperature: Temperature,
    pub state: Result<State, FluidError>,
}

/// The unit at about `points` temperatures from `low` to `high`, evenly spaced,
/// and exactly at each of `kinks` between them.
pub fn path(
    unit: &SealedUnit,
    (low, high): (Temperature, Temperature),
    points: usize,
    kinks: &[Temperature],
) -> Vec<PathPoint> {
    let (low, high) = (low.kelvin(), high.kelvin());
    let steps = points.max(2) - 1;
    let mut at: Vec<f64> = (0..=steps)
        .map(|i| low + (high - low) * i as f64 / steps as f64)
        .chain(
            kinks
                .iter()
                .map(|t| t.kelvin())
                .filter(|t| (low..=high).contains(t)),
        )
        .collect();
    at.sort_by(f64::total_cmp);
    at.dedup();
    at.into_iter()
        .filter_map(|t| Temperature::from_kelvin(t).ok())
        .map(|temperature| PathPoint {
            temperature,
            state: unit.state(temperature),
        })
        .collect()
}
