//! An area bounded from side to side, which may lean over as no `FilledArea` can.

use eframe::egui::{Color32, Mesh, Pos2, Rect, Shape, Stroke, Ui, pos2};
use egui_plot::{PlotBounds, PlotGeometry, PlotItem, PlotItemBase, PlotPoint, PlotTransform};
use std::ops::RangeInclusive;

/// Points between two hatch lines, across.
const HATCH: f32 = 11.0;

pub(super) struct Strip {
    base: PlotItemBase,
    /// Left and right end at each height, upward.
    rows: Vec<[PlotPoint; 2]>,
    fill: Color32,
    hatch: Option<Stroke>,
}

impl Strip {
    pub fn new(rows: Vec<[PlotPoint; 2]>, fill: Color32, hatch: Option<Stroke>) -> Self {
        Self {
            base: PlotItemBase::new(String::new()),
            rows,
            fill,
            hatch,
        }
    }
}

impl PlotItem for Strip {
    fn shapes(&self, _ui: &Ui, transform: &PlotTransform, shapes: &mut Vec<Shape>) {
        let mut mesh = Mesh::default();
        for end in self.rows.iter().flatten() {
            mesh.colored_vertex(transform.position_from_point(end), self.fill);
        }
        for row in 1..self.rows.len() as u32 {
            let first = 2 * (row - 1);
            mesh.add_triangle(first, first + 1, first + 2);
            mesh.add_triangle(first + 1, first + 2, first + 3);
        }
        shapes.push(Shape::mesh(mesh));
        if let Some(stroke) = self.hatch {
            let place = |row: &[PlotPoint; 2]| transform.position_from_point(&row[0]);
            let edge: Vec<Pos2> = self.rows.iter().map(place).collect();
            let mut lines = Vec::new();
            hatch_right_of(&edge, *transform.frame(), &mut lines);
            shapes.extend(
                lines
                    .into_iter()
                    .map(|ends| Shape::line_segment(ends, stroke)),
            );
        }
    }

    fn initialize(&mut self, _x_range: RangeInclusive<f64>) {}

    fn color(&self) -> Color32 {
        self.fill
    }

    fn geometry(&self) -> PlotGeometry<'_> {
        PlotGeometry::None
    }

    fn bounds(&self) -> PlotBounds {
        PlotBounds::NOTHING
    }

    fn base(&self) -> &PlotItemBase {
        &self.base
    }

    fn base_mut(&mut self) -> &mut PlotItemBase {
        &mut self.base
    }
}

/// Where a line that rises on the screen from point to point crosses a height.
pub(super) fn x_at(line: &[Pos2], y: f32) -> Option<f32> {
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
    use eframe::egui::vec2;

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
