//! Shapes of parts: their sizes and the volume they enclose.

use serde::{Deserialize, Serialize};

use super::capacity::Capacity;
use super::dimension::{Dimension, Pick};
use super::solid;
use super::wick::Wick;

/// Shape of a part by its inside sizes, or of a body that lies inside.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum Shape {
    /// By its developed length, whatever its course.
    Tube {
        inside_diameter: Dimension,
        length: Dimension,
        #[serde(default)]
        course: Course,
    },
    /// A tube too narrow for liquid and vapour to pass each other.
    Capillary {
        inside_diameter: Dimension,
        length: Dimension,
    },
    Sphere {
        inside_diameter: Dimension,
    },
    /// A sphere with a round neck, whose length counts from where it leaves the sphere.
    Bulb {
        inside_diameter: Dimension,
        neck_diameter: Dimension,
        neck_length: Dimension,
    },
    /// Six plates; inside sizes. Pillars stand between the two faces of width and depth.
    Box {
        width: Dimension,
        height: Dimension,
        depth: Dimension,
        #[serde(default)]
        pillars: Option<Pillars>,
    },
    /// Two flat sides joined by half circles; inside sizes.
    FlattenedTube {
        width: Dimension,
        height: Dimension,
        length: Dimension,
    },
    /// Between an outer tube and a closed core tube of the same material.
    Annulus {
        inside_diameter: Dimension,
        /// Outside diameter of the core tube.
        core_diameter: Dimension,
        core_thickness: Dimension,
        length: Dimension,
    },
    /// By its mean diameter; strength by its rating only.
    Bellows {
        /// Inside, at the foot of the convolutions.
        root_diameter: Dimension,
        /// Inside, at the top of the convolutions.
        crest_diameter: Dimension,
        /// Of the convolutions, in the middle of the stroke.
        length: Dimension,
        /// How far it moves either way from there.
        stroke: Dimension,
    },
    /// One diameter may be 0: a full cone.
    ConeFrustum {
        first_diameter: Dimension,
        second_diameter: Dimension,
        length: Dimension,
    },
    DishedEnd {
        inside_diameter: Dimension,
        form: DishedForm,
    },
    /// Encloses no volume of its own; a wall only.
    FlatEnd {
        inside_diameter: Dimension,
        edge: PlateEdge,
    },
    /// A rectangular lid; a wall only.
    PlateEnd {
        width: Dimension,
        height: Dimension,
        edge: PlateEdge,
    },
    /// A bought-in valve, seal, joint or feed-through: a dead volume, and strength by
    /// its rating only.
    Fitting {
        dead_volume: Capacity,
    },
    /// A solid body inside: takes volume away and has no wall.
    Insert {
        form: InsertForm,
    },
    Wick(Wick),
}

/// How a tube runs.
#[derive(Debug, Clone, Copy, PartialEq, Default, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum Course {
    #[default]
    Straight,
    /// Radius of the centre line at the tightest bend.
    Bent { radius: Dimension },
    /// Mean diameter of the coil.
    Coiled { diameter: Dimension },
}

/// Round pillars in even rows, joined to both faces.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Pillars {
    pub diameter: Dimension,
    /// In a row along the width.
    pub along_width: u32,
    /// Rows along the depth.
    pub along_depth: u32,
}

#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Serialize, Deserialize)]
pub enum DishedForm {
    Hemispherical,
    /// Depth a quarter of the inside diameter.
    TwoToOneEllipsoidal,
    /// Crown radius the inside diameter, knuckle 6 % of it.
    Torispherical,
}

/// How the rim of a flat end is held.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Serialize, Deserialize)]
pub enum PlateEdge {
    /// The rim cannot turn.
    Clamped,
    /// The rim can turn: the careful choice.
    SimplySupported,
}

#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum InsertForm {
    Cylinder {
        diameter: Dimension,
        length: Dimension,
    },
    Sphere {
        diameter: Dimension,
    },
    Block {
        width: Dimension,
        height: Dimension,
        depth: Dimension,
    },
}

/// What a part is to the chamber.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum Role {
    /// Encloses a volume by its wall.
    Cavity,
    /// Closes a cavity; a wall without volume.
    Lid,
    /// Encloses a volume, and bears by a stated rating only.
    Rated,
    /// Solid: takes volume away.
    Insert,
    /// Solid in part: its pores hold liquid.
    Wick,
}

