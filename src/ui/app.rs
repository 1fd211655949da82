//! One frame: edit, assess if changed, show, end gestures, then carry out orders.

use std::path::{Path, PathBuf};

use eframe::egui::{self, CentralPanel, Frame, Margin, Panel, Ui, ViewportCommand};

use super::command::Command;
use super::desk::{Desk, Draft};
use super::dialogs::{Decision, Dialog, PathDialog, Purpose, dialog_ui};
use super::panels::{
    Behaviour, DesignPanel, DiskAnswer, behaviour_ui, design_ui, editing_text_id, meaning_ui,
    menu_ui, status_ui,
};
use super::settings::Settings;
use super::theme::{self, Palette};
use super::widgets::is_typing;
use crate::assess::Remedy;
use crate::design::{ChargeAim, Design};
use crate::sheet::{Head, render};
use crate::store;
use crate::units::{Mass, Units};

/// The whole window.
pub struct App {
    desk: Desk,
    settings: Settings,
    saved_settings: Settings,
    /// The program's own folder; tests have none.
    folder: Option<PathBuf>,
    design_panel: DesignPanel,
    behaviour: Behaviour,
    dialog: Option<Dialog>,
    notice: Option<String>,
    orders: Vec<Command>,
    /// The user has agreed to close; the next close request goes through.
    closing: bool,
    themed: bool,
    title: String,
}

impl App {
    /// The window on a design file, or on the first ready design.
    pub fn new(ctx: &egui::Context, path: Option<&Path>, folder: Option<PathBuf>) -> Self {
        let settings = Settings::load(folder.as_deref());
        let mut app = Self {
            desk: Desk::new(first_design(), folder.as_deref()),
            saved_settings: settings.clone(),
            settings,
            design_panel: DesignPanel::default(),
            behaviour: Behaviour::default(),
            dialog: None,
            notice: None,
            orders: Vec::new(),
            closing: false,
            themed: false,
            title: String::new(),
            folder,
        };
        ctx.set_zoom_factor(app.settings.zoom);
        app.desk.start_watching(ctx);
        if let Some(path) = path {
            app.open_path(path);
        }
        if let Some((file, draft)) = app.folder.as_deref().and_then(Draft::left_behind) {
            app.dialog = Some(Dialog::Restore { file, draft });
        }
        app
    }

    /// The design on the desk.
    pub fn desk(&self) -> &Desk {
        &self.desk
    }

    /// Puts an order in, as a menu would.
    pub fn order(&mut self, command: Command) {
        self.orders.push(command);
    }

    /// Draws one frame into the whole window.
    pub fn frame_ui(&mut self, ui: &mut Ui) {
        let ctx = ui.ctx().clone();
        if !std::mem::replace(&mut self.themed, true) {
            theme::apply(&ctx, self.settings.theme);
        }
        self.keys(&ctx);
        self.dropped_files(&ctx);
        self.close_requests(&ctx);
        self.panels(ui);
        self.end_gesture(&ctx);
        self.show_dialog(&ctx);
        for command in std::mem::take(&mut self.orders) {
            self.carry_out(&ctx, command);
        }
        if self.desk.refresh() {
            // An order changed the design after it was drawn: one more frame shows it.
            ctx.request_repaint();
        }
        self.remember(&ctx);
    }

