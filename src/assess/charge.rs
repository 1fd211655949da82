//! From how the charge is stated to the mass that is sealed in.

use std::sync::Arc;

use super::figure::{Figure, Missing};
use super::inventory::GasInventory;
use crate::chamber::{Closure, Movement, NamedVolumes, Volumes};
use crate::design::{ChargeAim, Design, NamedVolume};
use crate::fluid::Fluid;
use crate::sealed::SealedUnit;
use crate::units::{Mass, Pressure, Volume};

/// The sealed mass and what the bench sees of it.
#[derive(Debug, Clone, PartialEq)]
pub struct ChargeFigures {
    /// Sealed mass aimed at.
    pub nominal: Mass,
    pub least: Mass,
    pub greatest: Mass,
    /// Vapour in the stub as it is parted at bench temperature.
    pub stub_content: Mass,
    /// What is dispensed: sealed mass, purge loss and what leaves in the stub.
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
    /// Greatest mass in the smallest volume, with its gas: governs pressure and liquid-full.
    pub heaviest: SealedUnit,
    /// Least mass in the largest volume, without gas: governs dry-out and collapse; none where the tolerance
    /// reaches down to nothing.
    pub lightest: Option<SealedUnit>,
}

/// The sealed mass that a design's charge means.
pub fn charge_figures(
    design: &Design,
    fluid: &Fluid,
    named: &NamedVolumes,
    movement: Movement,
) -> Figure<ChargeFigures> {
    let bench = design.conditions.bench;
    let nominal = sealed_mass(design, fluid, named, movement)?;
    let tolerance = design.charge.tolerance.kilogram();
    let mass =
        |kilogram: f64| Mass::from_kilogram(kilogram.max(0.0)).map_err(|_| Missing::NoCharge);
    let liquid = fluid.saturation(bench).map_err(Missing::Fluid);
    let stub_content = mass(match &liquid {
        Ok(at) => at.vapour_kg_per_m3 * stub_m3(design),
        Err(_) => 0.0,
    })?;
    let lost = design.bench.purge_loss.kilogram() + stub_content.kilogram();
    let dispensed = mass(nominal.kilogram() + lost)?;
    let dispensed_volume = liquid.clone().and_then(|at| {
        Volume::from_cubic_metre(dispensed.kilogram() / at.liquid_kg_per_m3)
            .map_err(|_| Missing::NoCharge)
    });
    let inside_m3 = named.inside.nominal.cubic_metre() * movement.growth(bench.kelvin());
    let density = nominal.kilogram() / inside_m3;
    let bench_fill = liquid.map(|at| {
        ((density - at.vapour_kg_per_m3) / (at.liquid_kg_per_m3 - at.vapour_kg_per_m3))
            .clamp(0.0, 1.0)
    });
    Ok(ChargeFigures {
        nominal,
        least: mass(nominal.kilogram() - tolerance)?,
        greatest: mass(nominal.kilogram() + tolerance)?,
        stub_content,
        dispensed,
        dispensed_volume,
        bench_fill,
    })
}

/// The corners as sealed units.
pub fn corners(
    fluid: &Arc<Fluid>,
    charge: &ChargeFigures,
    volumes: &Volumes,
    movement: Movement,
    outside: Pressure,
    gas: &GasInventory,
) -> Figure<Corners> {
    let unit = |mass, volume| {
        SealedUnit::new(Arc::clone(fluid), mass, volume)
            .map(|unit| unit.with_walls(movement, outside))
            .map_err(|_| Missing::NoCharge)
    };
    let with_gas = |mass: Mass, volume: Volume| -> Figure<SealedUnit> {
        let unit = unit(mass, volume)?;
        if gas.is_empty() {
            return Ok(unit);
        }
        let amount = gas.amount(mass.kilogram(), volume.cubic_metre());
        Ok(unit.with_gas(amount, gas.ostwald()))
    };
    Ok(Corners {
        nominal: with_gas(charge.nominal, volumes.nominal)?,
        heaviest: with_gas(charge.greatest, volumes.least)?,
        lightest: unit(charge.least, volumes.greatest).ok(),
    })
}

fn stub_m3(design: &Design) -> f64 {
    let closure = design.chamber.closure.as_ref();
    closure.map_or(0.0, Closure::stub_m3)
}

fn sealed_mass(
    design: &Design,
    fluid: &Fluid,
    volumes: &NamedVolumes,
    movement: Movement,
) -> Figure<Mass> {
    let bench = design.conditions.bench;
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
            let lost = design.bench.purge_loss.kilogram() + at.vapour_kg_per_m3 * stub_m3(design);
            checked(volume.cubic_metre() * at.liquid_kg_per_m3 - lost)
        }
        ChargeAim::FillRatio {
            ratio,
            temperature,
            of,
        } => {
            let temperature = temperature.unwrap_or(bench);
            let at = fluid.saturation(temperature)?;
            let inside = volumes.inside.nominal.cubic_metre();
            let named = match of {
                NamedVolume::Inside => inside,
                NamedVolume::VapourCore => volumes.vapour_core.nominal.cubic_metre(),
                NamedVolume::WickVoid => match volumes.wick_void.nominal.cubic_metre() {
                    0.0 => return Err(Missing::NoWick),
                    void => void,
                },
                NamedVolume::Evaporator => match &volumes.evaporator {
                    Some(evaporator) => evaporator.nominal.cubic_metre(),
                    None => return Err(Missing::NoEvaporator),
                },
                NamedVolume::Part(name) => {
                    let parts = design.chamber.parts.iter();
                    let named: Vec<f64> = parts
                        .filter(|part| part.name == *name)
                        .map(|part| part.volumes().inside.nominal_m3.abs())
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
            // Liquid and the volume it is counted in, both at that temperature.
            let growth = movement.growth(temperature.kelvin());
            checked(
                growth * (at.liquid_kg_per_m3 * liquid + at.vapour_kg_per_m3 * (inside - liquid)),
            )
        }
    }
}
