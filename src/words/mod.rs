//! What is said: findings, regimes, requirements, events, in sentences with units.
//!
//! Window, sheet and command line all speak through this room.

mod finding;
mod missing;

pub use finding::{Said, finding};
pub use missing::{chamber_fault, condition_fault, missing, upper};

use crate::assess::{Bound, EventKind, Objection, Requirement, Severity, Side, Verdict};
use crate::chamber::{AllowableBasis, OutsideBasis};
use crate::design::NamedVolume;
use crate::fluid::{FrozenPressure, Regime, StabilityKind};
use crate::units::{Amount, Kind, NBSP, Quantity, Units, figures, unit_named};

/// The care that is always said.
pub const CAUTIONS: &[&str] = &[
    "These are calculated figures for a designer to check. Local codes and licensed practice decide.",
    "A sealed unit in a fire will burst. Nothing here covers a fire.",
    "Well-mixed room figures are never a pass: near the break it is worse.",
];

pub const fn regime(regime: Regime) -> &'static str {
    match regime {
        Regime::TwoPhase => "two-phase",
        Regime::AllVapour => "all vapour",
        Regime::LiquidFull => "liquid-full",
        Regime::Supercritical => "supercritical",
        Regime::Frozen => "frozen",
    }
}

/// The word of a regime in tables for machines.
pub const fn regime_key(regime: Regime) -> &'static str {
    match regime {
        Regime::TwoPhase => "two_phase",
        Regime::AllVapour => "all_vapour",
        Regime::LiquidFull => "liquid_full",
        Regime::Supercritical => "supercritical",
        Regime::Frozen => "frozen",
    }
}

pub const fn requirement(requirement: Requirement) -> &'static str {
    match requirement {
        Requirement::LiquidWhenHot => "liquid at the upper working temperature",
        Requirement::Ullage => "ullage at the hottest",
        Requirement::LiquidFullMargin => "temperature margin to liquid-full",
        Requirement::FrozenVolume => "room for the frozen fluid",
        Requirement::AllowablePressure => "allowable pressure",
    }
}

/// The vapour pressure over the solid, as far as it is known.
pub fn solid_pressure(pressure: FrozenPressure, units: &Units) -> String {
    let shown = units.show_to(pressure.highest(), 3);
    match pressure {
        FrozenPressure::Known(_) => format!("{shown} abs"),
        FrozenPressure::BelowEquation(_) => format!("below {shown} abs"),
        FrozenPressure::AtMostTriplePoint(_) => {
            format!("at most {shown} abs, that at the freezing point")
        }
    }
}

/// A bound's mass, rounded into the window.
pub fn bound_mass(bound: &Bound, units: &Units) -> String {
    units.show_careful(bound.mass, 4, bound.side == Side::AtMost)
}

/// An amount of gas, and what that is at room temperature and one atmosphere.
pub fn gas_amount(amount: Amount, units: &Units) -> String {
    let shown = units.show_to(amount, 2);
    if amount.mole() == 0.0 {
        return shown;
    }
    let ntp = unit_named(Kind::Amount, "mL(NTP)");
    let number = figures(ntp.number_of(amount.si()), 2);
    format!("{shown} ({number}{NBSP}{})", ntp.symbol)
}

pub const fn event(event: EventKind) -> &'static str {
    match event {
        EventKind::Freezing => "freezes",
        EventKind::DryOut => "dries out",
        EventKind::LiquidFull => "goes liquid-full",
        EventKind::Critical => "passes the critical point",
        EventKind::AllowableReached => "reaches the allowable pressure",
    }
}

/// Why a fluid is excluded, in a cell of a table.
pub const fn objection(objection: Objection) -> &'static str {
    match objection {
        Objection::Unstable(StabilityKind::SelfDecomposing) => "can decompose",
        Objection::Unstable(StabilityKind::Oxidising) => "oxidising",
        Objection::Unstable(StabilityKind::WaterReactive) => "reacts with water",
        Objection::Unstable(StabilityKind::Pyrophoric) => "ignites in air",
        Objection::Unstable(StabilityKind::PeroxideForming) => "forms peroxides",
        Objection::Unstable(StabilityKind::Hydrolysing) => "hydrolyses",
        Objection::Unstable(StabilityKind::AcidInFlame) => "gives acid in a flame",
        Objection::TooHotForFluid => "too hot for it",
        Objection::NotForConsumers => "not for consumers",
        Objection::Incompatible => "attacks the wall",
        Objection::OverAllowable => "above the allowable",
        Objection::LiquidFull => "liquid-full too soon",
        Objection::Frozen => "frozen in work",
        Objection::FrozenOnBench => "solid on the bench",
        Objection::Dry => "dry in work",
        Objection::OutsideModel => "outside its model",
    }
}

