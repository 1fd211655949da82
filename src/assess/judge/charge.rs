//! Whether the charge fits the volume, the wall and the temperatures.

use super::Judge;
use crate::assess::finding::{FindingKind, Section, Severity};
use crate::assess::window::Requirement;
use crate::chamber::AllowableBasis;
use crate::design::Duty;
use crate::fluid::Regime;
use crate::units::Temperature;

impl Judge<'_> {
    pub(super) fn pressure(&mut self) {
        let Ok(case) = &self.a.worst else { return };
        let (Ok(weakest), Ok(share)) = (&case.weakest, &case.of_allowable) else {
            return;
        };
        if *share > 1.0 {
            let allowable = self.a.absolute(weakest.allowable.pressure);
            let kind = FindingKind::OverAllowable {
                pressure: case.pressure,
                allowable,
                temperature: case.temperature,
                part: weakest.name.to_string(),
                formula: weakest.formula,
            };
            // Whether less charge helps is the window's to say: its nearest charge is the remedy.
            self.add_share(Severity::Error, Section::Charge, kind, *share);
        }
        use AllowableBasis as Basis;
        if matches!(
            weakest.allowable.basis,
            Basis::BurstAtMost | Basis::YieldAtMost | Basis::CodeFormAtMost
        ) {
            let kind = FindingKind::StrengthKnownCooler {
                part: weakest.name.to_string(),
                temperature: case.temperature,
            };
            self.add(Severity::Warning, Section::Chamber, kind);
        }
    }

    pub(super) fn factors(&mut self) {
        if self.design.demands.factors.below_default() {
            let factors = self.design.demands.factors;
            self.add(
                Severity::Warning,
                Section::Demands,
                FindingKind::FactorsBelowDefault {
                    on_burst: factors.on_burst.number(),
                    on_yield: factors.on_yield.number(),
                    on_collapse: factors.on_collapse.number(),
                },
            );
        }
    }

    pub(super) fn liquid_full(&mut self) {
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

    pub(super) fn dry_out(&mut self) {
        let (Ok(dry_at), true) = (&self.a.lightest_dry_at, self.a.charge.is_ok()) else {
            return;
        };
        let Some(at) = *dry_at else { return };
        let conditions = &self.design.conditions;
        let working_high = conditions.working_high;
        if self.design.duty == Duty::PlainVessel {
            if at < conditions.hottest {
                let kind = FindingKind::AllVapourFrom {
                    at,
                    hottest: conditions.hottest,
                };
                self.add(Severity::Note, Section::Charge, kind);
            }
        } else if at <= working_high {
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

    pub(super) fn freezing(&mut self) {
        let conditions = &self.design.conditions;
        let freezing = self.a.fluid.freezing_point();
        let pressure = |t| self.a.fluid.frozen_pressure(t).ok();
        if conditions.bench < freezing {
            let bench = conditions.bench;
            self.add(
                Severity::Warning,
                Section::Conditions,
                FindingKind::FrozenOnBench {
                    freezing,
                    bench,
                    pressure: pressure(bench),
                },
            );
        }
        if conditions.coldest >= freezing {
            return;
        }
        if conditions.working_low < freezing {
            let kind = FindingKind::FrozenInWork {
                freezing,
                working_low: conditions.working_low,
                pressure: pressure(conditions.working_low),
            };
            self.add(Severity::Error, Section::Conditions, kind);
        } else {
            let kind = FindingKind::Freezes {
                freezing,
                coldest: conditions.coldest,
                pressure: pressure(conditions.coldest),
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

    pub(super) fn window(&mut self) {
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

    pub(super) fn tolerance(&mut self) {
        let tolerance = self.design.charge.tolerance;
        if let Ok(charge) = &self.a.charge
            && tolerance >= charge.nominal
        {
            let kind = FindingKind::ToleranceLargerThanCharge {
                tolerance,
                charge: charge.nominal,
            };
            self.add(Severity::Error, Section::Charge, kind);
        }
    }

    pub(super) fn balance(&mut self) {
        let (balance, tolerance) = (self.design.bench.balance, self.design.charge.tolerance);
        // A tenth of the balance's uncertainty is the step in which readings are told.
        if 1.1 * balance.kilogram() >= tolerance.kilogram() {
            let share = balance.kilogram() / tolerance.kilogram().max(f64::MIN_POSITIVE);
            let kind = FindingKind::BalanceTooCoarse { balance, tolerance };
            self.add_share(Severity::Error, Section::Bench, kind, share);
        }
    }
}
