//! A finding in words: what, why, what to try.

use super::missing::{chamber_fault, condition_fault, missing, upper};
use super::{gas_amount, requirement, solid_pressure};
use crate::assess::{Finding, FindingKind};
use crate::chamber::Chamber;
use crate::design::Change;
use crate::fluid::{FrozenPressure, StabilityKind};
use crate::units::{Units, careful_up, figures};

/// What is said of a finding.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Said {
    /// A few words.
    pub title: String,
    /// The figure against its limit, in one or two sentences.
    pub detail: String,
    /// What would mend it.
    pub try_this: Option<String>,
    /// The button of a one-click remedy.
    pub button: Option<String>,
    /// Where the limit comes from.
    pub source: Option<String>,
}

/// The words of a finding.
pub fn finding(finding: &Finding, chamber: Option<&Chamber>, units: &Units) -> Said {
    let mut said = kind(&finding.kind, chamber, units);
    said.button = finding.remedy.as_ref().map(|remedy| match remedy {
        Change::SetCharge(mass) => format!("Set the charge to {}", units.show(*mass)),
    });
    said
}

fn say(title: &str, detail: String) -> Said {
    Said {
        title: title.to_owned(),
        detail,
        try_this: None,
        button: None,
        source: None,
    }
}

impl Said {
    fn try_this(mut self, text: &str) -> Self {
        self.try_this = Some(text.to_owned());
        self
    }

    fn source(mut self, text: &str) -> Self {
        self.source = (!text.is_empty()).then(|| text.to_owned());
        self
    }
}

