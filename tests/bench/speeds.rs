//! Single states and the ranking, timed job by job: lines of `job,fluid,nanoseconds`
//! for `tests/bench/compare`, which puts the reference library beside them.
//!
//! Each job cycles through 1024 temperatures in a scrambled order, so that nothing is
//! predicted and no piece stays warm by chance; the best of nine rounds counts, which is
//! what the job costs when nobody else has the core.

use std::hint::black_box;
use std::sync::Arc;
use std::time::Instant;

use chargewright::assess::{Library, assess, rank};
use chargewright::fluid::{Catalog, Fluid};
use chargewright::sealed::SealedUnit;
use chargewright::store;
use chargewright::units::{Amount, Density, Mass, Temperature, Volume};

const FLUIDS: [&str; 5] = ["water", "ammonia", "r-134a", "acetone", "n-pentane"];
const STATES: usize = 1024;

fn main() {
    // `cargo test --benches` and listing tools run it with arguments: nothing to time then.
    if std::env::args().any(|argument| argument == "--test" || argument == "--list") {
        return;
    }
    println!("job,fluid,nanoseconds");
    for id in FLUIDS {
        single_states(
            &Catalog::built_in()
                .by_id(id)
                .expect("a fluid of the catalogue"),
        );
    }
    for name in store::preset_names() {
        let design = store::preset(name).expect("a ready design");
        let library = Library::built_in();
        report("assessment", name, 200, |_| assess(&design, &library));
        let mut gasless = design.clone();
        gasless.bench.vacuum = None;
        report("assessment without gas", name, 200, |_| {
            assess(&gasless, &library)
        });
    }
    ranking();
}

fn single_states(fluid: &Fluid) {
    let id = fluid.id();
    let curve = fluid.curve().expect("a curve");
    let (critical, molar_mass) = (fluid.critical().temperature_k, fluid.molar_mass());
    let low = (0.55 * critical).max(fluid.freezing_point().kelvin());
    let kelvin: Vec<f64> = (0..STATES)
        .map(|i| low + (0.98 * critical - low) * ((i * 619) % STATES) as f64 / STATES as f64)
        .collect();
    report("saturation looked up", id, 100_000, |i| curve.at(kelvin[i]));
    report("saturation solved", id, 10_000, |i| {
        fluid.model().curve_point(kelvin[i], molar_mass)
    });
    let density = |rho| Density::from_kilogram_per_cubic_metre(rho).expect("a density");
    let states = |of: &dyn Fn(f64, f64) -> f64| -> Vec<(Density, Temperature)> {
        let state = |t: &f64| {
            let at = curve.at(*t);
            let rho = of(at.liquid_kg_per_m3, at.vapour_kg_per_m3);
            (
                density(rho),
                Temperature::from_kelvin(*t).expect("a temperature"),
            )
        };
        kelvin.iter().map(state).collect()
    };
    for (job, states) in [
        ("p of liquid", states(&|liquid, _| 1.005 * liquid)),
        ("p of vapour", states(&|_, vapour| 0.7 * vapour)),
        (
            "p of two phases",
            states(&|liquid, vapour| 0.4 * liquid + 0.6 * vapour),
        ),
    ] {
        report(job, id, 20_000, |i| fluid.state(states[i].0, states[i].1));
    }
    two_phases_with_gas(id, &states(&|liquid, vapour| 0.9 * liquid + 0.1 * vapour));
}

/// A millibar, and an atmosphere, of air in a tenth of the volume.
fn two_phases_with_gas(id: &str, states: &[(Density, Temperature)]) {
    let fluid = Catalog::built_in().by_id(id).expect("known");
    let volume = Volume::from_cubic_metre(1e-4).expect("a volume");
    for (job, amount) in [
        ("p with 1 mbar of gas", 4e-7),
        ("p with 1 atm of gas", 4e-4),
    ] {
        let amount = Amount::from_mole(amount).expect("an amount");
        let units: Vec<SealedUnit> = states
            .iter()
            .map(|(density, _)| {
                let mass = 1e-4 * density.kilogram_per_cubic_metre();
                let mass = Mass::from_kilogram(mass).expect("a mass");
                let unit = SealedUnit::new(Arc::clone(&fluid), mass, volume);
                unit.expect("a unit").with_gas(amount, 0.2)
            })
            .collect();
        report(job, id, 20_000, |i| units[i].state(states[i].1));
    }
}

/// The whole catalogue, then ten thousand copies of it in memory of their own.
fn ranking() {
    let design = store::preset("glass-liquid-lift").expect("a ready design");
    let a = assess(&design, &Library::built_in());
    let catalog = Catalog::built_in();
    catalog.read_all();
    let fluids: Vec<Arc<Fluid>> = catalog.iter().collect();
    let label = format!("{} fluids", fluids.len());
    report("ranking", &label, 50, |_| {
        rank(&design, &a, fluids.iter().cloned())
    });
    for count in [1_000, 10_000] {
        let copies: Vec<Arc<Fluid>> = fluids
            .iter()
            .cycle()
            .take(count)
            .map(|fluid| Arc::new(Fluid::clone(fluid)))
            .collect();
        report("ranking", &format!("{count} copies"), 2, |_| {
            rank(&design, &a, copies.iter().cloned())
        });
    }
}

/// Prints the best of nine rounds of `count` runs.
fn report<T>(job: &str, fluid: &str, count: usize, mut run: impl FnMut(usize) -> T) {
    let mut best = f64::INFINITY;
    for _ in 0..9 {
        let start = Instant::now();
        for i in 0..count {
            black_box(run(black_box(i % STATES)));
        }
        best = best.min(start.elapsed().as_secs_f64() / count as f64);
    }
    println!("{job},{fluid},{:.1}", 1e9 * best);
}
