//! Why a figure is not known, and what contradicts itself, in the user's units.

use crate::assess::Missing;
use crate::chamber::water::WaterFillError;
use crate::chamber::{Chamber, ChamberError, ChamberFault, ShapeFault, StrengthGap, WickError};
use crate::conditions::ConditionFault;
use crate::fluid::FluidError;
use crate::units::{Kind, Units};

/// A sentence for a missing figure.
pub fn missing(missing: &Missing, units: &Units) -> String {
    match missing {
        Missing::Fluid(error) => fluid_error(error, units),
        Missing::Strength(unknown) => {
            let at = units.show(unknown.temperature);
            let why = match &unknown.reason {
                StrengthGap::TooCold { coldest } => {
                    format!("its values start at {}", units.show(*coldest))
                }
                StrengthGap::TooHot { hottest } => {
                    format!("its service ends at {}", units.show(*hottest))
                }
                StrengthGap::RatedElsewhere { coldest, hottest } => format!(
                    "its maker's rating holds from {} to {}",
                    units.show(*coldest),
                    units.show(*hottest)
                ),
                other => other.to_string(),
            };
            format!(
                "The strength of {} ({}) at {at} is not known: {why}.",
                unknown.name, unknown.material
            )
        }
        Missing::Chamber(error) => chamber_error(error, units),
        Missing::Overfull { share } => {
            format!(
                "The liquid would fill {:.1} times the inside volume. Lower the fill ratio.",
                share
            )
        }
        other => format!("{}.", upper(&other.to_string())),
    }
}

fn fluid_error(error: &FluidError, units: &Units) -> String {
    match error {
        FluidError::Frozen {
            fluid,
            temperature,
            melting,
        } => format!(
            "{} is frozen at {}: it melts at {}.",
            upper(fluid),
            units.show(*temperature),
            units.show(*melting)
        ),
        FluidError::TooCold {
            fluid,
            temperature,
            low,
        } => format!(
            "{} is outside the equation of {fluid}, which starts at {}.",
            units.show(*temperature),
            units.show(*low)
        ),
        FluidError::TooHot {
            fluid,
            temperature,
            high,
        } => format!(
            "{} is outside the model of {fluid}, which ends at {}.",
            units.show(*temperature),
            units.show(*high)
        ),
        FluidError::NoSaturation {
            fluid,
            temperature,
            high,
            critical,
        } => format!(
            "{fluid} has no vapour pressure at {}: its saturation is given up to {} (critical point {}).",
            units.show(*temperature),
            units.show(*high),
            units.show(*critical)
        ),
        FluidError::TooDense {
            fluid,
            density,
            high,
        } => format!(
            "A mean density of {} is beyond the model of {fluid}, which ends at {}: far too much fluid for the volume.",
            units.show(*density),
            units.show(*high)
        ),
        FluidError::PressureTooHigh { fluid, high } => format!(
            "The pressure would be above {} abs, where the model of {fluid} ends: the unit is liquid-full.",
            units.show(*high)
        ),
        FluidError::Solid {
            fluid,
            temperature,
            melting,
        } => format!(
            "{} turns solid at {} when pressed above {} abs, its melting pressure: the unit would be full of solid.",
            upper(fluid),
            units.show(*temperature),
            units.show(*melting)
        ),
        other => format!("{}.", upper(&other.to_string())),
    }
}

fn chamber_error(error: &ChamberError, units: &Units) -> String {
    match error {
        ChamberError::NoParts => "The chamber has no parts. Add one.".to_owned(),
        ChamberError::ZeroVolume => "The parts enclose no volume.".to_owned(),
        ChamberError::InsertsTooLarge {
            cavity_m3,
            inserts_m3,
        } => format!(
            "What lies inside takes {} out of a cavity of {}.",
            units.show_si(Kind::Volume, *inserts_m3, 4),
            units.show_si(Kind::Volume, *cavity_m3, 4)
        ),
        ChamberError::WaterFill(error) => water_fill(error, units),
        ChamberError::TooLarge { volume_m3 } => {
            format!(
                "A volume of {} is beyond all measure.",
                units.show_si(Kind::Volume, *volume_m3, 3)
            )
        }
    }
}

