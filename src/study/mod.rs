//! Studies: one Plan at many points.
//!
//! In comes a lowered sheet with the values of its single run; out come the rows of its tables. What does not depend on
//! the varied input is taken from the single run, the rest is worked in blocks of lanes.

mod sweep;

pub use sweep::{RefusedRow, Sweep, sweep};
