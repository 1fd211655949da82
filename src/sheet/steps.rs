//! The steps of the fill, with the temperatures and pressures of this very fluid.

use super::page::Page;
use crate::assess::{Assessment, DissolvedAir, FindingKind};
use crate::conditions::STANDARD_ATMOSPHERE_PA;
use crate::design::Design;
use crate::fluid::{Fluid, FluidError, StabilityKind};
use crate::units::{Kind, Units};

/// Dry ice sublimes at −78.5 °C and liquid nitrogen boils at 77.36 K under one
/// atmosphere (CRC Handbook of Chemistry and Physics, from memory).
const DRY_ICE_K: f64 = 194.65;
const LIQUID_NITROGEN_K: f64 = 77.36;
/// Below it air condenses into an open vessel: liquid oxygen (boils at 90.2 K).
const OXYGEN_CONDENSES_K: f64 = 90.2;

pub fn steps(page: &mut Page, design: &Design, a: &Assessment, units: &Units) {
    page.heading("STEPS");
    let fluid = &a.fluid;
    page.item(
        "[ ]",
        "Evacuate the clean, proven unit; close the valve; read the tare.",
    );
    let is_gas = transfer(page, design, a, units);
    page.item("[ ]", "Dispense by weight until the scale is inside row 1.");
    if is_gas {
        if design.bench.purge_loss.kilogram() > 0.0 {
            page.item(
                "[ ]",
                "Let the purge loss off into a recovery line, never into the room.",
            );
        }
    } else {
        remove_air(page, design, fluid, units);
    }
    if a.findings
        .iter()
        .any(|f| matches!(f.kind, FindingKind::BrittleGlass { .. }))
    {
        page.item(
            " ! ",
            "Never plunge glass into a cold bath; cool slowly. Close glass in the flame only while the inside is \
             below the outside pressure.",
        );
    }
    let safety = fluid.safety();
    if safety.is_flammable() {
        page.item(
            " ! ",
            "Flammable vapour: no flame, no hot seal, until no vapour is near the joint.",
        );
    }
    // The note names the acid of this very fluid.
    for acid in safety
        .stability
        .iter()
        .filter(|s| s.kind == StabilityKind::AcidInFlame)
    {
        let note = acid.note.trim_end_matches('.');
        page.item(" ! ", &format!("{note}: purge the joint before any flame."));
    }
    if let Some(vacuum) = design.bench.vacuum {
        page.item(
            "[ ]",
            &format!(
                "Seal only while the gas in the unit, besides the fluid's vapour, is at or below {} abs.",
                units.show(vacuum)
            ),
        );
    }
    page.item(
        "[ ]",
        "Seal. Weigh unit and stub: the sealed mass must be inside row 2.",
    );
}

/// How the fluid gets in; true where it comes as a gas under pressure.
fn transfer(page: &mut Page, design: &Design, a: &Assessment, units: &Units) -> bool {
    let fluid = &a.fluid;
    let bench = design.conditions.bench;
    match fluid.saturation_pressure(bench) {
        Ok(p) if p.pascal() > STANDARD_ATMOSPHERE_PA => {
            page.item(
                "[ ]",
                &format!(
                    "The fluid stands at {} abs on the bench: transfer it from its cylinder through a closed line \
                     into the unit, which is kept colder than the cylinder. Never into an open one.",
                    units.show(p)
                ),
            );
            true
        }
        Ok(p) => {
            page.item(
                "[ ]",
                &format!(
                    "Degas the fluid{}: it boils at {} abs on the bench. Dissolved air not removed here stays in the \
                     unit.",
                    mandatory(a),
                    units.show(p)
                ),
            );
            false
        }
        Err(FluidError::NoSaturation { .. }) => {
            page.item(
                "[ ]",
                "Above its critical temperature the fluid has no liquid on the bench: charge it as a gas through a \
                 closed line, by weight.",
            );
            true
        }
        Err(FluidError::Frozen { .. }) => {
            page.item(
                "[ ]",
                &format!(
                    "The fluid is solid on the bench: warm fluid and unit above {} to dispense it.",
                    units.show(fluid.freezing_point())
                ),
            );
            false
        }
        Err(_) => {
            page.item(
                "[ ]",
                "The bench is outside the fluid's model: ask for its vapour pressure before it is opened.",
            );
            false
        }
    }
}

/// Whether the design stands or falls with it.
fn mandatory(a: &Assessment) -> &'static str {
    match a.gas.as_ref().map(|gas| gas.dissolved) {
        Ok(DissolvedAir::Degassed(_)) => " (mandatory: its air is counted as taken out)",
        Ok(DissolvedAir::NotKnown) => " (mandatory: nobody knows how much air it brings)",
        _ => "",
    }
}

/// Freeze, evacuate and thaw, or boil off; and which bath freezes it.
fn remove_air(page: &mut Page, design: &Design, fluid: &Fluid, units: &Units) {
    let freezing = fluid.freezing_point();
    let show = |kelvin: f64| units.show_si(Kind::Temperature, kelvin, 4);
    let bath = |name: &str, kelvin: f64| {
        let verb = if kelvin < freezing.kelvin() {
            "freezes"
        } else {
            "does not freeze"
        };
        format!("{name} ({}) {verb} it", show(kelvin))
    };
    let or_purge = match design.bench.purge_loss.kilogram() {
        0.0 => "",
        _ => "; or boil off the purge loss into a cold trap",
    };
    page.item(
        "[ ]",
        &format!(
            "Freeze, evacuate, thaw, repeat{or_purge}. It melts at {}: {}; {}.",
            units.show(freezing),
            bath("dry ice", DRY_ICE_K),
            bath("liquid nitrogen", LIQUID_NITROGEN_K)
        ),
    );
    if freezing.kelvin() > LIQUID_NITROGEN_K && freezing.kelvin() < DRY_ICE_K {
        page.item(
            " ! ",
            &format!(
                "Below {} never open the unit to air: oxygen condenses, and with an organic it explodes.",
                show(OXYGEN_CONDENSES_K)
            ),
        );
    }
    page.item(" ! ", "Thaw from the top, so that the melt has room.");
    page.item(" ! ", "If gas has condensed in the unit, do not seal it.");
}
