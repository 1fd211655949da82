//! Whether residual gas is stated, how much of it there is, and whether the fluid must be degassed.

use super::Judge;
use crate::assess::finding::{FindingKind, Section, Severity};
use crate::assess::gas::DissolvedAir;
use crate::design::Duty;

impl Judge<'_> {
    pub(super) fn gas(&mut self) {
        match self.design.bench.vacuum {
            None => self.add(
                Severity::Warning,
                Section::Bench,
                FindingKind::VacuumNotStated,
            ),
            Some(pressure) if pressure.pascal() < 0.0 => self.add(
                Severity::Error,
                Section::Bench,
                FindingKind::VacuumBelowZero { pressure },
            ),
            Some(_) => {}
        }
        let Ok(gas) = &self.a.gas else { return };
        match gas.dissolved {
            DissolvedAir::Saturated(amount) => {
                let kind = FindingKind::NotDegassed { amount };
                self.add(Severity::Warning, Section::Bench, kind);
            }
            DissolvedAir::NotKnown => {
                let kind = FindingKind::DissolvedAirNotKnown;
                self.add(Severity::Warning, Section::Bench, kind);
            }
            DissolvedAir::NotStated | DissolvedAir::Degassed(_) | DissolvedAir::FromCylinder => {}
        }
        let (Ok(share), Ok(state)) = (&gas.of_saturation, &gas.at_working_low) else {
            return;
        };
        let allowed = self.design.demands.gas_share.fraction();
        let Some(pressure) = state.gas.filter(|_| *share > allowed) else {
            return;
        };
        let kind = FindingKind::GasAboveShare {
            pressure,
            temperature: self.design.conditions.working_low,
            of_saturation: *share,
            allowed,
        };
        // A plain vessel lives on no vapour pressure.
        let works = self.design.duty != Duty::PlainVessel;
        let severity = if *share > 1.0 && works {
            Severity::Error
        } else {
            Severity::Warning
        };
        // 0 is a demand that no unit meets: exceeded beyond all measure.
        let of_limit = share / allowed.max(f64::MIN_POSITIVE);
        self.add_share(severity, Section::Bench, kind, of_limit);
    }
}
