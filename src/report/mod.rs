//! The report: one model, several readers.
//!
//! In comes a worked sheet, gathered into a [`Report`] that holds everything a reader may show, numbers in SI and as
//! they are to be shown; out come text and JSON. A renderer reads the model and nothing else. `number.rs` is the only
//! place that formats numbers.

mod conventions;
mod diagnostics_json;
mod gather;
mod json;
mod model;
pub mod number;
#[cfg(test)]
mod sample;
mod species;
mod text;

pub use conventions::standing_conventions;
pub use diagnostics_json::render_diagnostics_json;
pub use gather::{TableValues, WorkedSheet, find_cautions, gather};
pub use json::render_json;
pub use model::{
    Caution, DataRow, DutyRow, Finding, InputRow, Item, LegKind, LegRow, MixtureRow, Path, PressureBasis,
    Quantity, Report, RequirementRow, ResultRow, Side, SiteRow, SpeciesRow, StateRow, StepRow, TableColumn,
    TableRow, TableRows,
};
pub use species::{
    PageChange, PageDatum, PagePhase, PageRow, SpeciesPage, render_plot, render_species_json,
    render_species_list, render_species_list_json, render_species_page, species_page,
};
pub use text::{Style, render_text};
