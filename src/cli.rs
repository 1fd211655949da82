//! The headless commands: each a pure function to text, then one write.

use std::io::{self, Write as _};
use std::path::{Path, PathBuf};
use std::process::ExitCode;
use std::sync::Arc;

use clap::{Parser, Subcommand};

use crate::assess::{Library, Verdict, assess};
use crate::design::Design;
use crate::fluid::{Fluid, FluidError, UnknownFluid};
use crate::picture::{of_design, svg};
use crate::section::NoSection;
use crate::sheet::{Head, render};
use crate::store::{self, Shelf, StoreError};
use crate::units::{ParseError, Quantity, QuantityError, Temperature, Units, parse_si, unit_named};
use crate::words;

mod csv;
mod lists;
mod states;
mod walls;

use csv::one_line;

/// Fluid, charge and envelope of sealed two-phase devices.
#[derive(Debug, Parser)]
#[command(name = "chargewright", version, args_conflicts_with_subcommands = true)]
pub struct Arguments {
    /// Design to open in the window.
    pub design: Option<PathBuf>,
    #[command(subcommand)]
    pub command: Option<Headless>,
}

#[derive(Debug, Subcommand)]
pub enum Headless {
    /// Print the charge sheet of a design.
    Sheet {
        design: PathBuf,
        /// Write to this file instead.
        #[arg(long, value_name = "FILE")]
        out: Option<PathBuf>,
    },
    /// List what was found in a design, worst first; exit 0 fit, 1 not fit.
    Check { design: PathBuf },
    /// Draw a design in section, to scale, as SVG.
    Section {
        design: PathBuf,
        /// Temperature that the liquid is drawn at, the hottest without it; kelvin without
        /// a unit.
        #[arg(long, value_name = "T", allow_hyphen_values = true)]
        at: Option<String>,
        /// Write to this file instead.
        #[arg(long, value_name = "FILE")]
        out: Option<PathBuf>,
    },
    /// What every wall of a design bears, inside and outside, as CSV.
    Walls {
        design: PathBuf,
        /// Temperatures, comma-separated; kelvin without a unit. Coldest, bench and hottest
        /// without it.
        #[arg(long, value_name = "T1,T2,…", allow_hyphen_values = true)]
        at: Option<String>,
    },
    /// Saturation states as CSV.
    Saturation {
        /// Id, CAS number or refrigerant number.
        fluid: String,
        /// Temperatures, comma-separated; kelvin without a unit.
        #[arg(long, value_name = "T1,T2,…", allow_hyphen_values = true)]
        at: String,
    },
    /// States of a sealed mean density as CSV.
    Isochore {
        /// Id, CAS number or refrigerant number.
        fluid: String,
        /// Mean density; kg/m³ without a unit.
        #[arg(long, value_name = "D", allow_hyphen_values = true)]
        density: String,
        /// Temperatures, comma-separated; kelvin without a unit.
        #[arg(long, value_name = "T1,T2,…", allow_hyphen_values = true)]
        at: String,
    },
    /// List the fluids.
    Fluids,
    /// List the wall materials, with their strengths at room temperature as supplied.
    Materials {
        /// With those beside this design.
        #[arg(long, value_name = "FILE")]
        of: Option<PathBuf>,
    },
}

