//! One smooth stretch of a meridian: the inside radius over the distance along the axis.

use std::f64::consts::PI;

/// A straight line or an arc, between two places on the axis.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Stretch {
    pub from_m: f64,
    pub to_m: f64,
    pub curve: Curve,
}

#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Curve {
    /// From one radius to another: cylinder and cone.
    Line { first_m: f64, last_m: f64 },
    /// The outer half of an ellipse whose centre lies `lift_m` off the axis: sphere,
    /// ellipsoid, and the knuckle of a torisphere.
    Arc {
        centre_m: f64,
        lift_m: f64,
        along_m: f64,
        across_m: f64,
    },
}

impl Stretch {
    pub const fn line(from_m: f64, to_m: f64, first_m: f64, last_m: f64) -> Self {
        Self {
            from_m,
            to_m,
            curve: Curve::Line { first_m, last_m },
        }
    }

    /// Part of a sphere around a place on the axis.
    pub const fn sphere(from_m: f64, to_m: f64, centre_m: f64, radius_m: f64) -> Self {
        Self {
            from_m,
            to_m,
            curve: Curve::Arc {
                centre_m,
                lift_m: 0.0,
                along_m: radius_m,
                across_m: radius_m,
            },
        }
    }

    pub(super) const fn is_straight(&self) -> bool {
        matches!(self.curve, Curve::Line { .. })
    }

    /// Inside radius at a place of the stretch.
    pub fn radius_m(&self, x_m: f64) -> f64 {
        match self.curve {
            Curve::Line { first_m, last_m } => {
                if self.to_m <= self.from_m {
                    return first_m;
                }
                let share = (x_m - self.from_m) / (self.to_m - self.from_m);
                first_m + (last_m - first_m) * share
            }
            Curve::Arc {
                centre_m,
                lift_m,
                along_m,
                across_m,
            } => {
                let t = (x_m - centre_m) / along_m;
                // (1 − t)(1 + t) keeps its digits where the arc meets the axis.
                lift_m + across_m * ((1.0 - t) * (1.0 + t)).max(0.0).sqrt()
            }
        }
    }

    /// Volume of revolution from the stretch's beginning to a place on it.
    ///
    /// line  V = π l (r₁² + r₁ r + r²)/3
    /// arc   V = π a [c² t + c b (t √(1−t²) + asin t) + b² (t − t³/3)] between both t
    ///
    /// | symbol  | meaning                                        | unit |
    /// |---------|------------------------------------------------|------|
    /// | l       | length of the line so far                      | m    |
    /// | r₁, r   | radius at its beginning, at the place          | m    |
    /// | a, b    | half axes of the arc, along and across         | m    |
    /// | c       | distance of the arc's centre from the axis     | m    |
    /// | t       | place from the arc's centre, over a            | –    |
    ///
    /// Source: ∫ π r² dx, own integration; checked against quadrature in `piece.rs`.
    pub fn volume_to_m3(&self, x_m: f64) -> f64 {
        let x_m = x_m.clamp(self.from_m, self.to_m);
        match self.curve {
            Curve::Line { first_m, .. } => {
                let r = self.radius_m(x_m);
                PI * (x_m - self.from_m) * (first_m * first_m + first_m * r + r * r) / 3.0
            }
            Curve::Arc {
                centre_m,
                lift_m: c,
                along_m: a,
                across_m: b,
            } => {
                let at = |x: f64| {
                    let t = ((x - centre_m) / a).clamp(-1.0, 1.0);
                    let half = t * ((1.0 - t) * (1.0 + t)).sqrt() + t.asin();
                    c * c * t + c * b * half + b * b * (t - t * t * t / 3.0)
                };
                PI * a * (at(x_m) - at(self.from_m))
            }
        }
    }

    /// Places where the radius meets the line y = α + β x or its mirror image, among
    /// others: each smooth part of the cut lies between two of them.
    pub(super) fn meets(&self, alpha_m: f64, beta: f64) -> impl Iterator<Item = f64> {
        let found = [1.0, -1.0].map(|sign| self.meets_one(sign * alpha_m, sign * beta));
        found
            .into_iter()
            .flatten()
            .filter(|x| x.is_finite() && *x > self.from_m && *x < self.to_m)
    }

