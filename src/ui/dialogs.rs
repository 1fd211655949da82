//! What stands in front of the window: a path to type, a question, a message.

use std::path::{Path, PathBuf};
use std::sync::Arc;
use std::sync::mpsc::{Receiver, TryRecvError, channel};
use std::task::{Context, Poll, Wake, Waker};

use eframe::egui::{self, Align, Id, Key, Layout, Modal, RichText, TextEdit, Ui};

use super::command::Command;
use super::desk::Draft;

/// One dialog; at most one is open.
pub enum Dialog {
    Path(PathDialog),
    /// Unsaved changes would be lost by this command.
    Loss {
        after: Command,
    },
    /// A crashed window left this behind, in this file.
    Restore {
        file: PathBuf,
        draft: Draft,
    },
    Message {
        title: String,
        text: String,
    },
    About,
}

/// What a chosen path is for.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Purpose {
    Open,
    SaveAs,
    ExportSheet,
    ExportSection,
}

/// A path that can be typed, or chosen where the system offers a file dialog.
pub struct PathDialog {
    pub purpose: Purpose,
    text: String,
    /// Why the last try failed.
    problem: Option<String>,
    browsing: Option<Receiver<Option<PathBuf>>>,
    wants_focus: bool,
    overwrite_asked: bool,
    /// A command to go on with once the file is written.
    pub then: Option<Command>,
}

/// What a dialog decided.
pub enum Decision {
    Path {
        purpose: Purpose,
        path: PathBuf,
        then: Option<Command>,
    },
    /// Go on and lose the changes.
    Discard(Command),
    /// Save first, then go on.
    SaveThen(Command),
    Restore {
        file: PathBuf,
        draft: Draft,
    },
    DropDraft {
        file: PathBuf,
    },
    Close,
}

impl Purpose {
    const fn title(self) -> &'static str {
        match self {
            Self::Open => "Open a design",
            Self::SaveAs => "Save the design as",
            Self::ExportSheet => "Export the charge sheet to",
            Self::ExportSection => "Export the section drawing to",
        }
    }

    const fn button(self) -> &'static str {
        match self {
            Self::Open => "Open",
            Self::SaveAs => "Save",
            Self::ExportSheet | Self::ExportSection => "Export",
        }
    }

    const fn extension(self) -> &'static str {
        match self {
            Self::Open | Self::SaveAs => "ron",
            Self::ExportSheet => "txt",
            Self::ExportSection => "svg",
        }
    }
}

impl PathDialog {
    pub fn new(purpose: Purpose, suggested: String, then: Option<Command>) -> Self {
        Self {
            purpose,
            text: suggested,
            problem: None,
            browsing: None,
            wants_focus: true,
            overwrite_asked: false,
            then,
        }
    }

    /// The try failed; the dialog stays with the reason.
    pub fn fail(&mut self, problem: String) {
        self.problem = Some(problem);
        self.wants_focus = true;
    }

    fn typed(&self) -> Option<PathBuf> {
        let text = self.text.trim().trim_matches('"');
        if text.is_empty() {
            return None;
        }
        let mut path = PathBuf::from(text);
        if let Ok(rest) = path.strip_prefix("~")
            && let Some(home) = std::env::var_os("HOME")
        {
            path = PathBuf::from(home).join(rest);
        }
        if self.purpose != Purpose::Open && path.extension().is_none() {
            path.set_extension(self.purpose.extension());
        }
        Some(path)
    }

