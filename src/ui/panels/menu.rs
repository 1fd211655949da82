//! The menu bar, with the design's name at its right end.

use std::path::PathBuf;

use eframe::egui::{Align, Button, Label, Layout, MenuBar, RichText, TextWrapMode, Ui};

use crate::store;
use crate::ui::command::Command;
use crate::ui::desk::Desk;
use crate::ui::settings::Settings;
use crate::ui::theme::{Palette, Theme};
use crate::units::UnitSystem;

pub fn menu_ui(ui: &mut Ui, desk: &Desk, settings: &Settings, out: &mut Vec<Command>) {
    MenuBar::new().ui(ui, |ui| {
        ui.menu_button("File", |ui| file_ui(ui, &settings.recent, out));
        ui.menu_button("Edit", |ui| {
            entry(ui, Command::Undo, desk.can_undo(), out);
            entry(ui, Command::Redo, desk.can_redo(), out);
        });
        ui.menu_button("View", |ui| view_ui(ui, settings, out));
        ui.menu_button("Help", |ui| entry(ui, Command::About, true, out));
        ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
            let palette = Palette::in_use(ui);
            if desk.is_unsaved() {
                ui.label(RichText::new("unsaved").color(palette.warning));
                ui.label(RichText::new("•").color(palette.warning));
            }
            ui.label(format!("({})", desk.name()));
            ui.add(Label::new(&desk.design.title).wrap_mode(TextWrapMode::Truncate));
        });
    });
}

fn file_ui(ui: &mut Ui, recent: &[PathBuf], out: &mut Vec<Command>) {
    entry(ui, Command::New, true, out);
    entry(ui, Command::Open, true, out);
    ui.add_enabled_ui(!recent.is_empty(), |ui| {
        ui.menu_button("Recent files", |ui| {
            for path in recent {
                entry(ui, Command::OpenPath(path.clone()), true, out);
            }
        });
    });
    ui.menu_button("Ready designs", |ui| {
        for name in store::preset_names() {
            entry(ui, Command::OpenPreset(name), true, out);
        }
    });
    ui.separator();
    entry(ui, Command::Save, true, out);
    entry(ui, Command::SaveAs, true, out);
    entry(ui, Command::ExportSheet, true, out);
    entry(ui, Command::ExportSection, true, out);
    ui.separator();
    entry(ui, Command::Quit, true, out);
}

fn view_ui(ui: &mut Ui, settings: &Settings, out: &mut Vec<Command>) {
    ui.label("Units");
    for system in [UnitSystem::Metric, UnitSystem::Kelvin, UnitSystem::Inch] {
        choice(ui, Command::SetUnits(system), settings.units == system, out);
    }
    ui.separator();
    ui.label("Theme");
    for theme in [Theme::Light, Theme::Dark] {
        choice(ui, Command::SetTheme(theme), settings.theme == theme, out);
    }
    ui.separator();
    entry(ui, Command::ZoomIn, true, out);
    entry(ui, Command::ZoomOut, true, out);
    entry(ui, Command::ZoomReset, true, out);
}

fn entry(ui: &mut Ui, command: Command, enabled: bool, out: &mut Vec<Command>) {
    let keys = match &command {
        Command::ZoomIn => "Ctrl++".to_owned(),
        Command::ZoomOut => "Ctrl+-".to_owned(),
        Command::ZoomReset => "Ctrl+0".to_owned(),
        other => other
            .shortcut()
            .map_or_else(String::new, |keys| ui.ctx().format_shortcut(&keys)),
    };
    let button = Button::new(command.text()).shortcut_text(keys);
    if ui
        .add_enabled(enabled, button)
        .on_hover_text(command.tooltip())
        .clicked()
    {
        out.push(command);
        ui.close();
    }
}

fn choice(ui: &mut Ui, command: Command, chosen: bool, out: &mut Vec<Command>) {
    if ui
        .radio(chosen, command.text())
        .on_hover_text(command.tooltip())
        .clicked()
    {
        out.push(command);
        ui.close();
    }
}