    fn panels(&mut self, ui: &mut Ui) {
        let units = Units::new(self.settings.units);
        let palette = Palette::of(self.settings.theme);
        let panel = Frame::NONE
            .fill(palette.panel)
            .inner_margin(Margin::symmetric(8, 6));
        let bar = Frame::NONE
            .fill(palette.panel)
            .inner_margin(Margin::symmetric(8, 3));
        Panel::top("menu").frame(bar).show(ui, |ui| {
            menu_ui(ui, &self.desk, &self.settings, &mut self.orders)
        });
        let name = self.desk.name();
        let changed = self.desk.changed_on_disk().then_some(name.as_str());
        if changed.is_some() || self.notice.is_some() {
            let answer = Panel::top("notices")
                .frame(Frame::NONE.fill(palette.panel))
                .show(ui, |ui| status_ui(ui, changed, &mut self.notice))
                .inner;
            match answer {
                Some(DiskAnswer::Reload) => self.reload(),
                Some(DiskAnswer::KeepMine) => self.desk.keep_mine(),
                None => {}
            }
        }
        let left = Panel::left("design")
            .frame(panel)
            .default_size(self.settings.left_column)
            .size_range(260.0..=520.0)
            .show(ui, |ui| {
                let desk = &mut self.desk;
                desk.edit(|design, a, library| {
                    design_ui(ui, design, a, library, &units, &mut self.design_panel);
                });
            });
        self.settings.left_column = left.response.rect.width();
        // What was edited on the left is assessed before the rest is drawn.
        self.desk.refresh();
        let right = Panel::right("meaning")
            .frame(panel)
            .default_size(self.settings.right_column)
            .size_range(250.0..=520.0)
            .show(ui, |ui| {
                meaning_ui(
                    ui,
                    &self.desk.design,
                    self.desk.assessment(),
                    &units,
                    &mut self.orders,
                );
            });
        self.settings.right_column = right.response.rect.width();
        let ground = Frame::NONE
            .fill(palette.ground)
            .inner_margin(Margin::symmetric(8, 6));
        let dragged = CentralPanel::default()
            .frame(ground)
            .show(ui, |ui| {
                let desk = &self.desk;
                let sheet = || sheet_text(desk, &units);
                behaviour_ui(
                    ui,
                    &desk.design,
                    desk.assessment(),
                    &units,
                    sheet,
                    &mut self.behaviour,
                    &mut self.orders,
                )
            })
            .inner;
        if let Some(mass) = dragged {
            self.set_mass(mass);
        }
    }

    /// An undo point where a gesture ends: no pointer or key is down and no text is
    /// half typed.
    fn end_gesture(&mut self, ctx: &egui::Context) {
        let busy = ctx.input(|i| i.pointer.any_down() || !i.keys_down.is_empty());
        let text_frame: Option<u64> = ctx.data(|data| data.get_temp(editing_text_id()));
        let typing = text_frame == Some(ctx.cumulative_pass_nr());
        if !busy && !typing {
            self.desk.commit();
        }
    }

    fn keys(&mut self, ctx: &egui::Context) {
        if self.dialog.is_some() {
            return;
        }
        let typing = is_typing(ctx);
        for command in Command::WITH_KEYS {
            // Undo and redo belong to the text while one is being typed.
            if typing && matches!(command, Command::Undo | Command::Redo) {
                continue;
            }
            if let Some(keys) = command.shortcut()
                && ctx.input_mut(|i| i.consume_shortcut(&keys))
            {
                self.orders.push(command);
            }
        }
        let redo = egui::KeyboardShortcut::new(egui::Modifiers::COMMAND, egui::Key::Y);
        if !typing && ctx.input_mut(|i| i.consume_shortcut(&redo)) {
            self.orders.push(Command::Redo);
        }
    }

    fn dropped_files(&mut self, ctx: &egui::Context) {
        let dropped = ctx.input(|i| {
            i.raw
                .dropped_files
                .first()
                .map(|file| file.path().to_owned())
        });
        if let Some(path) = dropped {
            self.orders.push(Command::OpenPath(path));
        }
    }

    fn close_requests(&mut self, ctx: &egui::Context) {
        if ctx.input(|i| i.viewport().close_requested()) && !self.closing {
            if self.desk.is_unsaved() {
                ctx.send_viewport_cmd(ViewportCommand::CancelClose);
                self.dialog = Some(Dialog::Loss {
                    after: Command::Quit,
                });
            } else {
                self.closing = true;
            }
        }
    }

