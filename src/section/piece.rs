//! A piece of a device: one stretch along its axis with an exact inside profile.

use std::f64::consts::PI;

use super::cut::{circle_below_m2, obround_below_m2, rectangle_below_m2};
use super::lining::Layer;
use super::stretch::Stretch;

/// One stretch of a device. Lengths count from the piece's own beginning.
#[derive(Debug, Clone, PartialEq)]
pub struct Piece {
    pub form: Form,
    /// Where it begins on the axis of the device.
    pub start_m: f64,
    pub wall_m: f64,
    /// Wicks on the inside of the wall, the outermost first.
    pub layers: Vec<Layer>,
    /// Share of the inside that inserts and solids of wicks take, evenly; below 0 where
    /// grooves in the wall add more than that.
    pub solid_share: f64,
    /// Index in [`crate::chamber::Chamber::parts`].
    pub part: usize,
    /// Name, kind and sizes, a line each.
    pub text: String,
}

/// The inside of a piece. In the plane of the drawing it is as high as it is wide
/// on the other side of the axis.
#[derive(Debug, Clone, PartialEq)]
pub enum Form {
    /// A solid of revolution; the stretches follow one another from 0.
    Round(Vec<Stretch>),
    /// Corrugated; counts as a cylinder of the mean diameter.
    Bellows {
        root_m: f64,
        crest_m: f64,
        length_m: f64,
    },
    /// A box: its ends are walls.
    Slab {
        length_m: f64,
        height_m: f64,
        depth_m: f64,
    },
    /// A flattened tube: `height_m` in the plane of the drawing, `across_m` square to it.
    Obround {
        length_m: f64,
        height_m: f64,
        across_m: f64,
    },
    /// Between a tube and a core tube, whose own inside is not the device's.
    Annulus {
        length_m: f64,
        inside_m: f64,
        /// Outside diameter of the core, and its wall.
        core_m: f64,
        core_wall_m: f64,
    },
    /// A flat end: a wall without inside.
    Plate { height_m: f64 },
}

/// Which end of a piece.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Side {
    First,
    Last,
}

impl Piece {
    /// Without wall, wick, inserts or text.
    pub const fn bare(form: Form, part: usize) -> Self {
        Self {
            form,
            start_m: 0.0,
            wall_m: 0.0,
            layers: Vec::new(),
            solid_share: 0.0,
            part,
            text: String::new(),
        }
    }

    /// What liquid and vapour have of the inside.
    pub fn volume_m3(&self) -> f64 {
        self.open_share() * self.form.volume_to_m3(self.form.length_m())
    }

    pub const fn open_share(&self) -> f64 {
        1.0 - self.solid_share
    }

    /// Thickness of all wicks that line the wall inside the bore.
    pub fn lining_m(&self) -> f64 {
        self.layers.iter().map(Layer::inward_m).sum()
    }
}

impl Form {
    pub fn length_m(&self) -> f64 {
        match self {
            Self::Round(stretches) => stretches.last().map_or(0.0, |last| last.to_m),
            Self::Bellows { length_m, .. }
            | Self::Slab { length_m, .. }
            | Self::Obround { length_m, .. }
            | Self::Annulus { length_m, .. } => *length_m,
            Self::Plate { .. } => 0.0,
        }
    }

    /// Half the height in the plane of the drawing, at a place along the axis.
    pub fn half_height_m(&self, x_m: f64) -> f64 {
        match self {
            Self::Round(stretches) => stretches
                .iter()
                .find(|stretch| x_m <= stretch.to_m)
                .or(stretches.last())
                .map_or(0.0, |stretch| stretch.radius_m(x_m)),
            Self::Bellows {
                root_m, crest_m, ..
            } => 0.25 * (root_m + crest_m),
            Self::Slab { height_m, .. }
            | Self::Obround { height_m, .. }
            | Self::Plate { height_m } => 0.5 * height_m,
            Self::Annulus { inside_m, .. } => 0.5 * inside_m,
        }
    }

    /// Cross-section at a place along the axis below the height `y_m` over the axis.
    pub fn area_below_m2(&self, x_m: f64, y_m: f64) -> f64 {
        match self {
            Self::Round(_) | Self::Bellows { .. } => circle_below_m2(self.half_height_m(x_m), y_m),
            Self::Slab {
                height_m, depth_m, ..
            } => rectangle_below_m2(*height_m, *depth_m, y_m),
            Self::Obround {
                height_m, across_m, ..
            } => obround_below_m2(*height_m, *across_m, y_m),
            Self::Annulus {
                inside_m, core_m, ..
            } => circle_below_m2(0.5 * inside_m, y_m) - circle_below_m2(0.5 * core_m, y_m),
            Self::Plate { .. } => 0.0,
        }
    }

    /// Volume of the inside from the beginning to a place along the axis, exact.
    pub fn volume_to_m3(&self, x_m: f64) -> f64 {
        match self {
            Self::Round(stretches) => stretches.iter().map(|s| s.volume_to_m3(x_m)).sum(),
            _ => self.area_below_m2(0.0, f64::INFINITY) * x_m.clamp(0.0, self.length_m()),
        }
    }

