//! From a list of parts to the pieces of a device, in order along its axis.

use super::Device;
use super::body::{Body, BodyOutline, Insert, Made};
use super::lining::{Lining, pillar_share};
use super::piece::{Form, Piece, Side};

/// What a part is in the section.
#[derive(Debug, Clone, PartialEq)]
pub enum Place {
    /// Lies along the axis.
    Along(Form),
    /// A box with round pillars from face to face: columns along the axis, rows across.
    Pillared {
        form: Form,
        diameter_m: f64,
        columns: u32,
        rows: u32,
    },
    /// Opened by the bores beside it.
    Sphere { diameter_m: f64 },
    /// A sphere whose neck leads to the next piece, or back where it is the last.
    Bulb {
        diameter_m: f64,
        neck_diameter_m: f64,
        neck_length_m: f64,
    },
    /// Closes an end; given as it stands at the beginning.
    End(Form),
    /// A volume without known shape, drawn as a stretch of the bore beside it.
    DeadVolume { volume_m3: f64 },
    /// Lies inside; the count is that of the part.
    Inside(Insert),
    /// Lies on the wall.
    OnWall(Lining),
}

/// A part in the section, still in the order of the list.
#[derive(Debug, Clone, PartialEq)]
pub struct Stacked {
    pub place: Place,
    pub count: u32,
    pub wall_m: f64,
    /// Index in [`crate::chamber::Chamber::parts`].
    pub part: usize,
    pub text: String,
}

/// Why a chamber has no section.
#[derive(Debug, Clone, Copy, PartialEq, Eq, thiserror::Error)]
pub enum NoSection {
    #[error("no part encloses a volume")]
    NothingEnclosed,
    #[error("the inserts leave no room")]
    InsertsTooLarge,
    #[error("more than {most} pieces in a row are not drawn")]
    TooManyPieces { most: usize },
}

/// More are no drawing any more.
const MOST_PIECES: usize = 60;

impl Device {
    /// Parts along the axis in the order of the list. Two ends alike close both ends, a
    /// single one the beginning where it comes first and the end where it comes last;
    /// one in between closes what is still open, or stays where it is.
    ///
    /// # Errors
    /// [`NoSection`].
    pub fn assemble(parts: &[Stacked]) -> Result<Self, NoSection> {
        let row = in_a_row(parts)?;
        let mut pieces: Vec<Piece> = (0..row.len())
            .filter_map(|i| piece(&row, i))
            .filter(|piece| {
                matches!(piece.form, Form::Plate { .. })
                    || piece.form.volume_to_m3(f64::INFINITY) > 0.0
            })
            .collect();
        for part in parts {
            if let Place::OnWall(lining) = &part.place {
                lining.lay_or_force(&mut pieces);
            }
        }
        let mut start_m = 0.0;
        for piece in &mut pieces {
            piece.start_m = start_m;
            start_m += piece.form.length_m();
        }
        let mut bodies = Vec::new();
        for part in parts {
            match &part.place {
                Place::Inside(insert) => bodies.extend(insert.put_into(&mut pieces)),
                Place::Pillared {
                    diameter_m,
                    columns,
                    rows,
                    ..
                } => {
                    for piece in pieces.iter_mut().filter(|piece| piece.part == part.part) {
                        piece.solid_share +=
                            pillar_share(&piece.form, *diameter_m, *columns, *rows);
                        bodies.extend(pillars(piece, *diameter_m, *columns));
                    }
                }
                _ => {}
            }
        }
        let mut device = Self { pieces, bodies };
        device.keep_room()?;
        Ok(device)
    }

    /// Where inserts overflow the part they were put in, they lie in all of them.
    fn keep_room(&mut self) -> Result<(), NoSection> {
        let gross = |piece: &Piece| piece.form.volume_to_m3(piece.form.length_m());
        let whole_m3: f64 = self.pieces.iter().map(gross).sum();
        if whole_m3 <= 0.0 {
            return Err(NoSection::NothingEnclosed);
        }
        let solid_m3: f64 = self.pieces.iter().map(|p| p.solid_share * gross(p)).sum();
        if solid_m3 >= whole_m3 {
            return Err(NoSection::InsertsTooLarge);
        }
        if self.pieces.iter().any(|piece| piece.solid_share >= 1.0) {
            for piece in &mut self.pieces {
                piece.solid_share = solid_m3 / whole_m3;
            }
        }
        Ok(())
    }
}

/// A place in the row, and whether it is turned to face backwards.
type Row<'a> = Vec<(&'a Stacked, bool)>;

