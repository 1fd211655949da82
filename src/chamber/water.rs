//! Inside volume of a vessel, measured by the water that fills it.

/// Density that balances take their weights to have.
///
/// Source: OIML D 28 and R 111-1, conventional mass [from memory].
pub const WEIGHTS_KG_PER_M3: f64 = 8000.0;

/// What the water itself may be off by, relative: dissolved air, isotopes and the
/// density formula. For distilled or deionised water; tap water is heavier by 1e-4
/// and more, and makes the vessel read too large.
///
/// Source: Tanaka et al. 2001, of the order of their corrections [from memory].
const WATER_RELATIVE: f64 = 1e-5;
/// Compressibility of water near room temperature, 1/Pa [from memory].
const WATER_COMPRESSIBILITY_PER_PA: f64 = 5.1e-10;
const STANDARD_PA: f64 = 101_325.0;
/// What the density of the air may be off by, relative: 2 hPa, 2 K and 10 % of
/// humidity together. It moves the volume by only 1e-5.
const AIR_RELATIVE: f64 = 0.01;
/// Greatest change of volume that the linear reduction is used for.
const REDUCTION_LIMIT: f64 = 0.02;

const WATER_K: [f64; 2] = [273.15, 313.15];
const AIR_K: [f64; 2] = [273.15, 313.15];
const AIR_PA: [f64; 2] = [60_000.0, 110_000.0];

/// Two weighings of one vessel on a balance in air: open and full of air, then full of
/// water, in the same room.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct WaterFill {
    /// Reading with the vessel empty, open and dry.
    pub empty_kg: f64,
    /// Reading with the vessel full of water.
    pub full_kg: f64,
    /// Of each reading, either way.
    pub reading_uncertainty_kg: f64,
    /// Of the water and the wall.
    pub water_temperature_k: f64,
    pub temperature_uncertainty_k: f64,
    /// At the balance, not reduced to sea level.
    pub air_pressure_pa: f64,
    pub air_temperature_k: f64,
    /// 0 to 1.
    pub relative_humidity: f64,
    /// Most gas that may have stayed in the vessel, 0 if none.
    pub bubble_allowance_m3: f64,
}

/// A volume and how far off it may be, either way.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct MeasuredVolume {
    pub volume_m3: f64,
    pub uncertainty_m3: f64,
}

/// What keeps two weighings from giving a volume.
#[derive(Debug, Clone, Copy, PartialEq, thiserror::Error)]
pub enum WaterFillError {
    /// Not finite, or the full reading is not above the empty one.
    #[error("full reading {full_kg} kg is not above empty {empty_kg} kg")]
    NotHeavier { empty_kg: f64, full_kg: f64 },
    /// An uncertainty or the bubble allowance is negative or not finite.
    #[error("an uncertainty must be 0 or above")]
    Uncertainty,
    /// With its uncertainty, outside 0 °C to 40 °C.
    #[error("water at {temperature_k} K is outside 273.15 K to 313.15 K")]
    WaterTemperature { temperature_k: f64 },
    /// Outside 0 °C to 40 °C.
    #[error("air at {temperature_k} K is outside 273.15 K to 313.15 K")]
    AirTemperature { temperature_k: f64 },
    /// Outside 600 hPa to 1100 hPa.
    #[error("air at {pressure_pa} Pa is outside 60000 Pa to 110000 Pa")]
    AirPressure { pressure_pa: f64 },
    /// Outside 0 to 1.
    #[error("humidity {relative} is not 0 to 1")]
    Humidity { relative: f64 },
    /// Reference temperature and expansion change the volume by more than 2 %, or are
    /// not finite.
    #[error("too far from the reference temperature")]
    Reduction,
}

/// Density of air-free water at 101.325 kPa; `None` outside 0 °C to 40 °C.
///
/// ρ = a₅ [1 − (t + a₁)² (t + a₂)/(a₃ (t + a₄))]
///
/// with t in °C (ITS-90). Stated uncertainty: below 1e-6.
/// Source: M. Tanaka et al., Metrologia 38 (2001) 301, doi:10.1088/0026-1394/38/4/3.
pub fn water_kg_per_m3(temperature_k: f64) -> Option<f64> {
    const A: [f64; 5] = [-3.983_035, 301.797, 522_528.9, 69.348_81, 999.974_950];
    let [least, greatest] = WATER_K;
    (least..=greatest).contains(&temperature_k).then(|| {
        let t = temperature_k - 273.15;
        A[4] * (1.0 - (t + A[0]).powi(2) * (t + A[1]) / (A[2] * (t + A[3])))
    })
}

