//! One part of the list: its row, and its body when it is open.

use eframe::egui::{
    Align, Button, DragValue, Id, Layout, RichText, Role, TextEdit, Ui, WidgetInfo, vec2,
};

use super::wall::{made_of_ui, rating_ui, wall_ui};
use super::{Change, share};
use crate::assess::Library;
use crate::chamber::{Capacity, Dimension, Field, Part, PlateEdge, Role as PartRole, Shape, Zone};
use crate::ui::panels::design::editing_text_id;
use crate::ui::theme::Palette;
use crate::ui::widgets::{ChoiceWidth, QuantityField, choice_ui, quantity_with_tolerance_row};
use crate::units::{Kind, Units};
use crate::words;

/// What a row shows of its place in the list.
pub struct Row<'a> {
    pub index: usize,
    pub count: usize,
    pub total_m3: f64,
    pub faults: &'a [String],
}

pub fn part_ui(
    ui: &mut Ui,
    row: &Row<'_>,
    part: &mut Part,
    library: &Library,
    units: &Units,
    change: &mut Option<Change>,
) {
    let palette = Palette::in_use(ui);
    let open_id = Id::unique(("part open", row.index));
    let mut open = ui.data(|data| data.get_temp(open_id)).unwrap_or(false);
    let size = vec2(ui.available_width(), ui.spacing().interact_size.y);
    ui.allocate_ui_with_layout(size, Layout::right_to_left(Align::Center), |ui| {
        let inside = part.volumes().inside;
        let share = share(&inside, row.total_m3)
            .map_or_else(String::new, |share| format!(", {:.0} %", 100.0 * share));
        let text = format!(
            "{}{share}",
            units.show_si(Kind::Volume, inside.nominal_m3, 3)
        )
        .replace('-', "−");
        ui.label(RichText::new(text).color(palette.text_faint));
        // The name takes what is left, however long it is.
        ui.with_layout(Layout::left_to_right(Align::Center), |ui| {
            let called = if part.name.trim().is_empty() {
                "unnamed part"
            } else {
                &part.name
            };
            let title = if row.faults.is_empty() {
                RichText::new(called)
            } else {
                let title = RichText::new(format!("!  {called}"));
                title.color(palette.error).strong()
            };
            let button = Button::selectable(open, title).truncate();
            if ui
                .add(button)
                .on_hover_text(part.shape.kind_name())
                .clicked()
            {
                open = !open;
            }
        });
    });
    ui.data_mut(|data| data.insert_temp(open_id, open));
    for fault in row.faults {
        ui.label(RichText::new(fault).color(palette.error));
    }
    if open {
        ui.indent("part", |ui| {
            body_ui(ui, row, part, library, units, change);
        });
    }
}

fn body_ui(
    ui: &mut Ui,
    row: &Row<'_>,
    part: &mut Part,
    library: &Library,
    units: &Units,
    change: &mut Option<Change>,
) {
    text_ui(ui, &mut part.name, "Name of the part", "name");
    head_ui(ui, row, part, change);
    sizes_ui(ui, &mut part.shape, units);
    zone_ui(ui, part);
    match part.shape.role() {
        PartRole::Cavity | PartRole::Lid => {
            match &mut part.wall {
                Some(wall) => wall_ui(ui, wall, library, units),
                None if ui.button("Give it a wall").clicked() => {
                    part.wall = super::wall::default_wall(library);
                }
                None => {}
            }
            rating_ui(ui, &mut part.rating, false, units);
        }
        PartRole::Rated => {
            made_of_ui(ui, &mut part.made_of, library);
            rating_ui(ui, &mut part.rating, true, units);
        }
        PartRole::Insert | PartRole::Wick => made_of_ui(ui, &mut part.made_of, library),
    }
}

fn head_ui(ui: &mut Ui, row: &Row<'_>, part: &mut Part, change: &mut Option<Change>) {
    let index = row.index;
    ui.horizontal(|ui| {
        ui.label(part.shape.kind_name());
        ui.label("×");
        count_ui(ui, "How many alike", &mut part.count, 1);
    });
    ui.horizontal(|ui| {
        let mut button = |label: &str, hint: &str, on: bool, wanted: Change| {
            let response = ui.add_enabled(on, Button::new(label).small());
            if response.on_hover_text(hint).clicked() {
                *change = Some(wanted);
            }
        };
        let last = index + 1 == row.count;
        button("Up", "Before the part above", index > 0, Change::Up(index));
        button("Down", "After the part below", !last, Change::Down(index));
        button(
            "Duplicate",
            "The same once more",
            true,
            Change::Duplicate(index),
        );
        button("Remove", "Undo brings it back", true, Change::Remove(index));
    });
}

