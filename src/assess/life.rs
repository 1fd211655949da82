//! The stretches of a unit's life that load its walls.

use std::sync::Arc;

use crate::conditions::{Contents, Exposure};
use crate::design::Design;
use crate::units::{Pressure, Temperature};

/// A range of temperatures with what is inside and what stands outside.
#[derive(Debug, Clone, PartialEq)]
pub struct Stretch {
    pub name: Arc<str>,
    pub contents: Contents,
    pub coldest: Temperature,
    pub hottest: Temperature,
    pub least_outside: Pressure,
    pub greatest_outside: Pressure,
}

/// Every stretch of a design: evacuated on the bench before the fill, sealed between its
/// extremes, and the exposures.
pub fn stretches(design: &Design) -> Vec<Stretch> {
    let conditions = &design.conditions;
    let bench = Stretch {
        name: Arc::from("evacuated on the bench"),
        contents: Contents::Evacuated,
        coldest: conditions.bench,
        hottest: conditions.bench,
        least_outside: conditions.barometer,
        greatest_outside: conditions.barometer,
    };
    let sealed = Stretch {
        name: Arc::from("sealed, coldest to hottest"),
        contents: Contents::Sealed,
        coldest: conditions.coldest,
        hottest: conditions.hottest,
        least_outside: conditions.least_outside,
        greatest_outside: conditions.barometer,
    };
    let exposures = conditions.exposures.iter().map(Stretch::from);
    [bench, sealed].into_iter().chain(exposures).collect()
}

impl Stretch {
    /// Its ends and the knots between them: where a load or a strength can be worst.
    pub fn temperatures<'a>(
        &'a self,
        knots: &'a [Temperature],
    ) -> impl Iterator<Item = Temperature> + 'a {
        let between = knots
            .iter()
            .copied()
            .filter(|t| *t > self.coldest && *t < self.hottest);
        [self.hottest, self.coldest].into_iter().chain(between)
    }

    pub fn is_sealed(&self) -> bool {
        self.contents == Contents::Sealed
    }
}

impl From<&Exposure> for Stretch {
    fn from(exposure: &Exposure) -> Self {
        Self {
            name: Arc::from(exposure.name.as_str()),
            contents: exposure.contents,
            coldest: exposure.coldest,
            hottest: exposure.hottest,
            least_outside: exposure.least_outside,
            greatest_outside: exposure.greatest_outside,
        }
    }
}
