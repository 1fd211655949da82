//! What the sheet says of residual gas, apart from the fluid's own pressure.

use super::page::Page;
use crate::assess::{Assessment, DissolvedAir, ResidualGas, WorstCase};
use crate::design::Design;
use crate::fluid::State;
use crate::units::{Pressure, Temperature, Units, figures};
use crate::words;

/// The vacuum to reach, and whether the fluid is to be degassed.
pub fn before_filling(page: &mut Page, design: &Design, a: &Assessment, units: &Units) {
    let Some(vacuum) = design.bench.vacuum else {
        page.row("Vacuum to reach", "not stated: no gas is counted");
        page.blank_row("Vacuum reached");
        return;
    };
    let stands_for = match &a.gas {
        Ok(ResidualGas {
            headspace: Some(amount),
            ..
        }) => format!(", for {} of gas", words::gas_amount(*amount, units)),
        _ => String::new(),
    };
    page.row(
        "Vacuum to reach",
        &format!(
            "{} abs at the seal, besides the fluid's vapour{stands_for}",
            units.show(vacuum)
        ),
    );
    for part in &design.chamber.parts {
        if let Some(at) = part.sealing_temperature {
            page.row(
                "While it is sealed",
                &format!("{} at {}", part.name, units.show(at)),
            );
        }
    }
    page.blank_row("Vacuum reached");
    let Ok(gas) = &a.gas else { return };
    let text = match gas.dissolved {
        DissolvedAir::NotStated => return,
        DissolvedAir::Degassed(_) => "mandatory: its air is counted as taken out".to_owned(),
        DissolvedAir::FromCylinder => {
            "none: it comes from a closed cylinder, whose gas is its supplier's to state".to_owned()
        }
        DissolvedAir::Saturated(amount) => format!(
            "not counted on: {} of dissolved air stay in",
            words::gas_amount(amount, units)
        ),
        DissolvedAir::NotKnown => {
            "mandatory: how much air the fluid takes up is not known".to_owned()
        }
    };
    page.row("Degassing of the fluid", &text);
}

/// Where it comes from, what it stands at, what it costs; nothing where none is counted.
pub fn residual_gas(page: &mut Page, design: &Design, a: &Assessment, units: &Units) {
    let Ok(gas) = &a.gas else { return };
    if gas.total.mole() == 0.0 {
        return;
    }
    page.heading("RESIDUAL GAS");
    if let Some(headspace) = gas.headspace {
        page.row(
            "Left above the liquid",
            &words::gas_amount(headspace, units),
        );
    }
    if let DissolvedAir::Degassed(amount) | DissolvedAir::Saturated(amount) = gas.dissolved
        && amount.mole() > 0.0
    {
        page.row("Dissolved in the liquid", &words::gas_amount(amount, units));
    }
    if gas.generated.mole() > 0.0 {
        page.row(
            "Made over life, as stated",
            &words::gas_amount(gas.generated, units),
        );
    }
    page.row("Together", &words::gas_amount(gas.total, units));
    page.paragraph(
        "Absolute pressures, heaviest charge in the smallest volume: fluid alone + gas = both.",
    );
    let conditions = &design.conditions;
    let mut told: Vec<Temperature> = Vec::new();
    for (at, state) in [
        (conditions.working_low, &gas.at_working_low),
        (conditions.bench, &gas.at_bench),
        (conditions.working_high, &gas.at_working_high),
        (conditions.hottest, &gas.at_hottest),
    ] {
        if told.contains(&at) {
            continue;
        }
        told.push(at);
        let text = state.as_ref().map_or_else(
            |missing| words::missing(missing, units),
            |state| sum(state, units),
        );
        let label = format!("  at {}", units.show(at).replace('\u{a0}', " "));
        page.row(&label, &text);
    }
    if let Ok(share) = gas.of_saturation {
        page.row(
            "Of the vapour pressure",
            &format!(
                "{} % at {}",
                figures(100.0 * share, 2),
                units.show(conditions.working_low)
            ),
        );
    }
    if let Some(lift) = gas.lift {
        page.row(
            "Lift lost to it, at most",
            &format!(
                "{}, or {} of difference, at {}",
                units.show_to(lift.column, 2),
                units.show_to(lift.difference, 2),
                units.show(conditions.working_low)
            ),
        );
    }
    if let Some(blocked) = gas.blocked {
        page.row(
            "Condenser blocked by it",
            &format!(
                "{}, vapour at {}, cold end at {} (flat front)",
                units.show_to(blocked.length, 2),
                units.show(blocked.vapour),
                units.show(blocked.cold_end)
            ),
        );
    }
}

/// What gas has its share in the governing pressure.
pub fn in_worst_case(page: &mut Page, case: &WorstCase, units: &Units) {
    if let Some(gas) = case.state.gas {
        page.row("Of it residual gas", &shown(gas, units));
    }
}

fn sum(state: &State, units: &Units) -> String {
    let gas = state
        .gas
        .map_or_else(|| "0".to_owned(), |gas| shown(gas, units));
    format!(
        "{} + {gas} = {} ({})",
        units.show(state.own_pressure()),
        units.show(state.pressure),
        words::regime(state.regime)
    )
}

fn shown(gas: Pressure, units: &Units) -> String {
    units.show_to(gas, 3)
}
