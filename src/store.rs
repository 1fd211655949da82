//! Designs, settings and drafts on disk: the only user of the file system.

use std::fs::{self, File};
use std::io::{self, Read, Write};
use std::path::{Path, PathBuf};
use std::sync::atomic::{AtomicU32, Ordering};

use serde::{Deserialize, Serialize};

use crate::design::Design;

/// Version of the design file's format.
pub const FORMAT: u32 = 1;
/// A design is a few kilobytes; anything far larger is a mistake.
const LARGEST_BYTES: u64 = 4 << 20;

include!(concat!(env!("OUT_DIR"), "/preset_files.rs"));

/// Why a file was not read or written. Each sentence names the file.
#[derive(Debug, thiserror::Error)]
pub enum StoreError {
    #[error("{} does not exist", path.display())]
    Missing { path: PathBuf },
    #[error("{} is a folder, not a design file", path.display())]
    Folder { path: PathBuf },
    #[error("{} is neither a file nor a folder that can be read here", path.display())]
    NotAFile { path: PathBuf },
    #[error("{} is the design itself: name another file", path.display())]
    OverDesign { path: PathBuf },
    #[error("{} is {mebibytes} MiB: a design file is at most 4 MiB", path.display())]
    TooLarge { path: PathBuf, mebibytes: u64 },
    #[error("{} is not text", path.display())]
    NotText { path: PathBuf },
    #[error("{} cannot be read: {cause}", path.display())]
    Read { path: PathBuf, cause: io::Error },
    #[error("{} cannot be written: {cause}; nothing was changed", path.display())]
    Write { path: PathBuf, cause: io::Error },
    #[error("{}, {error}", path.display())]
    Parse { path: PathBuf, error: ParseError },
}

/// What is wrong in a design's text, and where.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum ParseError {
    #[error("line {line}, column {column}: {}{what}", .field.as_ref().map(|field| format!("{field}: ")).unwrap_or_default())]
    At {
        line: usize,
        column: usize,
        field: Option<String>,
        what: String,
    },
    #[error("format {found} is newer than this program reads, {FORMAT}: use a newer version")]
    NewerFormat { found: u32 },
    #[error("format {found} never was: the first is 1")]
    NoSuchFormat { found: u32 },
}

/// A design with its format version, as it stands in a file.
#[derive(Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
struct DesignFile {
    format: u32,
    design: Design,
}

/// Only the version: read first, so that a newer file is refused by its version.
#[derive(Deserialize)]
struct FormatOnly {
    format: u32,
}

/// A design's text: the same bytes for the same design.
pub fn to_text(design: &Design) -> String {
    let config = ron::ser::PrettyConfig::new()
        .indentor("  ")
        .new_line("\n")
        .struct_names(false);
    let file = DesignFile {
        format: FORMAT,
        design: design.clone(),
    };
    let mut text = ron::ser::to_string_pretty(&file, config).expect("a design is plain data");
    text.push('\n');
    text
}

/// Reads a design's text.
///
/// # Errors
/// [`ParseError`] names line, column, field, value and limit.
pub fn from_text(text: &str) -> Result<Design, ParseError> {
    match ron::from_str::<FormatOnly>(text) {
        Ok(FormatOnly { format }) if format > FORMAT => {
            return Err(ParseError::NewerFormat { found: format });
        }
        Ok(FormatOnly { format: 0 }) => return Err(ParseError::NoSuchFormat { found: 0 }),
        _ => {}
    }
    let mut deserializer =
        ron::Deserializer::from_str(text).map_err(|error| at(text, &error, None))?;
    let file: DesignFile =
        serde_path_to_error::deserialize(&mut deserializer).map_err(|error| {
            let field = error.path().to_string();
            let field = (field != "." && !field.is_empty()).then_some(field);
            at(text, &deserializer.span_error(error.into_inner()), field)
        })?;
    deserializer
        .end()
        .map_err(|error| at(text, &deserializer.span_error(error), None))?;
    Ok(file.design)
}

fn at(text: &str, error: &ron::error::SpannedError, field: Option<String>) -> ParseError {
    // An error within a value is found where the value starts.
    let position = error.span.start;
    let what = match &error.code {
        ron::Error::IntegerOutOfBounds => {
            let found = value_at(text, position.line, position.col);
            format!("{found} is not a whole number from 0 to {}", u32::MAX)
        }
        code @ (ron::Error::ExpectedFloat
        | ron::Error::ExpectedInteger
        | ron::Error::ExpectedBoolean
        | ron::Error::ExpectedString) => {
            format!(
                "{code}, not {}",
                value_at(text, position.line, position.col)
            )
        }
        code => code.to_string(),
    };
    ParseError::At {
        line: position.line,
        column: position.col,
        field,
        what,
    }
}

