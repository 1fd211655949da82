//! The window without a display: widgets are found by their accessible names.

use std::path::{Path, PathBuf};
use std::sync::Arc;

use chargewright::store;
use chargewright::ui::{App, Command};
use chargewright::units::UnitSystem;
use eframe::egui::{self, Key, Modifiers, Role};
use egui_kittest::Harness;
use egui_kittest::kittest::{NodeT as _, Queryable as _};

pub struct Window {
    app: Option<App>,
    path: Option<PathBuf>,
    folder: Option<PathBuf>,
}

impl Window {
    fn frame_ui(&mut self, ui: &mut egui::Ui) {
        let (path, folder) = (self.path.as_deref(), self.folder.clone());
        let app = self
            .app
            .get_or_insert_with(|| App::new(ui.ctx(), path, folder));
        app.frame_ui(ui);
    }
}

pub fn window(path: Option<&Path>, folder: Option<&Path>) -> Harness<'static, Window> {
    let state = Window {
        app: None,
        path: path.map(Path::to_owned),
        folder: folder.map(Path::to_owned),
    };
    let mut harness = Harness::builder()
        .with_size([1280.0, 720.0])
        .with_max_steps(12)
        .build_ui_state(|ui, window: &mut Window| window.frame_ui(ui), state);
    harness.run();
    harness
}

pub fn app<'a>(harness: &'a mut Harness<'static, Window>) -> &'a mut App {
    harness
        .state_mut()
        .app
        .as_mut()
        .expect("made in the first frame")
}

pub fn order(harness: &mut Harness<'static, Window>, command: Command) {
    app(harness).order(command);
    harness.run();
}

pub fn type_into(harness: &mut Harness<'static, Window>, label: &str, text: &str) {
    let field = harness.get_by_role_and_label(Role::TextInput, label);
    field.click();
    harness.run();
    harness
        .get_by_role_and_label(Role::TextInput, label)
        .type_text(text);
    harness.run();
    harness.key_press(Key::Enter);
    harness.run();
}

fn hottest(harness: &mut Harness<'static, Window>) -> f64 {
    app(harness).desk().design.conditions.hottest.kelvin()
}

/// A folder of its own for one test, removed when it ends.
pub struct Folder(PathBuf);

impl Folder {
    pub fn new(name: &str) -> Self {
        let path = std::env::temp_dir().join(format!("chargewright-{name}-{}", std::process::id()));
        std::fs::create_dir_all(&path).expect("a temporary folder");
        Self(path)
    }

    pub fn file(&self, name: &str) -> PathBuf {
        self.0.join(name)
    }
}

impl Drop for Folder {
    fn drop(&mut self) {
        let _ = std::fs::remove_dir_all(&self.0);
    }
}

pub fn preset(folder: &Folder, name: &str) -> PathBuf {
    let path = folder.file(&format!("{name}.ron"));
    store::save(&path, &store::preset(name).expect(name)).expect("saves");
    path
}

#[test]
fn it_opens_on_a_ready_design_that_is_saved_and_says_so() {
    let mut harness = window(None, None);
    harness.get_by_label_contains("Fit to fill");
    assert!(!app(&mut harness).desk().is_unsaved());
    assert_eq!(app(&mut harness).desk().name(), "untitled");
}

#[test]
fn a_typed_value_in_any_unit_changes_every_answer_in_the_next_frame() {
    let mut harness = window(None, None);
    let before = app(&mut harness)
        .desk()
        .assessment()
        .worst
        .clone()
        .expect("a worst case");
    type_into(&mut harness, "Hottest", "300 degF");
    assert!((hottest(&mut harness) - (300.0 + 459.67) / 1.8).abs() < 1e-9);
    let after = app(&mut harness)
        .desk()
        .assessment()
        .worst
        .clone()
        .expect("a worst case");
    assert!(after.pressure > before.pressure);
    assert!(app(&mut harness).desk().is_unsaved());
    harness.get_by_label("unsaved");
}

#[test]
fn nonsense_keeps_the_old_value_and_says_why() {
    let mut harness = window(None, None);
    let before = hottest(&mut harness);
    type_into(&mut harness, "Hottest", "1,000");
    assert_eq!(hottest(&mut harness), before);
    harness.get_by_label_contains("ambiguous");
}

