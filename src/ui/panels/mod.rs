//! The window's panels: each shows or edits one thing and computes nothing.

mod behaviour;
mod chamber;
mod charge;
mod conditions;
mod design;
mod exposures;
mod findings;
mod fluid;
mod fluids;
mod meaning;
mod menu;
mod section;
mod status;

pub use behaviour::{Behaviour, Wish, behaviour_ui};
pub use design::{DesignPanel, design_ui, editing_text_id};
pub use meaning::meaning_ui;
pub use menu::menu_ui;
pub use status::{DiskAnswer, status_ui};
