//! What the sheet states: head, fluid, unit, worst case, basis, care.

use super::Head;
use super::gas;
use super::page::Page;
use super::walls;
use crate::assess::{Assessment, Figure, Severity};
use crate::chamber::Part;
use crate::design::Design;
use crate::units::{Temperature, Units, figures};
use crate::words;

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
    if let Some(own) = fluid.own_file() {
        page.row("The user's own, from", &own.name);
    }
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
    walls::volumes(page, design, a, units);
    page.row("Bench temperature", &units.show(design.conditions.bench));
    page.blank_row("Cleaned as");
    page.blank_row("Bake-out, temperature, hours");
    page.blank_row("Proof test, medium, pressure");
    page.blank_row("Leak test, limit, result");
    walls::vacuum(page, a, units);
    gas::before_filling(page, design, a, units);
    page.paragraph("Prove and leak-test before charging.");
}

pub fn worst_case(page: &mut Page, a: &Assessment, units: &Units) {
    page.heading("WORST CASE");
    match &a.worst {
        Ok(case) => {
            page.row("Governs", &case.stretch);
            page.row("At", &units.show(case.temperature));
            page.row(
                "Pressure there",
                &format!(
                    "{} abs ({}), heaviest charge in the smallest volume",
                    units.show(case.pressure),
                    words::regime(case.state.regime)
                ),
            );
            gas::in_worst_case(page, case, units);
            let outside = case.outside;
            let load = if case.load.pascal() > 0.0 {
                format!(
                    "{}, against {} abs outside",
                    units.show(case.load),
                    units.show(outside)
                )
            } else {
                format!(
                    "none: the least outside, {} abs, is higher",
                    units.show(outside)
                )
            };
            page.row("Load on the wall", &load);
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
                    page.row("Judged by", weakest.formula);
                    if let Ok(share) = &case.of_allowable
                        && *share > 0.0
                    {
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
    page.row(
        "Fluid freezes",
        &format!("at {}", units.show(a.fluid.freezing_point())),
    );
    // Each from the corner that comes to it first.
    let mut at = |what: &str, found: &Figure<Option<Temperature>>, corner: &str| {
        if let Ok(Some(t)) = found {
            page.row(what, &format!("at {} ({corner})", units.show(*t)));
        }
    };
    let heaviest = "heaviest charge, smallest volume";
    at("Reaches the allowable", &a.heaviest_over_at, heaviest);
    at("Goes liquid-full", &a.heaviest_full_at, heaviest);
    at(
        "Dries out",
        &a.lightest_dry_at,
        "lightest charge, largest volume",
    );
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
    if let Some(own) = a.fluid.own_file() {
        page.row(
            "The user's own fluid file",
            &format!("{}, fingerprint {}", own.name, own.fingerprint),
        );
    }
    for material in &a.own_materials {
        if let Some(own) = material.own_file() {
            let (name, file) = (&material.name, &own.name);
            let text = format!("{name}: {file}, fingerprint {}", own.fingerprint);
            page.row("The user's own material file", &text);
        }
    }
    // Sources of the user's own fluid are what the user says they are.
    let stated = |source: String| match a.fluid.own_file() {
        Some(_) => format!("the user states: {source}"),
        None => source,
    };
    for source in a.fluid.model_sources() {
        page.row("Fluid", &stated(source));
    }
    page.row("Its uncertainty", &stated(a.fluid.uncertainty()));
    let melting = &a.fluid.melting_point().source;
    page.row("Melting point", &stated(melting.to_string()));
    let mut unconfirmed = !a.fluid.melting_point().source.is_confirmed();
    if let Ok(case) = &a.worst
        && let Ok(weakest) = &case.weakest
    {
        let part = design.chamber.parts.get(weakest.part);
        let material = part.and_then(Part::material).unwrap_or_default();
        for source in a.envelope.sources(weakest.part, weakest.allowable.basis) {
            unconfirmed |= !source.is_confirmed();
            let own = a.own_materials.iter().any(|own| own.id == material);
            let states = if own { "the user states: " } else { "" };
            page.row("Strength", &format!("{material}: {states}{source}"));
        }
    }
    if let Ok(gas) = &a.gas
        && let Some(solubility) = gas.counted_solubility()
    {
        let source = &solubility.source;
        unconfirmed |= !source.is_confirmed();
        page.row("Air in the fluid", &source.to_string());
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
            page.row(what, &stated(source.to_string()));
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
