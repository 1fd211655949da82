//! Burst and allowable pressure of every part over temperature, and the weakest.
//!
//! Every pressure here is the load on a wall: inside minus outside.

use std::sync::Arc;

use super::Chamber;
use super::bounds::WallStrength;
use super::curve::Strength;
use super::factors::Factors;
use super::material::MaterialKind;
use super::materials::Materials;
use super::part::HeatTreatment;
use crate::source::Source;
use crate::units::{Pressure, Temperature};

/// The walls of a chamber, sizes and materials resolved once; then each question costs
/// some multiplications and allocates nothing.
#[derive(Debug, Clone, PartialEq)]
pub struct Envelope {
    walls: Vec<WallStrength>,
    factors: Factors,
}

/// Strength of one part at one temperature.
#[derive(Debug, Clone, PartialEq)]
pub struct PartStrength {
    pub burst: Result<Pressure, StrengthUnknown>,
    pub allowable: Result<Allowable, StrengthUnknown>,
    /// Which formulas were used.
    pub formula: &'static str,
}

/// An allowable load, with the joint efficiency and the factors in it.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Allowable {
    pub pressure: Pressure,
    pub basis: AllowableBasis,
}

/// Which of its bounds an allowable pressure is.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum AllowableBasis {
    /// Burst pressure over its factor.
    Burst,
    /// Pressure of first yield over its factor.
    Yield,
    /// Code-form allowable stress; code-form is not code-compliant.
    CodeForm,
    /// Permissible tensile stress of glass.
    Permissible,
    /// Hotter than burst is known: it is not more than with the strength where that was
    /// last known, since heat does not strengthen a metal. Over the factor.
    BurstAtMost,
    YieldAtMost,
    CodeFormAtMost,
}

/// The part that allows least, at one temperature.
#[derive(Debug, Clone, PartialEq)]
pub struct Weakest {
    /// Index in [`Chamber::parts`].
    pub part: usize,
    pub name: Arc<str>,
    pub allowable: Allowable,
    /// Burst pressure of that part.
    pub burst: Result<Pressure, StrengthUnknown>,
}

/// Whose strength is not known, where and why.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
#[error("strength of {name} ({material}) at {} K is not known: {reason}", temperature.kelvin())]
pub struct StrengthUnknown {
    /// Index in [`Chamber::parts`]; `None` where no part has a wall.
    pub part: Option<usize>,
    pub name: Arc<str>,
    pub material: Arc<str>,
    pub temperature: Temperature,
    pub reason: StrengthGap,
}

/// Why a strength is not known.
#[derive(Debug, Clone, Copy, PartialEq, thiserror::Error)]
pub enum StrengthGap {
    #[error("there is no wall")]
    NoWall,
    #[error("the material is not in the catalogue")]
    UnknownMaterial,
    #[error("a size is 0")]
    NoSize,
    #[error("a cone of {half_angle_degrees:.1} degrees half-angle is steeper than 30")]
    ConeTooSteep { half_angle_degrees: f64 },
    #[error("the material has no values for this state: {}", treatment.name())]
    NoValuesAfter { treatment: HeatTreatment },
    #[error("colder than the material's values reach, {} K", coldest.kelvin())]
    TooCold { coldest: Temperature },
    #[error("hotter than the material's service, {} K", hottest.kelvin())]
    TooHot { hottest: Temperature },
    #[error("the material's values do not reach this temperature")]
    NoValueThere,
    #[error("glass has no burst pressure, only a permissible stress")]
    Glass,
}

impl Envelope {
    /// Inserts, and parts that occur no times, have no say.
    pub fn new(chamber: &Chamber, materials: &Materials, factors: Factors) -> Self {
        let walls = chamber
            .parts
            .iter()
            .enumerate()
            .filter(|(_, part)| part.count > 0 && !part.shape.is_insert())
            .map(|(index, part)| WallStrength::new(index, part, materials))
            .collect();
        Self { walls, factors }
    }

