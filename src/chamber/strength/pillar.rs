//! Thin plates held apart and together by a grid of pillars, as in vapour chambers.

use std::f64::consts::PI;

use super::super::shape::PlateEdge;
use super::plate;

/// Bending stress of the plate in a cell walled on all sides: a rectangle clamped there.
///
/// σ = β q b²/t², [`plate::rectangular_stress_pa`]
///
/// | symbol | meaning                             | unit |
/// |--------|-------------------------------------|------|
/// | q      | inside minus outside                | Pa   |
/// | b      | the shorter of the two pitches      | m    |
/// | t      | thickness of the plate              | m    |
///
/// Valid: ribs or walls along every side of the cell, deflection below t/2. Pillars that
/// stand at its corners alone hold far less: [`plate_stress_pa`].
pub fn walled_cell_stress_pa(q_pa: f64, pitch_m: f64, other_pitch_m: f64, t_m: f64) -> f64 {
    plate::rectangular_stress_pa(q_pa, pitch_m, other_pitch_m, t_m, PlateEdge::Clamped)
}

/// Bending stress of the plate at the rim of a round pillar, in a grid of squares.
///
/// σ = 6 (μ/π + δ) q s²/t²
/// μ = C − (1/2) ln κ + κ²/4,  κ = √π r/s,
/// C = 2 (−3/16 − (κ² ln κ)/4 + κ²/8 + κ⁴/16)/(1 − κ²)
/// δ = 0.0019 + 0.38 (r/s)², at most 0.0165
///
/// μ is that of a round cell of equal area, R = s/√π: half way to the next pillar the
/// plate is level and carries no shear, at the pillar it is level, and between them
/// K d/dr[(1/r) d(r φ)/dr] = −q (R² − r²)/(2 r), M = K dφ/dr. δ is what the corners of
/// the square add, as a bound from above: the sum is at most 5 % too much for r ≤ 0.37 s.
///
/// | symbol | meaning                                          | unit |
/// |--------|--------------------------------------------------|------|
/// | q      | inside minus outside                             | Pa   |
/// | s      | pitch, the longer of two                         | m    |
/// | r      | radius of the pillar, of equal area if not round | m    |
/// | φ, M   | slope of the plate, moment per width (q R² μ)    | –, N |
/// | K      | bending stiffness of the plate                   | N m  |
/// | t      | thickness of the plate                           | m    |
///
/// Valid: rigid pillars joined to the plate, deflection below t/2. The stress is elastic
/// and falls off fast from the rim; a ductile plate bears more than its yield there
/// suggests. Zero where the pillars touch, r ≥ s/2; infinite on points.
/// Source: own; checked below against a series for the square cell, and that against the
/// deflection of a plate on points (Timoshenko and Woinowsky-Krieger, section 54
/// [from memory]).
pub fn rim_stress_pa(q_pa: f64, pitch_m: f64, pillar_radius_m: f64, t_m: f64) -> f64 {
    let share = pillar_radius_m / pitch_m;
    if share >= 0.5 {
        return 0.0;
    }
    if share <= 0.0 {
        return f64::INFINITY.copysign(q_pa); // a plate on points, or on nothing
    }
    let kappa = PI.sqrt() * share;
    let (k2, ln) = (kappa * kappa, kappa.ln());
    let c = 2.0 * (-3.0 / 16.0 - 0.25 * k2 * ln + 0.125 * k2 + k2 * k2 / 16.0) / (1.0 - k2);
    let round = (c - 0.5 * ln + 0.25 * k2) / PI;
    let corners = (0.0019 + 0.38 * share * share).min(0.0165);
    6.0 * (round + corners) * q_pa * (pitch_m / t_m).powi(2)
}

/// Bending stress of a plate on pillars: the greater in size of [`rim_stress_pa`], by the
/// longer pitch, and [`walled_cell_stress_pa`].
///
/// The rim governs for pillars thinner than about 0.58 of the pitch.
pub fn plate_stress_pa(
    q_pa: f64,
    pitch_m: f64,
    other_pitch_m: f64,
    pillar_radius_m: f64,
    t_m: f64,
) -> f64 {
    let rim = rim_stress_pa(q_pa, pitch_m.max(other_pitch_m), pillar_radius_m, t_m);
    let cell = walled_cell_stress_pa(q_pa, pitch_m, other_pitch_m, t_m);
    if rim.abs() > cell.abs() { rim } else { cell }
}

/// Pull in a pillar under inside pressure, σ = p (A_c − A_p)/A_p.
///
/// | symbol | meaning                                    | unit |
/// |--------|--------------------------------------------|------|
/// | p      | inside minus outside                       | Pa   |
/// | A_c    | area of the cell, the product of pitches   | m²   |
/// | A_p    | cross-section of the pillar or of its joint| m²   |
///
/// Valid: solid pillar joined to both plates, none at the edge of the grid.
/// Source: equilibrium of one cell; the pressure does not act where the pillar stands.
pub fn tension_pa(p_pa: f64, cell_m2: f64, pillar_m2: f64) -> f64 {
    p_pa * (cell_m2 - pillar_m2) / pillar_m2
}

/// Squeeze of a pillar under pressure from outside, σ = p A_c/A_p.
///
/// Symbols as in [`tension_pa`], p outside minus inside. Outside, the pressure acts on
/// the whole cell, the pillar's foot too. The same figure, with p inside minus outside,
/// is what yield (Tresca) compares under inside pressure: [`tension_pa`] and the
/// pressure p on the pillar's side. Source: the same.
pub fn compression_pa(p_pa: f64, cell_m2: f64, pillar_m2: f64) -> f64 {
    p_pa * cell_m2 / pillar_m2
}

/// Stress at which a slender pillar buckles between plates that hold its ends.
///
/// σ = 4 π² E (i/L)²
///
/// | symbol | meaning                                             | unit |
/// |--------|-----------------------------------------------------|------|
/// | E      | modulus                                             | Pa   |
/// | i      | least radius of gyration: d/4 round, side/√12 square| m    |
/// | L      | height of the pillar                                | m    |
///
/// Valid: elastic; the plates neither turn nor shift. Thin plates turn somewhat: a
/// quarter of this (pinned ends) is the careful figure. Source: L. Euler, 1744.
pub fn euler_pa(e_pa: f64, gyration_radius_m: f64, height_m: f64) -> f64 {
    4.0 * PI * PI * e_pa * (gyration_radius_m / height_m).powi(2)
}

/// Stress that a pillar of any height bears: Euler's where that is below half the proof
/// strength, σ_y (1 − σ_y/(4 σ_E)) above.
///
/// | symbol | meaning                    | unit |
/// |--------|----------------------------|------|
/// | σ_y    | proof strength             | Pa   |
/// | σ_E    | Euler's, from [`euler_pa`] | Pa   |
///
/// Source: J. B. Johnson's parabola, common practice for columns [from memory].
pub fn column_strength_pa(sy_pa: f64, euler_pa: f64) -> f64 {
    if euler_pa < 0.5 * sy_pa {
        euler_pa
    } else {
        sy_pa * (1.0 - 0.25 * sy_pa / euler_pa)
    }
}

#[cfg(test)]
#[path = "pillar_tests.rs"]
mod tests;
