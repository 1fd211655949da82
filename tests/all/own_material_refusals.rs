//! Material files that are refused: by line, column, field and reason, in one sentence.

use std::fs;

use chargewright::chamber::{Materials, read_own_material};
use chargewright::store;

use crate::files::Folder;
use crate::own_materials::{EXAMPLE, FILE};

/// The sentence that refuses a text in which the first `old` is `new`: it starts with the
/// line of the change and the field, and says each part.
fn refused(text: &str, (old, new): (&str, &str), field: &str, parts: &[&str]) {
    let at = text
        .find(old)
        .unwrap_or_else(|| panic!("no “{old}” in\n{text}"));
    let line = text[..at].matches('\n').count() + 1;
    let error = match read_own_material(&text.replacen(old, new, 1), FILE) {
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

/// What is replaced, by what, the field that is named, and what is said of it.
type Row = (
    &'static str,
    &'static str,
    &'static str,
    &'static [&'static str],
);

/// In the example, a metal.
const METAL: &[Row] = &[
    // Syntax, missing and unknown fields, a figure without its source.
    ("name: ", "nome: ", "", &["nome", "name"]),
    (
        "kind: Metal",
        "kind: Wood",
        "kind",
        &["Wood", "Metal", "Glass"],
    ),
    ("620e6,", "620e6 MPa,", "", &[]),
    (
        "value: 200e9, source: ",
        "value: 200e9, origin: ",
        "modulus_pa",
        &["origin", "source"],
    ),
    (
        "Memory(\"EN 10088-1, 1.4462 at 20 °C\")",
        "Memory(\" \")",
        "modulus_pa",
        &["a source must name"],
    ),
    // Names.
    (
        "id: \"example-duplex-steel\"",
        "id: \"Duplex\"",
        "id: ",
        &["Duplex", "a to z, 0 to 9, hyphens"],
    ),
    (
        "id: \"example-duplex-steel\"",
        "id: \"\"",
        "id: ",
        &["must not be empty"],
    ),
    (
        "\"UNS S31803\"",
        "\"a\\nb\"",
        "designations[1]: ",
        &["one line"],
    ),
    // In another unit, or with a slipped digit.
    (
        "620e6",
        "620",
        "kind.as_supplied.tensile.value_pa: ",
        &["620 is", "100000 to 5e9"],
    ),
    ("620e6", "-620e6", "kind", &["above 0"]),
    ("620e6", "NaN", "kind", &["NaN", "above 0"]),
    (
        "200e9",
        "200",
        "modulus_pa.value: ",
        &["200 is", "1e8 to 1e12"],
    ),
    ("0.30", "0.0", "poisson_ratio.value: ", &["not above 0"]),
    ("0.30", "0.5", "poisson_ratio", &["below 0.5"]),
    ("13.0e-6", "13.0", "expansion_per_k.value: ", &["13 is"]),
    (
        "7800.0",
        "7.8",
        "density_kg_per_m3.value: ",
        &["7.8 is", "100 to 30000"],
    ),
    (
        "(value: 523.15",
        "(value: -250.0",
        "service.hottest_k",
        &["-250"],
    ),
    (
        "(value: 523.15",
        "(value: 52315.0",
        "service.hottest_k.value: ",
        &["52315 is", "50 to 4000"],
    ),
    (
        "coldest_k: (value: 233.15",
        "coldest_k: (value: 533.15",
        "service.coldest_k.value: ",
        &["533.15 K is not below the hottest, 523.15 K"],
    ),
    (
        "value: 233.15,",
        "value: 600.0,",
        "kind.cold_value_held_down_to_k.value: ",
        &["600 K is not below"],
    ),
    // Curves: in order, in service, not leaping up, not above the modulus of the room.
    (
        "(373.15, 360e6)",
        "(273.15, 360e6)",
        "kind.as_supplied.proof.points_k_pa[1][0]: ",
        &["must rise", "273.15 K follows 293.15 K"],
    ),
    (
        "(293.15, 450e6), (373.15, 360e6), (423.15, 335e6), (473.15, 315e6), (523.15, 300e6)",
        "(293.15, 450e6)",
        "kind.as_supplied.proof.points_k_pa: ",
        &["two points at least, not 1"],
    ),
    (
        "(523.15, 300e6)",
        "(623.15, 300e6)",
        "kind.as_supplied.proof.points_k_pa[4][0]: ",
        &["623.15 K is outside the service"],
    ),
    (
        "315e6",
        "515e6",
        "kind.as_supplied.proof.points_k_pa[3][1]: ",
        &["5.15e8 Pa is far above 3.35e8 Pa"],
    ),
    (
        "315e6",
        "31.5e3",
        "kind.as_supplied.proof.points_k_pa[3][1]: ",
        &["31500 is outside"],
    ),
    (
        "194e9",
        "294e9",
        "hot_modulus.points_k_pa[1][1]: ",
        &["2.94e11 Pa is above", "2e11 Pa"],
    ),
    (
        "[(293.15, 200e9), (373.15, 194e9), (473.15, 186e9), (573.15, 180e9)]",
        "[(800.0, 180e9), (900.0, 170e9)]",
        "hot_modulus.points_k_pa: ",
        &["no point lies in the service"],
    ),
    // Among themselves.
    (
        "450e6",
        "650e6",
        "kind.as_supplied.proof.points_k_pa[0][1]: ",
        &["6.5e8 Pa at 293.15 K", "the tensile strength", "6.2e8 Pa"],
    ),
];

#[test]
fn a_wrong_figure_is_refused_by_line_column_field_and_reason() {
    for (old, new, field, parts) in METAL {
        refused(EXAMPLE, (old, new), field, parts);
    }
}

#[test]
fn a_code_stress_is_above_neither_proof_nor_a_share_of_tensile() {
    let with = |pa: &str| {
        EXAMPLE.replacen(
            "            // Published over",
            &format!(
                "            code_stress: AtRoomTemperature(value_pa: {pa}, source: Memory(\"a code\")),\n            // Published over"
            ),
            1,
        )
    };
    let said = |pa: &str| read_own_material(&with(pa), FILE).map_err(|error| error.to_string());
    let field = "kind.as_supplied.code_stress.value_pa: ";
    // 620 MPa / 2.4 = 258.3 MPa.
    assert!(said("258e6").is_ok());
    let error = said("265e6").expect_err("above its share");
    assert!(
        error.contains(field) && error.contains("over 2.4"),
        "{error}"
    );
    let error = said("460e6").expect_err("above proof");
    assert!(
        error.contains(field) && error.contains("the proof strength"),
        "{error}"
    );
}

/// Each condition is looked at, and glass has rules of its own.
#[test]
fn welded_and_annealed_values_and_glass_are_checked_too() {
    let asset = |name: &str| {
        let folder = std::path::Path::new(env!("CARGO_MANIFEST_DIR")).join("assets/materials");
        fs::read_to_string(folder.join(name)).expect("an asset")
    };
    let aluminium = asset("aluminium-6061-t6.ron");
    let change = ("(293.15, 80e6)", "(293.15, 180e6)");
    let field = "kind.after_welding.proof.points_k_pa[0][1]: ";
    refused(&aluminium, change, field, &["1.8e8 Pa at 293.15 K"]);
    let nickel = asset("alloy-n06625.ron");
    let change = ("690e6", "69e3");
    refused(
        &nickel,
        change,
        "kind.after_annealing.tensile.value_pa: ",
        &["69000 is"],
    );
    let quartz = asset("fused-quartz.ron");
    for (change, field, part) in [
        (
            ("value: 48e6", "value: 4.8e6"),
            "kind.short_term_pa.value: ",
            "4.8e6 Pa is below",
        ),
        (
            ("value: 6.89e6", "value: 6.89"),
            "kind.permissible_pa.value: ",
            "6.89 is",
        ),
        (
            ("(value: 10.0", "(value: 0.1"),
            "kind.short_term_divisor.value: ",
            "0.1 is",
        ),
    ] {
        refused(&quartz, change, field, &[part]);
    }
    let start = quartz.find("worn: (").expect("there");
    let share = format!(
        "{}{}",
        &quartz[..start],
        quartz[start..].replacen("0.5", "1.5", 1)
    );
    let error = read_own_material(&share, FILE).expect_err("a share above 1");
    assert!(error.to_string().contains("1.5"), "{error}");
}

#[test]
fn a_name_of_another_material_is_refused_naming_both() {
    let taken = |text: &str, name: &str, by: &str| {
        let folder = Folder::new("taken-material");
        fs::write(folder.path("b.material.ron"), text).expect("written");
        let shelf = store::shelf(Some(&folder.path("design.ron")), None);
        let said = shelf.notices().join("\n");
        for part in [
            "b.material.ron, line ",
            name,
            by,
            "another id, name and designation",
        ] {
            assert!(said.contains(part), "no “{part}” in {said}");
        }
        assert_eq!(
            shelf.library.materials.iter().len(),
            Materials::built_in().iter().len()
        );
    };
    let with = |old: &str, new: &str| EXAMPLE.replacen(old, new, 1);
    taken(
        &with("\"example-duplex-steel\"", "\"stainless-316l\""),
        "id: “stainless-316l”",
        "name of stainless-316l",
    );
    taken(
        &with(
            "\"Example duplex steel 1.4462, solution-annealed\"",
            "\"fused Quartz\"",
        ),
        "name: “fused Quartz”",
        "name of fused-quartz",
    );
    taken(
        &with("\"UNS S31803\"", "\"uns r50400\""),
        "designations[1]: “uns r50400”",
        "name of titanium-grade-2",
    );
    // Two of the user's own.
    let folder = Folder::new("taken-own");
    fs::write(folder.path("a.material.ron"), EXAMPLE).expect("written");
    let second = with("\"example-duplex-steel\"", "\"second\"");
    fs::write(folder.path("b.material.ron"), second).expect("written");
    let shelf = store::shelf(Some(&folder.path("design.ron")), None);
    let said = shelf.notices().join("\n");
    let both = "name of example-duplex-steel in a.material.ron";
    assert!(
        said.contains("b.material.ron, line ") && said.contains(both),
        "{said}"
    );
}

#[test]
fn what_is_no_material_file_at_all_is_one_clear_sentence() {
    let folder = Folder::new("no-material");
    fs::create_dir_all(folder.path("folder.material.ron")).expect("a folder");
    fs::write(folder.path("bytes.material.ron"), [0xff, 0xfe, 0x00]).expect("written");
    fs::write(folder.path("empty.material.ron"), "").expect("written");
    fs::write(folder.path("deep.material.ron"), "(".repeat(500_000)).expect("written");
    fs::write(folder.path(".hidden.material.ron"), "no matter").expect("written");
    fs::write(folder.path("material.ron"), "not asked").expect("written");
    let points: String = (0..600)
        .map(|i| format!("({}.0, 300e6), ", 240 + i))
        .collect();
    let long = EXAMPLE
        .replacen("(293.15, 450e6), (373.15, 360e6), ", "", 1)
        .replacen(
            "(423.15, 335e6), (473.15, 315e6), (523.15, 300e6)",
            &points,
            1,
        );
    fs::write(folder.path("long.material.ron"), long).expect("written");
    let large = fs::File::create(folder.path("large.material.ron")).expect("a file");
    large.set_len(200_000_000).expect("sparse");
    let shelf = store::shelf(Some(&folder.path("design.ron")), None);
    let notices = shelf.notices();
    let expected = [
        ("bytes.material.ron", "is not text"),
        ("deep.material.ron", "line 1, column "),
        ("empty.material.ron", "line 1, column 1: "),
        ("folder.material.ron", "is a folder, not a material file"),
        (
            "large.material.ron",
            "is 191 MiB: a material file is at most 1 MiB",
        ),
        ("long.material.ron", "at most 500 points are read, not 600"),
    ];
    assert_eq!(notices.len(), expected.len(), "{notices:#?}");
    for (notice, (name, reason)) in notices.iter().zip(expected) {
        assert!(notice.contains(name) && notice.contains(reason), "{notice}");
        assert!(
            !notice.contains('\n') && notice.starts_with("material file not read: "),
            "{notice}"
        );
    }
}
