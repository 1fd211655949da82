//! The widgets, used as a person or a screen reader would.

use eframe::egui::{Key, Modifiers, Role, Ui};
use egui_kittest::{Harness, kittest::Queryable};

use super::*;
use crate::chamber::Factor;
use crate::ui::theme::{self, Theme};
use crate::units::{Length, Pressure, Quantity, Temperature, UnitSystem, Units};

struct Bench {
    length: Length,
    tolerance: Length,
    pressure: Pressure,
    temperature: Temperature,
    factor: Factor,
    units: Units,
    changes: usize,
}

impl Bench {
    fn new() -> Self {
        Self {
            length: Length::from_metre(0.2).unwrap(),
            tolerance: Length::from_metre(0.0).unwrap(),
            pressure: Pressure::from_pascal(1e5).unwrap(),
            temperature: Temperature::from_celsius(25.0).unwrap(),
            factor: Factor::from_si(3.5).unwrap(),
            units: Units::new(UnitSystem::Metric),
            changes: 0,
        }
    }

    fn ui(&mut self, ui: &mut Ui) {
        let units = self.units;
        let length = QuantityField::new("Length", &mut self.length, &units)
            .slider(0.001, 0.5)
            .hover("Between the inner faces");
        self.changes += usize::from(quantity_with_tolerance_row(ui, length, &mut self.tolerance));
        let pressure = QuantityField::new("Outside", &mut self.pressure, &units)
            .slider(1e3, 1e7)
            .logarithmic();
        self.changes += usize::from(pressure.show(ui));
        let temperature = QuantityField::new("Hottest", &mut self.temperature, &units);
        self.changes += usize::from(temperature.slider(233.15, 433.15).show(ui));
        self.changes += usize::from(
            QuantityField::new("Factor", &mut self.factor, &units)
                .slider(1.0, 20.0)
                .show(ui),
        );
    }
}

fn bench() -> Harness<'static, Bench> {
    let mut harness = Harness::builder()
        .with_size([320.0, 400.0])
        .with_context_setup(|ctx| theme::apply(ctx, Theme::Light))
        .build_ui_state(|ui, bench: &mut Bench| bench.ui(ui), Bench::new());
    harness.run();
    harness
}

fn shown(harness: &Harness<'_, Bench>, label: &str) -> String {
    harness
        .get_by_role_and_label(Role::TextInput, label)
        .value()
        .unwrap()
        .replace('\u{a0}', " ")
}

fn type_into(harness: &mut Harness<'_, Bench>, label: &str, text: &str) {
    harness
        .get_by_role_and_label(Role::TextInput, label)
        .click();
    harness.run();
    harness
        .get_by_role_and_label(Role::TextInput, label)
        .type_text(text);
    harness.run();
}

#[test]
fn any_unit_can_be_typed() {
    let mut harness = bench();
    assert_eq!(shown(&harness, "Length"), "200.0 mm");
    type_into(&mut harness, "Length", "2 in");
    assert_eq!(
        harness.state().length.metre(),
        0.2,
        "a draft is not a value yet"
    );
    assert!(is_typing(&harness.ctx));
    harness.key_press(Key::Enter);
    harness.run();
    assert!((harness.state().length.metre() - 0.0508).abs() < 1e-12);
    assert_eq!(shown(&harness, "Length"), "50.80 mm");
    assert_eq!(harness.state().changes, 1);
    assert!(!is_typing(&harness.ctx));
    // Enter keeps the focus and selects everything.
    harness
        .get_by_role_and_label(Role::TextInput, "Length")
        .type_text("0,5 m");
    harness.run();
    harness.key_press(Key::Tab);
    harness.run();
    assert_eq!(harness.state().length.metre(), 0.5);
}

#[test]
fn a_click_elsewhere_commits_too() {
    let mut harness = bench();
    type_into(&mut harness, "Outside", "150 psi");
    harness
        .get_by_role_and_label(Role::TextInput, "Hottest")
        .click();
    harness.run();
    assert!((harness.state().pressure.pascal() - 1_034_213.6).abs() < 1.0);
    assert_eq!(harness.state().changes, 1);
}