/// A sentence for a chamber's contradiction; parts are named.
pub fn chamber_fault(fault: &ChamberFault, chamber: Option<&Chamber>, units: &Units) -> String {
    let part = |index: &usize| {
        chamber.map_or_else(
            || format!("part {}", index + 1),
            |chamber| match chamber.parts.get(*index) {
                Some(part) => format!("“{}”", part.name),
                None => "the closure".to_owned(),
            },
        )
    };
    match fault {
        ChamberFault::NoParts => "The parts list is empty. Add a part with a wall.".to_owned(),
        ChamberFault::ZeroVolume => "The parts enclose no volume.".to_owned(),
        ChamberFault::InsertsTooLarge { cavity_m3, inserts_m3 } => chamber_error(
            &ChamberError::InsertsTooLarge { cavity_m3: *cavity_m3, inserts_m3: *inserts_m3 },
            units,
        ),
        ChamberFault::TooLarge { volume_m3 } => {
            chamber_error(&ChamberError::TooLarge { volume_m3: *volume_m3 }, units)
        }
        ChamberFault::WaterFill(error) => water_fill(error, units),
        ChamberFault::MeasuredTwice => {
            "The volume is stated as measured and weighed as well. Keep one of them.".to_owned()
        }
        ChamberFault::Shape { part: p, why } => {
            format!("{}: {}.", upper(&part(p)), shape_fault(why, units))
        }
        ChamberFault::WallUsedUp { part: p } => {
            format!("Tolerance and corrosion allowance leave nothing of the wall of {}.", part(p))
        }
        ChamberFault::RatingReversed { part: p } => {
            format!("The rating of {} ends colder than it begins.", part(p))
        }
        ChamberFault::FlameSealWithoutGlass => {
            "The closure is a flame seal, and no part is glass whose last heat is flame-sealed. Mark that part, or choose another closure.".to_owned()
        }
        ChamberFault::NothingLeftAtWorst => {
            "At the worst corner of the tolerances no inside volume is left. Tighten the tolerances.".to_owned()
        }
        ChamberFault::CountZero { part: p } => format!("{} occurs no times. Set its count to 1 or remove it.", upper(&part(p))),
        ChamberFault::ZeroDimension { part: p, dimension } => {
            format!("The {dimension} of {} is zero.", part(p))
        }
        ChamberFault::ToleranceLargerThanDimension { part: p, dimension } => {
            format!("The tolerance of the {dimension} of {} is larger than the {dimension} itself.", part(p))
        }
        ChamberFault::WallMissing { part: p } => format!("{} has no wall. Give it a material and a thickness.", upper(&part(p))),
        ChamberFault::WallOnInsert { part: p } => format!("{} lies inside and cannot have a wall.", upper(&part(p))),
        ChamberFault::WallThickerThanBore { part: p } => format!("The wall of {} is thicker than its bore is wide.", part(p)),
        ChamberFault::UnknownMaterial { part: p, material } => {
            format!("{} is of “{material}”, which is no material here.", upper(&part(p)))
        }
    }
}

fn shape_fault(fault: &ShapeFault, units: &Units) -> String {
    let number = |x: f64| crate::units::figures(x, 3);
    match fault {
        ShapeFault::Wick(WickError::WiresTouch { .. }) => {
            "its wires touch: mesh number times wire diameter reaches 1".to_owned()
        }
        ShapeFault::Wick(WickError::Porosity {
            porosity,
            least,
            greatest,
        }) => {
            let share = |x: f64| units.show_si(Kind::Ratio, x, 3);
            format!(
                "a porosity of {} is outside what its relation holds for, {} to {}; enter measured figures",
                share(*porosity),
                share(*least),
                share(*greatest)
            )
        }
        ShapeFault::Wick(WickError::GrooveProportions {
            depth_over_mean_width,
            bottom_over_mouth,
        }) => format!(
            "its grooves, {} times as deep as wide with a floor of {} of the mouth, are outside what the relation holds for; enter measured figures",
            number(*depth_over_mean_width),
            number(*bottom_over_mouth)
        ),
        other => other.to_string(),
    }
}

