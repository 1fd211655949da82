//! Kinds of parts by name, and one of each to start from.

use super::capacity::Capacity;
use super::capillary::CRIMPING;
use super::dimension::{Dimension, length_m};
use super::factors::Factor;
use super::shape::{Course, DishedForm, InsertForm, Pillars, PlateEdge, Shape};
use super::wick::{Entered, Lies, Wick, WickForm};
use crate::units::{MeshNumber, Ratio, Volume};

impl Shape {
    /// What the kind of part is called.
    pub const fn kind_name(&self) -> &'static str {
        match self {
            Self::Tube { course, .. } => match course {
                Course::Straight => "tube",
                Course::Bent { .. } => "bent tube",
                Course::Coiled { .. } => "coiled tube",
            },
            Self::Capillary { .. } => "capillary",
            Self::Sphere { .. } => "sphere",
            Self::Bulb { .. } => "bulb with neck",
            Self::Box { pillars: None, .. } => "box",
            Self::Box { .. } => "box with pillars",
            Self::FlattenedTube { .. } => "flattened tube",
            Self::Annulus { .. } => "annulus",
            Self::Bellows { .. } => "bellows",
            Self::ConeFrustum { .. } => "cone",
            Self::DishedEnd { form, .. } => match form {
                DishedForm::Hemispherical => "hemispherical end",
                DishedForm::TwoToOneEllipsoidal => "ellipsoidal end",
                DishedForm::Torispherical => "torispherical end",
            },
            Self::FlatEnd { .. } => "flat end",
            Self::PlateEnd { .. } => "rectangular end",
            Self::Fitting { .. } => "fitting",
            Self::Insert { form } => match form {
                InsertForm::Cylinder { .. } => "solid cylinder",
                InsertForm::Sphere { .. } => "solid sphere",
                InsertForm::Block { .. } => "solid block",
            },
            Self::Wick(Wick { form, .. }) => match form {
                WickForm::Screen { .. } => "screen wick",
                WickForm::Powder { .. } => "sintered wick",
                WickForm::Felt { .. } => "felt wick",
                WickForm::Grooves { .. } => "axial grooves",
                WickForm::Artery { .. } => "artery",
            },
        }
    }

    /// One of each kind in a size usual for small sealed devices: the "add part" menu.
    pub fn default_of_each_kind() -> Vec<Self> {
        let mut shapes = cavities();
        shapes.extend(ends_and_fittings());
        shapes.extend(bodies_inside());
        shapes
    }
}

fn size(nominal_m: f64, tolerance_m: f64) -> Dimension {
    Dimension::new(length_m(nominal_m), length_m(tolerance_m))
}

fn bore() -> Dimension {
    size(0.010, 0.00005)
}

fn cavities() -> Vec<Shape> {
    let tube = |course| Shape::Tube {
        inside_diameter: bore(),
        length: size(0.200, 0.0005),
        course,
    };
    let flat = |pillars| Shape::Box {
        width: size(0.060, 0.0001),
        height: size(0.003, 0.00005),
        depth: size(0.060, 0.0001),
        pillars,
    };
    vec![
        tube(Course::Straight),
        tube(Course::Bent {
            radius: size(0.030, 0.001),
        }),
        tube(Course::Coiled {
            diameter: size(0.080, 0.001),
        }),
        Shape::Capillary {
            inside_diameter: size(0.0008, 0.00005),
            length: size(1.0, 0.01),
        },
        Shape::Sphere {
            inside_diameter: size(0.030, 0.0005),
        },
        Shape::Bulb {
            inside_diameter: size(0.030, 0.0005),
            neck_diameter: size(0.006, 0.0001),
            neck_length: size(0.020, 0.0005),
        },
        flat(None),
        flat(Some(Pillars {
            diameter: size(0.002, 0.00005),
            along_width: 9,
            along_depth: 9,
        })),
        Shape::FlattenedTube {
            width: size(0.014, 0.0001),
            height: size(0.003, 0.00005),
            length: size(0.200, 0.0005),
        },
        Shape::Annulus {
            inside_diameter: size(0.030, 0.0001),
            core_diameter: size(0.020, 0.0001),
            core_thickness: size(0.001, 0.0001),
            length: size(0.100, 0.0005),
        },
        Shape::ConeFrustum {
            first_diameter: bore(),
            second_diameter: size(0.004, 0.00005),
            length: size(0.012, 0.0002),
        },
        Shape::Bellows {
            root_diameter: bore(),
            crest_diameter: size(0.015, 0.0001),
            length: size(0.020, 0.0002),
            stroke: size(0.002, 0.0001),
        },
    ]
}