/// The value that stands at a line and column, as it is written there.
fn value_at(text: &str, line: usize, column: usize) -> String {
    const LONGEST: usize = 40;
    let line = text.lines().nth(line.saturating_sub(1)).unwrap_or_default();
    let ends = |c: char| matches!(c, ',' | ':' | '(' | ')' | '[' | ']') || c.is_whitespace();
    let at = line
        .char_indices()
        .nth(column.saturating_sub(1))
        .map_or(line.len(), |(at, _)| at);
    let start = line[..at]
        .char_indices()
        .rev()
        .take_while(|(_, c)| !ends(*c))
        .last()
        .map_or(at, |(start, _)| start);
    line[start..]
        .trim_start()
        .chars()
        .take_while(|c| !ends(*c))
        .take(LONGEST)
        .collect()
}

/// Fingerprint of a design's content: FNV-1a, 64 bits, of its text. It tells
/// versions of a sheet apart; it is no protection against forgery.
pub fn fingerprint(design: &Design) -> String {
    let hash = to_text(design)
        .bytes()
        .fold(0xcbf2_9ce4_8422_2325_u64, |hash, byte| {
            (hash ^ u64::from(byte)).wrapping_mul(0x0100_0000_01b3)
        });
    format!(
        "{:04x}-{:04x}-{:04x}-{:04x}",
        hash >> 48,
        hash >> 32 & 0xffff,
        hash >> 16 & 0xffff,
        hash & 0xffff
    )
}

/// Reads a design file.
///
/// # Errors
/// [`StoreError`] says what is wrong with it.
pub fn load(path: &Path) -> Result<Design, StoreError> {
    let text = read_text(path)?;
    from_text(&text).map_err(|error| StoreError::Parse {
        path: path.to_owned(),
        error,
    })
}

fn read_text(path: &Path) -> Result<String, StoreError> {
    let named = || path.to_owned();
    let failed = |cause: io::Error| match cause.kind() {
        io::ErrorKind::NotFound => StoreError::Missing { path: named() },
        io::ErrorKind::IsADirectory => StoreError::Folder { path: named() },
        _ => StoreError::Read {
            path: named(),
            cause,
        },
    };
    let metadata = fs::metadata(path).map_err(failed)?;
    if metadata.is_dir() {
        return Err(StoreError::Folder { path: named() });
    }
    if !metadata.is_file() {
        // A pipe would keep us waiting, a device would never end.
        return Err(StoreError::NotAFile { path: named() });
    }
    let too_large = |bytes: u64| StoreError::TooLarge {
        path: named(),
        // Rounded up: just above the limit it does not read as allowed.
        mebibytes: bytes.div_ceil(1 << 20),
    };
    if metadata.len() > LARGEST_BYTES {
        return Err(too_large(metadata.len()));
    }
    let mut bytes = Vec::new();
    // A file that grows has no length to trust: read one byte more than allowed.
    let file = File::open(path).map_err(failed)?;
    file.take(LARGEST_BYTES + 1)
        .read_to_end(&mut bytes)
        .map_err(failed)?;
    if bytes.len() as u64 > LARGEST_BYTES {
        return Err(too_large(bytes.len() as u64));
    }
    String::from_utf8(bytes).map_err(|_| StoreError::NotText { path: named() })
}

/// Writes a design file.
///
/// # Errors
/// [`StoreError::Write`]; the file that was there is still whole.
pub fn save(path: &Path, design: &Design) -> Result<(), StoreError> {
    write_text(path, &to_text(design))
}

/// Writes a text that must not take the place of the design it was made from, links
/// followed.
///
/// # Errors
/// [`StoreError::OverDesign`], or as [`write_text`].
pub fn write_beside(path: &Path, text: &str, design: Option<&Path>) -> Result<(), StoreError> {
    let real = |path: &Path| fs::canonicalize(path).ok();
    if let (Some(target), Some(design)) = (real(path), design.and_then(real))
        && target == design
    {
        return Err(StoreError::OverDesign {
            path: path.to_owned(),
        });
    }
    write_text(path, text)
}

/// Writes a text file at once or not at all: a temporary file in the same folder is
/// written, flushed to disk and renamed over the target, and the folder is flushed.
/// A link is followed; the mode bits of the file that was there are kept.
///
/// # Errors
/// [`StoreError::Write`]; the file that was there is still whole.
pub fn write_text(path: &Path, text: &str) -> Result<(), StoreError> {
    let failed = |cause: io::Error| StoreError::Write {
        path: path.to_owned(),
        cause,
    };
    if path.is_dir() {
        return Err(StoreError::Folder {
            path: path.to_owned(),
        });
    }
    // A link to a file that is not there yet has no canonical path: its own target is used.
    let target =
        fs::canonicalize(path).or_else(|_| fs::read_link(path).map(|link| beside(path, link)));
    let target = target.unwrap_or_else(|_| path.to_owned());
    let folder = match target.parent() {
        Some(folder) if !folder.as_os_str().is_empty() => folder.to_owned(),
        _ => PathBuf::from("."),
    };
    let name = target
        .file_name()
        .map(|name| name.to_string_lossy().into_owned())
        .unwrap_or_default();
    // Two that write at once, threads or processes, each have a name of their own.
    static COUNT: AtomicU32 = AtomicU32::new(0);
    let count = COUNT.fetch_add(1, Ordering::Relaxed);
    let temporary = folder.join(format!(".{name}.{}-{count}.part", std::process::id()));
    let written = write_and_rename(&temporary, &target, text);
    if written.is_err() {
        // Nothing half-written stays behind; that it may not exist is no second error.
        let _ = fs::remove_file(&temporary);
    }
    written.map_err(failed)?;
    flush_folder(&folder);
    Ok(())
}

