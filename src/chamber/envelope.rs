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
use crate::units::{Pressure, Temperature, TemperatureDifference};

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
    pub outside: Result<OutsideAllowable, StrengthUnknown>,
    /// Which formulas were used.
    pub formula: &'static str,
    pub outside_formula: &'static str,
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
    /// Stated by its maker.
    Rated,
    /// Collapse of the core tube over its factor.
    CoreCollapse,
    /// Hotter than burst is known: it is not more than with the strength where that was
    /// last known, since heat does not strengthen a metal. Over the factor.
    BurstAtMost,
    YieldAtMost,
    CodeFormAtMost,
}

/// An allowable outside less inside pressure, with the factors in it.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct OutsideAllowable {
    pub pressure: Pressure,
    pub basis: OutsideBasis,
    /// Elastic collapse without its factor; `None` where the shape cannot buckle, or by
    /// rating.
    pub elastic: Option<Pressure>,
}

/// Which of its bounds an allowable outside pressure is.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum OutsideBasis {
    /// Elastic collapse over its factor.
    Elastic,
    /// First yield, ovality included, over its factor.
    Yield,
    /// As before, with a strength that is only known cooler.
    YieldAtMost,
    /// Permissible tensile stress of glass.
    Permissible,
    /// Stated by its maker.
    Rated,
}

/// The part that allows least from outside, at one temperature.
#[derive(Debug, Clone, PartialEq)]
pub struct WeakestOutside {
    /// Index in [`Chamber::parts`], one past its end for the closure.
    pub part: usize,
    pub name: Arc<str>,
    pub allowable: OutsideAllowable,
    pub formula: &'static str,
}

/// The part that allows least, at one temperature.
#[derive(Debug, Clone, PartialEq)]
pub struct Weakest {
    /// Index in [`Chamber::parts`], one past its end for the closure.
    pub part: usize,
    pub name: Arc<str>,
    pub allowable: Allowable,
    pub formula: &'static str,
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
    #[error("its maker's rating is not stated")]
    NoRating,
    #[error("its maker's rating holds from {} K to {} K", coldest.kelvin(), hottest.kelvin())]
    RatedElsewhere {
        coldest: Temperature,
        hottest: Temperature,
    },
    #[error("it has a rating and no burst pressure")]
    RatedOnly,
    #[error("its maker states no rating against outside pressure")]
    NoOutsideRating,
    #[error("the bend is tighter than the tube is wide")]
    BendTooTight,
    #[error("glass has no burst pressure, only a permissible stress")]
    Glass,
}

impl Envelope {
    /// Inserts, wicks and parts that occur no times have no say. `across_wall` is the
    /// difference of temperature across the walls, which stresses glass.
    pub fn new(
        chamber: &Chamber,
        materials: &Materials,
        factors: Factors,
        across_wall: TemperatureDifference,
    ) -> Self {
        let bears = |closure: &super::Closure| closure.bears_by_rating();
        let closure_bears = chamber.closure.as_ref().is_some_and(bears);
        let walls = chamber
            .all_parts()
            .enumerate()
            .filter(|(index, _)| *index < chamber.parts.len() || closure_bears)
            .filter(|(_, part)| part.count > 0 && !part.shape.lies_inside())
            .map(|(index, part)| {
                WallStrength::new(index, &part, materials, across_wall.kelvin().max(0.0))
            })
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
            outside: wall.told(wall.outside(temperature, &self.factors), temperature),
            formula: wall.formula,
            outside_formula: wall.outside_formula,
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
        let (wall, allowable, burst) = weakest.ok_or_else(|| no_wall(temperature))?;
        let burst = wall.told(burst, temperature);
        Ok(Weakest {
            part: wall.part,
            name: Arc::clone(&wall.name),
            allowable,
            formula: wall.formula,
            burst,
        })
    }

    /// The part with the least allowable pressure from outside.
    ///
    /// # Errors
    /// [`StrengthUnknown`] of the first part whose collapse is not known.
    pub fn weakest_outside(
        &self,
        temperature: Temperature,
    ) -> Result<WeakestOutside, StrengthUnknown> {
        let mut weakest: Option<(&WallStrength, OutsideAllowable)> = None;
        for wall in &self.walls {
            let allowable = wall.told(wall.outside(temperature, &self.factors), temperature)?;
            if weakest.is_none_or(|(_, least)| allowable.pressure < least.pressure) {
                weakest = Some((wall, allowable));
            }
        }
        let (wall, allowable) = weakest.ok_or_else(|| no_wall(temperature))?;
        Ok(WeakestOutside {
            part: wall.part,
            name: Arc::clone(&wall.name),
            allowable,
            formula: wall.outside_formula,
        })
    }

    /// Greatest difference to a bath into which a part may be plunged without load; `None`
    /// where it is not glass.
    pub fn quench_limit(&self, part: usize) -> Option<TemperatureDifference> {
        let base = self.wall(part)?.base.as_ref().ok()?;
        TemperatureDifference::from_kelvin(base.quench_limit_k()?).ok()
    }

    /// Temperatures, ascending, at which a strength of any part bends or ends: between
    /// two of them every bound is smooth and known or unknown throughout.
    pub fn knots(&self) -> Vec<Temperature> {
        let mut knots: Vec<_> = self.walls.iter().flat_map(WallStrength::knots).collect();
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
                if base.surface.flame_worked {
                    sources.push(&glass.flame_worked.source);
                }
                if base.surface.worn {
                    sources.push(&glass.worn.source);
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
                    Basis::Yield | Basis::YieldAtMost | Basis::CoreCollapse => {
                        [&condition.proof, &None]
                    }
                    Basis::CodeForm | Basis::CodeFormAtMost => [&condition.code_stress, &None],
                    Basis::Permissible | Basis::Rated => [&None, &None],
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

fn no_wall(temperature: Temperature) -> StrengthUnknown {
    StrengthUnknown {
        part: None,
        name: Arc::from("the chamber"),
        material: Arc::from("no material"),
        temperature,
        reason: StrengthGap::NoWall,
    }
}

#[cfg(test)]
#[path = "envelope_tests.rs"]
mod tests;
