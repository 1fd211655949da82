//! The section of a device with its liquid, to scale.

use super::marks;
use super::outline::{inner, outer, outer_at};
use super::plane::{self, Cut, Point, below, hatched, outside};
use super::{Area, Bounds, Hatch, HotSpot, Line, Paint, Picture, Stroke};
use crate::section::{Body, BodyOutline, Device, Form, Lies, Made, Piece, Side, Tilt};
use crate::units::Units;

/// What is in the device.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Filling {
    /// Liquid outside the wick, of the device's own volume: its share of the chamber's
    /// volume times [`Device::volume_m3`].
    pub liquid_m3: f64,
    pub hold: Hold,
    /// How much of the wick's thickness is wet, 0 to 1, from the wall.
    pub wet_share: f64,
    pub frozen: bool,
}

/// What holds the liquid in its place.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Hold {
    Gravity,
    /// Capillary forces in a narrow loop: so many slugs, evenly spread.
    Slugs(usize),
}

/// How the device is held and how it is looked at.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct View {
    /// Of the axis out of the horizontal; 90 stands, the first part lowest.
    pub tilt_deg: f64,
    /// Of the whole picture to the left, to fit a long device; down turns with it.
    pub turn_deg: f64,
}

/// From the device's own plane, along and over the axis, to that of the picture.
pub(super) struct Frame {
    pub(super) along: Point,
}

impl Frame {
    pub(super) fn place(&self, [x, y]: [f64; 2]) -> Point {
        Point::new(0.0, 0.0)
            .plus(self.along, x)
            .plus(self.along.left(), y)
    }

    fn polygon(&self, points: &[Point]) -> Vec<Point> {
        points.iter().map(|p| self.place([p.x, p.y])).collect()
    }
}

/// The section of a device: walls, liquid where it is held, wicks, inserts, the marks
/// around it. To scale, whatever the shape.
pub fn section(
    device: &Device,
    filling: &Filling,
    view: &View,
    title: &str,
    units: &Units,
) -> Picture {
    let frame = Frame {
        along: Point::direction(view.tilt_deg + view.turn_deg),
    };
    let (inside, outside) = (inner(device), outer(device));
    let mut bounds = Bounds::nothing();
    for [x, r] in outside.iter().chain(&inside) {
        bounds.take(frame.place([*x, *r]));
        bounds.take(frame.place([*x, -r]));
    }
    let em_m = (bounds.width().max(bounds.height()) / 50.0).max(1e-9);
    let mut drawing = Drawing {
        picture: Picture {
            title: title.to_owned(),
            areas: Vec::new(),
            hatches: Vec::new(),
            lines: Vec::new(),
            labels: Vec::new(),
            spots: Vec::new(),
            key: Vec::new(),
            bounds,
            em_m,
        },
        frame,
        device,
    };
    drawing.walls(&inside, &outside);
    drawing.liquid(&mirrored(&inside), filling, view);
    drawing.solids();
    drawing.centre(&outside);
    drawing.hatch(view);
    let Drawing {
        mut picture, frame, ..
    } = drawing;
    marks::add(&mut picture, &frame, device, &outside, view, units);
    picture
}

struct Drawing<'a> {
    picture: Picture,
    frame: Frame,
    device: &'a Device,
}

