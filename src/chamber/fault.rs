//! Contradictions in a chamber: data about data, never a panic.

use super::materials::Materials;
use super::part::{Part, Wall};
use super::shape::Shape;
use super::{Chamber, ChamberError};

/// What contradicts itself; `part` is an index in [`Chamber::parts`], `dimension` the
/// name that [`Shape::dimensions`] gives it, or [`ChamberFault::THICKNESS`].
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
    WallMissing {
        part: usize,
    },
    WallOnInsert {
        part: usize,
    },
    WallThickerThanBore {
        part: usize,
    },
    UnknownMaterial {
        part: usize,
        material: String,
    },
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
            | Self::NothingLeftAtWorst => None,
            Self::CountZero { part }
            | Self::ZeroDimension { part, .. }
            | Self::ToleranceLargerThanDimension { part, .. }
            | Self::WallMissing { part }
            | Self::WallOnInsert { part }
            | Self::WallThickerThanBore { part }
            | Self::UnknownMaterial { part, .. } => Some(*part),
        }
    }
}

pub(super) fn faults(chamber: &Chamber, materials: &Materials) -> Vec<ChamberFault> {
    let mut faults = Vec::new();
    match chamber.volumes() {
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
    }
    // Also where the volume is measured: without parts there is no wall to judge.
    if chamber.parts.is_empty() {
        faults.push(ChamberFault::NoParts);
    }
    for (index, part) in chamber.parts.iter().enumerate() {
        of_part(index, part, materials, &mut faults);
    }
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
        if nominal_m == 0.0 && !closes_a_cone(&data.shape, dimension) {
            faults.push(ChamberFault::ZeroDimension { part, dimension });
        } else if nominal_m > 0.0 && tolerance_m >= nominal_m {
            faults.push(ChamberFault::ToleranceLargerThanDimension { part, dimension });
        }
    }
    match (&data.wall, data.shape.is_insert()) {
        (Some(_), true) => faults.push(ChamberFault::WallOnInsert { part }),
        (None, false) => faults.push(ChamberFault::WallMissing { part }),
        (Some(wall), false) => of_wall(part, wall, &data.shape, materials, faults),
        (None, true) => {}
    }
}

fn of_wall(
    part: usize,
    wall: &Wall,
    shape: &Shape,
    materials: &Materials,
    faults: &mut Vec<ChamberFault>,
) {
    if shape
        .bore_m()
        .is_some_and(|bore_m| wall.thickness.nominal.metre() > bore_m)
    {
        faults.push(ChamberFault::WallThickerThanBore { part });
    }
    if materials.get(&wall.material).is_none() {
        faults.push(ChamberFault::UnknownMaterial {
            part,
            material: wall.material.clone(),
        });
    }
}

/// One end of a cone may come to a point.
fn closes_a_cone(shape: &Shape, dimension: &str) -> bool {
    let Shape::ConeFrustum {
        first_diameter,
        second_diameter,
        ..
    } = shape
    else {
        return false;
    };
    dimension.ends_with("diameter")
        && (first_diameter.nominal.metre() > 0.0 || second_diameter.nominal.metre() > 0.0)
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
        let whole = chamber.volumes().expect("a volume").nominal.cubic_metre();
        let ends = chamber.parts[1].volumes().nominal_m3;
        for (_, dimension) in chamber.parts[1].shape.dimensions_mut() {
            dimension.nominal = length_m(0.0);
        }
        let faults = chamber.faults(&Materials::built_in());
        assert!(faults.iter().all(|fault| fault.part() == Some(1)) && !faults.is_empty());
        let left = chamber.volumes().expect("a volume").nominal.cubic_metre();
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
