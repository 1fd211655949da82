//! Lines of the charge map and of the pressure plot, solved point by point.

use super::figure::Figure;
use super::worst::Walls;
use crate::design::Design;
use crate::fluid::Fluid;
use crate::sealed::{PathPoint, SealedUnit, path};
use crate::units::{Mass, Pressure, Quantity, Temperature, Volume};

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
    let map = charge_map(fluid, unit.volume(), span, walls);
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

fn charge_map(
    fluid: &Fluid,
    volume: Volume,
    span: (Temperature, Temperature),
    walls: &Walls<'_>,
) -> ChargeMap {
    let mut map = ChargeMap::default();
    let (low, high) = fluid.saturation_range();
    let freezing = fluid.freezing_point();
    let critical = fluid.critical();
    let at = |density: f64, temperature: Temperature| {
        let mass = Mass::from_kilogram(density * volume.cubic_metre()).ok()?;
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
        map.allowable = allowable_line(fluid, volume, range, walls).unwrap_or_default();
    }
    map
}

/// The contour p(m, T) = allowable. It follows the liquid line, crosses the dome
/// level where the vapour pressure meets the allowable, and leaves along the vapour.
fn allowable_line(
    fluid: &Fluid,
    volume: Volume,
    range: (Temperature, Temperature),
    walls: &Walls<'_>,
) -> Figure<Vec<MapPoint>> {
    let mut line = Vec::new();
    let curve = fluid.curve()?;
    let gap = |t: f64| -> f64 {
        let Ok(t) = Temperature::from_kelvin(t) else {
            return f64::NAN;
        };
        match (fluid.saturation_pressure(t), walls.allowable_pressure(t)) {
            (Ok(p), Ok(limit)) => p.pascal() - limit.pascal(),
            _ => f64::NAN,
        }
    };
    let grid: Vec<Temperature> = temperatures(range, walls.knots.iter().copied()).collect();
    for pair in grid.windows(2) {
        let (here, next) = (pair[0], pair[1]);
        line.extend(on_contour(fluid, volume, here, walls)?);
        let (a, b) = (gap(here.kelvin()), gap(next.kelvin()));
        if a.is_finite()
            && b.is_finite()
            && a.signum() != b.signum()
            && let Ok(t) = crate::solve::bracketed_root(gap, here.kelvin(), next.kelvin(), 1e-9)
            && let Ok(temperature) = Temperature::from_kelvin(t)
        {
            let point = curve.at(t);
            let (first, second) = if a < 0.0 {
                (point.liquid_kg_per_m3, point.vapour_kg_per_m3)
            } else {
                (point.vapour_kg_per_m3, point.liquid_kg_per_m3)
            };
            for density in [first, second] {
                if let Ok(mass) = Mass::from_kilogram(density * volume.cubic_metre()) {
                    line.push(MapPoint { mass, temperature });
                }
            }
        }
    }
    if let Some(last) = grid.last() {
        line.extend(on_contour(fluid, volume, *last, walls)?);
    }
    Ok(line)
}

fn on_contour(
    fluid: &Fluid,
    volume: Volume,
    temperature: Temperature,
    walls: &Walls<'_>,
) -> Figure<Option<MapPoint>> {
    let Ok(limit) = walls.allowable_pressure(temperature) else {
        return Ok(None);
    };
    let density = fluid.densest_within(limit, temperature)?;
    Ok(density.and_then(|density| {
        let kilogram = density.kilogram_per_cubic_metre() * volume.cubic_metre();
        Mass::from_kilogram(kilogram)
            .ok()
            .map(|mass| MapPoint { mass, temperature })
    }))
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
