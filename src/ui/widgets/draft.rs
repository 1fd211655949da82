//! A text field whose text is only a draft until Enter, Tab or a click elsewhere.

use eframe::egui::{
    Align2, Context, Id, Key, Margin, Rect, Stroke, StrokeKind, TextEdit, Ui, UiBuilder, accesskit,
    text::CCursorRange,
};

use crate::units::{Kind, NBSP, Unit, Units, figures, parse_si};

/// What a value may be: the value itself, or a sentence why not.
pub(super) type Check<'a> = &'a dyn Fn(f64) -> Result<f64, String>;

/// How a value is written and read.
#[derive(Clone, Copy)]
pub(super) struct Script<'a> {
    pub kind: Kind,
    pub units: &'a Units,
    /// The unit shown, and meant where none is typed.
    pub unit: &'static Unit,
    pub digits: usize,
    /// Zeros that say nothing are left out.
    pub trim: bool,
    pub check: Check<'a>,
}

impl Script<'_> {
    /// As shown while nobody is typing.
    pub fn shown(&self, si: f64) -> String {
        let number = self.units.number(self.kind, si, self.unit, self.digits);
        self.with_unit(if self.trim { trimmed(&number) } else { number })
    }

    /// The value to nine figures, so that what is edited is the value itself and
    /// not its rounding. The shown text where that is as good.
    fn exact(&self, si: f64) -> String {
        let shown = self.shown(si);
        match parse_si(&shown, self.kind, self.unit) {
            Ok(read) if (read - si).abs() <= 1e-9 * si.abs() => shown,
            _ => self.with_unit(trimmed(&figures(self.unit.number_of(si), 9))),
        }
    }

    fn with_unit(&self, number: String) -> String {
        let symbol = self.unit.symbol;
        if symbol.is_empty() {
            number
        } else {
            format!("{number}{NBSP}{symbol}")
        }
    }

    fn read(&self, text: &str) -> Result<f64, String> {
        let si = parse_si(text, self.kind, self.unit).map_err(|error| error.to_string())?;
        (self.check)(si)
    }
}

/// What a field did in this frame.
pub(super) struct Typed {
    /// A new value.
    pub si: Option<f64>,
    /// Why the text in the field is not a value.
    pub refused: Option<String>,
}

/// Whether text is being typed that is not a value yet. Undo and redo then belong
/// to the text; otherwise they are the design's, also while a field has the focus.
pub fn is_typing(ctx: &Context) -> bool {
    let Some(id) = ctx.memory(|memory| memory.focused()) else {
        return false;
    };
    ctx.data(|data| data.get_temp::<Draft>(id))
        .is_some_and(|draft| draft.text != draft.original)
}

