//! How the filled unit is closed.

use eframe::egui::{RichText, Ui};

use super::faults_of;
use super::part::{capacity_ui, text_ui};
use super::wall::rating_ui;
use crate::assess::Assessment;
use crate::chamber::{Capacity, Chamber, Closure, ClosureKind, Relief, Stub};
use crate::ui::theme::Palette;
use crate::ui::widgets::{ChoiceWidth, QuantityField, choice_ui};
use crate::units::{Mass, Pressure, Units};
use crate::words;

pub fn closure_ui(ui: &mut Ui, chamber: &mut Chamber, a: &Assessment, units: &Units) {
    ui.push_id("closure", |ui| {
        kind_ui(ui, &mut chamber.closure);
        for fault in faults_of(a, chamber.parts.len(), units) {
            let text = RichText::new(fault).color(Palette::in_use(ui).error);
            ui.label(text);
        }
        if let Some(closure) = &mut chamber.closure {
            ui.indent("closure", |ui| body_ui(ui, closure, units));
        }
    });
}

fn kind_ui(ui: &mut Ui, closure: &mut Option<Closure>) {
    let kind = closure.as_ref().map(|closure| closure.kind);
    let mut chosen = kind;
    let said = |kind: Option<ClosureKind>| {
        kind.map_or_else(
            || "closure not stated".to_owned(),
            |kind| format!("closed by: {}", kind.name()),
        )
    };
    choice_ui(
        ui,
        "How the unit is closed",
        &said(kind),
        ChoiceWidth::Column,
        &mut chosen,
        ClosureKind::ALL.map(|kind| (Some(kind), words::upper(kind.name()))),
    );
    if let (Some(kind), true) = (chosen, chosen != kind) {
        match closure {
            Some(closure) => closure.kind = kind,
            None => *closure = Some(new_closure(kind)),
        }
    }
}

fn body_ui(ui: &mut Ui, closure: &mut Closure, units: &Units) {
    capacity_ui(ui, "Dead volume", &mut closure.dead_volume, 0, units);
    let mut comes_off = closure.stub.is_some();
    if ui.checkbox(&mut comes_off, "A stub comes off").changed() {
        closure.stub = comes_off.then(new_stub);
    }
    if let Some(stub) = &mut closure.stub {
        capacity_ui(ui, "Inside the stub", &mut stub.volume, 1, units);
        QuantityField::new("Mass of the stub", &mut stub.mass, units)
            .slider(0.0, 0.01)
            .digits(3)
            .show(ui);
    }
    ui.checkbox(&mut closure.refillable, "Can be opened and refilled");
    rating_ui(ui, &mut closure.rating, true, units);
    relief_ui(ui, &mut closure.relief, units);
}

fn relief_ui(ui: &mut Ui, relief: &mut Relief, units: &Units) {
    let mut device = matches!(relief, Relief::Device { .. });
    if ui.checkbox(&mut device, "A relief device").changed() {
        *relief = if device {
            Relief::Device {
                opens_at: Pressure::from_pascal(1e6).expect("a usual pressure"),
                what: String::new(),
            }
        } else {
            Relief::None {
                because: String::new(),
            }
        };
    }
    match relief {
        Relief::Device { opens_at, what } => {
            QuantityField::new("Opens at", opens_at, units)
                .slider(0.0, 1e7)
                .hover("Inside less outside pressure")
                .show(ui);
            text_ui(ui, what, "Which device, and where it blows to", "device");
        }
        Relief::None { because } => text_ui(ui, because, "Why there is none", "no relief"),
    }
}

fn new_closure(kind: ClosureKind) -> Closure {
    Closure {
        kind,
        dead_volume: Capacity::default(),
        stub: kind.parts_a_stub().then(new_stub),
        refillable: matches!(kind, ClosureKind::Valve | ClosureKind::ScrewPlug),
        rating: None,
        relief: Relief::None {
            because: String::new(),
        },
    }
}

fn new_stub() -> Stub {
    Stub {
        volume: Capacity::default(),
        mass: Mass::from_kilogram(0.001).expect("a usual mass"),
    }
}