#[test]
fn nonsense_is_refused_with_a_sentence_and_the_value_kept() {
    let mut harness = bench();
    for (text, sentence) in [
        ("1,000", "ambiguous"),
        ("nan", "does not start with a number"),
        ("inf", "does not start with a number"),
        ("-3", "below the least allowed, 0"),
        ("3 furlong", "is not one of"),
        ("", "nothing typed"),
    ] {
        type_into(&mut harness, "Length", "x");
        harness.key_press_modifiers(Modifiers::COMMAND, Key::A);
        harness.key_press(Key::Backspace);
        harness
            .get_by_role_and_label(Role::TextInput, "Length")
            .type_text(text);
        harness.key_press(Key::Enter);
        harness.run();
        assert_eq!(harness.state().length.metre(), 0.2, "{text}");
        assert_eq!(
            shown(&harness, "Length"),
            text,
            "the text stays to be mended"
        );
        harness.get_by_label_contains(sentence);
        harness.key_press(Key::Escape);
        harness.run();
        assert_eq!(
            shown(&harness, "Length"),
            "200.0 mm",
            "Escape brings the old value back"
        );
        assert!(harness.query_by_label_contains("Not taken").is_none());
    }
    assert_eq!(harness.state().changes, 0);
}

#[test]
fn a_refused_text_waits_until_the_value_changes() {
    let mut harness = bench();
    type_into(&mut harness, "Factor", "0.5");
    harness.key_press(Key::Tab);
    harness.run();
    assert_eq!(harness.state().factor.number(), 3.5);
    harness.get_by_label_contains("Not taken");
    harness.state_mut().factor = Factor::from_si(4.0).unwrap();
    harness.run();
    assert_eq!(shown(&harness, "Factor"), "4.000");
    assert!(harness.query_by_label_contains("Not taken").is_none());
}

#[test]
fn a_change_from_elsewhere_refreshes_the_text() {
    let mut harness = bench();
    harness.state_mut().length = Length::from_metre(0.0123).unwrap();
    harness.run();
    assert_eq!(shown(&harness, "Length"), "12.30 mm");
    harness.state_mut().units = Units::new(UnitSystem::Inch);
    harness.run();
    assert_eq!(shown(&harness, "Length"), "0.4843 in");
    // Focused, but nothing typed: still refreshed.
    harness
        .get_by_role_and_label(Role::TextInput, "Length")
        .click();
    harness.run();
    harness.state_mut().length = Length::from_metre(0.0254).unwrap();
    harness.run();
    assert_eq!(shown(&harness, "Length"), "1.000 in");
    assert_eq!(harness.state().changes, 0);
}

#[test]
fn looking_at_a_value_does_not_round_it() {
    let mut harness = bench();
    harness.state_mut().length = Length::from_metre(0.012_345_67).unwrap();
    harness.run();
    assert_eq!(shown(&harness, "Length"), "12.35 mm");
    harness
        .get_by_role_and_label(Role::TextInput, "Length")
        .click();
    harness.run();
    assert_eq!(
        shown(&harness, "Length"),
        "12.34567 mm",
        "edited is the value itself"
    );
    harness.key_press(Key::Tab);
    harness.run();
    assert_eq!(harness.state().length.metre(), 0.012_345_67);
    assert_eq!(harness.state().changes, 0);
}

#[test]
fn the_slider_moves_by_hand_and_by_key() {
    let mut harness = bench();
    let lane = harness.get_by_role_and_label(Role::Slider, "Length").rect();
    harness.drag_at(lane.center());
    harness.run();
    harness.hover_at(lane.center() + eframe::egui::vec2(40.0, 60.0));
    harness.run();
    harness.drop_at(lane.center() + eframe::egui::vec2(40.0, 60.0));
    harness.run();
    let dragged = harness.state().length.metre();
    assert!(dragged > 0.3 && dragged < 0.35, "{dragged}");
    let millimetres = dragged * 1e3;
    assert!(
        (millimetres - millimetres.round()).abs() < 1e-9,
        "{millimetres} is not round"
    );
    // The hand left the focus there: arrows go on, by a hundredth of the range.
    harness.key_press(Key::ArrowRight);
    harness.run();
    assert!((harness.state().length.metre() - dragged - 0.005).abs() < 1e-9);
    harness.key_press(Key::Home);
    harness.run();
    assert_eq!(harness.state().length.metre(), 0.001);
}

