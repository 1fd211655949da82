//! How much gas a design seals in, with any mass in any volume.

use std::sync::Arc;

use crate::chamber::{Chamber, Movement};
use crate::design::Design;
use crate::fluid::correlated::GAS_CONSTANT;
use crate::fluid::{Fluid, Solubility};
use crate::units::{Amount, Pressure, Temperature};

/// What a design's seal leaves in the unit, whatever the fluid.
#[derive(Debug, Clone)]
pub struct Seal<'a> {
    design: &'a Design,
    parts: Arc<[(f64, f64)]>,
    growth: f64,
}

/// What decides how much gas is sealed in with any mass in any volume.
#[derive(Debug, Clone, PartialEq)]
pub struct GasInventory {
    /// Shares of the inside and their temperatures at the seal, coldest first.
    parts: Arc<[(f64, f64)]>,
    pub(super) vacuum_pa: Option<f64>,
    /// Density of liquid and vapour as it is sealed; `None` where there is no liquid then.
    phases: Option<(f64, f64)>,
    pub(super) dissolved: Dissolved,
    generated_mol: f64,
    /// Inside at the bench over that at the reference.
    growth: f64,
    pub(super) solubility: Option<&'static Solubility>,
}

#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) enum Dissolved {
    NotStated,
    FromCylinder,
    Degassed { mol_per_m3: f64 },
    Saturated { mol_per_m3: f64 },
    NotKnown,
}

/// Amounts of gas by where they come from, mol.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct SealedGas {
    pub headspace: f64,
    pub dissolved: f64,
    pub generated: f64,
}

impl SealedGas {
    pub fn total(&self) -> f64 {
        self.headspace + self.dissolved + self.generated
    }
}

impl<'a> Seal<'a> {
    pub fn of(design: &'a Design, movement: Movement) -> Self {
        let bench = design.conditions.bench;
        Self {
            design,
            parts: shares(&design.chamber, bench).into(),
            growth: movement.growth(bench.kelvin()),
        }
    }
}

impl GasInventory {
    /// n = Σ p Vᵢ/(R Tᵢ) + L p_a V_l/(R T_bench) + n_life
    ///
    /// | symbol  | meaning                                                         | unit |
    /// |---------|-----------------------------------------------------------------|------|
    /// | p       | gas pressure stated at the seal                                 | Pa   |
    /// | Vᵢ, Tᵢ  | space of a part that the liquid leaves, its temperature          | m³, K|
    /// | L       | Ostwald coefficient of air                                      | –    |
    /// | p_a     | air that the liquid is in balance with: p where it is degassed, the barometer less the vapour pressure where not | Pa |
    /// | V_l     | volume of liquid                                                | m³   |
    /// | n_life  | gas made over life                                              | mol  |
    ///
    /// The liquid takes its volume off the coldest parts first: there it condenses and
    /// freezes. Inserts and wicks take theirs evenly.
    pub fn new(seal: &Seal<'_>, fluid: &Fluid) -> Self {
        let design = seal.design;
        let conditions = &design.conditions;
        let bench = conditions.bench;
        let parts = Arc::clone(&seal.parts);
        let coldest = parts.first().map_or(bench.kelvin(), |(_, t)| *t);
        let vacuum_pa = design.bench.vacuum.map(|p| p.pascal().max(0.0));
        let solubility = fluid.air_solubility();
        let boils = fluid.saturation_pressure(bench).ok();
        let (low, top) = fluid.saturation_range();
        let wet = Temperature::from_kelvin(coldest)
            .unwrap_or(bench)
            .max(fluid.freezing_point())
            .max(low);
        let phases = fluid
            .curve()
            .ok()
            .filter(|_| wet <= top)
            .map(|curve| curve.at(wet.kelvin()))
            .map(|at| (at.liquid_kg_per_m3, at.vapour_kg_per_m3));
        let air_pa = conditions.barometer.pascal() - boils.map_or(0.0, Pressure::pascal);
        let held = |pa: f64| {
            solubility.map(|s| s.ostwald_air * pa.max(0.0) / (GAS_CONSTANT * bench.kelvin()))
        };
        let dissolved = match vacuum_pa {
            None => Dissolved::NotStated,
            Some(_) if air_pa <= 0.0 || phases.is_none() => Dissolved::FromCylinder,
            Some(vacuum) if design.bench.degassed => Dissolved::Degassed {
                mol_per_m3: held(vacuum).unwrap_or(0.0),
            },
            Some(vacuum) => held(air_pa.max(vacuum)).map_or(Dissolved::NotKnown, |mol_per_m3| {
                Dissolved::Saturated { mol_per_m3 }
            }),
        };
        Self {
            parts,
            vacuum_pa,
            phases,
            dissolved,
            generated_mol: conditions.gas_generated.mole(),
            growth: seal.growth,
            solubility,
        }
    }

