//! The chamber: parts, inside volume, walls and their strength.
//!
//! [`Chamber`] is what the user decided; [`Envelope`] is what its walls bear. A
//! contradiction in the data is never an error here but a [`ChamberFault`] on its
//! part, and the rest still counts. Strengths are loads: inside minus outside.

mod bounds;
mod curve;
mod dimension;
mod envelope;
mod factors;
mod fault;
mod material;
mod materials;
mod menu;
mod part;
mod resistance;
mod shape;
mod solid;
pub mod strength;

pub use curve::{Curve, CurveError, Positive, ROOM_K, RoomValue, Strength, StrengthAt};
pub use dimension::{Dimension, Pick};
pub use envelope::{
    Allowable, AllowableBasis, Envelope, PartStrength, StrengthGap, StrengthUnknown, Weakest,
};
pub use factors::{Factor, Factors, JointEfficiency};
pub use fault::ChamberFault;
pub use material::{AfterAnnealing, Condition, Glass, Material, MaterialKind, Metal, ServiceRange};
pub use materials::{MaterialError, Materials};
pub use part::{HeatTreatment, Part, PartVolumes, Wall};
pub use shape::{DishedForm, InsertForm, PlateEdge, Shape};

use serde::{Deserialize, Serialize};

use crate::units::Volume;

#[derive(Debug, Clone, PartialEq, Default, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Chamber {
    pub parts: Vec<Part>,
    /// Takes the place of the parts' sum.
    #[serde(default)]
    pub measured: Option<MeasuredVolume>,
}

/// Inside volume as measured, by a weighed water fill for instance.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct MeasuredVolume {
    #[serde(rename = "volume_m3")]
    pub volume: Volume,
    /// Plus and minus, at the worst.
    #[serde(rename = "uncertainty_m3")]
    pub uncertainty: Volume,
}

/// Inside volume: nominal and at the worst tolerance corners.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Volumes {
    pub nominal: Volume,
    /// Least cavities with greatest inserts; 0 where nothing is left, which is the
    /// fault [`ChamberFault::NothingLeftAtWorst`].
    pub least: Volume,
    /// Greatest cavities with least inserts.
    pub greatest: Volume,
}

/// Why a chamber has no volume.
#[derive(Debug, Clone, Copy, PartialEq, thiserror::Error)]
pub enum ChamberError {
    #[error("the chamber has no parts")]
    NoParts,
    #[error("the parts enclose no volume")]
    ZeroVolume,
    #[error("the inserts take {inserts_m3:e} m3 out of a cavity of {cavity_m3:e} m3")]
    InsertsTooLarge { cavity_m3: f64, inserts_m3: f64 },
    #[error("a volume of {volume_m3:e} m3 is beyond all measure")]
    TooLarge { volume_m3: f64 },
}

impl Chamber {
    /// Inside volume, with the measured one in the place of the sum where there is one.
    /// A faulty part counts for what its sizes give, which may be nothing.
    ///
    /// # Errors
    /// [`ChamberError`] where nothing is enclosed.
    pub fn volumes(&self) -> Result<Volumes, ChamberError> {
        let (nominal_m3, least_m3, greatest_m3) = match &self.measured {
            Some(measured) => measured.corners_m3()?,
            None => self.sum_m3()?,
        };
        Ok(Volumes {
            nominal: volume(nominal_m3)?,
            least: volume(least_m3.max(0.0))?,
            greatest: volume(greatest_m3)?,
        })
    }

    /// Everything that contradicts itself, in the order of the parts.
    pub fn faults(&self, materials: &Materials) -> Vec<ChamberFault> {
        fault::faults(self, materials)
    }

    fn sum_m3(&self) -> Result<(f64, f64, f64), ChamberError> {
        if self.parts.is_empty() {
            return Err(ChamberError::NoParts);
        }
        let (mut cavity_m3, mut inserts_m3) = (0.0, 0.0);
        let (mut least_m3, mut greatest_m3) = (0.0, 0.0);
        for part in &self.parts {
            let volumes = part.volumes();
            if part.shape.is_insert() {
                inserts_m3 -= volumes.nominal_m3;
            } else {
                cavity_m3 += volumes.nominal_m3;
            }
            least_m3 += volumes.least_m3;
            greatest_m3 += volumes.greatest_m3;
        }
        if cavity_m3 <= 0.0 {
            Err(ChamberError::ZeroVolume)
        } else if inserts_m3 >= cavity_m3 {
            Err(ChamberError::InsertsTooLarge {
                cavity_m3,
                inserts_m3,
            })
        } else {
            Ok((cavity_m3 - inserts_m3, least_m3, greatest_m3))
        }
    }
}

