//! What the pressure picture draws: its range, and its lines as points.

use super::PressureScale;
use super::axis::{Home, Scale};
use super::items::Run;
use crate::assess::{Assessment, Charts, LimitPoint};
use crate::design::Design;
use crate::fluid::State;
use crate::sealed::PathPoint;
use crate::units::{Pressure, Temperature};

/// From which to which pressure to draw, so that both the saturation and the strength
/// can be read and a liquid-full unit does not press them flat.
pub(super) fn upward(
    design: &Design,
    a: &Assessment,
    charts: &Charts,
    scale: PressureScale,
) -> Home {
    let conditions = &design.conditions;
    let lived = |t: Temperature| t >= conditions.coldest && t <= conditions.hottest;
    let greatest = |pick: fn(&LimitPoint) -> Option<Pressure>| {
        charts
            .limits
            .iter()
            .filter(|p| lived(p.temperature))
            .filter_map(pick)
            .map(Pressure::pascal)
            .fold(0.0, f64::max)
    };
    let saturation = greatest(|p| p.saturation);
    let allowable = greatest(|p| p.allowable);
    let burst = greatest(|p| p.burst);
    let worst = a
        .worst
        .as_ref()
        .map_or(0.0, |worst| worst.pressure.pascal());
    let own = charts
        .path
        .iter()
        .filter_map(|p| p.state.as_ref().ok())
        .map(|s| s.pressure.pascal());
    let (least, most) = own.fold((f64::INFINITY, 0.0), |(least, most): (f64, f64), p| {
        (if p > 0.0 { least.min(p) } else { least }, most.max(p))
    });
    let known = saturation.max(allowable);
    let bounded = |worst: f64, times: f64| {
        if known > 0.0 {
            worst.min(times * known)
        } else {
            worst.max(most)
        }
    };
    match scale {
        PressureScale::Linear => {
            let vapour = saturation.max(bounded(worst, 2.0));
            // A wall far stronger than needed would press the curve flat: it is then told in words.
            let top = if allowable < 8.0 * vapour {
                allowable.max(vapour)
            } else {
                vapour
            };
            Home {
                scale: Scale::Linear,
                low: 0.0,
                high: 1.3 * top.max(1.0),
            }
        }
        PressureScale::Logarithm | PressureScale::Reciprocal => {
            let top = known
                .max(bounded(worst, 5.0))
                .max(burst.min(20.0 * known))
                .max(1.0);
            let low = charts
                .limits
                .iter()
                .filter_map(|p| p.saturation)
                .map(Pressure::pascal)
                .fold(least, f64::min);
            let low = if low.is_finite() && low > 0.0 {
                low
            } else {
                1e-3 * top
            };
            Home {
                scale: Scale::Logarithm,
                low: (0.6 * low).max(1e-7 * top),
                high: 2.0 * top,
            }
        }
    }
}

/// One line over temperature as runs of points; a run ends where a value is not known.
pub(super) fn limit_runs(charts: &Charts, pick: fn(&LimitPoint) -> Option<Pressure>) -> Vec<Run> {
    runs(charts.limits.iter().map(|p| (p.temperature, pick(p))))
}

/// The unit's own line, as far as its states are such.
pub(super) fn path_runs(charts: &Charts, which: fn(&State) -> bool) -> Vec<Run> {
    let pressure = |p: &PathPoint| {
        let state = p.state.as_ref().ok().filter(|state| which(state))?;
        Some(state.pressure)
    };
    runs(charts.path.iter().map(|p| (p.temperature, pressure(p))))
}

fn runs(points: impl Iterator<Item = (Temperature, Option<Pressure>)>) -> Vec<Run> {
    let mut runs = vec![Run::new()];
    for (temperature, pressure) in points {
        match (pressure, runs.last_mut()) {
            (Some(p), Some(run)) => run.push([temperature.kelvin(), p.pascal()]),
            (None, Some(run)) if !run.is_empty() => runs.push(Run::new()),
            _ => {}
        }
    }
    runs.retain(|run| run.len() > 1);
    runs
}
