//! The sheet's sections, in the order of the bench.

use super::Head;
use super::page::Page;
use crate::assess::{Assessment, EventKind, Severity, Side, Window};
use crate::chamber::MeasuredVolume;
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

pub fn head(page: &mut Page, design: &Design, head: &Head) {
    page.rule('=');
    page.paragraph("CHARGE SHEET");
    page.rule('=');
    page.row("Design", &design.title);
    if !design.note.is_empty() {
        page.row("Note", &design.note);
    }
    page.row("File", head.file_name.as_deref().unwrap_or("not saved"));
    page.row("Content fingerprint", &head.fingerprint);
    page.row(
        "Written by",
        concat!("Chargewright ", env!("CARGO_PKG_VERSION")),
    );
    page.row("Duty", design.duty.name());
    page.blank();
    page.blanks_side_by_side(&["Date", "Serial", "Lot"]);
}

pub fn release(page: &mut Page, fit: bool) {
    page.blank();
    if fit {
        page.blank_row("Released before filling");
        page.blank_row("Checked by a second person");
    } else {
        page.paragraph("Not to be released. No scale readings are given.");
    }
}

pub fn fluid(page: &mut Page, a: &Assessment) {
    let fluid = &a.fluid;
    page.heading("FLUID");
    page.row("Name", fluid.name());
    page.row("CAS", fluid.cas());
    page.row("Formula", fluid.formula());
    if let Some(number) = fluid.refrigerant() {
        page.row("Refrigerant number", number);
    }
    if let Some(group) = &fluid.safety().group {
        page.row(
            "Safety group",
            &format!("{} ({})", group.value, group.source),
        );
    }
    page.blank_row("Grade and moisture");
    page.blank_row("Stabiliser");
    page.blank_row("Lot of the fluid");
}

