//! The parts list: shapes, sizes, walls, and a measured volume over their sum.

use eframe::egui::{
    Align, Button, ComboBox, Id, Layout, RichText, Role, TextEdit, Ui, WidgetInfo, vec2,
};

use super::design::name;
use crate::assess::{Assessment, FindingKind, Library};
use crate::chamber::{Chamber, Dimension, HeatTreatment, MeasuredVolume, Part, Shape, Wall};
use crate::ui::theme::Palette;
use crate::ui::widgets::{QuantityField, quantity_with_tolerance_row};
use crate::units::{Kind, Length, Units};
use crate::words;

pub fn decision(a: &Assessment, units: &Units) -> String {
    a.volumes.as_ref().map_or_else(
        |_| "no volume".to_owned(),
        |volumes| units.show(volumes.nominal),
    )
}

/// What a part's buttons ask for, done after the list is drawn.
enum Change {
    Remove(usize),
    Duplicate(usize),
    Up(usize),
}

pub fn chamber_ui(
    ui: &mut Ui,
    chamber: &mut Chamber,
    a: &Assessment,
    library: &Library,
    units: &Units,
) {
    volume_ui(ui, a, units);
    let mut change = None;
    let total: f64 = chamber
        .parts
        .iter()
        .map(|part| part.volumes().nominal_m3)
        .sum();
    for (index, part) in chamber.parts.iter_mut().enumerate() {
        let faults = faults_of(a, index);
        ui.push_id(("part", index), |ui| {
            part_ui(ui, index, part, total, &faults, library, units, &mut change)
        });
    }
    match change {
        Some(Change::Remove(index)) => drop(chamber.parts.remove(index)),
        Some(Change::Duplicate(index)) => {
            let copy = chamber.parts[index].clone();
            chamber.parts.insert(index + 1, copy);
        }
        Some(Change::Up(index)) => chamber.parts.swap(index - 1, index),
        None => {}
    }
    add_ui(ui, chamber, library);
    measured_ui(ui, chamber, a, units);
}

fn volume_ui(ui: &mut Ui, a: &Assessment, units: &Units) {
    let text = match &a.volumes {
        Ok(volumes) => format!(
            "Inside {}, {} to {}",
            units.show(volumes.nominal),
            units.show(volumes.least),
            units.show(volumes.greatest)
        ),
        Err(reason) => words::missing(reason, units),
    };
    ui.label(RichText::new(text).color(Palette::in_use(ui).text_faint));
}

