//! Designs on disk: what is written whole, what is refused and in which words.

use std::fs;
use std::path::{Path, PathBuf};

use chargewright::store::{self, StoreError};

/// A folder of its own for one test, removed when the test is done.
pub struct Folder(PathBuf);

impl Folder {
    pub fn new(name: &str) -> Self {
        let path = std::env::temp_dir().join(format!("chargewright-{}-{name}", std::process::id()));
        let _ = fs::remove_dir_all(&path);
        fs::create_dir_all(&path).expect("a temporary folder");
        Self(path)
    }

    pub fn path(&self, name: &str) -> PathBuf {
        self.0.join(name)
    }

    /// Names of what lies in the folder.
    fn names(&self) -> Vec<String> {
        let mut names: Vec<String> = fs::read_dir(&self.0)
            .expect("the folder")
            .map(|entry| {
                entry
                    .expect("an entry")
                    .file_name()
                    .to_string_lossy()
                    .into_owned()
            })
            .collect();
        names.sort();
        names
    }
}

impl Drop for Folder {
    fn drop(&mut self) {
        let _ = fs::remove_dir_all(&self.0);
    }
}

pub fn preset() -> chargewright::design::Design {
    store::preset("copper-water-heat-pipe").expect("a ready design")
}

/// The refusal's sentence: one line, naming the file.
fn refused(path: &Path) -> String {
    let error = store::load(path).expect_err("refused").to_string();
    let name = path.file_name().expect("a name").to_string_lossy();
    assert!(error.contains(&*name), "“{error}” does not name {name}");
    assert!(!error.contains('\n'), "“{error}” is more than one line");
    error
}

#[test]
fn a_design_is_written_and_read_back_whole() {
    let folder = Folder::new("round-trip");
    let path = folder.path("a.ron");
    store::save(&path, &preset()).expect("saved");
    assert_eq!(store::load(&path).expect("loads"), preset());
    // Over the old one as well, and nothing else stays in the folder.
    store::save(&path, &preset()).expect("saved again");
    assert_eq!(
        fs::read_to_string(&path).expect("text"),
        store::to_text(&preset())
    );
    assert_eq!(folder.names(), ["a.ron"]);
}

#[test]
fn a_name_without_a_folder_is_written_beside_the_program() {
    // The folder of such a name is the current one: seen by a path relative to it.
    let folder = Folder::new("relative");
    let up: PathBuf = std::env::current_dir()
        .expect("a current folder")
        .components()
        .skip(1)
        .map(|_| "..")
        .collect();
    let inside = folder.path("b.ron");
    let relative = up.join(inside.strip_prefix("/").unwrap_or(&inside));
    store::save(&relative, &preset()).expect("saved");
    assert_eq!(folder.names(), ["b.ron"]);
}

#[test]
#[cfg(unix)]
fn a_link_is_followed_and_stays_a_link() {
    let folder = Folder::new("link");
    let (target, link) = (folder.path("target.ron"), folder.path("link.ron"));
    fs::write(&target, "old").expect("a file");
    std::os::unix::fs::symlink("target.ron", &link).expect("a link");
    store::save(&link, &preset()).expect("saved");
    assert!(fs::symlink_metadata(&link).expect("the link").is_symlink());
    assert_eq!(
        fs::read_to_string(&target).expect("text"),
        store::to_text(&preset())
    );
    assert_eq!(folder.names(), ["link.ron", "target.ron"]);
    // A link to a file that is not there yet makes that file.
    fs::remove_file(&target).expect("removed");
    store::save(&link, &preset()).expect("saved");
    assert!(fs::symlink_metadata(&link).expect("the link").is_symlink());
    assert!(target.is_file());
}

#[test]
#[cfg(unix)]
fn the_mode_bits_of_the_old_file_are_kept() {
    use std::os::unix::fs::PermissionsExt;
    let folder = Folder::new("mode");
    let path = folder.path("a.ron");
    for mode in [0o600, 0o640, 0o664] {
        fs::write(&path, "old").expect("a file");
        fs::set_permissions(&path, fs::Permissions::from_mode(mode)).expect("mode");
        store::save(&path, &preset()).expect("saved");
        let found = fs::metadata(&path).expect("the file").permissions().mode();
        assert_eq!(found & 0o777, mode, "{found:o} is not {mode:o}");
    }
}

#[test]
#[cfg(unix)]
fn a_read_only_file_is_left_alone() {
    use std::os::unix::fs::PermissionsExt;
    let folder = Folder::new("read-only");
    let path = folder.path("a.ron");
    fs::write(&path, "old").expect("a file");
    fs::set_permissions(&path, fs::Permissions::from_mode(0o444)).expect("mode");
    let error = store::save(&path, &preset())
        .expect_err("refused")
        .to_string();
    assert!(
        error.contains("read-only") && error.contains("nothing was changed"),
        "{error}"
    );
    assert_eq!(fs::read_to_string(&path).expect("text"), "old");
    assert_eq!(folder.names(), ["a.ron"]);
}

