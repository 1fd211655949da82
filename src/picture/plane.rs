//! Polygons in a plane: cut by a straight line, hatched, tested for a point.

use super::{Area, Hatch};

/// A place in a picture, m; y points up.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Point {
    pub x: f64,
    pub y: f64,
}

impl Point {
    pub const fn new(x: f64, y: f64) -> Self {
        Self { x, y }
    }

    pub(super) fn plus(self, step: Self, times: f64) -> Self {
        Self::new(self.x + step.x * times, self.y + step.y * times)
    }

    pub(super) fn dot(self, other: Self) -> f64 {
        self.x * other.x + self.y * other.y
    }

    /// Turned a quarter to the left.
    pub(super) const fn left(self) -> Self {
        Self::new(-self.y, self.x)
    }

    pub(super) fn direction(angle_deg: f64) -> Self {
        let (sin, cos) = angle_deg.to_radians().sin_cos();
        Self::new(cos, sin)
    }
}

/// Twice the area of a triangle, positive where it turns left.
pub(super) fn turn(a: Point, b: Point, c: Point) -> f64 {
    (b.x - a.x) * (c.y - a.y) - (b.y - a.y) * (c.x - a.x)
}

/// Area of a polygon, positive where it runs to the left around it.
pub(super) fn signed_area(outline: &[Point]) -> f64 {
    edges(outline)
        .map(|(a, b)| 0.5 * (a.x * b.y - b.x * a.y))
        .sum()
}

pub(super) fn edges(outline: &[Point]) -> impl Iterator<Item = (Point, Point)> {
    let n = outline.len();
    (0..n).map(move |i| (outline[i], outline[(i + 1) % n]))
}

/// Whether a point lies in a polygon, by the count of edges to its right.
pub(super) fn inside(outline: &[Point], at: Point) -> bool {
    edges(outline)
        .filter(|(a, b)| {
            (a.y > at.y) != (b.y > at.y) && at.x < a.x + (at.y - a.y) / (b.y - a.y) * (b.x - a.x)
        })
        .count()
        % 2
        == 1
}

/// What is left of a polygon on one side of a line.
#[derive(Debug, Clone, PartialEq, Default)]
pub(super) struct Cut {
    pub(super) pools: Vec<Vec<Point>>,
    /// The stretches of the line inside the polygon.
    pub(super) surfaces: Vec<[Point; 2]>,
}

/// The part of a simple polygon where normal · p ≤ offset, each pool a polygon of its own.
///
/// Along the line, inside and outside of a simple polygon take turns: the crossings in
/// their order are paired, and a pool that leaves by one comes back by its partner.
pub(super) fn below(outline: &[Point], normal: Point, offset: f64) -> Cut {
    let over = |p: Point| normal.dot(p) > offset;
    let Some(start) = outline.iter().position(|p| over(*p)) else {
        return Cut {
            pools: vec![outline.to_vec()],
            surfaces: Vec::new(),
        };
    };
    // Chains below the line, each from a crossing to a crossing.
    let mut chains: Vec<Vec<Point>> = Vec::new();
    let n = outline.len();
    for i in 0..n {
        let (a, b) = (outline[(start + i) % n], outline[(start + i + 1) % n]);
        let crossing = || {
            let (da, db) = (normal.dot(a) - offset, normal.dot(b) - offset);
            a.plus(Point::new(b.x - a.x, b.y - a.y), da / (da - db))
        };
        match (over(a), over(b)) {
            (true, false) => chains.push(vec![crossing(), b]),
            (false, true) => {
                if let Some(chain) = chains.last_mut() {
                    chain.push(crossing());
                }
            }
            (false, false) => {
                if let Some(chain) = chains.last_mut() {
                    chain.push(b);
                }
            }
            (true, true) => {}
        }
    }
    linked(chains, normal.left())
}

