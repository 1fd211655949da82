//! The slim slider under a field.

use eframe::egui::{
    Color32, EventFilter, Id, Key, Pos2, Rect, Response, Sense, Shape, Stroke, Ui, WidgetInfo,
    accesskit, lerp, pos2, remap, vec2,
};

use super::draft::Script;

/// Which values a slider reaches, in SI.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Reach {
    pub low: f64,
    pub high: f64,
    pub logarithmic: bool,
}

impl Reach {
    /// Where a value sits, from 0 to 1; outside for a value out of reach.
    pub fn share_of(&self, si: f64) -> f64 {
        if self.is_logarithmic() {
            (si.max(self.low * 1e-3).ln() - self.low.ln()) / (self.high.ln() - self.low.ln())
        } else {
            (si - self.low) / (self.high - self.low)
        }
    }

    /// The value at a share, rounded to what a hand can set: a step of the linear
    /// range, or three figures (four in `fine` steps).
    fn value_at(&self, share: f64, fine: bool, script: &Script<'_>) -> f64 {
        let share = share.clamp(0.0, 1.0);
        let si = if self.is_logarithmic() {
            (self.low.ln() + share * (self.high.ln() - self.low.ln())).exp()
        } else {
            self.low + share * (self.high - self.low)
        };
        let unit = if si == 0.0 {
            script.unit
        } else {
            script.units.unit_for(script.kind, si)
        };
        let number = unit.number_of(si);
        let quantum = if self.is_logarithmic() {
            power_of_ten_below(number.abs()) * if fine { 1e-3 } else { 1e-2 }
        } else {
            let step = if fine { 1e-3 } else { 1.0 / 300.0 };
            power_of_ten_below((self.high - self.low) / unit.scale * step)
        };
        let rounded = if quantum > 0.0 {
            rounded_to(number, quantum)
        } else {
            number
        };
        unit.to_si(rounded).clamp(self.low, self.high)
    }

    fn is_logarithmic(&self) -> bool {
        self.logarithmic && self.low > 0.0
    }
}

/// A slider and what it moves.
pub(super) struct Slider<'a> {
    pub id: Id,
    pub label: &'a str,
    pub reach: &'a Reach,
    pub script: &'a Script<'a>,
}

/// The slider in `lane`; a new value where it was moved. `lively` draws it as
/// something to take hold of, otherwise it is a hint of where the value sits.
pub(super) fn slider_ui(
    ui: &mut Ui,
    slider: &Slider<'_>,
    lane: Rect,
    si: f64,
    lively: bool,
) -> Option<f64> {
    let Slider {
        id,
        label,
        reach,
        script,
    } = *slider;
    let mut response = ui.interact(lane.expand2(vec2(0.0, 2.0)), id, Sense::click_and_drag());
    if response.drag_started() || response.clicked() {
        // So that the arrow keys go on from where the hand left it.
        response.request_focus();
    }
    let rail = lane.shrink2(vec2(HANDLE, 0.0));
    let mut moved = None;
    if let Some(pointer) = response
        .interact_pointer_pos()
        .filter(|_| response.is_pointer_button_down_on())
    {
        moved = Some(reach.value_at(share_at(pointer, rail), false, script));
    }
    if let Some((steps, fine)) = keyboard_steps(ui, &response) {
        let here = reach.share_of(si).clamp(0.0, 1.0);
        moved = Some(reach.value_at(here + steps, fine, script));
    }
    if let Some(number) = asked_by_assistive_tool(ui, id) {
        moved = Some(script.unit.to_si(number).clamp(reach.low, reach.high));
    }
    let moved = moved.filter(|value| *value != si && (script.check)(*value).is_ok());
    if moved.is_some() {
        response.mark_changed();
    }
    let now = moved.unwrap_or(si);
    describe(ui, &response, label, now, reach, script);
    paint(ui, &response, lane, rail, reach.share_of(now), lively);
    moved
}

/// Radius of the handle.
const HANDLE: f32 = 6.0;

/// Share of the range that one arrow key moves.
const STEP: f64 = 0.01;

fn share_at(pointer: Pos2, rail: Rect) -> f64 {
    f64::from(remap(pointer.x, rail.left()..=rail.right(), 0.0..=1.0))
}

