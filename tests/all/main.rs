//! All integration tests, in one binary so that it links once.

mod facts;
mod given;
mod layers;
mod reference_equations;
mod tables;
mod transport;
#[cfg(feature = "window")]
mod window;
