//! Residual gas: where it comes from, what it stands at, and what it costs.

use super::charge::Corners;
use super::figure::{Figure, Missing};
use super::inventory::{Dissolved, GasInventory, amount};
use crate::chamber::{Chamber, NamedVolumes, Shape, Zone};
use crate::design::{Design, Duty};
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

impl ResidualGas {
    /// The solubility that a figure here rests on.
    pub fn counted_solubility(&self) -> Option<&'static Solubility> {
        let counts = self.is_taken_up || matches!(self.dissolved, DissolvedAir::Saturated(_));
        self.solubility
            .filter(|_| counts && self.total.mole() > 0.0)
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
