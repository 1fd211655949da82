//! The arrows between modules point one way, and the outside world has one door each.
//!
//! Reads src/ and fails on a use of a later layer (house rules: invariant 1).

use std::path::{Path, PathBuf};

/// Modules in reading order, as `src/lib.rs` lists them: each may use itself and
/// earlier ones.
const ORDER: [&str; 18] = [
    "units",
    "solve",
    "source",
    "text",
    "fluid",
    "chamber",
    "conditions",
    "sealed",
    "section",
    "hazard",
    "design",
    "assess",
    "words",
    "picture",
    "sheet",
    "store",
    "cli",
    "ui",
];

/// A word of another world, and the only module that may say it.
const DOORS: [(&str, &str); 5] = [
    ("egui", "ui"),
    ("eframe", "ui"),
    ("egui_plot", "ui"),
    ("rfd", "ui"),
    ("std::fs", "store"),
];

fn source() -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join("src")
}

/// Every file below a folder.
fn files(folder: &Path) -> Vec<PathBuf> {
    let mut found = Vec::new();
    for entry in std::fs::read_dir(folder).expect("src is readable") {
        let path = entry.expect("src is readable").path();
        if path.is_dir() {
            found.extend(files(&path));
        } else if path.extension().is_some_and(|extension| extension == "rs") {
            found.push(path);
        }
    }
    found.sort();
    found
}

/// The module of a file: `src/fluid/state.rs` and `src/fluid.rs` are of `fluid`.
fn module(path: &Path) -> String {
    let inside = path.strip_prefix(source()).expect("below src");
    let first = inside.components().next().expect("a name");
    let name = first.as_os_str().to_string_lossy();
    name.trim_end_matches(".rs").to_owned()
}

/// The lines that are code of the program: no comments, and nothing from the first
/// `#[cfg(test)]` on, which is where a file's tests begin.
fn code(text: &str) -> impl Iterator<Item = (usize, &str)> {
    text.lines()
        .enumerate()
        .take_while(|(_, line)| line.trim() != "#[cfg(test)]")
        .map(|(number, line)| (number + 1, line.split("//").next().unwrap_or_default()))
}

/// Top-level modules named after `crate::` on a line, `use crate::{a, b::c}` included.
fn named(line: &str) -> Vec<&str> {
    let mut names = Vec::new();
    for rest in line.split("crate::").skip(1) {
        let names_of = |text: &str| {
            let end = text.find(|c: char| !c.is_alphanumeric() && c != '_');
            end.unwrap_or(text.len())
        };
        match rest.strip_prefix('{') {
            Some(list) => {
                for item in list.trim_end_matches(['}', ';']).split(',') {
                    let item = item.trim();
                    names.push(&item[..names_of(item)]);
                }
            }
            None => names.push(&rest[..names_of(rest)]),
        }
    }
    names
}

fn rank(module: &str) -> Option<usize> {
    ORDER.iter().position(|known| *known == module)
}

#[test]
fn no_module_uses_a_later_one() {
    let mut wrong = Vec::new();
    for path in files(&source()) {
        let module = module(&path);
        // The crate's root lists every module and the program opens the last.
        if module == "lib" || module == "main" {
            continue;
        }
        let own = rank(&module).unwrap_or_else(|| panic!("{module} has no place in the order"));
        let text = std::fs::read_to_string(&path).expect("a source file");
        for (number, line) in code(&text) {
            for used in named(line) {
                if rank(used).is_some_and(|used| used > own) {
                    wrong.push(format!("{}:{number}: {module} uses {used}", path.display()));
                }
            }
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
}

#[test]
fn the_crate_lists_its_modules_in_the_order_of_this_test() {
    let text = std::fs::read_to_string(source().join("lib.rs")).expect("lib.rs");
    let listed: Vec<&str> = text
        .lines()
        .filter_map(|line| line.strip_prefix("pub mod ")?.strip_suffix(';'))
        .collect();
    assert_eq!(listed, ORDER);
}

#[test]
fn the_window_and_the_disk_have_one_door_each() {
    let mut wrong = Vec::new();
    for path in files(&source()) {
        let module = module(&path);
        let text = std::fs::read_to_string(&path).expect("a source file");
        for (number, line) in code(&text) {
            for (word, door) in DOORS {
                if module != door && says(line, word) {
                    wrong.push(format!(
                        "{}:{number}: {word} outside {door}",
                        path.display()
                    ));
                }
            }
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
}

/// Whether a line names a path that starts with `word`, as a whole word.
fn says(line: &str, word: &str) -> bool {
    let is_name = |c: char| c.is_alphanumeric() || c == '_';
    line.match_indices(word).any(|(at, _)| {
        let before = line[..at].chars().next_back();
        let after = line[at + word.len()..].chars().next();
        !before.is_some_and(is_name) && !after.is_some_and(is_name)
    })
}

/// The test itself sees what it should.
#[test]
fn a_forbidden_use_is_seen() {
    assert_eq!(
        named("use crate::{fluid::Fluid, units};"),
        ["fluid", "units"]
    );
    assert_eq!(
        named("    crate::assess::assess(x, crate::ui::y)"),
        ["assess", "ui"]
    );
    assert!(says("use std::fs::{self, File};", "std::fs"));
    assert!(says("    eframe::run_native(", "eframe"));
    assert!(!says("let my_egui_thing = 1;", "egui"));
    let text = "use a;\n// crate::ui\n#[cfg(test)]\nuse crate::ui;";
    assert_eq!(
        code(text).filter(|(_, line)| line.contains("ui")).count(),
        0
    );
}
