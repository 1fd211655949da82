//! Energy that a breaking unit can set free.

use crate::conditions::STANDARD_ATMOSPHERE_PA;
use crate::fluid::{Fluid, FluidError, Regime};
use crate::sealed::SealedUnit;
use crate::solve::bracketed_root;
use crate::units::{Energy, Pressure, Temperature};

/// Why the energy is not given. Unknown means: treat as high.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum EnergyError {
    #[error(transparent)]
    Fluid(#[from] FluidError),
    #[error("{fluid} would freeze on expanding to one atmosphere: not computed")]
    FreezesOnExpansion { fluid: String },
}

/// Isentropic expansion to one atmosphere with flashing, m·(u(T, ρ) − u(p₀, s)),
/// in every regime. Of the fluid alone: what residual gas adds is small beside it.
///
/// Source of the method: the usual isentropic estimate for flashing liquids
/// (from memory of CCPS, Guidelines for Vapor Cloud Explosion, Pressure Vessel
/// Burst, BLEVE and Flash Fire Hazards).
///
/// # Errors
/// [`EnergyError`] for correlated fluids, frozen fluids, and where the expansion
/// ends below the freezing point.
pub fn rupture_energy(unit: &SealedUnit, temperature: Temperature) -> Result<Energy, EnergyError> {
    let fluid = unit.fluid();
    let state = unit.state(temperature)?;
    if state.regime == Regime::Frozen || state.own_pressure().pascal() <= STANDARD_ATMOSPHERE_PA {
        return Ok(Energy::from_joule(0.0).expect("zero"));
    }
    let rho = unit.mean_density_at(temperature).kilogram_per_cubic_metre();
    let (u1, s) = match state.quality {
        Some(x) if state.regime == Regime::TwoPhase => {
            let at = fluid.saturation(temperature)?;
            let (ul, sl) = fluid.energy_and_entropy(at.liquid_kg_per_m3, temperature)?;
            let (uv, sv) = fluid.energy_and_entropy(at.vapour_kg_per_m3, temperature)?;
            (ul + x * (uv - ul), sl + x * (sv - sl))
        }
        _ => fluid.energy_and_entropy(rho, temperature)?,
    };
    let u2 = energy_at_one_atmosphere(fluid, s, temperature)?;
    let joule = (unit.mass().kilogram() * (u1 - u2)).max(0.0);
    Energy::from_joule(joule).map_err(|_| {
        EnergyError::Fluid(FluidError::NotConverged {
            fluid: fluid.name().to_owned(),
            temperature,
        })
    })
}

/// Internal energy at one atmosphere and entropy `s`, J/kg.
fn energy_at_one_atmosphere(fluid: &Fluid, s: f64, from: Temperature) -> Result<f64, EnergyError> {
    let p0 = Pressure::from_pascal(STANDARD_ATMOSPHERE_PA).expect("finite");
    let (low, high) = fluid.saturation_range();
    let low = low.max(fluid.freezing_point());
    let curve = fluid.curve()?;
    let excess = |t: f64| curve.at(t).pressure_pa - STANDARD_ATMOSPHERE_PA;
    let boiling = bracketed_root(excess, low.kelvin(), high.kelvin(), 1e-9)
        .ok()
        .and_then(|t| Temperature::from_kelvin(t).ok())
        .ok_or_else(|| EnergyError::FreezesOnExpansion {
            fluid: fluid.name().to_owned(),
        })?;
    let at = fluid.saturation(boiling)?;
    let (ul, sl) = fluid.energy_and_entropy(at.liquid_kg_per_m3, boiling)?;
    let (uv, sv) = fluid.energy_and_entropy(at.vapour_kg_per_m3, boiling)?;
    if (sl..=sv).contains(&s) {
        return Ok(ul + (s - sl) / (sv - sl) * (uv - ul));
    }
    // One phase at one atmosphere: the temperature at which the entropy is `s`.
    let single = |t: f64| -> Option<(f64, f64)> {
        let t = Temperature::from_kelvin(t).ok()?;
        let rho = fluid.density_at(p0, t).ok()??;
        fluid
            .energy_and_entropy(rho.kilogram_per_cubic_metre(), t)
            .ok()
    };
    // A step off the boiling point keeps the density solve on one side of the dome.
    let (t1, t2) = if s < sl {
        (low.kelvin(), boiling.kelvin() * (1.0 - 1e-9))
    } else {
        (boiling.kelvin() * (1.0 + 1e-9), from.kelvin())
    };
    let found = bracketed_root(
        |t| single(t).map_or(f64::NAN, |(_, found)| found - s),
        t1,
        t2,
        1e-9,
    );
    match found.ok().and_then(single) {
        Some((u, _)) => Ok(u),
        // Between the saturated entropy and the first step off it: the boundary itself.
        None => Ok(if s < sl { ul } else { uv }),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::fluid::Catalog;
    use crate::units::{Mass, Volume};

    /// Hand-worked with the reference equations through CoolProp 8.0.0, phase by
    /// phase: half of 100 mL liquid, expanded at constant entropy to 1 atm.
    fn check(id: &str, celsius: f64, expected_j: f64) {
        let fluid = Catalog::built_in().by_id(id).expect(id);
        let t = Temperature::from_celsius(celsius).expect("temperature");
        let at = fluid.saturation(t).expect("saturation");
        let mass = 0.5 * 1e-4 * (at.liquid_kg_per_m3 + at.vapour_kg_per_m3);
        let unit = SealedUnit::new(
            fluid,
            Mass::from_kilogram(mass).expect("mass"),
            Volume::from_cubic_metre(1e-4).expect("volume"),
        )
        .expect("unit");
        let found = rupture_energy(&unit, t).expect("energy").joule();
        assert!(
            (found / expected_j - 1.0).abs() < 2e-3,
            "{id}: {found} J, expected {expected_j} J"
        );
    }

    #[test]
    fn flashing_energy_of_half_full_vessels() {
        check("ammonia", 60.0, 3043.0);
        check("r-134a", 70.0, 1926.0);
        check("water", 200.0, 3544.0);
    }

    /// One litre of liquid-full propane at 65 °C and 40 bar holds 30.6 kJ, not the
    /// 130 J of the liquid's compression alone.
    #[test]
    fn liquid_full_propane_holds_kilojoules() {
        let fluid = Catalog::built_in().by_id("propane").expect("propane");
        let t = Temperature::from_celsius(65.0).expect("temperature");
        let p = Pressure::from_pascal(40e5).expect("pressure");
        let rho = fluid.density_at(p, t).expect("liquid").expect("liquid");
        let unit = SealedUnit::new(
            fluid,
            Mass::from_kilogram(rho.kilogram_per_cubic_metre() * 1e-3).expect("mass"),
            Volume::from_cubic_metre(1e-3).expect("volume"),
        )
        .expect("unit");
        let found = rupture_energy(&unit, t).expect("energy").joule();
        assert!((found / 30_600.0 - 1.0).abs() < 0.01, "{found} J");
    }
}
