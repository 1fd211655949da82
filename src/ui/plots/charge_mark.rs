//! The present charge in the charge map: a band as wide as its tolerance, the
//! window of allowed mass along the axis, and the handle between them.

use eframe::egui::{
    Align2, CornerRadius, CursorIcon, Rangef, Rect, Sense, Shape, Stroke, TextStyle, Ui, pos2,
};
use egui_plot::LineStyle;

use super::PlotState;
use super::canvas::Canvas;
use super::grip::{grip, knob};
use super::items::Items;
use super::say;
use crate::assess::{Assessment, ChargeFigures};
use crate::ui::theme::Palette;
use crate::units::{Kind, Mass, Units};

/// Points from the frame down to the axis that carries the window.
pub(super) const TRACK: f32 = 11.0;
const KNOB: f32 = 6.0;

/// The stretch of allowed mass along the axis.
pub(super) fn window_ui(ui: &Ui, canvas: &Canvas<'_>, a: &Assessment, units: &Units) {
    let palette = canvas.palette;
    let y = canvas.frame.bottom() + TRACK;
    let across = canvas.frame.x_range();
    canvas.outside.hline(across, y, canvas.axis_stroke());
    let Ok(window) = &a.window else { return };
    let cap = |x: f32, color| {
        if across.expand(1.0).contains(x) {
            canvas
                .outside
                .vline(x, Rangef::new(y - 6.0, y + 6.0), Stroke::new(2.0, color));
        }
    };
    let lower = window
        .lower
        .as_ref()
        .map(|bound| canvas.x.px(bound.mass.kilogram()));
    let upper = window
        .upper
        .as_ref()
        .map(|bound| canvas.x.px(bound.mass.kilogram()));
    let color = if window.is_empty() {
        palette.error
    } else {
        palette.window
    };
    let (from, to) = (lower.unwrap_or(across.min), upper.unwrap_or(across.max));
    let stretch = Rangef::new(from.min(to), from.max(to)).intersection(across);
    if stretch.min < stretch.max {
        if window.is_empty() {
            // The ends have passed each other: a broken line between them.
            let points = [pos2(stretch.min, y), pos2(stretch.max, y)];
            canvas.outside.extend(Shape::dashed_line(
                &points,
                Stroke::new(3.0, color),
                4.0,
                3.0,
            ));
        } else {
            let bar = Rect::from_x_y_ranges(stretch, Rangef::new(y - 2.5, y + 2.5));
            canvas
                .outside
                .rect_filled(bar, CornerRadius::same(2), color);
        }
    }
    for end in [lower, upper].into_iter().flatten() {
        cap(end, color);
    }
    let word = if window.is_empty() {
        "no charge fits"
    } else {
        "allowed"
    };
    canvas.text(
        pos2(canvas.frame.right() + 14.0, y - 1.0),
        Align2::LEFT_CENTER,
        word,
        color,
    );
    let track = Rect::from_x_y_ranges(across, Rangef::new(y - 8.0, y + 8.0));
    ui.interact(track, canvas.response.id.with("window"), Sense::hover())
        .on_hover_ui(|ui| {
            for (word, bound) in [("At least", &window.lower), ("At most", &window.upper)] {
                if let Some(bound) = bound {
                    ui.label(say::bound(word, bound, units));
                }
            }
        });
}

/// Where the band lies, across.
pub(super) fn band(canvas: &Canvas<'_>, charge: &ChargeFigures) -> Rangef {
    let (least, greatest) = (
        canvas.x.px(charge.least.kilogram()),
        canvas.x.px(charge.greatest.kilogram()),
    );
    let centre = canvas.x.px(charge.nominal.kilogram());
    Rangef::new(least.min(centre - 1.0), greatest.max(centre + 1.0))
}

