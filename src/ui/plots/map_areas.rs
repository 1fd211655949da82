//! The areas of the charge map and their names.

use eframe::egui::{Pos2, Rangef, Rect, Stroke, pos2, vec2};
use egui_plot::LineStyle;

use super::canvas::Canvas;
use super::items::{Items, Run};
use super::labels::{Taken, place_in_area};
use super::strip::x_at;
use crate::assess::{Charts, LimitPoint, MapPoint};
use crate::fluid::Fluid;
use crate::ui::theme::Palette;

/// The boundaries, upper ends last.
pub(super) struct Areas {
    dry_out: Run,
    liquid_full: Run,
    /// Pieces of the allowable line; right of each the pressure is too high.
    allowable: Vec<Run>,
    /// Temperatures above which the fluid is supercritical, and below which it is frozen.
    critical: Option<f64>,
    freezing: Option<f64>,
    /// Temperatures between which no strength of the walls is known.
    strength_unknown: Vec<(f64, f64)>,
}

impl Areas {
    pub fn new(charts: &Charts, fluid: &Fluid) -> Self {
        let map = &charts.map;
        let (low, high) = (charts.span.0.kelvin(), charts.span.1.kelvin());
        let critical = fluid.critical().temperature_k;
        let freezing = fluid.freezing_point().kelvin();
        Self {
            dry_out: run(&map.dry_out),
            liquid_full: run(&map.liquid_full),
            allowable: pieces(&map.allowable, 1.5 * (high - low) / 96.0)
                .map(run)
                .collect(),
            critical: (critical < high && fluid.range().1.kelvin() > critical)
                .then(|| critical.max(low)),
            freezing: (freezing > low).then(|| freezing.min(high)),
            strength_unknown: strength_unknown(&charts.limits),
        }
    }

    /// Tints, hatching of what the walls do not bear, and the lines between.
    pub fn lay(&self, items: &mut Items, palette: &Palette) {
        let (left, right) = (f64::NEG_INFINITY, f64::INFINITY);
        let dry = || self.dry_out.iter().map(|p| (p[1], left, p[0]));
        let full = || self.liquid_full.iter().map(|p| (p[1], p[0], right));
        let between = self.dry_out.iter().zip(&self.liquid_full);
        let two_phase = between.map(|(dry, full)| (dry[1], dry[0], full[0]));
        items.rows(dry(), items.veil(palette.all_vapour), None);
        items.rows(two_phase, items.veil(palette.two_phase), None);
        items.rows(full(), items.veil(palette.liquid_full), None);
        let (low, high) = (items.y.low, items.y.high);
        if let Some(t) = self.critical {
            items.level_band(t, high, items.veil(palette.supercritical));
        }
        if let Some(t) = self.freezing {
            items.level_band(low, t, items.veil(palette.frozen));
        }
        let hatch = Stroke::new(1.0, palette.allowable.gamma_multiply(0.45));
        for piece in &self.allowable {
            let rows = piece.iter().map(|p| (p[1], p[0], right));
            items.rows(
                rows,
                palette.over_allowable.gamma_multiply(0.6),
                Some(hatch),
            );
        }
        // A question without an answer is not left blank.
        let grey = Stroke::new(1.0, palette.text_faint.gamma_multiply(0.35));
        for (from, to) in &self.strength_unknown {
            let rows = [(*from, left, right), (*to, left, right)];
            items.rows(
                rows.into_iter(),
                palette.text_faint.gamma_multiply(0.12),
                Some(grey),
            );
        }
        let edge = Stroke::new(1.5, palette.saturation);
        items.line(&self.dry_out, edge, LineStyle::Solid);
        items.line(&self.liquid_full, edge, LineStyle::Solid);
        for t in [self.critical, self.freezing].into_iter().flatten() {
            items.level(t, edge, LineStyle::Solid);
        }
        let stroke = Stroke::new(2.0, palette.allowable);
        for piece in &self.allowable {
            items.line(piece, stroke, LineStyle::Dashed { length: 7.0 });
        }
    }

