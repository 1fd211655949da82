//! Pictures as plain data in metres: areas, lines, labels, hot spots.
//!
//! A picture says what a thing is, not its colour; the window paints it in its theme,
//! [`svg`] in light ones for print. It is painted in this order: areas, hatches, lines,
//! labels. Areas may cover one another, the later the earlier.

mod liquid;
mod marks;
mod of_design;
mod outline;
mod pattern;
mod plane;
mod section;
#[cfg(test)]
mod section_tests;
mod svg;
mod triangles;

pub use of_design::of_design;
pub use plane::Point;
pub use section::{Filling, Hold, View, section};
pub use svg::svg;

/// A picture; y points up.
#[derive(Debug, Clone, PartialEq)]
pub struct Picture {
    pub title: String,
    pub areas: Vec<Area>,
    pub hatches: Vec<Hatch>,
    pub lines: Vec<Line>,
    pub labels: Vec<Label>,
    pub spots: Vec<HotSpot>,
    /// What the ringed numbers stand for.
    pub key: Vec<(usize, String)>,
    pub bounds: Bounds,
    /// Height of the text that distances between marks are made for.
    pub em_m: f64,
}

/// A filled polygon without holes, not always convex.
#[derive(Debug, Clone, PartialEq)]
pub struct Area {
    pub outline: Vec<Point>,
    pub paint: Paint,
}

/// What an area is of.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub enum Paint {
    Wall,
    Vapour,
    Liquid,
    Frozen,
    Wick,
    Insert,
    /// Nothing of the device: as the ground of the picture.
    Outside,
}

/// A stroke of the pattern that tells an area without colour.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Hatch {
    pub ends: [Point; 2],
    pub paint: Paint,
}

#[derive(Debug, Clone, PartialEq)]
pub struct Line {
    pub points: Vec<Point>,
    pub closed: bool,
    pub stroke: Stroke,
}

/// What a line is.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum Stroke {
    Outline,
    /// Where parts meet.
    Joint,
    /// The axis: long and short dashes.
    Centre,
    /// A free surface of the liquid.
    Level,
    /// Dimensions, leaders, scale bar, arrow.
    Dimension,
}

/// Words at a place, written level whatever the picture's turn.
#[derive(Debug, Clone, PartialEq)]
pub struct Label {
    pub text: String,
    /// The middle of the text's height.
    pub at: Point,
    pub anchor: Anchor,
    /// A number of the key, in a ring.
    pub ringed: bool,
}

/// Which end of a text is held at its place.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Anchor {
    Start,
    Middle,
    End,
}

/// What is said when the pointer rests on a polygon; the later the earlier.
#[derive(Debug, Clone, PartialEq)]
pub struct HotSpot {
    pub outline: Vec<Point>,
    pub text: String,
}

#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Bounds {
    pub low: Point,
    pub high: Point,
}

impl Paint {
    pub const ALL: [Self; 7] = [
        Self::Wall,
        Self::Vapour,
        Self::Liquid,
        Self::Frozen,
        Self::Wick,
        Self::Insert,
        Self::Outside,
    ];

    pub const fn name(self) -> &'static str {
        match self {
            Self::Wall => "wall",
            Self::Vapour => "vapour",
            Self::Liquid => "liquid",
            Self::Frozen => "frozen",
            Self::Wick => "wick",
            Self::Insert => "insert",
            Self::Outside => "outside",
        }
    }

    /// Angles, in degrees, and distances, in heights of text, of the strokes that tell
    /// it in print without colour.
    pub const fn pattern(self) -> &'static [(f64, f64)] {
        match self {
            Self::Liquid => &[(0.0, 0.55)],
            Self::Frozen => &[(60.0, 0.55), (-60.0, 0.55)],
            Self::Wick => &[(45.0, 0.32)],
            Self::Insert => &[(-45.0, 0.4)],
            Self::Wall | Self::Vapour | Self::Outside => &[],
        }
    }
}

impl Area {
    /// Its triangles, as places in the outline, for painters that fill convex shapes only.
    pub fn triangles(&self) -> Vec<[usize; 3]> {
        triangles::triangles(&self.outline)
    }
}

impl HotSpot {
    /// Whether a place lies in it.
    pub fn holds(&self, at: Point) -> bool {
        plane::inside(&self.outline, at)
    }
}

impl Picture {
    /// The topmost words at a place.
    pub fn text_at(&self, at: Point) -> Option<&str> {
        self.spots
            .iter()
            .rev()
            .find(|spot| spot.holds(at))
            .map(|spot| spot.text.as_str())
    }
}

impl Bounds {
    pub(crate) const fn nothing() -> Self {
        Self {
            low: Point::new(f64::INFINITY, f64::INFINITY),
            high: Point::new(f64::NEG_INFINITY, f64::NEG_INFINITY),
        }
    }

    pub(crate) fn take(&mut self, point: Point) {
        self.low = Point::new(self.low.x.min(point.x), self.low.y.min(point.y));
        self.high = Point::new(self.high.x.max(point.x), self.high.y.max(point.y));
    }

    pub fn width(&self) -> f64 {
        self.high.x - self.low.x
    }

    pub fn height(&self) -> f64 {
        self.high.y - self.low.y
    }
}
