//! The pictures in a window without a screen.

use eframe::egui::epaint::ClippedShape;
use eframe::egui::{Key, Pos2, Shape, Vec2, pos2};
use egui_kittest::Harness;
use egui_kittest::kittest::Queryable as _;

use super::*;
use crate::assess::{Assessment, Library, assess};
use crate::design::{ChargeAim, Design};
use crate::ui::theme::Theme;
use crate::units::{Mass, Temperature, UnitSystem};

const TUBE: &str = r#"(
    title: "Test tube", duty: Thermosyphon, fluid: "water",
    conditions: (bench_temperature_k: 293.15, working_low_k: 293.15, working_high_k: 353.15,
        coldest_k: 253.15, hottest_k: 393.15, least_outside_pressure_pa: 0.0, barometer_pa: 101325.0),
    chamber: (parts: [
        (name: "tube", shape: Tube(inside_diameter: (nominal_m: 0.010), length: (nominal_m: 0.100)),
         wall: Some((material: "copper-c12200-drawn", thickness: (nominal_m: 0.0005)))),
        (name: "ends", count: 2, shape: FlatEnd(inside_diameter: (nominal_m: 0.010), edge: SimplySupported),
         wall: Some((material: "copper-c12200-drawn", thickness: (nominal_m: 0.001)))),
    ]),
    charge: (aim: Mass(mass_kg: 0.003), tolerance_kg: 0.00005),
    room: (volume_m3: 30.0, temperature_k: 293.15, consumers: false),
    bench: (balance_uncertainty_kg: 0.00001, purge_loss_kg: 0.0, gauge: false),
)"#;

struct World {
    design: Design,
    a: Assessment,
    library: Library,
    scrubber: Temperature,
    plots: PlotState,
    picture: Picture,
}

impl World {
    fn new(picture: Picture) -> Self {
        let design: Design = ron::from_str(TUBE).expect("reads");
        let library = Library::built_in();
        let a = assess(&design, &library);
        let scrubber = Temperature::from_celsius(41.0).expect("a temperature");
        Self {
            design,
            a,
            library,
            scrubber,
            plots: PlotState::default(),
            picture,
        }
    }

    fn mass_g(&self) -> f64 {
        1e3 * self.a.charge.as_ref().expect("a charge").nominal.kilogram()
    }

    fn charge(&mut self, mass: Mass) {
        self.design.charge.aim = ChargeAim::Mass { mass };
        self.a = assess(&self.design, &self.library);
    }

    fn ui(&mut self, ui: &mut Ui) {
        let units = Units::new(UnitSystem::Metric);
        let palette = Palette::of(Theme::Light);
        let (design, a, scrubber, plots) =
            (&self.design, &self.a, &mut self.scrubber, &mut self.plots);
        let mut moved = None;
        ui.scope_builder(
            eframe::egui::UiBuilder::new().max_rect(picture_rect()),
            |ui| match self.picture {
                Picture::ChargeMap => {
                    moved = charge_map_ui(ui, design, a, &units, palette, scrubber, plots)
                }
                Picture::Pressure => pressure_ui(ui, design, a, &units, palette, scrubber, plots),
                Picture::Section => section_ui(ui, design, a, &units, palette, *scrubber, plots),
                Picture::LiquidShare => {
                    liquid_share_ui(ui, design, a, &units, palette, scrubber, plots)
                }
            },
        );
        scrubber_ui(ui, design, a, &units, scrubber);
        if let Some(mass) = moved {
            self.charge(mass);
        }
    }
}

fn picture_rect() -> eframe::egui::Rect {
    eframe::egui::Rect::from_min_size(Pos2::ZERO, Vec2::new(660.0, 330.0))
}

fn harness(world: World) -> Harness<'static, World> {
    let mut harness = Harness::builder()
        .with_size(Vec2::new(660.0, 400.0))
        .with_step_dt(1.0 / 60.0)
        .build_ui_state(|ui, world: &mut World| world.ui(ui), world);
    harness.run();
    harness
}

fn painted(harness: &Harness<'_, World>) -> Vec<String> {
    fn walk(shape: &Shape, into: &mut Vec<String>) {
        match shape {
            Shape::Text(text) => into.push(text.galley.text().to_owned()),
            Shape::Vec(shapes) => shapes.iter().for_each(|shape| walk(shape, into)),
            _ => {}
        }
    }
    let mut texts = Vec::new();
    for ClippedShape { shape, .. } in &harness.output().shapes {
        walk(shape, &mut texts);
    }
    texts
}

#[test]
fn the_areas_of_the_map_carry_their_names() {
    let harness = harness(World::new(Picture::ChargeMap));
    let texts = painted(&harness);
    for name in ["two-phase", "frozen"] {
        assert!(texts.iter().any(|text| text == name), "{name}: {texts:?}");
    }
    // Hyphenated where the area is narrow.
    assert!(
        texts
            .iter()
            .any(|text| text.replace('\n', "") == "liquid-full"),
        "{texts:?}"
    );
    assert!(
        texts.iter().any(|text| text.contains("hottest")),
        "{texts:?}"
    );
}

