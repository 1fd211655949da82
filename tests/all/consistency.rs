//! What must hold within one model: derivatives, equilibrium, continuity.
//!
//! No outside source is needed here; what check values miss, these catch.

use chargewright::fluid::helmholtz::CLOSEST_TO_CRITICAL;
use chargewright::fluid::{Catalog, Fluid};

use crate::given::{equation, grid, kelvin};
use crate::tables::Worst;

/// Temperatures at which a fluid has liquid and vapour, K, up to `top` of the critical.
pub fn dome(fluid: &Fluid, steps: usize, top: f64) -> impl Iterator<Item = f64> + use<> {
    let (low, high) = fluid.saturation_range();
    let low = low.max(fluid.freezing_point()).kelvin();
    let high = high.kelvin().min(top * fluid.critical().temperature_k);
    grid(low, high, steps)
}

/// Slope by the fourth-order central difference.
fn slope(f: impl Fn(f64) -> f64, at: f64, step: f64) -> f64 {
    let odd = |s: f64| f(at + s) - f(at - s);
    (8.0 * odd(step) - odd(2.0 * step)) / (12.0 * step)
}

/// Both phases' Gibbs energy in units of RT: 1e-12 of the terms' size (ln δ reaches −35
/// near freezing; sixteen digits less the cancellation of some dozen terms).
/// Both phases' pressure: 2e-12 of the liquid's ρRT, in whose digits it is computed.
#[test]
fn both_phases_have_one_gibbs_energy_and_one_pressure() {
    let mut worst = (0.0_f64, 0.0_f64);
    for fluid in Catalog::built_in().iter() {
        let id = fluid.id();
        let Some(equation) = equation(&fluid) else {
            continue;
        };
        for t in dome(&fluid, 60, CLOSEST_TO_CRITICAL) {
            let pair = equation.saturation(t).expect(id);
            let isotherm = equation.isotherm(t);
            let gap = isotherm.gibbs_over_rt(pair.liquid) - isotherm.gibbs_over_rt(pair.vapour);
            let size = isotherm.gibbs_over_rt(pair.vapour).abs().max(1.0);
            let ideal = pair.liquid * equation.data().gas_constant_j_per_mol_k * t;
            let pressures = isotherm.pressure(pair.liquid) - isotherm.pressure(pair.vapour);
            worst.0 = worst.0.max((gap / size).abs());
            worst.1 = worst.1.max((pressures / ideal).abs());
            assert!(
                (gap / size).abs() < 1e-12,
                "{} at {t} K: {gap:e}",
                fluid.id()
            );
            assert!((pressures / ideal).abs() < 2e-12, "{} at {t} K", fluid.id());
        }
    }
    println!(
        "Gibbs energy within {:.1e}, pressure within {:.1e}",
        worst.0, worst.1
    );
}

/// Every derivative that the program uses against finite differences of the figure it
/// belongs to. 2e-8: the differences lose half the digits.
#[test]
fn derivatives_agree_with_finite_differences() {
    let mut worst = Worst::default();
    for fluid in Catalog::built_in().iter() {
        let Some(equation) = equation(&fluid) else {
            continue;
        };
        let critical = equation.data().critical;
        let (low, high) = equation.data().temperature_range_k;
        for t in grid(
            low * 1.02,
            high.min(1.8 * critical.temperature_k) * 0.98,
            23,
        ) {
            for share in [1e-4, 0.02, 0.3, 1.3, 2.2, 2.8] {
                let rho = share * critical.density_mol_per_m3;
                let c = equation.caloric(t, rho);
                let (p, p_rho) = equation.isotherm(t).pressure_and_slope(rho);
                if p_rho <= 0.0 || rho > equation.data().highest_density_mol_per_m3 {
                    continue; // inside the dome, or denser than the equation goes
                }
                let place = || format!("{} at {t:.2} K, {share} ρc", fluid.id());
                let (h_t, h_rho) = (2e-4 * t, 2e-4 * rho);
                let over_t = |f: &dyn Fn(f64) -> f64| slope(f, t, h_t);
                let over_rho = |f: &dyn Fn(f64) -> f64| slope(f, rho, h_rho);
                // Against the larger of itself and a scale: some derivatives pass through zero.
                let r = equation.data().gas_constant_j_per_mol_k;
                let mut see = |what, found: f64, expected: f64, scale: f64| {
                    let off = (found - expected) / expected.abs().max(scale);
                    worst.see(what, 1.0 + off, 1.0, place);
                };
                let p_of_rho = over_rho(&|rho| equation.isotherm(t).pressure(rho));
                see("∂p/∂ρ", p_of_rho, p_rho, r * t);
                let p_of_t = over_t(&|t| equation.isotherm(t).pressure(rho));
                see("∂p/∂T", p_of_t, c.pressure_slope, r * rho);
                let u_of_t = over_t(&|t| equation.caloric(t, rho).internal_energy);
                see("cv from u", u_of_t, c.heat_capacity_v, r);
                let s_of_t = over_t(&|t| equation.caloric(t, rho).entropy);
                see("cv from s", t * s_of_t, c.heat_capacity_v, r);
                let s_of_rho = over_rho(&|rho| equation.caloric(t, rho).entropy);
                let maxwell = -c.pressure_slope / (rho * rho);
                see("∂s/∂ρ", s_of_rho * rho, maxwell * rho, r);
                see(
                    "h = u + p/ρ",
                    c.enthalpy,
                    c.internal_energy + p / rho,
                    r * t,
                );
                // cp along the isobar: dρ = −(∂p/∂T)/(∂p/∂ρ) dT.
                let h_of_t = over_t(&|t| equation.caloric(t, rho).enthalpy);
                let h_of_rho = over_rho(&|rho| equation.caloric(t, rho).enthalpy);
                let cp = h_of_t - h_of_rho * c.pressure_slope / p_rho;
                worst.see("cp", cp, c.heat_capacity_p, place);
                let sound = p_rho * c.heat_capacity_p / c.heat_capacity_v;
                worst.see("sound", c.sound_speed_squared_molar, sound, place);
            }
        }
    }
    worst.check("finite differences", 2e-8);
}

