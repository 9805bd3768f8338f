//! The command line: arguments in, text on the two standard streams and an exit status out.
//!
//! In come the arguments, the sheet's file and the files that it uses. Out come reports and lists on standard output,
//! diagnostics on standard error, and the exit status: 0 all well; 1 a requirement is not met; 2 the sheet or the
//! call is wrong. `arguments.rs` says what may be asked, each command has its file, `file.rs` and `folder.rs` read,
//! `draw.rs` draws diagnostics. Files, environment and terminal are touched here and nowhere else in the crate.
//!
//! Guaranteed: a closed pipe is no fault; nothing of a sheet reaches a terminal as a control sequence; a sheet reads
//! only files of its own folder.

mod arguments;
mod check;
mod colour;
mod draw;
mod excerpt;
mod explain;
mod file;
mod folder;
mod front;
mod run;
mod sheet;
mod species;
mod status;
mod streams;
mod units;

pub use front::main;
