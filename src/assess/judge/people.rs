//! What the fluid does to walls, to itself and to people, and how sure that is.

use super::Judge;
use crate::assess::finding::{FindingKind, Section, Severity};
use crate::fluid::{FluidError, StabilityKind};
use crate::hazard::{Compatibility, CompatibilityTable, EnergyError, PairVerdict};
use crate::units::Temperature;

/// Oxygen below which a room is dangerous to enter: 19.5 %, OSHA 29 CFR 1910.134
/// (from memory).
const LEAST_OXYGEN: f64 = 0.195;

impl Judge<'_> {
    pub(super) fn pair(&mut self) {
        let table = CompatibilityTable::built_in();
        // A row of the table may hold for several walls: it is said once, of all of them.
        let mut told: Vec<(Option<&Compatibility>, Vec<&str>)> = Vec::new();
        for id in self.design.chamber.materials_in_order() {
            let Some(material) = self.library.materials.get(id) else {
                continue;
            };
            // The table goes by the beginning of an id: bad news holds for whoever takes
            // that name, good news only for the materials it was written of.
            let is_own = material.own_file().is_some();
            let pair = table
                .of(self.a.fluid.id(), id)
                .filter(|pair| !is_own || pair.verdict != PairVerdict::Good);
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

    pub(super) fn stability(&mut self) {
        let safety = self.a.fluid.safety();
        for stability in &safety.stability {
            let severity = if stability.kind.blocks() {
                Severity::Error
            } else {
                Severity::Warning
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
        if let Some(restriction) = &safety.consumer_restriction {
            let severity = if self.design.room.consumers {
                Severity::Error
            } else {
                Severity::Note
            };
            let kind = FindingKind::NotForConsumers {
                reason: restriction.value.clone(),
                source: restriction.source.to_string(),
            };
            self.add(severity, Section::Fluid, kind);
        }
    }

    pub(super) fn fire(&mut self) {
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

    pub(super) fn poison(&mut self) {
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
            let kind = FindingKind::Corrosive {
                keep_dry: safety
                    .stability
                    .iter()
                    .any(|s| s.kind == StabilityKind::WaterReactive),
                source: safety.statements.source.to_string(),
            };
            self.add(Severity::Warning, Section::Fluid, kind);
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
        let harmful = safety.is_toxic() || safety.is_corrosive();
        if harmful && limit.is_none() && dangerous.is_none() {
            self.add(
                Severity::Warning,
                Section::Fluid,
                FindingKind::NoHazardLimits,
            );
        }
    }

    /// Too little vapour at room temperature to push out half a per cent of the air.
    pub(super) fn harmless_on_release(&self) -> bool {
        self.a
            .release
            .as_ref()
            .is_ok_and(|release| release.ppm < 5_000.0 || release.capped)
    }

    pub(super) fn rupture(&mut self) {
        match &self.a.rupture {
            Ok(Ok(energy)) if energy.joule() > 0.0 => {
                self.add(
                    Severity::Note,
                    Section::Chamber,
                    FindingKind::Rupture { energy: *energy },
                );
            }
            // A fluid error has its own finding.
            Ok(Err(
                error @ (EnergyError::FreezesOnExpansion { .. }
                | EnergyError::Fluid(FluidError::NoEnergy { .. })),
            )) => {
                let kind = FindingKind::RuptureNotComputed {
                    reason: error.to_string(),
                };
                self.add(Severity::Warning, Section::Chamber, kind);
            }
            _ => {}
        }
    }

    pub(super) fn own_fluid(&mut self) {
        if let Some(own) = self.a.fluid.own_file() {
            let file = own.name.clone();
            self.add(
                Severity::Warning,
                Section::Fluid,
                FindingKind::OwnFluid { file },
            );
        }
    }

    pub(super) fn provenance(&mut self) {
        let percent = 100.0 * self.a.fluid.pressure_uncertainty();
        if percent > 0.0 {
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
        let air = self.a.gas.as_ref().ok();
        let air = air.and_then(|gas| gas.counted_solubility());
        if air.is_some_and(|air| !air.source.is_confirmed()) {
            from_memory.push("air dissolved in the fluid".to_owned());
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