#[test]
fn dragging_the_handle_changes_the_charge() {
    let mut harness = harness(World::new(Picture::ChargeMap));
    let before = harness.state().mass_g();
    let rect = harness
        .get_by_role_and_label(eframe::egui::Role::Slider, "charge")
        .rect();
    let from = pos2(rect.center().x, rect.bottom() - 6.0);
    harness.drag_at(from);
    harness.step();
    harness.hover_at(from + Vec2::new(30.0, 0.0));
    harness.step();
    harness.step();
    assert!(harness.state().plots.dragging());
    harness.drop_at(from + Vec2::new(60.0, 0.0));
    harness.run();
    let after = harness.state().mass_g();
    assert!(after > before + 0.2, "{before} {after}");
    assert!(!harness.state().plots.dragging());
}

#[test]
fn arrow_keys_step_the_charge_by_a_two_hundredth() {
    let mut harness = harness(World::new(Picture::ChargeMap));
    harness
        .get_by_role_and_label(eframe::egui::Role::Slider, "charge")
        .focus();
    harness.run();
    let (low, high) = harness
        .state()
        .a
        .window
        .as_ref()
        .expect("a window")
        .ends()
        .expect("ends");
    let step = 1e3 * 0.005 * (high.kilogram() - low.kilogram());
    harness.key_press(Key::ArrowRight);
    harness.run();
    assert!((harness.state().mass_g() - 3.0 - step).abs() < 1e-9);
    harness.key_press(Key::ArrowLeft);
    harness.run();
    assert!((harness.state().mass_g() - 3.0).abs() < 1e-9);
}

#[test]
fn the_scrubber_moves_by_key_and_in_every_picture() {
    for picture in Picture::ALL {
        let mut harness = harness(World::new(picture));
        let before = harness.state().scrubber.celsius();
        harness
            .get_by_role_and_label(eframe::egui::Role::Slider, "temperature")
            .focus();
        harness.run();
        harness.key_press(Key::ArrowRight);
        harness.run();
        assert!(harness.state().scrubber.celsius() > before);
        // Its own label on the picture, found by the tag's text.
        assert!(
            painted(&harness)
                .iter()
                .any(|text| text.starts_with("at 41.9")),
            "{:?}",
            painted(&harness)
        );
    }
}

#[test]
fn the_pictures_say_what_they_show_and_what_they_cannot() {
    for picture in Picture::ALL {
        let mut world = World::new(picture);
        let harness_ok = harness(World::new(picture));
        assert_eq!(
            harness_ok
                .query_all_by_role(eframe::egui::Role::Image)
                .count(),
            1
        );
        world.design.chamber.parts.clear();
        world.a = assess(&world.design, &world.library);
        let harness = harness(world);
        let texts = painted(&harness).join(" | ");
        assert!(
            texts.contains("Nothing to draw. The chamber has no parts."),
            "{texts}"
        );
    }
}

#[test]
fn a_picture_is_copied_as_a_table_with_units() {
    let world = World::new(Picture::Pressure);
    let charts = world.a.charts.as_ref().expect("charts");
    let units = Units::new(UnitSystem::Metric);
    let text = table::pressure(&world.a, charts, &units);
    assert!(
        text.starts_with("temperature / °C\tsaturation / bar abs\tthis unit / bar abs\tregime")
    );
    assert!(text.lines().all(|line| line.split('\t').count() == 6));
    assert!(table::charge_map(charts, &units).contains("liquid-full\t"));
    assert!(table::liquid_share(charts, &units).contains("two-phase"));
}

#[test]
fn the_scrubber_is_dragged_in_the_picture_itself() {
    for (picture, step) in [
        (Picture::ChargeMap, Vec2::new(0.0, -30.0)),
        (Picture::Pressure, Vec2::new(40.0, 0.0)),
    ] {
        let mut harness = harness(World::new(picture));
        let frame = harness.get_by_role(eframe::egui::Role::Image).rect();
        let span = harness.state().a.charts.as_ref().expect("charts").span;
        let share = (314.15 - span.0.kelvin()) / (span.1.kelvin() - span.0.kelvin());
        let on_line = match picture {
            Picture::ChargeMap => pos2(
                frame.right() - 90.0,
                frame.bottom() - share as f32 * frame.height(),
            ),
            _ => pos2(
                frame.left() + share as f32 * frame.width(),
                frame.center().y,
            ),
        };
        harness.drag_at(on_line);
        harness.step();
        harness.hover_at(on_line + step);
        harness.step();
        harness.drop_at(on_line + step);
        harness.run();
        let after = harness.state().scrubber.celsius();
        assert!(after > 50.0 && after < 70.0, "{picture:?} {after}");
    }
}

#[test]
fn ctrl_and_wheel_zoom_and_a_double_click_shows_all_again() {
    let mut harness = harness(World::new(Picture::ChargeMap));
    let at = harness
        .get_by_role(eframe::egui::Role::Image)
        .rect()
        .center()
        + Vec2::new(60.0, -20.0);
    harness.hover_at(at);
    harness.run();
    harness.event(eframe::egui::Event::Zoom(2.0));
    harness.run();
    assert_ne!(harness.state().plots.map_view, View::default());
    for _ in 0..2 {
        harness.drag_at(at);
        harness.drop_at(at);
    }
    harness.run();
    assert_eq!(harness.state().plots.map_view, View::default());
    assert_eq!(harness.state().plots.enlarged, None);
}
