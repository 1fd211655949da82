//! What stands around a section: numbers of its parts, length, scale bar, the way down.

use std::collections::BTreeMap;

use super::outline::outer_at;
use super::plane::Point;
use super::section::{Frame, View};
use super::{Anchor, Bounds, Label, Line, Picture, Stroke};
use crate::section::{BodyOutline, Device, Form, Lies};
use crate::units::{Kind, NBSP, Units, figures};

pub(super) fn add(
    picture: &mut Picture,
    frame: &Frame,
    device: &Device,
    outside: &[[f64; 2]],
    view: &View,
    units: &Units,
) {
    // Numbers go up or to the right of the device, its length to the other side.
    let left = frame.along.left();
    let side = if left.x + left.y >= -1e-9 { 1.0 } else { -1.0 };
    let reach_m = outside.iter().map(|[_, r]| *r).fold(0.0, f64::max);
    numbers(
        picture,
        frame,
        device,
        outside,
        side * (reach_m + 2.4 * picture.em_m),
    );
    length(
        picture,
        frame,
        outside,
        -side * (reach_m + 1.8 * picture.em_m),
        units,
    );
    grow(picture);
    down(picture, Point::direction(view.turn_deg - 90.0));
    scale_bar(picture, units);
    grow(picture);
}

/// A ringed number for each part, joined to it by a leader.
fn numbers(
    picture: &mut Picture,
    frame: &Frame,
    device: &Device,
    outside: &[[f64; 2]],
    row_m: f64,
) {
    let em = picture.em_m;
    let side = row_m.signum();
    // First place of each part: where its leader begins, and its text.
    let mut found: BTreeMap<usize, ([f64; 2], &str)> = BTreeMap::new();
    for piece in &device.pieces {
        let length = piece.form.length_m();
        let middle = piece.start_m + 0.5 * length;
        let at = if matches!(piece.form, Form::Plate { .. }) {
            [middle, side * 0.6 * outer_at(outside, middle)]
        } else {
            [middle, side * outer_at(outside, middle)]
        };
        found.entry(piece.part).or_insert((at, &piece.text));
        let mut off = 0.0;
        for (i, layer) in piece.layers.iter().enumerate() {
            let x = length * (0.15 + 0.1 * (i % 3) as f64);
            let depth = match layer.lies {
                Lies::OnTheWall => off + 0.5 * layer.thickness_m,
                Lies::InTheWall => -0.5 * layer.thickness_m,
            };
            off += layer.inward_m();
            let at = [
                piece.start_m + x,
                side * (piece.form.half_height_m(x) - depth).max(0.0),
            ];
            found.entry(layer.part).or_insert((at, &layer.text));
        }
    }
    for body in &device.bodies {
        // Off the middle, where the leader of what is around it ends.
        let aside = match body.outline {
            BodyOutline::Bar { length_m, .. } => 0.3 * length_m,
            BodyOutline::Disc { .. } => 0.0,
        };
        let at = [body.along_m - aside, body.over_m];
        found.entry(body.part).or_insert((at, &body.text));
    }
    let mut places: Vec<(usize, [f64; 2], f64)> = found
        .iter()
        .map(|(part, (at, _))| (*part, *at, at[0]))
        .collect();
    places.sort_by(|a, b| a.2.total_cmp(&b.2));
    spread(&mut places, 2.0 * em);
    for (part, at, x) in places {
        let ring = frame.place([x, row_m]);
        let from = frame.place(at);
        let way = Point::new(from.x - ring.x, from.y - ring.y);
        let long = way.x.hypot(way.y).max(f64::MIN_POSITIVE);
        picture.lines.push(Line {
            points: vec![from, ring.plus(way, (0.85 * em / long).min(1.0))],
            closed: false,
            stroke: Stroke::Dimension,
        });
        picture.labels.push(Label {
            text: (part + 1).to_string(),
            at: ring,
            anchor: Anchor::Middle,
            ringed: true,
        });
    }
    picture.key = found
        .into_iter()
        .map(|(part, (_, text))| (part + 1, text.replace('\n', ", ")))
        .collect();
}

/// Moves numbers apart along the row until none overlap, each as little as it must.
fn spread(places: &mut [(usize, [f64; 2], f64)], gap_m: f64) {
    for _ in 0..200 {
        let mut moved = false;
        for i in 1..places.len() {
            let lack = gap_m - (places[i].2 - places[i - 1].2);
            if lack > 1e-6 * gap_m {
                places[i - 1].2 -= 0.5 * lack;
                places[i].2 += 0.5 * lack;
                moved = true;
            }
        }
        if !moved {
            break;
        }
    }
}

