//! Which part of a picture is in sight.

use egui_plot::PlotBounds;

use super::axis::Home;

/// The part of the whole that is in sight, as shares of it: it outlives a change of
/// unit and of design.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct View {
    pub x: (f64, f64),
    pub y: (f64, f64),
}

impl Default for View {
    fn default() -> Self {
        Self {
            x: (0.0, 1.0),
            y: (0.0, 1.0),
        }
    }
}

impl View {
    pub fn bounds(&self, x: &Home, y: &Home) -> PlotBounds {
        let part = |home: &Home, share: f64| {
            let (low, high) = home.ends();
            low + share * (high - low)
        };
        PlotBounds::from_min_max(
            [part(x, self.x.0), part(y, self.y.0)],
            [part(x, self.x.1), part(y, self.y.1)],
        )
    }

    /// The view that a plot was zoomed or dragged to, brought back into the whole.
    pub fn of(bounds: &PlotBounds, x: &Home, y: &Home) -> Self {
        let share = |home: &Home, axis: usize| {
            let (low, high) = home.ends();
            let (from, to) = (bounds.min()[axis], bounds.max()[axis]);
            let width = ((to - from) / (high - low)).clamp(0.005, 1.0);
            let from = ((from - low) / (high - low)).clamp(0.0, 1.0 - width);
            (from, from + width)
        };
        Self {
            x: share(x, 0),
            y: share(y, 1),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ui::plots::axis::Scale;

    #[test]
    fn a_view_moved_out_of_the_whole_or_too_deep_comes_back() {
        let home = Home {
            scale: Scale::Linear,
            low: 100.0,
            high: 300.0,
        };
        let view = |min, max| View::of(&PlotBounds::from_min_max(min, max), &home, &home);
        assert_eq!(view([0.0, 90.0], [400.0, 310.0]), View::default());
        let moved = view([50.0, 250.0], [150.0, 350.0]);
        assert_eq!((moved.x, moved.y), ((0.0, 0.5), (0.5, 1.0)));
        let deep = view([200.0, 200.0], [200.1, 200.1]);
        assert!((deep.x.1 - deep.x.0 - 0.005).abs() < 1e-12, "{deep:?}");
    }
}
