//! The section of a device with its liquid, to scale.

use super::marks;
use super::outline::{inner, outer, outer_at};
use super::plane::Point;
use super::{Area, Bounds, HotSpot, Line, Paint, Picture, Stroke};
use crate::section::{Body, BodyOutline, Device, Form, Made, Piece, Side};
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

    pub(super) fn polygon(&self, points: &[Point]) -> Vec<Point> {
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
    drawing.patterns(view);
    let Drawing {
        mut picture, frame, ..
    } = drawing;
    marks::add(&mut picture, &frame, device, &outside, view, units);
    picture
}

/// A picture in the making.
pub(super) struct Drawing<'a> {
    pub(super) picture: Picture,
    pub(super) frame: Frame,
    pub(super) device: &'a Device,
}

impl Drawing<'_> {
    /// `points` in the device's own plane.
    pub(super) fn area(&mut self, points: &[Point], paint: Paint) {
        if points.len() > 2 {
            let outline = self.frame.polygon(points);
            self.picture.areas.push(Area { outline, paint });
        }
    }

    pub(super) fn line(&mut self, points: &[Point], closed: bool, stroke: Stroke) {
        let points = self.frame.polygon(points);
        self.picture.lines.push(Line {
            points,
            closed,
            stroke,
        });
    }

    pub(super) fn spot(&mut self, points: &[Point], text: &str) {
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
}

/// A half outline and its mirror image, closed, running to the left around it.
pub(super) fn mirrored(half: &[[f64; 2]]) -> Vec<Point> {
    let lower = half.iter().map(|[x, r]| Point::new(*x, -r));
    let upper = half.iter().rev().map(|[x, r]| Point::new(*x, *r));
    let mut points: Vec<Point> = lower.chain(upper).collect();
    points.dedup();
    if points.len() > 1 && points.first() == points.last() {
        points.pop();
    }
    points
}

/// The core of an annulus, closed at its ends, smaller by `off_m` all around.
pub(super) fn core(piece: &Piece, off_m: f64) -> Option<Vec<Point>> {
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

pub(super) fn body_outline(body: &Body) -> Vec<Point> {
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
