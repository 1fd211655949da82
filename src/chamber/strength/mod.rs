//! Strength formulas, one file per family of shapes.
//!
//! Every pressure here is the load on the wall in Pa: inside minus outside, and in
//! [`collapse`] outside minus inside.
//! Every formula for inside pressure is linear in its stress, so that with a stress of 1 it gives the
//! pressure per unit of stress; [`super::Envelope`] computes that once per part.

pub mod bend;
pub mod collapse;
pub mod compliance;
pub mod cylinder;
pub mod glass;
pub mod head;
pub mod obround;
pub mod pillar;
pub mod plate;
pub mod sphere;
pub mod thermal;
