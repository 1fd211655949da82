//! Quantities, units and how numbers are read and shown.
//!
//! SI inside, units at the rim: this room is the only one that knows degrees
//! Celsius, bar, psi or millilitres.

mod format;
mod parse;
mod quantity;
mod system;
mod unit;

pub use format::{careful_down, careful_up, figures};
pub use parse::{ParseError, parse_si};
pub use quantity::{
    Amount, Density, Energy, Length, Mass, MeshNumber, Permeability, Pressure, Quantity,
    QuantityError, Ratio, Temperature, TemperatureDifference, Tilt, Volume,
};
pub use system::{NBSP, UnitSystem, Units};
pub use unit::{Kind, UNITS, Unit, unit_named};
