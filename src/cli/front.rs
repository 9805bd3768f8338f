//! From the arguments to a command and its exit status.

use super::arguments::{Arguments, Command};
use super::status::Status;
use super::streams::{complain, print, print_error};
use super::{check, explain, run, species, units};
use clap::Parser;
use std::ffi::OsString;
use std::process::ExitCode;
use std::thread;

/// The stack of the thread that works the sheet.
const STACK: usize = 256 << 20;

/// Does what the arguments ask, the program's name first, and gives the exit status: 0 all well; 1 a requirement is
/// not met; 2 the sheet or the call is wrong.
pub fn main(arguments: impl IntoIterator<Item = OsString>) -> ExitCode {
    match Arguments::try_parse_from(arguments) {
        Ok(arguments) => on_own_stack(arguments).into(),
        Err(answer) => say(&answer).into(),
    }
}

/// What clap has to say: the help or the version that were asked for, or what is wrong with the call.
fn say(answer: &clap::Error) -> Status {
    let text = answer.render().to_string();
    if answer.use_stderr() {
        print_error(&text);
        return Status::Wrong;
    }
    print(&text, Status::Well)
}

fn on_own_stack(arguments: Arguments) -> Status {
    let worker = thread::Builder::new().stack_size(STACK).spawn(move || obey(&arguments));
    match worker.map(thread::JoinHandle::join) {
        Ok(Ok(status)) => status,
        Ok(Err(_)) => Status::Wrong,
        Err(error) => {
            complain(&format!("no thread can be started: {error}"), None);
            Status::Wrong
        }
    }
}

fn obey(arguments: &Arguments) -> Status {
    match &arguments.command {
        Command::Run(run) => run::run(run, arguments.color),
        Command::Check(check) => check::check(check, arguments.color),
        Command::Species(word) => species::species(word),
        Command::Units(units) => units::units(units),
        Command::Explain(explain) => explain::explain(explain),
    }
}