#[test]
fn a_contradiction_is_a_finding_and_the_screen_does_not_go_blank() {
    let mut harness = window(None, None);
    type_into(&mut harness, "Hottest", "-60");
    harness.get_by_label_contains("Not fit");
    harness.get_by_label_contains("is below the coldest");
}

#[test]
fn undo_and_redo_by_key() {
    let mut harness = window(None, None);
    let before = hottest(&mut harness);
    type_into(&mut harness, "Hottest", "90");
    type_into(&mut harness, "Coldest", "2");
    harness.key_press_modifiers(Modifiers::COMMAND, Key::Z);
    harness.run();
    harness.key_press_modifiers(Modifiers::COMMAND, Key::Z);
    harness.run();
    assert_eq!(hottest(&mut harness), before);
    assert!(!app(&mut harness).desk().is_unsaved());
    harness.key_press_modifiers(Modifiers::COMMAND | Modifiers::SHIFT, Key::Z);
    harness.run();
    assert!((hottest(&mut harness) - 363.15).abs() < 1e-9);
}

#[test]
fn a_slider_moves_the_design_and_is_one_step_back() {
    let mut harness = window(None, None);
    let before = hottest(&mut harness);
    let slider = harness.get_by_role_and_label(Role::Slider, "Hottest");
    slider.focus();
    harness.run();
    harness.key_press(Key::ArrowRight);
    harness.run();
    assert!(hottest(&mut harness) > before);
    order(&mut harness, Command::Undo);
    assert_eq!(hottest(&mut harness), before);
}

#[test]
fn another_fluid_is_one_click_and_its_hazards_are_said() {
    let mut harness = window(None, None);
    harness
        .get_by_role_and_label(Role::TextInput, "Search fluids")
        .click();
    harness.run();
    harness
        .get_by_role_and_label(Role::TextInput, "Search fluids")
        .type_text("7664");
    harness.run();
    harness.get_by_label_contains("ammonia   ").click();
    harness.run();
    assert_eq!(app(&mut harness).desk().design.fluid.as_str(), "ammonia");
    harness.get_by_label_contains("Fluid attacks the wall");
    harness.get_by_label_contains("Not fit");
}

/// The table ranks every fluid; a row tries its fluid at the same fill ratio, Escape puts
/// the old one back, and an excluded fluid says why.
#[test]
fn a_row_of_the_table_tries_a_fluid_and_escape_puts_the_old_one_back() {
    let folder = Folder::new("table");
    let path = preset(&folder, "copper-water-heat-pipe");
    let mut harness = window(Some(&path), None);
    app(&mut harness).desk().library().fluids.read_all();
    harness.get_by_label("Fluids").click();
    harness.run();
    let before = app(&mut harness).desk().design.clone();
    assert_eq!(before.fluid.as_str(), "water");
    type_into(&mut harness, "Find in the table", "67-56-1");
    harness
        .get_by_role_and_label(Role::Button, "methanol")
        .click();
    harness.run();
    let tried = app(&mut harness).desk().design.clone();
    assert_eq!(tried.fluid.as_str(), "methanol");
    let fill = |harness: &mut Harness<'static, Window>| {
        let charge = app(harness).desk().assessment().charge.clone();
        charge.expect("a charge").bench_fill.expect("a fill ratio")
    };
    let methanol = fill(&mut harness);
    harness.key_press(Key::Escape);
    harness.run();
    assert_eq!(app(&mut harness).desk().design, before);
    let water = fill(&mut harness);
    // The tried mass has four figures.
    assert!(
        (methanol / water - 1.0).abs() < 2e-3,
        "{methanol} against {water}"
    );
}

#[test]
fn an_excluded_fluid_stays_in_the_table_with_its_reason() {
    let folder = Folder::new("excluded");
    let path = preset(&folder, "copper-water-heat-pipe");
    let mut harness = window(Some(&path), None);
    app(&mut harness).desk().library().fluids.read_all();
    harness.get_by_label("Fluids").click();
    harness.run();
    type_into(&mut harness, "Find in the table", "7664-41-7");
    assert!(
        harness
            .query_by_label_contains("ammonia, attacks the wall")
            .is_some(),
        "ammonia in copper"
    );
    harness.get_by_label("without objection").click();
    harness.run();
    assert!(
        harness
            .query_by_label_contains("ammonia, attacks the wall")
            .is_none()
    );
}

