//! Pressure over temperature: the saturation line, the sealed unit that leaves it,
//! and what the weakest wall bears.

use eframe::egui::{Align2, Pos2, Stroke, Ui, vec2};
use egui_plot::LineStyle;

use super::axis::{Home, Scale};
use super::canvas::{Canvas, Side};
use super::grip::scrub_line;
use super::gutter::{name_line, widest};
use super::items::{Items, Run};
use super::labels::Taken;
use super::over_temperature::{
    lay_conditions, lay_regimes, mark_event, name_bands, name_conditions, temperature_side,
};
use super::pressure_lines::{limit_runs, path_runs, upward};
use super::{CopyAs, Picture, PlotState, PressureScale, header_ui, missing_ui, say, table};
use crate::assess::{Assessment, Charts};
use crate::design::Design;
use crate::fluid::Regime;
use crate::ui::theme::Palette;
use crate::units::{Kind, Pressure, Temperature, Units};
use crate::words;

/// Paints pressure over temperature in all the room there is.
pub fn pressure_ui(
    ui: &mut Ui,
    design: &Design,
    a: &Assessment,
    units: &Units,
    palette: &Palette,
    scrubber: &mut Temperature,
    state: &mut PlotState,
) {
    let charts = match &a.charts {
        Ok(charts) => charts,
        Err(missing) => return missing_ui(ui, Picture::Pressure, missing, units, palette),
    };
    ui.push_id(Picture::Pressure.name(), |ui| {
        let copy = header_ui(
            ui,
            Picture::Pressure,
            state,
            palette,
            CopyAs::Table,
            |ui, state| {
                for scale in PressureScale::ALL {
                    if ui
                        .selectable_label(state.scale == scale, scale.name())
                        .clicked()
                        && state.scale != scale
                    {
                        state.scale = scale;
                        state.pressure_view = Default::default();
                        state.pressure_home = None;
                    }
                }
            },
        );
        if copy {
            ui.ctx().copy_text(table::pressure(a, charts, units));
        }
        plot_ui(ui, (design, a, charts), units, palette, scrubber, state);
    });
}

fn plot_ui(
    ui: &mut Ui,
    (design, a, charts): (&Design, &Assessment, &Charts),
    units: &Units,
    palette: &Palette,
    scrubber: &mut Temperature,
    state: &mut PlotState,
) {
    let (low, high) = (charts.span.0.kelvin(), charts.span.1.kelvin());
    let scale = if state.scale == PressureScale::Reciprocal {
        Scale::Reciprocal
    } else {
        Scale::Linear
    };
    let across = Home { scale, low, high };
    let found = upward(design, a, charts, state.scale);
    let up = if state.dragging() {
        state.pressure_home.unwrap_or(found)
    } else {
        found
    };
    state.pressure_home = Some(up);
    let pressure = units.unit_for(Kind::Pressure, up.high);
    let degree = units.unit_for(Kind::Temperature, high);
    let across_name = format!("inside, {}", degree.symbol);
    let names = [
        "saturation",
        "this unit",
        "allowable",
        "burst",
        across_name.as_str(),
    ];
    let mut items = Items::new(across, up, palette.ground);
    let bands = lay_regimes(&mut items, charts, palette);
    lay_conditions(&mut items, design, palette);
    let saturation = limit_runs(charts, |point| point.saturation);
    let frozen = path_runs(charts, |state| state.regime == Regime::Frozen);
    let path = path_runs(charts, |state| state.regime != Regime::Frozen);
    let allowable = limit_runs(charts, |point| point.allowable);
    let burst = limit_runs(charts, |point| point.burst);
    // A rail and what runs on it: the unit's line stays visible where both are one.
    let rail = Stroke::new(6.0, palette.saturation.gamma_multiply(0.45));
    let dots = |spacing| LineStyle::Dotted { spacing };
    for (runs, stroke, style) in [
        (&saturation, rail, LineStyle::Solid),
        (&frozen, Stroke::new(1.2, palette.path), dots(6.0)),
        (&path, Stroke::new(2.5, palette.path), LineStyle::Solid),
        (
            &allowable,
            Stroke::new(2.0, palette.allowable),
            LineStyle::Dashed { length: 8.0 },
        ),
        (&burst, Stroke::new(1.2, palette.burst), dots(5.0)),
    ] {
        runs.iter().for_each(|run| items.line(run, stroke, style));
    }
    let level = temperature_side(degree, &across_name, *scrubber);
    let upright_name = format!("{} abs", pressure.symbol);
    let upright = Side {
        unit: pressure,
        name: &upright_name,
        spacing: 26.0,
        away: 0.0,
        margin: 56.0,
        tag: None,
    };
    let right = widest(ui, names) + 22.0;
    let view = &mut state.pressure_view;
    let canvas = Canvas::show(ui, items, (level, upright), right, view, palette);
    if canvas.to_enlarge {
        state.toggle_enlarged(Picture::Pressure);
    }
    canvas.describe(|| sentence(design, a, units));
    name_conditions(&canvas, design, units);
    scrub_line(ui, &canvas, true, units, charts.span, scrubber);
    let on_screen =
        |runs: &[Run]| -> Vec<Vec<Pos2>> { runs.iter().map(|run| canvas.points(run)).collect() };
    let [saturation, path, frozen, allowable, burst] =
        [saturation, path, frozen, allowable, burst].map(|runs| on_screen(&runs));
    let mut taken = Taken::default();
    for run in [&saturation, &path, &frozen, &allowable, &burst]
        .into_iter()
        .flatten()
    {
        taken.keep_off(run);
    }
    let mut ends = Vec::new();
    for (runs, text, color) in [
        (&saturation, "saturation", palette.saturation),
        (&path, "this unit", palette.path),
        (&allowable, "allowable", palette.allowable),
        (&burst, "burst", palette.burst),
    ] {
        name_line(&canvas, runs, text, color, &mut ends, &mut taken);
    }
    paint_events(&canvas, a, units, &mut taken);
    name_bands(&canvas, &bands, &mut taken);
    paint_unknown(&canvas, (design, a), &up, units, &mut taken);
    canvas.border();
    canvas.end_labels(ends);
    if let Some(pointer) = canvas.resting_pointer(ui)
        && let Ok(at) = Temperature::from_kelvin(canvas.x.si(pointer.x))
        && let Ok(corners) = &a.corners
    {
        let text = match corners.nominal.state(at) {
            Ok(state) => say::state_pressure(&state, units, 4),
            Err(error) => say::fluid(&error, units),
        };
        canvas.read_out(
            pointer,
            &format!("at {}: {text}", say::temperature(at, units)),
        );
    }
}