/// Density of moist air; `None` outside 0 °C to 40 °C, 600 hPa to 1100 hPa, 0 to 1.
///
/// ρ = (0.34848 p − 0.009 h e^{0.061 t})/(273.15 + t)
///
/// with p in hPa, h the humidity in %, t in °C; arguments here in SI, humidity 0 to 1.
/// Stated uncertainty: 2e-4 from 900 hPa to 1100 hPa, 10 °C to 30 °C, below 80 %
/// [from memory]; outside, some 1e-3.
/// Source: OIML R 111-1:2004, E.3-1, simplified from the CIPM's [from memory].
pub fn air_kg_per_m3(temperature_k: f64, pressure_pa: f64, humidity: f64) -> Option<f64> {
    let within = |[least, greatest]: [f64; 2], x: f64| (least..=greatest).contains(&x);
    (within(AIR_K, temperature_k) && within(AIR_PA, pressure_pa) && within([0.0, 1.0], humidity))
        .then(|| {
            let vapour = 0.009 * (100.0 * humidity) * (0.061 * (temperature_k - 273.15)).exp();
            (0.34848 * (0.01 * pressure_pa) - vapour) / temperature_k
        })
}

impl WaterFill {
    /// Volume at a reference temperature, with a worst-case uncertainty.
    ///
    /// V = (W₂ − W₁) (1 − ρ_a/ρ_b)/(ρ_w − ρ_a) · (1 − 3 α (T − T_ref))
    ///
    /// | symbol | meaning                                       | unit  |
    /// |--------|-----------------------------------------------|-------|
    /// | W₁, W₂ | readings, empty and full                      | kg    |
    /// | ρ_w    | water, [`water_kg_per_m3`]                    | kg/m³ |
    /// | ρ_a    | air, [`air_kg_per_m3`]                        | kg/m³ |
    /// | ρ_b    | weights, [`WEIGHTS_KG_PER_M3`]                | kg/m³ |
    /// | α      | linear expansion of the wall                  | 1/K   |
    /// | T      | of water and wall                             | K     |
    ///
    /// ρ_a is taken off ρ_w because the empty vessel was weighed full of air; a vessel
    /// pumped out before its empty weighing needs no such thing, and reads 0.12 % too
    /// large here. The uncertainty is the plain sum of: both readings, the
    /// water's temperature (through its density and the wall), the water itself and
    /// the air's pressure on it, 1 % of the air's density, what the linear reduction
    /// leaves out, and the bubble. A bubble in truth only makes the volume read too
    /// small; counting it both ways is careful for dry-out as for overfilling.
    /// Source: the form of ISO 8655-6 and ASTM E542 [from memory].
    ///
    /// # Errors
    /// [`WaterFillError`], for what is out of range.
    pub fn volume(
        &self,
        reference_k: f64,
        expansion_per_k: f64,
    ) -> Result<MeasuredVolume, WaterFillError> {
        let air = self.checked_air_kg_per_m3()?;
        let t = self.water_temperature_k;
        let per_kg = |temperature_k: f64, air: f64| {
            let water = water_kg_per_m3(temperature_k)
                .ok_or(WaterFillError::WaterTemperature { temperature_k })?;
            let wall = 1.0 - 3.0 * expansion_per_k * (temperature_k - reference_k);
            Ok((1.0 - air / WEIGHTS_KG_PER_M3) / (water - air) * wall)
        };
        let net_kg = self.full_kg - self.empty_kg;
        let here = per_kg(t, air)?;
        // The extremes of the span decide: near 4 °C the density is a parabola.
        let warm = per_kg(t + self.temperature_uncertainty_k, air)?;
        let cold = per_kg(t - self.temperature_uncertainty_k, air)?;
        let other_air = per_kg(t, air * (1.0 + AIR_RELATIVE))?;
        let reduction = 3.0 * expansion_per_k * (t - reference_k);
        if !(reduction.abs() <= REDUCTION_LIMIT && reference_k >= 0.0) {
            return Err(WaterFillError::Reduction);
        }

        let volume_m3 = net_kg * here;
        let water = WATER_RELATIVE
            + WATER_COMPRESSIBILITY_PER_PA * (self.air_pressure_pa - STANDARD_PA).abs();
        let uncertainty_m3 = 2.0 * self.reading_uncertainty_kg * here
            + net_kg * (warm - here).abs().max((cold - here).abs())
            + net_kg * (other_air - here).abs()
            + volume_m3 * (water + reduction * reduction)
            + self.bubble_allowance_m3;
        if !(volume_m3.is_finite() && uncertainty_m3.is_finite()) {
            return Err(WaterFillError::Uncertainty);
        }
        Ok(MeasuredVolume {
            volume_m3,
            uncertainty_m3,
        })
    }

