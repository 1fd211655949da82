//! Designs, the user's own fluids and materials, settings and drafts on disk: the only
//! user of the file system.

use std::fs::{self, File};
use std::io::{self, Read, Write};
use std::path::{Path, PathBuf};
use std::sync::atomic::{AtomicU32, Ordering};

use serde::{Deserialize, Serialize};

use crate::design::{Design, FluidId};
use crate::fluid::Catalog;
use crate::text::{self, TextError};

mod shelf;

pub use shelf::{Refused, Shelf, carry_own, open, shelf};

/// Version of the design file's format.
pub const FORMAT: u32 = 1;

include!(concat!(env!("OUT_DIR"), "/preset_files.rs"));

/// Why a file was not read or written. Each sentence names the file.
#[derive(Debug, thiserror::Error)]
pub enum StoreError {
    #[error("{} does not exist", path.display())]
    Missing { path: PathBuf },
    #[error("{} is a folder, not a {kind} file", path.display())]
    Folder { path: PathBuf, kind: Kind },
    #[error("{} is neither a file nor a folder that can be read here", path.display())]
    NotAFile { path: PathBuf },
    #[error("{} is the design itself: name another file", path.display())]
    OverDesign { path: PathBuf },
    #[error("{} is {mebibytes} MiB: a {kind} file is at most {} MiB", path.display(), kind.largest_mebibytes)]
    TooLarge {
        path: PathBuf,
        mebibytes: u64,
        kind: Kind,
    },
    #[error("{} is not text", path.display())]
    NotText { path: PathBuf },
    #[error("{} cannot be read: {cause}", path.display())]
    Read { path: PathBuf, cause: io::Error },
    #[error("{} cannot be written: {cause}; nothing was changed", path.display())]
    Write { path: PathBuf, cause: io::Error },
    #[error("{}, {error}", path.display())]
    Parse { path: PathBuf, error: ParseError },
    #[error("{design}; {notices}")]
    FluidRefused {
        design: Box<StoreError>,
        /// The fluid files that may hold the design's fluid.
        notices: String,
    },
    #[error("{} is another file than the {kind} in use: choose another folder, or rename one of them", path.display())]
    OtherFile { path: PathBuf, kind: Kind },
}

/// A kind of file that a user may write; anything far larger than one is a mistake.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Kind {
    name: &'static str,
    largest_mebibytes: u64,
}

impl Kind {
    /// A design is a few kilobytes.
    const DESIGN: Self = Self {
        name: "design",
        largest_mebibytes: 4,
    };
    /// The longest equation takes some thirty kilobytes.
    pub const FLUID: Self = Self {
        name: "fluid",
        largest_mebibytes: 1,
    };
    /// A few kilobytes.
    pub const MATERIAL: Self = Self {
        name: "material",
        largest_mebibytes: 1,
    };

    const fn largest_bytes(self) -> u64 {
        self.largest_mebibytes << 20
    }
}

impl std::fmt::Display for Kind {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        f.write_str(self.name)
    }
}

/// What is wrong in a file's text, and where.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum ParseError {
    #[error(transparent)]
    At(#[from] TextError),
    /// A design names a fluid that is not in the catalogue.
    #[error(transparent)]
    UnknownFluid(TextError),
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

/// Reads a design's text; its fluid is one that comes with the program.
///
/// # Errors
/// As [`from_text_with`].
pub fn from_text(text: &str) -> Result<Design, ParseError> {
    from_text_with(text, &Catalog::built_in())
}

/// Reads a design's text against a catalogue: its fluid gets the catalogue's id,
/// whichever of its names stands there.
///
/// # Errors
/// [`ParseError`] names line, column, field, value and limit.
pub fn from_text_with(text: &str, fluids: &Catalog) -> Result<Design, ParseError> {
    match ron::from_str::<FormatOnly>(text) {
        Ok(FormatOnly { format }) if format > FORMAT => {
            return Err(ParseError::NewerFormat { found: format });
        }
        Ok(FormatOnly { format: 0 }) => return Err(ParseError::NoSuchFormat { found: 0 }),
        _ => {}
    }
    let DesignFile { mut design, .. } = text::read(text)?;
    match fluids.find(design.fluid.as_str()) {
        Ok(fluid) => design.fluid = FluidId::from(&*fluid),
        Err(unknown) => {
            let error = TextError::about(text, "design.fluid", unknown.to_string());
            return Err(ParseError::UnknownFluid(error));
        }
    }
    Ok(design)
}

/// Fingerprint of a design's content: it tells versions of a sheet apart.
pub fn fingerprint(design: &Design) -> String {
    text::fingerprint(&to_text(design))
}

/// Reads a design file; its fluid is one that comes with the program.
///
/// # Errors
/// [`StoreError`] says what is wrong with it.
pub fn load(path: &Path) -> Result<Design, StoreError> {
    load_with(path, &Catalog::built_in())
}

/// Reads a design file against a catalogue.
///
/// # Errors
/// [`StoreError`] says what is wrong with it.
pub fn load_with(path: &Path, fluids: &Catalog) -> Result<Design, StoreError> {
    let text = read_text(path, Kind::DESIGN)?;
    from_text_with(&text, fluids).map_err(|error| StoreError::Parse {
        path: path.to_owned(),
        error,
    })
}

fn read_text(path: &Path, kind: Kind) -> Result<String, StoreError> {
    let named = || path.to_owned();
    let failed = |cause: io::Error| match cause.kind() {
        io::ErrorKind::NotFound => StoreError::Missing { path: named() },
        io::ErrorKind::IsADirectory => StoreError::Folder {
            path: named(),
            kind,
        },
        _ => StoreError::Read {
            path: named(),
            cause,
        },
    };
    let metadata = fs::metadata(path).map_err(failed)?;
    if metadata.is_dir() {
        return Err(StoreError::Folder {
            path: named(),
            kind,
        });
    }
    if !metadata.is_file() {
        // A pipe would keep us waiting, a device would never end.
        return Err(StoreError::NotAFile { path: named() });
    }
    let too_large = |bytes: u64| StoreError::TooLarge {
        path: named(),
        // Rounded up: just above the limit it does not read as allowed.
        mebibytes: bytes.div_ceil(1 << 20),
        kind,
    };
    if metadata.len() > kind.largest_bytes() {
        return Err(too_large(metadata.len()));
    }
    let mut bytes = Vec::new();
    // A file that grows has no length to trust: read one byte more than allowed.
    let file = File::open(path).map_err(failed)?;
    file.take(kind.largest_bytes() + 1)
        .read_to_end(&mut bytes)
        .map_err(failed)?;
    if bytes.len() as u64 > kind.largest_bytes() {
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
            kind: Kind::DESIGN,
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
    ron::from_str(&read_text(path, Kind::DESIGN).ok()?).ok()
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
