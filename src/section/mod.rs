//! The section of a device: its pieces along one axis, and where the liquid stands.
//!
//! A [`Device`] is made from the parts of a chamber ([`Device::of`]) or from what they
//! come to ([`Device::assemble`], which knows no [`crate::chamber::Shape`]). Its volumes
//! are those of the body as drawn: a bore that leads into a sphere takes a cap off it,
//! while the chamber's sum counts the whole sphere, and a measured volume differs from
//! both. So liquid is carried over by its share of the volume.

mod body;
mod cut;
mod forms;
mod level;
#[cfg(test)]
mod level_tests;
mod lining;
mod piece;
mod quadrature;
mod shapes;
mod stack;
#[cfg(test)]
mod stack_tests;
mod stretch;

pub use body::{Body, BodyOutline, Insert, Made, Solid};
pub use level::Tilt;
pub use lining::{Layer, Lies, Lining, pillar_share};
pub use piece::{Form, Piece, Side};
pub use stack::{NoSection, Place, Stacked};
pub use stretch::{Curve, Stretch};

/// Pieces along one axis, from the first end to the last, and what lies in them.
#[derive(Debug, Clone, PartialEq)]
pub struct Device {
    pub pieces: Vec<Piece>,
    pub bodies: Vec<Body>,
}
