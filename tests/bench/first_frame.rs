//! How long the window takes to its first finished frame, what it draws when idle, and
//! what a frame costs while the charge is dragged.
//!
//! - `first_frame app|bare`: milliseconds from the first line of `main` to the end of the
//!   first frame, its painting and buffer swap included. The frame's end is taken where
//!   the next frame begins, which is asked for at once; so nothing is left out, and the
//!   event loop's turn between the two is counted as well. Loading the program before
//!   `main` is not.
//! - `first_frame app|bare --idle`: also the frames drawn in 5 s once nothing moves.
//! - `first_frame --drag`: what making the window's content and its first frame cost,
//!   then milliseconds a frame over 300 frames with a new charge each,
//!   drawn into shapes and triangles without a display or driver, and the part of it that
//!   the assessment takes.
//!
//! `bare` is an empty window of the same toolkit with one label, as a yardstick.

use std::env;
use std::hint::black_box;
use std::process::ExitCode;
use std::thread;
use std::time::{Duration, Instant};

use chargewright::assess::{Library, assess};
use chargewright::design::Change;
use chargewright::design::{ChargeAim, Design};
use chargewright::ui::{App, Command};
use chargewright::units::{Mass, Quantity};
use eframe::egui::{
    CentralPanel, Context, Event, Modifiers, PointerButton, RawInput, Rect, Ui, ViewportBuilder,
    ViewportCommand, pos2, vec2,
};

const SIZE: [f32; 2] = [1280.0, 720.0];
const FRAMES: usize = 300;

fn main() -> ExitCode {
    let start = Instant::now();
    let arguments: Vec<String> = env::args().skip(1).collect();
    let arguments: Vec<&str> = arguments.iter().map(String::as_str).collect();
    match arguments[..] {
        ["app"] => {
            chargewright::ui::warm_up(); // as src/ui/start.rs does
            open(start, false, app)
        }
        ["bare"] => open(start, false, |_| Content::Bare),
        ["app", "--idle"] => open(start, true, app),
        ["bare", "--idle"] => open(start, true, |_| Content::Bare),
        ["--drag"] => {
            drag();
            ExitCode::SUCCESS
        }
        _ => {
            eprintln!("first_frame: say app or bare, with --idle or without, or only --drag");
            ExitCode::from(2)
        }
    }
}

enum Content {
    App(Box<App>),
    Bare,
}

fn app(ctx: &Context) -> Content {
    Content::App(Box::new(App::new(ctx, None, None)))
}

/// The window, with a clock in front of its content.
struct Timed {
    start: Instant,
    idle: bool,
    content: Content,
    first_frame: Option<Duration>,
}

impl eframe::App for Timed {
    fn ui(&mut self, ui: &mut Ui, frame: &mut eframe::Frame) {
        let ctx = ui.ctx().clone();
        if ctx.cumulative_frame_nr() == 0 {
            ctx.request_repaint();
        } else if self.first_frame.is_none() {
            let took = self.start.elapsed();
            self.first_frame = Some(took);
            println!("{:.1}", 1e3 * took.as_secs_f64());
            if self.idle {
                count_idle_frames(ctx.clone());
            } else {
                ctx.send_viewport_cmd(ViewportCommand::Close);
            }
        }
        match &mut self.content {
            Content::App(app) => eframe::App::ui(app.as_mut(), ui, frame),
            Content::Bare => drop(CentralPanel::default().show(ui, |ui| ui.label("bare"))),
        }
    }
}

/// The window of `src/ui/start.rs`.
fn open(start: Instant, idle: bool, content: fn(&Context) -> Content) -> ExitCode {
    let options = eframe::NativeOptions {
        viewport: ViewportBuilder::default()
            .with_title("Chargewright")
            .with_app_id("chargewright")
            .with_inner_size(SIZE)
            .with_min_inner_size([960.0, 600.0])
            .with_drag_and_drop(true),
        renderer: eframe::Renderer::Glow,
        ..Default::default()
    };
    let result = eframe::run_native(
        "chargewright",
        options,
        Box::new(move |creation| {
            Ok(Box::new(Timed {
                start,
                idle,
                content: content(&creation.egui_ctx),
                first_frame: None,
            }))
        }),
    );
    match result {
        Ok(()) => ExitCode::SUCCESS,
        Err(error) => {
            eprintln!("first_frame: {error}");
            ExitCode::from(2)
        }
    }
}

