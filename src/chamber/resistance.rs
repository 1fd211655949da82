//! What a wall of a given shape bears per unit of stress.

use super::dimension::{Dimension, Pick};
use super::envelope::StrengthGap;
use super::face;
use super::shape::{Course, DishedForm, PlateEdge, Shape};
use super::strength::{bend, compliance, cylinder, glass, head, plate, sphere};

/// Pressure over stress, from the sizes alone: every formula is linear in stress.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct PressurePerStress {
    /// Times σ_y (2 − σ_y/σ_u): burst by Faupel's allowance for hardening.
    plastic: f64,
    /// Times σ_u: burst by tensile strength.
    tensile: f64,
    /// Times σ_y.
    first_yield: f64,
    /// Times S.
    code_form: f64,
    /// Times the permissible stress of glass.
    permissible: f64,
}

impl PressurePerStress {
    /// At the least thickness and the greatest inside sizes.
    ///
    /// # Errors
    /// [`StrengthGap`] for what has no wall, bears by rating, a size of 0, a cone too steep
    /// and a bend too tight.
    pub(super) fn of(shape: &Shape, least_t_m: f64, nu: f64) -> Result<Self, StrengthGap> {
        let t = least_t_m;
        let m = |dimension: &Dimension| dimension.at(Pick::Greatest).metre();
        let per_stress = match shape {
            Shape::Tube {
                inside_diameter,
                course,
                ..
            } => Self::cylinder(m(inside_diameter), t).bent(course, m(inside_diameter), t)?,
            Shape::Capillary {
                inside_diameter, ..
            } => Self::cylinder(m(inside_diameter), t),
            Shape::Sphere { inside_diameter }
            | Shape::DishedEnd {
                inside_diameter,
                form: DishedForm::Hemispherical,
            } => Self::sphere(m(inside_diameter), t),
            Shape::Bulb {
                inside_diameter,
                neck_diameter,
                ..
            } => Self::sphere(m(inside_diameter), t).or(Self::cylinder(m(neck_diameter), t)),
            Shape::DishedEnd {
                inside_diameter,
                form: DishedForm::TwoToOneEllipsoidal,
            } => Self::alike(head::ellipsoidal_pa(1.0, m(inside_diameter), t)),
            Shape::DishedEnd {
                inside_diameter,
                form: DishedForm::Torispherical,
            } => Self::alike(head::torispherical_pa(1.0, m(inside_diameter), t)),
            Shape::ConeFrustum {
                first_diameter,
                second_diameter,
                length,
            } => {
                let cone = Cone::of(first_diameter, second_diameter, length)?;
                let radius = head::cone_radius_m(m(cone.wide), cone.half_angle_degrees);
                Self::cylinder(2.0 * radius, t)
            }
            Shape::FlatEnd {
                inside_diameter,
                edge,
            } => Self::flat_end(m(inside_diameter), t, nu, *edge),
            Shape::PlateEnd {
                width,
                height,
                edge,
            } => Self::alike(face::of_plate(m(width), m(height), t, *edge)),
            Shape::Box {
                width,
                height,
                depth,
                pillars,
            } => {
                let sides = [m(width), m(height), m(depth)];
                Self::alike(face::of_box(sides, pillars.as_ref(), t))
            }
            Shape::FlattenedTube { width, height, .. } => {
                Self::alike(face::of_flattened_tube(m(width), m(height), t))
            }
            // Its core bears from outside: see `outside`.
            Shape::Annulus {
                inside_diameter, ..
            } => Self::cylinder(m(inside_diameter), t),
            Shape::Bellows { .. } | Shape::Fitting { .. } => return Err(StrengthGap::NoRating),
            Shape::Insert { .. } | Shape::Wick(_) => return Err(StrengthGap::NoWall),
        };
        if per_stress.all().iter().all(|x| x.is_finite()) {
            Ok(per_stress)
        } else {
            Err(StrengthGap::NoSize)
        }
    }

