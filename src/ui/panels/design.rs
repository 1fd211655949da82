//! The left column: what goes in, section by section in the order of the job.

use eframe::egui::{Id, Role, TextEdit, Ui, WidgetInfo};

use super::fluid::FluidPanel;
use super::section::{column_ui, section_ui};
use super::{chamber, charge, conditions, exposures, fluid};
use crate::assess::{Assessment, Library, Section};
use crate::design::{Design, Duty};
use crate::ui::widgets::{ChoiceWidth, QuantityField, choice_ui};
use crate::units::{Pressure, Units};

/// View-only state of the column.
#[derive(Debug, Default)]
pub struct DesignPanel {
    /// A section to open and scroll to in the next frame.
    pub show_next: Option<Section>,
    fluid: FluidPanel,
}

/// Edits the design. The assessment only supplies the decisions that closed
/// sections show and the marks on faulty parts.
pub fn design_ui(
    ui: &mut Ui,
    design: &mut Design,
    a: &Assessment,
    library: &Library,
    units: &Units,
    panel: &mut DesignPanel,
) {
    let wanted = panel.show_next.take();
    let show = |section| wanted == Some(section);
    column_ui(ui, "design", |ui| {
        section_ui(ui, "Duty", design.duty.name(), false, false, |ui| {
            duty_ui(ui, design)
        });
        let decision = conditions::decision(design, units);
        section_ui(
            ui,
            "Conditions",
            &decision,
            true,
            show(Section::Conditions),
            |ui| {
                conditions::conditions_ui(ui, design, units);
            },
        );
        let decision = exposures::decision(&design.conditions);
        section_ui(
            ui,
            "Exposures",
            &decision,
            false,
            show(Section::Exposures),
            |ui| {
                exposures::exposures_ui(ui, &mut design.conditions, units);
            },
        );
        let decision = conditions::demands_decision(design, units);
        section_ui(
            ui,
            "Demands",
            &decision,
            false,
            show(Section::Demands),
            |ui| {
                conditions::demands_ui(ui, design, units);
            },
        );
        let decision = fluid::decision(a);
        section_ui(ui, "Fluid", &decision, true, show(Section::Fluid), |ui| {
            fluid::fluid_ui(ui, design, a, library, &mut panel.fluid);
        });
        let decision = chamber::decision(a, units);
        section_ui(
            ui,
            "Chamber",
            &decision,
            true,
            show(Section::Chamber),
            |ui| {
                chamber::chamber_ui(ui, &mut design.chamber, a, library, units);
            },
        );
        let decision = charge::decision(a, units);
        section_ui(ui, "Charge", &decision, true, show(Section::Charge), |ui| {
            charge::charge_ui(ui, design, a, units);
        });
        let decision = format!("balance {}", units.show_to(design.bench.balance, 2));
        section_ui(ui, "Bench", &decision, false, show(Section::Bench), |ui| {
            bench_ui(ui, design, units)
        });
        let decision = units.show_to(design.room.volume, 3);
        section_ui(ui, "Room", &decision, false, show(Section::Room), |ui| {
            room_ui(ui, design, units)
        });
    });
}

fn duty_ui(ui: &mut Ui, design: &mut Design) {
    text_ui(ui, "Title", &mut design.title, false);
    text_ui(ui, "Note", &mut design.note, true);
    choice_ui(
        ui,
        "Duty of the device",
        design.duty.name(),
        ChoiceWidth::Column,
        &mut design.duty,
        Duty::ALL.map(|duty| (duty, duty.name().to_owned())),
    );
}

fn text_ui(ui: &mut Ui, label: &str, text: &mut String, long: bool) {
    let field = if long {
        TextEdit::multiline(text).desired_rows(2)
    } else {
        TextEdit::singleline(text)
    };
    let id = Id::unique(("text", label));
    let response = ui.add(field.id(id).hint_text(label).desired_width(f32::INFINITY));
    // A text is one undo step, not one a letter.
    if response.has_focus() {
        ui.data_mut(|data| data.insert_temp(editing_text_id(), ui.ctx().cumulative_pass_nr()));
    }
    response.widget_info(|| WidgetInfo::labeled(Role::TextInput, true, label));
}

/// Where a focused text leaves the number of the frame it was edited in.
pub fn editing_text_id() -> Id {
    Id::unique("editing a text")
}

fn bench_ui(ui: &mut Ui, design: &mut Design, units: &Units) {
    let bench = &mut design.bench;
    QuantityField::new("Balance", &mut bench.balance, units)
        .slider(1e-7, 1e-2)
        .logarithmic()
        .digits(2)
        .hover("Greatest error of a weighing by difference")
        .show(ui);
    QuantityField::new("Purge loss", &mut bench.purge_loss, units)
        .slider(0.0, 0.01)
        .digits(3)
        .hover("Mass boiled off or purged after dispensing, before the seal")
        .show(ui);
    ui.checkbox(&mut bench.gauge, "A pressure gauge stays on the unit");
    let mut stated = bench.vacuum.is_some();
    if ui
        .checkbox(&mut stated, "Vacuum reached is stated")
        .changed()
    {
        bench.vacuum = Pressure::from_pascal(10.0).ok().filter(|_| stated);
    }
    if let Some(vacuum) = &mut bench.vacuum {
        QuantityField::new("Gas left", vacuum, units)
            .slider(0.01, 1e4)
            .logarithmic()
            .digits(2)
            .hover("Pressure of gas left inside as it is sealed, besides the fluid's own vapour")
            .show(ui);
    }
    ui.checkbox(&mut bench.degassed, "The fluid is degassed")
        .on_hover_text("Air dissolved in the fluid is taken out before the seal");
}

fn room_ui(ui: &mut Ui, design: &mut Design, units: &Units) {
    let room = &mut design.room;
    QuantityField::new("Room volume", &mut room.volume, units)
        .slider(1.0, 1000.0)
        .logarithmic()
        .digits(3)
        .hover("Closed room in which the unit may break")
        .show(ui);
    QuantityField::new("Room temperature", &mut room.temperature, units)
        .slider(263.15, 313.15)
        .show(ui);
    ui.checkbox(&mut room.consumers, "The public holds it");
}
