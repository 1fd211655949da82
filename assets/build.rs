//! Lists the folders of assets and of ready designs, so that a new one is one file, and
//! writes the index of the fluids: what lists show of each without reading its file.

use std::collections::BTreeMap;
use std::fmt::Write as _;
use std::path::{Path, PathBuf};
use std::{env, fs};

#[path = "../src/text/scan.rs"]
mod scan;

fn main() {
    println!("cargo:rerun-if-changed=src/text/scan.rs");
    let root = env::var("CARGO_MANIFEST_DIR").expect("cargo sets it");
    let out = env::var("OUT_DIR").expect("cargo sets it");
    let out = Path::new(&out);
    for (folder, constant, file) in [
        (
            "assets/compatibility",
            "COMPATIBILITY_FILES",
            "compatibility_files.rs",
        ),
        ("assets/fluids", "FLUID_FILES", "fluid_files.rs"),
        ("assets/materials", "MATERIAL_FILES", "material_files.rs"),
        ("presets", "PRESET_FILES", "preset_files.rs"),
    ] {
        let folder = Path::new(&root).join(folder);
        println!("cargo:rerun-if-changed={}", folder.display());
        let paths = ron_files(&folder);
        let mut text = format!("pub(crate) static {constant}: &[(&str, &str)] = &[\n");
        for path in &paths {
            let stem = path
                .file_stem()
                .and_then(|stem| stem.to_str())
                .expect("asset names are plain text");
            writeln!(
                text,
                "    ({stem:?}, include_str!({:?})),",
                path.display().to_string()
            )
            .expect("writing to a string");
        }
        text.push_str("];\n");
        if constant == "FLUID_FILES" {
            write_index(&mut text, &paths);
        }
        fs::write(out.join(file), text).expect("the build folder can be written");
    }
}

fn ron_files(folder: &Path) -> Vec<PathBuf> {
    let mut paths: Vec<_> = fs::read_dir(folder)
        .map(|entries| {
            entries
                .filter_map(Result::ok)
                .map(|entry| entry.path())
                .collect()
        })
        .unwrap_or_default();
    paths.retain(|path| path.extension().is_some_and(|ext| ext == "ron"));
    paths.sort();
    paths
}

/// One `Entry` a fluid, in the order of `FLUID_FILES`; `src/fluid/entry.rs` says what
/// each field is, and a test compares it with the file as it is read.
fn write_index(text: &mut String, paths: &[PathBuf]) {
    text.push_str("pub(crate) static FLUID_INDEX: &[Entry] = &[\n");
    for path in paths {
        let fluid = fs::read_to_string(path).expect("an asset is text");
        let values = values(&fluid);
        let need = |key: &str| {
            let value = values.get(key);
            value.unwrap_or_else(|| panic!("{}: no {key}", path.display()))
        };
        // A string of RON is written as one of Rust is.
        let list = |key: &str| {
            let items = (0..).map_while(|i| values.get(&format!("{key}[{i}]")).copied());
            let lines: Vec<&str> = items.collect();
            match lines[..] {
                [] => "\"\"".to_owned(),
                [one] => one.to_owned(),
                _ => format!("concat!({})", lines.join(", \"\\n\", ")),
            }
        };
        let kind = if need("model").starts_with("Helmholtz") {
            "equation"
        } else {
            "correlations"
        };
        let refrigerant = match values.get("refrigerant") {
            Some(number) if number.starts_with("Some") => {
                let number = number.trim_start_matches("Some(").trim_end_matches(')');
                format!("Some(Cow::Borrowed({number}))")
            }
            _ => "None".to_owned(),
        };
        writeln!(
            text,
            "    Entry {{ id: Cow::Borrowed({}), name: Cow::Borrowed({}), also: Cow::Borrowed({}), \
             cas: Cow::Borrowed({}), refrigerant: {refrigerant}, formula: Cow::Borrowed({}), \
             model_kind: {kind:?}, range_k: {:?}, statements: Cow::Borrowed({}), burns: {:?}, own_file: None }},",
            need("id"),
            need("name"),
            list("also"),
            need("cas"),
            need("formula"),
            range(&values, kind),
            list("safety.statements.value"),
            values.get("safety.lower_flammable_limit").is_some_and(|limit| *limit != "None"),
        )
        .expect("writing to a string");
    }
    text.push_str("];\n");
}

/// Each value of a file by the way to it; of `Some(..)`, all of it.
fn values(text: &str) -> BTreeMap<String, &str> {
    let mut values = BTreeMap::new();
    scan::walk(text, |path, _, value| {
        values.insert(path.to_owned(), value);
    });
    values
}

/// The temperatures at which every form of the model holds, K. Correlations do not join
/// above 0.95 of the critical temperature.
fn range(values: &BTreeMap<String, &str>, kind: &str) -> (f64, f64) {
    let number = |key: &str| -> Option<f64> { values.get(key)?.parse().ok() };
    let mut range = (0.0_f64, f64::INFINITY);
    if kind == "correlations" {
        let critical = number("model.critical.temperature_k").expect("a critical temperature");
        range.1 = 0.95 * critical;
    }
    for key in values.keys() {
        if key.starts_with("model.") && key.ends_with("temperature_range_k") {
            let end = |i: usize| number(&format!("{key}[{i}]")).expect("a range has two ends");
            range = (range.0.max(end(0)), range.1.min(end(1)));
        }
    }
    range
}