#[test]
fn saving_opening_and_a_wrong_file() {
    let folder = Folder::new("save");
    let path = preset(&folder, "copper-water-heat-pipe");
    let mut harness = window(Some(&path), None);
    type_into(&mut harness, "Hottest", "111");
    harness.key_press_modifiers(Modifiers::COMMAND, Key::S);
    harness.run();
    assert!(!app(&mut harness).desk().is_unsaved());
    let saved = store::load(&path).expect("saved");
    assert!((saved.conditions.hottest.celsius() - 111.0).abs() < 1e-9);

    let wrong = folder.file("wrong.ron");
    std::fs::write(&wrong, "(format: 1, design: (title: 5))").expect("writes");
    order(&mut harness, Command::OpenPath(wrong));
    harness.get_by_label("Not opened");
    harness.get_by_label_contains("line 1, column");
    assert_eq!(
        app(&mut harness).desk().path(),
        Some(path.as_path()),
        "the open design stays"
    );
    harness.get_by_role_and_label(Role::Button, "Close").click();
    harness.run();
    assert!(harness.query_by_label("Not opened").is_none());
}

#[test]
fn a_typed_path_saves_where_no_file_dialog_exists() {
    let folder = Folder::new("typed");
    let mut harness = window(None, None);
    order(&mut harness, Command::SaveAs);
    let target = folder.file("new");
    let field = harness.get_by_role_and_label(Role::TextInput, "path");
    field.focus();
    harness.run();
    harness.key_press_modifiers(Modifiers::COMMAND, Key::A);
    harness
        .get_by_role_and_label(Role::TextInput, "path")
        .type_text(&target.display().to_string());
    harness.run();
    harness.get_by_role_and_label(Role::Button, "Save").click();
    harness.run();
    assert!(folder.file("new.ron").is_file());
    assert_eq!(app(&mut harness).desk().name(), "new.ron");
}

#[test]
fn changes_are_not_lost_without_asking() {
    let mut harness = window(None, None);
    type_into(&mut harness, "Hottest", "90");
    order(&mut harness, Command::OpenPreset("refrigerant-vessel"));
    harness.get_by_label("Unsaved changes");
    harness
        .get_by_role_and_label(Role::Button, "Cancel")
        .click();
    harness.run();
    assert_eq!(app(&mut harness).desk().design.fluid.as_str(), "water");
    order(&mut harness, Command::OpenPreset("refrigerant-vessel"));
    harness
        .get_by_role_and_label(Role::Button, "Lose them")
        .click();
    harness.run();
    assert_eq!(app(&mut harness).desk().design.fluid.as_str(), "r-134a");
    assert_eq!(
        app(&mut harness).desk().path(),
        None,
        "ready designs open as untitled copies"
    );
}

#[test]
fn a_file_dropped_on_the_window_opens() {
    #[derive(Debug)]
    struct Dropped(PathBuf);
    impl egui::DroppedFile for Dropped {
        fn path(&self) -> &Path {
            &self.0
        }
        fn bytes(&self) -> Result<Vec<u8>, String> {
            std::fs::read(&self.0).map_err(|error| error.to_string())
        }
    }
    let folder = Folder::new("drop");
    let path = preset(&folder, "refrigerant-vessel");
    let mut harness = window(None, None);
    harness
        .input_mut()
        .dropped_files
        .push(Arc::new(Dropped(path.clone())));
    harness.run();
    assert_eq!(app(&mut harness).desk().path(), Some(path.as_path()));
}

#[test]
fn a_file_changed_by_somebody_else_is_noticed() {
    let folder = Folder::new("disk");
    let path = preset(&folder, "copper-water-heat-pipe");
    let mut harness = window(Some(&path), None);
    let mut other = store::load(&path).expect("reads");
    other.title = "Changed by somebody else, with a longer title".to_owned();
    store::save(&path, &other).expect("saves");
    for _ in 0..50 {
        std::thread::sleep(std::time::Duration::from_millis(100));
        if app(&mut harness).desk().changed_on_disk() {
            break;
        }
    }
    harness.run();
    harness.get_by_label_contains("has changed on disk");
    harness
        .get_by_role_and_label(Role::Button, "Read it again")
        .click();
    harness.run();
    assert_eq!(app(&mut harness).desk().design.title, other.title);
    assert!(
        harness
            .query_by_label_contains("has changed on disk")
            .is_none()
    );
}

