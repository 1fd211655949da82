//! The design on the desk: its file, its saved state, its history, its draft.

use std::path::{Path, PathBuf};
use std::sync::mpsc::{Receiver, Sender, channel};
use std::sync::{Arc, Mutex};

use eframe::egui;
use serde::{Deserialize, Serialize};

use super::history::History;
use crate::assess::{Assessment, Library, assess};
use crate::design::Design;
use crate::store::{self, Shelf, Stamp, StoreError};

/// What the window works on.
pub struct Desk {
    pub design: Design,
    /// As last read or written; the unsaved mark is `design != saved`. None for a
    /// design restored from a draft that has no file.
    saved: Option<Design>,
    path: Option<PathBuf>,
    history: History,
    /// The program's own folder, where the user's own fluids may be.
    folder: Option<PathBuf>,
    /// What the design, its history and its draft are read and assessed against.
    shelf: Shelf,
    assessment: Assessment,
    assessed: Design,
    drafts: DraftWriter,
    watched: Arc<Mutex<Watched>>,
}

/// An unsaved design left behind by a window that did not close properly.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
pub struct Draft {
    pub path: Option<PathBuf>,
    /// The design's own text.
    pub text: String,
}

/// What the watcher looks at, and what it saw.
#[derive(Debug, Default)]
struct Watched {
    path: Option<PathBuf>,
    stamp: Option<Stamp>,
    changed: bool,
}

impl Desk {
    /// A desk with an untitled design on it; drafts go to `folder`, if there is one.
    pub fn new(design: Design, folder: Option<&Path>) -> Self {
        let shelf = store::shelf(None, folder);
        let assessment = assess(&design, &shelf.library);
        Self {
            saved: Some(design.clone()),
            path: None,
            history: History::new(design.clone()),
            assessed: design.clone(),
            assessment,
            shelf,
            folder: folder.map(Path::to_owned),
            drafts: DraftWriter::new(folder.map(Draft::own_path)),
            watched: Arc::default(),
            design,
        }
    }

    pub fn library(&self) -> &Library {
        &self.shelf.library
    }

    /// One sentence for each of the user's own files that was not read.
    pub fn notices(&self) -> Vec<String> {
        self.shelf.notices_for(&self.design)
    }

    pub fn assessment(&self) -> &Assessment {
        &self.assessment
    }

    /// Lets a panel edit the design beside what was last said of it.
    pub fn edit(&mut self, edit: impl FnOnce(&mut Design, &Assessment, &Library)) {
        edit(&mut self.design, &self.assessment, &self.shelf.library);
    }

    pub fn path(&self) -> Option<&Path> {
        self.path.as_deref()
    }

    /// File name, or "untitled".
    pub fn name(&self) -> String {
        let name = self.path.as_ref().and_then(|path| path.file_name());
        name.map_or_else(
            || "untitled".to_owned(),
            |name| name.to_string_lossy().into_owned(),
        )
    }

    pub fn is_unsaved(&self) -> bool {
        self.saved.as_ref() != Some(&self.design)
    }

    /// Assesses the design again if it changed; true if it did.
    pub fn refresh(&mut self) -> bool {
        if self.design == self.assessed {
            return false;
        }
        self.assess();
        true
    }

    fn assess(&mut self) {
        self.assessment = assess(&self.design, &self.shelf.library);
        self.assessed = self.design.clone();
    }

    /// Ends a gesture: an undo point, and a draft against a crash.
    pub fn commit(&mut self) {
        if self.history.commit(&self.design) {
            self.write_draft();
        }
    }

    pub fn can_undo(&self) -> bool {
        self.history.can_undo(&self.design)
    }

    pub fn can_redo(&self) -> bool {
        self.history.can_redo()
    }

    pub fn undo(&mut self) {
        if let Some(design) = self.history.undo(&self.design) {
            self.design = design;
            self.write_draft();
        }
    }

    pub fn redo(&mut self) {
        if let Some(design) = self.history.redo() {
            self.design = design;
            self.write_draft();
        }
    }

    /// Puts an untitled design on the desk.
    pub fn start_untitled(&mut self, design: Design) {
        let shelf = store::shelf(None, self.folder.as_deref());
        self.replace(design, None, shelf);
    }

    /// Reads a design file and the fluids beside it; the open design stays if that fails.
    ///
    /// # Errors
    /// [`StoreError`].
    pub fn open(&mut self, path: &Path) -> Result<(), StoreError> {
        let (design, shelf) = store::open(path, self.folder.as_deref())?;
        self.replace(design, Some(path.to_owned()), shelf);
        Ok(())
    }

    /// Takes a crashed window's draft as the unsaved design.
    pub fn restore(&mut self, draft: &Draft) {
        let Some((design, shelf)) = draft.read(self.folder.as_deref()) else {
            return;
        };
        let on_disk = draft
            .path
            .as_ref()
            .and_then(|path| store::load_with(path, &shelf.library.fluids).ok());
        let path = draft.path.clone().filter(|_| on_disk.is_some());
        self.replace(design, path, shelf);
        self.saved = on_disk;
        self.write_draft();
    }