fn water_fill(error: &WaterFillError, units: &Units) -> String {
    let kelvin = |t: f64| units.show_si(Kind::Temperature, t, 4);
    let why = match error {
        WaterFillError::NotHeavier { empty_kg, full_kg } => format!(
            "full, {}, it is not heavier than empty, {}",
            units.show_si(Kind::Mass, *full_kg, 5),
            units.show_si(Kind::Mass, *empty_kg, 5)
        ),
        WaterFillError::WaterTemperature { temperature_k } => format!(
            "water at {} with its uncertainty is outside {} to {}",
            kelvin(*temperature_k),
            kelvin(273.15),
            kelvin(313.15)
        ),
        WaterFillError::AirTemperature { temperature_k } => format!(
            "air at {} is outside {} to {}",
            kelvin(*temperature_k),
            kelvin(273.15),
            kelvin(313.15)
        ),
        WaterFillError::AirPressure { pressure_pa } => format!(
            "air at {} is outside {} to {} abs",
            units.show_si(Kind::Pressure, *pressure_pa, 4),
            units.show_si(Kind::Pressure, 60_000.0, 3),
            units.show_si(Kind::Pressure, 110_000.0, 3)
        ),
        other => other.to_string(),
    };
    format!("The weighed water fill gives no volume: {why}.")
}

/// A sentence for contradicting conditions.
pub fn condition_fault(fault: &ConditionFault, units: &Units) -> String {
    match fault {
        ConditionFault::HottestBelowColdest { hottest, coldest } => format!(
            "The hottest temperature, {}, is below the coldest, {}. Change one of them.",
            units.show(*hottest),
            units.show(*coldest)
        ),
        ConditionFault::WorkingRangeReversed { low, high } => format!(
            "The working range ends at {}, below its start at {}. Change one of them.",
            units.show(*high),
            units.show(*low)
        ),
        ConditionFault::WorkingOutsideExtremes {
            low,
            high,
            coldest,
            hottest,
        } => format!(
            "The working range, {} to {}, reaches outside coldest to hottest, {} to {}. Widen the extremes.",
            units.show(*low),
            units.show(*high),
            units.show(*coldest),
            units.show(*hottest)
        ),
        ConditionFault::BenchOutsideExtremes {
            bench,
            coldest,
            hottest,
        } => format!(
            "The sealed unit also stands on the bench, at {}, outside coldest to hottest, {} to {}. Widen the extremes.",
            units.show(*bench),
            units.show(*coldest),
            units.show(*hottest)
        ),
        ConditionFault::LeastAboveBarometer { least, barometer } => format!(
            "The least outside pressure, {} abs, is above the barometer, {} abs. The bench is outside too: lower it.",
            units.show(*least),
            units.show(*barometer)
        ),
        ConditionFault::AcrossWallBelowZero { difference } => format!(
            "A difference across the wall of {} is below zero. Give it without sign.",
            units.show(*difference)
        ),
        ConditionFault::ExposureReversed { index } => format!(
            "Exposure {} ends colder, or at less outside pressure, than it begins. Swap its ends.",
            index + 1
        ),
        ConditionFault::ExposureOutsideExtremes { index } => format!(
            "Exposure {} holds the sealed unit outside coldest to hottest. Widen the extremes.",
            index + 1
        ),
        ConditionFault::OutsideBelowZero { pressure } => {
            format!(
                "An outside pressure of {} abs is below zero. Use 0 for space.",
                units.show(*pressure)
            )
        }
    }
}

/// The first letter in upper case.
pub fn upper(text: &str) -> String {
    let mut chars = text.chars();
    chars.next().map_or_else(String::new, |first| {
        first.to_uppercase().chain(chars).collect()
    })
}
