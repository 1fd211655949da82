//! The user's own fluid: what its file must keep to, where it is found, who says so.
//!
//! The worked example of the README is the good file of these tests.

use std::fs;
use std::path::{Path, PathBuf};
use std::process::Output;

use chargewright::assess::{FindingKind, Severity, assess};
use chargewright::fluid::{Model, read_own};
use chargewright::store::{self, StoreError};

use crate::commands::{printed, program};
use crate::files::Folder;
use crate::given::{fluid, grid, kelvin};

pub const EXAMPLE: &str = include_str!("../own-fluid/example-ethyl-acetate.fluid.ron");
const DESIGN: &str = include_str!("../own-fluid/solvent-bulb.ron");
pub const FILE: &str = "example-ethyl-acetate.fluid.ron";

/// An equation fluid's file under names of its own; 50-00-0 is a CAS number that no
/// fluid here has.
pub fn equation_file() -> String {
    let text = fs::read_to_string(root("assets/fluids/r-134a.ron")).expect("an asset");
    let start = text.find("    also: [").expect("other names");
    let end = start + text[start..].find('\n').expect("a line") + 1;
    let text = format!("{}{}", &text[..start], &text[end..]);
    let refrigerant = text.find("    refrigerant:").expect("a number");
    let end = refrigerant + text[refrigerant..].find('\n').expect("a line") + 1;
    format!("{}{}", &text[..refrigerant], &text[end..])
        .replacen("id: \"r-134a\"", "id: \"own-equation\"", 1)
        .replacen("name: \"R-134a\"", "name: \"own equation\"", 1)
        .replacen("cas: \"811-97-2\"", "cas: \"50-00-0\"", 1)
}

fn root(name: &str) -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join(name)
}

#[test]
fn the_worked_example_is_a_fluid_and_says_whose_it_is() {
    let fluid = read_own(EXAMPLE, FILE).expect("the example is right");
    let own = fluid.own_file().expect("the user's own");
    assert_eq!(own.name, FILE);
    // CRC Handbook, 95th ed.: ethyl acetate boils at 350.26 K; the correlation's own
    // uncertainty of 1.5 % in pressure is 0.5 K there.
    let p = fluid.saturation_pressure(kelvin(350.26)).expect("in range");
    assert!((p.pascal() / 101_325.0 - 1.0).abs() < 0.015, "{p:?}");
    // The README leads to the file that is tested here, and names its place.
    let readme = fs::read_to_string(root("README.md")).expect("the README");
    for part in [
        "## Your own fluid",
        "tests/own-fluid/example-ethyl-acetate.fluid.ron",
        ".fluid.ron",
        "fluids/",
    ] {
        assert!(readme.contains(part), "{part}");
    }
}

#[test]
fn an_equation_under_another_id_gives_the_same_numbers() {
    let own = read_own(&equation_file(), "own.fluid.ron").expect("a good file");
    assert!(matches!(own.model(), Model::Equation(_)));
    let known = fluid("r-134a");
    for t in grid(170.0, 374.0, 20).map(kelvin) {
        assert_eq!(own.saturation(t), known.saturation(t));
    }
}

/// The nearer file wins; a copy of it is no contradiction, another text is said.
#[test]
fn a_file_beside_the_design_goes_before_the_users_folder() {
    let folder = Folder::new("nearer");
    let settings = folder.path("settings");
    fs::create_dir_all(settings.join("fluids")).expect("a folder");
    fs::write(folder.path(FILE), EXAMPLE).expect("written");
    let far = settings.join("fluids/far.ron");
    let shelf = |text: &str| {
        fs::write(&far, text).expect("written");
        store::shelf(Some(&folder.path("design.ron")), Some(&settings))
    };
    assert!(shelf(EXAMPLE).refused.is_empty());
    let other = shelf(&EXAMPLE.replacen("1.5,", "2.5,", 1));
    let said = other.notices().join("\n");
    assert!(said.contains("far.ron") && said.contains(FILE), "{said}");
    let own = other
        .library
        .fluids
        .by_id("example-ethyl-acetate")
        .expect("there");
    assert_eq!(own.own_file().expect("own").name, FILE);
    assert_eq!(own.pressure_uncertainty(), 0.015);
}

