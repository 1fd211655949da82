//! Orders carried out after the frame is drawn: files, dialogs, undo, settings.

use std::path::{Path, PathBuf};

use eframe::egui::{self, ViewportCommand};

use super::app::App;
use super::command::Command;
use super::desk::Desk;
use super::dialogs::{Decision, Dialog, PathDialog, Purpose, dialog_ui};
use super::theme;
use crate::design::Design;
use crate::picture::{of_design, svg};
use crate::sheet::{Head, render};
use crate::store;
use crate::units::Units;
use crate::words::upper;

impl App {
    pub(super) fn show_dialog(&mut self, ctx: &egui::Context) {
        let name = self.desk.name();
        let Some(dialog) = &mut self.dialog else {
            return;
        };
        let Some(decision) = dialog_ui(ctx, dialog, &name) else {
            return;
        };
        match decision {
            Decision::Path {
                purpose,
                path,
                then,
            } => self.path_chosen(purpose, &path, then),
            Decision::Discard(after) => {
                self.dialog = None;
                self.go_on(ctx, after);
            }
            Decision::SaveThen(after) => {
                self.dialog = None;
                self.save(Some(after));
            }
            Decision::Restore { file, draft } => {
                self.dialog = None;
                self.desk.restore(&draft);
                store::remove_own(&file);
                self.behaviour.forget();
                self.notice = self.fluid_notice();
            }
            Decision::DropDraft { file } => {
                self.dialog = None;
                store::remove_own(&file);
            }
            Decision::Close => self.dialog = None,
        }
        ctx.request_repaint();
    }

    pub(super) fn carry_out(&mut self, ctx: &egui::Context, command: Command) {
        match command {
            Command::New
            | Command::OpenPreset(_)
            | Command::OpenPath(_)
            | Command::Open
            | Command::Quit
                if self.desk.is_unsaved() =>
            {
                self.dialog = Some(Dialog::Loss { after: command });
                ctx.request_repaint();
            }
            Command::New
            | Command::OpenPreset(_)
            | Command::OpenPath(_)
            | Command::Open
            | Command::Quit => {
                self.go_on(ctx, command);
            }
            Command::Save => self.save(None),
            Command::SaveAs => self.ask_path(Purpose::SaveAs, None),
            Command::ExportSheet => self.ask_path(Purpose::ExportSheet, None),
            Command::ExportSection => self.ask_path(Purpose::ExportSection, None),
            Command::CopySheet => {
                let text = sheet_text(&self.desk, &Units::new(self.settings.units));
                ctx.copy_text(text);
                self.notice = Some("The charge sheet is on the clipboard.".to_owned());
            }
            Command::Undo => self.desk.undo(),
            Command::Redo => self.desk.redo(),
            Command::SetTheme(theme) => {
                self.settings.theme = theme;
                theme::apply(ctx, theme);
            }
            Command::SetUnits(units) => self.settings.units = units,
            Command::ZoomIn => egui::gui_zoom::zoom_in(ctx),
            Command::ZoomOut => egui::gui_zoom::zoom_out(ctx),
            Command::ZoomReset => ctx.set_zoom_factor(1.0),
            Command::About => self.dialog = Some(Dialog::About),
            Command::Show(section) => self.design_panel.show_next = Some(section),
            Command::Apply(change) => self.desk.design.apply(change),
        }
        ctx.request_repaint();
    }

    /// A command that takes the design off the desk, once nothing is lost by it.
    pub(super) fn go_on(&mut self, ctx: &egui::Context, command: Command) {
        match command {
            Command::New => self.start_untitled(first_design()),
            Command::OpenPreset(name) => {
                if let Some(design) = store::preset(name) {
                    self.start_untitled(design);
                }
            }
            Command::OpenPath(path) => self.open_path(&path),
            Command::Open => self.ask_path(Purpose::Open, None),
            Command::Quit => {
                self.closing = true;
                ctx.send_viewport_cmd(ViewportCommand::Close);
            }
            _ => {}
        }
    }

    pub(super) fn start_untitled(&mut self, design: Design) {
        self.desk.start_untitled(design);
        self.behaviour.forget();
        self.notice = self.fluid_notice();
    }

    /// What is said of the user's fluid files that were not read.
    pub(super) fn fluid_notice(&self) -> Option<String> {
        let said = self
            .desk
            .notices()
            .iter()
            .map(|notice| upper(notice))
            .collect::<Vec<_>>();
        (!said.is_empty()).then(|| format!("{}.", said.join(". ")))
    }

    pub(super) fn open_path(&mut self, path: &Path) {
        match self.desk.open(path) {
            Ok(()) => {
                self.settings.remember(path);
                self.behaviour.forget();
                self.notice = self.fluid_notice();
            }
            Err(error) => {
                let text = format!("{error}. The design that was open stays.");
                self.dialog = Some(Dialog::Message {
                    title: "Not opened".to_owned(),
                    text,
                });
            }
        }
    }

    pub(super) fn reload(&mut self) {
        if let Some(path) = self.desk.path().map(Path::to_owned) {
            self.open_path(&path);
        }
    }

