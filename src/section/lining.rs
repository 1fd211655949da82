//! Wicks on the wall: layers laid along pieces of the bore they are made for.

use super::piece::{Form, Piece};

/// A wick on the wall of one piece.
#[derive(Debug, Clone, PartialEq)]
pub struct Layer {
    pub lies: Lies,
    pub thickness_m: f64,
    /// Index of the wick in [`crate::chamber::Chamber::parts`].
    pub part: usize,
    pub text: String,
}

#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Lies {
    /// Inside the bore: screen, powder, felt.
    OnTheWall,
    /// Grooves that begin at the bore.
    InTheWall,
}

/// A wick as it is made: for a bore, over a length.
#[derive(Debug, Clone, PartialEq)]
pub struct Lining {
    /// Diameter, or the shorter side of a flat cavity; 0 for one that lies in any.
    pub bore_m: f64,
    pub length_m: f64,
    /// What its solids take of the cross-section; below 0 for grooves, whose room
    /// is added to the bore.
    pub solid_m2: f64,
    pub layer: Layer,
}

/// How far a bore may differ from the wick's and still be meant.
const SAME_BORE: f64 = 0.03;

impl Layer {
    /// What it takes off the bore on each side.
    pub const fn inward_m(&self) -> f64 {
        match self.lies {
            Lies::OnTheWall => self.thickness_m,
            Lies::InTheWall => 0.0,
        }
    }
}

impl Lining {
    /// Lays the wick in its bore, or where there is no such bore in any that is wider.
    pub fn lay_or_force(&self, pieces: &mut Vec<Piece>) -> f64 {
        let left_m = self.lay(pieces);
        if left_m < self.length_m {
            return left_m;
        }
        let Some(bore_m) = pieces
            .iter()
            .filter_map(|piece| Some(piece.form.prism()?.0))
            .filter(|bore_m| *bore_m > self.bore_m)
            .reduce(f64::min)
        else {
            return left_m;
        };
        let forced = Self {
            bore_m,
            ..self.clone()
        };
        forced.lay(pieces)
    }

    /// Lays the wick along the pieces of its bore, from the first on, and cuts the piece
    /// in which it ends in two. Gives the length that found no place.
    pub fn lay(&self, pieces: &mut Vec<Piece>) -> f64 {
        let mut left_m = self.length_m;
        let mut at = 0;
        while at < pieces.len() && left_m > 1e-9 * self.length_m {
            let piece = &mut pieces[at];
            let Some((bore_m, area_m2)) = piece.form.prism() else {
                at += 1;
                continue;
            };
            let fits = self.bore_m <= 0.0 || (bore_m / self.bore_m - 1.0).abs() <= SAME_BORE;
            if !fits || area_m2 <= 0.0 {
                at += 1;
                continue;
            }
            let length_m = piece.form.length_m();
            // A rest too short to be seen is not cut off.
            if left_m < 0.999 * length_m {
                let rest = Piece {
                    form: piece.form.cut_to(length_m - left_m),
                    ..piece.clone()
                };
                piece.form = piece.form.cut_to(left_m);
                pieces.insert(at + 1, rest);
            }
            let piece = &mut pieces[at];
            left_m -= length_m.min(left_m);
            piece.solid_share += self.solid_m2 / area_m2;
            piece.layers.push(self.layer.clone());
            at += 1;
        }
        left_m.max(0.0)
    }
}

/// Share of a cross-section that pillars between two faces take: `rows` across the
/// depth and `columns` along the length, even over the box.
pub fn pillar_share(form: &Form, diameter_m: f64, columns: u32, rows: u32) -> f64 {
    let Form::Slab {
        length_m, depth_m, ..
    } = form
    else {
        return 0.0;
    };
    let feet_m2 = 0.25 * std::f64::consts::PI * diameter_m * diameter_m;
    f64::from(columns) * f64::from(rows) * feet_m2 / (length_m * depth_m)
}

#[cfg(test)]
mod tests {
    use super::*;
    use std::f64::consts::PI;

    fn powder(length_m: f64) -> Lining {
        // Solids of half a layer 1 mm thick in a bore of 16 mm.
        let solid_m2 = 0.5 * 0.25 * PI * (0.016f64.powi(2) - 0.014f64.powi(2));
        Lining {
            bore_m: 0.016,
            length_m,
            solid_m2,
            layer: Layer {
                lies: Lies::OnTheWall,
                thickness_m: 0.001,
                part: 3,
                text: String::new(),
            },
        }
    }

    /// Sintered annulus of methods.md, F3: outside 16, inside 14 mm, 200 mm long,
    /// porosity 0.5.
    #[test]
    fn a_lining_takes_its_solids_off_the_volume_and_ends_where_it_ends() {
        let tube = |length| Piece::bare(Form::cylinder(0.016, length), 0);
        let mut pieces = vec![tube(0.12), tube(0.18)];
        let gross: f64 = pieces.iter().map(Piece::volume_m3).sum();
        assert_eq!(powder(0.2).lay(&mut pieces), 0.0);
        assert_eq!(pieces.len(), 3);
        let lengths: Vec<f64> = pieces.iter().map(|p| p.form.length_m()).collect();
        for (got, expected) in lengths.iter().zip([0.12, 0.08, 0.1]) {
            assert!((got - expected).abs() < 1e-15, "{got}");
        }
        assert_eq!(
            pieces.iter().map(Piece::lining_m).collect::<Vec<_>>(),
            [0.001, 0.001, 0.0]
        );
        let net: f64 = pieces.iter().map(Piece::volume_m3).sum();
        let solids = powder(0.2).solid_m2 * 0.2;
        assert!(((gross - net) / solids - 1.0).abs() < 1e-12);
    }

    #[test]
    fn what_does_not_fit_is_given_back() {
        let mut pieces = vec![
            Piece::bare(Form::cylinder(0.011, 0.3), 0),
            Piece::bare(Form::cylinder(0.016, 0.15), 0),
        ];
        assert!((powder(0.2).lay(&mut pieces) - 0.05).abs() < 1e-15);
        assert_eq!(pieces.len(), 2);
        assert!(pieces[0].layers.is_empty());
    }

    #[test]
    fn pillars_take_their_feet() {
        let slab = Form::Slab {
            length_m: 0.06,
            height_m: 0.003,
            depth_m: 0.04,
        };
        let share = pillar_share(&slab, 0.002, 5, 4);
        assert!((share - 20.0 * PI * 1e-6 / 0.0024).abs() < 1e-15);
    }
}
