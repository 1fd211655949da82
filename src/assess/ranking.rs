//! The whole catalogue in this design: what every other fluid would do in the same
//! chamber at the same fill ratio.
//!
//! Kept out of [`super::Assessment`]: only the table of fluids asks for it. Every
//! figure comes from the saturation expansions or, outside the dome, from one
//! evaluation of the model, so that the table follows a slider.

use std::sync::Arc;

use super::figure::Missing;
use super::inventory::{GasInventory, Seal};
use super::{Assessment, Figure};
use crate::chamber::Movement;
use crate::design::{Design, Duty};
use crate::fluid::{DomeSide, Fluid, FluidError, Regime, StabilityKind};
use crate::hazard::{CompatibilityTable, PairVerdict};
use crate::sealed::SealedUnit;
use crate::units::{Density, Mass, Pressure, Temperature, Volume};

/// One fluid in the design's chamber at the design's fill ratio.
#[derive(Debug, Clone, PartialEq)]
pub struct Ranked {
    pub fluid: Arc<Fluid>,
    /// The charge that gives the same fill ratio at the bench.
    pub mass: Figure<Mass>,
    /// Pressure and regime of the nominal unit.
    pub at_hottest: Figure<(Pressure, Regime)>,
    pub at_coldest: Figure<(Pressure, Regime)>,
    /// Slope of the vapour pressure in the middle of the working range, Pa/K.
    pub slope: Figure<f64>,
    /// ρ′ σ h / μ′ in the middle of the working range, W/m²: what a wick can carry.
    pub merit: Option<f64>,
    pub dry_out: Option<Temperature>,
    pub liquid_full: Option<Temperature>,
    /// Why it cannot be used here as it is; worst first.
    pub objections: Vec<Objection>,
}

/// Why a fluid is excluded; each is an error finding of the design that takes it.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Objection {
    Unstable(StabilityKind),
    TooHotForFluid,
    NotForConsumers,
    Incompatible,
    OverAllowable,
    LiquidFull,
    Frozen,
    /// Solid where it is filled: no fill ratio.
    FrozenOnBench,
    Dry,
    /// The model does not reach a temperature that is asked for.
    OutsideModel,
}

/// What a candidate is measured against; worked out once for all of them.
struct Yardstick<'a> {
    design: &'a Design,
    seal: Seal<'a>,
    /// Fill ratio of the inside at the bench.
    fill: Figure<f64>,
    volume_m3: f64,
    movement: Movement,
    middle: Temperature,
    /// Liquid-full is too near below this.
    full_from: Temperature,
    /// Absolute allowable pressure at the hottest and at the coldest, where known.
    allowable: [Option<Pressure>; 2],
    materials: Vec<&'a str>,
}

/// Every fluid given, in the order a designer would try them: those without objection
/// first and, among them, by the figure that the duty lives on.
pub fn rank(
    design: &Design,
    a: &Assessment,
    fluids: impl IntoIterator<Item = Arc<Fluid>>,
) -> Vec<Ranked> {
    let yardstick = Yardstick::new(design, a);
    let mut ranked: Vec<Ranked> = fluids
        .into_iter()
        .map(|fluid| yardstick.measure(fluid))
        .collect();
    ranked.sort_by(|x, y| {
        let key = |r: &Ranked| (r.objections.len(), -worth(design.duty, r));
        let ((a, b), (c, d)) = (key(x), key(y));
        a.cmp(&c).then(b.total_cmp(&d))
    });
    ranked
}

/// The duty's own figure, greater is better; not known comes last.
fn worth(duty: Duty, ranked: &Ranked) -> f64 {
    let known = |value: Option<f64>| value.unwrap_or(f64::NEG_INFINITY);
    match duty {
        Duty::HeatPipe | Duty::VapourChamber | Duty::Thermosyphon | Duty::PulsatingLoop => {
            known(ranked.merit)
        }
        Duty::SensingBulb | Duty::LiquidLift => known(ranked.slope.as_ref().ok().copied()),
        Duty::PlainVessel => known(ranked.at_hottest.as_ref().ok().map(|(p, _)| -p.pascal())),
    }
}

