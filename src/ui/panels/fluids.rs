//! The whole catalogue ranked against this design, live: a row tries its fluid.

use std::cmp::Ordering;
use std::fmt::Write as _;

use eframe::egui::{
    Align2, Checkbox, Key, Modifiers, Rect, Response, RichText, Role, ScrollArea, Sense, Shape,
    Stroke, TextEdit, TextStyle, Ui, Vec2, WidgetInfo, pos2, vec2,
};

use crate::assess::{Assessment, Figure, Library, Ranked, rank};
use crate::design::{Charge, ChargeAim, Design, Duty, FluidId};
use crate::fluid::Regime;
use crate::ui::theme::Palette;
use crate::ui::widgets::is_typing;
use crate::units::{Kind, Mass, NBSP, Pressure, Quantity, Unit, Units};
use crate::words;

/// View-only state of the table.
#[derive(Debug, Default)]
pub struct FluidTable {
    search: String,
    without_objection_only: bool,
    /// Column and whether the greatest comes first; none is the duty's own order.
    sort: Option<(Column, bool)>,
    /// The ranking of this design over this many fluids, in the order shown.
    ranked: Option<(Design, usize, Vec<Ranked>)>,
    /// The fluid being tried, and what stood there before.
    tried: Option<(FluidId, FluidId, Charge)>,
}

/// A fluid to try, with the charge that keeps the fill ratio, or to put back.
pub type Trial = (FluidId, Charge);

#[derive(Debug, Clone, Copy, PartialEq, Eq)]
enum Column {
    Name,
    Hottest,
    Coldest,
    Slope,
    Merit,
    DryOut,
    LiquidFull,
    Charge,
    Objection,
}

impl Column {
    /// The columns of a duty: a wick lives on the merit, a bulb on the slope.
    const fn all(duty: Duty) -> [Self; COLUMNS] {
        let own = match duty {
            Duty::HeatPipe | Duty::VapourChamber | Duty::Thermosyphon | Duty::PulsatingLoop => {
                Self::Merit
            }
            Duty::SensingBulb | Duty::LiquidLift | Duty::PlainVessel => Self::Slope,
        };
        [
            Self::Name,
            Self::Hottest,
            Self::Coldest,
            own,
            Self::DryOut,
            Self::LiquidFull,
            Self::Charge,
            Self::Objection,
        ]
    }

    const fn title(self) -> &'static str {
        match self {
            Self::Name => "fluid",
            Self::Hottest => "at hottest",
            Self::Coldest => "at coldest",
            Self::Slope => "slope",
            Self::Merit => "merit",
            Self::DryOut => "dries out",
            Self::LiquidFull => "full from",
            Self::Charge => "charge",
            Self::Objection => "objection, hazard",
        }
    }

    const fn tooltip(self) -> &'static str {
        match self {
            Self::Name => {
                "Name of the fluid. A click on a row tries it; Escape puts the old one back."
            }
            Self::Hottest => "Absolute pressure of the unit at the hottest temperature",
            Self::Coldest => "Absolute pressure of the unit at the coldest temperature",
            Self::Slope => "Slope of the vapour pressure in the middle of the working range",
            Self::Merit => {
                "Liquid density × surface tension × latent heat ÷ liquid viscosity in the middle of the working range: what a wick can carry"
            }
            Self::DryOut => "Temperature at which the last liquid evaporates",
            Self::LiquidFull => "Temperature at which the unit is full of liquid",
            Self::Charge => "Mass that gives the fill ratio of this design",
            Self::Objection => {
                "Why the fluid cannot be used here as it is; without objection, what it does to people"
            }
        }
    }

    /// At the narrowest; all grow together.
    const fn width(self) -> f32 {
        match self {
            Self::Name => 140.0,
            Self::Objection => 144.0,
            _ => 60.0,
        }
    }

    fn compare(self, a: &Ranked, b: &Ranked) -> Ordering {
        let number = |x: Option<f64>, y: Option<f64>| match (x, y) {
            (Some(x), Some(y)) => x.total_cmp(&y),
            (Some(_), None) => Ordering::Less,
            (None, Some(_)) => Ordering::Greater,
            (None, None) => Ordering::Equal,
        };
        match self {
            Self::Name => a
                .fluid
                .name()
                .to_lowercase()
                .cmp(&b.fluid.name().to_lowercase()),
            Self::Objection => a.objections.cmp(&b.objections),
            _ => number(self.value(a), self.value(b)),
        }
    }

    /// In SI; none where it is not known.
    fn value(self, row: &Ranked) -> Option<f64> {
        let pressure =
            |figure: &Figure<(Pressure, Regime)>| figure.as_ref().ok().map(|(p, _)| p.pascal());
        match self {
            Self::Name | Self::Objection => None,
            Self::Hottest => pressure(&row.at_hottest),
            Self::Coldest => pressure(&row.at_coldest),
            Self::Slope => row.slope.as_ref().ok().copied(),
            Self::Merit => row.merit,
            Self::DryOut => row.dry_out.map(Quantity::si),
            Self::LiquidFull => row.liquid_full.map(Quantity::si),
            Self::Charge => row.mass.as_ref().ok().map(|mass| mass.si()),
        }
    }
}