    fn meets_one(&self, alpha_m: f64, beta: f64) -> [f64; 2] {
        match self.curve {
            Curve::Line { first_m, last_m } => {
                let slope = (last_m - first_m) / (self.to_m - self.from_m);
                let x = (first_m - slope * self.from_m - alpha_m) / (beta - slope);
                [x, f64::NAN]
            }
            Curve::Arc {
                centre_m,
                lift_m,
                along_m: a,
                across_m: b,
            } => {
                // (p + q t)² = b² (1 − t²)
                let p = alpha_m + beta * centre_m - lift_m;
                let q = beta * a;
                let sum = q * q + b * b;
                let root = b * (sum - p * p).sqrt();
                [-1.0, 1.0].map(|sign| centre_m + a * (sign * root - p * q) / sum)
            }
        }
    }

    /// Greatest value of x·`along` + r·`across` on the stretch; `across` is at least 0.
    pub(super) fn reach_m(&self, along: f64, across: f64) -> f64 {
        let value = |x: f64| x * along + self.radius_m(x) * across;
        let ends = value(self.from_m).max(value(self.to_m));
        match self.curve {
            Curve::Line { .. } => ends,
            Curve::Arc {
                centre_m,
                along_m: a,
                across_m: b,
                ..
            } => {
                let t = a * along / (a * along).hypot(b * across);
                let x = centre_m + a * t;
                if (self.from_m..=self.to_m).contains(&x) {
                    ends.max(value(x))
                } else {
                    ends
                }
            }
        }
    }

    /// The same stretch seen from the other end of a body of this length.
    pub(super) fn reversed(&self, length_m: f64) -> Self {
        let curve = match self.curve {
            Curve::Line { first_m, last_m } => Curve::Line {
                first_m: last_m,
                last_m: first_m,
            },
            Curve::Arc {
                centre_m,
                lift_m,
                along_m,
                across_m,
            } => Curve::Arc {
                centre_m: length_m - centre_m,
                lift_m,
                along_m,
                across_m,
            },
        };
        Self {
            from_m: length_m - self.to_m,
            to_m: length_m - self.from_m,
            curve,
        }
    }

    /// Points to draw the stretch by, the wall's inside and its outside `wall_m` off,
    /// square to the meridian on an arc and square to the axis on a line. An arc turns
    /// by two degrees between points.
    pub fn drawn(&self, wall_m: f64) -> Vec<([f64; 2], [f64; 2])> {
        match self.curve {
            Curve::Line { first_m, last_m } => {
                let slope = (last_m - first_m) / (self.to_m - self.from_m).max(f64::MIN_POSITIVE);
                // A cone's wall is measured square to it; square to the axis it is thicker.
                let thick = wall_m * 1f64.hypot(slope).min(1e3);
                [(self.from_m, first_m), (self.to_m, last_m)]
                    .map(|(x, r)| ([x, r], [x, r + thick]))
                    .to_vec()
            }
            Curve::Arc {
                centre_m,
                lift_m,
                along_m: a,
                across_m: b,
            } => {
                let angle = |x: f64| ((x - centre_m) / a).clamp(-1.0, 1.0).acos();
                let (first, last) = (angle(self.from_m), angle(self.to_m));
                let steps = ((first - last).to_degrees() / 2.0).ceil().max(1.0);
                (0..=steps as usize)
                    .map(|i| {
                        let phi = first + (last - first) * i as f64 / steps;
                        let (sin, cos) = phi.sin_cos();
                        let normal = [cos / a, sin / b];
                        let size = normal[0].hypot(normal[1]);
                        let point = [centre_m + a * cos, lift_m + b * sin];
                        let off = |k: usize| point[k] + wall_m * normal[k] / size;
                        (point, [off(0), off(1)])
                    })
                    .collect()
            }
        }
    }
}
