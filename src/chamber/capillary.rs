//! Published relations for wicks: porosity, permeability, effective pore radius.
//!
//! Three errors matter, and each has its own careful side. Too high a permeability
//! or too small a pore radius promises heat that the wick cannot carry. Too high a
//! porosity asks for a charge that floods the condenser, too low a one for a charge
//! that leaves the wick dry. Every relation below says which way it errs.

use std::f64::consts::{FRAC_PI_2, PI};

/// Length of a woven wire over its straight distance, as most of the literature
/// takes it. Source: S. W. Chi, Heat Pipe Theory and Practice, 1976 [from memory].
pub const CRIMPING: f64 = 1.05;

/// Porosities within which [`screen_permeability_m2`] answers.
pub const SCREEN_POROSITY: [f64; 2] = [0.3, 0.95];
/// Porosities within which [`sphere_permeability_m2`] answers; 0.26 is the closest
/// packing of equal spheres, and a bed sintered further is no longer one of spheres.
pub const SPHERE_POROSITY: [f64; 2] = [0.25, 0.7];
/// Porosities within which the relations for felt answer.
pub const FELT_POROSITY: [f64; 2] = [0.5, 0.98];

/// Why a wick relation has no answer.
#[derive(Debug, Clone, Copy, PartialEq, thiserror::Error)]
pub enum WickError {
    /// Not a finite number above 0; `name` is the quantity's.
    #[error("{name} must be above 0")]
    NotPositive { name: &'static str },
    /// Mesh number times wire diameter reaches 1: the wires touch.
    #[error("wire diameter times mesh number is {mesh_times_wire}; the wires touch at 1")]
    WiresTouch { mesh_times_wire: f64 },
    /// A woven wire is longer than its straight distance, and not by half again.
    #[error("crimping factor {crimping} is not between 1 and 1.57")]
    Crimping { crimping: f64 },
    /// Outside what the relation was made for.
    #[error("porosity {porosity} is not between {least} and {greatest}")]
    Porosity {
        porosity: f64,
        least: f64,
        greatest: f64,
    },
    /// A groove too shallow, too deep or with too narrow a mouth for the relation.
    #[error(
        "depth over mean width {depth_over_mean_width} and bottom over mouth \
         {bottom_over_mouth} are outside what was checked"
    )]
    GrooveProportions {
        depth_over_mean_width: f64,
        bottom_over_mouth: f64,
    },
}

/// Porosity of wrapped screen, each layer taken as two wire diameters thick.
///
/// ε = 1 − π S N d / 4
///
/// | symbol | meaning                             | unit |
/// |--------|-------------------------------------|------|
/// | N      | mesh number, openings per length    | 1/m  |
/// | d      | wire diameter                       | m    |
/// | S      | crimping factor, about [`CRIMPING`] | –    |
///
/// Valid: N d < 1, plain weave, 1 ≤ S ≤ π/2. Errs high, and the charge with it: a
/// wire between straight bends already has S = √(1 + (N d)²), which passes 1.05 at
/// N d = 0.32 and is 1.12 at 0.5, where ε is 0.03 less; and layers that nest or are
/// pressed hold less than this, by all of the thickness that is lost.
/// Source: S. W. Chi, Heat Pipe Theory and Practice, 1976 [from memory].
///
/// # Errors
/// [`WickError::NotPositive`], [`WickError::WiresTouch`], [`WickError::Crimping`], or
/// [`WickError::Porosity`] where no void is left.
pub fn screen_porosity(mesh_per_m: f64, wire_m: f64, crimping: f64) -> Result<f64, WickError> {
    let mesh_times_wire = positive("mesh number", mesh_per_m)? * positive("wire diameter", wire_m)?;
    if mesh_times_wire >= 1.0 {
        return Err(WickError::WiresTouch { mesh_times_wire });
    }
    if !(1.0..=FRAC_PI_2).contains(&crimping) {
        return Err(WickError::Crimping { crimping });
    }
    let porosity = 1.0 - 0.25 * PI * crimping * mesh_times_wire;
    if porosity <= 0.0 {
        return Err(WickError::Porosity {
            porosity,
            least: 0.0,
            greatest: 1.0,
        });
    }
    Ok(porosity)
}

