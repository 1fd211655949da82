//! The tables that the headless commands print: columns, digits, what a list may hold.

use chargewright::fluid::Catalog;

use crate::commands::{printed, refused};
use crate::given::{fluid, kelvin};

fn cells(line: &str) -> Vec<&str> {
    line.split(',').collect()
}

/// A number of at most twelve significant digits that is nearest to `value`.
fn agrees(cell: &str, value: f64) {
    let found: f64 = cell
        .parse()
        .unwrap_or_else(|_| panic!("“{cell}” is no number"));
    assert!(
        (found / value - 1.0).abs() <= 5.1e-12,
        "{cell} is not {value}"
    );
    let mantissa = cell.split('e').next().expect("a mantissa");
    let digits = mantissa
        .trim_start_matches(['0', '.', '-'])
        .replace('.', "");
    assert!(digits.len() <= 12, "{cell} has {} digits", digits.len());
}

#[test]
fn saturation_prints_its_columns_to_twelve_digits() {
    let text = printed(&["saturation", "water", "--at", "300,350.5,647"], 0);
    let mut lines = text.lines();
    assert_eq!(
        lines.next(),
        Some(
            "temperature_k,pressure_pa,liquid_density_kg_per_m3,vapour_density_kg_per_m3,\
             latent_heat_j_per_kg,slope_pa_per_k,surface_tension_n_per_m,liquid_viscosity_pa_s,\
             vapour_viscosity_pa_s"
        )
    );
    let water = fluid("water");
    for (line, t) in lines.zip([300.0, 350.5, 647.0]) {
        let cells = cells(line);
        assert_eq!(cells.len(), 9, "{line}");
        let at = water.saturation(kelvin(t)).expect("in range");
        for (cell, value) in cells.iter().zip([
            t,
            at.pressure_pa,
            at.liquid_kg_per_m3,
            at.vapour_kg_per_m3,
            at.latent_heat_j_per_kg,
            at.slope_pa_per_k,
            water.surface_tension(kelvin(t)).expect("known"),
            water.liquid_viscosity(kelvin(t)).expect("known"),
            water.vapour_viscosity(kelvin(t)).expect("known"),
        ]) {
            agrees(cell, value);
        }
    }
    assert_eq!(text.lines().count(), 4);
    assert!(text.ends_with('\n'));
    // Not known: empty, not zero. No viscosity of this fluid is carried.
    let text = printed(&["saturation", "hfe-347mcc3", "--at", "300"], 0);
    assert_eq!(cells(text.lines().nth(1).expect("a row"))[7..], ["", ""]);
}

#[test]
fn a_temperature_may_carry_any_unit_and_a_bare_one_is_kelvin() {
    let mixed = printed(
        &[
            "saturation",
            "ammonia",
            "--at",
            "-5degC,268.15,23 degF,268.15 K",
        ],
        0,
    );
    let rows: Vec<&str> = mixed.lines().skip(1).collect();
    assert_eq!(rows.len(), 4);
    assert!(rows.iter().all(|row| *row == rows[0]), "{mixed}");
    assert!(rows[0].starts_with("268.15,"));
    let joined = printed(&["saturation", "ammonia", "--at=-5degC"], 0);
    assert_eq!(joined.lines().nth(1), Some(rows[0]));
}

#[test]
fn a_fluid_answers_to_id_cas_and_refrigerant_number() {
    let by_id = printed(&["saturation", "r-134a", "--at", "300"], 0);
    for name in ["811-97-2", "R134a", "R-134a", "r134A"] {
        assert_eq!(
            printed(&["saturation", name, "--at", "300"], 0),
            by_id,
            "{name}"
        );
    }
    for (name, id) in [
        ("7732-18-5", "water"),
        ("R-717", "ammonia"),
        ("R290", "propane"),
    ] {
        let (a, b) = (
            ["saturation", name, "--at", "300"],
            ["saturation", id, "--at", "300"],
        );
        assert_eq!(printed(&a, 0), printed(&b, 0), "{name}");
    }
    assert!(refused(&["saturation", "watr", "--at", "300"]).contains("did you mean water"));
    refused(&["saturation", "", "--at", "300"]);
    refused(&["isochore", "R-9999", "--density", "1", "--at", "300"]);
}

/// On the command line the comma separates and the mark is a point.
#[test]
fn a_comma_separates() {
    // One kelvin and zero kelvin, not a thousand.
    assert!(refused(&["saturation", "water", "--at", "1,000"]).contains("--at 000"));
    let two = printed(&["saturation", "water", "--at", "300,400"], 0);
    assert_eq!(two.lines().count(), 3);
    assert!(refused(&["saturation", "water", "--at", "300,"]).contains("nothing typed"));
    refused(&["saturation", "water", "--at", ""]);
    // One density, no list: the comma is no decimal mark here either.
    refused(&["isochore", "water", "--density", "0,5", "--at", "300"]);
    refused(&["isochore", "water", "--density", "1,000", "--at", "300"]);
}