/// Waits for a second without a frame, 20 s at most, then counts.
fn count_idle_frames(ctx: Context) {
    thread::spawn(move || {
        let drawn = |wait: u64| {
            let before = ctx.cumulative_frame_nr();
            thread::sleep(Duration::from_secs(wait));
            ctx.cumulative_frame_nr() - before
        };
        for _ in 0..20 {
            if drawn(1) == 0 {
                break;
            }
        }
        println!("{} frames in 5 s of idleness", drawn(5));
        ctx.send_viewport_cmd(ViewportCommand::Close);
        ctx.request_repaint();
    });
}

/// Frames of the whole window without a display, each with a new charge.
fn drag() {
    let ctx = Context::default();
    let start = Instant::now();
    let mut app = App::new(&ctx, None, None);
    report("making the content", vec![millis(start)]);
    let design = app.desk().design.clone();
    let masses: Vec<Mass> = charges(&design);

    // The pointer is down all the while, as in a drag, so no undo point is made.
    let down = Event::PointerButton {
        pos: pos2(0.5 * SIZE[0], 2.0),
        button: PointerButton::Primary,
        pressed: true,
        modifiers: Modifiers::NONE,
    };
    report("first frame", vec![frame(&ctx, &mut app, vec![down], None)]);
    // Fonts and layouts come to rest in the next ones.
    for mass in &masses[..30] {
        frame(&ctx, &mut app, Vec::new(), Some(*mass));
    }
    let frames = masses
        .iter()
        .map(|mass| frame(&ctx, &mut app, Vec::new(), Some(*mass)))
        .collect();
    let last = masses[FRAMES - 1];
    assert_eq!(
        app.desk().design.charge.aim,
        ChargeAim::Mass { mass: last },
        "the charge followed"
    );

    let still = (0..FRAMES)
        .map(|_| frame(&ctx, &mut app, Vec::new(), None))
        .collect();

    let library = Library::built_in();
    let assessments = masses
        .iter()
        .map(|mass| {
            let mut design = design.clone();
            design.charge.aim = ChargeAim::Mass { mass: *mass };
            let start = Instant::now();
            black_box(assess(black_box(&design), &library));
            millis(start)
        })
        .collect();

    report("frame with a new charge", frames);
    report("frame without a change", still);
    report("assessment alone", assessments);
}

/// From two fifths of the design's charge up to twice it.
fn charges(design: &Design) -> Vec<Mass> {
    let ChargeAim::Mass { mass } = design.charge.aim else {
        panic!("the first ready design is charged by mass")
    };
    (0..FRAMES)
        .map(|i| {
            let share = 0.4 + 1.6 * i as f64 / FRAMES as f64;
            Mass::from_si(share * mass.si()).expect("a mass in range")
        })
        .collect()
}

/// Milliseconds of one frame: the edit, the assessment, the panels, the triangles.
fn frame(ctx: &Context, app: &mut App, events: Vec<Event>, mass: Option<Mass>) -> f64 {
    let input = RawInput {
        screen_rect: Some(Rect::from_min_size(pos2(0.0, 0.0), vec2(SIZE[0], SIZE[1]))),
        events,
        ..Default::default()
    };
    let start = Instant::now();
    if let Some(mass) = mass {
        app.order(Command::Apply(Change::SetCharge(mass)));
    }
    let output = ctx.run_ui(input, |ui: &mut Ui| app.frame_ui(ui));
    black_box(ctx.tessellate(output.shapes, output.pixels_per_point));
    millis(start)
}

fn millis(start: Instant) -> f64 {
    1e3 * start.elapsed().as_secs_f64()
}

fn report(what: &str, mut milliseconds: Vec<f64>) {
    let count = milliseconds.len();
    if count == 1 {
        println!("{what}: {:.2} ms", milliseconds[0]);
        return;
    }
    let mean = milliseconds.iter().sum::<f64>() / count as f64;
    milliseconds.sort_by(f64::total_cmp);
    println!(
        "{what}: mean {mean:.2} ms, median {:.2} ms, 19 of 20 within {:.2} ms",
        milliseconds[count / 2],
        milliseconds[count * 19 / 20]
    );
}
