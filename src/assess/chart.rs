//! Lines of the charge map and of the pressure plot, solved point by point.

use super::figure::Figure;
use super::worst::Walls;
use crate::design::Design;
use crate::fluid::Fluid;
use crate::sealed::{PathPoint, SealedUnit, densest_within, path};
use crate::units::{Density, Mass, Pressure, Quantity, Temperature};

/// Points of the sealed path.
const PATH_POINTS: usize = 400;
/// Points of a boundary line of the map.
const MAP_POINTS: usize = 97;

/// A point of the charge map.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct MapPoint {
    pub mass: Mass,
    pub temperature: Temperature,
}

/// Boundaries between the areas of the charge map.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct ChargeMap {
    /// Left of it the unit is all vapour; ends at the critical temperature.
    pub dry_out: Vec<MapPoint>,
    /// Right of it the unit is liquid-full; ends at the critical temperature.
    pub liquid_full: Vec<MapPoint>,
    /// Right of it the pressure is above the allowable.
    pub allowable: Vec<MapPoint>,
    /// Below it the fluid is frozen.
    pub freezing: Option<Temperature>,
    pub critical: Option<Temperature>,
}

/// One point of the lines over temperature.
#[derive(Debug, Clone, PartialEq)]
pub struct LimitPoint {
    pub temperature: Temperature,
    /// Vapour pressure, where there is a saturation.
    pub saturation: Option<Pressure>,
    /// Allowable inside pressure of the weakest part, absolute.
    pub allowable: Option<Pressure>,
    /// Burst pressure of the weakest part, absolute.
    pub burst: Option<Pressure>,
}

/// What the pictures show.
#[derive(Debug, Clone, PartialEq)]
pub struct Charts {
    /// Temperatures drawn: coldest to hottest and some on both sides.
    pub span: (Temperature, Temperature),
    /// Greatest mass drawn.
    pub greatest_mass: Mass,
    pub path: Vec<PathPoint>,
    pub limits: Vec<LimitPoint>,
    pub map: ChargeMap,
}

/// Temperatures to draw: the conditions with an eighth of their span on both sides,
/// at least 10 K, so that the events just outside are seen.
pub fn span(design: &Design) -> (Temperature, Temperature) {
    let conditions = &design.conditions;
    let low = conditions.coldest.min(conditions.hottest).kelvin();
    let high = conditions.hottest.max(conditions.coldest).kelvin();
    let pad = (0.125 * (high - low)).max(10.0);
    let (_, hottest) = Temperature::RANGE;
    let kelvin = |t: f64| {
        Temperature::from_kelvin(t.clamp(1.0, hottest)).expect("clamped into the type's range")
    };
    (kelvin(low - pad), kelvin(high + pad))
}

/// Every line of the pictures.
pub fn charts(
    unit: &SealedUnit,
    span: (Temperature, Temperature),
    kinks: &[Temperature],
    walls: &Walls<'_>,
    window_end: Option<Mass>,
) -> Charts {
    let fluid = unit.fluid();
    let map = charge_map(unit, span, walls);
    let rightmost = map
        .liquid_full
        .iter()
        .map(|point| point.mass.kilogram())
        .chain(window_end.map(Mass::kilogram))
        .fold(unit.mass().kilogram(), f64::max);
    Charts {
        span,
        greatest_mass: Mass::from_kilogram(1.08 * rightmost).unwrap_or(unit.mass()),
        path: path(unit, span, PATH_POINTS, kinks),
        limits: limits(fluid, span, walls),
        map,
    }
}

fn limits(fluid: &Fluid, span: (Temperature, Temperature), walls: &Walls<'_>) -> Vec<LimitPoint> {
    let knots = walls.knots.iter().copied().chain([fluid.freezing_point()]);
    temperatures(span, knots)
        .map(|temperature| {
            let weakest = walls.envelope.weakest(temperature).ok();
            LimitPoint {
                temperature,
                saturation: fluid.saturation_pressure(temperature).ok(),
                allowable: weakest
                    .as_ref()
                    .map(|w| walls.absolute(w.allowable.pressure)),
                burst: weakest
                    .and_then(|w| w.burst.ok())
                    .map(|burst| walls.absolute(burst)),
            }
        })
        .collect()
}

fn charge_map(unit: &SealedUnit, span: (Temperature, Temperature), walls: &Walls<'_>) -> ChargeMap {
    let fluid = unit.fluid();
    let mut map = ChargeMap::default();
    let (low, high) = fluid.saturation_range();
    let freezing = fluid.freezing_point();
    let critical = fluid.critical();
    let at = |density: f64, temperature: Temperature| {
        let mass = Mass::from_kilogram(density * unit.volume_at_m3(temperature)).ok()?;
        Some(MapPoint { mass, temperature })
    };
    let from = span.0.max(low).max(freezing);
    let to = span.1.min(high);
    map.freezing = (freezing > span.0 && freezing < span.1).then_some(freezing);
    if let (true, Ok(curve)) = (from < to, fluid.curve()) {
        for temperature in temperatures((from, to), []) {
            let point = curve.at(temperature.kelvin());
            map.dry_out.extend(at(point.vapour_kg_per_m3, temperature));
            map.liquid_full
                .extend(at(point.liquid_kg_per_m3, temperature));
        }
    }
    if let Ok(t) = Temperature::from_kelvin(critical.temperature_k)
        && t > span.0
        && t < span.1
        && to >= high
    {
        map.critical = Some(t);
        map.dry_out.extend(at(critical.density_kg_per_m3, t));
        map.liquid_full.extend(at(critical.density_kg_per_m3, t));
    }
    let (_, top) = fluid.range();
    let range = (span.0.max(fluid.range().0).max(freezing), span.1.min(top));
    if range.0 < range.1 {
        map.allowable = allowable_line(unit, range, walls).unwrap_or_default();
    }
    map
}

