//! All integration tests, in one binary so that it links once.

mod boundaries;
mod charge_window;
mod commands;
mod consistency;
mod contradictions;
mod facts;
mod files;
mod given;
mod layers;
mod metals;
mod own_fluid_refusals;
mod own_fluids;
mod presets;
mod printed_tables;
mod random_states;
mod reference_equations;
mod refusals;
mod second_source;
mod tables;
mod transport;
#[cfg(feature = "window")]
mod window;
