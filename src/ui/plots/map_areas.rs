//! The areas of the charge map and their names.

use eframe::egui::{Mesh, Pos2, Rangef, Rect, Shape, Stroke, pos2, vec2};

use super::canvas::Canvas;
use super::labels::{Taken, place_in_area};
use crate::assess::{Charts, MapPoint};
use crate::fluid::Fluid;

/// Points between two hatch lines, across.
const HATCH: f32 = 11.0;

/// The boundaries as points of the screen, upper ends last.
pub(super) struct Areas {
    dry_out: Vec<Pos2>,
    liquid_full: Vec<Pos2>,
    /// Pieces of the allowable line; right of each the pressure is too high.
    allowable: Vec<Vec<Pos2>>,
    /// Heights above which the fluid is supercritical, and below which it is frozen.
    critical: Option<f32>,
    freezing: Option<f32>,
    frame: Rect,
}

impl Areas {
    pub fn new(canvas: &Canvas<'_>, charts: &Charts, fluid: &Fluid) -> Self {
        let points = |line: &[MapPoint]| -> Vec<Pos2> {
            line.iter()
                .map(|p| canvas.at(p.mass.kilogram(), p.temperature.kelvin()))
                .collect()
        };
        let map = &charts.map;
        let height = |t: f64| canvas.y.px(t);
        let (low, high) = (charts.span.0.kelvin(), charts.span.1.kelvin());
        let critical = fluid.critical().temperature_k;
        let freezing = fluid.freezing_point();
        Self {
            dry_out: points(&map.dry_out),
            liquid_full: points(&map.liquid_full),
            allowable: pieces(&map.allowable, 1.5 * (high - low) / 96.0)
                .map(points)
                .collect(),
            critical: (critical < high && fluid.range().1.kelvin() > critical)
                .then(|| height(critical.max(low))),
            freezing: (freezing > charts.span.0)
                .then(|| height(freezing.min(charts.span.1).kelvin())),
            frame: canvas.frame,
        }
    }

    pub fn paint_fills(&self, canvas: &Canvas<'_>) {
        let palette = canvas.palette;
        let (left, right) = (self.frame.left(), self.frame.right());
        let mut mesh = Mesh::default();
        let mut band = |a: (f32, f32, f32), b: (f32, f32, f32), color| {
            // Two levels, each from left to right at a height.
            let first = mesh.vertices.len() as u32;
            for corner in [
                pos2(a.0, a.2),
                pos2(a.1, a.2),
                pos2(b.0, b.2),
                pos2(b.1, b.2),
            ] {
                mesh.colored_vertex(corner, color);
            }
            mesh.add_triangle(first, first + 1, first + 2);
            mesh.add_triangle(first + 1, first + 2, first + 3);
        };
        for (dry, full) in self.dry_out.windows(2).zip(self.liquid_full.windows(2)) {
            let (ya, yb) = (dry[0].y, dry[1].y);
            band(
                (left, dry[0].x, ya),
                (left, dry[1].x, yb),
                palette.all_vapour,
            );
            band(
                (dry[0].x, full[0].x, ya),
                (dry[1].x, full[1].x, yb),
                palette.two_phase,
            );
            band(
                (full[0].x, right.max(full[0].x), ya),
                (full[1].x, right.max(full[1].x), yb),
                palette.liquid_full,
            );
        }
        if let Some(y) = self.critical {
            band(
                (left, right, self.frame.top()),
                (left, right, y),
                palette.supercritical,
            );
        }
        if let Some(y) = self.freezing {
            band(
                (left, right, y),
                (left, right, self.frame.bottom()),
                palette.frozen,
            );
        }
        canvas.inside.add(Shape::mesh(mesh));
    }