/// Why a command did nothing.
#[derive(Debug, thiserror::Error)]
pub enum CliError {
    #[error(transparent)]
    Store(#[from] StoreError),
    #[error(transparent)]
    UnknownFluid(#[from] UnknownFluid),
    #[error("{unknown}; {notices}")]
    UnknownBesideRefused {
        unknown: UnknownFluid,
        /// The fluid files that may hold it.
        notices: String,
    },
    #[error(transparent)]
    Fluid(#[from] FluidError),
    #[error("--{option} {text}: {cause}")]
    Number {
        option: &'static str,
        text: String,
        cause: ParseError,
    },
    #[error("--{option} {text}: {cause}")]
    Quantity {
        option: &'static str,
        text: String,
        cause: QuantityError,
    },
    #[error("--{option} {text}: the decimal mark is a point here, and one value is asked for")]
    Comma { option: &'static str, text: String },
    #[error("the chamber has no section: {0}")]
    NoSection(#[from] NoSection),
    #[error("the output cannot be written: {0}")]
    Output(io::Error),
}

/// What a command printed and how it ends.
#[derive(Debug, PartialEq, Eq)]
pub struct Outcome {
    pub text: String,
    pub code: u8,
    /// What is said beside the output: the user's own files that were not read.
    pub notices: Vec<String>,
}

/// The arguments, or how the program ends without them: help and version are
/// answers, anything else is refused in one line.
///
/// # Errors
/// The exit code; the text has been printed.
pub fn arguments() -> Result<Arguments, ExitCode> {
    Arguments::try_parse().map_err(|error| {
        if !error.use_stderr() {
            let _ = error.print();
            return ExitCode::SUCCESS;
        }
        let text = error.render().to_string();
        let reason = text.split("\n\n").next().unwrap_or(&text);
        let reason = one_line(reason.trim_start_matches("error: "));
        eprintln!("chargewright: {reason}; --help lists the commands");
        ExitCode::from(2)
    })
}

/// Runs a headless command: exit 0 or 1 with output, or 2 with one line on stderr.
pub fn run(command: &Headless) -> ExitCode {
    let settings = store::settings_folder();
    let outcome = answer(command, settings.as_deref()).and_then(|outcome| {
        for notice in &outcome.notices {
            say(notice);
        }
        print(&outcome.text).map(|()| outcome.code)
    });
    match outcome {
        Ok(code) => ExitCode::from(code),
        Err(error) => {
            say(&error.to_string());
            ExitCode::from(2)
        }
    }
}

/// A command's answer; writes a file only for `--out`. `settings` is the program's
/// own folder, which may hold the user's own fluids and materials.
///
/// # Errors
/// [`CliError`] where input is unreadable or out of range; nothing was printed then.
pub fn answer(command: &Headless, settings: Option<&Path>) -> Result<Outcome, CliError> {
    match command {
        Headless::Sheet { design, out } => {
            let (design_read, shelf) = store::open(design, settings)?;
            let text = sheet(design, &design_read, &shelf.library, out.as_deref())?;
            Ok(outcome(text, shelf.notices_for(&design_read)))
        }
        Headless::Check { design } => {
            let (design, shelf) = store::open(design, settings)?;
            let (text, code) = check(&design, &shelf.library);
            Ok(Outcome {
                code,
                ..outcome(text, shelf.notices_for(&design))
            })
        }
        Headless::Section { design, at, out } => {
            let (design_read, shelf) = store::open(design, settings)?;
            let at = at.as_ref().map(|text| quantity("at", text, "K"));
            let at = at.transpose()?;
            let text = section(&design_read, &shelf.library, at)?;
            let text = written(text, out.as_deref(), design)?;
            Ok(outcome(text, shelf.notices_for(&design_read)))
        }
        Headless::Walls { design, at } => {
            let (design, shelf) = store::open(design, settings)?;
            let conditions = &design.conditions;
            let at = match at {
                Some(text) => temperatures(text)?,
                None => vec![conditions.coldest, conditions.bench, conditions.hottest],
            };
            let assessment = assess(&design, &shelf.library);
            let text = walls::table(&design, &assessment, &at);
            Ok(outcome(text, shelf.notices_for(&design)))
        }
        Headless::Saturation { fluid, at } => {
            let shelf = store::shelf(None, settings);
            let text = states::saturation(&*find(&shelf, fluid)?, at)?;
            Ok(outcome(text, shelf.notices_of(store::Kind::FLUID)))
        }
        Headless::Isochore { fluid, density, at } => {
            let shelf = store::shelf(None, settings);
            let text = states::isochore(&*find(&shelf, fluid)?, density, at)?;
            Ok(outcome(text, shelf.notices_of(store::Kind::FLUID)))
        }
        Headless::Fluids => {
            let shelf = store::shelf(None, settings);
            let text = lists::fluids(&shelf.library.fluids);
            Ok(outcome(text, shelf.notices_of(store::Kind::FLUID)))
        }
        Headless::Materials { of: None } => {
            let shelf = store::shelf(None, settings);
            let text = lists::materials(&shelf.library.materials);
            Ok(outcome(text, shelf.notices_of(store::Kind::MATERIAL)))
        }
        Headless::Materials { of: Some(design) } => {
            let (design, shelf) = store::open(design, settings)?;
            let text = lists::materials(&shelf.library.materials);
            Ok(outcome(text, shelf.notices_for(&design)))
        }
    }
}

fn outcome(text: String, notices: Vec<String>) -> Outcome {
    Outcome {
        text,
        code: 0,
        notices,
    }
}

/// A fluid by any of its names; one that is unknown may be in a file that was refused.
fn find(shelf: &Shelf, name: &str) -> Result<Arc<Fluid>, CliError> {
    let found = shelf.library.fluids.find(name);
    let notices = || shelf.notices_of(store::Kind::FLUID).join("; ");
    found.map_err(|unknown| match notices() {
        none if none.is_empty() => CliError::UnknownFluid(unknown),
        notices => CliError::UnknownBesideRefused { unknown, notices },
    })
}

/// The sheet of a design of built-in fluids, as [`sheet_with`].
pub fn sheet_text(design: &Design, file_name: Option<String>) -> String {
    sheet_with(design, &Library::built_in(), file_name)
}

/// The sheet of a design file, in the metric system: a file's sheet has the same
/// bytes on every bench.
pub fn sheet_with(design: &Design, library: &Library, file_name: Option<String>) -> String {
    let assessment = assess(design, library);
    let head = Head {
        file_name,
        fingerprint: store::fingerprint(design),
    };
    render(design, &assessment, &Units::default(), &head)
}

/// The text to print: none where it went into a file.
fn sheet(
    path: &Path,
    design: &Design,
    library: &Library,
    out: Option<&Path>,
) -> Result<String, CliError> {
    let name = path
        .file_name()
        .map(|name| name.to_string_lossy().into_owned());
    written(sheet_with(design, library, name), out, path)
}

/// The text to print: none where it went into a file.
fn written(text: String, out: Option<&Path>, design: &Path) -> Result<String, CliError> {
    match out {
        Some(out) => {
            store::write_beside(out, &text, Some(design))?;
            Ok(String::new())
        }
        None => Ok(text),
    }
}

/// The section as SVG, in the metric system.
fn section(
    design: &Design,
    library: &Library,
    at: Option<Temperature>,
) -> Result<String, CliError> {
    let assessment = assess(design, library);
    let at = at.unwrap_or(design.conditions.hottest);
    let picture = of_design(design, &assessment, at, 0.0, &Units::default())?;
    Ok(svg(&picture))
}

/// One line a finding, and the exit code.
fn check(design: &Design, library: &Library) -> (String, u8) {
    let assessment = assess(design, library);
    let units = Units::default();
    let mut text = String::new();
    for finding in &assessment.findings {
        let said = words::finding(finding, Some(&design.chamber), &units);
        let advice = said
            .try_this
            .map_or_else(String::new, |text| format!(" {text}"));
        let severity = words::severity(finding.severity);
        let line = format!("{severity}: {}: {}{advice}", said.title, said.detail);
        text.push_str(&one_line(&line));
        text.push('\n');
    }
    (text, u8::from(assessment.verdict == Verdict::NotFit))
}

/// Every temperature of a list, or the first that is wrong.
fn temperatures(list: &str) -> Result<Vec<Temperature>, CliError> {
    list.split(',')
        .map(|text| quantity("at", text, "K"))
        .collect()
}

fn quantity<Q: Quantity>(option: &'static str, text: &str, default: &str) -> Result<Q, CliError> {
    if text.contains(',') {
        return Err(CliError::Comma {
            option,
            text: text.to_owned(),
        });
    }
    let si = parse_si(text, Q::KIND, unit_named(Q::KIND, default)).map_err(|cause| {
        CliError::Number {
            option,
            text: text.to_owned(),
            cause,
        }
    })?;
    Q::from_si(si).map_err(|cause| CliError::Quantity {
        option,
        text: text.to_owned(),
        cause,
    })
}

/// One line on stderr.
fn say(text: &str) {
    eprintln!("chargewright: {}", one_line(text));
}

/// One write; a reader that has gone away is no error.
fn print(text: &str) -> Result<(), CliError> {
    let mut out = io::stdout().lock();
    match out.write_all(text.as_bytes()).and_then(|()| out.flush()) {
        Err(error) if error.kind() != io::ErrorKind::BrokenPipe => Err(CliError::Output(error)),
        _ => Ok(()),
    }
}
