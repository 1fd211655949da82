//! Lists the folders of assets and of ready designs, so that a new one is one file.

use std::fmt::Write as _;
use std::path::Path;
use std::{env, fs};

fn main() {
    let root = env::var("CARGO_MANIFEST_DIR").expect("cargo sets it");
    let out = env::var("OUT_DIR").expect("cargo sets it");
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
        let mut paths: Vec<_> = fs::read_dir(&folder)
            .map(|entries| {
                entries
                    .filter_map(Result::ok)
                    .map(|entry| entry.path())
                    .collect()
            })
            .unwrap_or_default();
        paths.retain(|path| path.extension().is_some_and(|ext| ext == "ron"));
        paths.sort();
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
        fs::write(Path::new(&out).join(file), text).expect("the build folder can be written");
    }
}
