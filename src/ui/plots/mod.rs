//! The pictures of the middle column. They pick, convert units and paint; whatever
//! is physical was computed in the [`Assessment`](crate::assess::Assessment) or is
//! asked of its sealed unit.

mod axis;
mod canvas;
mod charge_map;
mod charge_mark;
mod grip;
mod gutter;
mod items;
mod labels;
mod liquid_share;
mod map_areas;
mod over_temperature;
mod pressure;
mod pressure_lines;
mod say;
mod scrubber;
mod section;
mod strip;
mod table;
#[cfg(test)]
mod tests;
mod view;

use eframe::egui::{Align, Button, Layout, RichText, Ui, vec2};
use serde::{Deserialize, Serialize};

use self::axis::Home;
use self::view::View;
use crate::assess::Missing;
use crate::ui::theme::Palette;
use crate::units::Units;
use crate::words;

pub use charge_map::charge_map_ui;
pub use liquid_share::liquid_share_ui;
pub use pressure::pressure_ui;
pub use scrubber::scrubber_ui;
pub use section::section_ui;

/// The pictures to choose from.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Default, Serialize, Deserialize)]
pub enum Picture {
    #[default]
    ChargeMap,
    Pressure,
    Section,
    LiquidShare,
}

/// How pressure is drawn over temperature.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Default, Serialize, Deserialize)]
pub enum PressureScale {
    Linear,
    /// The default: vacuum when cold and the strength of the wall both show.
    #[default]
    Logarithm,
    /// ln p over 1/T, in which a vapour pressure is nearly straight.
    Reciprocal,
}

/// What belongs to the view alone: scale, zoom, and what is being dragged.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct PlotState {
    pub scale: PressureScale,
    /// The picture that fills the column, if one does.
    pub enlarged: Option<Picture>,
    map_view: View,
    pressure_view: View,
    share_view: View,
    /// Distance of the pointer from the charge's line since it was seized.
    charge_held: Option<f32>,
    /// Whole ranges as last shown at rest: they stand still while the charge is dragged.
    map_home: Option<Home>,
    pressure_home: Option<Home>,
    section: Option<Box<section::Drawn>>,
}

impl Picture {
    #[cfg(test)]
    pub const ALL: [Self; 4] = [
        Self::ChargeMap,
        Self::Pressure,
        Self::Section,
        Self::LiquidShare,
    ];

    pub const fn name(self) -> &'static str {
        match self {
            Self::ChargeMap => "Charge map",
            Self::Pressure => "Pressure",
            Self::Section => "Section",
            Self::LiquidShare => "Liquid share",
        }
    }
}

impl PressureScale {
    pub const ALL: [Self; 3] = [Self::Linear, Self::Logarithm, Self::Reciprocal];

    pub const fn name(self) -> &'static str {
        match self {
            Self::Linear => "linear",
            Self::Logarithm => "logarithmic",
            Self::Reciprocal => "ln p over 1/T",
        }
    }
}

impl PlotState {
    /// Whether the charge is being dragged; no undo point belongs in between.
    pub fn dragging(&self) -> bool {
        self.charge_held.is_some()
    }

    /// Fills the column with a picture, or gives the room back.
    pub fn toggle_enlarged(&mut self, picture: Picture) {
        self.enlarged = if self.enlarged == Some(picture) {
            None
        } else {
            Some(picture)
        };
    }
}

/// What a picture's copy button puts on the clipboard.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
enum CopyAs {
    Table,
    Drawing,
}

impl CopyAs {
    const fn text(self) -> &'static str {
        match self {
            Self::Table => "Copy as table",
            Self::Drawing => "Copy as SVG",
        }
    }

    const fn tooltip(self) -> &'static str {
        match self {
            Self::Table => "Values with their units, separated by tabs, for a spreadsheet",
            Self::Drawing => "The drawing as SVG text; the File menu writes it to a file",
        }
    }
}

/// The line above a picture: its name, what belongs beside it, and its buttons.
/// True when the picture is to be copied, as `copy_as` says.
fn header_ui(
    ui: &mut Ui,
    picture: Picture,
    state: &mut PlotState,
    palette: &Palette,
    copy_as: CopyAs,
    beside: impl FnOnce(&mut Ui, &mut PlotState),
) -> bool {
    let mut copy = false;
    let copy_text = if ui.available_width() < 480.0 {
        "Copy"
    } else {
        copy_as.text()
    };
    // Buttons first, from the right: what stands beside the name gives way to them.
    let buttons = Layout::right_to_left(Align::Center);
    let row = vec2(ui.available_width(), ui.spacing().interact_size.y);
    ui.allocate_ui_with_layout(row, buttons, |ui| {
        copy = ui
            .add(Button::new(copy_text).small())
            .on_hover_text(copy_as.tooltip())
            .clicked();
        // Where it is narrow a double click must do.
        if row.x > 520.0 {
            let word = if state.enlarged == Some(picture) {
                "Restore"
            } else {
                "Enlarge"
            };
            let enlarge = ui
                .add(Button::new(word).small())
                .on_hover_text("A double click on the picture does the same");
            if enlarge.clicked() {
                state.toggle_enlarged(picture);
            }
        }
        ui.with_layout(Layout::left_to_right(Align::Center), |ui| {
            ui.label(RichText::new(picture.name()).strong().color(palette.text));
            beside(ui, state);
        });
    });
    copy
}

/// In the place of a picture that cannot be drawn: which, and why.
fn missing_ui(ui: &mut Ui, picture: Picture, missing: &Missing, units: &Units, palette: &Palette) {
    ui.label(RichText::new(picture.name()).strong().color(palette.text));
    let sentence = format!("Nothing to draw. {}", words::missing(missing, units));
    ui.label(RichText::new(sentence).color(palette.text_faint));
}
