//! What physics says about a design: pure, total, deterministic.
//!
//! [`assess`] always returns. A figure that cannot be had is an `Err` in its
//! field with the one reason, and a finding.

mod charge;
mod chart;
mod figure;
mod finding;
mod gas;
mod inventory;
mod judge;
mod life;
mod outside;
mod place;
mod ranking;
mod window;
mod worst;

use std::sync::Arc;

use crate::chamber::{Envelope, Material, Materials, Movement, NamedVolumes, Volumes};
use crate::design::Design;
use crate::fluid::{Catalog, DomeSide, Fluid, FluidError, Regime};
use crate::hazard::{EnergyError, Release, release, rupture_energy};
use crate::sealed::SealedUnit;
use crate::units::{Energy, Mass, Pressure, Temperature};

pub use charge::{ChargeFigures, Corners};
pub use chart::{ChargeMap, Charts, LimitPoint, MapPoint};
pub use figure::{Figure, Missing};
pub use finding::{Finding, FindingKind, Section, Severity, Verdict};
pub use gas::{Blocked, DissolvedAir, LiftLoss, ResidualGas};
pub use inventory::{GasInventory, SealedGas};
pub use life::Stretch;
pub use outside::OutsideCase;
pub use place::LiquidPlace;
pub use ranking::{Objection, Ranked, rank};
pub use window::{Bound, Requirement, Side, Window};
pub use worst::{Walls, WorstCase};

/// What a design is assessed against.
#[derive(Debug, Clone)]
pub struct Library {
    pub fluids: Catalog,
    pub materials: Materials,
}

impl Library {
    /// The fluids and materials that come with the program.
    pub fn built_in() -> Self {
        Self {
            fluids: Catalog::built_in(),
            materials: Materials::built_in(),
        }
    }
}

/// Something that happens to the sealed unit at one temperature.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Event {
    pub kind: EventKind,
    pub temperature: Temperature,
}

#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum EventKind {
    Freezing,
    DryOut,
    LiquidFull,
    /// The mean density meets the dome at the critical point.
    Critical,
    AllowableReached,
}

/// All that is known of a design.
#[derive(Debug, Clone, PartialEq)]
pub struct Assessment {
    pub fluid: Arc<Fluid>,
    /// The user's own materials in the chamber, each once, in the order of the parts.
    pub own_materials: Vec<Arc<Material>>,
    /// The inside at the reference temperature.
    pub volumes: Figure<Volumes>,
    pub named: Figure<NamedVolumes>,
    pub movement: Movement,
    pub envelope: Envelope,
    pub least_outside: Pressure,
    pub charge: Figure<ChargeFigures>,
    /// The nominal unit and its worst corners; answers `state` for any temperature.
    pub corners: Figure<Corners>,
    /// Of the nominal unit, ascending, over the whole range of the model.
    pub events: Figure<Vec<Event>>,
    /// Liquid-full temperature of the heaviest corner.
    pub heaviest_full_at: Figure<Option<Temperature>>,
    /// Where the heaviest corner, with the model's uncertainty, reaches the allowable.
    pub heaviest_over_at: Figure<Option<Temperature>>,
    /// Dry-out temperature of the lightest corner.
    pub lightest_dry_at: Figure<Option<Temperature>>,
    /// The worst moment of every sealed stretch of life.
    pub inside: Figure<Vec<WorstCase>>,
    /// The one of them that governs.
    pub worst: Figure<WorstCase>,
    /// Of nominal amount, at its pressures in the heaviest corner.
    pub gas: Figure<ResidualGas>,
    /// The hottest at which the empty unit may be pumped out in the air, from the bench up.
    pub vacuum_stands_to: Option<Temperature>,
    /// The worst moment of every stretch of life in which the outside presses.
    pub outside: Vec<OutsideCase>,
    pub window: Figure<Window>,
    pub charts: Figure<Charts>,
    pub release: Figure<Release>,
    /// Energy set free on rupture at the hottest.
    pub rupture: Figure<Result<Energy, EnergyError>>,
    /// Worst first.
    pub findings: Vec<Finding>,
    pub verdict: Verdict,
}

