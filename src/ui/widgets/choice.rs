//! One of several, in a box that opens.

use eframe::egui::{ComboBox, Role, Ui, WidgetInfo};

/// How wide the closed box is.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum ChoiceWidth {
    /// All there is; a longer text ends in an ellipsis.
    Column,
    /// As its text asks.
    Text,
}

/// A box for one of `choices`, each with its text in the list; `shown` stands in the closed
/// box, `name` is what it is called for who does not see it.
pub fn choice_ui<T: PartialEq>(
    ui: &mut Ui,
    name: &str,
    shown: &str,
    width: ChoiceWidth,
    value: &mut T,
    choices: impl IntoIterator<Item = (T, String)>,
) {
    let combo = ComboBox::from_id_salt(name).selected_text(shown);
    let combo = match width {
        ChoiceWidth::Column => combo.width(ui.available_width()).truncate(),
        ChoiceWidth::Text => combo,
    };
    let response = combo
        .show_ui(ui, |ui| {
            for (choice, text) in choices {
                ui.selectable_value(value, choice, text);
            }
        })
        .response;
    response.widget_info(|| WidgetInfo::labeled(Role::ComboBox, true, name));
}
