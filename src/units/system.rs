//! Which unit each kind of quantity is shown in.

use serde::{Deserialize, Serialize};

use super::format::{careful_down, careful_up, figures};
use super::quantity::Quantity;
use super::unit::{Kind, Unit, unit_named};

/// No-break space, between a number and its unit.
pub const NBSP: char = '\u{a0}';

/// The user's choice of units, remembered between starts.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Default, Serialize, Deserialize)]
pub enum UnitSystem {
    /// °C, bar, mL, g, mm.
    #[default]
    Metric,
    /// K, MPa, mL, g, mm.
    Kelvin,
    /// °F, psi, in³, oz, in.
    Inch,
}

/// Formats quantities in the chosen system: every view prints through it.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Default)]
pub struct Units {
    pub system: UnitSystem,
}

impl Units {
    pub const fn new(system: UnitSystem) -> Self {
        Self { system }
    }

    /// The unit in which a value of this size is shown: the prefix follows the size.
    pub fn unit_for(&self, kind: Kind, si: f64) -> &'static Unit {
        let size = si.abs();
        let pick = |steps: &[(f64, &'static str)], last: &'static str| {
            let symbol = steps
                .iter()
                .find(|(below, _)| size < *below)
                .map_or(last, |(_, s)| s);
            unit_named(kind, symbol)
        };
        match (kind, self.system) {
            (Kind::Temperature, UnitSystem::Metric) => unit_named(kind, "°C"),
            (Kind::Temperature, UnitSystem::Kelvin) => unit_named(kind, "K"),
            (Kind::Temperature, UnitSystem::Inch) => unit_named(kind, "°F"),
            (Kind::TemperatureDifference, UnitSystem::Inch) => unit_named(kind, "°F"),
            (Kind::TemperatureDifference, _) => unit_named(kind, "K"),
            (Kind::Pressure, UnitSystem::Metric) => pick(&[(1e3, "mbar")], "bar"),
            (Kind::Pressure, UnitSystem::Kelvin) => pick(&[(1e3, "Pa"), (1e5, "kPa")], "MPa"),
            (Kind::Pressure, UnitSystem::Inch) => unit_named(kind, "psi"),
            (Kind::Length, UnitSystem::Inch) => pick(&[(1.0, "in")], "ft"),
            (Kind::Length, _) => pick(&[(1e-4, "µm"), (1.0, "mm")], "m"),
            (Kind::Volume, UnitSystem::Inch) => pick(&[(1e-2, "in³")], "ft³"),
            (Kind::Volume, _) => pick(&[(1e-7, "µL"), (1e-3, "mL"), (1.0, "L")], "m³"),
            (Kind::Mass, UnitSystem::Inch) => pick(&[(0.5, "oz")], "lb"),
            (Kind::Mass, _) => pick(&[(1e-4, "mg"), (1.0, "g")], "kg"),
            (Kind::Density, UnitSystem::Inch) => unit_named(kind, "lb/ft³"),
            (Kind::Density, _) => unit_named(kind, "kg/m³"),
            (Kind::Ratio, _) => unit_named(kind, "%"),
            (Kind::Energy, UnitSystem::Inch) => unit_named(kind, "ft·lbf"),
            (Kind::Energy, _) => pick(&[(1e4, "J")], "kJ"),
            (Kind::Amount, _) => pick(&[(1e-7, "nmol"), (1e-4, "µmol"), (1e-1, "mmol")], "mol"),
            (Kind::Area, _) => unit_named(kind, "µm²"),
            (Kind::MeshNumber, UnitSystem::Inch) => unit_named(kind, "/in"),
            (Kind::MeshNumber, _) => unit_named(kind, "/mm"),
            (Kind::Angle, _) => unit_named(kind, "°"),
            (Kind::Number, _) => unit_named(kind, ""),
        }
    }

    /// A number for `si` in the unit it is shown in, without the unit.
    /// Temperatures keep two decimals at most, others `digits` figures.
    pub fn number(&self, kind: Kind, si: f64, unit: &Unit, digits: usize) -> String {
        let number = unit.number_of(si);
        if kind == Kind::Temperature {
            let decimals = if self.system == UnitSystem::Kelvin {
                2
            } else {
                1
            };
            let text = format!("{number:.decimals$}");
            // "-0.0" reads like a mistake.
            if text
                .trim_start_matches('-')
                .chars()
                .all(|c| matches!(c, '0' | '.'))
            {
                return text.trim_start_matches('-').to_owned();
            }
            return text;
        }
        figures(number, digits)
    }

    /// `si` with its unit, to `digits` significant figures.
    pub fn show_si(&self, kind: Kind, si: f64, digits: usize) -> String {
        let unit = self.unit_for(kind, si);
        let number = self.number(kind, si, unit, digits);
        with_unit(number, unit)
    }

    /// A quantity with its unit, to `digits` significant figures.
    pub fn show_to<Q: Quantity>(&self, quantity: Q, digits: usize) -> String {
        self.show_si(Q::KIND, quantity.si(), digits)
    }

    /// A quantity with its unit, in the unit in which `beside` is shown: a tolerance
    /// after its nominal.
    pub fn show_beside<Q: Quantity>(&self, quantity: Q, beside: Q, digits: usize) -> String {
        let unit = self.unit_for(Q::KIND, beside.si());
        let number = self.number(Q::KIND, quantity.si(), unit, digits);
        with_unit(number, unit)
    }

    /// A quantity with its unit, the last of `digits` figures rounded down or up and never
    /// to the nearest: an end of a range, told so that it lies inside.
    pub fn show_careful<Q: Quantity>(&self, quantity: Q, digits: i32, down: bool) -> String {
        let unit = self.unit_for(Q::KIND, quantity.si());
        let number = unit.number_of(quantity.si());
        let number = if down {
            careful_down(number, digits)
        } else {
            careful_up(number, digits)
        };
        let text = figures(number, digits.unsigned_abs() as usize);
        with_unit(text, unit)
    }

    /// A quantity with its unit, to four significant figures.
    pub fn show<Q: Quantity>(&self, quantity: Q) -> String {
        self.show_to(quantity, 4)
    }
}

fn with_unit(number: String, unit: &Unit) -> String {
    if unit.symbol.is_empty() {
        number
    } else {
        format!("{number}{NBSP}{}", unit.symbol)
    }
}

#[cfg(test)]
mod tests {
    use super::super::quantity::{Amount, Mass, Pressure, Temperature};
    use super::*;

