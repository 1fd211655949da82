//! Fluid and wall as a pair: what the fluid does to the material.

use std::collections::HashMap;
use std::sync::LazyLock;

use serde::Deserialize;

use crate::source::Source;

include!(concat!(env!("OUT_DIR"), "/compatibility_files.rs"));

/// How a pair gets on.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Deserialize)]
pub enum Verdict {
    /// Long experience is good.
    Good,
    /// Needs care: the reason says which.
    Caution,
    /// Corrodes, gasses or reacts: never.
    Never,
}

/// What is known of one pair.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Compatibility {
    /// Ids of fluids.
    fluids: Vec<String>,
    /// Beginnings of material ids: `copper` holds for each copper.
    materials: Vec<String>,
    pub verdict: Verdict,
    pub reason: String,
    pub source: Source,
}

/// The table compiled in.
#[derive(Debug, Clone, PartialEq)]
pub struct CompatibilityTable {
    rows: Vec<Compatibility>,
    /// Rows that name a fluid, by its id: the ranking asks for every fluid.
    of_fluid: HashMap<String, Vec<usize>>,
}

impl CompatibilityTable {
    /// The table that comes with the program.
    pub fn built_in() -> &'static Self {
        static TABLE: LazyLock<CompatibilityTable> = LazyLock::new(|| {
            let rows =
                |text| ron::from_str::<Vec<Compatibility>>(text).expect("a test parses the table");
            let rows: Vec<_> = COMPATIBILITY_FILES
                .iter()
                .flat_map(|(_, text)| rows(text))
                .collect();
            let mut of_fluid: HashMap<String, Vec<usize>> = HashMap::new();
            for (index, row) in rows.iter().enumerate() {
                for id in &row.fluids {
                    of_fluid.entry(id.clone()).or_default().push(index);
                }
            }
            CompatibilityTable { rows, of_fluid }
        });
        &TABLE
    }

    /// What is known of a pair; the worst verdict where several rows hold.
    pub fn of(&self, fluid: &str, material: &str) -> Option<&Compatibility> {
        let rank = |verdict| match verdict {
            Verdict::Good => 0,
            Verdict::Caution => 1,
            Verdict::Never => 2,
        };
        self.of_fluid
            .get(fluid)?
            .iter()
            .map(|index| &self.rows[*index])
            .filter(|row| {
                let mut materials = row.materials.iter();
                materials.any(|id| material.starts_with(id.as_str()))
            })
            .max_by_key(|row| rank(row.verdict))
    }

    /// Every fluid id the table names.
    pub fn fluids(&self) -> impl Iterator<Item = &str> {
        self.of_fluid.keys().map(String::as_str)
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::chamber::Materials;
    use crate::fluid::Catalog;

    /// A row of a metal that no file has would never be read.
    #[test]
    fn every_row_holds_for_a_material_that_comes_with_the_program() {
        let materials = Materials::built_in();
        for row in &CompatibilityTable::built_in().rows {
            for beginning in &row.materials {
                let known = materials
                    .iter()
                    .any(|known| known.id.starts_with(beginning));
                assert!(known, "{beginning} with {:?}", row.fluids);
            }
        }
    }

    /// Consensus of the heat-pipe handbooks (from memory of Reay and Kew, Faghri).
    #[test]
    fn the_pairs_everybody_must_get_right() {
        let table = CompatibilityTable::built_in();
        let verdict = |fluid, material| table.of(fluid, material).map(|row| row.verdict);
        assert_eq!(verdict("water", "aluminium-6061-t6"), Some(Verdict::Never));
        assert_eq!(
            verdict("water", "copper-c12200-annealed"),
            Some(Verdict::Good)
        );
        assert_eq!(
            verdict("ammonia", "copper-c12200-drawn"),
            Some(Verdict::Never)
        );
        assert_eq!(verdict("ammonia", "aluminium-6061-t6"), Some(Verdict::Good));
        assert_eq!(
            verdict("dichloromethane", "aluminium-6061-t6"),
            Some(Verdict::Never)
        );
        assert_eq!(
            verdict("methanol", "aluminium-6061-t6"),
            Some(Verdict::Never)
        );
        assert_eq!(verdict("nitrogen", "unobtainium"), None);
    }

    #[test]
    fn every_row_names_fluids_of_the_catalogue() {
        let catalog = Catalog::built_in();
        for id in CompatibilityTable::built_in().fluids() {
            assert!(catalog.by_id(id).is_some(), "{id}");
        }
    }
}
