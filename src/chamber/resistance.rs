//! What a wall of a given shape bears per unit of stress.

use super::dimension::Pick;
use super::envelope::StrengthGap;
use super::shape::{DishedForm, PlateEdge, Shape};
use super::strength::{cylinder, glass, head, plate, sphere};

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
    /// [`StrengthGap`] for an insert, a size of 0 and a cone too steep.
    pub(super) fn of(shape: &Shape, least_t_m: f64, nu: f64) -> Result<Self, StrengthGap> {
        let t = least_t_m;
        let m = |dimension: &super::Dimension| dimension.at(Pick::Greatest).metre();
        let per_stress = match shape {
            Shape::Tube {
                inside_diameter, ..
            } => Self::cylinder(m(inside_diameter), t),
            Shape::Sphere { inside_diameter }
            | Shape::DishedEnd {
                inside_diameter,
                form: DishedForm::Hemispherical,
            } => Self::sphere(m(inside_diameter), t),
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
                // The steepest cone that the tolerances allow.
                let (wide, narrow) = if first_diameter.nominal >= second_diameter.nominal {
                    (first_diameter, second_diameter)
                } else {
                    (second_diameter, first_diameter)
                };
                let half_angle_degrees = head::half_angle_degrees(
                    m(wide),
                    narrow.least().metre(),
                    length.least().metre(),
                );
                if half_angle_degrees > head::CONE_HALF_ANGLE_DEGREES {
                    return Err(StrengthGap::ConeTooSteep { half_angle_degrees });
                }
                Self::cylinder(2.0 * head::cone_radius_m(m(wide), half_angle_degrees), t)
            }
            Shape::FlatEnd {
                inside_diameter,
                edge,
            } => Self::flat_end(m(inside_diameter), t, nu, *edge),
            Shape::Box {
                width,
                height,
                depth,
            } => Self::alike(weakest_face([m(width), m(height), m(depth)], t)),
            Shape::Insert { .. } => return Err(StrengthGap::NoWall),
        };
        if per_stress.all().iter().all(|x| x.is_finite()) {
            Ok(per_stress)
        } else {
            Err(StrengthGap::NoSize)
        }
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
        // The pressure itself stands on the inner face (Tresca); it also keeps a
        // plug thicker than it is wide from bearing more than its stress.
        let bending = plate::circular_stress_pa(1.0, 0.5 * inside_diameter_m, t, nu, edge);
        let plate = Self::alike(1.0 / (bending + 1.0));
        let code_form = plate::flat_end_code_form_pa(1.0, inside_diameter_m, t);
        Self {
            code_form: code_form.min(1.0),
            ..plate
        }
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

/// Which formulas judge a shape, for "why this number".
pub(super) const fn formula(shape: &Shape, glass: bool) -> &'static str {
    match (shape, glass) {
        (Shape::Tube { .. }, false) => {
            "burst: the lower of Faupel and tensile strength on the mean diameter; yield: Lamé with von Mises; code form: UG-27(c)"
        }
        (Shape::Tube { .. }, true) => "permissible stress: EN 1595 form, Lamé where thick",
        (
            Shape::Sphere { .. }
            | Shape::DishedEnd {
                form: DishedForm::Hemispherical,
                ..
            },
            false,
        ) => {
            "burst: the lower of full plasticity with hardening and tensile strength on the mean diameter; yield: Lamé; code form: UG-27(d)"
        }
        (
            Shape::Sphere { .. }
            | Shape::DishedEnd {
                form: DishedForm::Hemispherical,
                ..
            },
            true,
        ) => "permissible stress: thin sphere on the mean diameter, Lamé where thick",
        (Shape::ConeFrustum { .. }, false) => {
            "as a tube of the radius square to the wall at the wide end; code form: UG-32(g)"
        }
        (Shape::ConeFrustum { .. }, true) => {
            "as a tube of the radius square to the wall at the wide end; permissible stress: EN 1595 form"
        }
        (
            Shape::DishedEnd {
                form: DishedForm::TwoToOneEllipsoidal,
                ..
            },
            _,
        ) => "code form of the 2:1 ellipsoid, UG-32(d), with each strength",
        (
            Shape::DishedEnd {
                form: DishedForm::Torispherical,
                ..
            },
            _,
        ) => "code form of the torisphere, UG-32(e) and appendix 1-4, with each strength",
        (Shape::FlatEnd { .. }, _) => {
            "circular plate (Roark), elastic bending with each strength; code form: UG-34, C = 0.33"
        }
        (Shape::Box { .. }, _) => {
            "rectangular plates (Roark), the worse of clamped and supported edges, with the pull of the neighbouring faces"
        }
        (Shape::Insert { .. }, _) => "none: an insert has no wall",
    }
}

/// Pressure over stress of the weakest face of a box.
///
/// Each face bends as a plate (its rim turns somewhat, so the worse of clamped and
/// supported), is pulled by the pressure on its neighbours, at most c/(2 t) along
/// either side, c being the box's size square to the face, and has the pressure itself
/// on its inside (Tresca).
/// The code would allow 1.5 S in bending; that is not taken.
fn weakest_face(sides_m: [f64; 3], t: f64) -> f64 {
    let [w, h, d] = sides_m;
    let face = |a: f64, b: f64, c: f64| {
        let bending = |edge| plate::rectangular_stress_pa(1.0, a, b, t, edge);
        let worst = bending(PlateEdge::Clamped).max(bending(PlateEdge::SimplySupported));
        1.0 / (worst + c / (2.0 * t) + 1.0)
    };
    face(w, h, d).min(face(h, d, w)).min(face(d, w, h))
}

#[cfg(test)]
mod tests {
    use super::*;

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
                assert!(shape.is_insert());
            }
        }
    }

    #[test]
    fn a_thicker_wall_bears_more_and_a_wider_part_less() {
        for shape in Shape::default_of_each_kind()
            .iter()
            .filter(|shape| !shape.is_insert())
        {
            let mut wide = shape.clone();
            for (_, dimension) in wide.dimensions_mut() {
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

    #[test]
    fn a_box_is_as_weak_as_its_largest_face() {
        let flat =
            "Box(width: (nominal_m: 0.04), height: (nominal_m: 0.003), depth: (nominal_m: 0.04))";
        let bending = 0.3078 * 1600.0; // clamped square, worse than supported
        let expected = 1.0 / (bending + 1.5 + 1.0);
        assert!((of(flat, 0.001).code_form_pa(1.0) / expected - 1.0).abs() < 1e-9);
    }
}
