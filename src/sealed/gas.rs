//! Permanent gas in the sealed unit: air left in or let out of the liquid, gas made over life.
//!
//! It has only what room the liquid leaves, and the liquid gives way to it: both are solved
//! together, up to the last bubble.

use crate::fluid::correlated::GAS_CONSTANT;
use crate::fluid::{Fluid, FluidError, Regime, Squeezed, State};
use crate::solve::{bracketed_root, rising_root};
use crate::units::{Amount, Density, Pressure, Temperature};

/// An amount of gas, and how much of it the liquid takes up.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Gas {
    pub amount: Amount,
    /// Concentration in the liquid over that in the space above it (Ostwald coefficient);
    /// 0 where it is not known, so that nothing is credited.
    pub ostwald: f64,
}

impl Gas {
    /// A state with the gas in it; `alone` is the fluid's own, in the same volume.
    ///
    /// In two phases, with the vapour at its saturation and the gas ideal,
    ///
    /// y (V_v + L V_l) = n R T,  m = ρ_l(p) V_l + ρ″ V_v,  V = V_l + V_v,  p = p_sat + y
    ///
    /// and in one, p = p_fluid + n R T/V (Dalton).
    ///
    /// | symbol   | meaning                                  | unit  |
    /// |----------|------------------------------------------|-------|
    /// | y        | partial pressure of the gas              | Pa    |
    /// | n        | amount of gas                            | mol   |
    /// | V_v, V_l | volume of vapour and of liquid           | m³    |
    /// | L        | Ostwald coefficient                      | –     |
    /// | ρ_l, ρ″  | squeezed liquid, saturated vapour        | kg/m³ |
    /// | p        | total pressure                           | Pa    |
    ///
    /// The unknown is y. Its left side rises with y, so there is one answer, between the
    /// excess at which the liquid alone would fill the volume (0 while it does not) and that
    /// of a liquid that does not give way, or the model's greatest pressure; Newton's step
    /// within that bracket, to 1e-9 of y, which leaves its square. A liquid that fills the
    /// volume is squeezed until the bubble has room, and where it can take up all the gas
    /// at the pressure that it has there is none. Above the critical temperature the line of
    /// critical density takes the place of the vapour pressure for what is denser than it
    /// ([`crate::fluid::Divide`]); for what is not, Dalton's sum meets it there.
    ///
    /// Left out: the second virial coefficient of the gas and its cross term with the
    /// vapour (air at 1 bar and room temperature: below 0.05 %; with an organic vapour a
    /// few tenths of a per cent), and that gas pressure raises the vapour pressure
    /// (v_l y/RT: 0.4 % of it per bar).
    /// Frozen, the gas has the room that the liquid left it at the freezing point, and takes
    /// nothing up.
    ///
    /// Source: Dalton's and Henry's law; the balance is derived here.
    ///
    /// # Errors
    /// [`FluidError::PressureTooHigh`] where the last bubble stands at more than the model's
    /// pressures, [`FluidError::NoCompressedLiquid`] where it does so because nothing is
    /// known of the squeezed liquid.
    pub fn joins(
        &self,
        fluid: &Fluid,
        alone: State,
        density: Density,
        volume_m3: f64,
        temperature: Temperature,
    ) -> Result<State, FluidError> {
        let added = match alone.regime {
            Regime::Frozen => self.over_the_solid(fluid, density, volume_m3, temperature),
            _ => self.added_pa(fluid, density, volume_m3, temperature)?,
        };
        let total =
            Pressure::from_pascal(alone.pressure.pascal() + added).map_err(|_| too_high(fluid))?;
        Ok(State {
            pressure: total,
            gas: Pressure::from_pascal(added).ok(),
            ..alone
        })
    }

    /// Pressure of all the gas in the whole volume, Pa.
    fn spread_pa(&self, volume_m3: f64, temperature: Temperature) -> f64 {
        self.amount.mole() * GAS_CONSTANT * temperature.kelvin() / volume_m3
    }

