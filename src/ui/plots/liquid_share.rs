//! How much of the inside is liquid, over temperature.

use eframe::egui::{Pos2, Rangef, Stroke, Ui};
use egui_plot::LineStyle;

use super::axis::{Home, Scale};
use super::canvas::{Canvas, Side};
use super::grip::scrub_line;
use super::gutter::{EndLabel, widest};
use super::items::{Items, Run};
use super::labels::{Taken, place_in_area};
use super::over_temperature::{
    lay_conditions, lay_regimes, mark_event, name_bands, name_conditions, temperature_side,
};
use super::{CopyAs, Picture, PlotState, header_ui, missing_ui, say, table};
use crate::assess::{Assessment, Charts, EventKind};
use crate::design::Design;
use crate::sealed::PathPoint;
use crate::ui::theme::Palette;
use crate::units::{Kind, Temperature, Units, unit_named};
use crate::words;

/// Paints the liquid share over temperature in all the room there is.
pub fn liquid_share_ui(
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
        Err(missing) => return missing_ui(ui, Picture::LiquidShare, missing, units, palette),
    };
    ui.push_id(Picture::LiquidShare.name(), |ui| {
        if header_ui(
            ui,
            Picture::LiquidShare,
            state,
            palette,
            CopyAs::Table,
            |_, _| {},
        ) {
            ui.ctx().copy_text(table::liquid_share(charts, units));
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
    let across = Home {
        scale: Scale::Linear,
        low,
        high,
    };
    // A little beyond nothing and all, so that both lines are seen whole.
    let up = Home {
        scale: Scale::Linear,
        low: -0.04,
        high: 1.04,
    };
    let degree = units.unit_for(Kind::Temperature, high);
    let across_name = format!("inside, {}", degree.symbol);
    let ceiling = 1.0 - design.demands.ullage.fraction();
    let ceiling_name = format!("at most {}", say::percent(ceiling, units, 3));
    let names = [
        "liquid-full",
        "this unit",
        ceiling_name.as_str(),
        across_name.as_str(),
    ];
    let mut items = Items::new(across, up, palette.ground);
    let runs = shares(charts);
    // Liquid below the line, vapour above it, in the tints of the charge map.
    for run in &runs {
        items.fill_to(run, 0.0, items.veil(palette.liquid_full));
        items.fill_to(run, 1.0, items.veil(palette.all_vapour));
        // The space above the ceiling, which must stay vapour at the hottest.
        let kept: Run = run.iter().map(|point| [point[0], ceiling]).collect();
        items.fill_to(&kept, 1.0, palette.over_allowable.gamma_multiply(0.6));
    }
    let bands = lay_regimes(&mut items, charts, palette);
    lay_conditions(&mut items, design, palette);
    let levels = [
        (0.0, "dry", palette.text_faint),
        (1.0, "liquid-full", palette.text_faint),
        (ceiling, ceiling_name.as_str(), palette.allowable),
    ];
    items.level(0.0, Stroke::new(1.0, palette.text_faint), LineStyle::Solid);
    items.level(1.0, Stroke::new(1.0, palette.text_faint), LineStyle::Solid);
    let broken = LineStyle::Dashed { length: 8.0 };
    items.level(ceiling, Stroke::new(2.0, palette.allowable), broken);
    for run in &runs {
        items.line(run, Stroke::new(3.0, palette.path), LineStyle::Solid);
    }
    let level = temperature_side(degree, &across_name, *scrubber);
    let upright = Side {
        unit: unit_named(Kind::Ratio, "%"),
        name: "% liquid",
        spacing: 34.0,
        away: 0.0,
        margin: 48.0,
        tag: None,
    };
    let right = widest(ui, names) + 22.0;
    let view = &mut state.share_view;
    let canvas = Canvas::show(ui, items, (level, upright), right, view, palette);
    if canvas.to_enlarge {
        state.toggle_enlarged(Picture::LiquidShare);
    }
    canvas.describe(|| sentence(design, a, units));
    name_conditions(&canvas, design, units);
    let mut ends: Vec<EndLabel> = levels
        .into_iter()
        .map(|(share, text, color)| EndLabel {
            y: canvas.y.px(share),
            text: text.to_owned(),
            color,
        })
        .collect();
    let runs: Vec<Vec<Pos2>> = runs.iter().map(|run| canvas.points(run)).collect();
    if let Some(end) = runs
        .last()
        .and_then(|run| run.last())
        .filter(|end| end.x >= canvas.frame.right() - 2.0)
    {
        ends.push(EndLabel {
            y: end.y,
            text: "this unit".to_owned(),
            color: palette.path,
        });
    }
    scrub_line(ui, &canvas, true, units, charts.span, scrubber);
    let mut taken = Taken::default();
    runs.iter().for_each(|run| taken.keep_off(run));
    if let (Ok(events), Ok(corners)) = (&a.events, &a.corners) {
        for event in events
            .iter()
            .filter(|event| event.kind != EventKind::AllowableReached)
        {
            let Some(share) = corners
                .nominal
                .state(event.temperature)
                .ok()
                .and_then(|state| state.liquid_share)
            else {
                continue;
            };
            let text = format!(
                "{} {}",
                words::event(event.kind),
                say::temperature(event.temperature, units)
            );
            mark_event(
                &canvas,
                canvas.at(event.temperature.kelvin(), share),
                &text,
                &mut taken,
            );
        }
    }
    name_bands(&canvas, &bands, &mut taken);
    name_phases(&canvas, &runs, &mut taken);
    canvas.border();
    canvas.end_labels(ends);
    if let Some(pointer) = canvas.resting_pointer(ui)
        && let Ok(at) = Temperature::from_kelvin(canvas.x.si(pointer.x))
        && let Ok(corners) = &a.corners
    {
        let text = match corners.nominal.state(at) {
            Ok(state) => match state.liquid_share {
                Some(share) => format!(
                    "{} liquid · {}",
                    say::percent(share, units, 3),
                    words::regime(state.regime)
                ),
                None => words::regime(state.regime).to_owned(),
            },
            Err(error) => say::fluid(&error, units),
        };
        canvas.read_out(
            pointer,
            &format!("at {}: {text}", say::temperature(at, units)),
        );
    }
}

/// The liquid share as runs of points; a run ends where phases are not told apart.
fn shares(charts: &Charts) -> Vec<Run> {
    let known = |p: &PathPoint| {
        p.state
            .as_ref()
            .is_ok_and(|state| state.liquid_share.is_some())
    };
    let runs = charts
        .path
        .chunk_by(|a, b| known(a) == known(b))
        .filter(|run| run.first().is_some_and(known));
    let point = |p: &PathPoint| {
        let share = p.state.as_ref().ok()?.liquid_share?;
        Some([p.temperature.kelvin(), share])
    };
    runs.map(|run| run.iter().filter_map(point).collect())
        .collect()
}

fn name_phases(canvas: &Canvas<'_>, runs: &[Vec<Pos2>], taken: &mut Taken) {
    let Some(run) = runs.iter().max_by_key(|run| run.len()) else {
        return;
    };
    let sparse: Vec<Pos2> = run.iter().step_by(6).chain(run.last()).copied().collect();
    let (dry, full) = (canvas.y.px(0.0), canvas.y.px(1.0));
    let nowhere = Rangef::new(-1.0, -1.0);
    for (name, ground) in [
        ("liquid", canvas.palette.liquid_full),
        ("vapour", canvas.palette.all_vapour),
    ] {
        let liquid = name == "liquid";
        let extent = |y: f32| {
            let there = |p: &Pos2| {
                if liquid {
                    p.y < y && y < dry
                } else {
                    full < y && y < p.y
                }
            };
            let stretches = sparse
                .chunk_by(|a, b| there(a) == there(b))
                .filter(|s| s.first().is_some_and(there));
            stretches
                .filter_map(|s| Some(Rangef::new(s.first()?.x, s.last()?.x)))
                .max_by(|a, b| a.span().total_cmp(&b.span()))
        };
        let galley = canvas.inside.layout_no_wrap(
            name.to_owned(),
            canvas.name_font.clone(),
            canvas.palette.text,
        );
        if let Some((rect, _)) =
            place_in_area(galley.size(), canvas.frame, extent, nowhere, &[], taken)
        {
            taken.add(rect);
            canvas.backed(rect, galley, ground);
        }
    }
}

fn sentence(design: &Design, a: &Assessment, units: &Units) -> String {
    let c = &design.conditions;
    let at = |t: Temperature| {
        let state = a
            .corners
            .as_ref()
            .ok()
            .and_then(|corners| corners.nominal.state(t).ok());
        let what = match state.map(|state| (state.liquid_share, state.regime)) {
            Some((Some(share), _)) => say::percent(share, units, 3),
            Some((None, regime)) => words::regime(regime).to_owned(),
            None => "not known".to_owned(),
        };
        format!("{what} at {}", say::temperature(t, units))
    };
    format!(
        "Liquid share of the inside volume: {}, {}.",
        at(c.coldest),
        at(c.hottest)
    )
}
