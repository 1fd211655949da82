//! From how the charge is stated to the mass that is sealed in.

use std::sync::Arc;

use super::figure::{Figure, Missing};
use crate::chamber::Volumes;
use crate::design::{ChargeAim, Design, NamedVolume};
use crate::fluid::Fluid;
use crate::sealed::SealedUnit;
use crate::units::{Mass, Temperature, Volume};

/// The sealed mass and what the bench sees of it.
#[derive(Debug, Clone, PartialEq)]
pub struct ChargeFigures {
    /// Sealed mass aimed at.
    pub nominal: Mass,
    pub least: Mass,
    pub greatest: Mass,
    /// What is dispensed: sealed mass and purge loss.
    pub dispensed: Mass,
    /// Liquid volume dispensed at bench temperature.
    pub dispensed_volume: Figure<Volume>,
    /// Liquid share of the inside volume at bench temperature.
    pub bench_fill: Figure<f64>,
}

/// The three corners of tolerance, as sealed units.
#[derive(Debug, Clone, PartialEq)]
pub struct Corners {
    pub nominal: SealedUnit,
    /// Greatest mass in the smallest volume: governs pressure and liquid-full.
    pub heaviest: SealedUnit,
    /// Least mass in the largest volume: governs dry-out; none where the tolerance
    /// reaches down to nothing.
    pub lightest: Option<SealedUnit>,
}

/// The sealed mass that a design's charge means.
pub fn charge_figures(design: &Design, fluid: &Fluid, volumes: &Volumes) -> Figure<ChargeFigures> {
    let bench = design.conditions.bench;
    let nominal = sealed_mass(design, fluid, volumes, bench)?;
    let tolerance = design.charge.tolerance.kilogram();
    let mass =
        |kilogram: f64| Mass::from_kilogram(kilogram.max(0.0)).map_err(|_| Missing::NoCharge);
    let dispensed = mass(nominal.kilogram() + design.bench.purge_loss.kilogram())?;
    let liquid = fluid.saturation(bench).map_err(Missing::Fluid);
    let dispensed_volume = liquid.clone().and_then(|at| {
        Volume::from_cubic_metre(dispensed.kilogram() / at.liquid_kg_per_m3)
            .map_err(|_| Missing::NoCharge)
    });
    let density = nominal.kilogram() / volumes.nominal.cubic_metre();
    let bench_fill = liquid.map(|at| {
        ((density - at.vapour_kg_per_m3) / (at.liquid_kg_per_m3 - at.vapour_kg_per_m3))
            .clamp(0.0, 1.0)
    });
    Ok(ChargeFigures {
        nominal,
        least: mass(nominal.kilogram() - tolerance)?,
        greatest: mass(nominal.kilogram() + tolerance)?,
        dispensed,
        dispensed_volume,
        bench_fill,
    })
}

/// The corners as sealed units.
pub fn corners(fluid: &Arc<Fluid>, charge: &ChargeFigures, volumes: &Volumes) -> Figure<Corners> {
    let unit = |mass, volume| {
        SealedUnit::new(Arc::clone(fluid), mass, volume).map_err(|_| Missing::NoCharge)
    };
    Ok(Corners {
        nominal: unit(charge.nominal, volumes.nominal)?,
        heaviest: unit(charge.greatest, volumes.least)?,
        lightest: unit(charge.least, volumes.greatest).ok(),
    })
}

fn sealed_mass(
    design: &Design,
    fluid: &Fluid,
    volumes: &Volumes,
    bench: Temperature,
) -> Figure<Mass> {
    let checked = |kilogram: f64| {
        Mass::from_kilogram(kilogram)
            .ok()
            .filter(|m| m.kilogram() > 0.0)
            .ok_or(Missing::NoCharge)
    };
    match &design.charge.aim {
        ChargeAim::Mass { mass } => checked(mass.kilogram()),
        ChargeAim::Dispensed { volume } => {
            let at = fluid.saturation(bench)?;
            checked(volume.cubic_metre() * at.liquid_kg_per_m3 - design.bench.purge_loss.kilogram())
        }
        ChargeAim::FillRatio {
            ratio,
            temperature,
            of,
        } => {
            let at = fluid.saturation(temperature.unwrap_or(bench))?;
            let inside = volumes.nominal.cubic_metre();
            let named = match of {
                NamedVolume::Inside => inside,
                NamedVolume::Part(name) => {
                    let parts = design.chamber.parts.iter();
                    let named: Vec<f64> = parts
                        .filter(|part| part.name == *name)
                        .map(|part| part.volumes().nominal_m3.abs())
                        .collect();
                    if named.is_empty() {
                        return Err(Missing::NoSuchPart { name: name.clone() });
                    }
                    named.iter().sum()
                }
            };
            let liquid = ratio.fraction() * named;
            if liquid > inside {
                return Err(Missing::Overfull {
                    share: liquid / inside,
                });
            }
            checked(at.liquid_kg_per_m3 * liquid + at.vapour_kg_per_m3 * (inside - liquid))
        }
    }
}