    /// What the gas adds to the fluid's own pressure, Pa.
    fn added_pa(
        &self,
        fluid: &Fluid,
        density: Density,
        volume_m3: f64,
        temperature: Temperature,
    ) -> Result<f64, FluidError> {
        let spread = self.spread_pa(volume_m3, temperature);
        let rho = density.kilogram_per_cubic_metre();
        let divide = fluid.divide(temperature)?;
        if spread == 0.0 || rho <= divide.light_kg_per_m3 {
            return Ok(spread);
        }
        let balance = Balance {
            rho,
            light: divide.light_kg_per_m3,
            ostwald: self.ostwald,
        };
        let rest = divide.at_rest();
        // A liquid that fills the volume by itself stands at this excess.
        let full = if rho > divide.dense_kg_per_m3 {
            divide.excess_pa(rho)
        } else {
            0.0
        };
        if full > 0.0 && full * self.ostwald >= spread {
            return Ok(0.0);
        }
        let room_at_rest = balance.room(rest.kg_per_m3);
        let stiff = spread / room_at_rest;
        if divide.is_stiff() {
            return if room_at_rest > 0.0 && stiff <= divide.most_excess_pa {
                Ok(stiff)
            } else {
                Err(fluid.no_compressed_liquid())
            };
        }
        let most = if room_at_rest > 0.0 && self.ostwald <= 1.0 {
            stiff.min(divide.most_excess_pa)
        } else {
            divide.most_excess_pa
        };
        let mut last = rest;
        let mut at = |y: f64| -> (f64, f64) {
            last = divide.squeezed(y, last);
            let (room, opens) = (balance.room(last.kg_per_m3), balance.opens(last));
            (y * room - spread, room + y * opens)
        };
        if most <= full || at(most).0 < 0.0 && most >= divide.most_excess_pa {
            return Err(too_high(fluid));
        }
        let start = balance.start(rest, spread);
        let y = rising_root(&mut at, (full, most), start, 1e-9).map_err(|_| too_high(fluid))?;
        Ok((y - full).max(0.0))
    }

    /// Over the solid, Pa: the room is that beside the liquid at its freezing point, or
    /// beside the solid where that is known to be lighter.
    fn over_the_solid(
        &self,
        fluid: &Fluid,
        density: Density,
        volume_m3: f64,
        temperature: Temperature,
    ) -> f64 {
        let (low, _) = fluid.range();
        let melting = fluid.freezing_point().max(low);
        let spread = self.spread_pa(volume_m3, temperature);
        let undissolved = Self {
            ostwald: 0.0,
            ..*self
        };
        let cooled = temperature.kelvin() / melting.kelvin();
        let beside_liquid = undissolved
            .added_pa(fluid, density, volume_m3, melting)
            .map_or(spread, |added| added * cooled);
        let beside_solid = fluid.solid_density().map_or(spread, |solid| {
            let left = 1.0 - density.kilogram_per_cubic_metre() / solid.value;
            if left > 0.0 { spread / left } else { spread }
        });
        spread.max(beside_liquid).max(beside_solid)
    }
}

/// The least density there is, kg/m³.
const NEXT_TO_NOTHING: f64 = 1e-30;

/// How much room the gas has at a density of the dense phase.
struct Balance {
    /// Mean density of the fluid.
    rho: f64,
    light: f64,
    ostwald: f64,
}

impl Balance {
    /// (V_v + L V_l)/V.
    fn room(&self, dense: f64) -> f64 {
        let free = (dense - self.rho) / (dense - self.light);
        free + self.ostwald * (1.0 - free)
    }

    /// Its slope over the excess pressure, 1/Pa.
    fn opens(&self, at: Squeezed) -> f64 {
        let between = at.kg_per_m3 - self.light;
        (1.0 - self.ostwald) * (self.rho - self.light) / (between * between) * at.yields
    }

