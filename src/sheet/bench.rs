//! What the bench weighs, and what it checks afterwards.

use super::page::Page;
use crate::assess::{Assessment, Corners, Side, Window};
use crate::design::{ChargeAim, Design};
use crate::fluid::Regime;
use crate::sealed::SealedUnit;
use crate::units::{Kind, Temperature, Units, figures};

use crate::words;

/// Air at 20 °C and one atmosphere (CRC Handbook of Chemistry and Physics, from memory).
const AIR_KG_PER_M3: f64 = 1.2;

pub fn weighing(page: &mut Page, design: &Design, a: &Assessment, units: &Units) {
    let Ok(charge) = &a.charge else { return };
    page.heading("WEIGHING");
    let air = a
        .volumes
        .as_ref()
        .map_or(0.0, |v| AIR_KG_PER_M3 * v.nominal.cubic_metre());
    page.paragraph(&format!(
        "Tare the unit evacuated: open, it holds {} of air. Weigh by difference on one balance.",
        units.show_si(Kind::Mass, air, 2)
    ));
    page.row("Charge stated as", &stated(design, units));
    page.row(
        "Sealed mass aimed at",
        &format!(
            "{} +/- {}",
            units.show_to(charge.nominal, 5),
            units.show_beside(design.charge.tolerance, charge.nominal, 3)
        ),
    );
    let balance = design.bench.balance.kilogram();
    let purge = design.bench.purge_loss.kilogram();
    // What is dispensed and does not stay.
    let lost = purge + charge.stub_content.kilogram();
    // Both ends move inwards by the balance's uncertainty and round inwards.
    let (mut low, mut high) = (
        charge.least.kilogram() + balance,
        charge.greatest.kilogram() - balance,
    );
    if let Ok(window) = &a.window
        && let Some((least, greatest)) = window.ends()
    {
        low = low.max(least.kilogram() + balance);
        high = high.min(greatest.kilogram() - balance);
    }
    // Told in steps of a tenth of the balance's uncertainty, rounded inwards.
    let unit = units.unit_for(Kind::Mass, charge.nominal.kilogram());
    let step = 10f64
        .powf((unit.number_of(balance).log10() - 1.0).floor())
        .max(1e-9);
    let decimals = (-step.log10().round()).max(0.0) as usize;
    let reading = |kilogram: f64, down: bool| {
        let steps = unit.number_of(kilogram) / step;
        let nearest = steps.round();
        let whole = if (steps - nearest).abs() < 1e-6 {
            nearest
        } else if down {
            steps.floor()
        } else {
            steps.ceil()
        };
        format!("{:.decimals$} {}", whole * step, unit.symbol)
    };
    page.row(
        "1  Dispense, scale shows",
        &format!(
            "from {} to {}",
            reading(low + lost, false),
            reading(high + lost, true)
        ),
    );
    page.row(
        "2  Sealed mass after purge",
        &format!("from {} to {}", reading(low, false), reading(high, true)),
    );
    page.row(
        "",
        &format!(
            "The ends are drawn in by the balance's {} and lie inside the charge window.",
            units.show_to(design.bench.balance, 2)
        ),
    );
    if purge > 0.0 {
        page.row(
            "Purge loss counted on",
            &units.show(design.bench.purge_loss),
        );
    }
    if let Ok(volume) = &charge.dispensed_volume {
        page.row(
            "Dispensed liquid",
            &format!(
                "{} at the liquid's own {}",
                units.show(*volume),
                units.show(design.conditions.bench)
            ),
        );
    }
    window_rows(page, a, units);
    page.blank_row("Tare, evacuated");
    page.blank_row("Gross after dispensing");
    page.blank_row("Gross after purge and seal");
    if let Some(closure) = &design.chamber.closure
        && closure.kind.parts_a_stub()
    {
        if charge.stub_content.kilogram() > 0.0 {
            page.row(
                "Vapour lost in the stub",
                &format!(
                    "{}, counted in row 1",
                    units.show_to(charge.stub_content, 2)
                ),
            );
        }
        page.blank_row("Stub after closing");
        page.paragraph(
            "After closing weigh unit and stub together: the stub's own mass is not fluid.",
        );
    }
}

fn window_rows(page: &mut Page, a: &Assessment, units: &Units) {
    let Ok(window) = &a.window else { return };
    let end = |side: Side, window: &Window| {
        let bound = match side {
            Side::AtLeast => window.lower.as_ref(),
            Side::AtMost => window.upper.as_ref(),
        };
        bound.map(|bound| {
            format!(
                "{} ({}, {})",
                words::bound_mass(bound, units),
                words::requirement(bound.requirement),
                units.show(bound.temperature)
            )
        })
    };
    page.row(
        "Window, least",
        &end(Side::AtLeast, window).unwrap_or_else(|| "none asked for".to_owned()),
    );
    page.row(
        "Window, greatest",
        &end(Side::AtMost, window).unwrap_or_else(|| "none found".to_owned()),
    );
}

