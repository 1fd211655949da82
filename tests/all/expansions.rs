//! The looked-up saturation against the direct solve, fluid by fluid.

use chargewright::fluid::{Catalog, Fluid, Model, SaturationCurve};

pub fn curve(fluid: &Fluid) -> &SaturationCurve {
    fluid
        .curve()
        .unwrap_or_else(|e| panic!("{}: {e}", fluid.id()))
}

/// Temperatures evenly spaced in √(1 − T/T_c), the variable of the expansions.
fn temperatures(fluid: &Fluid, points: usize, highest_share: f64) -> Vec<f64> {
    let critical = fluid.critical().temperature_k;
    let (low, high) = curve(fluid).range_k();
    let x = |t: f64| (1.0 - t / critical).max(0.0).sqrt();
    let (from, to) = (x(high.min(highest_share * critical)), x(low));
    (0..points)
        .map(|i| from + (to - from) * (i as f64 + 0.5) / points as f64)
        .map(|x| critical * (1.0 - x * x))
        .collect()
}

/// Greatest relative deviation of pressure and of either density from the direct solve.
pub fn deviation(fluid: &Fluid, at: &[f64]) -> f64 {
    let id = fluid.id();
    let curve = curve(fluid);
    at.iter().fold(0.0, |most: f64, t| {
        let solved = fluid
            .model()
            .curve_point(*t, fluid.molar_mass())
            .unwrap_or_else(|e| panic!("{id}: {e}"));
        let found = curve.at(*t);
        let off = |a: f64, b: f64| (a / b - 1.0).abs();
        most.max(off(found.pressure_pa, solved.pressure_pa))
            .max(off(found.liquid_kg_per_m3, solved.liquid_kg_per_m3))
            .max(off(found.vapour_kg_per_m3, solved.vapour_kg_per_m3))
    })
}

/// The direct solve's own noise at 0.9999 T_c: how far the liquid's density jumps beside
/// itself over temperatures some last digits apart, where the true change is below 1e-12.
pub fn noise(fluid: &Fluid) -> f64 {
    let id = fluid.id();
    let top = curve(fluid).range_k().1;
    let densities: Vec<f64> = (0..64)
        .map(|k| top * (1.0 - f64::from(k) * f64::EPSILON))
        .map(|t| fluid.model().curve_point(t, fluid.molar_mass()).expect(id))
        .flat_map(|at| [at.liquid_kg_per_m3, at.vapour_kg_per_m3])
        .collect();
    let spread = |phase: usize| {
        let of = densities.iter().skip(phase).step_by(2);
        let most = of.clone().fold(f64::MIN, |a, b| a.max(*b));
        let least = of.fold(f64::MAX, |a, b| a.min(*b));
        most / least - 1.0
    };
    spread(0).max(spread(1))
}

/// 1e-10 to 0.999 of the critical temperature; at 0.9999 within ten times the noise of
/// the direct solve, which is the last it can be held against.
#[test]
fn looked_up_saturation_is_the_solved_one() {
    let mut worst = (0.0, String::new());
    for fluid in Catalog::built_in().iter() {
        let Model::Equation(_) = fluid.model() else {
            continue;
        };
        let id = fluid.id();
        let off = deviation(&fluid, &temperatures(&fluid, 160, 0.999));
        assert!(off <= 1e-10, "{id}: {off:.1e}");
        if off > worst.0 {
            worst = (off, id.to_owned());
        }
        let top = fluid.curve().expect(id).range_k().1;
        let near = deviation(&fluid, &[top, top * (1.0 - 1e-9), top * (1.0 - 3e-7)]);
        let noise = noise(&fluid);
        println!("{id}: {off:.1e}, beside the critical point {near:.1e}, noise there {noise:.1e}");
        assert!(
            near <= 10.0 * noise.max(1e-11),
            "{id}: {near:.1e}, noise {noise:.1e}"
        );
    }
    println!("worst: {} {:.1e}", worst.1, worst.0);
}