/// Steps asked for by keys, as a share of the range, and whether they are fine.
fn keyboard_steps(ui: &Ui, response: &Response) -> Option<(f64, bool)> {
    use accesskit::Action::{Decrement, Increment};
    let mut steps = ui.input(|input| {
        input.num_accesskit_action_requests(response.id, Increment) as f64
            - input.num_accesskit_action_requests(response.id, Decrement) as f64
    });
    let mut fine = false;
    if response.has_focus() {
        let filter = EventFilter {
            horizontal_arrows: true,
            ..EventFilter::default()
        };
        ui.memory_mut(|memory| memory.set_focus_lock_filter(response.id, filter));
        ui.input(|input| {
            let presses = |key| input.num_presses(key) as f64;
            fine = input.modifiers.shift;
            let size = if fine { 0.1 } else { 1.0 };
            steps += size * (presses(Key::ArrowRight) - presses(Key::ArrowLeft));
            steps += 10.0 * (presses(Key::PageUp) - presses(Key::PageDown));
            // More than the whole range: the far end.
            steps += 1e3 * (presses(Key::End) - presses(Key::Home));
        });
    }
    (steps != 0.0).then_some((steps * STEP, fine))
}

fn asked_by_assistive_tool(ui: &Ui, id: Id) -> Option<f64> {
    ui.input(|input| {
        input
            .accesskit_action_requests(id, accesskit::Action::SetValue)
            .filter_map(|request| match request.data {
                Some(accesskit::ActionData::NumericValue(value)) if value.is_finite() => {
                    Some(value)
                }
                _ => None,
            })
            .last()
    })
}

/// Tells assistive tools the value in the unit that is shown.
fn describe(
    ui: &Ui,
    response: &Response,
    label: &str,
    si: f64,
    reach: &Reach,
    script: &Script<'_>,
) {
    let number = script.unit.number_of(si);
    response.widget_info(|| WidgetInfo::slider(ui.is_enabled(), number, label));
    ui.ctx().accesskit_node_builder(response.id, |node| {
        node.set_value(script.shown(si));
        node.set_min_numeric_value(script.unit.number_of(reach.low));
        node.set_max_numeric_value(script.unit.number_of(reach.high));
        node.set_numeric_value_step((reach.high - reach.low) / script.unit.scale * STEP);
        node.add_action(accesskit::Action::SetValue);
        node.add_action(accesskit::Action::Increment);
        node.add_action(accesskit::Action::Decrement);
    });
}

fn paint(ui: &Ui, response: &Response, lane: Rect, rail: Rect, share: f64, lively: bool) {
    if !ui.is_rect_visible(lane) {
        return;
    }
    let visuals = ui.visuals();
    let accent = visuals.selection.stroke.color;
    let groove = visuals.widgets.inactive.bg_stroke.color;
    let thickness = if lively { 4.0 } else { 2.0 };
    let here = lerp(rail.left()..=rail.right(), share.clamp(0.0, 1.0) as f32);
    let bar = |from: f32, to: f32| {
        Rect::from_min_max(
            pos2(from, lane.center().y - 0.5 * thickness),
            pos2(to, lane.center().y + 0.5 * thickness),
        )
    };
    let painter = ui.painter();
    painter.rect_filled(bar(lane.left(), lane.right()), 2.0, groove);
    let fill = if lively {
        accent
    } else {
        groove.lerp_to_gamma(accent, 0.45)
    };
    painter.rect_filled(bar(lane.left(), here), 2.0, fill);
    let center = pos2(here, lane.center().y);
    if lively {
        let radius = if response.hovered() || response.dragged() {
            HANDLE
        } else {
            HANDLE - 1.0
        };
        let ground = visuals.text_edit_bg_color();
        painter.circle(center, radius, ground, Stroke::new(2.0, accent));
        if response.has_focus() {
            painter.circle_stroke(center, radius + 2.0, Stroke::new(1.5, accent));
        }
    } else {
        painter.circle_filled(center, 3.0, fill);
    }
    if !(0.0..=1.0).contains(&share) {
        painter.add(beyond(center, share > 1.0, visuals.text_color()));
    }
}

/// A small wedge: the value lies beyond this end.
fn beyond(center: Pos2, right: bool, colour: Color32) -> Shape {
    let way = if right { 1.0 } else { -1.0 };
    let tip = center + vec2(way * 4.0, 0.0);
    let back = center - vec2(way * 1.0, 0.0);
    Shape::convex_polygon(
        vec![tip, back + vec2(0.0, 3.0), back - vec2(0.0, 3.0)],
        colour,
        Stroke::NONE,
    )
}

fn power_of_ten_below(value: f64) -> f64 {
    if value > 0.0 {
        10f64.powi(value.log10().floor() as i32)
    } else {
        0.0
    }
}

/// To a multiple of a power of ten, without the dust of binary fractions.
fn rounded_to(number: f64, quantum: f64) -> f64 {
    if quantum < 1.0 {
        let scale = (1.0 / quantum).round();
        (number * scale).round() / scale
    } else {
        (number / quantum).round() * quantum
    }
}
