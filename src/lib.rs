//! heatpath: a language and interpreter for thermal process sheets.

pub mod check;
pub mod cli;
pub mod diagnostic;
pub mod eval;
pub mod library;
pub mod numeric;
pub mod plan;
pub mod program;
pub mod report;
pub mod session;
pub mod source;
pub mod span;
pub mod study;
pub mod syntax;
pub mod thermo;
pub mod units;
