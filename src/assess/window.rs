//! The window of allowed mass: every requirement is a bound at a temperature.

use super::figure::{Figure, Missing};
use super::inventory::GasInventory;
use super::life::{Stretch, stretches};
use super::worst::Walls;
use crate::chamber::{Movement, Volumes};
use crate::design::{Design, Duty};
use crate::fluid::{Fluid, FluidError};
use crate::sealed::densest_within;
use crate::units::{Density, Mass, Pressure, Temperature, careful_down, careful_up};

/// What a bound on mass comes from.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum Requirement {
    /// Some liquid at the upper end of the working range, in the largest volume.
    LiquidWhenHot,
    /// Vapour space left at the hottest, in the smallest volume.
    Ullage,
    /// Liquid-full no nearer than the margin above the hottest, in the smallest volume.
    LiquidFullMargin,
    /// The frozen fluid must not fill the smallest volume.
    FrozenVolume,
    /// The pressure must stay at or below the allowable.
    AllowablePressure,
}

/// On which side of the window a bound lies.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum Side {
    AtLeast,
    AtMost,
}

/// One bound.
#[derive(Debug, Clone, PartialEq)]
pub struct Bound {
    pub requirement: Requirement,
    pub side: Side,
    pub mass: Mass,
    /// Where it acts.
    pub temperature: Temperature,
}

/// The intersection of all bounds on the sealed mass.
#[derive(Debug, Clone, PartialEq)]
pub struct Window {
    /// Highest lower bound; none where nothing asks for liquid.
    pub lower: Option<Bound>,
    /// Lowest upper bound.
    pub upper: Option<Bound>,
    /// All bounds, lower ones first.
    pub bounds: Vec<Bound>,
    /// Where the duty wants the charge; none in an empty window, and none where the
    /// duty aims at an inventory that is not computed.
    pub aim: Option<Mass>,
}

impl Window {
    /// The two ends collide: no mass meets both.
    pub fn is_empty(&self) -> bool {
        matches!((&self.lower, &self.upper), (Some(low), Some(high)) if low.mass >= high.mass)
    }

    /// The charge nearest to `nominal` that keeps its tolerance inside the window,
    /// rounded away from the ends; none where the window is too narrow for it.
    pub fn nearest(&self, nominal: Mass, tolerance: Mass) -> Option<Mass> {
        let (low, high) = self.ends()?;
        let low = careful_up(low.kilogram() + tolerance.kilogram(), 4);
        let high = careful_down(high.kilogram() - tolerance.kilogram(), 4);
        (low <= high)
            .then(|| Mass::from_kilogram(nominal.kilogram().clamp(low, high)).ok())
            .flatten()
    }

    /// Least and greatest mass, where both ends are known.
    pub fn ends(&self) -> Option<(Mass, Mass)> {
        let high = self.upper.as_ref()?.mass;
        let low = self
            .lower
            .as_ref()
            .map_or_else(|| Mass::from_kilogram(0.0).ok(), |b| Some(b.mass))?;
        Some((low, high))
    }
}

/// The inside at its corners, at any temperature.
pub struct Space<'a> {
    volumes: &'a Volumes,
    movement: Movement,
}

impl<'a> Space<'a> {
    pub const fn new(volumes: &'a Volumes, movement: Movement) -> Self {
        Self { volumes, movement }
    }

    fn least_m3(&self, temperature: Temperature) -> f64 {
        self.volumes.least.cubic_metre() * self.movement.growth(temperature.kelvin())
    }

    fn greatest_m3(&self, temperature: Temperature) -> f64 {
        self.volumes.greatest.cubic_metre() * self.movement.growth(temperature.kelvin())
    }
}

/// Share of the smallest volume that the frozen fluid may fill.
const FROZEN_SHARE: f64 = 0.95;

/// Every bound of a design, and their intersection.
///
/// # Errors
/// The first figure a bound needs and does not have.
pub fn window(
    design: &Design,
    fluid: &Fluid,
    space: &Space<'_>,
    walls: &Figure<Walls<'_>>,
    gas: &GasInventory,
) -> Figure<Window> {
    let mut bounds = Vec::new();
    if let Some(bound) = liquid_when_hot(design, fluid, space)? {
        bounds.push(bound);
    }
    bounds.extend(ullage(design, fluid, space)?);
    bounds.extend(liquid_full_margin(design, fluid, space)?);
    bounds.extend(frozen_volume(design, fluid, space));
    if let Ok(walls) = walls {
        bounds.extend(allowable(&stretches(design), fluid, space, walls, gas)?);
    }
    let end = |side: Side, better: fn(f64, f64) -> bool| {
        bounds
            .iter()
            .filter(|bound| bound.side == side)
            .fold(None::<&Bound>, |best, bound| match best {
                Some(best) if !better(bound.mass.kilogram(), best.mass.kilogram()) => Some(best),
                _ => Some(bound),
            })
    };
    let lower = end(Side::AtLeast, |a, b| a > b).cloned();
    let upper = end(Side::AtMost, |a, b| a < b).cloned();
    let mut window = Window {
        lower,
        upper,
        bounds,
        aim: None,
    };
    if !window.is_empty() {
        window.aim = aim(design, &window);
    }
    Ok(window)
}

/// The duty's place in the window.
fn aim(design: &Design, window: &Window) -> Option<Mass> {
    let (low, high) = window.ends().filter(|_| design.duty.aims_at_centre())?;
    Mass::from_kilogram(0.5 * (low.kilogram() + high.kilogram())).ok()
}

fn bound(
    requirement: Requirement,
    side: Side,
    density: f64,
    volume: f64,
    temperature: Temperature,
) -> Option<Bound> {
    let mass = Mass::from_kilogram(density * volume).ok()?;
    Some(Bound {
        requirement,
        side,
        mass,
        temperature,
    })
}

