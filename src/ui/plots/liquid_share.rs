//! How much of the inside is liquid, over temperature.

use eframe::egui::{Align2, CornerRadius, Pos2, Rangef, Rect, Stroke, Ui, pos2};

use super::axis::{Home, Scale};
use super::canvas::{Canvas, EndLabel, Margins, widest};
use super::grip::scrub_line;
use super::labels::Taken;
use super::pressure::{mark_event, paint_conditions};
use super::{Picture, PlotState, header_ui, missing_ui, say, table};
use crate::assess::{Assessment, Charts, EventKind};
use crate::design::Design;
use crate::fluid::Regime;
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
        if header_ui(ui, Picture::LiquidShare, state, palette, |_, _| {}) {
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
    let margins = Margins {
        left: 48.0,
        right: widest(ui, names) + 22.0,
        top: 24.0,
        bottom: 24.0,
    };
    let mut canvas = Canvas::new(ui, (across, up), margins, &mut state.share_view, palette);
    if canvas.response.double_clicked() && state.share_view == Default::default() {
        state.toggle_enlarged(Picture::LiquidShare);
    }
    canvas.describe(|| sentence(design, a, units));
    canvas.leave_room(true, scrubber.kelvin());
    paint_regimes(&canvas, charts, ceiling);
    canvas.y_axis(unit_named(Kind::Ratio, "%"), "% liquid");
    canvas.x_axis(degree, &across_name, 0.0);
    paint_conditions(&canvas, design, units);

    let full = canvas.frame.x_range();
    let mut ends = Vec::new();
    let mut level = |share: f64, text: &str, color, broken: bool| {
        let y = canvas.y.px(share);
        if broken {
            canvas.dashed(
                &[pos2(full.min, y), pos2(full.max, y)],
                Stroke::new(2.0, color),
                8.0,
                4.0,
            );
        } else {
            canvas.inside.hline(full, y, Stroke::new(1.0, color));
        }
        ends.push(EndLabel {
            y,
            text: text.to_owned(),
            color,
        });
    };
    level(0.0, "dry", palette.text_faint, false);
    level(1.0, "liquid-full", palette.text_faint, false);
    level(ceiling, &ceiling_name, palette.allowable, true);

    let mut run: Vec<Pos2> = Vec::with_capacity(charts.path.len());
    let mut last = None;
    for point in &charts.path {
        match point
            .state
            .as_ref()
            .ok()
            .and_then(|state| state.liquid_share)
        {
            Some(share) => run.push(canvas.at(point.temperature.kelvin(), share)),
            None => {
                last = run.last().copied().or(last);
                canvas
                    .inside
                    .line(std::mem::take(&mut run), Stroke::new(4.0, palette.path));
            }
        }
    }
    last = run.last().copied().or(last);
    canvas.inside.line(run, Stroke::new(4.0, palette.path));
    if let Some(end) = last.filter(|end| end.x >= canvas.frame.right() - 2.0) {
        ends.push(EndLabel {
            y: end.y,
            text: "this unit".to_owned(),
            color: palette.path,
        });
    }
    let mut taken = Taken::default();
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
    scrub_line(ui, &canvas, true, units, charts.span, scrubber);
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

/// What has no liquid share is tinted as in the charge map, and the space above the
/// ceiling, which must stay vapour at the hottest.
fn paint_regimes(canvas: &Canvas<'_>, charts: &Charts, ceiling: f64) {
    let palette = canvas.palette;
    let frame = canvas.frame;
    let kept = Rangef::new(canvas.y.px(1.0), canvas.y.px(ceiling));
    canvas.inside.rect_filled(
        Rect::from_x_y_ranges(frame.x_range(), kept),
        CornerRadius::ZERO,
        palette.over_allowable.gamma_multiply(0.30),
    );
    for (regime, color) in [
        (Regime::Frozen, palette.frozen),
        (Regime::Supercritical, palette.supercritical),
    ] {
        let here = charts
            .path
            .iter()
            .filter(|p| p.state.as_ref().is_ok_and(|s| s.regime == regime));
        let across = here.map(|p| canvas.x.px(p.temperature.kelvin()));
        let (from, to) = across.fold((f32::INFINITY, f32::NEG_INFINITY), |(a, b), x| {
            (a.min(x), b.max(x))
        });
        if from >= to {
            continue;
        }
        let rect = Rect::from_x_y_ranges(Rangef::new(from, to), frame.y_range());
        canvas.inside.rect_filled(rect, CornerRadius::ZERO, color);
        let seen = rect.intersect(frame);
        let galley = canvas.galley(words::regime(regime), palette.text);
        if seen.width() > galley.size().x + 8.0 {
            let at = Align2::CENTER_CENTER.anchor_size(seen.center(), galley.size());
            canvas.inside.galley(at.min, galley, palette.text);
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
