//! Residual gas: how much a design seals in, what it stands at, and what it costs.

use std::sync::Arc;

use super::charge::Corners;
use super::figure::{Figure, Missing};
use crate::chamber::{Chamber, Movement, NamedVolumes, Shape, Zone};
use crate::design::{Design, Duty};
use crate::fluid::correlated::GAS_CONSTANT;
use crate::fluid::{Fluid, Solubility, State};
use crate::sealed::effects::{blocked_length_m, lost_column_m, lost_temperature_k};
use crate::units::{Amount, Length, Pressure, Temperature, TemperatureDifference};

/// Residual gas of a design. Amounts are the nominal unit's; states those of the heaviest
/// charge in the smallest volume, in which the gas has least room.
#[derive(Debug, Clone, PartialEq)]
pub struct ResidualGas {
    /// Left in the space above the liquid; `None` where the vacuum is not stated.
    pub headspace: Option<Amount>,
    pub dissolved: DissolvedAir,
    /// Over life, as stated.
    pub generated: Amount,
    /// All that is counted.
    pub total: Amount,
    /// Of air in this fluid.
    pub solubility: Option<&'static Solubility>,
    /// Whether the liquid's taking up of gas is counted on: not where the gas is made over
    /// life and may be another than air.
    pub is_taken_up: bool,
    pub at_working_low: Figure<State>,
    pub at_bench: Figure<State>,
    pub at_working_high: Figure<State>,
    pub at_hottest: Figure<State>,
    /// Partial pressure over vapour pressure at the lower end of the working range.
    pub of_saturation: Figure<f64>,
    /// Of a liquid lift.
    pub lift: Option<LiftLoss>,
    /// Of a heat pipe or thermosyphon whose condenser is a tube that is said to be one.
    pub blocked: Option<Blocked>,
}

/// What becomes of the air in the liquid.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum DissolvedAir {
    /// The vacuum is not stated: nothing is known.
    NotStated,
    /// Taken out; what is left is in balance with the vacuum.
    Degassed(Amount),
    /// The fluid boils at the bench in the open: it comes from a closed cylinder.
    FromCylinder,
    /// In balance with the air of the bench.
    Saturated(Amount),
    /// Not degassed, and how much air it takes up is not known.
    NotKnown,
}

/// The most that gas takes from a lift, at the lower end of the working range.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct LiftLoss {
    pub column: Length,
    pub difference: TemperatureDifference,
}

/// Length of condenser that gas blocks, by the flat front.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Blocked {
    pub length: Length,
    /// The middle of the working range.
    pub vapour: Temperature,
    /// The lower end of the working range.
    pub cold_end: Temperature,
}

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
    vacuum_pa: Option<f64>,
    /// Density of liquid and vapour as it is sealed; `None` where there is no liquid then.
    phases: Option<(f64, f64)>,
    dissolved: Dissolved,
    generated_mol: f64,
    /// Inside at the bench over that at the reference.
    growth: f64,
    solubility: Option<&'static Solubility>,
}

