//! What went wrong, as data.
//!
//! In come findings of any pass; out goes a [`Diagnostic`]: a stable code, one lower-case line, labels that tell
//! the role of each place, and help that could be pasted. Nothing here draws or prints: the front ends do.

mod code;
mod nearest;
mod wording;

pub use code::Code;
pub use nearest::nearest;
pub use wording::{and_list, count, or_list};

use crate::span::Span;

/// How grave a finding is.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Severity {
    /// The sheet cannot be worked as written.
    Error,
    /// The sheet is worked, but a reader could be misled.
    Warning,
    /// The work itself can hurt someone.
    Caution,
}

impl Severity {
    /// The word that stands in reports and JSON.
    pub fn as_str(self) -> &'static str {
        match self {
            Severity::Error => "error",
            Severity::Warning => "warning",
            Severity::Caution => "caution",
        }
    }
}

/// A place with its role in the finding.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Label {
    /// The place.
    pub span: Span,
    /// What the place has to do with it, such as "a temperature in `degC` here".
    pub text: String,
}

/// One finding. The first label is where it is reported.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Diagnostic {
    /// The stable code.
    pub code: Code,
    /// One lower-case line, user text in back-ticks.
    pub message: String,
    /// The places, the main one first.
    pub labels: Vec<Label>,
    /// A way out, which could be pasted.
    pub help: Option<String>,
}

impl Diagnostic {
    /// A finding with no place yet.
    pub fn new(code: Code, message: impl Into<String>) -> Self {
        Diagnostic { code, message: message.into(), labels: Vec::new(), help: None }
    }

    /// Adds a place and its role.
    #[must_use]
    pub fn label(mut self, span: Span, text: impl Into<String>) -> Self {
        self.labels.push(Label { span, text: text.into() });
        self
    }

    /// Sets the way out.
    #[must_use]
    pub fn help(mut self, text: impl Into<String>) -> Self {
        self.help = Some(text.into());
        self
    }

    /// How grave it is, from the code.
    pub fn severity(&self) -> Severity {
        self.code.severity()
    }

    /// Whether the sheet cannot be worked for it.
    pub fn is_error(&self) -> bool {
        self.severity() == Severity::Error
    }

    /// Where it is reported: the first label's place.
    pub fn place(&self) -> Option<Span> {
        self.labels.first().map(|label| label.span)
    }
}