fn liquid_when_hot(design: &Design, fluid: &Fluid, space: &Space<'_>) -> Figure<Option<Bound>> {
    if design.duty == Duty::PlainVessel {
        return Ok(None);
    }
    let t = design.conditions.working_high;
    fluid.saturation_pressure(t)?;
    let vapour = fluid.curve()?.at(t.kelvin()).vapour_kg_per_m3;
    Ok(bound(
        Requirement::LiquidWhenHot,
        Side::AtLeast,
        vapour,
        space.greatest_m3(t),
        t,
    ))
}

/// Undefined above the critical temperature: there the pressure governs.
fn ullage(design: &Design, fluid: &Fluid, space: &Space<'_>) -> Figure<Option<Bound>> {
    let t = design.conditions.hottest;
    let share = design.demands.ullage.fraction();
    match fluid.saturation_pressure(t) {
        Ok(_) => {
            let at = fluid.curve()?.at(t.kelvin());
            let density = (1.0 - share) * at.liquid_kg_per_m3 + share * at.vapour_kg_per_m3;
            Ok(bound(
                Requirement::Ullage,
                Side::AtMost,
                density,
                space.least_m3(t),
                t,
            ))
        }
        Err(FluidError::NoSaturation { critical, .. }) if t >= critical || is_equation(fluid) => {
            Ok(None)
        }
        Err(FluidError::Frozen { .. }) => Ok(None),
        Err(error) => Err(error.into()),
    }
}

/// At the temperature `hottest + margin` the mean density may not exceed ρ′. Where
/// that lies above the critical temperature and the hottest below it, the unit must
/// dry out and not fill: the critical density. Water's liquid is lightest at one of
/// the two ends of the range, so both are asked.
fn liquid_full_margin(design: &Design, fluid: &Fluid, space: &Space<'_>) -> Figure<Option<Bound>> {
    let conditions = &design.conditions;
    let t = conditions
        .hottest
        .shifted(design.demands.liquid_full_margin);
    let critical = fluid.critical();
    let (low, top) = fluid.saturation_range();
    if conditions.hottest.kelvin() >= critical.temperature_k {
        return Ok(None);
    }
    let mass_kg = if t > top && is_equation(fluid) {
        let at = Temperature::from_kelvin(critical.temperature_k).unwrap_or(t);
        critical.density_kg_per_m3 * space.least_m3(at.min(t))
    } else {
        match fluid.saturation_pressure(t) {
            Ok(_) => {}
            Err(FluidError::Frozen { .. }) => return Ok(None),
            Err(error) => return Err(error.into()),
        }
        let curve = fluid.curve()?;
        let cold = conditions
            .coldest
            .max(low)
            .max(fluid.freezing_point())
            .min(t);
        let full = |t: Temperature| curve.at(t.kelvin()).liquid_kg_per_m3 * space.least_m3(t);
        full(t).min(full(cold))
    };
    Ok(bound(
        Requirement::LiquidFullMargin,
        Side::AtMost,
        mass_kg,
        1.0,
        t,
    ))
}

fn frozen_volume(design: &Design, fluid: &Fluid, space: &Space<'_>) -> Option<Bound> {
    let freezing = fluid.freezing_point();
    let solid = fluid.solid_density()?;
    if design.conditions.coldest >= freezing {
        return None;
    }
    bound(
        Requirement::FrozenVolume,
        Side::AtMost,
        FROZEN_SHARE * solid.value,
        space.least_m3(freezing),
        freezing,
    )
}

/// The mass that stands at the allowable pressure, with its gas, least over the hottest and every
/// temperature in range where a strength bends: between those the hottest governs.
fn allowable(
    stretches: &[Stretch],
    fluid: &Fluid,
    space: &Space<'_>,
    walls: &Walls<'_>,
    gas: &GasInventory,
) -> Figure<Option<Bound>> {
    let freezing = fluid.freezing_point();
    let mut least: Option<(Density, Temperature)> = None;
    let moments = stretches
        .iter()
        .filter(|stretch| stretch.is_sealed())
        .flat_map(|stretch| {
            let temperatures = stretch.temperatures(&walls.knots);
            let warm = temperatures.filter(|t| *t > stretch.coldest || *t == stretch.hottest);
            warm.map(move |t| (stretch.least_outside, t))
        });
    for (outside, t) in moments.filter(|(_, t)| *t >= freezing) {
        let allowable = walls.envelope.weakest(t)?.allowable.pressure;
        let limit = (allowable.pascal() + outside.pascal()) / (1.0 + fluid.pressure_uncertainty());
        let Ok(limit) = Pressure::from_pascal(limit) else {
            continue;
        };
        let densest = if gas.is_empty() {
            fluid.densest_within(limit, t, None)
        } else {
            let volume_m3 = space.least_m3(t);
            let drawn_m3 = space.volumes.least.cubic_metre();
            let amount_mol = |rho: f64| gas.with(rho * volume_m3, drawn_m3).total();
            densest_within(fluid, limit, t, volume_m3, gas.ostwald(), amount_mol)
        };
        if let Some(density) = densest.map_err(Missing::Fluid)?
            && least.is_none_or(|(found, _)| density < found)
        {
            least = Some((density, t));
        }
    }
    Ok(least.and_then(|(density, t)| {
        let density = density.kilogram_per_cubic_metre();
        bound(
            Requirement::AllowablePressure,
            Side::AtMost,
            density,
            space.least_m3(t),
            t,
        )
    }))
}

fn is_equation(fluid: &Fluid) -> bool {
    matches!(fluid.model(), crate::fluid::Model::Equation(_))
}
