//! Zoom and pan of a picture.

use eframe::egui::{Pos2, Rect, Response, Ui, Vec2};

/// The part of the whole that is in sight, as shares of it: it outlives a change of
/// unit and of design.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct View {
    pub x: (f64, f64),
    pub y: (f64, f64),
}

impl Default for View {
    fn default() -> Self {
        Self {
            x: (0.0, 1.0),
            y: (0.0, 1.0),
        }
    }
}

/// Ctrl and the wheel, or two fingers, zoom around the pointer; a zoomed picture can
/// be dragged; a double click shows all of it again. True where a double click found
/// all of it shown already.
pub(super) fn turn_view(ui: &Ui, response: &Response, frame: Rect, view: &mut View) -> bool {
    if response.double_clicked() {
        return std::mem::take(view) == View::default();
    }
    let share = |at: Pos2| {
        let across = f64::from((at.x - frame.left()) / frame.width());
        let up = f64::from((frame.bottom() - at.y) / frame.height());
        (across, up)
    };
    let zoom = f64::from(ui.input(|i| i.zoom_delta()));
    if zoom != 1.0
        && let Some(at) = response.hover_pos()
    {
        let (across, up) = share(at);
        view.x = zoomed(view.x, zoom, across);
        view.y = zoomed(view.y, zoom, up);
    }
    if response.dragged() {
        let by: Vec2 = response.drag_delta() / frame.size();
        view.x = shifted(view.x, -f64::from(by.x));
        view.y = shifted(view.y, f64::from(by.y));
    }
    false
}

fn zoomed((from, to): (f64, f64), by: f64, around: f64) -> (f64, f64) {
    let width = ((to - from) / by).clamp(0.005, 1.0);
    let from = (from + around * (to - from - width)).clamp(0.0, 1.0 - width);
    (from, from + width)
}

fn shifted((from, to): (f64, f64), by: f64) -> (f64, f64) {
    let by = (by * (to - from)).clamp(-from, 1.0 - to);
    (from + by, to + by)
}