    /// Whether no gas at all is counted.
    pub fn is_empty(&self) -> bool {
        self.vacuum_pa.is_none_or(|p| p == 0.0)
            && self.generated_mol == 0.0
            && !matches!(self.dissolved, Dissolved::Saturated { .. })
    }

    /// Ostwald coefficient that is counted on.
    pub fn ostwald(&self) -> f64 {
        match self.solubility {
            Some(solubility) if self.generated_mol == 0.0 => solubility.ostwald_air,
            _ => 0.0,
        }
    }

    /// The gas that is sealed in with this mass, in a volume at the reference temperature.
    pub fn with(&self, mass_kg: f64, volume_m3: f64) -> SealedGas {
        let inside_m3 = volume_m3 * self.growth;
        let liquid = self.phases.map_or(0.0, |(liquid, vapour)| {
            ((mass_kg / inside_m3 - vapour) / (liquid - vapour)).clamp(0.0, 1.0)
        });
        let mut left = liquid;
        let mut per_kelvin = 0.0;
        for (share, kelvin) in self.parts.iter() {
            let wet = left.min(*share);
            left -= wet;
            per_kelvin += (share - wet) / kelvin;
        }
        let mol_per_m3 = match self.dissolved {
            Dissolved::Degassed { mol_per_m3 } | Dissolved::Saturated { mol_per_m3 } => mol_per_m3,
            _ => 0.0,
        };
        SealedGas {
            headspace: self.vacuum_pa.unwrap_or(0.0) * inside_m3 * per_kelvin / GAS_CONSTANT,
            dissolved: mol_per_m3 * liquid * inside_m3,
            generated: self.generated_mol,
        }
    }

    /// The same, in all, as an amount; an amount beyond all measure is the greatest there is.
    pub fn amount(&self, mass_kg: f64, volume_m3: f64) -> Amount {
        amount(self.with(mass_kg, volume_m3).total())
    }
}

/// Shares of the inside by temperature at the seal, coldest first.
fn shares(chamber: &Chamber, bench: Temperature) -> Vec<(f64, f64)> {
    let mut parts: Vec<(f64, f64)> = chamber
        .all_parts()
        .map(|part| {
            let at = part.sealing_temperature.unwrap_or(bench);
            (part.volumes().inside.nominal_m3.max(0.0), at.kelvin())
        })
        .filter(|(volume, _)| *volume > 0.0)
        .collect();
    let whole: f64 = parts.iter().map(|(volume, _)| volume).sum();
    if !(whole > 0.0 && whole.is_finite()) {
        return vec![(1.0, bench.kelvin())];
    }
    for (volume, _) in &mut parts {
        *volume /= whole;
    }
    parts.sort_by(|a, b| a.1.total_cmp(&b.1));
    parts
}

/// In the range of the type.
pub(super) fn amount(mole: f64) -> Amount {
    use crate::units::Quantity;
    let (_, most) = Amount::RANGE;
    Amount::from_mole(mole.clamp(0.0, most)).expect("clamped into the type's range")
}

#[cfg(test)]
mod tests {
    use super::*;

    fn inventory(parts: &[(f64, f64)]) -> GasInventory {
        GasInventory {
            parts: parts.into(),
            vacuum_pa: Some(100.0),
            phases: Some((1000.0, 1.0)),
            dissolved: Dissolved::FromCylinder,
            generated_mol: 0.0,
            growth: 1.0,
            solubility: None,
        }
    }

    /// physics.md, "Residual gas": a part at 77 K holds 3.8 times the moles.
    #[test]
    fn a_frozen_bulb_holds_3_8_times_the_moles() {
        let warm = inventory(&[(1.0, 293.15)]).with(1e-12, 1e-5).headspace;
        let cold = inventory(&[(1.0, 77.36)]).with(1e-12, 1e-5).headspace;
        assert!((cold / warm - 3.8).abs() < 0.02, "{}", cold / warm);
        let both = inventory(&[(0.25, 77.36), (0.75, 293.15)]).with(1e-12, 1e-5);
        assert!((both.headspace / (0.25 * cold + 0.75 * warm) - 1.0).abs() < 1e-12);
    }

    /// The liquid fills the cold part first: of 10 mL, a fifth cold, 4 mL are liquid.
    #[test]
    fn the_liquids_volume_is_taken_off_from_the_coldest_on() {
        let mass = 4e-6 * 1000.0 + 6e-6 * 1.0;
        let found = inventory(&[(0.2, 77.36), (0.8, 293.15)]).with(mass, 1e-5);
        let expected = 100.0 * 6e-6 / (GAS_CONSTANT * 293.15);
        assert!((found.headspace / expected - 1.0).abs() < 1e-12);
    }
}