    fn show_dialog(&mut self, ctx: &egui::Context) {
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
            }
            Decision::DropDraft { file } => {
                self.dialog = None;
                store::remove_own(&file);
            }
            Decision::Close => self.dialog = None,
        }
        ctx.request_repaint();
    }

    fn carry_out(&mut self, ctx: &egui::Context, command: Command) {
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
            Command::Apply(Remedy::SetCharge(mass)) => self.set_mass(mass),
        }
        ctx.request_repaint();
    }

    /// A command that takes the design off the desk, once nothing is lost by it.
    fn go_on(&mut self, ctx: &egui::Context, command: Command) {
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

    fn start_untitled(&mut self, design: Design) {
        self.desk.start_untitled(design);
        self.behaviour.forget();
        self.notice = None;
    }

    fn open_path(&mut self, path: &Path) {
        match self.desk.open(path) {
            Ok(()) => {
                self.settings.remember(path);
                self.behaviour.forget();
                self.notice = None;
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

    fn reload(&mut self) {
        if let Some(path) = self.desk.path().map(Path::to_owned) {
            self.open_path(&path);
        }
    }

    fn ask_path(&mut self, purpose: Purpose, then: Option<Command>) {
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
        };
        let suggested = suggested.display().to_string();
        self.dialog = Some(Dialog::Path(PathDialog::new(purpose, suggested, then)));
    }

    fn save(&mut self, then: Option<Command>) {
        match self.desk.path().map(Path::to_owned) {
            Some(path) if !self.desk.changed_on_disk() => self.save_to(&path, then),
            // Written over by somebody else, or never saved: the user names the file.
            _ => self.ask_path(Purpose::SaveAs, then),
        }
    }

    fn save_to(&mut self, path: &Path, then: Option<Command>) {
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

    fn path_chosen(&mut self, purpose: Purpose, path: &Path, then: Option<Command>) {
        match purpose {
            Purpose::Open => match self.desk.open(path) {
                Ok(()) => {
                    self.dialog = None;
                    self.settings.remember(path);
                    self.behaviour.forget();
                }
                Err(error) => self.failed(error.to_string()),
            },
            Purpose::SaveAs => self.save_to(path, then),
            Purpose::ExportSheet => {
                let text = sheet_text(&self.desk, &Units::new(self.settings.units));
                match store::write_text(path, &text) {
                    Ok(()) => {
                        self.dialog = None;
                        self.notice = Some(format!("The charge sheet is in {}.", path.display()));
                    }
                    Err(error) => self.failed(error.to_string()),
                }
            }
        }
    }

    /// Says why, in the open path dialog or in a message of its own.
    fn failed(&mut self, why: String) {
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

    fn set_mass(&mut self, mass: Mass) {
        self.desk.design.charge.aim = ChargeAim::Mass { mass };
    }

    /// Settings are written when they change, not while a column is being dragged.
    fn remember(&mut self, ctx: &egui::Context) {
        self.settings.zoom = ctx.zoom_factor();
        let title = format!(
            "{}{} - Chargewright",
            if self.desk.is_unsaved() { "* " } else { "" },
            self.desk.name()
        );
        if title != self.title {
            ctx.send_viewport_cmd(ViewportCommand::Title(title.clone()));
            self.title = title;
        }
        if self.settings != self.saved_settings && !ctx.input(|i| i.pointer.any_down()) {
            self.settings.save(self.folder.as_deref());
            self.saved_settings = self.settings.clone();
        }
    }
}

impl eframe::App for App {
    fn ui(&mut self, ui: &mut Ui, _frame: &mut eframe::Frame) {
        self.frame_ui(ui);
    }

    fn on_exit(&mut self, _gl: Option<&eframe::glow::Context>) {
        self.settings.save(self.folder.as_deref());
        self.desk.close();
    }
}

fn first_design() -> Design {
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

fn sheet_text(desk: &Desk, units: &Units) -> String {
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