/// How a column's figures are written: one unit for the whole column.
struct Scale {
    unit: Option<&'static Unit>,
    kind: Kind,
    symbol: String,
    factor: f64,
}

impl Scale {
    /// The unit that suits the present fluid's figure.
    fn of(column: Column, present: Option<&Ranked>, units: &Units) -> Self {
        let of_kind = |kind: Kind, otherwise: f64| {
            let si = present
                .and_then(|row| column.value(row))
                .unwrap_or(otherwise);
            let unit = units.unit_for(kind, si);
            let symbol = unit.symbol.to_owned();
            Self {
                unit: Some(unit),
                kind,
                symbol,
                factor: 1.0,
            }
        };
        match column {
            Column::Name | Column::Objection => Self {
                unit: None,
                kind: Kind::Number,
                symbol: String::new(),
                factor: 1.0,
            },
            Column::Hottest | Column::Coldest => of_kind(Kind::Pressure, 1e5),
            Column::Slope => {
                let mut scale = of_kind(Kind::Pressure, 1e3);
                let kelvin = units.unit_for(Kind::TemperatureDifference, 1.0);
                scale.factor = kelvin.to_si(1.0);
                let _ = write!(scale.symbol, "/{}", kelvin.symbol);
                scale
            }
            Column::Merit => Self {
                unit: None,
                kind: Kind::Number,
                symbol: "GW/m²".to_owned(),
                factor: 1e-9,
            },
            Column::DryOut | Column::LiquidFull => of_kind(Kind::Temperature, 300.0),
            Column::Charge => of_kind(Kind::Mass, 1e-3),
        }
    }

    fn text(&self, si: f64, units: &Units) -> String {
        match self.unit {
            Some(unit) => {
                // Leading noughts take the room of figures.
                let digits = match unit.number_of(si * self.factor).abs() {
                    small if small < 0.01 => 2,
                    small if small < 0.1 => 3,
                    _ => 4,
                };
                units.number(self.kind, si * self.factor, unit, digits)
            }
            None => crate::units::figures(si * self.factor, 3),
        }
    }
}

/// The columns shown, each with the unit of all its figures.
struct Columns([(Column, Scale); COLUMNS]);

impl Columns {
    fn new(duty: Duty, present: Option<&Ranked>, units: &Units) -> Self {
        Self(Column::all(duty).map(|column| (column, Scale::of(column, present, units))))
    }

    /// Left ends of the columns and the right end of the last.
    fn lefts(&self, available: f32) -> Vec<f32> {
        let natural: f32 = self.0.iter().map(|(column, _)| column.width()).sum();
        let stretch = (available / natural).max(1.0);
        let mut x = 0.0;
        let mut lefts = vec![x];
        for (column, _) in &self.0 {
            x += column.width() * stretch;
            lefts.push(x);
        }
        lefts
    }
}