/// The merit number ρ′ σ h / μ′ (P. D. Dunn and D. A. Reay, Heat Pipes, from memory), W/m²,
/// where surface tension and viscosity are known.
fn merit(fluid: &Fluid, t: Temperature) -> Option<f64> {
    let slope = fluid.saturation_slope(t).ok()?;
    let at = fluid.curve().ok()?.at(t.kelvin());
    let (liquid, vapour) = (at.liquid_kg_per_m3, at.vapour_kg_per_m3);
    // Clausius and Clapeyron.
    let latent_heat = t.kelvin() * slope * (1.0 / vapour - 1.0 / liquid);
    Some(liquid * fluid.surface_tension(t)? * latent_heat / fluid.liquid_viscosity(t)?)
}

impl<'a> Yardstick<'a> {
    fn new(design: &'a Design, a: &'a Assessment) -> Self {
        let conditions = &design.conditions;
        let kelvin = |t: f64| Temperature::from_kelvin(t).unwrap_or(conditions.working_high);
        let middle = 0.5 * (conditions.working_low.kelvin() + conditions.working_high.kelvin());
        let limit = |t| a.limits_at(t).map(|(allowable, _)| allowable);
        let fill = match &a.charge {
            Ok(charge) => charge.bench_fill.clone(),
            Err(missing) => Err(missing.clone()),
        };
        Self {
            design,
            seal: Seal::of(design, a.movement),
            fill,
            volume_m3: a.volumes.as_ref().map_or(0.0, |v| v.nominal.cubic_metre()),
            movement: a.movement,
            middle: kelvin(middle),
            full_from: conditions
                .hottest
                .shifted(design.demands.liquid_full_margin),
            allowable: [limit(conditions.hottest), limit(conditions.coldest)],
            materials: design.chamber.materials(),
        }
    }

    fn measure(&self, fluid: Arc<Fluid>) -> Ranked {
        let conditions = &self.design.conditions;
        let density = self.density(&fluid);
        let unit = density
            .clone()
            .and_then(|density| self.unit(&fluid, density));
        let state = |t: Temperature| {
            let state = unit.clone()?.state(t)?;
            Ok((state.pressure, state.regime))
        };
        let at_hottest = state(conditions.hottest);
        let at_coldest = state(conditions.coldest);
        let slope = fluid.saturation_slope(self.middle).map_err(Missing::Fluid);
        let (mut dry_out, mut liquid_full) = (None, None);
        for crossing in density
            .clone()
            .ok()
            .and_then(|density| {
                let growth = |t| self.movement.growth(t);
                fluid.crossings_growing(density, growth).ok()
            })
            .into_iter()
            .flatten()
        {
            match crossing.side {
                DomeSide::Vapour => dry_out = Some(crossing.temperature),
                DomeSide::Liquid | DomeSide::Critical => liquid_full = Some(crossing.temperature),
            }
        }
        let mass = density.and_then(|density| {
            Mass::from_kilogram(density.kilogram_per_cubic_metre() * self.volume_m3)
                .map_err(|_| Missing::NoCharge)
        });
        let mut ranked = Ranked {
            merit: merit(&fluid, self.middle),
            fluid,
            mass,
            at_hottest,
            at_coldest,
            slope,
            dry_out,
            liquid_full,
            objections: Vec::new(),
        };
        ranked.objections = self.objections(&ranked);
        ranked
    }