fn ends_and_fittings() -> Vec<Shape> {
    let dished = |form| Shape::DishedEnd {
        inside_diameter: bore(),
        form,
    };
    let edge = PlateEdge::SimplySupported;
    let volume = |m3| Volume::from_cubic_metre(m3).expect("a usual size");
    vec![
        dished(DishedForm::Hemispherical),
        dished(DishedForm::TwoToOneEllipsoidal),
        dished(DishedForm::Torispherical),
        Shape::FlatEnd {
            inside_diameter: bore(),
            edge,
        },
        Shape::PlateEnd {
            width: size(0.014, 0.0001),
            height: size(0.003, 0.00005),
            edge,
        },
        Shape::Fitting {
            dead_volume: Capacity {
                nominal: volume(0.2e-6),
                tolerance: volume(0.02e-6),
            },
        },
    ]
}

fn bodies_inside() -> Vec<Shape> {
    let solid = |form| Shape::Insert { form };
    let wick = |form| {
        Shape::Wick(Wick {
            form,
            entered: Entered::default(),
        })
    };
    let share = |x| Ratio::from_fraction(x).expect("a usual share");
    let lies = || Lies::Lining {
        bore: bore(),
        length: size(0.200, 0.0005),
    };
    vec![
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
        wick(WickForm::Screen {
            lies: lies(),
            // 100 openings an inch of 0.1 mm wire, two layers.
            mesh: MeshNumber::from_per_metre(100.0 / 0.0254).expect("a usual mesh"),
            wire_diameter: size(0.0001, 0.000002),
            layers: 2,
            crimping: Factor::from_number(CRIMPING).expect("the usual factor"),
        }),
        wick(WickForm::Powder {
            lies: lies(),
            thickness: size(0.0008, 0.00005),
            particle_diameter: size(0.00015, 0.00002),
            porosity: share(0.45),
        }),
        wick(WickForm::Felt {
            lies: lies(),
            thickness: size(0.001, 0.0001),
            fibre_diameter: size(0.00003, 0.000002),
            porosity: share(0.8),
        }),
        wick(WickForm::Grooves {
            count: 20,
            length: size(0.200, 0.0005),
            mouth_width: size(0.0006, 0.00003),
            floor_width: size(0.0006, 0.00003),
            depth: size(0.001, 0.00005),
        }),
        wick(WickForm::Artery {
            inside_diameter: size(0.001, 0.00005),
            wall_thickness: size(0.0002, 0.00002),
            wall_porosity: share(0.6),
            length: size(0.200, 0.0005),
        }),
    ]
}

#[cfg(test)]
mod tests {
    use super::super::{Pick, Role};
    use super::*;

    #[test]
    fn the_menu_has_each_kind_once_and_each_survives_the_file() {
        let menu = Shape::default_of_each_kind();
        let mut names: Vec<_> = menu.iter().map(Shape::kind_name).collect();
        for shape in &menu {
            let text = ron::to_string(shape).expect("writes");
            assert_eq!(ron::from_str::<Shape>(&text).as_ref(), Ok(shape));
            let encloses = !matches!(shape.role(), Role::Lid | Role::Wick);
            assert_eq!(
                shape.volume(Pick::Least) > 0.0,
                encloses,
                "{}",
                shape.kind_name()
            );
        }
        names.sort_unstable();
        names.dedup();
        assert_eq!(names.len(), menu.len());
    }
}
