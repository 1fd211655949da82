//! The ground of a picture: frame, axes, zoom, and the gutters in which lines are named.
//!
//! Painted by hand and not by a plot widget: the same ground carries a second axis,
//! a logarithm, a reciprocal, and areas bounded from side to side.

use eframe::egui::text::Galley;
use eframe::egui::{
    Align2, Color32, CornerRadius, FontId, Painter, Pos2, Rangef, Rect, Response, Role, Sense,
    Shape, Stroke, StrokeKind, TextStyle, Ui, WidgetInfo, pos2, vec2,
};
use std::sync::Arc;

use super::axis::{Axis, Home};
use super::view::{View, turn_view};
use crate::ui::theme::Palette;
use crate::units::Unit;

/// Space around the frame, in points.
#[derive(Debug, Clone, Copy)]
pub(super) struct Margins {
    pub left: f32,
    pub right: f32,
    pub top: f32,
    pub bottom: f32,
}

pub(super) struct Canvas<'a> {
    pub x: Axis,
    pub y: Axis,
    pub frame: Rect,
    pub response: Response,
    /// A double click on the whole picture asks for more room.
    pub to_enlarge: bool,
    /// Paints inside the frame only.
    pub inside: Painter,
    /// Paints on the gutters as well.
    pub outside: Painter,
    pub palette: &'a Palette,
    /// Heights and places across where a tag covers the axis: no number is written there.
    pub tagged: (Option<f32>, Option<f32>),
    /// Of ticks and labels.
    pub font: FontId,
    /// Of the names of areas.
    pub name_font: FontId,
}

impl<'a> Canvas<'a> {
    /// Takes what room there is and paints the empty frame.
    pub fn new(
        ui: &mut Ui,
        homes: (Home, Home),
        margins: Margins,
        view: &mut View,
        palette: &'a Palette,
    ) -> Self {
        let size = ui.available_size();
        let height = if size.y.is_finite() { size.y } else { 330.0 };
        let (rect, _) =
            ui.allocate_exact_size(vec2(size.x.max(220.0), height.max(130.0)), Sense::hover());
        let frame = Rect::from_min_max(
            rect.min + vec2(margins.left, margins.top),
            rect.max - vec2(margins.right, margins.bottom),
        );
        // Not focusable: what can be done here by pointer, the slider and the charge
        // handle do by keyboard.
        let response = ui.interact(
            frame,
            ui.scope_id().with("frame"),
            Sense::CLICK | Sense::DRAG,
        );
        let to_enlarge = turn_view(ui, &response, frame, view);
        let outside = ui.painter_at(rect.expand(2.0));
        let inside = ui.painter_at(frame);
        inside.rect_filled(frame, CornerRadius::ZERO, palette.ground);
        let body = TextStyle::Body.resolve(ui.style());
        let font = FontId::new((0.87 * body.size).max(11.0), body.family.clone());
        Self {
            x: Axis::new(homes.0, view.x, (frame.left(), frame.right())),
            y: Axis::new(homes.1, view.y, (frame.bottom(), frame.top())),
            frame,
            response,
            to_enlarge,
            inside,
            outside,
            palette,
            tagged: (None, None),
            font,
            name_font: FontId::new(body.size, body.family),
        }
    }

    pub fn at(&self, x_si: f64, y_si: f64) -> Pos2 {
        pos2(self.x.px(x_si), self.y.px(y_si))
    }

    /// What a reader who cannot see the picture is told.
    pub fn describe(&self, sentence: impl Fn() -> String) {
        self.response
            .widget_info(|| WidgetInfo::labeled(Role::Image, true, sentence()));
    }

    /// Grid lines and numbers of the upright axis, at least `spacing` points apart; its
    /// unit stands above the numbers.
    pub fn y_axis(&self, unit: &Unit, unit_text: &str, spacing: f32) {
        let left = self.frame.left() - 7.0;
        for tick in self.y.ticks(unit, spacing) {
            let y = self.inside.round_to_pixel_center(self.y.px(tick.si));
            self.inside.hline(self.frame.x_range(), y, self.grid());
            self.outside.hline(
                Rangef::new(self.frame.left() - 4.0, self.frame.left()),
                y,
                self.axis_stroke(),
            );
            if !near(self.tagged.1, y, 15.0) {
                self.text(
                    pos2(left, y),
                    Align2::RIGHT_CENTER,
                    &tick.text,
                    self.palette.text_faint,
                );
            }
        }
        self.text(
            pos2(left, self.frame.top() - 6.0),
            Align2::RIGHT_BOTTOM,
            unit_text,
            self.palette.text,
        );
    }