/// Chains joined along the line into pools.
fn linked(chains: Vec<Vec<Point>>, along: Point) -> Cut {
    let mut crossings: Vec<(Point, usize, bool)> = Vec::new();
    for (i, chain) in chains.iter().enumerate() {
        if let (Some(first), Some(last)) = (chain.first(), chain.last()) {
            crossings.push((*first, i, true));
            crossings.push((*last, i, false));
        }
    }
    crossings.sort_by(|a, b| along.dot(a.0).total_cmp(&along.dot(b.0)));
    let mut cut = Cut::default();
    // Which chain a chain goes on with; itself, where rounding has upset the order.
    let mut next: Vec<usize> = (0..chains.len()).collect();
    for pair in crossings.chunks_exact(2) {
        cut.surfaces.push([pair[0].0, pair[1].0]);
        match (pair[0], pair[1]) {
            ((_, into, true), (_, from, false)) | ((_, from, false), (_, into, true)) => {
                next[from] = into;
            }
            _ => {}
        }
    }
    let mut done = vec![false; chains.len()];
    for first in 0..chains.len() {
        let (mut pool, mut at) = (Vec::new(), first);
        while !done[at] {
            done[at] = true;
            pool.extend_from_slice(&chains[at]);
            at = next[at];
        }
        if pool.len() > 2 {
            cut.pools.push(pool);
        }
    }
    cut
}

/// What is left of a stretch outside a convex polygon.
pub(super) fn outside(stretch: [Point; 2], convex: &[Point]) -> Vec<[Point; 2]> {
    let [from, to] = stretch;
    let step = Point::new(to.x - from.x, to.y - from.y);
    let left = signed_area(convex).signum();
    let (mut enter, mut leave) = (0.0f64, 1.0f64);
    for (a, b) in edges(convex) {
        // Distance to the inner side of the edge, at the beginning and gained on the way.
        let inward = Point::new(b.x - a.x, b.y - a.y).left();
        let at = left * inward.dot(Point::new(from.x - a.x, from.y - a.y));
        let gain = left * inward.dot(step);
        if gain > 0.0 {
            enter = enter.max(-at / gain);
        } else if gain < 0.0 {
            leave = leave.min(-at / gain);
        } else if at < 0.0 {
            return vec![stretch];
        }
    }
    if enter >= leave {
        return vec![stretch];
    }
    [(0.0, enter), (leave, 1.0)]
        .into_iter()
        .filter(|(low, high)| high - low > 1e-9)
        .map(|(low, high)| [from.plus(step, low), from.plus(step, high)])
        .collect()
}

/// Strokes at an angle and an even distance over an area. They lie on a grid common to
/// the whole picture, so that neighbours join.
pub(super) fn hatched(area: &Area, angle_deg: f64, distance_m: f64) -> Vec<Hatch> {
    let along = Point::direction(angle_deg);
    let across = along.left();
    let reach = |fold: fn(f64, f64) -> f64, start: f64| {
        area.outline
            .iter()
            .map(|p| across.dot(*p))
            .fold(start, fold)
    };
    let (low, high) = (
        reach(f64::min, f64::INFINITY),
        reach(f64::max, f64::NEG_INFINITY),
    );
    let mut strokes = Vec::new();
    let first = (low / distance_m).ceil();
    // A guard; the distance goes with the picture.
    for k in 0..2000 {
        // Off the grid by a hair, so that no stroke runs along an edge.
        let at = (first + f64::from(k) + 1e-6) * distance_m;
        if at >= high || at.is_nan() {
            break;
        }
        let mut meets: Vec<f64> = edges(&area.outline)
            .filter_map(|(a, b)| {
                let (da, db) = (across.dot(a) - at, across.dot(b) - at);
                ((da > 0.0) != (db > 0.0))
                    .then(|| along.dot(a) + (along.dot(b) - along.dot(a)) * da / (da - db))
            })
            .collect();
        meets.sort_by(f64::total_cmp);
        let place = |t: f64| Point::new(0.0, 0.0).plus(along, t).plus(across, at);
        strokes.extend(meets.chunks_exact(2).map(|pair| Hatch {
            ends: [place(pair[0]), place(pair[1])],
            paint: area.paint,
        }));
    }
    strokes
}