fn stated(design: &Design, units: &Units) -> String {
    match &design.charge.aim {
        ChargeAim::Mass { .. } => "mass".to_owned(),
        ChargeAim::FillRatio {
            ratio,
            temperature,
            of,
        } => {
            let of = words::named_volume(of);
            format!(
                "liquid in {} of {of} at {}",
                units.show(*ratio),
                units.show(temperature.unwrap_or(design.conditions.bench))
            )
        }
        ChargeAim::Dispensed { volume } => {
            format!(
                "{} of liquid dispensed at {}",
                units.show(*volume),
                units.show(design.conditions.bench)
            )
        }
    }
}

pub fn afterwards(page: &mut Page, design: &Design, a: &Assessment, units: &Units) {
    let Ok(corners) = &a.corners else { return };
    let conditions = &design.conditions;
    page.heading("AFTERWARDS");
    if design.bench.gauge {
        page.paragraph(&format!(
            "Expected pressure once the whole unit stands at one temperature (gauge against a barometer of {}). \
             Reject outside these limits, widened by what the gauge and the thermometer are uncertain by; \
             1 K changes the pressure as told:",
            units.show(conditions.barometer)
        ));
        for t in [
            conditions.working_low,
            conditions.bench,
            conditions.working_high,
        ] {
            page.row(
                &format!("  at {}", units.show(t).replace('\u{a0}', " ")),
                &expected_pressure(design, a, corners, t, units),
            );
        }
        page.paragraph(
            "The upper limits include the gas that is counted, the lower ones none. A higher reading is more gas in \
             the unit, too much fluid or a wrong one; a lower reading is too little fluid, a wrong one or a leak. \
             Release neither.",
        );
    } else {
        page.paragraph("No gauge stays on the unit. Judge by the liquid level and by weight.");
    }
    if let Ok(charge) = &a.charge
        && let Ok(fill) = charge.bench_fill
    {
        let text = match fill {
            fill if fill <= 0.0 => "none".to_owned(),
            fill if fill >= 1.0 => "the whole inside".to_owned(),
            fill => format!("{} % of the inside volume", figures(100.0 * fill, 3)),
        };
        page.row(
            "Liquid on the bench",
            &format!("{text}, at {}", units.show(conditions.bench)),
        );
    }
    page.item(
        "[ ]",
        "Re-weigh after a soak at the bench: a loss is a leak.",
    );
    page.item(
        "[ ]",
        "Under- or overfilled: recover the fluid into its vessel. Never boil it off into the room.",
    );
    page.blank_row("Mass after soak, days");
}

/// From the lightest charge in the largest volume to the heaviest in the smallest, the
/// model's uncertainty on both sides, and what a kelvin changes.
fn expected_pressure(
    design: &Design,
    a: &Assessment,
    corners: &Corners,
    t: Temperature,
    units: &Units,
) -> String {
    let uncertainty = a.fluid.pressure_uncertainty();
    let warmer = Temperature::from_kelvin(t.kelvin() + 1.0);
    let state = |unit: &SealedUnit| unit.state(t).ok().filter(|s| s.regime != Regime::Frozen);
    let low = corners.lightest.as_ref().and_then(state);
    let (Some(low), Some(high), Ok(warmer)) = (low, state(&corners.heaviest), warmer) else {
        let frozen = (t < a.fluid.freezing_point())
            .then(|| a.fluid.frozen_pressure(t).ok())
            .flatten();
        return frozen.map_or_else(
            || "not known".to_owned(),
            |pressure| format!("frozen: {}", words::solid_pressure(pressure, units)),
        );
    };
    let gas = high.gas;
    let low = low.pressure.pascal() * (1.0 - uncertainty);
    let high = high.pressure.pascal() * (1.0 + uncertainty);
    let barometer = design.conditions.barometer.pascal();
    let show = |pascal: f64| units.show_si(Kind::Pressure, pascal, 4);
    let slope = match (corners.nominal.state(t), corners.nominal.state(warmer)) {
        (Ok(here), Ok(there)) => show(there.pressure.pascal() - here.pressure.pascal()),
        _ => "not known".to_owned(),
    };
    let range = |low: f64, high: f64| {
        let (low, high) = (show(low), show(high));
        if low == high {
            low
        } else {
            format!("{low} to {high}")
        }
    };
    let gas = gas.map_or_else(String::new, |gas| {
        format!("; {} of it gas", units.show_to(gas, 3))
    });
    format!(
        "{} abs, {} gauge{gas}; 1 K: {slope}",
        range(low, high),
        range(low - barometer, high - barometer)
    )
}