    /// The nominal unit in walls that do not yield, with its gas.
    fn unit(&self, fluid: &Arc<Fluid>, density: Density) -> Figure<SealedUnit> {
        let mass_kg = density.kilogram_per_cubic_metre() * self.volume_m3;
        let mass = Mass::from_kilogram(mass_kg).map_err(|_| Missing::NoCharge)?;
        let volume = Volume::from_cubic_metre(self.volume_m3).map_err(|_| Missing::NoCharge)?;
        let unit = SealedUnit::new(Arc::clone(fluid), mass, volume)
            .map_err(|_| Missing::NoCharge)?
            .with_walls(self.movement.rigid(), self.design.conditions.least_outside);
        let gas = GasInventory::new(&self.seal, fluid);
        if gas.is_empty() {
            return Ok(unit);
        }
        let amount = gas.amount(mass_kg, self.volume_m3);
        Ok(unit.with_gas(amount, gas.ostwald()))
    }

    /// Mean density in the volume at its reference, at the design's fill ratio.
    fn density(&self, fluid: &Fluid) -> Figure<Density> {
        let fill = self.fill.clone()?;
        let bench = self.design.conditions.bench;
        fluid.saturation_pressure(bench)?;
        let at = fluid.curve()?.at(bench.kelvin());
        Density::from_kilogram_per_cubic_metre(
            self.movement.growth(bench.kelvin())
                * (fill * at.liquid_kg_per_m3 + (1.0 - fill) * at.vapour_kg_per_m3),
        )
        .map_err(|_| Missing::NoCharge)
    }

    fn objections(&self, ranked: &Ranked) -> Vec<Objection> {
        let conditions = &self.design.conditions;
        let fluid = &ranked.fluid;
        let safety = fluid.safety();
        let mut found: Vec<Objection> = safety
            .stability
            .iter()
            .filter(|stability| stability.kind.blocks())
            .map(|stability| Objection::Unstable(stability.kind))
            .collect();
        let mut object = |wrong: bool, objection: Objection| {
            if wrong {
                found.push(objection);
            }
        };
        let stable = safety.highest_stable_temperature_k.as_ref();
        object(
            stable.is_some_and(|stable| conditions.hottest.kelvin() > stable.value),
            Objection::TooHotForFluid,
        );
        object(
            self.design.room.consumers && safety.consumer_restriction.is_some(),
            Objection::NotForConsumers,
        );
        let table = CompatibilityTable::built_in();
        object(
            self.materials.iter().any(|material| {
                let pair = table.of(fluid.id(), material);
                pair.is_some_and(|pair| pair.verdict == PairVerdict::Never)
            }),
            Objection::Incompatible,
        );
        let over =
            |figure: &Figure<(Pressure, Regime)>, limit: Option<Pressure>| match (figure, limit) {
                (Ok((pressure, _)), Some(limit)) => {
                    pressure.pascal() * (1.0 + fluid.pressure_uncertainty()) > limit.pascal()
                }
                (
                    Err(Missing::Fluid(
                        FluidError::PressureTooHigh { .. } | FluidError::Solid { .. },
                    )),
                    Some(_),
                ) => true,
                _ => false,
            };
        object(
            over(&ranked.at_hottest, self.allowable[0])
                || over(&ranked.at_coldest, self.allowable[1]),
            Objection::OverAllowable,
        );
        object(
            ranked.liquid_full.is_some_and(|t| t < self.full_from),
            Objection::LiquidFull,
        );
        object(
            fluid.freezing_point() > conditions.working_low,
            Objection::Frozen,
        );
        object(
            fluid.freezing_point() > conditions.bench,
            Objection::FrozenOnBench,
        );
        object(
            self.design.duty != Duty::PlainVessel
                && ranked.dry_out.is_some_and(|t| t < conditions.working_high),
            Objection::Dry,
        );
        let outside = |missing: &Missing| matches!(missing, Missing::Fluid(error) if !matches!(error, FluidError::Frozen { .. } | FluidError::PressureTooHigh { .. } | FluidError::Solid { .. }));
        object(
            [&ranked.at_hottest, &ranked.at_coldest]
                .into_iter()
                .any(|figure| figure.as_ref().err().is_some_and(outside)),
            Objection::OutsideModel,
        );
        found.sort_unstable();
        found.dedup();
        found
    }
}
