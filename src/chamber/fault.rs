//! Contradictions in a chamber: data about data, never a panic.

use super::closure::ClosureKind;
use super::contradiction::{self, ShapeFault};
use super::material::MaterialKind;
use super::materials::Materials;
use super::part::{HeatTreatment, Part, Rating, Wall};
use super::shape::{Role, Shape};
use super::water::WaterFillError;
use super::wick::Lies;
use super::{Chamber, ChamberError};

/// What contradicts itself; `part` is an index in [`Chamber::parts`], one past its end for
/// the closure; `dimension` the name that [`Shape::dimensions`] gives it, or
/// [`ChamberFault::THICKNESS`].
#[derive(Debug, Clone, PartialEq)]
pub enum ChamberFault {
    NoParts,
    ZeroVolume,
    InsertsTooLarge {
        cavity_m3: f64,
        inserts_m3: f64,
    },
    TooLarge {
        volume_m3: f64,
    },
    WaterFill(WaterFillError),
    /// A volume stated as measured and a weighed fill beside it.
    MeasuredTwice,
    /// There is a volume, but not at the worst corner of the tolerances.
    NothingLeftAtWorst,
    CountZero {
        part: usize,
    },
    ZeroDimension {
        part: usize,
        dimension: &'static str,
    },
    /// The tolerance leaves nothing of the dimension.
    ToleranceLargerThanDimension {
        part: usize,
        dimension: &'static str,
    },
    /// The sizes of one shape do not go together.
    Shape {
        part: usize,
        why: ShapeFault,
    },
    WallMissing {
        part: usize,
    },
    WallOnInsert {
        part: usize,
    },
    WallThickerThanBore {
        part: usize,
    },
    /// Tolerance and corrosion allowance leave nothing of the wall.
    WallUsedUp {
        part: usize,
    },
    UnknownMaterial {
        part: usize,
        material: String,
    },
    RatingReversed {
        part: usize,
    },
    /// Closed in the flame, and no wall is glass with flame-sealed strength.
    FlameSealWithoutGlass,
}

impl ChamberFault {
    /// The dimension that is not one of the shape's.
    pub const THICKNESS: &'static str = "wall thickness";

    /// Index of the part to mark; `None` where it is the chamber as a whole.
    pub const fn part(&self) -> Option<usize> {
        match self {
            Self::NoParts
            | Self::ZeroVolume
            | Self::InsertsTooLarge { .. }
            | Self::TooLarge { .. }
            | Self::WaterFill(_)
            | Self::MeasuredTwice
            | Self::FlameSealWithoutGlass
            | Self::NothingLeftAtWorst => None,
            Self::CountZero { part }
            | Self::ZeroDimension { part, .. }
            | Self::ToleranceLargerThanDimension { part, .. }
            | Self::Shape { part, .. }
            | Self::WallMissing { part }
            | Self::WallOnInsert { part }
            | Self::WallThickerThanBore { part }
            | Self::WallUsedUp { part }
            | Self::RatingReversed { part }
            | Self::UnknownMaterial { part, .. } => Some(*part),
        }
    }
}

pub(super) fn faults(chamber: &Chamber, materials: &Materials) -> Vec<ChamberFault> {
    let mut faults = Vec::new();
    match chamber.volumes(materials) {
        Ok(volumes) if volumes.least.cubic_metre() == 0.0 => {
            faults.push(ChamberFault::NothingLeftAtWorst);
        }
        Ok(_) | Err(ChamberError::NoParts) => {}
        Err(ChamberError::ZeroVolume) => faults.push(ChamberFault::ZeroVolume),
        Err(ChamberError::InsertsTooLarge {
            cavity_m3,
            inserts_m3,
        }) => {
            faults.push(ChamberFault::InsertsTooLarge {
                cavity_m3,
                inserts_m3,
            });
        }
        Err(ChamberError::TooLarge { volume_m3 }) => {
            faults.push(ChamberFault::TooLarge { volume_m3 });
        }
        Err(ChamberError::WaterFill(error)) => faults.push(ChamberFault::WaterFill(error)),
    }
    if chamber.measured.is_some() && chamber.water_fill.is_some() {
        faults.push(ChamberFault::MeasuredTwice);
    }
    // Also where the volume is measured: without parts there is no wall to judge.
    if chamber.parts.is_empty() {
        faults.push(ChamberFault::NoParts);
    }
    let widest_m = chamber
        .parts
        .iter()
        .filter(|part| part.shape.role() == Role::Cavity)
        .filter_map(|part| part.shape.bore_m())
        .fold(0.0, f64::max);
    for (index, part) in chamber.parts.iter().enumerate() {
        of_part(index, part, materials, &mut faults);
        if let Shape::Wick(wick) = &part.shape
            && let Some(Lies::Lining { bore, .. }) = wick.lies()
            // As the drawing's tolerance goes.
            && bore.least().metre() > widest_m
        {
            let why = ShapeFault::WickWiderThanAnyPart;
            faults.push(ChamberFault::Shape { part: index, why });
        }
    }
    of_closure(chamber, materials, &mut faults);
    faults
}