#[test]
fn a_design_names_the_fluid_beside_it_by_any_of_its_names() {
    for name in [
        "141-78-6",
        "example-ethyl-acetate",
        "Example Ethyl Acetate",
        "ethyl ethanoate",
    ] {
        let folder = Folder::new("by-name");
        fs::write(folder.path(FILE), EXAMPLE).expect("written");
        let path = folder.path("design.ron");
        fs::write(&path, DESIGN.replacen("141-78-6", name, 1)).expect("written");
        let (design, shelf) = store::open(&path, None).expect(name);
        assert_eq!(design.fluid.as_str(), "example-ethyl-acetate");
        let a = assess(&design, &shelf.library);
        let own = a
            .findings
            .iter()
            .find(|f| matches!(f.kind, FindingKind::OwnFluid { .. }));
        assert_eq!(own.expect("it is said").severity, Severity::Warning);
        // Without the file beside it nobody knows it: the place is the name's.
        let error = store::load(&path).expect_err("unknown").to_string();
        for part in [
            "design.ron, line 16, column 12: design.fluid: ",
            name,
            "is no fluid here",
        ] {
            assert!(error.contains(part), "{error}");
        }
    }
}

/// Runs the program with a settings folder of the test's own.
pub fn run(settings: &Path, arguments: &[&str]) -> Output {
    let mut command = program();
    // Where each system keeps it.
    command
        .env("XDG_CONFIG_HOME", settings)
        .env("APPDATA", settings);
    command.env("HOME", settings);
    command.args(arguments).output().expect("the program runs")
}

/// The program's own folder below what [`run`] is given.
pub fn own_folder(settings: &Path) -> PathBuf {
    let base = if cfg!(target_os = "macos") {
        settings.join("Library/Application Support")
    } else {
        settings.to_owned()
    };
    base.join("chargewright")
}

pub fn said(output: &Output, code: i32) -> (String, String) {
    let text = |bytes: &[u8]| String::from_utf8(bytes.to_vec()).expect("text");
    assert_eq!(output.status.code(), Some(code), "{output:?}");
    (text(&output.stdout), text(&output.stderr))
}

#[test]
fn sheet_and_check_use_the_fluid_beside_the_design_and_say_so() {
    let design = root("tests/own-fluid/solvent-bulb.ron");
    let design = design.to_str().expect("a plain path");
    let sheet = printed(&["sheet", design], 0);
    let flat = sheet.split_whitespace().collect::<Vec<_>>().join(" ");
    for part in [
        "Name example ethyl acetate",
        "The user's own, from example-ethyl-acetate.fluid.ron",
        "Your own fluid: Its hazards and all its figures are your own, from example-ethyl-acetate.fluid.ron",
        "fingerprint",
        "the user states: vapour pressure: VDI Heat Atlas",
        "the user states: from memory of Regulation (EC) 1272/2008",
    ] {
        assert!(flat.contains(part), "no “{part}” in {sheet}");
    }
    // Fit: it has scale readings, and the same bytes each time.
    assert!(sheet.contains("Dispense, scale shows"), "{sheet}");
    assert_eq!(printed(&["sheet", design], 0), sheet);
    let check = printed(&["check", design], 0);
    assert!(check.starts_with("warning: Your own fluid: "), "{check}");
}

