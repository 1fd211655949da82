//! What the sealed unit will live through: facts, set by the world and not by the design.

use serde::{Deserialize, Serialize};

use crate::units::{Amount, Pressure, Temperature, TemperatureDifference, Volume};

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
    /// Greatest difference of temperature across a wall, or between a unit and the bath
    /// it is put into: it stresses glass.
    #[serde(rename = "across_wall_k", default = "none")]
    pub across_wall: TemperatureDifference,
    /// Permanent gas that corrosion, leaks and decay will have made by the end of its life,
    /// as the user states it.
    #[serde(rename = "gas_generated_mol", default = "no_gas")]
    pub gas_generated: Amount,
    /// What else the walls must stand, before or after the seal.
    #[serde(default)]
    pub exposures: Vec<Exposure>,
}

/// A stretch of the unit's life with outside pressures of its own.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Exposure {
    pub name: String,
    pub contents: Contents,
    #[serde(rename = "coldest_k")]
    pub coldest: Temperature,
    #[serde(rename = "hottest_k")]
    pub hottest: Temperature,
    /// Absolute.
    #[serde(rename = "least_outside_pressure_pa")]
    pub least_outside: Pressure,
    /// Absolute.
    #[serde(rename = "greatest_outside_pressure_pa")]
    pub greatest_outside: Pressure,
}

/// What is inside while it lasts.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Serialize, Deserialize)]
pub enum Contents {
    /// The charge, sealed in.
    Sealed,
    /// Nothing: pumped out.
    Evacuated,
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
    #[error("the difference across the wall is below zero")]
    AcrossWallBelowZero { difference: TemperatureDifference },
    #[error("an exposure's upper end is below its lower end")]
    ExposureReversed { index: usize },
    /// Sealed, it would be colder or hotter than the coldest or hottest of all.
    #[error("a sealed exposure reaches outside coldest to hottest")]
    ExposureOutsideExtremes { index: usize },
}

impl Contents {
    pub const ALL: [Self; 2] = [Self::Sealed, Self::Evacuated];

    pub const fn name(self) -> &'static str {
        match self {
            Self::Sealed => "sealed, charged",
            Self::Evacuated => "evacuated, empty",
        }
    }
}

impl Exposure {
    /// Usual stretches to start from, each with where its figures come from: the "add
    /// an exposure" menu.
    pub fn usual(conditions: &Conditions) -> [(Self, &'static str); 4] {
        let kelvin = |celsius| Temperature::from_celsius(celsius).expect("a usual temperature");
        let pascal = |pa| Pressure::from_pascal(pa).expect("a usual pressure");
        let air = conditions.barometer;
        let (bench, hottest) = (conditions.bench, conditions.hottest);
        let exposure =
            |name: &str, contents, (coldest, hottest), (least_outside, greatest_outside)| Self {
                name: name.to_owned(),
                contents,
                coldest,
                hottest,
                least_outside,
                greatest_outside,
            };
        let above_air = |bar: f64| pascal(air.pascal() + 1e5 * bar);
        [
            (
                exposure(
                    "evacuated bake-out",
                    Contents::Evacuated,
                    (bench, kelvin(125.0).max(bench)),
                    (air, air),
                ),
                "80 to 125 °C; common practice, no source",
            ),
            (
                exposure(
                    "leak test under helium",
                    Contents::Evacuated,
                    (bench, bench),
                    (air, above_air(2.0)),
                ),
                "some bar above the air; common practice, no source",
            ),
            (
                exposure(
                    "air transport in an unpressed hold",
                    Contents::Sealed,
                    (bench.min(hottest), hottest),
                    (pascal(11_600.0), air),
                ),
                "15 km in the standard atmosphere, ISO 2533, 11.6 kPa abs, from memory",
            ),
            (
                exposure(
                    "steam autoclave",
                    Contents::Sealed,
                    (bench.min(hottest), kelvin(134.0).min(hottest)),
                    (air, pascal(304_000.0)),
                ),
                "134 °C and 3.04 bar abs, saturated steam; customary cycle, from memory of EN 285",
            ),
        ]
    }
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
        if self.across_wall.kelvin() < 0.0 {
            let difference = self.across_wall;
            faults.push(ConditionFault::AcrossWallBelowZero { difference });
        }
        for (index, exposure) in self.exposures.iter().enumerate() {
            let reversed = exposure.hottest < exposure.coldest
                || exposure.greatest_outside < exposure.least_outside;
            if reversed {
                faults.push(ConditionFault::ExposureReversed { index });
            }
            if exposure.least_outside.pascal() < 0.0 {
                let pressure = exposure.least_outside;
                faults.push(ConditionFault::OutsideBelowZero { pressure });
            }
            let outside = exposure.coldest < coldest || exposure.hottest > hottest;
            if exposure.contents == Contents::Sealed && outside && !reversed {
                faults.push(ConditionFault::ExposureOutsideExtremes { index });
            }
        }
        faults
    }
}

fn none() -> TemperatureDifference {
    TemperatureDifference::from_kelvin(0.0).expect("0 is a difference")
}

fn no_gas() -> Amount {
    Amount::from_mole(0.0).expect("0 is an amount")
}