#[derive(Debug, Clone, Copy, PartialEq)]
enum Dissolved {
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

impl ResidualGas {
    /// The solubility that a figure here rests on.
    pub fn counted_solubility(&self) -> Option<&'static Solubility> {
        let counts = self.is_taken_up || matches!(self.dissolved, DissolvedAir::Saturated(_));
        self.solubility
            .filter(|_| counts && self.total.mole() > 0.0)
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

/// What a design's gas stands at and costs.
pub fn residual_gas(
    design: &Design,
    inventory: &GasInventory,
    corners: &Corners,
    named: &NamedVolumes,
) -> ResidualGas {
    let conditions = &design.conditions;
    let nominal = &corners.nominal;
    let sealed = inventory.with(
        nominal.mass().kilogram(),
        named.inside.nominal.cubic_metre(),
    );
    let heaviest = &corners.heaviest;
    let state = |t: Temperature| heaviest.state(t).map_err(Missing::Fluid);
    let at_working_low = state(conditions.working_low);
    let fluid = heaviest.fluid();
    let saturation = fluid.saturation_pressure(conditions.working_low);
    let of_saturation = at_working_low
        .clone()
        .and_then(|state| Ok(gas_pa(&state) / saturation.clone()?.pascal()));
    let lift = at_working_low
        .as_ref()
        .ok()
        .filter(|_| design.duty == Duty::LiquidLift)
        .and_then(|state| lift_loss(fluid, gas_pa(state), conditions.working_low));
    ResidualGas {
        headspace: inventory.vacuum_pa.map(|_| amount(sealed.headspace)),
        dissolved: match inventory.dissolved {
            Dissolved::NotStated => DissolvedAir::NotStated,
            Dissolved::FromCylinder => DissolvedAir::FromCylinder,
            Dissolved::Degassed { .. } => DissolvedAir::Degassed(amount(sealed.dissolved)),
            Dissolved::Saturated { .. } => DissolvedAir::Saturated(amount(sealed.dissolved)),
            Dissolved::NotKnown => DissolvedAir::NotKnown,
        },
        generated: conditions.gas_generated,
        total: amount(sealed.total()),
        solubility: inventory.solubility,
        is_taken_up: inventory.ostwald() > 0.0,
        at_working_low,
        at_bench: state(conditions.bench),
        at_working_high: state(conditions.working_high),
        at_hottest: state(conditions.hottest),
        of_saturation,
        lift,
        blocked: blocked(design, fluid, named, sealed.total()),
    }
}

fn gas_pa(state: &State) -> f64 {
    state.gas.map_or(0.0, Pressure::pascal)
}

fn lift_loss(fluid: &Fluid, gas_pa: f64, at: Temperature) -> Option<LiftLoss> {
    let phases = fluid.saturation_pressure(at).ok().and(fluid.curve().ok())?;
    let phases = phases.at(at.kelvin());
    let slope = fluid.saturation_slope(at).ok()?;
    let column = lost_column_m(gas_pa, phases.liquid_kg_per_m3, phases.vapour_kg_per_m3);
    Some(LiftLoss {
        column: Length::from_metre(column).ok()?,
        difference: TemperatureDifference::from_kelvin(lost_temperature_k(gas_pa, slope)).ok()?,
    })
}

fn blocked(
    design: &Design,
    fluid: &Fluid,
    named: &NamedVolumes,
    amount_mol: f64,
) -> Option<Blocked> {
    if !matches!(design.duty, Duty::HeatPipe | Duty::Thermosyphon) {
        return None;
    }
    let conditions = &design.conditions;
    let (low, high) = (conditions.working_low, conditions.working_high);
    let vapour = Temperature::from_kelvin(0.5 * (low.kelvin() + high.kelvin())).ok()?;
    let area_m2 = condenser_area_m2(&design.chamber, named)?;
    let pressure = |t| fluid.saturation_pressure(t).ok().map(Pressure::pascal);
    let (hot, cold) = (pressure(vapour)?, pressure(low)?);
    let length = blocked_length_m(amount_mol, low.kelvin(), area_m2, hot, cold)?;
    Some(Blocked {
        length: Length::from_metre(length).ok()?,
        vapour,
        cold_end: low,
    })
}

/// Free cross-section of the narrowest tube of the condenser; linings and inserts take of it
/// the share that they take of the whole.
fn condenser_area_m2(chamber: &Chamber, named: &NamedVolumes) -> Option<f64> {
    let bores = chamber
        .parts
        .iter()
        .filter(|part| part.zone == Zone::Condenser && part.count > 0)
        .filter_map(|part| match &part.shape {
            Shape::Tube {
                inside_diameter, ..
            } => Some(inside_diameter.nominal.metre()),
            _ => None,
        });
    let bore = bores.reduce(f64::min).filter(|bore| *bore > 0.0)?;
    let cavities: f64 = chamber
        .all_parts()
        .map(|part| part.volumes().vapour_core.nominal_m3.max(0.0))
        .sum();
    let core = named.vapour_core.nominal.cubic_metre();
    let free = if cavities > 0.0 {
        (core / cavities).clamp(0.0, 1.0)
    } else {
        1.0
    };
    Some(0.25 * std::f64::consts::PI * bore * bore * free)
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

fn amount(mole: f64) -> Amount {
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
