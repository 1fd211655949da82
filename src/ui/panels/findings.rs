//! Findings, worst first: what, the figure against its limit, what to try.

use eframe::egui::{
    Align, Button, Frame, Label, Layout, Margin, RichText, Role, Sense, Ui, WidgetInfo,
};

use crate::assess::Finding;
use crate::chamber::Chamber;
use crate::ui::command::Command;
use crate::ui::theme::Palette;
use crate::ui::widgets::{Badge, badge_mark, margin_bar};
use crate::units::Units;
use crate::words::{self, Said};

/// Every finding; a click on its title leads to where it comes from.
pub fn findings_ui(
    ui: &mut Ui,
    findings: &[Finding],
    chamber: &Chamber,
    units: &Units,
    out: &mut Vec<Command>,
) {
    if findings.is_empty() {
        ui.label("Nothing was found.");
    }
    for (index, finding) in findings.iter().enumerate() {
        ui.push_id(("finding", index), |ui| {
            finding_ui(ui, finding, chamber, units, out)
        });
    }
}

fn finding_ui(
    ui: &mut Ui,
    finding: &Finding,
    chamber: &Chamber,
    units: &Units,
    out: &mut Vec<Command>,
) {
    let palette = Palette::in_use(ui);
    let badge = Badge::from(finding.severity);
    let said = words::finding(finding, Some(chamber), units);
    Frame::NONE
        .inner_margin(Margin {
            left: 0,
            right: 0,
            top: 4,
            bottom: 5,
        })
        .show(ui, |ui| {
            ui.spacing_mut().item_spacing.y = 2.0;
            ui.horizontal(|ui| {
                badge_mark(ui, badge);
                let title = RichText::new(&said.title)
                    .strong()
                    .color(badge.colour(palette));
                let response = ui.add(Label::new(title).selectable(false).sense(Sense::click()));
                let named = format!("{}: {}", badge.word(), said.title);
                response.widget_info(|| WidgetInfo::labeled(Role::Link, true, &named));
                if response
                    .on_hover_text("Go to where this comes from")
                    .clicked()
                {
                    out.push(Command::Show(finding.section));
                }
            });
            ui.label(&said.detail);
            if let Some(share) = finding.share {
                let description = format!("{} of its limit used", percent(share));
                margin_bar(ui, share, badge.colour(palette), &description);
            }
            advice_ui(ui, &said, palette);
            if let (Some(button), Some(remedy)) = (&said.button, finding.remedy) {
                ui.with_layout(Layout::left_to_right(Align::Min), |ui| {
                    if ui.add(Button::new(button)).clicked() {
                        out.push(Command::Apply(remedy));
                    }
                });
            }
        });
    ui.separator();
}

fn advice_ui(ui: &mut Ui, said: &Said, palette: &Palette) {
    if let Some(advice) = &said.try_this {
        ui.label(RichText::new(advice).color(palette.text_faint));
    }
    if let Some(source) = &said.source {
        let response = ui.add(
            Label::new(
                RichText::new(format!("Source: {source}"))
                    .small()
                    .color(palette.text_faint),
            )
            .truncate(),
        );
        response.on_hover_text(source);
    }
}

fn percent(share: f64) -> String {
    format!("{} %", crate::units::figures(100.0 * share, 3))
}
