//! One row: the label, the field, the slider under both, and why a text was refused.

use eframe::egui::{
    Align2, Id, Label, Pos2, Rect, RichText, Sense, TextStyle, TextWrapMode, Ui, WidgetText, pos2,
    vec2,
};

use super::draft::{Script, Typed, draft_ui};
use super::slider::{Reach, Slider, slider_ui};

/// Height of a field.
pub(super) const FIELD: f32 = 22.0;
/// Height kept for the slider, so that rows below do not move when it shows.
const LANE: f32 = 9.0;
/// Share of the width that the label takes: the same everywhere, so that fields align.
const LABEL_SHARE: f32 = 0.42;
const GAP: f32 = 6.0;
/// Share of the field's place that the nominal keeps beside a tolerance.
const NOMINAL_SHARE: f32 = 0.54;
/// Room for the sign between them.
const SIGN: f32 = 15.0;

/// What a row is about.
pub(super) struct Row<'a> {
    pub id: Id,
    pub label: &'a str,
    pub hover: Option<&'a str>,
    pub si: f64,
    pub script: Script<'a>,
    pub reach: Option<Reach>,
}

/// A second, short field behind "±".
pub(super) struct Tolerance<'a> {
    pub si: f64,
    pub script: Script<'a>,
}

/// New values, where there are any.
#[derive(Debug, Default, Clone, Copy, PartialEq)]
pub(super) struct Changes {
    pub si: Option<f64>,
    pub tolerance_si: Option<f64>,
}

/// The whole row.
pub(super) fn row_ui(ui: &mut Ui, row: &Row<'_>, tolerance: Option<&Tolerance<'_>>) -> Changes {
    let width = ui.available_width().max(120.0);
    let lane_height = if row.reach.is_some() { LANE } else { 0.0 };
    let (_, area) = ui.allocate_space(vec2(width, FIELD + lane_height));
    let top = Rect::from_min_size(area.min, vec2(width, FIELD));
    let split = (area.left() + LABEL_SHARE * width).round();
    let fields = Rect::from_min_max(pos2(split, top.top()), top.max);
    let nominal = if tolerance.is_some() {
        let right = (fields.left() + NOMINAL_SHARE * (fields.width() - SIGN)).round();
        fields.with_max_x(right)
    } else {
        fields
    };

    let slider_id = row.id.with("slider");
    label_ui(
        ui,
        row,
        Rect::from_min_max(top.min, pos2(split - GAP, top.bottom())),
    );
    let typed = field_ui(
        ui,
        row.id,
        nominal,
        row.label,
        row.hover,
        row.si,
        &row.script,
    );
    let mut changes = Changes {
        si: typed.si,
        tolerance_si: None,
    };

    if let Some(reach) = &row.reach {
        let lane = Rect::from_min_max(pos2(area.left(), top.bottom()), area.max);
        let focused = ui.memory(|memory| memory.has_focus(row.id) || memory.has_focus(slider_id));
        let idle_hand = !ui.input(|input| input.pointer.any_down());
        let lively = ui.is_enabled() && (focused || (idle_hand && ui.rect_contains_pointer(area)));
        let now = changes.si.unwrap_or(row.si);
        let slider = Slider {
            id: slider_id,
            label: row.label,
            reach,
            script: &row.script,
        };
        changes.si = slider_ui(ui, &slider, lane, now, lively).or(changes.si);
    }

    let mut refused = typed.refused;
    if let Some(tolerance) = tolerance {
        let place = fields.with_min_x(nominal.right() + SIGN);
        sign_ui(
            ui,
            pos2(0.5 * (nominal.right() + place.left()), place.center().y),
        );
        let name = format!("{}, tolerance", row.label);
        let id = row.id.with("tolerance");
        let typed = field_ui(ui, id, place, &name, None, tolerance.si, &tolerance.script);
        changes.tolerance_si = typed.si;
        refused = refused.or(typed.refused);
    }
    if let Some(reason) = refused {
        refusal_ui(ui, &reason);
    }
    changes
}

fn label_ui(ui: &mut Ui, row: &Row<'_>, rect: Rect) {
    let text = WidgetText::from(RichText::new(row.label).text_style(TextStyle::Body));
    let galley = text.into_galley(
        ui,
        Some(TextWrapMode::Truncate),
        rect.width(),
        TextStyle::Body,
    );
    let elided = galley.elided;
    let position = pos2(rect.left(), rect.center().y - 0.5 * galley.size().y);
    ui.painter()
        .galley(position, galley, ui.visuals().text_color());
    // Clicks go to the field, but the label is no stop on the way of the Tab key.
    let response = ui.interact(rect, row.id.with("label"), Sense::CLICK);
    if response.clicked() {
        ui.memory_mut(|memory| memory.request_focus(row.id));
    }
    match (elided, row.hover) {
        (false, None) => {}
        (false, Some(hover)) => drop(response.on_hover_text(hover)),
        (true, None) => drop(response.on_hover_text(row.label)),
        (true, Some(hover)) => drop(response.on_hover_text(format!("{}\n{hover}", row.label))),
    }
}

fn field_ui(
    ui: &mut Ui,
    id: Id,
    rect: Rect,
    label: &str,
    hover: Option<&str>,
    si: f64,
    script: &Script<'_>,
) -> Typed {
    let typed = draft_ui(ui, id, rect, label, si, script);
    if let Some(hover) = hover.filter(|_| typed.refused.is_none()) {
        // Spoken here, but shown at the label only: over the field a tooltip
        // would cover the slider that the hand is on its way to.
        ui.ctx()
            .accesskit_node_builder(id, |node| node.set_description(hover));
    }
    typed
}

fn sign_ui(ui: &Ui, center: Pos2) {
    let font = TextStyle::Body.resolve(ui.style());
    ui.painter().text(
        center,
        Align2::CENTER_CENTER,
        "±",
        font,
        ui.visuals().weak_text_color(),
    );
}

fn refusal_ui(ui: &mut Ui, reason: &str) {
    let colour = ui.visuals().error_fg_color;
    let text = RichText::new(format!("Not taken: {reason}"))
        .text_style(TextStyle::Small)
        .color(colour);
    ui.add(Label::new(text).wrap());
}
