//! The fluids and materials that a design may name: the built-in ones, the user's own
//! beside the design, and those in the user's own folder.

use std::path::{Path, PathBuf};

use super::{Kind, ParseError, StoreError, files_in, load_with, read_text};
use crate::assess::Library;
use crate::chamber::{Materials, read_own_material};
use crate::design::Design;
use crate::fluid::{Catalog, read_own};
use crate::text::TextError;

/// Where the user's own files of one kind are.
struct Place {
    kind: Kind,
    /// What such a file beside a design is called.
    beside: &'static str,
    /// Their folder in the program's own folder.
    folder: &'static str,
}

const FLUIDS: Place = Place {
    kind: Kind::FLUID,
    beside: ".fluid.ron",
    folder: "fluids",
};
const MATERIALS: Place = Place {
    kind: Kind::MATERIAL,
    beside: ".material.ron",
    folder: "materials",
};

/// What a design is read and assessed against, and the user's own files that were refused.
#[derive(Debug)]
pub struct Shelf {
    pub library: Library,
    pub refused: Vec<Refused>,
}

/// One of the user's own files, and why it is of no use.
#[derive(Debug, thiserror::Error)]
#[error("{kind} file not read: {error}")]
pub struct Refused {
    pub kind: Kind,
    pub error: StoreError,
}

impl Shelf {
    /// One sentence for each file that was refused.
    pub fn notices(&self) -> Vec<String> {
        self.refused.iter().map(Refused::to_string).collect()
    }

    /// The same; a file that may hold a material of the design that nobody here knows is
    /// said to.
    pub fn notices_for(&self, design: &Design) -> Vec<String> {
        let mut unknown = design.chamber.materials();
        unknown.retain(|id| self.library.materials.get(id).is_none());
        let names = unknown.join("”, “");
        let sentence = |refused: &Refused| match refused.kind {
            Kind::MATERIAL if !unknown.is_empty() => {
                format!("{refused}; it may hold “{names}”, which the design names")
            }
            _ => refused.to_string(),
        };
        self.refused.iter().map(sentence).collect()
    }

    /// One sentence for each file of one kind that was refused.
    pub fn notices_of(&self, kind: Kind) -> Vec<String> {
        let of_kind = self.refused.iter().filter(|refused| refused.kind == kind);
        of_kind.map(Refused::to_string).collect()
    }
}

/// The shelf of a design's file, or of none; `settings` is the program's own folder,
/// where `fluids/*.ron` and `materials/*.ron` are looked at. A file beside the design goes
/// before one of the same text there.
pub fn shelf(design: Option<&Path>, settings: Option<&Path>) -> Shelf {
    let mut fluids = Catalog::built_in();
    let mut materials = Materials::built_in();
    let mut refused = Vec::new();
    let mut put_fluid = |text: &str, file: &str| {
        fluids
            .add(read_own(text, file)?)
            .map_err(|taken| TextError::about(text, &taken.field, taken.to_string()))
    };
    FLUIDS.read(design, settings, &mut refused, &mut put_fluid);
    let mut put_material = |text: &str, file: &str| {
        materials
            .add(read_own_material(text, file)?)
            .map_err(|taken| TextError::about(text, &taken.field, taken.to_string()))
    };
    MATERIALS.read(design, settings, &mut refused, &mut put_material);
    Shelf {
        library: Library { fluids, materials },
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
        ) => Err(match shelf.notices_of(Kind::FLUID).join("; ") {
            none if none.is_empty() => error,
            notices => StoreError::FluidRefused {
                design: Box::new(error),
                notices,
            },
        }),
        Err(error) => Err(error),
    }
}

/// Takes the files of a design's own fluid and materials that stand beside it along to
/// another design's folder, so that it opens alike there. What is in the user's own folder
/// needs no copy.
///
/// # Errors
/// [`StoreError::OtherFile`] where a file of that name with another text stands there;
/// nothing is written then.
pub fn carry_own(
    design: &Design,
    library: &Library,
    from: &Path,
    to: &Path,
) -> Result<(), StoreError> {
    let mut copies = Vec::new();
    let fluid = library.fluids.by_id(design.fluid.as_str());
    if let Some(own) = fluid.as_ref().and_then(|fluid| fluid.own_file()) {
        copies.extend(FLUIDS.copy(&own.name, from, to)?);
    }
    for id in design.chamber.materials() {
        let material = library.materials.get(id);
        if let Some(own) = material.and_then(|material| material.own_file()) {
            copies.extend(MATERIALS.copy(&own.name, from, to)?);
        }
    }
    copies
        .iter()
        .try_for_each(|(target, text)| super::write_text(target, text))
}

impl Place {
    /// Puts each file's text and name on the shelf, the nearer first.
    fn read(
        &self,
        design: Option<&Path>,
        settings: Option<&Path>,
        refused: &mut Vec<Refused>,
        put: &mut dyn FnMut(&str, &str) -> Result<(), TextError>,
    ) {
        let kind = self.kind;
        let beside = design.map(|path| ron_files(folder_of(path), self.beside));
        let own = settings.map(|folder| ron_files(&folder.join(self.folder), ".ron"));
        let mut texts = Vec::new();
        for path in beside.into_iter().chain(own).flatten() {
            match read_text(&path, kind) {
                // A copy of one that is on the shelf.
                Ok(text) if texts.contains(&text) => {}
                Ok(text) => {
                    if let Err(error) = put(&text, &name_of(&path)) {
                        let error = ParseError::At(error);
                        let error = StoreError::Parse { path, error };
                        refused.push(Refused { kind, error });
                    }
                    texts.push(text);
                }
                Err(error) => refused.push(Refused { kind, error }),
            }
        }
    }

    /// Target and text of a copy, where one is needed.
    fn copy(
        &self,
        file: &str,
        from: &Path,
        to: &Path,
    ) -> Result<Option<(PathBuf, String)>, StoreError> {
        let (source, path) = (folder_of(from).join(file), folder_of(to).join(file));
        // In the user's own folder a file may be called as any file here.
        let found = file
            .ends_with(self.beside)
            .then(|| read_text(&source, self.kind));
        let Some(Ok(text)) = found else {
            return Ok(None);
        };
        let kind = self.kind;
        match read_text(&path, kind) {
            Ok(there) if there == text => Ok(None),
            Err(StoreError::Missing { .. }) => Ok(Some((path, text))),
            _ => Err(StoreError::OtherFile { path, kind }),
        }
    }
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