#[test]
fn units_and_theme_are_remembered() {
    let folder = Folder::new("settings");
    let mut harness = window(None, Some(&folder.0));
    order(&mut harness, Command::SetUnits(UnitSystem::Inch));
    order(
        &mut harness,
        Command::SetTheme(chargewright::ui::Theme::Dark),
    );
    drop(harness);
    let harness = window(None, Some(&folder.0));
    assert!(harness.ctx.global_style().visuals.dark_mode);
    let field = harness.get_by_role_and_label(Role::TextInput, "Hottest");
    assert!(
        field
            .accesskit_node()
            .value()
            .expect("a value")
            .contains("°F")
    );
}

#[test]
fn after_a_crash_the_unsaved_design_is_offered() {
    let folder = Folder::new("crash");
    // A process number that no process can have stands for the crashed window.
    let mut design = store::preset("refrigerant-vessel").expect("a ready design");
    design.title = "Half done".to_owned();
    let draft = chargewright::ui::Draft {
        path: None,
        text: store::to_text(&design),
    };
    store::write_own(&folder.file("draft-999999999.ron"), &draft).expect("writes");
    let mut harness = window(None, Some(&folder.0));
    harness.get_by_label("An unsaved design was found");
    harness
        .get_by_role_and_label(Role::Button, "Bring it back")
        .click();
    harness.run();
    assert_eq!(app(&mut harness).desk().design.title, "Half done");
    assert!(app(&mut harness).desk().is_unsaved());
    assert!(!folder.file("draft-999999999.ron").exists());
    // The restored design has a draft of its own until it is saved.
    for _ in 0..50 {
        std::thread::sleep(std::time::Duration::from_millis(20));
        if folder
            .file(&format!("draft-{}.ron", std::process::id()))
            .exists()
        {
            return;
        }
    }
    panic!("the restored design left no draft");
}

#[test]
fn every_menu_entry_can_be_reached_and_about_names_the_licences() {
    let mut harness = window(None, None);
    for (menu, entry) in [
        ("File", "Export charge sheet…"),
        ("Edit", "Undo"),
        ("View", "Larger"),
        ("Help", "About and licences"),
    ] {
        harness.get_by_role_and_label(Role::Button, menu).click();
        harness.run();
        harness.get_by_label_contains(entry);
        harness.key_press(Key::Escape);
        harness.run();
    }
    order(&mut harness, Command::About);
    harness.get_by_label("Fonts");
    assert!(
        harness
            .query_all_by_label_contains("Permission is hereby granted")
            .count()
            >= 2
    );
}

#[test]
fn the_preview_is_exactly_the_exported_sheet() {
    let folder = Folder::new("sheet");
    let path = preset(&folder, "glass-liquid-lift");
    let mut harness = window(Some(&path), None);
    harness.get_by_label("Sheet").click();
    harness.run();
    let expected = chargewright::cli::sheet_text(
        &store::load(&path).expect("reads"),
        Some("glass-liquid-lift.ron".to_owned()),
    );
    let shown = harness.get_by_label_contains("CHARGE SHEET");
    assert_eq!(
        shown.accesskit_node().value().as_deref(),
        Some(expected.as_str())
    );
}

#[test]
fn a_finding_leads_to_its_section_and_its_remedy_mends_it() {
    let folder = Folder::new("remedy");
    let path = preset(&folder, "refrigerant-vessel");
    let mut harness = window(Some(&path), None);
    let mass = chargewright::units::Mass::from_kilogram(1.9).expect("mass");
    order(
        &mut harness,
        Command::Apply(chargewright::design::Change::SetCharge(mass)),
    );
    harness.get_by_label_contains("Not fit");
    let button = harness
        .get_all_by_role(Role::Button)
        .find(|node| {
            node.accesskit_node()
                .label()
                .is_some_and(|label| label.starts_with("Set the charge to"))
        })
        .expect("a remedy");
    button.click();
    harness.run();
    assert!(harness.query_by_label_contains("Not fit").is_none());
}

#[test]
fn a_value_half_typed_is_saved_too() {
    let folder = Folder::new("half");
    let path = preset(&folder, "copper-water-heat-pipe");
    let mut harness = window(Some(&path), None);
    harness
        .get_by_role_and_label(Role::TextInput, "Hottest")
        .click();
    harness.run();
    harness
        .get_by_role_and_label(Role::TextInput, "Hottest")
        .type_text("105");
    harness.run();
    harness.key_press_modifiers(Modifiers::COMMAND, Key::S);
    harness.run();
    let saved = store::load(&path).expect("saved");
    assert!((saved.conditions.hottest.celsius() - 105.0).abs() < 1e-9);
}

