//! Everything the user can order, as data: text, tooltip and key in one place.

use std::path::PathBuf;

use eframe::egui::{Key, KeyboardShortcut, Modifiers};

use super::theme::Theme;
use crate::assess::Section;
use crate::design::Change;
use crate::units::UnitSystem;
use crate::words;

/// An order, drained after the frame is drawn.
#[derive(Debug, Clone, PartialEq)]
pub enum Command {
    New,
    Open,
    OpenPath(PathBuf),
    OpenPreset(&'static str),
    Save,
    SaveAs,
    ExportSheet,
    ExportSection,
    CopySheet,
    Undo,
    Redo,
    SetTheme(Theme),
    SetUnits(UnitSystem),
    ZoomIn,
    ZoomOut,
    ZoomReset,
    About,
    Quit,
    /// Open a section of the left column.
    Show(Section),
    Apply(Change),
}

impl Command {
    /// The text of the menu entry or button.
    pub fn text(&self) -> String {
        match self {
            Self::New => "New".to_owned(),
            Self::Open => "Open…".to_owned(),
            Self::OpenPath(path) => path.display().to_string(),
            Self::OpenPreset(name) => preset_title(name),
            Self::Save => "Save".to_owned(),
            Self::SaveAs => "Save as…".to_owned(),
            Self::ExportSheet => "Export charge sheet…".to_owned(),
            Self::ExportSection => "Export section drawing…".to_owned(),
            Self::CopySheet => "Copy the sheet".to_owned(),
            Self::Undo => "Undo".to_owned(),
            Self::Redo => "Redo".to_owned(),
            Self::SetTheme(Theme::Light) => "Light".to_owned(),
            Self::SetTheme(Theme::Dark) => "Dark".to_owned(),
            Self::SetUnits(UnitSystem::Metric) => "°C, bar, mL, g, mm".to_owned(),
            Self::SetUnits(UnitSystem::Kelvin) => "K, MPa, mL, g, mm".to_owned(),
            Self::SetUnits(UnitSystem::Inch) => "°F, psi, in³, oz, in".to_owned(),
            Self::ZoomIn => "Larger".to_owned(),
            Self::ZoomOut => "Smaller".to_owned(),
            Self::ZoomReset => "Normal size".to_owned(),
            Self::About => "About and licences".to_owned(),
            Self::Quit => "Quit".to_owned(),
            Self::Show(_) => "Show".to_owned(),
            Self::Apply(_) => "Apply".to_owned(),
        }
    }

    /// What it does, for a tooltip.
    pub const fn tooltip(&self) -> &'static str {
        match self {
            Self::New => "Start from the first ready design, untitled",
            Self::Open => "Open a design file",
            Self::OpenPath(_) => "Open this design file again",
            Self::OpenPreset(_) => "Open a copy of this ready design, untitled",
            Self::Save => "Write the design to its file",
            Self::SaveAs => "Write the design to another file",
            Self::ExportSheet => "Write the charge sheet as plain text",
            Self::ExportSection => {
                "Write the section to scale as SVG, with the liquid at the chosen temperature"
            }
            Self::CopySheet => "Put the charge sheet on the clipboard",
            Self::Undo => "Take back the last change",
            Self::Redo => "Make the change again",
            Self::SetTheme(_) => "Colours of the window",
            Self::SetUnits(_) => "Units of the window; any unit can be typed anyway",
            Self::ZoomIn | Self::ZoomOut | Self::ZoomReset => "Size of everything in the window",
            Self::About => "What this is, and whose data and fonts it carries",
            Self::Quit => "Close the window",
            Self::Show(_) => "Go to where this comes from",
            Self::Apply(_) => "Change the design so",
        }
    }

    /// Its key.
    pub const fn shortcut(&self) -> Option<KeyboardShortcut> {
        const SHIFT: Modifiers = Modifiers::COMMAND.plus(Modifiers::SHIFT);
        let (modifiers, key) = match self {
            Self::New => (Modifiers::COMMAND, Key::N),
            Self::Open => (Modifiers::COMMAND, Key::O),
            Self::Save => (Modifiers::COMMAND, Key::S),
            Self::SaveAs => (SHIFT, Key::S),
            Self::ExportSheet => (Modifiers::COMMAND, Key::E),
            Self::Undo => (Modifiers::COMMAND, Key::Z),
            Self::Redo => (SHIFT, Key::Z),
            Self::Quit => (Modifiers::COMMAND, Key::Q),
            _ => return None,
        };
        Some(KeyboardShortcut::new(modifiers, key))
    }

    /// The commands that have a key; longer chords first, since a plain Ctrl + S would
    /// swallow Ctrl + Shift + S.
    pub const WITH_KEYS: [Self; 8] = [
        Self::SaveAs,
        Self::Redo,
        Self::New,
        Self::Open,
        Self::Save,
        Self::ExportSheet,
        Self::Undo,
        Self::Quit,
    ];
}

/// A ready design's file name as a menu entry: "copper-water-heat-pipe" reads as words.
fn preset_title(name: &str) -> String {
    words::upper(&name.replace('-', " "))
}
