//! One wall by its sizes, its material and that material's state.

use std::sync::Arc;

use super::bounds::Bounds;
use super::curve::{Strength, StrengthAt};
use super::envelope::{Allowable, AllowableBasis, OutsideAllowable, OutsideBasis, StrengthGap};
use super::factors::Factors;
use super::material::{Condition, Glass, Material, MaterialKind, Metal};
use super::materials::Materials;
use super::outside::{Against, Collapse};
use super::part::{HeatTreatment, Part};
use super::resistance::PressurePerStress;
use super::shape::Shape;
use super::strength::thermal;
use super::{Dimension, Pick};
use crate::units::{Pressure, Temperature};

/// Sizes, material and its state.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Base {
    pub(super) material: Arc<Material>,
    pub(super) treatment: HeatTreatment,
    pub(super) surface: Surface,
    /// Stress by the difference of temperature across the wall, which takes its share of
    /// what glass may carry.
    thermal_pa: f64,
    per_stress: PressurePerStress,
    against: Against,
    core: Option<Core>,
}

/// What glass has lived through.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) struct Surface {
    pub(super) flame_worked: bool,
    pub(super) worn: bool,
}

/// A tube inside that the fluid presses from its outside.
#[derive(Debug, Clone, PartialEq)]
struct Core {
    against: Against,
    per_stress: PressurePerStress,
}

impl Base {
    pub(super) fn new(
        part: &Part,
        materials: &Materials,
        across_wall_k: f64,
    ) -> Result<Self, StrengthGap> {
        let wall = part.wall.as_ref().ok_or(StrengthGap::NoWall)?;
        let material = materials
            .get(&wall.material)
            .ok_or(StrengthGap::UnknownMaterial)?;
        if wall.thickness.nominal.metre() == 0.0 {
            return Err(StrengthGap::NoSize);
        }
        let nu = material.poisson_ratio.value.fraction();
        let least_m = wall.least_thickness_m();
        let ovality = wall.ovality.fraction();
        Ok(Self {
            per_stress: PressurePerStress::of(&part.shape, least_m, nu)?,
            against: Against::of(&part.shape, least_m, nu, ovality)?,
            core: Core::of(&part.shape, ovality),
            material: Arc::clone(material),
            treatment: wall.treatment,
            surface: Surface {
                flame_worked: wall.treatment.works_glass() || shaped_in_the_flame(&part.shape),
                worn: wall.worn,
            },
            thermal_pa: thermal_stress_pa(&part.shape, least_m, material, across_wall_k),
        })
    }

    pub(super) fn metal(&self) -> Option<&Metal> {
        match &self.material.kind {
            MaterialKind::Metal(metal) => Some(metal),
            MaterialKind::Glass(_) => None,
        }
    }

    /// Permissible tensile stress of the glass, less what the difference of temperature
    /// across the wall already takes, Pa.
    pub(super) fn permissible_pa(&self, glass: &Glass) -> f64 {
        let Surface { flame_worked, worn } = self.surface;
        (glass.permissible_pa(flame_worked, worn) - self.thermal_pa).max(0.0)
    }

    /// Greatest difference to a bath that the glass bears without load, K.
    pub(super) fn quench_limit_k(&self) -> Option<f64> {
        let (glass, material) = (self.material.glass()?, &self.material);
        let Surface { flame_worked, worn } = self.surface;
        Some(thermal::quench_limit_k(
            glass.permissible_pa(flame_worked, worn),
            material.modulus.value.get(),
            material.expansion.value.get(),
            material.poisson_ratio.value.fraction(),
        ))
    }

    pub(super) fn in_service(&self, temperature: Temperature) -> Result<&Self, StrengthGap> {
        let (coldest, hottest) = (self.material.coldest(), self.material.service.hottest.value);
        if temperature < coldest {
            Err(StrengthGap::TooCold { coldest })
        } else if temperature > hottest {
            Err(StrengthGap::TooHot { hottest })
        } else {
            Ok(self)
        }
    }

