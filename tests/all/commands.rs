//! The headless commands, through the program itself.

use std::fs;
use std::path::{Path, PathBuf};
use std::process::{Command, Output, Stdio};

use chargewright::store;

use crate::files::Folder;
use crate::given::preset_with;

pub fn program() -> Command {
    let mut command = Command::new(env!("CARGO_BIN_EXE_chargewright"));
    // No display: a test must never open a window.
    for name in ["DISPLAY", "WAYLAND_DISPLAY", "WAYLAND_SOCKET"] {
        command.env_remove(name);
    }
    // Whoever runs the tests may have fluids of their own.
    for name in ["XDG_CONFIG_HOME", "HOME", "APPDATA"] {
        command.env(name, "/nowhere");
    }
    command
}

fn run(arguments: &[&str]) -> Output {
    program()
        .args(arguments)
        .output()
        .expect("the program runs")
}

/// What a command prints that ends with `code`, saying nothing on stderr.
pub fn printed(arguments: &[&str], code: i32) -> String {
    let output = run(arguments);
    let said = String::from_utf8(output.stderr).expect("text");
    assert_eq!(output.status.code(), Some(code), "{arguments:?}: {said}");
    assert_eq!(said, "", "{arguments:?}");
    String::from_utf8(output.stdout).expect("text")
}

/// The one line of a command that is refused: exit 2, nothing on stdout.
pub fn refused(arguments: &[&str]) -> String {
    let output = run(arguments);
    let said = String::from_utf8(output.stderr).expect("text");
    assert_eq!(output.status.code(), Some(2), "{arguments:?}: {said}");
    assert_eq!(output.stdout, b"", "{arguments:?}");
    assert_eq!(said.lines().count(), 1, "{arguments:?}: {said}");
    assert!(said.ends_with('\n') && !said.contains("panicked"), "{said}");
    said
}

fn preset_file(name: &str) -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR"))
        .join("presets")
        .join(format!("{name}.ron"))
}

fn text(path: &Path) -> &str {
    path.to_str().expect("a plain path")
}

#[test]
fn sheet_prints_or_writes_the_same_bytes() {
    let folder = Folder::new("sheet");
    for name in store::preset_names() {
        let design = preset_file(name);
        let shown = printed(&["sheet", text(&design)], 0);
        let out = folder.path("sheet.txt");
        assert_eq!(
            printed(&["sheet", text(&design), "--out", text(&out)], 0),
            ""
        );
        assert_eq!(fs::read_to_string(&out).expect("written"), shown, "{name}");
        let found = printed(&["check", text(&design)], 0);
        assert!(
            found.ends_with('\n') && !found.contains("not fit: "),
            "{found}"
        );
    }
    let nowhere = folder.path("no/such/folder.txt");
    let design = preset_file("refrigerant-vessel");
    let said = refused(&["sheet", text(&design), "--out", text(&nowhere)]);
    assert!(said.contains("folder.txt"), "{said}");
}

#[test]
fn a_design_that_is_not_fit_exits_0_as_a_sheet_and_1_as_a_check() {
    let folder = Folder::new("not-fit");
    let path = folder.path("hot.ron");
    let hot = preset_with(
        "refrigerant-vessel",
        &[("hottest_k: 338.15", "hottest_k: 365.15")],
    );
    store::save(&path, &hot).expect("saved");
    let sheet = printed(&["sheet", text(&path)], 0);
    assert!(sheet.contains("DO NOT FILL"), "{sheet}");
    let check = printed(&["check", text(&path)], 1);
    assert!(check.starts_with("not fit: "), "{check}");
    // Worst first: no error after a warning, no warning after a note.
    let ranks: Vec<usize> = check
        .lines()
        .map(|line| {
            ["not fit: ", "warning: ", "note: "]
                .iter()
                .position(|start| line.starts_with(start))
                .unwrap_or_else(|| panic!("{line}"))
        })
        .collect();
    assert!(ranks.is_sorted(), "{check}");
}