#[test]
fn one_bad_temperature_refuses_the_whole_list() {
    for (list, named) in [
        ("300,nan", "nan"),
        ("300,inf,310", "inf"),
        ("300,-1", "-1"),
        ("300,1e999", "1e999"),
        ("300,20 bar", "bar"),
        ("300,three", "three"),
        ("300,700", "700 K"),
        ("300,250", "250 K"),
    ] {
        let said = refused(&["saturation", "water", "--at", list]);
        assert!(said.contains(named), "{list}: {said}");
    }
    let said = refused(&["isochore", "water", "--density", "800", "--at", "300,5000"]);
    assert!(said.contains("5000 K") && said.contains("2000 K"), "{said}");
    let said = refused(&[
        "isochore",
        "diethyl-ether",
        "--density",
        "700",
        "--at",
        "300,200",
    ]);
    assert!(said.contains("200 K") && said.contains("270 K"), "{said}");
}

#[test]
fn a_density_that_is_none_is_refused() {
    for bad in ["nan", "0", "-5", "1e9", "5 bar", "", "dense"] {
        let said = refused(&["isochore", "water", "--density", bad, "--at", "300"]);
        assert!(said.contains("--density"), "{bad}: {said}");
    }
}

#[test]
fn isochore_says_the_regime_in_one_of_five_words() {
    let header = "temperature_k,density_kg_per_m3,regime,pressure_pa,liquid_share,vapour_quality";
    let ask = |density: &str, at: &str| {
        let text = printed(&["isochore", "water", "--density", density, "--at", at], 0);
        assert_eq!(text.lines().next(), Some(header));
        text
    };
    let text = ask("800", "260,300,560,700");
    let rows: Vec<Vec<&str>> = text.lines().skip(1).map(cells).collect();
    assert!(
        rows.iter().all(|row| row.len() == 6 && row[1] == "800"),
        "{text}"
    );
    let words: Vec<&str> = rows.iter().map(|row| row[2]).collect();
    assert_eq!(
        words,
        ["frozen", "two_phase", "liquid_full", "supercritical"]
    );
    // Frozen: the vapour pressure of the ice (IAPWS R14-08, 260 K), and no shares.
    let ice: f64 = rows[0][3].parse().expect("a pressure");
    assert!((ice / 195.8 - 1.0).abs() < 1e-4, "{ice} Pa");
    assert_eq!(rows[0][4..], ["", ""]);
    // Where only a bound is known, the cell is empty.
    let bounded = printed(
        &["isochore", "acetone", "--density", "800", "--at", "170"],
        0,
    );
    assert!(bounded.ends_with(",frozen,,,\n"), "{bounded}");
    assert!(rows[1][3..].iter().all(|cell| !cell.is_empty()));
    assert_eq!(rows[2][4..], ["1", "0"]);
    assert_eq!(rows[3][4..], ["", ""]);
    let vapour = ask("1e-1", "400");
    assert_eq!(
        cells(vapour.lines().nth(1).expect("a row"))[2..3],
        ["all_vapour"]
    );
    assert!(vapour.ends_with(",0,1\n"), "{vapour}");
    let state = fluid("water")
        .state(crate::given::density(800.0), kelvin(300.0))
        .expect("in range");
    agrees(rows[1][3], state.pressure.pascal());
    agrees(rows[1][4], state.liquid_share.expect("two phases"));
    agrees(rows[1][5], state.quality.expect("two phases"));
    // Units of density, and exponents.
    let bare = ask("8e2", "300");
    for same in ["800 kg/m3", "0.8 g/mL", "0.8kg/L"] {
        assert_eq!(ask(same, "300"), bare, "{same}");
    }
}

#[test]
fn fluids_lists_every_fluid() {
    let text = printed(&["fluids"], 0);
    assert_eq!(
        text.lines().next(),
        Some("id,name,cas,refrigerant,model,lowest_k,highest_k,own_file")
    );
    assert_eq!(text.lines().count(), 1 + Catalog::built_in().ids().count());
    for line in text.lines().skip(1) {
        let cells = quoted_cells(line);
        assert_eq!(
            cells.len(),
            8,
            "a name with a comma is put in quotes: {line}"
        );
        assert_eq!(cells[7], "", "of the program: {line}");
        assert!(
            ["equation", "correlations"].contains(&cells[4].as_str()),
            "{line}"
        );
        assert!(cells[5].parse::<f64>().expect(line) < cells[6].parse::<f64>().expect(line));
    }
}

/// Cells of a line in which a text with a comma stands in quotes.
fn quoted_cells(line: &str) -> Vec<String> {
    let mut cells = vec![String::new()];
    let mut quoted = false;
    for c in line.chars() {
        match c {
            '"' => quoted = !quoted,
            ',' if !quoted => cells.push(String::new()),
            c => cells.last_mut().expect("one at least").push(c),
        }
    }
    cells
}