    /// Grid lines and numbers of the level axis `below` points under the frame; its
    /// name stands to the right of the numbers.
    pub fn x_axis(&self, unit: &Unit, name: &str, below: f32) {
        let y = self
            .inside
            .round_to_pixel_center(self.frame.bottom() + below);
        for tick in self.x.ticks(unit, 52.0) {
            let x = self.inside.round_to_pixel_center(self.x.px(tick.si));
            self.inside.vline(x, self.frame.y_range(), self.grid());
            self.outside
                .vline(x, Rangef::new(y, y + 4.0), self.axis_stroke());
            if !near(self.tagged.0, x, 24.0) {
                self.text(
                    pos2(x, y + 6.0),
                    Align2::CENTER_TOP,
                    &tick.text,
                    self.palette.text_faint,
                );
            }
        }
        self.text(
            pos2(self.frame.right() + 14.0, y + 6.0),
            Align2::LEFT_TOP,
            name,
            self.palette.text,
        );
    }

    pub fn border(&self) {
        self.outside.rect_stroke(
            self.frame,
            CornerRadius::ZERO,
            self.axis_stroke(),
            StrokeKind::Outside,
        );
    }

    /// Leaves room on an axis for the tag of a level (upright axis) or upright line.
    pub fn leave_room(&mut self, upright: bool, kelvin: f64) {
        if upright {
            self.tagged.0 = self.x.contains(kelvin).then(|| self.x.px(kelvin));
        } else {
            self.tagged.1 = self.y.contains(kelvin).then(|| self.y.px(kelvin));
        }
    }

    /// Lines of the conditions: clear, but behind the lines of the fluid.
    pub fn condition_stroke(&self) -> Stroke {
        Stroke::new(1.0, self.palette.condition.gamma_multiply(0.45))
    }

    pub fn axis_stroke(&self) -> Stroke {
        Stroke::new(1.0, self.palette.text_faint.gamma_multiply(0.7))
    }

    fn grid(&self) -> Stroke {
        Stroke::new(1.0, self.palette.text_faint.gamma_multiply(0.14))
    }

    /// Text anywhere, gutters included.
    pub fn text(&self, at: Pos2, anchor: Align2, text: &str, color: Color32) -> Rect {
        self.outside
            .text(at, anchor, text, self.font.clone(), color)
    }

    pub fn galley(&self, text: &str, color: Color32) -> Arc<Galley> {
        self.outside
            .layout_no_wrap(text.to_owned(), self.font.clone(), color)
    }

    /// Text on a ground of its own, so that lines behind it do not cross it.
    pub fn backed(&self, rect: Rect, galley: Arc<Galley>, ground: Color32) {
        self.inside
            .rect_filled(rect.expand2(vec2(3.0, 0.0)), CornerRadius::same(3), ground);
        self.inside.galley(rect.min, galley, self.palette.text);
    }

    /// A broken line through some points.
    pub fn dashed(&self, points: &[Pos2], stroke: Stroke, dash: f32, gap: f32) {
        self.inside.extend(
            dashes(points, dash, gap)
                .into_iter()
                .map(|ends| Shape::line_segment(ends, stroke)),
        );
    }

    /// Where the pointer rests in the frame, with no button down.
    pub fn resting_pointer(&self, ui: &Ui) -> Option<Pos2> {
        if !ui.rect_contains_pointer(self.frame) || ui.input(|i| i.pointer.any_down()) {
            return None;
        }
        ui.input(|i| i.pointer.hover_pos())
    }
}

fn near(tag: Option<f32>, at: f32, reach: f32) -> bool {
    tag.is_some_and(|tag| (tag - at).abs() < reach)
}

/// Dashes along a line. Each is straight from its start to its end: with points closer
/// together than a dash, pieces cut at the points would be too short to be seen.
fn dashes(points: &[Pos2], dash: f32, gap: f32) -> Vec<[Pos2; 2]> {
    /// A line that leaves far outside the frame is not worth more.
    const MOST: usize = 1500;
    let mut dashes = Vec::new();
    let (mut along, mut next, mut lit) = (0.0, 0.0, false);
    let mut from = Pos2::ZERO;
    for pair in points.windows(2) {
        let length = pair[0].distance(pair[1]);
        while next <= along + length && dashes.len() < MOST {
            let at = pair[0] + (pair[1] - pair[0]) * ((next - along) / length.max(1e-6));
            if lit {
                dashes.push([from, at]);
            } else {
                from = at;
            }
            next += if lit { gap } else { dash };
            lit = !lit;
        }
        along += length;
    }
    if let (true, Some(end)) = (lit, points.last()) {
        dashes.push([from, *end]);
    }
    dashes
}
