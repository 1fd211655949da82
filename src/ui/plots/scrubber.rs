//! The one temperature that all pictures share, and what the unit is like there.

use eframe::egui::{
    Align2, CornerRadius, CursorIcon, FontId, Rangef, Rect, RichText, Sense, Stroke, TextStyle, Ui,
    pos2, vec2,
};

use super::axis::{Axis, Home, Scale};
use super::grip::grip;
use super::say;
use crate::assess::Assessment;
use crate::design::Design;
use crate::units::{Kind, Temperature, Units};
use crate::words;

/// A slider over the temperatures drawn, with the conditions marked on it, and one
/// line that says what the unit is like there. Nothing where nothing is drawn.
pub fn scrubber_ui(
    ui: &mut Ui,
    design: &Design,
    a: &Assessment,
    units: &Units,
    scrubber: &mut Temperature,
) {
    let Ok(charts) = &a.charts else { return };
    slider_ui(ui, design, charts.span, units, scrubber);
    ui.label(RichText::new(read_out(a, units, *scrubber)));
}

/// `at 41.0 °C: 1.180 bar abs · 63 % liquid · two-phase · saturation … · allowable …`
pub(super) fn read_out(a: &Assessment, units: &Units, at: Temperature) -> String {
    let mut text = format!("at {}: ", units.show(at));
    match a.corners.as_ref().map(|corners| corners.nominal.state(at)) {
        Ok(Ok(state)) => {
            text += &say::state_pressure(&state, units, 4);
            if let Some(share) = state.liquid_share {
                text += &format!(" · {} liquid", say::percent(share, units, 3));
            }
            text += &format!(" · {}", words::regime(state.regime));
        }
        Ok(Err(error)) => text += &say::fluid(&error, units),
        Err(missing) => text += &words::missing(missing, units),
    }
    if let Ok(saturation) = a.fluid.saturation_pressure(at) {
        text += &format!(" · saturation {}", say::pressure(saturation, units, 3));
    }
    match a.limits_at(at) {
        Some((allowable, _)) => {
            text += &format!(" · allowable {}", say::pressure(allowable, units, 3))
        }
        None => text += " · allowable not known",
    }
    text
}

fn slider_ui(
    ui: &mut Ui,
    design: &Design,
    span: (Temperature, Temperature),
    units: &Units,
    scrubber: &mut Temperature,
) {
    let size = vec2(ui.available_width().max(160.0), 26.0);
    let (rect, _) = ui.allocate_exact_size(size, Sense::hover());
    let visuals = ui.visuals();
    let (faint, strong) = (visuals.weak_text_color(), visuals.text_color());
    let knob = visuals.selection.stroke.color;
    let font = FontId::proportional(TextStyle::Body.resolve(ui.style()).size);
    let painter = ui.painter_at(rect);
    let name = painter.text(
        rect.left_center(),
        Align2::LEFT_CENTER,
        "temperature",
        font,
        strong,
    );
    let rail = Rangef::new(name.right() + 14.0, rect.right() - 10.0);
    let home = Home {
        scale: Scale::Linear,
        low: span.0.kelvin(),
        high: span.1.kelvin(),
    };
    let axis = Axis::rail(home, rail);
    let degree = units.unit_for(Kind::Temperature, span.1.kelvin());
    let number = |t: Temperature| degree.number_of(t.kelvin());

    let hit = Rect::from_x_y_ranges(rail.expand(8.0), rect.y_range());
    let id = ui.scope_id().with("temperature");
    let range = (number(span.0), number(span.1));
    let grip = grip(
        ui,
        id,
        hit,
        "temperature",
        number(*scrubber),
        range,
        &units.show(*scrubber),
    );
    let pointed = grip
        .response
        .interact_pointer_pos()
        .filter(|_| {
            grip.response.dragged()
                || grip.response.clicked()
                || grip.response.is_pointer_button_down_on()
        })
        .map(|pointer| axis.rounded_si(pointer.x, degree));
    // A two-hundredth of the span, but on whole tenths of a degree.
    let step = (0.005 * (range.1 - range.0) * 10.0).round().max(1.0) / 10.0;
    let stepped = (grip.steps != 0.0).then(|| degree.to_si(number(*scrubber) + grip.steps * step));
    if let Some(si) = pointed
        .or(grip.set.map(|number| degree.to_si(number)))
        .or(stepped)
        && let Ok(to) = Temperature::from_kelvin(si.clamp(span.0.kelvin(), span.1.kelvin()))
    {
        *scrubber = to;
    }

    let y = rect.center().y;
    let c = &design.conditions;
    painter.hline(rail, y, Stroke::new(2.0, faint.gamma_multiply(0.5)));
    let working = Rangef::new(
        axis.px(c.working_low.kelvin()),
        axis.px(c.working_high.kelvin()),
    );
    let working = Rect::from_x_y_ranges(working, Rangef::new(y - 2.5, y + 2.5));
    painter.rect_filled(working, CornerRadius::same(2), faint);
    for t in [c.coldest, c.hottest] {
        painter.vline(
            axis.px(t.kelvin()),
            Rangef::new(y - 6.0, y + 6.0),
            Stroke::new(1.5, faint),
        );
    }
    let at = pos2(axis.px(scrubber.kelvin().clamp(home.low, home.high)), y);
    let radius = if grip.response.hovered() || grip.response.dragged() {
        8.0
    } else {
        7.0
    };
    painter.circle(at, radius, knob, Stroke::new(2.0, ui.visuals().panel_fill));
    if grip.response.has_focus() {
        painter.circle_stroke(at, 10.0, Stroke::new(1.5, strong));
    }
    grip.response
        .on_hover_and_drag_cursor(CursorIcon::ResizeHorizontal);
}
