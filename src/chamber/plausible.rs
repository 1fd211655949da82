//! What each figure of a material's file must keep to, and what the figures must keep to
//! among themselves.
//!
//! The limits find a figure in another unit, a slipped digit, two swapped lines; no
//! material that a wall is made of comes near them.

use super::curve::{Curve, Strength, StrengthAt};
use super::material::{AfterAnnealing, Condition, Glass, Material, MaterialKind, Metal};
use crate::text::TextError;
use crate::units::Temperature;

/// Least and greatest allowed. All are common practice, no source.
type Limits = (f64, f64);

/// Soft metal near its melting point bears some MPa, the strongest wire some 4 GPa; a
/// figure in MPa, ksi or psi lies below.
const STRENGTH_PA: Limits = (1e5, 5e9);
/// From soft plastic to diamond.
const MODULUS_PA: Limits = (1e8, 1e12);
/// A figure in 10⁻⁶/K lies above.
const EXPANSION_PER_K: Limits = (1e-9, 1e-3);
/// From light foam to osmium, 22 600; a figure in g/cm³ lies below.
const DENSITY_KG_PER_M3: Limits = (100.0, 30_000.0);
/// Tungsten melts at 3 700 K.
const HOTTEST_K: Limits = (50.0, 4_000.0);
/// Below 1 it would make glass stronger under lasting load.
const DIVISOR: Limits = (1.0, 1_000.0);

/// A strength rises with temperature by ageing (steel near 250 °C, some nickel alloys), by
/// less than this over the least that was colder.
const GREATEST_RISE: f64 = 1.25;
/// A curve and the room value may be of two tables.
const MODULUS_RISE: f64 = 1.05;
/// No design code lets more than this share of the tensile strength.
/// Source: EN 13445-3 and ASME BPVC VIII-2, R_m/2.4 [from memory].
const OF_TENSILE: f64 = 1.0 / 2.4;
/// Rounding of a table's figures in other units.
const ROUNDING: f64 = 1.005;
/// Published tables have some 20.
const MOST_POINTS: usize = 500;

/// Checks the figures of a material's file.
///
/// # Errors
/// The first that breaks its rule, with its place.
pub fn check(text: &str, material: &Material) -> Result<(), TextError> {
    let service = &material.service;
    let page = Page {
        text,
        coldest_k: service.coldest.value.kelvin(),
        hottest_k: service.hottest.value.kelvin(),
    };
    page.service()?;
    let room_pa = material.modulus.value.get();
    page.within("modulus_pa.value", room_pa, MODULUS_PA)?;
    if let Some(curve) = &material.hot_modulus {
        page.hot_modulus(curve, room_pa)?;
    }
    if material.poisson_ratio.value.fraction() <= 0.0 {
        return page.refuse("poisson_ratio.value", "is not above 0");
    }
    let expansion_per_k = material.expansion.value.get();
    page.within("expansion_per_k.value", expansion_per_k, EXPANSION_PER_K)?;
    let density = material.density.value.kilogram_per_cubic_metre();
    page.within("density_kg_per_m3.value", density, DENSITY_KG_PER_M3)?;
    match &material.kind {
        MaterialKind::Metal(metal) => page.metal(metal),
        MaterialKind::Glass(glass) => page.glass(glass),
    }
}

struct Page<'a> {
    text: &'a str,
    coldest_k: f64,
    hottest_k: f64,
}