fn in_a_row(parts: &[Stacked]) -> Result<Row<'_>, NoSection> {
    let outer: Vec<&Stacked> = parts
        .iter()
        .filter(|part| !matches!(part.place, Place::Inside(_) | Place::OnWall(_)))
        .filter(|part| part.count > 0)
        .collect();
    let is_end = |part: &Stacked| matches!(part.place, Place::End(_));
    let (mut begin, mut finish) = (Vec::new(), Vec::new());
    let mut single = Vec::new();
    for (i, part) in outer.iter().copied().enumerate().filter(|(_, p)| is_end(p)) {
        if part.count >= 2 {
            begin.insert(0, part);
            finish.push(part);
        } else if i == 0 {
            begin.insert(0, part);
        } else if i + 1 == outer.len() {
            finish.push(part);
        } else {
            single.push(i);
        }
    }
    let bores: Vec<&Stacked> = outer.iter().copied().filter(|part| !is_end(part)).collect();
    let mut stays = Vec::new();
    for i in single {
        let part = outer[i];
        let off = |bore: Option<&&Stacked>, side| {
            let mouth = |part: &Stacked, side| mouth_m(part, false, side);
            bore.map_or(0.0, |bore| {
                (mouth(bore, side) - mouth(part, Side::Last)).abs()
            })
        };
        match (begin.is_empty(), finish.is_empty()) {
            (true, true) if off(bores.last(), Side::Last) < off(bores.first(), Side::First) => {
                finish.push(part);
            }
            (true, _) => begin.push(part),
            (false, true) => finish.push(part),
            (false, false) => stays.push(i),
        }
    }
    let mut row: Row = begin.into_iter().map(|part| (part, false)).collect();
    for (i, part) in outer.iter().copied().enumerate() {
        let times = match &part.place {
            Place::End(_) if stays.contains(&i) => 1,
            Place::End(_) => part.count.saturating_sub(2),
            place if is_one_stretch(place) => 1,
            _ => part.count,
        };
        if row.len() + times as usize > MOST_PIECES {
            return Err(NoSection::TooManyPieces { most: MOST_PIECES });
        }
        row.extend((0..times).map(|_| (part, is_end(part))));
    }
    // The last bulb's neck leads back, where there is something to lead to.
    let last = row.len().saturating_sub(1);
    if let Some((part, backwards)) = row.get_mut(last)
        && matches!(part.place, Place::Bulb { .. })
    {
        *backwards = last > 0;
    }
    row.extend(finish.into_iter().map(|part| (part, true)));
    Ok(row)
}

/// Prisms alike in a row make one longer; a core is closed, and closes again.
fn is_one_stretch(place: &Place) -> bool {
    match place {
        Place::Along(Form::Annulus { .. }) => false,
        Place::Along(form) => form.prism().is_some(),
        _ => false,
    }
}

fn piece(row: &Row, i: usize) -> Option<Piece> {
    let (part, backwards) = row.get(i)?;
    let beside = |at: Option<usize>, side| {
        at.and_then(|at| row.get(at))
            .map_or(0.0, |(part, backwards)| mouth_m(part, *backwards, side))
    };
    let before_m = beside(i.checked_sub(1), Side::Last);
    let after_m = beside(Some(i + 1), Side::First);
    let form = match &part.place {
        Place::Along(form) if is_one_stretch(&part.place) => {
            form.cut_to(f64::from(part.count) * form.length_m())
        }
        Place::Along(form) | Place::Pillared { form, .. } | Place::End(form) => form.clone(),
        Place::Sphere { diameter_m } => Form::sphere(
            *diameter_m,
            before_m.min(*diameter_m),
            after_m.min(*diameter_m),
        ),
        Place::Bulb {
            diameter_m,
            neck_diameter_m,
            neck_length_m,
        } => {
            let opening_m = if *backwards { after_m } else { before_m };
            Form::bulb(
                *diameter_m,
                opening_m.min(*diameter_m),
                *neck_diameter_m,
                *neck_length_m,
            )
        }
        Place::DeadVolume { volume_m3 } => {
            let bore_m = if before_m > 0.0 { before_m } else { after_m };
            // Without a bore beside it, as long as it is wide.
            let bore_m = if bore_m > 0.0 {
                bore_m
            } else {
                (4.0 * volume_m3 / std::f64::consts::PI).cbrt()
            };
            let area_m2 = 0.25 * std::f64::consts::PI * bore_m * bore_m;
            Form::cylinder(bore_m, volume_m3 / area_m2)
        }
        Place::Inside(_) | Place::OnWall(_) => return None,
    };
    let form = if *backwards { form.reversed() } else { form };
    let mut piece = Piece::bare(form, part.part);
    piece.wall_m = part.wall_m;
    piece.text = part.text.clone();
    Some(piece)
}

/// The way out of a place; that of a sphere is what its neighbours make it.
fn mouth_m(part: &Stacked, backwards: bool, side: Side) -> f64 {
    let leads_on = (side == Side::Last) != backwards;
    match &part.place {
        Place::Along(form) | Place::Pillared { form, .. } | Place::End(form) => {
            form.mouth_m(if leads_on { Side::Last } else { Side::First })
        }
        Place::Bulb {
            neck_diameter_m, ..
        } if leads_on => *neck_diameter_m,
        _ => 0.0,
    }
}

/// One row of pillars, as the section shows it.
fn pillars(piece: &Piece, diameter_m: f64, columns: u32) -> Vec<Body> {
    let Form::Slab {
        length_m, height_m, ..
    } = piece.form
    else {
        return Vec::new();
    };
    let columns = columns.min(100);
    (1..=columns)
        .map(|i| Body {
            outline: BodyOutline::Bar {
                length_m: diameter_m,
                height_m,
            },
            along_m: piece.start_m + length_m * f64::from(i) / f64::from(columns + 1),
            over_m: 0.0,
            made: Made::Solid,
            part: piece.part,
            text: piece.text.clone(),
        })
        .collect()
}
