//! The middle column: the pictures, the scrubber, and the sheet's preview.

use eframe::egui::{Align, Layout, RichText, ScrollArea, TextStyle, Ui, vec2};

use super::fluids::{FluidTable, fluid_table_ui};
use crate::assess::Assessment;
use crate::design::{Charge, Design, FluidId};
use crate::ui::command::Command;
use crate::ui::desk::Desk;
use crate::ui::plots::{
    Picture, PlotState, charge_map_ui, liquid_share_ui, pressure_ui, scrubber_ui, section_ui,
};
use crate::ui::theme::Palette;
use crate::units::{Mass, Temperature, Units};

/// View-only state of the column.
#[derive(Debug)]
pub struct Behaviour {
    tab: Tab,
    /// The picture beside the charge map where there is room for two only.
    second: Picture,
    scrubber: Option<Temperature>,
    plots: PlotState,
    fluids: FluidTable,
    /// The sheet of this design, made when it was last asked for.
    sheet: Option<(Design, String)>,
}

#[derive(Debug, Clone, Copy, PartialEq, Eq)]
enum Tab {
    Behaviour,
    Fluids,
    Sheet,
}

/// What the user wants in the design.
#[derive(Debug, Clone, PartialEq)]
pub enum Wish {
    Charge(Mass),
    Fluid(FluidId, Charge),
}

/// At this width the middle column shows three pictures.
const WIDE: f32 = 900.0;
/// Width of the tabs before the selector.
const SELECTOR: f32 = 180.0;

impl Default for Behaviour {
    fn default() -> Self {
        Self {
            tab: Tab::Behaviour,
            second: Picture::Pressure,
            scrubber: None,
            plots: PlotState::default(),
            fluids: FluidTable::default(),
            sheet: None,
        }
    }
}

impl Behaviour {
    /// The temperature all pictures share; at first the hottest.
    pub fn scrubber(&self, design: &Design) -> Temperature {
        self.scrubber.unwrap_or(design.conditions.hottest)
    }

    /// Another design is on the desk: start from its own temperatures.
    pub fn forget(&mut self) {
        self.scrubber = None;
        self.plots = PlotState::default();
    }
}

/// Shows how it behaves; a [`Wish`] where the user dragged the charge or tries a fluid.
pub fn behaviour_ui(
    ui: &mut Ui,
    desk: &Desk,
    units: &Units,
    sheet_of: impl FnOnce() -> String,
    state: &mut Behaviour,
    out: &mut Vec<Command>,
) -> Option<Wish> {
    let (design, a) = (&desk.design, desk.assessment());
    ui.horizontal(|ui| {
        ui.selectable_value(&mut state.tab, Tab::Behaviour, "Behaviour");
        ui.selectable_value(&mut state.tab, Tab::Fluids, "Fluids");
        ui.selectable_value(&mut state.tab, Tab::Sheet, "Sheet");
        if state.tab == Tab::Behaviour {
            picture_selector(ui, state);
        }
    });
    match state.tab {
        Tab::Behaviour => pictures_ui(ui, design, a, units, state).map(Wish::Charge),
        Tab::Fluids => fluid_table_ui(ui, design, a, desk.library(), units, &mut state.fluids)
            .map(|(fluid, charge)| Wish::Fluid(fluid, charge)),
        Tab::Sheet => {
            sheet_ui(ui, design, sheet_of, state, out);
            None
        }
    }
}

/// Where there is room for two pictures only, the second is chosen here; an enlarged
/// one stands alone.
fn picture_selector(ui: &mut Ui, state: &mut Behaviour) {
    let alone = state.plots.enlarged;
    if ui.available_width() > WIDE - SELECTOR && alone.is_none() {
        return;
    }
    ui.separator();
    if let Some(picture) = alone {
        ui.label(picture.name());
        return;
    }
    for picture in [Picture::Pressure, Picture::Section, Picture::LiquidShare] {
        ui.selectable_value(&mut state.second, picture, picture.name());
    }
}

