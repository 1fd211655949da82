//! Patterns that tell the areas of a section without colour.

use super::plane::{hatched, outside};
use super::section::{Drawing, View, body_outline};
use super::{Area, Hatch, Paint};
use crate::section::Made;

impl Drawing<'_> {
    /// Patterns of all but the wick's layers, which have theirs already.
    pub(super) fn patterns(&mut self, view: &View) {
        let em = self.picture.em_m;
        let mut strokes = Vec::new();
        let areas = &self.picture.areas;
        for (i, area) in areas.iter().enumerate() {
            if area.paint == Paint::Wick && !self.porous(area) {
                continue;
            }
            // Shorter where something lies over them.
            let over: Vec<&Area> = areas[i + 1..]
                .iter()
                .filter(|a| matches!(a.paint, Paint::Insert | Paint::Wall | Paint::Wick))
                .collect();
            for (angle, distance) in area.paint.pattern() {
                for stroke in hatched(area, pattern_turn(area.paint, *angle, view), distance * em) {
                    let mut left = vec![stroke.ends];
                    for a in &over {
                        left = left
                            .into_iter()
                            .flat_map(|ends| outside(ends, &a.outline))
                            .collect();
                    }
                    strokes.extend(left.into_iter().map(|ends| Hatch { ends, ..stroke }));
                }
            }
        }
        self.picture.hatches.splice(0..0, strokes);
    }

    /// Whether a wick's area is a body and no layer.
    fn porous(&self, area: &Area) -> bool {
        self.device
            .bodies
            .iter()
            .filter(|body| body.made == Made::Porous)
            .any(|body| self.frame.polygon(&body_outline(body)) == area.outline)
    }
}

/// Patterns lie with the level; that of a solid is turned by a quarter where its strokes
/// would run along the device.
pub(super) fn pattern_turn(paint: Paint, angle_deg: f64, view: &View) -> f64 {
    let off = (view.tilt_deg - angle_deg).rem_euclid(180.0);
    let runs_along = off.min(180.0 - off) < 22.0;
    match paint {
        Paint::Wick | Paint::Insert if runs_along => view.turn_deg + angle_deg + 90.0,
        _ => view.turn_deg + angle_deg,
    }
}