fn of_part(part: usize, data: &Part, materials: &Materials, faults: &mut Vec<ChamberFault>) {
    if data.count == 0 {
        faults.push(ChamberFault::CountZero { part });
    }
    let mut dimensions = data.shape.dimensions();
    if let Some(wall) = &data.wall {
        dimensions.push((ChamberFault::THICKNESS, &wall.thickness));
    }
    for (dimension, size) in dimensions {
        let (nominal_m, tolerance_m) = (size.nominal.metre(), size.tolerance.metre());
        if nominal_m == 0.0 && !contradiction::may_be_zero(&data.shape, dimension) {
            faults.push(ChamberFault::ZeroDimension { part, dimension });
        } else if nominal_m > 0.0 && tolerance_m >= nominal_m {
            faults.push(ChamberFault::ToleranceLargerThanDimension { part, dimension });
        }
    }
    for (what, count) in data.shape.counts() {
        if count == 0 {
            let why = ShapeFault::NoneOf(what);
            faults.push(ChamberFault::Shape { part, why });
        }
    }
    if let Some(why) = contradiction::of_shape(&data.shape) {
        faults.push(ChamberFault::Shape { part, why });
    }
    match (&data.wall, data.shape.role()) {
        (Some(_), Role::Insert | Role::Wick) => faults.push(ChamberFault::WallOnInsert { part }),
        (None, Role::Cavity | Role::Lid) => faults.push(ChamberFault::WallMissing { part }),
        (Some(wall), Role::Cavity | Role::Lid | Role::Rated) => {
            of_wall(part, wall, &data.shape, faults);
        }
        (None, _) => {}
    }
    if let Some(id) = data.material()
        && materials.get(id).is_none()
    {
        faults.push(ChamberFault::UnknownMaterial {
            part,
            material: id.to_owned(),
        });
    }
    of_rating(part, data.rating.as_ref(), faults);
}

fn of_wall(part: usize, wall: &Wall, shape: &Shape, faults: &mut Vec<ChamberFault>) {
    let thickness_m = wall.thickness.nominal.metre();
    if shape.bore_m().is_some_and(|bore_m| thickness_m > bore_m) {
        faults.push(ChamberFault::WallThickerThanBore { part });
    }
    let allowance_m = wall.corrosion_allowance.metre();
    if allowance_m > 0.0 && thickness_m > 0.0 && wall.least_thickness_m() == 0.0 {
        faults.push(ChamberFault::WallUsedUp { part });
    }
}

fn of_rating(part: usize, rating: Option<&Rating>, faults: &mut Vec<ChamberFault>) {
    if rating.is_some_and(|rating| rating.hottest < rating.coldest) {
        faults.push(ChamberFault::RatingReversed { part });
    }
}

fn of_closure(chamber: &Chamber, materials: &Materials, faults: &mut Vec<ChamberFault>) {
    let Some(closure) = &chamber.closure else {
        return;
    };
    of_rating(chamber.parts.len(), closure.rating.as_ref(), faults);
    let is_flamed_glass = |part: &Part| {
        part.wall.as_ref().is_some_and(|wall| {
            let material = materials.get(&wall.material);
            let glass = material.is_some_and(|m| matches!(m.kind, MaterialKind::Glass(_)));
            glass && wall.treatment == HeatTreatment::FlameSealed
        })
    };
    if closure.kind == ClosureKind::FlameSeal && !chamber.parts.iter().any(is_flamed_glass) {
        faults.push(ChamberFault::FlameSealWithoutGlass);
    }
}

