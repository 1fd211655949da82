//! A section of the left column: closed, it shows its decision in one line.

use eframe::egui::collapsing_header::paint_default_icon;
use eframe::egui::{
    self, Align, Align2, FontSelection, Id, Margin, Rect, RichText, Role, ScrollArea, Sense,
    StrokeKind, TextStyle, TextWrapMode, Ui, WidgetInfo, WidgetText, pos2, vec2,
};

use crate::ui::theme::Palette;

const HEIGHT: f32 = 26.0;
const ICON: f32 = 18.0;

/// One section; `decision` is what a closed one shows. `show_now` opens it and
/// scrolls to it.
pub fn section_ui(
    ui: &mut Ui,
    title: &str,
    decision: &str,
    open_at_start: bool,
    show_now: bool,
    body: impl FnOnce(&mut Ui),
) {
    let id = Id::unique(("section", title));
    let mut open = ui.data(|data| data.get_temp(id)).unwrap_or(open_at_start);
    let (rect, response) =
        ui.allocate_exact_size(vec2(ui.available_width(), HEIGHT), Sense::click());
    if response.clicked() {
        open = !open;
    }
    open |= show_now;
    ui.data_mut(|data| data.insert_temp(id, open));
    response.widget_info(|| WidgetInfo::selected(Role::Button, true, open, title));
    if show_now {
        response.scroll_to_me(Some(Align::TOP));
    }
    header(
        ui,
        rect,
        &response,
        title,
        if open { "" } else { decision },
        open,
    );
    if open {
        egui::Frame::NONE
            .inner_margin(Margin {
                left: 8,
                right: 0,
                top: 2,
                bottom: 8,
            })
            .show(ui, body);
    }
    ui.painter().hline(
        rect.x_range(),
        ui.min_rect().bottom() + 1.0,
        ui.visuals().widgets.noninteractive.bg_stroke,
    );
    ui.add_space(3.0);
}

fn header(
    ui: &mut Ui,
    rect: Rect,
    response: &egui::Response,
    title: &str,
    decision: &str,
    open: bool,
) {
    let palette = Palette::in_use(ui);
    let visuals = *ui.style().interact(response);
    if response.hovered() || response.has_focus() {
        ui.painter().rect(
            rect,
            4.0,
            visuals.weak_bg_fill,
            visuals.bg_stroke,
            StrokeKind::Inside,
        );
    }
    let icon = Rect::from_center_size(
        pos2(rect.left() + 0.5 * ICON, rect.center().y),
        vec2(10.0, 10.0),
    );
    let mut child = ui.new_child(egui::UiBuilder::new().max_rect(icon));
    let icon_response = response.clone().with_new_rect(icon);
    paint_default_icon(&mut child, if open { 1.0 } else { 0.0 }, &icon_response);
    let font = TextStyle::Body.resolve(ui.style());
    let at = pos2(rect.left() + ICON + 2.0, rect.center().y);
    let strong = WidgetText::from(RichText::new(title).strong());
    let galley = strong.into_galley(
        ui,
        Some(TextWrapMode::Extend),
        f32::INFINITY,
        FontSelection::FontId(font.clone()),
    );
    let title_rect = Align2::LEFT_CENTER.anchor_size(at, galley.size());
    ui.painter().galley(title_rect.min, galley, palette.text);
    if !decision.is_empty() {
        let from = title_rect.right() + 10.0;
        let room = (rect.right() - 4.0 - from).max(0.0);
        let faint = WidgetText::from(RichText::new(decision).color(palette.text_faint));
        let galley = faint.into_galley(
            ui,
            Some(TextWrapMode::Truncate),
            room,
            FontSelection::FontId(font),
        );
        let rect = Align2::LEFT_CENTER.anchor_size(pos2(from, rect.center().y), galley.size());
        ui.painter().galley(rect.min, galley, palette.text_faint);
    }
}

/// A column that scrolls down and never sideways.
pub fn column_ui(ui: &mut Ui, name: &str, body: impl FnOnce(&mut Ui)) {
    ScrollArea::vertical()
        .id_salt(name)
        .auto_shrink(false)
        .show(ui, |ui| {
            // Room for the scroll bar, so that nothing hides under it.
            ui.set_max_width(ui.available_width());
            body(ui);
        });
}

/// A small heading inside a section.
pub fn subheading_ui(ui: &mut Ui, text: &str) {
    ui.add_space(4.0);
    ui.label(
        RichText::new(text)
            .small()
            .strong()
            .color(Palette::in_use(ui).text_faint),
    );
}

/// A label and its value in two columns; a long value wraps in its own. Unlike a grid
/// it is laid out in one pass, also in the first frame.
pub fn fact_ui(ui: &mut Ui, label_width: f32, label: &str, value: &str) -> egui::Response {
    let row = ui.horizontal_top(|ui| {
        let height = ui.text_style_height(&TextStyle::Body);
        let layout = egui::Layout::left_to_right(Align::Min);
        ui.allocate_ui_with_layout(vec2(label_width, height), layout, |ui| {
            ui.set_min_width(label_width);
            ui.label(RichText::new(label).color(Palette::in_use(ui).text_faint));
        });
        ui.add(egui::Label::new(value).wrap())
    });
    // Rows of one list stand closer than separate things do.
    ui.add_space(3.0 - ui.spacing().item_spacing.y);
    row.inner
}