    /// The excess pressure of a liquid that gives way evenly: a y² + b y = n R T/V.
    fn start(&self, rest: Squeezed, spread: f64) -> f64 {
        let (a, b) = (self.opens(rest), self.room(rest.kg_per_m3));
        let root = (b * b + 4.0 * a * spread).sqrt();
        if !b.is_finite() || a <= 0.0 {
            0.0
        } else if b > 0.0 {
            2.0 * spread / (b + root)
        } else {
            0.5 * (root - b) / a
        }
    }
}

/// The greatest mean density at which fluid and gas together stand at or below `limit` in
/// `volume_m3`; `amount_mol` is the gas that comes with a mean density, falling or rising
/// slowly with it. Without gas it is [`Fluid::densest_within`].
///
/// At the limit the squeezed liquid's density is known, which leaves the balance of
/// [`Gas::joins`] linear in the mean density but for the amount of gas.
///
/// # Errors
/// [`FluidError`] outside the model's temperatures, or frozen.
pub fn densest_within(
    fluid: &Fluid,
    limit: Pressure,
    temperature: Temperature,
    volume_m3: f64,
    ostwald: f64,
    amount_mol: impl Fn(f64) -> f64,
) -> Result<Option<Density>, FluidError> {
    let spread = |rho: f64| amount_mol(rho) * GAS_CONSTANT * temperature.kelvin() / volume_m3;
    let melting = fluid.melting_pressure(temperature);
    // At the triple point the liquid melts as it is: the gas presses on it by less than the
    // line is known to.
    if melting.is_some_and(|m| m < limit && fluid.is_beside_its_line(m, temperature)) {
        return fluid.densest_within(limit, temperature, None);
    }
    let limit_pa = melting.map_or(limit.pascal(), |m| m.pascal().min(limit.pascal()));
    let divide = fluid.divide(temperature)?;
    let excess = limit_pa - divide.pressure_pa;
    if excess > divide.most_excess_pa {
        return fluid.densest_within(limit, temperature, None);
    }
    if excess > 0.0 {
        let dense = divide.squeezed(excess, divide.at_rest()).kg_per_m3;
        let over = |rho: f64| {
            let light = divide.light_kg_per_m3;
            let balance = Balance {
                rho,
                light,
                ostwald,
            };
            spread(rho) - excess * balance.room(dense)
        };
        if over(dense) <= 0.0 {
            return Ok(Density::from_kilogram_per_cubic_metre(dense).ok());
        }
        let light = divide.light_kg_per_m3;
        if over(light) < 0.0
            && let Ok(rho) = bracketed_root(over, light, dense, 1e-14 * dense)
        {
            return Ok(Density::from_kilogram_per_cubic_metre(rho).ok());
        }
    }
    // No liquid: the fluid has what pressure the gas leaves it.
    let mut rho = divide.light_kg_per_m3;
    for _ in 0..50 {
        let own = (limit_pa - spread(rho)).min(divide.pressure_pa);
        let Some(own) = Pressure::from_pascal(own).ok().filter(|p| p.pascal() > 0.0) else {
            return Ok(Density::from_kilogram_per_cubic_metre(NEXT_TO_NOTHING).ok());
        };
        let near = Density::from_kilogram_per_cubic_metre(rho).ok();
        let Some(found) = fluid.density_near(own, temperature, near)? else {
            return Ok(None);
        };
        let found = found.kilogram_per_cubic_metre();
        let settled = (found - rho).abs() <= 1e-13 * rho;
        rho = found;
        if settled {
            break;
        }
    }
    Ok(Density::from_kilogram_per_cubic_metre(rho).ok())
}

fn too_high(fluid: &Fluid) -> FluidError {
    let (_, high) = fluid.limits();
    FluidError::PressureTooHigh {
        fluid: fluid.name().to_owned(),
        high,
    }
}
