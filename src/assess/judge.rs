//! From figures to findings: one function a question, each in one place.

use super::figure::Missing;
use super::finding::{Finding, FindingKind, Remedy, Section, Severity};
use super::window::Requirement;
use super::{Assessment, Library};
use crate::chamber::{MaterialKind, StrengthGap};
use crate::design::{Design, Duty};
use crate::fluid::{Model, Regime, StabilityKind};
use crate::hazard::{Compatibility, CompatibilityTable, PairVerdict};
use crate::units::Temperature;

/// Oxygen below which a room is dangerous to enter: 19.5 %, OSHA 29 CFR 1910.134
/// (from memory).
const LEAST_OXYGEN: f64 = 0.195;

/// Every finding, worst first; within a severity in the order of the questions.
pub fn findings(design: &Design, library: &Library, a: &Assessment) -> Vec<Finding> {
    let mut judge = Judge {
        design,
        library,
        a,
        found: Vec::new(),
    };
    judge.contradictions();
    judge.not_known();
    judge.pressure();
    judge.liquid_full();
    judge.dry_out();
    judge.freezing();
    judge.window();
    judge.balance();
    judge.pair();
    judge.stability();
    judge.fire();
    judge.poison();
    judge.glass();
    judge.rupture();
    judge.provenance();
    judge.found.sort_by_key(|finding| finding.severity);
    judge.found
}

struct Judge<'a> {
    design: &'a Design,
    library: &'a Library,
    a: &'a Assessment,
    found: Vec<Finding>,
}

