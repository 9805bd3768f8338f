//! Whether to colour, and how wide to print.

use super::arguments::When;
use std::io::IsTerminal;

/// The width where the terminal does not say one.
const WIDTH: usize = 100;

/// How a stream is to be written to.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) struct Look {
    /// Whether to colour.
    pub(super) colour: bool,
    /// The width in columns.
    pub(super) width: usize,
}

/// The look of a stream. `--color` decides; left to itself, a terminal is coloured unless `NO_COLOR` is set to
/// something (<https://no-color.org>). What is piped is always 100 columns wide, so that it is the same everywhere.
pub(super) fn look(when: When, stream: &impl IsTerminal) -> Look {
    let terminal = stream.is_terminal();
    let colour = match when {
        When::Always => true,
        When::Never => false,
        When::Auto => terminal && !is_set("NO_COLOR") && !is_dumb(),
    };
    Look { colour, width: if terminal { terminal_width() } else { WIDTH } }
}

fn is_set(variable: &str) -> bool {
    std::env::var_os(variable).is_some_and(|value| !value.is_empty())
}

fn is_dumb() -> bool {
    std::env::var_os("TERM").is_some_and(|term| term == "dumb")
}

fn terminal_width() -> usize {
    let columns = std::env::var("COLUMNS").ok().and_then(|columns| columns.parse().ok());
    columns.unwrap_or(WIDTH).clamp(60, 120)
}
