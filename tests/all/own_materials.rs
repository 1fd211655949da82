//! The user's own wall material: where its file is found, who says so.
//!
//! The worked example of the README is the good file of these tests.

use std::fs;
use std::path::{Path, PathBuf};

use chargewright::assess::{FindingKind, Severity, assess};
use chargewright::chamber::{ChamberFault, read_own_material};
use chargewright::store;

use crate::commands::printed;
use crate::files::Folder;
use crate::own_fluids::{own_folder, run, said};

pub const EXAMPLE: &str = include_str!("../own-material/example-duplex-steel.material.ron");
pub const FILE: &str = "example-duplex-steel.material.ron";
pub const DESIGN: &str = include_str!("../own-material/duplex-bulb.ron");
const ID: &str = "example-duplex-steel";

fn root(name: &str) -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join(name)
}

fn text(path: &Path) -> &str {
    path.to_str().expect("a plain path")
}

#[test]
fn the_worked_example_is_a_material_and_says_whose_it_is() {
    let material = read_own_material(EXAMPLE, FILE).expect("the example is right");
    let own = material.own_file().expect("the user's own");
    assert_eq!((own.name.as_str(), material.id.as_str()), (FILE, ID));
    // The README leads to the file that is tested here, and names its place.
    let readme = fs::read_to_string(root("README.md")).expect("the README");
    for part in [
        "## Your own material",
        "tests/own-material/example-duplex-steel.material.ron",
        "`*.material.ron`",
        "materials/",
    ] {
        assert!(readme.contains(part), "{part}");
    }
}

/// A built-in file under other names bears to the bit what the built-in material bears.
#[test]
fn a_copy_under_other_names_gives_the_same_numbers() {
    let path = root("assets/materials/stainless-316l.ron");
    let steel = fs::read_to_string(path).expect("an asset");
    let start = steel.find("    designations: [").expect("there");
    let end = start + steel[start..].find('\n').expect("a line");
    let copy = format!("{}    designations: [],{}", &steel[..start], &steel[end..])
        .replacen("id: \"stainless-316l\"", "id: \"own-steel\"", 1)
        .replacen("name: \"", "name: \"our own ", 1);
    let folder = Folder::new("own-copy");
    fs::write(folder.path("own.material.ron"), copy).expect("written");
    let assessed = |id: &str| {
        let path = folder.path("design.ron");
        fs::write(&path, DESIGN.replacen(ID, id, 1)).expect("written");
        let (design, shelf) = store::open(&path, None).expect(id);
        assert_eq!(shelf.notices(), Vec::<String>::new());
        assess(&design, &shelf.library)
    };
    let (own, known) = (assessed("own-steel"), assessed("stainless-316l"));
    assert_eq!((own.own_materials.len(), known.own_materials.len()), (1, 0));
    let limits = |a: &chargewright::assess::Assessment| {
        let case = a.worst.as_ref().expect("a worst case");
        let weakest = case.weakest.as_ref().expect("known");
        (case.pressure, weakest.allowable, a.charts.clone())
    };
    assert_eq!(limits(&own), limits(&known));
}

/// The nearer file wins; a copy of it is no contradiction, another text is said.
#[test]
fn a_file_beside_the_design_goes_before_the_users_folder() {
    let folder = Folder::new("nearer-material");
    let settings = folder.path("settings");
    fs::create_dir_all(settings.join("materials")).expect("a folder");
    fs::write(folder.path(FILE), EXAMPLE).expect("written");
    let far = settings.join("materials/far.ron");
    let shelf = |text: &str| {
        fs::write(&far, text).expect("written");
        store::shelf(Some(&folder.path("design.ron")), Some(&settings))
    };
    assert!(shelf(EXAMPLE).refused.is_empty());
    let other = shelf(&EXAMPLE.replacen("620e6", "630e6", 1));
    let said = other.notices().join("\n");
    assert!(said.contains("far.ron") && said.contains(FILE), "{said}");
    let own = other.library.materials.get(ID).expect("there");
    assert_eq!(own.own_file().expect("own").name, FILE);
}