impl Page<'_> {
    fn refuse(&self, path: &str, what: impl Into<String>) -> Result<(), TextError> {
        Err(TextError::about(self.text, path, what))
    }

    fn within(&self, path: &str, value: f64, (least, greatest): Limits) -> Result<(), TextError> {
        if (least..=greatest).contains(&value) {
            return Ok(());
        }
        let (value, least, greatest) = (plain(value), plain(least), plain(greatest));
        let what = format!("{value} is outside what is allowed, {least} to {greatest}");
        self.refuse(path, what)
    }

    fn service(&self) -> Result<(), TextError> {
        let (coldest, hottest) = (self.coldest_k, self.hottest_k);
        self.within("service.hottest_k.value", hottest, HOTTEST_K)?;
        if coldest < hottest {
            return Ok(());
        }
        let what = format!("{coldest} K is not below the hottest, {hottest} K");
        self.refuse("service.coldest_k.value", what)
    }

    /// It may reach beyond the service, as round tables do, but not lie outside it.
    fn hot_modulus(&self, curve: &Curve, room_pa: f64) -> Result<(), TextError> {
        let path = "hot_modulus.points_k_pa";
        self.count(path, curve)?;
        for (i, (_, pa)) in curve.points().iter().enumerate() {
            let point = format!("{path}[{i}][1]");
            self.within(&point, *pa, MODULUS_PA)?;
            if *pa > MODULUS_RISE * room_pa {
                let (pa, room) = (plain(*pa), plain(room_pa));
                let what = format!("{pa} Pa is above the modulus at room temperature, {room} Pa");
                return self.refuse(&point, what);
            }
        }
        if curve.first().0 >= self.hottest_k || curve.last().0 <= self.coldest_k {
            let (coldest, hottest) = (self.coldest_k, self.hottest_k);
            let what = format!("no point lies in the service, {coldest} K to {hottest} K");
            return self.refuse(path, what);
        }
        Ok(())
    }

    fn metal(&self, metal: &Metal) -> Result<(), TextError> {
        let hold_k = metal.cold_hold.value.kelvin();
        if hold_k >= self.hottest_k {
            let hottest = self.hottest_k;
            let what = format!("{hold_k} K is not below the hottest service, {hottest} K");
            return self.refuse("kind.cold_value_held_down_to_k.value", what);
        }
        let annealed = match &metal.after_annealing {
            AfterAnnealing::Becomes(condition) => Some(condition),
            AfterAnnealing::Unchanged | AfterAnnealing::NotKnown => None,
        };
        for (path, condition) in [
            ("kind.as_supplied", Some(&metal.as_supplied)),
            ("kind.after_annealing", annealed),
            ("kind.after_welding", metal.after_welding.as_ref()),
        ] {
            if let Some(condition) = condition {
                self.condition(path, condition)?;
            }
        }
        Ok(())
    }

    fn condition(&self, path: &str, condition: &Condition) -> Result<(), TextError> {
        let of = |name: &str| format!("{path}.{name}");
        let (tensile, proof, code) = (
            condition.tensile.as_ref(),
            condition.proof.as_ref(),
            condition.code_stress.as_ref(),
        );
        for (name, strength) in [
            ("tensile", tensile),
            ("proof", proof),
            ("code_stress", code),
        ] {
            if let Some(strength) = strength {
                self.strength(&of(name), strength)?;
            }
        }
        let whole = "the tensile strength";
        self.not_above(&of("proof"), proof, tensile, (1.0, whole))?;
        self.not_above(&of("code_stress"), code, proof, (1.0, "the proof strength"))?;
        let share = (OF_TENSILE, "the tensile strength over 2.4");
        self.not_above(&of("code_stress"), code, tensile, share)
    }

    fn strength(&self, path: &str, strength: &Strength) -> Result<(), TextError> {
        let curve = match strength {
            Strength::AtRoomTemperature(room) => {
                return self.within(&format!("{path}.value_pa"), room.value.get(), STRENGTH_PA);
            }
            Strength::OverTemperature(curve) => curve,
        };
        let path = format!("{path}.points_k_pa");
        self.count(&path, curve)?;
        let mut least_pa = f64::INFINITY;
        for (i, &(k, pa)) in curve.points().iter().enumerate() {
            if !(self.coldest_k..=self.hottest_k).contains(&k) {
                let (coldest, hottest) = (self.coldest_k, self.hottest_k);
                let what = format!("{k} K is outside the service, {coldest} K to {hottest} K");
                return self.refuse(&format!("{path}[{i}][0]"), what);
            }
            let point = format!("{path}[{i}][1]");
            self.within(&point, pa, STRENGTH_PA)?;
            if pa > GREATEST_RISE * least_pa {
                let (pa, least) = (plain(pa), plain(least_pa));
                let what = format!("{pa} Pa is far above {least} Pa at a colder point");
                return self.refuse(&point, what);
            }
            least_pa = least_pa.min(pa);
        }
        Ok(())
    }

    /// Where it is known, a strength is not above a share of another; between the points of
    /// both they run straight.
    fn not_above(
        &self,
        path: &str,
        lower: Option<&Strength>,
        upper: Option<&Strength>,
        (share, what): (f64, &str),
    ) -> Result<(), TextError> {
        let (Some(lower), Some(upper)) = (lower, upper) else {
            return Ok(());
        };
        let mut knots_k = lower.knots_k();
        knots_k.extend(upper.knots_k());
        for k in knots_k {
            // Colder than its first point the upper one is greater than is stated.
            let stated = !matches!(upper, Strength::OverTemperature(curve) if k < curve.first().0);
            let Some(at) = Temperature::from_kelvin(k).ok().filter(|_| stated) else {
                continue;
            };
            let limit_pa = share * upper.at(at).ceiling();
            if let StrengthAt::Known(pa) = lower.at(at)
                && pa > ROUNDING * limit_pa
            {
                let (pa, limit) = (plain(pa), plain(limit_pa));
                let said = format!("{pa} Pa at {k} K is above {what} there, {limit} Pa");
                return self.refuse(&place(path, lower, k), said);
            }
        }
        Ok(())
    }

    fn glass(&self, glass: &Glass) -> Result<(), TextError> {
        let permissible_pa = glass.permissible.value.get();
        self.within("kind.permissible_pa.value", permissible_pa, STRENGTH_PA)?;
        let divisor = glass.short_term_divisor.value.get();
        self.within("kind.short_term_divisor.value", divisor, DIVISOR)?;
        if let Some(short_term) = &glass.short_term {
            let path = "kind.short_term_pa.value";
            let short_pa = short_term.value.get();
            self.within(path, short_pa, STRENGTH_PA)?;
            if permissible_pa > short_pa {
                let (short, permissible) = (plain(short_pa), plain(permissible_pa));
                let what = format!("{short} Pa is below the permissible stress, {permissible} Pa");
                return self.refuse(path, what);
            }
        }
        Ok(())
    }

    fn count(&self, path: &str, curve: &Curve) -> Result<(), TextError> {
        let count = curve.points().len();
        if count <= MOST_POINTS {
            return Ok(());
        }
        let what = format!("at most {MOST_POINTS} points are read, not {count}");
        self.refuse(path, what)
    }
}

/// Path of the value that a strength takes at a temperature: its own point, or the one
/// before.
fn place(path: &str, strength: &Strength, at_k: f64) -> String {
    match strength {
        Strength::AtRoomTemperature(_) => format!("{path}.value_pa"),
        Strength::OverTemperature(curve) => {
            let past = curve.points().partition_point(|(k, _)| *k <= at_k);
            format!("{path}.points_k_pa[{}][1]", past.saturating_sub(1))
        }
    }
}

/// A figure as short as it is exact: 620e6 as 6.2e8.
fn plain(value: f64) -> String {
    if value == 0.0 || (1e-2..1e6).contains(&value.abs()) {
        format!("{value}")
    } else {
        format!("{value:e}")
    }
}
