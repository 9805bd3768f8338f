//! From a worked sheet to the report's model.
//!
//! In come the Program, its slots and their values; out comes a [`Report`](super::Report). Nothing is worked here but
//! what only a reader needs: legs, the ranges over which data are used, and formulas with numbers put in.

mod caution;
mod data;
mod display;
mod formula;
mod rows;
mod step;
mod usage;
mod worked;

pub use caution::find_cautions;
pub use rows::gather;
pub use worked::{TableValues, WorkedSheet};
