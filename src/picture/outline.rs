//! The outlines of a device: inside and outside of its walls, over the axis.
//!
//! Points are (place on the axis, distance from it), for the half above the axis.

use crate::section::{Device, Form, Piece, Side};

/// The inside, piece after piece.
pub(super) fn inner(device: &Device) -> Vec<[f64; 2]> {
    let mut points: Vec<[f64; 2]> = Vec::new();
    for piece in &device.pieces {
        if matches!(piece.form, Form::Plate { .. }) {
            continue;
        }
        for ([x, r], _) in piece.form.drawn(0.0) {
            points.push([piece.start_m + x, r]);
        }
    }
    points.dedup();
    points
}

/// The outside: the farthest of all walls at each place.
pub(super) fn outer(device: &Device) -> Vec<[f64; 2]> {
    let walls: Vec<Vec<[f64; 2]>> = (0..device.pieces.len())
        .map(|i| wall(&device.pieces, i))
        .collect();
    let mut places: Vec<f64> = walls.iter().flatten().map(|[x, _]| *x).collect();
    places.sort_by(f64::total_cmp);
    let span = places.last().copied().unwrap_or(0.0) - places.first().copied().unwrap_or(0.0);
    // Ends that rounding has set apart are one place.
    let tolerance = 1e-12 * span;
    places.dedup_by(|b, a| *b - *a <= tolerance);
    let mut points = Vec::new();
    for ends in places.windows(2) {
        let (from, to) = (ends[0], ends[1]);
        let lines: Vec<[f64; 2]> = walls
            .iter()
            .filter_map(|wall| between(wall, from, to, tolerance))
            .collect();
        let first = points.len();
        top(&lines, [from, to], 4, &mut points);
        if points.len() == first {
            points.extend([[from, 0.0], [to, 0.0]]);
        }
    }
    points.dedup();
    points
}

/// Distance of the outside from the axis at a place.
pub(super) fn outer_at(outer: &[[f64; 2]], x: f64) -> f64 {
    outer
        .windows(2)
        .filter(|ends| ends[0][0] <= x && x <= ends[1][0])
        .map(|ends| {
            let span = ends[1][0] - ends[0][0];
            if span > 0.0 {
                ends[0][1] + (ends[1][1] - ends[0][1]) * (x - ends[0][0]) / span
            } else {
                ends[0][1].max(ends[1][1])
            }
        })
        .fold(0.0, f64::max)
}

/// The outside of one piece's wall, from left to right. Where the bore beside it is
/// narrower, and at the ends of a box, a shoulder of the same thickness closes it.
fn wall(pieces: &[Piece], i: usize) -> Vec<[f64; 2]> {
    let piece = &pieces[i];
    let (start, length, t) = (piece.start_m, piece.form.length_m(), piece.wall_m);
    let before = i.checked_sub(1).and_then(|i| pieces.get(i));
    let after = pieces.get(i + 1);
    let half = |piece: &Piece, at_end: bool| {
        piece
            .form
            .edge_m(if at_end { Side::Last } else { Side::First })
    };
    if let Form::Plate { height_m } = piece.form {
        let covers = |beside: Option<&Piece>, at_end| {
            beside.map_or(0.0, |p| match p.form {
                Form::Plate { .. } => 0.0,
                _ if half(p, at_end) > 0.0 => half(p, at_end) + p.wall_m,
                _ => 0.0,
            })
        };
        let r = (0.5 * height_m)
            .max(covers(before, true))
            .max(covers(after, false));
        let (back, on) = match (before, after) {
            (None, _) => (t, 0.0),
            (_, None) => (0.0, t),
            _ => (0.5 * t, 0.5 * t),
        };
        return vec![[start - back, r], [start + on, r]];
    }
    let mut points: Vec<[f64; 2]> = piece
        .form
        .drawn(t)
        .into_iter()
        .map(|(_, [x, r])| [start + x, r])
        .collect();
    let is_box = matches!(piece.form, Form::Slab { .. });
    let closes =
        |own: f64, beside: Option<f64>| beside.map_or(is_box, |beside| own > beside + 1e-9);
    let is_plate = |p: &Piece| matches!(p.form, Form::Plate { .. });
    let first = before.filter(|p| !is_plate(p)).map(|p| half(p, true));
    if closes(half(piece, false), first) && !before.is_some_and(is_plate) {
        let r = half(piece, false) + t;
        points.insert(0, [start - t, r]);
        points.insert(1, [start, r]);
    }
    let last = after.filter(|p| !is_plate(p)).map(|p| half(p, false));
    if closes(half(piece, true), last) && !after.is_some_and(is_plate) {
        let r = half(piece, true) + t;
        points.extend([[start + length, r], [start + length + t, r]]);
    }
    // An arc may lean over its own shoulder; the row must not run back.
    for k in 1..points.len() {
        points[k][0] = points[k][0].max(points[k - 1][0]);
    }
    points
}

/// A row of points as a straight line between two places, where it covers them.
fn between(row: &[[f64; 2]], from: f64, to: f64, tolerance: f64) -> Option<[f64; 2]> {
    let middle = 0.5 * (from + to);
    let k = row.partition_point(|[x, _]| *x <= middle);
    let (a, b) = (row.get(k.checked_sub(1)?)?, row.get(k)?);
    let at = |x: f64| a[1] + (b[1] - a[1]) * (x - a[0]) / (b[0] - a[0]);
    (a[0] <= from + tolerance && b[0] >= to - tolerance).then(|| [at(from), at(to)])
}

/// The highest of some straight lines between two places, halved where they cross.
fn top(lines: &[[f64; 2]], [from, to]: [f64; 2], depth: usize, points: &mut Vec<[f64; 2]>) {
    let best = |side: usize| {
        lines.iter().max_by(|a, b| {
            (a[side], a[1 - side])
                .partial_cmp(&(b[side], b[1 - side]))
                .unwrap_or(std::cmp::Ordering::Equal)
        })
    };
    let (Some(first), Some(last)) = (best(0), best(1)) else {
        return;
    };
    let gain = (first[0] - last[0]) + (last[1] - first[1]);
    let share = (first[0] - last[0]) / gain;
    if first == last || depth == 0 || gain <= 0.0 || !(1e-9..1.0 - 1e-9).contains(&share) {
        points.extend([[from, first[0]], [to, last[1]]]);
        return;
    }
    let at = from + (to - from) * share;
    let part = |low: f64, high: f64| -> Vec<[f64; 2]> {
        lines
            .iter()
            .map(|l| [low, high].map(|s| l[0] + (l[1] - l[0]) * s))
            .collect()
    };
    top(&part(0.0, share), [from, at], depth - 1, points);
    top(&part(share, 1.0), [at, to], depth - 1, points);
}