const ROW: f32 = 21.0;
const COLUMNS: usize = 8;

/// Shows the table; a [`Trial`] is the fluid that the user wants in the design.
pub fn fluid_table_ui(
    ui: &mut Ui,
    design: &Design,
    a: &Assessment,
    library: &Library,
    units: &Units,
    table: &mut FluidTable,
) -> Option<Trial> {
    let put_back = table.put_back(ui, design);
    let mut picked = None;
    table.refresh(design, a, library);
    let known = library.fluids.ids().count();
    ui.horizontal(|ui| {
        let search = TextEdit::singleline(&mut table.search)
            .hint_text("name, CAS or refrigerant number")
            .desired_width(200.0);
        let response = ui.add(search);
        response.widget_info(|| WidgetInfo::labeled(Role::TextInput, true, "Find in the table"));
        ui.add(Checkbox::new(
            &mut table.without_objection_only,
            "without objection",
        ));
        let (read, copied) = match &table.ranked {
            Some((_, read, rows)) => (*read, ui.button("Copy table").clicked().then_some(rows)),
            None => (0, None),
        };
        if let Some(rows) = copied {
            ui.ctx().copy_text(as_text(rows, design.duty, units));
        }
        let count = if read < known {
            format!("{read} of {known} fluids read")
        } else {
            format!("{known} fluids, same fill ratio")
        };
        ui.label(RichText::new(count).color(Palette::in_use(ui).text_faint));
    });
    let wanted = table.search.trim().to_lowercase();
    let Some((_, _, rows)) = &table.ranked else {
        return put_back;
    };
    let shown: Vec<&Ranked> = rows
        .iter()
        .filter(|row| !table.without_objection_only || row.objections.is_empty())
        .filter(|row| super::fluid::matches(row.fluid.entry(), &wanted))
        .collect();
    let present = rows
        .iter()
        .find(|row| row.fluid.id() == design.fluid.as_str());
    let columns = Columns::new(design.duty, present, units);
    let mut sort = table.sort;
    ScrollArea::horizontal()
        .id_salt("fluid table")
        .show(ui, |ui| {
            let lefts = columns.lefts(ui.available_width());
            header_ui(ui, &lefts, &columns, &mut sort);
            // The rows are counted with the spacing between them.
            ui.spacing_mut().item_spacing.y = 0.0;
            ScrollArea::vertical()
                .id_salt("fluid rows")
                .auto_shrink(false)
                .show_rows(ui, ROW, shown.len(), |ui, range| {
                    for row in &shown[range] {
                        let chosen = row.fluid.id() == design.fluid.as_str();
                        if row_ui(ui, row, chosen, &lefts, &columns, units).clicked() && !chosen {
                            picked = Some(trial_of(design, row));
                        }
                    }
                });
            if shown.is_empty() {
                ui.label(RichText::new("No fluid here answers to that.").weak());
            }
        });
    if sort != table.sort {
        table.sort = sort;
        table.ranked = None;
        ui.ctx().request_repaint();
    }
    if let Some((fluid, charge)) = picked {
        let (old_fluid, old_charge) = match table.tried.take() {
            // One fluid after another: Escape goes back to what stood before the first.
            Some((tried, old_fluid, old_charge)) if tried == design.fluid => {
                (old_fluid, old_charge)
            }
            _ => (design.fluid.clone(), design.charge.clone()),
        };
        table.tried = Some((fluid.clone(), old_fluid, old_charge));
        return Some((fluid, charge));
    }
    put_back
}

impl FluidTable {
    /// Escape takes a tried fluid out again, as long as it is still the one tried.
    fn put_back(&mut self, ui: &Ui, design: &Design) -> Option<Trial> {
        let (tried, fluid, charge) = self.tried.take()?;
        if tried != design.fluid {
            return None; // chosen otherwise since: there is nothing to put back
        }
        let escape =
            !is_typing(ui.ctx()) && ui.input_mut(|i| i.consume_key(Modifiers::NONE, Key::Escape));
        if escape {
            return Some((fluid, charge));
        }
        self.tried = Some((tried, fluid, charge));
        None
    }

