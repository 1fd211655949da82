//! All integration tests, in one binary so that it links once.

mod reference_equations;
mod tables;
#[cfg(feature = "window")]
mod window;
