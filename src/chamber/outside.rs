//! What a wall of a given shape bears from outside: collapse and yield.

use super::dimension::{Dimension, Pick};
use super::envelope::StrengthGap;
use super::face::{self, circle_m2};
use super::resistance::Cone;
use super::shape::Shape;
use super::strength::{collapse, pillar};

/// Sizes that collapse depends on, at their worst; elastic collapse goes with the modulus,
/// yield with the strength, and ovality ties the two.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Against {
    forms: Vec<Form>,
}

#[derive(Debug, Clone, Copy, PartialEq)]
enum Form {
    Tube {
        mean_diameter_m: f64,
        length_m: f64,
        t_m: f64,
        ovality: f64,
    },
    Sphere {
        mean_radius_m: f64,
        t_m: f64,
    },
    /// Stress per pressure of a plate or a ring, which bends as it does under inside
    /// pressure.
    Bending {
        pressure_per_stress: f64,
    },
    Pillar {
        cell_m2: f64,
        diameter_m: f64,
        height_m: f64,
    },
}

/// Outside less inside pressure at which a wall gives way, Pa.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Collapse {
    /// Elastic collapse of the perfect shape, knocked down where that is usual; infinite
    /// where the shape cannot buckle.
    pub(super) elastic_pa: f64,
    /// First yield with the shape's ovality.
    pub(super) yield_pa: f64,
}

impl Against {
    /// At the least thickness, the greatest diameters and lengths.
    ///
    /// # Errors
    /// [`StrengthGap`] for what has no wall, and a cone too steep.
    pub(super) fn of(shape: &Shape, t: f64, nu: f64, ovality: f64) -> Result<Self, StrengthGap> {
        let m = |dimension: &Dimension| dimension.at(Pick::Greatest).metre();
        let tube = |bore: f64, length_m: f64| Form::Tube {
            mean_diameter_m: bore + t,
            length_m,
            t_m: t,
            ovality,
        };
        let sphere = |inside_radius: f64| Form::Sphere {
            mean_radius_m: inside_radius + 0.5 * t,
            t_m: t,
        };
        let bending = |pressure_per_stress| Form::Bending {
            pressure_per_stress,
        };
        let forms = match shape {
            Shape::Tube {
                inside_diameter,
                length,
                ..
            }
            | Shape::Capillary {
                inside_diameter,
                length,
            }
            | Shape::Annulus {
                inside_diameter,
                length,
                ..
            } => vec![tube(m(inside_diameter), m(length))],
            Shape::Sphere { inside_diameter } => vec![sphere(0.5 * m(inside_diameter))],
            Shape::Bulb {
                inside_diameter,
                neck_diameter,
                neck_length,
            } => vec![
                sphere(0.5 * m(inside_diameter)),
                tube(m(neck_diameter), m(neck_length)),
            ],
            Shape::DishedEnd {
                inside_diameter,
                form,
            } => {
                let outside = m(inside_diameter) + 2.0 * t;
                let crown = collapse::dished_radius_m(*form, outside);
                vec![Form::Sphere {
                    mean_radius_m: crown,
                    t_m: t,
                }]
            }
            Shape::ConeFrustum {
                first_diameter,
                second_diameter,
                length,
            } => {
                let cone = Cone::of(first_diameter, second_diameter, length)?;
                let outside = |bore: &Dimension| m(bore) + 2.0 * t;
                let same = collapse::cone_as_cylinder(
                    outside(cone.wide),
                    outside(cone.narrow),
                    m(length),
                    t,
                    cone.half_angle_degrees,
                );
                vec![Form::Tube {
                    mean_diameter_m: same.diameter_m,
                    length_m: same.length_m,
                    t_m: same.t_m,
                    ovality,
                }]
            }
            Shape::FlatEnd {
                inside_diameter,
                edge,
            } => vec![bending(face::of_disc(m(inside_diameter), t, nu, *edge))],
            Shape::PlateEnd {
                width,
                height,
                edge,
            } => vec![bending(face::of_plate(m(width), m(height), t, *edge))],
            Shape::Box {
                width,
                height,
                depth,
                pillars,
            } => {
                let (w, h, d) = (m(width), m(height), m(depth));
                let mut forms = vec![bending(face::of_box([w, h, d], pillars.as_ref(), t))];
                if let Some(pillars) = pillars {
                    let (a, b) = pillars.cell_m(w, d);
                    forms.push(Form::Pillar {
                        cell_m2: a * b,
                        diameter_m: pillars.diameter.least().metre(),
                        height_m: h,
                    });
                }
                forms
            }
            Shape::FlattenedTube { width, height, .. } => {
                vec![bending(face::of_flattened_tube(m(width), m(height), t))]
            }
            Shape::Bellows { .. } | Shape::Fitting { .. } => return Err(StrengthGap::NoRating),
            Shape::Insert { .. } | Shape::Wick(_) => return Err(StrengthGap::NoWall),
        };
        Ok(Self { forms })
    }

