//! How the text is set: its width and whether it is coloured.

use std::ops::RangeInclusive;

/// The widths that the layout is made for.
const WIDTHS: RangeInclusive<usize> = 80..=120;

/// How the text is set.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Style {
    /// Whether the title, verdicts and warnings are coloured, by ANSI codes.
    pub colour: bool,
    /// The width in columns; below 80 it counts as 80, above 120 as 120.
    pub width: usize,
}

impl Default for Style {
    fn default() -> Self {
        Style { colour: false, width: 100 }
    }
}

impl Style {
    /// The width that is used.
    pub(super) fn columns(self) -> usize {
        self.width.clamp(*WIDTHS.start(), *WIDTHS.end())
    }

    /// The text in an ink, where colour is wanted.
    pub(super) fn painted(self, ink: Ink, text: &str) -> String {
        if self.colour { format!("\u{1b}[{}m{text}\u{1b}[0m", ink.code()) } else { text.to_owned() }
    }
}

/// What colour says beside the words.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Ink {
    /// A title.
    Title,
    /// A requirement that is met.
    Met,
    /// A requirement that is not met.
    NotMet,
    /// A warning or a caution.
    Warning,
}

impl Ink {
    /// The ink of a verdict.
    pub(super) fn of_verdict(met: bool) -> Ink {
        if met { Ink::Met } else { Ink::NotMet }
    }

    /// The number that selects it (ECMA-48, 8.3.117).
    fn code(self) -> &'static str {
        match self {
            Ink::Title => "1",
            Ink::Met => "32",
            Ink::NotMet => "31",
            Ink::Warning => "33",
        }
    }
}
