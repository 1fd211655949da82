//! What else the walls must stand: bake-out, leak test, autoclave and the like.

use eframe::egui::{Button, Ui};

use super::chamber::text_ui;
use crate::conditions::{Conditions, Contents, Exposure};
use crate::ui::widgets::{ChoiceWidth, QuantityField, choice_ui};
use crate::units::Units;
use crate::words;

pub fn decision(conditions: &Conditions) -> String {
    match conditions.exposures.as_slice() {
        [] => "none".to_owned(),
        [one] => one.name.clone(),
        more => format!("{}: {}, …", more.len(), more[0].name),
    }
}

pub fn exposures_ui(ui: &mut Ui, conditions: &mut Conditions, units: &Units) {
    let mut remove = None;
    for (index, exposure) in conditions.exposures.iter_mut().enumerate() {
        ui.push_id(("exposure", index), |ui| {
            if index > 0 {
                ui.separator();
            }
            if exposure_ui(ui, exposure, units) {
                remove = Some(index);
            }
        });
    }
    if let Some(index) = remove {
        conditions.exposures.remove(index);
    }
    let usual = Exposure::usual(conditions);
    ui.menu_button("Add an exposure…", |ui| {
        for (exposure, where_from) in usual {
            let button = ui.button(words::upper(&exposure.name));
            if button.on_hover_text(where_from).clicked() {
                conditions.exposures.push(exposure);
                ui.close();
            }
        }
    });
}

/// True where it is to be removed.
fn exposure_ui(ui: &mut Ui, exposure: &mut Exposure, units: &Units) -> bool {
    text_ui(ui, &mut exposure.name, "Name of the exposure", "name");
    let mut remove = false;
    ui.horizontal(|ui| {
        choice_ui(
            ui,
            "What is inside meanwhile",
            exposure.contents.name(),
            ChoiceWidth::Text,
            &mut exposure.contents,
            Contents::ALL.map(|contents| (contents, contents.name().to_owned())),
        );
        remove = ui.add(Button::new("Remove").small()).clicked();
    });
    for (label, value) in [
        ("From", &mut exposure.coldest),
        ("To", &mut exposure.hottest),
    ] {
        QuantityField::new(label, value, units)
            .slider(223.15, 473.15)
            .show(ui);
    }
    for (label, value) in [
        ("Least outside", &mut exposure.least_outside),
        ("Most outside", &mut exposure.greatest_outside),
    ] {
        QuantityField::new(label, value, units)
            .slider(0.0, 5e5)
            .hover("Absolute pressure outside the wall")
            .show(ui);
    }
    remove
}
