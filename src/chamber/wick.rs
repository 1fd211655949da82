//! Wicks as parts of their own: what they take away, what they hold, how they carry.

use serde::{Deserialize, Serialize};

use super::capillary::{self, WickError};
use super::dimension::{Dimension, Pick};
use super::factors::Factor;
use super::groove;
use super::solid;
use crate::units::{Length, MeshNumber, Permeability, Ratio};

/// A wick by its make, and what was measured of it.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Wick {
    pub form: WickForm,
    /// Takes the place of what the relations give.
    #[serde(default)]
    pub entered: Entered,
}

#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum WickForm {
    /// Layers of woven wire screen.
    Screen {
        lies: Lies,
        #[serde(rename = "mesh_per_m")]
        mesh: MeshNumber,
        wire_diameter: Dimension,
        layers: u32,
        /// Length of a crimped wire over its straight one; 1.05 is usual.
        crimping: Factor,
    },
    /// Sintered powder of even spheres.
    Powder {
        lies: Lies,
        thickness: Dimension,
        particle_diameter: Dimension,
        porosity: Ratio,
    },
    /// Felt or sintered fibres.
    Felt {
        lies: Lies,
        thickness: Dimension,
        fibre_diameter: Dimension,
        porosity: Ratio,
    },
    /// Axial grooves in the wall, outside the bore at their mouths: rectangles, or
    /// trapezoids where floor and mouth differ.
    Grooves {
        count: u32,
        length: Dimension,
        mouth_width: Dimension,
        floor_width: Dimension,
        depth: Dimension,
    },
    /// A porous tube that runs along the device.
    Artery {
        inside_diameter: Dimension,
        wall_thickness: Dimension,
        wall_porosity: Ratio,
        length: Dimension,
    },
}

/// Where a layer lies.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum Lies {
    /// On the inside of a round bore.
    Lining { bore: Dimension, length: Dimension },
    /// On a flat wall.
    Sheet { width: Dimension, length: Dimension },
}

/// What was measured; what is left out comes from the make.
#[derive(Debug, Clone, Copy, PartialEq, Default, Serialize, Deserialize)]
#[serde(deny_unknown_fields, default)]
pub struct Entered {
    pub porosity: Option<Ratio>,
    #[serde(rename = "permeability_m2")]
    pub permeability: Option<Permeability>,
    #[serde(rename = "pore_radius_m")]
    pub pore_radius: Option<Length>,
}

/// What a wick is like, each entered or by the published relation of its make.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct WickFigures {
    /// Share of the wick's space that liquid can fill.
    pub porosity: Result<f64, WickError>,
    pub permeability_m2: Result<f64, WickError>,
    /// Effective radius of its pores for capillary pressure, 2 σ/r.
    pub pore_radius_m: Result<f64, WickError>,
}

/// What a wick adds to the inside, its pores and the vapour core, in m³ at one corner.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct WickVolumes {
    /// Solid, greatest where the envelope is greatest.
    pub(super) solid_m3: f64,
    pub(super) void_m3: f64,
    /// Space that the wick takes from the bore.
    pub(super) from_core_m3: f64,
}

impl Wick {
    /// Porosity, permeability and pore radius.
    pub fn figures(&self) -> WickFigures {
        let porosity = self.porosity();
        let m = |dimension: &Dimension| dimension.nominal.metre();
        let (permeability, pore_radius) = match &self.form {
            WickForm::Screen {
                mesh,
                wire_diameter,
                ..
            } => (
                porosity.and_then(|eps| capillary::screen_permeability_m2(m(wire_diameter), eps)),
                capillary::screen_pore_radius_m(mesh.per_metre()),
            ),
            WickForm::Powder {
                particle_diameter, ..
            } => (
                porosity
                    .and_then(|eps| capillary::sphere_permeability_m2(m(particle_diameter), eps)),
                capillary::sphere_pore_radius_m(m(particle_diameter)),
            ),
            WickForm::Felt { fibre_diameter, .. } => (
                porosity.and_then(|eps| capillary::felt_permeability_m2(m(fibre_diameter), eps)),
                porosity.and_then(|eps| capillary::felt_pore_radius_m(m(fibre_diameter), eps)),
            ),
            WickForm::Grooves {
                mouth_width,
                floor_width,
                depth,
                ..
            } => (
                groove::trapezoid_groove_permeability_m2(m(mouth_width), m(floor_width), m(depth)),
                groove::trapezoid_groove_pore_radius_m(m(mouth_width), m(floor_width), m(depth)),
            ),
            WickForm::Artery {
                inside_diameter, ..
            } => (
                capillary::artery_permeability_m2(m(inside_diameter)),
                capillary::artery_pore_radius_m(m(inside_diameter), None),
            ),
        };
        let entered = &self.entered;
        WickFigures {
            porosity,
            permeability_m2: entered
                .permeability
                .map_or(permeability, |k| Ok(k.square_metre())),
            pore_radius_m: entered.pore_radius.map_or(pore_radius, |r| Ok(r.metre())),
        }
    }

