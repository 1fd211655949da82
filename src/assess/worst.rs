//! The worst case: greatest pressure of the worst corner against the weakest wall.

use std::sync::Arc;

use super::charge::Corners;
use super::figure::{Figure, Missing};
use super::life::Stretch;
use crate::chamber::{Envelope, StrengthUnknown, Weakest};
use crate::fluid::State;
use crate::units::{Pressure, Temperature};

/// The envelope with the outside pressure it works against.
#[derive(Debug, Clone, PartialEq)]
pub struct Walls<'a> {
    pub envelope: &'a Envelope,
    pub least_outside: Pressure,
    /// Temperatures at which a strength bends.
    pub knots: Vec<Temperature>,
}

/// One condition's pressure and what the walls say to it.
#[derive(Debug, Clone, PartialEq)]
pub struct WorstCase {
    /// The stretch of life in which it occurs.
    pub stretch: Arc<str>,
    pub temperature: Temperature,
    /// Absolute, with the model's uncertainty in it.
    pub pressure: Pressure,
    pub state: State,
    /// Least pressure outside there, absolute.
    pub outside: Pressure,
    /// Inside minus outside.
    pub load: Pressure,
    pub weakest: Result<Weakest, StrengthUnknown>,
    /// Load over allowable: 1 is the limit.
    pub of_allowable: Figure<f64>,
    /// Load over burst: 1 is bursting; unknown where no burst pressure is known.
    pub of_burst: Figure<f64>,
}

impl Walls<'_> {
    /// Allowable inside pressure, absolute, at a temperature.
    ///
    /// # Errors
    /// [`StrengthUnknown`] names the part and the reason.
    pub fn allowable_pressure(&self, at: Temperature) -> Result<Pressure, StrengthUnknown> {
        self.envelope
            .weakest(at)
            .map(|weakest| self.absolute(weakest.allowable.pressure))
    }

    /// A load on the wall as an absolute inside pressure.
    pub fn absolute(&self, load: Pressure) -> Pressure {
        absolute(load, self.least_outside)
    }
}

/// A load on the wall and what stands outside it, together the pressure inside.
pub fn absolute(load: Pressure, outside: Pressure) -> Pressure {
    Pressure::from_pascal(load.pascal() + outside.pascal()).unwrap_or(load)
}

/// The worst moment of the heaviest corner in every sealed stretch.
///
/// The ends of a stretch are asked, and every strength knot between them; the one with the
/// greatest share of the allowable governs, or the greatest pressure where the strength is
/// not known.
///
/// # Errors
/// The fluid's, where a condition lies outside its model.
pub fn worst_cases(
    stretches: &[Stretch],
    corners: &Corners,
    walls: &Walls<'_>,
) -> Figure<Vec<WorstCase>> {
    let mut cases = Vec::new();
    for stretch in stretches.iter().filter(|stretch| stretch.is_sealed()) {
        if stretch.hottest < stretch.coldest {
            return Err(Missing::Conditions);
        }
        let mut worst: Option<WorstCase> = None;
        for temperature in stretch.temperatures(&walls.knots) {
            let case = at_temperature(corners, walls, stretch, temperature)?;
            if worst.as_ref().is_none_or(|worst| worse(&case, worst)) {
                worst = Some(case);
            }
        }
        cases.extend(worst);
    }
    Ok(cases)
}

/// The case that governs over all.
///
/// # Errors
/// [`Missing::Conditions`] where no stretch is sealed.
pub fn governing(cases: &[WorstCase]) -> Figure<WorstCase> {
    cases
        .iter()
        .reduce(|worst, case| if worse(case, worst) { case } else { worst })
        .cloned()
        .ok_or(Missing::Conditions)
}

fn worse(case: &WorstCase, than: &WorstCase) -> bool {
    match (&case.of_allowable, &than.of_allowable) {
        (Ok(a), Ok(b)) => a > b,
        // An unknown strength governs over any known one.
        (Err(_), Ok(_)) => true,
        (Ok(_), Err(_)) => false,
        (Err(_), Err(_)) => case.pressure > than.pressure,
    }
}

/// Load over its limit. A wall under less pressure than on its other side carries no
/// load; a wall that the tolerances take away altogether carries none at all.
pub fn share_of(load: Pressure, limit: Pressure) -> f64 {
    match load.pascal().max(0.0) {
        0.0 => 0.0,
        load if limit.pascal() <= 0.0 => load * f64::MAX.sqrt(),
        load => load / limit.pascal(),
    }
}

fn at_temperature(
    corners: &Corners,
    walls: &Walls<'_>,
    stretch: &Stretch,
    temperature: Temperature,
) -> Figure<WorstCase> {
    let state = corners.heaviest.state(temperature)?;
    let uncertainty = corners.heaviest.fluid().pressure_uncertainty();
    let pressure = Pressure::from_pascal(state.pressure.pascal() * (1.0 + uncertainty))
        .unwrap_or(state.pressure);
    let outside = stretch.least_outside;
    let load = Pressure::from_pascal(pressure.pascal() - outside.pascal()).unwrap_or(pressure);
    let weakest = walls.envelope.weakest(temperature);
    let share = |limit: Pressure| share_of(load, limit);
    let of_allowable = weakest
        .as_ref()
        .map(|w| share(w.allowable.pressure))
        .map_err(|e| Missing::Strength(e.clone()));
    let of_burst = match &weakest {
        Ok(weakest) => weakest
            .burst
            .as_ref()
            .map(|burst| share(*burst))
            .map_err(|e| Missing::Strength(e.clone())),
        Err(error) => Err(Missing::Strength(error.clone())),
    };
    Ok(WorstCase {
        stretch: Arc::clone(&stretch.name),
        temperature,
        pressure,
        state,
        outside,
        load,
        weakest,
        of_allowable,
        of_burst,
    })
}
