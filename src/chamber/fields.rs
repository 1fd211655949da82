//! Everything of a shape that can be edited or at fault, by name.

use super::capacity::Capacity;
use super::dimension::Dimension;
use super::factors::Factor;
use super::shape::{Course, InsertForm, Pillars, Shape};
use super::wick::{Lies, Wick, WickForm};
use crate::units::{MeshNumber, Ratio};

/// One value of a shape, to be edited.
pub enum Field<'a> {
    Size(&'a mut Dimension),
    Share(&'a mut Ratio),
    Mesh(&'a mut MeshNumber),
    Count(&'a mut u32),
    Factor(&'a mut Factor),
    Capacity(&'a mut Capacity),
}

macro_rules! sizes_of_layer {
    ($lies:ident) => {
        match $lies {
            Lies::Lining { bore, length } => [("bore", bore), ("length", length)],
            Lies::Sheet { width, length } => [("width", width), ("length", length)],
        }
    };
}

/// Names beside sizes, for a shared or a mutable shape alike.
macro_rules! sizes_of {
    ($shape:expr) => {
        match $shape {
            Shape::Tube {
                inside_diameter,
                length,
                course,
            } => {
                let mut sizes = vec![("inside diameter", inside_diameter), ("length", length)];
                match course {
                    Course::Straight => {}
                    Course::Bent { radius } => sizes.push(("bend radius", radius)),
                    Course::Coiled { diameter } => sizes.push(("coil diameter", diameter)),
                }
                sizes
            }
            Shape::Capillary {
                inside_diameter,
                length,
            } => vec![("inside diameter", inside_diameter), ("length", length)],
            Shape::Sphere { inside_diameter }
            | Shape::DishedEnd {
                inside_diameter, ..
            }
            | Shape::FlatEnd {
                inside_diameter, ..
            } => vec![("inside diameter", inside_diameter)],
            Shape::Bulb {
                inside_diameter,
                neck_diameter,
                neck_length,
            } => vec![
                ("inside diameter", inside_diameter),
                ("neck diameter", neck_diameter),
                ("neck length", neck_length),
            ],
            Shape::Box {
                width,
                height,
                depth,
                pillars,
            } => {
                let mut sizes = vec![("width", width), ("height", height), ("depth", depth)];
                if let Some(Pillars { diameter, .. }) = pillars {
                    sizes.push(("pillar diameter", diameter));
                }
                sizes
            }
            Shape::FlattenedTube {
                width,
                height,
                length,
            } => vec![("width", width), ("height", height), ("length", length)],
            Shape::Annulus {
                inside_diameter,
                core_diameter,
                core_thickness,
                length,
            } => vec![
                ("inside diameter", inside_diameter),
                ("core diameter", core_diameter),
                ("core wall thickness", core_thickness),
                ("length", length),
            ],
            Shape::Bellows {
                root_diameter,
                crest_diameter,
                length,
                stroke,
            } => vec![
                ("root diameter", root_diameter),
                ("crest diameter", crest_diameter),
                ("length", length),
                ("stroke", stroke),
            ],
            Shape::ConeFrustum {
                first_diameter,
                second_diameter,
                length,
            } => vec![
                ("first diameter", first_diameter),
                ("second diameter", second_diameter),
                ("length", length),
            ],
            Shape::PlateEnd { width, height, .. } => vec![("width", width), ("height", height)],
            Shape::Fitting { .. } => Vec::new(),
            Shape::Insert { form } => match form {
                InsertForm::Cylinder { diameter, length } => {
                    vec![("diameter", diameter), ("length", length)]
                }
                InsertForm::Sphere { diameter } => vec![("diameter", diameter)],
                InsertForm::Block {
                    width,
                    height,
                    depth,
                } => vec![("width", width), ("height", height), ("depth", depth)],
            },
            Shape::Wick(Wick { form, .. }) => {
                let mut sizes = Vec::new();
                match form {
                    WickForm::Screen {
                        lies,
                        wire_diameter,
                        ..
                    } => {
                        sizes.extend(sizes_of_layer!(lies));
                        sizes.push(("wire diameter", wire_diameter));
                    }
                    WickForm::Powder {
                        lies,
                        thickness,
                        particle_diameter,
                        ..
                    } => {
                        sizes.extend(sizes_of_layer!(lies));
                        sizes.push(("layer thickness", thickness));
                        sizes.push(("particle diameter", particle_diameter));
                    }
                    WickForm::Felt {
                        lies,
                        thickness,
                        fibre_diameter,
                        ..
                    } => {
                        sizes.extend(sizes_of_layer!(lies));
                        sizes.push(("layer thickness", thickness));
                        sizes.push(("fibre diameter", fibre_diameter));
                    }
                    WickForm::Grooves {
                        length,
                        mouth_width,
                        floor_width,
                        depth,
                        ..
                    } => sizes.extend([
                        ("length", length),
                        ("mouth width", mouth_width),
                        ("floor width", floor_width),
                        ("groove depth", depth),
                    ]),
                    WickForm::Artery {
                        inside_diameter,
                        wall_thickness,
                        length,
                        ..
                    } => sizes.extend([
                        ("inside diameter", inside_diameter),
                        ("artery wall thickness", wall_thickness),
                        ("length", length),
                    ]),
                }
                sizes
            }
        }
    };
}

impl Shape {
    /// Every size with its name, in the order an editor shows them.
    pub fn dimensions(&self) -> Vec<(&'static str, &Dimension)> {
        sizes_of!(self)
    }

    /// The same list, to be edited.
    pub fn dimensions_mut(&mut self) -> Vec<(&'static str, &mut Dimension)> {
        sizes_of!(self)
    }

    /// What else of it can be edited.
    pub fn more_fields_mut(&mut self) -> Vec<(&'static str, Field<'_>)> {
        match self {
            Self::Box {
                pillars: Some(pillars),
                ..
            } => vec![
                (
                    "pillars along the width",
                    Field::Count(&mut pillars.along_width),
                ),
                (
                    "pillars along the depth",
                    Field::Count(&mut pillars.along_depth),
                ),
            ],
            Self::Fitting { dead_volume } => vec![("dead volume", Field::Capacity(dead_volume))],
            Self::Wick(Wick { form, .. }) => match form {
                WickForm::Screen {
                    mesh,
                    layers,
                    crimping,
                    ..
                } => vec![
                    ("mesh number", Field::Mesh(mesh)),
                    ("layers", Field::Count(layers)),
                    ("crimping factor", Field::Factor(crimping)),
                ],
                WickForm::Powder { porosity, .. } | WickForm::Felt { porosity, .. } => {
                    vec![("porosity", Field::Share(porosity))]
                }
                WickForm::Grooves { count, .. } => vec![("grooves", Field::Count(count))],
                WickForm::Artery { wall_porosity, .. } => {
                    vec![("porosity of its wall", Field::Share(wall_porosity))]
                }
            },
            _ => Vec::new(),
        }
    }

    /// Counts within the shape that must not be 0.
    pub(super) fn counts(&self) -> Vec<(&'static str, u32)> {
        match self {
            Self::Box {
                pillars: Some(pillars),
                ..
            } => vec![
                ("pillars along the width", pillars.along_width),
                ("pillars along the depth", pillars.along_depth),
            ],
            Self::Wick(Wick { form, .. }) => match form {
                WickForm::Screen { layers, .. } => vec![("layers", *layers)],
                WickForm::Grooves { count, .. } => vec![("grooves", *count)],
                _ => Vec::new(),
            },
            _ => Vec::new(),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::super::dimension::length_m;
    use super::*;

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
    fn no_two_fields_of_a_shape_share_a_name() {
        for mut shape in Shape::default_of_each_kind() {
            let mut names: Vec<_> = shape.dimensions().iter().map(|(name, _)| *name).collect();
            names.extend(shape.more_fields_mut().iter().map(|(name, _)| *name));
            let count = names.len();
            names.sort_unstable();
            names.dedup();
            assert_eq!(names.len(), count, "{}", shape.kind_name());
        }
    }
}
