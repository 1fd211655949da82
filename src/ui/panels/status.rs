//! Notices under the menu: what happened, and a file that changed on disk.

use eframe::egui::{Align, Frame, Layout, Margin, Ui};

use crate::ui::theme::Palette;

/// What the user answered to a file that changed on disk.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum DiskAnswer {
    Reload,
    KeepMine,
}

/// Shows the notices there are.
pub fn status_ui(
    ui: &mut Ui,
    changed_on_disk: Option<&str>,
    notice: &mut Option<String>,
) -> Option<DiskAnswer> {
    let mut answer = None;
    if let Some(name) = changed_on_disk {
        banner(ui, |ui| {
            ui.label(format!(
                "{name} has changed on disk since it was read here."
            ));
            if ui.button("Read it again").clicked() {
                answer = Some(DiskAnswer::Reload);
            }
            if ui.button("Keep what is here").clicked() {
                answer = Some(DiskAnswer::KeepMine);
            }
        });
    }
    if let Some(text) = notice.clone() {
        banner(ui, |ui| {
            ui.label(text);
            ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
                if ui.small_button("Dismiss").clicked() {
                    *notice = None;
                }
            });
        });
    }
    answer
}

fn banner(ui: &mut Ui, body: impl FnOnce(&mut Ui)) {
    let palette = Palette::in_use(ui);
    Frame::NONE
        .fill(palette.warning.gamma_multiply(0.12))
        .inner_margin(Margin::symmetric(8, 3))
        .show(ui, |ui| ui.horizontal(body));
}
