//! Chargewright: fluid, charge and envelope of sealed two-phase devices.
//!
//! A [`design::Design`] is what the user decided. [`assess::assess`] turns it into
//! an [`assess::Assessment`], what physics says about it. Everything else is a
//! view: the window, the charge sheet, the command line.
//!
//! Modules in reading order; arrows point from later to earlier ones only.

pub mod units;

pub mod solve;

pub mod source;

pub mod text;

pub mod fluid;

pub mod chamber;

pub mod conditions;

pub mod sealed;

pub mod section;

pub mod hazard;

pub mod design;

pub mod assess;

pub mod words;

pub mod picture;

pub mod sheet;

pub mod store;

pub mod cli;

#[cfg(feature = "window")]
pub mod ui;