    pub(super) fn ask_path(&mut self, purpose: Purpose, then: Option<Command>) {
        let at = self.desk.path().map(Path::to_owned);
        let suggested = match (purpose, at) {
            (Purpose::Open, Some(path)) => path
                .parent()
                .map(|folder| folder.join(""))
                .unwrap_or_default(),
            (Purpose::Open, None) => PathBuf::new(),
            (Purpose::SaveAs, Some(path)) => path,
            (Purpose::SaveAs, None) => {
                PathBuf::from(file_stem(&self.desk.design.title)).with_extension("ron")
            }
            (Purpose::ExportSheet, Some(path)) => path.with_extension("txt"),
            (Purpose::ExportSheet, None) => {
                PathBuf::from(file_stem(&self.desk.design.title)).with_extension("txt")
            }
            (Purpose::ExportSection, Some(path)) => path.with_extension("svg"),
            (Purpose::ExportSection, None) => {
                PathBuf::from(file_stem(&self.desk.design.title)).with_extension("svg")
            }
        };
        let suggested = suggested.display().to_string();
        self.dialog = Some(Dialog::Path(PathDialog::new(purpose, suggested, then)));
    }

    pub(super) fn save(&mut self, then: Option<Command>) {
        match self.desk.path().map(Path::to_owned) {
            Some(path) if !self.desk.changed_on_disk() => self.save_to(&path, then),
            // Written over by somebody else, or never saved: the user names the file.
            _ => self.ask_path(Purpose::SaveAs, then),
        }
    }

    pub(super) fn save_to(&mut self, path: &Path, then: Option<Command>) {
        match self.desk.save_to(path) {
            Ok(()) => {
                self.dialog = None;
                self.settings.remember(path);
                self.notice = None;
                if let Some(command) = then {
                    self.orders.push(command);
                }
            }
            Err(error) => self.failed(error.to_string()),
        }
    }

    pub(super) fn path_chosen(&mut self, purpose: Purpose, path: &Path, then: Option<Command>) {
        match purpose {
            Purpose::Open => match self.desk.open(path) {
                Ok(()) => {
                    self.dialog = None;
                    self.settings.remember(path);
                    self.behaviour.forget();
                    self.notice = self.fluid_notice();
                }
                Err(error) => self.failed(error.to_string()),
            },
            Purpose::SaveAs => self.save_to(path, then),
            Purpose::ExportSection => self.export_section(path),
            Purpose::ExportSheet => {
                let text = sheet_text(&self.desk, &Units::new(self.settings.units));
                match store::write_beside(path, &text, self.desk.path()) {
                    Ok(()) => {
                        self.dialog = None;
                        self.notice = Some(format!("The charge sheet is in {}.", path.display()));
                    }
                    Err(error) => self.failed(error.to_string()),
                }
            }
        }
    }

    /// The section at the temperature on the scrubber, the right way up.
    fn export_section(&mut self, path: &Path) {
        let desk = &self.desk;
        let at = self.behaviour.scrubber(&desk.design);
        let units = Units::new(self.settings.units);
        let picture = of_design(&desk.design, desk.assessment(), at, 0.0, &units);
        let written = match picture {
            Ok(picture) => store::write_beside(path, &svg(&picture), desk.path())
                .map_err(|error| error.to_string()),
            Err(reason) => Err(format!("The chamber has no section: {reason}")),
        };
        match written {
            Ok(()) => {
                self.dialog = None;
                self.notice = Some(format!("The section drawing is in {}.", path.display()));
            }
            Err(why) => self.failed(why),
        }
    }

    /// Says why, in the open path dialog or in a message of its own.
    pub(super) fn failed(&mut self, why: String) {
        match &mut self.dialog {
            Some(Dialog::Path(dialog)) => dialog.fail(why),
            _ => {
                self.dialog = Some(Dialog::Message {
                    title: "Not saved".to_owned(),
                    text: why,
                })
            }
        }
    }
}

/// What the window opens on.
pub(super) fn first_design() -> Design {
    store::presets()
        .map(|(_, design)| design)
        .find(|design| design.fluid.as_str() == "water")
        .unwrap_or_else(|| {
            store::presets()
                .next()
                .map(|(_, design)| design)
                .expect("ready designs are compiled in")
        })
}

/// The sheet of what is on the desk.
pub(super) fn sheet_text(desk: &Desk, units: &Units) -> String {
    let head = Head {
        file_name: desk.path().map(|_| desk.name()),
        fingerprint: store::fingerprint(&desk.design),
    };
    render(&desk.design, desk.assessment(), units, &head)
}

/// A title as a file name: letters, digits and hyphens.
fn file_stem(title: &str) -> String {
    let plain: String = title
        .to_lowercase()
        .chars()
        .map(|c| if c.is_alphanumeric() { c } else { '-' })
        .collect();
    let words: Vec<&str> = plain.split('-').filter(|word| !word.is_empty()).collect();
    if words.is_empty() {
        "design".to_owned()
    } else {
        words.join("-")
    }
}
