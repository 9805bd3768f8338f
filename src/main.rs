//! The `heatpath` program: hands its arguments on.

use std::process::ExitCode;

fn main() -> ExitCode {
    heatpath::cli::main(std::env::args_os())
}
