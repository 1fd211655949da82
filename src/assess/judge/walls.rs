//! Whether the walls stand pressure from outside, and how the unit is closed.

use super::Judge;
use crate::assess::figure::Missing;
use crate::assess::finding::{FindingKind, Section, Severity};
use crate::chamber::{MaterialKind, OutsideBasis, Relief};

impl Judge<'_> {
    pub(super) fn collapse(&mut self) {
        let a = self.a;
        let Some(case) = a.worst_outside() else {
            return;
        };
        let (weakest, share) = match (&case.weakest, &case.of_allowable) {
            (Ok(weakest), Ok(share)) => (weakest, *share),
            (Err(unknown), _) => {
                // The same gap under inside pressure has been told.
                let missing = Missing::Strength(unknown.clone());
                let told = self.found.iter().any(|finding| {
                    matches!(&finding.kind, FindingKind::NotKnown(Missing::Strength(known))
                        if known.part == unknown.part && known.reason == unknown.reason)
                });
                let at_fault = self.is_at_fault(unknown);
                if !told && !at_fault {
                    let kind = FindingKind::CollapseNotKnown {
                        stretch: case.stretch.to_string(),
                        missing,
                    };
                    self.add(Severity::Error, Section::Chamber, kind);
                }
                return;
            }
            (Ok(_), Err(_)) => return,
        };
        if share > 1.0 {
            let kind = FindingKind::Collapses {
                part: weakest.name.to_string(),
                stretch: case.stretch.to_string(),
                temperature: case.temperature,
                load: case.load,
                allowable: weakest.allowable.pressure,
                formula: weakest.formula,
            };
            self.add_share(Severity::Error, Section::Chamber, kind, share);
        }
        if weakest.allowable.basis == OutsideBasis::YieldAtMost {
            let kind = FindingKind::StrengthKnownCooler {
                part: weakest.name.to_string(),
                temperature: case.temperature,
            };
            self.add(Severity::Warning, Section::Chamber, kind);
        }
    }

    pub(super) fn closure(&mut self) {
        let Some(closure) = &self.design.chamber.closure else {
            self.add(
                Severity::Error,
                Section::Chamber,
                FindingKind::ClosureNotStated,
            );
            return;
        };
        if closure.kind.parts_a_stub() && closure.stub.is_none() {
            let closure = closure.kind.name();
            self.add(
                Severity::Warning,
                Section::Chamber,
                FindingKind::StubNotStated { closure },
            );
        }
        match &closure.relief {
            Relief::None { because } if because.trim().is_empty() => {
                self.add(
                    Severity::Warning,
                    Section::Chamber,
                    FindingKind::NoReliefReason,
                );
            }
            Relief::None { .. } => {}
            Relief::Device { opens_at, .. } => {
                let opens_at = *opens_at;
                let Ok(case) = &self.a.worst else { return };
                let Ok(weakest) = &case.weakest else { return };
                let (allowable, load) = (weakest.allowable.pressure, case.load);
                if opens_at > allowable {
                    let kind = FindingKind::ReliefTooHigh {
                        opens_at,
                        allowable,
                    };
                    self.add(Severity::Error, Section::Chamber, kind);
                } else if opens_at <= load {
                    let kind = FindingKind::ReliefOpensInUse { opens_at, load };
                    self.add(Severity::Warning, Section::Chamber, kind);
                }
            }
        }
    }

    /// What lies inside touches the fluid too.
    pub(super) fn bodies_inside(&mut self) {
        let unknown: Vec<&str> = self
            .design
            .chamber
            .parts
            .iter()
            .filter(|part| part.count > 0 && part.shape.lies_inside() && part.made_of.is_none())
            // Grooves are cut into the wall.
            .filter(|part| part.volumes().inside.nominal_m3 < 0.0)
            .map(|part| part.name.as_str())
            .collect();
        if !unknown.is_empty() {
            let parts = unknown.join(", ");
            self.add(
                Severity::Warning,
                Section::Chamber,
                FindingKind::MadeOfUnknown { parts },
            );
        }
    }

    pub(super) fn own_materials(&mut self) {
        for material in &self.a.own_materials {
            let Some(own) = material.own_file() else {
                continue;
            };
            let kind = FindingKind::OwnMaterial {
                file: own.name.clone(),
                name: material.name.clone(),
            };
            self.add(Severity::Warning, Section::Chamber, kind);
        }
    }

    pub(super) fn glass(&mut self) {
        let of_glass = |index: usize| {
            let part = &self.design.chamber.parts[index];
            let material = self.library.materials.get(&part.wall.as_ref()?.material)?;
            matches!(material.kind, MaterialKind::Glass(_)).then(|| part.name.clone())
        };
        let parts = 0..self.design.chamber.parts.len();
        let found = parts
            .filter_map(|index| Some((of_glass(index)?, self.a.envelope.quench_limit(index))))
            .reduce(|least, next| {
                let below =
                    |a: &Option<_>, b: &Option<_>| matches!((a, b), (Some(a), Some(b)) if a < b);
                if below(&next.1, &least.1) {
                    next
                } else {
                    least
                }
            });
        if let Some((part, bears)) = found {
            self.add(
                Severity::Warning,
                Section::Chamber,
                FindingKind::BrittleGlass { part, bears },
            );
        }
    }
}
