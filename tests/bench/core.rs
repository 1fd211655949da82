//! Times of the core: `cargo bench --bench core`.
//!
//! Absolute times depend on the machine; compare lines of one run.

use chargewright::assess::{Library, assess};
use chargewright::fluid::{Catalog, SaturationCurve};
use chargewright::picture::of_design;
use chargewright::sheet::{Head, render};
use chargewright::store;
use chargewright::units::{Density, Temperature, Units};
use divan::{Bencher, black_box};

fn main() {
    divan::main();
}

const FLUIDS: [&str; 5] = ["water", "ammonia", "r-134a", "acetone", "n-pentane"];

fn designs() -> Vec<&'static str> {
    store::preset_names().collect()
}

/// One whole assessment with its 400-point path, as on every change in the window.
#[divan::bench(args = designs())]
fn whole_assessment(bencher: Bencher<'_, '_>, name: &str) {
    let design = store::preset(name).expect("a ready design");
    let library = Library::built_in();
    assess(&design, &library);
    bencher.bench_local(|| assess(black_box(&design), &library));
}

/// The same with more parts, in half of which a wall is judged: the cost is linear in them.
#[divan::bench(args = [5, 10, 20, 40, 80])]
fn assessment_of_parts(bencher: Bencher<'_, '_>, parts: usize) {
    let mut design = store::preset("copper-water-heat-pipe").expect("a ready design");
    let some = design.chamber.parts.clone();
    let more = some.iter().cycle().take(parts).cloned();
    design.chamber.parts = more.collect();
    let library = Library::built_in();
    assess(&design, &library);
    bencher.bench_local(|| assess(black_box(&design), &library));
}

/// The section of as many parts, as the window draws it anew when something changed.
#[divan::bench(args = [5, 10, 20, 40])]
fn section_of_parts(bencher: Bencher<'_, '_>, parts: usize) {
    let mut design = store::preset("copper-water-heat-pipe").expect("a ready design");
    let some = design.chamber.parts.clone();
    design.chamber.parts = some.iter().cycle().take(parts).cloned().collect();
    let library = Library::built_in();
    let assessment = assess(&design, &library);
    let at = design.conditions.bench;
    bencher.bench_local(|| of_design(black_box(&design), &assessment, at, 0.0, &Units::default()));
}

#[divan::bench(args = designs())]
fn charge_sheet(bencher: Bencher<'_, '_>, name: &str) {
    let design = store::preset(name).expect("a ready design");
    let assessment = assess(&design, &Library::built_in());
    let head = Head {
        file_name: None,
        fingerprint: store::fingerprint(&design),
    };
    bencher.bench_local(|| render(&design, &assessment, &Units::default(), &head));
}

#[divan::bench(args = FLUIDS)]
fn saturation_solved(bencher: Bencher<'_, '_>, id: &str) {
    let fluid = Catalog::built_in().by_id(id).expect("a fluid");
    let t = 0.7 * fluid.critical().temperature_k;
    bencher.bench_local(|| fluid.model().curve_point(black_box(t), fluid.molar_mass()));
}

#[divan::bench(args = FLUIDS)]
fn saturation_looked_up(bencher: Bencher<'_, '_>, id: &str) {
    let fluid = Catalog::built_in().by_id(id).expect("a fluid");
    let t = 0.7 * fluid.critical().temperature_k;
    let curve = fluid.curve().expect("a curve");
    bencher.bench_local(|| curve.at(black_box(t)));
}

#[divan::bench(args = FLUIDS)]
fn state_two_phase(bencher: Bencher<'_, '_>, id: &str) {
    let fluid = Catalog::built_in().by_id(id).expect("a fluid");
    let t = Temperature::from_kelvin(0.7 * fluid.critical().temperature_k).expect("temperature");
    let rho = Density::from_kilogram_per_cubic_metre(fluid.critical().density_kg_per_m3)
        .expect("density");
    fluid.curve().expect("a curve");
    bencher.bench_local(|| fluid.state(black_box(rho), t));
}

#[divan::bench(args = FLUIDS)]
fn state_liquid_full(bencher: Bencher<'_, '_>, id: &str) {
    let fluid = Catalog::built_in().by_id(id).expect("a fluid");
    let kelvin = 0.7 * fluid.critical().temperature_k;
    let t = Temperature::from_kelvin(kelvin).expect("temperature");
    let liquid = 1.01 * fluid.curve().expect("a curve").at(kelvin).liquid_kg_per_m3;
    let rho = Density::from_kilogram_per_cubic_metre(liquid).expect("density");
    bencher.bench_local(|| fluid.state(black_box(rho), t));
}

/// Building a fluid's expansions, once on its first use.
#[divan::bench(args = FLUIDS)]
fn expansions_built(bencher: Bencher<'_, '_>, id: &str) {
    let fluid = Catalog::built_in().by_id(id).expect("a fluid");
    let m = fluid.molar_mass();
    bencher.bench_local(|| {
        SaturationCurve::build(
            fluid.critical().temperature_k,
            fluid.model().saturation_range_k(),
            &fluid.model().joints_k(),
            |t| fluid.model().curve_point(t, m),
        )
    });
}