/// What physics says about a design.
///
/// # Panics
/// Never for a design that was read or edited against this library: its fluid is looked
/// up when it is read.
pub fn assess(design: &Design, library: &Library) -> Assessment {
    let fluid = library
        .fluids
        .by_id(design.fluid.as_str())
        .expect("a design's fluid is looked up when it is read");
    let chamber = &design.chamber;
    let named = chamber
        .named_volumes(&library.materials)
        .map_err(Missing::from);
    let volumes = named
        .as_ref()
        .map(|named| named.inside)
        .map_err(Clone::clone);
    let movement = Movement::of(chamber, &library.materials);
    let envelope = Envelope::new(
        chamber,
        &library.materials,
        design.demands.factors,
        design.conditions.across_wall,
    );
    let walls = Walls {
        envelope: &envelope,
        least_outside: design.conditions.least_outside,
        knots: envelope.knots(),
    };
    let charge = named
        .as_ref()
        .map_err(Clone::clone)
        .and_then(|v| charge::charge_figures(design, &fluid, v, movement));
    let inventory = GasInventory::new(&inventory::Seal::of(design, movement), &fluid);
    let corners = match (&charge, &volumes) {
        (Ok(charge), Ok(volumes)) => {
            let outside = design.conditions.least_outside;
            charge::corners(&fluid, charge, volumes, movement, outside, &inventory)
        }
        (Err(missing), _) | (_, Err(missing)) => Err(missing.clone()),
    };
    let with_corners = || corners.as_ref().map_err(Missing::clone);
    let events = with_corners().and_then(|c| events(c, &walls));
    let heaviest_full_at = with_corners().and_then(|c| side_of(&c.heaviest, DomeSide::Liquid));
    let heaviest_over_at = with_corners()
        .and_then(|c| reaches_allowable(&c.heaviest, &walls, fluid.pressure_uncertainty()));
    let lightest_dry_at = with_corners().and_then(|c| match &c.lightest {
        Some(unit) => side_of(unit, DomeSide::Vapour),
        // A charge that may be nothing has a finding of its own.
        None => Ok(None),
    });
    let stretches = life::stretches(design);
    let inside = with_corners().and_then(|c| worst::worst_cases(&stretches, c, &walls));
    let worst = match &inside {
        Ok(cases) => worst::governing(cases),
        Err(missing) => Err(missing.clone()),
    };
    let gas = match (&corners, &named) {
        (Ok(corners), Ok(named)) => Ok(gas::residual_gas(design, &inventory, corners, named)),
        (Err(missing), _) | (_, Err(missing)) => Err(missing.clone()),
    };
    let vacuum_stands_to =
        outside::vacuum_stands_to(&walls, design.conditions.bench, design.conditions.barometer);
    let outside = outside::outside_cases(&stretches, corners.as_ref().ok(), &walls);
    let walls_known = match &worst {
        Ok(case) => case
            .weakest
            .as_ref()
            .map(|_| walls.clone())
            .map_err(|e| Missing::Strength(e.clone())),
        Err(missing) => Err(missing.clone()),
    };
    let window = volumes.as_ref().map_err(Missing::clone).and_then(|v| {
        window::window(
            design,
            &fluid,
            &window::Space::new(v, movement),
            &walls_known,
            &inventory,
        )
    });
    let charts = with_corners().map(|c| {
        let kinks: Vec<Temperature> = events
            .iter()
            .flatten()
            .map(|event| event.temperature)
            .collect();
        let upper = window
            .as_ref()
            .ok()
            .and_then(|w| Some(w.upper.as_ref()?.mass));
        chart::charts(&c.nominal, chart::span(design), &kinks, &walls, upper)
    });
    let release = charge
        .as_ref()
        .map_err(Missing::clone)
        .and_then(|c| release(&fluid, c.greatest, &design.room).ok_or(Missing::NoRoom));
    let rupture = with_corners().map(|c| rupture_energy(&c.heaviest, design.conditions.hottest));
    let mut assessment = Assessment {
        fluid,
        own_materials: own_materials(design, library),
        volumes,
        named,
        movement,
        least_outside: design.conditions.least_outside,
        charge,
        corners,
        events,
        heaviest_full_at,
        heaviest_over_at,
        lightest_dry_at,
        inside,
        worst,
        gas,
        vacuum_stands_to,
        outside,
        window,
        charts,
        release,
        rupture,
        findings: Vec::new(),
        verdict: Verdict::NotFit,
        envelope,
    };
    assessment.findings = judge::findings(design, library, &assessment);
    assessment.verdict = Verdict::of(&assessment.findings);
    assessment
}

fn own_materials(design: &Design, library: &Library) -> Vec<Arc<Material>> {
    let mut found: Vec<Arc<Material>> = Vec::new();
    for id in design.chamber.materials_in_order() {
        let known = library.materials.get(id);
        let own = known.filter(|material| material.own_file().is_some());
        if let Some(own) = own.filter(|own| found.iter().all(|known| known.id != own.id)) {
            found.push(Arc::clone(own));
        }
    }
    found
}

impl Assessment {
    /// The moment at which the walls are nearest to giving way from outside.
    pub fn worst_outside(&self) -> Option<&OutsideCase> {
        outside::governing(&self.outside)
    }

