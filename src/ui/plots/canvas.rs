//! The ground of a picture: a plot with its frame, axes and zoom, and the gutters in
//! which lines are named. What no plot can do is painted over it.

use eframe::egui::text::Galley;
use eframe::egui::{
    Align2, Color32, CornerRadius, FontId, Painter, Pos2, Rangef, Rect, Response, Role, Sense,
    Stroke, StrokeKind, TextStyle, Ui, WidgetInfo, pos2, vec2,
};
use egui_plot::{AxisHints, GridMark, HPlacement, Plot, PlotTransform, VPlacement};
use std::sync::Arc;

use super::axis::{Axis, Home, Tick};
use super::items::Items;
use super::view::View;
use crate::ui::theme::Palette;
use crate::units::Unit;

/// Points above the frame.
const TOP: f32 = 24.0;
/// Points from an axis to its numbers.
const GAP: f32 = 6.0;

/// What stands on one side of the frame.
pub(super) struct Side<'u> {
    pub unit: &'u Unit,
    /// Beyond the numbers: right of the level ones, above the upright ones.
    pub name: &'u str,
    /// Least points between two numbers.
    pub spacing: f32,
    /// Points from the frame to the axis.
    pub away: f32,
    /// Points from the frame to the end of the picture.
    pub margin: f32,
    /// A value whose tag covers the axis: no number is written there.
    pub tag: Option<f64>,
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
    /// Of ticks and labels.
    pub font: FontId,
    /// Of the names of areas.
    pub name_font: FontId,
}

impl<'a> Canvas<'a> {
    /// Takes what room there is and shows the items in a plot with gutters.
    pub fn show(
        ui: &mut Ui,
        items: Items,
        (across, up): (Side<'_>, Side<'_>),
        right: f32,
        view: &mut View,
        palette: &'a Palette,
    ) -> Self {
        let size = ui.available_size();
        let height = if size.y.is_finite() { size.y } else { 330.0 };
        let size = vec2(size.x.max(220.0), height.max(130.0));
        let rect = Rect::from_min_size(ui.cursor().min, size);
        let (x, y) = (items.x, items.y);
        let bounds = view.bounds(&x, &y);
        let expected = Rect::from_min_max(
            rect.min + vec2(up.margin, TOP),
            rect.max - vec2(right, across.margin),
        );
        let place = PlotTransform::new(expected, bounds, false);
        let x_ticks = ticks(&Axis::new(x, false, place), &across, 24.0);
        let y_ticks = ticks(&Axis::new(y, true, place), &up, 15.0);
        let body = TextStyle::Body.resolve(ui.style());
        let font = FontId::new((0.87 * body.size).max(11.0), body.family.clone());
        let x_marks = |_| marks(&x_ticks, &x);
        let y_marks = |_| marks(&y_ticks, &y);
        let faint = palette.text_faint;
        let plot = Plot::new("plot")
            .width(size.x)
            .height(size.y)
            .sense(Sense::CLICK | Sense::DRAG)
            .allow_scroll(false)
            .allow_boxed_zoom(false)
            .allow_axis_zoom_drag(false)
            .allow_double_click_reset(false)
            .allow_drag(*view != View::default())
            .show_x(false)
            .show_y(false)
            .grid_color(faint.gamma_multiply(0.14))
            .x_grid_spacer(x_marks)
            .y_grid_spacer(y_marks)
            .custom_x_axes(vec![
                room(AxisHints::new_x(), across.away + GAP),
                room(AxisHints::new_x(), across.margin - across.away - GAP)
                    .tick_label_font(font.clone())
                    .tick_label_color(faint)
                    .formatter(|mark, _| text_at(&x_ticks, &x, mark)),
                room(AxisHints::new_x(), TOP).placement(VPlacement::Top),
            ])
            .custom_y_axes(vec![
                room(AxisHints::new_y(), 0.5 * GAP),
                room(AxisHints::new_y(), up.margin - 0.5 * GAP)
                    .tick_label_font(font.clone())
                    .tick_label_color(faint)
                    .formatter(|mark, _| text_at(&y_ticks, &y, mark)),
                room(AxisHints::new_y(), right).placement(HPlacement::Right),
            ]);
        let list = items.list;
        let shown = ui.scope(|ui| {
            // The border is painted last, over the areas.
            ui.visuals_mut().widgets.noninteractive.bg_stroke = Stroke::NONE;
            ui.visuals_mut().extreme_bg_color = palette.ground;
            plot.show(ui, |plot| {
                plot.set_plot_bounds(bounds);
                list.into_iter().for_each(|item| plot.add_item(item));
            })
        });
        let (rect, shown) = (shown.response.rect, shown.inner);
        let place = shown.transform;
        let before = *view;
        let to_enlarge = shown.response.double_clicked() && before == View::default();
        if shown.response.double_clicked() {
            *view = View::default();
        } else if *place.bounds() != bounds {
            *view = View::of(place.bounds(), &x, &y);
        }
        if *view != before || *place.bounds() != bounds {
            // The plot goes beyond the whole, and its numbers were chosen before it
            // moved: this picture is not shown but done again.
            ui.ctx().request_discard("zoomed or dragged");
            ui.ctx().request_repaint();
        }
        let frame = *place.frame();
        let canvas = Self {
            x: Axis::new(x, false, place),
            y: Axis::new(y, true, place),
            frame,
            response: shown.response,
            to_enlarge,
            inside: ui.painter_at(frame),
            outside: ui.painter_at(rect.expand(2.0)),
            palette,
            font,
            name_font: FontId::new(body.size, body.family),
        };
        canvas.finish_axes((&x_ticks, &y_ticks), (&across, &up));
        canvas
    }

