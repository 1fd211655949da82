//! What the pictures say in words, in the user's units.

use crate::assess::Bound;
use crate::chamber::{StrengthGap, StrengthUnknown};
use crate::conditions::Conditions;
use crate::fluid::{FluidError, State};
use crate::units::{Kind, NBSP, Pressure, Quantity, Temperature, Units};
use crate::words;

/// A temperature without decimals that are nought: `60 °C`, `59.5 °C`.
pub(super) fn temperature(at: Temperature, units: &Units) -> String {
    let unit = units.unit_for(Kind::Temperature, at.si());
    let number = units.number(Kind::Temperature, at.si(), unit, 4);
    let short = if number.contains('.') {
        number.trim_end_matches('0').trim_end_matches('.')
    } else {
        &number
    };
    format!("{short}{NBSP}{}", unit.symbol)
}

/// A pressure that says it is absolute.
pub(super) fn pressure(pressure: Pressure, units: &Units, digits: usize) -> String {
    format!("{}{NBSP}abs", units.show_to(pressure, digits))
}

/// The pressure of a state, or that it is only bounded.
pub(super) fn state_pressure(state: &State, units: &Units, digits: usize) -> String {
    let shown = pressure(state.pressure, units, digits);
    if state.is_bound {
        format!("at most {shown}")
    } else {
        shown
    }
}

/// A share as a percentage.
pub(super) fn percent(share: f64, units: &Units, digits: usize) -> String {
    units.show_si(Kind::Ratio, share, digits)
}

/// The four temperatures of the conditions, ascending; equal ones share a name.
pub(super) fn conditions(conditions: &Conditions) -> Vec<(Temperature, &'static str)> {
    let c = conditions;
    let mut named = vec![(c.coldest, "coldest")];
    match named.iter_mut().find(|(t, _)| *t == c.working_low) {
        Some(same) => same.1 = "coldest, working",
        None => named.push((c.working_low, "working from")),
    }
    if c.working_high == c.hottest {
        named.push((c.hottest, "working, hottest"));
    } else {
        named.push((c.working_high, "working to"));
        named.push((c.hottest, "hottest"));
    }
    named
}

/// A bound of the window in one line.
pub(super) fn bound(word: &str, bound: &Bound, units: &Units) -> String {
    let at = temperature(bound.temperature, units);
    format!(
        "{word} {}: {}, {at}",
        words::bound_mass(bound, units),
        words::requirement(bound.requirement)
    )
}

/// Outside the model, in a few words: a read-out has no room for a sentence.
pub(super) fn fluid(error: &FluidError, units: &Units) -> String {
    let t = |at: &Temperature| temperature(*at, units);
    match error {
        FluidError::Frozen {
            fluid,
            temperature,
            melting,
        } => {
            format!(
                "{fluid} is frozen at {}: it melts at {}",
                t(temperature),
                t(melting)
            )
        }
        FluidError::TooCold { fluid, low, .. } => {
            format!("the model of {fluid} starts at {}", t(low))
        }
        FluidError::TooHot { fluid, high, .. } => {
            format!("the model of {fluid} ends at {}", t(high))
        }
        FluidError::NoSaturation { fluid, high, .. } => {
            format!("{fluid} has no saturation above {}", t(high))
        }
        FluidError::TooDense { fluid, .. } => format!("denser than the model of {fluid} reaches"),
        FluidError::PressureTooHigh { fluid, high } => {
            format!(
                "above {}, where the model of {fluid} ends",
                pressure(*high, units, 3)
            )
        }
        FluidError::Solid { fluid, melting, .. } => {
            format!("{fluid} is solid above {}", pressure(*melting, units, 3))
        }
        FluidError::NoCompressedLiquid { fluid, .. } => {
            format!("liquid-full {fluid}: its pressure is not known")
        }
        FluidError::NotConverged { .. } | FluidError::NoEnergy { .. } => error.to_string(),
    }
}

/// Why a strength is not known.
pub(super) fn strength(unknown: &StrengthUnknown, units: &Units) -> String {
    let StrengthUnknown {
        name,
        material,
        reason,
        ..
    } = unknown;
    match reason {
        StrengthGap::NoWall => "not known, no part has a wall".to_owned(),
        StrengthGap::UnknownMaterial => format!("not known, {material} is not in the catalogue"),
        StrengthGap::NoSize => format!("not known, a size of “{name}” is 0"),
        StrengthGap::ConeTooSteep { .. } => {
            format!("not known, the cone “{name}” is steeper than 30°")
        }
        StrengthGap::NoValuesAfter { treatment } => {
            format!("not known for {material} {}", treatment.name())
        }
        StrengthGap::TooCold { coldest } => format!(
            "not known for {material} below {}",
            temperature(*coldest, units)
        ),
        StrengthGap::TooHot { hottest } => format!(
            "not known for {material} above {}",
            temperature(*hottest, units)
        ),
        StrengthGap::NoRating => format!("not known, “{name}” has no stated rating"),
        StrengthGap::RatedElsewhere { coldest, hottest } => format!(
            "not known, “{name}” is rated from {} to {}",
            temperature(*coldest, units),
            temperature(*hottest, units)
        ),
        StrengthGap::RatedOnly => format!("not known, “{name}” has only a rating"),
        StrengthGap::NoOutsideRating => {
            format!("not known, “{name}” is not rated from outside")
        }
        StrengthGap::BendTooTight => {
            format!("not known, the bend of “{name}” is tighter than the tube is wide")
        }
        StrengthGap::NoValueThere => format!("not known for {material} over temperature"),
        StrengthGap::Glass => "not known, glass has only a permissible stress".to_owned(),
    }
}
