//! What permanent gas costs: height of a lifted column, and length of a condenser.

use crate::fluid::correlated::GAS_CONSTANT;

/// Standard gravity, m/s² (ISO 80000-3).
const GRAVITY: f64 = 9.806_65;

/// Height of a liquid column that a gas pressure holds down.
///
/// h = Δp/((ρ′ − ρ″) g)
///
/// | symbol | meaning                                       | unit  |
/// |--------|-----------------------------------------------|-------|
/// | Δp     | gas pressure on one side of the column        | Pa    |
/// | ρ′, ρ″ | density of liquid and of vapour               | kg/m³ |
/// | g      | 9.80665                                       | m/s²  |
///
/// All the gas on the far side, none on the near one: the most it can cost.
/// Source: hydrostatics.
pub fn lost_column_m(gas_pa: f64, liquid_kg_per_m3: f64, vapour_kg_per_m3: f64) -> f64 {
    gas_pa / ((liquid_kg_per_m3 - vapour_kg_per_m3) * GRAVITY)
}

/// Difference of temperature, K, that makes up for a gas pressure: Δp/(dp/dT), with the slope
/// of the vapour pressure in Pa/K.
pub fn lost_temperature_k(gas_pa: f64, slope_pa_per_k: f64) -> f64 {
    gas_pa / slope_pa_per_k
}

/// Length of a condenser that gas swept to its end blocks, by the flat front.
///
/// L = n R T_c/(A (p_v(T_v) − p_v(T_c)))
///
/// | symbol   | meaning                                     | unit |
/// |----------|---------------------------------------------|------|
/// | n        | amount of gas                               | mol  |
/// | T_v, T_c | temperature of the vapour, of the cold end  | K    |
/// | A        | free cross-section of the condenser         | m²   |
/// | p_v      | vapour pressure                             | Pa   |
///
/// Valid for a sharp front between vapour and gas: neither diffusion nor conduction along the
/// wall. `None` where the cold end is not colder.
/// Source: B. D. Marcus, Theory and Design of Variable Conductance Heat Pipes,
/// NASA CR-2018, 1972 [from memory].
pub fn blocked_length_m(
    amount_mol: f64,
    cold_end_k: f64,
    area_m2: f64,
    vapour_pa: f64,
    cold_end_pa: f64,
) -> Option<f64> {
    let driving = area_m2 * (vapour_pa - cold_end_pa);
    (driving > 0.0).then(|| amount_mol * GAS_CONSTANT * cold_end_k / driving)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::fluid::Catalog;
    use crate::units::Temperature;
    use std::f64::consts::PI;

    fn celsius(value: f64) -> Temperature {
        Temperature::from_celsius(value).expect("a temperature")
    }

    /// methods.md section 8, P7: 111 Pa is 8.5 mm of dichloromethane, and 0.058 K of it, at
    /// 20 °C; P1: 1925 Pa/K there, by another library's correlation.
    #[test]
    fn gas_of_a_millibar_on_a_column_of_dichloromethane() {
        let fluid = Catalog::built_in().by_id("dichloromethane").expect("known");
        let at = fluid.saturation(celsius(20.0)).expect("in range");
        let lost = lost_column_m(111.1, at.liquid_kg_per_m3, at.vapour_kg_per_m3);
        assert!((1e3 * lost - 8.5).abs() < 0.1, "{lost}");
        let kelvin = lost_temperature_k(111.1, at.slope_pa_per_k);
        assert!((kelvin - 0.058).abs() < 0.002, "{kelvin}");
    }

    /// methods.md section 8, P7: 1 µmol in water, vapour at 60 °C, cold end at 40 °C, bore
    /// 14 mm: 1.3 mm.
    #[test]
    fn a_micromole_at_the_end_of_a_water_heat_pipe() {
        let water = Catalog::built_in().by_id("water").expect("known");
        let p = |t: f64| water.saturation_pressure(celsius(t)).expect("in range");
        let area = 0.25 * PI * 0.014f64.powi(2);
        let (hot, cold) = (p(60.0).pascal(), p(40.0).pascal());
        let length = blocked_length_m(1e-6, 313.15, area, hot, cold).expect("a length");
        assert!((1e3 * length - 1.35).abs() < 0.05, "{length}");
        assert_eq!(blocked_length_m(1e-6, 313.15, area, cold, cold), None);
    }
}
