//! The set of materials at hand: those compiled in, and a user's own.

use std::sync::Arc;

use super::material::Material;
use crate::text::folded;

include!(concat!(env!("OUT_DIR"), "/material_files.rs"));

/// Materials by id, in order of id; cheap to clone.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Materials(Vec<Arc<Material>>);

/// Why a material file is of no use.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum MaterialError {
    #[error("material file {file} does not parse")]
    Parse {
        file: String,
        #[source]
        cause: Box<ron::error::SpannedError>,
    },
    #[error("material file {file} has the id {id}: they must be alike")]
    IdDiffers { file: String, id: String },
}

/// A user's own material answers to a name that another material has.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
#[error(
    "“{name}” is already a name of {by}{}: give the material of this file another id, name and designation, or take the file away",
    .by_file.as_ref().map_or_else(|| ", a material of this program".to_owned(), |file| format!(" in {file}"))
)]
pub struct MaterialNameTaken {
    /// Field of the file that is refused.
    pub field: String,
    pub name: String,
    /// Id of the material that has the name, and its file where it is the user's own.
    pub by: String,
    pub by_file: Option<String>,
}

impl Materials {
    /// The materials compiled in.
    ///
    /// # Panics
    /// Never: a test parses the same files.
    pub fn built_in() -> Self {
        Self::from_files(MATERIAL_FILES).expect("the files compiled in parse, as a test shows")
    }

    /// From (id, text) of each file.
    ///
    /// # Errors
    /// [`MaterialError`] names the first file that is of no use.
    pub fn from_files(files: &[(&str, &str)]) -> Result<Self, MaterialError> {
        let mut materials = Self::default();
        for (file, text) in files {
            materials.insert(parse(file, text)?);
        }
        Ok(materials)
    }

    /// Takes in a user's own material.
    ///
    /// # Errors
    /// [`MaterialNameTaken`] where another material here answers to one of its names.
    pub fn add(&mut self, material: Material) -> Result<(), MaterialNameTaken> {
        for (field, name) in material.names() {
            let wanted = folded(name);
            let has_it = |known: &&Arc<Material>| known.names().any(|(_, n)| folded(n) == wanted);
            if let Some(by) = self.0.iter().find(has_it) {
                return Err(MaterialNameTaken {
                    field,
                    name: name.to_owned(),
                    by: by.id.clone(),
                    by_file: by.own_file().map(|own| own.name.clone()),
                });
            }
        }
        self.insert(material);
        Ok(())
    }

    /// Adds a material, or replaces the one with its id.
    pub fn insert(&mut self, material: Material) {
        match self.position(&material.id) {
            Ok(at) => self.0[at] = Arc::new(material),
            Err(at) => self.0.insert(at, Arc::new(material)),
        }
    }

    pub fn get(&self, id: &str) -> Option<&Arc<Material>> {
        self.position(id).ok().map(|at| &self.0[at])
    }

    pub fn iter(&self) -> impl ExactSizeIterator<Item = &Arc<Material>> {
        self.0.iter()
    }

    fn position(&self, id: &str) -> Result<usize, usize> {
        self.0
            .binary_search_by(|material| material.id.as_str().cmp(id))
    }
}

fn parse(file: &str, text: &str) -> Result<Material, MaterialError> {
    let material: Material = ron::from_str(text).map_err(|cause| MaterialError::Parse {
        file: file.to_owned(),
        cause: Box::new(cause),
    })?;
    if material.id != file {
        return Err(MaterialError::IdDiffers {
            file: file.to_owned(),
            id: material.id,
        });
    }
    Ok(material)
}

#[cfg(test)]
mod tests {
    use super::super::curve::Strength;
    use super::super::material::{AfterAnnealing, MaterialKind, Metal};
    use super::super::part::HeatTreatment;
    use super::*;
    use crate::units::{Kind, parse_si, unit_named};

    const COPPER: &str = "copper-c12200-annealed";

    fn metal(id: &str) -> Metal {
        match &Materials::built_in().get(id).expect(id).kind {
            MaterialKind::Metal(metal) => metal.as_ref().clone(),
            MaterialKind::Glass(_) => panic!("{id} is glass"),
        }
    }