    pub(super) fn metal_bounds(&self, metal: &Metal, at: Temperature, factors: &Factors) -> Bounds {
        let Some(condition) = metal.condition(self.treatment) else {
            return Bounds::none(StrengthGap::NoValuesAfter {
                treatment: self.treatment,
            });
        };
        let efficiency = factors.joint_efficiency.number();
        let [burst, yields, code] = self.pressures(condition, at);
        let mut known_burst = match burst {
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
        if let Some(core) = &self.core
            && let Some(sy) = yield_strength(condition, at)
        {
            let (modulus_pa, nu) = self.elasticity(at);
            let collapse = core.against.collapse(modulus_pa, nu, sy.ceiling());
            let (pa, _) = collapse.allowable_pa(factors);
            if pa < least.0 {
                least = (pa, Basis::CoreCollapse);
            }
            known_burst = known_burst.and_then(|burst| {
                let gives_way = collapse.elastic_pa.min(collapse.yield_pa);
                pressure(burst.pascal().min(efficiency * gives_way))
            });
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

    pub(super) fn metal_outside(
        &self,
        metal: &Metal,
        at: Temperature,
        factors: &Factors,
    ) -> Result<OutsideAllowable, StrengthGap> {
        let treatment = self.treatment;
        let condition = metal
            .condition(treatment)
            .ok_or(StrengthGap::NoValuesAfter { treatment })?;
        let sy = yield_strength(condition, at).ok_or(StrengthGap::NoValueThere)?;
        let (modulus_pa, nu) = self.elasticity(at);
        let collapse = self.against.collapse(modulus_pa, nu, sy.ceiling());
        let (mut pa, mut basis) = collapse.allowable_pa(factors);
        if let Some(core) = &self.core {
            let core_pa = core.per_stress.yield_pa(sy.ceiling()) / factors.on_yield.number();
            if core_pa < pa {
                (pa, basis) = (core_pa, OutsideBasis::Yield);
            }
        }
        if basis == OutsideBasis::Yield && !sy.is_known() {
            basis = OutsideBasis::YieldAtMost;
        }
        Ok(OutsideAllowable {
            pressure: pressure(factors.joint_efficiency.number() * pa)?,
            basis,
            elastic: finite(collapse.elastic_pa),
        })
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

    pub(super) fn glass_bounds(&self, glass: &Glass, factors: &Factors) -> Bounds {
        let stress_pa = self.permissible_pa(glass);
        let mut least_pa = self.per_stress.permissible_pa(stress_pa);
        let mut basis = AllowableBasis::Permissible;
        if let Some(core) = &self.core {
            let (pa, _) = self.glass_collapse_pa(&core.against, stress_pa, factors);
            if pa < least_pa {
                (least_pa, basis) = (pa, AllowableBasis::CoreCollapse);
            }
        }
        Bounds {
            burst: Err(StrengthGap::Glass),
            allowable: pressure(least_pa).map(|pressure| Allowable { pressure, basis }),
        }
    }

    pub(super) fn glass_outside(
        &self,
        glass: &Glass,
        factors: &Factors,
    ) -> Result<OutsideAllowable, StrengthGap> {
        let stress_pa = self.permissible_pa(glass);
        let (mut pa, collapse) = self.glass_collapse_pa(&self.against, stress_pa, factors);
        let is_elastic = pa < collapse.yield_pa;
        if let Some(core) = &self.core {
            pa = pa.min(core.per_stress.permissible_pa(stress_pa));
        }
        Ok(OutsideAllowable {
            pressure: pressure(pa)?,
            basis: if is_elastic {
                OutsideBasis::Elastic
            } else {
                OutsideBasis::Permissible
            },
            elastic: finite(collapse.elastic_pa),
        })
    }

    /// Elastic collapse over its factor or the permissible stress, whichever is lower: the
    /// permissible stress has its factor in it, so none on yield is put beside it.
    fn glass_collapse_pa(
        &self,
        against: &Against,
        stress_pa: f64,
        factors: &Factors,
    ) -> (f64, Collapse) {
        let (modulus_pa, nu) = (
            self.material.modulus.value.get(),
            self.material.poisson_ratio.value.fraction(),
        );
        let collapse = against.collapse(modulus_pa, nu, stress_pa);
        let elastic_pa = collapse.elastic_pa / factors.on_collapse.number();
        (elastic_pa.min(collapse.yield_pa), collapse)
    }

    /// Modulus there, Pa, and Poisson's ratio.
    fn elasticity(&self, at: Temperature) -> (f64, f64) {
        let nu = self.material.poisson_ratio.value.fraction();
        (self.material.modulus_pa(at), nu)
    }
}

impl Collapse {
    /// Over its factors, Pa.
    fn allowable_pa(&self, factors: &Factors) -> (f64, OutsideBasis) {
        let elastic = self.elastic_pa / factors.on_collapse.number();
        let yields = self.yield_pa / factors.on_yield.number();
        if elastic < yields {
            (elastic, OutsideBasis::Elastic)
        } else {
            (yields, OutsideBasis::Yield)
        }
    }
}

impl Core {
    fn of(shape: &Shape, ovality: f64) -> Option<Self> {
        let Shape::Annulus {
            core_diameter,
            core_thickness,
            length,
            ..
        } = shape
        else {
            return None;
        };
        let m = |dimension: &Dimension| dimension.at(Pick::Greatest).metre();
        let t = core_thickness.least().metre();
        let bore = (m(core_diameter) - 2.0 * t).max(0.0);
        Some(Self {
            against: Against::of_core(m(core_diameter), m(length), t, ovality),
            per_stress: PressurePerStress::tube(bore, t),
        })
    }
}

/// Proof strength there. Where it is only known cooler and a code stress is known, half as
/// much again as the code stress: a code keeps it at two thirds of yield at most.
fn yield_strength(condition: &Condition, at: Temperature) -> Option<StrengthAt> {
    let proof = condition.proof.as_ref().map(|s| s.at(at));
    let code = condition.code_stress.as_ref().map(|s| s.at(at));
    match (proof, code) {
        (Some(StrengthAt::Known(sy)), _) => Some(StrengthAt::Known(sy)),
        (Some(sy), Some(StrengthAt::Known(s))) => {
            Some(StrengthAt::Known((1.5 * s).min(sy.ceiling())))
        }
        (None, Some(s)) => Some(s.map(|s| 1.5 * s)),
        (Some(sy), _) => Some(sy),
        (None, None) => None,
    }
}

fn thermal_stress_pa(shape: &Shape, t: f64, material: &Material, across_k: f64) -> f64 {
    let (e, alpha, nu) = (
        material.modulus.value.get(),
        material.expansion.value.get(),
        material.poisson_ratio.value.fraction(),
    );
    match shape {
        Shape::Tube {
            inside_diameter, ..
        }
        | Shape::Capillary {
            inside_diameter, ..
        } if inside_diameter.least().metre() > 0.0 && t > 0.0 => {
            let ri = 0.5 * inside_diameter.least().metre();
            thermal::tube_gradient_stress_pa(e, alpha, nu, across_k, ri, ri + t)
        }
        _ => thermal::gradient_stress_pa(e, alpha, nu, across_k),
    }
}

/// Glass of these shapes is blown or drawn in the flame, whatever came after.
const fn shaped_in_the_flame(shape: &Shape) -> bool {
    matches!(
        shape,
        Shape::Sphere { .. }
            | Shape::Bulb { .. }
            | Shape::DishedEnd { .. }
            | Shape::ConeFrustum { .. }
    )
}

fn finite(pa: f64) -> Option<Pressure> {
    Pressure::from_pascal(pa).ok()
}

fn pressure(pa: f64) -> Result<Pressure, StrengthGap> {
    Pressure::from_pascal(pa).map_err(|_| StrengthGap::NoSize)
}