    /// Thickness of the layer; `None` for grooves and arteries, which are no layer.
    pub fn thickness_m(&self, pick: Pick) -> Option<f64> {
        match &self.form {
            WickForm::Screen {
                wire_diameter,
                layers,
                ..
            } => capillary::screen_thickness_m(*layers, wire_diameter.at(pick).metre()).ok(),
            WickForm::Powder { thickness, .. } | WickForm::Felt { thickness, .. } => {
                Some(thickness.at(pick).metre())
            }
            WickForm::Grooves { .. } | WickForm::Artery { .. } => None,
        }
    }

    /// Where the layer lies; `None` for grooves and arteries.
    pub const fn lies(&self) -> Option<&Lies> {
        match &self.form {
            WickForm::Screen { lies, .. }
            | WickForm::Powder { lies, .. }
            | WickForm::Felt { lies, .. } => Some(lies),
            WickForm::Grooves { .. } | WickForm::Artery { .. } => None,
        }
    }

    pub(super) fn volumes(&self, pick: Pick) -> WickVolumes {
        let m = |dimension: &Dimension| dimension.at(pick).metre();
        // A make that contradicts itself has a fault of its own, and counts as solid.
        let porosity = self.porosity().unwrap_or(0.0);
        match &self.form {
            WickForm::Grooves {
                count,
                length,
                mouth_width,
                floor_width,
                depth,
            } => {
                let area = solid::trapezoid_m2(m(mouth_width), m(floor_width), m(depth));
                WickVolumes {
                    solid_m3: 0.0,
                    void_m3: f64::from(*count) * area * m(length) * porosity,
                    from_core_m3: 0.0,
                }
            }
            WickForm::Artery {
                inside_diameter,
                wall_thickness,
                length,
                ..
            } => {
                let bore_m3 = solid::cylinder_m3(m(inside_diameter), m(length));
                let outside = m(inside_diameter) + 2.0 * m(wall_thickness);
                let whole_m3 = solid::cylinder_m3(outside, m(length));
                let wall_m3 = whole_m3 - bore_m3;
                WickVolumes {
                    solid_m3: (1.0 - porosity) * wall_m3,
                    void_m3: bore_m3 + porosity * wall_m3,
                    from_core_m3: whole_m3,
                }
            }
            WickForm::Screen { lies, .. }
            | WickForm::Powder { lies, .. }
            | WickForm::Felt { lies, .. } => {
                let thickness = self.thickness_m(pick).unwrap_or(0.0);
                let space_m3 = match lies {
                    Lies::Lining { bore, length } => {
                        let core = (m(bore) - 2.0 * thickness).max(0.0);
                        solid::annulus_m3(m(bore), core, m(length)).unwrap_or(0.0)
                    }
                    Lies::Sheet { width, length } => m(width) * m(length) * thickness,
                };
                WickVolumes {
                    solid_m3: (1.0 - porosity) * space_m3,
                    void_m3: porosity * space_m3,
                    from_core_m3: space_m3,
                }
            }
        }
    }

    /// Share of its space that is open; of an artery's wall, of a groove all of it.
    fn porosity(&self) -> Result<f64, WickError> {
        if let Some(entered) = self.entered.porosity {
            return Ok(entered.fraction());
        }
        match &self.form {
            WickForm::Screen {
                mesh,
                wire_diameter,
                crimping,
                ..
            } => capillary::screen_porosity(
                mesh.per_metre(),
                wire_diameter.nominal.metre(),
                crimping.number(),
            ),
            WickForm::Powder { porosity, .. } | WickForm::Felt { porosity, .. } => {
                Ok(porosity.fraction())
            }
            WickForm::Grooves { .. } => Ok(1.0),
            WickForm::Artery { wall_porosity, .. } => Ok(wall_porosity.fraction()),
        }
    }
}
