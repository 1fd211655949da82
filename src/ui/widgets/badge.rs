//! A verdict in a shape, a colour and a word.

use eframe::egui::{
    Align2, Color32, FontId, Pos2, Rect, Response, RichText, Role, Sense, Shape, Stroke,
    StrokeKind, TextStyle, TextWrapMode, Ui, WidgetInfo, WidgetText, pos2, vec2,
};

use crate::assess::{Severity, Verdict};
use crate::ui::theme::Palette;

/// What a badge or a mark stands for.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Badge {
    /// Circle with a tick.
    Fit,
    /// Circle with an i.
    Note,
    /// Triangle.
    Warning,
    /// Octagon.
    Error,
}

impl Badge {
    pub const fn colour(self, palette: &Palette) -> Color32 {
        match self {
            Self::Fit => palette.fit,
            Self::Note => palette.note,
            Self::Warning => palette.warning,
            Self::Error => palette.error,
        }
    }

    /// For those who do not see the shape.
    pub const fn word(self) -> &'static str {
        match self {
            Self::Fit => "Fit",
            Self::Note => "Note",
            Self::Warning => "Warning",
            Self::Error => "Error",
        }
    }
}

impl From<Severity> for Badge {
    fn from(severity: Severity) -> Self {
        match severity {
            Severity::Error => Self::Error,
            Severity::Warning => Self::Warning,
            Severity::Note => Self::Note,
        }
    }
}

impl From<Verdict> for Badge {
    fn from(verdict: Verdict) -> Self {
        match verdict {
            Verdict::Fit => Self::Fit,
            Verdict::FitWithWarnings => Self::Warning,
            Verdict::NotFit => Self::Error,
        }
    }
}

/// The one-line verdict: shape and words on a faint ground of the same hue, as
/// wide as the panel; long words wrap.
pub fn verdict_badge(ui: &mut Ui, badge: Badge, text: &str) -> Response {
    let palette = Palette::in_use(ui);
    let colour = badge.colour(palette);
    let width = ui.available_width();
    let words = WidgetText::from(RichText::new(text).size(15.0).color(colour).strong())
        .into_galley(
            ui,
            Some(TextWrapMode::Wrap),
            (width - 2.0 * PAD - MARK - 8.0).max(40.0),
            TextStyle::Body,
        );
    let height = words.size().y.max(MARK) + 2.0 * 7.0;
    let (rect, response) = ui.allocate_exact_size(vec2(width, height), Sense::hover());
    let ground = palette.panel.lerp_to_gamma(colour, 0.08);
    ui.painter().rect(
        rect,
        4.0,
        ground,
        Stroke::new(1.0, colour),
        StrokeKind::Inside,
    );
    let first_line = words.rows.first().map_or(MARK, |row| row.height());
    let y = rect.top() + 7.0 + 0.5 * first_line.max(MARK);
    paint_mark(
        ui,
        badge,
        pos2(rect.left() + PAD + 0.5 * MARK, y),
        MARK,
        colour,
        palette.ground,
    );
    let at = pos2(rect.left() + PAD + MARK + 8.0, y - 0.5 * first_line);
    ui.painter().galley(at, words, colour);
    response.widget_info(|| WidgetInfo::labeled(Role::Status, true, text));
    response
}

/// Only the shape, as high as a line of text, for lists of findings.
pub fn badge_mark(ui: &mut Ui, badge: Badge) -> Response {
    let palette = Palette::in_use(ui);
    let (rect, response) = ui.allocate_exact_size(vec2(SMALL + 2.0, SMALL + 2.0), Sense::hover());
    paint_mark(
        ui,
        badge,
        rect.center(),
        SMALL,
        badge.colour(palette),
        palette.ground,
    );
    response.widget_info(|| WidgetInfo::labeled(Role::Image, true, badge.word()));
    response.on_hover_text(badge.word())
}

const PAD: f32 = 10.0;
const MARK: f32 = 18.0;
const SMALL: f32 = 15.0;

fn paint_mark(ui: &Ui, badge: Badge, center: Pos2, size: f32, colour: Color32, sign: Color32) {
    let painter = ui.painter();
    let rect = Rect::from_center_size(center, vec2(size, size));
    let stroke = Stroke::new(size * 0.11, sign);
    let at = |x: f32, y: f32| rect.min + vec2(x * size, y * size);
    let letter = |text: &str, y: f32| {
        painter.text(
            at(0.5, y),
            Align2::CENTER_CENTER,
            text,
            FontId::proportional(size * 0.78),
            sign,
        );
    };
    match badge {
        Badge::Fit => {
            painter.circle_filled(center, 0.5 * size, colour);
            painter.line(vec![at(0.27, 0.52), at(0.44, 0.69), at(0.74, 0.34)], stroke);
        }
        Badge::Note => {
            painter.circle_filled(center, 0.5 * size, colour);
            letter("i", 0.5);
        }
        Badge::Warning => {
            let corners = vec![at(0.5, 0.02), at(1.04, 0.95), at(-0.04, 0.95)];
            painter.add(Shape::convex_polygon(
                corners,
                colour,
                Stroke::new(1.0, colour),
            ));
            letter("!", 0.6);
        }
        Badge::Error => {
            let (a, b) = (0.293, 0.707);
            let corners = [
                (a, 0.0),
                (b, 0.0),
                (1.0, a),
                (1.0, b),
                (b, 1.0),
                (a, 1.0),
                (0.0, b),
                (0.0, a),
            ]
            .map(|(x, y)| at(x, y));
            painter.add(Shape::convex_polygon(
                corners.to_vec(),
                colour,
                Stroke::NONE,
            ));
            painter.line_segment([at(0.33, 0.33), at(0.67, 0.67)], stroke);
            painter.line_segment([at(0.67, 0.33), at(0.33, 0.67)], stroke);
        }
    }
}