impl Drawing<'_> {
    /// `points` in the device's own plane.
    fn area(&mut self, points: &[Point], paint: Paint) {
        if points.len() > 2 {
            let outline = self.frame.polygon(points);
            self.picture.areas.push(Area { outline, paint });
        }
    }

    fn line(&mut self, points: &[Point], closed: bool, stroke: Stroke) {
        let points = self.frame.polygon(points);
        self.picture.lines.push(Line {
            points,
            closed,
            stroke,
        });
    }

    fn spot(&mut self, points: &[Point], text: &str) {
        let outline = self.frame.polygon(points);
        self.picture.spots.push(HotSpot {
            outline,
            text: text.to_owned(),
        });
    }

    fn walls(&mut self, inside: &[[f64; 2]], outside: &[[f64; 2]]) {
        let (inside, wall) = (mirrored(inside), mirrored(outside));
        self.area(&wall, Paint::Wall);
        self.area(&inside, Paint::Vapour);
        self.line(&wall, true, Stroke::Outline);
        self.line(&inside, true, Stroke::Outline);
        for i in 0..self.device.pieces.len() {
            self.joint(i, outside);
            let piece = &self.device.pieces[i];
            let (mut from, mut to) = (piece.start_m, piece.start_m + piece.form.length_m());
            if let Form::Plate { .. } = piece.form {
                // Outward of its place, half and half where it parts the inside.
                let t = piece.wall_m;
                let first = i == 0;
                let last = i + 1 == self.device.pieces.len();
                from -= if first {
                    t
                } else if last {
                    0.0
                } else {
                    0.5 * t
                };
                to += if last {
                    t
                } else if first {
                    0.0
                } else {
                    0.5 * t
                };
                if !first && !last {
                    let r = 0.5 * piece.form.mouth_m(Side::First);
                    let plate = mirrored(&[[from, r], [to, r]]);
                    self.area(&plate, Paint::Wall);
                    self.line(&plate, true, Stroke::Outline);
                }
            }
            let shape: Vec<[f64; 2]> = std::iter::once([from, outer_at(outside, from)])
                .chain(
                    outside
                        .iter()
                        .copied()
                        .filter(|[x, _]| *x > from && *x < to),
                )
                .chain([[to, outer_at(outside, to)]])
                .collect();
            let text = piece.text.clone();
            self.spot(&mirrored(&shape), &text);
        }
    }

    /// A line across the wall where one part ends and another begins.
    fn joint(&mut self, i: usize, outside: &[[f64; 2]]) {
        let Some(before) = i.checked_sub(1).map(|i| &self.device.pieces[i]) else {
            return;
        };
        let piece = &self.device.pieces[i];
        if before.part == piece.part {
            return;
        }
        let x = piece.start_m;
        let ends = [
            before.form.edge_m(Side::Last),
            piece.form.edge_m(Side::First),
        ];
        let from = ends[0].min(ends[1]);
        let thick = before.wall_m.max(piece.wall_m);
        let to = outer_at(outside, x).min(ends[0].max(ends[1]) + thick);
        for side in [1.0, -1.0] {
            let points = [Point::new(x, side * from), Point::new(x, side * to)];
            self.line(&points, false, Stroke::Joint);
        }
    }

    fn liquid(&mut self, inside: &[Point], filling: &Filling, view: &View) {
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

    /// Cores and inserts, over the liquid.
    fn solids(&mut self) {
        for piece in &self.device.pieces {
            let Some(outline) = core(piece, 0.0) else {
                continue;
            };
            self.area(&outline, Paint::Wall);
            self.line(&outline, true, Stroke::Outline);
            if let Form::Annulus { core_wall_m, .. } = piece.form
                && let Some(hollow) = core(piece, core_wall_m)
            {
                self.area(&hollow, Paint::Outside);
                self.line(&hollow, true, Stroke::Outline);
            }
        }
        for body in &self.device.bodies {
            let outline = body_outline(body);
            let paint = match body.made {
                Made::Solid => Paint::Insert,
                Made::Porous => Paint::Wick,
            };
            self.area(&outline, paint);
            self.line(&outline, true, Stroke::Outline);
            self.spot(&outline, &body.text);
        }
    }

    fn centre(&mut self, outside: &[[f64; 2]]) {
        let over = 0.8 * self.picture.em_m;
        if let (Some(first), Some(last)) = (outside.first(), outside.last()) {
            let points = [first[0] - over, last[0] + over].map(|x| Point::new(x, 0.0));
            self.line(&points, false, Stroke::Centre);
        }
    }

    /// Patterns of all but the wick's layers, which have theirs already.
    fn hatch(&mut self, view: &View) {
        let em = self.picture.em_m;
        let mut strokes = Vec::new();
        let areas = &self.picture.areas;
        for (i, area) in areas.iter().enumerate() {
            if area.paint == Paint::Wick && !self.porous(area) {
                continue;
            }
            // Shorter where something lies over them.
            let over: Vec<&Area> = areas[i + 1..]
                .iter()
                .filter(|a| matches!(a.paint, Paint::Insert | Paint::Wall | Paint::Wick))
                .collect();
            for (angle, distance) in area.paint.pattern() {
                for stroke in hatched(area, pattern_turn(area.paint, *angle, view), distance * em) {
                    let mut left = vec![stroke.ends];
                    for a in &over {
                        left = left
                            .into_iter()
                            .flat_map(|ends| outside(ends, &a.outline))
                            .collect();
                    }
                    strokes.extend(left.into_iter().map(|ends| Hatch { ends, ..stroke }));
                }
            }
        }
        self.picture.hatches.splice(0..0, strokes);
    }

    /// Whether a wick's area is a body and no layer.
    fn porous(&self, area: &Area) -> bool {
        self.device
            .bodies
            .iter()
            .filter(|body| body.made == Made::Porous)
            .any(|body| self.frame.polygon(&body_outline(body)) == area.outline)
    }
}

/// Patterns lie with the level; that of a solid is turned by a quarter where its strokes
/// would run along the device.
fn pattern_turn(paint: Paint, angle_deg: f64, view: &View) -> f64 {
    let off = (view.tilt_deg - angle_deg).rem_euclid(180.0);
    let runs_along = off.min(180.0 - off) < 22.0;
    match paint {
        Paint::Wick | Paint::Insert if runs_along => view.turn_deg + angle_deg + 90.0,
        _ => view.turn_deg + angle_deg,
    }
}

/// A half outline and its mirror image, closed, running to the left around it.
fn mirrored(half: &[[f64; 2]]) -> Vec<Point> {
    let lower = half.iter().map(|[x, r]| Point::new(*x, -r));
    let upper = half.iter().rev().map(|[x, r]| Point::new(*x, *r));
    let mut points: Vec<Point> = lower.chain(upper).collect();
    points.dedup();
    if points.len() > 1 && points.first() == points.last() {
        points.pop();
    }
    points
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

/// The core of an annulus, closed at its ends, smaller by `off_m` all around.
fn core(piece: &Piece, off_m: f64) -> Option<Vec<Point>> {
    let Form::Annulus {
        length_m, core_m, ..
    } = piece.form
    else {
        return None;
    };
    let r = 0.5 * core_m - off_m;
    let (from, to) = (piece.start_m + off_m, piece.start_m + length_m - off_m);
    (r > 0.0 && to > from).then(|| mirrored(&[[from, r], [to, r]]))
}

fn body_outline(body: &Body) -> Vec<Point> {
    let middle = Point::new(body.along_m, body.over_m);
    match body.outline {
        BodyOutline::Bar { length_m, height_m } => {
            let (l, h) = (0.5 * length_m, 0.5 * height_m);
            [(-l, -h), (l, -h), (l, h), (-l, h)]
                .map(|(x, y)| Point::new(middle.x + x, middle.y + y))
                .to_vec()
        }
        BodyOutline::Disc { diameter_m } => (0..48)
            .map(|i| middle.plus(Point::direction(7.5 * f64::from(i)), 0.5 * diameter_m))
            .collect(),
    }
}