#[expect(
    clippy::too_many_arguments,
    reason = "a row of the list shows and edits all of it"
)]
fn part_ui(
    ui: &mut Ui,
    index: usize,
    part: &mut Part,
    total: f64,
    faults: &[String],
    library: &Library,
    units: &Units,
    change: &mut Option<Change>,
) {
    let palette = Palette::in_use(ui);
    let open_id = Id::unique(("part open", index));
    let mut open = ui.data(|data| data.get_temp(open_id)).unwrap_or(false);
    let row = vec2(ui.available_width(), ui.spacing().interact_size.y);
    ui.allocate_ui_with_layout(row, Layout::right_to_left(Align::Center), |ui| {
        let volume = part.volumes().nominal_m3;
        let share = if total > 0.0 {
            format!(", {:.0} %", 100.0 * volume / total)
        } else {
            String::new()
        };
        let text = format!("{}{share}", units.show_si(Kind::Volume, volume, 3));
        ui.label(RichText::new(text).color(palette.text_faint));
        // The name takes what is left, however long it is.
        ui.with_layout(Layout::left_to_right(Align::Center), |ui| {
            let mark = if faults.is_empty() { "" } else { "!  " };
            let called = if part.name.trim().is_empty() {
                "unnamed part"
            } else {
                &part.name
            };
            let title = RichText::new(format!("{mark}{called}"));
            let title = if faults.is_empty() {
                title
            } else {
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
    for fault in faults {
        ui.label(RichText::new(fault).color(palette.error));
    }
    if open {
        ui.indent("part", |ui| {
            body_ui(ui, index, part, library, units, change);
        });
    }
}

fn body_ui(
    ui: &mut Ui,
    index: usize,
    part: &mut Part,
    library: &Library,
    units: &Units,
    change: &mut Option<Change>,
) {
    let response = ui.add(TextEdit::singleline(&mut part.name).desired_width(f32::INFINITY));
    response.widget_info(|| WidgetInfo::labeled(Role::TextInput, true, "Name of the part"));
    if response.has_focus() {
        ui.data_mut(|data| {
            data.insert_temp(
                super::design::editing_text_id(),
                ui.ctx().cumulative_pass_nr(),
            )
        });
    }
    ui.horizontal(|ui| {
        ui.label(part.shape.kind_name());
        ui.label("×");
        let mut count = part.count;
        let drag = eframe::egui::DragValue::new(&mut count)
            .range(1..=999)
            .speed(0.05);
        let response = ui.add(drag);
        response.widget_info(|| WidgetInfo::drag_value(true, f64::from(part.count)));
        part.count = count;
        ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
            if ui.small_button("Remove").clicked() {
                *change = Some(Change::Remove(index));
            }
            if ui.small_button("Duplicate").clicked() {
                *change = Some(Change::Duplicate(index));
            }
            if index > 0
                && ui
                    .small_button("Up")
                    .on_hover_text("Move before the part above")
                    .clicked()
            {
                *change = Some(Change::Up(index));
            }
        });
    });
    for (salt, (label, dimension)) in part.shape.dimensions_mut().into_iter().enumerate() {
        dimension_ui(
            ui,
            &words::upper(label),
            dimension,
            (1e-3, 1.0),
            salt,
            units,
        );
    }
    match &mut part.wall {
        Some(wall) => wall_ui(ui, wall, library, units),
        None if part.shape.is_insert() => {}
        None if ui.button("Give it a wall").clicked() => part.wall = default_wall(library),
        None => {}
    }
}

fn dimension_ui(
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
        .id_salt(salt);
    quantity_with_tolerance_row(ui, field, tolerance);
}

fn wall_ui(ui: &mut Ui, wall: &mut Wall, library: &Library, units: &Units) {
    let shown = library
        .materials
        .get(&wall.material)
        .map_or(wall.material.as_str(), |m| m.name.as_str())
        .to_owned();
    let width = ui.available_width() - 8.0;
    let combo = ComboBox::from_id_salt("material")
        .width(width)
        .selected_text(shown);
    let response = combo
        .show_ui(ui, |ui| {
            for material in library.materials.iter() {
                ui.selectable_value(&mut wall.material, material.id.clone(), &material.name);
            }
        })
        .response;
    name(&response, "Wall material");
    let combo = ComboBox::from_id_salt("treatment")
        .width(width)
        .selected_text(format!("last heat: {}", wall.treatment.name()));
    let response = combo
        .show_ui(ui, |ui| {
            for treatment in HeatTreatment::ALL {
                ui.selectable_value(&mut wall.treatment, treatment, treatment.name());
            }
        })
        .response;
    name(&response, "Last heat treatment");
    dimension_ui(
        ui,
        "Wall thickness",
        &mut wall.thickness,
        (5e-5, 0.02),
        99,
        units,
    );
}

fn add_ui(ui: &mut Ui, chamber: &mut Chamber, library: &Library) {
    ui.menu_button("Add a part…", |ui| {
        for shape in Shape::default_of_each_kind() {
            if ui.button(shape.kind_name()).clicked() {
                let wall = if shape.is_insert() {
                    None
                } else {
                    chamber
                        .parts
                        .iter()
                        .rev()
                        .find_map(|part| part.wall.clone())
                };
                let wall = wall.or_else(|| {
                    if shape.is_insert() {
                        None
                    } else {
                        default_wall(library)
                    }
                });
                let name = shape.kind_name().to_owned();
                chamber.parts.push(Part {
                    name,
                    shape,
                    count: 1,
                    wall,
                });
                ui.close();
            }
        }
    });
}

fn default_wall(library: &Library) -> Option<Wall> {
    let material = library
        .materials
        .get("copper-c12200-annealed")
        .or_else(|| library.materials.iter().next())?;
    Some(Wall {
        material: material.id.clone(),
        thickness: Dimension::exact(Length::from_metre(1e-3).ok()?),
        treatment: HeatTreatment::default(),
    })
}

fn measured_ui(ui: &mut Ui, chamber: &mut Chamber, a: &Assessment, units: &Units) {
    let mut measured = chamber.measured.is_some();
    if ui
        .checkbox(&mut measured, "Measured volume instead of the sum")
        .changed()
    {
        chamber.measured =
            a.volumes
                .as_ref()
                .ok()
                .filter(|_| measured)
                .map(|volumes| MeasuredVolume {
                    volume: volumes.nominal,
                    uncertainty: crate::units::Volume::from_cubic_metre(
                        0.005 * volumes.nominal.cubic_metre(),
                    )
                    .unwrap_or(volumes.nominal),
                });
    }
    if let Some(MeasuredVolume {
        volume,
        uncertainty,
    }) = &mut chamber.measured
    {
        let field = QuantityField::new("Measured", volume, units)
            .slider(1e-8, 1.0)
            .logarithmic();
        quantity_with_tolerance_row(ui, field, uncertainty);
    }
}

fn faults_of(a: &Assessment, index: usize) -> Vec<String> {
    a.findings
        .iter()
        .filter_map(|finding| match &finding.kind {
            FindingKind::Chamber(fault) if fault.part() == Some(index) => {
                Some(words::chamber_fault(fault, None, &Units::default()))
            }
            _ => None,
        })
        .collect()
}
