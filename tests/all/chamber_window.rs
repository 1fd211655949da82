//! Editing the chamber in the window, without a display.

use chargewright::assess::Section;
use chargewright::chamber::{ClosureKind, Part, Role as PartRole};
use chargewright::design::Design;
use chargewright::ui::Command;
use eframe::egui::{Key, Modifiers, Role};
use egui_kittest::Harness;
use egui_kittest::kittest::Queryable as _;

use crate::window::{Folder, Window, app, order, preset, type_into, window};

/// The window on the ready heat pipe, its chamber in sight.
fn on_the_chamber(folder: &Folder) -> Harness<'static, Window> {
    let path = preset(folder, "copper-water-heat-pipe");
    let mut harness = window(Some(&path), None);
    order(&mut harness, Command::Show(Section::Chamber));
    harness
}

fn design(harness: &mut Harness<'static, Window>) -> Design {
    app(harness).desk().design.clone()
}

fn parts(harness: &mut Harness<'static, Window>) -> Vec<String> {
    let name = |part: &Part| part.name.clone();
    design(harness).chamber.parts.iter().map(name).collect()
}

fn click(harness: &mut Harness<'static, Window>, label: &str) {
    harness.get_by_role_and_label(Role::Button, label).click();
    harness.run();
}

fn undo(harness: &mut Harness<'static, Window>) {
    harness.key_press_modifiers(Modifiers::COMMAND, Key::Z);
    harness.run();
}

/// Every edit of the list is one step back, and shares and volumes follow.
#[test]
fn parts_are_added_doubled_moved_and_removed_and_each_is_one_step_back() {
    let folder = Folder::new("parts");
    let mut harness = on_the_chamber(&folder);
    let first = parts(&mut harness);
    click(&mut harness, "condenser");
    for (button, expected) in [
        (
            "Duplicate",
            "evaporator middle condenser condenser end caps sintered wick",
        ),
        ("Up", "evaporator condenser middle end caps sintered wick"),
        ("Down", "evaporator middle end caps condenser sintered wick"),
        ("Remove", "evaporator middle end caps sintered wick"),
    ] {
        click(&mut harness, button);
        assert_eq!(parts(&mut harness).join(" "), expected, "{button}");
        undo(&mut harness);
        assert_eq!(parts(&mut harness), first, "{button} taken back");
    }
    assert!(!app(&mut harness).desk().is_unsaved());
}

#[test]
fn a_part_is_added_from_the_menu_with_a_wall_like_the_others() {
    let folder = Folder::new("added");
    let mut harness = on_the_chamber(&folder);
    let before = parts(&mut harness).len();
    for (group, entry, role) in [
        ("Cavities", "Sphere", PartRole::Cavity),
        ("Wicks and solids inside", "Screen wick", PartRole::Wick),
        ("Ends and bought-in parts", "Fitting", PartRole::Rated),
    ] {
        order(&mut harness, Command::Show(Section::Chamber));
        click(&mut harness, "Add a part…");
        let entry_of = |harness: &Harness<'static, Window>, label: &str| {
            harness.query_all_by_label_contains(label).count() > 0
        };
        assert!(entry_of(&harness, group));
        harness.get_by_label_contains(group).click();
        harness.run();
        click(&mut harness, entry);
        let part = design(&mut harness).chamber.parts.pop().expect("added");
        assert_eq!(part.shape.role(), role);
        assert_eq!(part.wall.is_some(), role == PartRole::Cavity);
        assert_eq!(part.made_of.is_some(), role == PartRole::Wick);
    }
    assert_eq!(parts(&mut harness).len(), before + 3);
    // The fitting has no rating yet, so the design is not fit and says so.
    harness.get_by_label_contains("Not fit");
}

#[test]
fn a_mistaken_part_is_marked_where_it_stands_and_the_rest_still_counts() {
    let folder = Folder::new("mistake");
    let mut harness = on_the_chamber(&folder);
    click(&mut harness, "sintered wick");
    type_into(&mut harness, "Layer thickness", "6 mm");
    // At the part and among the findings.
    let told = "the wick is thicker than the bore leaves room for";
    assert_eq!(harness.query_all_by_label_contains(told).count(), 2);
    harness.get_by_label("!  sintered wick");
    harness.get_by_label_contains("Not fit");
    let assessment = app(&mut harness).desk().assessment().clone();
    assert!(assessment.named.is_ok());
    undo(&mut harness);
    assert!(!app(&mut harness).desk().is_unsaved());
}

#[test]
fn the_section_is_exported_to_scale_at_the_scrubbed_temperature() {
    let folder = Folder::new("section");
    let mut harness = on_the_chamber(&folder);
    harness.get_by_label("Section").click();
    harness.run();
    harness.get_by_label_contains("Section of the device, to scale. At 120.0");
    order(&mut harness, Command::ExportSection);
    harness
        .get_by_role_and_label(Role::Button, "Export")
        .click();
    harness.run();
    let written = std::fs::read_to_string(folder.file("copper-water-heat-pipe.svg"));
    let written = written.expect("beside the design");
    assert!(written.starts_with("<?xml") && written.contains("at 120.0\u{a0}°C"));
    assert_eq!(design(&mut harness).chamber.parts.len(), 5);
}

#[test]
fn another_closure_is_one_choice_and_one_step_back() {
    let folder = Folder::new("closure");
    let mut harness = on_the_chamber(&folder);
    harness
        .get_by_role_and_label(Role::ComboBox, "How the unit is closed")
        .click_accesskit();
    harness.run();
    harness.get_by_label("Valve").click_accesskit();
    harness.run();
    let kind = |harness: &mut Harness<'static, Window>| {
        design(harness).chamber.closure.map(|closure| closure.kind)
    };
    assert_eq!(kind(&mut harness), Some(ClosureKind::Valve));
    undo(&mut harness);
    assert_eq!(kind(&mut harness), Some(ClosureKind::PinchOffWelded));
}