#[test]
fn tab_goes_from_field_to_slider_and_arrows_work_there() {
    let mut harness = bench();
    harness
        .get_by_role_and_label(Role::TextInput, "Outside")
        .click();
    harness.run();
    harness.key_press(Key::Tab);
    harness.run();
    assert!(
        harness
            .get_by_role_and_label(Role::Slider, "Outside")
            .is_focused()
    );
    harness.key_press(Key::ArrowRight);
    harness.run();
    // A hundredth of four decades, to three figures.
    assert!(
        (harness.state().pressure.pascal() - 1.1e5).abs() < 1e-6,
        "{:?}",
        harness.state().pressure
    );
    assert_eq!(shown(&harness, "Outside"), "1.100 bar");
}

#[test]
fn assistive_tools_can_set_both_halves() {
    let mut harness = bench();
    harness
        .get_by_role_and_label(Role::Slider, "Hottest")
        .set_value_accesskit(60.0);
    harness.run();
    assert!((harness.state().temperature.celsius() - 60.0).abs() < 1e-9);
    harness
        .get_by_role_and_label(Role::Slider, "Hottest")
        .increment_accesskit();
    harness.run();
    assert!((harness.state().temperature.celsius() - 62.0).abs() < 1e-9);
    harness
        .get_by_role_and_label(Role::TextInput, "Hottest")
        .set_text_value_accesskit("70 degF");
    harness.run();
    assert!((harness.state().temperature.kelvin() - 294.261_111).abs() < 1e-5);
}

#[test]
fn a_tolerance_is_in_the_unit_of_its_nominal() {
    let mut harness = bench();
    assert_eq!(shown(&harness, "Length, tolerance"), "0 mm");
    type_into(&mut harness, "Length, tolerance", "0,05");
    harness.key_press(Key::Enter);
    harness.run();
    assert!((harness.state().tolerance.metre() - 5e-5).abs() < 1e-15);
    assert_eq!(shown(&harness, "Length, tolerance"), "0.05 mm");
}

#[test]
fn values_beyond_the_slider_can_be_typed() {
    let mut harness = bench();
    type_into(&mut harness, "Length", "3 m");
    harness.key_press(Key::Enter);
    harness.run();
    assert_eq!(harness.state().length.metre(), 3.0);
    assert_eq!(shown(&harness, "Length"), "3.000 m");
}

#[test]
fn bars_and_badges_say_what_they_show() {
    let bar = WindowBar {
        lower: Some(2.9),
        upper: 3.6,
        least: 3.2,
        nominal: 3.25,
        greatest: 3.3,
        aim: Some(3.1),
    };
    let empty = WindowBar {
        lower: Some(4.0),
        ..bar
    };
    let open = WindowBar {
        lower: None,
        aim: None,
        ..bar
    };
    assert!(empty.is_empty() && !bar.is_empty() && !open.is_empty());
    let labels = |description| WindowBarLabels {
        lower: "2.9 g",
        upper: "3.6 g",
        charge: "3.25 g",
        description,
    };
    let mut harness = Harness::builder()
        .with_size([320.0, 500.0])
        .with_context_setup(|ctx| theme::apply(ctx, Theme::Dark))
        .build_ui(move |ui| {
            verdict_badge(ui, Badge::Warning, "Fit with warnings");
            badge_mark(ui, Badge::Error);
            let colour = ui.visuals().error_fg_color;
            for share in [0.0, 0.87, 1.1, 7.0, f64::NAN] {
                margin_bar(ui, share, colour, &format!("share {share}"));
            }
            window_bar(ui, &bar, &labels("inside"));
            window_bar(ui, &empty, &labels("empty"));
            window_bar(ui, &open, &labels("open"));
        });
    harness.run();
    for label in [
        "Fit with warnings",
        "Error",
        "share 0.87",
        "share 7",
        "share NaN",
        "inside",
        "empty",
        "open",
    ] {
        harness.get_by_label(label);
    }
}
