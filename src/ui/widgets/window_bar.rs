//! Where the charge lies in its window.

use std::sync::Arc;

use eframe::egui::{
    Align, Color32, Galley, Painter, Pos2, Rect, Response, Role, Sense, Shape, Stroke, StrokeKind,
    TextStyle, Ui, WidgetInfo, pos2, text::LayoutJob, vec2,
};

use super::bars::{hatch, outline};
use crate::ui::theme::Palette;

/// Where the charge lies between its bounds, all in one unit of mass.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct WindowBar {
    /// None where nothing asks for liquid.
    pub lower: Option<f64>,
    pub upper: f64,
    pub least: f64,
    pub nominal: f64,
    pub greatest: f64,
    /// Where the duty wants the charge.
    pub aim: Option<f64>,
}

impl WindowBar {
    /// No mass meets both ends.
    pub fn is_empty(&self) -> bool {
        self.lower.is_some_and(|lower| lower >= self.upper)
    }

    fn is_inside(&self) -> bool {
        !self.is_empty()
            && self.lower.is_none_or(|lower| self.least >= lower)
            && self.greatest <= self.upper
    }

    /// The masses at the two ends of the picture: everything, and some air.
    fn span(&self) -> (f64, f64) {
        let all = [
            self.lower,
            Some(self.upper),
            Some(self.least),
            Some(self.greatest),
            self.aim,
        ];
        let known = || all.into_iter().flatten().filter(|mass| mass.is_finite());
        let low = known().fold(f64::INFINITY, f64::min);
        let high = known().fold(f64::NEG_INFINITY, f64::max);
        let low = if self.lower.is_none() { 0.0 } else { low };
        let air = (0.12 * (high - low))
            .max(1e-3 * high.abs())
            .max(f64::MIN_POSITIVE);
        if low <= high {
            ((low - air).max(0.0), high + air)
        } else {
            (0.0, 1.0)
        }
    }
}

/// Short texts at a window bar, in the caller's words and units.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct WindowBarLabels<'a> {
    /// Under the lower end: the mass, and what it comes from.
    pub lower: &'a str,
    pub upper: &'a str,
    /// Above the dot.
    pub charge: &'a str,
    /// The whole picture in a sentence.
    pub description: &'a str,
}

/// The window as a stretch between two brackets, the charge as a dot with its
/// tolerance, the aim as a wedge above. Where the ends have passed each other the
/// stretch is hatched and crossed out.
pub fn window_bar(ui: &mut Ui, bar: &WindowBar, labels: &WindowBarLabels<'_>) -> Response {
    let palette = Palette::in_use(ui);
    let width = ui.available_width().max(120.0);
    let half = 0.5 * width - 6.0;
    let charge_colour = if bar.is_inside() {
        palette.text
    } else {
        palette.error
    };
    let charge = text(
        ui,
        labels.charge,
        width,
        Align::LEFT,
        charge_colour,
        TextStyle::Body,
    );
    // Ends that have passed each other stand in the other order.
    let (first, second) = if bar.is_empty() {
        (labels.upper, labels.lower)
    } else {
        (labels.lower, labels.upper)
    };
    let first = text(
        ui,
        first,
        half,
        Align::LEFT,
        palette.text_faint,
        TextStyle::Small,
    );
    let second = text(
        ui,
        second,
        half,
        Align::RIGHT,
        palette.text_faint,
        TextStyle::Small,
    );
    let below = first.size().y.max(second.size().y);
    let height = charge.size().y + ABOVE + STRETCH + 5.0 + below;
    let (rect, response) = ui.allocate_exact_size(vec2(width, height), Sense::hover());
    let painter = ui.painter_at(rect.expand(2.0));
    let (low, high) = bar.span();
    let track = Rect::from_min_size(
        pos2(rect.left(), rect.top() + charge.size().y + ABOVE),
        vec2(width, STRETCH),
    );
    let at = |mass: f64| {
        let share = ((mass - low) / (high - low)).clamp(0.0, 1.0) as f32;
        (track.left() + share * track.width()).round()
    };

    painter.rect(
        track,
        3.0,
        palette.ground,
        Stroke::new(1.0, outline(ui)),
        StrokeKind::Inside,
    );
    let from = bar.lower.map_or(track.left(), at);
    let to = at(bar.upper);
    if bar.is_empty() {
        crossed(
            &painter,
            Rect::from_x_y_ranges(to..=from, track.y_range()),
            palette.error,
        );
    } else {
        let stretch = Rect::from_x_y_ranges(from..=to, track.y_range());
        painter.rect_filled(
            stretch,
            0.0,
            palette.ground.lerp_to_gamma(palette.window, 0.3),
        );
    }
    let end = if bar.is_empty() {
        palette.error
    } else {
        palette.window
    };
    if bar.lower.is_some() {
        bracket(&painter, from, track, 5.0, end);
    }
    bracket(&painter, to, track, -5.0, end);
    if let Some(aim) = bar.aim {
        wedge(
            &painter,
            pos2(at(aim), track.top() - 2.0),
            palette.text_faint,
        );
    }
    charge_mark(&painter, bar, track, &at, charge_colour);

    let centred = |x: f32, size: f32, within: std::ops::RangeInclusive<f32>| {
        (x - 0.5 * size)
            .min(within.end() - size)
            .max(*within.start())
    };
    let x = centred(at(bar.nominal), charge.size().x, rect.left()..=rect.right());
    painter.galley(pos2(x, rect.top()), charge, charge_colour);
    let under = track.bottom() + 5.0;
    let x = centred(
        from.min(to),
        first.size().x,
        rect.left()..=rect.center().x - 6.0,
    );
    painter.galley(pos2(x, under), first, palette.text_faint);
    let size = second.size().x;
    let x = centred(from.max(to), size, rect.center().x + 6.0..=rect.right());
    // A right-aligned text hangs to the left of the point where it is painted.
    painter.galley(pos2(x + size, under), second, palette.text_faint);
    response.widget_info(|| WidgetInfo::labeled(Role::Image, true, labels.description));
    response.on_hover_text(labels.description)
}

