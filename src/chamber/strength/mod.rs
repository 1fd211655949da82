//! Strength formulas, one file per family of shapes.
//!
//! Every pressure here is the load on the wall: inside minus outside, in Pa.
//! Every formula is linear in its stress, so that with a stress of 1 it gives the
//! pressure per unit of stress; [`super::Envelope`] computes that once per part.

pub mod cylinder;
pub mod glass;
pub mod head;
pub mod plate;
pub mod sphere;