impl Judge<'_> {
    fn add(&mut self, severity: Severity, section: Section, kind: FindingKind) {
        self.found.push(Finding {
            severity,
            section,
            kind,
            share: None,
            remedy: None,
        });
    }

    fn add_share(&mut self, severity: Severity, section: Section, kind: FindingKind, share: f64) {
        let remedy = (severity == Severity::Error && section == Section::Charge)
            .then(|| {
                self.a
                    .nearest_charge(self.design.charge.tolerance)
                    .map(Remedy::SetCharge)
            })
            .flatten();
        self.found.push(Finding {
            severity,
            section,
            kind,
            share: Some(share),
            remedy,
        });
    }

    fn contradictions(&mut self) {
        for fault in self.design.chamber.faults(&self.library.materials) {
            self.add(
                Severity::Error,
                Section::Chamber,
                FindingKind::Chamber(fault),
            );
        }
        for fault in self.design.conditions.faults() {
            self.add(
                Severity::Error,
                Section::Conditions,
                FindingKind::Conditions(fault),
            );
        }
    }

    /// Each root of a missing figure once: what depends on it shows a dash.
    fn not_known(&mut self) {
        let a = self.a;
        let mut roots: Vec<(Section, Missing)> = Vec::new();
        let mut root = |section, missing: Option<&Missing>| {
            if let Some(missing) = missing
                && !roots.iter().any(|(_, known)| known == missing)
            {
                roots.push((section, missing.clone()));
            }
        };
        root(Section::Charge, a.charge.as_ref().err());
        root(Section::Charge, a.corners.as_ref().err());
        root(Section::Conditions, a.worst.as_ref().err());
        if let Ok(case) = &a.worst
            && let Err(unknown) = &case.weakest
        {
            root(Section::Chamber, Some(&Missing::Strength(unknown.clone())));
        }
        root(Section::Conditions, a.window.as_ref().err());
        root(Section::Room, a.release.as_ref().err());
        for (section, missing) in roots {
            // Contradictions have findings of their own.
            let told = matches!(
                missing,
                Missing::Chamber(_)
                    | Missing::Conditions
                    | Missing::Strength(crate::chamber::StrengthUnknown {
                        reason: StrengthGap::NoSize
                            | StrengthGap::UnknownMaterial
                            | StrengthGap::NoWall,
                        part: Some(_),
                        ..
                    })
            );
            let already = told
                && self
                    .found
                    .iter()
                    .any(|finding| finding.severity == Severity::Error);
            if already {
                continue;
            }
            self.add(Severity::Error, section, FindingKind::NotKnown(missing));
        }
    }

    fn pressure(&mut self) {
        let Ok(case) = &self.a.worst else { return };
        let (Ok(weakest), Ok(share)) = (&case.weakest, &case.of_allowable) else {
            return;
        };
        if *share > 1.0 {
            let outside = self.design.conditions.least_outside.pascal();
            let allowable =
                crate::units::Pressure::from_pascal(weakest.allowable.pressure.pascal() + outside)
                    .unwrap_or(weakest.allowable.pressure);
            let kind = FindingKind::OverAllowable {
                pressure: case.pressure,
                allowable,
                temperature: case.temperature,
                part: weakest.name.to_string(),
            };
            // Whether less charge helps is the window's to say: its nearest charge is the remedy.
            self.add_share(Severity::Error, Section::Charge, kind, *share);
        }
        if self.design.demands.factors.below_default() {
            let factors = self.design.demands.factors;
            self.add(
                Severity::Warning,
                Section::Chamber,
                FindingKind::FactorsBelowDefault {
                    on_burst: factors.on_burst.number(),
                    on_yield: factors.on_yield.number(),
                },
            );
        }
    }

    fn liquid_full(&mut self) {
        let (Ok(corners), Ok(full_at)) = (&self.a.corners, &self.a.heaviest_full_at) else {
            return;
        };
        let hottest = self.design.conditions.hottest;
        let fluid = &self.a.fluid;
        let critical = fluid.critical();
        if hottest.kelvin() >= critical.temperature_k {
            if let Ok(critical) = Temperature::from_kelvin(critical.temperature_k) {
                let kind = FindingKind::AboveCritical { hottest, critical };
                self.add(Severity::Note, Section::Conditions, kind);
            }
            return;
        }
        let state = corners.heaviest.state(hottest);
        if let Some(at) = *full_at {
            let needed = self.design.demands.liquid_full_margin;
            if at <= hottest {
                let kind = FindingKind::LiquidFull { at, hottest };
                self.add_share(Severity::Error, Section::Charge, kind, 1.0);
                return;
            }
            let left = (at - hottest).kelvin();
            if left < needed.kelvin() {
                let kind = FindingKind::LiquidFullNear {
                    at,
                    hottest,
                    needed,
                };
                self.add_share(
                    Severity::Error,
                    Section::Charge,
                    kind,
                    needed.kelvin() / left,
                );
            }
        }
        if let Ok(state) = state
            && state.regime == Regime::TwoPhase
            && let Some(liquid) = state.liquid_share
        {
            let (left, needed) = (1.0 - liquid, self.design.demands.ullage.fraction());
            if left < needed {
                let kind = FindingKind::Ullage {
                    left,
                    needed,
                    temperature: hottest,
                };
                self.add_share(Severity::Error, Section::Charge, kind, needed / left);
            }
        }
    }

    fn dry_out(&mut self) {
        if self.design.duty == Duty::PlainVessel {
            return;
        }
        let (Ok(dry_at), true) = (&self.a.lightest_dry_at, self.a.charge.is_ok()) else {
            return;
        };
        let Some(at) = *dry_at else { return };
        let conditions = &self.design.conditions;
        let working_high = conditions.working_high;
        if at <= working_high {
            let kind = FindingKind::Dry { at, working_high };
            self.add_share(Severity::Error, Section::Charge, kind, 1.0);
        } else if at < conditions.hottest {
            let kind = FindingKind::DryAboveWorking {
                at,
                hottest: conditions.hottest,
            };
            self.add(Severity::Note, Section::Charge, kind);
        }
    }

    fn freezing(&mut self) {
        let conditions = &self.design.conditions;
        let freezing = self.a.fluid.freezing_point();
        if conditions.coldest >= freezing {
            return;
        }
        if conditions.working_low < freezing {
            let kind = FindingKind::FrozenInWork {
                freezing,
                working_low: conditions.working_low,
            };
            self.add(Severity::Error, Section::Conditions, kind);
        } else {
            let kind = FindingKind::Freezes {
                freezing,
                coldest: conditions.coldest,
            };
            self.add(Severity::Warning, Section::Conditions, kind);
        }
        let (Ok(charge), Ok(window)) = (&self.a.charge, &self.a.window) else {
            return;
        };
        let frozen = window
            .bounds
            .iter()
            .find(|bound| bound.requirement == Requirement::FrozenVolume);
        if let Some(bound) = frozen
            && charge.greatest > bound.mass
        {
            let kind = FindingKind::FrozenVolume {
                greatest: charge.greatest,
                allowed: bound.mass,
            };
            let share = charge.greatest.kilogram() / bound.mass.kilogram();
            self.add_share(Severity::Error, Section::Charge, kind, share);
        }
    }

    fn window(&mut self) {
        let Ok(window) = &self.a.window else { return };
        if window.is_empty()
            && let (Some(lower), Some(upper)) = (&window.lower, &window.upper)
        {
            let kind = FindingKind::EmptyWindow {
                lower: lower.requirement,
                upper: upper.requirement,
                lower_mass: lower.mass,
                upper_mass: upper.mass,
            };
            self.add(Severity::Error, Section::Chamber, kind);
        }
    }

    fn balance(&mut self) {
        let (balance, tolerance) = (self.design.bench.balance, self.design.charge.tolerance);
        if balance >= tolerance {
            let share = balance.kilogram() / tolerance.kilogram().max(f64::MIN_POSITIVE);
            let kind = FindingKind::BalanceTooCoarse { balance, tolerance };
            self.found.push(Finding {
                severity: Severity::Error,
                section: Section::Bench,
                kind,
                share: Some(share.min(f64::MAX.sqrt())),
                remedy: None,
            });
        }
    }

    fn pair(&mut self) {
        let table = CompatibilityTable::built_in();
        // A row of the table may hold for several walls: it is said once, of all of them.
        let mut told: Vec<(Option<&Compatibility>, Vec<&str>)> = Vec::new();
        for wall in self
            .design
            .chamber
            .parts
            .iter()
            .filter_map(|part| part.wall.as_ref())
        {
            let Some(material) = self.library.materials.get(&wall.material) else {
                continue;
            };
            let pair = table.of(self.a.fluid.id(), &wall.material);
            match told.iter_mut().find(|(known, _)| *known == pair) {
                Some((_, names)) if names.contains(&material.name.as_str()) => {}
                Some((_, names)) => names.push(&material.name),
                None => told.push((pair, vec![&material.name])),
            }
        }
        for (pair, names) in told {
            let material = names.join(", ");
            let Some(pair) = pair else {
                self.add(
                    Severity::Warning,
                    Section::Fluid,
                    FindingKind::PairNotKnown { material },
                );
                continue;
            };
            let (reason, source) = (pair.reason.clone(), pair.source.to_string());
            match pair.verdict {
                PairVerdict::Good => {}
                PairVerdict::Caution => {
                    let kind = FindingKind::PairCaution {
                        material,
                        reason,
                        source,
                    };
                    self.add(Severity::Warning, Section::Fluid, kind);
                }
                PairVerdict::Never => {
                    let kind = FindingKind::Incompatible {
                        material,
                        reason,
                        source,
                    };
                    self.add(Severity::Error, Section::Fluid, kind);
                }
            }
        }
    }

    fn stability(&mut self) {
        let safety = self.a.fluid.safety();
        for stability in &safety.stability {
            let severity = match stability.kind {
                StabilityKind::SelfDecomposing | StabilityKind::Pyrophoric => Severity::Error,
                _ => Severity::Warning,
            };
            let kind = FindingKind::Unstable {
                kind: stability.kind,
                note: stability.note.clone(),
                source: stability.source.to_string(),
            };
            self.add(severity, Section::Fluid, kind);
        }
        if let Some(stable) = &safety.highest_stable_temperature_k
            && let Ok(limit) = Temperature::from_kelvin(stable.value)
            && self.design.conditions.hottest > limit
        {
            let kind = FindingKind::TooHotForFluid {
                stable: limit,
                hottest: self.design.conditions.hottest,
                source: stable.source.to_string(),
            };
            self.add(Severity::Error, Section::Fluid, kind);
        }
        if let Some(restriction) = &safety.consumer_restriction
            && self.design.room.consumers
        {
            let kind = FindingKind::NotForConsumers {
                reason: restriction.value.clone(),
                source: restriction.source.to_string(),
            };
            self.add(Severity::Error, Section::Fluid, kind);
        }
    }

    fn fire(&mut self) {
        let safety = self.a.fluid.safety();
        let Ok(release) = &self.a.release else { return };
        let (Some(of_limit), Some(limit)) = (
            release.of_lower_flammable_limit,
            &safety.lower_flammable_limit,
        ) else {
            return;
        };
        let source = limit.source.to_string();
        if safety.is_flammable() {
            let kind = FindingKind::Flammable {
                ppm: release.ppm,
                of_limit,
                source,
            };
            self.add_share(Severity::Warning, Section::Room, kind, of_limit);
        } else if safety.burns_with_difficulty() {
            let kind = FindingKind::BurnsWithDifficulty { of_limit, source };
            self.add_share(Severity::Warning, Section::Room, kind, of_limit);
        }
    }

    fn poison(&mut self) {
        let safety = self.a.fluid.safety();
        let Ok(release) = &self.a.release else { return };
        let limit = safety.exposure_limit_ppm.as_ref();
        let dangerous = safety.immediately_dangerous_ppm.as_ref();
        let source = limit
            .or(dangerous)
            .map_or_else(String::new, |limit| limit.source.to_string());
        let above = release.of_exposure_limit.is_some_and(|share| share > 1.0);
        if safety.is_toxic() || above {
            let kind = FindingKind::Toxic {
                ppm: release.ppm,
                limit_ppm: limit.map(|limit| limit.value),
                dangerous_ppm: dangerous.map(|limit| limit.value),
                source,
            };
            let share = release
                .of_immediately_dangerous
                .or(release.of_exposure_limit);
            match share {
                Some(share) => self.add_share(Severity::Warning, Section::Room, kind, share),
                None => self.add(Severity::Warning, Section::Room, kind),
            }
        }
        if safety.is_corrosive() {
            let source = safety.statements.source.to_string();
            self.add(
                Severity::Warning,
                Section::Fluid,
                FindingKind::Corrosive { source },
            );
        }
        if release.oxygen < LEAST_OXYGEN {
            let kind = FindingKind::Asphyxiant {
                oxygen: release.oxygen,
            };
            self.add_share(
                Severity::Warning,
                Section::Room,
                kind,
                LEAST_OXYGEN / release.oxygen,
            );
        } else if !self.harmless_on_release() {
            let kind = FindingKind::Asphyxiant {
                oxygen: release.oxygen,
            };
            self.add(Severity::Note, Section::Room, kind);
        }
        if limit.is_none()
            && dangerous.is_none()
            && safety.statements.value.is_empty()
            && self.a.fluid.id() != "water"
        {
            self.add(Severity::Note, Section::Fluid, FindingKind::NoHazardLimits);
        }
    }

    /// Too little vapour at room temperature to push out half a per cent of the air.
    fn harmless_on_release(&self) -> bool {
        self.a
            .release
            .as_ref()
            .is_ok_and(|release| release.ppm < 5_000.0 || release.capped)
    }

    fn glass(&mut self) {
        let parts = self.design.chamber.parts.iter();
        let glass = parts.filter_map(|part| {
            let material = self.library.materials.get(&part.wall.as_ref()?.material)?;
            matches!(material.kind, MaterialKind::Glass(_)).then(|| part.name.clone())
        });
        if let Some(part) = glass.into_iter().next() {
            self.add(
                Severity::Warning,
                Section::Chamber,
                FindingKind::BrittleGlass { part },
            );
        }
    }

    fn rupture(&mut self) {
        match &self.a.rupture {
            Ok(Ok(energy)) if energy.joule() > 0.0 => {
                self.add(
                    Severity::Note,
                    Section::Chamber,
                    FindingKind::Rupture { energy: *energy },
                );
            }
            Ok(Err(error)) => {
                let kind = FindingKind::RuptureNotComputed {
                    reason: error.to_string(),
                };
                self.add(Severity::Warning, Section::Chamber, kind);
            }
            _ => {}
        }
    }

    fn provenance(&mut self) {
        if let Model::Correlated(model) = self.a.fluid.model() {
            let percent = 100.0 * model.pressure_uncertainty();
            self.add(
                Severity::Note,
                Section::Fluid,
                FindingKind::ModelUncertainty { percent },
            );
        }
        let mut from_memory: Vec<String> = Vec::new();
        if let Ok(case) = &self.a.worst
            && let Ok(weakest) = &case.weakest
            && self
                .a
                .envelope
                .sources(weakest.part, weakest.allowable.basis)
                .iter()
                .any(|s| !s.is_confirmed())
        {
            from_memory.push(format!("strength of {}", weakest.name));
        }
        let safety = self.a.fluid.safety();
        for (what, confirmed) in [
            (
                "lower flammable limit",
                safety
                    .lower_flammable_limit
                    .as_ref()
                    .map(|s| s.source.is_confirmed()),
            ),
            (
                "exposure limit",
                safety
                    .exposure_limit_ppm
                    .as_ref()
                    .map(|s| s.source.is_confirmed()),
            ),
            (
                "hazard statements",
                Some(safety.statements.source.is_confirmed()),
            ),
        ] {
            if confirmed == Some(false) {
                from_memory.push(what.to_owned());
            }
        }
        if !from_memory.is_empty() {
            let kind = FindingKind::FromMemory {
                what: from_memory.join(", "),
            };
            self.add(Severity::Note, Section::Fluid, kind);
        }
    }
}