/// Height of the stretch, and of the room above it for the wedge of the aim.
const STRETCH: f32 = 16.0;
const ABOVE: f32 = 9.0;

fn text(
    ui: &Ui,
    text: &str,
    width: f32,
    align: Align,
    colour: Color32,
    style: TextStyle,
) -> Arc<Galley> {
    let mut job = LayoutJob::simple(text.to_owned(), style.resolve(ui.style()), colour, width);
    job.halign = align;
    ui.painter().layout_job(job)
}

/// The stretch between two ends that have passed each other.
fn crossed(painter: &Painter, rect: Rect, colour: Color32) {
    hatch(painter, rect, colour.gamma_multiply(0.45));
    let cross = Rect::from_center_size(rect.center(), vec2(rect.width().min(24.0), rect.height()));
    let stroke = Stroke::new(2.0, colour);
    painter.line_segment([cross.left_top(), cross.right_bottom()], stroke);
    painter.line_segment([cross.right_top(), cross.left_bottom()], stroke);
}

/// An end of the window; the serifs point to the allowed side.
fn bracket(painter: &Painter, x: f32, track: Rect, serif: f32, colour: Color32) {
    let (top, bottom) = (track.top() - 2.0, track.bottom() + 2.0);
    let line = vec![
        pos2(x + serif, top),
        pos2(x, top),
        pos2(x, bottom),
        pos2(x + serif, bottom),
    ];
    painter.line(line, Stroke::new(2.0, colour));
}

fn wedge(painter: &Painter, tip: Pos2, colour: Color32) {
    let corners = vec![tip, tip + vec2(-4.0, -6.0), tip + vec2(4.0, -6.0)];
    painter.add(Shape::convex_polygon(corners, colour, Stroke::NONE));
}

/// The tolerance as a band with ends; the nominal as a dot, or as a cross where
/// it lies outside.
fn charge_mark(
    painter: &Painter,
    bar: &WindowBar,
    track: Rect,
    at: &dyn Fn(f64) -> f32,
    colour: Color32,
) {
    let y = track.center().y;
    let (least, greatest) = (at(bar.least), at(bar.greatest));
    painter.hline(least..=greatest, y, Stroke::new(3.0, colour));
    for x in [least, greatest] {
        painter.vline(x, y - 4.0..=y + 4.0, Stroke::new(1.5, colour));
    }
    let center = pos2(at(bar.nominal), y);
    let outside = bar.nominal > bar.upper || bar.lower.is_some_and(|lower| bar.nominal < lower);
    if outside || bar.is_empty() {
        let arm = 5.0;
        for way in [1.0, -1.0] {
            let arm = vec2(arm, way * arm);
            painter.line_segment([center - arm, center + arm], Stroke::new(2.5, colour));
        }
    } else {
        painter.circle_filled(center, 5.0, colour);
    }
}
