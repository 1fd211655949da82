//! Published relations for wicks: porosity, permeability, effective pore radius.
//!
//! Three errors matter, and each has its own careful side. Too high a permeability
//! or too small a pore radius promises heat that the wick cannot carry. Too high a
//! porosity asks for a charge that floods the condenser, too low a one for a charge
//! that leaves the wick dry. Every relation below says which way it errs.

use std::f64::consts::{FRAC_PI_2, PI};
use std::fmt;

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
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum WickError {
    /// Not a finite number above 0; `name` is the quantity's.
    NotPositive { name: &'static str },
    /// Mesh number times wire diameter reaches 1: the wires touch.
    WiresTouch { mesh_times_wire: f64 },
    /// A woven wire is longer than its straight distance, and not by half again.
    Crimping { crimping: f64 },
    /// Outside what the relation was made for.
    Porosity {
        porosity: f64,
        least: f64,
        greatest: f64,
    },
    /// A groove too shallow, too deep or with too narrow a mouth for the relation.
    GrooveProportions {
        depth_over_mean_width: f64,
        bottom_over_mouth: f64,
    },
}

impl fmt::Display for WickError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::NotPositive { name } => write!(f, "{name} must be above 0"),
            Self::WiresTouch { mesh_times_wire } => write!(
                f,
                "wire diameter times mesh number is {mesh_times_wire}; the wires touch at 1"
            ),
            Self::Crimping { crimping } => {
                write!(f, "crimping factor {crimping} is not between 1 and 1.57")
            }
            Self::Porosity {
                porosity,
                least,
                greatest,
            } => write!(
                f,
                "porosity {porosity} is not between {least} and {greatest}"
            ),
            Self::GrooveProportions {
                depth_over_mean_width,
                bottom_over_mouth,
            } => write!(
                f,
                "depth over mean width {depth_over_mean_width} and bottom over mouth \
                 {bottom_over_mouth} are outside what was checked"
            ),
        }
    }
}

impl std::error::Error for WickError {}

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
mod tests {
    use super::*;

    fn close(got: Result<f64, WickError>, expected: f64, relative: f64) {
        let got = got.expect("within validity");
        assert!((got / expected - 1.0).abs() <= relative, "{got} {expected}");
    }

    /// 500 mesh per inch of 0.02159 mm wire, S = 1.05: ε = 0.65; an example in an
    /// article on the conductivity of heat pipe wicks (Qpedia 97, after Chi), and 0.5 %
    /// for its two digits.
    #[test]
    fn porosity_of_a_published_screen() {
        close(
            screen_porosity(500.0 / 0.0254, 0.02159e-3, CRIMPING),
            0.65,
            5e-3,
        );
    }

    /// By hand: 100 mesh per inch (N = 3937.0 1/m) of 0.11 mm wire, N d = 0.43307:
    /// ε = 1 − 0.25 π · 1.05 · 0.43307 = 0.64286;
    /// K = 1.21e-8 · 0.26568/(122 · 0.12755) = 2.0658e-10 m²;
    /// r = 0.0127 mm · 10 = 0.127 mm; three layers 0.66 mm.
    #[test]
    fn a_hundred_mesh_screen_by_hand() {
        let n = 100.0 / 0.0254;
        let eps = screen_porosity(n, 0.11e-3, CRIMPING);
        close(eps, 0.64286, 1e-5);
        close(
            screen_permeability_m2(0.11e-3, eps.expect("above")),
            2.0658e-10,
            1e-4,
        );
        close(screen_pore_radius_m(n), 0.127e-3, 1e-12);
        close(screen_thickness_m(3, 0.11e-3), 0.66e-3, 1e-12);
    }

    /// The void of one layer, 2 d thick, is what its two sets of wire leave: the
    /// porosity is counted here from lengths of wire on a square metre.
    #[test]
    fn porosity_is_what_the_wires_leave() {
        let (n, d) = (4000.0, 0.1e-3);
        let wire = 2.0 * n * CRIMPING * 0.25 * PI * d * d;
        let thickness = screen_thickness_m(1, d).expect("valid");
        close(
            screen_porosity(n, d, CRIMPING),
            1.0 - wire / thickness,
            1e-14,
        );
    }

    /// The crimp that the documentation warns of, and the sensitivity it states.
    #[test]
    fn stated_sensitivities_hold() {
        assert!(((1.0f64 + 0.32 * 0.32).sqrt() - 1.05).abs() < 1e-3);
        let with = |s| screen_porosity(5000.0, 0.1e-3, s).expect("valid");
        assert!((with(CRIMPING) - with(1.25f64.sqrt()) - 0.027).abs() < 1e-3);
        let k = |eps| screen_permeability_m2(1e-4, eps).expect("valid");
        assert!((k(0.67) / k(0.65) - 1.23).abs() < 0.01);
    }

