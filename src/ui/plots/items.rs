//! What lies in a picture as items of the plot: lines, bands, and areas bounded from
//! side to side, all in SI until here.

use eframe::egui::{Color32, Stroke};
use egui_plot::{Axis, FilledArea, HLine, Line, LineStyle, PlotItem, Span, VLine};

use super::axis::Home;
use super::strip::Strip;

/// Points of a line, SI.
pub(super) type Run = Vec<[f64; 2]>;

/// The items of a picture, lowest first.
pub(super) struct Items {
    pub x: Home,
    pub y: Home,
    /// The colour beneath them all.
    pub ground: Color32,
    pub list: Vec<Box<dyn PlotItem>>,
}

impl Items {
    pub fn new(x: Home, y: Home, ground: Color32) -> Self {
        Self {
            x,
            y,
            ground,
            list: Vec::new(),
        }
    }

    fn at(&self, [x, y]: [f64; 2]) -> [f64; 2] {
        [self.x.at(x), self.y.at(y)]
    }

    pub fn line(&mut self, run: &[[f64; 2]], stroke: Stroke, style: LineStyle) {
        let points: Vec<[f64; 2]> = run.iter().map(|point| self.at(*point)).collect();
        // Bands are for noise; they would thin out what is steep.
        let line = Line::new("", points).allow_band(false);
        self.list.push(Box::new(line.stroke(stroke).style(style)));
    }

    /// From side to side at a height.
    pub fn level(&mut self, y: f64, stroke: Stroke, style: LineStyle) {
        let line = HLine::new("", self.y.at(y)).stroke(stroke).style(style);
        self.list.push(Box::new(line));
    }

    /// From top to bottom at a place across.
    pub fn upright(&mut self, x: f64, stroke: Stroke, style: LineStyle) {
        let line = VLine::new("", self.x.at(x)).stroke(stroke).style(style);
        self.list.push(Box::new(line));
    }

    /// All between two heights.
    pub fn level_band(&mut self, from: f64, to: f64, fill: Color32) {
        let range = self.y.at(from)..=self.y.at(to);
        let span = Span::new("", range).axis(Axis::Y).fill(fill);
        self.list.push(Box::new(span));
    }

    /// All between two places across.
    pub fn upright_band(&mut self, from: f64, to: f64, fill: Color32) {
        let span = Span::new("", self.x.at(from)..=self.x.at(to)).fill(fill);
        self.list.push(Box::new(span));
    }

    /// All between a line that runs to the right and a height.
    pub fn fill_to(&mut self, run: &[[f64; 2]], y: f64, fill: Color32) {
        let edge = vec![self.y.at(y); run.len()];
        let (xs, ys): (Vec<f64>, Vec<f64>) = run
            .iter()
            .map(|point| (self.x.at(point[0]), self.y.at(point[1])))
            .unzip();
        let area = FilledArea::new("", &xs, &edge, &ys).fill_color(fill);
        self.list.push(Box::new(area));
    }

    /// An area given row by row upward: height, and from where to where it reaches.
    /// Infinite is to the side of the frame.
    pub fn rows(
        &mut self,
        rows: impl Iterator<Item = (f64, f64, f64)>,
        fill: Color32,
        hatch: Option<Stroke>,
    ) {
        let rows = rows.map(|(y, from, to)| [self.at([from, y]), self.at([to, y])].map(Into::into));
        let strip = Strip::new(rows.collect(), fill, hatch);
        self.list.push(Box::new(strip));
    }

    /// The most transparent colour that looks like `tint` on the bare ground: the grid
    /// is seen through it.
    pub fn veil(&self, tint: Color32) -> Color32 {
        let [tint, ground] =
            [tint, self.ground].map(|color| [color.r(), color.g(), color.b()].map(f32::from));
        let share = |i: usize| 1.0 - tint[i] / ground[i].max(1.0);
        let cover = share(0).max(share(1)).max(share(2)).max(0.0);
        let channel = |i: usize| (tint[i] - (1.0 - cover) * ground[i]).round() as u8;
        Color32::from_rgba_premultiplied(
            channel(0),
            channel(1),
            channel(2),
            (255.0 * cover).round() as u8,
        )
    }
}
