//! How the inside volume moves with temperature and pressure.

use super::materials::Materials;
use super::part::Part;
use super::{Chamber, Role};

/// Temperature of drawn sizes and stated volumes, K: 20 °C.
/// Source: ISO 1, standard reference temperature [from memory].
pub const REFERENCE_K: f64 = 293.15;

/// V(T, p) = V₀ (1 + 3α (T − 293.15 K)) (1 + C (p − p_outside))
///
/// | symbol | meaning                                                  | unit |
/// |--------|----------------------------------------------------------|------|
/// | V₀     | inside volume as drawn or measured                       | m³   |
/// | 3α     | cubic expansion of the walls, weighted by their volumes  | 1/K  |
/// | C      | elastic growth of the walls; 0 where it is not asked for | 1/Pa |
///
/// Expansion is each material's mean one, so the further from 20 °C to 100 °C the less it
/// is worth; a tenth of it is some 0.05 % of the volume at 100 K from the reference.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct Movement {
    pub expansion_per_k: f64,
    pub compliance_per_pa: f64,
}

impl Movement {
    /// Of a chamber's walls and of what lies inside. What has no known material moves as
    /// its neighbours do.
    pub fn of(chamber: &Chamber, materials: &Materials) -> Self {
        let (mut whole_m3, mut moved_m3_per_k, mut grown_m3_per_pa) = (0.0, 0.0, 0.0);
        for part in chamber.all_parts() {
            let Some(material) = part.material().and_then(|id| materials.get(id)) else {
                continue;
            };
            let volume_m3 = part.volumes().inside.nominal_m3;
            whole_m3 += volume_m3;
            moved_m3_per_k += 3.0 * material.expansion.value.get() * volume_m3;
            if chamber.elastic_growth && part.shape.role() != Role::Insert {
                grown_m3_per_pa += growth_m3_per_pa(
                    &part,
                    material.modulus.value.get(),
                    material.poisson_ratio.value.fraction(),
                );
            }
        }
        if whole_m3 <= 0.0 {
            return Self::default();
        }
        Self {
            expansion_per_k: moved_m3_per_k / whole_m3,
            compliance_per_pa: grown_m3_per_pa / whole_m3,
        }
    }

    /// Volume at a temperature over that at the reference, the wall without load.
    pub fn growth(&self, temperature_k: f64) -> f64 {
        1.0 + self.expansion_per_k * (temperature_k - REFERENCE_K)
    }

    /// The same walls, as if they did not yield to pressure.
    #[must_use]
    pub const fn rigid(self) -> Self {
        Self {
            compliance_per_pa: 0.0,
            ..self
        }
    }
}

/// By the nominal sizes; 0 where no formula is at hand, which is the careful answer.
fn growth_m3_per_pa(part: &Part, modulus_pa: f64, nu: f64) -> f64 {
    let t = part
        .wall
        .as_ref()
        .map_or(0.0, |wall| wall.thickness.nominal.metre());
    if t <= 0.0 {
        return 0.0;
    }
    f64::from(part.count) * super::resistance::growth_m3_per_pa(&part.shape, t, modulus_pa, nu)
}