#[cfg(test)]
mod tests {
    use super::super::Paint;
    use super::*;

    fn polygon(points: &[(f64, f64)]) -> Vec<Point> {
        points.iter().map(|(x, y)| Point::new(*x, *y)).collect()
    }

    /// A dumb-bell, as two bulbs on a tube lie.
    fn dumb_bell() -> Vec<Point> {
        polygon(&[
            (0.0, -2.0),
            (2.0, -2.0),
            (2.0, -1.0),
            (4.0, -1.0),
            (4.0, -2.0),
            (6.0, -2.0),
            (6.0, 2.0),
            (4.0, 2.0),
            (4.0, 1.0),
            (2.0, 1.0),
            (2.0, 2.0),
            (0.0, 2.0),
        ])
    }

    const UP: Point = Point::new(0.0, 1.0);

    #[test]
    fn a_level_makes_as_many_pools_as_there_are() {
        for (level, pools, area) in [
            (-1.5, 2, 2.0),
            (0.0, 1, 10.0),
            (1.5, 1, 18.0),
            (3.0, 1, 20.0),
        ] {
            let cut = below(&dumb_bell(), UP, level);
            assert_eq!(cut.pools.len(), pools, "{level}");
            let sum: f64 = cut.pools.iter().map(|pool| signed_area(pool)).sum();
            assert!((sum - area).abs() < 1e-12, "{level}: {sum}");
        }
        assert_eq!(below(&dumb_bell(), UP, 1.5).surfaces.len(), 2);
        assert_eq!(below(&dumb_bell(), UP, 0.0).surfaces.len(), 1);
        assert!(below(&dumb_bell(), UP, -3.0).pools.is_empty());
        // A level in a face of the polygon counts as under it.
        let sum: f64 = below(&dumb_bell(), UP, -1.0)
            .pools
            .iter()
            .map(|p| signed_area(p))
            .sum();
        assert!((sum - 4.0).abs() < 1e-12, "{sum}");
    }

    #[test]
    fn a_stretch_loses_what_a_convex_polygon_covers() {
        let square = polygon(&[(1.0, -1.0), (3.0, -1.0), (3.0, 1.0), (1.0, 1.0)]);
        let stretch = |y| [Point::new(0.0, y), Point::new(4.0, y)];
        let left = outside(stretch(0.0), &square);
        assert_eq!(left.len(), 2);
        assert!((left[0][1].x - 1.0).abs() < 1e-12 && (left[1][0].x - 3.0).abs() < 1e-12);
        assert_eq!(outside(stretch(2.0), &square), [stretch(2.0)]);
        let within = [Point::new(1.5, 0.0), Point::new(2.0, 0.5)];
        assert!(outside(within, &square).is_empty());
        let mut turned = square;
        turned.reverse();
        assert_eq!(outside(stretch(0.0), &turned).len(), 2);
    }

    #[test]
    fn hatches_stay_inside_and_cover_evenly() {
        let area = Area {
            outline: dumb_bell(),
            paint: Paint::Wick,
        };
        for angle in [0.0, 45.0, 90.0, 135.0] {
            let strokes = hatched(&area, angle, 0.01);
            let length: f64 = strokes
                .iter()
                .map(|s| (s.ends[0].x - s.ends[1].x).hypot(s.ends[0].y - s.ends[1].y))
                .sum();
            assert!((length * 0.01 - 20.0).abs() < 0.1, "{angle}: {length}");
            for stroke in &strokes {
                let [a, b] = stroke.ends;
                let middle = Point::new(0.5 * (a.x + b.x), 0.5 * (a.y + b.y));
                assert!(inside(&area.outline, middle));
            }
        }
    }
}
