//! The right column: the verdict, the window, the worst case, the findings.

use eframe::egui::{Align, Layout, RichText, Ui};

use super::findings::findings_ui;
use super::section::{column_ui, fact_ui, subheading_ui};
use crate::assess::{Assessment, Bound, Missing, Window};
use crate::design::Design;
use crate::ui::command::Command;
use crate::ui::theme::Palette;
use crate::ui::widgets::{Badge, WindowBar, WindowBarLabels, verdict_badge, window_bar};
use crate::units::{Units, figures};
use crate::words;

/// Shows what it means; orders leave through `out`.
pub fn meaning_ui(
    ui: &mut Ui,
    design: &Design,
    a: &Assessment,
    units: &Units,
    out: &mut Vec<Command>,
) {
    verdict_badge(ui, Badge::from(a.verdict), words::verdict(a.verdict));
    ui.add_space(4.0);
    // From below: the care keeps its place, the rest scrolls in what is left. (A panel
    // would do, but costs the first frame a second pass.)
    ui.with_layout(Layout::bottom_up(Align::Min), |ui| {
        cautions_ui(ui);
        ui.with_layout(Layout::top_down(Align::Min), |ui| {
            column_ui(ui, "meaning", |ui| {
                charge_ui(ui, design, a, units);
                worst_ui(ui, a, units);
                subheading_ui(ui, "Findings, worst first");
                findings_ui(ui, &a.findings, &design.chamber, units, out);
            });
        });
    });
}

fn charge_ui(ui: &mut Ui, design: &Design, a: &Assessment, units: &Units) {
    let (Ok(charge), Ok(window)) = (&a.charge, &a.window) else {
        let reason: Option<&Missing> = a.charge.as_ref().err().or(a.window.as_ref().err());
        if let Some(reason) = reason {
            ui.label(words::missing(reason, units));
        }
        return;
    };
    let stated = format!(
        "Charge {} ± {}",
        units.show(charge.nominal),
        units.show_beside(design.charge.tolerance, charge.nominal, 3)
    );
    ui.label(RichText::new(&stated).strong());
    let Some(upper) = &window.upper else {
        ui.label("Nothing bounds the charge from above.");
        return;
    };
    let (low_text, high_text) = ends_text(window, units);
    let description = format!("{stated}; window {low_text} to {high_text}");
    let bar = WindowBar {
        lower: window.lower.as_ref().map(|bound| bound.mass.kilogram()),
        upper: upper.mass.kilogram(),
        least: charge.least.kilogram(),
        nominal: charge.nominal.kilogram(),
        greatest: charge.greatest.kilogram(),
        aim: window.aim.map(|mass| mass.kilogram()),
    };
    let labels = WindowBarLabels {
        lower: &low_text,
        upper: &high_text,
        charge: &units.show(charge.nominal),
        description: &description,
    };
    window_bar(ui, &bar, &labels);
    let faint = Palette::in_use(ui).text_faint;
    let end = |what: &str, requirement| {
        RichText::new(format!("{what}: {}", words::requirement(requirement)))
            .small()
            .color(faint)
    };
    if let Some(aim) = window.aim {
        let text = format!("▾ aim of the duty: {}, the centre", units.show(aim));
        ui.label(RichText::new(text).small().color(faint));
    }
    if let Some(lower) = &window.lower {
        ui.label(end("lower end", lower.requirement));
    }
    ui.label(end("upper end", upper.requirement));
}

/// The ends, rounded into the window.
fn ends_text(window: &Window, units: &Units) -> (String, String) {
    let told = |bound: &Option<Bound>, none: &str| match bound {
        Some(bound) => words::bound_mass(bound, units),
        None => none.to_owned(),
    };
    (told(&window.lower, "0"), told(&window.upper, "–"))
}

fn worst_ui(ui: &mut Ui, a: &Assessment, units: &Units) {
    subheading_ui(ui, "Worst case");
    let case = match &a.worst {
        Ok(case) => case,
        Err(reason) => {
            ui.label(words::missing(reason, units));
            return;
        }
    };
    let mut row = |what: &str, value: String| drop(fact_ui(ui, 96.0, what, &value));
    row(
        "Governing",
        format!(
            "{}, {}",
            units.show(case.temperature),
            words::regime(case.state.regime)
        ),
    );
    row("Pressure", format!("{} abs", units.show(case.pressure)));
    match &case.weakest {
        Ok(weakest) => {
            row("Weakest part", weakest.name.to_string());
            row("Allowable load", units.show(weakest.allowable.pressure));
            let times = |share: &Result<f64, Missing>| match share {
                Ok(share) if *share > 0.0 => {
                    format!("{} times the load", figures(1.0 / share, 3))
                }
                Ok(_) => "no load".to_owned(),
                Err(_) => "–".to_owned(),
            };
            row("Margin", times(&case.of_allowable));
            match &weakest.burst {
                Ok(burst) => row(
                    "Burst load",
                    format!("{}, {}", units.show(*burst), times(&case.of_burst)),
                ),
                Err(_) => row("Burst load", "not known there".to_owned()),
            }
        }
        Err(_) => row("Weakest part", "not known".to_owned()),
    }
    if let Some(outside) = a.worst_outside() {
        let used = match &outside.of_allowable {
            Ok(share) => format!("{} % used", figures(100.0 * share, 3)),
            Err(_) => "not known".to_owned(),
        };
        let what = format!("{}, {used}", units.show_to(outside.load, 3));
        let (response, hint) = (
            fact_ui(ui, 96.0, "From outside", &what),
            format!(
                "Outside less inside pressure: {}, at {}",
                outside.stretch,
                units.show(outside.temperature)
            ),
        );
        response.on_hover_text(hint);
    }
    let mut row = |what: &str, value: String| drop(fact_ui(ui, 96.0, what, &value));
    if let Ok(Some(at)) = &a.heaviest_full_at {
        row("Liquid-full", format!("at {}", units.show(*at)));
    }
    if let Ok(Some(at)) = &a.lightest_dry_at {
        row("Dry", format!("at {}", units.show(*at)));
    }
}

/// Always in sight: they cannot be scrolled or clicked away.
fn cautions_ui(ui: &mut Ui) {
    let faint = Palette::in_use(ui).text_faint;
    let spacing = std::mem::replace(&mut ui.spacing_mut().item_spacing.y, 1.0);
    for caution in words::CAUTIONS.iter().rev() {
        ui.label(RichText::new(*caution).small().color(faint));
    }
    ui.spacing_mut().item_spacing.y = spacing;
    ui.separator();
}
