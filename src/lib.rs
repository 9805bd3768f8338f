//! heatpath: a language and interpreter for thermal process sheets.

pub mod diagnostic;
pub mod numeric;
pub mod span;
pub mod thermo;
