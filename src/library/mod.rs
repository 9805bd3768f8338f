//! Names to texts: families of the shipped library, and files beside the sheet.
//!
//! In comes the name of a family or a path as a sheet writes it; out comes a text, or why there is none. The checker
//! asks through [`Loader`], so that the core touches no file: the command line brings one that reads the sheet's
//! folder, a test brings one that holds its texts. Of a family only the blocks that a sheet uses are read.

mod loader;

pub use loader::{
    LoadError, Loaded, Loader, NoFiles, families, family, family_of, family_species, family_with,
};