/// The length over all, as a drawing gives it.
fn length(picture: &mut Picture, frame: &Frame, outside: &[[f64; 2]], row_m: f64, units: &Units) {
    let (Some(first), Some(last)) = (outside.first(), outside.last()) else {
        return;
    };
    let em = picture.em_m;
    let (from, to) = (first[0], last[0]);
    let mut line = |points: Vec<[f64; 2]>| {
        let points = points.into_iter().map(|p| frame.place(p)).collect();
        picture.lines.push(Line {
            points,
            closed: false,
            stroke: Stroke::Dimension,
        });
    };
    let side = row_m.signum();
    line(vec![[from, row_m], [to, row_m]]);
    for (end, way) in [(first, 1.0), (last, -1.0)] {
        let x = end[0];
        line(vec![
            [x, side * (end[1] + 0.4 * em)],
            [x, row_m + side * 0.5 * em],
        ]);
        line(vec![
            [x + way * 0.7 * em, row_m + 0.22 * em],
            [x, row_m],
            [x + way * 0.7 * em, row_m - 0.22 * em],
        ]);
    }
    let middle = frame.place([0.5 * (from + to), row_m + side * 0.9 * em]);
    let outward = frame.along.left().x * side;
    let anchor = if outward > 0.3 {
        Anchor::Start
    } else if outward < -0.3 {
        Anchor::End
    } else {
        Anchor::Middle
    };
    picture.labels.push(Label {
        text: units.show_si(Kind::Length, to - from, 4),
        at: middle,
        anchor,
        ringed: false,
    });
}

/// An arrow the way things fall, left of the device.
fn down(picture: &mut Picture, way: Point) {
    let em = picture.em_m;
    let bounds = picture.bounds;
    let middle = Point::new(
        bounds.low.x - 2.5 * em,
        0.5 * (bounds.low.y + bounds.high.y),
    );
    let (tail, tip) = (middle.plus(way, -1.8 * em), middle.plus(way, 1.8 * em));
    let barb = |side: f64| tip.plus(way, -0.8 * em).plus(way.left(), side * 0.3 * em);
    for points in [vec![tail, tip], vec![barb(1.0), tip, barb(-1.0)]] {
        picture.lines.push(Line {
            points,
            closed: false,
            stroke: Stroke::Dimension,
        });
    }
    picture.labels.push(Label {
        text: "down".to_owned(),
        at: tip.plus(way, 0.9 * em),
        anchor: if way.x.abs() < 0.3 {
            Anchor::Middle
        } else if way.x > 0.0 {
            Anchor::Start
        } else {
            Anchor::End
        },
        ringed: false,
    });
}

/// A bar of a round length below everything, in halves.
fn scale_bar(picture: &mut Picture, units: &Units) {
    let em = picture.em_m;
    let unit = units.unit_for(Kind::Length, 10.0 * em);
    let number = round_below(unit.number_of(10.0 * em));
    let length_m = unit.to_si(number);
    let low = Point::new(picture.bounds.low.x, picture.bounds.low.y - 1.6 * em);
    let tick = |x: f64, high: f64| {
        vec![
            Point::new(low.x + x, low.y - high * em),
            Point::new(low.x + x, low.y + high * em),
        ]
    };
    let bar = vec![low, Point::new(low.x + length_m, low.y)];
    for points in [
        bar,
        tick(0.0, 0.35),
        tick(0.5 * length_m, 0.2),
        tick(length_m, 0.35),
    ] {
        picture.lines.push(Line {
            points,
            closed: false,
            stroke: Stroke::Dimension,
        });
    }
    let digits = if number >= 1.0 {
        1 + number.log10() as usize
    } else {
        1
    };
    picture.labels.push(Label {
        text: format!("{}{NBSP}{}", figures(number, digits), unit.symbol),
        at: Point::new(low.x + length_m + 0.6 * em, low.y),
        anchor: Anchor::Start,
        ringed: false,
    });
}

/// The greatest of 1, 2 and 5 times a power of ten that is not above a number.
fn round_below(number: f64) -> f64 {
    let power = 10f64.powi(number.log10().floor() as i32);
    let steps = [5.0, 2.0, 1.0];
    let best = steps
        .into_iter()
        .find(|step| step * power <= number * (1.0 + 1e-9));
    best.unwrap_or(1.0) * power
}

/// Bounds around everything that has been put into the picture.
fn grow(picture: &mut Picture) {
    let em = picture.em_m;
    let mut bounds: Bounds = picture.bounds;
    for line in &picture.lines {
        line.points.iter().for_each(|point| bounds.take(*point));
    }
    for label in &picture.labels {
        let (width, high) = if label.ringed {
            (1.7 * em, 0.85 * em)
        } else {
            (text_width(&label.text) * em, 0.6 * em)
        };
        let from = match label.anchor {
            Anchor::Start => 0.0,
            Anchor::Middle => -0.5,
            Anchor::End => -1.0,
        };
        bounds.take(Point::new(label.at.x + from * width, label.at.y - high));
        bounds.take(Point::new(
            label.at.x + (from + 1.0) * width,
            label.at.y + high,
        ));
    }
    picture.bounds = bounds;
}

/// Width of a text in its own height, on the wide side of what typefaces do.
pub(super) fn text_width(text: &str) -> f64 {
    0.6 * text.chars().count() as f64
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn bars_are_round() {
        for (number, expected) in [
            (9.99, 5.0),
            (10.0, 10.0),
            (49.0, 20.0),
            (0.21, 0.2),
            (1.9, 1.0),
        ] {
            assert!(
                (round_below(number) / expected - 1.0).abs() < 1e-12,
                "{number}"
            );
        }
    }

    #[test]
    fn numbers_stand_apart_and_keep_their_order() {
        let mut places = [0.0, 0.1, 0.2, 5.0].map(|x| (0, [x, 0.0], x)).to_vec();
        spread(&mut places, 1.0);
        for pair in places.windows(2) {
            assert!(pair[1].2 - pair[0].2 > 0.999, "{places:?}");
        }
        assert_eq!(places[3].2, 5.0);
    }
}
