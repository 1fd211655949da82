//! What the pictures over temperature have in common.

use eframe::egui::{Color32, Pos2, Rangef, Rect, Stroke, pos2, vec2};
use egui_plot::LineStyle;

use super::canvas::{Canvas, Side};
use super::items::Items;
use super::labels::Taken;
use super::say;
use crate::assess::Charts;
use crate::design::Design;
use crate::fluid::Regime;
use crate::ui::theme::Palette;
use crate::units::{Temperature, Unit, Units};
use crate::words;

/// Temperatures from which to which the unit is in a regime, and its tint.
pub(super) type Band = (f64, f64, Regime, Color32);

/// The level axis, with room for the scrubber's tag.
pub(super) fn temperature_side<'u>(
    unit: &'u Unit,
    name: &'u str,
    scrubber: Temperature,
) -> Side<'u> {
    Side {
        unit,
        name,
        spacing: 52.0,
        away: 0.0,
        margin: 24.0,
        tag: Some(scrubber.kelvin()),
    }
}

/// Coldest, working range and hottest as upright lines.
pub(super) fn lay_conditions(items: &mut Items, design: &Design, palette: &Palette) {
    for (t, _) in say::conditions(&design.conditions) {
        items.upright(t.kelvin(), condition_stroke(palette), LineStyle::Solid);
    }
}

/// Lines of the conditions: clear, but behind the lines of the fluid.
pub(super) fn condition_stroke(palette: &Palette) -> Stroke {
    Stroke::new(1.0, palette.condition.gamma_multiply(0.45))
}

/// The names of those lines, above the frame.
pub(super) fn name_conditions(canvas: &Canvas<'_>, design: &Design, units: &Units) {
    let labels: Vec<_> = say::conditions(&design.conditions)
        .into_iter()
        .map(|(t, name)| {
            let text = format!("{name} {}", say::temperature(t, units));
            (canvas.x.px(t.kelvin()), text)
        })
        .collect();
    canvas.top_labels(&labels, canvas.palette.condition);
}

/// Tints the temperatures at which the unit is frozen or supercritical, as in the
/// charge map. The bands are named last, by [`name_bands`].
pub(super) fn lay_regimes(items: &mut Items, charts: &Charts, palette: &Palette) -> Vec<Band> {
    let of = |(regime, color): (Regime, Color32)| {
        let here = charts
            .path
            .iter()
            .filter(|p| p.state.as_ref().is_ok_and(|s| s.regime == regime))
            .map(|p| p.temperature.kelvin());
        let (from, to) = here.fold((f64::INFINITY, f64::NEG_INFINITY), |(a, b), t| {
            (a.min(t), b.max(t))
        });
        (from < to).then_some((from, to, regime, color))
    };
    let regimes = [
        (Regime::Frozen, palette.frozen),
        (Regime::Supercritical, palette.supercritical),
    ];
    let bands: Vec<Band> = regimes.into_iter().filter_map(of).collect();
    for (from, to, _, color) in &bands {
        items.upright_band(*from, *to, items.veil(*color));
    }
    bands
}

pub(super) fn name_bands(canvas: &Canvas<'_>, bands: &[Band], taken: &mut Taken) {
    for (from, to, regime, color) in bands {
        let across = Rangef::new(canvas.x.px(*from), canvas.x.px(*to));
        let band = Rect::from_x_y_ranges(across, canvas.frame.y_range()).intersect(canvas.frame);
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
