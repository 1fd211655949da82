//! What a part is made of and what it bears.

use eframe::egui::Ui;

use super::part::{dimension_ui, text_ui};
use crate::assess::Library;
use crate::chamber::{Dimension, HeatTreatment, MaterialKind, Rating, Wall};
use crate::ui::widgets::{ChoiceWidth, QuantityField, choice_ui};
use crate::units::{Length, Pressure, Temperature, Units};

pub fn wall_ui(ui: &mut Ui, wall: &mut Wall, library: &Library, units: &Units) {
    let mut chosen = Some(wall.material.clone());
    material_combo(ui, "Wall material", &mut chosen, library, None);
    if let Some(chosen) = chosen {
        wall.material = chosen;
    }
    choice_ui(
        ui,
        "Last heat treatment",
        &format!("last heat: {}", wall.treatment.name()),
        ChoiceWidth::Column,
        &mut wall.treatment,
        HeatTreatment::ALL.map(|treatment| (treatment, treatment.name().to_owned())),
    );
    let thickness = &mut wall.thickness;
    dimension_ui(ui, "Wall thickness", thickness, (5e-5, 0.02), 99, units);
    QuantityField::new("Corrosion", &mut wall.corrosion_allowance, units)
        .slider(0.0, 0.002)
        .digits(3)
        .hover("What corrosion may take off over life; counts in no strength")
        .show(ui);
    QuantityField::new("Ovality", &mut wall.ovality, units)
        .slider(0.0, 0.1)
        .digits(2)
        .hover("Greatest less least diameter, over the nominal one: it weakens against outside pressure")
        .show(ui);
    let material = library.materials.get(&wall.material);
    if material.is_some_and(|m| matches!(m.kind, MaterialKind::Glass(_))) {
        ui.checkbox(&mut wall.worn, "Old or handled glass")
            .on_hover_text("A scratched surface bears less");
    }
}

pub fn made_of_ui(ui: &mut Ui, made_of: &mut Option<String>, library: &Library) {
    let label = "Material of the body";
    material_combo(ui, label, made_of, library, Some("material not stated"));
}

/// A stated strength: none, or all of it. `must`: the part has no other.
pub fn rating_ui(ui: &mut Ui, rating: &mut Option<Rating>, must: bool, units: &Units) {
    let label = if must {
        "Rating stated by its maker"
    } else {
        "Also limited by a stated rating"
    };
    let mut stated = rating.is_some();
    if ui.checkbox(&mut stated, label).changed() {
        *rating = stated.then(default_rating);
    }
    let Some(rating) = rating else { return };
    ui.indent("rating", |ui| {
        QuantityField::new("Rated inside", &mut rating.inside, units)
            .slider(0.0, 2e7)
            .hover("Greatest inside less outside pressure")
            .show(ui);
        let mut bears = rating.outside.is_some();
        if ui
            .checkbox(&mut bears, "Rated against outside pressure")
            .changed()
        {
            rating.outside = Pressure::from_pascal(1e5).ok().filter(|_| bears);
        }
        if let Some(outside) = &mut rating.outside {
            QuantityField::new("Rated outside", outside, units)
                .slider(0.0, 1e6)
                .hover("Greatest outside less inside pressure")
                .show(ui);
        }
        for (label, value) in [
            ("Rated from", &mut rating.coldest),
            ("Rated to", &mut rating.hottest),
        ] {
            QuantityField::new(label, value, units)
                .slider(193.15, 523.15)
                .show(ui);
        }
        text_ui(
            ui,
            &mut rating.stated_by,
            "Who states it, in which paper",
            "stated by",
        );
    });
}

pub fn default_wall(library: &Library) -> Option<Wall> {
    let material = library
        .materials
        .get("copper-c12200-annealed")
        .or_else(|| library.materials.iter().next())?;
    let thickness = Dimension::exact(Length::from_metre(1e-3).ok()?);
    Some(Wall::new(&material.id, thickness))
}

fn default_rating() -> Rating {
    let kelvin = |t| Temperature::from_kelvin(t).expect("a usual temperature");
    Rating {
        inside: Pressure::from_pascal(1e6).expect("a usual pressure"),
        outside: None,
        coldest: kelvin(253.15),
        hottest: kelvin(373.15),
        stated_by: String::new(),
    }
}

fn material_combo(
    ui: &mut Ui,
    label: &str,
    chosen: &mut Option<String>,
    library: &Library,
    none: Option<&str>,
) {
    let shown = chosen.as_deref().map_or_else(
        || none.unwrap_or_default().to_owned(),
        |id| {
            let material = library.materials.get(id);
            material.map_or_else(|| id.to_owned(), |m| m.name.clone())
        },
    );
    let none = none.map(|none| (None, none.to_owned()));
    let known = library.materials.iter().map(|material| {
        let own = material.own_file().map_or("", |_| ", your own");
        let text = format!("{}{own}", material.name);
        (Some(material.id.clone()), text)
    });
    choice_ui(
        ui,
        label,
        &shown,
        ChoiceWidth::Column,
        chosen,
        none.into_iter().chain(known),
    );
}