/// A contradiction between fields loads: a finding, exit 1, not a refusal.
#[test]
fn a_contradiction_is_a_finding_and_an_impossible_value_a_refusal() {
    let folder = Folder::new("contradiction");
    let path = folder.path("a.ron");
    let good = store::to_text(&store::preset("copper-water-heat-pipe").expect("ready"));
    for (old, new) in [
        ("nominal_m: 0.0005,", "nominal_m: 0.5,"),
        ("hottest_k: 393.15", "hottest_k: 100.0"),
        ("nominal_m: 0.25", "nominal_m: 0.0"),
    ] {
        fs::write(&path, good.replacen(old, new, 1)).expect("written");
        let check = printed(&["check", text(&path)], 1);
        assert!(check.starts_with("not fit: "), "{new}: {check}");
        assert!(
            printed(&["sheet", text(&path)], 0).contains("DO NOT FILL"),
            "{new}"
        );
    }
    fs::write(
        &path,
        good.replacen("hottest_k: 393.15", "hottest_k: NaN", 1),
    )
    .expect("written");
    for command in ["check", "sheet"] {
        let said = refused(&[command, text(&path)]);
        for part in ["a.ron", "line ", "column ", "hottest_k", "NaN", "finite"] {
            assert!(said.contains(part), "{command}: no “{part}” in {said}");
        }
    }
}

#[test]
fn unreadable_input_exits_2_with_one_line() {
    let folder = Folder::new("unreadable");
    let large = folder.path("large.ron");
    let file = fs::File::create(&large).expect("a file");
    file.set_len(200_000_000).expect("sparse");
    fs::write(folder.path("bytes.ron"), [0xff, 0xfe]).expect("a file");
    for command in ["check", "sheet"] {
        for path in [
            folder.path("nowhere.ron"),
            folder.path(""),
            folder.path("bytes.ron"),
            large.clone(),
            folder.path("bytes.ron/below.ron"),
        ] {
            refused(&[command, text(&path)]);
        }
    }
}

/// A wrong command line is refused too: exit 2, nothing on stdout, a hint on stderr.
#[test]
fn a_wrong_command_line_exits_2() {
    for arguments in [
        &["saturation", "water"][..],
        &["saturation"],
        &["frobnicate", "a", "b"],
        &["isochore", "water", "--at", "300"],
        &["fluids", "--all"],
    ] {
        let output = run(arguments);
        assert_eq!(output.status.code(), Some(2), "{arguments:?}");
        assert!(
            output.stdout.is_empty() && !output.stderr.is_empty(),
            "{arguments:?}"
        );
    }
    let help = run(&["--help"]);
    assert_eq!(help.status.code(), Some(0));
    let help = String::from_utf8(help.stdout).expect("text");
    for command in ["sheet", "check", "saturation", "isochore", "fluids"] {
        assert!(help.contains(command), "{help}");
    }
}

/// Without a display (and in a build without a window) the program says so in one line.
#[test]
fn without_a_display_it_names_the_commands_and_exits_2() {
    let design = preset_file("refrigerant-vessel");
    for arguments in [&[][..], &[text(&design)]] {
        let said = refused(arguments);
        for command in ["sheet", "check", "saturation", "isochore", "fluids"] {
            assert!(said.contains(command), "{said}");
        }
    }
}

/// `chargewright fluids | head -1`: the reader goes away, the writer is quiet.
#[test]
#[cfg(unix)]
fn a_reader_that_goes_away_is_no_error() {
    let many = vec!["300"; 20_000].join(",");
    let mut child = program()
        .args(["saturation", "water", "--at", &many])
        .stdout(Stdio::piped())
        .stderr(Stdio::piped())
        .spawn()
        .expect("the program runs");
    drop(child.stdout.take());
    let output = child.wait_with_output().expect("it ends");
    assert_eq!(String::from_utf8_lossy(&output.stderr), "");
    assert_eq!(output.status.code(), Some(0));
}

/// A disk that is full is an error of its own.
#[test]
#[cfg(target_os = "linux")]
fn output_that_cannot_be_written_exits_2() {
    let full = fs::OpenOptions::new().write(true).open("/dev/full");
    let Ok(full) = full else { return };
    let output = program()
        .arg("fluids")
        .stdout(full)
        .stderr(Stdio::piped())
        .output()
        .expect("the program runs");
    assert_eq!(output.status.code(), Some(2));
    let said = String::from_utf8(output.stderr).expect("text");
    assert_eq!(said.lines().count(), 1, "{said}");
    assert!(said.contains("cannot be written"), "{said}");
}
