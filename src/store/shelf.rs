//! The fluids that a design may name: the built-in ones, the user's own beside the design,
//! and those in the user's own folder.

use std::path::{Path, PathBuf};

use super::{Kind, ParseError, StoreError, files_in, load_with, read_text};
use crate::assess::Library;
use crate::design::Design;
use crate::fluid::{Catalog, read_own};
use crate::text::TextError;

/// What a fluid file beside a design is called.
const BESIDE: &str = ".fluid.ron";
/// Folder of the user's own fluids in the program's own folder.
const FOLDER: &str = "fluids";

/// What a design is read and assessed against, and the fluid files that were refused.
#[derive(Debug)]
pub struct Shelf {
    pub library: Library,
    pub refused: Vec<StoreError>,
}

impl Shelf {
    /// One sentence for each fluid file that was refused.
    pub fn notices(&self) -> Vec<String> {
        let sentence = |error| format!("fluid file not read: {error}");
        self.refused.iter().map(sentence).collect()
    }
}

/// The shelf of a design's file, or of none; `settings` is the program's own folder,
/// where `fluids/*.ron` is looked at. A file beside the design goes before one of the
/// same text there.
pub fn shelf(design: Option<&Path>, settings: Option<&Path>) -> Shelf {
    let beside = design.map(|path| ron_files(folder_of(path), BESIDE));
    let own = settings.map(|folder| ron_files(&folder.join(FOLDER), ".ron"));
    let mut fluids = Catalog::built_in();
    let mut refused = Vec::new();
    let mut texts = Vec::new();
    for path in beside.into_iter().chain(own).flatten() {
        match read_text(&path, Kind::FLUID) {
            // A copy of one that is on the shelf.
            Ok(text) if texts.contains(&text) => {}
            Ok(text) => {
                if let Err(error) = put(&mut fluids, &text, &path) {
                    refused.push(StoreError::Parse {
                        path,
                        error: ParseError::At(error),
                    });
                }
                texts.push(text);
            }
            Err(error) => refused.push(error),
        }
    }
    Shelf {
        library: Library::with_fluids(fluids),
        refused,
    }
}

/// Reads a design file with its shelf.
///
/// # Errors
/// [`StoreError`]; where the design's fluid is unknown and a fluid file was refused, that
/// file's sentence is part of it.
pub fn open(path: &Path, settings: Option<&Path>) -> Result<(Design, Shelf), StoreError> {
    let shelf = shelf(Some(path), settings);
    match load_with(path, &shelf.library.fluids) {
        Ok(design) => Ok((design, shelf)),
        Err(
            error @ StoreError::Parse {
                error: ParseError::UnknownFluid(_),
                ..
            },
        ) if !shelf.refused.is_empty() => Err(StoreError::FluidRefused {
            design: Box::new(error),
            notices: shelf.notices().join("; "),
        }),
        Err(error) => Err(error),
    }
}

/// Takes a fluid's file that stands beside one design along to another's folder, so that
/// the design opens alike there. A fluid of the user's own folder needs no copy.
///
/// # Errors
/// [`StoreError::OtherFluid`] where a file of that name with another text stands there;
/// nothing is written then.
pub fn carry_fluid(file: &str, from: &Path, to: &Path) -> Result<(), StoreError> {
    let source = folder_of(from).join(file);
    let target = folder_of(to).join(file);
    let Ok(text) = read_text(&source, Kind::FLUID) else {
        return Ok(());
    };
    match read_text(&target, Kind::FLUID) {
        Ok(there) if there == text => Ok(()),
        Err(StoreError::Missing { .. }) => super::write_text(&target, &text),
        _ => Err(StoreError::OtherFluid { path: target }),
    }
}

fn put(fluids: &mut Catalog, text: &str, path: &Path) -> Result<(), TextError> {
    let fluid = read_own(text, &name_of(path))?;
    fluids
        .add(fluid)
        .map_err(|taken| TextError::about(text, &taken.field, taken.to_string()))
}

fn ron_files(folder: &Path, end: &str) -> Vec<PathBuf> {
    let mut paths = files_in(folder);
    // What an editor hides beside a file is not a file of its own.
    paths.retain(|path| name_of(path).ends_with(end) && !name_of(path).starts_with('.'));
    paths
}

fn name_of(path: &Path) -> String {
    let name = path.file_name().unwrap_or_default();
    name.to_string_lossy().into_owned()
}

fn folder_of(path: &Path) -> &Path {
    match path.parent() {
        Some(folder) if !folder.as_os_str().is_empty() => folder,
        _ => Path::new("."),
    }
}