impl MeasuredVolume {
    fn corners_m3(&self) -> Result<(f64, f64, f64), ChamberError> {
        let (volume, off) = (self.volume.cubic_metre(), self.uncertainty.cubic_metre());
        if volume <= 0.0 {
            return Err(ChamberError::ZeroVolume);
        }
        Ok((volume, volume - off, volume + off))
    }
}

fn volume(volume_m3: f64) -> Result<Volume, ChamberError> {
    Volume::from_cubic_metre(volume_m3).map_err(|_| ChamberError::TooLarge { volume_m3 })
}

#[cfg(test)]
pub(crate) mod tests {
    use super::*;
    use std::f64::consts::PI;

    /// A copper tube with ends, a rod inside; for the tests of this room.
    pub(crate) const TUBE: &str = r#"(parts: [
        (name: "body",
         shape: Tube(inside_diameter: (nominal_m: 0.011, tolerance_m: 0.0001),
                     length: (nominal_m: 0.200, tolerance_m: 0.0005)),
         wall: Some((material: "copper-c12200-drawn", thickness: (nominal_m: 0.0005, tolerance_m: 0.00005), treatment: Brazed))),
        (name: "ends", count: 2,
         shape: DishedEnd(inside_diameter: (nominal_m: 0.011), form: Hemispherical),
         wall: Some((material: "copper-c12200-annealed", thickness: (nominal_m: 0.0006), treatment: Brazed))),
        (name: "rod",
         shape: Insert(form: Cylinder(diameter: (nominal_m: 0.004, tolerance_m: 0.0001),
                                      length: (nominal_m: 0.100)))),
    ])"#;

    pub(crate) fn chamber(text: &str) -> Chamber {
        ron::from_str(text).expect("a chamber")
    }

    fn close(volume: Volume, expected_m3: f64) {
        let got = volume.cubic_metre();
        assert!(
            (got / expected_m3 - 1.0).abs() < 1e-12,
            "{got} {expected_m3}"
        );
    }

    #[test]
    fn volume_is_cavities_less_inserts_at_every_corner() {
        let volumes = chamber(TUBE).volumes().expect("a volume");
        let ends = 2.0 * PI * 0.011f64.powi(3) / 12.0;
        let expected = |d: f64, l: f64, rod: f64| 0.25 * PI * (d * d * l - rod * rod * 0.1) + ends;
        close(volumes.nominal, expected(0.011, 0.2, 0.004));
        close(volumes.least, expected(0.0109, 0.1995, 0.0041));
        close(volumes.greatest, expected(0.0111, 0.2005, 0.0039));
    }

    #[test]
    fn a_measured_volume_takes_the_place_of_the_sum() {
        let measured = MeasuredVolume {
            volume: Volume::from_cubic_metre(50e-6).expect("a volume"),
            uncertainty: Volume::from_cubic_metre(0.2e-6).expect("a volume"),
        };
        for parts in [chamber(TUBE).parts, Vec::new()] {
            let volumes = Chamber {
                parts,
                measured: Some(measured),
            }
            .volumes()
            .expect("a volume");
            close(volumes.nominal, 50e-6);
            close(volumes.least, 49.8e-6);
            close(volumes.greatest, 50.2e-6);
        }
    }

    #[test]
    fn nothing_enclosed_is_an_error_that_says_why() {
        assert_eq!(Chamber::default().volumes(), Err(ChamberError::NoParts));
        let mut chamber = chamber(TUBE);
        chamber.parts[2].count = 1000;
        assert!(matches!(
            chamber.volumes(),
            Err(ChamberError::InsertsTooLarge { .. })
        ));
        chamber.parts[0].count = 0;
        chamber.parts[1].count = 0;
        assert_eq!(chamber.volumes(), Err(ChamberError::ZeroVolume));
        chamber.parts[0].count = u32::MAX;
        for (_, dimension) in chamber.parts[0].shape.dimensions_mut() {
            *dimension = Dimension::exact(crate::units::Length::from_metre(1e4).expect("a length"));
        }
        assert!(matches!(
            chamber.volumes(),
            Err(ChamberError::TooLarge { .. })
        ));
    }

    #[test]
    fn a_chamber_survives_the_file() {
        let chamber = chamber(TUBE);
        let text = ron::to_string(&chamber).expect("writes");
        assert_eq!(ron::from_str(&text), Ok(chamber));
        assert!(ron::from_str::<Chamber>("(parts: [], volume: 1)").is_err());
    }
}
