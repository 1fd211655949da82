//! What the pictures over temperature have in common.

use eframe::egui::{Color32, CornerRadius, Pos2, Rangef, Rect, Stroke, pos2, vec2};

use super::canvas::Canvas;
use super::labels::Taken;
use super::say;
use crate::assess::Charts;
use crate::design::Design;
use crate::fluid::Regime;
use crate::units::Units;
use crate::words;

/// Coldest, working range and hottest as upright lines, named above the frame.
pub(super) fn paint_conditions(canvas: &Canvas<'_>, design: &Design, units: &Units) {
    let color = canvas.palette.condition;
    let mut labels = Vec::with_capacity(4);
    for (t, name) in say::conditions(&design.conditions) {
        let x = canvas.inside.round_to_pixel_center(canvas.x.px(t.kelvin()));
        canvas
            .inside
            .vline(x, canvas.frame.y_range(), canvas.condition_stroke());
        labels.push((x, format!("{name} {}", say::temperature(t, units))));
    }
    canvas.top_labels(&labels, color);
}

/// Tints the temperatures at which the unit is frozen or supercritical, as in the
/// charge map. The bands are named last, by [`name_bands`].
pub(super) fn regime_bands(
    canvas: &Canvas<'_>,
    charts: &Charts,
) -> [Option<(Rect, Regime, Color32)>; 2] {
    let palette = canvas.palette;
    [
        (Regime::Frozen, palette.frozen),
        (Regime::Supercritical, palette.supercritical),
    ]
    .map(|(regime, color)| {
        let here = charts
            .path
            .iter()
            .filter(|p| p.state.as_ref().is_ok_and(|s| s.regime == regime));
        let across = here.map(|p| canvas.x.px(p.temperature.kelvin()));
        let (from, to) = across.fold((f32::INFINITY, f32::NEG_INFINITY), |(a, b), x| {
            (a.min(x), b.max(x))
        });
        if from >= to {
            return None;
        }
        let band = Rect::from_x_y_ranges(Rangef::new(from, to), canvas.frame.y_range());
        canvas.inside.rect_filled(band, CornerRadius::ZERO, color);
        Some((band.intersect(canvas.frame), regime, color))
    })
}

pub(super) fn name_bands(
    canvas: &Canvas<'_>,
    bands: &[Option<(Rect, Regime, Color32)>],
    taken: &mut Taken,
) {
    for (band, regime, color) in bands.iter().flatten() {
        let text = words::regime(*regime).to_owned();
        let galley =
            canvas
                .inside
                .layout_no_wrap(text, canvas.name_font.clone(), canvas.palette.text);
        let places = [0.5, 0.35, 0.65, 0.2, 0.8, 0.1, 0.9].map(|height| {
            let centre = pos2(band.center().x, band.top() + height * band.height());
            Rect::from_center_size(centre, galley.size())
        });
        if let Some(rect) = taken.first_free(places, band.shrink(3.0)) {
            canvas.backed(rect, galley, *color);
        }
    }
}

/// One dot with its name beside it, where there is room.
pub(super) fn mark_event(canvas: &Canvas<'_>, at: Pos2, text: &str, taken: &mut Taken) {
    if !canvas.frame.expand(1.0).contains(at) {
        return;
    }
    let palette = canvas.palette;
    canvas
        .inside
        .circle(at, 4.0, palette.ground, Stroke::new(2.0, palette.path));
    let galley = canvas.galley(text, palette.text);
    let size = galley.size();
    let places = [
        at + vec2(9.0, 5.0),
        at + vec2(-9.0 - size.x, -size.y - 5.0),
        at + vec2(9.0, -size.y - 5.0),
        at + vec2(-9.0 - size.x, 5.0),
        at + vec2(-0.5 * size.x, -size.y - 12.0),
        at + vec2(-0.5 * size.x, 12.0),
        at + vec2(9.0, 10.0 + size.y),
        at + vec2(-9.0 - size.x, -2.0 * size.y - 10.0),
    ];
    let room = canvas.frame.shrink(3.0);
    if let Some(rect) = taken.first_free(places.map(|min| Rect::from_min_size(min, size)), room) {
        canvas.backed(rect, galley, palette.ground.gamma_multiply(0.85));
    }
}
