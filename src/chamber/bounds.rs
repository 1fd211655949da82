//! Burst and allowable pressure of one wall, from its sizes and its material.

use std::sync::Arc;

use super::curve::{Strength, StrengthAt};
use super::envelope::{Allowable, AllowableBasis, StrengthGap, StrengthUnknown};
use super::factors::Factors;
use super::material::{Condition, Material, MaterialKind, Metal};
use super::materials::Materials;
use super::part::{HeatTreatment, Part};
use super::resistance::{PressurePerStress, formula};
use super::shape::Shape;
use crate::units::{Pressure, Temperature};

/// One wall, as far as it can be resolved.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct WallStrength {
    pub(super) part: usize,
    pub(super) name: Arc<str>,
    pub(super) material: Arc<str>,
    pub(super) formula: &'static str,
    pub(super) base: Result<Base, StrengthGap>,
}

/// Sizes, material and its state.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Base {
    pub(super) material: Arc<Material>,
    pub(super) treatment: HeatTreatment,
    pub(super) flame_worked: bool,
    per_stress: PressurePerStress,
}

/// Answers at one temperature, before a part's name is put to them.
pub(super) struct Bounds {
    pub(super) burst: Result<Pressure, StrengthGap>,
    pub(super) allowable: Result<Allowable, StrengthGap>,
}

impl WallStrength {
    pub(super) fn new(index: usize, part: &Part, materials: &Materials) -> Self {
        // By its name where the material is at hand, by its id where it is not.
        let id = part.wall.as_ref().map(|wall| wall.material.as_str());
        let known = id.and_then(|id| materials.get(id));
        let called = known.map_or(id, |material| Some(material.name.as_str()));
        let base = Base::new(part, materials);
        let glass = base
            .as_ref()
            .is_ok_and(|base| base.material.glass().is_some());
        Self {
            part: index,
            name: Arc::from(part.name.as_str()),
            material: Arc::from(called.unwrap_or("no material")),
            formula: formula(&part.shape, glass),
            base,
        }
    }

    pub(super) fn bounds(&self, temperature: Temperature, factors: &Factors) -> Bounds {
        match self
            .base
            .as_ref()
            .map_err(|gap| *gap)
            .and_then(|base| base.in_service(temperature))
        {
            Ok(base) => match &base.material.kind {
                MaterialKind::Metal(metal) => base.metal_bounds(metal, temperature, factors),
                MaterialKind::Glass(_) => base.glass_bounds(),
            },
            Err(gap) => Bounds {
                burst: Err(gap),
                allowable: Err(gap),
            },
        }
    }

    pub(super) fn told<T>(
        &self,
        answer: Result<T, StrengthGap>,
        at: Temperature,
    ) -> Result<T, StrengthUnknown> {
        answer.map_err(|reason| StrengthUnknown {
            part: Some(self.part),
            name: Arc::clone(&self.name),
            material: Arc::clone(&self.material),
            temperature: at,
            reason,
        })
    }
}

impl Base {
    fn new(part: &Part, materials: &Materials) -> Result<Self, StrengthGap> {
        let wall = part.wall.as_ref().ok_or(StrengthGap::NoWall)?;
        let material = materials
            .get(&wall.material)
            .ok_or(StrengthGap::UnknownMaterial)?;
        if wall.thickness.nominal.metre() == 0.0 {
            return Err(StrengthGap::NoSize);
        }
        let nu = material.poisson_ratio.value.fraction();
        let per_stress = PressurePerStress::of(&part.shape, wall.thickness.least().metre(), nu)?;
        let flame_worked = wall.treatment.works_glass() || shaped_in_the_flame(&part.shape);
        let material = Arc::clone(material);
        Ok(Self {
            material,
            treatment: wall.treatment,
            flame_worked,
            per_stress,
        })
    }

    pub(super) fn metal(&self) -> Option<&Metal> {
        match &self.material.kind {
            MaterialKind::Metal(metal) => Some(metal),
            MaterialKind::Glass(_) => None,
        }
    }

    fn in_service(&self, temperature: Temperature) -> Result<&Self, StrengthGap> {
        let (coldest, hottest) = (self.material.coldest(), self.material.service.hottest.value);
        if temperature < coldest {
            Err(StrengthGap::TooCold { coldest })
        } else if temperature > hottest {
            Err(StrengthGap::TooHot { hottest })
        } else {
            Ok(self)
        }
    }

