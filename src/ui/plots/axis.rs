//! One axis of a picture: SI values to points of the plot and of the screen, and where
//! its ticks lie.
//!
//! Values stay in SI; a unit only decides which of them are round. The plot itself is
//! linear: a logarithm or a reciprocal is taken here.

use eframe::egui::{Pos2, Rangef, Rect};
use egui_plot::{PlotBounds, PlotTransform};

use crate::units::Unit;

/// How a value is stretched along its axis.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub(super) enum Scale {
    #[default]
    Linear,
    Logarithm,
    /// Over the reciprocal, turned so that it still rises with the value.
    Reciprocal,
}

/// The whole range of a picture, SI.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Home {
    pub scale: Scale,
    pub low: f64,
    pub high: f64,
}

/// An axis laid on the screen.
#[derive(Debug, Clone, Copy)]
pub(super) struct Axis {
    home: Home,
    upright: bool,
    place: PlotTransform,
}

/// A labelled place on an axis.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Tick {
    pub si: f64,
    pub text: String,
}

impl Scale {
    fn stretched(self, si: f64) -> f64 {
        match self {
            Self::Linear => si,
            Self::Logarithm => si.ln(),
            Self::Reciprocal => -1.0 / si,
        }
    }

    fn back(self, stretched: f64) -> f64 {
        match self {
            Self::Linear => stretched,
            Self::Logarithm => stretched.exp(),
            Self::Reciprocal => -1.0 / stretched,
        }
    }
}

impl Home {
    /// Plot coordinates of the two ends.
    pub fn ends(&self) -> (f64, f64) {
        let (low, high) = (
            self.scale.stretched(self.low),
            self.scale.stretched(self.high),
        );
        (low, if high > low { high } else { low + 1.0 })
    }

    /// Plot coordinate of a value; far outside it stays within a few lengths of the
    /// axis, so that lines keep their direction and no coordinate overflows.
    pub fn at(&self, si: f64) -> f64 {
        let (low, high) = self.ends();
        let reach = 20.0 * (high - low);
        let at = self.scale.stretched(si);
        if at.is_nan() {
            low - reach
        } else {
            at.clamp(low - reach, high + reach)
        }
    }
}

impl Axis {
    /// The level or upright axis of a plot.
    pub fn new(home: Home, upright: bool, place: PlotTransform) -> Self {
        Self {
            home,
            upright,
            place,
        }
    }

    /// A level axis with no plot, all of it between two points of the screen.
    pub fn rail(home: Home, across: Rangef) -> Self {
        let (low, high) = home.ends();
        let bounds = PlotBounds::from_min_max([low, 0.0], [high, 1.0]);
        let rect = Rect::from_x_y_ranges(across, Rangef::new(0.0, 1.0));
        Self::new(home, false, PlotTransform::new(rect, bounds, false))
    }

    /// Where a value lies on the screen.
    pub fn px(&self, si: f64) -> f32 {
        let at = self.home.at(si);
        if self.upright {
            self.place.position_from_point_y(at)
        } else {
            self.place.position_from_point_x(at)
        }
    }

    /// The value at a point of the screen.
    pub fn si(&self, px: f32) -> f64 {
        let point = self.place.value_from_position(Pos2::new(px, px));
        let at = if self.upright { point.y } else { point.x };
        self.home.scale.back(at)
    }

    /// The value at a point, to the decimal that one point of the screen can tell apart.
    pub fn rounded_si(&self, px: f32, unit: &Unit) -> f64 {
        let number = unit.number_of(self.si(px));
        let per_point = (unit.number_of(self.si(px + 1.0)) - number).abs();
        if !(per_point > 0.0 && number.is_finite()) {
            return self.si(px);
        }
        let step = 10f64.powf(per_point.log10().floor());
        unit.to_si((number / step).round() * step)
    }

    /// Least and greatest value on the axis.
    pub fn range(&self) -> (f64, f64) {
        let axis = usize::from(self.upright);
        let bounds = self.place.bounds();
        let back = |at| self.home.scale.back(at);
        (back(bounds.min()[axis]), back(bounds.max()[axis]))
    }

    pub fn contains(&self, si: f64) -> bool {
        let (low, high) = self.range();
        let slack = 1e-9 * (high - low);
        (low - slack..=high + slack).contains(&si)
    }

