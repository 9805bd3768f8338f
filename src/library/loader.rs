//! The loader's contract, and the families that the program carries.

/// The families of the shipped library: name and text.
const FAMILIES: &[(&str, &str)] = &[
    ("metals", include_str!("../../sheets/metals.heat")),
    ("minerals", include_str!("../../sheets/minerals.heat")),
    ("sulfides", include_str!("../../sheets/sulfides.heat")),
    ("salts", include_str!("../../sheets/salts.heat")),
    ("gases", include_str!("../../sheets/gases.heat")),
    ("solvents", include_str!("../../sheets/solvents.heat")),
    ("water", include_str!("../../sheets/water.heat")),
    ("materials", include_str!("../../sheets/materials.heat")),
];

/// The families by name.
pub fn families() -> impl Iterator<Item = &'static str> {
    FAMILIES.iter().map(|(name, _)| *name)
}

/// The text of a family.
pub fn family(name: &str) -> Option<&'static str> {
    FAMILIES.iter().find(|(known, _)| *known == name).map(|(_, text)| *text)
}

/// A file that was found.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Loaded {
    /// What tells it from every other file, so that a circle of files is seen.
    pub identity: String,
    /// Its name for messages.
    pub name: String,
    /// Its text.
    pub text: String,
}

/// Why a file could not be had.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum LoadError {
    /// It lies outside the project folder, or the path is absolute.
    Outside,
    /// It cannot be opened or is no text; the reason in words.
    Unreadable(String),
}

/// Who brings the files that a sheet uses.
pub trait Loader {
    /// The file at `path`, as written in the file whose identity is `from`.
    ///
    /// # Errors
    /// [`LoadError::Outside`] for a path that leaves the project folder, [`LoadError::Unreadable`] for a file that
    /// cannot be opened or read.
    fn load(&self, from: &str, path: &str) -> Result<Loaded, LoadError>;
}

/// A loader for texts that stand alone.
#[derive(Debug, Clone, Copy)]
pub struct NoFiles;

impl Loader for NoFiles {
    fn load(&self, _: &str, _: &str) -> Result<Loaded, LoadError> {
        Err(LoadError::Unreadable("no files can be used from here".to_owned()))
    }
}
