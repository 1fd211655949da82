//! The charge map: charge across, temperature up, and what the unit is like there.

use eframe::egui::{Align2, Label, Pos2, Rangef, RichText, Ui, pos2};
use egui_plot::LineStyle;

use super::axis::{Axis, Home, Scale};
use super::canvas::{Canvas, Side};
use super::charge_mark::{TRACK, band, bottom_margin, handle_ui, lay_charge, window_ui};
use super::grip::scrub_line;
use super::gutter::{EndLabel, widest};
use super::items::Items;
use super::map_areas::Areas;
use super::over_temperature::condition_stroke;
use super::{CopyAs, Picture, PlotState, header_ui, missing_ui, say, table};
use crate::assess::{Assessment, ChargeFigures, Charts};
use crate::design::Design;
use crate::fluid::CurvePoint;
use crate::ui::theme::Palette;
use crate::units::{Kind, Mass, Temperature, Units};
use crate::words;

/// Paints the map in all the room there is. Some(mass) while the charge is dragged
/// or moved by the arrow keys.
pub fn charge_map_ui(
    ui: &mut Ui,
    design: &Design,
    a: &Assessment,
    units: &Units,
    palette: &Palette,
    scrubber: &mut Temperature,
    state: &mut PlotState,
) -> Option<Mass> {
    let (charts, charge) = match (&a.charts, &a.charge) {
        (Ok(charts), Ok(charge)) => (charts, charge),
        (Err(missing), _) | (_, Err(missing)) => {
            state.charge_held = None;
            missing_ui(ui, Picture::ChargeMap, missing, units, palette);
            return None;
        }
    };
    ui.push_id(Picture::ChargeMap.name(), |ui| {
        let copy = header_ui(
            ui,
            Picture::ChargeMap,
            state,
            palette,
            CopyAs::Table,
            |ui, _| {
                let words =
                    RichText::new(charge_in_words(design, charge, units)).color(palette.text_faint);
                ui.add(Label::new(words).truncate());
            },
        );
        if copy {
            ui.ctx().copy_text(table::charge_map(charts, units));
        }
        map_ui(
            ui,
            (design, a, charts, charge),
            units,
            palette,
            scrubber,
            state,
        )
    })
    .inner
}

fn map_ui(
    ui: &mut Ui,
    (design, a, charts, charge): (&Design, &Assessment, &Charts, &ChargeFigures),
    units: &Units,
    palette: &Palette,
    scrubber: &mut Temperature,
    state: &mut PlotState,
) -> Option<Mass> {
    // A little more than the core draws: room for the names right of the liquid line.
    let home = Home {
        scale: Scale::Linear,
        low: 0.0,
        high: 1.07 * charts.greatest_mass.kilogram(),
    };
    if !state.dragging() {
        state.map_home = Some(home);
    }
    let across = state.map_home.unwrap_or(home);
    let upward = Home {
        scale: Scale::Linear,
        low: charts.span.0.kelvin(),
        high: charts.span.1.kelvin(),
    };
    let mass = units.unit_for(Kind::Mass, across.high);
    let degree = units.unit_for(Kind::Temperature, upward.high);
    let mass_name = format!("charge, {}", mass.symbol);
    let fill = FillScale::new(design, a);
    let fill_name = format!(
        "% full at {}",
        say::temperature(design.conditions.bench, units)
    );
    let lines: Vec<(Temperature, String)> = say::conditions(&design.conditions)
        .into_iter()
        .map(|(t, name)| (t, format!("{name} {}", say::temperature(t, units))))
        .collect();
    let texts = lines
        .iter()
        .map(|(_, text)| text.as_str())
        .chain([mass_name.as_str(), fill_name.as_str()]);
    let right = widest(ui, texts) + 18.0;
    let mut items = Items::new(across, upward, palette.ground);
    let areas = Areas::new(charts, &a.fluid);
    areas.lay(&mut items, palette);
    for (t, _) in &lines {
        items.level(t.kelvin(), condition_stroke(palette), LineStyle::Solid);
    }
    lay_charge(&mut items, a, charge, palette);
    let level = Side {
        unit: mass,
        name: &mass_name,
        spacing: 52.0,
        away: TRACK,
        margin: bottom_margin(ui),
        tag: None,
    };
    let upright = Side {
        unit: degree,
        name: degree.symbol,
        spacing: 22.0,
        away: 0.0,
        margin: 48.0,
        tag: Some(scrubber.kelvin()),
    };
    let view = &mut state.map_view;
    let canvas = Canvas::show(ui, items, (level, upright), right, view, palette);
    if canvas.to_enlarge {
        state.toggle_enlarged(Picture::ChargeMap);
    }
    canvas.describe(|| sentence(charge, design, a, units));
    let labels: Vec<EndLabel> = lines
        .into_iter()
        .map(|(t, text)| EndLabel {
            y: canvas.y.px(t.kelvin()),
            text,
            color: palette.condition,
        })
        .collect();
    let heights: Vec<f32> = labels.iter().map(|label| label.y).collect();
    window_ui(ui, &canvas, a, units);
    scrub_line(ui, &canvas, false, units, charts.span, scrubber);
    areas.paint_names(&canvas, band(&canvas, charge).expand(4.0), &heights);
    canvas.border();
    canvas.end_labels(labels);
    if let Some(fill) = &fill {
        fill.paint(&canvas, &fill_name);
    }
    let moved = handle_ui(ui, &canvas, a, charge, units, state);
    if let Some(pointer) = canvas.resting_pointer(ui)
        && let Some(text) = pointed(&canvas, a, fill.as_ref(), pointer, units)
    {
        canvas.read_out(pointer, &text);
    }
    moved
}

