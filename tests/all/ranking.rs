//! The catalogue ranked in a design: the same figures as the design itself would show.

use chargewright::assess::{Library, Objection, Ranked, assess, rank};
use chargewright::design::{ChargeAim, Design, FluidId};
use chargewright::store;

fn ranked(design: &Design) -> Vec<Ranked> {
    let library = Library::built_in();
    rank(design, &assess(design, &library), library.fluids.iter())
}

fn row<'a>(rows: &'a [Ranked], id: &str) -> &'a Ranked {
    rows.iter().find(|row| row.fluid.id() == id).expect(id)
}

/// Whatever fluid a row names: the design with that fluid and the row's mass stands at the
/// row's pressures, and a row's exclusion is an error of that design.
#[test]
fn a_row_is_what_the_design_would_say() {
    for name in store::preset_names() {
        let design = store::preset(name).expect("a ready design");
        let library = Library::built_in();
        for row in ranked(&design) {
            let Ok(mass) = row.mass else { continue };
            let id = row.fluid.id();
            let mut tried = design.clone();
            tried.fluid = FluidId::from(&*row.fluid);
            tried.charge.aim = ChargeAim::Mass { mass };
            let a = assess(&tried, &library);
            let unit = &a
                .corners
                .as_ref()
                .unwrap_or_else(|e| panic!("{name}, {id}: {e}"))
                .nominal;
            for (figure, t) in [
                (&row.at_hottest, tried.conditions.hottest),
                (&row.at_coldest, tried.conditions.coldest),
            ] {
                let Ok((pressure, regime)) = figure else {
                    continue;
                };
                let state = unit
                    .state(t)
                    .unwrap_or_else(|e| panic!("{name}, {id}: {e}"));
                let off = state.pressure.pascal() / pressure.pascal() - 1.0;
                // A liquid is stiff: the rounding of the mass is a thousandfold in pressure.
                assert!(off.abs() < 1e-9, "{name}, {id}: {off:e}");
                assert_eq!(state.regime, *regime, "{name}, {id}");
            }
            let fit = a.verdict != chargewright::assess::Verdict::NotFit;
            assert!(
                row.objections.is_empty() || !fit,
                "{name}, {id}: {:?}",
                row.objections
            );
        }
    }
}

/// Common practice, no source: water is the first choice for a copper heat pipe between 30
/// and 100 °C, and its merit at 60 °C is 3.3e11 W/m² (methods.md section 8, P3; to 1 %).
#[test]
fn water_leads_in_a_copper_heat_pipe() {
    let mut design = store::preset("copper-water-heat-pipe").expect("a ready design");
    let rows = ranked(&design);
    assert_eq!(rows[0].fluid.id(), "water");
    assert!(
        row(&rows, "ammonia")
            .objections
            .contains(&Objection::Incompatible)
    );
    assert!(
        row(&rows, "nitrogen")
            .objections
            .contains(&Objection::OutsideModel)
    );
    assert!(!row(&rows, "naphthalene").objections.is_empty());
    design.conditions.working_low = crate::given::celsius(60.0);
    design.conditions.working_high = crate::given::celsius(60.0);
    let rows = ranked(&design);
    for (id, published) in [
        ("water", 3.30e11),
        ("methanol", 4.67e10),
        ("ethanol", 2.09e10),
    ] {
        let merit = row(&rows, id).merit.expect("known");
        assert!((merit / published - 1.0).abs() < 0.01, "{id}: {merit:e}");
    }
}

/// No order is lost: the same rows come whatever the order they are given in.
#[test]
fn the_order_does_not_depend_on_the_catalogue() {
    let design = store::preset("glass-liquid-lift").expect("a ready design");
    let library = Library::built_in();
    let a = assess(&design, &library);
    let mut fluids: Vec<_> = library.fluids.iter().collect();
    let ids = |rows: Vec<Ranked>| -> Vec<String> {
        rows.iter().map(|row| row.fluid.id().to_owned()).collect()
    };
    let forward = ids(rank(&design, &a, fluids.iter().cloned()));
    fluids.reverse();
    let backward = ids(rank(&design, &a, fluids));
    assert_eq!(forward.len(), backward.len());
    // Fluids whose figure is not known share the last places.
    assert_eq!(forward[..20], backward[..20]);
}
