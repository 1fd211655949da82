//! The table that README links to: every fluid, its model, range and source, how far it was
//! found from what it was held against, and how far to trust it.
//!
//! `CHARGEWRIGHT_BLESS=1 cargo test --test all catalogue_table` writes it again.

use std::fmt::Write as _;
use std::fs;

use chargewright::fluid::{Catalog, Fluid, Model};

use crate::expansions;
use crate::fixed_points;
use crate::second_source;
use crate::tables::{reference, rows};

const HEAD: &str = "\
# The catalogue, fluid by fluid

Written by `tests/all/catalogue_table.rs`; a test fails when it is no longer true.

- *Equation*: a published fundamental equation of state. \"Digits\" is the greatest relative \
deviation of saturation (pressure, both densities, latent heat, slope) from values of sixty \
digits by independent code, up to 0.995 of the critical temperature. \"Looked up\" is how far \
the expansions are from the direct solve at 0.9999 of it, and how much noise the solve itself \
has there.
- *Correlated*: published correlations. \"Second source\" is the greatest deviation from \
the figures that a second publication prints.
- \"Boils\": the computed normal boiling point less the one of a handbook table that is \
independent of the model.
- The last column is what the paper, or the comparison of sources, says. Where it says that \
no statement is at hand, trust it as far as its neighbours.

| fluid | model | range, K | boils, K | largest deviation found | how far to trust it; source |
|---|---|---|---|---|---|
";

/// One significant digit, upwards.
fn about(value: f64) -> String {
    if value == 0.0 {
        return "0".to_owned();
    }
    let decade = value.abs().log10().floor();
    let digit = (value.abs() / 10f64.powf(decade)).ceil();
    let (digit, decade) = if digit >= 10.0 {
        (1.0, decade + 1.0)
    } else {
        (digit, decade)
    };
    format!("{digit:.0}e{decade:.0}")
}

/// The deviation from the table of sixty digits.
fn digits(fluid: &Fluid, table: &[crate::tables::Row]) -> f64 {
    table
        .iter()
        .filter(|row| row.name == fluid.id())
        .fold(0.0, |most: f64, row| {
            let id = fluid.id();
            let at = fluid
                .model()
                .saturation(row.values[0], fluid.molar_mass())
                .expect(id);
            let found = [
                at.pressure_pa,
                at.liquid_kg_per_m3,
                at.vapour_kg_per_m3,
                at.latent_heat_j_per_kg,
                at.slope_pa_per_k,
            ];
            found
                .iter()
                .zip(&row.values[1..])
                .fold(most, |most, (found, exact)| {
                    most.max((found / exact - 1.0).abs())
                })
        })
}

fn table() -> String {
    let exact = rows("saturation.csv");
    let printed = second_source::printed();
    let boiling = fixed_points::boiling_points();
    let mut text = HEAD.to_owned();
    for fluid in Catalog::built_in().iter() {
        let (low, high) = fluid.range();
        let boils = boiling
            .iter()
            .find(|(id, _)| id == fluid.id())
            .map_or(String::new(), |(_, off)| format!("{off:+.2}"));
        let (model, deviation) = match fluid.model() {
            Model::Equation(_) => {
                let top = expansions::curve(&fluid).range_k().1;
                let deviation = format!(
                    "digits {}; looked up {}, noise {}",
                    about(digits(&fluid, &exact)),
                    about(expansions::deviation(&fluid, &[top])),
                    about(expansions::noise(&fluid)),
                );
                ("equation", deviation)
            }
            Model::Correlated(_) => {
                let worst = printed
                    .iter()
                    .filter(|row| row.fluid == fluid.id())
                    .map(|row| (row.deviation_percent(), row.quantity.replace('_', " ")))
                    .max_by(|a, b| a.0.abs().total_cmp(&b.0.abs()));
                let deviation = worst.map_or("no second source".to_owned(), |(off, quantity)| {
                    format!("second source {off:+.1} % ({quantity})")
                });
                ("correlated", deviation)
            }
        };
        let source = fluid
            .model_sources()
            .join("; ")
            .replace('|', "/")
            .replace('\n', " ");
        let trust = fluid.uncertainty().replace('|', "/");
        writeln!(
            text,
            "| {} | {model} | {:.2} to {:.2} | {boils} | {deviation} | {trust} *{source}* |",
            fluid.name(),
            low.kelvin(),
            high.kelvin(),
        )
        .expect("writing to a string");
    }
    text
}

/// Deviations that are rounding depend on the processor's mathematics library: a line may
/// differ in those by a factor of ten, in nothing else.
#[test]
fn the_table_is_what_the_catalogue_says() {
    let path = reference("catalogue.md");
    let found = table();
    if std::env::var_os("CHARGEWRIGHT_BLESS").is_some() {
        fs::write(&path, &found).expect("the table");
    }
    let kept = fs::read_to_string(&path).expect("tests/reference/catalogue.md");
    let plain = |text: &str| -> Vec<String> {
        let is_rounding = |cell: &&str| !cell.trim().starts_with("digits");
        text.lines()
            .map(|line| line.split('|').filter(is_rounding).collect())
            .collect()
    };
    for (found, kept) in plain(&found).iter().zip(plain(&kept)) {
        assert_eq!(
            *found, kept,
            "write the table again, see the head of this file"
        );
    }
    assert_eq!(found.lines().count(), kept.lines().count());
}