fn pictures_ui(
    ui: &mut Ui,
    design: &Design,
    a: &Assessment,
    units: &Units,
    state: &mut Behaviour,
) -> Option<Mass> {
    const SCRUBBER_HEIGHT: f32 = 62.0;
    let mut scrubber = state.scrubber(design);
    let size = ui.available_size();
    let height = (size.y - SCRUBBER_HEIGHT).max(120.0);
    let spacing = ui.spacing().item_spacing;
    let mut dragged = None;
    let mut show = |ui: &mut Ui,
                    picture: Picture,
                    state: &mut PlotState,
                    scrubber: &mut Temperature| {
        let palette = Palette::in_use(ui);
        match picture {
            Picture::ChargeMap => {
                dragged = charge_map_ui(ui, design, a, units, palette, scrubber, state)
            }
            Picture::Pressure => pressure_ui(ui, design, a, units, palette, scrubber, state),
            Picture::Section => section_ui(ui, design, a, units, palette, *scrubber, state),
            Picture::LiquidShare => liquid_share_ui(ui, design, a, units, palette, scrubber, state),
        }
    };
    let mut cell = |ui: &mut Ui,
                    size: eframe::egui::Vec2,
                    picture,
                    state: &mut PlotState,
                    scrubber: &mut Temperature| {
        ui.allocate_ui_with_layout(size, Layout::top_down(Align::Min), |ui| {
            ui.spacing_mut().item_spacing = spacing;
            ui.set_min_size(size);
            ui.set_max_size(size);
            show(ui, picture, state, scrubber);
        });
    };
    if let Some(picture) = state.plots.enlarged {
        cell(
            ui,
            vec2(size.x, height),
            picture,
            &mut state.plots,
            &mut scrubber,
        );
    } else if size.x > WIDE {
        let left = (0.56 * size.x).floor();
        // The buttons of one picture end well before the name of the next.
        const GAP: f32 = 18.0;
        let right = size.x - left - GAP;
        ui.horizontal_top(|ui| {
            ui.spacing_mut().item_spacing.x = GAP;
            // The four of them, two by two; the map keeps the more room.
            let upper = (0.58 * (height - spacing.y)).floor();
            let lower = height - spacing.y - upper;
            let columns = [
                (left, Picture::ChargeMap, Picture::Section),
                (right, Picture::Pressure, Picture::LiquidShare),
            ];
            for (width, above, below) in columns {
                ui.vertical(|ui| {
                    for (height, picture) in [(upper, above), (lower, below)] {
                        let size = vec2(width, height);
                        cell(ui, size, picture, &mut state.plots, &mut scrubber);
                    }
                });
            }
        });
    } else {
        let upper = (0.56 * (height - spacing.y)).floor();
        cell(
            ui,
            vec2(size.x, upper),
            Picture::ChargeMap,
            &mut state.plots,
            &mut scrubber,
        );
        cell(
            ui,
            vec2(size.x, height - spacing.y - upper),
            state.second,
            &mut state.plots,
            &mut scrubber,
        );
    }
    scrubber_ui(ui, design, a, units, &mut scrubber);
    if scrubber != state.scrubber(design) {
        state.scrubber = Some(scrubber);
    }
    dragged
}

fn sheet_ui(
    ui: &mut Ui,
    design: &Design,
    sheet_of: impl FnOnce() -> String,
    state: &mut Behaviour,
    out: &mut Vec<Command>,
) {
    ui.horizontal(|ui| {
        for command in [Command::CopySheet, Command::ExportSheet] {
            if ui
                .button(command.text())
                .on_hover_text(command.tooltip())
                .clicked()
            {
                out.push(command);
            }
        }
        ui.label(
            RichText::new("Exactly the text that is exported.")
                .color(Palette::in_use(ui).text_faint),
        );
    });
    let fresh = matches!(&state.sheet, Some((of, _)) if of == design);
    if !fresh {
        state.sheet = Some((design.clone(), sheet_of()));
    }
    let Some((_, text)) = &state.sheet else {
        return;
    };
    ScrollArea::both()
        .id_salt("sheet")
        .auto_shrink(false)
        .show(ui, |ui| {
            ui.label(RichText::new(text).text_style(TextStyle::Monospace));
        });
}
