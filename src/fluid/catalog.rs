//! The catalogue: every fluid compiled in, read on first use.

use std::sync::{Arc, LazyLock, OnceLock};

use super::{Fluid, asset};

include!(concat!(env!("OUT_DIR"), "/fluid_files.rs"));

/// All fluids that a design can name; immutable once made.
#[derive(Debug, Clone)]
pub struct Catalog {
    slots: Arc<[Slot]>,
}

#[derive(Debug)]
struct Slot {
    id: &'static str,
    text: &'static str,
    fluid: OnceLock<Arc<Fluid>>,
}

/// No fluid answers to this name.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
#[error("“{name}” is no fluid here{}", .near.as_ref().map(|near| format!(": did you mean {near}?")).unwrap_or_default())]
pub struct UnknownFluid {
    pub name: String,
    pub near: Option<String>,
}

impl Catalog {
    /// The fluids that come with the program.
    pub fn built_in() -> Self {
        static SLOTS: LazyLock<Arc<[Slot]>> = LazyLock::new(|| {
            FLUID_FILES
                .iter()
                .map(|(id, text)| Slot {
                    id,
                    text,
                    fluid: OnceLock::new(),
                })
                .collect()
        });
        Self {
            slots: Arc::clone(&SLOTS),
        }
    }

    /// The fluid with this id.
    pub fn by_id(&self, id: &str) -> Option<Arc<Fluid>> {
        self.slots.iter().find(|slot| slot.id == id).map(Slot::get)
    }

    /// The fluid that answers to an id, a CAS number, a refrigerant number or a name.
    ///
    /// # Errors
    /// [`UnknownFluid`], with the nearest name that is known.
    pub fn find(&self, name: &str) -> Result<Arc<Fluid>, UnknownFluid> {
        let wanted = folded(name);
        if let Some(fluid) = self
            .by_id(name)
            .or_else(|| self.iter().find(|fluid| answers_to(fluid, &wanted)))
        {
            return Ok(fluid);
        }
        let near = self
            .iter()
            .flat_map(|fluid| [fluid.id().to_owned(), fluid.name().to_owned()])
            .map(|known| (distance(&folded(&known), &wanted), known))
            .min_by_key(|(distance, _)| *distance)
            .filter(|(distance, _)| *distance <= 1 + wanted.chars().count() / 4)
            .map(|(_, known)| known);
        Err(UnknownFluid {
            name: name.to_owned(),
            near,
        })
    }

    /// Every fluid, by id.
    pub fn iter(&self) -> impl Iterator<Item = Arc<Fluid>> + '_ {
        self.slots.iter().map(Slot::get)
    }

    /// Ids only; parses nothing.
    pub fn ids(&self) -> impl Iterator<Item = &'static str> + '_ {
        self.slots.iter().map(|slot| slot.id)
    }
}

impl Slot {
    fn get(&self) -> Arc<Fluid> {
        let read =
            || Arc::new(asset::parse(self.text).expect("a test parses every fluid compiled in"));
        Arc::clone(self.fluid.get_or_init(read))
    }
}

fn answers_to(fluid: &Fluid, wanted: &str) -> bool {
    let names = [fluid.id(), fluid.name(), fluid.cas()];
    names
        .into_iter()
        .chain(fluid.refrigerant())
        .any(|name| folded(name) == wanted)
        || fluid.also().iter().any(|name| folded(name) == wanted)
}

/// Case, spaces and hyphens do not tell fluids apart: "R134a", "r-134a".
fn folded(name: &str) -> String {
    name.chars()
        .filter(|c| !matches!(c, ' ' | '-' | '_'))
        .flat_map(char::to_lowercase)
        .collect()
}

/// Number of single-letter edits between two words (Levenshtein).
fn distance(a: &str, b: &str) -> usize {
    let b: Vec<char> = b.chars().collect();
    let mut row: Vec<usize> = (0..=b.len()).collect();
    for (i, x) in a.chars().enumerate() {
        let mut diagonal = row[0];
        row[0] = i + 1;
        for (j, y) in b.iter().enumerate() {
            let next = (diagonal + usize::from(x != *y))
                .min(row[j] + 1)
                .min(row[j + 1] + 1);
            diagonal = row[j + 1];
            row[j + 1] = next;
        }
    }
    row[b.len()]
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_fluid_compiled_in_parses_and_is_found_by_its_names() {
        let catalog = Catalog::built_in();
        assert!(catalog.ids().count() >= 16);
        for (id, text) in FLUID_FILES {
            let fluid = asset::parse(text).unwrap_or_else(|e| panic!("{id}: {e}"));
            assert_eq!(fluid.id(), *id);
            assert_eq!(catalog.find(fluid.cas()).expect(id).id(), *id);
            if let Some(number) = fluid.refrigerant() {
                assert_eq!(catalog.find(number).expect(id).id(), *id);
            }
        }
        assert_eq!(catalog.find("R134a").expect("spelling").id(), "r-134a");
        let near = catalog.find("watr").expect_err("misspelt");
        assert_eq!(near.near.as_deref(), Some("water"));
    }
}