pub const fn severity(severity: Severity) -> &'static str {
    match severity {
        Severity::Error => "not fit",
        Severity::Warning => "warning",
        Severity::Note => "note",
    }
}

pub const fn verdict(verdict: Verdict) -> &'static str {
    match verdict {
        Verdict::Fit => "Fit to fill, as far as this program judges",
        Verdict::FitWithWarnings => "Fit to fill if the warnings are answered for",
        Verdict::NotFit => "Not fit: do not fill",
    }
}

/// What an allowable pressure rests on.
pub const fn basis(basis: AllowableBasis) -> &'static str {
    match basis {
        AllowableBasis::Burst => "burst pressure over its factor",
        AllowableBasis::Yield => "yield pressure over its factor",
        AllowableBasis::CodeForm => "code-form allowable stress",
        AllowableBasis::Permissible => "permissible tensile stress of glass",
        AllowableBasis::Rated => "rating stated by its maker",
        AllowableBasis::CoreCollapse => "collapse of its core tube over its factor",
        AllowableBasis::BurstAtMost => "burst pressure over its factor, last known cooler",
        AllowableBasis::YieldAtMost => "yield pressure over its factor, last known cooler",
        AllowableBasis::CodeFormAtMost => "code-form allowable stress, last known cooler",
    }
}

/// What an allowable outside pressure rests on.
pub const fn outside_basis(basis: OutsideBasis) -> &'static str {
    match basis {
        OutsideBasis::Elastic => "elastic collapse over its factor",
        OutsideBasis::Yield => "yield over its factor, ovality included",
        OutsideBasis::YieldAtMost => "yield over its factor, strength last known cooler",
        OutsideBasis::Permissible => "permissible tensile stress of glass",
        OutsideBasis::Rated => "rating stated by its maker",
    }
}

/// Which volume a fill ratio is of.
pub fn named_volume(of: &NamedVolume) -> String {
    match of {
        NamedVolume::Inside => "the inside volume".to_owned(),
        NamedVolume::VapourCore => "the vapour core".to_owned(),
        NamedVolume::WickVoid => "the void of the wick".to_owned(),
        NamedVolume::Evaporator => "the evaporator".to_owned(),
        NamedVolume::Part(name) => format!("“{name}”"),
    }
}

/// What a GHS hazard statement code says, shortened.
pub fn statement(code: &str) -> &'static str {
    if code == "EUH014" {
        return "reacts violently with water";
    }
    match code.get(..4).unwrap_or(code) {
        "H220" => "extremely flammable gas",
        "H221" => "flammable gas",
        "H224" => "extremely flammable liquid and vapour",
        "H225" => "highly flammable liquid and vapour",
        "H226" => "flammable liquid and vapour",
        "H230" => "may react explosively even without air",
        "H231" => "may react explosively even without air, under pressure or hot",
        "H250" => "catches fire by itself in air",
        "H260" => "water sets free gases that may ignite by themselves",
        "H270" => "may cause or intensify fire; oxidiser",
        "H280" => "gas under pressure; may explode if heated",
        "H281" => "refrigerated gas; cold burns",
        "H301" => "toxic if swallowed",
        "H302" => "harmful if swallowed",
        "H304" => "may be fatal if swallowed and enters airways",
        "H311" => "toxic in contact with skin",
        "H312" => "harmful in contact with skin",
        "H314" => "severe skin burns and eye damage",
        "H315" => "skin irritation",
        "H318" => "serious eye damage",
        "H319" => "serious eye irritation",
        "H330" => "fatal if inhaled",
        "H331" => "toxic if inhaled",
        "H332" => "harmful if inhaled",
        "H335" => "may irritate the airways",
        "H336" => "may cause drowsiness or dizziness",
        "H340" => "may cause genetic defects",
        "H350" => "may cause cancer",
        "H351" => "suspected of causing cancer",
        "H360" => "may damage fertility or the unborn child",
        "H361" => "suspected of damaging fertility or the unborn child",
        "H370" => "damages organs",
        "H372" => "damages organs through long exposure",
        "H373" => "may damage organs through long exposure",
        "H400" => "very toxic to aquatic life",
        "H410" => "very toxic to aquatic life with lasting effects",
        "H411" => "toxic to aquatic life with lasting effects",
        "H412" => "harmful to aquatic life with lasting effects",
        "H420" => "harms the ozone layer",
        "EUH0" => "see its safety data sheet",
        _ => "see its safety data sheet",
    }
}
