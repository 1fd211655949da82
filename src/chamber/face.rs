//! Flat walls: pressure over stress of a plate, and of a shape's weakest face.

use super::dimension::Pick;
use super::shape::{Pillars, PlateEdge};
use super::strength::{obround, pillar, plate};

/// Of a circular plate by its bending.
///
/// The pressure itself stands on the inner face (Tresca); it also keeps a plug thicker
/// than it is wide from bearing more than its stress.
pub(super) fn of_disc(diameter_m: f64, t: f64, nu: f64, edge: PlateEdge) -> f64 {
    1.0 / (plate::circular_stress_pa(1.0, 0.5 * diameter_m, t, nu, edge) + 1.0)
}

/// Of a rectangular plate, likewise.
pub(super) fn of_plate(side_m: f64, other_side_m: f64, t: f64, edge: PlateEdge) -> f64 {
    1.0 / (plate::rectangular_stress_pa(1.0, side_m, other_side_m, t, edge) + 1.0)
}

/// Of a box.
///
/// Each face bends as a plate (its rim turns somewhat, so the worse of clamped and
/// supported), is pulled by the pressure on its neighbours, at most c/(2 t) along
/// either side, c being the box's size square to the face, and has the pressure itself
/// on its inside (Tresca). Pillars divide the two faces of width and depth into cells that
/// are clamped, as their neighbours bend alike; they are pulled themselves.
/// The code would allow 1.5 S in bending; that is not taken.
pub(super) fn of_box(sides_m: [f64; 3], pillars: Option<&Pillars>, t: f64) -> f64 {
    let [w, h, d] = sides_m;
    let face = |a: f64, b: f64, c: f64| 1.0 / (worse_edge(a, b, t) + c / (2.0 * t) + 1.0);
    let side_faces = face(w, h, d).min(face(h, d, w));
    let Some(pillars) = pillars else {
        return side_faces.min(face(d, w, h));
    };
    let (a, b) = pillars.cell_m(w, d);
    let diameter = pillars.diameter.at(Pick::Least).metre();
    let bending = pillar::plate_stress_pa(1.0, a, b, 0.5 * diameter, t);
    // The outermost cells hang on the side walls, whose rim turns: no neighbour evens that
    // out, so a cell counts as supported where that is worse.
    let worst = bending.max(worse_edge(a, b, t));
    let cells = 1.0 / (worst + h / (2.0 * t) + 1.0);
    side_faces
        .min(cells)
        // The pull on a pillar and the pressure on its side (Tresca).
        .min(1.0 / pillar::compression_pa(1.0, a * b, circle_m2(diameter)))
}

fn worse_edge(a: f64, b: f64, t: f64) -> f64 {
    let bending = |edge| plate::rectangular_stress_pa(1.0, a, b, t, edge);
    bending(PlateEdge::Clamped).max(bending(PlateEdge::SimplySupported))
}

/// Of a flattened tube: the greatest stress around its cross-section, and the pressure
/// itself on its inside (Tresca).
pub(super) fn of_flattened_tube(width_m: f64, height_m: f64, t: f64) -> f64 {
    if t <= 0.0 {
        return 0.0;
    }
    1.0 / (obround::stresses(1.0, width_m, height_m, t).worst_pa() + 1.0)
}

/// Area of a circle.
pub(super) fn circle_m2(diameter_m: f64) -> f64 {
    super::solid::cylinder_m3(diameter_m, 1.0)
}