fn write_and_rename(temporary: &Path, target: &Path, text: &str) -> io::Result<()> {
    let mut file = File::create(temporary)?;
    if let Ok(metadata) = fs::metadata(target) {
        if metadata.permissions().readonly() {
            return Err(io::Error::new(
                io::ErrorKind::PermissionDenied,
                "it is read-only",
            ));
        }
        file.set_permissions(metadata.permissions())?;
    }
    file.write_all(text.as_bytes())?;
    file.sync_all()?;
    drop(file);
    fs::rename(temporary, target)
}

fn beside(link: &Path, target: PathBuf) -> PathBuf {
    match link.parent() {
        Some(folder) if target.is_relative() => folder.join(target),
        _ => target,
    }
}

/// The rename itself must reach the disk. Where folders cannot be opened (Windows),
/// the system does it.
fn flush_folder(folder: &Path) {
    if let Ok(folder) = File::open(folder) {
        let _ = folder.sync_all();
    }
}

/// The ready designs with their names, in order of their file names.
pub fn presets() -> impl Iterator<Item = (&'static str, Design)> {
    PRESET_FILES
        .iter()
        .map(|(name, text)| (*name, ready(name, text)))
}

/// Names of the ready designs; parses nothing.
pub fn preset_names() -> impl Iterator<Item = &'static str> {
    PRESET_FILES.iter().map(|(name, _)| *name)
}

/// One ready design by its file name.
pub fn preset(name: &str) -> Option<Design> {
    let (name, text) = PRESET_FILES.iter().find(|(known, _)| *known == name)?;
    Some(ready(name, text))
}

fn ready(name: &str, text: &str) -> Design {
    from_text(text).unwrap_or_else(|error| panic!("the ready design {name}: {error}"))
}

/// Modification time and length: whether a file changed on disk.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Stamp {
    modified: Option<std::time::SystemTime>,
    bytes: u64,
}

/// The stamp of a file, if it is there.
pub fn stamp(path: &Path) -> Option<Stamp> {
    let metadata = fs::metadata(path).ok()?;
    Some(Stamp {
        modified: metadata.modified().ok(),
        bytes: metadata.len(),
    })
}

/// The program's own folder for settings and the unsaved draft.
pub fn settings_folder() -> Option<PathBuf> {
    let from = |variable: &str| {
        std::env::var_os(variable)
            .map(PathBuf::from)
            .filter(|path| path.is_absolute())
    };
    let base = if cfg!(windows) {
        from("APPDATA")
    } else if cfg!(target_os = "macos") {
        from("HOME").map(|home| home.join("Library/Application Support"))
    } else {
        from("XDG_CONFIG_HOME").or_else(|| from("HOME").map(|home| home.join(".config")))
    };
    base.map(|base| base.join("chargewright"))
}

/// Reads a small RON file of the program's own; `None` where it is missing or damaged.
pub fn read_own<T: for<'de> Deserialize<'de>>(path: &Path) -> Option<T> {
    ron::from_str(&read_text(path).ok()?).ok()
}

/// Writes a small RON file of the program's own, with its folder.
///
/// # Errors
/// [`StoreError::Write`].
pub fn write_own<T: Serialize>(path: &Path, value: &T) -> Result<(), StoreError> {
    if let Some(folder) = path.parent() {
        fs::create_dir_all(folder).map_err(|cause| StoreError::Write {
            path: folder.to_owned(),
            cause,
        })?;
    }
    let text =
        ron::ser::to_string_pretty(value, ron::ser::PrettyConfig::default()).map_err(|error| {
            StoreError::Write {
                path: path.to_owned(),
                cause: io::Error::other(error),
            }
        })?;
    write_text(path, &text)
}

/// Removes a file of the program's own; that it is not there is fine.
pub fn remove_own(path: &Path) {
    let _ = fs::remove_file(path);
}

/// Files of a folder of the program's own, by name.
pub fn files_in(folder: &Path) -> Vec<PathBuf> {
    let mut paths: Vec<_> = fs::read_dir(folder)
        .map(|entries| {
            entries
                .filter_map(Result::ok)
                .map(|entry| entry.path())
                .collect()
        })
        .unwrap_or_default();
    paths.sort();
    paths
}