impl Shape {
    pub const fn role(&self) -> Role {
        match self {
            Self::Tube { .. }
            | Self::Capillary { .. }
            | Self::Sphere { .. }
            | Self::Bulb { .. }
            | Self::Box { .. }
            | Self::FlattenedTube { .. }
            | Self::Annulus { .. }
            | Self::ConeFrustum { .. }
            | Self::DishedEnd { .. } => Role::Cavity,
            Self::FlatEnd { .. } | Self::PlateEnd { .. } => Role::Lid,
            Self::Bellows { .. } | Self::Fitting { .. } => Role::Rated,
            Self::Insert { .. } => Role::Insert,
            Self::Wick(_) => Role::Wick,
        }
    }

    /// Volume of the cavity, or of the solid for an insert, in m³; 0 for a wick, whose
    /// volumes are its own. Never negative.
    /// [`super::Part::volumes`] gives it its sign.
    pub fn volume(&self, pick: Pick) -> f64 {
        let m = |dimension: &Dimension| dimension.at(pick).metre();
        let opposite = |dimension: &Dimension| dimension.at(pick.opposite()).metre();
        match self {
            Self::Tube {
                inside_diameter,
                length,
                ..
            }
            | Self::Capillary {
                inside_diameter,
                length,
            } => solid::cylinder_m3(m(inside_diameter), m(length)),
            Self::Sphere { inside_diameter } => solid::sphere_m3(m(inside_diameter)),
            Self::Bulb {
                inside_diameter,
                neck_diameter,
                neck_length,
            } => solid::necked_bulb_m3(m(inside_diameter), m(neck_diameter), m(neck_length))
                .unwrap_or(0.0),
            Self::Box {
                width,
                height,
                depth,
                pillars,
            } => {
                let pillars_m3 = pillars.as_ref().map_or(0.0, |pillars| {
                    pillars.count() * solid::cylinder_m3(opposite(&pillars.diameter), m(height))
                });
                (m(width) * m(height) * m(depth) - pillars_m3).max(0.0)
            }
            Self::FlattenedTube {
                width,
                height,
                length,
            } => solid::obround_m3(m(width), m(height), m(length)).unwrap_or(0.0),
            Self::Annulus {
                inside_diameter,
                core_diameter,
                length,
                ..
            } => solid::annulus_m3(m(inside_diameter), opposite(core_diameter), m(length))
                .unwrap_or(0.0),
            Self::Bellows {
                root_diameter,
                crest_diameter,
                length,
                stroke,
            } => {
                let moved = stroke.greatest().metre();
                let length = match pick {
                    Pick::Nominal => m(length),
                    Pick::Least => (m(length) - moved).max(0.0),
                    Pick::Greatest => m(length) + moved,
                };
                solid::bellows_m3(m(root_diameter), m(crest_diameter), length)
            }
            Self::ConeFrustum {
                first_diameter,
                second_diameter,
                length,
            } => solid::frustum_m3(m(first_diameter), m(second_diameter), m(length)),
            Self::DishedEnd {
                inside_diameter,
                form,
            } => match form {
                DishedForm::Hemispherical => solid::hemisphere_m3(m(inside_diameter)),
                DishedForm::TwoToOneEllipsoidal => solid::ellipsoidal_end_m3(m(inside_diameter)),
                DishedForm::Torispherical => solid::torispherical_end_m3(m(inside_diameter)),
            },
            Self::FlatEnd { .. } | Self::PlateEnd { .. } | Self::Wick(_) => 0.0,
            Self::Fitting { dead_volume } => dead_volume.at_m3(pick),
            Self::Insert { form } => match form {
                InsertForm::Cylinder { diameter, length } => {
                    solid::cylinder_m3(m(diameter), m(length))
                }
                InsertForm::Sphere { diameter } => solid::sphere_m3(m(diameter)),
                InsertForm::Block {
                    width,
                    height,
                    depth,
                } => m(width) * m(height) * m(depth),
            },
        }
    }

    /// Whether it lies inside the chamber and has no wall of its own.
    pub const fn lies_inside(&self) -> bool {
        matches!(self.role(), Role::Insert | Role::Wick)
    }

