//! Marks that mislead: commas and points in numbers, control characters. Each costs its statement.

use super::cutter::Cutter;
use crate::diagnostic::{Code, Diagnostic};

impl Cutter<'_> {
    /// A comma between two digits of a number: decimal comma or thousands separator, never guessed.
    pub(super) fn comma(&mut self, at: usize) {
        let digit = |i: usize| self.source.get(i).is_some_and(u8::is_ascii_digit);
        if !(digit(at + 1) && at > 0 && digit(at - 1) && self.number_ends(at)) {
            return;
        }
        let start = self.number_start(at);
        let end = (at + 1..self.source.len())
            .find(|&i| !self.source[i].is_ascii_digit())
            .unwrap_or(self.source.len());
        let whole = String::from_utf8_lossy(&self.source[start..at]).into_owned();
        let after = String::from_utf8_lossy(&self.source[at + 1..end]).into_owned();
        let help = if after.len() == 3 && whole != "0" {
            format!(
                "write `{whole}{after}` if it separates thousands, `{whole}.{after}` if it is the decimal sign"
            )
        } else {
            format!("write `{whole}.{after}`; between two numbers of a list, a blank after the comma")
        };
        if !self.entry.as_ref().is_some_and(|entry| entry.broken) {
            self.diagnostics.push(
                Diagnostic::new(Code::DecimalComma, format!("a comma inside the number `{whole},{after}`"))
                    .label(self.span(start..end), "read as a decimal sign by some, as a separator by others")
                    .help(help),
            );
        }
        self.break_entry(at);
    }

    /// A decimal point wants a digit on both sides.
    pub(super) fn point(&mut self, at: usize) {
        let digit = |i: usize| self.source.get(i).is_some_and(u8::is_ascii_digit);
        let before = at > 0 && digit(at - 1) && self.number_ends(at);
        let wordlike = |byte: u8| byte.is_ascii_alphanumeric() || byte == b'_' || byte == b')' || byte >= 128;
        let leading = digit(at + 1) && (at == 0 || !wordlike(self.source[at - 1]));
        let trailing = before && !digit(at + 1);
        if !(leading || trailing) || self.entry.as_ref().is_some_and(|entry| entry.broken) {
            return;
        }
        let start = if trailing { self.number_start(at) } else { at };
        let end = (at + 1..self.source.len())
            .find(|&i| !self.source[i].is_ascii_digit())
            .unwrap_or(self.source.len());
        let written = String::from_utf8_lossy(&self.source[start..end]).into_owned();
        let right = if trailing { format!("{written}0") } else { format!("0{written}") };
        self.diagnostics.push(
            Diagnostic::new(
                Code::BareDecimalPoint,
                format!("the number `{written}` lacks a digit beside its point"),
            )
            .label(self.span(start..end), "a point is easily lost here")
            .help(format!("write `{right}`")),
        );
        self.break_entry(at);
    }

    /// Whether the digits just before `at` are a number and not the end of a name.
    fn number_ends(&self, at: usize) -> bool {
        let start = self.number_start(at);
        start == 0 || {
            let before = self.source[start - 1];
            !(before.is_ascii_alphanumeric() || before == b'_' || before >= 128)
        }
    }

    fn number_start(&self, at: usize) -> usize {
        let mut start = at;
        while start > 0 && (self.source[start - 1].is_ascii_digit() || self.source[start - 1] == b'.') {
            start -= 1;
        }
        start
    }

    pub(super) fn control(&mut self, at: usize) {
        if !self.entry.as_ref().is_some_and(|entry| entry.broken) {
            self.diagnostics.push(
                Diagnostic::new(
                    Code::ControlCharacter,
                    format!("a control character (U+{:04X}) in the sheet", self.source[at]),
                )
                .label(self.span(at..at + 1), "no printed sheet would show it")
                .help("take it out; a sheet holds printable text, tabs and line ends"),
            );
        }
        self.break_entry(at);
    }
}
