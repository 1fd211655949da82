//! Kinds of parts by name, and one of each to start from.

use super::dimension::{Dimension, length_m};
use super::shape::{DishedForm, InsertForm, PlateEdge, Shape};

impl Shape {
    /// What the kind of part is called.
    pub const fn kind_name(&self) -> &'static str {
        match self {
            Self::Tube { .. } => "tube",
            Self::Sphere { .. } => "sphere",
            Self::Box { .. } => "box",
            Self::ConeFrustum { .. } => "cone",
            Self::DishedEnd {
                form: DishedForm::Hemispherical,
                ..
            } => "hemispherical end",
            Self::DishedEnd {
                form: DishedForm::TwoToOneEllipsoidal,
                ..
            } => "ellipsoidal end",
            Self::DishedEnd {
                form: DishedForm::Torispherical,
                ..
            } => "torispherical end",
            Self::FlatEnd { .. } => "flat end",
            Self::Insert {
                form: InsertForm::Cylinder { .. },
            } => "solid cylinder",
            Self::Insert {
                form: InsertForm::Sphere { .. },
            } => "solid sphere",
            Self::Insert {
                form: InsertForm::Block { .. },
            } => "solid block",
        }
    }

    /// One of each kind in a size usual for small sealed devices: the "add part" menu.
    pub fn default_of_each_kind() -> Vec<Self> {
        let size =
            |nominal_m, tolerance_m| Dimension::new(length_m(nominal_m), length_m(tolerance_m));
        let bore = size(0.010, 0.00005);
        let dished = |form| Self::DishedEnd {
            inside_diameter: bore,
            form,
        };
        let solid = |form| Self::Insert { form };
        vec![
            Self::Tube {
                inside_diameter: bore,
                length: size(0.200, 0.0005),
            },
            Self::Sphere {
                inside_diameter: size(0.030, 0.0005),
            },
            Self::Box {
                width: size(0.060, 0.0001),
                height: size(0.003, 0.00005),
                depth: size(0.060, 0.0001),
            },
            Self::ConeFrustum {
                first_diameter: bore,
                second_diameter: size(0.004, 0.00005),
                length: size(0.012, 0.0002),
            },
            dished(DishedForm::Hemispherical),
            dished(DishedForm::TwoToOneEllipsoidal),
            dished(DishedForm::Torispherical),
            Self::FlatEnd {
                inside_diameter: bore,
                edge: PlateEdge::SimplySupported,
            },
            solid(InsertForm::Cylinder {
                diameter: size(0.004, 0.00005),
                length: size(0.050, 0.0002),
            }),
            solid(InsertForm::Sphere {
                diameter: size(0.005, 0.00005),
            }),
            solid(InsertForm::Block {
                width: size(0.005, 0.00005),
                height: size(0.002, 0.00005),
                depth: size(0.020, 0.0001),
            }),
        ]
    }
}

#[cfg(test)]
mod tests {
    use super::super::Pick;
    use super::*;

    #[test]
    fn the_menu_has_each_kind_once_and_each_survives_the_file() {
        let menu = Shape::default_of_each_kind();
        let mut names: Vec<_> = menu.iter().map(Shape::kind_name).collect();
        for shape in &menu {
            let text = ron::to_string(shape).expect("writes");
            assert_eq!(ron::from_str::<Shape>(&text).as_ref(), Ok(shape));
            let encloses = !matches!(shape, Shape::FlatEnd { .. });
            assert_eq!(
                shape.volume(Pick::Least) > 0.0,
                encloses,
                "{}",
                shape.kind_name()
            );
        }
        names.sort_unstable();
        names.dedup();
        assert_eq!(names.len(), 11);
    }
}