    fn metal_bounds(&self, metal: &Metal, at: Temperature, factors: &Factors) -> Bounds {
        let Some(condition) = metal.condition(self.treatment) else {
            let gap = StrengthGap::NoValuesAfter {
                treatment: self.treatment,
            };
            return Bounds {
                burst: Err(gap),
                allowable: Err(gap),
            };
        };
        let efficiency = factors.joint_efficiency.number();
        let [burst, yields, code] = self.pressures(condition, at);
        let known_burst = match burst {
            Some(StrengthAt::Known(pa)) => pressure(efficiency * pa),
            _ => Err(StrengthGap::NoValueThere),
        };

        // Burst alone does not make a pressure allowable: yield or a code stress must
        // be known as well.
        let known = [yields, code]
            .iter()
            .any(|x| matches!(x, Some(StrengthAt::Known(_))));
        if !known {
            return Bounds {
                burst: known_burst,
                allowable: Err(StrengthGap::NoValueThere),
            };
        }
        use AllowableBasis as Basis;
        let bounds = [
            (code, 1.0, Basis::CodeForm, Basis::CodeFormAtMost),
            (
                yields,
                factors.on_yield.number(),
                Basis::Yield,
                Basis::YieldAtMost,
            ),
            (
                burst,
                factors.on_burst.number(),
                Basis::Burst,
                Basis::BurstAtMost,
            ),
        ];
        let mut least = (f64::INFINITY, Basis::CodeForm);
        for (bound, factor, known, cooler) in bounds {
            let (pa, basis) = match bound {
                Some(StrengthAt::Known(pa)) => (pa / factor, known),
                Some(StrengthAt::AtMost(pa)) => (pa / factor, cooler),
                None => continue,
            };
            if pa < least.0 {
                least = (pa, basis);
            }
        }
        let allowable = pressure(efficiency * least.0);
        let allowable = allowable.map(|pressure| Allowable {
            pressure,
            basis: least.1,
        });
        Bounds {
            burst: known_burst,
            allowable,
        }
    }

    /// Burst, yield and code-form pressure in Pa, as far as they are known.
    fn pressures(&self, condition: &Condition, at: Temperature) -> [Option<StrengthAt>; 3] {
        let strength = |strength: &Option<Strength>| strength.as_ref().map(|s| s.at(at));
        let proof = strength(&condition.proof);
        let burst = match (proof, strength(&condition.tensile)) {
            (Some(sy), Some(su)) => {
                let pa = self
                    .per_stress
                    .burst_pa(sy.ceiling().min(su.ceiling()), su.ceiling());
                Some(if sy.is_known() && su.is_known() {
                    StrengthAt::Known(pa)
                } else {
                    StrengthAt::AtMost(pa)
                })
            }
            _ => None,
        };
        let yields = proof.map(|sy| sy.map(|sy| self.per_stress.yield_pa(sy)));
        let code =
            strength(&condition.code_stress).map(|s| s.map(|s| self.per_stress.code_form_pa(s)));
        [burst, yields, code]
    }

    fn glass_bounds(&self) -> Bounds {
        let allowable = match self.material.glass() {
            Some(glass) => {
                let stress_pa = glass.permissible_pa(self.flame_worked);
                pressure(self.per_stress.permissible_pa(stress_pa))
            }
            None => Err(StrengthGap::NoValueThere),
        };
        let basis = AllowableBasis::Permissible;
        let allowable = allowable.map(|pressure| Allowable { pressure, basis });
        Bounds {
            burst: Err(StrengthGap::Glass),
            allowable,
        }
    }
}

/// Glass of these shapes is blown or drawn in the flame, whatever came after.
const fn shaped_in_the_flame(shape: &Shape) -> bool {
    matches!(
        shape,
        Shape::Sphere { .. } | Shape::DishedEnd { .. } | Shape::ConeFrustum { .. }
    )
}

fn pressure(pa: f64) -> Result<Pressure, StrengthGap> {
    Pressure::from_pascal(pa).map_err(|_| StrengthGap::NoSize)
}