    /// Smallest inside diameter or side that a wall must leave open; `None` for
    /// a lid, which may be thicker than it is wide, and for what lies inside.
    pub(super) fn bore_m(&self) -> Option<f64> {
        let m = |dimension: &Dimension| dimension.nominal.metre();
        match self {
            Self::Tube {
                inside_diameter, ..
            }
            | Self::Capillary {
                inside_diameter, ..
            }
            | Self::Sphere { inside_diameter }
            | Self::Bulb {
                inside_diameter, ..
            }
            | Self::Annulus {
                inside_diameter, ..
            }
            | Self::DishedEnd {
                inside_diameter, ..
            } => Some(m(inside_diameter)),
            Self::Bellows { root_diameter, .. } => Some(m(root_diameter)),
            // The narrow end may close to a point; the wide one is the bore.
            Self::ConeFrustum {
                first_diameter,
                second_diameter,
                ..
            } => Some(m(first_diameter).max(m(second_diameter))),
            Self::Box {
                width,
                height,
                depth,
                ..
            } => Some(m(width).min(m(height)).min(m(depth))),
            Self::FlattenedTube { width, height, .. } => Some(m(width).min(m(height))),
            Self::FlatEnd { .. }
            | Self::PlateEnd { .. }
            | Self::Fitting { .. }
            | Self::Insert { .. }
            | Self::Wick(_) => None,
        }
    }
}

impl Course {
    /// Radius of the centre line, where it is curved.
    pub fn least_radius_m(&self) -> Option<f64> {
        match self {
            Self::Straight => None,
            Self::Bent { radius } => Some(radius.least().metre()),
            Self::Coiled { diameter } => Some(0.5 * diameter.least().metre()),
        }
    }
}

impl Pillars {
    pub(super) fn count(&self) -> f64 {
        f64::from(self.along_width) * f64::from(self.along_depth)
    }

    /// Sides of the cell that one pillar holds, of a face of these sides.
    pub(super) fn cell_m(&self, width_m: f64, depth_m: f64) -> (f64, f64) {
        let spaces = |count: u32| f64::from(count) + 1.0;
        (
            width_m / spaces(self.along_width),
            depth_m / spaces(self.along_depth),
        )
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use std::f64::consts::PI;

    #[test]
    fn volume_follows_the_tolerance_corner() {
        let tube: Shape = ron::from_str(
            "Tube(inside_diameter: (nominal_m: 0.010, tolerance_m: 0.001), length: (nominal_m: 0.1))",
        )
        .expect("reads");
        for (pick, d) in [
            (Pick::Least, 0.009),
            (Pick::Nominal, 0.010),
            (Pick::Greatest, 0.011),
        ] {
            assert!((tube.volume(pick) - 0.25 * PI * d * d * 0.1).abs() < 1e-18);
        }
    }

    /// What stands in the way is greatest where the cavity is least.
    #[test]
    fn cores_and_pillars_go_to_the_other_corner() {
        let annulus: Shape = ron::from_str(
            "Annulus(inside_diameter: (nominal_m: 0.02), core_diameter: (nominal_m: 0.01, tolerance_m: 0.001),
                     core_thickness: (nominal_m: 0.001), length: (nominal_m: 1.0))",
        )
        .expect("reads");
        let expected = 0.25 * PI * (0.02f64.powi(2) - 0.011f64.powi(2));
        assert!((annulus.volume(Pick::Least) - expected).abs() < 1e-15);
        let chamber: Shape = ron::from_str(
            "Box(width: (nominal_m: 0.06), height: (nominal_m: 0.002), depth: (nominal_m: 0.05),
                 pillars: Some((diameter: (nominal_m: 0.002, tolerance_m: 0.0001), along_width: 5, along_depth: 4)))",
        )
        .expect("reads");
        let expected = 0.06 * 0.002 * 0.05 - 20.0 * 0.25 * PI * 0.0019f64.powi(2) * 0.002;
        assert!((chamber.volume(Pick::Greatest) - expected).abs() < 1e-18);
    }

    #[test]
    fn a_bellows_moves_by_its_stroke() {
        let bellows: Shape = ron::from_str(
            "Bellows(root_diameter: (nominal_m: 0.01), crest_diameter: (nominal_m: 0.014),
                     length: (nominal_m: 0.02), stroke: (nominal_m: 0.003))",
        )
        .expect("reads");
        let area = 0.25 * PI * 0.012f64.powi(2);
        for (pick, length) in [
            (Pick::Least, 0.017),
            (Pick::Nominal, 0.020),
            (Pick::Greatest, 0.023),
        ] {
            assert!((bellows.volume(pick) - area * length).abs() < 1e-18);
        }
    }

    #[test]
    fn an_unknown_key_is_refused() {
        let text = "Sphere(inside_diameter: (nominal_m: 0.03), radius: (nominal_m: 0.015))";
        assert!(ron::from_str::<Shape>(text).is_err());
    }
}