    fn show(&mut self, ui: &mut Ui) -> Option<Decision> {
        ui.set_width(440.0);
        ui.heading(self.purpose.title());
        ui.add_space(4.0);
        let field = TextEdit::singleline(&mut self.text)
            .desired_width(f32::INFINITY)
            .hint_text("folder and file name, such as ~/designs/pipe.ron");
        let response = ui.add(field);
        response.widget_info(|| egui::WidgetInfo::labeled(egui::Role::TextInput, true, "path"));
        if std::mem::take(&mut self.wants_focus) {
            response.request_focus();
        }
        if response.changed() {
            self.problem = None;
            self.overwrite_asked = false;
        }
        let enter = response.lost_focus() && ui.input(|i| i.key_pressed(Key::Enter));
        if let Some(problem) = &self.problem {
            ui.add_space(2.0);
            ui.label(RichText::new(problem).color(ui.visuals().error_fg_color));
        }
        self.poll_browser();
        ui.add_space(8.0);
        let mut decision = None;
        ui.horizontal(|ui| {
            if ui
                .add_enabled(self.browsing.is_none(), egui::Button::new("Browse…"))
                .clicked()
            {
                self.browse(ui.ctx());
            }
            ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
                let label = if self.overwrite_asked {
                    "Replace it"
                } else {
                    self.purpose.button()
                };
                if ui.button(label).clicked() || enter {
                    decision = self.decide();
                }
                if ui.button("Cancel").clicked() {
                    decision = Some(Decision::Close);
                }
            });
        });
        decision
    }

    fn decide(&mut self) -> Option<Decision> {
        let Some(path) = self.typed() else {
            self.fail("Type a path, or browse for one.".to_owned());
            return None;
        };
        if self.purpose != Purpose::Open && !self.overwrite_asked && path.exists() {
            self.overwrite_asked = true;
            self.fail(format!(
                "{} exists. Press again to replace it.",
                path.display()
            ));
            return None;
        }
        Some(Decision::Path {
            purpose: self.purpose,
            path,
            then: self.then.clone(),
        })
    }

    /// The system's file dialog. Its future is made here, on the window's thread, and
    /// polled on another, so the window never waits. Where the system has no such
    /// dialog it answers "nothing chosen", and the typed path remains.
    fn browse(&mut self, ctx: &egui::Context) {
        let dialog = rfd::AsyncFileDialog::new().set_title(self.purpose.title());
        let (sender, receiver) = channel();
        let ctx = ctx.clone();
        let suggested = self.typed();
        let folder = suggested
            .as_ref()
            .and_then(|path| path.parent())
            .filter(|folder| folder.is_dir());
        let mut dialog = dialog.add_filter(
            match self.purpose {
                Purpose::Open | Purpose::SaveAs => "design",
                Purpose::ExportSheet => "plain text",
                Purpose::ExportSection => "SVG drawing",
            },
            &[self.purpose.extension()],
        );
        if let Some(folder) = folder {
            dialog = dialog.set_directory(folder);
        }
        if let Some(name) = suggested.as_ref().and_then(|path| path.file_name()) {
            dialog = dialog.set_file_name(name.to_string_lossy());
        }
        let save = self.purpose != Purpose::Open;
        let spawn = move |chosen: Option<rfd::FileHandle>| {
            let _ = sender.send(chosen.map(|file| file.path().to_owned()));
            ctx.request_repaint();
        };
        if save {
            let future = dialog.save_file();
            std::thread::spawn(move || spawn(wait_for(future)));
        } else {
            let future = dialog.pick_file();
            std::thread::spawn(move || spawn(wait_for(future)));
        }
        self.browsing = Some(receiver);
    }

    fn poll_browser(&mut self) {
        let Some(receiver) = &self.browsing else {
            return;
        };
        match receiver.try_recv() {
            Ok(Some(path)) => {
                self.text = path.display().to_string();
                self.problem = None;
                // The system's own dialog has asked about replacing.
                self.overwrite_asked = true;
                self.browsing = None;
            }
            Ok(None) | Err(TryRecvError::Disconnected) => self.browsing = None,
            Err(TryRecvError::Empty) => {}
        }
        self.wants_focus |= self.browsing.is_none();
    }
}

/// Shows a dialog; `Some` once the user has decided.
pub fn dialog_ui(ctx: &egui::Context, dialog: &mut Dialog, name: &str) -> Option<Decision> {
    let mut decision = None;
    let response = Modal::new(Id::unique("dialog")).show(ctx, |ui| {
        decision = match dialog {
            Dialog::Path(path) => path.show(ui),
            Dialog::Loss { after } => loss_ui(ui, after, name),
            Dialog::Restore { file, draft } => restore_ui(ui, file, draft),
            Dialog::Message { title, text } => message_ui(ui, title, text),
            Dialog::About => about_ui(ui),
        };
    });
    if decision.is_none() && response.should_close() && !matches!(dialog, Dialog::Restore { .. }) {
        decision = Some(Decision::Close);
    }
    decision
}

