//! A species of the library on a page of its own.
//!
//! In come checked species with their families; out come a list, and for each species a page: its heating curve as
//! phases and transitions, heat capacity and enthalpy at some temperatures, ranges, spreads and sources, as text, as JSON
//! and as curves drawn with characters.

mod gather;
mod json;
mod model;
mod plot;
mod text;

pub use gather::species_page;
pub use json::{render_species_json, render_species_list_json};
pub use model::{PageChange, PageDatum, PagePhase, PageRow, SpeciesPage};
pub use plot::render_plot;
pub use text::{render_species_list, render_species_page};