    /// The tint and hatching of what the walls do not bear.
    pub fn paint_over_allowable(&self, canvas: &Canvas<'_>) {
        let color = canvas.palette.over_allowable;
        let right = self.frame.right();
        let mut mesh = Mesh::default();
        let mut hatch = Vec::new();
        for piece in &self.allowable {
            for pair in piece.windows(2) {
                let (a, b) = (pair[0], pair[1]);
                if a.x.min(b.x) >= right || (a.y - b.y).abs() < 1e-3 {
                    continue;
                }
                let first = mesh.vertices.len() as u32;
                for corner in [a, pos2(right.max(a.x), a.y), b, pos2(right.max(b.x), b.y)] {
                    mesh.colored_vertex(corner, color.gamma_multiply(0.6));
                }
                mesh.add_triangle(first, first + 1, first + 2);
                mesh.add_triangle(first + 1, first + 2, first + 3);
            }
            hatch_right_of(piece, self.frame, &mut hatch);
        }
        canvas.inside.add(Shape::mesh(mesh));
        let stroke = Stroke::new(1.0, canvas.palette.allowable.gamma_multiply(0.45));
        canvas.inside.extend(
            hatch
                .into_iter()
                .map(|ends| Shape::line_segment(ends, stroke)),
        );
    }

    pub fn paint_lines(&self, canvas: &Canvas<'_>) {
        let palette = canvas.palette;
        let edge = Stroke::new(1.5, palette.saturation);
        canvas.inside.line(self.dry_out.clone(), edge);
        canvas.inside.line(self.liquid_full.clone(), edge);
        for y in [self.critical, self.freezing].into_iter().flatten() {
            canvas.inside.hline(self.frame.x_range(), y, edge);
        }
        for piece in &self.allowable {
            canvas.dashed(piece, Stroke::new(2.0, palette.allowable), 7.0, 4.0);
        }
    }

    /// Writes each area's name where it has room, keeping out of `avoid` (across)
    /// and, where it can, off some heights.
    pub fn paint_names(&self, canvas: &Canvas<'_>, avoid: Rangef, heights: &[f32]) {
        let palette = canvas.palette;
        let all = self.frame.x_range();
        let mut taken = Taken::default();
        let between = |line: &[Pos2], y: f32| x_at(line, y);
        let two_phase = |y: f32| {
            Some(Rangef::new(
                between(&self.dry_out, y)?,
                between(&self.liquid_full, y)?,
            ))
        };
        let vapour = |y: f32| Some(Rangef::new(all.min, between(&self.dry_out, y)?));
        let full = |y: f32| Some(Rangef::new(between(&self.liquid_full, y)?, all.max));
        let above = |y: f32| self.critical.filter(|edge| y < *edge).map(|_| all);
        let frozen = |y: f32| self.freezing.filter(|edge| y > *edge).map(|_| all);
        let over = |y: f32| {
            let edge = self.allowable.iter().find_map(|piece| x_at(piece, y))?;
            Some(Rangef::new(edge, all.max))
        };
        let mut name = |texts: &[&str], extent: &dyn Fn(f32) -> Option<Rangef>, ground| -> bool {
            for text in texts {
                let galley = canvas.inside.layout_no_wrap(
                    (*text).to_owned(),
                    canvas.name_font.clone(),
                    palette.text,
                );
                if let Some((rect, _)) =
                    place_in_area(galley.size(), self.frame, extent, avoid, heights, &taken)
                {
                    taken.add(rect.expand(4.0));
                    canvas.backed(rect, galley, ground);
                    return true;
                }
            }
            false
        };
        name(
            &[
                "above allowable pressure",
                "above allowable\npressure",
                "above\nallowable\npressure",
            ],
            &over,
            palette.over_allowable.gamma_multiply(0.9),
        );
        name(&["two-phase", "two-\nphase"], &two_phase, palette.two_phase);
        name(
            &["liquid-full", "liquid-\nfull"],
            &full,
            palette.liquid_full,
        );
        let vapour_named = name(&["all vapour", "all\nvapour"], &vapour, palette.all_vapour);
        name(&["supercritical"], &above, palette.supercritical);
        name(&["frozen"], &frozen, palette.frozen);
        if !vapour_named {
            self.point_at_vapour(canvas, avoid, heights, &taken);
        }
    }

