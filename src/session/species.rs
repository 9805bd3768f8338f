//! The species of the shipped library, as pages.

use crate::check::check_family;
use crate::library::families;
use crate::report::{SpeciesPage, species_page};

/// The pages of all families, in the order of the library. A family at fault has no pages; a test holds that none is.
pub fn library_pages() -> Vec<SpeciesPage> {
    families()
        .flat_map(|family| {
            let species = check_family(family).unwrap_or_default();
            species.into_iter().map(move |species| species_page(&species, family))
        })
        .collect()
}