/// The contour p(m, T) = allowable. It follows the liquid line, crosses the dome
/// level where the vapour pressure meets the allowable, and leaves along the vapour.
fn allowable_line(
    unit: &SealedUnit,
    range: (Temperature, Temperature),
    walls: &Walls<'_>,
) -> Figure<Vec<MapPoint>> {
    if unit.gas().is_some() {
        return allowable_line_with_gas(unit, range, walls);
    }
    let fluid = unit.fluid();
    let mut line = Vec::new();
    let curve = fluid.curve()?;
    let at = |density: f64, temperature: Temperature| {
        let mass = Mass::from_kilogram(density * unit.volume_at_m3(temperature)).ok()?;
        Some(MapPoint { mass, temperature })
    };
    let gap_below =
        |limit: Option<Pressure>, t: Temperature| match (fluid.saturation_pressure(t), limit) {
            (Ok(p), Some(limit)) => p.pascal() - limit.pascal(),
            _ => f64::NAN,
        };
    let mut before: Option<(Temperature, f64)> = None;
    let mut behind: [Option<f64>; 2] = [None, None];
    for temperature in temperatures(range, walls.knots.iter().copied()) {
        let limit = walls.allowable_pressure(temperature).ok();
        let gap = gap_below(limit, temperature);
        if let Some((earlier, gap_before)) = before
            && gap_before.is_finite()
            && gap.is_finite()
            && gap_before.signum() != gap.signum()
            && let Ok(level) = crate::solve::bracketed_root(
                |t| {
                    Temperature::from_kelvin(t)
                        .map_or(f64::NAN, |t| gap_below(walls.allowable_pressure(t).ok(), t))
                },
                earlier.kelvin(),
                temperature.kelvin(),
                1e-9,
            )
            && let Ok(across) = Temperature::from_kelvin(level)
        {
            let point = curve.at(level);
            let (first, second) = if gap_before < 0.0 {
                (point.liquid_kg_per_m3, point.vapour_kg_per_m3)
            } else {
                (point.vapour_kg_per_m3, point.liquid_kg_per_m3)
            };
            line.extend(
                [first, second]
                    .into_iter()
                    .filter_map(|rho| at(rho, across)),
            );
            behind = [None, None];
        }
        before = Some((temperature, gap));
        let Some(limit) = limit else { continue };
        // The contour is followed: each density starts in line with the two before.
        let near = match behind {
            [Some(older), Some(last)] => Some(2.0 * last - older),
            [_, last] => last,
        };
        let near = near.and_then(|rho| Density::from_kilogram_per_cubic_metre(rho).ok());
        let found = fluid
            .densest_within(limit, temperature, near)?
            .map(Density::kilogram_per_cubic_metre);
        line.extend(found.and_then(|rho| at(rho, temperature)));
        behind = [behind[1], found];
    }
    Ok(line)
}

/// The same with the unit's gas, which tilts the level stretch: more charge leaves the gas
/// less room.
fn allowable_line_with_gas(
    unit: &SealedUnit,
    range: (Temperature, Temperature),
    walls: &Walls<'_>,
) -> Figure<Vec<MapPoint>> {
    let Some(gas) = unit.gas() else {
        return Ok(Vec::new());
    };
    let mut line = Vec::new();
    for temperature in temperatures(range, walls.knots.iter().copied()) {
        let Ok(limit) = walls.allowable_pressure(temperature) else {
            continue;
        };
        let volume_m3 = unit.volume_at_m3(temperature);
        let amount = |_| gas.amount.mole();
        let found = densest_within(
            unit.fluid(),
            limit,
            temperature,
            volume_m3,
            gas.ostwald,
            amount,
        )?;
        line.extend(found.and_then(|density| {
            let mass = density.kilogram_per_cubic_metre() * volume_m3;
            Some(MapPoint {
                mass: Mass::from_kilogram(mass).ok()?,
                temperature,
            })
        }));
    }
    Ok(line)
}

/// Evenly spaced temperatures with the knots between them, ascending.
fn temperatures(
    (low, high): (Temperature, Temperature),
    knots: impl IntoIterator<Item = Temperature>,
) -> impl Iterator<Item = Temperature> {
    let (low, high) = (low.kelvin(), high.kelvin());
    let mut all: Vec<f64> = (0..MAP_POINTS)
        .map(|i| low + (high - low) * i as f64 / (MAP_POINTS - 1) as f64)
        .chain(
            knots
                .into_iter()
                .map(|t| t.kelvin())
                .filter(|t| *t > low && *t < high),
        )
        .collect();
    all.sort_by(f64::total_cmp);
    all.dedup();
    all.into_iter()
        .filter_map(|t| Temperature::from_kelvin(t).ok())
}
