//! The one field for every quantity.

use eframe::egui::Ui;

use super::draft::Script;
use super::row::{Row, Tolerance, row_ui};
use super::slider::Reach;
use crate::units::{Kind, Quantity, QuantityError, Unit, Units};

/// A row for one quantity: label, field with number and unit, slim slider.
///
/// Any unit typed is understood; nonsense is refused with a sentence and the old
/// value kept; Escape brings it back. Values beyond the slider can be typed.
#[must_use = "a field does nothing until it is shown"]
pub struct QuantityField<'a, Q: Quantity> {
    value: &'a mut Q,
    units: &'a Units,
    form: Form<'a>,
}

impl<'a, Q: Quantity> QuantityField<'a, Q> {
    pub fn new(label: &'a str, value: &'a mut Q, units: &'a Units) -> Self {
        Self {
            value,
            units,
            form: Form::new(label, 4),
        }
    }

    /// Adds the slider, over the sensible range in SI.
    pub fn slider(mut self, low_si: f64, high_si: f64) -> Self {
        self.form.range = Some((low_si, high_si));
        self
    }

    /// Equal ratios take equal way on the slider; for ranges above zero.
    pub fn logarithmic(mut self) -> Self {
        self.form.logarithmic = true;
        self
    }

    /// Significant figures shown while nobody types; four where not said.
    pub fn digits(mut self, digits: usize) -> Self {
        self.form.digits = digits;
        self
    }

    /// Without the zeros at its end, as a drawing gives a size.
    pub fn trimmed(mut self) -> Self {
        self.form.trim = true;
        self
    }

    /// What the quantity means, as a tooltip and accessible description.
    pub fn hover(mut self, text: &'a str) -> Self {
        self.form.hover = Some(text);
        self
    }

    /// Where two rows of one panel share a label, something that tells them apart.
    pub fn id_salt(mut self, salt: usize) -> Self {
        self.form.salt = salt;
        self
    }

    /// Draws the row; true where the value changed.
    pub fn show(self, ui: &mut Ui) -> bool {
        let Self { value, units, form } = self;
        let check = |si| checked::<Q>(si, units);
        let si = value.si();
        let unit = unit_shown(Q::KIND, si, &form, units);
        let script = Script {
            kind: Q::KIND,
            units,
            unit,
            digits: form.digits,
            trim: form.trim,
            check: &check,
        };
        let new = form.show(ui, si, script);
        set(value, new)
    }
}

/// A nominal and its symmetric tolerance in one row; the tolerance is shown in the
/// unit of the nominal where both are of one kind. True where either changed.
pub fn quantity_with_tolerance_row<Q: Quantity, T: Quantity>(
    ui: &mut Ui,
    nominal: QuantityField<'_, Q>,
    tolerance: &mut T,
) -> bool {
    let QuantityField { value, units, form } = nominal;
    let check = |si| checked::<Q>(si, units);
    let si = value.si();
    let unit = unit_shown(Q::KIND, si, &form, units);
    let script = Script {
        kind: Q::KIND,
        units,
        unit,
        digits: form.digits,
        trim: form.trim,
        check: &check,
    };
    let tolerance_check = |si: f64| {
        if si < 0.0 {
            Err("a tolerance is 0 or more".to_owned())
        } else {
            checked::<T>(si, units)
        }
    };
    let beside = Tolerance {
        si: tolerance.si(),
        script: Script {
            kind: T::KIND,
            units,
            unit: if T::KIND == Q::KIND {
                unit
            } else {
                units.unit_for(T::KIND, tolerance.si())
            },
            digits: 3,
            trim: true,
            check: &tolerance_check,
        },
    };
    let changes = row_ui(ui, &form.row(ui, si, script), Some(&beside));
    let nominal_changed = set(value, changes.si);
    let tolerance_changed = set(tolerance, changes.tolerance_si);
    nominal_changed || tolerance_changed
}

/// What both fields can be told.
struct Form<'a> {
    label: &'a str,
    hover: Option<&'a str>,
    range: Option<(f64, f64)>,
    logarithmic: bool,
    digits: usize,
    trim: bool,
    salt: usize,
}

impl<'a> Form<'a> {
    const fn new(label: &'a str, digits: usize) -> Self {
        Self {
            label,
            hover: None,
            range: None,
            logarithmic: false,
            digits,
            trim: false,
            salt: 0,
        }
    }

    fn row(&self, ui: &Ui, si: f64, script: Script<'a>) -> Row<'a> {
        let reach = self
            .range
            .filter(|(low, high)| low.is_finite() && high.is_finite() && low < high)
            .map(|(low, high)| Reach {
                low,
                high,
                logarithmic: self.logarithmic,
            });
        let id = ui.make_persistent_id(("quantity", self.label, self.salt));
        Row {
            id,
            label: self.label,
            hover: self.hover,
            si,
            script,
            reach,
        }
    }

    fn show(&self, ui: &mut Ui, si: f64, script: Script<'a>) -> Option<f64> {
        row_ui(ui, &self.row(ui, si, script), None).si
    }
}

/// The unit follows the size of the value; of nothing, the size of the range.
fn unit_shown(kind: Kind, si: f64, form: &Form<'_>, units: &Units) -> &'static Unit {
    let size = match form.range {
        Some((_, high)) if si == 0.0 => 0.5 * high,
        _ => si,
    };
    units.unit_for(kind, size)
}

/// The SI value if it is one of `Q`; otherwise why not, in the user's units.
fn checked<Q: Quantity>(si: f64, units: &Units) -> Result<f64, String> {
    let shown = |si| units.show_si(Q::KIND, si, 4);
    match Q::from_si(si) {
        Ok(quantity) => Ok(quantity.si()),
        Err(QuantityError::Below {
            quantity,
            value,
            low,
            ..
        }) => Err(format!(
            "{quantity} of {} is below the least allowed, {}",
            shown(value),
            shown(low)
        )),
        Err(QuantityError::Above {
            quantity,
            value,
            high,
            ..
        }) => Err(format!(
            "{quantity} of {} is above the greatest allowed, {}",
            shown(value),
            shown(high)
        )),
        Err(error @ QuantityError::NotFinite { .. }) => Err(error.to_string()),
    }
}

fn set<Q: Quantity>(value: &mut Q, si: Option<f64>) -> bool {
    match si.map(Q::from_si) {
        Some(Ok(new)) if new != *value => {
            *value = new;
            true
        }
        _ => false,
    }
}
