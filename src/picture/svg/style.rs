//! Colours and pens: light, with a difference in grey where there is one in colour.

use super::super::{Paint, Stroke};

pub(super) const INK: &str = "#1d2329";

pub(super) const fn fill(paint: Paint) -> &'static str {
    match paint {
        Paint::Wall => "#7d858e",
        Paint::Vapour => "#f7f9fb",
        Paint::Liquid => "#a8d3f0",
        Paint::Frozen => "#dceaf4",
        Paint::Wick => "#efd9b0",
        Paint::Insert => "#d3d6d9",
        Paint::Outside => "#ffffff",
    }
}

pub(super) const fn hatch_colour(paint: Paint) -> &'static str {
    match paint {
        Paint::Liquid => "#3f86b8",
        Paint::Frozen => "#6f9ab8",
        Paint::Wick => "#7a5a1e",
        _ => "#5b6168",
    }
}

/// Colour, width and dashes of a line, both in heights of text.
pub(super) const fn pen(stroke: Stroke) -> (&'static str, f64, &'static [f64]) {
    match stroke {
        Stroke::Outline => (INK, 0.07, &[]),
        Stroke::Joint => (INK, 0.05, &[]),
        Stroke::Centre => ("#4a525b", 0.04, &[1.2, 0.25, 0.25, 0.25]),
        Stroke::Level => ("#0b4f80", 0.11, &[]),
        Stroke::Dimension => (INK, 0.05, &[]),
    }
}
