//! The program as its users start it.

use std::ffi::OsStr;
use std::io::{Read, Write};
use std::path::{Path, PathBuf};
use std::process::{Child, Command, Stdio};
use std::thread::{self, JoinHandle};
use std::time::{Duration, Instant};

/// What came of a call.
#[derive(Debug)]
pub(crate) struct Ran {
    /// The exit status; `None` where a signal or the clock ended it.
    pub(crate) status: Option<i32>,
    /// Standard output.
    pub(crate) stdout: String,
    /// Standard error.
    pub(crate) stderr: String,
}

/// Calls the program in the root of the repository; nothing on standard input.
pub(crate) fn heatpath<S: AsRef<OsStr>>(arguments: &[S]) -> Ran {
    within(command(arguments), b"", Duration::from_secs(60))
}

/// Calls the program with a text on standard input.
pub(crate) fn heatpath_reading<S: AsRef<OsStr>>(arguments: &[S], input: &[u8]) -> Ran {
    within(command(arguments), input, Duration::from_secs(60))
}

/// The call, in an environment that says nothing about colour or width.
pub(crate) fn command<S: AsRef<OsStr>>(arguments: &[S]) -> Command {
    let mut command = Command::new(env!("CARGO_BIN_EXE_heatpath"));
    command.args(arguments).current_dir(env!("CARGO_MANIFEST_DIR"));
    for variable in ["NO_COLOR", "FORCE_COLOR", "CLICOLOR_FORCE", "COLUMNS"] {
        command.env_remove(variable);
    }
    command
}

/// Runs a call to its end; one that is not done in time is ended, and has no status.
pub(crate) fn within(mut command: Command, input: &[u8], limit: Duration) -> Ran {
    let streams = command.stdin(Stdio::piped()).stdout(Stdio::piped()).stderr(Stdio::piped());
    let mut child = streams.spawn().expect("the program starts");
    let stdout = reader(child.stdout.take());
    let stderr = reader(child.stderr.take());
    let mut stdin = child.stdin.take().expect("standard input is a pipe");
    let input = input.to_vec();
    // A program that does not read its input closes the pipe, which is no concern of the test.
    let writer = thread::spawn(move || stdin.write_all(&input).unwrap_or_default());
    let status = ended(&mut child, limit);
    writer.join().expect("the writer ends");
    Ran { status, stdout: stdout.join().expect("a text"), stderr: stderr.join().expect("a text") }
}

fn reader(stream: Option<impl Read + Send + 'static>) -> JoinHandle<String> {
    thread::spawn(move || {
        let mut bytes = Vec::new();
        stream.expect("the stream is a pipe").read_to_end(&mut bytes).expect("a pipe can be read");
        String::from_utf8_lossy(&bytes).into_owned()
    })
}

fn ended(child: &mut Child, limit: Duration) -> Option<i32> {
    let start = Instant::now();
    while start.elapsed() < limit {
        if let Some(status) = child.try_wait().expect("the child is ours") {
            return status.code();
        }
        thread::sleep(Duration::from_millis(1));
    }
    child.kill().expect("the child is ours");
    child.wait().expect("the child is ours").code()
}

/// A path below the root of the repository.
pub(crate) fn path(below: &str) -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join(below)
}

/// An empty folder for the files of one test.
pub(crate) fn scratch(name: &str) -> PathBuf {
    let folder = Path::new(env!("CARGO_TARGET_TMPDIR")).join(name);
    if folder.exists() {
        std::fs::remove_dir_all(&folder).expect("the folder is ours");
    }
    std::fs::create_dir_all(&folder).expect("the folder is ours");
    folder
}