    /// Short strokes at the numbers, and the names beyond them.
    fn finish_axes(&self, (x, y): (&[Tick], &[Tick]), (across, up): (&Side<'_>, &Side<'_>)) {
        let stroke = self.axis_stroke();
        let (left, top) = self.frame.left_top().into();
        for tick in y {
            let reach = Rangef::new(left - 4.0, left);
            self.outside.hline(reach, self.y.px(tick.si), stroke);
        }
        let bottom = self.frame.bottom() + across.away;
        for tick in x {
            let reach = Rangef::new(bottom, bottom + 4.0);
            self.outside.vline(self.x.px(tick.si), reach, stroke);
        }
        let text = self.palette.text;
        let above = pos2(left - 7.0, top - 6.0);
        self.text(above, Align2::RIGHT_BOTTOM, up.name, text);
        let beside = pos2(self.frame.right() + 14.0, bottom + GAP);
        self.text(beside, Align2::LEFT_TOP, across.name, text);
    }

    pub fn at(&self, x_si: f64, y_si: f64) -> Pos2 {
        pos2(self.x.px(x_si), self.y.px(y_si))
    }

    /// A line's points on the screen.
    pub fn points(&self, run: &[[f64; 2]]) -> Vec<Pos2> {
        run.iter().map(|[x, y]| self.at(*x, *y)).collect()
    }

    /// What a reader who cannot see the picture is told.
    pub fn describe(&self, sentence: impl Fn() -> String) {
        self.response
            .widget_info(|| WidgetInfo::labeled(Role::Image, true, sentence()));
    }

    pub fn border(&self) {
        self.outside.rect_stroke(
            self.frame,
            CornerRadius::ZERO,
            self.axis_stroke(),
            StrokeKind::Outside,
        );
    }

    pub fn axis_stroke(&self) -> Stroke {
        Stroke::new(1.0, self.palette.text_faint.gamma_multiply(0.7))
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

    /// Where the pointer rests in the frame, with no button down.
    pub fn resting_pointer(&self, ui: &Ui) -> Option<Pos2> {
        if !ui.rect_contains_pointer(self.frame) || ui.input(|i| i.pointer.any_down()) {
            return None;
        }
        ui.input(|i| i.pointer.hover_pos())
    }
}

/// Round values on an axis, without a number where a tag covers it.
fn ticks(axis: &Axis, side: &Side<'_>, reach: f32) -> Vec<Tick> {
    let mut ticks = axis.ticks(side.unit, side.spacing);
    if let Some(tag) = side.tag.filter(|tag| axis.contains(*tag)) {
        for tick in &mut ticks {
            if (axis.px(tick.si) - axis.px(tag)).abs() < reach {
                tick.text.clear();
            }
        }
    }
    ticks
}

/// Ticks as marks of the plot, all as strong as one a whole axis apart.
fn marks(ticks: &[Tick], home: &Home) -> Vec<GridMark> {
    let (low, high) = home.ends();
    let mark = |tick: &Tick| GridMark {
        value: home.at(tick.si),
        step_size: high - low,
    };
    ticks.iter().map(mark).collect()
}

fn text_at(ticks: &[Tick], home: &Home, mark: GridMark) -> String {
    let here = ticks.iter().find(|tick| home.at(tick.si) == mark.value);
    here.map(|tick| tick.text.clone()).unwrap_or_default()
}

/// An axis without numbers: room for what is painted beside the frame.
fn room(hints: AxisHints<'_>, thickness: f32) -> AxisHints<'_> {
    hints
        .min_thickness(thickness)
        .formatter(|_, _| String::new())
}
