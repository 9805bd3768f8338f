//! heatpath: a language and interpreter for thermal process sheets.

pub mod cli;
pub mod diagnostic;
pub mod library;
pub mod report;
pub mod session;
pub mod source;
pub mod span;
pub mod syntax;
pub mod units;
