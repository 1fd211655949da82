//! One frame: edit, assess if changed, show, end gestures, then carry out orders.

use std::path::{Path, PathBuf};

use eframe::egui::{self, CentralPanel, Frame, Margin, Panel, Ui, ViewportCommand};

use super::command::Command;
use super::desk::{Desk, Draft};
use super::dialogs::Dialog;
use super::orders::{first_design, sheet_text};
use super::panels::{
    Behaviour, DesignPanel, DiskAnswer, Wish, behaviour_ui, design_ui, editing_text_id, meaning_ui,
    menu_ui, status_ui,
};
use super::settings::Settings;
use super::theme::{self, Palette};
use super::widgets::is_typing;
use crate::design::Change;
use crate::units::Units;

/// The whole window.
pub struct App {
    pub(super) desk: Desk,
    pub(super) settings: Settings,
    saved_settings: Settings,
    /// The program's own folder; tests have none.
    folder: Option<PathBuf>,
    pub(super) design_panel: DesignPanel,
    pub(super) behaviour: Behaviour,
    pub(super) dialog: Option<Dialog>,
    pub(super) notice: Option<String>,
    pub(super) orders: Vec<Command>,
    /// The user has agreed to close; the next close request goes through.
    pub(super) closing: bool,
    /// The catalogue is read, or being read, in the background.
    reading: bool,
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
            reading: false,
            title: String::new(),
            folder,
        };
        // Before the first frame: fonts set later would be laid out twice.
        theme::apply(ctx, app.settings.theme);
        ctx.set_zoom_factor(app.settings.zoom);
        app.desk.start_watching(ctx);
        app.notice = app.fluid_notice();
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
        // A narrow or zoomed window keeps a third for the pictures.
        let width = ui.available_width();
        let left = Panel::left("design")
            .frame(panel)
            .default_size(self.settings.left_column)
            .size_range(240.0..=(0.33 * width).max(260.0))
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
            .size_range(220.0..=(0.33 * width).max(240.0))
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
        let wish = CentralPanel::default()
            .frame(ground)
            .show(ui, |ui| {
                let desk = &self.desk;
                let sheet = || sheet_text(desk, &units);
                behaviour_ui(
                    ui,
                    desk,
                    &units,
                    sheet,
                    &mut self.behaviour,
                    &mut self.orders,
                )
            })
            .inner;
        match wish {
            Some(Wish::Charge(mass)) => self.desk.design.apply(Change::SetCharge(mass)),
            Some(Wish::Fluid(fluid, charge)) => {
                self.desk.design.fluid = fluid;
                self.desk.design.charge = charge;
            }
            None => {}
        }
    }

    /// Once the first frame is drawn, every fluid is read in the background, so that the
    /// table of fluids does not wait.
    fn read_catalogue(&mut self, ctx: &egui::Context) {
        if std::mem::replace(&mut self.reading, true) {
            return;
        }
        let (fluids, ctx) = (self.desk.library().fluids.clone(), ctx.clone());
        std::thread::spawn(move || {
            fluids.read_all();
            ctx.request_repaint();
        });
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
                // A value half typed counts: its field takes it as it loses the focus.
                if let Some(field) = ctx.memory(egui::Memory::focused) {
                    ctx.memory_mut(|memory| memory.surrender_focus(field));
                }
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
        self.read_catalogue(ui.ctx());
    }

    fn on_exit(&mut self, _gl: Option<&eframe::glow::Context>) {
        self.settings.save(self.folder.as_deref());
        self.desk.close();
    }
}
