//! `run`: works a sheet and prints its report.

use super::arguments::{Format, RunArguments, When};
use super::colour::look;
use super::draw::draw;
use super::sheet::worked;
use super::status::Status;
use super::streams::{print, print_error};
use crate::report::{Report, Style, render_diagnostics_json, render_json, render_text};
use crate::session::{self, Worked};
use std::io;

/// Works a sheet. The report holds the warnings and cautions, so they are not drawn beside it.
pub(super) fn run(arguments: &RunArguments, when: When) -> Status {
    let worked = worked(&arguments.sheet, session::run);
    if arguments.diagnostics == Format::Json {
        print_error(&render_diagnostics_json(&worked.diagnostics, &worked.sources));
    }
    match &worked.report {
        Some(report) => print(&rendered(report, arguments.format, when), verdict(report)),
        None => {
            if arguments.diagnostics == Format::Text {
                refuse(&worked, when);
            }
            Status::Wrong
        }
    }
}

fn rendered(report: &Report, format: Format, when: When) -> String {
    match format {
        Format::Json => render_json(report),
        Format::Text => {
            let look = look(when, &io::stdout());
            render_text(report, Style { colour: look.colour, width: look.width })
        }
    }
}

fn verdict(report: &Report) -> Status {
    if report.all_met() { Status::Well } else { Status::Unmet }
}

fn refuse(worked: &Worked, when: When) {
    print_error(&draw(&worked.diagnostics, &worked.sources, look(when, &io::stderr())));
}