    /// Round values at least `spacing` points apart.
    pub fn ticks(&self, unit: &Unit, spacing: f32) -> Vec<Tick> {
        let (low, high) = self.range();
        let (low, high) = (unit.number_of(low), unit.number_of(high));
        let frame = self.place.frame().size();
        let length = if self.upright { frame.y } else { frame.x };
        if !(low < high && length > 1.0) {
            return Vec::new();
        }
        if self.home.scale == Scale::Logarithm && low > 0.0 && high > 6.0 * low {
            return decades(low, high, f64::from(spacing / length))
                .map(|n| tick(unit, n, None))
                .collect();
        }
        let step = round_step((high - low) * f64::from(spacing / length));
        let mut last: Option<f32> = None;
        let mut ticks = Vec::new();
        for i in (low / step - 1e-6).ceil() as i64..=(high / step + 1e-6).floor() as i64 {
            let candidate = tick(unit, i as f64 * step, Some(step));
            let px = self.px(candidate.si);
            if last.is_none_or(|last| (px - last).abs() >= 0.9 * spacing) {
                last = Some(px);
                ticks.push(candidate);
            }
        }
        ticks
    }
}

/// 1, 2 or 5 times a power of ten, not below `least`.
pub(super) fn round_step(least: f64) -> f64 {
    let power = 10f64.powf(least.log10().floor());
    [1.0, 2.0, 5.0]
        .map(|n| n * power)
        .into_iter()
        .find(|step| *step >= least * 0.999)
        .unwrap_or(10.0 * power)
}

fn decades(low: f64, high: f64, spacing_share: f64) -> impl Iterator<Item = f64> {
    let per_tick = spacing_share * (high / low).log10();
    let inner: &'static [f64] = match per_tick {
        p if p < 0.28 => &[1.0, 2.0, 5.0],
        p if p < 0.45 => &[1.0, 3.0],
        _ => &[1.0],
    };
    let every = per_tick.ceil().max(1.0) as i32;
    let (first, last) = (low.log10().floor() as i32, high.log10().ceil() as i32);
    (first..=last)
        .filter(move |decade| decade % every == 0)
        .flat_map(move |decade| inner.iter().map(move |n| n * 10f64.powi(decade)))
        .filter(move |n| (low * 0.999..=high * 1.001).contains(n))
}

fn tick(unit: &Unit, number: f64, step: Option<f64>) -> Tick {
    let smallest = step.unwrap_or(number.abs()).abs();
    let decimals = (-(smallest * 1.000_001).log10().floor()).max(0.0);
    let text = if number == 0.0 {
        "0".to_owned()
    } else if decimals > 5.0 || number.abs() >= 1e6 {
        format!("{number:.0e}")
    } else {
        format!("{number:.0$}", decimals as usize)
    };
    Tick {
        si: unit.to_si(number),
        text,
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ui::plots::view::View;
    use crate::units::{Kind, unit_named};

    fn texts(scale: Scale, low: f64, high: f64, unit: &Unit) -> Vec<String> {
        let axis = Axis::rail(Home { scale, low, high }, Rangef::new(0.0, 500.0));
        axis.ticks(unit, 70.0)
            .into_iter()
            .map(|tick| tick.text)
            .collect()
    }

    #[test]
    fn ticks_are_round_in_the_unit_shown() {
        let celsius = unit_named(Kind::Temperature, "°C");
        assert_eq!(
            texts(Scale::Linear, 263.15, 383.15, celsius),
            ["0", "20", "40", "60", "80", "100"]
        );
        let bar = unit_named(Kind::Pressure, "bar");
        assert_eq!(
            texts(Scale::Logarithm, 1e3, 1e7, bar),
            ["0.01", "0.1", "1", "10", "100"]
        );
        assert_eq!(
            texts(Scale::Linear, 0.0, 2.4e5, bar),
            ["0.0", "0.5", "1.0", "1.5", "2.0"].map(|t| if t == "0.0" { "0" } else { t })
        );
    }

    #[test]
    fn a_point_and_its_value_belong_together_on_every_scale() {
        for scale in [Scale::Linear, Scale::Logarithm, Scale::Reciprocal] {
            let home = Home {
                scale,
                low: 250.0,
                high: 400.0,
            };
            let view = View {
                x: (0.0, 1.0),
                y: (0.25, 0.75),
            };
            let frame = Rect::from_x_y_ranges(Rangef::new(0.0, 1.0), Rangef::new(40.0, 600.0));
            let place = PlotTransform::new(frame, view.bounds(&home, &home), false);
            let axis = Axis::new(home, true, place);
            for si in [290.0, 310.0, 330.0] {
                assert!((axis.si(axis.px(si)) - si).abs() < 1e-3, "{scale:?} {si}");
            }
        }
    }

    #[test]
    fn a_pointed_value_has_no_more_decimals_than_the_screen_tells_apart() {
        let home = Home {
            scale: Scale::Linear,
            low: 0.0,
            high: 4e-3,
        };
        let axis = Axis::rail(home, Rangef::new(0.0, 500.0));
        let gram = unit_named(Kind::Mass, "g");
        let number = gram.number_of(axis.rounded_si(123.0, gram));
        assert!((number - 0.984).abs() < 1e-9, "{number}");
    }
}