pub fn before_filling(page: &mut Page, design: &Design, a: &Assessment, units: &Units) {
    page.heading("BEFORE FILLING");
    match &design.chamber.measured {
        Some(MeasuredVolume {
            volume,
            uncertainty,
        }) => page.row(
            "Inside volume",
            &format!(
                "{} +/- {}, measured",
                units.show(*volume),
                units.show_to(*uncertainty, 2)
            ),
        ),
        None => {
            if let Ok(volumes) = &a.volumes {
                page.row(
                    "Inside volume",
                    &format!(
                        "{} by the drawing ({} to {})",
                        units.show(volumes.nominal),
                        units.show(volumes.least),
                        units.show(volumes.greatest)
                    ),
                );
            }
        }
    }
    page.row("Bench temperature", &units.show(design.conditions.bench));
    page.blank_row("Cleaned as");
    page.blank_row("Bake-out, temperature, hours");
    page.blank_row("Proof test, medium, pressure");
    page.blank_row("Leak test, limit, result");
    page.paragraph(
        "Prove and leak-test before charging. The wall's strength under outside pressure while evacuated \
         and hot is not judged here: ask for it before a hot bake-out.",
    );
}

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
            units.show_to(design.charge.tolerance, 3)
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
            let down = side == Side::AtMost;
            let careful = if down {
                careful_down(bound.mass.kilogram(), 4)
            } else {
                careful_up(bound.mass.kilogram(), 4)
            };
            format!(
                "{} ({}, {})",
                units.show_si(Kind::Mass, careful, 4),
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

pub fn worst_case(page: &mut Page, design: &Design, a: &Assessment, units: &Units) {
    page.heading("WORST CASE");
    match &a.worst {
        Ok(case) => {
            page.row("Governing temperature", &units.show(case.temperature));
            page.row(
                "Pressure there",
                &format!(
                    "{} abs ({}), heaviest charge in the smallest volume",
                    units.show(case.pressure),
                    words::regime(case.state.regime)
                ),
            );
            page.row(
                "Load on the wall",
                &format!(
                    "{}, against {} abs outside",
                    units.show(case.load),
                    units.show(design.conditions.least_outside)
                ),
            );
            match &case.weakest {
                Ok(weakest) => {
                    page.row("Weakest part", &weakest.name);
                    page.row(
                        "Allowable load",
                        &format!(
                            "{} ({})",
                            units.show(weakest.allowable.pressure),
                            words::basis(weakest.allowable.basis)
                        ),
                    );
                    if let Ok(share) = &case.of_allowable {
                        page.row(
                            "Used of the allowable",
                            &format!("{} %", figures(100.0 * share, 3)),
                        );
                    }
                    match (&weakest.burst, &case.of_burst) {
                        (Ok(burst), Ok(share)) if *share > 0.0 => page.row(
                            "Burst load",
                            &format!(
                                "{}, {} times the load",
                                units.show(*burst),
                                figures(1.0 / share, 3)
                            ),
                        ),
                        (Ok(burst), _) => page.row("Burst load", &units.show(*burst)),
                        (Err(unknown), _) => {
                            page.row("Burst load", &format!("not known: {}", unknown.reason))
                        }
                    }
                }
                Err(unknown) => page.row("Weakest part", &format!("not known: {unknown}")),
            }
        }
        Err(missing) => page.row("Worst case", &words::missing(missing, units)),
    }
    if let Ok(events) = &a.events {
        let (_, high) = a.fluid.range();
        for event in events.iter().filter(|event| event.temperature < high) {
            let what = words::event(event.kind);
            // Freezing belongs to the fluid, not to this charge.
            let prefix = if event.kind == EventKind::Freezing {
                "Fluid"
            } else {
                "Unit"
            };
            page.row(
                &format!("{prefix} {what}"),
                &format!("at {}", units.show(event.temperature)),
            );
        }
    }
}

pub fn warnings(page: &mut Page, design: &Design, a: &Assessment, units: &Units) {
    let spoken: Vec<_> = a
        .findings
        .iter()
        .filter(|f| f.severity != Severity::Error)
        .collect();
    if spoken.is_empty() {
        return;
    }
    page.heading("WARNINGS AND NOTES");
    for finding in spoken {
        let said = words::finding(finding, Some(&design.chamber), units);
        let mark = if finding.severity == Severity::Warning {
            "!"
        } else {
            "-"
        };
        let advice = said
            .try_this
            .map_or_else(String::new, |text| format!(" {text}"));
        page.item(mark, &format!("{}: {}{advice}", said.title, said.detail));
    }
}

pub fn basis(page: &mut Page, design: &Design, a: &Assessment) {
    page.heading("BASIS");
    for source in a.fluid.model_sources() {
        page.row("Fluid", &source);
    }
    page.row("Its uncertainty", &a.fluid.uncertainty());
    page.row("Melting point", &a.fluid.melting_point().source.to_string());
    let mut unconfirmed = !a.fluid.melting_point().source.is_confirmed();
    if let Ok(case) = &a.worst
        && let Ok(weakest) = &case.weakest
    {
        let material = design
            .chamber
            .parts
            .get(weakest.part)
            .and_then(|part| part.wall.as_ref());
        let material = material.map_or("", |wall| wall.material.as_str());
        for source in a.envelope.sources(weakest.part, weakest.allowable.basis) {
            unconfirmed |= !source.is_confirmed();
            page.row("Strength", &format!("{material}: {source}"));
        }
    }
    let safety = a.fluid.safety();
    for (what, source) in [
        (
            "Flammable limit",
            safety.lower_flammable_limit.as_ref().map(|s| &s.source),
        ),
        (
            "Exposure limit",
            safety.exposure_limit_ppm.as_ref().map(|s| &s.source),
        ),
        (
            "Dangerous concentration",
            safety.immediately_dangerous_ppm.as_ref().map(|s| &s.source),
        ),
        ("Hazard statements", Some(&safety.statements.source)),
    ] {
        if let Some(source) = source {
            unconfirmed |= !source.is_confirmed();
            page.row(what, &source.to_string());
        }
    }
    if unconfirmed {
        page.blank_row("To be confirmed by");
    }
}

pub fn care(page: &mut Page, a: &Assessment) {
    page.heading("HAZARDS AND CARE");
    let safety = a.fluid.safety();
    for code in &safety.statements.value {
        page.row(code, words::statement(code));
    }
    page.item(
        "-",
        "Eye protection and a shield at every pressurised or evacuated unit; gloves against cold.",
    );
    if safety.is_flammable() {
        page.item(
            "-",
            "No ignition source; earthed vessels; ventilation at the floor and at the joint.",
        );
    }
    if safety.is_toxic() || safety.is_corrosive() {
        page.item(
            "-",
            "Work under an extraction hood; keep what the safety data sheet asks for at hand.",
        );
    }
    page.item(
        "-",
        "Spill and disposal: as the safety data sheet and the local rules say.",
    );
    for caution in words::CAUTIONS {
        page.item("-", caution);
    }
}

pub fn label(page: &mut Page, design: &Design, a: &Assessment, units: &Units) {
    let Ok(charge) = &a.charge else { return };
    page.heading("UNIT LABEL");
    page.paragraph(&format!(
        "{}, {} (CAS {})",
        design.title,
        a.fluid.name(),
        a.fluid.cas()
    ));
    page.paragraph(&format!(
        "Sealed charge {}. Highest temperature {}.",
        units.show(charge.nominal),
        units.show(design.conditions.hottest)
    ));
    page.paragraph("Do not heat above it, open or puncture. Serial ____________");
}