    /// By hand: d = 0.1 mm, ε = 0.4: K = 1e-8 · 0.064/(150 · 0.36) = 1.18519e-11 m²;
    /// the same as r_s² ε³/(37.5 (1 − ε)²), the other form in print [from memory].
    #[test]
    fn spheres_by_hand() {
        close(sphere_permeability_m2(1e-4, 0.4), 1.18519e-11, 1e-5);
        close(
            sphere_permeability_m2(1e-4, 0.4),
            0.25e-8 * 0.064 / (37.5 * 0.36),
            1e-14,
        );
        close(sphere_pore_radius_m(1e-4), 20.5e-6, 1e-14);
    }

    /// By hand: d = 8 µm, ε = 0.9: d² ε³/(1 − ε)² = 6.4e-11 · 72.9 = 4.6656e-9 m²,
    /// X = 1.153965, X² = 1.331635, K = 6e-10 · 0.331635/2.331635 = 8.5340e-11 m².
    /// Measured felts of fine wire, porosity above 0.9, lie at 30 to 300 µm² and 40 to
    /// 120 µm (N. Andreas, H. Cole, SAND94-0657C, abstract); the wires there are
    /// not all of this diameter, so that only the range is compared.
    #[test]
    fn felt_by_hand_and_within_measured_ranges() {
        close(felt_permeability_m2(8e-6, 0.9), 8.5340e-11, 1e-4);
        close(felt_pore_radius_m(8e-6, 0.9), 40e-6, 1e-12);
        for eps in [0.9, 0.92, 0.95] {
            let k = felt_permeability_m2(8e-6, eps).expect("valid");
            let r = felt_pore_radius_m(8e-6, eps).expect("valid");
            assert!((30e-12..=300e-12).contains(&k), "{k}");
            assert!((39.9e-6..=120e-6).contains(&r), "{r}");
        }
        // Never above A.
        assert!(felt_permeability_m2(1e-3, 0.98).expect("valid") <= 6.0e-10);
    }

    #[test]
    fn artery_open_and_closed() {
        close(artery_permeability_m2(1.6e-3), 8e-8, 1e-14);
        close(artery_pore_radius_m(1.6e-3, None), 0.8e-3, 1e-14);
        close(artery_pore_radius_m(1.6e-3, Some(1e4)), 50e-6, 1e-14);
    }

    /// Sintered ring 18/16 mm, 200 mm long, ε = 0.5: 5.341 mL of void, and water/copper
    /// wick 16/14 × 400 mm: 9.266 g at 983.2 kg/m³; calculated for methods.md, F3 and P4.
    #[test]
    fn void_of_a_sintered_ring() {
        let void = |outside: f64, inside: f64, length: f64| {
            0.5 * super::super::solid::annulus_m3(outside, inside, length).expect("valid")
        };
        assert!((void(0.018, 0.016, 0.2) - 5.341e-6).abs() < 0.5e-9);
        assert!((983.2 * void(0.016, 0.014, 0.4) - 9.266e-3).abs() < 0.5e-6);
    }

    #[test]
    fn nonsense_is_refused_and_never_becomes_nan() {
        let bad = [0.0, -1.0, f64::NAN, f64::INFINITY];
        for x in bad {
            assert!(screen_porosity(x, 1e-4, CRIMPING).is_err());
            assert!(screen_porosity(4e3, x, CRIMPING).is_err());
            assert!(screen_porosity(4e3, 1e-4, x).is_err());
            assert!(screen_thickness_m(1, x).is_err());
            assert!(screen_permeability_m2(x, 0.6).is_err());
            assert!(screen_permeability_m2(1e-4, x).is_err());
            assert!(screen_pore_radius_m(x).is_err());
            assert!(sphere_permeability_m2(x, 0.4).is_err());
            assert!(sphere_permeability_m2(1e-4, x).is_err());
            assert!(sphere_pore_radius_m(x).is_err());
            assert!(felt_permeability_m2(x, 0.9).is_err());
            assert!(felt_permeability_m2(8e-6, x).is_err());
            assert!(felt_pore_radius_m(x, 0.9).is_err());
            assert!(felt_pore_radius_m(8e-6, x).is_err());
            assert!(artery_permeability_m2(x).is_err());
            assert!(artery_pore_radius_m(x, None).is_err());
            assert!(artery_pore_radius_m(1e-3, Some(x)).is_err());
        }
        // Squares that leave the range of numbers are no answer either.
        for x in [1e-200, 1e200] {
            assert!(screen_permeability_m2(x, 0.6).is_err());
            assert!(sphere_permeability_m2(x, 0.4).is_err());
            assert!(felt_permeability_m2(x, 0.9).is_err());
            assert!(artery_permeability_m2(x).is_err());
        }
        assert!(screen_pore_radius_m(1e-320).is_err());
        assert!(screen_thickness_m(0, 1e-4).is_err());
        assert_eq!(
            screen_porosity(1e4, 1e-4, CRIMPING),
            Err(WickError::WiresTouch {
                mesh_times_wire: 1.0
            })
        );
        assert!(matches!(
            screen_porosity(9.9e3, 1e-4, 1.5),
            Err(WickError::Porosity { .. })
        ));
        assert!(sphere_permeability_m2(1e-4, 0.75).is_err());
    }
}
