//! Names of lines beside the frame, and the read-out at the pointer.

use eframe::egui::text::Galley;
use eframe::egui::{
    Color32, CornerRadius, FontId, Pos2, Rangef, Rect, Stroke, StrokeKind, TextStyle, Ui, pos2,
    vec2,
};
use std::sync::Arc;

use super::canvas::Canvas;
use super::labels::{Taken, spread};

/// A name at the right end of a line.
pub(super) struct EndLabel {
    pub y: f32,
    pub text: String,
    pub color: Color32,
}

impl Canvas<'_> {
    /// Names in the right gutter, moved apart, each with a hair to its line.
    pub fn end_labels(&self, mut labels: Vec<EndLabel>) {
        let within = Rangef::new(self.frame.top() - 4.0, self.frame.bottom() + 6.0);
        labels.retain(|label| self.frame.y_range().expand(1.0).contains(label.y));
        labels.sort_by(|a, b| a.y.total_cmp(&b.y));
        let galleys: Vec<_> = labels
            .iter()
            .map(|label| self.galley(&label.text, label.color))
            .collect();
        let mut places: Vec<(f32, f32)> = labels
            .iter()
            .zip(&galleys)
            .map(|(label, galley)| (label.y, galley.size().y))
            .collect();
        spread(&mut places, within);
        for ((label, galley), (y, height)) in labels.iter().zip(galleys).zip(places) {
            let from = pos2(self.frame.right() + 1.0, label.y);
            let to = pos2(self.frame.right() + 10.0, y);
            self.outside.line_segment(
                [from, to],
                Stroke::new(1.0, label.color.gamma_multiply(0.7)),
            );
            self.outside
                .galley(pos2(to.x + 3.0, y - 0.5 * height), galley, label.color);
        }
    }

    /// Names above upright lines, moved apart.
    pub fn top_labels(&self, labels: &[(f32, String)], color: Color32) {
        let mut seen: Vec<(f32, Arc<Galley>)> = labels
            .iter()
            .filter(|(x, _)| self.frame.x_range().expand(1.0).contains(*x))
            .map(|(x, text)| (*x, self.galley(text, color)))
            .collect();
        seen.sort_by(|a, b| a.0.total_cmp(&b.0));
        let room = Rangef::new(self.frame.left() - 2.0, self.outside.clip_rect().right());
        let width = |seen: &[(f32, Arc<Galley>)]| -> f32 {
            seen.iter().map(|(_, galley)| galley.size().x + 12.0).sum()
        };
        // Where there is no room for all, the outermost are the ones that matter.
        while seen.len() > 1 && width(&seen) > room.span() {
            seen.remove(if seen.len() > 2 { 1 } else { 0 });
        }
        let mut places: Vec<(f32, f32)> = seen
            .iter()
            .map(|(x, galley)| (*x, galley.size().x + 12.0))
            .collect();
        spread(&mut places, room);
        let baseline = self.frame.top() - 6.0;
        for ((x, galley), (centre, _)) in seen.into_iter().zip(places) {
            let stroke = Stroke::new(1.0, color.gamma_multiply(0.7));
            self.outside
                .line_segment([pos2(x, self.frame.top()), pos2(centre, baseline)], stroke);
            let size = galley.size();
            self.outside.galley(
                pos2(centre - 0.5 * size.x, baseline - size.y),
                galley,
                color,
            );
        }
    }

    /// A one-line box beside the pointer, kept inside the picture.
    pub fn read_out(&self, pointer: Pos2, text: &str) {
        let galley = self.galley(text, self.palette.text);
        let size = galley.size() + vec2(14.0, 8.0);
        let room = self.outside.clip_rect().shrink(4.0);
        let above = pointer.y - size.y - 12.0;
        let y = if above > room.top() {
            above
        } else {
            pointer.y + 18.0
        };
        let x = (pointer.x - 0.5 * size.x)
            .min(room.right() - size.x)
            .max(room.left());
        let rect = Rect::from_min_size(pos2(x, y), size);
        self.outside.rect(
            rect,
            CornerRadius::same(4),
            self.palette.panel,
            Stroke::new(1.0, self.palette.text_faint.gamma_multiply(0.6)),
            StrokeKind::Inside,
        );
        self.outside
            .galley(rect.min + vec2(7.0, 4.0), galley, self.palette.text);
    }
}

/// A line's name: in the gutter where it reaches it, else where it leaves the frame.
pub(super) fn name_line(
    canvas: &Canvas<'_>,
    runs: &[Vec<Pos2>],
    text: &str,
    color: Color32,
    ends: &mut Vec<EndLabel>,
    taken: &mut Taken,
) {
    let frame = canvas.frame;
    let Some(last) = runs
        .iter()
        .flatten()
        .rfind(|p| frame.expand(0.5).contains(**p))
    else {
        return;
    };
    if last.x >= frame.right() - 14.0 {
        ends.push(EndLabel {
            y: last.y,
            text: text.to_owned(),
            color,
        });
        return;
    }
    let galley = canvas.galley(text, color);
    let size = galley.size();
    let places = [
        pos2(last.x + 6.0, last.y + 4.0),
        pos2(last.x + 8.0, last.y - size.y - 4.0),
        pos2(last.x - size.x - 8.0, last.y + 4.0),
        pos2(last.x - size.x - 8.0, last.y - size.y - 4.0),
        pos2(last.x - size.x - 8.0, last.y + 20.0),
    ];
    if let Some(rect) = taken.first_free(
        places.map(|at| Rect::from_min_size(at, size)),
        frame.shrink(2.0),
    ) {
        canvas.backed(rect, galley, canvas.palette.ground.gamma_multiply(0.85));
    }
}

/// Width of the widest of some texts in the label font of a picture.
pub(super) fn widest<'t>(ui: &Ui, texts: impl IntoIterator<Item = &'t str>) -> f32 {
    let body = TextStyle::Body.resolve(ui.style());
    let font = FontId::new((0.87 * body.size).max(11.0), body.family);
    texts
        .into_iter()
        .map(|text| {
            ui.painter()
                .layout_no_wrap(text.to_owned(), font.clone(), Color32::WHITE)
                .size()
                .x
        })
        .fold(0.0, f32::max)
}
