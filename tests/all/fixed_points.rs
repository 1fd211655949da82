//! Normal boiling points and melting points of every fluid against published tables
//! (tests/reference/fixed-points.csv, each figure with its source and tolerance).

use chargewright::fluid::Catalog;
use chargewright::units::Pressure;

use crate::given::{fluid, kelvin};
use crate::tables::reference;

/// One figure of the table: value, tolerance, source.
type Figure = Option<(f64, f64, String)>;

/// Id, boiling point, melting point.
fn table() -> Vec<(String, Figure, Figure)> {
    let text = std::fs::read_to_string(reference("fixed-points.csv")).expect("the table");
    text.lines()
        .filter(|line| !line.starts_with('#'))
        .skip(1)
        .map(|line| {
            let cells = cells(line);
            let figure = |i: usize| {
                (!cells[i].is_empty()).then(|| {
                    let number = |i: usize| cells[i].parse().expect(line);
                    (number(i), number(i + 1), cells[i + 2].clone())
                })
            };
            (cells[0].clone(), figure(1), figure(4))
        })
        .collect()
}

/// Cells of a line; one with a comma in it stands in double quotes.
fn cells(line: &str) -> Vec<String> {
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

/// °C would do as well: temperature at which the vapour pressure is one atmosphere.
fn boiling_point(id: &str) -> f64 {
    const ATMOSPHERE: f64 = 101_325.0;
    let fluid = fluid(id);
    let (low, high) = fluid.saturation_range();
    let (mut low, mut high) = (low.max(fluid.freezing_point()).kelvin(), high.kelvin());
    for _ in 0..60 {
        let middle = 0.5 * (low + high);
        match fluid
            .saturation_pressure(kelvin(middle))
            .map(Pressure::pascal)
        {
            Ok(p) if p > ATMOSPHERE => high = middle,
            Ok(_) => low = middle,
            Err(error) => panic!("{id} at {middle} K: {error}"),
        }
    }
    0.5 * (low + high)
}

#[test]
fn every_fluid_boils_where_the_tables_say() {
    let mut checked = 0;
    for (id, boiling, _) in table() {
        let Some((printed, tolerance, source)) = boiling else {
            continue;
        };
        let found = boiling_point(&id);
        assert!(
            (found - printed).abs() <= tolerance,
            "{id}: {found:.3} K against {printed} K, {source}"
        );
        checked += 1;
    }
    // Those that sublime, start above their boiling point or have no second table are few.
    assert!(checked >= 125, "{checked} boiling points checked");
}

#[test]
fn every_fluid_melts_where_a_second_table_says() {
    let mut checked = 0;
    for (id, _, melting) in table() {
        let Some((printed, tolerance, source)) = melting else {
            continue;
        };
        let found = fluid(&id).melting_point().value;
        // The file's own source rounds as well: half of a tenth.
        assert!(
            (found - printed).abs() <= tolerance + 0.05,
            "{id}: {found:.3} K against {printed} K, {source}"
        );
        checked += 1;
    }
    assert!(checked >= 120, "{checked} melting points checked");
}

#[test]
fn the_table_holds_every_fluid() {
    let listed: Vec<String> = table().into_iter().map(|(id, ..)| id).collect();
    let catalog = Catalog::built_in();
    for id in catalog.ids() {
        assert!(listed.iter().any(|known| known == id), "no row for {id}");
    }
}