    /// Ranks again where the design changed or more fluids are read.
    fn refresh(&mut self, design: &Design, a: &Assessment, library: &Library) {
        let read = library.fluids.ready().count();
        if matches!(&self.ranked, Some((of, n, _)) if of == design && *n == read) {
            return;
        }
        let mut rows = rank(design, a, library.fluids.ready());
        if let Some((column, greatest_first)) = self.sort {
            rows.sort_by(|a, b| {
                let order = column.compare(a, b);
                let both_known = column.value(a).is_some() == column.value(b).is_some();
                // What is not known stays last either way.
                if greatest_first && both_known {
                    order.reverse()
                } else {
                    order
                }
            });
        }
        self.ranked = Some((design.clone(), read, rows));
    }
}

/// The fluid in the design, at the same fill ratio where the charge is a mass.
fn trial_of(design: &Design, row: &Ranked) -> Trial {
    let mut charge = design.charge.clone();
    if let (ChargeAim::Mass { mass }, Ok(same_fill)) = (&mut charge.aim, &row.mass) {
        let grams = crate::units::careful_down(same_fill.kilogram(), 4);
        *mass = Mass::from_kilogram(grams).unwrap_or(*same_fill);
    }
    (FluidId::from(&*row.fluid), charge)
}

fn header_ui(ui: &mut Ui, lefts: &[f32], columns: &Columns, sort: &mut Option<(Column, bool)>) {
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
fn arrow(centre: eframe::egui::Pos2, down: bool, palette: &Palette) -> Shape {
    let tip = if down { 3.0 } else { -3.0 };
    let corners = [vec2(-3.5, -tip), vec2(3.5, -tip), vec2(0.0, tip)].map(|off: Vec2| centre + off);
    Shape::convex_polygon(corners.to_vec(), palette.text, Stroke::NONE)
}

fn row_ui(
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
    let font = TextStyle::Body.resolve(ui.style());
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
        let align = Align2([align.x(), eframe::egui::Align::Center]);
        let colour = match column {
            Column::Objection if !chosen => palette.text_faint,
            _ => colour,
        };
        let painter = ui.painter().with_clip_rect(cell.intersect(ui.clip_rect()));
        painter.text(pos2(x, cell.center().y), align, text, font.clone(), colour);
    }
    response.on_hover_ui(|ui| {
        ui.label(RichText::new(row.fluid.name()).strong());
        ui.label(super::fluid::nature(row.fluid.entry()));
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
        [] => match super::fluid::nature(row.fluid.entry()) {
            nature if nature == super::fluid::HARMLESS => String::new(),
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

/// Tab-separated, units in the header, for a spreadsheet.
fn as_text(rows: &[Ranked], duty: Duty, units: &Units) -> String {
    let columns = Columns::new(duty, rows.first(), units);
    let heads = columns.0.iter().map(|(column, scale)| {
        if scale.symbol.is_empty() {
            column.title().to_owned()
        } else {
            format!("{} / {}", column.title(), scale.symbol.replace(NBSP, " "))
        }
    });
    let mut text = heads.collect::<Vec<_>>().join("\t");
    for row in rows {
        let cells = columns.0.iter().map(|(column, scale)| match column {
            Column::Name => row.fluid.name().to_owned(),
            Column::Objection => row
                .objections
                .iter()
                .map(|objection| words::objection(*objection))
                .collect::<Vec<_>>()
                .join("; "),
            _ => column
                .value(row)
                .map_or(String::new(), |si| scale.text(si, units)),
        });
        text.push('\n');
        text.push_str(&cells.collect::<Vec<_>>().join("\t"));
    }
    text.push('\n');
    text
}