    /// Beside the area of vapour alone, which is often a sliver: its name and a hair to it.
    fn point_at_vapour(&self, canvas: &Canvas<'_>, avoid: Rangef, heights: &[f32], taken: &Taken) {
        let galley = canvas.inside.layout_no_wrap(
            "all vapour".to_owned(),
            canvas.font.clone(),
            canvas.palette.text,
        );
        let size = galley.size();
        let seen = self.frame.shrink2(vec2(0.0, 0.5 * size.y + 3.0));
        const ROWS: u8 = 24;
        let place = (0..=ROWS)
            .map(|row| seen.top() + seen.height() * f32::from(row) / f32::from(ROWS))
            .find_map(|y| {
                let edge = x_at(&self.dry_out, y)?;
                let rect = Rect::from_min_size(
                    pos2(edge.max(self.frame.left()) + 18.0, y - 0.5 * size.y),
                    size,
                );
                // Near the critical point the boundary leans over: there it would cross the text.
                let leans = x_at(&self.dry_out, rect.top() - 3.0)
                    .is_none_or(|above| above > rect.left() - 4.0);
                let clear = !leans
                    && heights
                        .iter()
                        .all(|height| (height - y).abs() > 0.5 * size.y + 2.0);
                let room = taken.is_free(rect)
                    && rect.right() < self.frame.right()
                    && !rect.x_range().intersects(avoid);
                (edge - self.frame.left() >= 1.5 && clear && room).then_some((edge, rect))
            });
        if let Some((edge, rect)) = place {
            let y = rect.center().y;
            let from = pos2(0.5 * (edge + self.frame.left()), y);
            canvas.inside.line_segment(
                [from, pos2(rect.left() - 4.0, y)],
                Stroke::new(1.0, canvas.palette.text),
            );
            canvas.backed(rect, galley, canvas.palette.two_phase);
        }
    }
}

/// Runs of points without a wider gap in temperature than `gap_k`.
fn pieces(line: &[MapPoint], gap_k: f64) -> impl Iterator<Item = &[MapPoint]> {
    line.chunk_by(move |a, b| b.temperature.kelvin() - a.temperature.kelvin() <= gap_k)
}

/// Where a line that rises on the screen from point to point crosses a height.
fn x_at(line: &[Pos2], y: f32) -> Option<f32> {
    let next = line.partition_point(|p| p.y > y);
    let (a, b) = (line.get(next.checked_sub(1)?)?, line.get(next)?);
    let share = if a.y == b.y {
        0.0
    } else {
        (a.y - y) / (a.y - b.y)
    };
    Some(a.x + share * (b.x - a.x))
}

/// Slanted lines over all that lies right of `edge`, a line rising on the screen.
fn hatch_right_of(edge: &[Pos2], frame: Rect, into: &mut Vec<[Pos2; 2]>) {
    let (Some(bottom), Some(top)) = (edge.first(), edge.last()) else {
        return;
    };
    let (bottom, top) = (bottom.y.min(frame.bottom()), top.y.max(frame.top()));
    if bottom <= top {
        return;
    }
    let leftmost = edge
        .iter()
        .map(|p| p.x)
        .fold(f32::INFINITY, f32::min)
        .max(frame.left());
    // Lines rise to the right at 45°: x + y is constant along each.
    let mut sum = HATCH * ((leftmost + top) / HATCH).ceil();
    let last = frame.right() + bottom;
    while sum < last {
        // Walked from the lower left up; steps fine enough for the edge's bends.
        let mut start: Option<Pos2> = None;
        let mut y = bottom.min(sum - leftmost);
        loop {
            let at = pos2(sum - y, y);
            let inside = at.x <= frame.right()
                && x_at(edge, y.clamp(top + 1e-3, bottom - 1e-3)).is_some_and(|x| at.x >= x);
            match (inside, start) {
                (true, None) => start = Some(at),
                (false, Some(from)) => {
                    into.push([from, at]);
                    start = None;
                }
                _ => {}
            }
            if y <= top || at.x > frame.right() {
                if let Some(from) = start {
                    into.push([from, at]);
                }
                break;
            }
            y = (y - 2.0).max(top);
        }
        sum += HATCH;
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn hatching_stays_right_of_its_edge() {
        let frame = Rect::from_min_size(pos2(0.0, 0.0), vec2(100.0, 100.0));
        let edge = [
            pos2(80.0, 100.0),
            pos2(60.0, 50.0),
            pos2(10.0, 50.0),
            pos2(5.0, 0.0),
        ];
        let mut lines = Vec::new();
        hatch_right_of(&edge, frame, &mut lines);
        assert!(lines.len() > 5);
        for point in lines.iter().flatten() {
            let x = x_at(&edge, point.y.clamp(0.01, 99.9)).expect("on the edge's heights");
            assert!(point.x >= x - 60.0 && point.x <= 103.0, "{point:?} {x}");
        }
    }
}