/// The ends of the window as upright dots, and the band over them.
pub(super) fn lay_charge(
    items: &mut Items,
    a: &Assessment,
    charge: &ChargeFigures,
    palette: &Palette,
) {
    if let Ok(window) = &a.window
        && !window.is_empty()
    {
        let dots = Stroke::new(0.8, palette.window);
        for bound in [&window.lower, &window.upper].into_iter().flatten() {
            let style = LineStyle::Dotted { spacing: 5.0 };
            items.upright(bound.mass.kilogram(), dots, style);
        }
    }
    let (least, greatest) = (charge.least.kilogram(), charge.greatest.kilogram());
    items.upright_band(least, greatest, palette.charge.gamma_multiply(0.28));
    let centre = Stroke::new(2.0, palette.charge);
    items.upright(charge.nominal.kilogram(), centre, LineStyle::Solid);
}

/// The handle: the band and its knob on the axis. Some(mass) when it is moved.
pub(super) fn handle_ui(
    ui: &Ui,
    canvas: &Canvas<'_>,
    a: &Assessment,
    charge: &ChargeFigures,
    units: &Units,
    state: &mut PlotState,
) -> Option<Mass> {
    let nominal = charge.nominal.kilogram();
    let unit = units.unit_for(Kind::Mass, nominal);
    let (low, high) = canvas.x.range();
    let greatest = state.map_home.map_or(high, |home| home.high);
    let centre = canvas.x.px(nominal);
    let y = canvas.frame.bottom() + TRACK;
    let seen = canvas.frame.x_range().expand(1.0).contains(centre);
    let hit = Rect::from_x_y_ranges(
        band(canvas, charge)
            .expand(4.0)
            .intersection(canvas.frame.x_range().expand(KNOB + 2.0)),
        Rangef::new(canvas.frame.top(), y + KNOB + 3.0),
    );
    let id = canvas.response.id.with("charge");
    let number = unit.number_of(nominal);
    let range = (0.0, unit.number_of(greatest));
    let grip = grip(
        ui,
        id,
        hit,
        "charge",
        number,
        range,
        &units.show(charge.nominal),
    );
    if grip.response.drag_started()
        && let Some(press) = ui.input(|i| i.pointer.press_origin())
    {
        state.charge_held = Some(press.x - centre);
    }
    if !grip.response.dragged() {
        state.charge_held = None;
    }
    let dragged = match (state.charge_held, grip.response.interact_pointer_pos()) {
        (Some(held), Some(pointer)) => Some(canvas.x.rounded_si(pointer.x - held, unit)),
        _ => None,
    };
    // A two-hundredth of the window, or of the mass where there is no window.
    let width = a
        .window
        .as_ref()
        .ok()
        .filter(|window| !window.is_empty())
        .and_then(|window| window.ends());
    let step = 0.005 * width.map_or(nominal, |(low, high)| high.kilogram() - low.kilogram());
    let stepped = (grip.steps != 0.0).then_some(nominal + grip.steps * step);
    let asked = grip.set.map(|number| unit.to_si(number));
    if seen {
        knob(
            &canvas.outside,
            pos2(centre, y),
            KNOB,
            &grip.response,
            canvas.palette,
        );
        if state.dragging() {
            let text = format!(
                "{} ± {}",
                units.show(charge.nominal),
                units.show_beside(tolerance(charge), charge.nominal, 2)
            );
            canvas.read_out(pos2(centre, canvas.frame.top() + 44.0), &text);
        }
    }
    grip.response
        .on_hover_and_drag_cursor(CursorIcon::ResizeHorizontal);
    let least = 1e-4 * greatest;
    let low = if dragged.is_some() {
        low.max(least)
    } else {
        least
    };
    let to = dragged
        .or(asked)
        .or(stepped)?
        .clamp(low.min(greatest), greatest);
    Mass::from_kilogram(to)
        .ok()
        .filter(|mass| *mass != charge.nominal)
}

fn tolerance(charge: &ChargeFigures) -> Mass {
    Mass::from_kilogram(charge.greatest.kilogram() - charge.nominal.kilogram())
        .unwrap_or(charge.nominal)
}

/// Room for the axis, its numbers and the knob.
pub(super) fn bottom_margin(ui: &Ui) -> f32 {
    TRACK + 8.0 + ui.text_style_height(&TextStyle::Body)
}