#[cfg(test)]
mod tests {
    use super::super::dimension::length_m;
    use super::super::tests::{TUBE, chamber};
    use super::super::{Dimension, MeasuredVolume};
    use super::*;
    use crate::units::Volume;

    /// Faults of the test chamber after a change to it.
    fn check(change: impl FnOnce(&mut Chamber), expected: &[ChamberFault]) {
        let mut chamber = chamber(TUBE);
        change(&mut chamber);
        assert_eq!(chamber.faults(&Materials::built_in()), expected);
    }

    fn wall(chamber: &mut Chamber) -> &mut Wall {
        chamber.parts[0].wall.as_mut().expect("a wall")
    }

    #[test]
    fn a_sound_chamber_has_none() {
        check(|_| {}, &[]);
    }

    #[test]
    fn each_contradiction_marks_its_part() {
        check(
            |c| c.parts[1].count = 0,
            &[ChamberFault::CountZero { part: 1 }],
        );
        check(
            |c| c.parts[0].wall = None,
            &[ChamberFault::WallMissing { part: 0 }],
        );
        check(
            |c| c.parts[2].wall = c.parts[0].wall.clone(),
            &[ChamberFault::WallOnInsert { part: 2 }],
        );
        check(
            |c| wall(c).thickness.nominal = length_m(0.0111),
            &[ChamberFault::WallThickerThanBore { part: 0 }],
        );
        let dimension = ChamberFault::THICKNESS;
        check(
            |c| wall(c).thickness = Dimension::exact(length_m(0.0)),
            &[ChamberFault::ZeroDimension { part: 0, dimension }],
        );
        check(
            |c| wall(c).thickness.tolerance = length_m(0.0005),
            &[ChamberFault::ToleranceLargerThanDimension { part: 0, dimension }],
        );
        let material = "unobtainium".to_owned();
        check(
            |c| wall(c).material.clone_from(&material),
            &[ChamberFault::UnknownMaterial {
                part: 0,
                material: material.clone(),
            }],
        );
    }

    #[test]
    fn a_faulty_part_leaves_the_rest_standing() {
        let mut chamber = chamber(TUBE);
        let whole = chamber
            .volumes(&Materials::built_in())
            .expect("a volume")
            .nominal
            .cubic_metre();
        let ends = chamber.parts[1].volumes().inside.nominal_m3;
        for (_, dimension) in chamber.parts[1].shape.dimensions_mut() {
            dimension.nominal = length_m(0.0);
        }
        let faults = chamber.faults(&Materials::built_in());
        assert!(faults.iter().all(|fault| fault.part() == Some(1)) && !faults.is_empty());
        let left = chamber
            .volumes(&Materials::built_in())
            .expect("a volume")
            .nominal
            .cubic_metre();
        assert!((left - (whole - ends)).abs() < 1e-15);
    }

    #[test]
    fn the_chamber_as_a_whole_can_be_at_fault() {
        check(|c| c.parts.clear(), &[ChamberFault::NoParts]);
        check(
            |c| {
                c.parts.clear();
                c.measured = Some(MeasuredVolume {
                    volume: Volume::from_cubic_metre(1e-5).expect("a volume"),
                    uncertainty: Volume::from_cubic_metre(1e-5).expect("a volume"),
                });
            },
            &[ChamberFault::NothingLeftAtWorst, ChamberFault::NoParts],
        );
        check(
            |c| {
                c.parts.drain(..2);
            },
            &[ChamberFault::ZeroVolume],
        );
        let mut chamber = chamber(TUBE);
        chamber.parts[2].count = 1000;
        let faults = chamber.faults(&Materials::built_in());
        assert!(
            matches!(faults[..], [ChamberFault::InsertsTooLarge { .. }]),
            "{faults:?}"
        );
    }

    #[test]
    fn a_cone_may_close_to_a_point_but_not_to_a_line() {
        let cone = |second: f64| {
            let shape = Shape::ConeFrustum {
                first_diameter: Dimension::exact(length_m(0.0)),
                second_diameter: Dimension::exact(length_m(second)),
                length: Dimension::exact(length_m(0.02)),
            };
            let mut chamber = chamber(TUBE);
            chamber.parts.truncate(1);
            chamber.parts[0].shape = shape;
            chamber.faults(&Materials::built_in()).len()
        };
        assert_eq!((cone(0.01), cone(0.0)), (0, 4));
    }
}
