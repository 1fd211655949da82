//! The catalogue: every fluid compiled in, listed by its index and read on first use, and
//! the user's own beside them.

use std::borrow::Cow;
use std::sync::{Arc, LazyLock, OnceLock};

use super::entry::Entry;
use super::{Fluid, asset};
use crate::text::folded;

include!(concat!(env!("OUT_DIR"), "/fluid_files.rs"));

/// All fluids that a design can name.
#[derive(Debug, Clone)]
pub struct Catalog {
    built_in: Arc<[Slot]>,
    own: Vec<Arc<Fluid>>,
}

#[derive(Debug)]
struct Slot {
    entry: &'static Entry,
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

/// A user's own fluid answers to a name that another fluid has.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
#[error(
    "“{name}” is already a name of {by}{}: give the fluid of this file another id, name and CAS number, or take the file away",
    .by_file.as_ref().map_or_else(|| ", a fluid of this program".to_owned(), |file| format!(" in {file}"))
)]
pub struct NameTaken {
    /// Field of the file that is refused.
    pub field: String,
    pub name: String,
    /// Id of the fluid that has the name, and its file where it is the user's own.
    pub by: String,
    pub by_file: Option<String>,
}

impl Catalog {
    /// The fluids that come with the program.
    pub fn built_in() -> Self {
        static SLOTS: LazyLock<Arc<[Slot]>> = LazyLock::new(|| {
            FLUID_INDEX
                .iter()
                .zip(FLUID_FILES)
                .map(|(entry, (_, text))| Slot {
                    entry,
                    text,
                    fluid: OnceLock::new(),
                })
                .collect()
        });
        Self {
            built_in: Arc::clone(&SLOTS),
            own: Vec::new(),
        }
    }

    /// Takes in a user's own fluid.
    ///
    /// # Errors
    /// [`NameTaken`] where another fluid here answers to one of its names.
    pub fn add(&mut self, fluid: Fluid) -> Result<(), NameTaken> {
        for (field, name) in fluid.entry().names() {
            let wanted = folded(name);
            if let Some(by) = self.entries().find(|known| answers_to(known, &wanted)) {
                return Err(NameTaken {
                    field,
                    name: name.to_owned(),
                    by: by.id().to_owned(),
                    by_file: by.own_file().map(str::to_owned),
                });
            }
        }
        self.own.push(Arc::new(fluid));
        Ok(())
    }

    /// The fluid with this id.
    pub fn by_id(&self, id: &str) -> Option<Arc<Fluid>> {
        self.first(|entry| entry.id() == id)
    }

    /// The fluid that answers to an id, a CAS number, a refrigerant number or a name;
    /// no other is read.
    ///
    /// # Errors
    /// [`UnknownFluid`], with the nearest name that is known.
    pub fn find(&self, name: &str) -> Result<Arc<Fluid>, UnknownFluid> {
        let wanted = folded(name);
        if let Some(fluid) = self
            .by_id(name)
            .or_else(|| self.first(|entry| answers_to(entry, &wanted)))
        {
            return Ok(fluid);
        }
        let near = self
            .entries()
            .flat_map(|entry| [entry.id(), entry.name()])
            .map(|known| (distance(&folded(known), &wanted), known))
            .min_by_key(|(distance, _)| *distance)
            .filter(|(distance, _)| *distance <= 1 + wanted.chars().count() / 4)
            .map(|(_, known)| known.to_owned());
        Err(UnknownFluid {
            name: name.to_owned(),
            near,
        })
    }

