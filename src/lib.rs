//! bird's-eye view comes later
pub mod units;
pub mod solve;
pub mod source;
pub mod fluid;
