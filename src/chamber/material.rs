//! A wall material: what it bears, by condition and temperature.

use serde::{Deserialize, Serialize};

use super::curve::{Curve, Positive, Strength};
use super::part::HeatTreatment;
use crate::source::Sourced;
use crate::text::OwnFile;
use crate::units::{Density, Ratio, Temperature};

/// One file in `assets/materials`, or the user's own.
/// Every value has a source; a file without one does not parse.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Material {
    pub id: String,
    pub name: String,
    /// What standards and the trade call it.
    pub designations: Vec<String>,
    pub kind: MaterialKind,
    #[serde(rename = "modulus_pa")]
    pub modulus: Sourced<Positive>,
    /// Where the metal is hot; without it the modulus holds up to the hottest service.
    #[serde(default)]
    pub hot_modulus: Option<Curve>,
    #[serde(deserialize_with = "below_a_half")]
    pub poisson_ratio: Sourced<Ratio>,
    /// Linear, mean over the range its source names.
    #[serde(rename = "expansion_per_k")]
    pub expansion: Sourced<Positive>,
    #[serde(rename = "density_kg_per_m3")]
    pub density: Sourced<Density>,
    /// Outside it no strength is given.
    pub service: ServiceRange,
    #[serde(skip)]
    pub(super) own_file: Option<OwnFile>,
}

#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
pub enum MaterialKind {
    Metal(Box<Metal>),
    Glass(Glass),
}

#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct ServiceRange {
    #[serde(rename = "coldest_k")]
    pub coldest: Sourced<Temperature>,
    #[serde(rename = "hottest_k")]
    pub hottest: Sourced<Temperature>,
}

/// A ductile metal.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Metal {
    pub as_supplied: Condition,
    /// After brazing, sintering or annealing.
    pub after_annealing: AfterAnnealing,
    /// After welding; annealed values where left out.
    #[serde(default)]
    pub after_welding: Option<Condition>,
    /// Below their first point the values are held down to here, on the stated
    /// ground that the metal does not weaken or turn brittle in the cold.
    #[serde(rename = "cold_value_held_down_to_k")]
    pub cold_hold: Sourced<Temperature>,
}

/// Strengths of one condition; what is left out is not known.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Condition {
    /// Tensile strength, R_m.
    #[serde(default)]
    pub tensile: Option<Strength>,
    /// 0.2 % proof strength, R_p0.2.
    #[serde(default)]
    pub proof: Option<Strength>,
    /// Code-form allowable stress, S.
    #[serde(default)]
    pub code_stress: Option<Strength>,
}

#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
pub enum AfterAnnealing {
    /// Supplied annealed: heat changes nothing.
    Unchanged,
    Becomes(Condition),
    NotKnown,
}

/// Judged by permissible tensile stress, never by a burst number.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Glass {
    /// Permissible tensile stress of whole, stress-free glass.
    #[serde(rename = "permissible_pa")]
    pub permissible: Sourced<Positive>,
    /// Share of it left where the flame has worked the glass.
    pub flame_worked: Sourced<Ratio>,
    /// Share of it left in glass that has been handled, cleaned or exposed for years.
    pub worn: Sourced<Ratio>,
    /// Short-term tensile strength, characteristic value.
    #[serde(default, rename = "short_term_pa")]
    pub short_term: Option<Sourced<Positive>>,
    /// The permissible stress stays below the short-term strength by this.
    pub short_term_divisor: Sourced<Positive>,
}

impl Material {
    /// The user's file it was read from; `None` for one that comes with the program.
    pub const fn own_file(&self) -> Option<&OwnFile> {
        self.own_file.as_ref()
    }

    /// Every name it answers to, with the field of its file.
    pub(super) fn names(&self) -> impl Iterator<Item = (String, &str)> {
        let designations = self.designations.iter().enumerate();
        [("id", &self.id), ("name", &self.name)]
            .into_iter()
            .map(|(field, name)| (field.to_owned(), name.as_str()))
            .chain(designations.map(|(i, name)| (format!("designations[{i}]"), name.as_str())))
    }

    /// The glass, where it is one.
    pub const fn glass(&self) -> Option<&Glass> {
        match &self.kind {
            MaterialKind::Glass(glass) => Some(glass),
            MaterialKind::Metal(_) => None,
        }
    }

    /// Modulus at a temperature, Pa: the curve's end values hold beyond it, and the
    /// room-temperature value where there is no curve and in the cold, where it only rises.
    pub fn modulus_pa(&self, temperature: Temperature) -> f64 {
        let room_pa = self.modulus.value.get();
        let Some(curve) = &self.hot_modulus else {
            return room_pa;
        };
        match curve.at(temperature) {
            Ok(pa) => pa.min(room_pa),
            Err(_) if temperature.kelvin() < curve.first().0 => room_pa.min(curve.first().1),
            Err(_) => curve.last().1.min(room_pa),
        }
    }

    /// The coldest temperature at which strength is given: of service, or of the
    /// ground on which cold values are held.
    pub fn coldest(&self) -> Temperature {
        let service = self.service.coldest.value;
        match &self.kind {
            MaterialKind::Metal(metal) => service.max(metal.cold_hold.value),
            MaterialKind::Glass(_) => service,
        }
    }
}

impl Metal {
    /// The values left after a treatment; `None` where they are not known.
    pub const fn condition(&self, treatment: HeatTreatment) -> Option<&Condition> {
        match treatment {
            HeatTreatment::AsSupplied => Some(&self.as_supplied),
            HeatTreatment::Welded if self.after_welding.is_some() => self.after_welding.as_ref(),
            // A flame heats as a brazing torch does.
            HeatTreatment::Brazed
            | HeatTreatment::Sintered
            | HeatTreatment::Annealed
            | HeatTreatment::Welded
            | HeatTreatment::FlameSealed => match &self.after_annealing {
                AfterAnnealing::Unchanged => Some(&self.as_supplied),
                AfterAnnealing::Becomes(condition) => Some(condition),
                AfterAnnealing::NotKnown => None,
            },
        }
    }
}

impl Condition {
    pub(super) fn strengths(&self) -> impl Iterator<Item = &Strength> {
        [&self.tensile, &self.proof, &self.code_stress]
            .into_iter()
            .flatten()
    }
}

impl Glass {
    /// Permissible tensile stress, Pa: the published one, less where the flame has
    /// worked the glass or years have worn it, and never above the divided short-term
    /// strength. Flame and wear both count.
    pub fn permissible_pa(&self, flame_worked: bool, worn: bool) -> f64 {
        let left = |applies: bool, share: &Sourced<Ratio>| {
            if applies { share.value.fraction() } else { 1.0 }
        };
        let share = left(flame_worked, &self.flame_worked) * left(worn, &self.worn);
        let permissible_pa = share * self.permissible.value.get();
        match &self.short_term {
            Some(short_term) => {
                permissible_pa.min(short_term.value.get() / self.short_term_divisor.value.get())
            }
            None => permissible_pa,
        }
    }
}

impl HeatTreatment {
    /// Glass that was neither left as drawn nor annealed holds stress.
    pub(super) const fn works_glass(self) -> bool {
        !matches!(self, Self::AsSupplied | Self::Annealed)
    }
}

fn below_a_half<'de, D: serde::Deserializer<'de>>(from: D) -> Result<Sourced<Ratio>, D::Error> {
    let ratio = Sourced::<Ratio>::deserialize(from)?;
    if ratio.value.fraction() >= 0.5 {
        return Err(serde::de::Error::custom(
            "Poisson's ratio of a solid is below 0.5",
        ));
    }
    Ok(ratio)
}
