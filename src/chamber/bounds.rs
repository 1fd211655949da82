//! Burst and allowable pressure of one wall, from its sizes and its material.

use std::sync::Arc;

use super::curve::{Strength, StrengthAt};
use super::envelope::{
    Allowable, AllowableBasis, OutsideAllowable, OutsideBasis, StrengthGap, StrengthUnknown,
};
use super::factors::Factors;
use super::material::{Condition, Glass, Material, MaterialKind, Metal};
use super::materials::Materials;
use super::outside::{Against, Collapse};
use super::part::{HeatTreatment, Part, Rating};
use super::resistance::PressurePerStress;
use super::shape::{Role, Shape};
use super::strength::thermal;
use super::{Dimension, Pick, formula};
use crate::units::{Pressure, Temperature};

/// One wall, as far as it can be resolved.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct WallStrength {
    pub(super) part: usize,
    pub(super) name: Arc<str>,
    pub(super) material: Arc<str>,
    pub(super) formula: &'static str,
    pub(super) outside_formula: &'static str,
    pub(super) base: Result<Base, StrengthGap>,
    rating: Option<Rating>,
    /// Nothing is known of it but its rating.
    by_rating: bool,
}

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

/// Answers at one temperature, before a part's name is put to them.
pub(super) struct Bounds {
    pub(super) burst: Result<Pressure, StrengthGap>,
    pub(super) allowable: Result<Allowable, StrengthGap>,
    pub(super) outside: Result<OutsideAllowable, StrengthGap>,
}

impl WallStrength {
    pub(super) fn new(
        index: usize,
        part: &Part,
        materials: &Materials,
        across_wall_k: f64,
    ) -> Self {
        // By its name where the material is at hand, by its id where it is not.
        let id = part.material();
        let known = id.and_then(|id| materials.get(id));
        let called = known.map_or(id, |material| Some(material.name.as_str()));
        let base = Base::new(part, materials, across_wall_k);
        let glass = base
            .as_ref()
            .is_ok_and(|base| base.material.glass().is_some());
        Self {
            part: index,
            name: Arc::from(part.name.as_str()),
            material: Arc::from(called.unwrap_or("no material")),
            formula: formula::inside(&part.shape, glass),
            outside_formula: formula::outside(&part.shape),
            base,
            rating: part.rating.clone(),
            by_rating: part.shape.role() == Role::Rated,
        }
    }

