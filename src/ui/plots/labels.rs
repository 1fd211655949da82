//! Text that finds room for itself.

use eframe::egui::{Pos2, Rangef, Rect, Vec2, pos2};

/// Moves places of given sizes apart along a line so that none overlap, each as
/// little as may be, inside `within`. `wanted` are centres; the order is kept.
pub(super) fn spread(wanted: &mut [(f32, f32)], within: Rangef) {
    wanted.sort_by(|a, b| a.0.total_cmp(&b.0));
    // Neighbours that overlap give way to each other by halves; a few rounds settle a row.
    for _ in 0..12 {
        for i in 1..wanted.len() {
            let overlap = 0.5 * (wanted[i - 1].1 + wanted[i].1) - (wanted[i].0 - wanted[i - 1].0);
            if overlap > 0.0 {
                wanted[i - 1].0 -= 0.5 * overlap;
                wanted[i].0 += 0.5 * overlap;
            }
        }
    }
    let mut edge = within.min;
    for (centre, size) in wanted.iter_mut() {
        *centre = centre.max(edge + 0.5 * *size);
        edge = *centre + 0.5 * *size;
    }
    let mut edge = within.max;
    for (centre, size) in wanted.iter_mut().rev() {
        *centre = centre.min(edge - 0.5 * *size);
        edge = *centre - 0.5 * *size;
    }
}

/// Rectangles that are taken, so that later texts keep out.
#[derive(Debug, Default)]
pub(super) struct Taken {
    rects: Vec<Rect>,
    /// Points of lines that are not to be written over.
    points: Vec<Pos2>,
}

impl Taken {
    pub fn add(&mut self, rect: Rect) {
        self.rects.push(rect);
    }

    /// Keeps texts off a line, as far as its points are close enough together.
    pub fn keep_off(&mut self, line: &[Pos2]) {
        self.points.extend_from_slice(line);
    }

    pub fn is_free(&self, rect: Rect) -> bool {
        let near = rect.expand(2.0);
        !self.rects.iter().any(|taken| taken.intersects(rect))
            && !self.points.iter().any(|p| near.contains(*p))
    }

    /// The first of some places that is free and inside `within`; it is then taken.
    pub fn first_free(
        &mut self,
        places: impl IntoIterator<Item = Rect>,
        within: Rect,
    ) -> Option<Rect> {
        let place = places
            .into_iter()
            .find(|place| within.contains_rect(*place) && self.is_free(*place))?;
        self.add(place);
        Some(place)
    }
}

/// The best place for a text of `size` in an area given row by row.
///
/// `extent` tells from where to where the area reaches at a height, `avoid` is a
/// vertical band to keep out of, `lines` are heights better not written over.
pub(super) fn place_in_area(
    size: Vec2,
    frame: Rect,
    extent: impl Fn(f32) -> Option<Rangef>,
    avoid: Rangef,
    lines: &[f32],
    taken: &Taken,
) -> Option<(Rect, f32)> {
    const ROWS: usize = 32;
    let room = frame.height() - size.y - 6.0;
    if room < 0.0 {
        return None;
    }
    let half = 0.5 * size.y;
    let mut middle = (0.0, 0.0);
    let mut candidates: Vec<(Rect, f32)> = Vec::new();
    for row in 0..=ROWS {
        let y = frame.top() + 3.0 + half + room * row as f32 / ROWS as f32;
        let Some(across) = [y - half, y, y + half].into_iter().map(&extent).try_fold(
            Rangef::new(frame.left(), frame.right()),
            |common, here| {
                let common = common.intersection(here?);
                (common.max > common.min).then_some(common)
            },
        ) else {
            continue;
        };
        middle = (middle.0 + y * across.span(), middle.1 + across.span());
        let sides = [
            Rangef::new(across.min, across.max.min(avoid.min)),
            Rangef::new(across.min.max(avoid.max), across.max),
        ];
        let spare = 8.0;
        for side in sides {
            let rect = Rect::from_center_size(pos2(0.5 * (side.min + side.max), y), size);
            if side.max - side.min >= size.x + spare && taken.is_free(rect.expand(3.0)) {
                candidates.push((rect, (side.max - side.min) / size.x));
            }
        }
    }
    let middle = middle.0 / middle.1.max(1e-3);
    let score = |(rect, wide): &(Rect, f32)| {
        let crossed = lines
            .iter()
            .filter(|y| (**y - rect.center().y).abs() < half + 2.0)
            .count() as f32;
        wide.min(4.0) - 6.0 * ((rect.center().y - middle).abs() / frame.height()) - 2.5 * crossed
    };
    candidates
        .iter()
        .map(|c| (c.0, score(c)))
        .max_by(|a, b| a.1.total_cmp(&b.1))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn crowded_labels_move_apart_and_stay_inside() {
        let mut places = [(98.0, 12.0), (97.0, 12.0), (20.0, 12.0), (96.0, 12.0)];
        spread(&mut places, Rangef::new(0.0, 100.0));
        assert_eq!(places[0].0, 20.0);
        assert_eq!(places[3].0, 94.0);
        for pair in places.windows(2) {
            assert!(pair[1].0 - pair[0].0 >= 12.0 - 1e-3, "{places:?}");
        }
    }

    #[test]
    fn a_name_keeps_out_of_the_band_and_of_areas_too_small_for_it() {
        let frame = Rect::from_min_max(pos2(0.0, 0.0), pos2(200.0, 100.0));
        let all = |_: f32| Some(Rangef::new(0.0, 200.0));
        let band = Rangef::new(90.0, 110.0);
        let taken = Taken::default();
        let (rect, _) = place_in_area(Vec2::new(60.0, 12.0), frame, all, band, &[], &taken)
            .expect("there is room");
        assert!(rect.right() <= 90.0 || rect.left() >= 110.0, "{rect:?}");
        let thin = |_: f32| Some(Rangef::new(0.0, 30.0));
        assert!(place_in_area(Vec2::new(60.0, 12.0), frame, thin, band, &[], &taken).is_none());
    }
}
