//! What each figure of a fluid's file must keep to, by the name it stands under.
//!
//! Keys wear their unit, so one rule holds for every form that has the key, and a figure
//! that breaks it is refused where it stands in the text.

use std::collections::HashMap;

use crate::text::{TextError, scan};

/// More would take minutes to evaluate; the longest equations have some 600.
const MOST_NUMBERS: usize = 5_000;

/// A key, or its end; least and greatest allowed; whether the least itself is.
const LIMITS: &[(&str, f64, f64, bool)] = &[
    // A mass in grams per mole is a thousand times too large: lightest H2, heaviest oils.
    ("molar_mass_kg_per_mol", 0.001, 2.0, true),
    // 8.314 in every edition of it.
    ("gas_constant_j_per_mol_k", 8.3, 8.33, true),
    ("gas_constant", 8.3, 8.33, true),
    ("acentric_factor", -1.0, 3.0, true),
    ("uncertainty_percent", 0.0, 100.0, true),
    // Fractions, not per cent.
    ("lower_flammable_limit", 0.0, 1.0, false),
    ("upper_flammable_limit", 0.0, 1.0, false),
    ("_ppm", 0.0, 1e6, false),
    ("gwp_100", 0.0, 1e6, true),
    ("temperature_k", 0.0, 1e5, false),
    ("range_k", 0.0, 1e5, false),
    ("point_k", 0.0, 1e5, false),
    ("autoignition_k", 0.0, 1e5, false),
    ("t0_k", 0.0, 1e5, false),
    ("_pa", 0.0, 1e12, false),
    ("density_kg_per_m3", 0.0, 1e6, false),
    ("density_mol_per_m3", 0.0, 1e6, false),
];

/// Blocks in which all lists run in parallel.
const PARALLEL: &[&str] = &[
    "model.residual[",
    "model.ideal[",
    "model.ancillary.",
    "model.vapour_pressure",
    "model.liquid_density",
    "surface_tension",
];

/// Checks the figures of a fluid's file one by one.
///
/// # Errors
/// The first that breaks its rule, with its place.
pub fn check(text: &str) -> Result<(), TextError> {
    let mut page = Page::default();
    scan::walk(text, |path, _, value| page.take(path, value));
    page.lists_run_in_parallel();
    page.flammable_limits_rise();
    if page.numbers.len() > MOST_NUMBERS {
        let what = format!(
            "at most {MOST_NUMBERS} numbers are read, not {}",
            page.numbers.len()
        );
        page.refuse("model", what);
    }
    match page.refusal {
        Some((path, what)) => Err(TextError::about(text, &path, what)),
        None => Ok(()),
    }
}

#[derive(Default)]
struct Page {
    /// In the order of the text.
    numbers: Vec<(String, f64)>,
    lists: Vec<String>,
    lengths: HashMap<String, usize>,
    refusal: Option<(String, String)>,
}

impl Page {
    fn refuse(&mut self, path: &str, what: String) {
        self.refusal.get_or_insert_with(|| (path.to_owned(), what));
    }

    fn take(&mut self, path: &str, value: &str) {
        if let Some((list, _)) = path
            .strip_suffix(']')
            .and_then(|path| path.rsplit_once('['))
        {
            *self.lengths.entry(list.to_owned()).or_default() += 1;
        }
        if value.starts_with('[') {
            self.lists.push(path.to_owned());
        } else if value.starts_with('"') {
            if value.trim_matches('"').trim().is_empty() {
                self.refuse(path, "must not be empty".to_owned());
            }
        } else if let Some(number) = number(value) {
            self.number(path, value, number);
        }
    }

    fn number(&mut self, path: &str, value: &str, number: f64) {
        if !number.is_finite() {
            self.refuse(path, format!("{value} is not a finite number"));
        }
        let key = key(path);
        // The longest name first: an exact key before a mere ending.
        let rule = LIMITS
            .iter()
            .filter(|(name, ..)| key == *name || (name.contains('_') && key.ends_with(name)))
            .max_by_key(|(name, ..)| name.len());
        if let Some((_, least, greatest, least_allowed)) = rule {
            let is_low = number < *least || (number == *least && !least_allowed);
            if is_low || number > *greatest {
                let from = if *least_allowed { "from" } else { "above" };
                let what =
                    format!("{value} is outside what is allowed, {from} {least} to {greatest}");
                self.refuse(path, what);
            }
        }
        if let Some(range) = path.strip_suffix("[1]")
            && range.ends_with("range_k")
            && let Some((_, low)) = self.numbers.last()
            && *low >= number
        {
            self.refuse(range, format!("must rise, not {low} to {number}"));
        }
        self.numbers.push((path.to_owned(), number));
    }

    fn lists_run_in_parallel(&mut self) {
        let mut first: HashMap<String, (String, usize)> = HashMap::new();
        for list in std::mem::take(&mut self.lists) {
            let Some((block, name)) = list.rsplit_once('.') else {
                continue;
            };
            if !PARALLEL.iter().any(|parallel| block.starts_with(parallel)) {
                continue;
            }
            let length = self.lengths.get(&list).copied().unwrap_or(0);
            let (leader, wanted) = first
                .entry(block.to_owned())
                .or_insert_with(|| (name.to_owned(), length));
            if length != *wanted {
                let what = format!("has {length} entries, where {leader} has {wanted}");
                self.refuse(&list, what);
            }
        }
    }

    fn flammable_limits_rise(&mut self) {
        let of = |name: &str| {
            let path = format!("safety.{name}.value");
            let found = self.numbers.iter().find(|(known, _)| *known == path);
            found.map(|(_, number)| *number)
        };
        if let (Some(lower), Some(upper)) =
            (of("lower_flammable_limit"), of("upper_flammable_limit"))
            && lower >= upper
        {
            let what = format!("{upper} is not above the lower limit, {lower}");
            self.refuse("safety.upper_flammable_limit", what);
        }
    }
}

/// The name a figure stands under: without `.value` and without indices.
fn key(path: &str) -> &str {
    let path = path.strip_suffix(".value").unwrap_or(path);
    let name = path.rsplit('.').next().unwrap_or(path);
    name.split('[').next().unwrap_or(name)
}

/// A number as RON writes it.
fn number(value: &str) -> Option<f64> {
    let starts = |c: char| c.is_ascii_digit() || matches!(c, '-' | '+' | '.');
    let is_word = matches!(value, "NaN" | "inf");
    if !is_word && !value.starts_with(starts) {
        return None;
    }
    value.replace('_', "").parse().ok()
}
