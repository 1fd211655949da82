//! A volume as stated: nominal and symmetric tolerance.

use serde::{Deserialize, Serialize};

use super::dimension::Pick;
use crate::units::Volume;

/// A volume with its tolerance: `(nominal_m3: 0.2e-6, tolerance_m3: 0.05e-6)` in a
/// file, the tolerance 0 where left out.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Capacity {
    #[serde(rename = "nominal_m3")]
    pub nominal: Volume,
    /// Plus and minus.
    #[serde(rename = "tolerance_m3", default = "nothing")]
    pub tolerance: Volume,
}

impl Capacity {
    pub(super) fn at_m3(&self, pick: Pick) -> f64 {
        let (nominal, off) = (self.nominal.cubic_metre(), self.tolerance.cubic_metre());
        match pick {
            Pick::Nominal => nominal,
            Pick::Least => (nominal - off).max(0.0),
            Pick::Greatest => nominal + off,
        }
    }
}

impl Default for Capacity {
    /// Nothing, exactly.
    fn default() -> Self {
        Self {
            nominal: nothing(),
            tolerance: nothing(),
        }
    }
}

fn nothing() -> Volume {
    Volume::from_cubic_metre(0.0).expect("0 is a volume")
}