    pub(super) fn bounds(&self, temperature: Temperature, factors: &Factors) -> Bounds {
        if self.by_rating {
            return self.rated(temperature);
        }
        let mut bounds = match self
            .base
            .as_ref()
            .map_err(|gap| *gap)
            .and_then(|base| base.in_service(temperature))
        {
            Ok(base) => match &base.material.kind {
                MaterialKind::Metal(metal) => base.metal_bounds(metal, temperature, factors),
                MaterialKind::Glass(glass) => base.glass_bounds(glass, factors),
            },
            Err(gap) => Bounds::none(gap),
        };
        if self.rating.is_some() {
            // Never more than its maker states, nor where he states nothing.
            let rated = self.rated(temperature);
            bounds.allowable = match (bounds.allowable, rated.allowable) {
                (Ok(own), Ok(rated)) if own.pressure <= rated.pressure => Ok(own),
                (Ok(_), rated) => rated,
                (Err(gap), _) => Err(gap),
            };
            if let (Ok(own), Ok(rated)) = (&bounds.outside, rated.outside)
                && rated.pressure < own.pressure
            {
                bounds.outside = Ok(rated);
            }
        }
        bounds
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

    /// Temperatures between which the answers are smooth.
    pub(super) fn knots(&self) -> Vec<Temperature> {
        let mut knots: Vec<_> = self
            .rating
            .iter()
            .flat_map(|rating| [rating.coldest, rating.hottest])
            .collect();
        let Ok(base) = &self.base else {
            return knots;
        };
        knots.push(base.material.coldest());
        knots.push(base.material.service.hottest.value);
        let condition = base
            .metal()
            .and_then(|metal| metal.condition(base.treatment));
        for strength in condition.iter().flat_map(|condition| condition.strengths()) {
            let inside = strength.knots_k().into_iter().map(Temperature::from_kelvin);
            knots.extend(inside.filter_map(Result::ok));
        }
        knots
    }

    fn rated(&self, temperature: Temperature) -> Bounds {
        let rating = match &self.rating {
            None => return Bounds::none(StrengthGap::NoRating),
            Some(rating) if rating.stated_by.trim().is_empty() => {
                return Bounds::none(StrengthGap::NoRating);
            }
            Some(rating) if temperature < rating.coldest || temperature > rating.hottest => {
                let (coldest, hottest) = (rating.coldest, rating.hottest);
                return Bounds::none(StrengthGap::RatedElsewhere { coldest, hottest });
            }
            Some(rating) => rating,
        };
        Bounds {
            burst: Err(StrengthGap::RatedOnly),
            allowable: Ok(Allowable {
                pressure: rating.inside,
                basis: AllowableBasis::Rated,
            }),
            outside: rating
                .outside
                .map(|pressure| OutsideAllowable {
                    pressure,
                    basis: OutsideBasis::Rated,
                    elastic: None,
                })
                .ok_or(StrengthGap::NoOutsideRating),
        }
    }
}

impl Bounds {
    fn none(gap: StrengthGap) -> Self {
        Self {
            burst: Err(gap),
            allowable: Err(gap),
            outside: Err(gap),
        }
    }
}

impl Base {
    fn new(part: &Part, materials: &Materials, across_wall_k: f64) -> Result<Self, StrengthGap> {
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
        let sy = yield_strength(condition, at);
        let (modulus_pa, nu) = self.elasticity(at);
        let outside = match sy {
            Some(sy) => {
                let collapse = self.against.collapse(modulus_pa, nu, sy.ceiling());
                self.outside_bounds(collapse, factors, sy, efficiency)
            }
            None => Err(StrengthGap::NoValueThere),
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
                outside,
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
        if let (Some(core), Some(sy)) = (&self.core, sy) {
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
            outside,
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

    fn glass_bounds(&self, glass: &Glass, factors: &Factors) -> Bounds {
        let stress_pa = self.permissible_pa(glass);
        let (modulus_pa, nu) = (
            self.material.modulus.value.get(),
            self.material.poisson_ratio.value.fraction(),
        );
        let mut least_pa = self.per_stress.permissible_pa(stress_pa);
        let mut basis = AllowableBasis::Permissible;
        // The permissible stress has its factor in it: none on yield beside it.
        let of_glass = |collapse: Collapse| {
            let elastic = collapse.elastic_pa / factors.on_collapse.number();
            (elastic.min(collapse.yield_pa), elastic < collapse.yield_pa)
        };
        if let Some(core) = &self.core {
            let (pa, _) = of_glass(core.against.collapse(modulus_pa, nu, stress_pa));
            if pa < least_pa {
                (least_pa, basis) = (pa, AllowableBasis::CoreCollapse);
            }
        }
        let collapse = self.against.collapse(modulus_pa, nu, stress_pa);
        let (mut outside_pa, is_elastic) = of_glass(collapse);
        if let Some(core) = &self.core {
            outside_pa = outside_pa.min(core.per_stress.permissible_pa(stress_pa));
        }
        let outside = pressure(outside_pa).map(|pressure| OutsideAllowable {
            pressure,
            basis: if is_elastic {
                OutsideBasis::Elastic
            } else {
                OutsideBasis::Permissible
            },
            elastic: finite(collapse.elastic_pa),
        });
        Bounds {
            burst: Err(StrengthGap::Glass),
            allowable: pressure(least_pa).map(|pressure| Allowable { pressure, basis }),
            outside,
        }
    }

    fn outside_bounds(
        &self,
        collapse: Collapse,
        factors: &Factors,
        sy: StrengthAt,
        efficiency: f64,
    ) -> Result<OutsideAllowable, StrengthGap> {
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
            pressure: pressure(efficiency * pa)?,
            basis,
            elastic: finite(collapse.elastic_pa),
        })
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
