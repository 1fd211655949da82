//! Colours by role, in a light and a dark theme, and the fonts.

use eframe::egui::Color32;
use serde::{Deserialize, Serialize};

/// The user's choice, remembered between starts.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default, Serialize, Deserialize)]
pub enum Theme {
    #[default]
    Light,
    Dark,
}

/// Colours by what they mean. Fills of areas are faint; lines and text are strong.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Palette {
    pub two_phase: Color32,
    pub all_vapour: Color32,
    pub liquid_full: Color32,
    pub supercritical: Color32,
    pub frozen: Color32,
    pub over_allowable: Color32,
    /// Line of the saturation curve.
    pub saturation: Color32,
    /// Line of the sealed unit's own path.
    pub path: Color32,
    pub allowable: Color32,
    pub burst: Color32,
    /// The present charge.
    pub charge: Color32,
    /// Coldest, working and hottest.
    pub condition: Color32,
    pub scrubber: Color32,
    /// Window of allowed charge.
    pub window: Color32,
    pub fit: Color32,
    pub warning: Color32,
    pub error: Color32,
    pub note: Color32,
    pub text: Color32,
    pub text_faint: Color32,
    pub ground: Color32,
    pub panel: Color32,
}
