//! heatpath: a language and interpreter for thermal process sheets.

pub mod diagnostic;
pub mod span;
pub mod units;
