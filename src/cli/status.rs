//! The exit status.

use std::process::ExitCode;

/// How a call ended.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Status {
    /// All is well.
    Well,
    /// A requirement is not met.
    Unmet,
    /// The sheet or the call is wrong.
    Wrong,
}

impl From<Status> for ExitCode {
    fn from(status: Status) -> ExitCode {
        ExitCode::from(match status {
            Status::Well => 0,
            Status::Unmet => 1,
            Status::Wrong => 2,
        })
    }
}
