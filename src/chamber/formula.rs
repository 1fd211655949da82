//! The names of the formulas that judge a shape, for "why this number".

use super::shape::{Course, DishedForm, Shape};

const TUBE: &str = "burst: the lower of Faupel and tensile strength on the mean diameter; yield: Lamé with von Mises; code form: UG-27(c)";
const GLASS_TUBE: &str = "permissible stress: EN 1595 form, Lamé where thick";
const BENT_TUBE: &str = "as a straight tube, less the share for its bend, B31.3 304.2.1";
const SPHERE: &str = "burst: the lower of full plasticity with hardening and tensile strength on the mean diameter; yield: Lamé; code form: UG-27(d)";
const GLASS_SPHERE: &str = "permissible stress: thin sphere on the mean diameter, Lamé where thick";
const RATED: &str = "its stated rating";

/// Under inside pressure.
pub(super) const fn inside(shape: &Shape, glass: bool) -> &'static str {
    match shape {
        Shape::Tube {
            course: Course::Straight,
            ..
        }
        | Shape::Capillary { .. } => pick(glass, GLASS_TUBE, TUBE),
        Shape::Tube { .. } => BENT_TUBE,
        Shape::Sphere { .. }
        | Shape::DishedEnd {
            form: DishedForm::Hemispherical,
            ..
        } => pick(glass, GLASS_SPHERE, SPHERE),
        Shape::Bulb { .. } => "the weaker of its sphere and its neck as a tube",
        Shape::ConeFrustum { .. } => pick(
            glass,
            "as a tube of the radius square to the wall at the wide end; permissible stress: EN 1595 form",
            "as a tube of the radius square to the wall at the wide end; code form: UG-32(g)",
        ),
        Shape::DishedEnd {
            form: DishedForm::TwoToOneEllipsoidal,
            ..
        } => "code form of the 2:1 ellipsoid, UG-32(d), with each strength",
        Shape::DishedEnd {
            form: DishedForm::Torispherical,
            ..
        } => "code form of the torisphere, UG-32(e) and appendix 1-4, with each strength",
        Shape::FlatEnd { .. } => {
            "circular plate (Roark), elastic bending with each strength; code form: UG-34, C = 0.33"
        }
        Shape::PlateEnd { .. } => "rectangular plate (Roark), elastic bending with each strength",
        Shape::Box { pillars: None, .. } => {
            "rectangular plates (Roark), the worse of clamped and supported edges, with the pull of the neighbouring faces"
        }
        Shape::Box { .. } => {
            "rectangular plates (Roark) between the pillars, the faces at the sides, and the pull on a pillar"
        }
        Shape::FlattenedTube { .. } => {
            "thin ring of two flat sides and two half circles, elastic bending and pull with each strength"
        }
        Shape::Annulus { .. } => {
            "the outer tube as a tube; the core as a tube under outside pressure (Windenburg and Trilling, Timoshenko)"
        }
        Shape::Bellows { .. } | Shape::Fitting { .. } => RATED,
        Shape::Insert { .. } | Shape::Wick(_) => "none: it has no wall",
    }
}

/// Under outside pressure.
pub(super) const fn outside(shape: &Shape) -> &'static str {
    match shape {
        Shape::Tube { .. } | Shape::Capillary { .. } => {
            "elastic collapse: Windenburg and Trilling, or the long tube; yield with its ovality: Timoshenko"
        }
        Shape::Annulus { .. } => {
            "the outer tube as a tube under outside pressure; the core as a tube under inside pressure"
        }
        Shape::ConeFrustum { .. } => {
            "as the tube of UG-33(f): Windenburg and Trilling; yield with its ovality: Timoshenko"
        }
        Shape::Sphere { .. } => {
            "elastic collapse of the sphere times 0.2; yield on the mean radius"
        }
        Shape::Bulb { .. } => "the weaker of its sphere and its neck as tubes and spheres collapse",
        Shape::DishedEnd { .. } => {
            "as the sphere of its crown (UG-33), elastic collapse times 0.2; yield on the mean radius"
        }
        Shape::FlatEnd { .. }
        | Shape::PlateEnd { .. }
        | Shape::Box { .. }
        | Shape::FlattenedTube { .. } => "bending as under inside pressure, by yield",
        Shape::Bellows { .. } | Shape::Fitting { .. } => RATED,
        Shape::Insert { .. } | Shape::Wick(_) => "none: it has no wall",
    }
}

const fn pick(glass: bool, of_glass: &'static str, of_metal: &'static str) -> &'static str {
    if glass { of_glass } else { of_metal }
}
