//! Reading the reference tables of tests/reference: `#` comments, a header, rows.

use std::path::{Path, PathBuf};

/// One row: a name and numbers.
pub struct Row {
    pub name: String,
    pub values: Vec<f64>,
}

pub fn reference(file: &str) -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR"))
        .join("tests/reference")
        .join(file)
}

/// Rows of a table whose first column is a name.
pub fn rows(file: &str) -> Vec<Row> {
    let text = std::fs::read_to_string(reference(file)).expect(file);
    let rows: Vec<Row> = text
        .lines()
        .filter(|line| !line.starts_with('#') && !line.trim().is_empty())
        .skip(1)
        .map(|line| {
            let mut cells = line.split(',');
            let name = cells.next().expect("a name").to_owned();
            let values = cells.map(|cell| cell.parse().expect(line)).collect();
            Row { name, values }
        })
        .collect();
    assert!(!rows.is_empty(), "{file} holds no rows");
    rows
}

/// Largest relative error seen in each column, with where it was.
#[derive(Default)]
pub struct Worst {
    columns: Vec<(&'static str, f64, String)>,
}

impl Worst {
    pub fn see(
        &mut self,
        column: &'static str,
        found: f64,
        expected: f64,
        place: impl Fn() -> String,
    ) {
        let error = ((found - expected) / expected).abs();
        let error = if error.is_nan() { f64::INFINITY } else { error };
        match self.columns.iter_mut().find(|(name, _, _)| *name == column) {
            Some(entry) if entry.1 >= error => {}
            Some(entry) => *entry = (column, error, place()),
            None => self.columns.push((column, error, place())),
        }
    }

    /// Prints what was seen and fails where a column is beyond the tolerance.
    pub fn check(&self, title: &str, tolerance: f64) {
        for (column, error, place) in &self.columns {
            println!("{title}: {column} within {error:.1e} (at {place})");
        }
        for (column, error, place) in &self.columns {
            assert!(
                *error <= tolerance,
                "{title}: {column} is off by {error:.2e} at {place}"
            );
        }
    }
}
