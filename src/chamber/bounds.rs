//! Burst and allowable pressure of one part: by its wall, or by its maker's rating.

use std::sync::Arc;

use super::base::Base;
use super::envelope::{
    Allowable, AllowableBasis, OutsideAllowable, OutsideBasis, StrengthGap, StrengthUnknown,
};
use super::factors::Factors;
use super::formula;
use super::material::MaterialKind;
use super::materials::Materials;
use super::part::{Part, Rating};
use super::shape::Role;
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

/// Answers at one temperature, before a part's name is put to them.
pub(super) struct Bounds {
    pub(super) burst: Result<Pressure, StrengthGap>,
    pub(super) allowable: Result<Allowable, StrengthGap>,
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
            bounds.allowable = match (bounds.allowable, self.rated(temperature).allowable) {
                (Ok(own), Ok(rated)) if own.pressure <= rated.pressure => Ok(own),
                (Ok(_), rated) => rated,
                (Err(gap), _) => Err(gap),
            };
        }
        bounds
    }

    /// Allowable outside less inside pressure.
    pub(super) fn outside(
        &self,
        temperature: Temperature,
        factors: &Factors,
    ) -> Result<OutsideAllowable, StrengthGap> {
        if self.by_rating {
            return self.rated_outside(temperature);
        }
        let base = self.base.as_ref().map_err(|gap| *gap)?;
        let base = base.in_service(temperature)?;
        let own = match &base.material.kind {
            MaterialKind::Metal(metal) => base.metal_outside(metal, temperature, factors),
            MaterialKind::Glass(glass) => base.glass_outside(glass, factors),
        }?;
        Ok(match self.rated_outside(temperature) {
            Ok(rated) if rated.pressure < own.pressure => rated,
            _ => own,
        })
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

    /// The rating where it holds and somebody stands for it.
    fn rating_at(&self, temperature: Temperature) -> Result<&Rating, StrengthGap> {
        match &self.rating {
            None => Err(StrengthGap::NoRating),
            Some(rating) if rating.stated_by.trim().is_empty() => Err(StrengthGap::NoRating),
            Some(rating) if temperature < rating.coldest || temperature > rating.hottest => {
                let (coldest, hottest) = (rating.coldest, rating.hottest);
                Err(StrengthGap::RatedElsewhere { coldest, hottest })
            }
            Some(rating) => Ok(rating),
        }
    }

    fn rated(&self, temperature: Temperature) -> Bounds {
        match self.rating_at(temperature) {
            Ok(rating) => Bounds {
                burst: Err(StrengthGap::RatedOnly),
                allowable: Ok(Allowable {
                    pressure: rating.inside,
                    basis: AllowableBasis::Rated,
                }),
            },
            Err(gap) => Bounds::none(gap),
        }
    }

    fn rated_outside(&self, temperature: Temperature) -> Result<OutsideAllowable, StrengthGap> {
        let rating = self.rating_at(temperature)?;
        let pressure = rating.outside.ok_or(StrengthGap::NoOutsideRating)?;
        Ok(OutsideAllowable {
            pressure,
            basis: OutsideBasis::Rated,
            elastic: None,
        })
    }
}

impl Bounds {
    pub(super) fn none(gap: StrengthGap) -> Self {
        Self {
            burst: Err(gap),
            allowable: Err(gap),
        }
    }
}
