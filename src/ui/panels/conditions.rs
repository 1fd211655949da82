//! Temperatures and outside pressures, and what is demanded of the charge.

use eframe::egui::Ui;

use crate::design::Design;
use crate::ui::widgets::QuantityField;
use crate::units::{Temperature, Units};

pub fn decision(design: &Design, units: &Units) -> String {
    let conditions = &design.conditions;
    format!(
        "{} to {}",
        units.show(conditions.coldest),
        units.show(conditions.hottest)
    )
}

pub fn conditions_ui(ui: &mut Ui, design: &mut Design, units: &Units) {
    let conditions = &mut design.conditions;
    let temperature = |ui: &mut Ui, label: &str, value: &mut Temperature, hover: &str| {
        QuantityField::new(label, value, units)
            .slider(223.15, 473.15)
            .hover(hover)
            .show(ui);
    };
    temperature(
        ui,
        "Hottest",
        &mut conditions.hottest,
        "Hottest the sealed unit will ever see: storage, transport, stagnation",
    );
    temperature(
        ui,
        "Working, upper",
        &mut conditions.working_high,
        "Upper end of the working range",
    );
    temperature(
        ui,
        "Working, lower",
        &mut conditions.working_low,
        "Lower end of the working range",
    );
    temperature(
        ui,
        "Coldest",
        &mut conditions.coldest,
        "Coldest the sealed unit will ever see",
    );
    temperature(
        ui,
        "Bench",
        &mut conditions.bench,
        "Temperature at filling, where fill ratios are stated",
    );
    QuantityField::new("Outside, least", &mut conditions.least_outside, units)
        .slider(0.0, 101_325.0)
        .hover("Least pressure outside the wall, absolute; 0 in space")
        .show(ui);
    QuantityField::new("Barometer", &mut conditions.barometer, units)
        .slider(80_000.0, 105_000.0)
        .hover("Gauge pressures are counted from it")
        .show(ui);
    QuantityField::new("Across a wall", &mut conditions.across_wall, units)
        .slider(0.0, 100.0)
        .digits(3)
        .hover("Greatest difference of temperature across a wall in use: it stresses glass")
        .show(ui);
    QuantityField::new("Gas over life", &mut conditions.gas_generated, units)
        .slider(0.0, 1e-4)
        .digits(2)
        .hover(
            "Permanent gas that corrosion, leaks and decay will have made by the end of its life",
        )
        .show(ui);
}

pub fn demands_decision(design: &Design, units: &Units) -> String {
    let demands = &design.demands;
    format!(
        "ullage {}, factors {} and {}",
        units.show_to(demands.ullage, 2),
        demands.factors.on_burst.number(),
        demands.factors.on_yield.number()
    )
}

pub fn demands_ui(ui: &mut Ui, design: &mut Design, units: &Units) {
    let demands = &mut design.demands;
    QuantityField::new("Ullage", &mut demands.ullage, units)
        .slider(0.0, 0.5)
        .digits(3)
        .hover("Least share of vapour at the hottest: customary 5 %, glass 10 %")
        .show(ui);
    QuantityField::new("Below liquid-full", &mut demands.liquid_full_margin, units)
        .slider(0.0, 60.0)
        .digits(3)
        .hover("The largest charge goes liquid-full at least this far above the hottest")
        .show(ui);
    QuantityField::new("Factor on burst", &mut demands.factors.on_burst, units)
        .slider(1.0, 10.0)
        .digits(3)
        .hover("Burst pressure over allowable pressure: 4 unless the customer demands otherwise")
        .show(ui);
    QuantityField::new("Factor on yield", &mut demands.factors.on_yield, units)
        .slider(1.0, 4.0)
        .digits(3)
        .hover("Yield pressure over allowable pressure: customary 1.5")
        .show(ui);
    QuantityField::new(
        "Factor on collapse",
        &mut demands.factors.on_collapse,
        units,
    )
    .slider(1.0, 6.0)
    .digits(3)
    .hover("Elastic collapse over allowable pressure from outside: customary 3")
    .show(ui);
    QuantityField::new(
        "Joint efficiency",
        &mut demands.factors.joint_efficiency,
        units,
    )
    .slider(0.5, 1.0)
    .digits(3)
    .hover("Share of the wall's strength that its joints have")
    .show(ui);
    QuantityField::new("Gas, at most", &mut demands.gas_share, units)
        .slider(0.0, 1.0)
        .digits(2)
        .hover("Residual gas over the vapour pressure at the lower end of the working range")
        .show(ui);
}
