//! Where the liquid is: in the wick first, the rest as a pool.

use super::Assessment;
use crate::fluid::Regime;
use crate::units::Temperature;

/// Liquid, or what froze of it, at one temperature.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct LiquidPlace {
    /// How full the wick is, 0 to 1; 0 where there is none.
    pub wick: f64,
    /// Share of the vapour core that the pool fills, 0 to 1.
    pub pool: f64,
    pub frozen: bool,
}

impl Assessment {
    /// Where the liquid of the nominal unit is; `None` where the phases are not told
    /// apart, or nothing is known. Capillary forces fill the wick before any pool forms.
    /// What is frozen counts with the volume it has as liquid at its freezing point.
    pub fn liquid_place(&self, temperature: Temperature) -> Option<LiquidPlace> {
        let (unit, named) = (
            &self.corners.as_ref().ok()?.nominal,
            self.named.as_ref().ok()?,
        );
        let state = unit.state(temperature).ok()?;
        let frozen = state.regime == Regime::Frozen;
        let share = if frozen {
            let freezing = unit.fluid().freezing_point();
            unit.state(freezing).ok()?.liquid_share?
        } else {
            state.liquid_share?
        };
        // All of these grow alike.
        let whole = named.inside.nominal.cubic_metre();
        let void = named.wick_void.nominal.cubic_metre();
        let core = named.vapour_core.nominal.cubic_metre();
        let liquid = share * whole;
        let filled = |liquid: f64, of: f64| {
            if of > 0.0 {
                (liquid / of).clamp(0.0, 1.0)
            } else {
                0.0
            }
        };
        Some(LiquidPlace {
            wick: filled(liquid, void),
            pool: filled(liquid - void, core),
            frozen,
        })
    }
}
