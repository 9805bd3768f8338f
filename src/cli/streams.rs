//! Writing to the standard streams.

use super::status::Status;
use std::io::{self, ErrorKind, Write};

/// Writes to standard output. A reader that closed the pipe has read enough, which is no fault; on any other failure
/// the status becomes [`Status::Wrong`].
pub(super) fn print(text: &str, status: Status) -> Status {
    match write_all(io::stdout().lock(), text) {
        Ok(()) => status,
        Err(error) => {
            complain(&format!("standard output cannot be written: {error}"), None);
            Status::Wrong
        }
    }
}

/// Writes to standard error. Nobody is left to tell of a failure, so there is no answer.
pub(super) fn print_error(text: &str) {
    write_all(io::stderr().lock(), text).unwrap_or_default();
}

/// Says what is wrong with the call, with a way out.
pub(super) fn complain(message: &str, help: Option<&str>) {
    let help = help.map(|help| format!("\n  help: {help}\n")).unwrap_or_default();
    print_error(&plain(&format!("error: {message}\n{help}")));
}

fn write_all(mut stream: impl Write, text: &str) -> io::Result<()> {
    match stream.write_all(text.as_bytes()).and_then(|()| stream.flush()) {
        Err(error) if error.kind() == ErrorKind::BrokenPipe => Ok(()),
        written => written,
    }
}

/// A text of several lines with everything taken out that a terminal would obey.
fn plain(text: &str) -> String {
    text.chars().map(|c| if c == '\n' { c } else { visible(c) }).collect()
}

/// A character as it may reach a terminal: a control character, or one that turns the direction of writing, becomes
/// the replacement character.
pub(super) fn visible(c: char) -> char {
    let turns = matches!(c, '\u{200e}' | '\u{200f}' | '\u{202a}'..='\u{202e}' | '\u{2066}'..='\u{2069}');
    if c.is_control() || turns { '\u{fffd}' } else { c }
}