/// The field at `rect`. Its draft lives in egui's memory under `id`.
pub(super) fn draft_ui(
    ui: &mut Ui,
    id: Id,
    rect: Rect,
    label: &str,
    si: f64,
    script: &Script<'_>,
) -> Typed {
    let had_focus = ui.memory(|memory| memory.has_focus(id));
    let mut draft = ui
        .data(|data| data.get_temp::<Draft>(id))
        .and_then(|draft| draft.after_outside_change(si, script, had_focus));
    if had_focus && draft.is_none() {
        draft = Some(Draft::new(si, script));
    }
    let mut text = draft
        .as_ref()
        .map_or_else(|| script.shown(si), |draft| draft.text.clone());

    let mut child = ui.new_child(UiBuilder::new().max_rect(rect));
    let mut output = TextEdit::singleline(&mut text)
        .id(id)
        .align(Align2::RIGHT_CENTER)
        .margin(Margin::symmetric(6, 2))
        .desired_width(rect.width())
        .min_size(rect.size())
        .show(&mut child);
    let response = output.response.response.clone().accessible_name(label);

    let mut new_si = None;
    let mut select_all = false;
    if response.changed() {
        let draft = draft.get_or_insert_with(|| Draft::new(si, script));
        draft.text = text;
        if draft.refused.is_some() {
            draft.refused = script.read(&draft.text).err();
        }
    }
    let has_focus = ui.memory(|memory| memory.has_focus(id));
    let (enter, escape) = ui.input(|input| {
        (
            input.key_pressed(Key::Enter),
            input.key_pressed(Key::Escape),
        )
    });
    // Assistive tools set the text without ever giving the focus.
    let set_from_outside = response.changed() && !has_focus && !response.lost_focus();
    if response.lost_focus() && escape {
        draft = None;
    } else if response.lost_focus() || set_from_outside {
        match draft.as_mut().map(|draft| draft.committed(script)) {
            Some(Ok(value)) => {
                new_si = value.filter(|value| *value != si);
                draft = None;
                output.state.clear_undoer();
            }
            Some(Err(reason)) => {
                draft = draft.map(|draft| Draft {
                    refused: Some(reason),
                    ..draft
                })
            }
            None => {}
        }
        if enter {
            // Enter takes the value and stays, so that the next try can be typed at once.
            response.request_focus();
            select_all = draft.is_none();
        }
    } else if response.gained_focus() {
        let entered = draft.get_or_insert_with(|| Draft::new(si, script));
        entered.fresh = ui.input(|input| input.pointer.any_down());
        select_all = !entered.fresh;
        ui.ctx().request_repaint();
    } else if response.clicked()
        && let Some(draft) = draft.as_mut().filter(|draft| draft.fresh)
    {
        // A first click selects everything, a second one places the cursor.
        draft.fresh = false;
        select_all = !ui.input(|input| input.modifiers.shift);
    }
    if !response.has_focus() && !response.lost_focus() {
        // A draft whose field was away when the focus left; a refused one stays.
        draft = draft.filter(|draft| draft.refused.is_some());
    }
    if select_all {
        let text = draft.as_ref().map_or_else(
            || script.exact(new_si.unwrap_or(si)),
            |draft| draft.text.clone(),
        );
        output
            .state
            .cursor
            .set_char_range(Some(CCursorRange::select_all_str(&text)));
        ui.ctx().request_repaint();
    }
    output.state.store(ui.ctx(), id);

    let refused = draft.as_ref().and_then(|draft| draft.refused.clone());
    if let Some(reason) = &refused {
        let error = ui.visuals().error_fg_color;
        ui.painter()
            .rect_stroke(rect, 4.0, Stroke::new(1.5, error), StrokeKind::Inside);
        ui.ctx().accesskit_node_builder(id, |node| {
            node.set_invalid(accesskit::Invalid::True);
            node.set_description(reason.as_str());
        });
    }
    ui.data_mut(|data| match draft {
        Some(draft) => drop(data.insert_temp(id, draft)),
        None => data.remove::<Draft>(id),
    });
    Typed {
        si: new_si,
        refused,
    }
}

/// Text that is not a value yet.
#[derive(Debug, Clone)]
struct Draft {
    text: String,
    /// What the text was when the field got the focus.
    original: String,
    /// The value it stands beside, and the unit it was written in.
    si: f64,
    unit: &'static str,
    refused: Option<String>,
    /// The pointer that gave the focus is still down.
    fresh: bool,
}

impl Draft {
    fn new(si: f64, script: &Script<'_>) -> Self {
        let text = script.exact(si);
        Self {
            original: text.clone(),
            text,
            si,
            unit: script.unit.symbol,
            refused: None,
            fresh: false,
        }
    }

    /// The draft after the value or its unit may have been changed elsewhere: what
    /// is being typed stays, everything else shows the new value.
    fn after_outside_change(self, si: f64, script: &Script<'_>, has_focus: bool) -> Option<Self> {
        if self.si == si && self.unit == script.unit.symbol {
            Some(self)
        } else if has_focus && self.text != self.original {
            Some(Self {
                si,
                unit: script.unit.symbol,
                ..self
            })
        } else if has_focus {
            Some(Self {
                fresh: self.fresh,
                ..Self::new(si, script)
            })
        } else {
            None
        }
    }

    /// The value meant; none where the text was left as it was, which keeps
    /// digits that are not shown.
    fn committed(&self, script: &Script<'_>) -> Result<Option<f64>, String> {
        if self.text.trim() == self.original.trim() {
            Ok(None)
        } else {
            script.read(&self.text).map(Some)
        }
    }
}

/// Without the zeros at the end of the decimals, and without a bare point.
fn trimmed(number: &str) -> String {
    let (mantissa, exponent) = number
        .split_once('e')
        .map_or((number, None), |(m, e)| (m, Some(e)));
    let mantissa = if mantissa.contains('.') {
        mantissa.trim_end_matches('0').trim_end_matches('.')
    } else {
        mantissa
    };
    exponent.map_or_else(
        || mantissa.to_owned(),
        |exponent| format!("{mantissa}e{exponent}"),
    )
}

#[cfg(test)]
mod tests {
    use super::trimmed;

    #[test]
    fn only_zeros_that_say_nothing_go() {
        for (text, expected) in [
            ("200.000", "200"),
            ("0.0500", "0.05"),
            ("100", "100"),
            ("1.500e-9", "1.5e-9"),
            ("0", "0"),
        ] {
            assert_eq!(trimmed(text), expected);
        }
    }
}
