//! Failures of a run at their places in the sheet.
//!
//! In comes a failure, which carries the index of an operation; out goes a diagnostic at the place that the operation
//! came from, with the values, and a way out. One file per sort of failure.

mod arithmetic;
mod explain;
mod guard;
mod locate;
mod settle;
mod teller;

pub(super) use explain::{circle, explain, explain_row};
