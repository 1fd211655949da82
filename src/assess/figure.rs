//! A result that may not exist, and the one reason why.

use crate::chamber::{ChamberError, StrengthUnknown};
use crate::fluid::FluidError;

/// A computed figure: known, or the root of why not. What depends on a missing
/// figure carries the same reason and is shown as a dash.
pub type Figure<T> = Result<T, Missing>;

/// Why a figure is not known.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum Missing {
    #[error(transparent)]
    Chamber(#[from] ChamberError),
    #[error(transparent)]
    Fluid(#[from] FluidError),
    #[error(transparent)]
    Strength(#[from] StrengthUnknown),
    #[error("the charge is zero")]
    NoCharge,
    #[error("the fill ratio names the part “{name}”, which is not in the parts list")]
    NoSuchPart { name: String },
    #[error("the fill ratio is of the wick, and no part is one")]
    NoWick,
    #[error("the fill ratio is of the evaporator, and no part is said to be in that zone")]
    NoEvaporator,
    #[error("the temperatures contradict each other")]
    Conditions,
    #[error("the room has no volume")]
    NoRoom,
    #[error("the liquid would fill {share:.3} of the inside volume, more than there is")]
    Overfull { share: f64 },
}
