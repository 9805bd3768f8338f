//! The files that a sheet uses, from the folder it stands in.

use super::file::{Admitted, Fault, LIMIT, read_text, reason};
use crate::library::{LoadError, Loaded, Loader};
use std::path::{Component, Path, PathBuf};

/// Brings files of one project folder: the folder of the main sheet. A path counts from the folder of the file that
/// uses it, and never leads out of the project folder, by `..` or by a symbolic link.
///
/// The identity of a file is its canonical path below the project folder.
#[derive(Debug)]
pub(super) struct FolderLoader {
    /// The project folder, canonical.
    project: PathBuf,
    /// The project folder as the user named it, for messages.
    shown: PathBuf,
}

impl FolderLoader {
    /// A loader for the sheet at `path`, and the sheet's identity.
    pub(super) fn beside(path: &Path) -> (FolderLoader, String) {
        let shown = path.parent().unwrap_or(Path::new("")).to_path_buf();
        let canonical = path.canonicalize().unwrap_or_else(|_| path.to_path_buf());
        let identity =
            canonical.file_name().map(|name| name.to_string_lossy().into_owned()).unwrap_or_default();
        let parent = canonical.parent().filter(|parent| !parent.as_os_str().is_empty());
        let project = canonical_folder(parent.unwrap_or(Path::new(".")));
        (FolderLoader { project, shown }, identity)
    }

    /// A loader for a sheet from standard input: the current folder.
    pub(super) fn here() -> (FolderLoader, String) {
        let loader = FolderLoader { project: canonical_folder(Path::new(".")), shown: PathBuf::new() };
        (loader, String::new())
    }
}

impl Loader for FolderLoader {
    fn load(&self, from: &str, path: &str) -> Result<Loaded, LoadError> {
        let below = below(Path::new(from).parent().unwrap_or(Path::new("")), Path::new(path))?;
        let canonical = self.project.join(below).canonicalize();
        let canonical = canonical.map_err(|error| LoadError::Unreadable(reason(&error)))?;
        let inside = canonical.strip_prefix(&self.project).map_err(|_| LoadError::Outside)?;
        let identity =
            inside.to_str().ok_or_else(|| LoadError::Unreadable("its name is not UTF-8".to_owned()))?;
        let text = read_text(&canonical, Admitted::FilesOnly)
            .map_err(|fault| LoadError::Unreadable(words(&fault)))?;
        Ok(Loaded {
            name: self.shown.join(inside).to_string_lossy().into_owned(),
            identity: identity.to_owned(),
            text,
        })
    }
}

/// The path below the project folder that `path` means in `folder`, by its words alone.
fn below(folder: &Path, path: &Path) -> Result<PathBuf, LoadError> {
    let mut below = PathBuf::new();
    for part in folder.components().chain(path.components()) {
        match part {
            Component::Normal(name) => below.push(name),
            Component::CurDir => {}
            Component::ParentDir if below.pop() => {}
            Component::ParentDir | Component::RootDir | Component::Prefix(_) => {
                return Err(LoadError::Outside);
            }
        }
    }
    Ok(below)
}

fn canonical_folder(folder: &Path) -> PathBuf {
    folder.canonicalize().unwrap_or_else(|_| folder.to_path_buf())
}

fn words(fault: &Fault) -> String {
    match fault {
        Fault::Unreadable(reason) => reason.clone(),
        Fault::TooLarge => format!("it is larger than {} MB", LIMIT / 1_000_000),
        Fault::NotUtf8 { offset, .. } => format!("it is not UTF-8 text (byte {offset})"),
    }
}