    /// The core of an annulus, which the fluid presses from its outside.
    pub(super) fn of_core(diameter_m: f64, length_m: f64, t: f64, ovality: f64) -> Self {
        Self {
            forms: vec![Form::Tube {
                mean_diameter_m: diameter_m - t,
                length_m,
                t_m: t,
                ovality,
            }],
        }
    }

    /// The weakest of the shape's ways to give way.
    pub(super) fn collapse(&self, modulus_pa: f64, nu: f64, yield_pa: f64) -> Collapse {
        let mut least = Collapse {
            elastic_pa: f64::INFINITY,
            yield_pa: f64::INFINITY,
        };
        for form in &self.forms {
            let one = form.collapse(modulus_pa, nu, yield_pa);
            least.elastic_pa = least.elastic_pa.min(one.elastic_pa);
            least.yield_pa = least.yield_pa.min(one.yield_pa);
        }
        least
    }
}

impl Form {
    fn collapse(self, modulus_pa: f64, nu: f64, sy_pa: f64) -> Collapse {
        match self {
            Self::Tube {
                mean_diameter_m,
                length_m,
                t_m,
                ovality,
            } => {
                let elastic_pa =
                    collapse::cylinder_pa(modulus_pa, nu, mean_diameter_m, t_m, length_m);
                let radius_m = 0.5 * mean_diameter_m;
                let oval =
                    collapse::cylinder_out_of_round_pa(elastic_pa, sy_pa, radius_m, t_m, ovality);
                let (inside, outside) = (radius_m - 0.5 * t_m, radius_m + 0.5 * t_m);
                let yield_pa = oval.min(collapse::cylinder_yield_pa(sy_pa, inside, outside));
                Collapse {
                    elastic_pa,
                    yield_pa,
                }
            }
            Self::Sphere { mean_radius_m, t_m } => Collapse {
                // So that the usual factor of 3 keeps to UG-28(d), p = 0.0625 E (t/R)².
                elastic_pa: collapse::sphere_pa(modulus_pa, nu, mean_radius_m, t_m)
                    .min(3.0 * 0.0625 * modulus_pa * (t_m / mean_radius_m).powi(2)),
                yield_pa: collapse::sphere_yield_pa(sy_pa, mean_radius_m, t_m),
            },
            Self::Bending {
                pressure_per_stress,
            } => Collapse {
                elastic_pa: f64::INFINITY,
                yield_pa: pressure_per_stress * sy_pa,
            },
            Self::Pillar {
                cell_m2,
                diameter_m,
                height_m,
            } => Collapse {
                elastic_pa: pillar::euler_pa(modulus_pa, 0.25 * diameter_m, height_m)
                    / pillar::compression_pa(1.0, cell_m2, circle_m2(diameter_m)),
                yield_pa: sy_pa / pillar::compression_pa(1.0, cell_m2, circle_m2(diameter_m)),
            },
        }
    }
}