fn kind(kind: &FindingKind, chamber: Option<&Chamber>, units: &Units) -> Said {
    match kind {
        FindingKind::Chamber(fault) => say("Chamber contradicts itself", chamber_fault(fault, chamber, units)),
        FindingKind::Conditions(fault) => say("Conditions contradict each other", condition_fault(fault, units)),
        FindingKind::NotKnown(reason) => say("Not known", missing(reason, units))
            .try_this("A question without an answer is never skipped: change the design or give the figure."),
        FindingKind::OverAllowable { pressure, allowable, temperature, part, formula } => say(
            "Over the allowable pressure",
            format!(
                "At {} the worst corner stands at {} abs; {part} allows {} abs.",
                units.show(*temperature),
                units.show(*pressure),
                units.show(*allowable)
            ),
        )
        .try_this("A thicker or stronger wall, a smaller bore, another fluid, or a charge inside the window.")
        .source(formula),
        FindingKind::LiquidFull { at, hottest } => say(
            "Goes liquid-full",
            format!(
                "The heaviest charge in the smallest volume is liquid-full at {}; the hottest is {}. Beyond it the pressure climbs steeply.",
                units.show(*at),
                units.show(*hottest)
            ),
        )
        .try_this("Less charge or more volume."),
        FindingKind::LiquidFullNear { at, hottest, needed } => say(
            "Too near liquid-full",
            format!(
                "Liquid-full at {}, only {} above the hottest, {}; {} is asked for.",
                units.show(*at),
                units.show_to(*at - *hottest, 3),
                units.show(*hottest),
                units.show_to(*needed, 3)
            ),
        )
        .try_this("Less charge or more volume."),
        FindingKind::Ullage { left, needed, temperature } => say(
            "Too little ullage",
            format!(
                "At {} the worst corner leaves {} of the volume for vapour; {} is asked for.",
                units.show(*temperature),
                percent(*left),
                percent(*needed)
            ),
        )
        .try_this("Less charge or more volume."),
        FindingKind::StrengthKnownCooler { part, temperature } => say(
            "Strength known only cooler",
            format!(
                "The allowable of {part} at {} rests on a strength that is known only where it is cooler; heat lowers it.",
                units.show(*temperature)
            ),
        )
        .try_this("Give the material's strength at that temperature, or keep a margin."),
        FindingKind::ToleranceLargerThanCharge { tolerance, charge } => say(
            "Tolerance not smaller than the charge",
            format!(
                "The charge is {}, its tolerance {}: a unit could be empty.",
                units.show(*charge),
                units.show_beside(*tolerance, *charge, 4)
            ),
        )
        .try_this("A tighter tolerance or more charge."),
        FindingKind::AllVapourFrom { at, hottest } => say(
            "All vapour when hot",
            format!(
                "The lightest charge has no liquid above {}; the hottest is {}.",
                units.show(*at),
                units.show(*hottest)
            ),
        ),
        FindingKind::FrozenOnBench { freezing, bench, pressure } => say(
            "Frozen on the bench",
            format!(
                "It freezes at {}; the bench is at {}.{}",
                units.show(*freezing),
                units.show(*bench),
                solid_says(*pressure, units)
            ),
        )
        .try_this("Dispense it warm, and weigh it: volumes and fill ratios on the bench do not exist."),
        FindingKind::Collapses { part, stretch, temperature, load, allowable, formula } => say(
            "Collapses under outside pressure",
            format!(
                "{}, at {}, the outside presses with {} more than the inside; {part} may bear {}.",
                upper(stretch),
                units.show(*temperature),
                units.show(*load),
                units.show(*allowable)
            ),
        )
        .try_this("A thicker, rounder or shorter wall, pillars, or a stiffer material.")
        .source(formula),
        FindingKind::CollapseNotKnown { stretch, missing: reason } => say(
            "Collapse not known",
            format!("{}, the outside presses. {}", upper(stretch), missing(reason, units)),
        )
        .try_this("Give the rating against outside pressure, or a wall whose strength is known there."),
        FindingKind::ClosureNotStated => say(
            "Closure not stated",
            "Nothing is said of how the unit is closed: its dead volume, its strength, what comes off and what relieves it.".to_owned(),
        )
        .try_this("State the closure in the chamber section."),
        FindingKind::StubNotStated { closure } => say(
            "Stub not stated",
            format!("The {closure} parts a stub from the unit. Without its mass the unit cannot be weighed after closing."),
        )
        .try_this("Give the stub's volume and mass, or weigh unit and stub together."),
        FindingKind::NoReliefReason => say(
            "No relief, no reason",
            "There is no relief device, and no reason is given why none is needed.".to_owned(),
        )
        .try_this("Name the device, or write down the reason."),
        FindingKind::ReliefTooHigh { opens_at, allowable } => say(
            "Relief opens too late",
            format!(
                "The relief device opens at {} above the outside; the weakest part allows {}.",
                units.show(*opens_at),
                units.show(*allowable)
            ),
        )
        .try_this("A device that opens below the allowable pressure."),
        FindingKind::ReliefOpensInUse { opens_at, load } => say(
            "Relief opens in use",
            format!(
                "The relief device opens at {} above the outside; the worst case stands at {}. The charge is lost into the room.",
                units.show(*opens_at),
                units.show(*load)
            ),
        )
        .try_this("A higher set pressure, less charge or another fluid."),
        FindingKind::MadeOfUnknown { parts } => say(
            "Material of a body inside not stated",
            format!("Nothing says what {parts} is made of: whether the fluid attacks it, and how it expands, is not judged."),
        )
        .try_this("Choose its material in the chamber section."),
        FindingKind::AboveCritical { hottest, critical } => say(
            "Above the critical temperature",
            format!(
                "The hottest, {}, is above the critical temperature, {}: ullage means nothing there, the pressure of the worst corner governs.",
                units.show(*hottest),
                units.show(*critical)
            ),
        ),
        FindingKind::Dry { at, working_high } => say(
            "Dries out while working",
            format!(
                "The lightest charge in the largest volume is dry at {}; the working range reaches {}.",
                units.show(*at),
                units.show(*working_high)
            ),
        )
        .try_this("More charge, less volume or a lower working temperature."),
        FindingKind::DryAboveWorking { at, hottest } => say(
            "Dries out above the working range",
            format!(
                "The lightest charge is dry above {}; the hottest is {}. The pressure then rises only slowly.",
                units.show(*at),
                units.show(*hottest)
            ),
        ),
        FindingKind::Freezes { freezing, coldest, pressure } => say(
            "Freezes in the cold",
            format!(
                "It freezes at {}; the coldest is {}.{}",
                units.show(*freezing),
                units.show(*coldest),
                solid_says(*pressure, units)
            ),
        )
        .try_this("Check that the frozen fluid harms neither wick nor wall, and that the unit starts from frozen."),
        FindingKind::FrozenInWork { freezing, working_low, pressure } => say(
            "Frozen in the working range",
            format!(
                "It freezes at {}; the working range starts at {}.{}",
                units.show(*freezing),
                units.show(*working_low),
                solid_says(*pressure, units)
            ),
        )
        .try_this("Another fluid."),
        FindingKind::FrozenVolume { greatest, allowed } => say(
            "No room for the frozen fluid",
            format!(
                "The solid is lighter than the liquid: at most {} may freeze in the smallest volume, the heaviest charge is {}.",
                units.show(*allowed),
                units.show(*greatest)
            ),
        )
        .try_this("Less charge or more volume."),
        FindingKind::EmptyWindow { lower, upper: top, lower_mass, upper_mass } => say(
            "No charge can meet every demand",
            format!(
                "“{}” asks for at least {}, “{}” allows at most {}.",
                upper(requirement(*lower)),
                units.show(*lower_mass),
                requirement(*top),
                units.show(*upper_mass)
            ),
        )
        .try_this("More volume, a stronger wall or another fluid."),
        FindingKind::BalanceTooCoarse { balance, tolerance } => say(
            "Balance too coarse",
            format!(
                "The balance is uncertain by {}; the charge may deviate by {} only, so no scale reading would prove it.",
                units.show_to(*balance, 2),
                units.show_to(*tolerance, 3)
            ),
        )
        .try_this("A finer balance or a wider tolerance."),
        FindingKind::VacuumNotStated => say(
            "Vacuum not stated",
            "Nothing is said of the gas left in the unit as it is sealed: no pressure here includes it.".to_owned(),
        )
        .try_this("State the vacuum that the bench reaches, and whether the fluid is degassed."),
        FindingKind::VacuumBelowZero { pressure } => say(
            "Vacuum below zero",
            format!("The gas left at the seal is stated as {} abs.", units.show(*pressure)),
        )
        .try_this("Give it as an absolute pressure; a perfect vacuum is 0."),
        FindingKind::NotDegassed { amount } => say(
            "Fluid not degassed",
            format!("It brings {} of the bench's air with it, dissolved.", gas_amount(*amount, units)),
        )
        .try_this("Degas it before the seal."),
        FindingKind::DissolvedAirNotKnown => say(
            "Dissolved air not known",
            "The fluid is not degassed, and how much air it takes up is not recorded: that gas is not counted.".to_owned(),
        )
        .try_this("Degassing is mandatory with this fluid: do it, and say so under the bench."),
        FindingKind::GasAboveShare { pressure, temperature, of_saturation, allowed } => {
            let title = if *of_saturation > 1.0 {
                "More residual gas than vapour"
            } else {
                "Much residual gas"
            };
            say(
                title,
                format!(
                    "At {} the gas stands at {}, {} of the vapour pressure there; {} is asked for.",
                    units.show(*temperature),
                    units.show_to(*pressure, 3),
                    percent(*of_saturation),
                    percent(*allowed)
                ),
            )
            .try_this("Reach a better vacuum, degas the fluid, leave the gas more room by less charge, or get what makes it (metal, seals) out of the unit.")
        }
        FindingKind::Incompatible { material, reason, source } => {
            say("Fluid attacks the wall", format!("{material}: {reason}.")).try_this("Another wall or another fluid.").source(source)
        }
        FindingKind::PairCaution { material, reason, source } => {
            say("Fluid and wall need care", format!("{material}: {reason}.")).source(source)
        }
        FindingKind::PairNotKnown { material } => say(
            "Fluid and wall not known as a pair",
            format!("Nothing is recorded of this fluid in {material}."),
        )
        .try_this("Make a life test, or find one."),
        FindingKind::Flammable { ppm, of_limit, source } => say(
            "Flammable",
            format!(
                "The whole charge in the room gives {}, {} of the lower flammable limit when well mixed. Near the break it can burn.",
                ppm_text(*ppm),
                percent(*of_limit)
            ),
        )
        .try_this("No flame and no spark at the bench; ventilate.")
        .source(source),
        FindingKind::BurnsWithDifficulty { of_limit, source } => say(
            "Burns with difficulty",
            format!(
                "It is not classed as flammable, yet has a flammable range; the whole charge in the room gives {} of its lower limit.",
                percent(*of_limit)
            ),
        )
        .source(source),
        FindingKind::Toxic { ppm, limit_ppm, dangerous_ppm, source } => {
            let limit = limit_ppm.map_or_else(String::new, |l| format!("; exposure limit {}", ppm_text(l)));
            let danger = dangerous_ppm
                .map_or_else(String::new, |l| format!("; immediately dangerous at {}", ppm_text(l)));
            say("Harmful to breathe", format!("The whole charge in the room gives {}{limit}{danger}.", ppm_text(*ppm)))
                .try_this("Ventilate; leave the room if a unit breaks.")
                .source(source)
        }
        FindingKind::Corrosive { keep_dry, source } => {
            say("Burns skin and eyes", "Liquid and vapour are corrosive.".to_owned())
                .try_this(if *keep_dry {
                    "Goggles, face shield, dry gloves; no water near it. Take it off the skin dry, then rinse long."
                } else {
                    "Goggles, gloves, and water at hand."
                })
                .source(source)
        }
        FindingKind::Asphyxiant { oxygen } => say(
            "Displaces air",
            format!("With the whole charge in the room the air keeps {:.1} % oxygen; below 19.5 % nobody may enter.", 100.0 * oxygen),
        ),
        FindingKind::NoHazardLimits => say(
            "No hazard figures",
            "The fluid is classed as harmful, yet no exposure limit is recorded. Not known is not harmless.".to_owned(),
        ),
        FindingKind::BrittleGlass { part, bears } => say(
            "Brittle glass",
            format!(
                "{} is glass: it breaks without warning, from a scratch or a shock.{}",
                upper(part),
                bears.map_or_else(String::new, |bears| format!(
                    " Empty, it bears a bath that is {} hotter or colder at most.",
                    units.show_careful(bears, 2, true)
                ))
            ),
        )
        .try_this("Shield it, wear eye protection, never plunge it hot or cold."),
        FindingKind::NotForConsumers { reason, source } => {
            say("Not for consumers", format!("{}.", reason.trim_end_matches('.')))
                .try_this("Another fluid, or keep it out of the public's hands; check the country's rules.")
                .source(source)
        }
        FindingKind::Unstable { kind, note, source } => say(stability(*kind), format!("{}.", upper(note.trim_end_matches('.')))).source(source),
        FindingKind::TooHotForFluid { stable, hottest, source } => say(
            "Too hot for the fluid",
            format!("It is stable up to {}; the hottest is {}.", units.show(*stable), units.show(*hottest)),
        )
        .try_this("Another fluid.")
        .source(source),
        FindingKind::FactorsBelowDefault { on_burst, on_yield, on_collapse } => say(
            "Factors below the customary",
            format!("Burst is divided by {on_burst}, yield by {on_yield}, collapse by {on_collapse}; customary are 4, 1.5 and 3."),
        )
        .try_this("Say on the sheet who answers for them."),
        FindingKind::Rupture { energy } => say(
            "Stored energy",
            format!("A rupture at the hottest sets free {}.", units.show_to(*energy, 2)),
        ),
        FindingKind::RuptureNotComputed { reason } => {
            say("Stored energy not computed", format!("{}. Treat it as high.", upper(reason)))
        }
        FindingKind::ModelUncertainty { percent } => say(
            "Pressure less well known",
            format!(
                "The model of this fluid gives its pressure within {} %, which the worst case includes.",
                figures(careful_up(*percent, 2), 2)
            ),
        ),
        FindingKind::OwnFluid { file } => say(
            "Your own fluid",
            format!("Its hazards and all its figures are your own, from {file}; nobody else has checked them."),
        )
        .try_this("Hold every figure of that file against its source, and have a second person do so."),
        FindingKind::OwnMaterial { file, name } => say(
            "Your own material",
            format!("All figures of {name} are your own, from {file}; nobody else has checked them."),
        )
        .try_this("Hold every figure of that file against its source, and have a second person do so."),
        FindingKind::FromMemory { what } => {
            say("To be confirmed", format!("From memory of a named document: {what}."))
        }
    }
}

/// What is known of the vapour pressure over the solid, as a sentence after others.
fn solid_says(pressure: Option<FrozenPressure>, units: &Units) -> String {
    pressure.map_or_else(String::new, |pressure| {
        format!(
            " The solid's vapour pressure is then {}.",
            solid_pressure(pressure, units)
        )
    })
}

fn stability(kind: StabilityKind) -> &'static str {
    match kind {
        StabilityKind::SelfDecomposing => "Decomposes by itself",
        StabilityKind::Oxidising => "Feeds fire",
        StabilityKind::WaterReactive => "Reacts with water",
        StabilityKind::Pyrophoric => "Ignites in air",
        StabilityKind::PeroxideForming => "Forms peroxides",
        StabilityKind::Hydrolysing => "Hydrolyses",
        StabilityKind::AcidInFlame => "Makes acid in a flame",
    }
}

fn percent(share: f64) -> String {
    format!("{} %", figures(100.0 * share, 3)).replace(' ', "\u{a0}")
}

fn ppm_text(ppm: f64) -> String {
    format!("{}\u{a0}ppm", figures(ppm, 3))
}