    /// Strength of a part; `None` for an insert or a part that does not occur.
    pub fn part(&self, part: usize, temperature: Temperature) -> Option<PartStrength> {
        let wall = self.wall(part)?;
        let bounds = wall.bounds(temperature, &self.factors);
        Some(PartStrength {
            burst: wall.told(bounds.burst, temperature),
            allowable: wall.told(bounds.allowable, temperature),
            formula: wall.formula,
        })
    }

    /// The part with the least allowable pressure.
    ///
    /// # Errors
    /// [`StrengthUnknown`] of the first part whose allowable pressure is not known:
    /// it might be the weakest.
    pub fn weakest(&self, temperature: Temperature) -> Result<Weakest, StrengthUnknown> {
        let mut weakest: Option<(&WallStrength, Allowable, Result<Pressure, StrengthGap>)> = None;
        for wall in &self.walls {
            let bounds = wall.bounds(temperature, &self.factors);
            let allowable = wall.told(bounds.allowable, temperature)?;
            if weakest
                .as_ref()
                .is_none_or(|(_, least, _)| allowable.pressure < least.pressure)
            {
                weakest = Some((wall, allowable, bounds.burst));
            }
        }
        let (wall, allowable, burst) = weakest.ok_or_else(|| StrengthUnknown {
            part: None,
            name: Arc::from("the chamber"),
            material: Arc::from("no material"),
            temperature,
            reason: StrengthGap::NoWall,
        })?;
        let burst = wall.told(burst, temperature);
        Ok(Weakest {
            part: wall.part,
            name: Arc::clone(&wall.name),
            allowable,
            burst,
        })
    }

    /// Temperatures, ascending, at which a strength of any part bends or ends: between
    /// two of them every bound is smooth and known or unknown throughout.
    pub fn knots(&self) -> Vec<Temperature> {
        let mut knots = Vec::new();
        for base in self.walls.iter().filter_map(|wall| wall.base.as_ref().ok()) {
            knots.push(base.material.coldest());
            knots.push(base.material.service.hottest.value);
            let condition = base
                .metal()
                .and_then(|metal| metal.condition(base.treatment));
            for strength in condition.iter().flat_map(|condition| condition.strengths()) {
                let inside = strength.knots_k().into_iter().map(Temperature::from_kelvin);
                knots.extend(inside.filter_map(Result::ok));
            }
        }
        knots.sort_by(|a, b| a.kelvin().total_cmp(&b.kelvin()));
        knots.dedup();
        knots
    }

    /// The sources of the values that a bound of a part rests on.
    pub fn sources(&self, part: usize, basis: AllowableBasis) -> Vec<&Source> {
        let Some(Ok(base)) = self.wall(part).map(|wall| wall.base.as_ref()) else {
            return Vec::new();
        };
        match &base.material.kind {
            MaterialKind::Glass(glass) => {
                let mut sources = vec![&glass.permissible.source];
                if base.flame_worked {
                    sources.push(&glass.flame_worked.source);
                }
                if let Some(short_term) = &glass.short_term {
                    sources.extend([&short_term.source, &glass.short_term_divisor.source]);
                }
                sources
            }
            MaterialKind::Metal(metal) => {
                let Some(condition) = metal.condition(base.treatment) else {
                    return Vec::new();
                };
                use AllowableBasis as Basis;
                let strengths = match basis {
                    Basis::Burst | Basis::BurstAtMost => [&condition.tensile, &condition.proof],
                    Basis::Yield | Basis::YieldAtMost => [&condition.proof, &None],
                    Basis::CodeForm | Basis::CodeFormAtMost => [&condition.code_stress, &None],
                    Basis::Permissible => [&None, &None],
                };
                strengths
                    .into_iter()
                    .flatten()
                    .map(Strength::source)
                    .collect()
            }
        }
    }

    fn wall(&self, part: usize) -> Option<&WallStrength> {
        self.walls.iter().find(|wall| wall.part == part)
    }
}

#[cfg(test)]
#[path = "envelope_tests.rs"]
mod tests;
