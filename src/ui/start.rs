//! Opening the window, or saying in one line why it cannot be opened.

use std::panic::{self, AssertUnwindSafe};
use std::path::PathBuf;
use std::process::ExitCode;
use std::sync::atomic::{AtomicBool, Ordering};

use eframe::egui::{self, ViewportBuilder};

use super::app::App;
use super::orders::first_design;
use crate::assess::{Library, assess};
use crate::store;

/// Set once the window's toolkit has started: a panic after it is ours.
static STARTED: AtomicBool = AtomicBool::new(false);

/// Opens the window on a design, or on a ready one, and stays until it is closed.
pub fn open(design: Option<PathBuf>) -> ExitCode {
    if !has_display() {
        return refuse("there is no display");
    }
    warm_up();
    let options = eframe::NativeOptions {
        viewport: ViewportBuilder::default()
            .with_title("Chargewright")
            .with_app_id("chargewright")
            .with_inner_size([1280.0, 720.0])
            .with_min_inner_size([960.0, 600.0])
            .with_drag_and_drop(true),
        renderer: eframe::Renderer::Glow,
        ..Default::default()
    };
    let run = move || {
        eframe::run_native(
            "chargewright",
            options,
            Box::new(move |creation| {
                STARTED.store(true, Ordering::Relaxed);
                let ctx: &egui::Context = &creation.egui_ctx;
                Ok(Box::new(App::new(
                    ctx,
                    design.as_deref(),
                    store::settings_folder(),
                )))
            }),
        )
    };
    match quietly(run) {
        Ok(Ok(())) => ExitCode::SUCCESS,
        Ok(Err(error)) => {
            // The toolkit puts the place in its own source before the reason.
            let text = error.to_string();
            let reason = text.rsplit(": ").next().unwrap_or(&text);
            refuse(&format!("the window cannot be opened: {reason}"))
        }
        Err(why) => refuse(&format!("the window cannot be opened: {why}")),
    }
}

/// Assesses the first design on another thread: the window and its driver take longer
/// to open than that, and a fluid's expansions are kept once they are made.
pub fn warm_up() {
    std::thread::spawn(|| drop(assess(&first_design(), &Library::built_in())));
}

/// Runs the window. Its toolkit panics where a library of the system is missing
/// (libxkbcommon-x11, for instance): before the window has started, such a panic
/// becomes a sentence; after it, it goes on as it is.
fn quietly<T>(run: impl FnOnce() -> T) -> Result<T, String> {
    let usual = panic::take_hook();
    panic::set_hook(Box::new(move |info| {
        if STARTED.load(Ordering::Relaxed) {
            usual(info);
        }
    }));
    let result = panic::catch_unwind(AssertUnwindSafe(run));
    result.map_err(|payload| {
        if STARTED.load(Ordering::Relaxed) {
            panic::resume_unwind(payload);
        }
        let text = payload
            .downcast_ref::<String>()
            .cloned()
            .or_else(|| {
                payload
                    .downcast_ref::<&str>()
                    .map(|text| (*text).to_owned())
            })
            .unwrap_or_else(|| "a system library is missing".to_owned());
        text.split_whitespace().collect::<Vec<_>>().join(" ")
    })
}

fn has_display() -> bool {
    let set = |name: &str| std::env::var_os(name).is_some_and(|value| !value.is_empty());
    !cfg!(all(unix, not(target_os = "macos"))) || set("DISPLAY") || set("WAYLAND_DISPLAY")
}

fn refuse(why: &str) -> ExitCode {
    eprintln!(
        "chargewright: {why}; without a window there are the commands sheet, check, section, walls, saturation, isochore, fluids, materials"
    );
    ExitCode::from(2)
}
