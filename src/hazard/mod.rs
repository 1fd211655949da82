//! What happens to people when a unit breaks.

mod compatibility;
mod energy;
mod release;

pub use compatibility::{Compatibility, CompatibilityTable, Verdict as PairVerdict};
pub use energy::{EnergyError, rupture_energy};
pub use release::{Release, release};
