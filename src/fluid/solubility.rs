//! Air dissolved in a liquid.

use std::sync::LazyLock;

use serde::Deserialize;

use crate::source::Source;

/// How much air a liquid takes up at 25 °C.
///
/// c_liquid = L c_gas,  c_gas = p/(R T)
///
/// | symbol            | meaning                                       | unit   |
/// |-------------------|-----------------------------------------------|--------|
/// | L                 | Ostwald coefficient                           | –      |
/// | c_liquid, c_gas   | amount of air per volume of liquid and of gas | mol/m³ |
/// | p                 | partial pressure of the air                   | Pa     |
///
/// Of air: 0.79 of that of nitrogen and 0.21 of that of oxygen. From a mole fraction x at
/// 101 325 Pa, L = x R T/(p V_m), with the liquid's molar volume. Held constant over
/// temperature: in organic liquids it rises slowly with heat, in water it falls by about a
/// third from 25 °C to 80 °C [from memory].
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Solubility {
    fluid: String,
    pub ostwald_air: f64,
    pub source: Source,
}

impl Solubility {
    /// That of a built-in fluid.
    pub(super) fn of(id: &str) -> Option<&'static Self> {
        static TABLE: LazyLock<Vec<Solubility>> = LazyLock::new(|| {
            ron::from_str(include_str!("../../assets/air-solubility.ron"))
                .expect("a test reads the table")
        });
        TABLE.iter().find(|row| row.fluid == id)
    }
}

#[cfg(test)]
mod tests {
    use crate::fluid::Catalog;
    use crate::fluid::correlated::GAS_CONSTANT;
    use crate::units::Temperature;

    /// Mole fractions at 101 325 Pa and 298.15 K, nitrogen and oxygen, times 10 000; from
    /// memory of the reviews that the table names.
    const MOLE_FRACTIONS: [(&str, f64, f64); 12] = [
        ("water", 0.117_74, 0.229_96),
        ("methanol", 2.75, 4.15),
        ("ethanol", 3.59, 5.84),
        ("acetone", 5.42, 8.4),
        ("n-hexane", 14.0, 20.0),
        ("n-heptane", 13.5, 20.2),
        ("n-octane", 13.0, 20.5),
        ("benzene", 4.46, 8.17),
        ("toluene", 5.74, 9.09),
        ("cyclohexane", 7.6, 12.3),
        ("carbon-tetrachloride", 6.43, 12.0),
        ("chlorobenzene", 4.38, 7.9),
    ];

    #[test]
    fn the_coefficients_are_those_of_the_mole_fractions() {
        let t = 298.15;
        for (id, nitrogen, oxygen) in MOLE_FRACTIONS {
            let fluid = Catalog::built_in().by_id(id).expect(id);
            let at = fluid.saturation(Temperature::from_kelvin(t).expect("a temperature"));
            let molar_volume = fluid.molar_mass() / at.expect(id).liquid_kg_per_m3;
            let x = 1e-4 * (0.79 * nitrogen + 0.21 * oxygen);
            let expected = x * GAS_CONSTANT * t / (101_325.0 * molar_volume);
            let row = fluid.air_solubility().expect(id);
            assert!(
                (row.ostwald_air / expected - 1.0).abs() < 0.03,
                "{id}: {expected}"
            );
            assert!((0.0..1.0).contains(&row.ostwald_air));
            assert!(!row.source.text().is_empty());
        }
    }

    #[test]
    fn what_is_not_confidently_known_is_not_in_the_table() {
        for id in ["dichloromethane", "diethyl-ether", "ammonia"] {
            let fluid = Catalog::built_in().by_id(id).expect(id);
            assert_eq!(fluid.air_solubility(), None, "{id}");
        }
    }
}