#[test]
fn every_command_sees_the_users_folder() {
    let folder = Folder::new("settings-own");
    let own = own_folder(&folder.path("")).join("fluids");
    fs::create_dir_all(&own).expect("a folder");
    fs::write(own.join("equation.ron"), equation_file()).expect("written");
    fs::write(own.join(FILE), EXAMPLE).expect("written");
    let run = |arguments: &[&str]| {
        let (out, err) = said(&run(&folder.path(""), arguments), 0);
        assert_eq!(err, "", "{arguments:?}");
        out
    };
    let fluids = run(&["fluids"]);
    assert!(
        fluids.contains("\nexample-ethyl-acetate,example ethyl acetate,141-78-6,,correlations,254,497,example-ethyl-acetate.fluid.ron\n"),
        "{fluids}"
    );
    let of = |name: &str| run(&["saturation", name, "--at", "300,350"]);
    assert_eq!(of("50-00-0"), of("R-134a"));
    assert!(of("ethyl ethanoate").lines().count() == 3);
    let isochore = |name| run(&["isochore", name, "--density", "500", "--at", "300"]);
    assert_eq!(isochore("own-equation"), isochore("r-134a"));
    let path = folder.path("design.ron");
    fs::write(&path, DESIGN).expect("written");
    let check = run(&["check", path.to_str().expect("a plain path")]);
    assert!(check.starts_with("warning: Your own fluid: "), "{check}");
}

#[test]
fn a_broken_fluid_file_is_told_and_stops_only_who_needs_it() {
    let folder = Folder::new("broken-fluid");
    let nowhere = folder.path("no-settings");
    fs::write(
        folder.path(FILE),
        EXAMPLE.replacen("141-78-6", "141-78-5", 1),
    )
    .expect("written");
    let needs = folder.path("needs.ron");
    fs::write(&needs, DESIGN).expect("written");
    let other = folder.path("other.ron");
    fs::write(&other, DESIGN.replacen("141-78-6", "acetone", 1)).expect("written");
    let ask = |path: &Path, code| {
        let path = path.to_str().expect("a plain path");
        said(&run(&nowhere, &["check", path]), code)
    };
    let (out, err) = ask(&other, 0);
    assert!(
        out.contains("warning: ") && !out.contains("Your own fluid"),
        "{out}"
    );
    assert_eq!(err.lines().count(), 1, "{err}");
    assert!(
        err.contains("fluid file not read: ") && err.contains("cas: “141-78-5”"),
        "{err}"
    );
    let (out, err) = ask(&needs, 2);
    assert_eq!((out.as_str(), err.lines().count()), ("", 1), "{err}");
    for part in [
        "needs.ron, line 16",
        "“141-78-6” is no fluid here",
        "not read: ",
        "cas: “141-78-5”",
    ] {
        assert!(err.contains(part), "no “{part}” in {err}");
    }
    let error = store::open(&needs, None).expect_err("refused");
    assert!(matches!(error, StoreError::FluidRefused { .. }), "{error}");
}

/// Saving a design elsewhere takes the fluid beside it along, and never over another file.
#[test]
fn the_fluid_goes_with_the_design_to_another_folder() {
    let folder = Folder::new("carry");
    let (here, there) = (folder.path("here"), folder.path("there"));
    for place in [&here, &there] {
        fs::create_dir_all(place).expect("a folder");
    }
    fs::write(here.join(FILE), EXAMPLE).expect("written");
    let (from, to) = (here.join("a.ron"), there.join("b.ron"));
    fs::write(&from, DESIGN).expect("written");
    let (mut design, shelf) = store::open(&from, None).expect("a design");
    let carry = |design: &_| store::carry_own(design, &shelf.library, &from, &to);
    carry(&design).expect("copied");
    let copy = || fs::read_to_string(there.join(FILE)).expect("there");
    assert_eq!(copy(), EXAMPLE);
    carry(&design).expect("the same file is there");
    fs::write(there.join(FILE), "another").expect("written");
    let error = carry(&design).expect_err("another file");
    assert!(error.to_string().contains("another file"), "{error}");
    assert_eq!(copy(), "another");
    // A fluid of the program, or of the user's folder: nothing to copy.
    design.fluid = chargewright::design::FluidId::from(&*fluid("acetone"));
    carry(&design).expect("nothing to do");
    design.fluid =
        chargewright::design::FluidId::from(shelf.library.fluids.entries().last().expect("own"));
    fs::remove_file(here.join(FILE)).expect("removed");
    carry(&design).expect("nothing beside it");
}
