//! The inside volume: the sum of the parts, as measured, or weighed full of water.

use eframe::egui::{RichText, Ui};

use crate::assess::Assessment;
use crate::chamber::{Chamber, MeasuredVolume, WaterFill};
use crate::ui::theme::Palette;
use crate::ui::widgets::{ChoiceWidth, QuantityField, choice_ui, quantity_with_tolerance_row};
use crate::units::{Mass, Pressure, Ratio, Temperature, TemperatureDifference, Units, Volume};

#[derive(Clone, Copy, PartialEq, Eq)]
enum Way {
    Sum,
    Stated,
    Weighed,
}

impl Way {
    const ALL: [Self; 3] = [Self::Sum, Self::Stated, Self::Weighed];

    const fn name(self) -> &'static str {
        match self {
            Self::Sum => "inside volume by the parts",
            Self::Stated => "inside volume as measured",
            Self::Weighed => "inside volume weighed full of water",
        }
    }
}

pub fn inside_ui(ui: &mut Ui, chamber: &mut Chamber, a: &Assessment, units: &Units) {
    let way = match (&chamber.measured, &chamber.water_fill) {
        (_, Some(_)) => Way::Weighed,
        (Some(_), None) => Way::Stated,
        (None, None) => Way::Sum,
    };
    let mut chosen = way;
    choice_ui(
        ui,
        "How the inside volume is found",
        way.name(),
        ChoiceWidth::Column,
        &mut chosen,
        Way::ALL.map(|way| (way, way.name().to_owned())),
    );
    if chosen != way {
        let now = a.volumes.as_ref().map(|volumes| volumes.nominal).ok();
        chamber.measured = now.filter(|_| chosen == Way::Stated).map(stated);
        chamber.water_fill = now.filter(|_| chosen == Way::Weighed).map(weighed);
    }
    if let Some(MeasuredVolume {
        volume,
        uncertainty,
    }) = &mut chamber.measured
    {
        let field = QuantityField::new("Measured", volume, units)
            .slider(1e-8, 1.0)
            .logarithmic();
        quantity_with_tolerance_row(ui, field, uncertainty);
    }
    if let Some(fill) = &mut chamber.water_fill {
        ui.indent("water", |ui| water_ui(ui, fill, units));
        if let Ok(volumes) = &a.volumes {
            let off = volumes.greatest.cubic_metre() - volumes.nominal.cubic_metre();
            let text = format!(
                "{} ± {} at 20 °C, buoyancy of air and the wall's expansion counted",
                units.show_to(volumes.nominal, 6),
                Volume::from_cubic_metre(off)
                    .map_or_else(|_| "–".to_owned(), |v| units.show_to(v, 2))
            );
            ui.label(RichText::new(text).color(Palette::in_use(ui).text_faint));
        }
    }
}

fn water_ui(ui: &mut Ui, fill: &mut WaterFill, units: &Units) {
    QuantityField::new("Empty, open", &mut fill.empty, units)
        .digits(7)
        .hover("Balance with the chamber open and full of air")
        .show(ui);
    QuantityField::new("Full of water", &mut fill.full, units)
        .digits(7)
        .hover("Balance with the chamber full of water, no bubble left")
        .show(ui);
    QuantityField::new("Of either reading", &mut fill.reading_uncertainty, units)
        .digits(2)
        .hover("Uncertainty of a reading, at the worst")
        .show(ui);
    let field = QuantityField::new("Water", &mut fill.water_temperature, units);
    quantity_with_tolerance_row(ui, field, &mut fill.temperature_uncertainty);
    QuantityField::new("Air", &mut fill.air_temperature, units).show(ui);
    QuantityField::new("Air pressure", &mut fill.air_pressure, units).show(ui);
    QuantityField::new("Humidity of the air", &mut fill.relative_humidity, units)
        .digits(2)
        .show(ui);
    QuantityField::new("Bubbles left", &mut fill.bubble_allowance, units)
        .digits(2)
        .hover("Most gas that may have stayed inside")
        .show(ui);
}

fn stated(volume: Volume) -> MeasuredVolume {
    let half_a_percent = Volume::from_cubic_metre(0.005 * volume.cubic_metre());
    MeasuredVolume {
        volume,
        uncertainty: half_a_percent.unwrap_or(volume),
    }
}

/// Readings that give about the present volume, to be typed over.
fn weighed(volume: Volume) -> WaterFill {
    let kilogram = |kg: f64| Mass::from_kilogram(kg).unwrap_or_else(|_| zero_mass());
    let room = Temperature::from_kelvin(293.15).expect("20 °C");
    WaterFill {
        empty: kilogram(0.1),
        full: kilogram(0.1 + 997.1 * volume.cubic_metre()),
        reading_uncertainty: kilogram(1e-5),
        water_temperature: room,
        temperature_uncertainty: TemperatureDifference::from_kelvin(0.2).expect("a difference"),
        air_temperature: room,
        air_pressure: Pressure::from_pascal(101_325.0).expect("an atmosphere"),
        relative_humidity: Ratio::from_fraction(0.5).expect("a share"),
        bubble_allowance: Volume::from_cubic_metre(0.0).expect("0 is a volume"),
    }
}

fn zero_mass() -> Mass {
    Mass::from_kilogram(0.0).expect("0 is a mass")
}
