//! `check`: reads and unit-checks a sheet.

use super::arguments::{CheckArguments, Format, When};
use super::colour::look;
use super::draw::draw;
use super::sheet::{name_of, worked};
use super::status::Status;
use super::streams::{print, print_error};
use crate::diagnostic::Diagnostic;
use crate::report::render_diagnostics_json;
use crate::session;
use std::io;

/// Checks a sheet and says what was found.
pub(super) fn check(arguments: &CheckArguments, when: When) -> Status {
    let worked = worked(&arguments.sheet, session::check);
    let wrong = worked.diagnostics.iter().any(Diagnostic::is_error);
    let status = if wrong { Status::Wrong } else { Status::Well };
    if arguments.format == Format::Json {
        return print(&render_diagnostics_json(&worked.diagnostics, &worked.sources), status);
    }
    print_error(&draw(&worked.diagnostics, &worked.sources, look(when, &io::stderr())));
    if wrong {
        return status;
    }
    print(&format!("{}: no errors\n", name_of(&arguments.sheet)), status)
}
