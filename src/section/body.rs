//! Solid bodies inside a device: how much room they take, and where they are drawn.

use std::f64::consts::PI;

use super::piece::{Form, Piece};

/// Inserts alike, before they have a place.
#[derive(Debug, Clone, PartialEq)]
pub struct Insert {
    pub solid: Solid,
    pub made: Made,
    /// Share of its own room that it takes away; 1 where it has no pores.
    pub solidity: f64,
    pub count: u32,
    /// Index in [`crate::chamber::Chamber::parts`].
    pub part: usize,
    pub text: String,
}

/// A solid, its length along the axis of the device.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Solid {
    Rod {
        diameter_m: f64,
        length_m: f64,
    },
    Ball {
        diameter_m: f64,
    },
    Block {
        length_m: f64,
        height_m: f64,
        depth_m: f64,
    },
}

/// A body as it is drawn.
#[derive(Debug, Clone, PartialEq)]
pub struct Body {
    pub outline: BodyOutline,
    /// Of its middle: along the axis of the device, and over it.
    pub along_m: f64,
    pub over_m: f64,
    pub made: Made,
    pub part: usize,
    pub text: String,
}

#[derive(Debug, Clone, Copy, PartialEq)]
pub enum BodyOutline {
    Bar { length_m: f64, height_m: f64 },
    Disc { diameter_m: f64 },
}

/// What a body is made of.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Made {
    Solid,
    /// An artery, for instance.
    Porous,
}

/// More bodies alike are not drawn; their room counts all the same.
const DRAWN_AT_MOST: usize = 60;

impl Solid {
    pub fn volume_m3(&self) -> f64 {
        match self {
            Self::Rod {
                diameter_m,
                length_m,
            } => 0.25 * PI * diameter_m * diameter_m * length_m,
            Self::Ball { diameter_m } => PI * diameter_m.powi(3) / 6.0,
            Self::Block {
                length_m,
                height_m,
                depth_m,
            } => length_m * height_m * depth_m,
        }
    }

    /// Length along the axis and height in the plane of the drawing.
    fn sides_m(&self) -> (f64, f64) {
        match *self {
            Self::Rod {
                diameter_m,
                length_m,
            } => (length_m, diameter_m),
            Self::Ball { diameter_m } => (diameter_m, diameter_m),
            Self::Block {
                length_m, height_m, ..
            } => (length_m, height_m),
        }
    }

    fn outline(&self, (length_m, height_m): (f64, f64)) -> BodyOutline {
        match self {
            Self::Ball { .. } => BodyOutline::Disc {
                diameter_m: length_m.min(height_m),
            },
            _ => BodyOutline::Bar { length_m, height_m },
        }
    }
}

impl Insert {
    /// Puts the inserts into the largest part that holds one, or into the largest of all
    /// where none does, and takes their room off it evenly.
    pub fn put_into(&self, pieces: &mut [Piece]) -> Vec<Body> {
        let Some(part) = self.roomiest(pieces) else {
            return Vec::new();
        };
        let room_m3: f64 = of_part(pieces, part).map(gross_m3).sum();
        let taken_m3 = self.solidity * self.solid.volume_m3() * f64::from(self.count);
        for piece in pieces.iter_mut().filter(|piece| piece.part == part) {
            piece.solid_share += taken_m3 / room_m3;
        }
        self.drawn(pieces, part)
    }

    fn roomiest(&self, pieces: &[Piece]) -> Option<usize> {
        let mut best: Option<(bool, f64, usize)> = None;
        for piece in pieces {
            let room_m3: f64 = of_part(pieces, piece.part).map(gross_m3).sum();
            let holds = of_part(pieces, piece.part).any(|piece| self.fits(&piece.form));
            if room_m3 > 0.0 && best.is_none_or(|(h, m3, _)| (holds, room_m3) > (h, m3)) {
                best = Some((holds, room_m3, piece.part));
            }
        }
        best.map(|(_, _, part)| part)
    }

    fn fits(&self, form: &Form) -> bool {
        let (length_m, height_m) = self.solid.sides_m();
        let (long, high) = room_m(form);
        length_m <= long * (1.0 + 1e-9) && height_m <= high * (1.0 + 1e-9)
    }

