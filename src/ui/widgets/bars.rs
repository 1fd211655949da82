//! How much of a limit is used.

use eframe::egui::{
    Color32, Painter, Rect, Response, Role, Sense, Shape, Stroke, StrokeKind, Ui, WidgetInfo, pos2,
    vec2,
};

use crate::ui::theme::Palette;

/// How much of a limit is used: filled up to the share, with a tick at the limit.
/// What is beyond the limit is hatched; what is beyond the bar ends in an arrow.
pub fn margin_bar(ui: &mut Ui, share: f64, colour: Color32, description: &str) -> Response {
    let palette = Palette::in_use(ui);
    let (rect, response) =
        ui.allocate_exact_size(vec2(ui.available_width().max(40.0), 14.0), Sense::hover());
    let bar = rect.shrink2(vec2(0.0, 3.0));
    let painter = ui.painter_at(rect.expand(1.0));
    let at =
        |share: f64| (bar.left() + (share / SHOWN).clamp(0.0, 1.0) as f32 * bar.width()).round();
    let limit = at(1.0);
    painter.rect(
        bar,
        2.0,
        palette.ground,
        Stroke::new(1.0, outline(ui)),
        StrokeKind::Inside,
    );
    if share.is_finite() {
        let end = at(share);
        painter.rect_filled(bar.with_max_x(end.min(limit)), 2.0, colour);
        if share > 1.0 {
            let over = Rect::from_min_max(pos2(limit, bar.top()), pos2(end, bar.bottom()));
            hatch(&painter, over, colour);
            painter.rect_stroke(over, 0.0, Stroke::new(1.0, colour), StrokeKind::Inside);
        }
        if share > SHOWN {
            let tip = pos2(bar.right(), bar.center().y);
            let back = vec2(-7.0, 0.0);
            let half = vec2(0.0, 0.5 * rect.height());
            let corners = vec![tip, tip + back + half, tip + back - half];
            painter.add(Shape::convex_polygon(corners, colour, Stroke::NONE));
        }
    }
    painter.vline(limit, rect.y_range(), Stroke::new(2.0, palette.text));
    response.widget_info(|| {
        let mut info = WidgetInfo::labeled(Role::Meter, true, description);
        info.value = share.is_finite().then_some(share);
        info
    });
    response.on_hover_text(description)
}

/// The share at the right end of a margin bar.
const SHOWN: f64 = 1.25;

/// The line around an empty bar.
pub(super) fn outline(ui: &Ui) -> Color32 {
    ui.visuals().widgets.inactive.bg_stroke.color
}

/// Slanted lines: beyond, or not to be had.
pub(super) fn hatch(painter: &Painter, rect: Rect, colour: Color32) {
    let painter = painter.with_clip_rect(rect.intersect(painter.clip_rect()));
    let stroke = Stroke::new(1.5, colour);
    let mut x = rect.left() - rect.height();
    while x < rect.right() {
        painter.line_segment(
            [pos2(x, rect.bottom()), pos2(x + rect.height(), rect.top())],
            stroke,
        );
        x += 5.0;
    }
}
