//! Walls under more pressure outside than inside, in every stretch of a unit's life.

use std::sync::Arc;

use super::charge::Corners;
use super::figure::{Figure, Missing};
use super::life::Stretch;
use super::worst::{Walls, share_of};
use crate::chamber::{StrengthUnknown, WeakestOutside};
use crate::units::{Pressure, Temperature};

/// The worst moment of one stretch for collapse.
#[derive(Debug, Clone, PartialEq)]
pub struct OutsideCase {
    pub stretch: Arc<str>,
    pub temperature: Temperature,
    /// Absolute; none for what is not known of the charge, which counts as nothing.
    pub inside: Pressure,
    /// Absolute, the greatest of the stretch.
    pub outside: Pressure,
    /// Outside less inside.
    pub load: Pressure,
    pub weakest: Result<WeakestOutside, StrengthUnknown>,
    /// Load over allowable: 1 is the limit.
    pub of_allowable: Figure<f64>,
}

/// The worst moment of every stretch in which the outside presses at all.
///
/// Between its ends and the strength's knots both load and strength fall, so a stretch is
/// also asked at sixteen even steps; a wall that is not known there governs.
pub fn outside_cases(
    stretches: &[Stretch],
    corners: Option<&Corners>,
    walls: &Walls<'_>,
) -> Vec<OutsideCase> {
    stretches
        .iter()
        .filter_map(|stretch| worst_of(stretch, corners, walls))
        .collect()
}

/// The case that governs over all.
pub fn governing(cases: &[OutsideCase]) -> Option<&OutsideCase> {
    cases
        .iter()
        .reduce(|worst, case| if worse(case, worst) { case } else { worst })
}

/// The hottest at which the empty unit stands this pressure from outside, from the bench
/// up; `None` where it does not even there. Found to a tenth of a kelvin, rounded down.
pub fn vacuum_stands_to(
    walls: &Walls<'_>,
    bench: Temperature,
    outside: Pressure,
) -> Option<Temperature> {
    const STEP_K: f64 = 5.0;
    const HOTTEST_K: f64 = 1500.0;
    let stands = |t: f64| {
        let at = Temperature::from_kelvin(t).ok()?;
        let allowable = walls.envelope.weakest_outside(at).ok()?.allowable;
        (allowable.pressure >= outside).then_some(at)
    };
    let mut good = bench.kelvin();
    let mut hottest = stands(good)?;
    // Strength only falls in the heat, but for wiggles of published points: the first
    // temperature that does not stand is the end.
    let mut step = STEP_K;
    while good < HOTTEST_K {
        match stands(good + step) {
            Some(at) => {
                good += step;
                hottest = at;
            }
            None if step > 0.1 => step *= 0.5,
            None => break,
        }
    }
    Some(hottest)
}

fn worst_of(
    stretch: &Stretch,
    corners: Option<&Corners>,
    walls: &Walls<'_>,
) -> Option<OutsideCase> {
    const STEPS: i32 = 16;
    let (low, high) = (stretch.coldest.kelvin(), stretch.hottest.kelvin());
    let steps = (1..STEPS).map(|i| low + (high - low) * f64::from(i) / f64::from(STEPS));
    let even = steps
        .filter(|_| low < high)
        .filter_map(|t| Temperature::from_kelvin(t).ok());
    stretch
        .temperatures(&walls.knots)
        .chain(even)
        .filter_map(|temperature| case_at(stretch, corners, walls, temperature))
        .reduce(|worst, case| if worse(&case, &worst) { case } else { worst })
}

fn case_at(
    stretch: &Stretch,
    corners: Option<&Corners>,
    walls: &Walls<'_>,
    temperature: Temperature,
) -> Option<OutsideCase> {
    // The least the charge can push back with: less than the model says, by its
    // uncertainty, and nothing where the state is not known or only bounded.
    let pushes = corners
        .filter(|_| stretch.is_sealed())
        .and_then(|corners| corners.lightest.as_ref())
        .and_then(|unit| {
            let state = unit.state(temperature).ok().filter(|s| !s.is_bound)?;
            let certain = 1.0 - unit.fluid().pressure_uncertainty();
            Some(state.pressure.pascal() * certain.max(0.0))
        })
        .unwrap_or(0.0);
    let outside = stretch.greatest_outside;
    let load = Pressure::from_pascal(outside.pascal() - pushes)
        .ok()
        .filter(|load| load.pascal() > 0.0)?;
    let weakest = walls.envelope.weakest_outside(temperature);
    let of_allowable = weakest
        .as_ref()
        .map(|w| share_of(load, w.allowable.pressure))
        .map_err(|e| Missing::Strength(e.clone()));
    Some(OutsideCase {
        stretch: Arc::clone(&stretch.name),
        temperature,
        inside: Pressure::from_pascal(pushes).ok()?,
        outside,
        load,
        weakest,
        of_allowable,
    })
}

fn worse(case: &OutsideCase, than: &OutsideCase) -> bool {
    match (&case.of_allowable, &than.of_allowable) {
        (Ok(a), Ok(b)) => a > b,
        (Err(_), Ok(_)) => true,
        (_, Err(_)) => false,
    }
}