#[test]
fn columns_and_recent_files_are_remembered() {
    let folder = Folder::new("columns");
    let path = preset(&folder, "refrigerant-vessel");
    let narrow = chargewright::ui::Settings {
        left_column: 270.0,
        ..Default::default()
    };
    let wide = chargewright::ui::Settings {
        left_column: 380.0,
        ..Default::default()
    };
    let right_edge = |settings: &chargewright::ui::Settings| {
        settings.save(Some(&folder.0));
        let harness = window(None, Some(&folder.0));
        harness
            .get_by_role_and_label(Role::TextInput, "Hottest")
            .rect()
            .right()
    };
    let (narrow, wide) = (right_edge(&narrow), right_edge(&wide));
    assert!((wide - narrow - 110.0).abs() < 2.0, "{narrow} {wide}");

    drop(window(Some(&path), Some(&folder.0)));
    let remembered = chargewright::ui::Settings::load(Some(&folder.0));
    assert_eq!(remembered.recent, [path]);
}

#[test]
fn the_whole_window_is_enlarged_by_key_and_by_menu() {
    let mut harness = window(None, None);
    harness.key_press_modifiers(Modifiers::COMMAND, Key::Plus);
    harness.run();
    let by_key = harness.ctx.zoom_factor();
    assert!(by_key > 1.0);
    order(&mut harness, Command::ZoomIn);
    assert!(harness.ctx.zoom_factor() > by_key);
    order(&mut harness, Command::ZoomReset);
    assert_eq!(harness.ctx.zoom_factor(), 1.0);
}

#[test]
fn the_charge_is_dragged_and_everything_follows() {
    let mut harness = window(None, None);
    let before = app(&mut harness).desk().design.clone();
    let charge = harness.get_by_role_and_label(Role::Slider, "charge");
    charge.focus();
    harness.run();
    harness.key_press(Key::ArrowRight);
    harness.run();
    let app = app(&mut harness);
    assert_ne!(app.desk().design.charge, before.charge);
    let charge = app.desk().assessment().charge.clone().expect("a charge");
    assert!(charge.nominal.kilogram() > 0.0032);
}

/// The user's own fluid travels with the desk: opened, undone, saved elsewhere, restored.
#[test]
fn the_desk_carries_the_fluid_beside_the_design() {
    let folder = Folder::new("own-fluid");
    let fluid_file = "example-ethyl-acetate.fluid.ron";
    let kept = Path::new(env!("CARGO_MANIFEST_DIR")).join("tests/own-fluid");
    for name in ["solvent-bulb.ron", fluid_file] {
        std::fs::copy(kept.join(name), folder.file(name)).expect("copied");
    }
    let path = folder.file("solvent-bulb.ron");
    let first = store::preset("refrigerant-vessel").expect("a ready design");
    let mut desk = chargewright::ui::Desk::new(first.clone(), Some(&folder.0));
    desk.open(&path).expect("opens");
    let own = |desk: &chargewright::ui::Desk| {
        let file = desk.assessment().fluid.own_file();
        file.map(|own| own.name.clone())
    };
    assert_eq!(own(&desk).as_deref(), Some(fluid_file));
    assert!(!desk.is_unsaved() && desk.notices().is_empty());
    // To another fluid and back.
    desk.commit();
    desk.design.fluid = first.fluid.clone();
    desk.refresh();
    desk.commit();
    assert_eq!(own(&desk), None);
    desk.undo();
    desk.refresh();
    assert_eq!(own(&desk).as_deref(), Some(fluid_file));
    // Saved elsewhere it opens alike: the fluid went along.
    let there = folder.file("there");
    std::fs::create_dir_all(&there).expect("a folder");
    desk.save_to(&there.join("a.ron")).expect("saved");
    assert!(there.join(fluid_file).exists());
    desk.open(&there.join("a.ron")).expect("opens there");
    // A draft is read with the fluids beside its file.
    let draft = chargewright::ui::Draft {
        path: Some(path),
        text: store::to_text(&desk.design),
    };
    let file = folder.file("draft-999999999.ron");
    store::write_own(&file, &draft).expect("writes");
    let (_, found) = chargewright::ui::Draft::left_behind(&folder.0).expect("offered");
    desk.start_untitled(first);
    assert_eq!(own(&desk), None);
    desk.restore(&found);
    assert_eq!(own(&desk).as_deref(), Some(fluid_file));
}