/// Thickness of wrapped screen.
///
/// t = 2 n d, with n layers of wire diameter d, m.
///
/// Nested or pressed layers are thinner, loose ones thicker; where a wick was
/// measured, take that. Source: common practice.
///
/// # Errors
/// [`WickError::NotPositive`]
pub fn screen_thickness_m(layers: u32, wire_m: f64) -> Result<f64, WickError> {
    let layers = positive("number of layers", f64::from(layers))?;
    Ok(2.0 * layers * positive("wire diameter", wire_m)?)
}

/// Permeability of wrapped screen, along its layers.
///
/// K = d² ε³ / (122 (1 − ε)²)
///
/// | symbol | meaning       | unit |
/// |--------|---------------|------|
/// | K      | permeability  | m²   |
/// | d      | wire diameter | m    |
/// | ε      | porosity      | –    |
///
/// Valid: tight wraps, ε in [`SCREEN_POROSITY`]. K goes nearly as ε³/(1 − ε)²: at
/// ε = 0.65 a porosity 0.02 too high makes it 23 % too high. Loose wraps carry more
/// through their gaps, and so err on the careful side.
/// Source: S. W. Chi, Heat Pipe Theory and Practice, 1976 [from memory]; methods F3.
///
/// # Errors
/// [`WickError::NotPositive`], [`WickError::Porosity`]
pub fn screen_permeability_m2(wire_m: f64, porosity: f64) -> Result<f64, WickError> {
    let d = positive("wire diameter", wire_m)?;
    let eps = within(porosity, SCREEN_POROSITY)?;
    positive("permeability", blake_kozeny_m2(d, eps, 122.0))
}

/// Effective pore radius of screen.
///
/// r = 1/(2 N), half of opening and wire together; N the mesh number, 1/m.
///
/// Errs large, the careful side, for tight layers that lie staggered; small where a
/// layer is torn or stands off the wall.
/// Source: S. W. Chi, Heat Pipe Theory and Practice, 1976 [from memory]; methods F3.
///
/// # Errors
/// [`WickError::NotPositive`]
pub fn screen_pore_radius_m(mesh_per_m: f64) -> Result<f64, WickError> {
    positive("pore radius", 0.5 / positive("mesh number", mesh_per_m)?)
}

/// Permeability of sintered spheres.
///
/// K = d² ε³ / (150 (1 − ε)²)
///
/// | symbol | meaning         | unit |
/// |--------|-----------------|------|
/// | K      | permeability    | m²   |
/// | d      | sphere diameter | m    |
/// | ε      | porosity        | –    |
///
/// Valid: spheres of one size, ε in [`SPHERE_POROSITY`], commonly 0.40 to 0.48. Errs
/// high: Carman's constant 180 gives a sixth less, irregular powder less again.
/// Take the smallest diameter of a sieve cut.
/// Source: Blake–Kozeny, as in Chi 1976 and Faghri [from memory]; methods F3.
///
/// # Errors
/// [`WickError::NotPositive`], [`WickError::Porosity`]
pub fn sphere_permeability_m2(diameter_m: f64, porosity: f64) -> Result<f64, WickError> {
    let d = positive("sphere diameter", diameter_m)?;
    let eps = within(porosity, SPHERE_POROSITY)?;
    positive("permeability", blake_kozeny_m2(d, eps, 150.0))
}

/// Effective pore radius of sintered spheres.
///
/// r = 0.41 r_s = 0.205 d, d the sphere diameter, m.
///
/// Valid: spheres of one size, closely packed. Errs small, the careless side, for a
/// loose bed or one with a crack. Take the largest diameter of a sieve cut.
/// Source: Chi 1976, Faghri [from memory]; methods F3.
///
/// # Errors
/// [`WickError::NotPositive`]
pub fn sphere_pore_radius_m(diameter_m: f64) -> Result<f64, WickError> {
    Ok(0.205 * positive("sphere diameter", diameter_m)?)
}