/// The slope that Clausius and Clapeyron give against the curve it belongs to, and the
/// latent heat against slope and volumes: 1e-6, difference of curves of eleven digits.
#[test]
fn vapour_pressure_rises_as_clausius_and_clapeyron_say() {
    let mut worst = Worst::default();
    for fluid in Catalog::built_in().iter() {
        let id = fluid.id();
        let ends = fluid.saturation_range();
        let room = |t: f64| (t - ends.0.kelvin()).min(ends.1.kelvin() - t);
        for t in dome(&fluid, 40, 0.998) {
            let at = fluid.saturation(kelvin(t)).expect(id);
            let place = || format!("{} at {t:.2} K", fluid.id());
            let step = (1e-3 * t).min(0.02 * (fluid.critical().temperature_k - t));
            if room(t) > 2.0 * step && t - 2.0 * step > fluid.freezing_point().kelvin() {
                let p = |t: f64| fluid.saturation(kelvin(t)).expect(id).pressure_pa.ln();
                let found = at.pressure_pa * slope(p, t, step);
                worst.see("slope", found, at.slope_pa_per_k, place);
            }
            let volumes = 1.0 / at.vapour_kg_per_m3 - 1.0 / at.liquid_kg_per_m3;
            let latent = t * at.slope_pa_per_k * volumes;
            worst.see("latent heat", at.latent_heat_j_per_kg, latent, place);
        }
    }
    worst.check("Clausius and Clapeyron", 1e-6);
}

/// At 0.9999 of the critical temperature, and on the way there, the direct solve ends
/// and the expansions give the same: 1e-9, the aim of the issue.
#[test]
fn expansions_follow_the_direct_solve_up_to_the_critical_point() {
    let mut worst = Worst::default();
    for fluid in Catalog::built_in().iter() {
        let id = fluid.id();
        let curve = fluid.curve().expect(id);
        let close = [0.995, 0.999, 0.9995, 0.9998, CLOSEST_TO_CRITICAL]
            .map(|share| share * fluid.critical().temperature_k);
        let top = fluid.saturation_range().1;
        for t in dome(&fluid, 97, 1.0).chain(close.into_iter().filter(|t| *t <= top.kelvin())) {
            let place = || {
                format!(
                    "{} at {:.5} Tc",
                    fluid.id(),
                    t / fluid.critical().temperature_k
                )
            };
            let direct = fluid.saturation(kelvin(t)).expect(id);
            let found = curve.at(t);
            worst.see("pressure", found.pressure_pa, direct.pressure_pa, place);
            worst.see(
                "liquid density",
                found.liquid_kg_per_m3,
                direct.liquid_kg_per_m3,
                place,
            );
            worst.see(
                "vapour density",
                found.vapour_kg_per_m3,
                direct.vapour_kg_per_m3,
                place,
            );
            assert!(
                direct.liquid_kg_per_m3 > direct.vapour_kg_per_m3,
                "{}",
                place()
            );
            assert!(
                found.liquid_kg_per_m3 > found.vapour_kg_per_m3,
                "{}",
                place()
            );
            assert!(
                direct.slope_pa_per_k > 0.0 && direct.latent_heat_j_per_kg > 0.0,
                "{}",
                place()
            );
        }
    }
    worst.check("expansions", 1e-9);
}
