//! The inside volume and its named parts, at their worst corners.

use serde::{Deserialize, Serialize};

use super::materials::Materials;
use super::movement::{Movement, REFERENCE_K};
use super::part::{PartVolumes, Spread, Zone};
use super::water::{self, WaterFillError};
use super::{Chamber, Role};
use crate::units::{Mass, Pressure, Ratio, Temperature, TemperatureDifference, Volume};

/// Inside volume as measured, with nothing said of how.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct MeasuredVolume {
    #[serde(rename = "volume_m3")]
    pub volume: Volume,
    /// Plus and minus, at the worst.
    #[serde(rename = "uncertainty_m3")]
    pub uncertainty: Volume,
}

/// The readings of a weighed water fill.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct WaterFill {
    /// Balance with the chamber open and full of air.
    #[serde(rename = "empty_kg")]
    pub empty: Mass,
    /// Balance with the chamber full of water, no bubble left.
    #[serde(rename = "full_kg")]
    pub full: Mass,
    /// Of either reading, at the worst.
    #[serde(rename = "reading_uncertainty_kg")]
    pub reading_uncertainty: Mass,
    #[serde(rename = "water_temperature_k")]
    pub water_temperature: Temperature,
    #[serde(rename = "temperature_uncertainty_k")]
    pub temperature_uncertainty: TemperatureDifference,
    #[serde(rename = "air_temperature_k")]
    pub air_temperature: Temperature,
    #[serde(rename = "air_pressure_pa")]
    pub air_pressure: Pressure,
    pub relative_humidity: Ratio,
    /// Most gas that may have stayed inside.
    #[serde(rename = "bubble_allowance_m3", default = "nothing")]
    pub bubble_allowance: Volume,
}

/// A volume: nominal and at the worst tolerance corners.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Volumes {
    pub nominal: Volume,
    /// Least cavities with greatest inserts; 0 where nothing is left, which is the
    /// fault [`super::ChamberFault::NothingLeftAtWorst`].
    pub least: Volume,
    /// Greatest cavities with least inserts.
    pub greatest: Volume,
}

/// The volumes that a fill ratio or an inventory may be of, at the reference temperature.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct NamedVolumes {
    /// All that fluid can fill.
    pub inside: Volumes,
    /// The inside without the space of wicks.
    pub vapour_core: Volumes,
    /// Pores, grooves and arteries.
    pub wick_void: Volumes,
    /// The inside of the parts of that zone; `None` where no part is said to be of it.
    pub evaporator: Option<Volumes>,
}

/// Why a chamber has no volume.
#[derive(Debug, Clone, Copy, PartialEq, thiserror::Error)]
pub enum ChamberError {
    #[error("the chamber has no parts")]
    NoParts,
    #[error("the parts enclose no volume")]
    ZeroVolume,
    #[error("what lies inside takes {inserts_m3:e} m3 out of a cavity of {cavity_m3:e} m3")]
    InsertsTooLarge { cavity_m3: f64, inserts_m3: f64 },
    #[error("a volume of {volume_m3:e} m3 is beyond all measure")]
    TooLarge { volume_m3: f64 },
    #[error(transparent)]
    WaterFill(#[from] WaterFillError),
}

impl Chamber {
    /// Inside volume at the reference temperature, with the measured one in the place of
    /// the sum where there is one. A faulty part counts for what its sizes give, which may
    /// be nothing.
    ///
    /// # Errors
    /// [`ChamberError`] where nothing is enclosed, or a water fill contradicts itself.
    pub fn volumes(&self, materials: &Materials) -> Result<Volumes, ChamberError> {
        if let Some(fill) = &self.water_fill {
            let movement = Movement::of(self, materials);
            let (volume_m3, off_m3) = fill.reduced(movement.expansion_per_k)?;
            return measured(volume_m3, off_m3);
        }
        match &self.measured {
            Some(stated) => measured(
                stated.volume.cubic_metre(),
                stated.uncertainty.cubic_metre(),
            ),
            None => volumes(self.sum()?),
        }
    }

