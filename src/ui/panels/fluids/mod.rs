//! The whole catalogue ranked against this design, live: a row tries its fluid.

mod columns;
mod rows;

use eframe::egui::{
    Checkbox, Key, Modifiers, RichText, Role, ScrollArea, TextEdit, Ui, WidgetInfo,
};

use columns::{Column, Columns, as_text};
use rows::{ROW, header_ui, row_ui};

use crate::assess::{Assessment, Library, Ranked, rank};
use crate::design::{Charge, ChargeAim, Design, FluidId};
use crate::ui::theme::Palette;
use crate::ui::widgets::is_typing;
use crate::units::{Mass, Units, careful_down};

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
        let grams = careful_down(same_fill.kilogram(), 4);
        *mass = Mass::from_kilogram(grams).unwrap_or(*same_fill);
    }
    (FluidId::from(&*row.fluid), charge)
}
