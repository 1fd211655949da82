//! The window: the only room that knows egui, the only one that opens dialogs.

mod app;
mod command;
mod desk;
mod dialogs;
mod history;
mod orders;
mod panels;
mod plots;
mod settings;
mod start;
mod theme;
mod widgets;

pub use app::App;
pub use command::Command;
pub use desk::{Desk, Draft};
pub use settings::Settings;
pub use start::{open, warm_up};
pub use theme::{Palette, Theme};