/// A write that fails half-way, whoever runs the test: a name of 250 bytes is a file's,
/// but the temporary name beside it is longer than a folder takes.
#[test]
fn after_a_failed_write_the_old_file_is_whole() {
    let folder = Folder::new("failed");
    let path = folder.path(&"n".repeat(250));
    fs::write(&path, "old").expect("a file");
    match store::save(&path, &preset()) {
        // Some systems take longer names: then it is written, and whole.
        Ok(()) => assert_eq!(store::load(&path).expect("loads"), preset()),
        Err(error) => {
            assert!(matches!(error, StoreError::Write { .. }), "{error}");
            assert_eq!(fs::read_to_string(&path).expect("text"), "old");
        }
    }
    assert_eq!(folder.names().len(), 1, "{:?}", folder.names());
}

#[test]
fn a_target_that_cannot_be_is_refused_in_one_sentence() {
    let folder = Folder::new("cannot");
    fs::write(folder.path("file"), "no folder").expect("a file");
    for path in [
        folder.path("file/below.ron"),
        folder.path("missing/below.ron"),
        folder.path(""),
    ] {
        let error = store::save(&path, &preset())
            .expect_err("refused")
            .to_string();
        assert!(!error.contains('\n'), "{error}");
        assert!(
            error.contains("chargewright-"),
            "“{error}” does not name the path"
        );
    }
    assert_eq!(folder.names(), ["file"]);
}

/// A folder nobody may write into; skipped where the system lets its master do so all
/// the same.
#[test]
#[cfg(unix)]
fn a_read_only_folder_loses_nothing() {
    use std::os::unix::fs::PermissionsExt;
    let folder = Folder::new("locked");
    let path = folder.path("a.ron");
    fs::write(&path, "old").expect("a file");
    fs::set_permissions(&folder.0, fs::Permissions::from_mode(0o555)).expect("mode");
    let saved = store::save(&path, &preset());
    fs::set_permissions(&folder.0, fs::Permissions::from_mode(0o755)).expect("mode");
    match saved {
        Ok(()) => assert_eq!(store::load(&path).expect("loads"), preset()),
        Err(error) => {
            assert!(error.to_string().contains("cannot be written"), "{error}");
            assert_eq!(fs::read_to_string(&path).expect("text"), "old");
        }
    }
    assert_eq!(folder.names(), ["a.ron"]);
}

#[test]
fn what_is_no_design_file_is_refused_by_what_it_is() {
    let folder = Folder::new("refused");
    assert!(refused(&folder.path("nowhere.ron")).contains("does not exist"));
    fs::create_dir(folder.path("folder.ron")).expect("a folder");
    assert!(refused(&folder.path("folder.ron")).contains("is a folder"));
    fs::write(folder.path("bytes.ron"), [b'(', 0xff, 0xfe, b')']).expect("a file");
    assert!(refused(&folder.path("bytes.ron")).contains("is not text"));
    fs::write(folder.path("empty.ron"), "").expect("a file");
    assert!(refused(&folder.path("empty.ron")).contains("line 1, column 1"));
    fs::write(
        folder.path("marked.ron"),
        format!("\u{feff}{}", store::to_text(&preset())),
    )
    .expect("a file");
    refused(&folder.path("marked.ron"));
}

/// Sparse: it takes no room on disk, and is refused before it is read.
#[test]
fn a_file_of_200_megabytes_is_refused_unread() {
    let folder = Folder::new("large");
    let path = folder.path("large.ron");
    let file = fs::File::create(&path).expect("a file");
    file.set_len(200_000_000).expect("a sparse file");
    let started = std::time::Instant::now();
    let error = refused(&path);
    assert!(
        error.contains("191 MiB") && error.contains("at most 4 MiB"),
        "{error}"
    );
    assert!(
        started.elapsed().as_millis() < 500,
        "it was read: {:?}",
        started.elapsed()
    );
    // Just above the limit the number must not read as if it were allowed.
    file.set_len((4 << 20) + 1).expect("a sparse file");
    let error = refused(&path);
    assert!(!error.contains("is 4 MiB"), "{error}");
}

/// A file that goes away while others are read: each read is whole or a sentence.
#[test]
fn a_file_that_vanishes_is_a_sentence() {
    let folder = Folder::new("vanishing");
    let path = folder.path("a.ron");
    let writer = {
        let path = path.clone();
        std::thread::spawn(move || {
            for _ in 0..100 {
                store::save(&path, &preset()).expect("saved");
                let _ = fs::remove_file(&path);
            }
        })
    };
    while !writer.is_finished() {
        match store::load(&path) {
            Ok(design) => assert_eq!(design, preset()),
            Err(StoreError::Missing { .. }) => {}
            Err(error) => panic!("{error}"),
        }
    }
    writer.join().expect("the writer");
}

/// Two that save to one file at once: the file is one or the other, never a mixture.
#[test]
fn writers_at_once_leave_one_whole_file() {
    let folder = Folder::new("writers");
    let path = folder.path("a.ron");
    let writers: Vec<_> = store::presets()
        .take(2)
        .map(|(_, design)| {
            let path = path.clone();
            std::thread::spawn(move || {
                (0..50)
                    .filter(|_| store::save(&path, &design).is_err())
                    .count()
            })
        })
        .collect();
    let refused: usize = writers
        .into_iter()
        .map(|writer| writer.join().expect("a writer"))
        .sum();
    assert_eq!(refused, 0, "each has a temporary file of its own");
    let found = store::load(&path).expect("whole");
    assert!(store::presets().take(2).any(|(_, design)| design == found));
    assert_eq!(folder.names(), ["a.ron"]);
}
