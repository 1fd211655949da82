//! What the bench does: weighing, steps, checks afterwards.

use super::page::Page;
use crate::assess::{Assessment, Side, Window};
use crate::conditions::STANDARD_ATMOSPHERE_PA;
use crate::design::{ChargeAim, Design, NamedVolume};
use crate::fluid::{Regime, StabilityKind};
use crate::units::{Kind, Pressure, Temperature, Units, careful_down, careful_up, figures};
use crate::words;

/// Dry ice sublimes at −78.5 °C and liquid nitrogen boils at 77.36 K under one
/// atmosphere (CRC Handbook of Chemistry and Physics, from memory).
const DRY_ICE_K: f64 = 194.65;
const LIQUID_NITROGEN_K: f64 = 77.36;
/// Below it air condenses into an open vessel: liquid oxygen (boils at 90.2 K).
const OXYGEN_CONDENSES_K: f64 = 90.2;

pub fn weighing(page: &mut Page, design: &Design, a: &Assessment, units: &Units) {
    let Ok(charge) = &a.charge else { return };
    page.heading("WEIGHING");
    page.paragraph(
        "Tare the unit evacuated: an open unit of 50 mL holds 60 mg of air. Weigh by difference on one balance.",
    );
    page.row("Charge stated as", &stated(design, units));
    page.row(
        "Sealed mass aimed at",
        &format!(
            "{} +/- {}",
            units.show(charge.nominal),
            units.show_beside(design.charge.tolerance, charge.nominal, 3)
        ),
    );
    let balance = design.bench.balance.kilogram();
    let purge = design.bench.purge_loss.kilogram();
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
    let unit = units.unit_for(Kind::Mass, charge.nominal.kilogram());
    let reading = |kilogram: f64, down: bool| {
        let number = unit.number_of(kilogram);
        let digits = 5;
        let careful = if down {
            careful_down(number, digits)
        } else {
            careful_up(number, digits)
        };
        format!("{} {}", figures(careful, digits as usize), unit.symbol)
    };
    page.row(
        "1  Dispense, scale shows",
        &format!(
            "from {} to {}",
            reading(low + purge, false),
            reading(high + purge, true)
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
    page.blank_row("Stub after pinch-off");
    page.paragraph("After pinch-off weigh unit and stub together: the stub's mass is not fluid.");
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
            let of = match of {
                NamedVolume::Inside => "the inside volume".to_owned(),
                NamedVolume::Part(name) => format!("“{name}”"),
            };
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

pub fn steps(page: &mut Page, design: &Design, a: &Assessment, units: &Units) {
    page.heading("STEPS");
    let fluid = &a.fluid;
    let bench = design.conditions.bench;
    let pressure = |t: Temperature| fluid.saturation_pressure(t).ok();
    let show = |p: Pressure| format!("{} abs", units.show(p));
    page.item(
        "[ ]",
        "Evacuate the clean, proven unit; close the valve; read the tare.",
    );
    let gas_at_bench = pressure(bench).is_none_or(|p| p.pascal() > STANDARD_ATMOSPHERE_PA);
    match pressure(bench) {
        Some(p) if gas_at_bench => page.item(
            "[ ]",
            &format!(
                "The fluid stands at {} on the bench: transfer it from its cylinder through a closed line into \
                 the cooled unit. Never into an open one.",
                show(p)
            ),
        ),
        Some(p) => page.item(
            "[ ]",
            &format!(
                "Degas the fluid: it boils at {} on the bench. Dissolved air not removed here stays in the unit.",
                show(p)
            ),
        ),
        None => page.item(
            "[ ]",
            "The fluid has no liquid on the bench: charge it as a gas through a closed line, or cold.",
        ),
    }
    page.item("[ ]", "Dispense by weight until the scale is inside row 1.");
    let freezing = fluid.freezing_point();
    let baths = [
        ("dry ice", DRY_ICE_K),
        ("liquid nitrogen", LIQUID_NITROGEN_K),
    ];
    let verdicts: Vec<String> = baths
        .iter()
        .map(|(bath, kelvin)| {
            let verb = if *kelvin < freezing.kelvin() {
                "freezes"
            } else {
                "does not freeze"
            };
            let at = units.show_si(Kind::Temperature, *kelvin, 4);
            format!("{bath} ({at}) {verb} it")
        })
        .collect();
    page.item(
        "[ ]",
        &format!(
            "Freeze, evacuate, thaw, repeat; or boil off the purge loss. It melts at {}: {}.",
            units.show(freezing),
            verdicts.join("; ")
        ),
    );
    if freezing.kelvin() > LIQUID_NITROGEN_K && freezing.kelvin() < DRY_ICE_K {
        page.item(
            " ! ",
            &format!(
                "Below {} never open the unit to air: oxygen condenses, and with an organic it explodes.",
                units.show_si(Kind::Temperature, OXYGEN_CONDENSES_K, 4)
            ),
        );
    }
    page.item(" ! ", "Never plunge glass into a cold bath; cool slowly. Thaw from the top, so that the melt has room.");
    page.item(" ! ", "If gas has condensed in the unit, do not seal it.");
    if fluid.safety().is_flammable() {
        page.item(
            " ! ",
            "Flammable vapour: no flame, no hot seal, until no vapour is near the joint.",
        );
    }
    if fluid
        .safety()
        .stability
        .iter()
        .any(|s| s.kind == StabilityKind::AcidInFlame)
    {
        page.item(" ! ", "Its vapour in a flame makes acid, and chlorinated vapour phosgene: purge the seal first.");
    }
    page.item(
        "[ ]",
        "Seal. Weigh unit and stub: the sealed mass must be inside row 2.",
    );
}

pub fn afterwards(page: &mut Page, design: &Design, a: &Assessment, units: &Units) {
    let Ok(corners) = &a.corners else { return };
    let conditions = &design.conditions;
    page.heading("AFTERWARDS");
    if design.bench.gauge {
        page.paragraph(&format!(
            "Expected pressure once the whole unit stands at one temperature (gauge against a barometer of {}):",
            units.show(conditions.barometer)
        ));
        for t in [
            conditions.working_low,
            conditions.bench,
            conditions.working_high,
        ] {
            let text = match corners.nominal.state(t) {
                Ok(state) if state.regime == Regime::Frozen => "frozen".to_owned(),
                Ok(state) => {
                    let gauge = state.pressure.pascal() - conditions.barometer.pascal();
                    format!(
                        "{} abs, {} gauge",
                        units.show(state.pressure),
                        units.show_si(Kind::Pressure, gauge, 4)
                    )
                }
                Err(_) => "not known".to_owned(),
            };
            page.row(
                &format!("  at {}", units.show(t).replace('\u{a0}', " ")),
                &text,
            );
        }
        page.paragraph("A higher reading is gas in the unit or a wrong fluid: do not release it.");
    } else {
        page.paragraph("No gauge stays on the unit. Judge by the liquid level and by weight.");
    }
    if let Ok(charge) = &a.charge
        && let Ok(fill) = charge.bench_fill
    {
        page.row(
            "Liquid on the bench",
            &format!(
                "{} % of the inside volume at {}",
                figures(100.0 * fill, 3),
                units.show(conditions.bench)
            ),
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
