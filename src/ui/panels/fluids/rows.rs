//! Header and rows of the table, drawn cell by cell.

use std::fmt::Write as _;

use eframe::egui::{
    Align, Align2, Pos2, Rect, Response, RichText, Role, Sense, Shape, Stroke, TextStyle,
    TextWrapMode, Ui, Vec2, WidgetInfo, WidgetText, pos2, vec2,
};

use super::columns::{Column, Columns};
use crate::assess::Ranked;
use crate::ui::panels::fluid::{HARMLESS, nature};
use crate::ui::theme::Palette;
use crate::units::Units;
use crate::words;

/// Height of a row in points.
pub(super) const ROW: f32 = 21.0;

pub(super) fn header_ui(
    ui: &mut Ui,
    lefts: &[f32],
    columns: &Columns,
    sort: &mut Option<(Column, bool)>,
) {
    let palette = Palette::in_use(ui);
    let width = lefts[lefts.len() - 1];
    let (rect, _) = ui.allocate_exact_size(vec2(width, 34.0), Sense::hover());
    let font = TextStyle::Small.resolve(ui.style());
    for (i, (column, scale)) in columns.0.iter().enumerate() {
        let column = *column;
        let cell = cell(rect, lefts, i);
        let response = ui
            .interact(cell, ui.scope_id().with(("column", i)), Sense::click())
            .on_hover_text(column.tooltip());
        let title = column.title();
        response
            .widget_info(|| WidgetInfo::labeled(Role::Button, true, format!("Sort by {title}")));
        let painter = ui.painter().with_clip_rect(cell);
        let (x, align) = anchor(column, cell);
        let colour = if response.hovered() || response.has_focus() {
            palette.text
        } else {
            palette.text_faint
        };
        let top = painter.text(
            pos2(x, cell.top() + 2.0),
            align.0,
            title,
            font.clone(),
            colour,
        );
        painter.text(
            pos2(x, cell.bottom() - 3.0),
            align.1,
            &scale.symbol,
            font.clone(),
            palette.text_faint,
        );
        if let Some((sorted, greatest_first)) = sort
            && *sorted == column
        {
            let x = if column == Column::Name || column == Column::Objection {
                top.right() + 7.0
            } else {
                top.left() - 7.0
            };
            ui.painter()
                .add(arrow(pos2(x, top.center().y), *greatest_first, palette));
        }
        if response.clicked() {
            *sort = match *sort {
                Some((same, false)) if same == column => Some((column, true)),
                Some((same, true)) if same == column => None,
                _ => Some((column, false)),
            };
        }
    }
    let stroke = Stroke::new(1.0, palette.text_faint);
    ui.painter().hline(rect.x_range(), rect.bottom(), stroke);
}

/// A small triangle: up for rising figures, down for falling ones.
fn arrow(centre: Pos2, down: bool, palette: &Palette) -> Shape {
    let tip = if down { 3.0 } else { -3.0 };
    let corners = [vec2(-3.5, -tip), vec2(3.5, -tip), vec2(0.0, tip)].map(|off: Vec2| centre + off);
    Shape::convex_polygon(corners.to_vec(), palette.text, Stroke::NONE)
}

pub(super) fn row_ui(
    ui: &mut Ui,
    row: &Ranked,
    chosen: bool,
    lefts: &[f32],
    columns: &Columns,
    units: &Units,
) -> Response {
    let palette = Palette::in_use(ui);
    let width = lefts[lefts.len() - 1];
    let (rect, response) = ui.allocate_exact_size(vec2(width, ROW), Sense::click());
    let excluded = !row.objections.is_empty();
    let label = spoken(row);
    response.widget_info(|| WidgetInfo::selected(Role::Button, true, chosen, &label));
    if chosen {
        ui.painter()
            .rect_filled(rect, 3.0, ui.visuals().selection.bg_fill);
    } else if response.hovered() || response.has_focus() {
        ui.painter()
            .rect_filled(rect, 3.0, ui.visuals().widgets.hovered.weak_bg_fill);
    }
    let colour = match (chosen, excluded) {
        (true, _) => ui.visuals().selection.stroke.color,
        (false, true) => palette.text_faint,
        (false, false) => palette.text,
    };
    for (i, (column, scale)) in columns.0.iter().enumerate() {
        let column = *column;
        let cell = cell(rect, lefts, i);
        let text = match column {
            Column::Name => row.fluid.name().to_owned(),
            Column::Objection => objection_text(row),
            _ => column
                .value(row)
                .map_or("–".to_owned(), |si| scale.text(si, units)),
        };
        let (x, (align, _)) = anchor(column, cell);
        let align = Align2([align.x(), Align::Center]);
        let colour = match column {
            Column::Objection if !chosen => palette.text_faint,
            _ => colour,
        };
        // A name too long for its cell ends in an ellipsis; the hover says it whole.
        let text = WidgetText::from(RichText::new(text).color(colour));
        let room = cell.right() - cell.left();
        let galley = text.into_galley(ui, Some(TextWrapMode::Truncate), room, TextStyle::Body);
        let place = align.anchor_size(pos2(x, cell.center().y), galley.size());
        let painter = ui.painter().with_clip_rect(cell.intersect(ui.clip_rect()));
        painter.galley(place.min, galley, colour);
    }
    response.on_hover_ui(|ui| {
        ui.label(RichText::new(row.fluid.name()).strong());
        ui.label(nature(row.fluid.entry()));
        for objection in &row.objections {
            ui.label(words::objection(*objection));
        }
        for figure in [&row.at_hottest, &row.at_coldest] {
            if let Err(missing) = figure {
                ui.label(words::missing(missing, units));
            }
        }
    })
}

/// The first objection, and how many more there are.
fn objection_text(row: &Ranked) -> String {
    match row.objections.as_slice() {
        [] => match nature(row.fluid.entry()) {
            nature if nature == HARMLESS => String::new(),
            nature => nature,
        },
        [only] => words::objection(*only).to_owned(),
        [first, others @ ..] => {
            format!("{} +{}", words::objection(*first), others.len())
        }
    }
}

fn spoken(row: &Ranked) -> String {
    let mut text = row.fluid.name().to_owned();
    for objection in &row.objections {
        let _ = write!(text, ", {}", words::objection(*objection));
    }
    text
}

fn cell(row: Rect, lefts: &[f32], i: usize) -> Rect {
    Rect::from_min_max(
        pos2(row.left() + lefts[i] + 3.0, row.top()),
        pos2(row.left() + lefts[i + 1] - 3.0, row.bottom()),
    )
}

/// Words start at the left, figures end at the right: top and bottom corner.
fn anchor(column: Column, cell: Rect) -> (f32, (Align2, Align2)) {
    match column {
        Column::Name | Column::Objection => {
            (cell.left() + 3.0, (Align2::LEFT_TOP, Align2::LEFT_BOTTOM))
        }
        _ => (cell.right(), (Align2::RIGHT_TOP, Align2::RIGHT_BOTTOM)),
    }
}
