//! A design's text that is refused: by line, column, field, value and limit.

use chargewright::store::{self, ParseError};

use crate::files::preset;

/// The ready design with one line changed, and the refusal's parts: line and column of
/// the value, its field, the value, the limit.
fn wrong(old: &str, new: &str, field: &str, parts: &[&str]) {
    let text = store::to_text(&preset());
    assert!(text.contains(old), "no “{old}” in\n{text}");
    let changed = text.replacen(old, new, 1);
    let at = text.find(old).expect("found");
    let line = text[..at].matches('\n').count() + 1;
    let error = match store::from_text(&changed) {
        Ok(_) => panic!("“{new}” is accepted"),
        Err(error) => error,
    };
    let said = error.to_string();
    let (ParseError::At(at) | ParseError::UnknownFluid(at)) = error else {
        panic!("“{new}”: {said}")
    };
    assert_eq!(at.line, line, "“{new}”: {said}");
    assert!(at.column > 1, "“{new}”: {said}");
    assert!(
        said.starts_with(&format!("line {line}, column {}: ", at.column)),
        "{said}"
    );
    assert!(
        said.contains(field),
        "“{new}” does not name {field}: {said}"
    );
    for part in parts {
        assert!(said.contains(part), "“{new}” does not say “{part}”: {said}");
    }
    assert!(!said.contains('\n'), "{said}");
}

#[test]
fn an_impossible_value_is_refused_by_line_column_field_value_and_limit() {
    wrong(
        "hottest_k: 393.15",
        "hottest_k: NaN",
        "hottest_k",
        &["finite", "NaN"],
    );
    wrong(
        "hottest_k: 393.15",
        "hottest_k: inf",
        "hottest_k",
        &["finite", "inf"],
    );
    wrong(
        "hottest_k: 393.15",
        "hottest_k: -1.0",
        "hottest_k",
        &["-1 K", "0.001 K"],
    );
    wrong(
        "hottest_k: 393.15",
        "hottest_k: 1e9",
        "hottest_k",
        &["1000000000 K", "100000 K"],
    );
    wrong(
        "nominal_m: 0.25",
        "nominal_m: -0.25",
        "nominal_m",
        &["-0.25 m", "0 m"],
    );
    wrong("nominal_m: 0.25", "nominal_m: NaN", "nominal_m", &["NaN"]);
    wrong(
        "mass_kg: 0.0032",
        "mass_kg: -0.0032",
        "mass_kg",
        &["-0.0032 kg", "0 kg"],
    );
    wrong(
        "porosity: 0.48",
        "porosity: 1.2",
        "porosity",
        &["1.2", "greatest allowed, 1"],
    );
    wrong(
        "nominal_m: 0.0005,",
        "nominal_m: -0.0005,",
        "nominal_m",
        &["-0.0005 m", "0 m"],
    );
    wrong(
        "ovality: 0.01",
        "ovality: 2.0",
        "ovality",
        &["2", "greatest allowed, 1"],
    );
    wrong(
        "tilt_rad: 0.0",
        "tilt_rad: 3.0",
        "tilt_rad",
        &["3 rad", "1.57"],
    );
    wrong("mass_kg: 0.0032", "mass_kg: -inf", "mass_kg", &["-inf"]);
    wrong(
        "ullage: 0.05",
        "ullage: 1.5",
        "ullage",
        &["1.5", "greatest allowed, 1"],
    );
    wrong(
        "on_burst: 4.0",
        "on_burst: 0.5",
        "on_burst",
        &["0.5", "least allowed, 1"],
    );
    wrong(
        "fluid: \"water\"",
        "fluid: \"watr\"",
        "fluid",
        &["“watr”", "did you mean water"],
    );
    wrong(
        "count: 1",
        "count: -1",
        "count",
        &["-1 is not", "4294967295"],
    );
    wrong(
        "count: 1",
        "count: 5000000000",
        "count",
        &["5000000000", "4294967295"],
    );
    wrong(
        "treatment: Sintered",
        "treatment: Boiled",
        "treatment",
        &["Boiled", "Sintered"],
    );
    wrong(
        "duty: HeatPipe",
        "duty: Toaster",
        "duty",
        &["Toaster", "HeatPipe"],
    );
}

#[test]
fn an_unknown_or_missing_field_is_refused_by_its_name() {
    wrong(
        "coldest_k: 278.15",
        "coldest_c: 5.0",
        "conditions",
        &["coldest_c", "coldest_k"],
    );
    wrong(
        "duty: HeatPipe,",
        "duty: HeatPipe, colour: \"red\",",
        "colour",
        &["title"],
    );
    wrong(
        "hottest_k: 393.15",
        "hottest_k: \"hot\"",
        "hottest_k",
        &["\"hot\""],
    );
    let text = store::to_text(&preset());
    let start = text.find("      hottest_k").expect("the line");
    let end = start + text[start..].find('\n').expect("its end") + 1;
    let without = format!("{}{}", &text[..start], &text[end..]);
    let said = store::from_text(&without).expect_err("refused").to_string();
    assert!(
        said.contains("hottest_k") && said.starts_with("line "),
        "{said}"
    );
}

#[test]
fn text_after_the_design_and_cut_off_text_are_refused_where_they_are() {
    let text = store::to_text(&preset());
    let said = store::from_text(&format!("{text}and more\n"))
        .expect_err("refused")
        .to_string();
    // It is found where the design ends.
    let lines = text.lines().count();
    assert!(said.starts_with(&format!("line {lines},")), "{said}");
    for cut in (0..text.len())
        .step_by(97)
        .filter(|at| text.is_char_boundary(*at))
    {
        let said = store::from_text(&text[..cut])
            .expect_err("cut off")
            .to_string();
        assert!(
            said.starts_with("line ") && !said.contains('\n'),
            "cut at {cut}: {said}"
        );
    }
}

#[test]
fn a_newer_format_is_refused_by_its_version() {
    let newer = store::to_text(&preset()).replacen("format: 1", "format: 2", 1);
    let with_news = newer.replacen("duty: HeatPipe,", "duty: HeatPipe, colour: \"red\",", 1);
    for text in [newer, with_news] {
        let error = store::from_text(&text).expect_err("refused");
        assert_eq!(error, ParseError::NewerFormat { found: 2 });
        assert!(error.to_string().contains("newer"), "{error}");
    }
    // No version ever was 0.
    let older = store::to_text(&preset()).replacen("format: 1", "format: 0", 1);
    store::from_text(&older).expect_err("format 0 is none");
}
