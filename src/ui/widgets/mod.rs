//! What panels are put together from: the one field for every quantity, the
//! bars that show how much of a limit is used, the badge of a verdict.

mod badge;
mod bars;
mod choice;
mod draft;
mod quantity;
mod row;
mod slider;
mod window_bar;

#[cfg(test)]
mod tests;

pub use badge::{Badge, badge_mark, verdict_badge};
pub use bars::margin_bar;
pub use choice::{ChoiceWidth, choice_ui};
pub use draft::is_typing;
pub use quantity::{QuantityField, quantity_with_tolerance_row};
pub use window_bar::{WindowBar, WindowBarLabels, window_bar};
