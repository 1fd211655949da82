//! What the sizes of one shape contradict.

use super::WickError;
use super::dimension::{Dimension, Pick};
use super::shape::Shape;
use super::wick::{Lies, WickForm};

/// Sizes of one shape that do not go together.
#[derive(Debug, Clone, Copy, PartialEq, thiserror::Error)]
pub enum ShapeFault {
    #[error("the neck is as wide as the bulb: draw it as a tube")]
    NeckAsWideAsBulb,
    #[error("the width is below the height: swap them")]
    NarrowerThanHigh,
    #[error("the core fills the bore")]
    CoreFillsBore,
    #[error("the wall of the core is thicker than the core")]
    CoreWallFillsCore,
    #[error("the convolutions are no wider at their crest than at their root")]
    CrestWithinRoot,
    #[error("the stroke is longer than the bellows")]
    StrokeLongerThanBellows,
    #[error("the bend is tighter than the tube is wide")]
    BendTighterThanTube,
    #[error("the pillars leave no room between them")]
    PillarsTouch,
    #[error("the wick is thicker than the bore leaves room for")]
    WickThickerThanBore,
    #[error("the wick is wider than any part that could hold it")]
    WickWiderThanAnyPart,
    #[error("{0}")]
    Wick(WickError),
    /// Of what must be at least one.
    #[error("{0} is 0")]
    NoneOf(&'static str),
}

/// What the nominal sizes of one shape contradict.
pub(super) fn of_shape(shape: &Shape) -> Option<ShapeFault> {
    let m = |dimension: &Dimension| dimension.nominal.metre();
    let fault = |wrong: bool, why: ShapeFault| wrong.then_some(why);
    match shape {
        Shape::Tube {
            inside_diameter,
            course,
            ..
        } => {
            let radius_m = course.least_radius_m()?;
            let tight = radius_m > 0.0 && radius_m <= 0.5 * m(inside_diameter);
            fault(tight, ShapeFault::BendTighterThanTube)
        }
        Shape::Bulb {
            inside_diameter,
            neck_diameter,
            ..
        } => fault(
            m(neck_diameter) >= m(inside_diameter) && m(inside_diameter) > 0.0,
            ShapeFault::NeckAsWideAsBulb,
        ),
        Shape::FlattenedTube { width, height, .. } => {
            fault(m(width) < m(height), ShapeFault::NarrowerThanHigh)
        }
        Shape::Annulus {
            inside_diameter,
            core_diameter,
            core_thickness,
            ..
        } => fault(
            m(core_diameter) >= m(inside_diameter) && m(inside_diameter) > 0.0,
            ShapeFault::CoreFillsBore,
        )
        .or_else(|| {
            fault(
                2.0 * m(core_thickness) > m(core_diameter),
                ShapeFault::CoreWallFillsCore,
            )
        }),
        Shape::Bellows {
            root_diameter,
            crest_diameter,
            length,
            stroke,
        } => fault(
            m(crest_diameter) <= m(root_diameter) && m(root_diameter) > 0.0,
            ShapeFault::CrestWithinRoot,
        )
        .or_else(|| fault(m(stroke) > m(length), ShapeFault::StrokeLongerThanBellows)),
        Shape::Box {
            width,
            depth,
            pillars: Some(pillars),
            ..
        } => {
            let (across, along) = pillars.cell_m(m(width), m(depth));
            let diameter_m = m(&pillars.diameter);
            fault(
                diameter_m > 0.0 && across.min(along) <= diameter_m,
                ShapeFault::PillarsTouch,
            )
        }
        Shape::Wick(wick) => {
            if let Some(Lies::Lining { bore, .. }) = wick.lies()
                && let Some(thickness_m) = wick.thickness_m(Pick::Nominal)
                && m(bore) > 0.0
                && 2.0 * thickness_m > m(bore)
            {
                return Some(ShapeFault::WickThickerThanBore);
            }
            // What the sizes give only: a size of 0 has a fault of its own.
            let has_sizes = shape.dimensions().iter().all(|(_, size)| m(size) > 0.0)
                || matches!(wick.form, WickForm::Grooves { .. });
            let figures = wick.figures();
            let errors = [
                figures.porosity.err(),
                figures.permeability_m2.err(),
                figures.pore_radius_m.err(),
            ];
            errors
                .into_iter()
                .flatten()
                .next()
                .filter(|_| has_sizes)
                .map(ShapeFault::Wick)
        }
        _ => None,
    }
}

/// One end of a cone may come to a point, a bellows may stand still, a groove may be a V.
pub(super) fn may_be_zero(shape: &Shape, dimension: &str) -> bool {
    match shape {
        Shape::ConeFrustum {
            first_diameter,
            second_diameter,
            ..
        } => {
            dimension.ends_with("diameter")
                && (first_diameter.nominal.metre() > 0.0 || second_diameter.nominal.metre() > 0.0)
        }
        Shape::Bellows { .. } => dimension == "stroke",
        Shape::Wick(_) => dimension == "floor width",
        _ => false,
    }
}
