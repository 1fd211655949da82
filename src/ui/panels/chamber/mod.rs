//! The chamber: its parts, the inside as drawn or measured, and how it is closed.

mod closure;
mod inside;
mod part;
mod wall;

pub use part::text_ui;

use eframe::egui::{RichText, Ui};

use crate::assess::{Assessment, FindingKind, Library};
use crate::chamber::{Chamber, Part, Role, Shape, Spread};
use crate::ui::theme::Palette;
use crate::ui::widgets::QuantityField;
use crate::units::Units;
use crate::words;

pub fn decision(a: &Assessment, units: &Units) -> String {
    a.volumes.as_ref().map_or_else(
        |_| "no volume".to_owned(),
        |volumes| units.show(volumes.nominal),
    )
}

/// What a part's buttons ask for, done after the list is drawn.
enum Change {
    Remove(usize),
    Duplicate(usize),
    Up(usize),
    Down(usize),
}

pub fn chamber_ui(
    ui: &mut Ui,
    chamber: &mut Chamber,
    a: &Assessment,
    library: &Library,
    units: &Units,
) {
    volumes_ui(ui, a, units);
    let mut change = None;
    let total = total_m3(chamber);
    let count = chamber.parts.len();
    for (index, part) in chamber.parts.iter_mut().enumerate() {
        let faults = faults_of(a, index, units);
        let row = part::Row {
            index,
            count,
            total_m3: total,
            faults: &faults,
        };
        ui.push_id(("part", index), |ui| {
            part::part_ui(ui, &row, part, library, units, &mut change);
        });
    }
    make(chamber, change);
    add_ui(ui, chamber, library);
    inside::inside_ui(ui, chamber, a, units);
    QuantityField::new("Tilt", &mut chamber.tilt, units)
        .slider(0.0, std::f64::consts::FRAC_PI_2)
        .digits(3)
        .hover("Of the axis against the horizontal; the first part is the low one")
        .show(ui);
    ui.checkbox(&mut chamber.elastic_growth, "Walls yield to pressure")
        .on_hover_text(
            "Counts the elastic growth of tubes, spheres and flat ends in the worst case; \
             never in the margin to liquid-full",
        );
    ui.add_space(4.0);
    closure::closure_ui(ui, chamber, a, units);
}

/// What the parts add together, before what lies inside is taken away: shares are of it.
fn total_m3(chamber: &Chamber) -> f64 {
    chamber
        .parts
        .iter()
        .map(|part| part.volumes().inside.nominal_m3)
        .sum()
}

fn volumes_ui(ui: &mut Ui, a: &Assessment, units: &Units) {
    let faint = |text: String| RichText::new(text).color(Palette::in_use(ui).text_faint);
    match &a.named {
        Ok(named) => {
            let text = format!(
                "Inside {}, {} to {}",
                units.show(named.inside.nominal),
                units.show(named.inside.least),
                units.show(named.inside.greatest)
            );
            let mut more = Vec::new();
            if named.wick_void.nominal.cubic_metre() > 0.0 {
                more.push(format!("wick void {}", units.show(named.wick_void.nominal)));
                more.push(format!(
                    "vapour core {}",
                    units.show(named.vapour_core.nominal)
                ));
            }
            if let Some(evaporator) = &named.evaporator {
                more.push(format!("evaporator {}", units.show(evaporator.nominal)));
            }
            let (text, more) = (faint(text), faint(words::upper(&more.join(", "))));
            ui.label(text);
            if !more.text().is_empty() {
                ui.label(more);
            }
        }
        Err(reason) => {
            let text = faint(words::missing(reason, units));
            ui.label(text);
        }
    }
}

fn make(chamber: &mut Chamber, change: Option<Change>) {
    let parts = &mut chamber.parts;
    match change {
        Some(Change::Remove(index)) => drop(parts.remove(index)),
        Some(Change::Duplicate(index)) => {
            let copy = parts[index].clone();
            parts.insert(index + 1, copy);
        }
        Some(Change::Up(index)) => parts.swap(index - 1, index),
        Some(Change::Down(index)) => parts.swap(index, index + 1),
        None => {}
    }
}

fn add_ui(ui: &mut Ui, chamber: &mut Chamber, library: &Library) {
    ui.menu_button("Add a part…", |ui| {
        let groups: [(&str, &[Role]); 3] = [
            ("Cavities", &[Role::Cavity]),
            ("Ends and bought-in parts", &[Role::Lid, Role::Rated]),
            ("Wicks and solids inside", &[Role::Wick, Role::Insert]),
        ];
        let shapes = Shape::default_of_each_kind();
        for (label, roles) in groups {
            ui.menu_button(label, |ui| {
                for shape in shapes.iter().filter(|shape| roles.contains(&shape.role())) {
                    if ui.button(words::upper(shape.kind_name())).clicked() {
                        chamber
                            .parts
                            .push(new_part(chamber, shape.clone(), library));
                        ui.close();
                    }
                }
            });
        }
    });
}

/// A part of this shape, with the wall of the last part that has one; what lies inside is
/// of that wall's material.
fn new_part(chamber: &Chamber, shape: Shape, library: &Library) -> Part {
    let last = chamber.parts.iter().rev().find_map(|p| p.wall.clone());
    let wall = last.or_else(|| wall::default_wall(library));
    let name = shape.kind_name().to_owned();
    match shape.role() {
        Role::Cavity | Role::Lid => Part::new(&name, shape, wall),
        Role::Rated => Part::new(&name, shape, None),
        Role::Insert | Role::Wick => Part {
            made_of: wall.map(|wall| wall.material),
            ..Part::new(&name, shape, None)
        },
    }
}

fn faults_of(a: &Assessment, index: usize, units: &Units) -> Vec<String> {
    a.findings
        .iter()
        .filter_map(|finding| match &finding.kind {
            FindingKind::Chamber(fault) if fault.part() == Some(index) => {
                Some(words::chamber_fault(fault, None, units))
            }
            _ => None,
        })
        .collect()
}

/// Share of the whole that a part adds or takes.
fn share(spread: &Spread, total_m3: f64) -> Option<f64> {
    (total_m3 > 0.0).then(|| spread.nominal_m3 / total_m3)
}