fn sizes_ui(ui: &mut Ui, shape: &mut Shape, units: &Units) {
    for (salt, (label, dimension)) in shape.dimensions_mut().into_iter().enumerate() {
        dimension_ui(
            ui,
            &words::upper(label),
            dimension,
            (1e-4, 1.0),
            salt,
            units,
        );
    }
    for (salt, (label, field)) in shape.more_fields_mut().into_iter().enumerate() {
        field_ui(ui, &words::upper(label), field, 40 + salt, units);
    }
    if let Shape::FlatEnd { edge, .. } | Shape::PlateEnd { edge, .. } = shape {
        let said = |edge: PlateEdge| match edge {
            PlateEdge::Clamped => "rim held, cannot turn",
            PlateEdge::SimplySupported => "rim can turn (careful)",
        };
        let shown = said(*edge);
        choice_ui(
            ui,
            "How its rim is held",
            shown,
            ChoiceWidth::Column,
            edge,
            [PlateEdge::SimplySupported, PlateEdge::Clamped]
                .map(|edge| (edge, said(edge).to_owned())),
        );
    }
    if let Shape::Wick(wick) = shape {
        let figures = wick.figures();
        let shown = |kind, value: Result<f64, _>| {
            value.map_or_else(|_| "–".to_owned(), |si| units.show_si(kind, si, 3))
        };
        let text = format!(
            "Porosity {}, permeability {}, pore radius {}",
            shown(Kind::Ratio, figures.porosity),
            shown(Kind::Area, figures.permeability_m2),
            shown(Kind::Length, figures.pore_radius_m)
        );
        ui.label(RichText::new(text).color(Palette::in_use(ui).text_faint));
        entered_ui(ui, wick, units);
    }
}

/// Measured figures of a wick, each in the place of its relation.
fn entered_ui(ui: &mut Ui, wick: &mut crate::chamber::Wick, units: &Units) {
    use crate::units::{Length, Permeability, Quantity, Ratio};
    fn one<Q: Quantity>(
        ui: &mut Ui,
        label: &str,
        value: &mut Option<Q>,
        from: Result<f64, crate::chamber::WickError>,
        salt: usize,
        units: &Units,
    ) {
        let mut entered = value.is_some();
        let response = ui.checkbox(&mut entered, format!("{label} as measured"));
        if response.changed() {
            *value = from
                .ok()
                .and_then(|si| Q::from_si(si).ok())
                .filter(|_| entered);
        }
        if let Some(value) = value {
            QuantityField::new(label, value, units)
                .id_salt(salt)
                .show(ui);
        }
    }
    let figures = wick.figures();
    let entered = &mut wick.entered;
    one::<Ratio>(
        ui,
        "Porosity",
        &mut entered.porosity,
        figures.porosity,
        60,
        units,
    );
    one::<Permeability>(
        ui,
        "Permeability",
        &mut entered.permeability,
        figures.permeability_m2,
        61,
        units,
    );
    one::<Length>(
        ui,
        "Pore radius",
        &mut entered.pore_radius,
        figures.pore_radius_m,
        62,
        units,
    );
}

fn zone_ui(ui: &mut Ui, part: &mut Part) {
    choice_ui(
        ui,
        "Zone of the device",
        part.zone.name(),
        ChoiceWidth::Column,
        &mut part.zone,
        Zone::ALL.map(|zone| (zone, zone.name().to_owned())),
    );
}

pub fn dimension_ui(
    ui: &mut Ui,
    label: &str,
    dimension: &mut Dimension,
    range: (f64, f64),
    salt: usize,
    units: &Units,
) {
    let Dimension { nominal, tolerance } = dimension;
    let field = QuantityField::new(label, nominal, units)
        .slider(range.0, range.1)
        .logarithmic()
        .trimmed()
        .id_salt(salt);
    quantity_with_tolerance_row(ui, field, tolerance);
}

pub fn capacity_ui(ui: &mut Ui, label: &str, capacity: &mut Capacity, salt: usize, units: &Units) {
    let Capacity { nominal, tolerance } = capacity;
    let field = QuantityField::new(label, nominal, units)
        .slider(0.0, 5e-6)
        .trimmed()
        .id_salt(salt);
    quantity_with_tolerance_row(ui, field, tolerance);
}

fn field_ui(ui: &mut Ui, label: &str, field: Field<'_>, salt: usize, units: &Units) {
    match field {
        Field::Size(dimension) => dimension_ui(ui, label, dimension, (1e-4, 1.0), salt, units),
        Field::Share(share) => {
            let field = QuantityField::new(label, share, units).slider(0.0, 1.0);
            field.digits(3).id_salt(salt).show(ui);
        }
        Field::Mesh(mesh) => {
            let field = QuantityField::new(label, mesh, units).slider(500.0, 30_000.0);
            field.logarithmic().digits(3).id_salt(salt).show(ui);
        }
        Field::Factor(factor) => {
            let field = QuantityField::new(label, factor, units).slider(1.0, 1.5);
            field.digits(3).id_salt(salt).show(ui);
        }
        Field::Capacity(capacity) => capacity_ui(ui, label, capacity, salt, units),
        Field::Count(count) => {
            ui.horizontal(|ui| {
                ui.label(label);
                ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
                    count_ui(ui, label, count, 0);
                });
            });
        }
    }
}

fn count_ui(ui: &mut Ui, label: &str, count: &mut u32, least: u32) {
    let response = ui.add(DragValue::new(count).range(least..=9999).speed(0.05));
    let value = f64::from(*count);
    response.widget_info(|| WidgetInfo {
        label: Some(label.to_owned()),
        ..WidgetInfo::drag_value(true, value)
    });
}

/// A line of text: one undo step, not one a letter.
pub fn text_ui(ui: &mut Ui, text: &mut String, label: &str, salt: &str) {
    let id = ui.make_persistent_id(("text", salt));
    let field = TextEdit::singleline(text)
        .id(id)
        .hint_text(label)
        .desired_width(f32::INFINITY);
    let response = ui.add(field);
    response.widget_info(|| WidgetInfo::labeled(Role::TextInput, true, label));
    if response.has_focus() {
        ui.data_mut(|data| data.insert_temp(editing_text_id(), ui.ctx().cumulative_pass_nr()));
    }
}
