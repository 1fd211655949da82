//! The pictures as tables: tab-separated values, units in the header, for a spreadsheet.

use std::fmt::Write as _;

use crate::assess::{Assessment, Charts};
use crate::units::{Kind, Pressure, Unit, Units, figures};
use crate::words;

/// Boundaries of the charge map, one point a row.
pub(super) fn charge_map(charts: &Charts, units: &Units) -> String {
    let mass = units.unit_for(Kind::Mass, charts.greatest_mass.kilogram());
    let degree = units.unit_for(Kind::Temperature, charts.span.1.kelvin());
    let mut text = format!(
        "boundary\tmass / {}\ttemperature / {}\n",
        mass.symbol, degree.symbol
    );
    let map = &charts.map;
    for (name, line) in [
        ("dry-out", &map.dry_out),
        ("liquid-full", &map.liquid_full),
        ("allowable pressure", &map.allowable),
    ] {
        for point in line {
            let m = number(mass, point.mass.kilogram());
            row(
                &mut text,
                [
                    name.to_owned(),
                    m,
                    number(degree, point.temperature.kelvin()),
                ],
            );
        }
    }
    for (name, t) in [("freezing", map.freezing), ("critical", map.critical)] {
        if let Some(t) = t {
            row(
                &mut text,
                [name.to_owned(), String::new(), number(degree, t.kelvin())],
            );
        }
    }
    text
}

/// Every line of the pressure picture over the same temperatures.
pub(super) fn pressure(a: &Assessment, charts: &Charts, units: &Units) -> String {
    let greatest = charts
        .limits
        .iter()
        .filter_map(|p| p.saturation)
        .map(Pressure::pascal)
        .fold(1e5, f64::max);
    let unit = units.unit_for(Kind::Pressure, greatest);
    let degree = units.unit_for(Kind::Temperature, charts.span.1.kelvin());
    let mut text = format!(
        "temperature / {}\tsaturation / {p} abs\tthis unit / {p} abs\tregime\tallowable / {p} abs\tburst / {p} abs\n",
        degree.symbol,
        p = unit.symbol
    );
    let shown = |p: Option<Pressure>| p.map_or_else(String::new, |p| number(unit, p.pascal()));
    for point in &charts.limits {
        let state = a
            .corners
            .as_ref()
            .ok()
            .and_then(|corners| corners.nominal.state(point.temperature).ok());
        row(
            &mut text,
            [
                number(degree, point.temperature.kelvin()),
                shown(point.saturation),
                shown(state.map(|state| state.pressure)),
                state
                    .map_or("", |state| words::regime(state.regime))
                    .to_owned(),
                shown(point.allowable),
                shown(point.burst),
            ],
        );
    }
    text
}

/// The sealed unit's liquid share over temperature.
pub(super) fn liquid_share(charts: &Charts, units: &Units) -> String {
    let degree = units.unit_for(Kind::Temperature, charts.span.1.kelvin());
    let percent = units.unit_for(Kind::Ratio, 1.0);
    let mut text = format!(
        "temperature / {}\tliquid share of volume / %\tvapour share of mass / %\tregime\n",
        degree.symbol
    );
    let share = |share: Option<f64>| share.map_or_else(String::new, |share| number(percent, share));
    for point in &charts.path {
        let state = point.state.as_ref().ok();
        row(
            &mut text,
            [
                number(degree, point.temperature.kelvin()),
                share(state.and_then(|s| s.liquid_share)),
                share(state.and_then(|s| s.quality)),
                state.map_or("", |s| words::regime(s.regime)).to_owned(),
            ],
        );
    }
    text
}

fn number(unit: &Unit, si: f64) -> String {
    figures(unit.number_of(si), 6)
}

fn row<const N: usize>(text: &mut String, cells: [String; N]) {
    for (i, cell) in cells.iter().enumerate() {
        let end = if i + 1 == N { '\n' } else { '\t' };
        write!(text, "{cell}{end}").expect("writing to a string");
    }
}
