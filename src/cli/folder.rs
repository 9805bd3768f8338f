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

#[cfg(test)]
mod tests {
    use super::*;
    use std::fs;

    /// A project with files beside and below its sheet, and a secret outside.
    struct Project {
        outer: PathBuf,
        loader: FolderLoader,
        main: String,
    }

    impl Project {
        fn new(name: &str) -> Project {
            let outer = std::env::temp_dir().join(format!("heatpath-{name}-{}", std::process::id()));
            let inner = outer.join("pot/alloys");
            fs::create_dir_all(&inner).expect("a folder of our own");
            for (file, text) in [("main.heat", "m"), ("beside.heat", "b"), ("alloys/below.heat", "l")] {
                fs::write(outer.join("pot").join(file), text).expect("a folder of our own");
            }
            fs::write(outer.join("secret.heat"), "s").expect("a folder of our own");
            let (loader, main) = FolderLoader::beside(&outer.join("pot/main.heat"));
            Project { outer, loader, main }
        }

        fn text(&self, from: &str, path: &str) -> Result<String, LoadError> {
            self.loader.load(from, path).map(|loaded| loaded.text)
        }
    }

    impl Drop for Project {
        fn drop(&mut self) {
            fs::remove_dir_all(&self.outer).unwrap_or_default();
        }
    }

    #[test]
    fn paths_count_from_the_file_that_uses_them() {
        let project = Project::new("paths");
        let below = project.loader.load(&project.main, "alloys/below.heat").expect("a file");
        assert_eq!(below.text, "l");
        assert_eq!(project.text(&below.identity, "../beside.heat"), Ok("b".to_owned()));
        assert_eq!(project.text(&below.identity, "./below.heat"), Ok("l".to_owned()));
        assert!(matches!(project.text(&below.identity, "beside.heat"), Err(LoadError::Unreadable(_))));
    }

    #[test]
    fn one_file_has_one_identity() {
        let project = Project::new("identity");
        let one = project.loader.load(&project.main, "alloys/../main.heat").expect("a file");
        assert_eq!(one.identity, project.main);
    }

    #[test]
    fn nothing_outside_the_folder_is_brought() {
        let project = Project::new("outside");
        let absolute = project.outer.join("pot/beside.heat");
        for path in
            ["../secret.heat", "../no-such.heat", "alloys/../../secret.heat", &absolute.to_string_lossy()]
        {
            assert_eq!(project.text(&project.main, path), Err(LoadError::Outside), "{path}");
        }
    }

    #[cfg(unix)]
    #[test]
    fn a_link_is_followed_only_inside_the_folder() {
        use std::os::unix::fs::symlink;
        let project = Project::new("links");
        let pot = project.outer.join("pot");
        symlink(project.outer.join("secret.heat"), pot.join("leak.heat")).expect("a link");
        symlink(&project.outer, pot.join("up")).expect("a link");
        symlink(pot.join("beside.heat"), pot.join("inside.heat")).expect("a link");
        assert_eq!(project.text(&project.main, "leak.heat"), Err(LoadError::Outside));
        assert_eq!(project.text(&project.main, "up/secret.heat"), Err(LoadError::Outside));
        assert_eq!(project.text(&project.main, "inside.heat"), Ok("b".to_owned()));
    }

    #[test]
    fn what_is_no_text_file_is_unreadable() {
        let project = Project::new("unreadable");
        fs::write(project.outer.join("pot/latin.heat"), b"460 \xb0C").expect("a folder of our own");
        for (path, reason) in [
            ("missing.heat", "there is no such file"),
            ("alloys", "it is a folder"),
            ("", "it is a folder"),
            ("beside.heat/x", "a part of its path is no folder"),
            ("latin.heat", "it is not UTF-8 text (byte 4)"),
        ] {
            assert_eq!(
                project.text(&project.main, path),
                Err(LoadError::Unreadable(reason.to_owned())),
                "{path}"
            );
        }
    }
}
