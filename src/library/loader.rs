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

/// The species of a family, in the order of its text.
pub fn family_species(name: &str) -> impl Iterator<Item = &'static str> {
    family(name).unwrap_or_default().lines().filter_map(species_head)
}

/// The family that holds a species.
pub fn family_of(species: &str) -> Option<&'static str> {
    families().find(|family| family_species(family).any(|known| known == species))
}

/// The text of a family with blanks for all but the blocks of the species wanted, so that only these are read.
/// Lengths and line ends stay, so that every place is a place in the whole text.
pub fn family_with(name: &str, wanted: &[&str]) -> Option<String> {
    let whole = family(name)?;
    let mut text = String::with_capacity(whole.len());
    let mut kept = false;
    for line in whole.split_inclusive('\n') {
        if let Some(species) = species_head(line) {
            kept = wanted.contains(&species);
        }
        if kept {
            text.push_str(line);
        } else {
            let end = usize::from(line.ends_with('\n'));
            text.push_str(&" ".repeat(line.len() - end));
            text.push_str(&"\n".repeat(end));
        }
        kept &= !line.starts_with('}');
    }
    Some(text)
}

/// The name behind `species` at the start of a line: in a family, blocks begin and end at the margin.
fn species_head(line: &str) -> Option<&str> {
    line.strip_prefix("species ").and_then(|rest| rest.split_whitespace().next())
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

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_family_is_cut_to_what_is_wanted_without_moving_it() {
        let whole = family("metals").expect("a family");
        let cut = family_with("metals", &["Zn", "W"]).expect("a family");
        assert_eq!(cut.len(), whole.len());
        let kept: Vec<_> = cut.lines().filter_map(species_head).collect();
        assert_eq!(kept, ["Zn", "W"]);
        let zinc = whole.find("species Zn ").expect("zinc");
        let end = zinc + whole[zinc..].find("\n}\n").expect("its end") + 3;
        assert_eq!(cut.get(zinc..end), whole.get(zinc..end));
        assert_eq!(cut.lines().count(), whole.lines().count());
    }

    #[test]
    fn a_species_is_found_in_its_family() {
        assert_eq!(family_of("N2"), Some("gases"));
        assert_eq!(family_of("CaSO4·2H2O"), Some("minerals"));
        assert_eq!(family_of("Xx"), None);
    }

    #[test]
    fn no_species_stands_in_two_families() {
        let mut all: Vec<_> = families().flat_map(family_species).collect();
        all.sort_unstable();
        let before = all.len();
        all.dedup();
        assert_eq!(all.len(), before);
    }
}