/// A dot and a name where the unit's behaviour changes.
fn paint_events(canvas: &Canvas<'_>, a: &Assessment, units: &Units, taken: &mut Taken) {
    let (Ok(events), Ok(corners)) = (&a.events, &a.corners) else {
        return;
    };
    for event in events {
        let Ok(state) = corners.nominal.state(event.temperature) else {
            continue;
        };
        let at = canvas.at(event.temperature.kelvin(), state.pressure.pascal());
        let text = format!(
            "{} {}",
            words::event(event.kind),
            say::temperature(event.temperature, units)
        );
        mark_event(canvas, at, &text, taken);
    }
}

/// In words, in a free corner: strengths that are not known or lie above the picture.
fn paint_unknown(
    canvas: &Canvas<'_>,
    (design, a): (&Design, &Assessment),
    up: &Home,
    units: &Units,
    taken: &mut Taken,
) {
    let hottest = design.conditions.hottest;
    let mut lines: Vec<String> = Vec::new();
    let above = |name: &str, p: Pressure| {
        (p.pascal() > up.high)
            .then(|| format!("{name}: {}, above the picture", say::pressure(p, units, 3)))
    };
    match (a.envelope.weakest(hottest), a.limits_at(hottest)) {
        (Ok(weakest), Some((allowable, burst))) => {
            lines.extend(above("allowable", allowable));
            match (weakest.burst, burst) {
                (Err(unknown), _) => {
                    lines.push(format!("burst: {}", say::strength(&unknown, units)))
                }
                (Ok(_), Some(burst)) => lines.extend(above("burst", burst)),
                (Ok(_), None) => {}
            }
        }
        (Err(unknown), _) => lines.push(format!(
            "allowable and burst: {}",
            say::strength(&unknown, units)
        )),
        (Ok(_), None) => {}
    }
    if lines.is_empty() {
        return;
    }
    let room = canvas.frame.shrink2(vec2(8.0, 5.0));
    let text = lines.join("\n");
    let (font, color) = (canvas.font.clone(), canvas.palette.text);
    let galley = canvas.outside.layout(text, font, color, room.width());
    let corner = |anchor: Align2| anchor.align_size_within_rect(galley.size(), room);
    let corners = [
        Align2::RIGHT_BOTTOM,
        Align2::LEFT_TOP,
        Align2::RIGHT_TOP,
        Align2::LEFT_BOTTOM,
    ]
    .map(corner);
    let rect = taken
        .first_free(corners, canvas.frame)
        .unwrap_or(corners[0]);
    canvas.backed(rect, galley, canvas.palette.ground.gamma_multiply(0.85));
}

fn sentence(design: &Design, a: &Assessment, units: &Units) -> String {
    let hottest = design.conditions.hottest;
    let mut text = format!(
        "Pressure over temperature: at the hottest, {}",
        say::temperature(hottest, units)
    );
    match a
        .corners
        .as_ref()
        .map(|corners| corners.nominal.state(hottest))
    {
        Ok(Ok(state)) => {
            text += &format!(
                ", the unit stands at {}",
                say::pressure(state.pressure, units, 4)
            )
        }
        Ok(Err(error)) => text += &format!(", {}", say::fluid(&error, units)),
        Err(_) => {}
    }
    if let Some((allowable, _)) = a.limits_at(hottest) {
        text += &format!(
            "; the weakest part may bear {}",
            say::pressure(allowable, units, 3)
        );
    }
    text + "."
}
