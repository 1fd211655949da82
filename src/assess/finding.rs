//! What an assessment found: data; the words are elsewhere.

use super::figure::Missing;
use super::window::Requirement;
use crate::chamber::ChamberFault;
use crate::conditions::ConditionFault;
use crate::design::Change;
use crate::fluid::{FrozenPressure, StabilityKind};
use crate::units::{Amount, Energy, Mass, Pressure, Temperature, TemperatureDifference};

/// How much a finding weighs; worst first.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Severity {
    /// The design is not fit.
    Error,
    /// Fit, if somebody answers for it.
    Warning,
    /// To be known.
    Note,
}

/// Where in the design a finding comes from; clicking it leads there.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum Section {
    Conditions,
    Exposures,
    Demands,
    Fluid,
    Chamber,
    Charge,
    Room,
    Bench,
}

/// A share of a limit: 1 is the limit, more is beyond.
pub type Share = f64;

/// One finding.
#[derive(Debug, Clone, PartialEq)]
pub struct Finding {
    pub severity: Severity,
    pub section: Section,
    pub kind: FindingKind,
    /// How much of its limit is used, for a margin bar.
    pub share: Option<Share>,
    /// What one click would mend it with.
    pub remedy: Option<Change>,
}

/// What was found, with its figures.
#[derive(Debug, Clone, PartialEq)]
pub enum FindingKind {
    Chamber(ChamberFault),
    Conditions(ConditionFault),
    /// A figure that the verdict needs is not known.
    NotKnown(Missing),
    OverAllowable {
        pressure: Pressure,
        allowable: Pressure,
        temperature: Temperature,
        part: String,
        formula: &'static str,
    },
    LiquidFull {
        at: Temperature,
        hottest: Temperature,
    },
    LiquidFullNear {
        at: Temperature,
        hottest: Temperature,
        needed: TemperatureDifference,
    },
    Ullage {
        left: f64,
        needed: f64,
        temperature: Temperature,
    },
    /// The allowable rests on a strength that is known only where it is cooler.
    StrengthKnownCooler {
        part: String,
        temperature: Temperature,
    },
    /// A unit could be empty.
    ToleranceLargerThanCharge {
        tolerance: Mass,
        charge: Mass,
    },
    /// A plain vessel without liquid from here up.
    AllVapourFrom {
        at: Temperature,
        hottest: Temperature,
    },
    FrozenOnBench {
        freezing: Temperature,
        bench: Temperature,
        pressure: Option<FrozenPressure>,
    },
    /// More pressure outside than a wall may bear.
    Collapses {
        part: String,
        stretch: String,
        temperature: Temperature,
        load: Pressure,
        allowable: Pressure,
        formula: &'static str,
    },
    CollapseNotKnown {
        stretch: String,
        missing: Missing,
    },
    ClosureNotStated,
    /// A stub comes off, and nothing is said of it.
    StubNotStated {
        closure: &'static str,
    },
    /// Neither a relief device nor a reason for none.
    NoReliefReason,
    ReliefTooHigh {
        opens_at: Pressure,
        allowable: Pressure,
    },
    ReliefOpensInUse {
        opens_at: Pressure,
        load: Pressure,
    },
    /// What lies inside has no material: nothing is known of it with the fluid.
    MadeOfUnknown {
        parts: String,
    },
    /// Above the critical temperature ullage means nothing; the pressure governs.
    AboveCritical {
        hottest: Temperature,
        critical: Temperature,
    },
    Dry {
        at: Temperature,
        working_high: Temperature,
    },
    DryAboveWorking {
        at: Temperature,
        hottest: Temperature,
    },
    Freezes {
        freezing: Temperature,
        coldest: Temperature,
        pressure: Option<FrozenPressure>,
    },
    FrozenInWork {
        freezing: Temperature,
        working_low: Temperature,
        pressure: Option<FrozenPressure>,
    },
    FrozenVolume {
        greatest: Mass,
        allowed: Mass,
    },
    EmptyWindow {
        lower: Requirement,
        upper: Requirement,
        lower_mass: Mass,
        upper_mass: Mass,
    },
    /// Guard bands on both sides would leave no scale reading.
    BalanceTooCoarse {
        balance: Mass,
        tolerance: Mass,
    },
    /// Nothing is said of the gas that is sealed in.
    VacuumNotStated,
    VacuumBelowZero {
        pressure: Pressure,
    },
    /// The liquid brings the air of the bench with it.
    NotDegassed {
        amount: Amount,
    },
    /// Likewise, and nobody knows how much.
    DissolvedAirNotKnown,
    /// Residual gas over the share of the vapour pressure that is allowed.
    GasAboveShare {
        pressure: Pressure,
        temperature: Temperature,
        of_saturation: Share,
        allowed: Share,
    },
    Incompatible {
        material: String,
        reason: String,
        source: String,
    },
    PairCaution {
        material: String,
        reason: String,
        source: String,
    },
    PairNotKnown {
        material: String,
    },
    Flammable {
        ppm: f64,
        of_limit: f64,
        source: String,
    },
    BurnsWithDifficulty {
        of_limit: f64,
        source: String,
    },
    Toxic {
        ppm: f64,
        limit_ppm: Option<f64>,
        dangerous_ppm: Option<f64>,
        source: String,
    },
    Corrosive {
        /// Water makes it worse.
        keep_dry: bool,
        source: String,
    },
    Asphyxiant {
        oxygen: f64,
    },
    NoHazardLimits,
    BrittleGlass {
        part: String,
        /// Difference to a bath that it bears without load.
        bears: Option<TemperatureDifference>,
    },
    NotForConsumers {
        reason: String,
        source: String,
    },
    Unstable {
        kind: StabilityKind,
        note: String,
        source: String,
    },
    TooHotForFluid {
        stable: Temperature,
        hottest: Temperature,
        source: String,
    },
    FactorsBelowDefault {
        on_burst: f64,
        on_yield: f64,
        on_collapse: f64,
    },
    Rupture {
        energy: Energy,
    },
    RuptureNotComputed {
        reason: String,
    },
    ModelUncertainty {
        percent: f64,
    },
    /// The fluid is the user's own: nobody else answers for its figures.
    OwnFluid {
        file: String,
    },
    /// A material of the chamber is the user's own, likewise.
    OwnMaterial {
        file: String,
        name: String,
    },
    FromMemory {
        what: String,
    },
}

/// The verdict in a word.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum Verdict {
    Fit,
    /// Fit with warnings that somebody must answer for.
    FitWithWarnings,
    NotFit,
}

impl Verdict {
    /// The verdict that follows from the findings.
    pub fn of(findings: &[Finding]) -> Self {
        match findings.iter().map(|finding| finding.severity).min() {
            Some(Severity::Error) => Self::NotFit,
            Some(Severity::Warning) => Self::FitWithWarnings,
            _ => Self::Fit,
        }
    }
}