    /// Every named volume.
    ///
    /// # Errors
    /// As [`Self::volumes`].
    pub fn named_volumes(&self, materials: &Materials) -> Result<NamedVolumes, ChamberError> {
        let inside = self.volumes(materials)?;
        let sum = |of: fn(&PartVolumes) -> Spread, zone: Option<Zone>| {
            let mut spread = Spread::default();
            for part in self
                .parts
                .iter()
                .filter(|part| zone.is_none_or(|zone| part.zone == zone))
            {
                spread += of(&part.volumes());
            }
            spread
        };
        let wick_void = volumes(sum(|v| v.wick_void, None))?;
        // Of a measured inside the wick's share is still by its sizes.
        let vapour_core = if self.is_measured() {
            let less = |inside: Volume, void: Volume| inside.cubic_metre() - void.cubic_metre();
            volumes(Spread {
                nominal_m3: less(inside.nominal, wick_void.nominal),
                least_m3: less(inside.least, wick_void.greatest),
                greatest_m3: less(inside.greatest, wick_void.least),
            })?
        } else {
            let mut core = sum(|v| v.vapour_core, None);
            if let Some(closure) = &self.closure {
                core += closure.part().volumes().vapour_core;
            }
            volumes(core)?
        };
        let is_zoned = self
            .parts
            .iter()
            .any(|part| part.zone == Zone::Evaporator && part.count > 0);
        let evaporator = is_zoned
            .then(|| volumes(sum(|v| v.inside, Some(Zone::Evaporator))))
            .transpose()?;
        Ok(NamedVolumes {
            inside,
            vapour_core,
            wick_void,
            evaporator,
        })
    }

    /// Whether a measurement takes the place of the sum.
    pub const fn is_measured(&self) -> bool {
        self.measured.is_some() || self.water_fill.is_some()
    }

    fn sum(&self) -> Result<Spread, ChamberError> {
        if self.parts.is_empty() {
            return Err(ChamberError::NoParts);
        }
        let (mut cavity_m3, mut inserts_m3) = (0.0, 0.0);
        let mut sum = Spread::default();
        for part in self.all_parts() {
            let inside = part.volumes().inside;
            if part.shape.role() == Role::Insert || inside.nominal_m3 < 0.0 {
                inserts_m3 -= inside.nominal_m3;
            } else {
                cavity_m3 += inside.nominal_m3;
            }
            sum += inside;
        }
        if cavity_m3 <= 0.0 {
            Err(ChamberError::ZeroVolume)
        } else if inserts_m3 >= cavity_m3 {
            Err(ChamberError::InsertsTooLarge {
                cavity_m3,
                inserts_m3,
            })
        } else {
            Ok(sum)
        }
    }
}

impl WaterFill {
    /// Volume at the reference temperature and its uncertainty, m³.
    fn reduced(&self, cubic_expansion_per_k: f64) -> Result<(f64, f64), WaterFillError> {
        water::WaterFill {
            empty_kg: self.empty.kilogram(),
            full_kg: self.full.kilogram(),
            reading_uncertainty_kg: self.reading_uncertainty.kilogram(),
            water_temperature_k: self.water_temperature.kelvin(),
            temperature_uncertainty_k: self.temperature_uncertainty.kelvin(),
            air_pressure_pa: self.air_pressure.pascal(),
            air_temperature_k: self.air_temperature.kelvin(),
            relative_humidity: self.relative_humidity.fraction(),
            bubble_allowance_m3: self.bubble_allowance.cubic_metre(),
        }
        .volume(REFERENCE_K, cubic_expansion_per_k / 3.0)
        .map(|found| (found.volume_m3, found.uncertainty_m3))
    }
}

fn measured(volume_m3: f64, off_m3: f64) -> Result<Volumes, ChamberError> {
    if volume_m3 <= 0.0 {
        return Err(ChamberError::ZeroVolume);
    }
    volumes(Spread {
        nominal_m3: volume_m3,
        least_m3: volume_m3 - off_m3,
        greatest_m3: volume_m3 + off_m3,
    })
}

fn volumes(spread: Spread) -> Result<Volumes, ChamberError> {
    Ok(Volumes {
        nominal: volume(spread.nominal_m3)?,
        least: volume(spread.least_m3)?,
        greatest: volume(spread.greatest_m3)?,
    })
}

fn volume(volume_m3: f64) -> Result<Volume, ChamberError> {
    Volume::from_cubic_metre(volume_m3.max(0.0)).map_err(|_| ChamberError::TooLarge { volume_m3 })
}

fn nothing() -> Volume {
    Volume::from_cubic_metre(0.0).expect("0 is a volume")
}
