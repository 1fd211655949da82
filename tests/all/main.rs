//! All integration tests, in one binary so that it links once.

mod boundaries;
mod catalogue;
mod catalogue_table;
mod chamber;
#[cfg(feature = "window")]
mod chamber_window;
mod charge_window;
mod commands;
mod consistency;
mod contradictions;
mod expansions;
mod facts;
mod files;
mod fixed_points;
mod gas_in_designs;
mod given;
mod layers;
mod metals;
mod own_fluid_refusals;
mod own_fluids;
mod own_material_refusals;
mod own_materials;
mod phase_lines;
mod pictures;
mod presets;
mod printed_tables;
mod random_states;
mod ranking;
mod reference_equations;
mod refusals;
mod residual_gas;
mod second_source;
mod tables;
mod transport;
mod viscosity;
#[cfg(feature = "window")]
mod window;