    /// A closed tube by itself: the core of an annulus under pressure from its own inside.
    pub(super) fn tube(inside_diameter_m: f64, t: f64) -> Self {
        Self::cylinder(inside_diameter_m, t)
    }

    pub(super) fn burst_pa(&self, sy_pa: f64, su_pa: f64) -> f64 {
        (self.plastic * sy_pa * (2.0 - sy_pa / su_pa)).min(self.tensile * su_pa)
    }

    pub(super) fn yield_pa(&self, sy_pa: f64) -> f64 {
        self.first_yield * sy_pa
    }

    pub(super) fn code_form_pa(&self, s_pa: f64) -> f64 {
        self.code_form * s_pa
    }

    pub(super) fn permissible_pa(&self, stress_pa: f64) -> f64 {
        self.permissible * stress_pa
    }

    fn cylinder(inside_diameter_m: f64, t: f64) -> Self {
        let ri = 0.5 * inside_diameter_m;
        Self {
            plastic: cylinder::full_plastic_pa(1.0, ri, ri + t),
            tensile: cylinder::tensile_burst_pa(1.0, inside_diameter_m + t, t),
            first_yield: cylinder::first_yield_pa(1.0, ri, ri + t),
            code_form: cylinder::code_form_pa(1.0, ri, t),
            permissible: glass::tube_pa(1.0, inside_diameter_m, t),
        }
    }

    fn sphere(inside_diameter_m: f64, t: f64) -> Self {
        let ri = 0.5 * inside_diameter_m;
        Self {
            plastic: sphere::full_plastic_pa(1.0, ri, ri + t),
            tensile: sphere::tensile_burst_pa(1.0, inside_diameter_m + t, t),
            first_yield: sphere::first_yield_pa(1.0, ri, ri + t),
            code_form: sphere::code_form_pa(1.0, ri, t),
            permissible: glass::sphere_pa(1.0, inside_diameter_m, t),
        }
    }

    fn flat_end(inside_diameter_m: f64, t: f64, nu: f64, edge: PlateEdge) -> Self {
        let plate = Self::alike(face::of_disc(inside_diameter_m, t, nu, edge));
        let code_form = plate::flat_end_code_form_pa(1.0, inside_diameter_m, t);
        Self {
            code_form: code_form.min(1.0),
            ..plate
        }
    }

    /// The weaker of two in each respect.
    fn or(self, other: Self) -> Self {
        Self {
            plastic: self.plastic.min(other.plastic),
            tensile: self.tensile.min(other.tensile),
            first_yield: self.first_yield.min(other.first_yield),
            code_form: self.code_form.min(other.code_form),
            permissible: self.permissible.min(other.permissible),
        }
    }

    /// The same tube in its bend.
    fn bent(self, course: &Course, bore_m: f64, t: f64) -> Result<Self, StrengthGap> {
        let Some(radius_m) = course.least_radius_m() else {
            return Ok(self);
        };
        let share =
            bend::pressure_factor(bore_m + 2.0 * t, radius_m).ok_or(StrengthGap::BendTooTight)?;
        Ok(Self {
            plastic: share * self.plastic,
            tensile: share * self.tensile,
            first_yield: share * self.first_yield,
            code_form: share * self.code_form,
            permissible: share * self.permissible,
        })
    }

    /// One figure for a shape with one formula: greatest elastic stress, or code form.
    /// With σ_y (2 − σ_y/σ_u) against σ_u, burst is by [`head::flow_strength_pa`].
    const fn alike(per_stress: f64) -> Self {
        Self {
            plastic: per_stress,
            tensile: per_stress,
            first_yield: per_stress,
            code_form: per_stress,
            permissible: per_stress,
        }
    }

    const fn all(&self) -> [f64; 5] {
        [
            self.plastic,
            self.tensile,
            self.first_yield,
            self.code_form,
            self.permissible,
        ]
    }
}