    /// Writes each area's name where it has room, keeping out of `avoid` (across)
    /// and, where it can, off some heights.
    pub fn paint_names(&self, canvas: &Canvas<'_>, avoid: Rangef, heights: &[f32]) {
        let palette = canvas.palette;
        let all = canvas.frame.x_range();
        let mut taken = Taken::default();
        let [dry_out, liquid_full] = [&self.dry_out, &self.liquid_full].map(|r| canvas.points(r));
        let allowable: Vec<Vec<Pos2>> = self.allowable.iter().map(|r| canvas.points(r)).collect();
        let [critical, freezing] = [self.critical, self.freezing].map(|t| Some(canvas.y.px(t?)));
        let two_phase = |y: f32| Some(Rangef::new(x_at(&dry_out, y)?, x_at(&liquid_full, y)?));
        let vapour = |y: f32| Some(Rangef::new(all.min, x_at(&dry_out, y)?));
        let full = |y: f32| Some(Rangef::new(x_at(&liquid_full, y)?, all.max));
        let above = |y: f32| critical.filter(|edge| y < *edge).map(|_| all);
        let frozen = |y: f32| freezing.filter(|edge| y > *edge).map(|_| all);
        let over = |y: f32| {
            let edge = allowable.iter().find_map(|piece| x_at(piece, y))?;
            Some(Rangef::new(edge, all.max))
        };
        let mut name = |texts: &[&str], extent: &dyn Fn(f32) -> Option<Rangef>, ground| -> bool {
            for text in texts {
                let galley = canvas.inside.layout_no_wrap(
                    (*text).to_owned(),
                    canvas.name_font.clone(),
                    palette.text,
                );
                if let Some((rect, _)) =
                    place_in_area(galley.size(), canvas.frame, extent, avoid, heights, &taken)
                {
                    taken.add(rect.expand(4.0));
                    canvas.backed(rect, galley, ground);
                    return true;
                }
            }
            false
        };
        for (from, to) in &self.strength_unknown {
            let (top, bottom) = (canvas.y.px(*to), canvas.y.px(*from));
            let unknown = |y: f32| (top..=bottom).contains(&y).then_some(all);
            let ground = palette.ground.gamma_multiply(0.85);
            name(&["strength of the walls not known"], &unknown, ground);
        }
        name(
            &[
                "above allowable pressure",
                "above allowable\npressure",
                "above\nallowable\npressure",
            ],
            &over,
            palette.over_allowable.gamma_multiply(0.9),
        );
        name(&["two-phase", "two-\nphase"], &two_phase, palette.two_phase);
        name(
            &["liquid-full", "liquid-\nfull"],
            &full,
            palette.liquid_full,
        );
        let vapour_named = name(&["all vapour", "all\nvapour"], &vapour, palette.all_vapour);
        name(&["supercritical"], &above, palette.supercritical);
        name(&["frozen"], &frozen, palette.frozen);
        if !vapour_named {
            point_at_vapour(canvas, &dry_out, avoid, heights, &taken);
        }
    }
}

/// Runs of temperature, in the order of the limits, in which no allowable is known.
fn strength_unknown(limits: &[LimitPoint]) -> Vec<(f64, f64)> {
    let mut runs: Vec<(f64, f64)> = Vec::new();
    let mut last_known = true;
    for point in limits {
        let t = point.temperature.kelvin();
        match (point.allowable, runs.last_mut()) {
            (Some(_), _) => last_known = true,
            (None, Some(run)) if !last_known => run.1 = t,
            (None, _) => {
                runs.push((t, t));
                last_known = false;
            }
        }
    }
    runs.retain(|(from, to)| to > from);
    runs
}

/// Beside the area of vapour alone, which is often a sliver: its name and a hair to it.
fn point_at_vapour(
    canvas: &Canvas<'_>,
    dry_out: &[Pos2],
    avoid: Rangef,
    heights: &[f32],
    taken: &Taken,
) {
    let galley = canvas.inside.layout_no_wrap(
        "all vapour".to_owned(),
        canvas.font.clone(),
        canvas.palette.text,
    );
    let size = galley.size();
    let seen = canvas.frame.shrink2(vec2(0.0, 0.5 * size.y + 3.0));
    const ROWS: u8 = 24;
    let place = (0..=ROWS)
        .map(|row| seen.top() + seen.height() * f32::from(row) / f32::from(ROWS))
        .find_map(|y| {
            let edge = x_at(dry_out, y)?;
            let rect = Rect::from_min_size(
                pos2(edge.max(canvas.frame.left()) + 18.0, y - 0.5 * size.y),
                size,
            );
            // Near the critical point the boundary leans over: there it would cross the text.
            let leans =
                x_at(dry_out, rect.top() - 3.0).is_none_or(|above| above > rect.left() - 4.0);
            let clear = !leans
                && heights
                    .iter()
                    .all(|height| (height - y).abs() > 0.5 * size.y + 2.0);
            let room = taken.is_free(rect)
                && rect.right() < canvas.frame.right()
                && !rect.x_range().intersects(avoid);
            (edge - canvas.frame.left() >= 1.5 && clear && room).then_some((edge, rect))
        });
    if let Some((edge, rect)) = place {
        let y = rect.center().y;
        let from = pos2(0.5 * (edge + canvas.frame.left()), y);
        canvas.inside.line_segment(
            [from, pos2(rect.left() - 4.0, y)],
            Stroke::new(1.0, canvas.palette.text),
        );
        canvas.backed(rect, galley, canvas.palette.two_phase);
    }
}

/// Runs of points without a wider gap in temperature than `gap_k`.
fn pieces(line: &[MapPoint], gap_k: f64) -> impl Iterator<Item = &[MapPoint]> {
    line.chunk_by(move |a, b| b.temperature.kelvin() - a.temperature.kelvin() <= gap_k)
}

fn run(line: &[MapPoint]) -> Run {
    line.iter()
        .map(|p| [p.mass.kilogram(), p.temperature.kelvin()])
        .collect()
}
