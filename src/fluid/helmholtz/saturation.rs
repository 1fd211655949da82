//! Liquid and vapour in equilibrium: equal pressure and equal Gibbs energy.

use super::{Equation, Isotherm};

/// Densities of the two phases at one temperature, mol/m³, and their pressure, Pa.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct SaturatedPair {
    pub pressure: f64,
    pub liquid: f64,
    pub vapour: f64,
    /// Slope of the vapour-pressure curve, Pa/K, by Clausius and Clapeyron.
    pub slope: f64,
    /// Enthalpy of evaporation, J/mol.
    pub latent_heat: f64,
}

/// The solve found no equilibrium at this temperature.
#[derive(Debug, Clone, Copy, PartialEq, thiserror::Error)]
#[error("the saturation solve did not converge at {temperature_k} K")]
pub struct NotConverged {
    pub temperature_k: f64,
}

/// Closest approach to the critical temperature: above it two densities are no
/// longer told apart to a useful number of digits in double precision.
pub const CLOSEST_TO_CRITICAL: f64 = 0.9999;

impl Equation {
    /// Saturated liquid and vapour at a temperature in K, below
    /// [`CLOSEST_TO_CRITICAL`] of the critical temperature.
    ///
    /// # Errors
    /// [`NotConverged`] if no guess leads to an equilibrium.
    pub fn saturation(&self, temperature_k: f64) -> Result<SaturatedPair, NotConverged> {
        let (pressure, liquid, vapour) = self.saturated_state(temperature_k)?;
        let entropy = self.entropy_step(temperature_k, liquid, vapour);
        Ok(SaturatedPair {
            pressure,
            liquid,
            vapour,
            slope: entropy / (1.0 / vapour - 1.0 / liquid),
            latent_heat: temperature_k * entropy,
        })
    }

    /// Vapour pressure in Pa and the two densities.
    ///
    /// # Errors
    /// As [`Self::saturation`].
    pub fn saturated_state(&self, temperature_k: f64) -> Result<(f64, f64, f64), NotConverged> {
        let isotherm = self.isotherm(temperature_k);
        let (liquid, vapour) = self.densities_on(&isotherm, temperature_k)?;
        // The liquid side loses digits at low pressure: p from the vapour.
        Ok((isotherm.pressure(vapour), liquid, vapour))
    }

    /// Both phases from guesses tried in order: the ancillary equations; then,
    /// near the critical point, a walk towards it along ρ − ρ_c ∝ √(T_c − T).
    fn densities_on(
        &self,
        isotherm: &Isotherm<'_>,
        temperature_k: f64,
    ) -> Result<(f64, f64), NotConverged> {
        let ancillary = &self.data.ancillary;
        let guess = (
            ancillary.liquid_density.at(temperature_k),
            ancillary.vapour_density.at(temperature_k),
        );
        if let Some(pair) = self.equilibrium(isotherm, guess, temperature_k) {
            return Ok(pair);
        }
        self.walk_to(temperature_k)
            .ok_or(NotConverged { temperature_k })
    }

    /// Steps from 0.98 T_c towards `temperature_k`, each guess scaled from the
    /// two solutions before.
    fn walk_to(&self, temperature_k: f64) -> Option<(f64, f64)> {
        let critical = self.data.critical;
        let target = 1.0 - temperature_k / critical.temperature_k;
        let mut theta: f64 = 0.02;
        if target <= 0.0 || target >= theta {
            return None;
        }
        let at = |theta: f64| critical.temperature_k * (1.0 - theta);
        let start = at(theta);
        let ancillary = &self.data.ancillary;
        let guess = (
            ancillary.liquid_density.at(start),
            ancillary.vapour_density.at(start),
        );
        let (mut liquid, mut vapour) = self.equilibrium(&self.isotherm(start), guess, start)?;
        let mut exponent = 0.4;
        loop {
            let next = (theta * 0.6).max(target);
            let shrink = (next / theta).powf(exponent);
            // Half the difference follows the power law, the mean is a straight line in θ.
            let mean = 0.5 * (liquid + vapour);
            let mean =
                critical.density_mol_per_m3 + (mean - critical.density_mol_per_m3) * next / theta;
            let half = 0.5 * (liquid - vapour) * shrink;
            let temperature = at(next);
            let found = self.equilibrium(
                &self.isotherm(temperature),
                (mean + half, mean - half),
                temperature,
            )?;
            exponent = (((found.0 - found.1) / (liquid - vapour)).ln() / (next / theta).ln())
                .clamp(0.3, 0.6);
            (liquid, vapour) = found;
            theta = next;
            if theta <= target {
                return Some((liquid, vapour));
            }
        }
    }

    /// Newton on both densities with J = δ(1+δαʳ_δ) and K = δαʳ_δ + αʳ + ln δ
    /// equal in both phases (Akasaka, R. 2008, J. Therm. Sci. Technol. 3,
    /// 442–451, doi 10.1299/jtst.3.442).
    ///
    /// Newton squares the error: a step whose square is below the last digit is the
    /// last one. The factor of that square grows as 1/(T_c − T). Beside the critical
    /// point rounding keeps the steps larger: there it stops when they no longer
    /// shrink. At that point the densities carry all the digits the equation has in
    /// double precision. Never judged by the
    /// difference of two pressures, which is noise at low pressure.
    fn equilibrium(
        &self,
        isotherm: &Isotherm<'_>,
        guess: (f64, f64),
        temperature_k: f64,
    ) -> Option<(f64, f64)> {
        let reducing = isotherm.reducing_density;
        let critical = self.data.critical;
        let near_critical = temperature_k > 0.98 * critical.temperature_k;
        let (mut liquid, mut vapour) = (guess.0 / reducing, guess.1 / reducing);
        let mut last_step = f64::INFINITY;
        let last_step_below = 1e-8 * (1.0 - temperature_k / critical.temperature_k).abs();
        for _ in 0..60 {
            let [a, d1, d2] = isotherm.residual.at(liquid);
            let (jl, kl) = (liquid * (1.0 + d1), a + d1 + liquid.ln());
            let squeeze_l = 1.0 + 2.0 * d1 + d2;
            let [a, d1, d2] = isotherm.residual.at(vapour);
            let (jv, kv) = (vapour * (1.0 + d1), a + d1 + vapour.ln());
            let squeeze_v = 1.0 + 2.0 * d1 + d2;
            if squeeze_l <= 0.0 || squeeze_v <= 0.0 {
                return None; // the guess lies inside the spinodal
            }
            // dJ/dδ = squeeze, dK/dδ = squeeze/δ: the 2×2 system solved by hand.
            let (dj, dk) = (jv - jl, kv - kl);
            let spread = liquid - vapour;
            let step_l = liquid * (dj - vapour * dk) / (squeeze_l * spread);
            let step_v = vapour * (dj - liquid * dk) / (squeeze_v * spread);
            // A vapour guess may be far off in scale at low pressure: hold it positive.
            let damp = if near_critical {
                (0.25 * spread / step_l.abs().max(step_v.abs())).min(1.0)
            } else {
                1.0
            };
            liquid += damp * step_l;
            let next = vapour + damp * step_v;
            vapour = if next > 0.0 { next } else { 0.1 * vapour };
            let step = (step_l / liquid).abs().max((step_v / vapour).abs());
            if !step.is_finite() || liquid <= vapour {
                return None;
            }
            if step < last_step_below || (step >= 0.5 * last_step && last_step < 1e-8) {
                return (spread > 1e-9 * liquid).then_some((liquid * reducing, vapour * reducing));
            }
            last_step = step;
        }
        None
    }
}