/// Permeability of felt or sintered metal fibres.
///
/// K = A (X² − 1)/(X² + 1),  X = 1 + B d² ε³/(1 − ε)²
///
/// | symbol | meaning                     | unit |
/// |--------|-----------------------------|------|
/// | K      | permeability                | m²   |
/// | A      | 6.0e-10, fitted             | m²   |
/// | B      | 3.3e7, fitted               | 1/m² |
/// | d      | fibre diameter              | m    |
/// | ε      | porosity                    | –    |
///
/// Valid: metal fibres, ε in [`FELT_POROSITY`]. A fit to a few felts: K never passes
/// A, so that coarse open felt errs low. Which way it errs elsewhere is not known;
/// a factor of two either way is not excluded.
/// Source: D. Reay, P. Kew, Heat Pipes, ch. 3, on sintered metal fibres [from memory].
///
/// # Errors
/// [`WickError::NotPositive`], [`WickError::Porosity`]
pub fn felt_permeability_m2(fibre_m: f64, porosity: f64) -> Result<f64, WickError> {
    const A_M2: f64 = 6.0e-10;
    const B_PER_M2: f64 = 3.3e7;
    let d = positive("fibre diameter", fibre_m)?;
    let eps = within(porosity, FELT_POROSITY)?;
    // X² − 1 = b (2 + b), without the cancellation for fine fibres.
    let b = B_PER_M2 * blake_kozeny_m2(d, eps, 1.0);
    let above = b * (2.0 + b);
    positive("permeability", A_M2 * above / (above + 2.0))
}

/// Effective pore radius of felt or sintered metal fibres.
///
/// r = d / (2 (1 − ε)); d the fibre diameter, m; ε the porosity.
///
/// Valid: ε in [`FELT_POROSITY`]. It is the mean spacing of the fibres: errs small, the
/// careless side, for a felt of uneven density, whose widest pore decides.
/// Source: D. Reay, P. Kew, Heat Pipes, ch. 3, on sintered metal fibres [from memory].
///
/// # Errors
/// [`WickError::NotPositive`], [`WickError::Porosity`]
pub fn felt_pore_radius_m(fibre_m: f64, porosity: f64) -> Result<f64, WickError> {
    let d = positive("fibre diameter", fibre_m)?;
    Ok(0.5 * d / (1.0 - within(porosity, FELT_POROSITY)?))
}

/// Permeability of a round artery, per area of its bore.
///
/// K = D²/32, D the inside diameter, m.
///
/// Valid: laminar and full of liquid. Errs high where the wall is mesh or the bore is
/// bent flat; a single bubble makes it 0.
/// Source: Hagen–Poiseuille.
///
/// # Errors
/// [`WickError::NotPositive`]
pub fn artery_permeability_m2(diameter_m: f64) -> Result<f64, WickError> {
    let d = positive("artery diameter", diameter_m)?;
    positive("permeability", d * d / 32.0)
}

/// Effective pore radius of a round artery.
///
/// r = D/2 while its bore is open to the vapour; r = 1/(2 N), that of the mesh in its
/// wall, once primed and closed. D the inside diameter, m; N the mesh number, 1/m.
///
/// The open radius is the careful one, and decides whether the artery primes at all:
/// ask with `None` for that, whatever its wall. With a mesh it is careless whenever a
/// bubble may form, as in any artery that reaches into a heated zone.
/// Source: Chi 1976 [from memory].
///
/// # Errors
/// [`WickError::NotPositive`]
pub fn artery_pore_radius_m(
    diameter_m: f64,
    wall_mesh_per_m: Option<f64>,
) -> Result<f64, WickError> {
    let open = 0.5 * positive("artery diameter", diameter_m)?;
    wall_mesh_per_m.map_or(Ok(open), screen_pore_radius_m)
}

fn blake_kozeny_m2(d_m: f64, eps: f64, constant: f64) -> f64 {
    d_m * d_m * eps.powi(3) / (constant * (1.0 - eps).powi(2))
}

/// The value, if it is a finite number above 0.
pub(crate) fn positive(name: &'static str, value: f64) -> Result<f64, WickError> {
    if value.is_finite() && value > 0.0 {
        Ok(value)
    } else {
        Err(WickError::NotPositive { name })
    }
}

fn within(porosity: f64, [least, greatest]: [f64; 2]) -> Result<f64, WickError> {
    if (least..=greatest).contains(&porosity) {
        Ok(porosity)
    } else {
        Err(WickError::Porosity {
            porosity,
            least,
            greatest,
        })
    }
}

#[cfg(test)]
#[path = "capillary_tests.rs"]
mod tests;