/// What a wall yields to pressure, m³/Pa, by its nominal sizes; 0 where no formula is at
/// hand.
pub(super) fn growth_m3_per_pa(shape: &Shape, t: f64, modulus_pa: f64, nu: f64) -> f64 {
    let m = |dimension: &Dimension| dimension.nominal.metre();
    let volume_m3 = shape.volume(Pick::Nominal);
    let radii = |bore: &Dimension| (0.5 * m(bore), 0.5 * m(bore) + t);
    let grown = match shape {
        Shape::Tube {
            inside_diameter, ..
        }
        | Shape::Capillary {
            inside_diameter, ..
        } => {
            let (ri, ro) = radii(inside_diameter);
            volume_m3 * compliance::cylinder_per_pa(modulus_pa, nu, ri, ro)
        }
        Shape::Sphere { inside_diameter }
        | Shape::Bulb {
            inside_diameter, ..
        }
        | Shape::DishedEnd {
            inside_diameter,
            form: DishedForm::Hemispherical,
        } => {
            let (ri, ro) = radii(inside_diameter);
            volume_m3 * compliance::sphere_per_pa(modulus_pa, nu, ri, ro)
        }
        Shape::FlatEnd {
            inside_diameter,
            edge,
        } => {
            let radius = 0.5 * m(inside_diameter);
            compliance::circular_plate_m3_per_pa(modulus_pa, nu, radius, t, *edge)
        }
        // Cones, dished ends and flat faces yield more than this, or by what is not known
        // of their edges: nothing is credited.
        _ => 0.0,
    };
    if grown.is_finite() { grown } else { 0.0 }
}

/// The steepest cone that the tolerances allow.
pub(super) struct Cone<'a> {
    pub(super) wide: &'a Dimension,
    pub(super) narrow: &'a Dimension,
    pub(super) half_angle_degrees: f64,
}