    /// Writes the design to its file; the user's own files that stand beside it are taken
    /// along to another folder.
    ///
    /// # Errors
    /// [`StoreError`]; the design stays unsaved.
    pub fn save_to(&mut self, path: &Path) -> Result<(), StoreError> {
        if let Some(before) = &self.path {
            store::carry_own(&self.design, self.library(), before, path)?;
        }
        store::save(path, &self.design)?;
        self.saved = Some(self.design.clone());
        self.path = Some(path.to_owned());
        self.watch();
        self.drafts.remove();
        Ok(())
    }

    /// Whether the file on disk is no longer what this program last saw.
    pub fn changed_on_disk(&self) -> bool {
        self.watched.lock().is_ok_and(|watched| watched.changed)
    }

    /// Accepts the file on disk as it is: the next save writes over it.
    pub fn keep_mine(&mut self) {
        self.watch();
        // What is on the desk is no longer what is on disk.
        let fluids = &self.shelf.library.fluids;
        let path = self.path.as_ref();
        self.saved = path.and_then(|path| store::load_with(path, fluids).ok());
    }

    /// Starts the watcher; it asks for a frame only when the file changed.
    pub fn start_watching(&self, ctx: &egui::Context) {
        let watched = Arc::downgrade(&self.watched);
        let ctx = ctx.clone();
        std::thread::spawn(move || {
            while let Some(watched) = watched.upgrade() {
                if let Ok(mut watched) = watched.lock()
                    && let Some(path) = &watched.path
                    && !watched.changed
                    && store::stamp(path) != watched.stamp
                {
                    watched.changed = true;
                    ctx.request_repaint();
                }
                drop(watched);
                std::thread::sleep(std::time::Duration::from_secs(1));
            }
        });
    }

    /// A proper end: no draft is left behind.
    pub fn close(&self) {
        self.drafts.remove();
    }

    /// A design comes with the shelf it was read against: the same id may be another fluid
    /// there, so it is assessed at once.
    fn replace(&mut self, design: Design, path: Option<PathBuf>, shelf: Shelf) {
        self.design = design;
        self.shelf = shelf;
        self.assess();
        self.saved = Some(self.design.clone());
        self.path = path;
        self.history = History::new(self.design.clone());
        self.watch();
        self.drafts.remove();
    }

    fn watch(&self) {
        if let Ok(mut watched) = self.watched.lock() {
            *watched = Watched {
                path: self.path.clone(),
                stamp: self.path.as_deref().and_then(store::stamp),
                changed: false,
            };
        }
    }

    fn write_draft(&self) {
        if self.is_unsaved() {
            self.drafts.write(Draft {
                path: self.path.clone(),
                text: store::to_text(&self.design),
            });
        } else {
            self.drafts.remove();
        }
    }
}

/// Writes drafts one after another, away from the window's thread.
struct DraftWriter {
    orders: Option<Sender<Option<Draft>>>,
    thread: Option<std::thread::JoinHandle<()>>,
}

impl DraftWriter {
    fn new(path: Option<PathBuf>) -> Self {
        let Some(path) = path else {
            return Self {
                orders: None,
                thread: None,
            };
        };
        let (orders, inbox): (Sender<Option<Draft>>, Receiver<_>) = channel();
        let thread = std::thread::spawn(move || {
            while let Ok(mut order) = inbox.recv() {
                // Only the newest matters.
                while let Ok(newer) = inbox.try_recv() {
                    order = newer;
                }
                match order {
                    Some(draft) => drop(store::write_own(&path, &draft)),
                    None => store::remove_own(&path),
                }
            }
        });
        Self {
            orders: Some(orders),
            thread: Some(thread),
        }
    }

    fn write(&self, draft: Draft) {
        if let Some(orders) = &self.orders {
            let _ = orders.send(Some(draft));
        }
    }

    fn remove(&self) {
        if let Some(orders) = &self.orders {
            let _ = orders.send(None);
        }
    }
}

impl Drop for DraftWriter {
    fn drop(&mut self) {
        self.orders = None;
        if let Some(thread) = self.thread.take() {
            let _ = thread.join();
        }
    }
}

impl Draft {
    /// A draft of a window that is no longer running, and its file. The file stays
    /// until the user has decided.
    pub fn left_behind(folder: &Path) -> Option<(PathBuf, Self)> {
        store::files_in(folder).into_iter().find_map(|path| {
            let process = process_of(&path)?;
            if process == std::process::id() || is_running(process) {
                return None;
            }
            let draft = store::read_own::<Self>(&path)?;
            draft.read(Some(folder)).is_some().then_some((path, draft))
        })
    }

    /// The design with the fluids beside its file and in the program's own folder.
    fn read(&self, folder: Option<&Path>) -> Option<(Design, Shelf)> {
        let shelf = store::shelf(self.path.as_deref(), folder);
        let design = store::from_text_with(&self.text, &shelf.library.fluids).ok()?;
        Some((design, shelf))
    }

    fn own_path(folder: &Path) -> PathBuf {
        folder.join(format!("draft-{}.ron", std::process::id()))
    }
}

fn process_of(path: &Path) -> Option<u32> {
    path.file_name()?
        .to_str()?
        .strip_prefix("draft-")?
        .strip_suffix(".ron")?
        .parse()
        .ok()
}

/// Where the system does not say, a draft counts as left behind.
fn is_running(process: u32) -> bool {
    Path::new("/proc").join(process.to_string()).is_dir()
}