    /// Places between which a plane cuts the piece smoothly, both ends included; in the
    /// drawing the plane is the line y = α + β x.
    pub(super) fn smooth_parts(&self, alpha_m: f64, beta: f64) -> Vec<f64> {
        let length_m = self.length_m();
        let mut places = vec![0.0, length_m];
        if let Self::Round(stretches) = self {
            for stretch in stretches {
                places.push(stretch.to_m);
                places.extend(stretch.meets(alpha_m, beta));
            }
        } else {
            let kinks = self.kinks_m();
            places.extend(
                kinks
                    .iter()
                    .flat_map(|y| [*y, -y])
                    .map(|y| (y - alpha_m) / beta)
                    .filter(|x| *x > 0.0 && *x < length_m),
            );
        }
        places.sort_by(f64::total_cmp);
        places.dedup();
        places
    }

    /// Heights at which the cross-section of a prism has a kink.
    fn kinks_m(&self) -> Vec<f64> {
        let half = self.half_height_m(0.0);
        match self {
            Self::Annulus { core_m, .. } => vec![half, 0.5 * core_m],
            Self::Obround {
                height_m, across_m, ..
            } => vec![half, 0.5 * (height_m - across_m).max(0.0)],
            _ => vec![half],
        }
    }

    /// Greatest value of x·`along` + |y|·`across` in the piece.
    pub(super) fn reach_m(&self, along: f64, across: f64) -> f64 {
        match self {
            Self::Round(stretches) => stretches
                .iter()
                .map(|stretch| stretch.reach_m(along, across))
                .fold(f64::NEG_INFINITY, f64::max),
            _ => (along * self.length_m()).max(0.0) + across * self.half_height_m(0.0),
        }
    }

    /// Size of the way out at one end: the greatest circle that passes; nothing for what
    /// comes to a point there.
    pub fn mouth_m(&self, side: Side) -> f64 {
        match self {
            Self::Slab {
                height_m, depth_m, ..
            } => height_m.min(*depth_m),
            Self::Obround {
                height_m, across_m, ..
            } => height_m.min(*across_m),
            _ => 2.0 * self.edge_m(side),
        }
    }

    /// Half the height at one end, as drawn.
    pub fn edge_m(&self, side: Side) -> f64 {
        match (self, side) {
            (Self::Bellows { root_m, .. }, _) => 0.5 * root_m,
            (_, Side::First) => self.half_height_m(0.0),
            (_, Side::Last) => self.half_height_m(self.length_m()),
        }
    }

    /// Bore of a piece that is alike along its whole length, with its cross-section.
    pub(super) fn prism(&self) -> Option<(f64, f64)> {
        let alike = match self {
            Self::Round(stretches) => match stretches.as_slice() {
                [one] => one.radius_m(one.from_m) == one.radius_m(one.to_m) && one.is_straight(),
                _ => false,
            },
            Self::Plate { .. } | Self::Bellows { .. } => false,
            _ => true,
        };
        alike.then(|| {
            (
                self.mouth_m(Side::First),
                self.area_below_m2(0.0, f64::INFINITY),
            )
        })
    }

    /// The same prism, of another length.
    pub(super) fn cut_to(&self, to_m: f64) -> Self {
        let mut cut = self.clone();
        match &mut cut {
            Self::Round(stretches) => {
                for stretch in stretches {
                    stretch.to_m = to_m;
                }
            }
            Self::Bellows { length_m, .. }
            | Self::Slab { length_m, .. }
            | Self::Obround { length_m, .. }
            | Self::Annulus { length_m, .. } => *length_m = to_m,
            Self::Plate { .. } => {}
        }
        cut
    }

    /// Seen from the other end.
    pub fn reversed(&self) -> Self {
        match self {
            Self::Round(stretches) => {
                let length_m = self.length_m();
                Self::Round(
                    stretches
                        .iter()
                        .rev()
                        .map(|stretch| stretch.reversed(length_m))
                        .collect(),
                )
            }
            other => other.clone(),
        }
    }

    /// Points of inside and outside of the upper wall, as [`Stretch::drawn`] gives them.
    pub fn drawn(&self, wall_m: f64) -> Vec<([f64; 2], [f64; 2])> {
        match self {
            Self::Round(stretches) => stretches.iter().flat_map(|s| s.drawn(wall_m)).collect(),
            Self::Bellows {
                root_m,
                crest_m,
                length_m,
            } => corrugated(*root_m, *crest_m, *length_m)
                .map(|[x, r]| ([x, r], [x, r + wall_m]))
                .collect(),
            _ => [0.0, self.length_m()]
                .map(|x| {
                    let r = self.half_height_m(x);
                    ([x, r], [x, r + wall_m])
                })
                .to_vec(),
        }
    }
}

/// Waves about as long as they are high, foot at both ends.
fn corrugated(root_m: f64, crest_m: f64, length_m: f64) -> impl Iterator<Item = [f64; 2]> {
    const POINTS: usize = 16;
    let wave_m = (crest_m - root_m).abs().max(1e-9);
    let waves = (length_m / wave_m).round().clamp(2.0, 40.0) as usize;
    (0..=waves * POINTS).map(move |i| {
        let share = i as f64 / (waves * POINTS) as f64;
        let rise = 0.5 - 0.5 * (2.0 * PI * i as f64 / POINTS as f64).cos();
        [share * length_m, 0.5 * (root_m + (crest_m - root_m) * rise)]
    })
}
