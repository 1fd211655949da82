//! Shapes of parts: their inside volume and their sizes.

use serde::{Deserialize, Serialize};

use super::dimension::{Dimension, Pick};
use super::solid;

/// Names beside sizes, for a shared or a mutable shape alike.
macro_rules! sizes_of {
    ($shape:expr) => {
        match $shape {
            Self::Tube {
                inside_diameter,
                length,
            } => {
                vec![("inside diameter", inside_diameter), ("length", length)]
            }
            Self::Sphere { inside_diameter }
            | Self::DishedEnd {
                inside_diameter, ..
            }
            | Self::FlatEnd {
                inside_diameter, ..
            } => vec![("inside diameter", inside_diameter)],
            Self::Box {
                width,
                height,
                depth,
            }
            | Self::Insert {
                form:
                    InsertForm::Block {
                        width,
                        height,
                        depth,
                    },
            } => {
                vec![("width", width), ("height", height), ("depth", depth)]
            }
            Self::ConeFrustum {
                first_diameter,
                second_diameter,
                length,
            } => vec![
                ("first diameter", first_diameter),
                ("second diameter", second_diameter),
                ("length", length),
            ],
            Self::Insert {
                form: InsertForm::Cylinder { diameter, length },
            } => {
                vec![("diameter", diameter), ("length", length)]
            }
            Self::Insert {
                form: InsertForm::Sphere { diameter },
            } => vec![("diameter", diameter)],
        }
    };
}

/// Shape of a part by its inside sizes, or a solid body that fills space.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub enum Shape {
    Tube {
        inside_diameter: Dimension,
        length: Dimension,
    },
    Sphere {
        inside_diameter: Dimension,
    },
    /// Six plates; inside sizes.
    Box {
        width: Dimension,
        height: Dimension,
        depth: Dimension,
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
    /// A solid body inside: takes volume away and has no wall.
    Insert {
        form: InsertForm,
    },
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

impl Shape {
    /// Volume of the cavity, or of the solid for an insert, in m³; never negative.
    /// [`super::Part::volumes`] gives it its sign.
    pub fn volume(&self, pick: Pick) -> f64 {
        let m = |dimension: &Dimension| dimension.at(pick).metre();
        match self {
            Self::Tube {
                inside_diameter,
                length,
            } => solid::cylinder_m3(m(inside_diameter), m(length)),
            Self::Sphere { inside_diameter } => solid::sphere_m3(m(inside_diameter)),
            Self::Box {
                width,
                height,
                depth,
            } => m(width) * m(height) * m(depth),
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
            Self::FlatEnd { .. } => 0.0,
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

    /// Every size with its name, in the order an editor shows them.
    pub fn dimensions(&self) -> Vec<(&'static str, &Dimension)> {
        sizes_of!(self)
    }

    /// The same list, to be edited.
    pub fn dimensions_mut(&mut self) -> Vec<(&'static str, &mut Dimension)> {
        sizes_of!(self)
    }

    pub const fn is_insert(&self) -> bool {
        matches!(self, Self::Insert { .. })
    }

    /// Smallest inside diameter or side that a wall must leave open; `None` for
    /// a lid, which may be thicker than it is wide, and for an insert.
    pub(super) fn bore_m(&self) -> Option<f64> {
        match self {
            Self::Tube {
                inside_diameter, ..
            }
            | Self::Sphere { inside_diameter }
            | Self::DishedEnd {
                inside_diameter, ..
            } => Some(inside_diameter.nominal.metre()),
            Self::ConeFrustum {
                first_diameter,
                second_diameter,
                ..
            } => {
                // The narrow end may close to a point; the wide one is the bore.
                Some(
                    first_diameter
                        .nominal
                        .metre()
                        .max(second_diameter.nominal.metre()),
                )
            }
            Self::Box {
                width,
                height,
                depth,
            } => Some(
                width
                    .nominal
                    .metre()
                    .min(height.nominal.metre())
                    .min(depth.nominal.metre()),
            ),
            Self::FlatEnd { .. } | Self::Insert { .. } => None,
        }
    }
}

#[cfg(test)]
mod tests {
    use super::super::dimension::length_m;
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

    #[test]
    fn both_lists_of_sizes_agree_and_reach_the_shape() {
        for mut shape in Shape::default_of_each_kind() {
            let names: Vec<_> = shape.dimensions().iter().map(|(name, _)| *name).collect();
            for (i, (name, dimension)) in shape.dimensions_mut().into_iter().enumerate() {
                assert_eq!(name, names[i]);
                dimension.nominal = length_m(0.5 + i as f64);
            }
            for (i, (_, dimension)) in shape.dimensions().into_iter().enumerate() {
                assert_eq!(dimension.nominal.metre(), 0.5 + i as f64);
            }
        }
    }

    #[test]
    fn an_unknown_key_is_refused() {
        let text = "Sphere(inside_diameter: (nominal_m: 0.03), radius: (nominal_m: 0.015))";
        assert!(ron::from_str::<Shape>(text).is_err());
    }
}
