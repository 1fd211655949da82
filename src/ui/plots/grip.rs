//! What is dragged: a handle with a keyboard and a voice, and the line of the scrubber.

use eframe::egui::accesskit::{Action, ActionData};
use eframe::egui::{
    Align2, CornerRadius, CursorIcon, EventFilter, Id, Key, Painter, Pos2, Rect, Response, Sense,
    Stroke, Ui, WidgetInfo, pos2, vec2,
};

use super::canvas::Canvas;
use super::say;
use crate::ui::theme::Palette;
use crate::units::{Kind, Quantity, Temperature, Units};

/// What was done to a handle in this frame.
pub(super) struct Grip {
    pub response: Response,
    /// Arrow keys to the right less those to the left; ten each with Shift.
    pub steps: f64,
    /// A number that a screen reader asked for, in the unit shown.
    pub set: Option<f64>,
}

/// A handle that behaves as a slider, wherever it is painted. `number` and `range`
/// are in the unit shown.
pub(super) fn grip(
    ui: &Ui,
    id: Id,
    rect: Rect,
    name: &str,
    number: f64,
    range: (f64, f64),
    text: &str,
) -> Grip {
    let response = ui.interact(rect, id, Sense::click_and_drag());
    if response.is_pointer_button_down_on() || response.dragged() {
        response.request_focus();
    }
    let mut steps = 0.0;
    if response.has_focus() {
        let filter = EventFilter {
            horizontal_arrows: true,
            ..EventFilter::default()
        };
        ui.memory_mut(|memory| memory.set_focus_lock_filter(id, filter));
        ui.input(|input| {
            steps = input.num_presses(Key::ArrowRight) as f64
                - input.num_presses(Key::ArrowLeft) as f64;
            if input.modifiers.shift {
                steps *= 10.0;
            }
        });
    }
    let set = ui.input(|input| {
        steps += input.num_accesskit_action_requests(id, Action::Increment) as f64;
        steps -= input.num_accesskit_action_requests(id, Action::Decrement) as f64;
        input
            .accesskit_action_requests(id, Action::SetValue)
            .filter_map(|request| match request.data {
                Some(ActionData::NumericValue(value)) => Some(value),
                _ => None,
            })
            .last()
    });
    response.widget_info(|| WidgetInfo {
        current_text_value: Some(text.to_owned()),
        ..WidgetInfo::slider(true, number, name)
    });
    ui.ctx().accesskit_node_builder(id, |node| {
        node.set_min_numeric_value(range.0);
        node.set_max_numeric_value(range.1);
        for action in [Action::SetValue, Action::Increment, Action::Decrement] {
            node.add_action(action);
        }
    });
    Grip {
        response,
        steps,
        set,
    }
}

/// The round knob of a handle; a ring around it while it has the keyboard.
pub(super) fn knob(painter: &Painter, at: Pos2, radius: f32, grip: &Response, palette: &Palette) {
    let lifted = grip.hovered() || grip.dragged();
    let color = palette.charge;
    let radius = if lifted { radius + 1.0 } else { radius };
    painter.circle(at, radius, color, Stroke::new(2.0, palette.ground));
    if grip.has_focus() {
        painter.circle_stroke(at, radius + 3.0, Stroke::new(1.5, palette.text));
    }
}

/// The scrubber's temperature as a line that can be dragged: upright where
/// temperature runs across, level where it runs up. Its tag lies on the axis.
pub(super) fn scrub_line(
    ui: &Ui,
    canvas: &Canvas<'_>,
    upright: bool,
    units: &Units,
    span: (Temperature, Temperature),
    scrubber: &mut Temperature,
) {
    let axis = if upright { &canvas.x } else { &canvas.y };
    let frame = canvas.frame;
    let at = axis.px(scrubber.kelvin());
    let hit = if upright {
        Rect::from_center_size(pos2(at, frame.center().y), vec2(11.0, frame.height()))
    } else {
        Rect::from_center_size(pos2(frame.center().x, at), vec2(frame.width(), 11.0))
    };
    let inside = axis.contains(scrubber.kelvin());
    // Not focusable: the slider below the pictures is the same thing with a keyboard.
    let response = ui.interact(
        hit.intersect(frame),
        canvas.response.id.with("scrubber"),
        Sense::DRAG,
    );
    if response.dragged()
        && let Some(pointer) = response.interact_pointer_pos()
    {
        let unit = units.unit_for(Kind::Temperature, scrubber.si());
        let si = axis.rounded_si(if upright { pointer.x } else { pointer.y }, unit);
        if let Ok(to) = Temperature::from_kelvin(si.clamp(span.0.kelvin(), span.1.kelvin())) {
            *scrubber = to;
        }
    }
    let response = response.on_hover_and_drag_cursor(if upright {
        CursorIcon::ResizeHorizontal
    } else {
        CursorIcon::ResizeVertical
    });
    if !inside {
        return;
    }
    let color = canvas.palette.scrubber;
    let wide = if response.hovered() || response.dragged() {
        2.5
    } else {
        1.5
    };
    let text = say::temperature(*scrubber, units);
    let galley = canvas.galley(
        text.split('\u{a0}').next().unwrap_or(&text),
        canvas.palette.ground,
    );
    let size = galley.size() + vec2(8.0, 2.0);
    let at = axis.px(scrubber.kelvin());
    let tag = if upright {
        canvas
            .inside
            .vline(at, frame.y_range(), Stroke::new(wide, color));
        Align2::CENTER_TOP.anchor_size(pos2(at, frame.bottom() + 3.0), size)
    } else {
        canvas
            .inside
            .hline(frame.x_range(), at, Stroke::new(wide, color));
        Align2::RIGHT_CENTER.anchor_size(pos2(frame.left() - 2.0, at), size)
    };
    canvas
        .outside
        .rect_filled(tag, CornerRadius::same(3), color);
    canvas
        .outside
        .galley(tag.min + vec2(4.0, 1.0), galley, canvas.palette.ground);
}