/// Between sealed mass and liquid share of the volume at bench temperature.
struct FillScale {
    volume_m3: f64,
    at: CurvePoint,
}

impl FillScale {
    fn new(design: &Design, a: &Assessment) -> Option<Self> {
        let bench = design.conditions.bench;
        let unit = &a.corners.as_ref().ok()?.nominal;
        a.fluid.saturation_pressure(bench).ok()?;
        Some(Self {
            volume_m3: unit.volume_at_m3(bench),
            at: a.fluid.curve().ok()?.at(bench.kelvin()),
        })
    }

    fn mass(&self, fill: f64) -> f64 {
        self.volume_m3 * (fill * self.at.liquid_kg_per_m3 + (1.0 - fill) * self.at.vapour_kg_per_m3)
    }

    fn fill(&self, mass: f64) -> f64 {
        let (liquid, vapour) = (self.at.liquid_kg_per_m3, self.at.vapour_kg_per_m3);
        (mass / self.volume_m3 - vapour) / (liquid - vapour)
    }

    /// Ticks above the frame at round fill ratios.
    fn paint(&self, canvas: &Canvas<'_>, name: &str) {
        let (low, high) = canvas.x.range();
        let (low, high) = (
            self.fill(low).clamp(0.0, 1.0),
            self.fill(high).clamp(0.0, 1.0),
        );
        if low >= high {
            return;
        }
        // The same points of the screen, counted in fill.
        let home = Home {
            scale: Scale::Linear,
            low,
            high,
        };
        let end = |fill| canvas.x.px(self.mass(fill));
        let axis = Axis::rail(home, Rangef::new(end(low), end(high)));
        let percent = crate::units::unit_named(Kind::Ratio, "%");
        let top = canvas.frame.top();
        for tick in axis.ticks(percent, 36.0) {
            let x = canvas.inside.round_to_pixel_center(axis.px(tick.si));
            canvas
                .outside
                .vline(x, Rangef::new(top - 4.0, top), canvas.axis_stroke());
            canvas.text(
                pos2(x, top - 5.0),
                Align2::CENTER_BOTTOM,
                &tick.text,
                canvas.palette.text_faint,
            );
        }
        canvas.text(
            pos2(canvas.frame.right() + 14.0, top - 5.0),
            Align2::LEFT_BOTTOM,
            name,
            canvas.palette.text,
        );
    }
}

/// What the unit would be like at the pointer.
fn pointed(
    canvas: &Canvas<'_>,
    a: &Assessment,
    fill: Option<&FillScale>,
    pointer: Pos2,
    units: &Units,
) -> Option<String> {
    let mass = Mass::from_kilogram(canvas.x.si(pointer.x)).ok()?;
    let at = Temperature::from_kelvin(canvas.y.si(pointer.y)).ok()?;
    let unit = a.corners.as_ref().ok()?.nominal.with_mass(mass).ok()?;
    let mut text = units.show_to(mass, 3);
    if let Some(fill) = fill
        .map(|fill| fill.fill(mass.kilogram()))
        .filter(|fill| (0.0..=1.0).contains(fill))
    {
        text += &format!(", {} full", say::percent(fill, units, 3));
    }
    text += &format!(" · {} · ", say::temperature(at, units));
    text += &match unit.state(at) {
        Ok(state) => format!(
            "{} · {}",
            words::regime(state.regime),
            say::state_pressure(&state, units, 3)
        ),
        Err(error) => say::fluid(&error, units),
    };
    Some(text)
}

fn charge_in_words(design: &Design, charge: &ChargeFigures, units: &Units) -> String {
    let mut text = format!(
        "{} ± {}",
        units.show(charge.nominal),
        units.show_beside(design.charge.tolerance, charge.nominal, 2)
    );
    if let Ok(fill) = charge.bench_fill {
        let bench = say::temperature(design.conditions.bench, units);
        text += &format!(", {} full at {bench}", say::percent(fill, units, 3));
    }
    text
}

fn sentence(charge: &ChargeFigures, design: &Design, a: &Assessment, units: &Units) -> String {
    let mut text = format!("Charge map: {}", charge_in_words(design, charge, units));
    if let Ok(window) = &a.window {
        match window.ends() {
            Some(_) if window.is_empty() => text += "; no charge meets every limit",
            Some((low, high)) => {
                text += &format!("; allowed from {} to {}", units.show(low), units.show(high))
            }
            None => {}
        }
    }
    let c = &design.conditions;
    text + &format!(
        "; from {} to {}.",
        say::temperature(c.coldest, units),
        say::temperature(c.hottest, units)
    )
}