    #[test]
    fn prefix_follows_the_size_and_the_system() {
        let metric = Units::new(UnitSystem::Metric);
        let inch = Units::new(UnitSystem::Inch);
        let mass = Mass::from_kilogram(3.2144e-3).expect("mass");
        assert_eq!(metric.show(mass), "3.214\u{a0}g");
        let warm = Temperature::from_kelvin(273.15).expect("temperature");
        assert_eq!(metric.show(warm), "0.0\u{a0}°C");
        assert_eq!(inch.show(warm), "32.0\u{a0}°F");
        let mass = Mass::from_kilogram(18.3757e-3).expect("mass");
        assert_eq!(metric.show_careful(mass, 4, true), "18.37\u{a0}g");
        assert_eq!(metric.show_careful(mass, 4, false), "18.38\u{a0}g");
        assert_eq!(inch.show_careful(mass, 4, true), "0.6481\u{a0}oz");
        let p = Pressure::from_pascal(58_700.0).expect("pressure");
        assert_eq!(metric.show(p), "0.5870\u{a0}bar");
        // methods.md section 5: 1 µmol of gas is about 0.024 mL(NTP).
        let amount = Amount::from_mole(1e-6).expect("amount");
        assert_eq!(metric.show(amount), "1.000\u{a0}µmol");
        let ntp = unit_named(Kind::Amount, "mL(NTP)").number_of(amount.mole());
        assert!((ntp - 0.024).abs() < 1e-4, "{ntp}");
    }
}