    /// Every fluid, read: the built-in ones by id, then the user's own.
    pub fn iter(&self) -> impl Iterator<Item = Arc<Fluid>> + '_ {
        let own = self.own.iter().map(Arc::clone);
        self.built_in.iter().map(Slot::get).chain(own)
    }

    /// What lists show of every fluid, in the order of [`Self::iter`]; reads nothing.
    pub fn entries(&self) -> impl Iterator<Item = &Entry> {
        let own = self.own.iter().map(|fluid| fluid.entry());
        self.built_in.iter().map(|slot| slot.entry).chain(own)
    }

    /// Ids only; reads nothing.
    pub fn ids(&self) -> impl Iterator<Item = &str> {
        self.entries().map(Entry::id)
    }

    /// Reads what is not read yet and builds its saturation curve, fluid after fluid: for
    /// a thread in the background. A fluid asked for meanwhile is read at once.
    pub fn read_all(&self) {
        for fluid in self.iter() {
            // A curve that cannot be built says so to whoever asks for it.
            let _ = fluid.curve();
        }
    }

    /// The fluids that are read and have their saturation curve, in the order of
    /// [`Self::iter`]; reads nothing.
    pub fn ready(&self) -> impl Iterator<Item = Arc<Fluid>> + '_ {
        let built_in = self.built_in.iter().filter_map(|slot| slot.fluid.get());
        built_in
            .chain(&self.own)
            .filter(|fluid| fluid.has_curve())
            .map(Arc::clone)
    }

    fn first(&self, is_it: impl Fn(&Entry) -> bool) -> Option<Arc<Fluid>> {
        let built_in = self.built_in.iter().find(|slot| is_it(slot.entry));
        let own = || self.own.iter().find(|fluid| is_it(fluid.entry()));
        built_in.map(Slot::get).or_else(|| own().map(Arc::clone))
    }
}

impl Slot {
    fn get(&self) -> Arc<Fluid> {
        let read =
            || Arc::new(asset::parse(self.text).expect("a test parses every fluid compiled in"));
        Arc::clone(self.fluid.get_or_init(read))
    }
}

fn answers_to(entry: &Entry, wanted: &str) -> bool {
    entry.names().any(|(_, name)| folded(name) == wanted)
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
    fn the_index_is_what_the_files_say() {
        assert!(FLUID_INDEX.len() >= 16);
        assert_eq!(FLUID_INDEX.len(), FLUID_FILES.len());
        for (entry, (id, text)) in FLUID_INDEX.iter().zip(FLUID_FILES) {
            let fluid = asset::parse(text).unwrap_or_else(|e| panic!("{id}: {e}"));
            assert_eq!(entry.id(), *id, "the file's name is its id");
            assert_eq!(*entry, Entry::of(&fluid), "{id}");
            let safety = fluid.safety();
            assert_eq!(entry.is_flammable(), safety.is_flammable(), "{id}");
            assert_eq!(entry.is_toxic(), safety.is_toxic(), "{id}");
            assert_eq!(entry.is_corrosive(), safety.is_corrosive(), "{id}");
        }
    }

    #[test]
    fn every_fluid_is_found_by_each_of_its_names_and_no_two_share_one() {
        let catalog = Catalog::built_in();
        for entry in FLUID_INDEX {
            for (field, name) in entry.names() {
                let found = catalog.find(name).expect(name);
                assert_eq!(found.id(), entry.id(), "{field} “{name}”");
            }
        }
        assert_eq!(catalog.find("R134a").expect("spelling").id(), "r-134a");
        let near = catalog.find("watr").expect_err("misspelt");
        assert_eq!(near.near.as_deref(), Some("water"));
    }

    #[test]
    fn finding_one_fluid_reads_no_other() {
        // Slots of its own: the shared ones are read by other tests.
        let slots = FLUID_INDEX.iter().zip(FLUID_FILES);
        let catalog = Catalog {
            built_in: slots
                .map(|(entry, (_, text))| Slot {
                    entry,
                    text,
                    fluid: OnceLock::new(),
                })
                .collect(),
            own: Vec::new(),
        };
        let read = |catalog: &Catalog| {
            let read = catalog.built_in.iter().filter(|s| s.fluid.get().is_some());
            read.count()
        };
        catalog.find("no such fluid").expect_err("unknown");
        assert_eq!(catalog.entries().count(), FLUID_INDEX.len());
        assert_eq!(read(&catalog), 0);
        assert_eq!(catalog.find("811-97-2").expect("known").id(), "r-134a");
        assert_eq!(read(&catalog), 1);
        catalog.read_all();
        assert_eq!(read(&catalog), FLUID_INDEX.len());
    }
}
