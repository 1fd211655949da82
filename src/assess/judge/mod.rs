//! From figures to findings: one function a question, each in one place.

mod charge;
mod gas;
mod people;
mod walls;

use super::figure::Missing;
use super::finding::{Finding, FindingKind, Section, Severity};
use super::{Assessment, Library};
use crate::chamber::{StrengthGap, StrengthUnknown};
use crate::conditions::ConditionFault;
use crate::design::{Change, Design};

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
    judge.own_fluid();
    judge.own_materials();
    judge.pressure();
    judge.factors();
    judge.collapse();
    judge.closure();
    judge.bodies_inside();
    judge.tolerance();
    judge.liquid_full();
    judge.dry_out();
    judge.freezing();
    judge.window();
    judge.balance();
    judge.gas();
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
                    .map(Change::SetCharge)
            })
            .flatten();
        self.found.push(Finding {
            severity,
            section,
            kind,
            // A limit of nothing is exceeded beyond all measure, not infinitely.
            share: Some(share.min(f64::MAX.sqrt())),
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
            let section = match fault {
                ConditionFault::ExposureReversed { .. }
                | ConditionFault::ExposureOutsideExtremes { .. } => Section::Exposures,
                _ => Section::Conditions,
            };
            self.add(Severity::Error, section, FindingKind::Conditions(fault));
        }
    }

    /// Whether a strength is missing because its part contradicts itself, which is told.
    fn is_at_fault(&self, unknown: &StrengthUnknown) -> bool {
        use StrengthGap as Gap;
        let contradicts = matches!(
            unknown.reason,
            Gap::NoSize | Gap::UnknownMaterial | Gap::NoWall | Gap::BendTooTight
        );
        contradicts && unknown.part.is_some()
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
            let told = match &missing {
                Missing::Chamber(_) | Missing::Conditions => true,
                Missing::Strength(unknown) => self.is_at_fault(unknown),
                _ => false,
            };
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
}