    fn text_of(id: &str) -> &'static str {
        MATERIAL_FILES
            .iter()
            .find(|(file, _)| *file == id)
            .expect(id)
            .1
    }

    /// Parses a built-in file with `from` replaced.
    fn spoilt(id: &str, from: &str, to: &str) -> String {
        let text = text_of(id);
        assert!(text.contains(from), "{from}");
        match parse(id, &text.replace(from, to)) {
            Err(MaterialError::Parse { cause, .. }) => cause.to_string(),
            other => panic!("{other:?}"),
        }
    }

    #[test]
    fn the_files_compiled_in_parse_and_survive_being_embedded_in_a_design() {
        let materials = Materials::from_files(MATERIAL_FILES).expect("parses");
        assert_eq!(materials.iter().len(), MATERIAL_FILES.len());
        assert!(MATERIAL_FILES.len() >= 15, "{}", MATERIAL_FILES.len());
        for (id, _) in MATERIAL_FILES {
            let material = materials.get(id).expect(id);
            let text = ron::to_string(material.as_ref()).expect("writes");
            assert_eq!(
                ron::from_str::<Material>(&text).as_ref(),
                Ok(material.as_ref()),
                "{id}"
            );
        }
        assert_eq!(materials.get("unobtainium"), None);
    }

    #[test]
    fn a_file_without_source_or_with_impossible_values_does_not_parse() {
        assert!(
            spoilt(COPPER, "value: 117e9, source: ", "value: 117e9, origin: ").contains("origin")
        );
        assert!(spoilt(COPPER, "value: 117e9", "value: 0").contains("above 0"));
        assert!(spoilt(COPPER, "value: 0.34", "value: 0.5").contains("0.5"));
        assert!(spoilt(COPPER, "338.705556", "300.0").contains("must rise"));
        assert!(spoilt(COPPER, "35163262.1952", "-1").contains("above 0"));
        assert!(spoilt(COPPER, "name: ", "colour: \"red\", name: ").contains("colour"));
        let renamed = parse("copper", text_of(COPPER));
        assert!(
            matches!(renamed, Err(MaterialError::IdDiffers { .. })),
            "{renamed:?}"
        );
    }

    /// Allowable stress in psi over °F, as printed.
    /// Source: Copper Tube Handbook, table 3c, Copper Development Association.
    #[test]
    fn copper_stresses_are_the_printed_psi() {
        let check = |id: &str, printed: &[(&str, &str)]| {
            let Some(Strength::OverTemperature(curve)) = metal(id).as_supplied.code_stress else {
                panic!("a curve");
            };
            assert_eq!(curve.points().len(), printed.len());
            for (&(k, pa), (fahrenheit, psi)) in curve.points().iter().zip(printed) {
                let si = |text, kind| parse_si(text, kind, unit_named(kind, "K"));
                let t = si(fahrenheit, Kind::Temperature).expect("a temperature");
                let s =
                    parse_si(psi, Kind::Pressure, unit_named(Kind::Pressure, "psi")).expect("psi");
                assert!(
                    (k - t).abs() < 1e-6 && (pa - s).abs() < 1e-3,
                    "{fahrenheit} {psi}"
                );
            }
        };
        check(
            COPPER,
            &[
                ("100 °F", "6000"),
                ("150 °F", "5100"),
                ("200 °F", "4900"),
                ("250 °F", "4800"),
                ("300 °F", "4700"),
                ("350 °F", "4000"),
                ("400 °F", "3000"),
            ],
        );
        check(
            "copper-c12200-drawn",
            &[
                ("100 °F", "10300"),
                ("250 °F", "10300"),
                ("300 °F", "10000"),
                ("350 °F", "9700"),
                ("400 °F", "9400"),
            ],
        );
    }

    #[test]
    fn heat_turns_drawn_copper_into_annealed() {
        let (drawn, annealed) = (metal("copper-c12200-drawn"), metal(COPPER));
        assert_eq!(
            drawn.after_annealing,
            AfterAnnealing::Becomes(annealed.as_supplied.clone())
        );
        for treatment in HeatTreatment::ALL {
            let expected = match treatment {
                HeatTreatment::AsSupplied => &drawn.as_supplied,
                _ => &annealed.as_supplied,
            };
            assert_eq!(drawn.condition(treatment), Some(expected), "{treatment:?}");
            assert_eq!(annealed.condition(treatment), Some(&annealed.as_supplied));
        }
    }

    #[test]
    fn welded_6061_has_its_own_values_and_brazed_6061_has_none() {
        let metal = metal("aluminium-6061-t6");
        assert_eq!(
            metal.condition(HeatTreatment::Welded),
            metal.after_welding.as_ref()
        );
        assert!(metal.after_welding.is_some());
        assert_eq!(metal.condition(HeatTreatment::Brazed), None);
    }

    /// A sound weld in these keeps the least values of the metal; what a furnace leaves
    /// is not known.
    #[test]
    fn welded_steel_and_titanium_are_as_supplied_and_brazed_ones_unknown() {
        for id in ["carbon-steel-p235gh", "titanium-grade-2"] {
            let metal = metal(id);
            assert_eq!(metal.after_welding.as_ref(), Some(&metal.as_supplied));
            assert_eq!(metal.condition(HeatTreatment::Brazed), None, "{id}");
        }
    }

    #[test]
    fn glass_takes_half_in_the_flame_and_a_tenth_of_short_term_strength_at_most() {
        let materials = Materials::built_in();
        // Soda-lime and quartz: a tenth of 45 and 48 MPa is less than what is permissible.
        for (id, whole_pa, flamed_pa) in [
            ("borosilicate-3.3", 7e6, 3.5e6),
            ("soda-lime", 4.5e6, 3e6),
            ("fused-quartz", 4.8e6, 3.445e6),
        ] {
            let glass = materials.get(id).and_then(|material| material.glass());
            let glass = glass.expect("glass");
            assert_eq!(
                (
                    glass.permissible_pa(false, false),
                    glass.permissible_pa(true, false)
                ),
                (whole_pa, flamed_pa),
                "{id}"
            );
        }
    }
}
