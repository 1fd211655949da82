//! The chamber: parts, inside volume, walls and their strength.
//!
//! [`Chamber`] is what the user decided; [`Envelope`] is what its walls bear. A
//! contradiction in the data is never an error here but a [`ChamberFault`] on its
//! part, and the rest still counts. Strengths are loads: inside minus outside.

mod base;
mod bounds;
mod capacity;
pub mod capillary;
mod closure;
mod contradiction;
mod curve;
mod dimension;
mod envelope;
mod face;
mod factors;
mod fault;
mod fields;
mod formula;
pub mod groove;
mod material;
mod materials;
mod menu;
mod movement;
mod outside;
mod own;
mod part;
mod plausible;
mod resistance;
mod shape;
mod solid;
pub mod strength;
mod volumes;
pub mod water;
mod wick;

pub use capacity::Capacity;
pub use capillary::WickError;
pub use closure::{Closure, ClosureKind, Relief, Stub};
pub use contradiction::ShapeFault;
pub use curve::{Curve, CurveError, Positive, ROOM_K, RoomValue, Strength, StrengthAt};
pub use dimension::{Dimension, Pick};
pub use envelope::{
    Allowable, AllowableBasis, Envelope, OutsideAllowable, OutsideBasis, PartStrength, StrengthGap,
    StrengthUnknown, Weakest, WeakestOutside,
};
pub use factors::{Factor, Factors, JointEfficiency};
pub use fault::ChamberFault;
pub use fields::Field;
pub use material::{AfterAnnealing, Condition, Glass, Material, MaterialKind, Metal, ServiceRange};
pub use materials::{MaterialError, MaterialNameTaken, Materials};
pub use movement::{Movement, REFERENCE_K};
pub use own::read_own_material;
pub use part::{HeatTreatment, Part, PartVolumes, Rating, Spread, Wall, Zone};
pub use shape::{Course, DishedForm, InsertForm, Pillars, PlateEdge, Role, Shape};
pub use solid::TORISPHERE_KNUCKLE;
pub use volumes::{ChamberError, MeasuredVolume, NamedVolumes, Volumes, WaterFill};
pub use wick::{Entered, Lies, Wick, WickFigures, WickForm};

use serde::{Deserialize, Serialize};

use crate::units::Tilt;

#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Chamber {
    /// Along the axis, the lowest first where it stands.
    pub parts: Vec<Part>,
    /// Takes the place of the parts' sum.
    #[serde(default)]
    pub measured: Option<MeasuredVolume>,
    /// The same, by weighing it empty and full of water.
    #[serde(default)]
    pub water_fill: Option<WaterFill>,
    #[serde(default)]
    pub closure: Option<Closure>,
    /// Of the axis against the horizontal, the first part low.
    #[serde(rename = "tilt_rad", default = "upright")]
    pub tilt: Tilt,
    /// Whether the walls' yielding to pressure counts in the volume.
    #[serde(default)]
    pub elastic_growth: bool,
}

impl Default for Chamber {
    fn default() -> Self {
        Self {
            parts: Vec::new(),
            measured: None,
            water_fill: None,
            closure: None,
            tilt: upright(),
            elastic_growth: false,
        }
    }
}

impl Chamber {
    /// Everything that contradicts itself, in the order of the parts.
    pub fn faults(&self, materials: &Materials) -> Vec<ChamberFault> {
        fault::faults(self, materials)
    }

    /// The parts, and the closure as the last of them.
    pub(crate) fn all_parts(&self) -> impl Iterator<Item = std::borrow::Cow<'_, Part>> {
        let closure = self.closure.as_ref().map(Closure::part);
        let parts = self.parts.iter().map(std::borrow::Cow::Borrowed);
        parts.chain(closure.map(std::borrow::Cow::Owned))
    }

    /// Ids of the materials that the fluid touches, in the order of the parts.
    pub fn materials_in_order(&self) -> impl Iterator<Item = &str> {
        self.parts.iter().filter_map(Part::material)
    }

    /// Ids of the materials that the fluid touches, each once, sorted.
    pub fn materials(&self) -> Vec<&str> {
        let mut ids: Vec<&str> = self.materials_in_order().collect();
        ids.sort_unstable();
        ids.dedup();
        ids
    }
}

fn upright() -> Tilt {
    use crate::units::Quantity;
    Tilt::from_radian(Tilt::RANGE.1).expect("the end of its range")
}

#[cfg(test)]
pub(crate) mod tests {
    use super::*;
    use crate::units::Volume;
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
        let volumes = chamber(TUBE)
            .volumes(&Materials::built_in())
            .expect("a volume");
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
                ..Chamber::default()
            }
            .volumes(&Materials::built_in())
            .expect("a volume");
            close(volumes.nominal, 50e-6);
            close(volumes.least, 49.8e-6);
            close(volumes.greatest, 50.2e-6);
        }
    }

    #[test]
    fn nothing_enclosed_is_an_error_that_says_why() {
        assert_eq!(
            Chamber::default().volumes(&Materials::built_in()),
            Err(ChamberError::NoParts)
        );
        let mut chamber = chamber(TUBE);
        chamber.parts[2].count = 1000;
        assert!(matches!(
            chamber.volumes(&Materials::built_in()),
            Err(ChamberError::InsertsTooLarge { .. })
        ));
        chamber.parts[0].count = 0;
        chamber.parts[1].count = 0;
        assert_eq!(
            chamber.volumes(&Materials::built_in()),
            Err(ChamberError::ZeroVolume)
        );
        chamber.parts[0].count = u32::MAX;
        for (_, dimension) in chamber.parts[0].shape.dimensions_mut() {
            *dimension = Dimension::exact(crate::units::Length::from_metre(1e4).expect("a length"));
        }
        assert!(matches!(
            chamber.volumes(&Materials::built_in()),
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
