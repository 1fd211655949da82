//! Fluid files that are refused: by line, column, field and reason, in one sentence.

use std::fs;

use chargewright::fluid::{Catalog, read_own};
use chargewright::store;

use crate::files::Folder;
use crate::own_fluids::{EXAMPLE, FILE, equation_file};

/// The sentence that refuses a text in which the first `old` is `new`: it starts with
/// the line of the change and the field, and says each part.
fn refused(text: &str, old: &str, new: &str, field: &str, parts: &[&str]) {
    let at = text
        .find(old)
        .unwrap_or_else(|| panic!("no “{old}” in\n{text}"));
    let line = text[..at].matches('\n').count() + 1;
    let error = match read_own(&text.replacen(old, new, 1), FILE) {
        Ok(_) => panic!("“{new}” is accepted"),
        Err(error) => error,
    };
    let said = error.to_string();
    assert_eq!(error.line, line, "“{new}”: {said}");
    assert!(error.column >= 1, "“{new}”: {said}");
    let start = format!("line {line}, column {}: {field}", error.column);
    assert!(said.starts_with(&start), "“{new}”: {said}, not {start}");
    for part in parts {
        assert!(said.contains(part), "“{new}” does not say “{part}”: {said}");
    }
    assert!(!said.contains('\n'), "{said}");
}

#[test]
fn a_wrong_figure_is_refused_by_line_column_field_and_reason() {
    let wrong = |old, new, field, parts: &[&str]| refused(EXAMPLE, old, new, field, parts);
    // Syntax, missing and unknown fields.
    wrong("format: 1", "format: 2", "format", &["format 2"]);
    wrong("cas: ", "cash: ", "", &["cash", "cas"]);
    wrong(
        "acentric_factor: 0.363",
        "acentric_factor: \"large\"",
        "model",
        &["\"large\""],
    );
    wrong(
        "model: Correlated",
        "model: Guessed",
        "model",
        &["Guessed", "Correlated", "Helmholtz"],
    );
    wrong(
        "a: [-7.89734, 2.16798, -3.5239, -3.10641]",
        "a: [-7.89734, 2.16798, -3.5239]",
        "model",
        &["4 coefficients", "3"],
    );
    // Not a number, or one that no such figure has.
    wrong(
        "2.16798",
        "NaN",
        "model.vapour_pressure.a[1]",
        &["NaN", "finite"],
    );
    wrong(
        "0.05977",
        "-inf",
        "surface_tension.a[0]",
        &["-inf", "finite"],
    );
    wrong(
        "308.0",
        "1e999",
        "model.critical.density_kg_per_m3",
        &["1e999", "finite"],
    );
    wrong(
        "molar_mass_kg_per_mol: 0.08810512",
        "molar_mass_kg_per_mol: 88.10512",
        "molar_mass_kg_per_mol",
        &["88.10512", "0.001 to 2"],
    );
    wrong(
        "value: 189.35",
        "value: -83.8",
        "melting_point_k",
        &["-83.8", "above 0"],
    );
    wrong(
        "temperature_k: 523.2",
        "temperature_k: 0",
        "model.critical.temperature_k",
        &["above 0"],
    );
    wrong(
        "pressure_pa: 3830000.0",
        "pressure_pa: -1.0",
        "model.critical.pressure_pa",
        &["-1"],
    );
    wrong(
        "(254.0, 497.0)",
        "(497.0, 254.0)",
        "model.vapour_pressure.temperature_range_k",
        &["must rise, not 497 to 254"],
    );
    wrong(
        "uncertainty_percent: 1.5",
        "uncertainty_percent: 150",
        "model",
        &["150", "0 to 100"],
    );
    // Hazards: fractions, and one above the other.
    wrong(
        "(value: 0.02,",
        "(value: 2.0,",
        "safety.lower_flammable_limit",
        &["2.0", "0 to 1"],
    );
    wrong(
        "(value: 0.115,",
        "(value: 0.015,",
        "safety.upper_flammable_limit",
        &["0.015 is not above the lower limit, 0.02"],
    );
    wrong(
        "(value: 200.0,",
        "(value: 2e7,",
        "safety.exposure_limit_ppm",
        &["2e7", "1000000"],
    );
    wrong(
        "[\"H225\",",
        "[\"flammable\",",
        "safety.statements",
        &["flammable", "H225"],
    );
    // Names, and sources that say nothing.
    wrong(
        "id: \"example-",
        "id: \"My Fluid ",
        "id",
        &["My Fluid ethyl-acetate", "a to z"],
    );
    wrong(
        "name: \"example ethyl acetate\"",
        "name: \" \"",
        "name",
        &["must not be empty"],
    );
    wrong(
        "formula: \"C4H8O2\"",
        "formula: \"C4\\nH8\"",
        "formula",
        &["one line"],
    );
    wrong(
        "cas: \"141-78-6\"",
        "cas: \"141-78-5\"",
        "cas",
        &["141-78-5", "check digit"],
    );
    wrong(
        "cas: \"141-78-6\"",
        "cas: \"141-78-6p\"",
        "cas",
        &["141-78-6p"],
    );
    wrong(
        "Published(\"Haynes",
        "Published(\"\"), note: (\"Haynes",
        "melting_point_k",
        &["source"],
    );
    wrong(
        "source: Memory(\"Regulation",
        "source: Gossip(\"Regulation",
        "safety",
        &["Gossip"],
    );
}

