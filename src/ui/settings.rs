//! What is remembered between starts: units, theme, columns, recent files.

use std::path::{Path, PathBuf};

use serde::{Deserialize, Serialize};

use super::theme::Theme;
use crate::store;
use crate::units::UnitSystem;

const MOST_RECENT: usize = 8;
const FILE: &str = "settings.ron";

/// The user's choices about the window, not about a design.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(default)]
pub struct Settings {
    pub theme: Theme,
    pub units: UnitSystem,
    /// Widths of the outer columns, points.
    pub left_column: f32,
    pub right_column: f32,
    pub zoom: f32,
    /// Newest first.
    pub recent: Vec<PathBuf>,
}

impl Default for Settings {
    fn default() -> Self {
        Self {
            theme: Theme::default(),
            units: UnitSystem::default(),
            left_column: 316.0,
            right_column: 300.0,
            zoom: 1.0,
            recent: Vec::new(),
        }
    }
}

impl Settings {
    /// The settings in the program's own folder; damaged or missing ones are the default.
    pub fn load(folder: Option<&Path>) -> Self {
        let found: Option<Self> = folder.and_then(|folder| store::read_own(&folder.join(FILE)));
        found.unwrap_or_default().within_reason()
    }

    /// Writes the settings; a home that cannot be written costs only the memory of them.
    pub fn save(&self, folder: Option<&Path>) {
        if let Some(folder) = folder {
            let _ = store::write_own(&folder.join(FILE), self);
        }
    }

    /// Puts a file at the head of the recent ones.
    pub fn remember(&mut self, path: &Path) {
        let path = std::path::absolute(path).unwrap_or_else(|_| path.to_owned());
        self.recent.retain(|known| *known != path);
        self.recent.insert(0, path);
        self.recent.truncate(MOST_RECENT);
    }

    fn within_reason(mut self) -> Self {
        let hold = |x: f32, low: f32, high: f32| {
            if x.is_finite() {
                x.clamp(low, high)
            } else {
                low
            }
        };
        self.left_column = hold(self.left_column, 260.0, 520.0);
        self.right_column = hold(self.right_column, 250.0, 520.0);
        self.zoom = hold(self.zoom, 0.6, 3.0);
        self.recent.truncate(MOST_RECENT);
        self
    }
}