#[test]
fn sheet_and_check_use_the_material_beside_the_design_and_say_so() {
    let path = root("tests/own-material/duplex-bulb.ron");
    let (design, shelf) = store::open(&path, None).expect("a good design");
    let a = assess(&design, &shelf.library);
    let mut own = a
        .findings
        .iter()
        .filter(|f| matches!(&f.kind, FindingKind::OwnMaterial { file, .. } if file == FILE));
    assert_eq!(own.next().expect("it is said").severity, Severity::Warning);
    assert!(own.next().is_none(), "once");

    let sheet = printed(&["sheet", text(&path)], 0);
    let flat = sheet.split_whitespace().collect::<Vec<_>>().join(" ");
    let own = shelf.library.materials.get(ID).expect("there");
    let fingerprint = &own.own_file().expect("own").fingerprint;
    for part in [
        "Your own material: All figures of Example duplex steel 1.4462, solution-annealed are your own",
        &format!(
            "The user's own material file Example duplex steel 1.4462, solution-annealed: {FILE}, fingerprint {fingerprint}"
        ),
        "Strength example-duplex-steel: the user states: from memory of ASTM A240",
    ] {
        assert!(flat.contains(part), "no “{part}” in {sheet}");
    }
    // Fit: it has scale readings, and the same bytes each time.
    assert!(sheet.contains("Dispense, scale shows"), "{sheet}");
    assert_eq!(printed(&["sheet", text(&path)], 0), sheet);
    let check = printed(&["check", text(&path)], 0);
    assert!(check.starts_with("warning: Your own material: "), "{check}");
}

/// Good long experience is of the materials it was made with; bad holds for a name alike.
#[test]
fn a_name_alone_is_no_experience_with_the_fluid() {
    let folder = Folder::new("own-pair");
    let path = folder.path("design.ron");
    let found = |id: &str, fluid: &str| {
        let material = EXAMPLE.replacen(ID, id, 1);
        fs::write(folder.path(FILE), material).expect("written");
        let design = DESIGN.replacen(ID, id, 1).replacen("acetone", fluid, 1);
        fs::write(&path, design).expect("written");
        let (design, shelf) = store::open(&path, None).expect("a design");
        assess(&design, &shelf.library).findings
    };
    let of_copper = found("copper-of-ours", "water");
    let not_known = |f: &FindingKind| matches!(f, FindingKind::PairNotKnown { .. });
    assert!(
        of_copper.iter().any(|f| not_known(&f.kind)),
        "{of_copper:#?}"
    );
    let of_aluminium = found("aluminium-of-ours", "water");
    let never = |f: &FindingKind| matches!(f, FindingKind::Incompatible { .. });
    assert!(
        of_aluminium.iter().any(|f| never(&f.kind)),
        "{of_aluminium:#?}"
    );
}

#[test]
fn every_command_sees_the_users_folder_and_the_list_marks_its_own() {
    let folder = Folder::new("settings-material");
    let own = own_folder(&folder.path("")).join("materials");
    fs::create_dir_all(&own).expect("a folder");
    fs::write(own.join("steel.ron"), EXAMPLE).expect("written");
    let ask = |arguments: &[&str]| {
        let (out, err) = said(&run(&folder.path(""), arguments), 0);
        assert_eq!(err, "", "{arguments:?}");
        out
    };
    let line = |file: &str| {
        format!(
            "\nexample-duplex-steel,\"Example duplex steel 1.4462, solution-annealed\",metal,450000000,620000000,,200000000000,233.15,523.15,{file}\n"
        )
    };
    let list = ask(&["materials"]);
    assert!(list.contains(&line("steel.ron")), "{list}");
    let path = folder.path("design.ron");
    fs::write(&path, DESIGN).expect("written");
    let check = ask(&["check", text(&path)]);
    assert!(check.starts_with("warning: Your own material: "), "{check}");
    // Beside a design it is in the list of that design only.
    let beside = root("tests/own-material/duplex-bulb.ron");
    let list = printed(&["materials", "--of", text(&beside)], 0);
    assert!(list.contains(&line(FILE)), "{list}");
    let list = printed(&["materials"], 0);
    assert!(!list.contains(ID), "{list}");
    assert!(
        list.starts_with("id,name,kind,proof_pa,tensile_pa,permissible_pa,modulus_pa,coldest_k,hottest_k,own_file\n"),
        "{list}"
    );
    assert!(
        list.contains(",glass,,,7000000,63000000000,77,573.15,\n"),
        "{list}"
    );
}

