//! The fluid picker: search, facts, choice.

use eframe::egui::{Align, RichText, Role, ScrollArea, TextEdit, Ui, WidgetInfo};

use super::section::fact_ui;
use crate::assess::{Assessment, Library};
use crate::design::{Design, FluidId};
use crate::fluid::{Entry, Fluid};

/// View-only state of the picker.
#[derive(Debug, Default)]
pub struct FluidPanel {
    search: String,
    /// The fluid last scrolled to.
    in_sight: Option<FluidId>,
}

pub fn decision(a: &Assessment) -> String {
    format!("{}, {}", a.fluid.name(), nature(a.fluid.entry()))
}

pub fn fluid_ui(
    ui: &mut Ui,
    design: &mut Design,
    a: &Assessment,
    library: &Library,
    panel: &mut FluidPanel,
) {
    let response = ui.add(
        TextEdit::singleline(&mut panel.search)
            .hint_text("name, CAS or refrigerant number")
            .desired_width(f32::INFINITY),
    );
    response.widget_info(|| WidgetInfo::labeled(Role::TextInput, true, "Search fluids"));
    let wanted = panel.search.to_lowercase();
    ScrollArea::vertical()
        .id_salt("fluids")
        .max_height(132.0)
        .auto_shrink([false, true])
        .show(ui, |ui| {
            let mut any = false;
            for fluid in library
                .fluids
                .entries()
                .filter(|fluid| matches(fluid, &wanted))
            {
                any = true;
                let chosen = fluid.id() == design.fluid.as_str();
                let own = fluid.own_file().map_or("", |_| "your own, ");
                let label = format!("{}   {own}{}", fluid.name(), nature(fluid));
                let row = ui.selectable_label(chosen, label);
                if chosen && panel.in_sight.as_ref() != Some(&design.fluid) {
                    // Another fluid than last time, by whatever way: bring it into sight.
                    row.scroll_to_me(Some(Align::Center));
                    panel.in_sight = Some(design.fluid.clone());
                }
                if row.clicked() {
                    design.fluid = FluidId::from(fluid);
                    panel.in_sight = Some(design.fluid.clone());
                }
            }
            if !any {
                let text = format!("No fluid here answers to “{}”.", panel.search.trim());
                ui.label(RichText::new(text).weak());
            }
        });
    facts_ui(ui, &a.fluid);
}

fn facts_ui(ui: &mut Ui, fluid: &Fluid) {
    const LABELS: f32 = 76.0;
    ui.add_space(4.0);
    if let Some(own) = fluid.own_file() {
        fact_ui(ui, LABELS, "Your own", &own.name);
    }
    fact_ui(ui, LABELS, "CAS", fluid.cas());
    fact_ui(ui, LABELS, "Formula", fluid.formula());
    if let Some(number) = fluid.refrigerant() {
        let group = fluid.safety().group.as_ref();
        let text = group.map_or_else(
            || number.to_owned(),
            |group| format!("{number}, group {}", group.value),
        );
        let row = fact_ui(ui, LABELS, "Refrigerant", &text);
        if let Some(group) = group {
            row.on_hover_text(group.source.to_string());
        }
    }
    fact_ui(ui, LABELS, "Model", fluid.model_kind()).on_hover_ui(|ui| {
        ui.label(fluid.model_sources().join("\n"));
    });
}

pub(super) const HARMLESS: &str = "no fire or poison class";

/// What it does to people, in a few words.
pub(super) fn nature(fluid: &Entry) -> String {
    let mut words = Vec::new();
    if fluid.is_flammable() {
        words.push("flammable");
    }
    if fluid.is_toxic() {
        words.push("harmful");
    }
    if fluid.is_corrosive() {
        words.push("corrosive");
    }
    if words.is_empty() {
        HARMLESS.to_owned()
    } else {
        words.join(", ")
    }
}

pub(super) fn matches(fluid: &Entry, wanted: &str) -> bool {
    if wanted.is_empty() {
        return true;
    }
    let hit = |text: &str| text.to_lowercase().contains(wanted);
    hit(fluid.id())
        || hit(fluid.name())
        || hit(fluid.cas())
        || hit(fluid.formula())
        || fluid.refrigerant().is_some_and(hit)
        || fluid.also().any(hit)
}
