//! Sheets of the repository, with what their first comments say.

use crate::program::path;
use std::path::{Path, PathBuf};

/// A sheet and its header: the comment lines before anything else.
#[derive(Debug)]
pub(crate) struct Sheet {
    /// Its path below the root of the repository.
    pub(crate) name: String,
    /// Its bytes.
    pub(crate) bytes: Vec<u8>,
    /// The lines `# key: text` and `# key text` of its header, as they stand behind `# `.
    pub(crate) header: Vec<String>,
}

impl Sheet {
    /// What the header says behind `key`, line by line.
    pub(crate) fn said<'a>(&'a self, key: &'a str) -> impl Iterator<Item = &'a str> {
        self.header.iter().filter_map(move |line| line.strip_prefix(key)).map(str::trim)
    }
}

/// Every sheet below a folder, by name.
pub(crate) fn sheets_below(folder: &str) -> Vec<Sheet> {
    let mut files = Vec::new();
    gather(&path(folder), "heat", &mut files);
    files.sort();
    files.into_iter().map(|file| read(&file)).collect()
}

/// Every file below a folder whose name ends in `.extension`.
pub(crate) fn gather(folder: &Path, extension: &str, files: &mut Vec<PathBuf>) {
    for entry in std::fs::read_dir(folder).expect("the folder is there") {
        let path = entry.expect("the folder can be read").path();
        if path.is_dir() {
            gather(&path, extension, files);
        } else if path.extension().is_some_and(|found| found == extension) {
            files.push(path);
        }
    }
}

fn read(file: &Path) -> Sheet {
    let bytes = std::fs::read(file).expect("the sheet can be read");
    let text = String::from_utf8_lossy(&bytes);
    let lines = text.lines().map_while(|line| line.strip_prefix('#')).map(|line| line.trim().to_owned());
    let name = file.strip_prefix(env!("CARGO_MANIFEST_DIR")).expect("below the root");
    Sheet { name: name.to_string_lossy().replace('\\', "/"), header: lines.collect(), bytes }
}
