//! The whole charge set free in a closed room, well mixed.
//!
//! Near the break it is worse: a well-mixed figure never gives a pass by itself.

use crate::conditions::{Room, STANDARD_ATMOSPHERE_PA};
use crate::fluid::Fluid;
use crate::fluid::correlated::GAS_CONSTANT;
use crate::units::Mass;

/// Mole fraction of oxygen in dry air (U.S. Standard Atmosphere 1976).
const OXYGEN: f64 = 0.209_476;

/// Room air after a release.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Release {
    /// Parts per million by volume, at most the fluid's vapour pressure allows.
    pub ppm: f64,
    /// Whether the vapour pressure at room temperature caps the figure.
    pub capped: bool,
    /// mg/m³, the whole charge, as vapour or mist.
    pub mg_per_m3: f64,
    /// Share of the lower flammable limit, where the fluid has one.
    pub of_lower_flammable_limit: Option<f64>,
    /// Multiple of the lowest exposure limit, where known.
    pub of_exposure_limit: Option<f64>,
    /// Multiple of the immediately dangerous concentration, where known.
    pub of_immediately_dangerous: Option<f64>,
    /// Oxygen left, mole fraction, the gas having pushed out air.
    pub oxygen: f64,
}

/// `mass` set free in `room` at one standard atmosphere.
///
/// C = 10⁶ · m R T / (M p V), an ideal gas: at room pressure that is good to 1 %.
/// The gas pushes out its own volume of air, the careful one of the usual pictures: what
/// leaves the room is air alone.
pub fn release(fluid: &Fluid, mass: Mass, room: &Room) -> Option<Release> {
    let volume = room.volume.cubic_metre();
    if volume <= 0.0 {
        return None;
    }
    let t = room.temperature.kelvin();
    let mole_ratio =
        mass.kilogram() * GAS_CONSTANT * t / (fluid.molar_mass() * STANDARD_ATMOSPHERE_PA * volume);
    let ceiling = fluid
        .saturation_pressure(room.temperature)
        .map_or(f64::INFINITY, |p| p.pascal() / STANDARD_ATMOSPHERE_PA);
    let capped = mole_ratio > ceiling && ceiling < 1.0;
    // More than all of the air cannot be pushed out.
    let fraction = if capped { ceiling } else { mole_ratio.min(1.0) };
    let ppm = 1e6 * fraction;
    let safety = fluid.safety();
    let over =
        |limit: &Option<crate::source::Sourced<f64>>| limit.as_ref().map(|limit| ppm / limit.value);
    Some(Release {
        ppm,
        capped,
        mg_per_m3: 1e6 * mass.kilogram() / volume,
        of_lower_flammable_limit: safety
            .lower_flammable_limit
            .as_ref()
            .map(|limit| fraction / limit.value),
        of_exposure_limit: over(&safety.exposure_limit_ppm),
        of_immediately_dangerous: over(&safety.immediately_dangerous_ppm),
        oxygen: OXYGEN * (1.0 - fraction),
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::fluid::Catalog;
    use crate::units::{Temperature, Volume};

    fn check(fluid: &str, gram: f64, expected_ppm: f64) {
        let fluid = Catalog::built_in().by_id(fluid).expect(fluid);
        let room = Room {
            volume: Volume::from_cubic_metre(30.0).expect("volume"),
            temperature: Temperature::from_celsius(25.0).expect("temperature"),
            consumers: false,
        };
        let found = release(
            &fluid,
            Mass::from_kilogram(gram * 1e-3).expect("mass"),
            &room,
        )
        .expect("a room");
        assert!(
            (found.ppm / expected_ppm - 1.0).abs() < 3e-3,
            "{}: {}",
            fluid.id(),
            found.ppm
        );
    }

    /// Hand-worked with the molar volume 24.465 L at 25 °C and 1 atm (OSHA's and
    /// NIOSH's conversion, from memory); 30 m³.
    #[test]
    fn ppm_in_a_room_against_the_molar_volume() {
        check("dichloromethane", 30.0, 288.0);
        check("ammonia", 10.0, 479.0);
        check("propane", 150.0, 2774.0);
        check("diethyl-ether", 20.0, 220.0);
        check("n-pentane", 20.0, 226.0);
        check("r-134a", 50.0, 400.0);
    }

    #[test]
    fn vapour_pressure_caps_the_concentration() {
        let water = Catalog::built_in().by_id("water").expect("water");
        let room = Room {
            volume: Volume::from_cubic_metre(1.0).expect("volume"),
            temperature: Temperature::from_celsius(25.0).expect("temperature"),
            consumers: false,
        };
        let found =
            release(&water, Mass::from_kilogram(5.0).expect("mass"), &room).expect("a room");
        // 3169.9 Pa at 25 °C (IAPWS-95) over one atmosphere.
        assert!(found.capped && (found.ppm - 1e6 * 3169.9 / 101_325.0).abs() < 2.0);
        assert!((found.mg_per_m3 - 5e6).abs() < 1e-6);
    }
}