#[test]
fn correlations_that_contradict_physics_are_refused() {
    let model = "model: Correlated";
    let at_model = |old: &str, new: &str, parts: &[&str]| {
        let text = EXAMPLE.replacen(old, new, 1);
        assert_ne!(text, EXAMPLE, "{old}");
        // The model as a whole is wrong: its place is the model's.
        refused(&text, model, model, "model: ", parts);
    };
    at_model(
        "-7.89734",
        "7.89734",
        &["K the vapour pressure does not rise with temperature"],
    );
    at_model("660.3752", "-660.3752", &["K "]);
    // Too large a latent heat: a vapour thinner than the ideal gas.
    at_model("8.65545", "9.65545", &["compressibility factor", "above 1"]);
    at_model("8.65545", "-8.65545", &["K "]);
    at_model(
        "a: [0.05977]",
        "a: [-0.05977]",
        &["surface tension", "below 0"],
    );
    at_model(
        "(value: 189.35,",
        "(value: 500.0,",
        &["nothing is left", "500 K"],
    );
    at_model("(254.0, 497.0)", "(100.0, 150.0)", &[]);
}

#[test]
fn an_equation_that_contradicts_physics_is_refused() {
    let text = equation_file();
    let with = |old: &str, new: &str| {
        let at = text.find(old).unwrap_or_else(|| panic!("no {old}"));
        let start = at + old.len();
        let end = start + text[start..].find([',', ')']).expect("an end");
        format!("{}{new}{}", &text[..start], &text[end..])
    };
    let said = |text: &str| read_own(text, FILE).expect_err("refused").to_string();
    let critical = "critical: (temperature_k: ";
    assert!(
        said(&with(critical, "380.0")).contains("the critical point is not the equation's own")
    );
    // Without its terms, and with one that takes the heat away.
    let start = text.find("ideal: [").expect("there");
    let end = start + text[start..].find("        ],").expect("an end");
    let empty = format!("{}ideal: [\n{}", &text[..start], &text[end..]);
    let reason = said(&empty);
    assert!(
        reason.contains("ideal") && reason.contains("3/2"),
        "{reason}"
    );
    let unequal = text.replacen("n: [", "n: [1.0, ", 1);
    assert_ne!(unequal, text);
    let reason = said(&unequal);
    assert!(reason.contains("entries, where"), "{reason}");
    assert!(reason.starts_with("line "), "{reason}");
    // A coefficient with the wrong sign.
    let start = text.find("residual: [").expect("there");
    let n = start + text[start..].find("n: [").expect("coefficients") + 4;
    let flipped = match text[n..].strip_prefix('-') {
        Some(rest) => format!("{}{rest}", &text[..n]),
        None => format!("{}-{}", &text[..n], &text[n..]),
    };
    said(&flipped);
    // A file that would take minutes.
    let long = format!("n: [{}", "0.0, ".repeat(20_000));
    let reason = said(&text.replacen("n: [", &long, 1));
    assert!(
        reason.contains("entries") || reason.contains("numbers"),
        "{reason}"
    );
}

#[test]
fn a_name_of_another_fluid_is_refused_naming_both() {
    let taken = |text: &str, name: &str, by: &str| {
        let folder = Folder::new("taken");
        fs::write(folder.path("a.fluid.ron"), text).expect("written");
        let shelf = store::shelf(Some(&folder.path("design.ron")), None);
        let said = shelf.notices().join("\n");
        for part in [
            "a.fluid.ron, line ",
            name,
            by,
            "another id, name and CAS number",
        ] {
            assert!(said.contains(part), "no “{part}” in {said}");
        }
        assert_eq!(
            shelf.library.fluids.entries().count(),
            Catalog::built_in().ids().count()
        );
    };
    let with = |old: &str, new: &str| EXAMPLE.replacen(old, new, 1);
    taken(
        &with("id: \"example-ethyl-acetate\"", "id: \"water\""),
        "id: “water”",
        "name of water",
    );
    taken(
        &with("141-78-6", "7732-18-5"),
        "cas: “7732-18-5”",
        "name of water",
    );
    taken(
        &with("\"example ethyl acetate\"", "\"Acetone\""),
        "name: “Acetone”",
        "name of acetone",
    );
    taken(
        &with("[\"ethyl ethanoate\"]", "[\"R 134a\"]"),
        "also[0]: “R 134a”",
        "name of r-134a",
    );
}

#[test]
fn what_is_no_fluid_file_at_all_is_one_clear_sentence() {
    let folder = Folder::new("no-fluid");
    fs::create_dir_all(folder.path("folder.fluid.ron")).expect("a folder");
    fs::write(folder.path("bytes.fluid.ron"), [0xff, 0xfe, 0x00]).expect("written");
    fs::write(folder.path("empty.fluid.ron"), "").expect("written");
    fs::write(folder.path("deep.fluid.ron"), "(".repeat(500_000)).expect("written");
    fs::write(folder.path(".hidden.fluid.ron"), "no matter").expect("written");
    fs::write(folder.path("fluid.ron"), "not asked").expect("written");
    let large = fs::File::create(folder.path("large.fluid.ron")).expect("a file");
    large.set_len(200_000_000).expect("sparse");
    let shelf = store::shelf(Some(&folder.path("design.ron")), None);
    let notices = shelf.notices();
    let expected = [
        ("bytes.fluid.ron", "is not text"),
        ("deep.fluid.ron", "line 1, column "),
        ("empty.fluid.ron", "line 1, column 1: "),
        ("folder.fluid.ron", "is a folder, not a fluid file"),
        (
            "large.fluid.ron",
            "is 191 MiB: a fluid file is at most 1 MiB",
        ),
    ];
    assert_eq!(notices.len(), expected.len(), "{notices:#?}");
    for (notice, (name, reason)) in notices.iter().zip(expected) {
        assert!(notice.contains(name) && notice.contains(reason), "{notice}");
        assert!(
            !notice.contains('\n') && notice.starts_with("fluid file not read: "),
            "{notice}"
        );
    }
}