    /// Allowable and burst pressure of the weakest part at a temperature, absolute.
    pub fn limits_at(&self, temperature: Temperature) -> Option<(Pressure, Option<Pressure>)> {
        let weakest = self.envelope.weakest(temperature).ok()?;
        let burst = weakest.burst.ok().map(|burst| self.absolute(burst));
        Some((self.absolute(weakest.allowable.pressure), burst))
    }

    /// A load on the wall as an absolute inside pressure.
    pub fn absolute(&self, load: Pressure) -> Pressure {
        worst::absolute(load, self.least_outside)
    }

    /// The charge nearest to the present one that the window allows.
    pub fn nearest_charge(&self, tolerance: Mass) -> Option<Mass> {
        let (window, charge) = (self.window.as_ref().ok()?, self.charge.as_ref().ok()?);
        window.nearest(charge.nominal, tolerance)
    }
}

/// The temperature at which a unit leaves the dome by this side: its hottest crossing,
/// since water may touch its liquid line near 4 °C as well. A unit that is on that
/// side wherever the fluid is liquid is so from the lowest temperature on.
fn side_of(unit: &SealedUnit, side: DomeSide) -> Figure<Option<Temperature>> {
    let crossings = unit.crossings()?;
    let fluid = unit.fluid();
    if crossings.is_empty() {
        let (low, _) = fluid.saturation_range();
        let low = low.max(fluid.freezing_point());
        // Too dense even for the model counts as liquid: it is past every liquid line.
        let is_there = match (unit.state(low), side) {
            (Ok(state), DomeSide::Liquid) => state.regime == Regime::LiquidFull,
            (Ok(state), DomeSide::Vapour) => state.regime == Regime::AllVapour,
            (
                Err(
                    FluidError::TooDense { .. }
                    | FluidError::PressureTooHigh { .. }
                    | FluidError::Solid { .. }
                    | FluidError::NoCompressedLiquid { .. },
                ),
                side,
            ) => side == DomeSide::Liquid,
            _ => false,
        };
        return Ok(is_there.then_some(low));
    }
    // At the critical point a unit denser than critical leaves by the liquid's side.
    let critical = fluid.critical();
    let at_critical = Temperature::from_kelvin(critical.temperature_k)
        .map_or(0.0, |t| unit.mean_density_at(t).kilogram_per_cubic_metre());
    let critical = if at_critical >= critical.density_kg_per_m3 {
        DomeSide::Liquid
    } else {
        DomeSide::Vapour
    };
    let on_side = crossings.iter().rfind(|crossing| {
        crossing.side == side || (crossing.side == DomeSide::Critical && side == critical)
    });
    Ok(on_side.map(|crossing| crossing.temperature))
}

/// The lowest temperature at which a unit's pressure, a share of it added, reaches the
/// allowable.
fn reaches_allowable(
    unit: &SealedUnit,
    walls: &Walls<'_>,
    added: f64,
) -> Figure<Option<Temperature>> {
    let fluid = unit.fluid();
    let (low, high) = fluid.range();
    let limit = |t: Temperature| {
        let allowable = walls.allowable_pressure(t).ok()?;
        Pressure::from_pascal(allowable.pascal() / (1.0 + added)).ok()
    };
    let between = (low.max(fluid.freezing_point()), high);
    // A unit that is full, or past its walls, where the fluid melts is so from there on.
    let is_over = match unit.state(between.0) {
        Ok(state) => limit(between.0).is_some_and(|limit| state.pressure >= limit),
        Err(FluidError::NoCompressedLiquid { .. } | FluidError::PressureTooHigh { .. }) => true,
        Err(_) => false,
    };
    if is_over {
        return Ok(Some(between.0));
    }
    Ok(unit.meets(limit, between, &walls.knots)?.first().copied())
}

fn events(corners: &Corners, walls: &Walls<'_>) -> Figure<Vec<Event>> {
    let unit = &corners.nominal;
    let fluid = unit.fluid();
    let mut events = vec![Event {
        kind: EventKind::Freezing,
        temperature: fluid.freezing_point(),
    }];
    for crossing in unit.crossings()? {
        let kind = match crossing.side {
            DomeSide::Vapour => EventKind::DryOut,
            DomeSide::Liquid => EventKind::LiquidFull,
            DomeSide::Critical => EventKind::Critical,
        };
        events.push(Event {
            kind,
            temperature: crossing.temperature,
        });
    }
    if let Some(temperature) = reaches_allowable(unit, walls, 0.0)? {
        events.push(Event {
            kind: EventKind::AllowableReached,
            temperature,
        });
    }
    events.sort_by(|a, b| a.temperature.kelvin().total_cmp(&b.temperature.kelvin()));
    Ok(events)
}
