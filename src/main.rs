//! The window, or a headless command.

use std::process::ExitCode;

use chargewright::cli::{arguments, run};

fn main() -> ExitCode {
    match arguments() {
        Ok(arguments) => match &arguments.command {
            Some(command) => run(command),
            None => open_window(arguments.design),
        },
        Err(code) => code,
    }
}

#[cfg(feature = "window")]
fn open_window(design: Option<std::path::PathBuf>) -> ExitCode {
    chargewright::ui::open(design)
}

#[cfg(not(feature = "window"))]
fn open_window(_design: Option<std::path::PathBuf>) -> ExitCode {
    eprintln!(
        "chargewright: this build has no window; the headless commands are sheet, check, section, walls, saturation, isochore, fluids, materials"
    );
    ExitCode::from(2)
}