fn loss_ui(ui: &mut Ui, after: &Command, name: &str) -> Option<Decision> {
    ui.set_width(380.0);
    ui.heading("Unsaved changes");
    ui.label(format!("The changes to {name} have not been saved."));
    ui.add_space(8.0);
    let mut decision = None;
    ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
        if ui.button("Save them").clicked() {
            decision = Some(Decision::SaveThen(after.clone()));
        }
        if ui.button("Lose them").clicked() {
            decision = Some(Decision::Discard(after.clone()));
        }
        if ui.button("Cancel").clicked() {
            decision = Some(Decision::Close);
        }
    });
    decision
}

fn restore_ui(ui: &mut Ui, file: &Path, draft: &Draft) -> Option<Decision> {
    ui.set_width(400.0);
    ui.heading("An unsaved design was found");
    let of = draft.path.as_ref().map_or_else(
        || "a design without a file".to_owned(),
        |path| path.display().to_string(),
    );
    ui.label(format!("The last window ended before {of} was saved."));
    ui.add_space(8.0);
    let mut decision = None;
    ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
        if ui.button("Bring it back").clicked() {
            decision = Some(Decision::Restore {
                file: file.to_owned(),
                draft: draft.clone(),
            });
        }
        if ui.button("Throw it away").clicked() {
            decision = Some(Decision::DropDraft {
                file: file.to_owned(),
            });
        }
    });
    decision
}

fn message_ui(ui: &mut Ui, title: &str, text: &str) -> Option<Decision> {
    ui.set_width(420.0);
    ui.heading(title);
    ui.label(text);
    ui.add_space(8.0);
    let mut decision = None;
    ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
        if ui.button("Close").clicked() {
            decision = Some(Decision::Close);
        }
    });
    decision
}

fn about_ui(ui: &mut Ui) -> Option<Decision> {
    ui.set_width(560.0);
    ui.heading(concat!("Chargewright ", env!("CARGO_PKG_VERSION")));
    ui.label("Fluid, charge and envelope of sealed two-phase devices, from a design to the charge sheet.");
    ui.add_space(4.0);
    ui.label(RichText::new(crate::words::CAUTIONS[0]).strong());
    ui.separator();
    egui::ScrollArea::vertical().max_height(280.0).show(ui, |ui| {
        ui.set_width(ui.available_width());
        ui.label(RichText::new("Data").strong());
        ui.label(
            "Each fluid and material file names the paper, standard or handbook of each value. \
             Coefficients of the equations of state are carried over under this notice:",
        );
        ui.label(RichText::new(include_str!("../../assets/fluids/NOTICE.txt")).small());
        ui.separator();
        ui.label(RichText::new("Fonts").strong());
        ui.label(
            "Ubuntu Light (Ubuntu Font Licence 1.0), Hack (MIT and Bitstream Vera licences), and the symbol fonts \
             Noto Emoji (SIL Open Font Licence 1.1) and emoji-icon-font (MIT), as they come with the window's \
             toolkit.",
        );
        ui.separator();
        ui.label(RichText::new("Program").strong());
        ui.label(RichText::new(include_str!("../../LICENSE")).small());
    });
    ui.add_space(6.0);
    let mut decision = None;
    ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
        if ui.button("Close").clicked() {
            decision = Some(Decision::Close);
        }
    });
    decision
}

/// Waits for a future on this thread.
fn wait_for<T>(future: impl Future<Output = T>) -> T {
    struct Unpark(std::thread::Thread);
    impl Wake for Unpark {
        fn wake(self: Arc<Self>) {
            self.0.unpark();
        }
    }
    let waker = Waker::from(Arc::new(Unpark(std::thread::current())));
    let mut context = Context::from_waker(&waker);
    let mut future = std::pin::pin!(future);
    loop {
        match future.as_mut().poll(&mut context) {
            Poll::Ready(value) => return value,
            Poll::Pending => std::thread::park(),
        }
    }
}
