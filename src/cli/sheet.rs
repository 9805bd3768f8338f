//! The sheet that a command names: its text, or why there is none.

use super::file::{Admitted, Fault, LIMIT, read_text, text_of};
use super::folder::FolderLoader;
use crate::diagnostic::{Code, Diagnostic};
use crate::library::Loader;
use crate::session::Worked;
use crate::source::Sources;
use crate::span::Span;
use std::path::Path;

/// How standard input is called in messages.
const STANDARD_INPUT: &str = "standard input";

/// The name of a sheet in messages.
pub(super) fn name_of(path: &Path) -> String {
    if path == Path::new("-") { STANDARD_INPUT.to_owned() } else { path.to_string_lossy().into_owned() }
}

/// A pass over a sheet: name, identity, text and loader in, what came of it out.
type Pass = fn(&str, &str, &str, &dyn Loader) -> Worked;

/// Reads the sheet at `path` (`-`: standard input) and hands it to `pass`. A sheet that cannot be read comes back
/// with the reason as its one diagnostic.
pub(super) fn worked(path: &Path, pass: Pass) -> Worked {
    let name = name_of(path);
    if path == Path::new("-") {
        let (loader, identity) = FolderLoader::here();
        return hand_on(&name, &identity, text_of(std::io::stdin().lock()), &loader, pass);
    }
    let (loader, identity) = FolderLoader::beside(path);
    hand_on(&name, &identity, read_text(path, Admitted::Any), &loader, pass)
}

fn hand_on(
    name: &str,
    identity: &str,
    text: Result<String, Fault>,
    loader: &dyn Loader,
    pass: Pass,
) -> Worked {
    match text {
        Ok(text) => pass(name, identity, &text, loader),
        Err(fault) => refused(name, fault),
    }
}

fn refused(name: &str, fault: Fault) -> Worked {
    let mut sources = Sources::new();
    let diagnostic = match fault {
        Fault::Unreadable(reason) => {
            Diagnostic::new(Code::FileUnreadable, format!("`{name}` cannot be opened: {reason}"))
        }
        Fault::TooLarge => {
            Diagnostic::new(Code::FileTooLarge, format!("`{name}` is larger than {} MB", LIMIT / 1_000_000))
        }
        Fault::NotUtf8 { bytes, offset } => not_utf8(name, &bytes, offset, &mut sources),
    };
    Worked { sources, diagnostics: vec![diagnostic], report: None }
}

/// The refusal at the offending byte; its source is shown with the replacement character there.
fn not_utf8(name: &str, bytes: &[u8], offset: usize, sources: &mut Sources) -> Diagnostic {
    let file = sources.add(name, String::from_utf8_lossy(bytes));
    let byte = bytes.get(offset).copied().unwrap_or_default();
    let (line, _) = sources.line_column(file, u32::try_from(offset).unwrap_or(u32::MAX));
    let message = format!("`{name}` is not UTF-8 text: byte {offset}, on line {line}, is 0x{byte:02X}");
    Diagnostic::new(Code::NotUtf8, message)
        .label(Span::new(file, offset, offset + '\u{fffd}'.len_utf8()), "no UTF-8 here")
        .help("save the sheet as UTF-8, or use the ASCII spellings, such as `degC`")
}