impl<'a> Cone<'a> {
    /// # Errors
    /// [`StrengthGap::ConeTooSteep`].
    pub(super) fn of(
        first: &'a Dimension,
        second: &'a Dimension,
        length: &Dimension,
    ) -> Result<Self, StrengthGap> {
        let (wide, narrow) = if first.nominal >= second.nominal {
            (first, second)
        } else {
            (second, first)
        };
        let half_angle_degrees = head::half_angle_degrees(
            wide.greatest().metre(),
            narrow.least().metre(),
            length.least().metre(),
        );
        if half_angle_degrees > head::CONE_HALF_ANGLE_DEGREES {
            return Err(StrengthGap::ConeTooSteep { half_angle_degrees });
        }
        Ok(Self {
            wide,
            narrow,
            half_angle_degrees,
        })
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    use super::super::shape::Role;

    const NU: f64 = 0.3;

    fn of(shape: &str, t: f64) -> PressurePerStress {
        let shape: Shape = ron::from_str(shape).expect(shape);
        PressurePerStress::of(&shape, t, NU).expect("strength")
    }

    #[test]
    fn a_tube_takes_the_lower_burst() {
        let tube = of(
            "Tube(inside_diameter: (nominal_m: 0.011), length: (nominal_m: 0.1))",
            0.0005,
        );
        // methods.md, E3: soft copper by Faupel, 6061-T6 by tensile strength.
        assert!((tube.burst_pa(62e6, 206e6) / 105.8e5 - 1.0).abs() < 1e-3);
        assert!((tube.burst_pa(276e6, 310e6) / 269.6e5 - 1.0).abs() < 1e-3);
        assert!((tube.code_form_pa(41e6) / 3.534e6 - 1.0).abs() < 2e-4);
    }

    #[test]
    fn a_straight_cone_is_a_tube_and_a_steep_one_is_refused() {
        let tube = of(
            "Tube(inside_diameter: (nominal_m: 0.011), length: (nominal_m: 0.1))",
            0.0005,
        );
        let cone = "ConeFrustum(first_diameter: (nominal_m: 0.011), second_diameter: (nominal_m: 0.011), length: (nominal_m: 0.1))";
        assert_eq!(of(cone, 0.0005), tube);
        let steep: Shape = ron::from_str(
            "ConeFrustum(first_diameter: (nominal_m: 0.0), second_diameter: (nominal_m: 0.02), length: (nominal_m: 0.01))",
        )
        .expect("reads");
        let gap = PressurePerStress::of(&steep, 0.001, NU);
        assert!(
            matches!(gap, Err(StrengthGap::ConeTooSteep { .. })),
            "{gap:?}"
        );
    }

    #[test]
    fn a_size_of_zero_has_no_strength_and_no_wall_bears_nothing() {
        let point: Shape =
            ron::from_str("Sphere(inside_diameter: (nominal_m: 0.0))").expect("reads");
        assert_eq!(
            PressurePerStress::of(&point, 0.001, NU),
            Err(StrengthGap::NoSize)
        );
        for shape in Shape::default_of_each_kind() {
            if let Ok(bare) = PressurePerStress::of(&shape, 0.0, NU) {
                assert_eq!(bare.all(), [0.0; 5], "{}", shape.kind_name());
            } else {
                assert!(!matches!(shape.role(), Role::Cavity | Role::Lid));
            }
        }
    }

    #[test]
    fn a_thicker_wall_bears_more_and_a_wider_part_less() {
        for shape in Shape::default_of_each_kind()
            .iter()
            .filter(|shape| matches!(shape.role(), Role::Cavity | Role::Lid))
            // In a bend a thicker tube is also a tighter one.
            .filter(
                |shape| !matches!(shape, Shape::Tube { course, .. } if *course != Course::Straight),
            )
        {
            let mut wide = shape.clone();
            for (name, dimension) in wide.dimensions_mut() {
                if name == "pillar diameter" {
                    continue;
                }
                *dimension = super::super::Dimension::exact(super::super::dimension::length_m(
                    1.3 * dimension.greatest().metre(),
                ));
            }
            for i in 1..400 {
                let t = f64::from(i) * 1e-4;
                let at = |shape, t| PressurePerStress::of(shape, t, NU).expect("strength").all();
                let (thin, thick, wide) = (at(shape, t), at(shape, 1.01 * t), at(&wide, t));
                for k in 0..5 {
                    assert!(thick[k] >= thin[k], "{} {t} {k}", shape.kind_name());
                    assert!(wide[k] <= thin[k], "{} {t} {k}", shape.kind_name());
                }
            }
        }
    }

    /// At R = 30 mm and D = 11 mm the inside of the bend bears (4 R/D − 2)/(4 R/D − 1).
    #[test]
    fn a_bend_takes_its_share_and_must_be_wider_than_the_tube() {
        let at = |course: &str| {
            let shape = format!(
                "Tube(inside_diameter: (nominal_m: 0.010), length: (nominal_m: 0.2), course: {course})"
            );
            PressurePerStress::of(&ron::from_str(&shape).expect(&shape), 0.0005, NU)
        };
        let straight = at("Straight").expect("strength").all();
        let bent = at("Bent(radius: (nominal_m: 0.03))")
            .expect("strength")
            .all();
        let coiled = at("Coiled(diameter: (nominal_m: 0.06))").expect("strength");
        let share = (4.0 * 30.0 / 11.0 - 2.0) / (4.0 * 30.0 / 11.0 - 1.0);
        for (bent, straight) in bent.iter().zip(straight) {
            assert!((bent / straight - share).abs() < 1e-12, "{bent} {straight}");
        }
        assert_eq!(coiled.all(), bent);
        assert_eq!(
            at("Bent(radius: (nominal_m: 0.005))"),
            Err(StrengthGap::BendTooTight)
        );
    }

    #[test]
    fn a_box_is_as_weak_as_its_largest_face() {
        let flat =
            "Box(width: (nominal_m: 0.04), height: (nominal_m: 0.003), depth: (nominal_m: 0.04))";
        let bending = 0.3078 * 1600.0; // clamped square, worse than supported
        let expected = 1.0 / (bending + 1.5 + 1.0);
        assert!((of(flat, 0.001).code_form_pa(1.0) / expected - 1.0).abs() < 1e-9);
    }
}