    /// Density of the air, once every field makes sense.
    fn checked_air_kg_per_m3(&self) -> Result<f64, WaterFillError> {
        let (empty_kg, full_kg) = (self.empty_kg, self.full_kg);
        if !(empty_kg.is_finite() && full_kg.is_finite() && full_kg > empty_kg) {
            return Err(WaterFillError::NotHeavier { empty_kg, full_kg });
        }
        let uncertainties = [
            self.reading_uncertainty_kg,
            self.temperature_uncertainty_k,
            self.bubble_allowance_m3,
        ];
        if !uncertainties.iter().all(|u| u.is_finite() && *u >= 0.0) {
            return Err(WaterFillError::Uncertainty);
        }
        let (temperature_k, pressure_pa) = (self.air_temperature_k, self.air_pressure_pa);
        let relative = self.relative_humidity;
        air_kg_per_m3(temperature_k, pressure_pa, relative).ok_or({
            if !(AIR_K[0]..=AIR_K[1]).contains(&temperature_k) {
                WaterFillError::AirTemperature { temperature_k }
            } else if !(AIR_PA[0]..=AIR_PA[1]).contains(&pressure_pa) {
                WaterFillError::AirPressure { pressure_pa }
            } else {
                WaterFillError::Humidity { relative }
            }
        })
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn close(got: f64, expected: f64, digit: f64) {
        assert!((got - expected).abs() <= 0.5 * digit, "{got} {expected}");
    }

    const FILL: WaterFill = WaterFill {
        empty_kg: 0.250,
        full_kg: 0.350,
        reading_uncertainty_kg: 10e-6,
        water_temperature_k: 295.15,
        temperature_uncertainty_k: 0.5,
        air_pressure_pa: 100_000.0,
        air_temperature_k: 296.15,
        relative_humidity: 0.45,
        bubble_allowance_m3: 20e-9,
    };

    /// Table in Tanaka et al. 2001 [20 °C and 25 °C seen quoted, the others from memory].
    #[test]
    fn water_density_of_the_table() {
        for (t, rho) in [
            (0.0, 999.8428),
            (5.0, 999.9668),
            (10.0, 999.7027),
            (15.0, 999.1026),
            (20.0, 998.2067),
            (25.0, 997.0470),
            (30.0, 995.6488),
            (40.0, 992.2152),
        ] {
            close(water_kg_per_m3(273.15 + t).expect("in range"), rho, 1e-4);
        }
    }

    /// Moist air as a mixture of perfect gases, compressibility 0.9996: dry 28.965 g/mol,
    /// vapour 18.015 g/mol at half of 2339.3 Pa, 20 °C: 1.1994 kg/m³. 3e-4 for the
    /// formula's own 2e-4 and the digits of the mixture's.
    #[test]
    fn air_density_agrees_with_a_mixture_of_gases() {
        let (p, e, rt) = (101_325.0, 0.5 * 2339.3, 8.314_463 * 293.15);
        let mixture = ((p - e) * 0.028_965 + e * 0.018_015) / (0.9996 * rt);
        let air = air_kg_per_m3(293.15, p, 0.5).expect("in range");
        assert!((air / mixture - 1.0).abs() < 3e-4, "{air} {mixture}");
    }

    /// Z, µL/mg, by air pressure in hPa and temperature in °C: ISO 8655-6:2002, table A.1,
    /// as printed in a pipette maker's manual. 1e-4, its last digit: it rests on
    /// an older formula for air-saturated water, and the humidity is not stated.
    #[test]
    fn volume_per_reading_is_the_factor_of_the_standard() {
        for (t, hpa, z) in [
            (15.0, 800.0, 1.0018),
            (15.0, 1013.0, 1.0020),
            (20.0, 800.0, 1.0026),
            (20.0, 960.0, 1.0028),
            (20.0, 1013.0, 1.0029),
            (22.0, 1013.0, 1.0033),
            (25.0, 907.0, 1.0039),
            (25.0, 1013.0, 1.0040),
            (30.0, 800.0, 1.0052),
            (30.0, 1067.0, 1.0055),
        ] {
            let fill = WaterFill {
                empty_kg: 1.0,
                full_kg: 2.0,
                water_temperature_k: 273.15 + t,
                air_temperature_k: 273.15 + t,
                air_pressure_pa: 100.0 * hpa,
                relative_humidity: 0.5,
                ..FILL
            };
            let got = fill.volume(293.15, 0.0).expect("in range").volume_m3;
            assert!((1e3 * got - z).abs() < 1e-4, "{t} {hpa}: {got}");
        }
    }

    /// By hand, a copper vessel (α = 16.5e-6 1/K) reduced to 20 °C:
    ///
    /// water, 22.0 °C: t + a₁ = 18.016965, squared 324.61103; t + a₂ = 323.797, product
    ///   105 108.077; a₃ (t + a₄) = 522 528.9 · 91.34881 = 47 732 393.2;
    ///   ρ_w = 999.974950 (1 − 0.002 202 028 9) = 997.77298 kg/m³
    /// air, 23.0 °C, 1000 hPa, 45 %: e^{1.403} = 4.067384;
    ///   (348.480 − 0.009 · 45 · 4.067384)/296.15 = (348.480 − 1.647290)/296.15 = 1.171139 kg/m³
    /// weights: 1 − 1.171139/8000 = 0.999 853 61
    /// net reading 0.1 kg: 0.1 · 0.999 853 61/996.601838 = 100.326 286 mL at 22 °C
    /// wall: 1 − 3 · 16.5e-6 · 2 = 0.999 901; V = 100.316 353 mL
    ///
    /// readings     2 · 10 mg · 1.003 164 µL/mg            = 20.0633 µL
    /// temperature  22.5 °C: ρ_w = 997.658154, V + 9.0759;
    ///              21.5 °C: ρ_w = 997.885274, V − 8.8196  =  9.0759 µL
    /// air          ρ_a 1 % up                              =  1.0320 µL
    /// water        100.316 mL (1e-5 + 5.1e-10 · 1325)      =  1.0710 µL
    /// reduction    100.316 mL · (9.9e-5)²                  =  0.0010 µL
    /// bubble                                                 20.0000 µL
    /// sum                                                    51.2432 µL
    #[test]
    fn a_copper_vessel_by_hand() {
        close(water_kg_per_m3(295.15).expect("in range"), 997.77298, 1e-5);
        close(
            air_kg_per_m3(296.15, 100_000.0, 0.45).expect("in range"),
            1.171139,
            1e-6,
        );
        let got = FILL.volume(293.15, 16.5e-6).expect("in range");
        close(1e6 * got.volume_m3, 100.316353, 1e-5);
        close(1e9 * got.uncertainty_m3, 51.2432, 2e-3);
        // At the measured temperature the wall does not matter.
        let unreduced = FILL.volume(295.15, 16.5e-6).expect("in range");
        close(1e6 * unreduced.volume_m3, 100.326286, 1e-5);
    }

    /// Any error within what was stated stays within the uncertainty, at every corner.
    #[test]
    fn uncertainty_covers_every_corner() {
        for centre_k in [275.0, 277.2, 295.15, 312.0] {
            let fill = WaterFill {
                water_temperature_k: centre_k,
                ..FILL
            };
            let stated = fill.volume(293.15, 16.5e-6).expect("in range");
            for corner in 0..27 {
                let sign = |place: i32| f64::from(corner / place % 3 - 1);
                let other = WaterFill {
                    empty_kg: fill.empty_kg + sign(1) * fill.reading_uncertainty_kg,
                    full_kg: fill.full_kg + sign(3) * fill.reading_uncertainty_kg,
                    water_temperature_k: centre_k + sign(9) * fill.temperature_uncertainty_k,
                    temperature_uncertainty_k: 0.0,
                    ..fill
                };
                let got = other.volume(293.15, 16.5e-6).expect("in range").volume_m3;
                assert!((got - stated.volume_m3).abs() <= stated.uncertainty_m3);
            }
        }
    }

    #[test]
    fn nonsense_is_refused() {
        let refused = |change: fn(&mut WaterFill)| {
            let mut fill = FILL;
            change(&mut fill);
            fill.volume(293.15, 16.5e-6).expect_err("refused")
        };
        assert_eq!(
            refused(|f| f.full_kg = 0.25),
            WaterFillError::NotHeavier {
                empty_kg: 0.25,
                full_kg: 0.25
            }
        );
        assert!(matches!(
            refused(|f| f.empty_kg = f64::NAN),
            WaterFillError::NotHeavier { .. }
        ));
        assert_eq!(
            refused(|f| f.bubble_allowance_m3 = -1e-9),
            WaterFillError::Uncertainty
        );
        assert!(matches!(
            refused(|f| f.water_temperature_k = 313.0),
            WaterFillError::WaterTemperature { .. }
        ));
        assert!(matches!(
            refused(|f| f.water_temperature_k = f64::NAN),
            WaterFillError::WaterTemperature { .. }
        ));
        assert!(matches!(
            refused(|f| f.air_temperature_k = 20.0),
            WaterFillError::AirTemperature { .. }
        ));
        assert!(matches!(
            refused(|f| f.air_pressure_pa = 1013.0),
            WaterFillError::AirPressure { .. }
        ));
        assert!(matches!(
            refused(|f| f.relative_humidity = 45.0),
            WaterFillError::Humidity { .. }
        ));
        for (reference, alpha) in [(f64::NAN, 0.0), (293.15, f64::NAN), (700.0, 2e-5)] {
            assert_eq!(
                FILL.volume(reference, alpha),
                Err(WaterFillError::Reduction)
            );
        }
    }
}
