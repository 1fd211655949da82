//! What lists show of a fluid without reading its file.

use std::borrow::Cow;

use super::Fluid;
use super::safety;

/// A fluid in the catalogue's index: its names, its model, what it does to people.
///
/// Those of the built-in fluids are written by `assets/build.rs` from their files.
#[derive(Debug, Clone, PartialEq)]
pub struct Entry {
    pub(super) id: Cow<'static, str>,
    pub(super) name: Cow<'static, str>,
    /// One a line.
    pub(super) also: Cow<'static, str>,
    pub(super) cas: Cow<'static, str>,
    pub(super) refrigerant: Option<Cow<'static, str>>,
    pub(super) formula: Cow<'static, str>,
    pub(super) model_kind: &'static str,
    pub(super) range_k: (f64, f64),
    /// Hazard statement codes, one a line.
    pub(super) statements: Cow<'static, str>,
    /// A flammable range is recorded.
    pub(super) burns: bool,
    pub(super) own_file: Option<String>,
}

impl Entry {
    pub(super) fn of(fluid: &Fluid) -> Self {
        let (low, high) = fluid.range();
        let safety = fluid.safety();
        Self {
            id: fluid.id().to_owned().into(),
            name: fluid.name().to_owned().into(),
            also: fluid.also().join("\n").into(),
            cas: fluid.cas().to_owned().into(),
            refrigerant: fluid.refrigerant().map(|number| number.to_owned().into()),
            formula: fluid.formula().to_owned().into(),
            model_kind: fluid.model_kind(),
            range_k: (low.kelvin(), high.kelvin()),
            statements: safety.statements.value.join("\n").into(),
            burns: safety.lower_flammable_limit.is_some(),
            own_file: fluid.own_file().map(|own| own.name.clone()),
        }
    }

    pub fn id(&self) -> &str {
        &self.id
    }

    pub fn name(&self) -> &str {
        &self.name
    }

    /// Other names it is known by.
    pub fn also(&self) -> impl Iterator<Item = &str> {
        self.also.lines()
    }

    pub fn cas(&self) -> &str {
        &self.cas
    }

    pub fn refrigerant(&self) -> Option<&str> {
        self.refrigerant.as_deref()
    }

    pub fn formula(&self) -> &str {
        &self.formula
    }

    /// Name of the kind of model, in a word.
    pub fn model_kind(&self) -> &'static str {
        self.model_kind
    }

    /// Lowest and highest temperature of the model, K.
    pub fn range_k(&self) -> (f64, f64) {
        self.range_k
    }

    /// File name of the user's own fluid; `None` for one that comes with the program.
    pub fn own_file(&self) -> Option<&str> {
        self.own_file.as_deref()
    }

    /// As [`safety::Safety::is_flammable`].
    pub fn is_flammable(&self) -> bool {
        self.burns && safety::is_classed_flammable(self.statements.lines())
    }

    /// As [`safety::Safety::is_toxic`].
    pub fn is_toxic(&self) -> bool {
        safety::is_classed_toxic(self.statements.lines())
    }

    /// As [`safety::Safety::is_corrosive`].
    pub fn is_corrosive(&self) -> bool {
        safety::is_classed_corrosive(self.statements.lines())
    }

    /// Every name it answers to, with the field of its file.
    pub(super) fn names(&self) -> impl Iterator<Item = (String, &str)> {
        let one = |field: &str, name| (field.to_owned(), name);
        [
            one("id", self.id()),
            one("name", self.name()),
            one("cas", self.cas()),
        ]
        .into_iter()
        .chain(self.refrigerant().map(|name| one("refrigerant", name)))
        .chain(
            self.also()
                .enumerate()
                .map(|(i, name)| (format!("also[{i}]"), name)),
        )
    }
}
