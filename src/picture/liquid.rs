//! The liquid of a section: pools, slugs, and what is in the wick.

use super::pattern::pattern_turn;
use super::plane::{self, Cut, Point, below, hatched, outside};
use super::section::{Drawing, Filling, Hold, View, body_outline, core};
use super::{Area, Paint, Stroke};
use crate::section::{Lies, Piece, Tilt};

impl Drawing<'_> {
    /// `inside` is the inside of the device, in its own plane.
    pub(super) fn liquid(&mut self, inside: &[Point], filling: &Filling, view: &View) {
        let paint = if filling.frozen {
            Paint::Frozen
        } else {
            Paint::Liquid
        };
        let whole_m3 = self.device.volume_m3();
        let liquid_m3 = filling.liquid_m3.clamp(0.0, whole_m3);
        let tilt = Tilt::new(view.tilt_deg);
        let up = Point::new(tilt.sin, tilt.cos);
        // Frozen or held in slugs, no level stands in the wick either.
        let mut level_m = f64::NEG_INFINITY;
        let cuts = if liquid_m3 <= 0.0 {
            Vec::new()
        } else {
            match filling.hold {
                Hold::Gravity => {
                    level_m = self.device.level_m(view.tilt_deg, liquid_m3);
                    vec![below(inside, up, level_m)]
                }
                Hold::Slugs(count) => self.slugs(inside, liquid_m3, count),
            }
        };
        for cut in &cuts {
            for pool in &cut.pools {
                self.area(pool, paint);
            }
        }
        self.linings(paint, filling.wet_share.clamp(0.0, 1.0), view, level_m);
        if liquid_m3 < whole_m3 {
            let surfaces: Vec<[Point; 2]> = cuts.into_iter().flat_map(|cut| cut.surfaces).collect();
            let is_level = filling.hold == Hold::Gravity && !filling.frozen;
            self.surfaces(inside, surfaces, up, is_level);
        }
    }

    /// Slugs of the same volume in the middle of as many equal shares of the device.
    fn slugs(&self, inside: &[Point], liquid_m3: f64, count: usize) -> Vec<Cut> {
        let count = count.clamp(1, 200);
        let share_m3 = self.device.volume_m3() / count as f64;
        let slug_m3 = liquid_m3 / count as f64;
        let axis = Point::new(1.0, 0.0);
        (0..count)
            .flat_map(|i| {
                let middle_m3 = share_m3 * (i as f64 + 0.5);
                let from = self.device.along_m(middle_m3 - 0.5 * slug_m3);
                let to = self.device.along_m(middle_m3 + 0.5 * slug_m3);
                let begun = below(inside, Point::new(-1.0, 0.0), -from);
                let mut cuts: Vec<Cut> = begun
                    .pools
                    .iter()
                    .map(|pool| below(pool, axis, to))
                    .collect();
                if let Some(first) = cuts.first_mut() {
                    first.surfaces.extend(begun.surfaces);
                }
                cuts
            })
            .collect()
    }

    /// Free surfaces, but for what solids and cores hide of them.
    fn surfaces(
        &mut self,
        inside: &[Point],
        mut surfaces: Vec<[Point; 2]>,
        up: Point,
        is_level: bool,
    ) {
        let hidden: Vec<Vec<Point>> = self
            .device
            .bodies
            .iter()
            .map(body_outline)
            .chain(
                self.device
                    .pieces
                    .iter()
                    .filter_map(|piece| core(piece, 0.0)),
            )
            .collect();
        for shape in &hidden {
            surfaces = surfaces
                .into_iter()
                .flat_map(|surface| outside(surface, shape))
                .collect();
        }
        for surface in &surfaces {
            self.line(surface, false, Stroke::Level);
        }
        if is_level {
            self.level_sign(inside, surfaces, up);
        }
    }

    /// A triangle that stands on the widest surface, where there is room for it.
    fn level_sign(&mut self, inside: &[Point], surfaces: Vec<[Point; 2]>, up: Point) {
        let length = |[a, b]: [Point; 2]| (a.x - b.x).hypot(a.y - b.y);
        let em = self.picture.em_m;
        let Some([a, b]) = surfaces
            .into_iter()
            .max_by(|a, b| length(*a).total_cmp(&length(*b)))
        else {
            return;
        };
        let along = Point::new(b.x - a.x, b.y - a.y);
        let sign = |share: f64| {
            let foot = a.plus(along, share);
            let head = foot.plus(up, 0.7 * em);
            let side = up.left();
            [foot, head.plus(side, 0.4 * em), head.plus(side, -0.4 * em)]
        };
        let free = |sign: &[Point; 3]| {
            let room = |p: Point| plane::inside(inside, p);
            let [foot, left, right] = *sign;
            [foot, left, right]
                .map(|p| p.plus(up, 0.15 * em))
                .into_iter()
                .all(room)
        };
        let found = [0.75, 0.25, 0.5, 0.9, 0.1].map(sign).into_iter().find(free);
        if let Some(sign) = found {
            self.line(&sign, true, Stroke::Level);
        }
    }

    /// Wicks: dry, wet from the wall as far as they are, and wet below the level.
    fn linings(&mut self, paint: Paint, wet_share: f64, view: &View, level_m: f64) {
        let tilt = Tilt::new(view.tilt_deg);
        let up = Point::new(tilt.sin, tilt.cos);
        for piece in &self.device.pieces {
            let mut off = 0.0;
            for layer in &piece.layers {
                let t = layer.thickness_m;
                let (from, to) = match layer.lies {
                    Lies::OnTheWall => (off, off + t),
                    Lies::InTheWall => (-t, 0.0),
                };
                off += layer.inward_m();
                for side in [1.0, -1.0] {
                    let dry = band(piece, from, to, side);
                    self.area(&dry, Paint::Wick);
                    let wet = band(piece, from, from + wet_share * (to - from), side);
                    if wet_share > 0.0 {
                        self.area(&wet, paint);
                    }
                    for pool in below(&dry, up, level_m).pools {
                        self.area(&pool, paint);
                    }
                    // The pattern of the wick goes over both.
                    let outline = self.frame.polygon(&dry);
                    let area = Area {
                        outline,
                        paint: Paint::Wick,
                    };
                    for (angle, distance) in Paint::Wick.pattern() {
                        let angle = pattern_turn(Paint::Wick, *angle, view);
                        let strokes = hatched(&area, angle, distance * self.picture.em_m);
                        self.picture.hatches.extend(strokes);
                    }
                    let edge = |k: f64| Point::new(k, side * inner_edge(piece, to, k));
                    let ends = [0.0, piece.form.length_m()];
                    let points = ends.map(|x| edge(x).plus(Point::new(1.0, 0.0), piece.start_m));
                    self.line(&points, false, Stroke::Joint);
                    self.spot(&dry, &layer.text);
                }
            }
        }
    }
}

fn inner_edge(piece: &Piece, off: f64, x: f64) -> f64 {
    (piece.form.half_height_m(x) - off).max(0.0)
}

/// A band along the wall between two distances inward of the bore, on one side.
fn band(piece: &Piece, from: f64, to: f64, side: f64) -> Vec<Point> {
    let edge = piece.form.drawn(0.0);
    let at = |off: f64| {
        edge.iter()
            .map(move |([x, r], _)| Point::new(piece.start_m + x, side * (r - off).max(0.0)))
    };
    let mut points: Vec<Point> = at(to).collect();
    points.extend(at(from).collect::<Vec<_>>().into_iter().rev());
    points
}
