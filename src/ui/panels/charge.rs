//! How much goes in: by mass, by fill ratio, or by dispensed volume.

use eframe::egui::{RichText, Ui};

use crate::assess::Assessment;
use crate::design::{ChargeAim, Design, NamedVolume};
use crate::ui::theme::Palette;
use crate::ui::widgets::{ChoiceWidth, QuantityField, choice_ui};
use crate::units::{Mass, Ratio, Units, Volume};
use crate::words;

pub fn decision(a: &Assessment, units: &Units) -> String {
    a.charge
        .as_ref()
        .map_or_else(|_| "–".to_owned(), |charge| units.show(charge.nominal))
}

pub fn charge_ui(ui: &mut Ui, design: &mut Design, a: &Assessment, units: &Units) {
    kind_ui(ui, design, a);
    let most = a
        .charts
        .as_ref()
        .map_or(1.0, |charts| charts.greatest_mass.kilogram());
    let parts: Vec<String> = design
        .chamber
        .parts
        .iter()
        .map(|part| part.name.clone())
        .collect();
    match &mut design.charge.aim {
        ChargeAim::Mass { mass } => {
            QuantityField::new("Sealed mass", mass, units)
                .slider(0.0, most)
                .hover("Liquid and vapour together")
                .show(ui);
        }
        ChargeAim::FillRatio {
            ratio,
            temperature,
            of,
        } => {
            QuantityField::new("Fill ratio", ratio, units)
                .slider(0.0, 1.0)
                .hover("Liquid volume over the named volume")
                .show(ui);
            named_volume_ui(ui, of, &parts);
            let mut stated = temperature.is_some();
            if ui
                .checkbox(&mut stated, "At another temperature than the bench's")
                .changed()
            {
                *temperature = stated.then_some(design.conditions.bench);
            }
            if let Some(temperature) = temperature {
                QuantityField::new("Ratio stated at", temperature, units)
                    .slider(223.15, 473.15)
                    .show(ui);
            }
        }
        ChargeAim::Dispensed { volume } => {
            let inside = a
                .volumes
                .as_ref()
                .map_or(1.0, |volumes| volumes.nominal.cubic_metre());
            QuantityField::new("Dispensed liquid", volume, units)
                .slider(0.0, inside)
                .hover("Liquid measured out at bench temperature, purge loss included")
                .show(ui);
        }
    }
    QuantityField::new("Tolerance, ±", &mut design.charge.tolerance, units)
        .slider(0.0, 0.1 * most)
        .digits(3)
        .hover("Greatest deviation of the sealed mass")
        .show(ui);
    outcome_ui(ui, a, units);
}

/// The three ways to state a charge; switching keeps the mass.
fn kind_ui(ui: &mut Ui, design: &mut Design, a: &Assessment) {
    let charge = a.charge.as_ref().ok();
    let aim = &mut design.charge.aim;
    ui.horizontal_wrapped(|ui| {
        let is_mass = matches!(aim, ChargeAim::Mass { .. });
        if ui.selectable_label(is_mass, "Mass").clicked() && !is_mass {
            let mass = charge.map_or_else(smallest_mass, |charge| charge.nominal);
            *aim = ChargeAim::Mass { mass };
        }
        let is_ratio = matches!(aim, ChargeAim::FillRatio { .. });
        if ui.selectable_label(is_ratio, "Fill ratio").clicked() && !is_ratio {
            let fill = charge
                .and_then(|charge| charge.bench_fill.clone().ok())
                .unwrap_or(0.5);
            if let Ok(ratio) = Ratio::from_fraction(fill) {
                *aim = ChargeAim::FillRatio {
                    ratio,
                    temperature: None,
                    of: NamedVolume::Inside,
                };
            }
        }
        let is_dispensed = matches!(aim, ChargeAim::Dispensed { .. });
        if ui
            .selectable_label(is_dispensed, "Dispensed volume")
            .clicked()
            && !is_dispensed
        {
            let volume = charge.and_then(|charge| charge.dispensed_volume.clone().ok());
            if let Some(volume) = volume.or_else(|| Volume::from_cubic_metre(1e-6).ok()) {
                *aim = ChargeAim::Dispensed { volume };
            }
        }
    });
}

fn smallest_mass() -> Mass {
    Mass::from_kilogram(1e-3).expect("a gram is a mass")
}

fn named_volume_ui(ui: &mut Ui, of: &mut NamedVolume, parts: &[String]) {
    let said = |of: &NamedVolume| format!("of {}", words::named_volume(of));
    let named = [
        NamedVolume::Inside,
        NamedVolume::VapourCore,
        NamedVolume::WickVoid,
        NamedVolume::Evaporator,
    ];
    let parts = parts.iter().cloned().map(NamedVolume::Part);
    let shown = said(of);
    choice_ui(
        ui,
        "Volume that the fill ratio is of",
        &shown,
        ChoiceWidth::Column,
        of,
        named.into_iter().chain(parts).map(|choice| {
            let text = said(&choice);
            (choice, text)
        }),
    );
}

/// What the charge comes to, in the other ways of stating it.
fn outcome_ui(ui: &mut Ui, a: &Assessment, units: &Units) {
    let text = match &a.charge {
        Ok(charge) => {
            let fill = charge.bench_fill.as_ref().map_or_else(
                |_| "no liquid".to_owned(),
                |fill| format!("{:.1} % liquid", 100.0 * fill),
            );
            let volume = charge
                .dispensed_volume
                .as_ref()
                .map_or_else(|_| "–".to_owned(), |v| units.show(*v));
            format!(
                "{} sealed; {fill} on the bench; {volume} dispensed",
                units.show(charge.nominal)
            )
        }
        Err(reason) => words::missing(reason, units),
    };
    ui.label(RichText::new(text).color(Palette::in_use(ui).text_faint));
}