    /// In columns along the axis and rows over one another, with even gaps.
    fn drawn(&self, pieces: &[Piece], part: usize) -> Vec<Body> {
        let cells: Vec<&Piece> = of_part(pieces, part)
            .filter(|piece| piece.form.length_m() > 0.0)
            .collect();
        let each = (self.count as usize)
            .min(DRAWN_AT_MOST)
            .div_ceil(cells.len().max(1));
        let mut left = (self.count as usize).min(DRAWN_AT_MOST);
        let mut bodies = Vec::new();
        for piece in cells {
            let count = each.min(left);
            left -= count;
            let (long, high) = room_m(&piece.form);
            let (length_m, height_m) = self.solid.sides_m();
            let sides = (length_m.min(0.98 * long), height_m.min(0.98 * high));
            let fit = |room: f64, side: f64| ((room / side) as usize).clamp(1, DRAWN_AT_MOST);
            let columns = fit(long, sides.0).min(count.max(1));
            let rows = fit(high, sides.1).min(count.div_ceil(columns).max(1));
            let middle = middle_m(&piece.form);
            for i in 0..count.min(columns * rows) {
                let (column, row) = (i % columns, i / columns);
                let even = |i: usize, n: usize| (i as f64 + 0.5) / n as f64 - 0.5;
                bodies.push(Body {
                    outline: self.solid.outline(sides),
                    along_m: piece.start_m
                        + piece.form.length_m() * 0.5
                        + long * even(column, columns),
                    over_m: middle + high * even(row, rows),
                    made: self.made,
                    part: self.part,
                    text: self.text.clone(),
                });
            }
        }
        bodies
    }
}

fn of_part(pieces: &[Piece], part: usize) -> impl Iterator<Item = &Piece> {
    pieces.iter().filter(move |piece| piece.part == part)
}

fn gross_m3(piece: &Piece) -> f64 {
    piece.form.volume_to_m3(piece.form.length_m())
}

/// Length and height that a body may take in a form, its height in the middle.
fn room_m(form: &Form) -> (f64, f64) {
    let length_m = form.length_m();
    let height_m = match form {
        Form::Annulus {
            inside_m, core_m, ..
        } => 0.5 * (inside_m - core_m),
        _ => 2.0 * form.half_height_m(0.5 * length_m),
    };
    (length_m, height_m)
}

/// Height over the axis around which bodies are put.
fn middle_m(form: &Form) -> f64 {
    match form {
        Form::Annulus {
            inside_m, core_m, ..
        } => 0.25 * (inside_m + core_m),
        _ => 0.0,
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn insert(solid: Solid, count: u32) -> Insert {
        Insert {
            solid,
            made: Made::Solid,
            solidity: 1.0,
            count,
            part: 9,
            text: String::new(),
        }
    }

    #[test]
    fn inserts_go_into_the_largest_part_that_holds_them_and_take_their_room() {
        // The second is roomier but too short for the rod.
        let mut pieces = vec![
            Piece::bare(Form::cylinder(0.02, 0.3), 0),
            Piece::bare(Form::cylinder(0.06, 0.05), 1),
        ];
        let rod = Solid::Rod {
            diameter_m: 0.004,
            length_m: 0.2,
        };
        let before: f64 = pieces.iter().map(Piece::volume_m3).sum();
        let bodies = insert(rod, 3).put_into(&mut pieces);
        let after: f64 = pieces.iter().map(Piece::volume_m3).sum();
        assert!(((before - after) / (3.0 * rod.volume_m3()) - 1.0).abs() < 1e-12);
        assert!(pieces[0].solid_share > 0.0 && pieces[1].solid_share == 0.0);
        assert_eq!(bodies.len(), 3);
        for body in &bodies {
            assert!((body.along_m - 0.15).abs() < 1e-15 && body.over_m.abs() <= 0.008);
        }
    }

    #[test]
    fn many_balls_are_spread_and_the_rest_only_counted() {
        let mut pieces = vec![Piece::bare(Form::cylinder(0.02, 0.3), 0)];
        let ball = Solid::Ball { diameter_m: 0.005 };
        let bodies = insert(ball, 500).put_into(&mut pieces);
        assert!(bodies.len() <= 60 && bodies.len() > 10, "{}", bodies.len());
        let taken = 500.0 * ball.volume_m3() / (PI * 1e-4 * 0.3);
        assert!((pieces[0].solid_share / taken - 1.0).abs() < 1e-12);
    }
}
