//! What the sealed unit will live through: facts, set by the world and not by the design.

use serde::{Deserialize, Serialize};

use crate::units::{Pressure, Temperature, Volume};

/// One standard atmosphere, Pa: the default outside and barometer.
pub const STANDARD_ATMOSPHERE_PA: f64 = 101_325.0;

/// Temperatures, outside pressures and the room.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Conditions {
    /// Where it is filled and where fill ratios are stated.
    #[serde(rename = "bench_temperature_k")]
    pub bench: Temperature,
    /// Working range: the fluid must be liquid and vapour throughout.
    #[serde(rename = "working_low_k")]
    pub working_low: Temperature,
    #[serde(rename = "working_high_k")]
    pub working_high: Temperature,
    /// Coldest and hottest the sealed unit will ever see: storage, transport, stagnation.
    #[serde(rename = "coldest_k")]
    pub coldest: Temperature,
    #[serde(rename = "hottest_k")]
    pub hottest: Temperature,
    /// Least pressure outside the wall, absolute: 0 in space.
    #[serde(rename = "least_outside_pressure_pa")]
    pub least_outside: Pressure,
    /// Barometer that gauge pressures are counted from, absolute.
    #[serde(rename = "barometer_pa")]
    pub barometer: Pressure,
}

/// Where the unit may break.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Room {
    #[serde(rename = "volume_m3")]
    pub volume: Volume,
    #[serde(rename = "temperature_k")]
    pub temperature: Temperature,
    /// Whether whoever holds the unit may be a member of the public.
    pub consumers: bool,
}

/// Two conditions that cannot both hold.
#[derive(Debug, Clone, Copy, PartialEq, thiserror::Error)]
pub enum ConditionFault {
    #[error("the hottest temperature is below the coldest")]
    HottestBelowColdest {
        hottest: Temperature,
        coldest: Temperature,
    },
    #[error("the upper end of the working range is below its lower end")]
    WorkingRangeReversed { low: Temperature, high: Temperature },
    #[error("the working range reaches outside coldest to hottest")]
    WorkingOutsideExtremes {
        low: Temperature,
        high: Temperature,
        coldest: Temperature,
        hottest: Temperature,
    },
    #[error("the bench is outside coldest to hottest")]
    BenchOutsideExtremes {
        bench: Temperature,
        coldest: Temperature,
        hottest: Temperature,
    },
    #[error("the least outside pressure is above the barometer")]
    LeastAboveBarometer {
        least: Pressure,
        barometer: Pressure,
    },
    #[error("a pressure outside the wall is below zero")]
    OutsideBelowZero { pressure: Pressure },
}

impl Conditions {
    /// Every contradiction between the fields.
    pub fn faults(&self) -> Vec<ConditionFault> {
        let mut faults = Vec::new();
        let (low, high) = (self.working_low, self.working_high);
        let (coldest, hottest) = (self.coldest, self.hottest);
        if hottest < coldest {
            faults.push(ConditionFault::HottestBelowColdest { hottest, coldest });
        }
        if high < low {
            faults.push(ConditionFault::WorkingRangeReversed { low, high });
        } else if hottest >= coldest && (low < coldest || high > hottest) {
            faults.push(ConditionFault::WorkingOutsideExtremes {
                low,
                high,
                coldest,
                hottest,
            });
        }
        let bench = self.bench;
        if hottest >= coldest && (bench < coldest || bench > hottest) {
            // The sealed unit stands on the bench as well.
            faults.push(ConditionFault::BenchOutsideExtremes {
                bench,
                coldest,
                hottest,
            });
        }
        let (least, barometer) = (self.least_outside, self.barometer);
        if least > barometer {
            faults.push(ConditionFault::LeastAboveBarometer { least, barometer });
        }
        for pressure in [self.least_outside, self.barometer] {
            if pressure.pascal() < 0.0 {
                faults.push(ConditionFault::OutsideBelowZero { pressure });
            }
        }
        faults
    }
}