#[test]
fn a_broken_material_file_is_told_and_the_design_stays_readable() {
    let folder = Folder::new("broken-material");
    let nowhere = folder.path("no-settings");
    fs::write(folder.path(FILE), EXAMPLE.replacen("620e6", "620", 1)).expect("written");
    let needs = folder.path("needs.ron");
    fs::write(&needs, DESIGN).expect("written");
    let other = folder.path("other.ron");
    fs::write(&other, DESIGN.replacen(ID, "stainless-316l", 1)).expect("written");
    let ask = |path: &Path, code| said(&run(&nowhere, &["check", text(path)]), code);
    let may = "it may hold “example-duplex-steel”, which the design names";
    let (out, err) = ask(&other, 0);
    assert!(!out.contains("Your own material"), "{out}");
    assert_eq!(err.lines().count(), 1, "{err}");
    assert!(err.contains("material file not read: "), "{err}");
    assert!(
        err.contains("620 is outside") && !err.contains(may),
        "{err}"
    );
    // Loaded, not fit, and the notice says where the material may be.
    let (out, err) = ask(&needs, 1);
    assert!(out.contains("which is no material here"), "{out}");
    assert_eq!(err.lines().count(), 1, "{err}");
    assert!(err.contains(may), "{err}");
    // Who asks for fluids only is not bothered.
    let settings = own_folder(&nowhere).join("materials");
    fs::create_dir_all(&settings).expect("a folder");
    fs::write(settings.join("broken.ron"), "no material").expect("written");
    for (command, lines) in [("fluids", 0), ("materials", 1)] {
        let (_, err) = said(&run(&nowhere, &[command]), 0);
        assert_eq!(err.lines().count(), lines, "{command}: {err}");
    }
    let (design, shelf) = store::open(&needs, None).expect("it loads");
    let faults = design.chamber.faults(&shelf.library.materials);
    assert!(
        matches!(&faults[..], [ChamberFault::UnknownMaterial { material, .. }] if material == ID),
        "{faults:?}"
    );
}

/// Saving a design elsewhere takes the material beside it along, and never over another
/// file; nothing is copied then, not even the fluid.
#[test]
fn the_material_goes_with_the_design_to_another_folder() {
    let folder = Folder::new("carry-material");
    let (here, there) = (folder.path("here"), folder.path("there"));
    for place in [&here, &there] {
        fs::create_dir_all(place).expect("a folder");
    }
    fs::write(here.join(FILE), EXAMPLE).expect("written");
    fs::write(
        here.join(crate::own_fluids::FILE),
        crate::own_fluids::EXAMPLE,
    )
    .expect("written");
    let (from, to) = (here.join("a.ron"), there.join("b.ron"));
    fs::write(&from, DESIGN.replacen("\"acetone\"", "\"141-78-6\"", 1)).expect("written");
    let (design, shelf) = store::open(&from, None).expect("a design");
    let carry = || store::carry_own(&design, &shelf.library, &from, &to);
    fs::write(there.join(FILE), "another").expect("written");
    let error = carry().expect_err("another file").to_string();
    assert!(
        error.contains("another file than the material in use"),
        "{error}"
    );
    assert_eq!(fs::read_dir(&there).expect("there").count(), 1);
    fs::remove_file(there.join(FILE)).expect("removed");
    carry().expect("copied");
    let copy = fs::read_to_string(there.join(FILE)).expect("there");
    assert_eq!(copy, EXAMPLE);
    assert!(there.join(crate::own_fluids::FILE).exists());
    carry().expect("the same files are there");
    store::save(&to, &design).expect("saved");
    let (_, shelf) = store::open(&to, None).expect("opens there");
    assert!(shelf.library.materials.get(ID).is_some());
}
