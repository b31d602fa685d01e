//! Files as an editor sees them: its open buffers before the disk, and files that were read before while the disk has
//! not changed them. Notes what was looked at, so that it is known what to look at again when a file changes.

use super::deck::SourceFile;
use super::includes::normalised;
use super::read::{Disk, Problem, Read};
use std::collections::{BTreeSet, HashMap};
use std::path::{Path, PathBuf};
use std::sync::{Arc, Mutex, MutexGuard, PoisonError};
use std::time::SystemTime;

/// Most bytes of text that [`DiskFiles`] keeps. Trees are several times as large.
pub const KEPT_BYTES: usize = 2 * 1024 * 1024;

/// Buffers that are open in an editor.
pub trait Buffers: Sync {
    /// The buffer that holds the file at a path.
    ///
    /// # Errors
    /// Says why an open buffer cannot be read as a deck.
    fn buffer(&self, path: &Path) -> Option<Result<Arc<SourceFile>, Problem>>;
}

/// Files read from disk before, each with what the disk said of it then.
#[derive(Debug, Default)]
pub struct DiskFiles {
    kept: Mutex<HashMap<PathBuf, (Stamp, Arc<SourceFile>)>>,
}

/// What tells that a file has changed.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
struct Stamp {
    changed: SystemTime,
    length: u64,
}

impl DiskFiles {
    fn stamp(path: &Path) -> Option<Stamp> {
        let about = std::fs::metadata(path).ok()?;
        Some(Stamp { changed: about.modified().ok()?, length: about.len() })
    }

    /// The file at a path, read again where the disk has changed it.
    ///
    /// # Errors
    /// As [`Disk`].
    pub fn read(&self, path: &Path) -> Result<Arc<SourceFile>, Problem> {
        let stamp = Self::stamp(path);
        if let (Some(stamp), Some((known, file))) = (stamp, locked(&self.kept).get(path))
            && stamp == *known
        {
            return Ok(file.clone());
        }
        let file = Disk.read(path)?;
        if let Some(stamp) = stamp {
            let mut kept = locked(&self.kept);
            let bytes: usize = kept.values().map(|(_, file)| file.text.len()).sum();
            if bytes + file.text.len() > KEPT_BYTES {
                kept.clear();
            }
            kept.insert(path.to_path_buf(), (stamp, file.clone()));
        }
        Ok(file)
    }

    /// Reads the file again next time, whatever the disk says of it.
    pub fn forget(&self, path: &Path) {
        locked(&self.kept).remove(path);
    }
}

/// Open buffers, then files on disk.
pub struct Overlay<'a> {
    buffers: &'a dyn Buffers,
    disk: &'a DiskFiles,
    /// A deck that is read once and not again, and so is not kept.
    passing: Option<&'a Path>,
    looked_at: Mutex<BTreeSet<PathBuf>>,
}

impl<'a> Overlay<'a> {
    /// Reads `buffers`, then `disk`. The file at `passing` is not kept.
    pub fn new(buffers: &'a dyn Buffers, disk: &'a DiskFiles, passing: Option<&'a Path>) -> Overlay<'a> {
        Overlay { buffers, disk, passing, looked_at: Mutex::default() }
    }

    /// Every path that was asked for, whether there was a file or not.
    pub fn looked_at(self) -> BTreeSet<PathBuf> {
        self.looked_at.into_inner().unwrap_or_else(PoisonError::into_inner)
    }

    fn note(&self, path: &Path) {
        let mut looked_at = locked(&self.looked_at);
        if !looked_at.contains(path) {
            looked_at.insert(path.to_path_buf());
        }
    }
}

impl Read for Overlay<'_> {
    fn read(&self, path: &Path) -> Result<Arc<SourceFile>, Problem> {
        self.note(path);
        match self.buffers.buffer(path) {
            Some(buffer) => buffer,
            None if self.passing == Some(path) => Disk.read(path),
            None => self.disk.read(path),
        }
    }

    fn exists(&self, path: &Path) -> bool {
        self.note(path);
        self.buffers.buffer(path).is_some() || Disk.exists(path)
    }

    fn real_path(&self, path: &Path) -> Option<PathBuf> {
        self.note(path);
        if self.buffers.buffer(path).is_some() {
            return Some(path.to_path_buf());
        }
        Disk.real_path(path)
    }
}

/// The one path of a file, whether it is on disk yet or not.
pub fn real_path(path: &Path) -> PathBuf {
    let plain = normalised(path);
    if let Ok(real) = plain.canonicalize() {
        return real;
    }
    match (plain.parent().and_then(|folder| folder.canonicalize().ok()), plain.file_name()) {
        (Some(folder), Some(name)) => folder.join(name),
        _ => plain,
    }
}

/// A lock, also where another thread came to grief holding it: what is guarded here is whole at every step.
fn locked<T>(mutex: &Mutex<T>) -> MutexGuard<'_, T> {
    mutex.lock().unwrap_or_else(PoisonError::into_inner)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::syntax::parse;

    struct One(PathBuf, &'static str);

    impl Buffers for One {
        fn buffer(&self, path: &Path) -> Option<Result<Arc<SourceFile>, Problem>> {
            (path == self.0)
                .then(|| Ok(Arc::new(SourceFile { path: self.0.clone(), tree: parse(self.1), text: self.1.into() })))
        }
    }

    fn folder(name: &str) -> PathBuf {
        let folder = std::env::temp_dir().join(format!("deckline-overlay-{name}-{}", std::process::id()));
        std::fs::create_dir_all(&folder).expect("a temporary folder");
        folder.canonicalize().expect("its path")
    }

    #[test]
    fn a_buffer_comes_before_the_disk_and_what_was_asked_for_is_noted() {
        let folder = folder("buffer");
        let (open, closed, absent) = (folder.join("open.buoy"), folder.join("closed.buoy"), folder.join("absent.buoy"));
        std::fs::write(&open, "given\n").expect("written");
        std::fs::write(&closed, "run\n").expect("written");
        let (buffers, disk) = (One(open.clone(), "mesh\n"), DiskFiles::default());
        let overlay = Overlay::new(&buffers, &disk, None);
        assert_eq!(&*overlay.read(&open).expect("a buffer").text, "mesh\n");
        assert_eq!(&*overlay.read(&closed).expect("a file").text, "run\n");
        assert!(!overlay.exists(&absent));
        assert_eq!(overlay.looked_at(), BTreeSet::from([open, closed, absent]));
        std::fs::remove_dir_all(folder).expect("removed");
    }

    #[test]
    fn a_file_is_read_again_when_it_has_changed_and_only_then() {
        let folder = folder("kept");
        let path = folder.join("a.buoy");
        let disk = DiskFiles::default();
        std::fs::write(&path, "run\n").expect("written");
        let first = disk.read(&path).expect("read");
        assert!(Arc::ptr_eq(&first, &disk.read(&path).expect("read")));
        std::fs::write(&path, "given\n").expect("written");
        assert_eq!(&*disk.read(&path).expect("read").text, "given\n");
        std::fs::remove_dir_all(folder).expect("removed");
    }
}
